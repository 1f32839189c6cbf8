using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;

namespace TrimFit.Tests.Importing;

public class ColumnRulesTests
{
    [Theory]
    [InlineData("yaw_rate=gz:deg/s", ChannelRole.YawRate, "gz", "deg/s")]
    [InlineData("YAW_RATE=gz:°/s", ChannelRole.YawRate, "gz", "°/s")]
    [InlineData("yaw_rate=gz", ChannelRole.YawRate, "gz", null)]
    [InlineData("yaw_rate=imu:gz", ChannelRole.YawRate, "imu:gz", null)]
    [InlineData("yaw_rate=imu:gz:rad/s", ChannelRole.YawRate, "imu:gz", "rad/s")]
    [InlineData("throttle=Thr:-1024..1024", ChannelRole.Throttle, "Thr", "-1024..1024")]
    [InlineData("brake_difference=a=b:%", ChannelRole.BrakeDifference, "a=b", "%")]
    [InlineData("ground_speed=v:deg", ChannelRole.GroundSpeed, "v:deg", null)]
    public void A_unit_is_one_only_behind_the_last_colon_and_only_if_the_role_has_it(string text, ChannelRole role, string name, string? unit)
    {
        Assert.True(ColumnRules.TryParse(text, out ColumnRule rule, out string problem));
        Assert.Equal(new ColumnRule(role, name, unit), rule);
        Assert.Equal("", problem);
    }

    [Theory]
    [InlineData("gz", "\"gz\" is no column rule; write ROLE=NAME or ROLE=NAME:UNIT, such as yaw_rate=gz:deg/s.")]
    [InlineData("yaw_rate=", "\"yaw_rate=\" is no column rule; write ROLE=NAME or ROLE=NAME:UNIT, such as yaw_rate=gz:deg/s.")]
    public void What_is_no_rule_is_refused(string text, string problem)
    {
        Assert.False(ColumnRules.TryParse(text, out _, out string found));
        Assert.Equal(problem, found);
    }

    [Fact]
    public void An_unknown_role_is_refused_with_the_roles_there_are()
    {
        Assert.False(ColumnRules.TryParse("yaw=gz", out _, out string problem));
        Assert.StartsWith("\"yaw\" is no role of a column; the roles are time, date, throttle, rpm,", problem, StringComparison.Ordinal);
    }
}
