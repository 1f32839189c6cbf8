using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Reporting.Jobs;

// CS8524 (an unnamed enum value) cannot happen here; without it CS8509 still makes a missing member an error, which `_ =>` would hide.
#pragma warning disable CS8524

namespace TrimFit.Reporting.Wording;

/// <summary>The job book in English.</summary>
internal sealed record EnglishJobWords : JobWords
{
    public override string ListTitle => "Jobs";
    public override string JobTitle(long number) => "Job " + Text(number);
    public override string HistoryTitle => "History";
    public override string Job => "job";
    public override string Opened => "opened";
    public override string Machine => "machine";
    public override string Customer => "customer";
    public override string Wing => "wing";
    public override string Complaint => "complaint";
    public override string Setups => "Setups";
    public override string Setup => "setup";
    public override string Flights => "Flights";
    public override string Flight => "flight";
    public override string Results => "Results";
    public override string Adjustments => "Adjustments";
    public override string Checks => "Checks";
    public override string Check => "check";
    public override string Notes => "Notes";
    public override string Signatures => "Signed";
    public override string Date => "date";
    public override string Time => "time (UTC)";
    public override string What => "what";
    public override string RigFile => "rig file";
    public override string Files => "files (with the beginning of their SHA-256)";
    public override string Turn => "turn deg/s";
    public override string Verdict => "result";
    public override string State => "state";
    public override string Signed => "signed";
    public override string Unsigned => "open";
    public override string Outcome => "outcome";
    public override string Found => "found";
    public override string By => "by";
    public override string Recommended => "recommended";
    public override string Readings => "readings as measured";
    public override string SignedBy => "signed by";
    public override string Wings => "wings";
    public override string MemoryTitle => "The shop's memory";

    public override string VerdictWord(string code) => code switch
    {
        "insufficient" => "cannot tell",
        "balanced" => "balanced",
        "over_compensated" => "over-compensated",
        "both" => "constant pull and pull of power",
        "power_pull" => "pull grows with power",
        "constant_pull" => "constant pull",
        "fixed" => "fixed",
        "better" => "better",
        "no_clear_change" => "no clear change",
        "worse" => "worse",
        _ => code.Replace('_', ' '),
    };

    public override string Answer(JobRecord job, Numbers numbers)
    {
        string state = job.IsSigned
            ? $"signed by {job.Signatures[^1].Name} on {JobDocuments.Date(job.Signatures[^1].Date)}"
            : "open";
        string flights = Count(job.Flights.Length, "flight", "flights"), setups = Count(job.Setups.Length, "setup", "setups");
        string turn = job.LatestFit?.RateRadPerSec is double rate ? $" The last flight turned {Side(rate)} at {numbers.Rate(Math.Abs(rate))}." : "";
        return $"Job {Text(job.Number)}, {job.Machine}: {state}; {setups}, {flights}.{turn}";
    }

    public override string ListAnswer(int jobs, int flights, long bytes, Numbers numbers) =>
        jobs == 0 ? $"No job here. The book takes {Size(bytes, numbers)}." : $"{Count(jobs, "job", "jobs")} with {Count(flights, "flight", "flights")}; the book takes {Size(bytes, numbers)}.";

    public override string SetupOrigin(SetupRecord setup) => setup.ChangedFrom is int from ? $"setup {Text(from)} after an adjustment" : "measured";

    public override string SignatureIsTheirs => "A signature is the technician's own word. TrimFit estimates; it approves nothing.";

    public override string Role(string role)
    {
        bool before = role.StartsWith(InputRecord.Before, StringComparison.Ordinal);
        string own = before ? role[InputRecord.Before.Length..] : role;
        string name = own switch
        {
            InputRecord.Log => "log",
            InputRecord.LogWithoutPlace => "log, place taken out",
            InputRecord.Rig => "rig file",
            InputRecord.Sheet => "flight sheet",
            _ => own.Replace('_', ' '),
        };
        return before ? "before: " + name : name;
    }

    public override string OutcomeOf(CheckOutcome outcome) => outcome switch
    {
        CheckOutcome.Pass => "in order",
        CheckOutcome.Fail => "not in order",
        CheckOutcome.NotDone => "not done",
    };

    public override string CheckName(string code)
    {
        foreach (SimpleCause cause in Enum.GetValues<SimpleCause>())
        {
            if (Snake.Of(cause.ToString()) == code)
                return Words.English.Ground.Cause(cause);
        }
        return code.Replace('_', ' ');
    }

    public override string Reading(ReadingRecord reading, Numbers numbers) => $"{ReadingName(reading.Key)} {ReadingValue(reading, numbers)}";

