using System.Collections.Immutable;
using Microsoft.Data.Sqlite;
using TrimFit.Core.Statistics;
using TrimFit.Core.Workshop;

namespace TrimFit.Jobs;

public sealed partial class JobBook
{
    /// <summary>Opens a job.</summary>
    /// <param name="job">Complaint, machine, customer, wing; its number, identity, time and lists are the book's.</param>
    /// <param name="rig">The machine's rig file; null when it is not measured yet.</param>
    /// <param name="at">The time.</param>
    /// <returns>The job as the book keeps it.</returns>
    /// <exception cref="JobBookException">The book cannot take it.</exception>
    public JobRecord AddJob(JobRecord job, KeptFile? rig, DateTimeOffset at)
    {
        ArgumentNullException.ThrowIfNull(job);
        return Writing(() =>
        {
            long number = InsertJob(job with { Uid = Guid.NewGuid().ToString("N"), Opened = at });
            if (rig is not null)
                InsertSetup(number, Keep(rig), rig.Name, null, "", at);
            return JobOf(number);
        });
    }

    /// <summary>Writes down a measured machine as a new setup; the latest one when it is the same file.</summary>
    /// <exception cref="JobBookException">No such job, or the book cannot take it.</exception>
    public SetupRecord AddSetup(long job, KeptFile rig, string note, DateTimeOffset at)
    {
        ArgumentNullException.ThrowIfNull(rig);
        return Writing(() =>
        {
            MustExist(job);
            string sha256 = Keep(rig);
            SetupRecord? latest = SetupsOf(job).LastOrDefault();
            return latest?.RigSha256 == sha256 ? latest : InsertSetup(job, sha256, rig.Name, null, note, at);
        });
    }

    /// <summary>Keeps a flight with its files and its result.</summary>
    /// <exception cref="JobBookException">No such job or setup, or the book cannot take it.</exception>
    public FlightRecord AddFlight(long job, NewFlight flight, DateTimeOffset at)
    {
        ArgumentNullException.ThrowIfNull(flight);
        return Writing(() =>
        {
            int setup = flight.Setup;
            if (flight.NewRig is KeptFile rig)
            {
                MustExist(job);
                string sha256 = Keep(rig);
                SetupRecord? latest = SetupsOf(job).LastOrDefault();
                setup = latest?.RigSha256 == sha256 ? latest.Number : InsertSetup(job, sha256, rig.Name, null, "", at).Number;
            }
            MustHaveSetup(job, setup);
            int number = Next("flight", job);
            var record = new FlightRecord
            {
                Number = number,
                Added = at,
                Setup = setup,
                Flown = flight.Flown,
                WingId = flight.WingId,
                Inputs = [.. flight.Inputs.Select(i => new InputRecord(i.Role, i.Name, Keep(i)))],
            };
            InsertFlight(job, record);
            InsertResult(job, Recorded(flight.Result, job, number, at));
            return record;
        });
    }

    /// <summary>Keeps a further result of flights that are already in the book.</summary>
    /// <exception cref="JobBookException">No such job or flight, or the book cannot take it.</exception>
    public ResultRecord AddResult(long job, NewResult result, DateTimeOffset at)
    {
        ArgumentNullException.ThrowIfNull(result);
        return Writing(() =>
        {
            MustExist(job);
            ResultRecord record = Recorded(result, job, result.Record.Flight, at);
            InsertResult(job, record);
            return record;
        });
    }

    /// <summary>Writes down an adjustment and the setup it led to.</summary>
    /// <param name="job">Number of the job.</param>
    /// <param name="adjustment">What was moved; its number, time and setup after are the book's.</param>
    /// <param name="rig">Rig file with the readings after.</param>
    /// <param name="at">The time.</param>
    /// <exception cref="JobBookException">No such job or setup, the setup is no longer the latest, or the book cannot take it.</exception>
    public AdjustmentRecord AddAdjustment(long job, AdjustmentRecord adjustment, KeptFile rig, DateTimeOffset at)
    {
        ArgumentNullException.ThrowIfNull(adjustment);
        ArgumentNullException.ThrowIfNull(rig);
        return Writing(() =>
        {
            MustHaveSetup(job, adjustment.FromSetup);
            if (SetupsOf(job)[^1].Number != adjustment.FromSetup)
                throw new JobBookException($"{Name}: job {Text(job)} has got another setup meanwhile. Look at it (trimfit job show {Text(job)}) and adjust from there.");
            SetupRecord after = InsertSetup(job, Keep(rig), rig.Name, adjustment.FromSetup, "", at);
            AdjustmentRecord record = adjustment with { Number = Next("adjustment", job), Made = at, ToSetup = after.Number };
            InsertAdjustment(job, record);
            return record;
        });
    }

