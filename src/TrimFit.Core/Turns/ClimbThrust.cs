using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Units;

namespace TrimFit.Core.Turns;

/// <summary>Thrust from climb: in steady flight T = W (climb + glide sink)/airspeed.</summary>
/// <remarks>The machine's weight is lifted at the climb plus what it would sink without power, and the power for that is thrust times airspeed. Rising air
/// counts as thrust, so a reading is good to some tens of newtons and a leg to less.</remarks>
internal static class ClimbThrust
{
    /// <summary>Half of the time over which a climb is read, s.</summary>
    private const double HalfSpanSec = 6;

    /// <summary>Standard deviation of rising air over such a time, m/s, and of a rig's glide sink (common practice, no source).</summary>
    private const double RisingAir = 0.3, SinkError = 0.2;

    /// <summary>Airspeed when neither log nor rig gives one, m/s (common practice, no source).</summary>
    private const double UsualAirspeed = 10.5;

    private const double SettleSec = 6, LargestRelativeError = 0.15;
    private const int FewestWindows = 8;

    /// <summary>Agreement with the static scale: momentum theory takes up to a third off, and a scale up to this much above it is a scale's error.</summary>
    private const double LargestRatio = 1.15, BelowExpected = 0.15, LowestRatioExpected = 0.7;

    /// <summary>Thrust over the clock and the standard error of a reading, N; null without an altitude or a glide sink in the rig.</summary>
    public static (double[] Thrust, double ErrorN)? Readings(FlightLog log, Rig rig)
    {
        if (rig.Wing.GlideSinkMPerSec is not double sink || !log.Has(ChannelRole.Altitude))
            return null;
        double perClimb = Weight(rig) / Airspeed(log, rig, null);
        ReadOnlySpan<double> time = log.TimeSec, altitude = log[ChannelRole.Altitude];
        var thrust = new double[log.Count];
        Array.Fill(thrust, double.NaN);
        int[] have = [.. Finite(altitude)];
        int from = 0, to = 0;
        for (int i = 0; i < thrust.Length; i++)
        {
            while (from < have.Length && time[have[from]] < time[i] - HalfSpanSec)
                from++;
            while (to < have.Length && time[have[to]] <= time[i] + HalfSpanSec)
                to++;
            if (to - from < 4 || time[have[to - 1]] - time[have[from]] < HalfSpanSec)
                continue;
            thrust[i] = Math.Max(0, perClimb * (Slope(time, altitude, have.AsSpan(from, to - from)) + sink));
        }
        return (thrust, perClimb * Math.Sqrt((RisingAir * RisingAir) + (SinkError * SinkError)));
    }

    /// <summary>Checks the scale of thrust by climb, or gives one where the rig has none; null when the flight cannot tell to 15 %.</summary>
    public static Finding? Check(TurnSignals signals, Rig rig, Propulsion propulsion)
    {
        if (!signals.HasThrust || signals.AltitudeM.Length == 0 || signals.Findings.Any(f => f.Code == FindingCode.ThrustFromClimb))
            return null;
        (double[] fraction, double[] climb) = ClimbWindows.Cut(signals, SettleSec);
        if (fraction.Length < FewestWindows || fraction.Max() - fraction.Min() < SteadyWindowEstimator.SmallestThrustRange)
            return null;
        if (ClimbWindows.RobustLine(fraction, climb, FewestWindows) is not LeastSquaresFit fit)
            return null;
        double airspeed = Airspeed(null, rig, signals.Wind);
        double full = fit.Coefficients[1] * Weight(rig) / airspeed;
        // Speed and weight are known to some percent: not worth less than 3 % together.
        double error = Math.Abs(full) * double.Hypot(fit[1].StandardError / fit.Coefficients[1], 0.03);
        if (!(full > 0) || !(error < LargestRelativeError * full))
            return null;
        if (signals.ThrustBasis == ThrustBasis.Relative)
            return Finding.Of(FindingCode.FullThrustByClimb, full, error);
        double ratio = full / propulsion.FullThrustN, ratioError = error / propulsion.FullThrustN;
        double expected = rig.Propeller.DiameterM is double diameter
            ? InFlightThrust.AtConstantPower(propulsion.FullThrustN, MomentumTheory.DiskArea(diameter), propulsion.AirDensity, airspeed) / propulsion.FullThrustN
            : 0;
        double lowest = (expected > 0 ? expected : LowestRatioExpected) - BelowExpected;
        bool agrees = ratio + (2 * ratioError) > lowest && ratio - (2 * ratioError) < LargestRatio;
        return Finding.Of(FindingCode.ThrustScaleByClimb, ratio, ratioError, expected, agrees ? 1 : 0);
    }

    private static double Weight(Rig rig) => PhysicalConstants.StandardGravity * (rig.Mass.PilotKg.Value + rig.Mass.PassengerKg.Value
        + rig.Mass.PowerUnitKg.Value + rig.Mass.FuelKg.Value + rig.Mass.WheelsKg.Value + rig.Wing.MassKg.Value);

    private static double Airspeed(FlightLog? log, Rig rig, Wind? wind)
    {
        if (wind is not null)
            return wind.AirspeedMPerSec;
        if (log is not null && log.Has(ChannelRole.Airspeed))
        {
            double[] flying = [.. log[ChannelRole.Airspeed].ToArray().Where(v => v > FlightSpan.FlyingSpeed)];
            if (flying.Length > 0)
                return Median.InPlace(flying);
        }
        return rig.Wing.TrimSpeedMPerSec ?? UsualAirspeed;
    }

    private static List<int> Finite(ReadOnlySpan<double> column)
    {
        var have = new List<int>();
        for (int i = 0; i < column.Length; i++)
        {
            if (double.IsFinite(column[i]))
                have.Add(i);
        }
        return have;
    }

    private static double Slope(ReadOnlySpan<double> time, ReadOnlySpan<double> y, ReadOnlySpan<int> rows)
    {
        double meanT = 0, meanY = 0, top = 0, bottom = 0;
        foreach (int i in rows)
        {
            meanT += time[i] / rows.Length;
            meanY += y[i] / rows.Length;
        }
        foreach (int i in rows)
        {
            top += (time[i] - meanT) * (y[i] - meanY);
            bottom += (time[i] - meanT) * (time[i] - meanT);
        }
        return top / bottom;
    }
}
