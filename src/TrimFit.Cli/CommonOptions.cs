using System.Collections.Immutable;
using System.CommandLine;
using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Units;
using TrimFit.Import;
using TrimFit.Import.Flights;
using TrimFit.Reporting;

namespace TrimFit.Cli;

/// <summary>Options that several commands share. Values arrive as text and are read here, so that every message is our own and in one style.</summary>
internal sealed class CommonOptions
{
    private readonly Option<string?> _json = new("--json") { Description = "Write the result as JSON to a file, or to standard output with -.", HelpName = "FILE|-" };
    private readonly Option<string[]> _report = new("--report") { Description = "Write a report for people: .html or .md. May be given more than once.", HelpName = "FILE" };
    private readonly Option<bool> _quiet = new("--quiet") { Description = "Only the answer, and only errors beside it." };
    private readonly Option<bool> _strict = new("--strict") { Description = "A row left out is an error (exit 3)." };
    private readonly Option<string?> _units = new("--units") { Description = "Units of what people read: metric or imperial.", HelpName = "metric|imperial" };
    private readonly Option<string?> _culture = new("--culture") { Description = "Number style of what people read, such as de-DE.", HelpName = "NAME" };
    private readonly Option<string?> _language = new("--language") { Description = "Language of what people read: en (English) or de (German). JSON and messages stay English.", HelpName = "en|de" };
    private readonly Option<string[]> _column = new("--column") { Description = "What a column is; overrules every guess. May be given more than once.", HelpName = "ROLE=NAME[:UNIT]" };
    private readonly Option<string?> _balance = new("--balance-thrust") { Description = "Where the turn is to be nulled: newtons, cruise (level flight), full or even.", HelpName = "N|cruise|full|even" };
    private readonly Option<string?> _tolerance = new("--tolerance") { Description = "Turn rate that counts as no pull, deg/s (1.0).", HelpName = "DEG_S" };
    private readonly Option<string?> _seed = new("--seed") { Description = "Seed of the random draws; the same seed gives the same result (1).", HelpName = "N" };

    public void AddForPeople(Command command)
    {
        command.Options.Add(_json);
        command.Options.Add(_report);
        AddForReading(command);
    }

    public void AddForReading(Command command)
    {
        command.Options.Add(_units);
        command.Options.Add(_culture);
        command.Options.Add(_language);
        AddQuiet(command);
    }

    /// <summary>For commands that answer in a few lines and write no report.</summary>
    public void AddForAnswers(Command command)
    {
        command.Options.Add(_json);
        command.Options.Add(_units);
        command.Options.Add(_culture);
        AddQuiet(command);
    }

    public void AddForLogs(Command command)
    {
        command.Options.Add(_column);
        command.Options.Add(_strict);
    }

    public void AddForFit(Command command)
    {
        command.Options.Add(_balance);
        command.Options.Add(_tolerance);
        AddSeed(command);
    }

    public void AddSeed(Command command) => command.Options.Add(_seed);

    public void AddQuiet(Command command) => command.Options.Add(_quiet);

    /// <summary>The options as values.</summary>
    /// <exception cref="CommandLineException">A value is none of those it may be.</exception>
    public CommonChoices Choices(ParseResult parsed) => new()
    {
        Json = parsed.GetValue(_json),
        Reports = [.. (parsed.GetValue(_report) ?? []).Select(ReportPath)],
        Quiet = parsed.GetValue(_quiet),
        Strict = parsed.GetValue(_strict),
        Style = Style(parsed.GetValue(_units), parsed.GetValue(_culture), parsed.GetValue(_language)),
        Columns = [.. (parsed.GetValue(_column) ?? []).Select(Column)],
        Balance = Balance(parsed.GetValue(_balance)),
        Tolerance = Tolerance(parsed.GetValue(_tolerance)),
        Seed = Seed(parsed.GetValue(_seed)),
        TrimOptionsGiven = parsed.GetValue(_balance) is not null || parsed.GetValue(_tolerance) is not null || parsed.GetValue(_seed) is not null,
    };

    private static string ReportPath(string path) => ReportPath("--report", path);

    /// <summary>A name that ends as a report may.</summary>
    /// <exception cref="CommandLineException">It does not.</exception>
    public static string ReportPath(string option, string path) => Path.GetExtension(path).ToUpperInvariant() is ".HTML" or ".HTM" or ".MD"
        ? path
        : throw new CommandLineException($"{option}: found \"{path}\", expected a name that ends in .html or .md.");

    private static UnitSystem Units(string? text) => text switch
    {
        null or "metric" => UnitSystem.Metric,
        "imperial" => UnitSystem.Imperial,
        _ => throw new CommandLineException($"--units: found \"{text}\", expected metric or imperial."),
    };

