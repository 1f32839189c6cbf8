using System.Text;
using Microsoft.Data.Sqlite;
using TrimFit.Core.Workshop;
using TrimFit.Jobs;

namespace TrimFit.Tests.Jobs;

public class JobBookTests
{
    [Fact]
    public void What_was_put_in_comes_out_after_the_book_was_closed()
    {
        using var folder = new BookFolder();
        string before;
        using (JobBook book = folder.Open())
            before = JobText.Write(book.Job(BookFolder.Fill(book)));
        using JobBook again = folder.Open(BookAccess.Read);
        JobRecord job = again.Job(1);
        Assert.Equal(before, JobText.Write(job));
        Assert.Equal("pulls left at full power", job.Complaint);
        Assert.Equal(["came with a bent suspension bar"], job.Notes.Select(n => n.Text));
        Assert.Equal([CheckOutcome.Pass, CheckOutcome.NotDone], job.Checks.Select(c => c.Outcome));
        Assert.Equal(-0.0071, Assert.Single(job.Adjustments).Travel);
        Assert.Equal(2, job.CurrentSetup!.Number);
        Assert.Equal(1, job.CurrentSetup.ChangedFrom);
        Assert.True(job.IsSigned);
        Assert.Equal([InputRecord.Log, InputRecord.Sheet, InputRecord.Rig], Assert.Single(job.Results).Inputs.Select(i => i.Role));
        Assert.Equal("time,rpm\n0,1000\n1,1010\n", Encoding.UTF8.GetString(again.Content(job.Flights[0].Inputs[0].Sha256)));
        Assert.Empty(again.Damage());
    }

    [Fact]
    public void A_result_points_to_the_bytes_that_made_it_by_their_SHA_256()
    {
        using var folder = new BookFolder();
        using JobBook book = folder.Open();
        long job = book.AddJob(BookFolder.NewJob(), BookFolder.File(InputRecord.Rig, "rig.toml", "rig 1"), BookFolder.At).Number;
        book.AddFlight(job, BookFolder.NewFlight(1, "abc"), BookFolder.At);
        // FIPS 180-2, appendix B.1: SHA-256 of "abc".
        Assert.Equal("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad", book.Job(job).Results[0].Inputs[0].Sha256);
    }

    [Fact]
    public void A_log_that_two_flights_share_is_kept_once()
    {
        using var folder = new BookFolder();
        using JobBook book = folder.Open();
        string log = RandomText(2_000_000);
        long job = book.AddJob(BookFolder.NewJob(), BookFolder.File(InputRecord.Rig, "rig.toml", "rig 1"), BookFolder.At).Number;
        book.AddFlight(job, BookFolder.NewFlight(1, log), BookFolder.At);
        long once = book.SizeOnDisk();
        book.AddFlight(job, BookFolder.NewFlight(1, log), BookFolder.At);
        Assert.True(book.SizeOnDisk() < once + 200_000, $"{once} became {book.SizeOnDisk()}");
    }

