using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Tests.Analysis;

public class ShopMemoryTests
{
    private static readonly MadeUpFlight _flight = new() { ConstantDegPerSec = 0.1, PowerDegPerSec = -4, BallastDegPerSec = 1.8 };

    private static MeasuredSensitivity Wing(long job, double logMedian, double logSd = 0.3, double? area = 26, double kg = 115, string wingId = "") =>
        new() { Job = job, WingId = wingId, Source = "pair", LogMedian = logMedian, LogSd = logSd, WingAreaM2 = area, SuspendedKg = kg };

    [Fact]
    public void Two_wings_say_nothing_about_a_third()
    {
        Assert.Null(ShopMemory.Of([Wing(1, 1.6), Wing(2, 1.6)], 26, 115));
        Assert.NotNull(ShopMemory.Of([Wing(1, 1.6), Wing(2, 1.6), Wing(3, 1.6)], 26, 115));
        Assert.Null(ShopMemory.Of([Wing(1, 1.6, wingId: "A"), Wing(2, 1.6, wingId: "A"), Wing(3, 1.6)], 26, 115)); // one wing in two jobs is one wing
    }

    [Fact]
    public void A_similar_wing_of_twice_the_area_under_the_same_load_turns_two_to_the_one_and_a_half_less()
    {
        // By hand: V goes with (m/A)^½ and b² with A, so S goes with V/b² = m^½ A^(-3/2): 2^(-1.5) for twice the area, 2^(0.5) for twice the load.
        MeasuredSensitivity[] shop = [Wing(1, 1.6), Wing(2, 1.6), Wing(3, 1.6), Wing(4, 1.6)];
        ShopMemory same = ShopMemory.Of(shop, 26, 115)!, larger = ShopMemory.Of(shop, 52, 115)!, heavier = ShopMemory.Of(shop, 26, 230)!;
        Accuracy.AgreesTo(9, 1.6, same.LogMedian);
        Accuracy.AgreesTo(9, 1.6 - (1.5 * Math.Log(2)), larger.LogMedian);
        Accuracy.AgreesTo(9, 1.6 + (0.5 * Math.Log(2)), heavier.LogMedian);
        Assert.True(larger.LogSd > heavier.LogSd && heavier.LogSd > same.LogSd); // what is carried farther is known less well
    }

    [Fact]
    public void A_size_that_is_not_known_costs_width_and_moves_nothing()
    {
        ShopMemory known = ShopMemory.Of([Wing(1, 1.6), Wing(2, 1.6), Wing(3, 1.6)], 26, 115)!;
        ShopMemory unknown = ShopMemory.Of([Wing(1, 1.6, area: null), Wing(2, 1.6, area: null), Wing(3, 1.6, area: null)], 26, 150)!;
        Accuracy.AgreesTo(9, 1.6, unknown.LogMedian);
        Assert.True(unknown.LogSd > known.LogSd);
        // Where the new wing's size is not known, the load alone moves nothing either.
        Accuracy.AgreesTo(9, 1.6, ShopMemory.Of([Wing(1, 1.6), Wing(2, 1.6), Wing(3, 1.6)], null, 250)!.LogMedian);
    }

    [Fact]
    public void A_wing_that_behaves_otherwise_is_named_and_not_averaged_in()
    {
        MeasuredSensitivity[] others = [.. Enumerable.Range(2, 8).Select(j => Wing(j, 1.6 + (0.05 * (j % 3))))];
        ShopMemory without = ShopMemory.Of(others, 26, 115)!, with = ShopMemory.Of([Wing(1, 1.6 + Math.Log(8), wingId: "odd"), .. others], 26, 115)!;
        SetAsideWing odd = Assert.Single(with.SetAside);
        Assert.Equal((1L, "odd"), (odd.Job, odd.WingId));
        Assert.InRange(odd.P, 0, ShopMemory.ConflictP);
        Accuracy.AgreesTo(12, without.LogMedian, with.LogMedian);
        Accuracy.AgreesTo(12, without.LogSd, with.LogSd);
        Assert.Empty(without.SetAside);
    }

    [Fact]
    public void The_order_of_the_jobs_does_not_matter()
    {
        MeasuredSensitivity[] shop = [Wing(1, 1.2), Wing(2, 1.9, 0.5), Wing(3, 1.6, 0.2), Wing(4, 4.5)];
        ShopMemory forward = ShopMemory.Of(shop, 24, 100)!, back = ShopMemory.Of(shop.Reverse(), 24, 100)!;
        Accuracy.AgreesTo(12, forward.LogMedian, back.LogMedian);
        Accuracy.AgreesTo(12, forward.LogSd, back.LogSd);
    }

