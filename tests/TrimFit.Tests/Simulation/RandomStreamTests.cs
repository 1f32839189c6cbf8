using TrimFit.Simulation;

namespace TrimFit.Tests.Simulation;

public class RandomStreamTests
{
    [Fact]
    public void The_generator_is_xoshiro256_starstar()
    {
        // First outputs for the state 1, 2, 3, 4, as given with the reference implementation by its users (Blackman and Vigna 2018);
        // the first two by hand: rotl(2·5, 7)·9 = 11520, then the second word is 2 ^ 3 ^ 1 = 0.
        var random = new RandomStream(1, 2, 3, 4);
        Assert.Equal([11520UL, 0UL, 1509978240UL, 1215971899390074240UL], [random.Next(), random.Next(), random.Next(), random.Next()]);
    }

    [Fact]
    public void Normal_deviates_have_the_moments_of_the_normal_distribution()
    {
        var random = new RandomStream(7, 1);
        const int n = 200_000;
        double sum = 0, squares = 0, fourth = 0;
        for (int i = 0; i < n; i++)
        {
            double z = random.Normal();
            sum += z;
            squares += z * z;
            fourth += z * z * z * z;
        }
        Assert.InRange(sum / n, -0.01, 0.01);       // 4.5 standard errors of 1/sqrt(n)
        Assert.InRange(squares / n, 0.985, 1.015);  // sqrt(2/n) = 0.003
        Assert.InRange(fourth / n, 2.88, 3.12);     // sqrt(96/n) = 0.022
    }

    [Fact]
    public void Streams_of_one_seed_are_unlike()
    {
        var a = new RandomStream(7, 1);
        var b = new RandomStream(7, 2);
        double product = 0;
        for (int i = 0; i < 10_000; i++)
            product += a.Normal() * b.Normal();
        Assert.InRange(product / 10_000, -0.045, 0.045);
    }

    [Fact]
    public void A_Markov_process_keeps_its_size_and_forgets_at_its_pace()
    {
        var process = new MarkovProcess(new RandomStream(3, 1), standardDeviation: 2, correlationTimeSec: 0.5, stepSec: 0.1);
        const int n = 100_000;
        double squares = 0, lagged = 0;
        double before = process.Value;
        for (int i = 0; i < n; i++)
        {
            double now = process.Step();
            squares += now * now;
            lagged += now * before;
            before = now;
        }
        Assert.InRange(Math.Sqrt(squares / n), 1.95, 2.05);
        Assert.InRange(lagged / squares, Math.Exp(-0.2) - 0.01, Math.Exp(-0.2) + 0.01);
    }
}
