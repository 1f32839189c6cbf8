using MathNet.Numerics.LinearAlgebra;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Tests.Analysis;
using static TrimFit.Tests.Comparing.MadeUpPair;

namespace TrimFit.Tests.Comparing;

public class FlightComparisonTests
{
    [Fact]
    public void A_known_scatter_adds_to_both_flights_errors()
    {
        // By hand: errors 0.3 and 0.4, scatter 0.5 on each: change 1.2 with sqrt(0.09 + 0.16 + 0.25 + 0.25) = 0.8660.
        FlightComparison c = Compare(Known(0.5), Flight("a", 2, 0.3), Flight("b", 0.8, 0.4, rig: Moved(0.01)));
        SettingChange off = c.Changes[0];
        Accuracy.AgreesTo(5, Deg(-1.2), off.Change.Mean);
        Accuracy.AgreesTo(4, Deg(0.8660254), off.Change.StandardError);
        Accuracy.AgreesTo(4, Deg(2 - (1.959964 * Math.Sqrt(0.09 + 0.25))), off.Before.Interval95.Lower);
    }

    [Fact]
    public void A_scatter_that_is_not_known_is_integrated_out()
    {
        // Independent: quadrature over the half-normal prior, 100,000 draws of its own seed, of a normal change with variance 0.02 + 2 σ².
        FlightComparison c = Compare(new() { WithNext = false }, Flight("a", 0, 0.1), Flight("b", 0, 0.1, rig: Moved(0.01)));
        var random = new SeededRandom(11);
        double[] draws = new double[100_000];
        for (int i = 0; i < draws.Length; i++)
            draws[i] = random.NextNormal() * Math.Sqrt(0.02 + (2 * Math.Pow(0.4 * random.NextNormal(), 2)));
        // Standard error of the 97.5 % quantile of so many draws: about 0.008.
        Assert.Equal(QuantileType7.Of(draws, 0.975), double.RadiansToDegrees(c.Changes[0].Interval95.Upper), 0.03);
        Assert.True(c.Scatter is { Learned: false });
    }

    [Fact]
    public void Flights_of_one_setting_that_differ_teach_a_larger_scatter_and_flights_that_agree_a_smaller_one()
    {
        FlightComparison agree = Compare(new() { WithNext = false }, Flight("a", 1.0, 0.1), Flight("a", 1.02, 0.1)), differ = Compare(new() { WithNext = false }, Flight("a", 0, 0.1), Flight("a", 2, 0.1));
        Assert.True(agree.Scatter!.MedianRadPerSec < differ.Scatter!.MedianRadPerSec);
        Assert.True(agree.Setups[0].At[0].Interval95.HalfWidth < differ.Setups[0].At[0].Interval95.HalfWidth);
        Assert.True(differ.Scatter.Learned);
        Assert.Null(agree.Verdict); // one setting: nothing was changed
    }

