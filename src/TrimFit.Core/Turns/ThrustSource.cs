using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Thrust over the flight's clock, from the best of what was logged.</summary>
internal sealed class ThrustSource
{
    /// <summary>Longest time a reading of rpm or throttle is held, s; beyond it the engine's state is unknown and the span is left out.</summary>
    public const double LongestHoldSec = 5;

    /// <summary>Thrust, N or fraction of full, held between samples, never negative; NaN where unknown.</summary>
    public required double[] Thrust { get; init; }

    public required ThrustBasis Basis { get; init; }

    public required double FullThrust { get; init; }

    /// <summary>Square of speed of rotation over full, 0 where unknown.</summary>
    public required double[] RotationRatioSquared { get; init; }

    public required bool Known { get; init; }

    public List<Finding> Findings { get; } = [];

    public static ThrustSource Of(FlightLog log, Rig rig, Propulsion propulsion)
    {
        int count = log.Count;
        RigPropeller propeller = rig.Propeller;
        var findings = new List<Finding>();
        double[] fraction = new double[count];
        double[] ratioSquared = new double[count];
        bool known = true;
        ReadOnlySpan<double> throttle = Held(log, ChannelRole.Throttle);

        if (log.Has(ChannelRole.Rpm))
        {
            double[] speed = Held(log, ChannelRole.Rpm);
            double full = propeller.FullPowerRevPerSec ?? 0;
            if (!(full > 0))
            {
                full = QuantileType7.Of([.. speed.Where(double.IsFinite)], 0.995); // one spike must not set the scale
                findings.Add(Finding.Of(FindingCode.FullPowerSpeedAssumed, full));
            }
            double engage = propeller.Drive == PropellerDrive.Clutch ? propeller.ClutchEngageRevPerSec ?? 0 : 0;
            for (int i = 0; i < count; i++)
            {
                double ratio = speed[i] / full;
                ratioSquared[i] = double.IsFinite(ratio) ? ratio * ratio : 0;
                fraction[i] = speed[i] < engage ? 0 : ratio * ratio; // an open clutch drives nothing
            }
        }
        else if (log.Has(ChannelRole.Throttle))
        {
            if (propeller.ThrottleThrust.IsEmpty)
            {
                findings.Add(Finding.Of(FindingCode.ThrottleTakenAsThrust));
                throttle.CopyTo(fraction);
            }
            else
            {
                for (int i = 0; i < count; i++)
                    fraction[i] = double.IsFinite(throttle[i]) ? Interpolate(propeller.ThrottleThrust, throttle[i]) : double.NaN;
            }
            for (int i = 0; i < count; i++)
                ratioSquared[i] = double.IsFinite(fraction[i]) ? fraction[i] : 0;
        }
        else
        {
            known = false;
            findings.Add(Finding.Of(FindingCode.NoThrust));
        }

        ThrustBasis basis = known && propulsion.ThrustKnown ? ThrustBasis.Newton : ThrustBasis.Relative;
        if (known && basis == ThrustBasis.Relative)
            findings.Add(Finding.Of(FindingCode.ThrustRelative));
        double scale = basis == ThrustBasis.Newton ? propulsion.FullThrustN : 1;
        double[] density = DensityRatio(log, propulsion.AirDensity);
        for (int i = 0; i < count; i++)
            fraction[i] = Math.Max(0, fraction[i]) * scale * density[i]; // NaN stays NaN
        var source = new ThrustSource { Thrust = fraction, Basis = basis, FullThrust = scale, RotationRatioSquared = ratioSquared, Known = known };
        source.Findings.AddRange(findings);
        return source;
    }

    private static double Interpolate(System.Collections.Immutable.ImmutableArray<(double Throttle, double Thrust)> table, double throttle)
    {
        if (throttle <= table[0].Throttle)
            return table[0].Thrust;
        for (int i = 1; i < table.Length; i++)
        {
            if (throttle <= table[i].Throttle)
            {
                double share = (throttle - table[i - 1].Throttle) / (table[i].Throttle - table[i - 1].Throttle);
                return table[i - 1].Thrust + (share * (table[i].Thrust - table[i - 1].Thrust));
            }
        }
        return table[^1].Thrust;
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
