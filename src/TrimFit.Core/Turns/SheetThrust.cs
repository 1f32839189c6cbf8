using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Core.Turns;

/// <summary>Thrust from the powers on a flight sheet, where the log says nothing about the engine.</summary>
/// <remarks>Full power is full thrust, off is none, idle is what idle is taken to be. Level flight lies between them as its climb does: in steady
/// flight climb grows with thrust (T = W (climb + sink)/airspeed), so the share follows from three mean climbs and neither weight nor sink has to be
/// known. A leg's climb is averaged over all legs of its power: a reading every few seconds would be off by tens of newtons, a mean over a minute
/// is not. Outside the legs thrust is unknown.</remarks>
internal static class SheetThrust
{
    /// <summary>Left out at a leg's start while engine and climb settle, s, and at an edge that no control shows.</summary>
    private const double SettleSec = 3, UnseenEdgeSec = SheetLegs.EdgeToleranceSec;

    private const double ShortestSec = 5;

    /// <summary>Full power must climb this much better than the least power, m/s, or the two hardly differ.</summary>
    private const double LeastClimbDifference = 0.8;

    /// <summary>Thrust as fraction of full over the clock, NaN outside the legs, and the share of level flight; null when fewer than two powers are on the sheet.</summary>
    public static (double[] Fraction, double Level, bool LevelByClimb)? Of(FlightLog log, Rig rig, ReadOnlySpan<FoundLeg> legs)
    {
        var climbs = new Dictionary<PowerSetting, (double Sum, double Weight)>();
        bool any = false;
        var given = new HashSet<double>();
        foreach (FoundLeg leg in legs)
        {
            if (leg.Leg.ThrottleFraction is double throttle)
                given.Add(throttle);
            if (leg.Leg.Power is not PowerSetting power)
                continue;
            given.Add(-1 - (int)power);
            any = true;
            (double sum, double weight) = climbs.GetValueOrDefault(power);
            double from = leg.StatedStartSec + SettleSec + (leg.StartFoundIn is null ? UnseenEdgeSec : 0), to = leg.StatedEndSec - (leg.EndFoundIn is null ? UnseenEdgeSec : 0);
            if (to - from >= ShortestSec && Climb(log, from, to) is double climb)
                climbs[power] = (sum + (climb * (to - from)), weight + to - from);
            else
                climbs[power] = (sum, weight);
        }
        if (given.Count < 2)
            return null;
        double idle = rig.Propeller.Drive == PropellerDrive.Clutch ? 0 : RigReporter.AssumedIdleFraction;
        double level = RigReporter.AssumedCruiseFraction;
        bool byClimb = false;
        if (any && Mean(PowerSetting.Full) is double most && Mean(PowerSetting.Cruise) is double middle)
        {
            (double least, double share)? floor = Mean(PowerSetting.Off) is double off ? (off, 0) : Mean(PowerSetting.Idle) is double low ? (low, idle) : null;
            if (floor is (double climb, double at) && most - climb > LeastClimbDifference)
            {
                level = Math.Clamp(at + ((1 - at) * (middle - climb) / (most - climb)), at + 0.05, 1);
                byClimb = true;
            }
        }
        ReadOnlySpan<double> time = log.TimeSec;
        double[] fraction = new double[log.Count];
        Array.Fill(fraction, double.NaN);
        foreach (FoundLeg leg in legs)
        {
            double? x = leg.Leg.ThrottleFraction is double throttle ? throttle : leg.Leg.Power switch
            {
                PowerSetting.Off => 0,
                PowerSetting.Idle => idle,
                PowerSetting.Cruise => level,
                PowerSetting.Full => 1,
                _ => null,
            };
            if (x is not double known)
                continue;
            for (int i = 0; i < fraction.Length; i++)
            {
                if (time[i] >= leg.StartSec && time[i] <= leg.EndSec)
                    fraction[i] = known;
            }
        }
        return (fraction, level, byClimb);

        double? Mean(PowerSetting power) => climbs.TryGetValue(power, out (double Sum, double Weight) all) && all.Weight > 0 ? all.Sum / all.Weight : null;
    }

    /// <summary>Least-squares climb over a span, m/s; null with fewer than four readings of altitude.</summary>
    private static double? Climb(FlightLog log, double fromSec, double toSec)
    {
        if (!log.Has(ChannelRole.Altitude))
            return null;
        ReadOnlySpan<double> time = log.TimeSec, altitude = log[ChannelRole.Altitude];
        double meanT = 0, meanY = 0;
        int n = 0;
        for (int i = 0; i < time.Length; i++)
        {
            if (time[i] >= fromSec && time[i] <= toSec && double.IsFinite(altitude[i]))
            {
                n++;
                meanT += (time[i] - meanT) / n;
                meanY += (altitude[i] - meanY) / n;
            }
        }
        if (n < 4)
            return null;
        double top = 0, bottom = 0;
        for (int i = 0; i < time.Length; i++)
        {
            if (time[i] >= fromSec && time[i] <= toSec && double.IsFinite(altitude[i]))
            {
                top += (time[i] - meanT) * (altitude[i] - meanY);
                bottom += (time[i] - meanT) * (time[i] - meanT);
            }
        }
        return bottom > 0 ? top / bottom : null;
    }
}
