using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Comparing;

/// <summary>Two or more flights of one machine with something changed between them: the one result that program, report and page show.</summary>
public sealed partial record FlightComparison
{
    /// <summary>Options that made this result.</summary>
    public required ComparisonOptions Options { get; init; }

    /// <summary>The flights in the order flown.</summary>
    public required ImmutableArray<ComparedFlight> Flights { get; init; }

    /// <summary>Unit of thrust in <see cref="Coefficients"/> and of <see cref="CommonFullThrust"/>.</summary>
    public required ThrustBasis ThrustBasis { get; init; }

    /// <summary>Full thrust at which all flights are compared, N; 1 when thrust is relative.</summary>
    public required double CommonFullThrust { get; init; }

    /// <summary>The settings in the order of their first flight; empty when no flight could tell its pull over power.</summary>
    public required ImmutableArray<ComparedSetup> Setups { get; init; }

    /// <summary>First to last setting at off, idle, cruise, full; empty with fewer than two settings.</summary>
    public ImmutableArray<SettingChange> Changes { get; init; } = [];

    /// <summary>First to last setting at the balance thrust; null with fewer than two settings.</summary>
    public SettingChange? AtBalance { get; init; }

    /// <summary>First to last setting, coefficient by coefficient.</summary>
    public ImmutableArray<CoefficientChange> Coefficients { get; init; } = [];

    /// <summary>Share of the pull at the balance thrust that is gone, (before − after)/before, with Fieller's 95 % set; null when the pull before does
    /// not differ from zero.</summary>
    public FiellerSet? Removed { get; init; }

    /// <summary>The verdict; null with fewer than two settings.</summary>
    public ComparisonVerdict? Verdict { get; init; }

    /// <summary>How much of the pull went with what was declared as changed; null when nothing was declared.</summary>
    public ChangeAttribution? Attribution { get; init; }

    /// <summary>Settings flown again after another one.</summary>
    public ImmutableArray<SwapBack> SwapBacks { get; init; } = [];

    /// <summary>Trend over three settings or more; null with fewer.</summary>
    public SetupTrend? Trend { get; init; }

    /// <summary>What comes next from the last setting: all flights of it together, other settings as sources of the sensitivity. Null when no flight
    /// could tell.</summary>
    public TrimAnalysis? Next { get; init; }

    /// <summary>The fit behind <see cref="Next"/>; null with it.</summary>
    internal TurnFit? NextFit { get; init; }

    /// <summary>The options behind <see cref="Next"/>, with the known changes.</summary>
    internal TrimOptions? NextOptions { get; init; }

    /// <summary>Whether the change between the settings entered the sensitivity.</summary>
    public bool PairUsed { get; init; }

    /// <summary>Scatter from flight to flight; null when no flight could tell.</summary>
    public ScatterReport? Scatter { get; init; }

    /// <summary>What else is worth saying.</summary>
    public ImmutableArray<CompareNotice> Notices { get; init; } = [];
}