    [Fact]
    public void The_flights_coefficients_and_covariances_hold_all_that_one_fit_of_both_logs_would()
    {
        // One stacked regression of two logs with an indicator on each coefficient, each log with its own noise, against the comparison of the
        // two regressions: same change, same covariance. Two flights before, one after.
        var random = new SeededRandom(5);
        double full = 600;
        (Matrix<double> X, Vector<double> Y, double Sd)[] logs = [.. Enumerable.Range(0, 3).Select(i =>
        {
            int rows = 60 + (20 * i);
            double sd = Deg(0.3 + (0.2 * i));
            Matrix<double> x = Matrix<double>.Build.Dense(rows, 3, (r, c) => Math.Pow(full * ((r * 7 % 11) / 10.0), c));
            return (x, x * Vector<double>.Build.Dense([Deg(i == 2 ? 0.2 : 1.5), Deg(-2) / full, Deg(0.3) / (full * full)]) + Vector<double>.Build.Dense(rows, _ => sd * random.NextNormal()), sd);
        })];
        // Stacked: three columns of the first setting, three of the change.
        Matrix<double> information = Matrix<double>.Build.Dense(6, 6);
        Vector<double> score = Vector<double>.Build.Dense(6);
        Vector<double> scale = Vector<double>.Build.Dense([1, full, full * full, 1, full, full * full]);
        for (int i = 0; i < 3; i++)
        {
            Matrix<double> x = (i == 2 ? logs[i].X.Append(logs[i].X) : logs[i].X.Append(logs[i].X * 0)) * Matrix<double>.Build.DiagonalOfDiagonalVector(1 / scale) / logs[i].Sd;
            information += x.Transpose() * x;
            score += x.Transpose() * logs[i].Y / logs[i].Sd;
        }
        Matrix<double> covariance = information.Inverse();
        Vector<double> stacked = covariance * score; // per full thrust

        ComparedFlight[] flights = [.. logs.Select((log, i) =>
        {
            Matrix<double> v = (log.X.Transpose() * log.X / (log.Sd * log.Sd)).Inverse();
            Vector<double> b = v * (log.X.Transpose() * log.Y) / (log.Sd * log.Sd);
            ComparedFlight flight = Flight(i == 2 ? "b" : "a", 0, 1, rig: i == 2 ? Moved(0.01) : null);
            string[] names = [TurnCoefficient.Constant, TurnCoefficient.Thrust, TurnCoefficient.ThrustSquared];
            TurnFit fit = flight.Analysis.Fit with
            {
                Coefficients = [.. names.Select((n, j) => new TurnCoefficient(n, new Estimate(b[j], Math.Sqrt(v[j, j])), ""))],
                Covariance = [.. Enumerable.Range(0, 9).Select(at => v[at / 3, at % 3])],
                DegreesOfFreedom = 1e9,
            };
            return flight with { Analysis = flight.Analysis with { Fit = fit } };
        })];
        FlightComparison c = Compare(Known(0), flights);
        for (int j = 0; j < 3; j++)
        {
            double unit = Math.Pow(full, j);
            Accuracy.AgreesTo(4, stacked[3 + j], c.Coefficients[j].Change.Mean * unit);
            Accuracy.AgreesTo(4, Math.Sqrt(covariance[3 + j, 3 + j]), c.Coefficients[j].Change.StandardError * unit);
        }
        double at = c.Changes[2].After.ThrustFraction;
        Vector<double> row = Vector<double>.Build.Dense([0, 0, 0, 1, at, at * at]);
        Accuracy.AgreesTo(4, row * stacked, c.Changes[2].Change.Mean);
    }

    [Fact]
    public void Three_flights_of_a_setting_are_random_effects_with_the_interval_of_Hartung_and_Knapp()
    {
        // Independent of the pooling: the tested RandomEffects by itself, factor not below 1.
        double[] values = [Deg(0.2), Deg(0.9), Deg(0.5)], variances = [Square(0.1), Square(0.2), Square(0.1)];
        FlightComparison c = Compare(new() { WithNext = false }, Flight("a", 0.2, 0.1), Flight("a", 0.9, 0.2), Flight("a", 0.5, 0.1));
        ConfidenceInterval wanted = RandomEffects.DerSimonianLaird(values, variances).HartungKnappInterval(0.95)!.Value;
        Assert.Equal(PoolingMethod.RandomEffects, c.Setups[0].Method);
        Accuracy.AgreesTo(4, wanted.Lower, c.Setups[0].At[0].Interval95.Lower);
        Accuracy.AgreesTo(4, wanted.Upper, c.Setups[0].At[0].Interval95.Upper);
        Assert.DoesNotContain(CompareNoticeCode.ScatterAssumed, Codes(c));

        static double Square(double degPerSec) => (Deg(degPerSec) * Deg(degPerSec)) + 1e-12;
    }

    [Fact]
    public void The_difference_of_three_flights_and_one_is_their_convolution()
    {
        // Independent: 200,000 draws of t with 2 degrees of freedom less a normal.
        ComparedFlight[] three = [Flight("a", 0.2, 0.1), Flight("a", 0.9, 0.2), Flight("a", 0.5, 0.1)];
        FlightComparison c = Compare(new() { WithNext = false }, [.. three, Flight("b", 0, 0.3, rig: Moved(0.01))]);
        SettingChange off = c.Changes[0];
        var random = new SeededRandom(3);
        double[] draws = new double[200_000];
        PullDistribution before = off.Before.Rate, after = off.After.Rate;
        for (int i = 0; i < draws.Length; i++)
            draws[i] = after.Quantile(0.001 + (0.998 * random.NextDouble())) - before.Quantile(0.001 + (0.998 * random.NextDouble()));
        Assert.Equal(QuantileType7.Of(draws, 0.9), off.Change.Quantile(0.9), 0.03 * off.Change.StandardError);
        Assert.Equal(QuantileType7.Of(draws, 0.1), off.Change.Quantile(0.1), 0.03 * off.Change.StandardError);
    }

