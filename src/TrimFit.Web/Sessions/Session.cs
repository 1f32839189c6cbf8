using System.Collections.Immutable;
using System.Globalization;
using TrimFit.Core.Ground;
using TrimFit.Reporting;
using TrimFit.Web.Flights;

namespace TrimFit.Web.Sessions;

/// <summary>What one browser is at work on. Nothing of it is reachable from another session.</summary>
internal sealed class Session(string id, string folder)
{
    /// <summary>Random, 256 bits; the cookie's value.</summary>
    public string Id { get; } = id;

    /// <summary>Folder of its uploads; made when the first comes.</summary>
    public string Folder { get; } = folder;

    /// <summary>One request of a session at a time changes it.</summary>
    public SemaphoreSlim Gate { get; } = new(1, 1);

    /// <summary>When it was last used.</summary>
    public DateTimeOffset LastUsed { get; set; }

    /// <summary>Units and number style.</summary>
    public ReportStyle Style { get; set; } = new();

    /// <summary>How far running work is; read without the gate.</summary>
    public WorkProgress Progress { get; } = new();

    /// <summary>What the pilot told; null before.</summary>
    public Complaint? Complaint { get; set; }

    /// <summary>The machine.</summary>
    public RigDraft Rig { get; set; } = RigDraft.None;

    /// <summary>The flight being worked on; null before a drop.</summary>
    public DroppedFlight? Flight { get; set; }

    /// <summary>Answers of this session, oldest first.</summary>
    public ImmutableArray<Answer> Answers { get; set; } = [];

    /// <summary>Number of the answer that is looked at.</summary>
    public int? CurrentAnswer { get; set; }

    /// <summary>The job that is worked on; null for none.</summary>
    public long? Job { get; set; }

    /// <summary>The latest proof of a change on the ground.</summary>
    public HangChangeReport? GroundProof { get; set; }

    /// <summary>The latest test card.</summary>
    public CardReport? Card { get; set; }

    /// <summary>The latest comparison.</summary>
    public CompareReport? Comparison { get; set; }

    /// <summary>Files of the session on the disk, bytes.</summary>
    public long StoredBytes => Flight?.StoredBytes ?? 0;

    /// <summary>The answer that is looked at; null before the first.</summary>
    public Answer? Answer => Answers.FirstOrDefault(a => a.Number == CurrentAnswer) ?? (Answers.IsEmpty ? null : Answers[^1]);

    /// <summary>Deletes the files; the rest goes with the session itself.</summary>
    public void DeleteFiles()
    {
        try
        {
            if (Directory.Exists(Folder))
                Directory.Delete(Folder, recursive: true);
        }
        catch (IOException)
        {
            return; // a reader still holds one; the folder of all sessions goes at the end
        }
    }

    /// <summary>A name for a new file in the folder: a number, so that no name from outside ever reaches the file system.</summary>
    public string NewFile()
    {
        if (!Directory.Exists(Folder))
        {
            if (OperatingSystem.IsWindows())
                Directory.CreateDirectory(Folder);
            else
                Directory.CreateDirectory(Folder, UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute);
        }
        return Path.Combine(Folder, Interlocked.Increment(ref _files).ToString(CultureInfo.InvariantCulture));
    }

    private int _files;
}
