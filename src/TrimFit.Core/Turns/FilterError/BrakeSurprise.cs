using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns.FilterError;

/// <summary>What of the brake could not be foreseen from brakes and headings so far.</summary>
/// <remarks>Without a gyro a pilot knows more of the turn than the log: he feels it before a fix shows it, and his brakes tell. Taken as an outside
/// input they then bias their own coefficient, since the error of the filtered state and the brake go together (Söderström, Gustavsson and
/// Ljung 1975, "Identifiability conditions for linear systems operating in closed loop", Int. J. Control 21:243,
/// doi 10.1080/00207177508921986; Ljung 1999, "System Identification", 13.4: the noise model has to hold what the loop feeds back). In the
/// innovations form of brakes and headings together the brake's surprise corrects the state as a measurement's does, with gains of its own;
/// those gains are columns of the linear part (<see cref="ColumnKind.RateSurprise"/>). Large surprises are what the pilot decided (a
/// brake step, taking hold, letting go): they say nothing of the state and count as none.</remarks>
internal static class BrakeSurprise
{
    private const int Lags = 5; // rows, 1 s at 0.2 s: a pilot's reaction time is 0.2 to 0.6 s
    private const double DecidedBy = 3; // robust standard deviations
    private const int Rounds = 4;
    private static readonly double[] _spansSec = [1, 3];

    /// <summary>The surprise at each row over its robust standard deviation; 0 where there is none. Empty when it cannot be told.</summary>
    public static double[] Of(FlightColumns flight)
    {
        double[] brakes = flight.BrakeColumn(), turned = BrakeFeedback.Turned(flight), timeSec = flight.TimeSec;
        byte[] flags = flight.Flags;
        int n = brakes.Length, p = 1 + Lags + _spansSec.Length;
        double[] rows = new double[n * p];
        var usable = new List<int>();
        int segment = 0;
        for (int i = 0; i < n; i++)
        {
            if ((flags[i] & FlightColumns.Reset) != 0)
                segment = i;
            if (i - segment < Lags || timeSec[i] - timeSec[segment] < _spansSec[^1])
                continue;
            bool held = true;
            for (int l = 0; l <= Lags; l++)
                held &= brakes[i - l] != 0;
            if (!held)
                continue;
            Span<double> row = rows.AsSpan(i * p, p);
            row[0] = 1;
            for (int l = 1; l <= Lags; l++)
                row[l] = brakes[i - l];
            for (int j = 0; j < _spansSec.Length; j++)
                row[1 + Lags + j] = turned[i] - turned[BrakeFeedback.Before(flight, i, _spansSec[j], segment)];
            usable.Add(i);
        }
        if (usable.Count < 20 * p)
            return [];
        double[] residual = new double[n], normal = new double[p * p], right = new double[p];
        bool[] kept = new bool[n];
        foreach (int i in usable)
            kept[i] = true;
        double scale = 0;
        for (int round = 0; round < Rounds; round++)
        {
            Array.Clear(normal);
            Array.Clear(right);
            foreach (int i in usable)
            {
                if (!kept[i])
                    continue;
                ReadOnlySpan<double> row = rows.AsSpan(i * p, p);
                for (int a = 0; a < p; a++)
                {
                    right[a] += row[a] * brakes[i];
                    for (int b = 0; b < p; b++)
                        normal[(a * p) + b] += row[a] * row[b];
                }
            }
            for (int a = 0; a < p; a++)
                normal[(a * p) + a] *= 1 + 1e-9;
            if (!SmallCholesky.Factor(normal, p))
                return [];
            SmallCholesky.Solve(normal, p, right);
            double[] sizes = new double[usable.Count];
            for (int u = 0; u < sizes.Length; u++)
            {
                int i = usable[u];
                double foreseen = 0;
                for (int a = 0; a < p; a++)
                    foreseen += right[a] * rows[(i * p) + a];
                residual[i] = brakes[i] - foreseen;
                sizes[u] = Math.Abs(residual[i]);
            }
            scale = 1.4826 * Median.Of(sizes);
            if (!(scale > 0))
                return [];
            foreach (int i in usable)
                kept[i] = Math.Abs(residual[i]) < DecidedBy * scale;
        }
        double[] surprise = new double[n];
        foreach (int i in usable)
            surprise[i] = kept[i] ? residual[i] / scale : 0;
        return surprise;
    }
}
