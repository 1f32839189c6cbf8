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
        if (CsvLongRows.Layout(head) is { } layout)
            return ReadLong(source, options, head, layout);
        CsvPlan plan = CsvPlan.Create(source.Name, head, options, source.Recording is not null);
        var rows = new CsvRows(source, head, plan, options.Strict);
        if (!rows.Read(source, lineBreaksInQuotes: true, options.Progress))
        {
            plan = CsvPlan.Create(source.Name, head, options, source.Recording is not null);
            rows = new CsvRows(source, head, plan, options.Strict);
            rows.Read(source, lineBreaksInQuotes: false, options.Progress);
        }
        rows.Finish();
        return Table(source.Name, head, plan.Time, plan.Columns, plan.Columns, [.. plan.Notices, .. rows.Notices], rows);
    }

    // One value per row: the time comes from the file's columns, the rest from the channels.
    private static LogTable ReadLong(LogSource source, ImportOptions options, CsvHead head, CsvLongLayout layout)
    {
        CsvPlan timePlan = CsvPlan.CreateForTime(source.Name, head, options);
        var rows = new CsvLongRows(source.Name, head, layout, timePlan.Time, options);
        rows.Read(source, options.Progress);
        CsvPlan plan = CsvPlan.CreateForChannels(source.Name, head, rows.Finish(), options);
        return Table(source.Name, head, timePlan.Time, [.. timePlan.Columns.Where(c => c.Role is not null), .. plan.Columns], plan.Columns, [.. timePlan.Notices, .. plan.Notices], rows);
    }

    private static LogTable Table(string file, CsvHead head, CsvTime timing, IReadOnlyList<CsvColumn> all, IReadOnlyList<CsvColumn> channels, List<Notice> notices, ICsvRows rows)
    {
        if (rows.Count < 2)
            throw TooFewRows(file, rows, head);
        CsvUnits units = CsvUnits.Resolve(file, rows.TimeSec, channels, notices, out Dictionary<ChannelRole, double[]> columns);
        notices.AddRange(rows.LeftOut.Notices);
        CsvTime dated = rows.AnchorSec is null ? timing : timing.Anchor!;
        ClockKind clock = dated.Kind switch
        {
            CsvTimeKind.Elapsed => ClockKind.Elapsed,
            CsvTimeKind.TimeOfDay or CsvTimeKind.ClockOfDateTime => ClockKind.TimeOfDay,
            _ => ClockKind.Absolute,
        };
        double[] time = rows.TimeSec;
        double first = time[0];
        // Zero of the result: the first row, and midnight for a time of day.
        double zero = clock == ClockKind.TimeOfDay ? -(rows.AnchorSec ?? rows.ZeroSec) : first;
        DateTimeOffset? origin = clock != ClockKind.Absolute ? null
            : rows.AnchorSec is { } anchor ? DateTimeOffset.UnixEpoch.AddTicks((long)Math.Round((anchor + first) * TimeSpan.TicksPerSecond))
            : DateTimeOffset.UnixEpoch.AddSeconds(rows.ZeroSec).AddTicks((long)Math.Round(first * TimeSpan.TicksPerSecond));
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
                Columns = [.. all.Select(c => c.ToUse())],
            },
            Clock = clock,
            Origin = origin,
            IsUtc = clock != ClockKind.Elapsed && (dated.IsUtc || rows.SawZone),
            ElapsedStartSec = clock == ClockKind.Elapsed ? rows.ZeroSec + first : 0,
            TimeSec = time,
            Columns = columns,
            BrakeUnit = units.BrakeUnit,
            TrimmerUnit = units.TrimmerUnit,
            Warnings = notices,
        };
    }

    private static LogFormatException TooFewRows(string file, ICsvRows rows, CsvHead head)
    {
        string why = string.Join("; ", rows.LeftOut.Reasons.Select(r => FormattableString.Invariant($"{r.Rows} × {r.Reason}, first in line {r.FirstLine}")));
        return LogFormatException.At(file, head.DataLine, null, FormattableString.Invariant($"{rows.Count} usable of {rows.RowsRead} rows{(why.Length > 0 ? $" ({why})" : "")}"),
            "at least two rows", "Correct the file, or say with --column what its columns are.");
    }
}