    public override string ReadingName(string key) => key switch
    {
        "carabiners.left_mm" => "left riser carabiner",
        "carabiners.right_mm" => "right riser carabiner",
        "hang_points.front_offset_mm" => "middle of the front harness hang points",
        "hang_points.rear_offset_mm" => "middle of the rear harness hang points",
        "hang_points.front_left_mm" => "left front harness hang point",
        "hang_points.front_right_mm" => "right front harness hang point",
        "hang_points.rear_left_mm" => "left rear harness hang point",
        "hang_points.rear_right_mm" => "right rear harness hang point",
        "hang_check.left_kg" => "hang check left",
        "hang_check.right_kg" => "hang check right",
        "propeller.thrust_line_mm" => "thrust line",
        _ => key[(key.IndexOf('.', StringComparison.Ordinal) + 1)..].Replace('_', ' '),
    };

    public override string ReadingValue(ReadingRecord reading, Numbers numbers)
    {
        bool lateral = reading.Key.StartsWith("carabiners.", StringComparison.Ordinal) || reading.Key.StartsWith("hang_points.", StringComparison.Ordinal) || reading.Key == "propeller.thrust_line_mm";
        // As measured: not rounded to what a workshop can set.
        string Measured(double mm) => numbers.Imperial ? numbers.Plain(Math.Abs(mm) / 25.4, 2) + " in" : numbers.Tick(Math.Abs(mm)) + " mm";
        return lateral ? Measured(reading.Value) + (reading.Value == 0 ? "" : " " + Side(reading.Value))
            : reading.Key.StartsWith("hang_check.", StringComparison.Ordinal) ? numbers.Mass(reading.Value)
            : numbers.Tick(reading.Value);
    }

    public override string Measured(ResultRecord first, ResultRecord? last, Numbers numbers)
    {
        string before = first.RateRadPerSec is double b ? $"On the first flight it turned {Side(b)} at {numbers.Rate(Math.Abs(b))} with the brakes even." : "The first flight could not tell the pull.";
        string after = last is null ? "" : last.RateRadPerSec is double a ? $" On the last one it turned {Side(a)} at {numbers.Rate(Math.Abs(a))}." : " The last one could not tell it.";
        return before + after;
    }

    public override string Changed(IEnumerable<AdjustmentRecord> adjustments, Numbers numbers) =>
        string.Join(" ", adjustments.Select(a => $"Moved, by the readings: {Words.English.PartShort(a.Kind)} {Words.English.Travel(a.Travel, FitFacts.UnitOf(a.Kind), numbers)}."));

    public override string CheckLine(CheckRecord check, Numbers numbers) =>
        $"{CheckName(check.Code)}: {OutcomeOf(check.Outcome)}{(check.Value is double v ? $", {numbers.Tick(v)} {check.Unit}" : "")}{Tail(check.Note)}";

    public override string SignedAs(SignatureRecord signature) => $"{signature.Name}, {JobDocuments.Date(signature.Date)}";

    public override string Event(JobEvent what, Numbers numbers) => what switch
    {
        JobEvent.Opened e => $"opened: {e.Job.Complaint}",
        JobEvent.Measured e => $"setup {Text(e.Setup.Number)} measured: {e.Setup.RigName}{Tail(e.Setup.Note)}",
        JobEvent.Checked e => "check: " + CheckLine(e.Check, numbers),
        JobEvent.Flown e => $"flight {Text(e.Flight.Number)} with setup {Text(e.Flight.Setup)}: {string.Join(", ", e.Flight.Inputs.Select(i => i.Name))}",
        JobEvent.Found e => Found1(e.Result, numbers),
        JobEvent.Adjusted e => $"{Moved(e.Adjustment, numbers)}; setup {Text(e.Adjustment.FromSetup)} became setup {Text(e.Adjustment.ToSetup)}{Tail(e.Adjustment.Note)}",
        JobEvent.Noted e => $"note: {e.Note.Text}",
        JobEvent.SignedOff e => $"signed by {e.Signature.Name} for setup {Text(e.Signature.Setup)}",
        _ => throw new ArgumentOutOfRangeException(nameof(what)),
    };

    public override string Kept(JobEvent what, long job, Numbers numbers) => what switch
    {
        JobEvent.Opened e => $"Job {Text(job)} is open: {e.Job.Machine}.",
        JobEvent.Measured e => $"Job {Text(job)} has setup {Text(e.Setup.Number)} ({e.Setup.RigName}).",
        JobEvent.Checked e => $"Job {Text(job)}, check {Text(e.Check.Number)}: {CheckLine(e.Check, numbers)}.",
        JobEvent.Flown e => $"Job {Text(job)}, flight {Text(e.Flight.Number)} is kept with its result (setup {Text(e.Flight.Setup)}).",
        JobEvent.Found e => $"Job {Text(job)}, result {Text(e.Result.Number)} is kept: {Found1(e.Result, numbers)}.",
        JobEvent.Adjusted e => $"Job {Text(job)}, setup {Text(e.Adjustment.ToSetup)}: {Moved(e.Adjustment, numbers)}.",
        JobEvent.Noted => $"Job {Text(job)}: the note is kept.",
        JobEvent.SignedOff e => $"Job {Text(job)}, setup {Text(e.Signature.Setup)} is signed by {e.Signature.Name} on {JobDocuments.Date(e.Signature.Date)}. The word is theirs; TrimFit approves nothing.",
        _ => throw new ArgumentOutOfRangeException(nameof(what)),
    };

