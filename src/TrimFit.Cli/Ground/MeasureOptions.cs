using System.Collections.Immutable;
using System.CommandLine;
using System.Globalization;
using TrimFit.Core.Rigging;
using TrimFit.Import.Rigs;
using TrimFit.Reporting;

namespace TrimFit.Cli;

/// <summary>Options of <c>rig</c> for the work on the ground.</summary>
internal sealed class MeasureOptions
{
    private readonly Option<bool> _measure = new("--measure") { Description = "Write readings into the rig file; earlier values stay as comments. Asks on a terminal when no reading is given." };
    private readonly Option<string[]> _reading = new("--reading") { Description = "A reading, such as hang_check.left_kg=56.3,56.1,56.5. May be given more than once.", HelpName = "NAME=V,V,V" };
    private readonly Option<string?> _readings = new("--readings") { Description = "A readings file (TOML with tables and keys of the rig file), or - to be asked.", HelpName = "FILE|-" };
    private readonly Option<bool> _evenSo = new("--even-so") { Description = "Write readings although they contradict each other." };
    private readonly Option<string?> _moved = new("--moved") { Description = "Does the hang check prove a change? What was moved and how far, right positive, in mm (deg for engine_cant, kg for ballast); the rig file has the hang check before it, the readings are those after it.", HelpName = "KIND=TRAVEL" };
    private readonly Option<string[]> _sheet = new("--sheet") { Description = "Write a sheet to print and fill in: measuring, hang-check, weighing, rotation, thrust or templates. May be given more than once.", HelpName = "KIND=FILE.html" };

    public void AddTo(Command command)
    {
        foreach (Option option in (Option[])[_measure, _reading, _readings, _evenSo, _moved, _sheet])
            command.Options.Add(option);
    }

    /// <exception cref="CommandLineException">A value is none of those it may be.</exception>
    public MeasureChoices Choices(ParseResult parsed)
    {
        var choices = new MeasureChoices
        {
            Measure = parsed.GetValue(_measure),
            Readings = Given(parsed.GetValue(_reading) ?? []),
            ReadingsFile = parsed.GetValue(_readings),
            EvenSo = parsed.GetValue(_evenSo),
            Moved = parsed.GetValue(_moved) is string moved ? Moved(moved) : null,
            Sheets = [.. (parsed.GetValue(_sheet) ?? []).Select(Sheet)],
        };
        if (choices.Measure && choices.Moved is not null)
            throw new CommandLineException("--moved compares and writes nothing; give --measure in a second call.");
        if (!choices.Measure && choices.Moved is null && (!choices.Readings.IsEmpty || choices.ReadingsFile is not null))
            throw new CommandLineException("readings without --measure (to write them) or --moved (to compare them).");
        return choices;
    }

    private static GroundReadings Given(string[] texts)
    {
        var readings = new GroundReadings();
        foreach (string text in texts)
        {
            int equals = text.IndexOf('=', StringComparison.Ordinal);
            string name = equals > 0 ? text[..equals].Trim() : text;
            if (equals <= 0)
                throw new CommandLineException($"--reading: found \"{text}\", expected NAME=V or NAME=V,V,V, such as hang_check.left_kg=56.3,56.1,56.5.");
            if (MeasuredKey.Find(name) is not MeasuredKey key)
                throw new CommandLineException($"--reading: \"{name}\" is no reading; the readings are {string.Join(", ", MeasuredKey.All.Select(k => k.Name))}.");
            if (readings.TrySet(key, text[(equals + 1)..]) is string fault)
                throw new CommandLineException("--reading: " + fault);
        }
        return readings;
    }

    private static (Adjustment, double) Moved(string text)
    {
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        string[] names = [.. Adjustment.All.Where(a => a.Move is not null).Select(a => Snake(a.Kind))];
        Adjustment? adjustment = equals <= 0 ? null : Adjustment.All.FirstOrDefault(a => a.Move is not null && Snake(a.Kind) == text[..equals].Trim());
        if (adjustment is null || !double.TryParse(text.AsSpan(equals + 1), NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double travel) || travel == 0)
            throw new CommandLineException($"--moved: found \"{text}\", expected KIND=TRAVEL such as carabiner_pair=-7; the kinds are {string.Join(", ", names)}; right is positive, 0 is no change.");
        return (adjustment, adjustment.Unit switch { TravelUnit.Meter => travel / 1000, TravelUnit.Radian => double.DegreesToRadians(travel), _ => travel });
    }

    private static (SheetKind, string) Sheet(string text)
    {
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        string path = equals < 0 ? "" : text[(equals + 1)..];
        foreach (SheetKind kind in Enum.GetValues<SheetKind>())
        {
            if (equals > 0 && text[..equals] == Snake(kind).Replace('_', '-') && Path.GetExtension(path).ToUpperInvariant() is ".HTML" or ".HTM")
                return (kind, path);
        }
        throw new CommandLineException($"--sheet: found \"{text}\", expected KIND=FILE.html; the kinds are {string.Join(", ", Enum.GetValues<SheetKind>().Select(k => Snake(k).Replace('_', '-')))}.");
    }

    private static string Snake(Enum value) => CommandWords.Of(value);
}

/// <summary>The options as values.</summary>
internal sealed record MeasureChoices
{
    public required bool Measure { get; init; }
    public required GroundReadings Readings { get; init; }
    public required string? ReadingsFile { get; init; }
    public required bool EvenSo { get; init; }
    public required (Adjustment Adjustment, double Travel)? Moved { get; init; }
    public required ImmutableArray<(SheetKind Kind, string Path)> Sheets { get; init; }
}
