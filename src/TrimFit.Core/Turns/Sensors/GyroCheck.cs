using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Compares a yaw gyro with the turn of the GPS or compass heading and mends sign, unit, scale and delay.</summary>
internal static class GyroCheck
{
    private const double DegreesInRadian = 180 / Math.PI;

    /// <summary>Share of the heading's turn that a mounting askew may leave of the gyro's (60 deg), and the most a calibration may add.</summary>
    private const double SmallestScale = 0.5, LargestScale = 1.4;

    /// <summary>A scale is mended when it is off by three standard errors.</summary>
    private const double ScaleErrors = 3;

    /// <summary>What a slowly changing wind (0.3 m/s) leaves in the scale of a flight with a dozen turns, beside the regression's own error. With it
    /// the error stated was 1.2 to 1.7 times the scatter over made-up flights in calm and rough air (DEVELOPERS.md); without, it was too small.</summary>
    private const double SlowWindScaleError = 0.012;

    /// <summary>A delay is mended beyond three standard errors and 0.05 s, what brakes and gyro must be aligned to (model page section 2).</summary>
    private const double DelayErrors = 3, DelayFloorSec = 0.05, LargestDelayErrorSec = 0.3;

    /// <summary>A slope counts beyond five standard errors; a scale of no known unit calibrates the gyro when it is known to 3 %.</summary>
    private const double ClearErrors = 5, CalibrationError = 0.03;

    /// <summary>What came of it.</summary>
    /// <param name="Report">Numbers for people.</param>
    /// <param name="Gyro">The mended rate; empty when the gyro is set aside.</param>
    /// <param name="HeadingAheadSec">Time by which the heading must be moved earlier, s; 0 when it need not.</param>
    /// <param name="Factor">What the rate was multiplied by.</param>
    public sealed record Result(GyroReport Report, double[] Gyro, double HeadingAheadSec, double Factor);

    /// <summary>Checks and mends.</summary>
    /// <param name="time">Clock, s.</param>
    /// <param name="gyro">Yaw rate, rad/s; NaN where missing.</param>
    /// <param name="heading">Unwrapped heading, rad; NaN where missing; empty when there is none.</param>
    /// <param name="inFlight">Where the two may be compared; strong turns are welcome.</param>
    /// <param name="throughAir">Whether the heading is that through the air: over ground in an unknown wind only sign and unit can be told.</param>
    /// <param name="bias">Bias known beforehand (standing still), in the gyro's own unit.</param>
    /// <param name="findings">Receives what people should know.</param>
    public static Result Of(double[] time, double[] gyro, double[] heading, bool[] inFlight, bool throughAir, Estimate? bias, List<Finding> findings)
    {
        if (heading.Length == 0
            || new HeadingRegression(time, [gyro], heading, inFlight).Fit(true, throughAir) is not HeadingMatch match
            || !(Math.Abs(match.Coefficients[0]) > ClearErrors * match[0].StandardError))
            return new(new GyroReport { BiasRadPerSec = bias }, gyro, 0, 1);

        double slope = match.Coefficients[0];
        double scale = 1 / slope, scaleError = double.Hypot(match[0].StandardError / slope, SlowWindScaleError) / Math.Abs(slope);
        double size = Math.Abs(scale);
        int sign = Math.Sign(scale);
        double unit = NearestUnit(size);
        bool unitKnown = size / unit is > SmallestScale and < LargestScale || !throughAir;
        double divide = unit;
        if (!unitKnown)
        {
            bool calibrates = scaleError < CalibrationError * size;
            findings.Add(Finding.Of(FindingCode.GyroScaleOff, size, calibrates ? 1 : 0));
            if (!calibrates)
                return new(new GyroReport { Scale = scale, ScaleStdError = scaleError, Sign = sign }, [], 0, 1);
            divide = size;
        }
        else if (unit != 1)
        {
            findings.Add(Finding.Of(FindingCode.GyroUnitCorrected, size));
        }
        double rest = size / divide, restError = scaleError / divide;
        if (throughAir && Math.Abs(rest - 1) > ScaleErrors * restError)
        {
            findings.Add(Finding.Of(FindingCode.GyroScaleCorrected, rest, restError, rest < 1 ? Math.Acos(rest) : 0));
            divide *= rest;
        }
        if (sign < 0)
            findings.Add(Finding.Of(FindingCode.GyroSignReversed, scale));
        double factor = sign / divide;
        double[] mended = factor == 1 ? gyro : [.. gyro.Select(g => g * factor)];

        double ahead = 0;
        Estimate? delay = throughAir && match.DelaySec is Estimate d && d.StandardError < LargestDelayErrorSec ? d : null;
        if (delay is Estimate late && Math.Abs(late.Value) > Math.Max(DelayFloorSec, DelayErrors * late.StandardError))
        {
            // No sensor is early: the one that is behind is moved.
            if (late.Value > 0)
            {
                mended = Earlier(time, mended, late.Value);
                findings.Add(Finding.Of(FindingCode.GyroDelayed, late.Value, late.StandardError));
            }
            else
            {
                ahead = -late.Value;
                findings.Add(Finding.Of(FindingCode.GpsDelayed, ahead, late.StandardError));
            }
        }
        // heading rate = slope · gyro + intercept, so the gyro reads −intercept/slope where nothing turns.
        Estimate found = new(-match.Intercept.Value / slope * factor, Math.Abs(match.Intercept.StandardError / slope * factor));
        Estimate? known = bias is Estimate b ? new(b.Value * factor, b.StandardError * Math.Abs(factor)) : null;
        return new(
            new GyroReport
            {
                BiasRadPerSec = !throughAir && known is not null ? known : found,
                Scale = scale,
                ScaleStdError = scaleError,
                Sign = sign,
                DelaySec = delay?.Value,
                DelayStdErrorSec = delay?.StandardError,
            },
            mended, ahead, factor);
    }

