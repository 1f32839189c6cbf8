using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>What was read, as <c>inspect</c> and <c>fit</c> both show it.</summary>
internal static class DataTables
{
    public static IEnumerable<string> Facts(ImportDiagnostics diagnostics, Wind? wind, GyroReport? gyro, Words words, Numbers numbers)
    {
        if (diagnostics.Sampling.Start is DateTimeOffset start)
        {
            string clock = start.ToUniversalTime().ToString("yyyy-MM-dd HH:mm:ss", System.Globalization.CultureInfo.InvariantCulture);
            yield return diagnostics.Sampling.StartIsUtc ? clock + " UTC" : $"{clock} ({words.Labels.LoggersZone})";
        }
        yield return words.Wind(wind, numbers);
        if (words.Gyro(gyro, numbers) is { Length: > 0 } g)
            yield return g;
        foreach (TimeGap gap in diagnostics.Sampling.Gaps)
            yield return words.Gap(gap, numbers);
        foreach (InputFile file in diagnostics.Files)
        {
            foreach (RowsLeftOut left in file.LeftOut)
                yield return words.RowsLeftOut(file.Name, left, numbers);
        }
    }

    public static void Files(DocumentBuilder document, ImportDiagnostics diagnostics, Numbers numbers)
    {
        Labels l = document.Words.Labels;
        bool clocks = diagnostics.Files.Any(f => f.ClockOffsetSec is not null);
        List<TableColumn> columns = [new(l.File, false), new(l.Format, false), new(l.RowsRead), new(l.RowsLeftOut)];
        if (clocks)
            columns.Add(new(l.ClockShift));
        document.Table(columns, diagnostics.Files.Select(f =>
        {
            List<string> row = [f.Name, document.Words.Said(f.Format, numbers), numbers.Integer(f.RowsRead), numbers.Integer(f.LeftOut.Sum(x => x.Rows))];
            if (clocks)
                row.Add(f.ClockOffsetSec is double s ? numbers.Plain(s, 2) : "-");
            return (IReadOnlyList<string>)row;
        }));
    }

    public static void Columns(DocumentBuilder document, ImportDiagnostics diagnostics, Numbers numbers, bool usedOnly)
    {
        Labels l = document.Words.Labels;
        bool several = diagnostics.Files.Length > 1;
        document.Heading(l.Columns);
        List<TableColumn> columns = [new(l.Column, false), new(l.Role, false), new(l.Unit, false), new(l.Basis, false), new(l.Missing)];
        if (several)
            columns.Insert(0, new(l.File, false));
        document.Table(columns, diagnostics.Files.SelectMany(f => f.Columns.Where(c => !usedOnly || c.Role is not null).Select(c =>
        {
            List<string> row = [c.Name, c.Role is ChannelRole role ? ChannelRoles.NameOf(role) : l.NotUsed, c.Unit, document.Words.Said(c.Basis, numbers), numbers.Integer(c.Missing)];
            if (several)
                row.Insert(0, f.Name);
            return (IReadOnlyList<string>)row;
        })));
    }
}
