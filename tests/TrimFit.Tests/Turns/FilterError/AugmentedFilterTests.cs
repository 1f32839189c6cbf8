using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.SimulationTests;

namespace TrimFit.Tests.Turns.FilterError;

/// <summary>The fast filter against the readable one, and that one against the plain multivariate normal density.</summary>
public class AugmentedFilterTests
{
    internal static readonly NoiseParameters FirstOrder = new()
    {
        Order = ResponseOrder.First,
        LagSec = 1.3,
        DisturbanceRms = 0.03,
        DisturbanceTauSec = 6,
        QuickDisturbance = 0.004,
        GyroNoise = 0.012,
        HeadingNoise = 0.03,
        GustRms = 0.05,
        GustTauSec = 9,
        CompassNoise = 0.04,
    };

    internal static readonly NoiseParameters SecondOrder = FirstOrder with { Order = ResponseOrder.Second, NaturalFrequency = 1.2, Damping = 0.45 };

    /// <summary>A short flight with uneven time stamps, holes in both sensors and a span left out.</summary>
    private static FlightColumns Ragged(double seconds, double blockSec, int seed, bool compass = false, bool withGyro = true)
    {
        var random = new Gauss(seed);
        TurnScenario scenario = TurnScenario.Random(random, false, Sensors.GyroAndGps, Hardship.None) with { DurationSec = seconds };
        TurnSignals s = MadeUpFlight.Fly(scenario, random);
        int[] keep = [.. Enumerable.Range(0, s.Count).Where(_ => random.Uniform() > 0.15)];
        double[] gyro = [.. keep.Select(i => random.Uniform() < 0.1 ? double.NaN : s.GyroRadPerSec[i])];
        var signals = new TurnSignals
        {
            TimeSec = [.. keep.Select(i => s.TimeSec[i] + Math.Round(0.02 * random.Uniform(), 4))],
            Thrust = [.. keep.Select(i => s.Thrust[i] * (1 - (0.9 * (i % 90 / 90.0))))],
            ThrustBasis = s.ThrustBasis,
            FullThrust = s.FullThrust,
            HasThrust = true,
            BrakeDifference = [.. keep.Select(i => (0.1 * Math.Sin(i / 17.0)) + (withGyro ? 0 : 0.01 * random.Normal()))],
            HasBrakes = true,
            TrimmerDifference = [.. keep.Select(i => i > s.Count / 2 ? 0.2 : 0)],
            GyroRadPerSec = withGyro ? gyro : [],
            RotationRatioSquared = [.. keep.Select(i => s.RotationRatioSquared[i])],
            HeadingRad = compass ? [.. keep.Select(i => i % 7 == 0 ? Math.IEEERemainder((0.02 * i) + 1, Math.Tau) : double.NaN)] : [],
            VelocityNorth = [.. keep.Select(i => withGyro || i % 10 == 0 ? s.VelocityNorth[i] : double.NaN)],
            VelocityEast = [.. keep.Select(i => withGyro || i % 10 == 0 ? s.VelocityEast[i] : double.NaN)],
            Wind = s.Wind,
            Use = [.. keep.Select(i => i < s.Count / 3 || i > s.Count * 2 / 5)],
            HandsOff = [.. keep.Select(i => s.HandsOff[i])],
        };
        return FlightPreparation.Prepare(signals, new FilterErrorOptions { BlockSec = blockSec }, true, out _)!;
    }

