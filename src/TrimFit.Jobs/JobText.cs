using System.Globalization;
using System.Text.Encodings.Web;
using System.Text.Json;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Workshop;
using TrimFit.Jobs.Json;

namespace TrimFit.Jobs;

/// <summary>A job as JSON and back. Numbers carry nine significant digits, lengths millimetres, rates deg/s.</summary>
public static class JobText
{
    private const double DegPerRad = 180 / Math.PI, MmPerM = 1000, PerMmOfPerM = DegPerRad / MmPerM;
    private const int MostText = 100_000; // of one note or complaint: far more than anybody writes

    private static readonly JobJsonContext _context = new(new JsonSerializerOptions(JobJsonContext.Default.Options) { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping });

    /// <summary>The job as JSON, schema <c>trimfit-job/1</c>; ends with a line feed.</summary>
    public static string Write(JobRecord job)
    {
        ArgumentNullException.ThrowIfNull(job);
        var json = new JobJson
        {
            Schema = JobJson.SchemaName,
            Number = job.Number,
            Uid = job.Uid,
            Opened = Statements.TextOf(job.Opened),
            Complaint = job.Complaint,
            Machine = job.Machine,
            Customer = job.Customer,
            Wing = job.Wing,
            WingId = job.WingId,
            Setups = [.. job.Setups.Select(s => new SetupJson
            {
                Number = s.Number, Made = Statements.TextOf(s.Made), RigName = s.RigName, RigSha256 = s.RigSha256, ChangedFrom = s.ChangedFrom, Note = s.Note,
            })],
            Checks = [.. job.Checks.Select(c => new CheckJson
            {
                Number = c.Number, Made = Statements.TextOf(c.Made), Setup = c.Setup, Code = c.Code, Outcome = BookWords.Of(c.Outcome),
                Value = Digits(c.Value), Unit = c.Unit, Note = c.Note, By = c.By,
            })],
            Flights = [.. job.Flights.Select(f => new FlightJson
            {
                Number = f.Number, Added = Statements.TextOf(f.Added), Setup = f.Setup, Flown = f.Flown is DateTimeOffset t ? Statements.TextOf(t) : null,
                WingId = f.WingId, Inputs = Inputs(f.Inputs),
            })],
            Results = [.. job.Results.Select(r => new ResultJson
            {
                Number = r.Number, Made = Statements.TextOf(r.Made), Kind = r.Kind, Flight = r.Flight, ProgramVersion = r.ProgramVersion, Options = r.Options,
                Sha256 = r.Sha256, Inputs = Inputs(r.Inputs), Verdict = r.Verdict, Strength = r.Strength, Rate = Digits(r.RateRadPerSec * DegPerRad),
                RateLow95 = Digits(r.RateInterval95?.Lower * DegPerRad), RateHigh95 = Digits(r.RateInterval95?.Upper * DegPerRad),
                Sensitivities = [.. r.Sensitivities.Select(s => new SensitivityJson
                {
                    Source = s.Source, Value = Digits(Math.Exp(s.LogMedian) * PerMmOfPerM), LogSd = Digits(s.LogSd), WingArea = Digits(s.WingAreaM2), SuspendedKg = Digits(s.SuspendedKg),
                })],
            })],
            Adjustments = [.. job.Adjustments.Select(a => new AdjustmentJson
            {
                Number = a.Number, Made = Statements.TextOf(a.Made), FromSetup = a.FromSetup, ToSetup = a.ToSetup, Kind = BookWords.Of(a.Kind),
                Travel = Digits(a.Travel * PerSi(a.Kind)), Recommended = Digits(a.Recommended * PerSi(a.Kind)), Unit = UnitOf(a.Kind), RecommendedBy = a.RecommendedBy,
                ReadingsConfirmed = a.ReadingsConfirmed, By = a.By, Note = a.Note, Readings = Readings(a.Readings),
            })],
            Notes = [.. job.Notes.Select(n => new NoteJson { Made = Statements.TextOf(n.Made), Text = n.Text })],
            Signatures = [.. job.Signatures.Select(s => new SignatureJson
            {
                Made = Statements.TextOf(s.Made), Name = s.Name, Date = BookWords.Of(s.Date), Setup = s.Setup, Note = s.Note, Readings = Readings(s.Readings),
            })],
        };
        return JsonSerializer.Serialize(json, _context.JobJson) + "\n";
    }