    [Theory]
    [InlineData("UPDATE setup SET rig_name = 'other'", "a setup is never changed")]
    [InlineData("UPDATE result SET program_version = '9'", "a result is never changed")]
    [InlineData("UPDATE flight_input SET name = 'other'", "a flight is never changed")]
    [InlineData("UPDATE content SET bytes = 1", "content is never changed")]
    [InlineData("UPDATE adjustment SET travel = 0", "an adjustment is never changed")]
    [InlineData("UPDATE signature SET name = 'other'", "a signature is never changed")]
    [InlineData("DELETE FROM content", "FOREIGN KEY constraint failed")]
    public void The_book_itself_refuses_to_change_what_was_written(string sql, string reason)
    {
        using var folder = new BookFolder();
        using (JobBook book = folder.Open())
            BookFolder.Fill(book);
        using var connection = new SqliteConnection($"Data Source={folder.Path};Pooling=False;Foreign Keys=True");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        Assert.Contains(reason, Assert.Throws<SqliteException>(() => command.ExecuteNonQuery()).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_measured_machine_that_did_not_change_makes_no_new_setup()
    {
        using var folder = new BookFolder();
        using JobBook book = folder.Open();
        long job = BookFolder.Fill(book);
        Assert.Equal(2, book.AddSetup(job, BookFolder.File(InputRecord.Rig, "rig.toml", "rig 2"), "", BookFolder.At).Number);
        Assert.Equal(3, book.AddSetup(job, BookFolder.File(InputRecord.Rig, "rig.toml", "rig 3"), "", BookFolder.At).Number);
        Assert.False(book.Job(job).IsSigned); // what was signed for is no longer how the machine is
    }

    [Fact]
    public void An_adjustment_from_a_setup_that_is_no_longer_the_latest_is_refused()
    {
        using var folder = new BookFolder();
        using JobBook book = folder.Open();
        long job = BookFolder.Fill(book);
        AdjustmentRecord again = book.Job(job).Adjustments[0];
        JobBookException e = Assert.Throws<JobBookException>(() => book.AddAdjustment(job, again, BookFolder.File(InputRecord.Rig, "rig.toml", "rig 4"), BookFolder.At));
        Assert.Contains("has got another setup meanwhile", e.Message, StringComparison.Ordinal);
        Assert.Equal(2, book.Job(job).Setups.Length);
    }

    [Fact]
    public void Deleting_a_job_takes_its_logs_and_words_out_of_the_file_and_leaves_those_of_others()
    {
        using var folder = new BookFolder();
        string own = RandomText(100_000), shared = RandomText(100_000, seed: 2);
        byte[] ownPacked, sharedPacked;
        using (JobBook book = folder.Open())
        {
            long gone = BookFolder.Fill(book, own, "Xylophone complaint"), stays = BookFolder.Fill(book, shared, "other complaint");
            book.AddFlight(gone, BookFolder.NewFlight(1, shared), BookFolder.At);
            (ownPacked, sharedPacked) = (Packed.Pack(Encoding.UTF8.GetBytes(own)), Packed.Pack(Encoding.UTF8.GetBytes(shared)));
            Assert.True(Holds(folder, ownPacked) && Holds(folder, "Xylophone"u8));
            DeletedJob deleted = book.Delete(gone);
            Assert.Equal(2, deleted.Flights);
            Assert.True(deleted.RoomGivenBack);
            Assert.Equal("other complaint", Assert.Single(book.List()).Complaint);
            Assert.Equal(shared, Encoding.UTF8.GetString(book.Content(book.Job(stays).Flights[0].Inputs[0].Sha256)));
            Assert.Equal(stays + 1, book.AddJob(BookFolder.NewJob(), null, BookFolder.At).Number); // a number is never given twice
            Assert.Empty(book.Damage());
        }
        Assert.False(Holds(folder, ownPacked));
        Assert.False(Holds(folder, "Xylophone"u8));
        Assert.True(Holds(folder, sharedPacked));

        // Any 64 bytes in the middle of the packed log would tell of it.
        static bool Holds(BookFolder folder, ReadOnlySpan<byte> wanted)
        {
            ReadOnlySpan<byte> piece = wanted.Length > 200 ? wanted.Slice(100, 64) : wanted;
            foreach (string file in Directory.GetFiles(Path.GetDirectoryName(folder.Path)!))
            {
                if (ReadShared(file).AsSpan().IndexOf(piece) >= 0)
                    return true;
            }
            return false;
        }
    }

    [Fact]
    public void A_book_of_a_newer_version_is_refused_with_a_sentence_and_left_alone()
    {
        using var folder = new BookFolder();
        using (JobBook book = folder.Open())
            BookFolder.Fill(book);
        Raw(folder.Path, "PRAGMA user_version = 99");
        byte[] before = File.ReadAllBytes(folder.Path);
        foreach (BookAccess access in Enum.GetValues<BookAccess>())
        {
            JobBookException e = Assert.Throws<JobBookException>(() => folder.Open(access));
            Assert.Equal($"{folder.Path}: this book is of version 99, made by a newer TrimFit; this program knows versions up to {Schema.Version}. The book was left alone: use the newer program.", e.Message);
        }
        Assert.Equal(before, File.ReadAllBytes(folder.Path));
    }

    [Fact]
    public void What_is_no_book_is_refused_and_left_alone()
    {
        using var folder = new BookFolder();
        Assert.Contains("no job book is there", Message(() => folder.Open(BookAccess.Write)), StringComparison.Ordinal);
        Assert.False(File.Exists(folder.Path));
        Assert.Contains("found a folder", Message(() => JobBook.Open(Path.GetDirectoryName(folder.Path)!, BookAccess.Create, BookFolder.At)), StringComparison.Ordinal);
        Assert.Contains("there is no folder", Message(() => JobBook.Open(folder["none/b.trimfit-book"], BookAccess.Create, BookFolder.At)), StringComparison.Ordinal);
        File.WriteAllText(folder["log.csv"], "time,rpm\n" + RandomText(5000));
        Assert.Contains("another kind of file", Message(() => JobBook.Open(folder["log.csv"], BookAccess.Create, BookFolder.At)), StringComparison.Ordinal);
        Raw(folder["other.db"], "CREATE TABLE t(x)");
        byte[] other = File.ReadAllBytes(folder["other.db"]);
        Assert.Contains("another program's database", Message(() => JobBook.Open(folder["other.db"], BookAccess.Create, BookFolder.At)), StringComparison.Ordinal);
        Assert.Equal(other, File.ReadAllBytes(folder["other.db"]));
        File.WriteAllBytes(folder.Path, []);
        Assert.Contains("is empty", Message(() => folder.Open(BookAccess.Read)), StringComparison.Ordinal);
    }

    [Fact]
    public void A_full_disk_says_so_and_keeps_nothing_of_the_action()
    {
        using var folder = new BookFolder();
        using JobBook book = folder.Open();
        long job = BookFolder.Fill(book);
        string before = JobText.Write(book.Job(job));
        book.LimitPages(60);
        JobBookException e = Assert.Throws<JobBookException>(() => book.AddFlight(job, BookFolder.NewFlight(1, RandomText(1_000_000)), BookFolder.At));
        Assert.Equal($"{folder.Path}: the disk is full. Nothing of this action was kept; the book is as it was. Make room and do it again.", e.Message);
        Assert.Equal(before, JobText.Write(book.Job(job)));
        Assert.Empty(book.Damage());
        book.AddNote(job, "still works", BookFolder.At);
    }

    [Fact]
    public void An_action_that_fails_half_way_keeps_nothing()
    {
        using var folder = new BookFolder();
        using JobBook book = folder.Open();
        long job = BookFolder.Fill(book);
        string before = JobText.Write(book.Job(job));
        NewFlight flight = BookFolder.NewFlight(1, "another log");
        NewFlight broken = flight with { Result = flight.Result with { Record = flight.Result.Record with { Sensitivities = [new() { Source = "pair", LogMedian = 0, LogSd = -1, SuspendedKg = 100 }] } } };
        Assert.Throws<JobBookException>(() => book.AddFlight(job, broken, BookFolder.At));
        Assert.Equal(before, JobText.Write(book.Job(job)));
        Assert.Throws<JobBookException>(() => book.Content(Packed.Sha256("another log"u8)));
    }

    [Fact]
    public async Task Two_programs_may_write_at_once_and_nothing_is_lost()
    {
        using var folder = new BookFolder();
        using (JobBook book = folder.Open())
            BookFolder.Fill(book);
        await Task.WhenAll(Enumerable.Range(0, 4).Select(w => Task.Run(() =>
        {
            using JobBook book = folder.Open(BookAccess.Write);
            for (int i = 0; i < 25; i++)
                book.AddFlight(1, BookFolder.NewFlight(1, $"log {w} {i}"), BookFolder.At);
        }, TestContext.Current.CancellationToken)));
        using JobBook all = folder.Open(BookAccess.Read);
        JobRecord job = all.Job(1);
        Assert.Equal(Enumerable.Range(1, 101), job.Flights.Select(f => f.Number));
        Assert.Equal(101, job.Results.Select(r => r.Sha256).Distinct().Count());
        Assert.Empty(all.Damage());
    }

    [Fact]
    public async Task Two_programs_may_make_the_same_book_at_once()
    {
        using var folder = new BookFolder();
        await Task.WhenAll(Enumerable.Range(0, 6).Select(_ => Task.Run(() =>
        {
            using JobBook book = folder.Open();
            book.AddJob(BookFolder.NewJob(), null, BookFolder.At);
        }, TestContext.Current.CancellationToken)));
        using JobBook all = folder.Open(BookAccess.Read);
        Assert.Equal([6, 5, 4, 3, 2, 1], all.List().Select(j => j.Number));
    }

    [Fact]
    [System.Runtime.Versioning.UnsupportedOSPlatform("windows")]
    public void Nobody_else_may_read_a_new_book()
    {
        Assert.SkipWhen(OperatingSystem.IsWindows(), "file modes are Unix's");
        using var folder = new BookFolder();
        folder.Open().Dispose();
        Assert.Equal(UnixFileMode.UserRead | UnixFileMode.UserWrite, File.GetUnixFileMode(folder.Path));
    }

    [Fact]
    public void The_default_book_is_in_the_users_data_folder()
    {
        string? path = JobBook.DefaultPath;
        Assert.SkipWhen(path is null, "this account has no home");
        Assert.EndsWith(Path.Combine("trimfit", "jobs.trimfit-book"), path, StringComparison.Ordinal);
    }

    private static string Message(Action action) => Assert.Throws<JobBookException>(action).Message;

    private static void Raw(string path, string sql)
    {
        using var connection = new SqliteConnection($"Data Source={path};Pooling=False");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }

    private static byte[] ReadShared(string path)
    {
        using var stream = new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite);
        byte[] bytes = new byte[stream.Length];
        stream.ReadExactly(bytes);
        return bytes;
    }

    /// <summary>Text that hardly packs.</summary>
    private static string RandomText(int length, int seed = 1)
    {
        var random = new Core.Statistics.SeededRandom((ulong)seed);
        return string.Create(length, random, static (span, r) =>
        {
            for (int i = 0; i < span.Length; i++)
                span[i] = (char)('!' + r.NextInt32(94));
        });
    }
}
