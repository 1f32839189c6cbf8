using System.Collections.Immutable;
using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Import.Toml;

namespace TrimFit.Import.Sheets;

/// <summary>Reads a flight sheet (TOML, schema <c>trimfit-flight/1</c>).</summary>
/// <remarks>A leg's <c>start</c> and <c>end</c> are a clock time (<c>10:21:30</c>, with or without quotes), seconds of the log, or
/// <c>{ marker = 3 }</c>; <c>marker = 3</c> in their place is the leg from mark 3 to mark 4. A clock leg may run over midnight.</remarks>
public static class FlightSheetReader
{
    /// <summary>The schema this program reads.</summary>
    public const string Schema = "trimfit-flight/1";

    private const double MmPerM = 1000, SecondsPerDay = 86_400;

    // Wide enough for any flight; a number outside is a slip of unit, sign or digit.
    private static readonly NumberRange _percent = new(0, 100, "%", "Give percent of the travel.");
    private static readonly NumberRange _fuel = new(0, 100, "kg", "Fuel is in kilograms; a litre of petrol is 0.75 kg.");
    private static readonly NumberRange _altitude = new(-500, 6000, "m", "Give metres above sea level.");
    private static readonly NumberRange _brake = new(0, 1500, "mm", "Give millimetres of brake travel; pulled is positive.");
    private static readonly NumberRange _ballast = new(0, 100, "kg", "Give kilograms; the side is the sign of ballast_arm_mm.");
    private static readonly NumberRange _arm = new(-1000, 1000, "mm", "Give millimetres from the centre line; positive is to the seated pilot's right.");
    private static readonly NumberRange _marker = new(0, 10_000, "", "Give the number of the mark.");
    private static readonly NumberRange _seconds = new(0, 1e6, "s", "Give seconds since the start of the log, or a clock time such as 10:21:30.");

