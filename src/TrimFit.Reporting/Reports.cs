using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;

namespace TrimFit.Reporting;

/// <summary>Everything a report of <c>fit</c> shows.</summary>
public sealed record FitReport
{
    /// <summary>The result.</summary>
    public required TrimAnalysis Analysis { get; init; }

    /// <summary>The flight with the account of how it was read.</summary>
    public required FlightImport Import { get; init; }

    /// <summary>The rig file.</summary>
    public required SourceFile RigFile { get; init; }

    /// <summary>The flight sheet; null when none was given.</summary>
    public SourceFile? SheetFile { get; init; }

    /// <summary>Whether the flight reached what its test card promised; null without a card.</summary>
    public CardOutcome? CardOutcome { get; init; }

    /// <summary>What the page carries of its own input.</summary>
    public CarriedInput Carried { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}

/// <summary>Everything a test card shows.</summary>
public sealed record CardReport
{
    /// <summary>The card, or why there is none.</summary>
    public required CardPlan Plan { get; init; }

    /// <summary>The rig.</summary>
    public required Rig Rig { get; init; }

    /// <summary>The rig file.</summary>
    public required SourceFile RigFile { get; init; }

    /// <summary>The result of the last flight it is planned from; null when none was given.</summary>
    public SourceFile? FromFile { get; init; }

    /// <summary>Number of the sealed order of a blind trial; null when it is none.</summary>
    public string? BlindCommitment { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}

/// <summary>Everything a report of <c>inspect</c> shows.</summary>
public sealed record InspectReport
{
    /// <summary>The flight with the account of how it was read.</summary>
    public required FlightImport Import { get; init; }

    /// <summary>Wind; null when it could not be found.</summary>
    public Wind? Wind { get; init; }

    /// <summary>The gyro; null without one.</summary>
    public GyroReport? Gyro { get; init; }

    /// <summary>What the sensors say about each other.</summary>
    public ImmutableArray<Finding> Findings { get; init; } = [];

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}

/// <summary>Everything a report of <c>rig</c> shows.</summary>
public sealed record RigSheetReport
{
    /// <summary>The rig.</summary>
    public required Rig Rig { get; init; }

    /// <summary>Its statics and adjustments.</summary>
    public required RigReport Statics { get; init; }

    /// <summary>The rig file.</summary>
    public required SourceFile RigFile { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}
