namespace TrimFit.Core.Workshop;

/// <summary>The machine as it was measured at one time. Never changed: another measurement or adjustment is another setup.</summary>
public sealed record SetupRecord
{
    /// <summary>Number in its job, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>When it was written down, UTC.</summary>
    public required DateTimeOffset Made { get; init; }

    /// <summary>Name of the rig file without its folder.</summary>
    public required string RigName { get; init; }

    /// <summary>SHA-256 of the rig file's bytes, lower-case hex; the book keeps the bytes.</summary>
    public required string RigSha256 { get; init; }

    /// <summary>Number of the setup this one was changed from; null when it was measured anew.</summary>
    public int? ChangedFrom { get; init; }

    /// <summary>Anything else; empty when nothing.</summary>
    public string Note { get; init; } = "";
}