    /// <summary>The job again, checked as if a stranger wrote it.</summary>
    /// <param name="name">Name of the file for messages.</param>
    /// <param name="utf8">The JSON text, UTF-8.</param>
    /// <exception cref="JobBookException">The text is no job of this schema, or contradicts itself.</exception>
    public static JobRecord Read(string name, ReadOnlySpan<byte> utf8)
    {
        JobJson json;
        try
        {
            json = JsonSerializer.Deserialize(utf8, _context.JobJson) ?? throw new JsonException("null");
        }
        catch (JsonException e)
        {
            string at = e.Path is { Length: > 0 } path ? $" at {path}" : "";
            string line = e.LineNumber is long number ? string.Create(CultureInfo.InvariantCulture, $"({number + 1})") : "";
            throw new JobBookException($"{name}{line}: found JSON that is no job{at}, expected schema {JobJson.SchemaName}. Export the job again with this version of TrimFit, or import it with a newer one.", e);
        }
        if (json.Schema != JobJson.SchemaName)
            throw new JobBookException($"{name}: found schema \"{Short(json.Schema)}\", expected {JobJson.SchemaName}. Import it with the program that made it, or a newer one.");
        var check = new Reader(name);
        var job = new JobRecord
        {
            Number = json.Number,
            Uid = json.Uid.Length == 32 && json.Uid.All(char.IsAsciiHexDigitLower) ? json.Uid : throw check.Fault("uid", "32 hex digits"),
            Opened = check.Time("opened", json.Opened),
            Complaint = check.Text("complaint", json.Complaint),
            Machine = check.Text("machine", json.Machine),
            Customer = check.Text("customer", json.Customer),
            Wing = check.Text("wing", json.Wing),
            WingId = check.Text("wing_id", json.WingId),
            Setups = [.. json.Setups.Select((s, i) => new SetupRecord
            {
                Number = check.Counted("setups", s.Number, i),
                Made = check.Time("setups.made", s.Made),
                RigName = check.FileName("setups.rig_name", s.RigName),
                RigSha256 = check.Hash("setups.rig_sha256", s.RigSha256),
                ChangedFrom = s.ChangedFrom is int from ? check.Among("setups.changed_from", from, i) : null,
                Note = check.Text("setups.note", s.Note),
            })],
            Checks = [.. json.Checks.Select((c, i) => new CheckRecord
            {
                Number = check.Counted("checks", c.Number, i),
                Made = check.Time("checks.made", c.Made),
                Setup = c.Setup is int setup ? check.Among("checks.setup", setup, json.Setups.Length) : null,
                Code = check.Text("checks.code", c.Code),
                Outcome = BookWords.Outcome(c.Outcome) ?? throw check.Fault("checks.outcome", "pass, fail or not_done"),
                Value = c.Value,
                Unit = check.Text("checks.unit", c.Unit),
                Note = check.Text("checks.note", c.Note),
                By = check.Text("checks.by", c.By),
            })],
            Flights = [.. json.Flights.Select((f, i) => new FlightRecord
            {
                Number = check.Counted("flights", f.Number, i),
                Added = check.Time("flights.added", f.Added),
                Setup = check.Among("flights.setup", f.Setup, json.Setups.Length),
                Flown = f.Flown is string flown ? check.Time("flights.flown", flown) : null,
                WingId = check.Text("flights.wing_id", f.WingId),
                Inputs = check.Inputs("flights.inputs", f.Inputs),
            })],
            Results = [.. json.Results.Select((r, i) => new ResultRecord
            {
                Number = check.Counted("results", r.Number, i),
                Made = check.Time("results.made", r.Made),
                Kind = r.Kind is ResultRecord.FitKind or ResultRecord.CompareKind ? r.Kind : throw check.Fault("results.kind", "fit or compare"),
                Flight = check.Among("results.flight", r.Flight, json.Flights.Length),
                ProgramVersion = check.Text("results.program_version", r.ProgramVersion),
                Options = check.Text("results.options", r.Options),
                Sha256 = check.Hash("results.sha256", r.Sha256),
                Inputs = check.Inputs("results.inputs", r.Inputs),
                Verdict = check.Text("results.verdict", r.Verdict),
                Strength = check.Text("results.strength", r.Strength),
                RateRadPerSec = r.Rate / DegPerRad,
                RateInterval95 = r.RateLow95 is double low && r.RateHigh95 is double high
                    ? low <= high ? new ConfidenceInterval(low / DegPerRad, high / DegPerRad, 0.95) : throw check.Fault("results.rate_low95", "a low end below the high one") : null,
                Sensitivities = [.. r.Sensitivities.Select(s => new SensitivityRecord
                {
                    Source = check.Text("results.sensitivities.source", s.Source),
                    LogMedian = Math.Log(check.Positive("results.sensitivities.deg_s_per_mm", s.Value) / PerMmOfPerM),
                    LogSd = check.Positive("results.sensitivities.log_sd", s.LogSd),
                    WingAreaM2 = s.WingArea is double area ? check.Positive("results.sensitivities.wing_area_m2", area) : null,
                    SuspendedKg = check.Positive("results.sensitivities.suspended_kg", s.SuspendedKg),
                })],
            })],
            Adjustments = [.. json.Adjustments.Select((a, i) =>
            {
                AdjustmentKind kind = BookWords.Kind(a.Kind) ?? throw check.Fault("adjustments.kind", "a part that can be moved, such as carabiner_pair");
                if (a.Unit != UnitOf(kind))
                    throw check.Fault("adjustments.unit", UnitOf(kind));
                return new AdjustmentRecord
                {
                    Number = check.Counted("adjustments", a.Number, i),
                    Made = check.Time("adjustments.made", a.Made),
                    FromSetup = check.Among("adjustments.from_setup", a.FromSetup, json.Setups.Length),
                    ToSetup = check.Among("adjustments.to_setup", a.ToSetup, json.Setups.Length),
                    Kind = kind,
                    Travel = a.Travel / PerSi(kind),
                    Recommended = a.Recommended / PerSi(kind),
                    RecommendedBy = a.RecommendedBy is int by ? check.Among("adjustments.recommended_by", by, json.Results.Length) : null,
                    ReadingsConfirmed = a.ReadingsConfirmed,
                    By = check.Text("adjustments.by", a.By),
                    Note = check.Text("adjustments.note", a.Note),
                    Readings = check.Readings("adjustments.readings", a.Readings),
                };
            })],
            Notes = [.. json.Notes.Select(n => new NoteRecord(check.Time("notes.made", n.Made), check.Text("notes.text", n.Text)))],
            Signatures = [.. json.Signatures.Select(s => new SignatureRecord
            {
                Made = check.Time("signatures.made", s.Made),
                Name = check.Text("signatures.name", s.Name),
                Date = BookWords.Date(s.Date) ?? throw check.Fault("signatures.date", "a date such as 2026-05-17"),
                Setup = check.Among("signatures.setup", s.Setup, json.Setups.Length),
                Note = check.Text("signatures.note", s.Note),
                Readings = check.Readings("signatures.readings", s.Readings),
            })],
        };
        return job;
    }

