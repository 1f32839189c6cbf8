using TrimFit.Core.Logs;

namespace TrimFit.Import.Csv;

/// <summary>Tables as text: comma, semicolon, tab or pipe between the cells, one row per time.</summary>
public sealed class CsvLogFormat : ILogFormat
{
    /// <inheritdoc/>
    public string Name => "CSV";

    /// <inheritdoc/>
    public bool Recognises(ReadOnlySpan<byte> head, string fileName) => TextEncoding.Detect(head) is not null;

    /// <inheritdoc/>
    public LogTable Read(LogSource source, ImportOptions options)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(options);
        CsvHead head = CsvHead.Read(source);
        CsvPlan plan = CsvPlan.Create(source.Name, head, options);
        var rows = new CsvRows(source.Name, head, plan, options.Strict);
        if (!rows.Read(source, lineBreaksInQuotes: true, options.Progress))
        {
            plan = CsvPlan.Create(source.Name, head, options);
            rows = new CsvRows(source.Name, head, plan, options.Strict);
            rows.Read(source, lineBreaksInQuotes: false, options.Progress);
        }
        rows.Finish();
        if (rows.Count < 2)
            throw TooFewRows(source.Name, rows, head);
        var notices = new List<Notice>(plan.Notices);
        notices.AddRange(rows.Notices);
        CsvUnits units = CsvUnits.Resolve(source.Name, rows.TimeSec, plan.Columns, notices, out Dictionary<ChannelRole, double[]> columns);
        notices.AddRange(rows.LeftOut.Notices);
        return Table(source.Name, head, plan, rows, units, columns, notices);
    }

    private static LogTable Table(string file, CsvHead head, CsvPlan plan, CsvRows rows, CsvUnits units, Dictionary<ChannelRole, double[]> columns, List<Notice> notices)
    {
        ClockKind clock = plan.Time.Kind switch
        {
            CsvTimeKind.Elapsed => ClockKind.Elapsed,
            CsvTimeKind.TimeOfDay => ClockKind.TimeOfDay,
            _ => ClockKind.Absolute,
        };
        double[] time = rows.TimeSec;
        DateTimeOffset? origin = null;
        double first = time[0];
        if (clock == ClockKind.Absolute)
            origin = DateTimeOffset.UnixEpoch.AddSeconds(rows.ZeroSec).AddTicks((long)Math.Round(first * TimeSpan.TicksPerSecond));
        // A time of day stays one: zero is midnight.
        double zero = clock == ClockKind.TimeOfDay ? -rows.ZeroSec : first;
        if (zero != 0) // exact: nothing to take off
        {
            for (int i = 0; i < time.Length; i++)
                time[i] -= zero;
        }
        return new LogTable
        {
            File = new InputFile
            {
                Name = file,
                Sha256 = rows.Sha256,
                Format = head.Describe(),
                RowsRead = rows.RowsRead,
                LeftOut = [.. rows.LeftOut.Reasons],
                Columns = [.. plan.Columns.Select(c => c.ToUse())],
            },
            Clock = clock,
            Origin = origin,
            IsUtc = clock != ClockKind.Elapsed && (plan.Time.IsUtc || rows.SawZone),
            ElapsedStartSec = clock == ClockKind.Elapsed ? rows.ZeroSec + first : 0,
            TimeSec = time,
            Columns = columns,
            BrakeUnit = units.BrakeUnit,
            TrimmerUnit = units.TrimmerUnit,
            Warnings = notices,
        };
    }

    private static LogFormatException TooFewRows(string file, CsvRows rows, CsvHead head)
    {
        string why = string.Join("; ", rows.LeftOut.Reasons.Select(r => FormattableString.Invariant($"{r.Rows} × {r.Reason}, first in line {r.FirstLine}")));
        return LogFormatException.At(file, head.DataLine, null, FormattableString.Invariant($"{rows.Count} usable of {rows.RowsRead} rows{(why.Length > 0 ? $" ({why})" : "")}"),
            "at least two rows", "Correct the file, or say with --column what its columns are.");
    }
}
