using System.IO.Compression;
using System.Text;
using TrimFit.Core.Workshop;
using TrimFit.Jobs;

namespace TrimFit.Tests.Jobs;

public class JobZipTests
{
    [Fact]
    public void An_exported_job_is_the_same_in_another_book()
    {
        using BookFolder folder = new(), other = new();
        using JobBook book = folder.Open(), to = other.Open();
        BookFolder.Fill(to);
        BookFolder.Fill(to, "a log of another job");
        long number = BookFolder.Fill(book, "time,rpm\n0,1\n");
        byte[] zip = Zip(book.Bundle(number));
        JobRecord there = to.Import(JobZip.Read("j.zip", new MemoryStream(zip)));
        Assert.Equal(3, there.Number);
        Assert.Equal(JobText.Write(book.Job(number)), JobText.Write(there with { Number = number }));
        Assert.Equal(zip, Zip(to.Bundle(3) with { Job = there with { Number = number } })); // byte for byte, whenever it is made
        foreach (string sha256 in JobBundle.NamedBy(there))
            Assert.Equal(book.Content(sha256), to.Content(sha256));
        Assert.Empty(to.Damage());
        Assert.Equal($"{Path.GetFileName(other.Path)}: this job is already here as job 3. Delete that one first if the other is to take its place.",
            Assert.Throws<JobBookException>(() => to.Import(JobZip.Read("j.zip", new MemoryStream(zip)))).Message);
    }

    public static TheoryData<string, string> Hostile => new()
    {
        { "slip", "found a file \"../../evil.txt\", expected job.json and content/SHA-256 only" },
        { "absolute", "found a file \"/tmp/evil\", expected job.json and content/SHA-256 only" },
        { "content slip", "found a file \"content/../job.json\", expected job.json and content/SHA-256 only" },
        { "two jobs", "found two files job.json, expected one" },
        { "two contents", "found two files content/" },
        { "wrong bytes", "whose bytes have another SHA-256, expected the bytes that were exported" },
        { "missing", "which job.json names, expected every file of the job" },
        { "extra", "which job.json does not name, expected the files of the job only" },
        { "no job", "found no job.json" },
        { "bomb", "found a zip that unpacks to far more than a job" },
        { "lying bomb", "Nothing was imported." },
        { "many", "20001 files" },
        { "no zip", "found a damaged zip or none at all" },
        { "cut", "Nothing was imported." },
    };

    [Theory]
    [MemberData(nameof(Hostile))]
    public void A_hostile_zip_is_refused_with_a_reason_and_the_book_is_as_it_was(string how, string expected)
    {
        using BookFolder folder = new(), other = new();
        using JobBook book = folder.Open(), to = other.Open();
        BookFolder.Fill(to);
        byte[] bytes = Spoil(how, book.Bundle(BookFolder.Fill(book, "a log")));
        JobBookException e = Assert.Throws<JobBookException>(() => to.Import(JobZip.Read("j.zip", new MemoryStream(bytes), mostBytes: 1 << 20)));
        Assert.Contains(expected, e.Message, StringComparison.Ordinal);
        Assert.StartsWith("j.zip: ", e.Message, StringComparison.Ordinal);
        Assert.Single(to.List());
        Assert.Empty(to.Damage());
    }

    [Theory]
    [InlineData("\"schema\": \"trimfit-job/1\"", "\"schema\": \"trimfit-job/2\"", "j.zip/job.json: found schema \"trimfit-job/2\", expected trimfit-job/1")]
    [InlineData("\"complaint\"", "\"grievance\"", "found JSON that is no job")]
    [InlineData("\"complaint\": \"pulls left at full power\"", "\"complaint\": null", "found JSON that is no job")]
    [InlineData("\"rig_name\": \"rig.toml\"", "\"rig_name\": \"../../rig.toml\"", "setups.rig_name is not what it should be, expected a file name without a folder")]
    [InlineData("\"name\": \"flight.csv\"", "\"name\": \"..\"", "flights.inputs.name is not what it should be")]
    [InlineData("\"setup\": 2", "\"setup\": 7", "is not what it should be, expected a number from 1 to 2")]
    [InlineData("\"changed_from\": 1", "\"changed_from\": 2", "setups.changed_from is not what it should be")]
    [InlineData("\"kind\": \"carabiner_pair\"", "\"kind\": \"wheel\"", "adjustments.kind is not what it should be")]
    [InlineData("\"unit\": \"mm\",\n      \"recommended_by\"", "\"unit\": \"in\",\n      \"recommended_by\"", "adjustments.unit is not what it should be, expected mm")]
    [InlineData("\"log_sd\": 0.4", "\"log_sd\": -0.4", "results.sensitivities.log_sd is not what it should be, expected a number above 0")]
    [InlineData("\"rate_low95\": -1.7", "\"rate_low95\": 1.7", "results.rate_low95 is not what it should be")]
    [InlineData("\"date\": \"2026-05-17\"", "\"date\": \"17.05.2026\"", "signatures.date is not what it should be")]
    [InlineData("\"opened\": \"2026-05-17T07:40:00.000Z\"", "\"opened\": \"yesterday\"", "opened is not what it should be")]
    [InlineData("\"uid\": \"", "\"uid\": \"x", "uid is not what it should be, expected 32 hex digits")]
    [InlineData("\"number\": 2,", "\"number\": 5,", ".number is not what it should be, expected 1, 2, 3")]
    [InlineData("\"machine\": \"Demo machine\"", "\"machine\": \"Demo machine\",\n  \"machine\": \"Other\"", "found JSON that is no job")]
    public void A_job_that_was_tampered_with_is_refused_at_the_value(string from, string to, string expected)
    {
        using var folder = new BookFolder();
        using JobBook book = folder.Open();
        JobBundle bundle = book.Bundle(BookFolder.Fill(book));
        string json = JobText.Write(bundle.Job);
        Assert.Contains(from, json, StringComparison.Ordinal);
        byte[] zip = Zip(bundle, json: Replaced(json, from, to));
        Assert.Contains(expected, Assert.Throws<JobBookException>(() => JobZip.Read("j.zip", new MemoryStream(zip))).Message, StringComparison.Ordinal);
    }