    [Theory]
    // Errors of 0.1 and no scatter, tolerance 1: the 90 % interval is ± 0.164.
    [InlineData(3.0, 0.2, ComparisonVerdictCode.Fixed)]
    [InlineData(3.0, -0.8, ComparisonVerdictCode.Fixed)]
    [InlineData(3.0, 0.9, ComparisonVerdictCode.Better)]    // 0.9 + 0.164 leaves the tolerance
    [InlineData(-3.0, 1.5, ComparisonVerdictCode.Better)]   // past zero, but nearer
    [InlineData(1.5, 3.0, ComparisonVerdictCode.Worse)]
    [InlineData(1.5, -3.0, ComparisonVerdictCode.Worse)]
    [InlineData(2.0, 2.05, ComparisonVerdictCode.NoClearChange)]
    public void The_verdict_follows_the_pull_left(double before, double after, ComparisonVerdictCode wanted)
    {
        FlightComparison c = Compare(Known(0), Flight("a", before, 0.1), Flight("b", after, 0.1, rig: Moved(0.01)));
        Assert.Equal(wanted, c.Verdict!.Code);
        FlightComparison mirrored = Compare(Known(0), Flight("a", -before, 0.1), Flight("b", -after, 0.1, rig: Moved(0.01)));
        Assert.Equal(wanted, mirrored.Verdict!.Code);
    }

    [Fact]
    public void A_pull_that_is_gone_in_level_flight_alone_is_not_fixed()
    {
        // -1.2 without power and +1.5 at full power: nothing in level flight (0.6 of full), too much at full power.
        FlightComparison c = Compare(Known(0), Flight("a", -4, 0.05, 2.5), Flight("b", -1.5, 0.05, 2.5, rig: Moved(0.01)));
        Assert.Equal(ComparisonVerdictCode.Better, c.Verdict!.Code);
        Assert.True(Math.Abs(c.AtBalance!.After.Rate.Mean) < Deg(0.05));
    }

    [Fact]
    public void Shown_equal_and_cannot_tell_are_told_apart()
    {
        Assert.True(Compare(Known(0), Flight("a", 2, 0.1), Flight("b", 2, 0.1, rig: Moved(0.01))).Verdict!.ShownEqual);
        Assert.False(Compare(Known(0), Flight("a", 2, 0.8), Flight("b", 2, 0.8, rig: Moved(0.01))).Verdict!.ShownEqual);
    }

    [Fact]
    public void Without_steering_or_hands_off_spans_nothing_is_fixed()
    {
        TurnSignals blind = TurnSignals.From(new MadeUpFlight { PowerDegPerSec = -1, Brakes = false }.Fly(), MadeUpFlight.Rig(), []);
        ComparedFlight after = Flight("b", 0, 0.05, rig: Moved(0.01));
        after = after with { Analysis = after.Analysis with { Signals = blind } };
        FlightComparison c = Compare(Known(0), Flight("a", 3, 0.05), after);
        Assert.Equal(ComparisonVerdictCode.Better, c.Verdict!.Code);
        Assert.True(c.Verdict.WithheldFixed);
        Assert.Contains(CompareNoticeCode.NoSteering, Codes(c));
    }

    [Fact]
    public void The_share_of_the_pull_that_is_gone_is_Fiellers_and_null_where_nothing_was_there()
    {
        FlightComparison c = Compare(Known(0), Flight("a", 2, 0.1), Flight("b", 0.5, 0.1, rig: Moved(0.01)));
        Assert.Equal(0.75, c.Removed!.Ratio!.Value, 1e-6);
        // By hand, 1 − after/before, with t = 1.959964: Fieller of 0.5/2 with equal errors 0.1, independent.
        FiellerSet rest = Fieller.Ratio(new(0.5, 0.1), new(2, 0.1), 0, double.PositiveInfinity, 0.95);
        Assert.Equal(1 - rest.Interval!.Value.Upper, c.Removed.Interval!.Value.Lower, 0.001);
        Assert.Equal(1 - rest.Interval.Value.Lower, c.Removed.Interval.Value.Upper, 0.001);
        Assert.Null(Compare(Known(0), Flight("a", 0.1, 0.1), Flight("b", 0.5, 0.1, rig: Moved(0.01))).Removed);
    }

