using System.Globalization;

namespace TrimFit.Tests;

public class CultureTests
{
    /// <summary>The suite is run again under another culture; this shows that it really was.</summary>
    [Fact]
    public void The_culture_asked_for_is_the_one_in_force()
    {
        if (Environment.GetEnvironmentVariable("TRIMFIT_EXPECT_CULTURE") is string wanted)
        {
            Assert.Equal(wanted, CultureInfo.CurrentCulture.Name);
            Assert.NotEqual("1.5", 1.5.ToString(CultureInfo.CurrentCulture)); // each culture the suite is run under has another decimal mark
        }
        else
        {
            Assert.NotEqual(CultureInfo.GetCultureInfo("de-DE").NumberFormat.NumberDecimalSeparator, CultureInfo.InvariantCulture.NumberFormat.NumberDecimalSeparator);
        }
    }
}
