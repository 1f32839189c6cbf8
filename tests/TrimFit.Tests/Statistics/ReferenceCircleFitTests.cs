using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceCircleFitTests
{
    // SciPy Cookbook, "Least squares circle": the full circle and the arc.
    private static readonly double[] _fullX = [9, 35, -13, 10, 23, 0], _fullY = [34, 10, 6, -14, 27, -10];
    private static readonly double[] _arcX = [36, 36, 19, 18, 33, 26], _arcY = [14, 10, 28, 31, 18, 26];

    // Gander, Golub & Strebel, BIT 34 (1994) 558, the six points of their example.
    private static readonly double[] _sixX = [1, 2, 5, 7, 9, 3], _sixY = [7, 6, 8, 7, 5, 7];

    [Fact]
    public void A_full_circle_agrees_with_other_solvers()
    {
        // Kåsa and geometric centres: SciPy Cookbook prints 10.55231 9.70590 and 10.50009 9.65995, R 23.33353. Further digits of the
        // geometric fit: Newton in 40-digit arithmetic (Data/Statistics/circle_newton.py). Pratt and Taubin: a separate program, Newton on the
        // characteristic polynomial and a generalised eigenproblem, which agree to 1e-14.
        Agree(new(10.552312856, 9.705900056, 23.362410562), CircleFit.Kasa(_fullX, _fullY), 9.5);
        Agree(new(10.550297611, 9.7099542072, 23.415414159), CircleFit.Pratt(_fullX, _fullY), 9.5);
        Agree(new(10.550293007, 9.7099634353, 23.362572652), CircleFit.Taubin(_fullX, _fullY), 9.5);
        Agree(new(10.5000862139443, 9.65994950583643, 23.3335276461828), CircleFit.Geometric(_fullX, _fullY), 12);
        Accuracy.AgreesTo(12, 7.71185223881996, CircleFit.GeometricFit(_fullX, _fullY)!.SumOfSquares);
    }

    [Fact]
    public void An_arc_agrees_with_other_solvers()
    {
        // Sources as above; SciPy Cookbook prints 15.05503 8.83615 and, not fully converged, 9.88759 3.68752.
        Agree(new(15.05503487, 8.8361499576, 20.850723091), CircleFit.Kasa(_arcX, _arcY), 9);
        Agree(new(9.582585518, 3.4865358235, 27.71749328), CircleFit.Pratt(_arcX, _arcY), 9);
        Agree(new(9.5757969109, 3.4798988788, 27.70220033), CircleFit.Taubin(_arcX, _arcY), 9);
        Agree(new(9.88756656747738, 3.68749730978412, 27.3504431681337), CircleFit.Geometric(_arcX, _arcY), 12);
        Accuracy.AgreesTo(12, 4.04252189831859, CircleFit.GeometricFit(_arcX, _arcY)!.SumOfSquares);
    }

    [Fact]
    public void The_six_points_of_Gander_Golub_and_Strebel_give_their_circle()
    {
        Circle published = new(4.7398, 2.9835, 4.7142); // Gander, Golub & Strebel, BIT 34 (1994), geometric fit
        Circle found = CircleFit.Geometric(_sixX, _sixY)!.Value;
        Assert.Equal(published, new(Math.Round(found.CenterX, 4), Math.Round(found.CenterY, 4), Math.Round(found.Radius, 4)));
        // More digits from circle_newton.py, the algebraic fits from a separate program, as above.
        Agree(new(4.73978241090607, 2.98353269929247, 4.71422603779210), found, 12);
        Agree(new(4.7423312883, 3.8351226994, 4.1087615223), CircleFit.Kasa(_sixX, _sixY), 9.5);
        Agree(new(4.6154815168, 2.8073543972, 4.9113015969), CircleFit.Pratt(_sixX, _sixY), 9.5);
        Agree(new(4.6139326939, 2.7952093469, 4.8792128456), CircleFit.Taubin(_sixX, _sixY), 9.5);
    }

    [Fact]
    public void Points_on_a_circle_give_it_by_every_fit() => Gen.Select(Gen.Double[-30, 30], Gen.Double[-30, 30], Gen.Double[5, 20], Gen.Double[0.6, 6.2]).Sample((cx, cy, r, arc) =>
    {
        double[] x = [.. Enumerable.Range(0, 12).Select(i => cx + (r * Math.Cos(arc * i / 11)))];
        double[] y = [.. Enumerable.Range(0, 12).Select(i => cy + (r * Math.Sin(arc * i / 11)))];
        foreach (Circle? circle in new[] { CircleFit.Kasa(x, y), CircleFit.Pratt(x, y), CircleFit.Taubin(x, y), CircleFit.Geometric(x, y) })
        {
            Assert.NotNull(circle);
            Assert.InRange(Math.Abs(circle.Value.CenterX - cx) + Math.Abs(circle.Value.CenterY - cy) + Math.Abs(circle.Value.Radius - r), 0, 1e-8 * (r + 30));
        }
    });

    [Fact]
    public void Moved_scaled_and_turned_points_give_the_moved_scaled_and_turned_circle() =>
        Gen.Select(Gen.Double[-1e3, 1e3], Gen.Double[-1e3, 1e3], Gen.Double[0.01, 100], Gen.Double[0, 6.28]).Sample((dx, dy, k, turn) =>
        {
            (double s, double c) = Math.SinCos(turn);
            double[] x = [.. _arcX.Zip(_arcY, (a, b) => dx + (k * ((c * a) - (s * b))))];
            double[] y = [.. _arcX.Zip(_arcY, (a, b) => dy + (k * ((s * a) + (c * b))))];
            Same(CircleFit.Kasa(_arcX, _arcY), CircleFit.Kasa(x, y));
            Same(CircleFit.Pratt(_arcX, _arcY), CircleFit.Pratt(x, y));
            Same(CircleFit.Taubin(_arcX, _arcY), CircleFit.Taubin(x, y));
            Same(CircleFit.Geometric(_arcX, _arcY), CircleFit.Geometric(x, y));

            void Same(Circle? before, Circle? after)
            {
                Circle b = before!.Value, a = after!.Value;
                double scale = Math.Abs(dx) + Math.Abs(dy) + (k * b.Radius);
                Assert.InRange(Math.Abs(a.CenterX - (dx + (k * ((c * b.CenterX) - (s * b.CenterY))))), 0, 1e-9 * scale);
                Assert.InRange(Math.Abs(a.CenterY - (dy + (k * ((s * b.CenterX) + (c * b.CenterY))))), 0, 1e-9 * scale);
                Assert.InRange(Math.Abs(a.Radius - (k * b.Radius)), 0, 1e-9 * scale);
            }
        });

    [Fact]
    public void A_weight_of_two_is_the_point_twice()
    {
        double[] weights = [1, 2, 1, 1, 2, 1];
        double[] x = [.. _arcX, _arcX[1], _arcX[4]], y = [.. _arcY, _arcY[1], _arcY[4]];
        Agree(CircleFit.Kasa(x, y)!.Value, CircleFit.Kasa(_arcX, _arcY, weights), 12);
        Agree(CircleFit.Pratt(x, y)!.Value, CircleFit.Pratt(_arcX, _arcY, weights), 12);
        Agree(CircleFit.Taubin(x, y)!.Value, CircleFit.Taubin(_arcX, _arcY, weights), 12);
        Agree(CircleFit.Geometric(x, y)!.Value, CircleFit.Geometric(_arcX, _arcY, weights), 10);
    }

    [Fact]
    public void Points_of_weight_zero_do_not_count()
    {
        double[] x = [.. _sixX, 1e6], y = [.. _sixY, -1e6];
        double[] weights = [1, 1, 1, 1, 1, 1, 0];
        Agree(CircleFit.Taubin(_sixX, _sixY)!.Value, CircleFit.Taubin(x, y, weights), 12);
        Assert.Equal(3, CircleFit.GeometricFit(x, y, weights)!.DegreesOfFreedom);
    }

    [Fact]
    public void Points_on_a_line_give_no_circle()
    {
        double[] x = [0.1, 0.2, 0.3, 0.7], y = [1.3, 1.6, 1.9, 3.1];
        Assert.Null(CircleFit.Kasa(x, y));
        Assert.Null(CircleFit.Pratt(x, y));
        Assert.Null(CircleFit.Taubin(x, y));
        Assert.Null(CircleFit.Geometric(x, y));
    }

    [Fact]
    public void Too_few_points_or_one_place_give_no_circle()
    {
        Assert.Null(CircleFit.Taubin([], []));
        Assert.Null(CircleFit.Taubin([1, 2], [3, 5]));
        Assert.Null(CircleFit.Pratt([5, 5, 5], [7, 7, 7]));
    }

    [Fact]
    public void A_value_that_is_not_finite_is_the_callers_mistake()
    {
        ArgumentException error = Assert.Throws<ArgumentException>(() => CircleFit.Kasa([1, double.NaN, 3], [1, 2, 0]));
        Assert.Equal("point 1 is (NaN, 2) with weight 1: must be finite, the weight not negative (Parameter 'x')", error.Message);
    }

    [Fact]
    public void The_errors_of_a_geometric_fit_are_those_seen_when_it_is_repeated()
    {
        // Monte Carlo against the linearised covariance: 4000 repeats give the standard deviation to 1.1 % (one sigma); 5 % is over four sigma.
        SeededRandom random = new(20240501);
        double[] x = new double[40], y = new double[40];
        double[] radii = new double[4000];
        double claimed = 0;
        for (int k = 0; k < radii.Length; k++)
        {
            for (int i = 0; i < x.Length; i++)
            {
                (double s, double c) = Math.SinCos(3.0 * i / 39);
                x[i] = (10 * c) + (0.1 * random.NextNormal());
                y[i] = (10 * s) + (0.1 * random.NextNormal());
            }
            GeometricCircleFit fit = CircleFit.GeometricFit(x, y)!;
            Assert.True(fit.Convergence.Converged);
            radii[k] = fit.Circle.Radius;
            claimed += fit.Covariance[8] / radii.Length;
        }
        Assert.InRange(Math.Sqrt(claimed) / SampleMoments.StandardDeviation(radii), 0.95, 1.05);
    }

    private static void Agree(Circle expected, Circle? actual, double digits)
    {
        Assert.NotNull(actual);
        Accuracy.AgreesTo(digits, expected.CenterX, actual.Value.CenterX);
        Accuracy.AgreesTo(digits, expected.CenterY, actual.Value.CenterY);
        Accuracy.AgreesTo(digits, expected.Radius, actual.Value.Radius);
    }
}
