using TrimFit.Core.Logs;

namespace TrimFit.Import.Csv;

/// <summary>Counts the rows left out, by reason, and makes the message of the first of each.</summary>
internal sealed class CsvLeftOut(string file, bool strict)
{
    private readonly List<Entry> _entries = [];

    /// <summary>Rows left out so far.</summary>
    public int Rows => _entries.Sum(e => e.Rows);

    /// <summary>By reason, in the order of their first rows.</summary>
    public IEnumerable<RowsLeftOut> Reasons => _entries.Select(e => new RowsLeftOut(e.Reason, e.Rows, e.FirstLine));

    /// <summary>One sentence for each reason.</summary>
    public IEnumerable<Notice> Notices => _entries.Select(e => new Notice("rows_left_out", e.Sentence()));

    /// <summary>Counts one row.</summary>
    /// <param name="code">Tells the reasons apart, with the column.</param>
    /// <param name="line">The row's line.</param>
    /// <param name="column">Column at fault; null when it is the row.</param>
    /// <param name="describe">Makes the texts; called for the first row of a reason only.</param>
    /// <exception cref="LogFormatException">Rows must not be left out (strict).</exception>
    public void Add(string code, int line, string? column, Func<LeftOutText> describe)
    {
        foreach (Entry entry in _entries)
        {
            if (entry.Code == code && entry.Column == column)
            {
                entry.Rows++;
                entry.LastLine = line;
                return;
            }
        }
        LeftOutText text = describe();
        if (strict)
            throw LogFormatException.At(file, line, column, text.Found, text.Expected, $"{text.Remedy} Without --strict the row is left out.");
        _entries.Add(new Entry { File = file, Code = code, Column = column, Reason = text.Reason, Problem = text.Problem, Remedy = text.NoticeRemedy, FirstLine = line, LastLine = line, Rows = 1 });
    }

    private sealed class Entry
    {
        public required string File { get; init; }
        public required string Code { get; init; }
        public required string? Column { get; init; }
        public required string Reason { get; init; }
        public required string Problem { get; init; }
        public required string? Remedy { get; init; }
        public required int FirstLine { get; init; }
        public int LastLine { get; set; }
        public int Rows { get; set; }

        public string Sentence()
        {
            string place = Column is null ? "" : $", {Column}";
            string rows = Rows == 1 ? "Row left out." : FormattableString.Invariant($"{Rows} rows left out for this, lines {FirstLine} to {LastLine}.");
            return FormattableString.Invariant($"{File}({FirstLine}{place}): {Problem} {rows}") + (Remedy is null ? "" : $" {Remedy}");
        }
    }
}

/// <summary>Texts about a row left out.</summary>
/// <param name="Reason">A few words for the count, the same for all rows of the kind.</param>
/// <param name="Problem">A sentence about the first row.</param>
/// <param name="Found">What was found, for the strict message.</param>
/// <param name="Expected">What was expected.</param>
/// <param name="Remedy">What to do, a sentence.</param>
/// <param name="NoticeRemedy">What to do when the rows were left out; null when nothing needs doing.</param>
internal sealed record LeftOutText(string Reason, string Problem, string Found, string Expected, string Remedy, string? NoticeRemedy = null);