    [Fact]
    public void The_mixture_over_the_spread_between_agrees_with_a_sum_over_a_fine_grid()
    {
        // Independent: posterior of (mu, tau) on a grid by brute force, prediction by its cumulative sum. Five studies, half-normal(0.35) on tau.
        double[] y = [1.2, 1.9, 1.6, 1.4, 2.1], v = [0.09, 0.16, 0.12, 0.2, 0.1];
        const double scale = 0.35;
        double total = 0, mean = 0, meanTau = 0;
        var nodes = new List<(double Mu, double Tau, double Weight)>();
        for (double tau = 0.002; tau < 2; tau += 0.004)
        {
            for (double mu = -1; mu < 4; mu += 0.01)
            {
                double log = -0.5 * tau * tau / (scale * scale);
                for (int i = 0; i < y.Length; i++)
                    log -= 0.5 * (Math.Log(v[i] + (tau * tau)) + ((y[i] - mu) * (y[i] - mu) / (v[i] + (tau * tau))));
                double weight = Math.Exp(log);
                nodes.Add((mu, tau, weight));
                (total, mean, meanTau) = (total + weight, mean + (weight * mu), meanTau + (weight * tau));
            }
        }
        (mean, meanTau) = (mean / total, meanTau / total);
        double Inside(double half) => nodes.Sum(n => n.Weight * (StandardNormal.Cdf((mean + half - n.Mu) / n.Tau) - StandardNormal.Cdf((mean - half - n.Mu) / n.Tau))) / total;
        double low = 0, high = 5;
        for (int i = 0; i < 40; i++)
            (low, high) = Inside((low + high) / 2) < 0.95 ? ((low + high) / 2, high) : (low, (low + high) / 2);
        RandomEffectsPrediction prediction = RandomEffectsPrediction.Of(y, v, scale);
        Accuracy.AgreesTo(3, mean, prediction.Mean);
        Accuracy.AgreesTo(2, meanTau, prediction.BetweenSd);
        Accuracy.AgreesTo(2, high / 1.959964, prediction.StandardDeviation);
    }

    [Fact]
    public void An_unknown_slope_widens_by_its_spread_times_the_difference()
    {
        // By hand: one study of variance 0.04 that differs by 2, slope 0 ± 0.1: 0.04 + (0.1 × 2)² = 0.08.
        RandomEffectsPrediction prediction = RandomEffectsPrediction.Of([1.5], [0.04], 1e-6, [[2.0]], 0.1);
        Accuracy.AgreesTo(9, 1.5, prediction.Mean);
        Accuracy.AgreesTo(4, Math.Sqrt(0.08), prediction.StandardDeviation);
        // By hand: two exact studies at -1 and 1 with values 1 and 3 and a free slope give 2 in the middle.
        RandomEffectsPrediction line = RandomEffectsPrediction.Of([1, 3], [1e-6, 1e-6], 1e-6, [[-1.0, 1.0]], 1e3);
        Accuracy.AgreesTo(6, 2, line.Mean);
    }

    [Fact]
    public void One_study_with_a_known_spread_of_nearly_nothing_is_predicted_as_it_is()
    {
        RandomEffectsPrediction prediction = RandomEffectsPrediction.Of([1.5], [0.04], 1e-6);
        Accuracy.AgreesTo(9, 1.5, prediction.Mean);
        Accuracy.AgreesTo(4, 0.2, prediction.StandardDeviation); // the normal of the study itself
    }

    [Fact]
    public void The_prior_predictive_p_is_that_of_the_normal()
    {
        ShopMemory memory = new() { LogMedian = 1, LogSd = 0.3, Wings = 5, BetweenLogSd = 0.2 };
        // By hand: sqrt(0.3² + 0.4²) = 0.5, so 1.96 standard deviations are 0.98.
        Accuracy.AgreesTo(4, 0.05, memory.PriorPredictiveP(1.98, 0.4));
        Accuracy.AgreesTo(9, 1, memory.PriorPredictiveP(1, 0.4));
    }

