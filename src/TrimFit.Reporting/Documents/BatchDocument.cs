using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>The summary of <c>batch</c>.</summary>
internal static class BatchDocument
{
    public static ReportDocument Build(BatchSummary summary, Words words, Numbers numbers)
    {
        Labels l = words.Labels;
        (string machine, string flights, string answered, string cannotTell, string unreadable, string pull, string between) = words.Batch.Heads;
        var document = new DocumentBuilder(words);
        document.Answer(words.Batch.Answer(summary.Flights, summary.Machines.Sum(m => m.Unreadable)));
        document.Table(
            [
                new(machine, Numeric: false), new(flights), new(answered), new(cannotTell), new(unreadable), new(pull), new(l.Range95), new(between),
            ],
            summary.Machines.Select(m => (IReadOnlyList<string>)
            [
                m.Name, numbers.Integer(m.Flights), numbers.Integer(m.Answered), numbers.Integer(m.CannotTell), numbers.Integer(m.Unreadable),
                m.PullRadPerSec is double mean ? numbers.RateNumber(mean) : "-",
                m.Interval95 is { } interval ? numbers.RateRange(interval, l.To) : "-",
                m.BetweenRadPerSec is double sd ? numbers.RateNumber(sd) : "-",
            ]));
        document.Paragraph(words.Batch.Note);
        document.Cautions(Cautions.For(CautionPlaces.Everywhere), numbers);
        return document.Build(words.Batch.Title, "");
    }
}
