namespace TrimFit.Core.Turns.FilterError;

/// <summary>How much of the brake is the pilot's answer to the turn.</summary>
/// <remarks>In closed loop the estimate leans on the disturbance model (Ljung 1999, "System Identification", ch. 13), so the share is
/// reported: R² of the brake on what the machine did before it, seen after a reaction time: turn rate over a second, heading change over
/// 5 s, and both over longer. Least squares on rows with hands on.</remarks>
internal static class BrakeFeedback
{
    private const double ReactionSec = 0.4;
    private static readonly double[] _spansSec = [1, 5, 15];

    public static double? Share(FlightColumns flight)
    {
        double[] brakes = flight.BrakeColumn();
        if (brakes.Length == 0)
            return null;
        double[] turned = Turned(flight);
        int p = _spansSec.Length + 1;
        double[] normal = new double[p * p], right = new double[p], row = new double[p];
        double sum = 0, squares = 0;
        int count = 0, segment = 0;
        for (int i = 0; i < flight.Count; i++)
        {
            if ((flight.Flags[i] & FlightColumns.Reset) != 0)
                segment = i;
            if (brakes[i] == 0 || flight.TimeSec[i] - flight.TimeSec[segment] < ReactionSec + _spansSec[^1])
                continue;
            int end = Before(flight, i, ReactionSec, segment);
            row[0] = 1;
            for (int j = 1; j < p; j++)
                row[j] = turned[end] - turned[Before(flight, i, ReactionSec + _spansSec[j - 1], segment)];
            for (int a = 0; a < p; a++)
            {
                right[a] += row[a] * brakes[i];
                for (int b = 0; b < p; b++)
                    normal[(a * p) + b] += row[a] * row[b];
            }
            sum += brakes[i];
            squares += brakes[i] * brakes[i];
            count++;
        }
        double total = squares - (sum * sum / Math.Max(1, count));
        if (count < 50 || !(total > 0))
            return null;
        double[] solution = [.. right];
        if (!SmallCholesky.Factor(normal, p))
            return null;
        SmallCholesky.Solve(normal, p, solution);
        double explained = -sum * sum / count;
        for (int a = 0; a < p; a++)
            explained += solution[a] * right[a];
        return Math.Clamp(explained / total, 0, 1);
    }

    internal static int Before(FlightColumns flight, int i, double seconds, int first)
    {
        int at = Array.BinarySearch(flight.TimeSec, first, i - first + 1, flight.TimeSec[i] - seconds);
        return at >= 0 ? at : Math.Max(first, ~at - 1);
    }

    /// <summary>Heading gone through since the start of the segment: the gyro summed up, or the headings themselves.</summary>
    internal static double[] Turned(FlightColumns flight)
    {
        double[] turned = new double[flight.Count];
        byte bit = flight.HasHeading ? FlightColumns.Heading : FlightColumns.Compass;
        double[] rows = flight.HasHeading ? flight.HeadingRows : flight.CompassRows;
        for (int i = 0; i < turned.Length; i++)
        {
            bool reset = (flight.Flags[i] & FlightColumns.Reset) != 0;
            double before = reset || i == 0 ? 0 : turned[i - 1];
            if (flight.HasGyro)
            {
                bool measured = (flight.Flags[i] & FlightColumns.Gyro) != 0;
                turned[i] = before + (measured && !reset && i > 0 ? flight.GyroRows[i * flight.Stride] * (flight.TimeSec[i] - flight.TimeSec[i - 1]) : 0);
            }
            else
            {
                turned[i] = (flight.Flags[i] & bit) != 0 ? rows[i * flight.Stride] : reset ? flight.StartHeading[i] : before;
            }
        }
        return turned;
    }
}
