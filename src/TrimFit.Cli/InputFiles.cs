using System.Collections.Immutable;
using System.Security.Cryptography;
using TrimFit.Core.Logs;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Joining;
using TrimFit.Import.Results;
using TrimFit.Import.Rigs;
using TrimFit.Import.Sheets;
using TrimFit.Import.Toml;
using TrimFit.Reporting;
using TrimFit.Reporting.Carrying;

namespace TrimFit.Cli;

/// <summary>Everything the program reads; a file that cannot be read becomes a <see cref="LogFormatException"/> that names it.</summary>
internal static class InputFiles
{
    public static FlightImport Flight(IReadOnlyList<string> paths, CommonChoices choices, LogSettings? machine = null) => Flight(Sources(paths), choices.Columns, choices, machine);

    public static FlightImport Flight(IReadOnlyList<LogSource> sources, ImmutableArray<ColumnRule> columns, CommonChoices choices, LogSettings? machine)
    {
        // The command line speaks before the rig file: a role named there is not looked up again.
        ImmutableArray<ColumnRule> fromRig = machine is null ? [] : [.. machine.Columns.Where(r => !columns.Any(c => c.Role == r.Role))];
        var options = new ImportOptions { Columns = [.. columns, .. fromRig], Strict = choices.Strict, Progress = choices.Quiet ? null : ReadingProgress.ForTerminal() };
        return Readable(string.Join(", ", sources.Select(s => s.Name)), () => FlightReader.Read(sources, options));
    }

    public static IReadOnlyList<LogSource> Sources(IReadOnlyList<string> paths)
    {
        foreach (string path in paths.Where(path => !Directory.Exists(path))) // a folder is one recording
            MustExist(path);
        return Readable(string.Join(", ", paths.Select(Path.GetFileName)), () => LogSources.From(paths));
    }

    /// <summary>A rig file or sheet with its bytes as read.</summary>
    public static CarriedFile Carry(string path)
    {
        MustExist(path);
        return new(Path.GetFileName(path), SettingsFile.ReadBytes(path));
    }

    public static byte[] Bytes(LogSource source) => Readable(source.Name, () =>
    {
        using Stream stream = source.Open();
        using var bytes = new MemoryStream();
        stream.CopyTo(bytes);
        return bytes.ToArray();
    });

    public static (Rig Rig, SourceFile File) Rig(string path)
    {
        MustExist(path);
        return (RigFileReader.ReadFile(path), Source(path));
    }

    public static (FlightSheet Sheet, SourceFile File) Sheet(string path)
    {
        MustExist(path);
        return (FlightSheetReader.ReadFile(path), Source(path));
    }

    /// <summary>The bytes of a file.</summary>
    public static byte[] Bytes(string path)
    {
        MustExist(path);
        return Readable(Path.GetFileName(path), () => File.ReadAllBytes(path));
    }

    /// <summary>A file to read from.</summary>
    public static FileStream Open(string path)
    {
        MustExist(path);
        return Readable(Path.GetFileName(path), () => File.OpenRead(path));
    }

    /// <summary>A flight sheet, read and checked, with its bytes.</summary>
    public static Jobs.KeptFile SheetBytes(string path)
    {
        _ = Sheet(path);
        return new(Core.Workshop.InputRecord.Sheet, Path.GetFileName(path), Bytes(path));
    }

    public static string Text(string path)
    {
        MustExist(path);
        return Readable(Path.GetFileName(path), () => File.ReadAllText(path));
    }

    public static (string Text, SourceFile File) TextWithSource(string path) => (Text(path), Source(path));
    /// <summary>Text of a file that another file names; null when there is none or it cannot be read.</summary>
    public static string? TextOrNull(string path)
    {
        try
        {
            return File.Exists(path) ? File.ReadAllText(path) : null;
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return null;
        }
    }

    /// <summary>The last flight for a test card.</summary>
    public static (PriorFlight Flight, SourceFile File) Prior(string path, Rig rig)
    {
        MustExist(path);
        return (FitResultReader.Read(path, Text(path), rig.BrakeFullTravelM), Source(path));
    }

    /// <summary>What a flown test card promised.</summary>
    public static CardPromise Card(string path)
    {
        MustExist(path);
        return CardFileReader.Read(path, Text(path));
    }

    private static SourceFile Source(string path) =>
        new(Path.GetFileName(path), Convert.ToHexStringLower(Readable(Path.GetFileName(path), () => SHA256.HashData(File.ReadAllBytes(path)))));

    private static void MustExist(string path)
    {
        if (Directory.Exists(path))
            throw LogFormatException.At(path, null, null, "a folder", "a file", "Name the file in it.");
        if (!File.Exists(path))
            throw LogFormatException.At(path, null, null, "no such file", "a file", "Check the name and the folder.");
    }

    private static T Readable<T>(string name, Func<T> read)
    {
        try
        {
            return read();
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            throw LogFormatException.At(name, null, null, "a file that cannot be opened", "a readable file", "Check its rights and whether another program holds it.");
        }
    }
}
