using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Thrust over the flight's clock, from the best of what was logged.</summary>
/// <remarks>In this order: motor current (follows torque, and torque over thrust hardly changes), speed of rotation squared, power to the
/// two-thirds (momentum theory: T = (FM P)^⅔ (2ρA)^⅓), throttle by the rig's table, throttle taken as thrust, the powers of a flight sheet, climb.</remarks>
internal sealed class ThrustSource
{
    /// <summary>Longest time a reading of rpm or throttle is held, s; beyond it the engine's state is unknown and the span is left out.</summary>
    public const double LongestHoldSec = 5;

    /// <summary>Share of a column's readings below its "full" value: one spike must not set the scale.</summary>
    private const double FullQuantile = 0.995;

    /// <summary>Shaft power over battery power of an electric machine (common practice, no source).</summary>
    private const double ElectricEfficiency = 0.82;

    /// <summary>A clutch engages some way above idle; this much stands in when the rig does not say (common practice, no source).</summary>
    private const double EngageOverIdle = 1.25, RunningRevPerSec = 5;

    private const double PowerExponent = 2.0 / 3;

    /// <summary>Thrust, N or fraction of full, held between samples, never negative; NaN where unknown.</summary>
    public required double[] Thrust { get; init; }

    public required ThrustBasis Basis { get; init; }

    public required double FullThrust { get; init; }

    /// <summary>Square of speed of rotation over full, 0 where unknown.</summary>
    public required double[] RotationRatioSquared { get; init; }

    public required bool Known { get; init; }

    public required ImmutableArray<Finding> Findings { get; init; }

    public static ThrustSource Of(FlightLog log, Rig rig, Propulsion propulsion, params ReadOnlySpan<FoundLeg> legs)
    {
        RigPropeller propeller = rig.Propeller;
        var findings = new List<Finding>();
        double densityExponent = 1; // T = C_T ρ n² D⁴
        double[]? speedSquared = null;
        double[] fraction;
        if (log.Has(ChannelRole.MotorCurrent))
        {
            (fraction, double full) = OverFull(Held(log, ChannelRole.MotorCurrent));
            findings.Add(Finding.Of(FindingCode.ThrustFromMotorCurrent, full));
        }
        else if (log.Has(ChannelRole.Rpm))
        {
            (fraction, speedSquared) = FromRpm(log, propeller, findings);
        }
        else if (Power(log) is double[] power)
        {
            fraction = FromPower(power, propeller, findings);
            densityExponent = 1.0 / 3;
        }
        else if (log.Has(ChannelRole.Current) && propeller.Drive == PropellerDrive.Electric)
        {
            (double[] share, double full) = OverFull(Held(log, ChannelRole.Current));
            fraction = [.. share.Select(s => Math.Pow(s, PowerExponent))];
            findings.Add(Finding.Of(FindingCode.CurrentTakenAsPower, full));
            densityExponent = 1.0 / 3;
        }
        else if (log.Has(ChannelRole.Throttle) && !propeller.ThrottleThrust.IsEmpty)
        {
            var curve = MonotoneCubic.Through([.. propeller.ThrottleThrust.Select(p => p.Throttle)], [.. propeller.ThrottleThrust.Select(p => p.Thrust)]);
            fraction = [.. Held(log, ChannelRole.Throttle).Select(t => double.IsFinite(t) ? curve.At(t) : double.NaN)];
        }
        else if (log.Has(ChannelRole.Throttle))
        {
            findings.Add(Finding.Of(FindingCode.ThrottleTakenAsThrust));
            fraction = Held(log, ChannelRole.Throttle);
        }
        else if (SheetThrust.Of(log, rig, legs) is (double[] byLegs, double level, bool levelByClimb))
        {
            findings.Add(Finding.Of(FindingCode.ThrustFromSheet, level, levelByClimb ? 1 : 0));
            fraction = byLegs;
        }
        else if (ClimbThrust.Readings(log, rig) is (double[] thrust, double error))
        {
            findings.Add(Finding.Of(FindingCode.ThrustFromClimb, error));
            return new()
            {
                Thrust = thrust,
                Basis = ThrustBasis.Newton,
                FullThrust = propulsion.FullThrustN,
                RotationRatioSquared = new double[log.Count], // what the propeller does is not known
                Known = true,
                Findings = [.. findings],
            };
        }
        else
        {
            findings.Add(Finding.Of(FindingCode.NoThrust));
            return new()
            {
                Thrust = new double[log.Count],
                Basis = ThrustBasis.Relative,
                FullThrust = 1,
                RotationRatioSquared = new double[log.Count],
                Known = false,
                Findings = [.. findings],
            };
        }

        speedSquared ??= [.. fraction.Select(f => double.IsFinite(f) ? Math.Max(0, f) : 0)]; // thrust goes with the square of the speed
        ThrustBasis basis = propulsion.ThrustKnown ? ThrustBasis.Newton : ThrustBasis.Relative;
        if (basis == ThrustBasis.Relative)
            findings.Add(Finding.Of(FindingCode.ThrustRelative));
        double scale = basis == ThrustBasis.Newton ? propulsion.FullThrustN : 1;
        double[] density = DensityRatio(log, propulsion.AirDensity);
        for (int i = 0; i < fraction.Length; i++)
            fraction[i] = Math.Max(0, fraction[i]) * scale * Math.Pow(density[i], densityExponent); // NaN stays NaN
        return new()
        {
            Thrust = fraction,
            Basis = basis,
            FullThrust = scale,
            RotationRatioSquared = speedSquared,
            Known = true,
            Findings = [.. findings],
        };
    }

