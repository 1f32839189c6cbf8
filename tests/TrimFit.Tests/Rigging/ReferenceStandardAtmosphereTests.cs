using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Rigging;

public class ReferenceStandardAtmosphereTests
{
    [Theory] // ICAO Doc 7488/3, tables by geometric height: h (m), T (K), p (Pa), density (kg/m³), speed of sound (m/s), six digits printed
    [InlineData(-5000, 320.676, 177762.0, 1.93113, 358.986)]
    [InlineData(-2500, 304.406, 135205.0, 1.54731, 349.761)]
    [InlineData(0, 288.15, 101325.0, 1.225, 340.294)]
    [InlineData(1000, 281.651, 89876.3, 1.11166, 336.435)]
    [InlineData(2000, 275.154, 79501.4, 1.00655, 332.532)]
    [InlineData(11000, 216.774, 22699.9, 0.364801, 295.154)]
    [InlineData(15000, 216.65, 12111.8, 0.194755, 295.069)]
    [InlineData(20000, 216.65, 5529.29, 0.0889097, 295.069)]
    [InlineData(25000, 221.552, 2549.21, 0.0400837, 298.389)]
    public void Geometric_heights_agree_with_the_tables(double height, double temperature, double pressure, double density, double sound)
    {
        AirState air = StandardAtmosphere.AtGeometric(height);
        Accuracy.AgreesTo(5, temperature, air.TemperatureK);
        Accuracy.AgreesTo(5, pressure, air.PressurePa);
        Accuracy.AgreesTo(5, density, air.DensityKgPerM3);
        Accuracy.AgreesTo(5, sound, air.SpeedOfSoundMPerSec);
    }

    [Theory] // ICAO Doc 7488/3, tables by geopotential height: H (m), T, p, density
    [InlineData(11000, 216.65, 22632.0, 0.363918)]
    [InlineData(20000, 216.65, 5474.87, 0.0880345)]
    [InlineData(32000, 228.65, 868.014, 0.0132249)]
    [InlineData(47000, 270.65, 110.906, 0.00142752)]
    [InlineData(51000, 270.65, 66.9384, 0.0008616)]
    [InlineData(71000, 214.65, 3.95639, 6.42105e-05)]
    [InlineData(80000, 196.65, 0.886272, 1.57004e-05)]
    // By the formula p₀ (1 − 6.5e-3 H/T₀)^5.25588, worked separately
    [InlineData(500, 284.9, 95460.8, 1.16727)]
    [InlineData(1500, 278.4, 84556.0, 1.05807)]
    [InlineData(3000, 268.65, 70108.5, 0.909122)]
    [InlineData(5000, 255.65, 54019.9, 0.736116)]
    public void Geopotential_heights_agree_with_the_tables(double height, double temperature, double pressure, double density)
    {
        AirState air = StandardAtmosphere.AtGeopotential(height);
        Accuracy.AgreesTo(9, temperature, air.TemperatureK);
        Accuracy.AgreesTo(5, pressure, air.PressurePa);
        Accuracy.AgreesTo(4.9, density, air.DensityKgPerM3);
    }

    [Theory] // U.S. Standard Atmosphere 1976, SI table by geometric kilometre as printed in Public Domain Aeronautical Software
    [InlineData(500, 95461, 1.167)]
    [InlineData(1500, 84559, 1.058)]
    [InlineData(3000, 70121, 0.909)]
    [InlineData(5000, 54048, 0.736)]
    public void The_1976_table_is_met_to_its_rounding(double height, double pressure, double density)
    {
        AirState air = StandardAtmosphere.AtGeometric(height);
        Assert.InRange(air.PressurePa, pressure - 1, pressure + 1); // the table rounds down in places
        Assert.Equal(density, Math.Round(air.DensityKgPerM3, 3));
    }

    [Fact]
    public void Heights_and_pressures_lead_back()
    {
        foreach (double height in new[] { -400.0, 0, 812.5, 4000, 10999 })
        {
            Accuracy.AgreesTo(12, height, StandardAtmosphere.Geometric(StandardAtmosphere.Geopotential(height)));
            Assert.Equal(height, StandardAtmosphere.PressureAltitude(StandardAtmosphere.AtGeopotential(height).PressurePa), 7);
        }
        Assert.Equal(1.225, StandardAtmosphere.Density(101325, 288.15), 6);
    }

    [Fact]
    public void Heights_outside_the_table_are_refused()
    {
        ArgumentOutOfRangeException error = Assert.Throws<ArgumentOutOfRangeException>(() => StandardAtmosphere.AtGeopotential(80001));
        Assert.StartsWith("must be from -5100 to 80000 m (Parameter 'geopotentialM')", error.Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentOutOfRangeException>(() => StandardAtmosphere.AtGeometric(double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => StandardAtmosphere.PressureAltitude(20000));
    }
}
