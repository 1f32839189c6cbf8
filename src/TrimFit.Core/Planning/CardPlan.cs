using System.Collections.Immutable;

namespace TrimFit.Core.Planning;

/// <summary>A test card, or why there is none.</summary>
public sealed record CardPlan
{
    /// <summary>Wind at flying height above which the card is not flown, as a share of the trim speed (common practice, no source).</summary>
    public const double WindShare = 0.33;

    /// <summary>Sink is taken this much larger and climb this much smaller than expected when the start height is worked out.</summary>
    private const double SinkMargin = 1.2, ClimbMargin = 0.8;

    /// <summary>Fuel of a two-stroke a shaft kilowatt-hour, kg, and battery over shaft energy of an electric machine (common practice, no source).</summary>
    private const double FuelKgPerKilowattHour = 0.5, BatteryOverShaft = 1 / 0.82;

    /// <summary>Shaft power goes with thrust to this (momentum theory).</summary>
    private const double PowerExponent = 1.5;

    /// <summary>What was asked for.</summary>
    public required CardOptions Options { get; init; }

    /// <summary>Machine, air and logger it is planned for.</summary>
    public required CardMachine Machine { get; init; }

    /// <summary>The legs in the order flown; empty when the card is refused.</summary>
    public ImmutableArray<CardLeg> Legs { get; init; } = [];

    /// <summary>Number of runs to and fro.</summary>
    public int Runs { get; init; }

    /// <summary>Expected precision; null when the card is refused.</summary>
    public CardPrediction? Prediction { get; init; }

    /// <summary>Why there is no card; null when there is one.</summary>
    public CardRefusal? Refusal { get; init; }

    /// <summary>Precision that no card of up to <see cref="CardOptions.MostMinutes"/> betters, when that was found: m or rad/s as it was asked for.</summary>
    public double? LeastReachable { get; init; }

    /// <summary>Minutes that the wanted precision needs, when the card is shorter by wish; null when unknown or not asked.</summary>
    public double? MinutesNeeded { get; init; }

    /// <summary>The number behind a refusal: pull, rad/s, or held brake, fraction of travel; null for others.</summary>
    public double? RefusedFor { get; init; }

    /// <summary>Length, s.</summary>
    public double Seconds => Legs.IsEmpty ? 0 : Legs[^1].EndSec;

    /// <summary>Whether the wanted precision is expected to be reached; null when none was asked for.</summary>
    public bool? Reaches => Prediction is null ? null
        : Options.ShiftHalfWidthM is double width ? Prediction.ShiftHalfWidthM <= width
        : Options.PullStdErrorRadPerSec is double error ? Prediction.PullStdErrorRadPerSec <= error
        : null;

    /// <summary>Height against the start at each leg's end, m, with sink taken larger and climb smaller than expected.</summary>
    public ImmutableArray<double> CautiousHeights => Heights(SinkMargin, ClimbMargin);

    /// <summary>Height above ground at which the card starts, m, in whole tens: no leg then goes below the floor.</summary>
    public double StartHeightM => Legs.IsEmpty ? 0 : 10 * Math.Ceiling((Options.FloorM + Math.Max(0, -CautiousHeights.Min()) - 1e-9) / 10);

    /// <summary>Highest point above the start as expected, m.</summary>
    public double HighestAboveStartM => Legs.IsEmpty ? 0 : Math.Max(0, Heights(1, 1).Max());

    /// <summary>Wind at height above which the card is not flown, m/s.</summary>
    public double WindLimitMPerSec => WindShare * Machine.AirspeedMPerSec;

    /// <summary>How far a wind at the limit carries the card, m.</summary>
    public double DriftAtLimitM => WindLimitMPerSec * Seconds;

    /// <summary>Shaft energy of the card, J.</summary>
    public double ShaftEnergyJ => Legs.Sum(l => l.Seconds * Machine.ShaftPowerW * Math.Pow(Machine.ThrustOf(l.Power), PowerExponent));

    /// <summary>Fuel of the card, kg, for a two-stroke.</summary>
    public double FuelKg => ShaftEnergyJ / 3.6e6 * FuelKgPerKilowattHour;

    /// <summary>Battery energy of the card, Wh, for an electric machine.</summary>
    public double BatteryWh => ShaftEnergyJ / 3600 * BatteryOverShaft;

    private ImmutableArray<double> Heights(double sinkMargin, double climbMargin)
    {
        double height = 0;
        var heights = ImmutableArray.CreateBuilder<double>(Legs.Length);
        foreach (CardLeg leg in Legs)
        {
            double climb = Machine.ClimbAt(Machine.ThrustOf(leg.Power));
            // Level flight is flown by the throttle, and turns and brakes cost height: taken as level less a tenth of the sink.
            if (leg.Power == Analysis.PowerSetting.Cruise && sinkMargin > 1)
                climb = -0.1 * Machine.SinkMPerSec;
            height += leg.Seconds * climb * (climb < 0 ? sinkMargin : climbMargin);
            heights.Add(height);
        }
        return heights.MoveToImmutable();
    }
}

/// <summary>Why a card is refused.</summary>
public enum CardRefusal
{
    /// <summary>The last flight's pull is too strong: adjust on the ground first.</summary>
    StrongPull,
    /// <summary>The last flight's held brake was too much: adjust on the ground first.</summary>
    HeldBrake,
    /// <summary>No card makes the shift's interval as narrow as asked: what a millimetre does is not known well enough.</summary>
    WidthUnreachable,
    /// <summary>No card makes the pull's standard error as small as asked.</summary>
    StdErrorUnreachable,
}
