using System.CommandLine;
using TrimFit.Jobs;

namespace TrimFit.Cli;

/// <summary>Options that all verbs of <c>job</c> share.</summary>
internal sealed class JobOptions(TextWriter error, bool logs = false)
{
    private readonly CommonOptions _common = new();
    private readonly Option<string?> _book = new("--book")
    {
        Description = "The job book. Without it: trimfit/jobs.trimfit-book in the user's data folder (XDG_DATA_HOME where it is set, else ~/.local/share).",
        HelpName = "FILE",
    };

    public void Add(Command command, bool report = false)
    {
        command.Options.Add(_book);
        if (logs || report)
            _common.AddForPeople(command);
        else
            _common.AddForAnswers(command);
        if (logs)
        {
            _common.AddForLogs(command);
            _common.AddForFit(command);
        }
    }

    /// <summary>For a command that analyses what the book has.</summary>
    public void AddForFit(Command command)
    {
        Add(command, report: true);
        _common.AddForFit(command);
    }

    /// <summary>For a command that has the others already.</summary>
    public void AddBook(Command command) => command.Options.Add(_book);

    public JobChoices Choices(ParseResult parsed)
    {
        string? told = parsed.GetValue(_book);
        if (told is { Length: 0 })
            throw new CommandLineException("--book: found nothing, expected a file.");
        string path = told ?? JobBook.DefaultPath
            ?? throw new CommandLineException("This machine has no data folder of the user (HOME is not set). Name the job book: --book FILE.");
        return new(path, told is null, _common.Choices(parsed), error);
    }
}

/// <summary>The shared options as values.</summary>
/// <param name="Book">The book's file.</param>
/// <param name="BookIsDefault">Nobody named it, so it is said where it is.</param>
/// <param name="Common">Options that other commands have too.</param>
/// <param name="Error">Where everything but results goes.</param>
internal sealed record JobChoices(string Book, bool BookIsDefault, CommonChoices Common, TextWriter Error)
{
    /// <summary>The time as the book keeps it, to the millisecond.</summary>
    public static DateTimeOffset Now
    {
        get
        {
            DateTimeOffset now = TimeProvider.System.GetUtcNow();
            return now.AddTicks(-(now.Ticks % TimeSpan.TicksPerMillisecond));
        }
    }

    /// <summary>Opens the book and says where it is when nobody named it.</summary>
    public JobBook Open(BookAccess access)
    {
        JobBook book = JobBook.Open(Book, access, Now);
        if (BookIsDefault && !Common.Quiet)
            Error.Write(TrimFit.Reporting.Jobs.JobReportText.BookAt(Book, Common.Style));
        return book;
    }
}
