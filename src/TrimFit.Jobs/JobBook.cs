using System.Globalization;
using Microsoft.Data.Sqlite;

namespace TrimFit.Jobs;

/// <summary>The job book: one SQLite file with everything a workshop keeps. Takes and gives records and bytes; computes nothing.</summary>
/// <remarks>Write-ahead log, every action one transaction that is on the disk before the call returns; two programs may use a book at once, one
/// waits for the other. Faults are <see cref="JobBookException"/>, after which the book is as it was before the call.</remarks>
public sealed partial class JobBook : IDisposable
{
    /// <summary>Seconds to wait while another program writes.</summary>
    private const int BusySec = 30;

    private const int SqliteBusy = 5, SqliteLocked = 6, SqliteReadOnly = 8, SqliteIoError = 10, SqliteCorrupt = 11, SqliteFull = 13, SqliteCannotOpen = 14, SqliteNotADatabase = 26;

    private readonly SqliteConnection _connection;

    private JobBook(string path, SqliteConnection connection) => (Path, _connection) = (path, connection);

    /// <summary>Where the book is.</summary>
    public string Path { get; }

    private string Name => System.IO.Path.GetFileName(Path);

    /// <summary>Where a book is when nobody says: <c>trimfit/jobs.trimfit-book</c> in the user's data folder (XDG_DATA_HOME where it is set);
    /// null when the machine has no such folder.</summary>
    public static string? DefaultPath
    {
        get
        {
            string folder = Environment.GetFolderPath(Environment.SpecialFolder.LocalApplicationData, Environment.SpecialFolderOption.DoNotVerify);
            return folder.Length == 0 ? null : System.IO.Path.Combine(folder, "trimfit", "jobs.trimfit-book");
        }
    }

    /// <summary>Opens a book.</summary>
    /// <param name="path">Its file.</param>
    /// <param name="access">What for.</param>
    /// <param name="now">The time, for the account of what was done to the book.</param>
    /// <exception cref="JobBookException">The file is not there, is no book, is of a newer version, or cannot be written though it must be.</exception>
    public static JobBook Open(string path, BookAccess access, DateTimeOffset now)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        string name = System.IO.Path.GetFileName(path);
        if (Directory.Exists(path))
            throw new JobBookException($"{path}: found a folder, expected a job book. Name a file in it, such as --book {System.IO.Path.Combine(path, "jobs.trimfit-book")}.");
        bool fresh = !File.Exists(path);
        if (fresh && access != BookAccess.Create)
            throw new JobBookException($"{path}: no job book is there. \"trimfit job open\" makes one; --book names another.");
        if (fresh)
            MakeFile(path);
        SqliteConnection? connection = null;
        try
        {
            connection = access == BookAccess.Read ? ConnectToRead(path) : Connect(path, SqliteOpenMode.ReadWrite);
            var book = new JobBook(path, connection);
            book.CheckVersion(access, now);
            connection = null;
            return book;
        }
        catch (SqliteException e)
        {
            throw Explained(path, e, access != BookAccess.Read);
        }
        finally
        {
            connection?.Dispose();
            if (connection is not null && fresh)
                DropEmptyFile(path);
        }