    /// <summary>Writes down checks.</summary>
    /// <param name="job">Number of the job.</param>
    /// <param name="checks">Code, outcome, number, note, person; number, time and setup are the book's.</param>
    /// <param name="at">The time.</param>
    /// <exception cref="JobBookException">No such job, or the book cannot take them.</exception>
    public ImmutableArray<CheckRecord> AddChecks(long job, IEnumerable<CheckRecord> checks, DateTimeOffset at)
    {
        ArgumentNullException.ThrowIfNull(checks);
        return Writing<ImmutableArray<CheckRecord>>(() =>
        {
            MustExist(job);
            int number = Next("checked", job);
            int? setup = SetupsOf(job).LastOrDefault()?.Number;
            ImmutableArray<CheckRecord> records = [.. checks.Select((c, i) => c with { Number = number + i, Made = at, Setup = setup })];
            foreach (CheckRecord record in records)
                InsertCheck(job, record);
            return records;
        });
    }

    /// <summary>Writes down a note.</summary>
    /// <exception cref="JobBookException">No such job, or the book cannot take it.</exception>
    public NoteRecord AddNote(long job, string words, DateTimeOffset at) => Writing(() =>
    {
        MustExist(job);
        var note = new NoteRecord(at, words);
        InsertNote(job, Next("note", job), note);
        return note;
    });

    /// <summary>Writes down a technician's sign-off.</summary>
    /// <param name="job">Number of the job.</param>
    /// <param name="signature">Name, date, setup, readings; its time is the book's.</param>
    /// <param name="at">The time.</param>
    /// <exception cref="JobBookException">No such job or setup, the setup is no longer the latest, or the book cannot take it.</exception>
    public SignatureRecord AddSignature(long job, SignatureRecord signature, DateTimeOffset at)
    {
        ArgumentNullException.ThrowIfNull(signature);
        return Writing(() =>
        {
            MustHaveSetup(job, signature.Setup);
            if (SetupsOf(job)[^1].Number != signature.Setup)
                throw new JobBookException($"{Name}: job {Text(job)} has got another setup meanwhile. Look at it (trimfit job show {Text(job)}) before you sign.");
            SignatureRecord record = signature with { Made = at };
            InsertSignature(job, Next("signature", job), record);
            return record;
        });
    }

    /// <summary>Takes a job out of the book with everything that no other job uses, and gives its room back.</summary>
    /// <returns>What went, and whether the room was given back at once.</returns>
    /// <exception cref="JobBookException">No such job, or the book cannot be written.</exception>
    public DeletedJob Delete(long job)
    {
        (int flights, int contents) = Writing(() =>
        {
            MustExist(job);
            int flights = (int)_connection.Number("SELECT count(*) FROM flight WHERE job = $1", job);
            _connection.Run("DELETE FROM job WHERE id = $1", job);
            int contents = _connection.Run("""
                DELETE FROM content WHERE sha256 NOT IN (SELECT rig FROM setup UNION SELECT content FROM flight_input
                    UNION SELECT content FROM result UNION SELECT content FROM result_input)
                """);
            return (flights, contents);
        });
        try
        {
            // Deleted pages are zeroed in the file; what the write-ahead log still has of them goes with it.
            _connection.Run("VACUUM");
            bool whole = _connection.Rows("PRAGMA wal_checkpoint(TRUNCATE)", r => r.GetInt64(0)).Single() == 0;
            return new(flights, contents, whole);
        }
        catch (SqliteException) // full disk or another program: the job is gone, its room is not back yet
        {
            return new(flights, contents, RoomGivenBack: false);
        }
    }

