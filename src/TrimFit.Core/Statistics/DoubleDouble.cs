namespace TrimFit.Core.Statistics;

/// <summary>A running sum held as the unevaluated sum of two doubles, about 32 digits.</summary>
/// <remarks>Error-free transformations of Knuth (two-sum) and Dekker (two-product, here by fused multiply-add); T. J. Dekker,
/// "A floating-point technique for extending the available precision", Numer. Math. 18 (1971) 224.</remarks>
internal struct DoubleDouble
{
    private double _high;
    private double _low;

    /// <summary>The sum rounded to a double.</summary>
    public readonly double Value => _high + _low;

    /// <summary>Adds one value.</summary>
    public void Add(double value)
    {
        double sum = _high + value;
        double part = sum - _high;
        double error = (_high - (sum - part)) + (value - part);
        double low = _low + error;
        _high = sum + low;
        _low = low - (_high - sum);
    }

    /// <summary>Adds the product of two values without rounding it first.</summary>
    public void AddProduct(double a, double b)
    {
        double product = a * b;
        double error = Math.FusedMultiplyAdd(a, b, -product);
        Add(product);
        Add(error);
    }
}
