namespace TrimFit.Core.Statistics;

/// <summary>A circle in the plane, in the unit of the points it was fitted to.</summary>
/// <param name="CenterX">First coordinate of the centre.</param>
/// <param name="CenterY">Second coordinate of the centre.</param>
/// <param name="Radius">Radius; above 0.</param>
public readonly record struct Circle(double CenterX, double CenterY, double Radius)
{
    /// <summary>Signed distance of a point from the circle; positive outside.</summary>
    public double DistanceTo(double x, double y) => double.Hypot(x - CenterX, y - CenterY) - Radius;
}