    private static string Replaced(string text, string from, string to)
    {
        int at = text.IndexOf(from, StringComparison.Ordinal);
        return text[..at] + to + text[(at + from.Length)..];
    }

    private static byte[] Zip(JobBundle bundle, Action<ZipArchive>? more = null, string? json = null, Func<string, bool>? keep = null, Func<byte[], byte[]>? spoil = null)
    {
        using var stream = new MemoryStream();
        if (more is null && json is null && keep is null && spoil is null)
        {
            JobZip.Write(bundle, stream);
            return stream.ToArray();
        }
        using (var zip = new ZipArchive(stream, ZipArchiveMode.Create, leaveOpen: true))
        {
            if (keep is null || keep("job.json"))
                Put(zip, "job.json", Encoding.UTF8.GetBytes(json ?? JobText.Write(bundle.Job)));
            foreach ((string sha256, ReadOnlyMemory<byte> bytes) in bundle.Contents)
            {
                if (keep is null || keep(sha256))
                    Put(zip, "content/" + sha256, spoil is null ? bytes.ToArray() : spoil(bytes.ToArray()));
            }
            more?.Invoke(zip);
        }
        return stream.ToArray();
    }

    private static void Put(ZipArchive zip, string name, byte[] bytes)
    {
        using Stream entry = zip.CreateEntry(name, CompressionLevel.Optimal).Open();
        entry.Write(bytes);
    }

    private static byte[] Spoil(string how, JobBundle bundle)
    {
        string first = bundle.Contents.Keys.First();
        switch (how)
        {
            case "slip":
                return Zip(bundle, z => Put(z, "../../evil.txt", [1]));
            case "absolute":
                return Zip(bundle, z => Put(z, "/tmp/evil", [1]));
            case "content slip":
                return Zip(bundle, z => Put(z, "content/../job.json", [1]));
            case "two jobs":
                return Zip(bundle, z => Put(z, "job.json", Encoding.UTF8.GetBytes(JobText.Write(bundle.Job))));
            case "two contents":
                return Zip(bundle, z => Put(z, "content/" + first, bundle.Contents[first].ToArray()));
            case "wrong bytes":
                return Zip(bundle, spoil: bytes => [.. bytes, 0]);
            case "missing":
                return Zip(bundle, keep: name => name != first);
            case "extra":
                return Zip(bundle, z => Put(z, "content/" + Packed.Sha256("stowaway"u8), "stowaway"u8.ToArray()));
            case "no job":
                return Zip(bundle, keep: name => name != "job.json");
            case "bomb":
                return Zip(bundle, z => Put(z, "content/" + new string('a', 64), new byte[64 << 20]));
            case "lying bomb":
                byte[] zip = Zip(bundle, z => Put(z, "content/" + new string('a', 64), new byte[64 << 20]));
                // The true length, 64 MiB, stands little-endian in the central directory and behind the data; say 64 bytes instead.
                for (int i = 0; i + 4 <= zip.Length; i++)
                {
                    if (zip[i] == 0 && zip[i + 1] == 0 && zip[i + 2] == 0 && zip[i + 3] == 4)
                        (zip[i], zip[i + 3]) = (64, 0);
                }
                return zip;
            case "many":
                return Zip(bundle, z =>
                {
                    for (int i = bundle.Contents.Count + 1; i < 20_001; i++)
                        z.CreateEntry("content/" + i.ToString("x64", System.Globalization.CultureInfo.InvariantCulture));
                });
            case "no zip":
                return "this is no zip"u8.ToArray();
            default:
                byte[] whole = Zip(bundle);
                return whole[..(whole.Length / 2)];
        }
    }
}
