using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>Everything one flight and one rig have to say: the one result that program, report and page all show.</summary>
public sealed partial record TrimAnalysis
{
    /// <summary>The rig.</summary>
    public required Rig Rig { get; init; }
    /// <summary>Options that made this result.</summary>
    public required TrimOptions Options { get; init; }
    /// <summary>The flight as the estimator saw it.</summary>
    public required TurnSignals Signals { get; init; }
    /// <summary>What was found about the gyro; null without one.</summary>
    public GyroReport? Gyro { get; init; }
    /// <summary>The turn model.</summary>
    public required TurnFit Fit { get; init; }
    /// <summary>The steady-window regression beside the main estimator; null when it is the main one.</summary>
    public TurnFit? CrossCheck { get; init; }
    /// <summary>The pull over power.</summary>
    public required PullReport Pull { get; init; }
    /// <summary>The sensitivity.</summary>
    public required SensitivityReport Sensitivity { get; init; }
    /// <summary>The shift; null when it may not be stated.</summary>
    public ShiftReport? Shift { get; init; }
    /// <summary>Ways to make it, best first; empty when no travel may be stated.</summary>
    public ImmutableArray<AdjustmentReport> Adjustments { get; init; } = [];
    /// <summary>The rig's statics and table without the flight.</summary>
    public required RigReport RigReport { get; init; }
    /// <summary>The verdict.</summary>
    public required Verdict Verdict { get; init; }
    /// <summary>Values that nobody measured.</summary>
    public required ImmutableArray<Assumption> Assumptions { get; init; }
    /// <summary>Everything else worth saying.</summary>
    public ImmutableArray<Finding> Warnings { get; init; } = [];
}
