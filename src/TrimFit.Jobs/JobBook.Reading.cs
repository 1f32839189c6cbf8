using System.Collections.Immutable;
using Microsoft.Data.Sqlite;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using TrimFit.Core.Workshop;

namespace TrimFit.Jobs;

public sealed partial class JobBook
{
    /// <summary>Every job in one line each, newest first.</summary>
    /// <exception cref="JobBookException">The book cannot be read.</exception>
    public ImmutableArray<JobSummary> List() => Reading<ImmutableArray<JobSummary>>(() =>
    [
        .. _connection.Rows("""
            SELECT j.id, j.opened, j.machine, j.customer, j.complaint, j.wing, j.wing_id,
                (SELECT count(*) FROM setup s WHERE s.job = j.id), (SELECT count(*) FROM flight f WHERE f.job = j.id),
                r.verdict, r.rate, r.rate_low, r.rate_high,
                coalesce((SELECT g.setup FROM signature g WHERE g.job = j.id ORDER BY g.number DESC LIMIT 1) = (SELECT max(s.number) FROM setup s WHERE s.job = j.id), 0)
            FROM job j LEFT JOIN result r ON r.job = j.id AND r.number = (SELECT max(x.number) FROM result x WHERE x.job = j.id AND x.kind = 'fit')
            ORDER BY j.id DESC
            """, r => new JobSummary
            {
                Number = r.GetInt64(0),
                Opened = r.Time(1),
                Machine = r.GetString(2),
                Customer = r.GetString(3),
                Complaint = r.GetString(4),
                Wing = string.Join(" ", new[] { r.GetString(5), r.GetString(6) }.Where(t => t.Length > 0)),
                Setups = r.GetInt32(7),
                Flights = r.GetInt32(8),
                Verdict = r.IsDBNull(9) ? null : r.GetString(9),
                RateRadPerSec = r.NumberOrNull(10),
                RateInterval95 = Interval(r, 11),
                IsSigned = r.GetInt64(13) != 0,
            }),
    ]);

    /// <summary>One job with everything but the bytes.</summary>
    /// <exception cref="JobBookException">No such job, or the book cannot be read.</exception>
    public JobRecord Job(long number) => Reading(() => JobOf(number));

    /// <summary>Numbers of the jobs of a wing, oldest first: the one it came with, and those in which it was flown.</summary>
    /// <exception cref="JobBookException">The book cannot be read.</exception>
    public ImmutableArray<long> JobsOfWing(string wingId) => Reading<ImmutableArray<long>>(() =>
        [.. _connection.Rows("SELECT id FROM job WHERE wing_id = $1 UNION SELECT job FROM flight WHERE wing_id = $1 ORDER BY 1", r => r.GetInt64(0), wingId)]);

    /// <summary>Bytes that the book keeps.</summary>
    /// <param name="sha256">Their SHA-256, lower-case hex.</param>
    /// <exception cref="JobBookException">The book has no such bytes, or they are damaged.</exception>
    public byte[] Content(string sha256) => Reading(() => ContentOf(sha256));

    /// <summary>A job with all bytes it rests on, as it is at one moment.</summary>
    /// <exception cref="JobBookException">No such job, or the book is damaged.</exception>
    public JobBundle Bundle(long number) => Reading(() =>
    {
        JobRecord job = JobOf(number);
        return new JobBundle(job, JobBundle.NamedBy(job).ToImmutableSortedDictionary(h => h, h => (ReadOnlyMemory<byte>)ContentOf(h), StringComparer.Ordinal));
    });

