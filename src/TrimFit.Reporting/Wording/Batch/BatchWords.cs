namespace TrimFit.Reporting.Wording.Batch;

/// <summary>Words of the summary of many flights.</summary>
internal abstract record BatchWords
{
    /// <summary>How many flights have a row, and where the rows are.</summary>
    public abstract string Answer(int flights, int unreadable);

    /// <summary>What the mean and the scatter are.</summary>
    public abstract string Note { get; }

    /// <summary>Title of the summary.</summary>
    public abstract string Title { get; }

    /// <summary>Column heads; rates are in deg/s.</summary>
    public abstract (string Machine, string Flights, string Answered, string CannotTell, string Unreadable, string Pull, string Between) Heads { get; }
}