    [Fact]
    public void The_memory_joins_the_prior_as_one_more_log_normal()
    {
        TurnSignals signals = TurnSignals.From(_flight.Fly(), MadeUpFlight.Rig());
        TurnFit fit = SensitivitySourcesTests.FitOf(signals, (0.1, 0.1), (-4, 0.2));
        ShopMemory memory = new() { LogMedian = Math.Log(double.DegreesToRadians(0.12) * 1000), LogSd = 0.3, Wings = 9, BetweenLogSd = 0.2 };
        TrimPosterior posterior = TrimPosterior.Draw(MadeUpFlight.Rig(), new RigSpread(MadeUpFlight.Rig()), fit, signals, new() { ShopMemory = memory, Draws = 20_000 }, SensitivitySources.Memory);
        // By hand: prior ln 0.09 with sd ln 3/1.96 = 0.5605, memory ln 0.12 with sqrt(0.3² + 0.25²) = 0.3905: precisions 3.183 and 6.557,
        // so median exp((3.183 ln 0.09 + 6.557 ln 0.12)/9.740) = 0.10923 deg/s per mm and sd 0.32042.
        Assert.Equal(0.10923, double.RadiansToDegrees(posterior.Report.RadPerSecPerM!.Value) / 1000, 0.001);
        Assert.Equal(0.32042, Math.Log(posterior.Report.Interval95!.Value.Upper / posterior.Report.Interval95.Value.Lower) / (2 * 1.96), 0.01);
        Assert.True(posterior.Report.Sources.Single(s => s.Kind == ShopMemory.Kind).Used);
    }

    [Fact]
    public void A_memory_that_this_flights_ballast_contradicts_is_named_and_changes_nothing()
    {
        ShopMemory memory = new() { LogMedian = Math.Log(double.DegreesToRadians(0.9) * 1000), LogSd = 0.2, Wings = 9, BetweenLogSd = 0.1 }; // ten times what the legs show
        FlightLog log = _flight.Fly();
        TrimAnalysis without = TrimAnalysis.Run(log, MadeUpFlight.Rig(), new(), _flight.Legs());
        TrimAnalysis with = TrimAnalysis.Run(log, MadeUpFlight.Rig(), new() { ShopMemory = memory }, _flight.Legs());
        Finding named = with.Warnings.Single(w => w.Code == FindingCode.ShopMemoryConflict);
        Assert.Equal(2, named.Values[0]); // the ballast leg
        Assert.InRange(named.Values[1], 0.05, 0.2);
        Assert.InRange(named.Values[2], 0, 0.05);
        Assert.False(with.Sensitivity.Sources.Single(s => s.Kind == ShopMemory.Kind).Used);
        Assert.Equal(without.Sensitivity.RadPerSecPerM, with.Sensitivity.RadPerSecPerM);
        Assert.Equal(without.Shift, with.Shift! with { Ratios = without.Shift!.Ratios, TurnLeftAt = without.Shift.TurnLeftAt });
        Assert.Equal(without.Verdict.Code, with.Verdict.Code);
    }

    [Fact]
    public void A_memory_that_fits_makes_the_shift_narrower()
    {
        ShopMemory memory = new() { LogMedian = Math.Log(double.DegreesToRadians(0.09) * 1000), LogSd = 0.2, Wings = 9, BetweenLogSd = 0.1 };
        FlightLog log = _flight.Fly();
        TrimAnalysis without = TrimAnalysis.Run(log, MadeUpFlight.Rig(), new()), with = TrimAnalysis.Run(log, MadeUpFlight.Rig(), new() { ShopMemory = memory });
        Assert.True(with.Shift!.Interval95.HalfWidth < 0.8 * without.Shift!.Interval95.HalfWidth);
        Assert.Equal(without.Verdict.Strength, with.Verdict.Strength); // other wings are no measurement of this one
    }

    [Fact]
    public void What_an_analysis_tells_the_memory_is_what_its_known_shift_showed()
    {
        TrimAnalysis analysis = TrimAnalysis.Run(_flight.Fly(), MadeUpFlight.Rig(), new(), _flight.Legs());
        MeasuredSensitivity measured = Assert.Single(MeasuredSensitivity.From(analysis, 7, "W1"));
        SensitivitySource source = analysis.Sensitivity.Sources.Single(s => s.Kind == "ballast");
        Assert.Equal((7L, "W1", "ballast"), (measured.Job, measured.WingId, measured.Source));
        Accuracy.AgreesTo(12, source.RadPerSecPerM, Math.Exp(measured.LogMedian));
        Accuracy.AgreesTo(9, source.Interval95.Upper / source.Interval95.Lower, Math.Exp(2 * 1.96 * measured.LogSd));
        Assert.Empty(MeasuredSensitivity.From(TrimAnalysis.Run(_flight.Fly(), MadeUpFlight.Rig(), new()), 7, ""));
    }
}
