using System.Collections.Immutable;
using System.Text;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Workshop;
using TrimFit.Jobs;

namespace TrimFit.Tests.Jobs;

/// <summary>A folder with a job book of a test's own, gone with it.</summary>
internal sealed class BookFolder : IDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("trimfit-book-");

    public static DateTimeOffset At { get; } = new(2026, 5, 17, 7, 40, 0, TimeSpan.Zero);

    public string Path => this["jobs.trimfit-book"];

    public string this[string name] => System.IO.Path.Combine(_folder.FullName, name);

    public JobBook Open(BookAccess access = BookAccess.Create) => JobBook.Open(Path, access, At);

    public void Dispose() => _folder.Delete(recursive: true);

    public static KeptFile File(string role, string name, string text) => new(role, name, Encoding.UTF8.GetBytes(text));

    public static JobRecord NewJob(string complaint = "pulls left at full power", string wingId = "W1") => new()
    {
        Number = 0,
        Uid = "",
        Opened = default,
        Complaint = complaint,
        Machine = "Demo machine",
        Customer = "A. Pilot",
        Wing = "Demo wing 26",
        WingId = wingId,
    };

    public static NewFlight NewFlight(int setup, string log, SensitivityRecord? sensitivity = null)
    {
        ImmutableArray<KeptFile> inputs = [File(InputRecord.Log, "flight.csv", log), File(InputRecord.Sheet, "sheet.toml", "schema = \"trimfit-flight/1\"\n")];
        return new()
        {
            Setup = setup,
            Flown = At.AddDays(-1),
            Inputs = inputs,
            Result = new()
            {
                Json = Encoding.UTF8.GetBytes("{\"of\":\"" + log[..Math.Min(20, log.Length)] + "\"}"),
                Inputs = [.. inputs, File(InputRecord.Rig, "rig.toml", "rig 1")],
                Record = new()
                {
                    Number = 0,
                    Made = default,
                    Kind = ResultRecord.FitKind,
                    Flight = 0,
                    ProgramVersion = "0.1.0",
                    Options = "--seed 1",
                    Sha256 = "",
                    Verdict = "power_pull",
                    Strength = "weak",
                    RateRadPerSec = -0.025,
                    RateInterval95 = new ConfidenceInterval(-0.03, -0.02, 0.95),
                    Sensitivities = sensitivity is null ? [] : [sensitivity],
                },
            },
        };
    }

    /// <summary>A job with at least one of everything.</summary>
    public static long Fill(JobBook book, string log = "time,rpm\n0,1000\n1,1010\n", string complaint = "pulls left at full power")
    {
        long job = book.AddJob(NewJob(complaint), File(InputRecord.Rig, "rig.toml", "rig 1"), At).Number;
        book.AddNote(job, "came with a bent suspension bar", At.AddMinutes(1));
        book.AddChecks(job,
        [
            new() { Number = 0, Made = default, Code = "brake_lines", Outcome = CheckOutcome.Pass, Value = 3.5, Unit = "mm", By = "T. Echnician" },
            new() { Number = 0, Made = default, Code = "trimmers", Outcome = CheckOutcome.NotDone, Note = "none fitted" },
        ], At.AddMinutes(2));
        book.AddFlight(job, NewFlight(1, log, new() { Source = "ballast", LogMedian = 1.6, LogSd = 0.4, WingAreaM2 = 26, SuspendedKg = 118 }), At.AddMinutes(3));
        book.AddAdjustment(job, new()
        {
            Number = 0,
            Made = default,
            FromSetup = 1,
            ToSetup = 0,
            Kind = AdjustmentKind.CarabinerPair,
            Travel = -0.0071,
            Recommended = -0.007,
            RecommendedBy = 1,
            By = "T. Echnician",
            Readings = [new("carabiners.left_mm", -227.1), new("carabiners.right_mm", 212.9)],
        }, File(InputRecord.Rig, "rig.toml", "rig 2"), At.AddMinutes(4));
        book.AddSignature(job, new() { Made = default, Name = "T. Echnician", Date = new(2026, 5, 17), Setup = 2, Readings = [new("carabiners.left_mm", -227.1)] }, At.AddMinutes(5));
        return job;
    }
}
