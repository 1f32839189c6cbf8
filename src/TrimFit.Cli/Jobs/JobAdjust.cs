using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using System.Text.Json;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Import.Rigs;
using TrimFit.Jobs;
using TrimFit.Reporting.Jobs;

namespace TrimFit.Cli;

/// <summary>What <c>job adjust</c> was given.</summary>
internal sealed record AdjustRequest
{
    public required string Part { get; init; }
    public required string[] Readings { get; init; }
    public required string? Rig { get; init; }
    public required string By { get; init; }
    public required string Note { get; init; }
    public required bool Confirmed { get; init; }
}

/// <summary><c>job adjust</c>: what was done, by the readings; doubted once when it is not what was recommended.</summary>
internal static class JobAdjust
{
    private const string TravelKey = "travel=";

    public static int Run(JobChoices choices, long number, AdjustRequest request, TextWriter output)
    {
        AdjustmentKind kind = Kind(request.Part);
        string[] rigReadings = [.. request.Readings.Where(r => !r.StartsWith(TravelKey, StringComparison.Ordinal))];
        double? toldTravel = request.Readings.FirstOrDefault(r => r.StartsWith(TravelKey, StringComparison.Ordinal)) is string told ? Travel(told, kind) : null;
        if (request.Rig is null == (request.Readings.Length == 0))
            throw new CommandLineException("job adjust: give the readings after (--reading KEY=VALUE), or the rig file after (--rig RIG).");
        (Rig Rig, KeptFile File)? given = request.Rig is null ? null : JobWork.RigFile(request.Rig);
        using JobBook book = choices.Open(BookAccess.Write);
        JobRecord job = book.Job(number);
        SetupRecord setup = JobWork.CurrentSetup(job);
        KeptFile before = JobWork.RigOf(book, setup);
        KeptFile after = given?.File ?? (rigReadings.Length > 0 ? JobWork.WithReadings(before, rigReadings) : before);
        Rig rigBefore = JobWork.ReadRig(before), rigAfter = JobWork.ReadRig(after);
        // Where the weight sat before the change says nothing about after it: kept in the rig file it would undo the change in the statics.
        bool stale = MovesWeight(kind) && rigAfter.HangCheck is RigHangCheck carried && rigBefore.HangCheck is RigHangCheck earlier && SameCheck(earlier, carried);
        if (stale)
        {
            after = after with { Bytes = Encoding.UTF8.GetBytes(RigFileEditor.WithoutHangCheck(after.Name, Encoding.UTF8.GetString(after.Bytes.Span))) };
            rigAfter = JobWork.ReadRig(after);
        }
        if (rigReadings.Length > 0 && !request.Confirmed)
            JobWork.RefuseContradictions(after.Name, rigAfter, rigBefore, rigReadings, choices.Common.Style, "Measure again; when the readings stand, say so with --confirm.");

        MovedPart? read = MovedPart.Between(kind, rigBefore, rigAfter);
        if (read is not null && toldTravel is not null)
            throw new CommandLineException($"job adjust: {request.Part} is in the rig file, so its travel follows from the readings. Give them instead of travel=.");
        MovedPart moved = read ?? new MovedPart(toldTravel ?? throw new CommandLineException($"job adjust: {request.Part} is not in the rig file. Say how far it went: --reading travel=7, right positive."),
            0, MovedPart.StepOf(kind, rigBefore));
        (double? recommended, int? by) = Recommended(book, job, kind);
        bool off = moved.Misfit > moved.Step * 1.000001 || recommended is not double wanted || Math.Abs(moved.Travel - wanted) > moved.Step * 1.000001;
        if (off && !request.Confirmed && !AskedAgain(choices, kind, moved, recommended))
            return ExitCode.CommandLine;

        ImmutableArray<ReadingRecord> readings = request.Readings.Length > 0
            ? [.. rigReadings.SelectMany(JobWork.Records), .. toldTravel is double t ? [new ReadingRecord("travel", t * PerSi(kind))] : Array.Empty<ReadingRecord>()]
            : RigReadings.Of(rigAfter);
        AdjustmentRecord kept = book.AddAdjustment(number, new AdjustmentRecord
        {
            Number = 0,
            Made = default,
            FromSetup = setup.Number,
            ToSetup = 0,
            Kind = kind,
            Travel = moved.Travel,
            Recommended = recommended,
            RecommendedBy = by,
            ReadingsConfirmed = off,
            By = request.By,
            Note = request.Note,
            Readings = readings,
        }, after, JobChoices.Now);
        if (choices.Common.Json == "-")
        {
            output.Write(JobText.Write(book.Job(number)));
            return ExitCode.Done;
        }
        output.Write(JobReportText.Kept(new JobEvent.Adjusted(kept), number, choices.Common.Style));
        if (MovesWeight(kind))
            output.Write(JobReportText.HangChange(HangChangeOf(kind, moved.Travel, rigBefore, rigAfter), kind, choices.Common.Style));
        output.Write(JobReportText.AfterAdjustment(kind, choices.Common.Style));
        return ExitCode.Done;
    }

