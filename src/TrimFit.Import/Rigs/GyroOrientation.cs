namespace TrimFit.Import.Rigs;

/// <summary>The words for how a gyro is mounted, such as <c>x forward, y right, z down</c>.</summary>
internal static class GyroOrientation
{
    private static readonly Dictionary<string, (double X, double Y, double Z)> _directions = new(StringComparer.Ordinal)
    {
        ["forward"] = (1, 0, 0),
        ["back"] = (-1, 0, 0),
        ["right"] = (0, 1, 0),
        ["left"] = (0, -1, 0),
        ["down"] = (0, 0, 1),
        ["up"] = (0, 0, -1),
    };

    /// <summary>Whether the words give each axis once and three directions that are square to each other and right-handed.</summary>
    public static bool IsValid(string words) => Parse(words) is not null;

    /// <summary>Directions of the sensor's x, y and z axes in body axes (x forward, y right, z down), or null when the words are none.</summary>
    public static (double X, double Y, double Z)[]? Parse(string words)
    {
        var axes = new (double X, double Y, double Z)?[3];
        foreach (string part in words.Split(',', StringSplitOptions.TrimEntries))
        {
            string[] pair = part.Split(' ', StringSplitOptions.RemoveEmptyEntries);
            int axis = pair.Length == 2 ? Array.IndexOf(["x", "y", "z"], pair[0]) : -1;
            if (axis < 0 || axes[axis] is not null || !_directions.TryGetValue(pair[1], out (double X, double Y, double Z) direction))
                return null;
            axes[axis] = direction;
        }
        if (axes[0] is not { } x || axes[1] is not { } y || axes[2] is not { } z)
            return null;
        double volume = (x.X * ((y.Y * z.Z) - (y.Z * z.Y))) - (x.Y * ((y.X * z.Z) - (y.Z * z.X))) + (x.Z * ((y.X * z.Y) - (y.Y * z.X)));
        return volume == 1 ? [x, y, z] : null; // components are 0 and ±1, so 1 is exact; sensors are right-handed
    }
}
