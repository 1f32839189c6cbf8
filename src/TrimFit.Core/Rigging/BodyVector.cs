namespace TrimFit.Core.Rigging;

/// <summary>A vector in body axes: x forward, y to the pilot's right, z down. Moments follow the right-hand rule, so a positive X rolls right and a
/// positive Z turns the nose right.</summary>
/// <param name="X">Forward part.</param>
/// <param name="Y">Part to the right.</param>
/// <param name="Z">Part downwards.</param>
public readonly record struct BodyVector(double X, double Y, double Z)
{
    /// <summary>The vector product with another vector.</summary>
    public BodyVector Cross(BodyVector other) =>
        new((Y * other.Z) - (Z * other.Y), (Z * other.X) - (X * other.Z), (X * other.Y) - (Y * other.X));

    /// <summary>The vector stretched by a factor.</summary>
    public BodyVector Times(double factor) => new(factor * X, factor * Y, factor * Z);
}