    /// <summary>A column that is behind by a delay, brought to the clock by whole samples.</summary>
    /// <remarks>Never between samples: the mean of two readings has another noise than a reading, and a likelihood that takes the column for
    /// measurements with white noise then finds air and wing that are not there. What is left is at most half a sample step.</remarks>
    public static double[] Earlier(double[] time, double[] column, double delaySec)
    {
        int[] have = [.. Enumerable.Range(0, time.Length).Where(i => double.IsFinite(column[i]))];
        var moved = new double[column.Length];
        Array.Fill(moved, double.NaN);
        if (have.Length < 2)
            return moved;
        double step = Median.Of([.. have.Skip(1).Select((h, i) => time[h] - time[have[i]])]);
        int shift = (int)Math.Round(delaySec / step, MidpointRounding.AwayFromZero);
        for (int i = 0; i < have.Length; i++)
        {
            int from = i + shift;
            if (from >= 0 && from < have.Length && Math.Abs(time[have[from]] - time[have[i]] - (shift * step)) <= step) // not across a pause
                moved[have[i]] = column[have[from]];
        }
        return moved;
    }

    /// <summary>Values that belong to an earlier time, put on the nearest rows of the clock.</summary>
    public static double[] MovedEarlier(double[] time, double[] column, double bySec)
    {
        var moved = new double[column.Length];
        Array.Fill(moved, double.NaN);
        int k = 0;
        for (int i = 0; i < column.Length; i++)
        {
            if (!double.IsFinite(column[i]))
                continue;
            double t = time[i] - bySec;
            if (t < time[0])
                continue;
            while (k + 1 < time.Length && time[k + 1] <= t)
                k++;
            int nearest = k + 1 < time.Length && time[k + 1] - t < t - time[k] ? k + 1 : k;
            moved[nearest] = column[i];
        }
        return moved;
    }

    /// <summary>1, or the factor between degrees and radians either way, whichever is nearest by ratio.</summary>
    private static double NearestUnit(double size) => size < 1 / Math.Sqrt(DegreesInRadian) ? 1 / DegreesInRadian : size > Math.Sqrt(DegreesInRadian) ? DegreesInRadian : 1;
}