    /// <summary>Every measured sensitivity in the book, with the job and the wing it belongs to. Of comparisons the last one of a job: it rests on what
    /// those before it rested on.</summary>
    /// <exception cref="JobBookException">The book cannot be read.</exception>
    public ImmutableArray<MeasuredSensitivity> Sensitivities() => Reading<ImmutableArray<MeasuredSensitivity>>(() =>
    [
        .. _connection.Rows("""
            SELECT s.job, CASE WHEN f.wing_id <> '' THEN f.wing_id ELSE j.wing_id END, s.source, s.log_median, s.log_sd, s.wing_area, s.suspended
            FROM sensitivity s JOIN result r ON r.job = s.job AND r.number = s.result
                JOIN flight f ON f.job = r.job AND f.number = r.flight JOIN job j ON j.id = s.job
            WHERE r.kind <> 'compare' OR r.number = (SELECT max(x.number) FROM result x WHERE x.job = r.job AND x.kind = 'compare')
            ORDER BY s.job, s.result, s.position
            """, r => new MeasuredSensitivity
            {
                Job = r.GetInt64(0),
                WingId = r.GetString(1),
                Source = r.GetString(2),
                LogMedian = r.GetDouble(3),
                LogSd = r.GetDouble(4),
                WingAreaM2 = r.NumberOrNull(5),
                SuspendedKg = r.GetDouble(6),
            }),
    ]);

    private byte[] ContentOf(string sha256)
    {
        List<(long Bytes, byte[] Packed)> rows = _connection.Rows("SELECT bytes, packed FROM content WHERE sha256 = $1", r => (r.GetInt64(0), (byte[])r.GetValue(1)), sha256);
        if (rows.Count == 0)
            throw new JobBookException($"{Name}: the book does not hold {sha256}.");
        return Packed.Unpack(rows[0].Packed, rows[0].Bytes, sha256)
            ?? throw new JobBookException($"{Name}: what the book holds as {sha256} is damaged. Go back to the last copy; keep this file for who may mend it.");
    }

    private JobRecord JobOf(long number)
    {
        JobRecord job = _connection.Rows("SELECT uid, opened, complaint, machine, customer, wing, wing_id FROM job WHERE id = $1", r => new JobRecord
        {
            Number = number,
            Uid = r.GetString(0),
            Opened = r.Time(1),
            Complaint = r.GetString(2),
            Machine = r.GetString(3),
            Customer = r.GetString(4),
            Wing = r.GetString(5),
            WingId = r.GetString(6),
        }, number).FirstOrDefault() ?? throw NoSuchJob(number);
        ILookup<int, InputRecord> flightInputs = Inputs("flight_input", "flight", number), resultInputs = Inputs("result_input", "result", number);
        ILookup<int, ReadingRecord> adjustmentReadings = ReadingsOf("adjustment_reading", "adjustment", number), signatureReadings = ReadingsOf("signature_reading", "signature", number);
        ILookup<int, SensitivityRecord> sensitivities = _connection.Rows(
            "SELECT result, source, log_median, log_sd, wing_area, suspended FROM sensitivity WHERE job = $1 ORDER BY result, position",
            r => (Result: r.GetInt32(0), Record: new SensitivityRecord
            {
                Source = r.GetString(1),
                LogMedian = r.GetDouble(2),
                LogSd = r.GetDouble(3),
                WingAreaM2 = r.NumberOrNull(4),
                SuspendedKg = r.GetDouble(5),
            }), number).ToLookup(s => s.Result, s => s.Record);
        return job with
        {
            Setups = SetupsOf(number),
            Flights =
            [
                .. _connection.Rows("SELECT number, added, setup, flown, wing_id FROM flight WHERE job = $1 ORDER BY number", r => new FlightRecord
                {
                    Number = r.GetInt32(0),
                    Added = r.Time(1),
                    Setup = r.GetInt32(2),
                    Flown = r.IsDBNull(3) ? null : r.Time(3),
                    WingId = r.GetString(4),
                    Inputs = [.. flightInputs[r.GetInt32(0)]],
                }, number),
            ],
            Results =
            [
                .. _connection.Rows("""
                    SELECT number, made, kind, flight, program_version, options, content, verdict, strength, rate, rate_low, rate_high
                    FROM result WHERE job = $1 ORDER BY number
                    """, r => new ResultRecord
                    {
                        Number = r.GetInt32(0),
                        Made = r.Time(1),
                        Kind = r.GetString(2),
                        Flight = r.GetInt32(3),
                        ProgramVersion = r.GetString(4),
                        Options = r.GetString(5),
                        Sha256 = r.GetString(6),
                        Verdict = r.GetString(7),
                        Strength = r.GetString(8),
                        RateRadPerSec = r.NumberOrNull(9),
                        RateInterval95 = Interval(r, 10),
                        Inputs = [.. resultInputs[r.GetInt32(0)]],
                        Sensitivities = [.. sensitivities[r.GetInt32(0)]],
                    }, number),
            ],
            Adjustments =
            [
                .. _connection.Rows("""
                    SELECT number, made, from_setup, to_setup, kind, travel, recommended, recommended_by, confirmed, person, note
                    FROM adjustment WHERE job = $1 ORDER BY number
                    """, r => new AdjustmentRecord
                    {
                        Number = r.GetInt32(0),
                        Made = r.Time(1),
                        FromSetup = r.GetInt32(2),
                        ToSetup = r.GetInt32(3),
                        Kind = BookWords.Kind(r.GetString(4)) ?? throw Unknown(r.GetString(4)),
                        Travel = r.GetDouble(5),
                        Recommended = r.NumberOrNull(6),
                        RecommendedBy = r.CountOrNull(7),
                        ReadingsConfirmed = r.GetInt64(8) != 0,
                        By = r.GetString(9),
                        Note = r.GetString(10),
                        Readings = [.. adjustmentReadings[r.GetInt32(0)]],
                    }, number),
            ],
            Checks =
            [
                .. _connection.Rows("SELECT number, made, setup, code, outcome, value, unit, note, person FROM checked WHERE job = $1 ORDER BY number", r => new CheckRecord
                {
                    Number = r.GetInt32(0),
                    Made = r.Time(1),
                    Setup = r.CountOrNull(2),
                    Code = r.GetString(3),
                    Outcome = BookWords.Outcome(r.GetString(4)) ?? throw Unknown(r.GetString(4)),
                    Value = r.NumberOrNull(5),
                    Unit = r.GetString(6),
                    Note = r.GetString(7),
                    By = r.GetString(8),
                }, number),
            ],
            Notes = [.. _connection.Rows("SELECT made, words FROM note WHERE job = $1 ORDER BY number", r => new NoteRecord(r.Time(0), r.GetString(1)), number)],
            Signatures =
            [
                .. _connection.Rows("SELECT number, made, name, day, setup, note FROM signature WHERE job = $1 ORDER BY number", r => new SignatureRecord
                {
                    Made = r.Time(1),
                    Name = r.GetString(2),
                    Date = BookWords.Date(r.GetString(3)) ?? throw Unknown(r.GetString(3)),
                    Setup = r.GetInt32(4),
                    Note = r.GetString(5),
                    Readings = [.. signatureReadings[r.GetInt32(0)]],
                }, number),
            ],
        };
    }