    /// <summary>Puts in a job that came from another book, with the bytes it rests on.</summary>
    /// <returns>The job with its number in this book.</returns>
    /// <exception cref="JobBookException">The job is already here, or the book cannot take it.</exception>
    public JobRecord Import(JobBundle bundle)
    {
        ArgumentNullException.ThrowIfNull(bundle);
        JobRecord job = bundle.Job;
        return Writing(() =>
        {
            foreach (long already in _connection.Rows("SELECT id FROM job WHERE uid = $1", r => r.GetInt64(0), job.Uid))
                throw new JobBookException($"{Name}: this job is already here as job {Text(already)}. Delete that one first if the other is to take its place.");
            foreach (ReadOnlyMemory<byte> bytes in bundle.Contents.Values)
                Keep(bytes);
            long number = InsertJob(job);
            foreach (SetupRecord setup in job.Setups)
                InsertSetup(number, setup);
            foreach (FlightRecord flight in job.Flights)
                InsertFlight(number, flight);
            foreach (ResultRecord result in job.Results)
                InsertResult(number, result);
            foreach (AdjustmentRecord adjustment in job.Adjustments)
                InsertAdjustment(number, adjustment);
            foreach (CheckRecord check in job.Checks)
                InsertCheck(number, check);
            for (int i = 0; i < job.Notes.Length; i++)
                InsertNote(number, i + 1, job.Notes[i]);
            for (int i = 0; i < job.Signatures.Length; i++)
                InsertSignature(number, i + 1, job.Signatures[i]);
            return JobOf(number);
        });
    }

    private ResultRecord Recorded(NewResult result, long job, int flight, DateTimeOffset at) => result.Record with
    {
        Number = Next("result", job),
        Made = at,
        Flight = flight,
        Sha256 = Keep(result.Json),
        Inputs = [.. result.Inputs.Select(i => new InputRecord(i.Role, i.Name, Keep(i)))],
    };

    private long InsertJob(JobRecord job)
    {
        _connection.Run("INSERT INTO job(uid, opened, complaint, machine, customer, wing, wing_id) VALUES ($1, $2, $3, $4, $5, $6, $7)",
            job.Uid, Statements.TextOf(job.Opened), job.Complaint, job.Machine, job.Customer, job.Wing, job.WingId);
        return _connection.Number("SELECT last_insert_rowid()");
    }

    private SetupRecord InsertSetup(long job, string sha256, string name, int? changedFrom, string note, DateTimeOffset at)
    {
        var setup = new SetupRecord { Number = Next("setup", job), Made = at, RigName = name, RigSha256 = sha256, ChangedFrom = changedFrom, Note = note };
        InsertSetup(job, setup);
        return setup;
    }

    private void InsertSetup(long job, SetupRecord s) =>
        _connection.Run("INSERT INTO setup(job, number, made, rig_name, rig, changed_from, note) VALUES ($1, $2, $3, $4, $5, $6, $7)",
            job, s.Number, Statements.TextOf(s.Made), s.RigName, s.RigSha256, s.ChangedFrom, s.Note);

    private void InsertFlight(long job, FlightRecord f)
    {
        _connection.Run("INSERT INTO flight(job, number, added, setup, flown, wing_id) VALUES ($1, $2, $3, $4, $5, $6)",
            job, f.Number, Statements.TextOf(f.Added), f.Setup, f.Flown is DateTimeOffset t ? Statements.TextOf(t) : null, f.WingId);
        for (int i = 0; i < f.Inputs.Length; i++)
        {
            _connection.Run("INSERT INTO flight_input(job, flight, position, role, name, content) VALUES ($1, $2, $3, $4, $5, $6)",
                job, f.Number, i + 1, f.Inputs[i].Role, f.Inputs[i].Name, f.Inputs[i].Sha256);
        }
    }

    private void InsertResult(long job, ResultRecord r)
    {
        ConfidenceInterval? interval = r.RateInterval95;
        _connection.Run("""
            INSERT INTO result(job, number, made, kind, flight, program_version, options, content, verdict, strength, rate, rate_low, rate_high)
            VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13)
            """,
            job, r.Number, Statements.TextOf(r.Made), r.Kind, r.Flight, r.ProgramVersion, r.Options, r.Sha256, r.Verdict, r.Strength,
            r.RateRadPerSec, interval?.Lower, interval?.Upper);
        for (int i = 0; i < r.Inputs.Length; i++)
        {
            _connection.Run("INSERT INTO result_input(job, result, position, role, name, content) VALUES ($1, $2, $3, $4, $5, $6)",
                job, r.Number, i + 1, r.Inputs[i].Role, r.Inputs[i].Name, r.Inputs[i].Sha256);
        }
        for (int i = 0; i < r.Sensitivities.Length; i++)
        {
            SensitivityRecord s = r.Sensitivities[i];
            _connection.Run("INSERT INTO sensitivity(job, result, position, source, log_median, log_sd, wing_area, suspended) VALUES ($1, $2, $3, $4, $5, $6, $7, $8)",
                job, r.Number, i + 1, s.Source, s.LogMedian, s.LogSd, s.WingAreaM2, s.SuspendedKg);
        }
    }