    [Fact]
    public void A_swap_of_wings_says_how_much_of_the_constant_pull_went_with_the_wing_and_what_it_cannot_tell()
    {
        FlightComparison c = Compare(Known(0, ChangedPart.Wing), Flight("old wing", 2, 0.1, -1), Flight("other wing", 0.8, 0.1, -1));
        Assert.Equal(AttributedPull.Constant, c.Attribution!.Of);
        Assert.Equal(0.6, c.Attribution.Share!.Ratio!.Value, 1e-6);
        Assert.Contains(CompareNoticeCode.SwapLimits, Codes(c));
        Assert.DoesNotContain(CompareNoticeCode.NothingChanged, Codes(c));
        Assert.False(c.PairUsed);
    }

    [Theory]
    [InlineData(2.05, true)]
    [InlineData(3.5, false)]
    public void A_swap_back_tells_whether_something_else_moved(double again, bool agrees)
    {
        FlightComparison c = Compare(Known(0.2), Flight("a", 2, 0.1, name: "first"), Flight("b", 0.3, 0.1, rig: Moved(0.01), name: "second"), Flight("a", again, 0.1, name: "third"));
        SwapBack back = Assert.Single(c.SwapBacks);
        Assert.Equal((0, 2, agrees), (back.First, back.Second, back.Agrees));
        Assert.Contains(agrees ? CompareNoticeCode.SwapBackAgrees : CompareNoticeCode.SwapBackDiffers, Codes(c));
        Assert.DoesNotContain(CompareNoticeCode.RegressionToTheMean, Codes(c)); // two flights before
    }

    [Fact]
    public void One_flight_before_is_told_about_regression_to_the_mean() =>
        Assert.Contains(CompareNoticeCode.RegressionToTheMean, Codes(Compare(Known(0), Flight("a", 2, 0.1), Flight("b", 0, 0.1, rig: Moved(0.01)))));

    [Fact]
    public void Five_kilograms_that_nobody_declared_are_noticed_and_declared_ballast_is_not()
    {
        Rig heavy = MadeUpFlight.Rig() with { Mass = MadeUpFlight.Rig().Mass with { PilotKg = Reading.Measured(93) } }, nearly = heavy with { Mass = heavy.Mass with { PilotKg = Reading.Measured(92.5) } };
        Assert.Contains(CompareNoticeCode.MassDiffers, Codes(Compare(Known(0), Flight("a", 1, 0.1), Flight("b", 1, 0.1, rig: heavy))));
        Assert.DoesNotContain(CompareNoticeCode.MassDiffers, Codes(Compare(Known(0), Flight("a", 1, 0.1), Flight("b", 1, 0.1, rig: nearly))));
        Assert.DoesNotContain(CompareNoticeCode.MassDiffers, Codes(Compare(Known(0, ChangedPart.Ballast), Flight("a", 1, 0.1), Flight("b", 1, 0.1, rig: heavy))));
        // The same by the sheets' fuel: 10 kg and 4 kg on average.
        ComparedFlight full = Flight("a", 1, 0.1) with { Sheet = new FlightSheet { FuelStartKg = 12, FuelEndKg = 8 } };
        ComparedFlight empty = Flight("b", 1, 0.1, rig: Moved(0.01)) with { Sheet = new FlightSheet { FuelStartKg = 5, FuelEndKg = 3 } };
        Assert.Contains(CompareNoticeCode.MassDiffers, Codes(Compare(Known(0), full, empty)));
    }

    [Theory]
    [InlineData(55, null, true)]
    [InlineData(43, null, false)]  // 3 ± 1.4
    [InlineData(55, ChangedPart.BrakeLines, false)]
    public void Brakes_that_answer_otherwise_are_noticed_unless_their_lines_were_changed(double after, ChangedPart? changed, bool noticed)
    {
        FlightComparison c = Compare(Known(0, changed), Flight("a", 1, 0.1), Flight("b", 1, 0.1, rig: Moved(0.01), brake: after));
        Assert.Equal(noticed, Codes(c).Contains(CompareNoticeCode.BrakeResponseChanged));
    }

