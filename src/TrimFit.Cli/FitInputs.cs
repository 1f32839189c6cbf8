using System.Collections.Immutable;
using System.Globalization;
using System.Security.Cryptography;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Units;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Import.Sheets;
using TrimFit.Import.Toml;
using TrimFit.Reporting;
using TrimFit.Reporting.Carrying;

namespace TrimFit.Cli;

/// <summary>Everything one run of <c>fit</c> works on, from files or from a report page that carries them.</summary>
internal sealed record FitInputs
{
    public required Rig Rig { get; init; }
    public required CarriedFile RigFile { get; init; }
    public required FlightSheet? Sheet { get; init; }
    public required CarriedFile? SheetFile { get; init; }
    public required FlightImport Import { get; init; }
    public required TrimOptions Options { get; init; }
    public required IReadOnlyList<LogSource> Sources { get; init; }
    public required ImmutableArray<ColumnRule> Columns { get; init; }
    public required bool WithoutPlace { get; init; }

    /// <summary>The result in the page this run came from; null for files, and when something of the page's input was overruled.</summary>
    public string? Before { get; init; }

    /// <summary>Whether the run came from a page.</summary>
    public bool FromReport { get; init; }

    /// <summary>Reads the inputs.</summary>
    /// <exception cref="LogFormatException">A file cannot be read.</exception>
    /// <exception cref="CommandLineException">No rig file was given.</exception>
    public static FitInputs Read(IReadOnlyList<string> logs, string? rigPath, string? sheetPath, bool forgetPlace, CommonChoices choices)
    {
        if (logs is [string page] && Path.GetExtension(page).ToUpperInvariant() is ".HTML" or ".HTM")
            return FromPage(page, rigPath, sheetPath, forgetPlace, choices);
        if (rigPath is null)
            throw new CommandLineException("Option '--rig' is required, unless the log is a report page that carries its rig file.");
        CarriedFile rig = InputFiles.Carry(rigPath);
        CarriedFile? sheet = sheetPath is null ? null : InputFiles.Carry(sheetPath);
        IReadOnlyList<LogSource> sources = InputFiles.Sources(logs);
        return Of(sources, rig, sheet, choices.Columns, choices.TrimOptions, forgetPlace, withoutPlace: false, choices, null);
    }

    private static FitInputs FromPage(string path, string? rigPath, string? sheetPath, bool forgetPlace, CommonChoices choices)
    {
        string name = Path.GetFileName(path);
        ReportInput input;
        try
        {
            input = ReportInput.FindIn(InputFiles.Text(path))
                ?? throw LogFormatException.At(name, null, null, "a page that carries no flight", "a report written by trimfit fit --report", "Give the log itself.");
        }
        catch (InvalidDataException e)
        {
            throw LogFormatException.At(name, null, null, "a report whose carried flight cannot be unpacked (" + e.Message + ")", "the report as it was written", "Copy it again, or give the log itself.");
        }
        // What the command line says overrules the page; then the results are not of the same input and are not compared.
        ImmutableArray<ColumnRule> columns = choices.Columns.IsEmpty ? [.. input.Columns.Select(c => Rule(c, name))] : choices.Columns;
        TrimOptions options = choices.TrimOptionsGiven ? choices.TrimOptions : OptionsOf(input, name);
        bool same = rigPath is null && sheetPath is null && choices.Columns.IsEmpty && !choices.TrimOptionsGiven && (!forgetPlace || input.WithoutPlace);
        LogSource[] sources = [.. input.Logs.Select(l => LogSource.FromBytes(l.Name, l.Content.ToArray()) with { Recording = l.Recording })];
        return Of(sources, rigPath is null ? input.Rig : InputFiles.Carry(rigPath), sheetPath is null ? input.Sheet : InputFiles.Carry(sheetPath),
            columns, options, forgetPlace && !input.WithoutPlace, input.WithoutPlace, choices, same ? input.Result : null) with
        {
            FromReport = true,
        };
    }