        // A book that could not be filled with its tables is not left behind.
        static void DropEmptyFile(string path)
        {
            try
            {
                if (new FileInfo(path) is { Exists: true, Length: 0 })
                    File.Delete(path);
            }
            catch (Exception e) when (e is IOException or UnauthorizedAccessException)
            {
                return;
            }
        }
    }

    /// <summary>Closes the book.</summary>
    public void Dispose() => _connection.Dispose();

    /// <summary>Bytes that the book takes on the disk, its write-ahead log included.</summary>
    public long SizeOnDisk()
    {
        long size = 0;
        foreach (string file in new[] { Path, Path + "-wal" })
        {
            if (new FileInfo(file) is { Exists: true } info)
                size += info.Length;
        }
        return size;
    }

    /// <summary>Looks through the whole book for damage; empty when there is none. Takes as long as reading the file.</summary>
    public IReadOnlyList<string> Damage() => Reading(() =>
    {
        var found = _connection.Rows("PRAGMA integrity_check", r => r.GetString(0)).Where(line => line != "ok").ToList();
        found.AddRange(_connection.Rows("PRAGMA foreign_key_check", r => $"{r.GetString(0)} names something that is not there"));
        foreach ((string sha256, long bytes, byte[] packed) in _connection.Rows("SELECT sha256, bytes, packed FROM content", r => (r.GetString(0), r.GetInt64(1), (byte[])r.GetValue(2))))
        {
            if (Packed.Unpack(packed, bytes, sha256) is null)
                found.Add($"content {sha256} is not what was put in");
        }
        return found;
    });

    /// <summary>For tests: no more pages than this, as on a full disk.</summary>
    internal void LimitPages(long pages) => _connection.Run(string.Create(CultureInfo.InvariantCulture, $"PRAGMA max_page_count = {pages}"));

    /// <summary>For benchmarks only: does not wait for the disk.</summary>
    internal void DoNotWaitForTheDisk() => _connection.Run("PRAGMA synchronous = OFF");

    private static void MakeFile(string path)
    {
        try
        {
            string folder = System.IO.Path.GetDirectoryName(System.IO.Path.GetFullPath(path))!;
            if (path == DefaultPath && !OperatingSystem.IsWindows())
                Directory.CreateDirectory(folder, UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute);
            else if (path == DefaultPath)
                Directory.CreateDirectory(folder);
            if (!Directory.Exists(folder))
                throw new JobBookException($"{path}: there is no folder \"{folder}\". Make it, or name another file with --book.");
            var options = new FileStreamOptions { Mode = FileMode.OpenOrCreate, Access = FileAccess.ReadWrite, Share = FileShare.ReadWrite };
            if (!OperatingSystem.IsWindows())
                options.UnixCreateMode = UnixFileMode.UserRead | UnixFileMode.UserWrite; // customers' names and flights are nobody else's business
            new FileStream(path, options).Dispose();
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or NotSupportedException or ArgumentException)
        {
            throw new JobBookException($"{path}: a job book cannot be made there. Check the folder's rights and the room on the disk, or name another file with --book.", e);
        }
    }

    private static SqliteConnection Connect(string path, SqliteOpenMode mode, string query = "")
    {
        var text = new SqliteConnectionStringBuilder
        {
            DataSource = query.Length == 0 ? path : "file:" + Uri.EscapeDataString(System.IO.Path.GetFullPath(path)).Replace("%2F", "/", StringComparison.Ordinal) + query,
            Mode = mode,
            Pooling = false,
            ForeignKeys = true,
            DefaultTimeout = BusySec,
        };
        var connection = new SqliteConnection(text.ConnectionString);
        try
        {
            connection.Open();
            connection.Run("PRAGMA trusted_schema = OFF");
            connection.Run("PRAGMA synchronous = FULL"); // what was acknowledged outlives a power cut
            connection.Run("PRAGMA secure_delete = ON"); // a deleted job is gone, not only out of sight
            connection.Number("SELECT count(*) FROM sqlite_schema"); // the first read shows whether it can be read at all
            return connection;
        }
        catch
        {
            connection.Dispose();
            throw;
        }
    }

    /// <summary>As a writer where that is possible, since a reader cannot tidy up the write-ahead log; else without writing anything.</summary>
    private static SqliteConnection ConnectToRead(string path)
    {
        try
        {
            return Connect(path, SqliteOpenMode.ReadWrite);
        }
        catch (SqliteException e) when (e.SqliteErrorCode is SqliteReadOnly or SqliteCannotOpen)
        {
            try
            {
                return Connect(path, SqliteOpenMode.ReadOnly);
            }
            catch (SqliteException inner) when (inner.SqliteErrorCode is SqliteReadOnly or SqliteCannotOpen && new FileInfo(path + "-wal") is not { Exists: true, Length: > 0 })
            {
                return Connect(path, SqliteOpenMode.ReadOnly, "?immutable=1"); // nothing waits in a write-ahead log, so the file alone is the book
            }
        }
    }

    private void CheckVersion(BookAccess access, DateTimeOffset now)
    {
        long application = _connection.Number("PRAGMA application_id"), version = _connection.Number("PRAGMA user_version");
        bool empty = application == 0 && version == 0 && _connection.Number("SELECT count(*) FROM sqlite_schema") == 0;
        if (!empty && application != Schema.ApplicationId)
            throw new JobBookException($"{Path}: found another program's database, expected a job book. It was left alone; name the book with --book.");
        if (version > Schema.Version)
        {
            throw new JobBookException(string.Create(CultureInfo.InvariantCulture,
                $"{Path}: this book is of version {version}, made by a newer TrimFit; this program knows versions up to {Schema.Version}. The book was left alone: use the newer program."));
        }
        if (version == Schema.Version)
            return;
        if (empty && access != BookAccess.Create)
            throw new JobBookException($"{Path}: this job book is empty. \"trimfit job open\" fills it.");
        Upgrade(now);
    }

    /// <summary>Brings the book to this program's version, in one transaction; another program may have done it meanwhile.</summary>
    private void Upgrade(DateTimeOffset now)
    {
        _connection.Run("PRAGMA journal_mode = WAL");
        using SqliteTransaction transaction = _connection.BeginTransaction(deferred: false);
        long version = _connection.Number("PRAGMA user_version");
        for (int step = (int)version; step < Schema.Version; step++)
        {
            _connection.Run(Schema.Steps[step]);
            _connection.Run("INSERT INTO migration(version, applied) VALUES ($1, $2)", step + 1, Statements.TextOf(now));
        }
        _connection.Run(string.Create(CultureInfo.InvariantCulture, $"PRAGMA application_id = {Schema.ApplicationId}"));
        _connection.Run(string.Create(CultureInfo.InvariantCulture, $"PRAGMA user_version = {Schema.Version}"));
        transaction.Commit();
    }

    /// <summary>One action: all of it is kept, or nothing.</summary>
    private T Writing<T>(Func<T> action)
    {
        try
        {
            using SqliteTransaction transaction = _connection.BeginTransaction(deferred: false);
            T result = action();
            transaction.Commit();
            return result;
        }
        catch (SqliteException e)
        {
            throw Explained(Path, e, writing: true);
        }
    }

    /// <summary>Reads the book as it is at one moment.</summary>
    private T Reading<T>(Func<T> action)
    {
        try
        {
            using SqliteTransaction transaction = _connection.BeginTransaction(deferred: true);
            return action();
        }
        catch (SqliteException e)
        {
            throw Explained(Path, e, writing: false);
        }
    }

    private static JobBookException Explained(string path, SqliteException e, bool writing)
    {
        string kept = writing ? " Nothing of this action was kept; the book is as it was." : "";
        string message = e.SqliteErrorCode switch
        {
            SqliteFull => $"{path}: the disk is full.{kept} Make room and do it again.",
            SqliteReadOnly => $"{path}: the book or its folder cannot be written.{kept} Check their rights, or copy the book to where you may write.",
            SqliteCannotOpen => $"{path}: the book cannot be opened. Check the rights of the book and of its folder.",
            SqliteIoError => $"{path}: the disk refused to read or write (error {e.SqliteExtendedErrorCode.ToString(CultureInfo.InvariantCulture)}).{kept} Check its room and its health.",
            SqliteBusy or SqliteLocked => $"{path}: another program has been writing into the book for {BusySec.ToString(CultureInfo.InvariantCulture)} s.{kept} Close it and do it again.",
            SqliteNotADatabase => $"{path}: found another kind of file, expected a job book. It was left alone; name the book with --book.",
            SqliteCorrupt => $"{path}: the book is damaged.{kept} Go back to the last copy; keep this file for who may mend it.",
            _ => $"{path}: the book refused: {e.Message.ReplaceLineEndings(" ")}.{kept}",
        };
        return new(message, e);
    }
}
