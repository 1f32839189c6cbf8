using System.Numerics;

namespace TrimFit.Core.Statistics;

/// <summary>Random numbers that are the same for the same seed on every machine.</summary>
/// <remarks>xoshiro256** 1.0 (D. Blackman &amp; S. Vigna, "Scrambled linear pseudorandom number generators", ACM Trans. Math. Softw. 47 (2021) 36),
/// state filled from the seed by SplitMix64. Normal deviates use only operations that IEEE 754 rounds exactly, not the machine's logarithm.
/// Not for secrets. One instance per thread.</remarks>
public sealed class SeededRandom
{
    private ulong _s0, _s1, _s2, _s3;
    private double _spareNormal;
    private bool _hasSpare;

    /// <summary>A generator for a seed; every seed is good.</summary>
    public SeededRandom(ulong seed)
        : this(SplitMix64(ref seed), SplitMix64(ref seed), SplitMix64(ref seed), SplitMix64(ref seed))
    {
    }

    internal SeededRandom(ulong s0, ulong s1, ulong s2, ulong s3) => (_s0, _s1, _s2, _s3) = (s0, s1, s2, s3);

    /// <summary>A generator for one of many independent streams under one seed: flight number, chain number.</summary>
    /// <remarks>The first SplitMix64 value of the seed, changed by the stream number, seeds the stream, so neighbours share nothing.</remarks>
    public static SeededRandom ForStream(ulong seed, ulong stream)
    {
        ulong mixed = SplitMix64(ref seed);
        stream ^= mixed;
        return new SeededRandom(SplitMix64(ref stream) ^ BitOperations.RotateLeft(mixed, 32));
    }

    /// <summary>The next 64 random bits.</summary>
    public ulong NextUInt64()
    {
        ulong result = BitOperations.RotateLeft(_s1 * 5, 7) * 9;
        ulong t = _s1 << 17;
        _s2 ^= _s0;
        _s3 ^= _s1;
        _s1 ^= _s2;
        _s0 ^= _s3;
        _s2 ^= t;
        _s3 = BitOperations.RotateLeft(_s3, 45);
        return result;
    }

    /// <summary>Uniform on [0, 1): a multiple of 2⁻⁵³.</summary>
    public double NextDouble() => (NextUInt64() >> 11) * (1.0 / (1UL << 53));

    /// <summary>Uniform on [lower, upper).</summary>
    /// <exception cref="ArgumentOutOfRangeException">A bound is not finite.</exception>
    public double NextUniform(double lower, double upper) => Guard.Finite(lower) + ((Guard.Finite(upper) - lower) * NextDouble());

    /// <summary>Uniform on 0 … count − 1, without bias (D. Lemire, ACM Trans. Model. Comput. Simul. 29 (2019) 3).</summary>
    /// <exception cref="ArgumentOutOfRangeException">The count is not above 0.</exception>
    public int NextInt32(int count)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(count);
        ulong range = (ulong)count;
        ulong threshold = (0 - range) % range;
        while (true)
        {
            ulong high = Math.BigMul(NextUInt64(), range, out ulong low);
            if (low >= threshold)
                return (int)high;
        }
    }

    /// <summary>Standard normal, by Marsaglia's polar method (SIAM Rev. 6 (1964) 260).</summary>
    public double NextNormal()
    {
        if (_hasSpare)
        {
            _hasSpare = false;
            return _spareNormal;
        }
        double u, v, s;
        do
        {
            u = (2 * NextDouble()) - 1;
            v = (2 * NextDouble()) - 1;
            s = (u * u) + (v * v);
        }
        while (s is >= 1 or 0);
        double factor = Math.Sqrt(-2 * Log(s) / s);
        _spareNormal = v * factor;
        _hasSpare = true;
        return u * factor;
    }

    /// <summary>Normal with a mean and standard deviation.</summary>
    public double NextNormal(double mean, double standardDeviation) => mean + (standardDeviation * NextNormal());

    internal static ulong SplitMix64(ref ulong state)
    {
        ulong z = state += 0x9E3779B97F4A7C15;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }

    // ln x = e ln 2 + 2 artanh((m−1)/(m+1)), m in [√½, √2): additions, products and quotients only, because Math.Log may differ between
    // machines by a last digit. Eleven terms leave less than 1e-17.
    internal static double Log(double x)
    {
        int exponent = Math.ILogB(x);
        double m = Math.ScaleB(x, -exponent);
        if (m > 1.4142135623730951)
        {
            m /= 2;
            exponent++;
        }
        double s = (m - 1) / (m + 1);
        double square = s * s;
        double sum = 0;
        for (int k = 21; k >= 1; k -= 2)
            sum = (sum * square) + (1.0 / k);
        return (exponent * 0.6931471805599453) + (2 * s * sum);
    }
}