    [Fact]
    public void What_differs_in_the_rig_files_without_being_declared_is_named_and_the_pair_is_not_used()
    {
        Rig other = Moved(0.01) with { Wing = new() { Name = "wing two" } }, first = MadeUpFlight.Rig() with { Wing = new() { Name = "wing one" } };
        FlightComparison c = Compare(Known(0), Flight("a", 2, 0.1, -1, rig: first), Flight("b", 1, 0.1, -1, rig: other));
        Assert.Contains(CompareNoticeCode.WingDiffers, Codes(c));
        Assert.Contains(CompareNoticeCode.PairNotUsed, Codes(c));
        Assert.False(c.PairUsed);
        FlightComparison moved = Compare(Known(0, ChangedPart.Wing), Flight("a", 2, 0.1, -1, rig: first), Flight("b", 1, 0.1, -1, rig: other));
        Assert.Contains(CompareNoticeCode.GeometryDiffers, Codes(moved));
        Rig turned = Moved(0.01) with { Propeller = MadeUpFlight.Rig().Propeller with { DiameterM = 1.4 } };
        Assert.Contains(CompareNoticeCode.PropellerDiffers, Codes(Compare(Known(0), Flight("a", 2, 0.1), Flight("b", 1, 0.1, rig: turned))));
        Assert.Contains(CompareNoticeCode.NothingChanged, Codes(Compare(Known(0), Flight("a", 2, 0.1), Flight("b", 1, 0.1))));
        Assert.Contains(CompareNoticeCode.DeclaredButSame, Codes(Compare(Known(0, ChangedPart.Geometry), Flight("a", 2, 0.1), Flight("b", 1, 0.1))));
    }

    [Fact]
    public void Riser_carabiners_moved_between_the_flights_measure_the_sensitivity()
    {
        // By hand: 20 mm to the left shift the CG offset 20 mm to the right; 1.8 deg/s more to the right is 0.09 deg/s per mm.
        FlightComparison c = FlightComparison.Run([Flight("a", -2, 0.02, -2, 0.05, curveError: 0.5), Flight("b", -0.2, 0.02, -2, 0.05, Moved(-0.020), curveError: 0.5)],
            new() { Scatter = FlightScatter.None, Trim = new() { Draws = 4000 } });
        SensitivitySource pair = c.Next!.Sensitivity.Sources.Single(s => s.Kind == "pair");
        Assert.True(c.PairUsed && pair.Used);
        Assert.Equal(0.09, double.RadiansToDegrees(pair.RadPerSecPerM) / 1000, 0.01);
        Assert.True(c.Next.Sensitivity.Interval95!.Value.HalfWidth < double.DegreesToRadians(0.12) * 1000 / 2); // the prior alone: 0.12 either way
    }

    [Fact]
    public void Three_settings_on_a_line_show_where_it_meets_zero()
    {
        // CG offsets 0, +10, +30 mm (riser carabiners moved left) at 0.1 deg/s per mm from -2 deg/s: zero at 20 mm.
        FlightComparison c = Compare(Known(0), Flight("a", -2, 0.05), Flight("b", -1, 0.05, rig: Moved(-0.010)), Flight("c", 1, 0.05, rig: Moved(-0.030)));
        Assert.Equal(0.1, double.RadiansToDegrees(c.Trend!.SlopeRadPerSecPerM) / 1000, 1e-6);
        Assert.Equal(0.020, c.Trend.BestOffset.Ratio!.Value, 1e-6);
        Assert.Equal(1, c.Trend.BestSeen);
        Assert.Equal(1, c.Trend.Scale);
    }

    [Fact]
    public void A_flight_that_cannot_tell_is_named_and_left_out()
    {
        ComparedFlight broken = Flight("b", 0, 0.1, name: "broken.csv");
        broken = broken with { Analysis = broken.Analysis with { Fit = broken.Analysis.Fit with { Coefficients = [.. broken.Analysis.Fit.Coefficients.Select(x => x with { Estimate = null })] } } };
        FlightComparison c = Compare(Known(0), Flight("a", 1, 0.1), broken);
        Assert.Equal(["broken.csv"], c.Notices.Single(n => n.Code == CompareNoticeCode.FlightNotUsed).Names);
        Assert.Single(c.Setups);
        Assert.Null(c.Verdict);
        Assert.Empty(Compare(Known(0), broken).Setups);
    }

    [Fact]
    public void No_flight_is_refused() => Assert.Throws<ArgumentException>(() => FlightComparison.Run([], new()));
}
