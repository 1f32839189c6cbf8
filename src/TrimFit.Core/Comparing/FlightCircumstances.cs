using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Comparing;

/// <summary>Load, air, wind and ways of flying of one flight: what must be alike before two flights may be compared.</summary>
internal sealed class FlightCircumstances
{
    /// <summary>Differences from which a warning is due. Mass and density: model page section 4; the others are common practice, no source.</summary>
    public const double MassKg = 5, DensityShare = 0.03, WindMPerSec = 4, HeightM = 300, LeastOverlap = 0.6, AirspeedShare = 0.05, SensorAngleRad = 0.09, TurnShare = 0.5;

    private const double LeastTurnedRad = 2 * Math.PI;

    public FlightCircumstances(ComparedFlight flight)
    {
        TrimAnalysis a = flight.Analysis;
        Name = flight.Name;
        double fuel = a.Rig.Mass.FuelKg.Value;
        if (flight.Sheet is FlightSheet sheet && sheet.FuelStartKg is double start)
            fuel = (start + (sheet.FuelEndKg ?? start)) / 2;
        MassKgs = RigSpread.SuspendedKg(a.Rig) - a.Rig.Mass.FuelKg.Value + fuel;
        TurnSignals s = a.Signals;
        double[] heights = s.AltitudeM.Length == 0 ? [] : [.. s.AltitudeM.Where((h, i) => s.Use[i] && double.IsFinite(h))];
        if (heights.Length > 0)
        {
            Height = QuantileType7.Of(heights, 0.5);
            Density = Height is > -1000 and < 10_000 ? Rigging.StandardAtmosphere.AtGeometric(Height.Value).DensityKgPerM3 : null;
        }
        if (s.Wind is Wind wind)
        {
            Wind = Math.Sqrt((wind.NorthMPerSec * wind.NorthMPerSec) + (wind.EastMPerSec * wind.EastMPerSec));
            Airspeed = new(wind.AirspeedMPerSec, wind.AirspeedStdError);
        }
        if (s.HasThrust && !a.Fit.Points.IsEmpty)
            Flown = (a.Fit.Points.Min(p => p.Thrust) / s.FullThrust, a.Fit.Points.Max(p => p.Thrust) / s.FullThrust);
        Finding? tilt = s.Findings.FirstOrDefault(f => f.Code == FindingCode.GyroLevelled);
        SensorTilt = tilt?.Values.Length > 0 ? tilt.Values[0] : null;
        RightTurns = Turned(s);
        Sheet = flight.Sheet;
    }

    public string Name { get; }
    public double MassKgs { get; }
    public double? Height { get; }
    public double? Density { get; }
    public double? Wind { get; }
    public Estimate? Airspeed { get; }
    public (double Low, double High)? Flown { get; }
    public double? SensorTilt { get; }
    public double? RightTurns { get; }
    public FlightSheet? Sheet { get; }

    /// <summary>Share of the intended turning that went right; null when there was hardly any.</summary>
    private static double? Turned(TurnSignals s)
    {
        double right = 0, left = 0;
        for (int i = 1; i < s.GyroRadPerSec.Length; i++)
        {
            double step = s.TimeSec[i] - s.TimeSec[i - 1], turn = s.GyroRadPerSec[i] * step;
            if (s.Use[i] || !double.IsFinite(turn) || step > 2)
                continue;
            right += Math.Max(0, turn);
            left += Math.Max(0, -turn);
        }
        return right + left > LeastTurnedRad ? right / (right + left) : null;
    }
}
