using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>Where a known shift was flown the shift wanted is a plain ratio of two estimates, and Fieller's set checks it.</summary>
/// <remarks>Ballast: −pull/(turn per known CG shift). Pair: −pull/(change of turn between the flights) in units of what was moved. Both carry
/// the yaw moment with them, as the shift that was flown did.</remarks>
internal static class RatioCheck
{
    /// <summary>The sets at 95 %, by source; empty without a known shift.</summary>
    public static IEnumerable<(string Source, FiellerSet Set)> Of(TurnSignals signals, TurnFit fit, PowerLevels levels, TrimOptions options)
    {
        double balance = levels.Balance * signals.FullThrust;
        if (fit.PullAt(balance) is not Estimate pull)
            yield break;
        Estimate numerator = pull with { Value = -pull.Value };
        if (fit[TurnCoefficient.CgShift] is Estimate perShift)
        {
            int n = fit.Coefficients.Length, at = 0;
            while (fit.Coefficients[at].Name != TurnCoefficient.CgShift)
                at++;
            double covariance = fit.Covariance[at] + (balance * fit.Covariance[n + at]) + (balance * balance * fit.Covariance[(2 * n) + at]);
            yield return ("ballast", Fieller.Ratio(numerator, perShift, -covariance, fit.DegreesOfFreedom, 0.95));
        }
        foreach (KnownChange change in options.KnownChanges)
        {
            // At the thrust nearest to the balance: other flight less this one, per whole travel.
            int nearest = 0;
            for (int i = 1; i < change.ThrustFractions.Length; i++)
            {
                if (Math.Abs(change.ThrustFractions[i] - levels.Balance) < Math.Abs(change.ThrustFractions[nearest] - levels.Balance))
                    nearest = i;
            }
            int m = change.ThrustFractions.Length;
            Estimate here = fit.PullAt(change.ThrustFractions[nearest] * signals.FullThrust)!.Value;
            double variance = here.StandardError * here.StandardError;
            var difference = new Estimate(change.TurnRateRadPerSec[nearest] - here.Value, Math.Sqrt(change.Covariance[(nearest * m) + nearest] + variance));
            yield return ("pair", Fieller.Ratio(here with { Value = -here.Value }, difference, variance, fit.DegreesOfFreedom, 0.95));
        }
    }
}
