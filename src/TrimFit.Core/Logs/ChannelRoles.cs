using System.Text;

namespace TrimFit.Core.Logs;

/// <summary>The words for roles and the unit each is kept in.</summary>
public static class ChannelRoles
{
    private static readonly (ChannelRole Role, string Name)[] _names =
        [.. Enum.GetValues<ChannelRole>().Select(role => (role, SnakeCase(role.ToString())))];

    /// <summary>All role words in their documented order, such as <c>yaw_rate</c>.</summary>
    public static IEnumerable<string> Names => _names.Select(n => n.Name);

    /// <summary>The word for a role, such as <c>yaw_rate</c>.</summary>
    public static string NameOf(ChannelRole role) => _names[(int)role].Name;

    /// <summary>Finds the role for a word; the comparison ignores case.</summary>
    public static bool TryParse(string name, out ChannelRole role)
    {
        foreach ((ChannelRole candidate, string word) in _names)
        {
            if (string.Equals(word, name, StringComparison.OrdinalIgnoreCase))
            {
                role = candidate;
                return true;
            }
        }
        role = default;
        return false;
    }

    /// <summary>The unit in which a <see cref="FlightLog"/> keeps the role.</summary>
    public static string UnitOf(ChannelRole role) => role switch
    {
        ChannelRole.Time => "s",
        ChannelRole.Rpm => "rev/s",
        ChannelRole.Power => "W",
        ChannelRole.Voltage => "V",
        ChannelRole.Current or ChannelRole.MotorCurrent => "A",
        ChannelRole.YawRate or ChannelRole.GyroX or ChannelRole.GyroY or ChannelRole.GyroZ or ChannelRole.RollRate => "rad/s",
        ChannelRole.AccelerationX or ChannelRole.AccelerationY or ChannelRole.AccelerationZ => "m/s2",
        ChannelRole.Heading or ChannelRole.Roll or ChannelRole.GroundCourse or ChannelRole.Latitude or ChannelRole.Longitude => "rad",
        ChannelRole.Altitude => "m",
        ChannelRole.Pressure => "Pa",
        ChannelRole.VerticalSpeed or ChannelRole.GroundSpeed or ChannelRole.VelocityNorth or ChannelRole.VelocityEast or ChannelRole.Airspeed => "m/s",
        ChannelRole.Date or ChannelRole.Position => "",
        ChannelRole.Marker => "1",
        _ => "1", // fractions; brakes and trimmers may also be in metres, see FlightLog.BrakeUnit
    };

    private static string SnakeCase(string pascal)
    {
        var text = new StringBuilder();
        foreach (char c in pascal)
        {
            if (char.IsAsciiLetterUpper(c) && text.Length > 0)
                text.Append('_');
            text.Append(char.ToLowerInvariant(c));
        }
        return text.ToString();
    }
}
