using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Planning;

/// <summary>Predicts the intervals a card will give: flights drawn from the model go through the same fit and posterior as a real one.</summary>
internal static class CardPredictor
{
    /// <summary>Draws of the posterior of one predicted flight: its ends then move by some 3 %, less than flights differ.</summary>
    private const int PosteriorDraws = 2000;

    /// <summary>Covariances are shrunk by this to see what the sensitivity alone leaves: half a percent of the variance stays, and the posterior
    /// still finds enough draws.</summary>
    private const double Exact = 0.01;

    /// <summary>Predicts.</summary>
    public static CardPrediction Predict(
        Rig rig, RigSpread spread, CardMachine machine, CardOptions options, ImmutableArray<CardLeg> legs, Action? each = null)
    {
        TrimOptions trim = new() { BalanceThrust = options.BalanceThrust, Tolerance = options.Tolerance, Draws = PosteriorDraws, Seed = options.Seed };
        var flights = new List<(double StdError, double HalfWidth, double? Shift, double? Floor, TurnFit Fit, ImmutableArray<SensitivitySource> Sources)>();
        double known = double.NaN;
        for (int i = 0; i < options.Draws; i++)
        {
            TurnSignals signals = CardFlight.Draw(legs, machine, SeededRandom.ForStream(options.Seed, (ulong)(i + 1)));
            if (i == 0 && CardInformation.Of(signals, machine.Noise, machine.Slope) is CardInformation information)
                known = Math.Sqrt(information.PullVariance(machine.Balance));
            TurnFit fit = new FilterErrorEstimator().Estimate(signals);
            PowerLevels levels = PowerLevels.Of(signals, fit, options.BalanceThrust);
            PullReport pull = TrimAnalysis.PullOf(signals, fit, levels);
            if (pull.AtBalance.Interval95 is ConfidenceInterval interval)
            {
                (double? width, ImmutableArray<SensitivitySource> sources) = Shift(fit, levels);
                TurnFit exact = fit with { Covariance = [.. fit.Covariance.Select(c => Exact * c)] };
                double? floor = Shift(exact, levels with { BalanceStdError = 0 }).Width;
                flights.Add((interval.HalfWidth / StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom), interval.HalfWidth, width, floor, fit, sources));
            }
            each?.Invoke();

            (double? Width, ImmutableArray<SensitivitySource> Sources) Shift(TurnFit of, PowerLevels at)
            {
                TrimPosterior posterior = TrimPosterior.Draw(rig, spread, of, signals, trim);
                return posterior.Report.RadPerSecPerM is null ? (null, [])
                    : (ShiftSolver.Shift(posterior, at, signals, of).Interval95.HalfWidth, posterior.Report.Sources);
            }
        }
        if (flights.Count == 0)
            throw new InvalidOperationException("no drawn flight of this card could be fitted");
        var byWidth = flights.OrderBy(f => f.HalfWidth).ToList();
        TurnFit middle = byWidth[byWidth.Count / 2].Fit;
        return new()
        {
            KnownNoiseStdErrorRadPerSec = known,
            PullStdErrorRadPerSec = Middle(flights.Select(f => (double?)f.StdError))!.Value,
            PullHalfWidthRadPerSec = Middle(flights.Select(f => (double?)f.HalfWidth))!.Value,
            ShiftHalfWidthM = Middle(flights.Select(f => f.Shift)),
            SensitivityFloorM = Middle(flights.Select(f => f.Floor)),
            Sources = [.. byWidth[byWidth.Count / 2].Sources.Where(s => s.Used).Select(s => s.Kind)],
            Coefficients = [.. middle.Coefficients.Select(c => c.Name)],
            Covariance = middle.Covariance,
            Draws = options.Draws,
        };
    }

    private static double? Middle(IEnumerable<double?> values)
    {
        double[] finite = [.. values.OfType<double>()];
        return finite.Length > 0 ? QuantileType7.Of(finite, 0.5) : null;
    }
}
