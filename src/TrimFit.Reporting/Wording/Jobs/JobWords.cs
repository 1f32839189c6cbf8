using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Reporting.Jobs;

namespace TrimFit.Reporting.Wording;

/// <summary>What people read about the job book, in one language.</summary>
internal abstract record JobWords
{
    public abstract string ListTitle { get; }
    public abstract string JobTitle(long number);
    public abstract string HistoryTitle { get; }
    public abstract string Job { get; }
    public abstract string Opened { get; }
    public abstract string Machine { get; }
    public abstract string Customer { get; }
    public abstract string Wing { get; }
    public abstract string Complaint { get; }
    public abstract string Setups { get; }
    public abstract string Setup { get; }
    public abstract string Flights { get; }
    public abstract string Flight { get; }
    public abstract string Results { get; }
    public abstract string Adjustments { get; }
    public abstract string Checks { get; }
    public abstract string Check { get; }
    public abstract string Notes { get; }
    public abstract string Signatures { get; }
    public abstract string Date { get; }
    public abstract string Time { get; }
    public abstract string What { get; }
    public abstract string RigFile { get; }
    public abstract string Files { get; }
    public abstract string Turn { get; }
    public abstract string Verdict { get; }
    public abstract string State { get; }
    public abstract string Signed { get; }
    public abstract string Unsigned { get; }
    public abstract string Outcome { get; }
    public abstract string Found { get; }
    public abstract string By { get; }
    public abstract string Recommended { get; }
    public abstract string Readings { get; }
    public abstract string SignedBy { get; }
    public abstract string Wings { get; }
    public abstract string MemoryTitle { get; }

    /// <summary>The verdict of a result, by its word in JSON, shortly.</summary>
    public abstract string VerdictWord(string code);

    /// <summary>First sentence about a job.</summary>
    public abstract string Answer(JobRecord job, Numbers numbers);

    /// <summary>First sentence of the list.</summary>
    public abstract string ListAnswer(int jobs, int flights, long bytes, Numbers numbers);

    /// <summary>What a setup came from.</summary>
    public abstract string SetupOrigin(SetupRecord setup);

    /// <summary>Whose word a signature is.</summary>
    public abstract string SignatureIsTheirs { get; }

    /// <summary>Role of a file.</summary>
    public abstract string Role(string role);

    /// <summary>Outcome of a check.</summary>
    public abstract string OutcomeOf(CheckOutcome outcome);

    /// <summary>Name of a check.</summary>
    public abstract string CheckName(string code);

    /// <summary>One reading as measured.</summary>
    public abstract string Reading(ReadingRecord reading, Numbers numbers);

    /// <summary>What was read, such as <c>left riser carabiner</c>.</summary>
    public abstract string ReadingName(string key);

    /// <summary>A reading's number with its unit and side.</summary>
    public abstract string ReadingValue(ReadingRecord reading, Numbers numbers);

    /// <summary>The first and the last flight for the customer, without statistics.</summary>
    public abstract string Measured(ResultRecord first, ResultRecord? last, Numbers numbers);

    /// <summary>What was moved, for the customer.</summary>
    public abstract string Changed(IEnumerable<AdjustmentRecord> adjustments, Numbers numbers);

    /// <summary>One check for the customer.</summary>
    public abstract string CheckLine(CheckRecord check, Numbers numbers);

    /// <summary>Who signed and when.</summary>
    public abstract string SignedAs(SignatureRecord signature);

    /// <summary>One line of a history.</summary>
    public abstract string Event(JobEvent what, Numbers numbers);

    /// <summary>What was kept after an action.</summary>
    public abstract string Kept(JobEvent what, long job, Numbers numbers);

    /// <summary>What the shop's memory says; null when it is too small to say anything.</summary>
    public abstract string Memory(ShopMemory? memory, int wings, Numbers numbers);

    /// <summary>A wing that was set aside.</summary>
    public abstract string SetAside(SetAsideWing wing, Numbers numbers);

    /// <summary>A travel as measured is more than one step off the recommendation, or the readings do not fit the part.</summary>
    public abstract string AskAgain(AdjustmentKind kind, MovedPart moved, double? recommended, Numbers numbers);

    /// <summary>A setup without both hang checks.</summary>
    public abstract string NoHangChange { get; }

    /// <summary>The instruction after an adjustment.</summary>
    public abstract string AfterAdjustment { get; }

    /// <summary>Where the book is.</summary>
    public abstract string BookAt(string path);

    /// <summary>An export.</summary>
    public abstract string Exported(long job, string file, long bytes, Numbers numbers);

    /// <summary>An import.</summary>
    public abstract string Imported(long job, long numberThere);

    /// <summary>A delete.</summary>
    public abstract string Deleted(long job, int flights, int files, bool roomGivenBack);

    /// <summary>Asks before a delete.</summary>
    public abstract string AskDelete(JobRecord job);

    /// <summary>Bytes as people read them.</summary>
    public abstract string Size(long bytes, Numbers numbers);
}
