using System.CommandLine;
using System.Globalization;
using TrimFit.Core.Planning;

namespace TrimFit.Cli;

/// <summary>Options of <c>card</c>. Values arrive as text and are read here, so that every message is our own and in one style.</summary>
internal sealed class CardCommandOptions
{
    private readonly Option<string> _rig = new("--rig") { Description = "The machine: a rig file (TOML).", Required = true, HelpName = "RIG" };
    private readonly Option<string?> _from = new("--from") { Description = "The last flight's result (JSON of fit): its noise, pull and powers.", HelpName = "FIT.json" };
    private readonly Option<string?> _width = new("--width") { Description = "Wanted half-width of the shift's 95 % range, mm.", HelpName = "MM" };
    private readonly Option<string?> _stdError = new("--std-error") { Description = "Wanted standard error of the pull, deg/s.", HelpName = "DEG_S" };
    private readonly Option<string?> _minutes = new("--minutes") { Description = "Length of the card, 3 to 24 min (6, or as long as the wanted precision needs).", HelpName = "N" };
    private readonly Option<string?> _logger = new("--logger") { Description = "What the flight is logged with: full (gyro, GPS, rpm or throttle, brakes), phone (gyro, GPS, sheet) or gps (GPS, sheet).", HelpName = "full|phone|gps" };
    private readonly Option<string?> _ballast = new("--ballast") { Description = "Ballast at hand and how far out it can be held: offers ballast legs, which tell what a millimetre does.", HelpName = "KG@MM" };
    private readonly Option<bool> _engineOff = new("--engine-off") { Description = "Offer legs with the engine off." };
    private readonly Option<string?> _floor = new("--floor") { Description = "Height above ground below which no leg is flown, at least 300 m.", HelpName = "M" };
    private readonly Option<string?> _sheet = new("--sheet") { Description = "Write an empty flight sheet (TOML) for the card.", HelpName = "FILE" };
    private readonly Option<string?> _speaking = new("--speaking") { Description = "Write the speaking card: one page (.html) for a telephone that calls the legs.", HelpName = "FILE" };

    private readonly Option<string?> _blind = new("--blind") { Description = "Draw a sealed order of two settings, A and B, that the pilot does not know (TOML), with a slip for the helper beside it.", HelpName = "FILE" };

    public void AddTo(Command command)
    {
        foreach (Option option in (Option[])[_rig, _from, _width, _stdError, _minutes, _logger, _ballast, _engineOff, _floor, _sheet, _speaking, _blind])
            command.Options.Add(option);
    }

    /// <summary>The options as values.</summary>
    /// <exception cref="CommandLineException">A value is none of those it may be.</exception>
    public CardChoices Choices(ParseResult parsed, CommonChoices common)
    {
        double? width = Number("--width", parsed.GetValue(_width), 0.1, 500, "a half-width of 0.1 to 500 mm");
        double? error = Number("--std-error", parsed.GetValue(_stdError), 0.01, 10, "a standard error of 0.01 to 10 deg/s");
        if (width is not null && error is not null)
            throw new CommandLineException("--width and --std-error: found both, expected one of the two.");
        (double kg, double mm)? ballast = Ballast(parsed.GetValue(_ballast));
        string? speaking = parsed.GetValue(_speaking);
        if (speaking is not null && Path.GetExtension(speaking).ToUpperInvariant() is not (".HTML" or ".HTM"))
            throw new CommandLineException($"--speaking: found \"{speaking}\", expected a name that ends in .html.");
        return new()
        {
            RigPath = parsed.GetValue(_rig)!,
            FromPath = parsed.GetValue(_from),
            SheetPath = parsed.GetValue(_sheet),
            SpeakingPath = speaking,
            BlindPath = parsed.GetValue(_blind),
            Options = new()
            {
                ShiftHalfWidthM = width / 1000,
                PullStdErrorRadPerSec = error is double e ? double.DegreesToRadians(e) : null,
                Minutes = Number("--minutes", parsed.GetValue(_minutes), CardOptions.FewestMinutes, CardOptions.MostMinutes, "3 to 24 minutes"),
                Logger = parsed.GetValue(_logger) switch
                {
                    null => null,
                    "full" => CardLogger.Full,
                    "phone" => CardLogger.Phone,
                    "gps" => CardLogger.Gps,
                    string other => throw new CommandLineException($"--logger: found \"{other}\", expected full, phone or gps."),
                },
                BallastKg = ballast?.kg ?? 0,
                BallastArmM = (ballast?.mm ?? 450) / 1000,
                EngineOffLegs = parsed.GetValue(_engineOff),
                FloorM = Number("--floor", parsed.GetValue(_floor), CardOptions.LeastFloorM, 3000, "a height of 300 to 3000 m") ?? CardOptions.LeastFloorM,
                BalanceThrust = common.Balance,
                Tolerance = common.Tolerance,
                Seed = common.Seed ?? 1,
            },
        };
    }

    private static (double Kg, double Mm)? Ballast(string? text)
    {
        if (text is null)
            return null;
        string[] parts = text.Split('@');
        return parts.Length == 2 && Parse(parts[0]) is double kg and >= 0.5 and <= 20 && Parse(parts[1]) is double mm and >= 100 and <= 1500
            ? (kg, mm)
            : throw new CommandLineException($"--ballast: found \"{text}\", expected kilograms and millimetres such as 5@450 (0.5 to 20 kg, 100 to 1500 mm).");
    }

    private static double? Number(string option, string? text, double least, double most, string expected)
    {
        if (text is null)
            return null;
        return Parse(text) is double value && value >= least && value <= most
            ? value
            : throw new CommandLineException($"{option}: found \"{text}\", expected {expected}.");
    }

    private static double? Parse(string text) =>
        double.TryParse(text, NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value) ? value : null;
}

/// <summary>The options of <c>card</c> as values.</summary>
internal sealed record CardChoices
{
    public required string RigPath { get; init; }
    public required string? FromPath { get; init; }
    public required string? SheetPath { get; init; }
    public required string? SpeakingPath { get; init; }
    public required string? BlindPath { get; init; }
    public required CardOptions Options { get; init; }
}
