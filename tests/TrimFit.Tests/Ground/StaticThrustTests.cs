using TrimFit.Core.Ground;

namespace TrimFit.Tests.Ground;

public class StaticThrustTests
{
    [Theory]
    // Outside: ICAO Doc 7488 (ISO 2533) tables, geometric height, temperature of the table: density kg/m³.
    [InlineData(15, 0, 1.2250)]
    [InlineData(8.501, 1000, 1.11166)]
    [InlineData(2.004, 2000, 1.00655)]
    public void Air_of_the_standard_day_has_the_standard_density(double celsius, double height, double density) =>
        Accuracy.AgreesTo(4, density, StaticThrust.AirDensity(celsius, height));

    [Fact]
    public void A_hot_day_in_the_hills_by_hand()
    {
        // By hand: 89876.3 Pa (ICAO table at 1000 m)/(287.05287 × 303.15) = 1.032831 kg/m³; 60 kg pull = 588.399 N; at sea level × 1.225/1.032831 = 697.878 N.
        double density = StaticThrust.AirDensity(30, 1000), thrust = StaticThrust.FromPull(60);
        Accuracy.AgreesTo(5, 1.032831, density);
        Accuracy.AgreesTo(6, 588.399, thrust);
        Accuracy.AgreesTo(5, 697.878, StaticThrust.AtSeaLevel(thrust, density));
    }

    [Fact]
    public void A_slanting_rope_carries_more_than_the_thrust()
    {
        Accuracy.AgreesTo(6, 588.399 * 0.9961947, StaticThrust.FromPull(60, double.DegreesToRadians(5)));
        Assert.Throws<ArgumentOutOfRangeException>(() => StaticThrust.FromPull(60, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>(() => StaticThrust.AirDensity(288, 0)); // kelvins
    }
}
