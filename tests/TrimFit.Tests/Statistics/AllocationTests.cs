using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class AllocationTests
{
    [Fact]
    public void Kernels_meant_for_long_columns_allocate_nothing_per_call()
    {
        SeededRandom random = new(3);
        double[] x = new double[1000], y = new double[1000], filtered = new double[1000];
        for (int i = 0; i < x.Length; i++)
            (x[i], y[i]) = (Math.Cos(i) + (0.1 * random.NextNormal()), Math.Sin(i) + (0.1 * random.NextNormal()));
        MatrixExponential exponential = new(2);
        VanLoan vanLoan = new(2);
        KalmanFilter filter = new(2);
        filter.Start([0, 0], [1, 0, 0, 1]);
        SavitzkyGolay smoother = new(7, 2);
        MonotoneCubic curve = MonotoneCubic.Through([0, 1, 2], [0, 1, 5]);
        double[] a = [-1, 0.5, 0, -2], q = [1, 0, 0, 1], phi = new double[4], noise = new double[4], row = [1, 0.5];
        double sum = 0;
        long Bytes()
        {
            long before = GC.GetAllocatedBytesForCurrentThread();
            for (int k = 0; k < 100; k++)
            {
                sum += CircleFit.Kasa(x, y)!.Value.Radius + CircleFit.Pratt(x, y)!.Value.Radius + CircleFit.Taubin(x, y)!.Value.Radius;
                sum += Median.InPlace(filtered) + SampleMoments.StandardDeviation(x) + ResidualTests.DurbinWatson(x) + curve.At(1.3);
                exponential.Compute(a, 0.1, phi);
                vanLoan.Discretize(a, q, 0.1, phi, noise);
                filter.Predict(phi, noise);
                sum += filter.Update(row, 0.3, 0.1).Value + random.NextNormal();
                smoother.Apply(x, 0.1, filtered);
            }
            return GC.GetAllocatedBytesForCurrentThread() - before;
        }
        Bytes(); // once for the compiler
        Assert.Equal(0, Bytes());
        Assert.True(double.IsFinite(sum));
    }
}
