using System.Collections.Immutable;

namespace TrimFit.Core.Logs;

/// <summary>What the import read, what it left out and why, and what it inferred.</summary>
public sealed record ImportDiagnostics
{
    /// <summary>One entry for each file read, in the order given.</summary>
    public required ImmutableArray<InputFile> Files { get; init; }

    /// <summary>Rate, duration and gaps of the joined flight.</summary>
    public required SamplingSummary Sampling { get; init; }

    /// <summary>Faults the analysis survives, each a whole sentence that a pilot understands.</summary>
    public ImmutableArray<Notice> Warnings { get; init; } = [];

    /// <summary>Rows left out over all files.</summary>
    public int RowsLeftOut => Files.Sum(f => f.LeftOut.Sum(l => l.Rows));
}

/// <summary>One file as it was read.</summary>
public sealed record InputFile
{
    /// <summary>File name without its folder.</summary>
    public required string Name { get; init; }

    /// <summary>SHA-256 of the bytes, lower-case hex.</summary>
    public required string Sha256 { get; init; }

    /// <summary>What the file is, in words: delimiter, encoding, decimal mark, such as <c>CSV, semicolon, decimal comma, UTF-8</c>.</summary>
    public required string Format { get; init; }

    /// <summary>Data rows in the file; equals rows used plus rows left out.</summary>
    public required int RowsRead { get; init; }

    /// <summary>Rows left out, by reason.</summary>
    public ImmutableArray<RowsLeftOut> LeftOut { get; init; } = [];

    /// <summary>Every column with what became of it, in the file's order.</summary>
    public ImmutableArray<ColumnUse> Columns { get; init; } = [];

    /// <summary>Seconds added to this file's clock to bring it to the flight's; null when it is the only file or shares the clock.</summary>
    public double? ClockOffsetSec { get; init; }

    /// <summary>Standard error of <see cref="ClockOffsetSec"/>, s; null when the clocks are the same by their stamps.</summary>
    public double? ClockOffsetStdErrorSec { get; init; }
}

/// <summary>Rows left out for one reason.</summary>
/// <param name="Reason">Why, in the pilot's words.</param>
/// <param name="Rows">How many rows.</param>
/// <param name="FirstLine">Line of the first of them in the file, counted from 1.</param>
public sealed record RowsLeftOut(string Reason, int Rows, int FirstLine);

/// <summary>What became of one column.</summary>
/// <param name="Name">Name in the header, or <c>column 3</c> without a header.</param>
/// <param name="Role">The role it was given; null when it is not used.</param>
/// <param name="Unit">Unit the file's numbers were taken to be in; empty when none.</param>
/// <param name="Basis">How role and unit were decided: name, header, units row, told, inferred from the data; empty when not used.</param>
/// <param name="Missing">Cells without a value.</param>
public sealed record ColumnUse(string Name, ChannelRole? Role, string Unit, string Basis, int Missing);

/// <summary>Rate, duration and gaps.</summary>
public sealed record SamplingSummary
{
    /// <summary>Absolute time of the first sample; null when no logger knew the date.</summary>
    public DateTimeOffset? Start { get; init; }

    /// <summary>Whether <see cref="Start"/> is known to be UTC; else its zone is the logger's own.</summary>
    public bool StartIsUtc { get; init; }

    /// <summary>From first to last sample, s.</summary>
    public required double DurationSec { get; init; }

    /// <summary>Rate of the fastest channel, Hz: one over the median step between its samples.</summary>
    public required double RateHz { get; init; }

    /// <summary>Pauses longer than five median steps and longer than 2 s.</summary>
    public ImmutableArray<TimeGap> Gaps { get; init; } = [];
}

/// <summary>A pause in the record.</summary>
/// <param name="StartSec">Time of the last sample before it.</param>
/// <param name="DurationSec">Its length, s.</param>
public sealed record TimeGap(double StartSec, double DurationSec);

/// <summary>One message with a code that scripts can rely on.</summary>
/// <param name="Code">Lower-case words joined by underscores.</param>
/// <param name="Message">A whole sentence, in the pilot's words.</param>
public sealed record Notice(string Code, string Message);