    /// <summary>What the hang checks before and after say; null when one is missing or the part does not move the weight.</summary>
    public static HangChangeResult? HangChangeOf(AdjustmentKind kind, double travel, Rig before, Rig after)
    {
        Adjustment adjustment = Adjustment.All.Single(a => a.Kind == kind);
        if (!MovesWeight(kind) || travel == 0 || RigHang.Of(before) is not HangCheckResult first || RigHang.Of(after) is not HangCheckResult second)
            return null;
        (double change, double sd, _) = RigHang.Expected(before, adjustment, travel);
        return change == 0 ? null : HangChange.Judge(first, second, change, sd);
    }

    private static bool MovesWeight(AdjustmentKind kind) => Adjustment.All.Single(a => a.Kind == kind).Move is not null;

    /// <summary>The hang check of before, carried along in the rig file, is none of after.</summary>
    private static bool SameCheck(RigHangCheck a, RigHangCheck b) => a.LeftKg.Value == b.LeftKg.Value && a.RightKg.Value == b.RightKg.Value;

    /// <summary>Asks once more, on a terminal; without one the command says what to do.</summary>
    private static bool AskedAgain(JobChoices choices, AdjustmentKind kind, MovedPart moved, double? recommended)
    {
        choices.Error.WriteLine("trimfit: " + JobReportText.AskAgain(kind, moved, recommended, choices.Common.Style));
        if (Console.IsInputRedirected || Console.IsErrorRedirected)
        {
            choices.Error.WriteLine("trimfit: nothing was written down. When the readings stand, say so with --confirm.");
            return false;
        }
        choices.Error.Write("trimfit: were they taken again, and do they stand? Type yes: ");
        if (Console.ReadLine()?.Trim().Equals("yes", StringComparison.OrdinalIgnoreCase) == true)
            return true;
        choices.Error.WriteLine("trimfit: nothing was written down.");
        return false;
    }

    /// <summary>The first step that the latest result states for a part; none once the machine was changed after it.</summary>
    private static (double? Travel, int? Result) Recommended(JobBook book, JobRecord job, AdjustmentKind kind)
    {
        ResultRecord? latest = job.Results.LastOrDefault();
        if (latest is null || job.Flights.First(f => f.Number == latest.Flight).Setup != job.CurrentSetup?.Number)
            return (null, null);
        using JsonDocument json = JsonDocument.Parse(book.Content(latest.Sha256));
        if (!json.RootElement.TryGetProperty("adjustments", out JsonElement adjustments) || adjustments.ValueKind != JsonValueKind.Array)
            return (null, null);
        foreach (JsonElement adjustment in adjustments.EnumerateArray())
        {
            if (adjustment.GetProperty("kind").GetString() == CommandWords.Of(kind) && adjustment.GetProperty("first_step").ValueKind == JsonValueKind.Number)
                return (adjustment.GetProperty("first_step").GetDouble() / PerSi(kind), latest.Number);
        }
        return (null, null);
    }

    private static AdjustmentKind Kind(string word) => CommandWords.Parse<AdjustmentKind>("--part", word);

    private static double Travel(string text, AdjustmentKind kind) =>
        double.TryParse(text[TravelKey.Length..], NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value)
            ? value / PerSi(kind) : throw new CommandLineException($"--reading: found \"{text}\", expected travel= and a number with a decimal point, right positive.");

    private static double PerSi(AdjustmentKind kind) => Adjustment.All.Single(a => a.Kind == kind).Unit switch
    {
        TravelUnit.Meter => 1000,
        TravelUnit.Radian => 180 / Math.PI,
        _ => 1,
    };
}
