namespace TrimFit.Import;

/// <summary>A unit of a log's numbers: SI value = number × <see cref="Factor"/> + <see cref="Offset"/>.</summary>
/// <param name="Name">How the unit is written in reports, such as <c>deg/s</c>.</param>
/// <param name="Quantity">What it measures.</param>
/// <param name="Factor">SI units in one of it; exact where the unit is defined exactly.</param>
/// <param name="Offset">SI value of its zero.</param>
public sealed record LogUnit(string Name, Quantity Quantity, double Factor, double Offset = 0);