    /// <summary>Reads the text of a flight sheet.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="tomlText">The whole file.</param>
    /// <exception cref="LogFormatException">The text has faults; the message has a line for each.</exception>
    public static FlightSheet Read(string fileName, string tomlText)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(tomlText);
        var faults = new FaultList(Path.GetFileName(fileName));
        TomlTable root = TomlDocument.Read(tomlText, faults);
        faults.ThrowIfAny();
        SchemaLine.Check(root, Schema, faults);
        faults.ThrowIfAny(); // the keys of another schema mean other things
        FlightSheet sheet = Sheet(new TableReader(root, "", faults), faults);
        faults.ThrowIfAny();
        return sheet;
    }

    /// <summary>Reads a flight sheet from disk, UTF-8.</summary>
    /// <exception cref="LogFormatException">The file cannot be opened or has faults.</exception>
    public static FlightSheet ReadFile(string path) => Read(path, SettingsFile.ReadText(path));

    private static FlightSheet Sheet(TableReader root, FaultList faults)
    {
        root.Item("schema");
        var sheet = new FlightSheet
        {
            Date = Date(root, faults),
            WingTrim = root.Text("wing_trim", "neutral") ?? "",
            Accelerator = root.Number("accelerator", _percent) / 100,
            FuelStartKg = root.Number("fuel_start_kg", _fuel),
            FuelEndKg = root.Number("fuel_end_kg", _fuel),
            GroundAltitudeM = root.Number("ground_altitude_m", _altitude),
            Notes = root.Text("notes", "calm evening") ?? "",
            Legs = Legs(root, faults),
        };
        if (sheet.FuelEndKg > sheet.FuelStartKg)
            faults.Add(root.LineOf("fuel_end_kg"), FormattableString.Invariant($"{sheet.FuelEndKg} kg after landing and {sheet.FuelStartKg} kg at take-off"), "fuel that does not grow", "Swap the two if they were mixed up.");
        root.ReportUnknown();
        return sheet;
    }

    private static DateOnly? Date(TableReader root, FaultList faults)
    {
        if (root.Item("date") is not TomlItem item)
            return null;
        string? text = item.Value is TomlMoment moment ? moment.Text : item.Value as string;
        if (DateOnly.TryParseExact(text, "yyyy-MM-dd", CultureInfo.InvariantCulture, DateTimeStyles.None, out DateOnly date))
            return date;
        faults.Add(item.Line, $"{item.Found} for date", "year, month and day", "Write date = 2026-05-17.");
        return null;
    }

    private static ImmutableArray<SheetLeg> Legs(TableReader root, FaultList faults)
    {
        if (root.Item("leg") is not TomlItem item)
            return [];
        if (item.Value is not TomlList list || !list.Items.All(entry => entry is TomlTable))
        {
            faults.Add(item.Line, $"{item.Found} for leg", "a table for each leg", "Write a line [[leg]] before the keys of each leg.");
            return [];
        }
        var legs = ImmutableArray.CreateBuilder<SheetLeg>();
        foreach (TomlTable table in list.Items.Cast<TomlTable>())
        {
            if (Leg(table, faults) is SheetLeg leg)
                legs.Add(leg);
        }
        return legs.ToImmutable();
    }

    private static SheetLeg? Leg(TomlTable table, FaultList faults)
    {
        var reader = new TableReader(table with { Path = "[leg]" }, "[leg]", faults);
        (SheetTime? start, SheetTime? end) = Span(reader, faults);
        SheetLegKind? kind = reader.Word("kind", ("hands_off", SheetLegKind.HandsOff), ("held", SheetLegKind.Held), ("brake_step", SheetLegKind.BrakeStep),
            ("weight_shift", SheetLegKind.WeightShift), ("ballast", SheetLegKind.Ballast), ("other", SheetLegKind.Other));
        if (reader.Item("kind") is null)
            faults.Add(reader.Line, "a leg without kind", "what the pilot did", "Write kind = \"hands_off\", \"held\", \"brake_step\", \"weight_shift\", \"ballast\" or \"other\".");
        PowerSetting? power = reader.Word("power", ("off", PowerSetting.Off), ("idle", PowerSetting.Idle), ("level", PowerSetting.Cruise), ("full", PowerSetting.Full));
        double? throttle = reader.Number("throttle_percent", _percent) / 100;
        double? left = reader.Number("brake_left", _brake), right = reader.Number("brake_right", _brake);
        double? ballast = reader.Number("ballast_kg", _ballast), arm = reader.Number("ballast_arm_mm", _arm);
        if (power is not null && throttle is not null)
            faults.Add(reader.LineOf("throttle_percent"), "throttle_percent beside power", "one of the two", "Leave power out when the throttle is known.");
        if (kind == SheetLegKind.HandsOff && (left > 0 || right > 0))
            faults.Add(reader.LineOf(left > 0 ? "brake_left" : "brake_right"), "a pulled brake on a hands_off leg", "no brake", "Write kind = \"held\" or \"brake_step\".");
        if (kind == SheetLegKind.BrakeStep && reader.Item("brake_left") is null && reader.Item("brake_right") is null)
            faults.Add(reader.Line, "a brake_step leg without brake_left and brake_right", "how far a brake was pulled, mm", "Add the brake that was pulled.");
        if (kind == SheetLegKind.Ballast && (reader.Item("ballast_kg") is null || reader.Item("ballast_arm_mm") is null))
            faults.Add(reader.Line, $"a ballast leg without {(reader.Item("ballast_kg") is null ? "ballast_kg" : "ballast_arm_mm")}", "mass and place of the ballast", "Add both ballast_kg and ballast_arm_mm.");
        reader.ReportUnknown();
        return start is null || end is null || kind is null ? null : new()
        {
            Start = start.Value,
            End = end.Value,
            Kind = kind.Value,
            Power = power,
            ThrottleFraction = throttle,
            BrakeLeftM = left / MmPerM,
            BrakeRightM = right / MmPerM,
            BallastKg = ballast,
            BallastArmM = arm / MmPerM,
            Line = table.Line,
        };
    }

    private static (SheetTime? Start, SheetTime? End) Span(TableReader reader, FaultList faults)
    {
        TomlItem? startItem = reader.Item("start"), endItem = reader.Item("end"), markerItem = reader.Item("marker");
        if (markerItem is not null && (startItem is not null || endItem is not null))
        {
            faults.Add(markerItem.Line, "marker beside start or end", "one of the two", "Leave marker out, or start and end.");
            return (null, null);
        }
        if (markerItem is not null)
        {
            return Marker(reader, markerItem, markerItem.Value, faults) is int number
                ? (SheetTime.FromMarker(number), SheetTime.FromMarker(number + 1))
                : (null, null);
        }
        if (startItem is null || endItem is null)
        {
            faults.Add(reader.Line, $"a leg without {(startItem is null ? "start" : "end")}", "both start and end, or a marker", "Write start = 10:21:30 and end = 10:22:10, or seconds of the log, or marker = 3.");
            return (null, null);
        }
        SheetTime? start = Moment(reader, startItem, faults), end = Moment(reader, endItem, faults);
        if (start is { } s && end is { } e)
        {
            if (s.Kind != e.Kind)
                faults.Add(endItem.Line, "start and end in different kinds of time", "the same kind", "Give both as clock times, both in seconds, or both as marks.");
            else if (!(Length(s, e) > 0))
                faults.Add(endItem.Line, "an end that does not follow the start", "a later end", "Correct start or end.");
        }
        return (start, end);
    }

    /// <summary>From start to end; a clock leg that ends up to half a day before its start runs over midnight.</summary>
    private static double Length(SheetTime start, SheetTime end)
    {
        double length = end.Value - start.Value;
        return start.Kind == SheetTimeKind.Clock && length < -SecondsPerDay / 2 ? length + SecondsPerDay : length;
    }

    private static SheetTime? Moment(TableReader reader, TomlItem item, FaultList faults)
    {
        switch (item.Value)
        {
            case double:
                return reader.Checked(item, item.Value, item.Key, _seconds) is double seconds ? SheetTime.FromSeconds(seconds) : null;
            case TomlTable table:
                var inner = new TableReader(table with { Path = item.Key }, item.Key, faults);
                TomlItem? markerItem = inner.Item("marker");
                inner.ReportUnknown();
                if (markerItem is null)
                    faults.Add(item.Line, $"a table without marker for {item.Key}", "a mark", $"Write {item.Key} = {{ marker = 3 }}.");
                return markerItem is not null && Marker(inner, markerItem, markerItem.Value, faults) is int number ? SheetTime.FromMarker(number) : null;
            default:
                string? text = item.Value is TomlMoment moment ? moment.Text : item.Value as string;
                string[] forms = ["HH':'mm':'ss", "H':'mm':'ss", "HH':'mm", "H':'mm", "HH':'mm':'ss'.'FFFFFFF", "H':'mm':'ss'.'FFFFFFF"];
                if (TimeOnly.TryParseExact(text, forms, CultureInfo.InvariantCulture, DateTimeStyles.None, out TimeOnly clock))
                    return SheetTime.FromClock(clock.ToTimeSpan());
                faults.Add(item.Line, $"{item.Found} for {item.Key}", "a clock time, seconds or a mark", $"Write {item.Key} = 10:21:30, {item.Key} = 95 or {item.Key} = {{ marker = 3 }}.");
                return null;
        }
    }

    private static int? Marker(TableReader reader, TomlItem item, object value, FaultList faults)
    {
        if (reader.Checked(item, value, "marker", _marker) is not double number)
            return null;
        if (number == Math.Floor(number))
            return (int)number;
        faults.Add(item.Line, $"{item.Found} for marker", "a whole number", _marker.Remedy);
        return null;
    }
}