    private static ReportStyle Style(string? units, string? culture, string? language)
    {
        var style = new ReportStyle { Units = Units(units), Language = Language(language) };
        return culture is null ? style : style with { Culture = Culture(culture) }; // else the numbers follow the language
    }

    private static ReportLanguage Language(string? text) => text switch
    {
        null or "en" => ReportLanguage.English,
        "de" => ReportLanguage.German,
        _ => throw new CommandLineException($"--language: found \"{text}\", expected en or de."),
    };

    private static CultureInfo Culture(string name)
    {
        try
        {
            return CultureInfo.GetCultureInfo(name, predefinedOnly: true);
        }
        catch (CultureNotFoundException)
        {
            throw new CommandLineException($"--culture: found \"{name}\", expected a culture this machine knows, such as de-DE.");
        }
    }

    internal static ColumnRule Column(string text)
    {
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        if (equals <= 0 || equals == text.Length - 1)
            throw new CommandLineException($"--column: found \"{text}\", expected ROLE=NAME or ROLE=NAME:UNIT.");
        string role = text[..equals].Trim(), name = text[(equals + 1)..];
        if (!ChannelRoles.TryParse(role, out ChannelRole channel))
            throw new CommandLineException($"--column: \"{role}\" is no role; the roles are {string.Join(", ", ChannelRoles.Names)}.");
        int colon = name.LastIndexOf(':'); // after the last colon stands a unit only if it is one: column names may hold colons
        return colon > 0 && LogUnits.TryParse(name[(colon + 1)..].Trim(), out _)
            ? new(channel, name[..colon].Trim(), name[(colon + 1)..].Trim())
            : new(channel, name.Trim(), null);
    }

    private static BalanceThrust Balance(string? text) => text switch
    {
        null or "cruise" => BalanceThrust.Cruise,
        "full" => BalanceThrust.Full,
        "even" => BalanceThrust.Even,
        _ => Number(text) is double n && n >= 0 ? BalanceThrust.At(n)
            : throw new CommandLineException($"--balance-thrust: found \"{text}\", expected a thrust in newtons, cruise, full or even."),
    };

    private static AngularRate Tolerance(string? text) => text is null
        ? AngularRate.FromDegPerSec(1)
        : Number(text) is double d && d > 0 ? AngularRate.FromDegPerSec(d)
        : throw new CommandLineException($"--tolerance: found \"{text}\", expected a turn rate above 0 in deg/s, such as 1.5.");

    /// <summary>What was changed between two settings.</summary>
    /// <exception cref="CommandLineException">The word is none of those it may be.</exception>
    public static ChangedPart? Changed(string? text)
    {
        if (text is null)
            return null;
        foreach ((string word, ChangedPart part) in FlightListReader.ChangedWords)
        {
            if (word == text)
                return part;
        }
        throw new CommandLineException($"--changed: found \"{text}\", expected {string.Join(", ", FlightListReader.ChangedWords.Select(w => w.Word))}.");
    }

    /// <summary>Scatter of the pull from flight to flight.</summary>
    /// <exception cref="CommandLineException">Not a turn rate of 0 or more.</exception>
    public static FlightScatter Scatter(string? text) => text is null
        ? FlightScatter.Usual
        : Number(text) is double d && d >= 0 ? FlightScatter.Known(AngularRate.FromDegPerSec(d))
        : throw new CommandLineException($"--flight-scatter: found \"{text}\", expected a turn rate of 0 or more in deg/s, such as 0.3.");

    private static ulong? Seed(string? text) => text is null
        ? null
        : ulong.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out ulong seed) ? seed
        : throw new CommandLineException($"--seed: found \"{text}\", expected a whole number of 0 or more.");

    /// <summary>A number of threads; all cores when not given.</summary>
    public static int Threads(string? text) => text is null
        ? Environment.ProcessorCount
        : int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out int threads) && threads > 0 ? threads
        : throw new CommandLineException($"--threads: found \"{text}\", expected a whole number above 0.");

    private static double? Number(string text) =>
        double.TryParse(text, NumberStyles.AllowDecimalPoint | NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value) ? value : null;
}

/// <summary>The shared options as values.</summary>
internal sealed record CommonChoices
{
    public required string? Json { get; init; }
    public required ImmutableArray<string> Reports { get; init; }
    public required bool Quiet { get; init; }
    public required bool Strict { get; init; }
    public required ReportStyle Style { get; init; }
    public required ImmutableArray<ColumnRule> Columns { get; init; }
    public required BalanceThrust Balance { get; init; }
    public required AngularRate Tolerance { get; init; }
    public required ulong? Seed { get; init; }

    /// <summary>Whether any option of the analysis was given, which overrules those a report carries.</summary>
    public bool TrimOptionsGiven { get; init; }

    /// <summary>Options of the analysis.</summary>
    public TrimOptions TrimOptions => new() { BalanceThrust = Balance, Tolerance = Tolerance, Seed = Seed ?? 1 };
}
