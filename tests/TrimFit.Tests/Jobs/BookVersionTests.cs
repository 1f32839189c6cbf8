using System.Globalization;
using System.Text;
using TrimFit.Core.Analysis;
using TrimFit.Core.Workshop;
using TrimFit.Import.Rigs;
using TrimFit.Jobs;

namespace TrimFit.Tests.Jobs;

/// <summary>Books of released versions are opened and read as they were written.</summary>
public class BookVersionTests
{
    private static string Data(string name) => Path.Combine(RepositoryRoot.Path, "tests", "TrimFit.Tests", "Data", "Jobs", name);

    [Theory]
    [InlineData("version-1")]
    public void A_book_of_an_older_version_reads_as_it_was_written(string version)
    {
        using var folder = new BookFolder();
        File.Copy(Data(version + ".trimfit-book"), folder.Path);
        if (!OperatingSystem.IsWindows())
            File.SetUnixFileMode(folder.Path, UnixFileMode.UserRead | UnixFileMode.UserWrite);
        using JobBook book = folder.Open(BookAccess.Write);
        if (Environment.GetEnvironmentVariable("TRIMFIT_MAKE_BOOK_FIXTURE") == version) // once, before a release
        {
            BookFolder.Fill(book);
            File.WriteAllText(Data(version + ".json"), Everything(book));
            book.Dispose();
            File.Copy(folder.Path, Data(version + ".trimfit-book"), overwrite: true);
            return;
        }
        Assert.Equal(File.ReadAllText(Data(version + ".json")), Everything(book)); // golden: written by that version
        Assert.Empty(book.Damage());
        foreach (JobSummary job in book.List())
        {
            foreach (string sha256 in JobBundle.NamedBy(book.Job(job.Number)))
                Assert.Equal(sha256, Packed.Sha256(book.Content(sha256)));
        }
        // It can be worked on.
        JobRecord first = book.Job(1);
        Assert.Equal(-227, Math.Round(1000 * RigFileReader.Read("rig.toml", Encoding.UTF8.GetString(book.Content(first.CurrentSetup!.RigSha256))).Carabiners.LeftM.Value, 6));
        book.AddNote(1, "opened by a later version", BookFolder.At);
        Assert.Equal(first.Notes.Length + 1, book.Job(1).Notes.Length);
    }

    private static string Everything(JobBook book)
    {
        var text = new StringBuilder();
        foreach (JobSummary job in book.List().OrderBy(j => j.Number))
            text.Append(JobText.Write(book.Job(job.Number)));
        foreach (MeasuredSensitivity m in book.Sensitivities())
            text.Append(CultureInfo.InvariantCulture, $"{m.Job} {m.WingId} {m.Source} {m.LogMedian:G9} {m.LogSd:G9} {m.WingAreaM2:G9} {m.SuspendedKg:G9}\n");
        return text.ToString();
    }
}
