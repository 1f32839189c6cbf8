namespace TrimFit.Core.Units;

/// <summary>Constants of physics and of the standard atmosphere, each exact or with how good it is.</summary>
public static class PhysicalConstants
{
    /// <summary>Standard acceleration of gravity, m/s², exact (3rd CGPM, 1901). Local gravity differs by up to 0.3 %.</summary>
    public const double StandardGravity = 9.80665;

    /// <summary>Air density at sea level in the standard atmosphere, kg/m³, exact by definition (ICAO Doc 7488).</summary>
    public const double SeaLevelDensity = 1.225;

    /// <summary>Newtons in one pound-force, exact.</summary>
    public const double NewtonsPerPoundForce = 4.4482216152605;

    /// <summary>Metres in one inch, exact.</summary>
    public const double MetersPerInch = 0.0254;

    /// <summary>Mean radius of the Earth used for short lines between fixes, m; short lines are good to 0.3 %.</summary>
    public const double MeanEarthRadius = 6371008.8;
}
