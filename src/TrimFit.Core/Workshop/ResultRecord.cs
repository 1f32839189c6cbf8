using System.Collections.Immutable;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Workshop;

/// <summary>A result with what it was made of and by: the exact logs, rig file and sheet, the options and the program's version.</summary>
public sealed record ResultRecord
{
    /// <summary>Kind of a result of one flight.</summary>
    public const string FitKind = "fit";

    /// <summary>Kind of a comparison of flights before and after a change.</summary>
    public const string CompareKind = "compare";

    /// <summary>Number in its job, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>When it was made, UTC.</summary>
    public required DateTimeOffset Made { get; init; }

    /// <summary><see cref="FitKind"/> or <see cref="CompareKind"/>.</summary>
    public required string Kind { get; init; }

    /// <summary>Number of the flight it is about; of a comparison the last flight after the change.</summary>
    public required int Flight { get; init; }

    /// <summary>Version of the program that made it.</summary>
    public required string ProgramVersion { get; init; }

    /// <summary>The choices that made it, as the words of the command line.</summary>
    public required string Options { get; init; }

    /// <summary>SHA-256 of the result as JSON, lower-case hex; the book keeps the text.</summary>
    public required string Sha256 { get; init; }

    /// <summary>Every file it rests on.</summary>
    public ImmutableArray<InputRecord> Inputs { get; init; } = [];

    /// <summary>The verdict's word, such as <c>power_pull</c>.</summary>
    public required string Verdict { get; init; }

    /// <summary>The strength's word, such as <c>weak</c>.</summary>
    public required string Strength { get; init; }

    /// <summary>Turn rate at the balance thrust, rad/s, right positive; null when it could not be told.</summary>
    public double? RateRadPerSec { get; init; }

    /// <summary>Its 95 % interval; null with the rate.</summary>
    public ConfidenceInterval? RateInterval95 { get; init; }

    /// <summary>What the result tells the shop's memory; empty when it measured no sensitivity.</summary>
    public ImmutableArray<SensitivityRecord> Sensitivities { get; init; } = [];
}
