using System.Collections.Immutable;
using TrimFit.Core.Comparing;
using TrimFit.Import.Toml;

namespace TrimFit.Import.Flights;

/// <summary>Reads a list of flights (TOML, schema <c>trimfit-flights/1</c>).</summary>
/// <remarks>
/// <c>[[flight]]</c> with <c>logs</c> (a path or a list of paths), <c>rig</c>, <c>sheet</c>, <c>setup</c>. A <c>rig</c> at the top is that of every
/// flight without its own; without <c>setup</c> the rig file's name is the setting. <c>changed</c> says what was changed. A blind trial names
/// <c>sealed_order</c> and the rig of each setting in <c>[setups]</c>; its flights then have neither rig nor setup.
/// </remarks>
public static class FlightListReader
{
    /// <summary>The schema this program reads.</summary>
    public const string Schema = "trimfit-flights/1";

    /// <summary>Words of what was changed, as on the command line.</summary>
    public static ImmutableArray<(string Word, ChangedPart Part)> ChangedWords { get; } =
    [
        ("geometry", ChangedPart.Geometry), ("wing", ChangedPart.Wing), ("brake_lines", ChangedPart.BrakeLines), ("trimmers", ChangedPart.Trimmers),
        ("harness", ChangedPart.Harness), ("propeller", ChangedPart.Propeller), ("ballast", ChangedPart.Ballast),
    ];

    /// <summary>Reads the text of a list.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="tomlText">The whole file.</param>
    /// <exception cref="LogFormatException">The text has faults; the message has a line for each.</exception>
    public static FlightList Read(string fileName, string tomlText)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(tomlText);
        var faults = new FaultList(Path.GetFileName(fileName));
        TomlTable root = TomlDocument.Read(tomlText, faults);
        faults.ThrowIfAny();
        SchemaLine.Check(root, Schema, faults);
        faults.ThrowIfAny();
        FlightList list = List(new TableReader(root, "", faults), faults);
        faults.ThrowIfAny();
        return list;
    }

    /// <summary>Reads a list from disk, UTF-8.</summary>
    /// <exception cref="LogFormatException">The file cannot be opened or has faults.</exception>
    public static FlightList ReadFile(string path) => Read(path, SettingsFile.ReadText(path));

    private static FlightList List(TableReader root, FaultList faults)
    {
        root.Item("schema");
        string? rig = root.Text("rig", "machine-rig.toml"), order = root.Text("sealed_order", "trial-order.toml");
        ChangedPart? changed = root.Word("changed", [.. ChangedWords]);
        ImmutableDictionary<string, string> setups = Setups(root, faults);
        var list = new FlightList { Flights = Flights(root, rig, order is not null, faults), Changed = changed, SealedOrder = order, SetupRigs = setups };
        if (order is not null && setups.IsEmpty)
            faults.Add(root.LineOf("sealed_order"), "sealed_order without a table [setups]", "the rig file of each setting", "Write [setups] and below it A = \"rig-a.toml\" and B = \"rig-b.toml\".");
        if (order is null && !setups.IsEmpty)
            faults.Add(root.LineOf("setups"), "a table [setups] without sealed_order", "both or neither", "Name the sealed order, or give each flight its rig.");
        root.ReportUnknown();
        return list;
    }

    private static ImmutableDictionary<string, string> Setups(TableReader root, FaultList faults)
    {
        var setups = ImmutableDictionary.CreateBuilder<string, string>(StringComparer.Ordinal);
        if (root.Item("setups") is not TomlItem item)
            return setups.ToImmutable();
        if (item.Value is not TomlTable table)
        {
            faults.Add(item.Line, $"{item.Found} for setups", "a table", "Write [setups] and below it A = \"rig-a.toml\".");
            return setups.ToImmutable();
        }
        foreach (TomlItem entry in table.Items)
        {
            if (entry.Value is string path)
                setups[entry.Key] = path;
            else
                faults.Add(entry.Line, $"{entry.Found} for {entry.Key}", "a rig file's name in quotes", $"Write {entry.Key} = \"rig.toml\".");
        }
        return setups.ToImmutable();
    }

    private static ImmutableArray<ListedFlight> Flights(TableReader root, string? rig, bool sealedOrder, FaultList faults)
    {
        if (root.Item("flight") is not TomlItem item)
        {
            faults.Add(1, "no flight", "a table for each flight", "Write a line [[flight]] and below it logs = \"flight.csv\" and rig = \"rig.toml\".");
            return [];
        }
        if (item.Value is not TomlList list || !list.Items.All(entry => entry is TomlTable))
        {
            faults.Add(item.Line, $"{item.Found} for flight", "a table for each flight", "Write a line [[flight]] before the keys of each flight.");
            return [];
        }
        var flights = ImmutableArray.CreateBuilder<ListedFlight>();
        foreach (TomlTable table in list.Items.Cast<TomlTable>())
        {
            var reader = new TableReader(table with { Path = "[flight]" }, "[flight]", faults);
            ImmutableArray<string> logs = Logs(reader, faults);
            string? own = reader.Text("rig", "rig.toml"), sheet = reader.Text("sheet", "sheet.toml"), setup = reader.Text("setup", "as delivered");
            if (sealedOrder && (own ?? setup) is not null)
                faults.Add(reader.LineOf(own is null ? "setup" : "rig"), "rig or setup beside a sealed order", "neither", "The sealed order says which setting each flight had; leave them out.");
            if (!sealedOrder && (own ?? rig) is null)
                faults.Add(reader.Line, "a flight without rig", "the rig file it was flown with", "Write rig = \"rig.toml\" below [[flight]], or once at the top for all flights.");
            reader.ReportUnknown();
            flights.Add(new()
            {
                Logs = logs,
                Rig = sealedOrder ? null : own ?? rig,
                Sheet = sheet,
                Setup = sealedOrder ? null : setup ?? Path.GetFileNameWithoutExtension(own ?? rig),
                Line = table.Line,
            });
        }
        return flights.ToImmutable();
    }

    private static ImmutableArray<string> Logs(TableReader reader, FaultList faults)
    {
        switch (reader.Item("logs"))
        {
            case null:
                faults.Add(reader.Line, "a flight without logs", "at least one log", "Write logs = \"flight.csv\", or logs = [\"gps.igc\", \"engine.csv\"].");
                return [];
            case { Value: string one }:
                return [one];
            case { Value: TomlList { Items.Count: > 0 } list } when list.Items.All(x => x is string):
                return [.. list.Items.Cast<string>()];
            case TomlItem other:
                faults.Add(other.Line, $"{other.Found} for logs", "a file name or a list of file names", "Write logs = \"flight.csv\", or logs = [\"gps.igc\", \"engine.csv\"].");
                return [];
        }
    }
}
