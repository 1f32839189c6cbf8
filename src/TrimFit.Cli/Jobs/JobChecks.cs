using System.Collections.Immutable;
using System.Globalization;
using TrimFit.Core.Ground;
using TrimFit.Core.Workshop;
using TrimFit.Jobs;
using TrimFit.Reporting.Jobs;

namespace TrimFit.Cli;

/// <summary><c>job checks</c> with a job: outcomes and numbers into the book.</summary>
internal static class JobChecks
{
    public static int Run(JobChoices choices, long number, string[] made, string by, string note, TextWriter output)
    {
        CheckRecord[] checks = [.. made.Select(text => Check(text) with { By = by, Note = note })];
        using JobBook book = choices.Open(BookAccess.Write);
        ImmutableArray<CheckRecord> kept = book.AddChecks(number, checks, JobChoices.Now);
        if (choices.Common.Json == "-")
            output.Write(JobText.Write(book.Job(number)));
        else
            output.Write(string.Concat(kept.Select(c => JobReportText.Kept(new JobEvent.Checked(c), number, choices.Common.Style))));
        return ExitCode.Done;
    }

    private static CheckRecord Check(string text)
    {
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        if (equals <= 0)
            throw new CommandLineException($"--done: found \"{text}\", expected CHECK=OUTCOME or CHECK=OUTCOME:NUMBER, such as brake_lines=pass:4mm.");
        SimpleCause cause = CommandWords.Parse<SimpleCause>("--done", text[..equals].Trim());
        string[] parts = text[(equals + 1)..].Split(':', 2, StringSplitOptions.TrimEntries);
        var check = new CheckRecord { Number = 0, Made = default, Code = CommandWords.Of(cause), Outcome = CommandWords.Parse<CheckOutcome>("--done", parts[0]) };
        if (parts.Length == 1)
            return check;
        int digits = parts[1].TakeWhile(c => char.IsAsciiDigit(c) || c is '.' or '-' or '+').Count();
        return double.TryParse(parts[1].AsSpan(0, digits), NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double value)
            ? check with { Value = value, Unit = parts[1][digits..].Trim() }
            : throw new CommandLineException($"--done: found \"{parts[1]}\" as the number of {text[..equals]}, expected a number with a decimal point and its unit, such as 4mm.");
    }
}
