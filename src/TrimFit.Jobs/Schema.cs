namespace TrimFit.Jobs;

/// <summary>Tables of a book, by version. A version that was released is never edited: a change is one more step.</summary>
/// <remarks>Numbers are SI. Bytes of logs, rig files, sheets and results lie in <c>content</c> under their SHA-256, each once, packed with Brotli.
/// Setups, inputs, results and adjustments are never updated: triggers refuse it whatever program tries.</remarks>
internal static class Schema
{
    /// <summary>Marks the file as a job book in the SQLite header ("TFJB").</summary>
    public const int ApplicationId = 0x54464A42;

    /// <summary>The version this program writes.</summary>
    public static int Version => Steps.Length;

    /// <summary>Steps from version to version; step i leads to version i + 1.</summary>
    public static readonly string[] Steps =
    [
        """
        CREATE TABLE migration(version INTEGER PRIMARY KEY, applied TEXT NOT NULL) STRICT;

        CREATE TABLE content(sha256 TEXT NOT NULL PRIMARY KEY CHECK(length(sha256) = 64), bytes INTEGER NOT NULL, packed BLOB NOT NULL) STRICT;

        CREATE TABLE job(
            id INTEGER PRIMARY KEY AUTOINCREMENT, uid TEXT NOT NULL UNIQUE, opened TEXT NOT NULL, complaint TEXT NOT NULL, machine TEXT NOT NULL,
            customer TEXT NOT NULL, wing TEXT NOT NULL, wing_id TEXT NOT NULL) STRICT;

        CREATE TABLE setup(
            job INTEGER NOT NULL REFERENCES job ON DELETE CASCADE, number INTEGER NOT NULL, made TEXT NOT NULL,
            rig_name TEXT NOT NULL, rig TEXT NOT NULL REFERENCES content, changed_from INTEGER, note TEXT NOT NULL,
            PRIMARY KEY(job, number), FOREIGN KEY(job, changed_from) REFERENCES setup(job, number) DEFERRABLE INITIALLY DEFERRED) STRICT, WITHOUT ROWID;
        CREATE INDEX setup_by_rig ON setup(rig);

        CREATE TABLE flight(
            job INTEGER NOT NULL REFERENCES job ON DELETE CASCADE, number INTEGER NOT NULL, added TEXT NOT NULL, setup INTEGER NOT NULL,
            flown TEXT, wing_id TEXT NOT NULL,
            PRIMARY KEY(job, number), FOREIGN KEY(job, setup) REFERENCES setup(job, number) DEFERRABLE INITIALLY DEFERRED) STRICT, WITHOUT ROWID;

        CREATE TABLE flight_input(
            job INTEGER NOT NULL, flight INTEGER NOT NULL, position INTEGER NOT NULL, role TEXT NOT NULL, name TEXT NOT NULL,
            content TEXT NOT NULL REFERENCES content,
            PRIMARY KEY(job, flight, position), FOREIGN KEY(job, flight) REFERENCES flight(job, number) ON DELETE CASCADE) STRICT, WITHOUT ROWID;
        CREATE INDEX flight_input_by_content ON flight_input(content);

        CREATE TABLE result(
            job INTEGER NOT NULL, number INTEGER NOT NULL, made TEXT NOT NULL, kind TEXT NOT NULL, flight INTEGER NOT NULL,
            program_version TEXT NOT NULL, options TEXT NOT NULL, content TEXT NOT NULL REFERENCES content,
            verdict TEXT NOT NULL, strength TEXT NOT NULL, rate REAL, rate_low REAL, rate_high REAL,
            PRIMARY KEY(job, number), FOREIGN KEY(job, flight) REFERENCES flight(job, number) ON DELETE CASCADE) STRICT, WITHOUT ROWID;
        CREATE INDEX result_by_content ON result(content);

        CREATE TABLE result_input(
            job INTEGER NOT NULL, result INTEGER NOT NULL, position INTEGER NOT NULL, role TEXT NOT NULL, name TEXT NOT NULL,
            content TEXT NOT NULL REFERENCES content,
            PRIMARY KEY(job, result, position), FOREIGN KEY(job, result) REFERENCES result(job, number) ON DELETE CASCADE) STRICT, WITHOUT ROWID;
        CREATE INDEX result_input_by_content ON result_input(content);

        CREATE TABLE sensitivity(
            job INTEGER NOT NULL, result INTEGER NOT NULL, position INTEGER NOT NULL, source TEXT NOT NULL,
            log_median REAL NOT NULL, log_sd REAL NOT NULL CHECK(log_sd > 0), wing_area REAL, suspended REAL NOT NULL CHECK(suspended > 0),
            PRIMARY KEY(job, result, position), FOREIGN KEY(job, result) REFERENCES result(job, number) ON DELETE CASCADE) STRICT, WITHOUT ROWID;

        CREATE TABLE adjustment(
            job INTEGER NOT NULL REFERENCES job ON DELETE CASCADE, number INTEGER NOT NULL, made TEXT NOT NULL,
            from_setup INTEGER NOT NULL, to_setup INTEGER NOT NULL, kind TEXT NOT NULL, travel REAL NOT NULL, recommended REAL, recommended_by INTEGER,
            confirmed INTEGER NOT NULL, person TEXT NOT NULL, note TEXT NOT NULL,
            PRIMARY KEY(job, number),
            FOREIGN KEY(job, from_setup) REFERENCES setup(job, number) DEFERRABLE INITIALLY DEFERRED,
            FOREIGN KEY(job, to_setup) REFERENCES setup(job, number) DEFERRABLE INITIALLY DEFERRED) STRICT, WITHOUT ROWID;

        CREATE TABLE adjustment_reading(
            job INTEGER NOT NULL, adjustment INTEGER NOT NULL, position INTEGER NOT NULL, key TEXT NOT NULL, value REAL NOT NULL,
            PRIMARY KEY(job, adjustment, position), FOREIGN KEY(job, adjustment) REFERENCES adjustment(job, number) ON DELETE CASCADE) STRICT, WITHOUT ROWID;

        CREATE TABLE checked(
            job INTEGER NOT NULL REFERENCES job ON DELETE CASCADE, number INTEGER NOT NULL, made TEXT NOT NULL, setup INTEGER,
            code TEXT NOT NULL, outcome TEXT NOT NULL, value REAL, unit TEXT NOT NULL, note TEXT NOT NULL, person TEXT NOT NULL,
            PRIMARY KEY(job, number)) STRICT, WITHOUT ROWID;

        CREATE TABLE note(
            job INTEGER NOT NULL REFERENCES job ON DELETE CASCADE, number INTEGER NOT NULL, made TEXT NOT NULL, words TEXT NOT NULL,
            PRIMARY KEY(job, number)) STRICT, WITHOUT ROWID;

        CREATE TABLE signature(
            job INTEGER NOT NULL REFERENCES job ON DELETE CASCADE, number INTEGER NOT NULL, made TEXT NOT NULL, name TEXT NOT NULL, day TEXT NOT NULL,
            setup INTEGER NOT NULL, note TEXT NOT NULL,
            PRIMARY KEY(job, number), FOREIGN KEY(job, setup) REFERENCES setup(job, number) DEFERRABLE INITIALLY DEFERRED) STRICT, WITHOUT ROWID;

        CREATE TABLE signature_reading(
            job INTEGER NOT NULL, signature INTEGER NOT NULL, position INTEGER NOT NULL, key TEXT NOT NULL, value REAL NOT NULL,
            PRIMARY KEY(job, signature, position), FOREIGN KEY(job, signature) REFERENCES signature(job, number) ON DELETE CASCADE) STRICT, WITHOUT ROWID;

        CREATE TRIGGER content_is_never_changed BEFORE UPDATE ON content BEGIN SELECT RAISE(ABORT, 'content is never changed'); END;
        CREATE TRIGGER setup_is_never_changed BEFORE UPDATE ON setup BEGIN SELECT RAISE(ABORT, 'a setup is never changed'); END;
        CREATE TRIGGER flight_is_never_changed BEFORE UPDATE ON flight BEGIN SELECT RAISE(ABORT, 'a flight is never changed'); END;
        CREATE TRIGGER flight_input_is_never_changed BEFORE UPDATE ON flight_input BEGIN SELECT RAISE(ABORT, 'a flight is never changed'); END;
        CREATE TRIGGER result_is_never_changed BEFORE UPDATE ON result BEGIN SELECT RAISE(ABORT, 'a result is never changed'); END;
        CREATE TRIGGER result_input_is_never_changed BEFORE UPDATE ON result_input BEGIN SELECT RAISE(ABORT, 'a result is never changed'); END;
        CREATE TRIGGER adjustment_is_never_changed BEFORE UPDATE ON adjustment BEGIN SELECT RAISE(ABORT, 'an adjustment is never changed'); END;
        CREATE TRIGGER signature_is_never_changed BEFORE UPDATE ON signature BEGIN SELECT RAISE(ABORT, 'a signature is never changed'); END;
        """,
    ];
}
