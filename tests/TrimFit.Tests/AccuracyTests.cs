namespace TrimFit.Tests;

public class AccuracyTests
{
    [Fact]
    public void Digits_are_counted_from_the_relative_error()
    {
        Accuracy.AgreesTo(2.9, 1000, 1001);
        Assert.ThrowsAny<Xunit.Sdk.XunitException>(() => Accuracy.AgreesTo(3.1, 1000, 1001));
    }

    [Fact]
    public void A_NaN_agrees_with_nothing() => Assert.ThrowsAny<Xunit.Sdk.XunitException>(() => Accuracy.AgreesTo(1, 1, double.NaN));
}