    public override string Memory(ShopMemory? memory, int wings, Numbers numbers) => memory is null
        ? $"{Count(wings, "measurement", "measurements")} of turn per shift so far; {Text(ShopMemory.FewestWings)} wings are the fewest that say anything about the next one. A ballast leg, or a second flight after the first step (trimfit job compare), adds one."
        : $"{Count(memory.Wings, "wing", "wings")} of this workshop say that the next one, at {numbers.Mass(_usualKg)} with no size given, turns {numbers.SensitivityNumber(memory.RadPerSecPerM)} {numbers.SensitivityUnit} of CG shift ({numbers.SensitivityNumber(memory.Interval95.Lower)} to {numbers.SensitivityNumber(memory.Interval95.Upper)}).";

    public override string SetAside(SetAsideWing wing, Numbers numbers) =>
        $"The wing of job {Text(wing.Job)}{(wing.WingId.Length > 0 ? " (" + wing.WingId + ")" : "")} behaves otherwise than the others, {numbers.SensitivityNumber(wing.RadPerSecPerM)} {numbers.SensitivityUnit} (p = {numbers.Plain(wing.P, 3)}), and is left out of the memory.";

    public override string AskAgain(AdjustmentKind kind, MovedPart moved, double? recommended, Numbers numbers)
    {
        TravelUnit unit = FitFacts.UnitOf(kind);
        string part = Words.English.PartShort(kind), travel = Words.English.Travel(moved.Travel, unit, numbers);
        string step = numbers.Travel(moved.Step, unit);
        if (moved.Misfit > moved.Step)
            return $"The readings do not fit one travel of {part}: they are up to {numbers.Length(moved.Misfit)} off what {travel} would give, and one step is {step}. Left is negative, right positive. Measure again.";
        return recommended is double wanted
            ? $"By the readings, {part} went {travel}; recommended was {Words.English.Travel(wanted, unit, numbers)}, and one step is {step}. Measure again, and see whether it went to the right side."
            : $"By the readings, {part} went {travel}, and the latest result does not recommend that. Measure again, and see whether it is the right part.";
    }

    public override string NoHangChange => "No hang check before and after: do one before every flight after a change, two scales under the riser carabiners (--reading hang_check.left_kg=KG --reading hang_check.right_kg=KG).";

    public override string AfterAdjustment => "Before the next flight:";

    public override string BookAt(string path) => $"trimfit: job book {path}";

    public override string Exported(long job, string file, long bytes, Numbers numbers) =>
        $"Job {Text(job)} is in {file} ({Size(bytes, numbers)}). The file holds the customer's name and flights: give it only to whom they may go.";

    public override string Imported(long job, long numberThere) => $"Imported as job {Text(job)} (it was job {Text(numberThere)} where it came from).";

    public override string Deleted(long job, int flights, int files, bool roomGivenBack) =>
        $"Job {Text(job)} is deleted with {Count(flights, "flight", "flights")} and {Count(files, "file", "files")} that no other job uses."
        + (roomGivenBack ? "" : " Another program uses the book or the disk is full, so traces may remain on the disk until the next delete.");

    public override string AskDelete(JobRecord job) =>
        $"This deletes job {Text(job.Number)} ({job.Machine}, {Count(job.Flights.Length, "flight", "flights")}) for good. Say so with --yes; \"trimfit job export\" keeps a copy.";

    public override string Size(long bytes, Numbers numbers) => bytes switch
    {
        < 1_000_000 => numbers.Plain(bytes / 1e3, 0) + " kB",
        < 1_000_000_000 => numbers.Plain(bytes / 1e6, 1) + " MB",
        _ => numbers.Plain(bytes / 1e9, 2) + " GB",
    };

    /// <summary>Load that the sentence about the memory speaks of; a result uses its own machine's.</summary>
    private const double _usualKg = ShopMemoryFacts.UsualKg;

    private string Found1(ResultRecord result, Numbers numbers)
    {
        string about = result.Kind == ResultRecord.CompareKind ? "comparison up to flight " : "result of flight ";
        string turn = result.RateRadPerSec is double r ? $", turns {Side(r)} at {numbers.Rate(Math.Abs(r))}" : "";
        return $"{about}{Text(result.Flight)}: {VerdictWord(result.Verdict)}{turn}";
    }

    private static string Moved(AdjustmentRecord a, Numbers numbers) =>
        $"{Words.English.PartShort(a.Kind)} {Words.English.Travel(a.Travel, FitFacts.UnitOf(a.Kind), numbers)} by the readings"
        + (a.Recommended is double d ? $", recommended {Words.English.Travel(d, FitFacts.UnitOf(a.Kind), numbers)}" : "");

    private static string Tail(string note) => note.Length > 0 ? "; " + note : "";

    private static string Side(double rightPositive) => rightPositive < 0 ? "left" : "right";

    private static string Count(int count, string one, string many) => $"{Text(count)} {(count == 1 ? one : many)}";

    private static string Text(long number) => number.ToString(CultureInfo.InvariantCulture);
}
