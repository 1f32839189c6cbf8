using System.Collections.Immutable;

namespace TrimFit.Core.Workshop;

/// <summary>One job of a workshop: a machine that came with a complaint, and everything that was done about it.</summary>
public sealed record JobRecord
{
    /// <summary>Number in its book, from 1; never given twice.</summary>
    public required long Number { get; init; }

    /// <summary>Identity that goes with the job from book to book, 32 lower-case hex digits.</summary>
    public required string Uid { get; init; }

    /// <summary>When it was opened, UTC.</summary>
    public required DateTimeOffset Opened { get; init; }

    /// <summary>What the customer complains about, in his words.</summary>
    public required string Complaint { get; init; }

    /// <summary>The machine, as the workshop calls it.</summary>
    public required string Machine { get; init; }

    /// <summary>Whose it is; empty when not given.</summary>
    public string Customer { get; init; } = "";

    /// <summary>The wing flown with it, such as its type and size; empty when not given.</summary>
    public string Wing { get; init; } = "";

    /// <summary>What tells this wing from others of its kind, such as a serial number; empty when not given.</summary>
    public string WingId { get; init; } = "";

    /// <summary>Setups in the order they were made; a changed machine is a new setup.</summary>
    public ImmutableArray<SetupRecord> Setups { get; init; } = [];

    /// <summary>Checks in the order they were made.</summary>
    public ImmutableArray<CheckRecord> Checks { get; init; } = [];

    /// <summary>Flights in the order they were added.</summary>
    public ImmutableArray<FlightRecord> Flights { get; init; } = [];

    /// <summary>Results in the order they were made.</summary>
    public ImmutableArray<ResultRecord> Results { get; init; } = [];

    /// <summary>Adjustments in the order they were made.</summary>
    public ImmutableArray<AdjustmentRecord> Adjustments { get; init; } = [];

    /// <summary>Notes in the order they were made.</summary>
    public ImmutableArray<NoteRecord> Notes { get; init; } = [];

    /// <summary>Sign-offs in the order they were made.</summary>
    public ImmutableArray<SignatureRecord> Signatures { get; init; } = [];

    /// <summary>The setup the machine has now; null before the first.</summary>
    public SetupRecord? CurrentSetup => Setups.IsEmpty ? null : Setups[^1];

    /// <summary>The latest result of a flight alone; null before the first.</summary>
    public ResultRecord? LatestFit => Results.LastOrDefault(r => r.Kind == ResultRecord.FitKind);

    /// <summary>Whether the machine as it is now is signed for: a new setup opens the job again.</summary>
    public bool IsSigned => !Signatures.IsEmpty && Signatures[^1].Setup == CurrentSetup?.Number;
}
