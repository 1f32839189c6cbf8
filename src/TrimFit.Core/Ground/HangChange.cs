using TrimFit.Core.Statistics;

namespace TrimFit.Core.Ground;

/// <summary>The hang check of a change: did the weight go the way it should?</summary>
/// <remarks>Two statements are compared: the change of e is the expected one, or its mirror image. The likelihood ratio of the two decides
/// (A. Wald, "Sequential Analysis", 1947: sequential probability ratio test): at least 1000 to confirm, at most 1/20 to call it the wrong way, in
/// between it cannot tell. Under the mirror image the ratio passes 1000 at most once in 1000 looks however often the hangs are repeated
/// and looked at, because it is a martingale there (J. Ville 1939); with normal scatter and one look at most once in 10,000. The bounds differ because
/// confirming a wrong change flies, and doubting a right one only hangs once more. Seating scatter is estimated, so the densities are
/// Student's. A confirmed direction with a size outside its 95 % interval is <see cref="HangChangeVerdict.OtherSize"/>.</remarks>
public static class HangChange
{
    /// <summary>Likelihood ratio from which a change is confirmed.</summary>
    public const double ConfirmRatio = 1000;

    /// <summary>Likelihood ratio of the mirror image from which a change is named wrong.</summary>
    public const double WrongRatio = 20;

    /// <summary>Chance that the advised number of hangs confirms a right change.</summary>
    private const double WantedPower = 0.9;

    /// <summary>More hangs than this are not advised.</summary>
    public const int MostHangs = 12;

    /// <summary>Judges a change.</summary>
    /// <param name="before">Hang check before the change.</param>
    /// <param name="after">Hang check after it, same scales, same kit.</param>
    /// <param name="expectedChangeM">Change of e that the adjustment makes, m, right positive; not 0.</param>
    /// <param name="expectedSdM">Its standard deviation from what was not measured, m; not negative.</param>
    /// <exception cref="ArgumentOutOfRangeException">The expected change is 0 or not finite.</exception>
    public static HangChangeResult Judge(HangCheckResult before, HangCheckResult after, double expectedChangeM, double expectedSdM = 0)
    {
        ArgumentNullException.ThrowIfNull(before);
        ArgumentNullException.ThrowIfNull(after);
        _ = Guard.Positive(Math.Abs(expectedChangeM), nameof(expectedChangeM));
        double spread = Guard.NotNegative(expectedSdM);
        double measured = after.OffsetM - before.OffsetM;
        // One pilot, one seating spread: the second check's own scatter joins what the first one knows.
        // Where either check scatters more than pilots usually do, what is usual is left out.
        bool alone = before.ScattersMore || after.ScattersMore;
        double degrees = (alone ? before.OwnDegreesOfFreedom : before.SeatingDegreesOfFreedom) + after.OwnDegreesOfFreedom;
        double earlier = alone ? before.OwnSquares : before.SeatingDegreesOfFreedom * before.SeatingSdM * before.SeatingSdM;
        double seating = (earlier + after.OwnSquares) / degrees;
        double other = before.OtherVariance + after.OtherVariance;
        double bySeating = (seating / before.Hangs.Length) + (seating / after.Hangs.Length);
        double variance = bySeating + other + (spread * spread);
        double whole = degrees * Math.Pow(variance / bySeating, 2);
        double logRatio = LogRatio(measured, expectedChangeM, variance, whole);
        double half = StudentT.TwoSidedFactor(0.95, whole) * Math.Sqrt(variance);
        HangChangeVerdict verdict = logRatio >= Math.Log(ConfirmRatio)
            ? Math.Abs(measured - expectedChangeM) <= half ? HangChangeVerdict.Confirmed : HangChangeVerdict.OtherSize
            : logRatio <= -Math.Log(WrongRatio) ? HangChangeVerdict.WrongWay : HangChangeVerdict.CannotTell;
        double floor = other + (spread * spread);
        return new()
        {
            Verdict = verdict,
            ExpectedChangeM = expectedChangeM,
            MeasuredChangeM = measured,
            Interval95 = new(measured - half, measured + half, 0.95),
            LogLikelihoodRatio = logRatio,
            HangsAfter = Needed(before.Hangs.Length, after.Hangs.Length),
            HangsEach = Needed(null, Math.Min(before.Hangs.Length, after.Hangs.Length)),
        };

        int? Needed(int? hangsBefore, int hangsNow)
        {
            for (int n = hangsNow + 1; n <= MostHangs; n++)
            {
                double v = floor + (seating / n) + (seating / (hangsBefore ?? n)), d = degrees + (n - hangsNow);
                if (Power(expectedChangeM, v, d * Math.Pow(v / (v - floor), 2)) >= WantedPower)
                    return n;
            }
            return null;
        }
    }

    /// <summary>Logarithm of the Student densities' ratio: expected change over mirror image.</summary>
    private static double LogRatio(double measured, double expected, double variance, double degrees)
    {
        double right = measured - expected, mirrored = measured + expected;
        return double.IsPositiveInfinity(degrees)
            ? 2 * expected * measured / variance
            : (degrees + 1) / 2 * (Math.Log(1 + (mirrored * mirrored / (degrees * variance))) - Math.Log(1 + (right * right / (degrees * variance))));
    }

    /// <summary>Chance that a right change passes the confirming ratio.</summary>
    /// <remarks>The ratio grows with the measured change up to where Student's tails meet, which lies beyond the expected change; the change at which it
    /// passes is searched between 0 and the expected one.</remarks>
    private static double Power(double expected, double variance, double degrees)
    {
        double wanted = Math.Log(ConfirmRatio), size = Math.Abs(expected);
        if (LogRatio(size, size, variance, degrees) < wanted)
            return 0;
        double low = 0, high = size;
        for (int i = 0; i < 60; i++)
        {
            double middle = (low + high) / 2;
            if (LogRatio(middle, size, variance, degrees) < wanted)
                low = middle;
            else
                high = middle;
        }
        return StudentT.Cdf((size - high) / Math.Sqrt(variance), degrees);
    }
}
