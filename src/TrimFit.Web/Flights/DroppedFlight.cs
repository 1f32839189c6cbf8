using System.Collections.Immutable;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Import;
using TrimFit.Reporting;

namespace TrimFit.Web.Flights;

/// <summary>One file as it was dropped. Its bytes lie under a number; the name is for people only.</summary>
/// <param name="Name">File name without folder or control characters.</param>
/// <param name="Path">Where the bytes are.</param>
/// <param name="Bytes">Their length.</param>
internal sealed record StoredFile(string Name, string Path, long Bytes)
{
    /// <summary>For messages.</summary>
    public bool Exists => File.Exists(Path);
}

/// <summary>A flight that was dropped, and what was recognised in it.</summary>
internal sealed record DroppedFlight
{
    /// <summary>Logs; their bytes are gone once the flight was worked out.</summary>
    public required ImmutableArray<StoredFile> Logs { get; init; }

    /// <summary>The sheet's name and bytes; null without one.</summary>
    public (string Name, byte[] Bytes)? Sheet { get; init; }

    /// <summary>What the person said about columns.</summary>
    public ImmutableArray<ColumnRule> Rules { get; init; } = [];

    /// <summary>Whether a rule was remembered from an earlier flight of the same logger.</summary>
    public bool RulesRemembered { get; init; }

    /// <summary>What was recognised; null when it cannot be read.</summary>
    public RecognisedFlight? Recognised { get; init; }

    /// <summary>Why it cannot be read; empty when it can.</summary>
    public string Problem { get; init; } = "";

    /// <summary>The beginning of each log.</summary>
    public ImmutableArray<LogPreview> Previews { get; init; } = [];

    /// <summary>Whether the bytes are still there.</summary>
    public bool HasFiles { get; init; } = true;

    /// <summary>Bytes on the disk.</summary>
    public long StoredBytes => HasFiles ? Logs.Sum(l => l.Bytes) : 0;
}

/// <summary>What was recognised in a flight: everything but the columns themselves.</summary>
/// <param name="Diagnostics">Files, columns, rows left out, warnings.</param>
/// <param name="Sensors">What the sensors say about each other.</param>
internal sealed record RecognisedFlight(ImportDiagnostics Diagnostics, SensorReport Sensors);

/// <summary>A flight that was worked out.</summary>
internal sealed record Answer
{
    /// <summary>Number in the session, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>The result, as <c>fit</c> makes it.</summary>
    public required FitReport Report { get; init; }

    /// <summary>Its JSON, as <c>fit</c> writes it.</summary>
    public required string Json { get; init; }

    /// <summary>What any travel would leave; empty where no travel may be stated.</summary>
    public required Core.Analysis.WhatIf WhatIf { get; init; }

    /// <summary>The rig file it was made with.</summary>
    public required RigDraft Rig { get; init; }

    /// <summary>The sheet; null without one.</summary>
    public FlightSheet? Sheet { get; init; }

    /// <summary>Job and flight it was kept as; null when it was not kept.</summary>
    public (long Job, int Flight)? Kept { get; init; }

    /// <summary>Rows of the flight.</summary>
    public long Rows => Report.Import.Flight.Count;

    /// <summary>File names of the logs.</summary>
    public string Name => string.Join(", ", Report.Import.Diagnostics.Files.Select(f => f.Name));
}
