using TrimFit.Core.Planning;

namespace TrimFit.Import.Results;

/// <summary>Reads a test card (JSON, schema <c>trimfit-card/1</c>) for what it promised.</summary>
public static class CardFileReader
{
    /// <summary>The schema this program reads.</summary>
    public const string Schema = "trimfit-card/1";

    private const string Remedy = "Write it with: trimfit card --rig RIG --json FILE.";
    private const double RadPerDeg = Math.PI / 180, MmPerM = 1000;

    /// <summary>Reads the text of a card.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="json">The whole file.</param>
    /// <exception cref="LogFormatException">The text is no card, or one that was refused.</exception>
    public static CardPromise Read(string fileName, string json)
    {
        using ResultFile file = ResultFile.Read(fileName, json, Schema, Remedy);
        if (file.At("refusal") is not null)
            throw file.Fault("refusal", "a card that was refused", "a card with legs", "Plan another one.");
        if (file.Number("prediction", "pull_half_width_deg_s") is not double pull)
            throw file.Fault("prediction.pull_half_width_deg_s", "nothing", "a number", Remedy);
        return new()
        {
            PullHalfWidthRadPerSec = pull * RadPerDeg,
            ShiftHalfWidthM = file.Number("prediction", "shift_half_width_mm") / MmPerM,
            WantedShiftHalfWidthM = file.Number("asked", "width_mm") / MmPerM,
            WantedPullStdErrorRadPerSec = file.Number("asked", "std_error_deg_s") * RadPerDeg,
        };
    }
}