    private static FitInputs Of(IReadOnlyList<LogSource> sources, CarriedFile rigFile, CarriedFile? sheetFile, ImmutableArray<ColumnRule> columns, TrimOptions options,
        bool forgetPlace, bool withoutPlace, CommonChoices choices, string? before)
    {
        Rig rig = RigFileReader.Read(rigFile.Name, SettingsFile.TextOf(rigFile.Name, rigFile.Content.Span));
        FlightSheet? sheet = sheetFile is null ? null : FlightSheetReader.Read(sheetFile.Name, SettingsFile.TextOf(sheetFile.Name, sheetFile.Content.Span));
        // A log without its place has columns of its own; what the rig file says about the logger's belongs to the log as it was.
        FlightImport import = InputFiles.Flight(sources, columns, choices, withoutPlace ? null : rig.Log);
        if (forgetPlace)
        {
            // From here on the stripped log is the log: what the page carries is what was measured.
            ImmutableArray<Notice> warnings = import.Diagnostics.Warnings;
            (LogSource source, ImmutableArray<ColumnRule> rules) = PlacelessLog.Of(import.Flight, Path.GetFileNameWithoutExtension(sources[0].Name) + "-without-place.csv");
            (sources, columns) = ([source], rules);
            import = InputFiles.Flight(sources, columns, choices, null);
            import = import with { Diagnostics = import.Diagnostics with { Warnings = [.. warnings, .. import.Diagnostics.Warnings] } };
        }
        return new()
        {
            Rig = rig,
            RigFile = rigFile,
            Sheet = sheet,
            SheetFile = sheetFile,
            Import = import,
            Options = options,
            Sources = sources,
            Columns = columns,
            WithoutPlace = forgetPlace || withoutPlace,
            Before = before,
        };
    }

    /// <summary>Name and hash of a settings file.</summary>
    public static SourceFile Source(CarriedFile file) => new(file.Name, Convert.ToHexStringLower(SHA256.HashData(file.Content.Span)));

    /// <summary>What a page of this run can carry.</summary>
    public CarriedInput Carriable => Sources.Sum(s => s.Length ?? 0) > ReportInput.MostLogBytes ? CarriedInput.TooLong
        : WithoutPlace ? CarriedInput.WithoutPlace : CarriedInput.Whole;

    /// <summary>Packs the input with its result for a page; null when it is too long.</summary>
    public string? Pack(string result) => Carriable == CarriedInput.TooLong ? null : new ReportInput
    {
        Logs = [.. Sources.Select(s => new CarriedFile(s.Name, InputFiles.Bytes(s)) { Recording = s.Recording })],
        Rig = RigFile,
        Sheet = SheetFile,
        Columns = [.. Columns.Select(c => $"{ChannelRoles.NameOf(c.Role)}={c.Name}{(c.Unit is null ? "" : ":" + c.Unit)}")],
        Balance = Balance(Options.BalanceThrust),
        ToleranceDegPerSec = Options.Tolerance.DegPerSec,
        Seed = Options.Seed,
        WithoutPlace = WithoutPlace,
        Result = result,
    }.Pack();

    private static string Balance(BalanceThrust thrust) => thrust.Kind switch
    {
        BalanceThrustKind.Cruise => "cruise",
        BalanceThrustKind.Full => "full",
        BalanceThrustKind.Even => "even",
        _ => thrust.Newtons.ToString("R", CultureInfo.InvariantCulture),
    };

    private static TrimOptions OptionsOf(ReportInput input, string page) => new()
    {
        BalanceThrust = input.Balance switch
        {
            "cruise" => BalanceThrust.Cruise,
            "full" => BalanceThrust.Full,
            "even" => BalanceThrust.Even,
            _ => double.TryParse(input.Balance, NumberStyles.Float, CultureInfo.InvariantCulture, out double newtons) && newtons >= 0 ? BalanceThrust.At(newtons) : throw Damaged(page),
        },
        Tolerance = input.ToleranceDegPerSec > 0 && double.IsFinite(input.ToleranceDegPerSec) ? AngularRate.FromDegPerSec(input.ToleranceDegPerSec) : throw Damaged(page),
        Seed = input.Seed,
    };

    private static ColumnRule Rule(string text, string page) => ColumnRules.TryParse(text, out ColumnRule rule, out _) ? rule : throw Damaged(page);

    private static LogFormatException Damaged(string page) => LogFormatException.At(page, null, null, "a carried choice that is none", "the report as it was written", "Copy it again, or give the log itself.");
}
