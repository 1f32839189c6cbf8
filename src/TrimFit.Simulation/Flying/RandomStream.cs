namespace TrimFit.Simulation;

/// <summary>Seeded random numbers: xoshiro256** (Blackman and Vigna 2018) filled by SplitMix64, normal deviates by Marsaglia's polar method (1964).</summary>
/// <remarks>Each cause in a flight (air, gyro, fixes…) draws from its own stream, so that a sensor more or less leaves the air as it was.</remarks>
internal sealed class RandomStream
{
    private ulong _s0, _s1, _s2, _s3;
    private double _spare = double.NaN;

    public RandomStream(ulong seed, ulong stream)
    {
        ulong state = seed ^ (stream * 0xD1B54A32D192ED03UL); // an odd multiplier keeps streams of one seed apart
        _s0 = SplitMix(ref state);
        _s1 = SplitMix(ref state);
        _s2 = SplitMix(ref state);
        _s3 = SplitMix(ref state);
    }

    /// <summary>A stream from a given state, for checks against published sequences.</summary>
    public RandomStream(ulong s0, ulong s1, ulong s2, ulong s3) => (_s0, _s1, _s2, _s3) = (s0, s1, s2, s3);

    /// <summary>The next 64 bits.</summary>
    public ulong Next()
    {
        ulong result = ulong.RotateLeft(_s1 * 5, 7) * 9;
        ulong t = _s1 << 17;
        _s2 ^= _s0;
        _s3 ^= _s1;
        _s1 ^= _s2;
        _s0 ^= _s3;
        _s2 ^= t;
        _s3 = ulong.RotateLeft(_s3, 45);
        return result;
    }

    /// <summary>Uniform in [0, 1).</summary>
    public double Uniform() => (Next() >> 11) * (1.0 / (1UL << 53));

    /// <summary>Normal with mean 0 and standard deviation 1.</summary>
    public double Normal()
    {
        if (!double.IsNaN(_spare))
        {
            double spare = _spare;
            _spare = double.NaN;
            return spare;
        }
        while (true)
        {
            double u = (2 * Uniform()) - 1;
            double v = (2 * Uniform()) - 1;
            double s = (u * u) + (v * v);
            if (s is > 0 and < 1)
            {
                double k = Math.Sqrt(-2 * Math.Log(s) / s);
                _spare = v * k;
                return u * k;
            }
        }
    }

    private static ulong SplitMix(ref ulong state)
    {
        state += 0x9E3779B97F4A7C15UL;
        ulong z = state;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9UL;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EBUL;
        return z ^ (z >> 31);
    }
}