    [Theory]
    [InlineData(false, false)]
    [InlineData(true, false)]
    [InlineData(false, true)]
    [InlineData(true, true)]
    public void The_fast_filter_agrees_with_the_readable_one(bool second, bool compass)
    {
        FlightColumns flight = Ragged(60, 0, 7, compass);
        NoiseParameters noise = second ? SecondOrder : FirstOrder;
        var fast = new AugmentedFilter(flight);
        double value = fast.Run(noise);
        var readable = new ReadableTurnFilter(flight, noise);
        readable.Run();

        Assert.Equal(compass, flight.HasCompass);
        Accuracy.AgreesTo(9, readable.LogLikelihood, -value);
        double[] covariance = fast.ConditionalCovariance();
        for (int j = 0; j < flight.Coefficients; j++)
        {
            int diagonal = (j * flight.Coefficients) + j;
            double se = Math.Sqrt(readable.Covariance[diagonal]);
            Assert.True(Math.Abs(fast.Coefficients[j] - readable.Coefficients[j]) < 1e-7 * se, $"{flight.Kinds[j]}");
            Accuracy.AgreesTo(7, readable.Covariance[diagonal], covariance[diagonal]);
        }
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Without_a_gyro_the_brakes_surprise_corrects_the_state_in_both_filters_alike(bool second)
    {
        FlightColumns flight = Ragged(120, 0.2, 9, withGyro: false);
        NoiseParameters noise = second ? SecondOrder : FirstOrder;
        var fast = new AugmentedFilter(flight);
        double value = fast.Run(noise);
        var readable = new ReadableTurnFilter(flight, noise);
        readable.Run();

        Assert.Contains(flight.Surprise, s => s != 0);
        Assert.Contains(flight.Flags, f => (f & (FlightColumns.Gyro | FlightColumns.Heading | FlightColumns.Compass)) == 0); // rows that carry inputs only
        Accuracy.AgreesTo(9, readable.LogLikelihood, -value);
        for (int j = 0; j < flight.Coefficients; j++)
        {
            double se = Math.Sqrt(readable.Covariance[(j * flight.Coefficients) + j]);
            Assert.True(Math.Abs(fast.Coefficients[j] - readable.Coefficients[j]) < 1e-7 * se, $"{flight.Kinds[j]}");
        }
        int gain = flight.IndexOf(ColumnKind.RateSurprise);
        Assert.True(readable.Covariance[(gain * flight.Coefficients) + gain] < 0.9 * flight.PriorSd[gain] * flight.PriorSd[gain], "the flight says nothing of the gain");
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void The_readable_filter_agrees_with_the_normal_density_of_all_measurements(bool second)
    {
        FlightColumns flight = Ragged(16, 0, 11);
        var readable = new ReadableTurnFilter(flight, second ? SecondOrder : FirstOrder);
        readable.Run();
        Accuracy.AgreesTo(8, readable.DenseLogLikelihood(), readable.LogLikelihood);
    }

    [Theory]
    [InlineData(0.01)]
    [InlineData(0.2)]
    [InlineData(1)]
    [InlineData(10)]
    public void A_step_agrees_with_Van_Loan(double dt)
    {
        foreach (NoiseParameters noise in (NoiseParameters[])[FirstOrder, SecondOrder])
        {
            double[] a = new double[16], density = new double[16], phi = new double[16], q = new double[16];
            if (noise.Order == ResponseOrder.First)
                (a[0], a[2]) = (-1 / 1.3, 1 / 1.3);
            else
                (a[1], a[4], a[5], a[6]) = (1, -1.44, -2 * 0.45 * 1.2, 1.44);
            a[10] = -1.0 / 6;
            a[12] = 1;
            density[10] = 2 * 0.03 * 0.03 / 6;
            density[noise.Order == ResponseOrder.First ? 0 : 5] = Math.Pow(0.004 * (noise.Order == ResponseOrder.First ? 1 / 1.3 : 1.44), 2);
            new VanLoan(4).Discretize(a, density, dt, phi, q);
            TurnDynamics d = TurnDynamics.Over(dt, noise);
            double[] expected = [phi[0], phi[1], phi[2], phi[4], phi[5], phi[6], phi[10], phi[12], phi[13], phi[14]];
            double[] found = [d.Rr, d.Rp, d.Rw, d.Pr, d.Pp, d.Pw, d.Ww, d.Sr, d.Sp, d.Sw];
            for (int i = 0; i < expected.Length; i++)
                Assert.Equal(expected[i], found[i], 1e-12 * Math.Max(1, dt));
            double[] expectedNoise = [q[0], q[1], q[2], q[3], q[5], q[6], q[7], q[10], q[11], q[15]];
            double[] foundNoise = [d.Q00, d.Q01, d.Q02, d.Q03, d.Q11, d.Q12, d.Q13, d.Q22, d.Q23, d.Q33];
            for (int i = 0; i < expectedNoise.Length; i++)
                Assert.Equal(expectedNoise[i], foundNoise[i], (1e-10 * Math.Abs(expectedNoise[i])) + (1e-15 * q[10])); // Van Loan's own digits
        }
    }

    [Fact]
    public void A_first_order_step_has_its_textbook_form()
    {
        // dr/dt = (u − r)/τ: after h = 0.5 s with τ = 1.3 s, e^(−h/τ) of the old rate is left, and the heading gains τ(1 − e^(−h/τ)) of it.
        TurnDynamics d = TurnDynamics.Over(0.5, FirstOrder);
        double left = Math.Exp(-0.5 / 1.3);
        Accuracy.AgreesTo(12, left, d.Rr);
        Accuracy.AgreesTo(12, 1 - left, d.Gr);
        Accuracy.AgreesTo(12, 1.3 * (1 - left), d.Sr);
        Accuracy.AgreesTo(12, 0.5 - (1.3 * (1 - left)), d.Gs);
    }
}
