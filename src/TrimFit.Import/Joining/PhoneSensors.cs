using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Import.Joining;

/// <summary>Phone recordings have one file per sensor, in which the columns are only called x, y and z: the file's name says what they are.</summary>
internal static class PhoneSensors
{
    private const int HeadBytes = 4096;

    // Words of file names; the first that fits counts. Rank 0 is not used. Acceleration serves to find the vertical, so it must hold gravity.
    private static readonly (string Word, Sensor Sensor, int Rank)[] _words =
    [
        ("uncalibrated", Sensor.Other, 0),
        ("gyro", Sensor.Gyro, 1),
        ("linear", Sensor.Other, 0),
        ("withoutg", Sensor.Other, 0),
        ("useracc", Sensor.Other, 0),
        ("totalacc", Sensor.Acceleration, 3),
        ("gravity", Sensor.Acceleration, 2),
        ("accelero", Sensor.Acceleration, 1),
        ("accelerat", Sensor.Acceleration, 1),
    ];

    private enum Sensor
    {
        Other,
        Gyro,
        Acceleration,
    }

    /// <summary>What x, y and z of a file are; empty for files that are no phone sensor, or of which the recording has a better one.</summary>
    public static IReadOnlyList<ColumnRule> RulesFor(LogSource source, IReadOnlyList<LogSource> all)
    {
        (Sensor sensor, int rank) = Of(source);
        if (rank == 0 || source.Recording is null || all.Any(other => other.Recording == source.Recording && Of(other) is (Sensor s, int r) && s == sensor && r > rank))
            return [];
        (ChannelRole[] roles, string unit) = sensor == Sensor.Gyro
            ? (new[] { ChannelRole.GyroX, ChannelRole.GyroY, ChannelRole.GyroZ }, "rad/s")
            : (new[] { ChannelRole.AccelerationX, ChannelRole.AccelerationY, ChannelRole.AccelerationZ }, "m/s2");
        string[] header = Header(source);
        var rules = new List<ColumnRule>();
        for (int axis = 0; axis < 3; axis++)
        {
            string letter = "xyz"[axis..(axis + 1)];
            string? cell = Array.Find(header, c => c.Equals(letter, StringComparison.OrdinalIgnoreCase) || c.StartsWith(letter + " (", StringComparison.OrdinalIgnoreCase));
            if (cell is not null)
                rules.Add(new(roles[axis], cell, cell.Length == 1 ? unit : null)); // phones give rad/s and m/s²; a unit in the header comes first
        }
        return rules.Count == 3 ? rules : [];
    }

    private static (Sensor Sensor, int Rank) Of(LogSource source)
    {
        string name = new([.. source.Name.Where(char.IsAsciiLetter).Select(char.ToLowerInvariant)]);
        foreach ((string word, Sensor sensor, int rank) in _words)
        {
            if (name.Contains(word, StringComparison.Ordinal))
                return (sensor, rank);
        }
        return (Sensor.Other, 0);
    }

    private static string[] Header(LogSource source)
    {
        using Stream stream = source.Open();
        byte[] head = new byte[HeadBytes];
        int length = stream.ReadAtLeast(head, head.Length, throwOnEndOfStream: false);
        string text = Encoding.UTF8.GetString(head, 0, length);
        string line = text[..(text.AsSpan().IndexOfAny('\r', '\n') is int end and >= 0 ? end : text.Length)];
        return [.. line.TrimStart('\uFEFF').Split(',', ';', '\t').Select(cell => cell.Trim(' ', '"'))];
    }
}
