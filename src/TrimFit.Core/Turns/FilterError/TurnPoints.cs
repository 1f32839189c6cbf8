using System.Collections.Immutable;

namespace TrimFit.Core.Turns.FilterError;

/// <summary>Points to draw: mean measured turn rate over short windows, with what brakes, trimmers and sensor errors did taken out.</summary>
internal static class TurnPoints
{
    private const double WindowSec = 10;

    public static ImmutableArray<TurnPoint> Of(TurnSignals signals, FlightColumns flight, AugmentedFilter filter)
    {
        int slope = flight.IndexOf(ColumnKind.Thrust), k = flight.Coefficients;
        double full = signals.FullThrust > 0 ? signals.FullThrust : 1;
        var points = ImmutableArray.CreateBuilder<TurnPoint>();
        int first = 0;
        for (int i = 1; i <= flight.Count; i++)
        {
            bool ends = i == flight.Count || (flight.Flags[i] & FlightColumns.Reset) != 0 || flight.HandsOff[i] != flight.HandsOff[first]
                || flight.TimeSec[i] - flight.TimeSec[first] >= WindowSec;
            if (!ends)
                continue;
            if (i - first >= 3 && flight.TimeSec[i - 1] - flight.TimeSec[first] >= WindowSec / 2)
                Add(first, i - 1);
            first = i;
        }
        return points.ToImmutable();

        void Add(int from, int to)
        {
            double thrust = 0, controls = 0, gyro = 0;
            int gyros = 0, headingFrom = -1, headingTo = -1;
            double[] rows = flight.HasHeading ? flight.HeadingRows : flight.CompassRows;
            byte headingBit = flight.HasHeading ? FlightColumns.Heading : FlightColumns.Compass;
            for (int i = from; i <= to; i++)
            {
                ReadOnlySpan<double> input = flight.InputRows.AsSpan(i * flight.Stride, flight.Stride);
                thrust += slope >= 0 ? input[slope + 1] * full : 0;
                for (int j = 0; j < k; j++)
                {
                    if (flight.Kinds[j] is ColumnKind.Brake or ColumnKind.Trimmer or ColumnKind.CgShift)
                        controls += input[j + 1] * filter.Coefficients[j];
                }
                if ((flight.Flags[i] & FlightColumns.Gyro) != 0)
                {
                    ReadOnlySpan<double> row = flight.GyroRows.AsSpan(i * flight.Stride, flight.Stride);
                    double rate = row[0];
                    for (int j = 0; j < k; j++)
                        rate += row[j + 1] * filter.Coefficients[j]; // rows hold minus what a coefficient adds
                    gyro += rate;
                    gyros++;
                }
                if ((flight.Flags[i] & headingBit) != 0)
                {
                    headingFrom = headingFrom < 0 ? i : headingFrom;
                    headingTo = i;
                }
            }
            int count = to - from + 1;
            double turn;
            if (gyros > 0)
                turn = gyro / gyros;
            else if (headingTo > headingFrom)
                turn = (rows[headingTo * flight.Stride] - rows[headingFrom * flight.Stride]) / (flight.TimeSec[headingTo] - flight.TimeSec[headingFrom]);
            else
                return;
            double mean = slope >= 0 || !signals.HasThrust ? thrust / count : MeanThrust(signals, flight.TimeSec[from], flight.TimeSec[to]);
            points.Add(new(flight.TimeSec[from], flight.TimeSec[to], mean, turn - (controls / count), flight.HandsOff[from]));
        }
    }

    /// <summary>A thrust that hardly moved has no column; its windows still lie where they were flown.</summary>
    private static double MeanThrust(TurnSignals signals, double fromSec, double toSec)
    {
        double sum = 0;
        int count = 0;
        for (int i = 0; i < signals.Count; i++)
        {
            if (signals.TimeSec[i] < fromSec || signals.TimeSec[i] > toSec || !double.IsFinite(signals.Thrust[i]))
                continue;
            sum += signals.Thrust[i];
            count++;
        }
        return count > 0 ? sum / count : 0;
    }
}
