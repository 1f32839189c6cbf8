using System.Collections.Immutable;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Ground;

/// <summary>The hang check: pilot in full kit on two hanging scales, engine cold, plug cap off, in and out several times.</summary>
/// <remarks>e_i = e ± b + seat_i: b is the scales' difference in calibration as an offset, known only by its spread, and changes its sign when the
/// scales change places; seat_i differs from hang to hang with a spread pooled from the hangs and from <see cref="HangCheckOptions"/>.
/// Generalised least squares of e and b; the tape's error scales e. Derivation: DEVELOPERS.md, "Ground checks".</remarks>
public static class HangCheck
{
    /// <summary>Hangs that would scatter so with this probability or less, were the pilot a usual one, speak for themselves alone.</summary>
    /// <remarks>Costs nothing for the usual pilot (coverage 95.4 and 95.5 % of three hangs without and with it) and gives 88 instead of 84 % at 8 mm.</remarks>
    private const double OtherPilot = 0.10;

    /// <summary>Finds e from the hangs.</summary>
    /// <param name="hangs">At least one; both scales above 0 together.</param>
    /// <param name="spacingM">Distance between the riser carabiners, m; above 0.</param>
    /// <param name="spacingSdM">Its standard deviation, m; not negative.</param>
    /// <param name="pilotShare">m_p/m: a seat that is off by 1 mm shifts e by this, from 0 to 1.</param>
    /// <param name="options">Scales and seating.</param>
    /// <exception cref="ArgumentOutOfRangeException">No hang, or an argument outside its range.</exception>
    public static HangCheckResult Measure(ImmutableArray<HangReading> hangs, double spacingM, double spacingSdM, double pilotShare, HangCheckOptions? options = null)
    {
        options ??= new();
        ArgumentOutOfRangeException.ThrowIfZero(hangs.Length);
        foreach (HangReading hang in hangs)
            _ = Guard.Positive(Guard.NotNegative(hang.LeftKg) + Guard.NotNegative(hang.RightKg));
        double s = Guard.Positive(spacingM), n = hangs.Length;
        double sum = hangs.Average(h => h.SumKg);
        double[] offsets = [.. hangs.Select(h => h.OffsetM(s))];

        // Scatter inside each place of the scales, so that b does not enter it; pooled with what pilots usually scatter by.
        (double squares, double own) = Scatter(hangs, offsets);
        double prior = options.SeatingSdM * Math.Clamp(Guard.Finite(pilotShare), 0.01, 1);
        bool alone = own > 0 && FisherF.UpperTail(squares / own / (prior * prior), own, options.SeatingDegreesOfFreedom) < OtherPilot;
        double degrees = alone ? own : options.SeatingDegreesOfFreedom + own;
        double variance = alone ? squares / own : ((options.SeatingDegreesOfFreedom * prior * prior) + squares) / degrees;

        double scaleSd = s * Math.Sqrt(2) * options.ScaleSdKg / (2 * sum), byB = 1 / (scaleSd * scaleSd);
        double balance = hangs.Sum(h => h.Exchanged ? -1.0 : 1); // +n with the scales in one place, 0 when they changed half the time
        double total = offsets.Sum(), signed = hangs.Zip(offsets, (h, e) => h.Exchanged ? -e : e).Sum();
        // Normal equations of (e, b): [n, balance; balance, n + variance/scaleSd²] (e, b) = (total, signed), all over the variance.
        double corner = n + (variance * byB), determinant = (n * corner) - (balance * balance);
        double offset = ((corner * total) - (balance * signed)) / determinant;
        double offsetVariance = variance * corner / determinant;
        double tape = offset * Guard.NotNegative(spacingSdM) / s;
        double wholeVariance = offsetVariance + (tape * tape);
        double seating = variance / n;
        return new()
        {
            OffsetM = offset,
            StandardError = Math.Sqrt(wholeVariance),
            DegreesOfFreedom = degrees * Math.Pow(wholeVariance / seating, 2), // Satterthwaite: only the seating's share is estimated
            SeatingSdM = Math.Sqrt(variance),
            SeatingDegreesOfFreedom = degrees,
            ScattersMore = alone,
            OwnDegreesOfFreedom = own,
            OwnSquares = squares,
            OtherVariance = Math.Max(0, wholeVariance - seating),
            SpacingM = s,
            SumKg = sum,
            Hangs = hangs,
        };
    }

    /// <summary>Sum of squares around the mean of each place of the scales, and its degrees of freedom.</summary>
    internal static (double Squares, double Degrees) Scatter(ImmutableArray<HangReading> hangs, double[] offsets)
    {
        double squares = 0, degrees = 0;
        foreach (bool exchanged in (ReadOnlySpan<bool>)[false, true])
        {
            double[] some = [.. offsets.Where((_, i) => hangs[i].Exchanged == exchanged)];
            if (some.Length == 0)
                continue;
            double mean = some.Average();
            squares += some.Sum(e => (e - mean) * (e - mean));
            degrees += some.Length - 1;
        }
        return (squares, degrees);
    }

    /// <summary>Readings to expect on the two scales, kg: W (1/2 ± e/s).</summary>
    /// <param name="suspendedKg">Everything that hangs, kg.</param>
    /// <param name="offsetM">e, m.</param>
    /// <param name="spacingM">s, m; above 0.</param>
    public static HangReading Expected(double suspendedKg, double offsetM, double spacingM)
    {
        double moved = suspendedKg * Guard.Finite(offsetM) / Guard.Positive(spacingM);
        return new((suspendedKg / 2) - moved, (suspendedKg / 2) + moved);
    }
}
