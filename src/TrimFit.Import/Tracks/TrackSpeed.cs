using TrimFit.Core.Units;

namespace TrimFit.Import.Tracks;

/// <summary>Speed over ground between neighbouring positions.</summary>
internal static class TrackSpeed
{
    /// <summary>Speed, m/s, from the last row with a position to this one; NaN where there is none. Angles in rad; short lines on a sphere.</summary>
    public static double[] Between(IReadOnlyList<double> time, IReadOnlyList<double> latitude, IReadOnlyList<double> longitude)
    {
        double[] speed = new double[time.Count];
        Array.Fill(speed, double.NaN);
        int last = -1;
        for (int i = 0; i < time.Count; i++)
        {
            if (!double.IsFinite(latitude[i]) || !double.IsFinite(longitude[i]))
                continue;
            if (last >= 0)
            {
                double north = latitude[i] - latitude[last];
                double east = Math.IEEERemainder(longitude[i] - longitude[last], 2 * Math.PI) * Math.Cos(latitude[i]);
                speed[i] = PhysicalConstants.MeanEarthRadius * Math.Sqrt((north * north) + (east * east)) / (time[i] - time[last]);
            }
            last = i;
        }
        return speed;
    }
}