    private void InsertAdjustment(long job, AdjustmentRecord a)
    {
        _connection.Run("""
            INSERT INTO adjustment(job, number, made, from_setup, to_setup, kind, travel, recommended, recommended_by, confirmed, person, note)
            VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12)
            """,
            job, a.Number, Statements.TextOf(a.Made), a.FromSetup, a.ToSetup, BookWords.Of(a.Kind), a.Travel, a.Recommended, a.RecommendedBy,
            a.ReadingsConfirmed ? 1 : 0, a.By, a.Note);
        Readings("adjustment_reading", "adjustment", job, a.Number, a.Readings);
    }

    private void InsertCheck(long job, CheckRecord c) =>
        _connection.Run("INSERT INTO checked(job, number, made, setup, code, outcome, value, unit, note, person) VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)",
            job, c.Number, Statements.TextOf(c.Made), c.Setup, c.Code, BookWords.Of(c.Outcome), c.Value, c.Unit, c.Note, c.By);

    private void InsertNote(long job, int number, NoteRecord note) =>
        _connection.Run("INSERT INTO note(job, number, made, words) VALUES ($1, $2, $3, $4)", job, number, Statements.TextOf(note.Made), note.Text);

    private void InsertSignature(long job, int number, SignatureRecord s)
    {
        _connection.Run("INSERT INTO signature(job, number, made, name, day, setup, note) VALUES ($1, $2, $3, $4, $5, $6, $7)",
            job, number, Statements.TextOf(s.Made), s.Name, BookWords.Of(s.Date), s.Setup, s.Note);
        Readings("signature_reading", "signature", job, number, s.Readings);
    }

    private void Readings(string table, string owner, long job, int number, ImmutableArray<ReadingRecord> readings)
    {
        for (int i = 0; i < readings.Length; i++)
            _connection.Run($"INSERT INTO {table}(job, {owner}, position, key, value) VALUES ($1, $2, $3, $4, $5)", job, number, i + 1, readings[i].Key, readings[i].Value);
    }

    /// <summary>Keeps bytes once, whoever brings them.</summary>
    private string Keep(KeptFile file) => Keep(file.Bytes);

    private string Keep(ReadOnlyMemory<byte> bytes)
    {
        string sha256 = Packed.Sha256(bytes.Span);
        if (_connection.Number("SELECT count(*) FROM content WHERE sha256 = $1", sha256) == 0)
            _connection.Run("INSERT INTO content(sha256, bytes, packed) VALUES ($1, $2, $3)", sha256, (long)bytes.Length, Packed.Pack(bytes.Span));
        return sha256;
    }

    private int Next(string table, long job) => (int)_connection.Number($"SELECT coalesce(max(number), 0) + 1 FROM {table} WHERE job = $1", job);

    private void MustExist(long job)
    {
        if (_connection.Number("SELECT count(*) FROM job WHERE id = $1", job) == 0)
            throw NoSuchJob(job);
    }

    private void MustHaveSetup(long job, int setup)
    {
        MustExist(job);
        if (_connection.Number("SELECT count(*) FROM setup WHERE job = $1 AND number = $2", job, setup) == 0)
            throw new JobBookException($"{Name}: job {Text(job)} has no setup {Text(setup)}. \"trimfit job measure {Text(job)} --rig RIG\" writes one down; \"trimfit job show {Text(job)}\" shows those it has.");
    }

    private JobBookException NoSuchJob(long job) => new($"{Name}: there is no job {Text(job)}. \"trimfit job list\" shows those there are.");

    private static string Text(long number) => number.ToString(System.Globalization.CultureInfo.InvariantCulture);
}
