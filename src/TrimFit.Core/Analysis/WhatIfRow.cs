using System.Collections.Immutable;

namespace TrimFit.Core.Analysis;

/// <summary>What a travel of one adjustment leaves.</summary>
/// <param name="Travel">Travel in the adjustment's unit, right positive.</param>
/// <param name="State">What it leaves.</param>
public sealed record WhatIfRow(double Travel, StateAfterTravel State)
{
    /// <summary>Inside the rig's limits; null when the rig gives none.</summary>
    public bool? WithinLimits { get; init; }
}

/// <summary>The machine after a travel: turn, riser twist, loads and hang check.</summary>
public sealed record StateAfterTravel
{
    /// <summary>Turn left at off, idle, cruise, full, in this order.</summary>
    public required ImmutableArray<PullAtSetting> TurnLeftAt { get; init; }
    /// <summary>|N|/k_chi at full thrust: median; null when thrust is relative.</summary>
    public double? TwistRatio { get; init; }
    /// <summary>Upper 95 % of the same.</summary>
    public double? TwistRatioHigh95 { get; init; }
    /// <summary>Which way the frame twists at full thrust.</summary>
    public required TwistDirection TwistDirection { get; init; }
    /// <summary>Load of the left risers at full thrust, N; null when thrust is relative.</summary>
    public double? RiserLoadLeftN { get; init; }
    /// <summary>Load of the right risers at full thrust, N.</summary>
    public double? RiserLoadRightN { get; init; }
    /// <summary>Hang-check reading of the left scale to expect, kg.</summary>
    public required double HangCheckLeftKg { get; init; }
    /// <summary>Hang-check reading of the right scale to expect, kg.</summary>
    public required double HangCheckRightKg { get; init; }
}