    private static double PerSi(AdjustmentKind kind) => UnitOf(kind) switch { "mm" => MmPerM, "deg" => DegPerRad, _ => 1 };

    private static string UnitOf(AdjustmentKind kind) => (Adjustment.All.FirstOrDefault(a => a.Kind == kind)?.Unit ?? TravelUnit.Meter) switch
    {
        TravelUnit.Radian => "deg",
        TravelUnit.Kilogram => "kg",
        _ => "mm",
    };

    private static InputJson[] Inputs(IEnumerable<InputRecord> inputs) => [.. inputs.Select(i => new InputJson { Role = i.Role, Name = i.Name, Sha256 = i.Sha256 })];

    private static ReadingJson[] Readings(IEnumerable<ReadingRecord> readings) => [.. readings.Select(r => new ReadingJson { Key = r.Key, Value = Digits(r.Value) })];

    private static double Digits(double value) => double.Parse(value.ToString("G9", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);

    private static double? Digits(double? value) => value is double v ? Digits(v) : null;

    private static string Short(string text) => new([.. text.Where(c => !char.IsControl(c)).Take(60)]);

    /// <summary>Values of a stranger's file.</summary>
    private sealed class Reader(string name)
    {
        public JobBookException Fault(string where, string expected) =>
            new($"{name}: {where} is not what it should be, expected {expected}. The file was changed or damaged; export the job again.");

        public string Text(string where, string text) => text.Length <= MostText && !text.Contains('\0') ? text : throw Fault(where, "text of a sensible length");

        public string FileName(string where, string text) =>
            text.Length is > 0 and <= 255 && !text.AsSpan().ContainsAny('/', '\\', '\0') && text is not ("." or "..") ? text : throw Fault(where, "a file name without a folder");

        public string Hash(string where, string text) => Packed.IsSha256(text) ? text : throw Fault(where, "a SHA-256 in lower-case hex");

        public double Positive(string where, double value) => value > 0 && double.IsFinite(value) ? value : throw Fault(where, "a number above 0");

        public int Counted(string where, int number, int index) => number == index + 1 ? number : throw Fault(where + ".number", "1, 2, 3, … in order");

        public int Among(string where, int number, int count) =>
            number >= 1 && number <= count ? number : throw Fault(where, string.Create(CultureInfo.InvariantCulture, $"a number from 1 to {count}"));

        public DateTimeOffset Time(string where, string text) =>
            DateTimeOffset.TryParseExact(text, "yyyy-MM-dd'T'HH:mm:ss.fff'Z'", CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out DateTimeOffset time)
                ? time : throw Fault(where, "a time such as 2026-05-17T07:40:00.000Z");

        public System.Collections.Immutable.ImmutableArray<InputRecord> Inputs(string where, InputJson[] inputs) =>
            [.. inputs.Select(i => new InputRecord(Role(where, i.Role), FileName(where + ".name", i.Name), Hash(where + ".sha256", i.Sha256)))];

        public System.Collections.Immutable.ImmutableArray<ReadingRecord> Readings(string where, ReadingJson[] readings) =>
            [.. readings.Select(r => new ReadingRecord(Text(where + ".key", r.Key), r.Value))];

        private string Role(string where, string role)
        {
            string own = role.StartsWith(InputRecord.Before, StringComparison.Ordinal) ? role[InputRecord.Before.Length..] : role;
            return own is InputRecord.Log or InputRecord.LogWithoutPlace or InputRecord.Rig or InputRecord.Sheet ? role : throw Fault(where + ".role", "log, log_without_place, rig or sheet");
        }
    }
}