    private ImmutableArray<SetupRecord> SetupsOf(long job) =>
    [
        .. _connection.Rows("SELECT number, made, rig_name, rig, changed_from, note FROM setup WHERE job = $1 ORDER BY number", r => new SetupRecord
        {
            Number = r.GetInt32(0),
            Made = r.Time(1),
            RigName = r.GetString(2),
            RigSha256 = r.GetString(3),
            ChangedFrom = r.CountOrNull(4),
            Note = r.GetString(5),
        }, job),
    ];

    private ILookup<int, InputRecord> Inputs(string table, string owner, long job) => _connection.Rows(
        $"SELECT {owner}, role, name, content FROM {table} WHERE job = $1 ORDER BY {owner}, position",
        r => (Owner: r.GetInt32(0), Input: new InputRecord(r.GetString(1), r.GetString(2), r.GetString(3))), job).ToLookup(i => i.Owner, i => i.Input);

    private ILookup<int, ReadingRecord> ReadingsOf(string table, string owner, long job) => _connection.Rows(
        $"SELECT {owner}, key, value FROM {table} WHERE job = $1 ORDER BY {owner}, position",
        r => (Owner: r.GetInt32(0), Reading: new ReadingRecord(r.GetString(1), r.GetDouble(2))), job).ToLookup(i => i.Owner, i => i.Reading);

    private static ConfidenceInterval? Interval(SqliteDataReader r, int column) =>
        r.NumberOrNull(column) is double low && r.NumberOrNull(column + 1) is double high ? new(low, high, 0.95) : null;

    private JobBookException Unknown(string word) => new($"{Name}: the book holds \"{word}\", which this program does not know. It is damaged, or another program wrote into it.");
}