    private static (double[] Fraction, double[] SpeedSquared) FromRpm(FlightLog log, RigPropeller propeller, List<Finding> findings)
    {
        double[] speed = Held(log, ChannelRole.Rpm);
        double full = propeller.FullPowerRevPerSec ?? 0;
        if (!(full > 0))
        {
            full = Full(speed);
            findings.Add(Finding.Of(FindingCode.FullPowerSpeedAssumed, full));
        }
        double engage = propeller.Drive == PropellerDrive.Clutch ? propeller.ClutchEngageRevPerSec ?? Engage(speed, propeller, findings) : 0;
        var fraction = new double[speed.Length];
        var squared = new double[speed.Length];
        for (int i = 0; i < fraction.Length; i++)
        {
            double ratio = full > 0 ? speed[i] / full : 0 * speed[i]; // an engine that never ran: 0, and NaN stays NaN
            squared[i] = double.IsFinite(ratio) ? ratio * ratio : 0;
            fraction[i] = speed[i] < engage ? 0 : ratio * ratio; // an open clutch drives nothing
        }
        return (fraction, squared);
    }

    /// <summary>Where a clutch of unknown speed engages: above the idle the log shows. A logged propeller speed needs none, for it stands.</summary>
    private static double Engage(double[] speed, RigPropeller propeller, List<Finding> findings)
    {
        double[] running = [.. speed.Where(s => s > RunningRevPerSec)];
        if (propeller.RpmIs == RpmMeaning.Propeller || running.Length == 0)
            return 0;
        double engage = EngageOverIdle * QuantileType7.InPlace(running, 0.02);
        findings.Add(Finding.Of(FindingCode.ClutchEngageAssumed, engage));
        return engage;
    }

    private static double[]? Power(FlightLog log)
    {
        if (log.Has(ChannelRole.Power))
            return Held(log, ChannelRole.Power);
        if (!log.Has(ChannelRole.Voltage) || !log.Has(ChannelRole.Current))
            return null;
        double[] voltage = Held(log, ChannelRole.Voltage), current = Held(log, ChannelRole.Current);
        return [.. voltage.Select((v, i) => v * current[i])];
    }

    /// <summary>Fraction of full thrust from power.</summary>
    /// <remarks>Full power is the log's largest. When that stays below the rig's shaft power, full power was not flown: then the rig's counts, over
    /// the efficiency of motor and controller.</remarks>
    private static double[] FromPower(double[] power, RigPropeller propeller, List<Finding> findings)
    {
        double full = Full(power);
        bool flown = !(propeller.ShaftPowerW > full);
        if (!flown)
            full = propeller.ShaftPowerW!.Value / ElectricEfficiency;
        findings.Add(Finding.Of(FindingCode.ThrustFromPower, full, flown ? 1 : 0));
        return [.. power.Select(p => full > 0 ? Math.Pow(Math.Max(0, p) / full, PowerExponent) : 0 * p)];
    }

    private static (double[] Share, double Full) OverFull(double[] column)
    {
        double full = Full(column);
        return ([.. column.Select(c => full > 0 ? Math.Max(0, c) / full : 0 * c)], full);
    }

    private static double Full(double[] column)
    {
        double[] finite = [.. column.Where(double.IsFinite)];
        return finite.Length > 0 ? Math.Max(0, QuantileType7.InPlace(finite, FullQuantile)) : 0;
    }

    /// <summary>A column with each value held until the next one, for at most <see cref="LongestHoldSec"/>; before the first value NaN.</summary>
    public static double[] Held(FlightLog log, ChannelRole role)
    {
        ReadOnlySpan<double> column = log[role], time = log.TimeSec;
        var held = new double[log.Count];
        int last = -1;
        for (int i = 0; i < held.Length; i++)
        {
            if (i < column.Length && double.IsFinite(column[i]))
                last = i;
            held[i] = last >= 0 && time[i] - time[last] <= LongestHoldSec ? column[last] : double.NaN;
        }
        return held;
    }

    /// <summary>Air density over that of the rig's numbers, by the standard atmosphere at the logged altitude; 1 without an altitude.</summary>
    private static double[] DensityRatio(FlightLog log, double density)
    {
        var ratio = new double[log.Count];
        Array.Fill(ratio, 1);
        if (!log.Has(ChannelRole.Altitude))
            return ratio;
        ReadOnlySpan<double> altitude = log[ChannelRole.Altitude];
        double last = 1;
        bool seen = false;
        for (int i = 0; i < ratio.Length; i++)
        {
            if (double.IsFinite(altitude[i]) && altitude[i] is > -500 and < 9000)
            {
                last = StandardAtmosphere.AtGeometric(altitude[i]).DensityKgPerM3 / density;
                seen = true;
            }
            ratio[i] = seen ? last : 1;
        }
        return ratio;
    }
}
