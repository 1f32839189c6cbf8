using System.Collections.Immutable;
using System.IO.Enumeration;
using TrimFit.Import;

namespace TrimFit.Cli.Batch;

/// <summary>One flight of a batch: its files, as named by who asked.</summary>
/// <param name="Logs">Logs of one flight.</param>
/// <param name="RigPath">Its rig file.</param>
/// <param name="SheetPath">Its flight sheet; null without one.</param>
/// <param name="Setup">Name of the setup flown; null when not told.</param>
internal sealed record BatchFlight(ImmutableArray<string> Logs, string RigPath, string? SheetPath, string? Setup)
{
    /// <summary>How a sheet beside a log is named: <c>flight.csv</c> has <c>flight-sheet.toml</c>.</summary>
    private const string SheetEnding = "-sheet.toml";

    /// <summary>Name of the row; rows are ordered by it.</summary>
    public string Name => string.Join(" + ", Logs);

    /// <summary>Flights from paths and patterns: each file is one flight, a folder is one recording of several loggers.</summary>
    /// <param name="patterns">Paths; <c>*</c> and <c>?</c> in the last part match names, so that shells without patterns can use them too.</param>
    /// <param name="rigPath">The machine of all of them.</param>
    /// <exception cref="CommandLineException">A pattern matches nothing.</exception>
    public static IReadOnlyList<BatchFlight> From(IEnumerable<string> patterns, string rigPath)
    {
        var paths = new SortedSet<string>(StringComparer.Ordinal);
        foreach (string pattern in patterns)
        {
            string folder = Path.GetDirectoryName(pattern) is { Length: > 0 } given ? given : "", name = Path.GetFileName(pattern);
            if (File.Exists(pattern) || Directory.Exists(pattern) || name.AsSpan().IndexOfAny("*?") < 0)
            {
                paths.Add(pattern); // one that does not exist becomes a row that says so
                continue;
            }
            string[] found = [.. Matches(folder, name)];
            if (found.Length == 0)
                throw new CommandLineException($"\"{pattern}\" matches no file. Check the folder and the pattern.");
            paths.UnionWith(found);
        }
        return [.. paths.Select(path => new BatchFlight([path], rigPath, SheetBeside(path), null))];
    }

    /// <summary>The paths that a text file lists, one a line; empty lines and lines that begin with # do not count.</summary>
    public static IEnumerable<string> Listed(string file) =>
        InputFiles.Text(file).Split('\n').Select(line => line.Trim()).Where(line => line.Length > 0 && line[0] != '#');

    private static IEnumerable<string> Matches(string folder, string pattern)
    {
        try
        {
            return [.. Directory.EnumerateFiles(folder.Length == 0 ? "." : folder)
                .Select(path => Path.GetFileName(path))
                .Where(name => FileSystemName.MatchesSimpleExpression(pattern, name, ignoreCase: false) && !name.EndsWith(".toml", StringComparison.OrdinalIgnoreCase))
                .Select(name => Path.Join(folder, name))];
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            throw LogFormatException.At(folder, null, null, "a folder that cannot be listed", "a readable folder", "Check its name and rights.");
        }
    }

    private static string? SheetBeside(string log)
    {
        string sheet = Path.ChangeExtension(log, null) + SheetEnding;
        return File.Exists(sheet) ? sheet : null;
    }
}
