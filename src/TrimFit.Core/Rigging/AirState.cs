namespace TrimFit.Core.Rigging;

/// <summary>State of still, dry air.</summary>
/// <param name="TemperatureK">Temperature, K.</param>
/// <param name="PressurePa">Pressure, Pa.</param>
/// <param name="DensityKgPerM3">Density, kg/m³.</param>
/// <param name="SpeedOfSoundMPerSec">Speed of sound, m/s.</param>
public readonly record struct AirState(double TemperatureK, double PressurePa, double DensityKgPerM3, double SpeedOfSoundMPerSec);
