using System.Globalization;
using System.Text;
using TrimFit.Core.Logs;

namespace TrimFit.Simulation;

/// <summary>Writes a log the way loggers do.</summary>
public static partial class LogWriters
{
    /// <summary>A CSV log.</summary>
    /// <param name="log">The log.</param>
    /// <param name="dialect">How to write it; null is the plain dialect.</param>
    /// <param name="only">Channels of this logger; null is all. Rows without any value are left away.</param>
    /// <exception cref="ArgumentException">The dialect needs a date and the log has none, or separator and decimal mark are the same.</exception>
    public static byte[] Csv(FlightLog log, CsvDialect? dialect = null, IReadOnlySet<ChannelRole>? only = null)
    {
        ArgumentNullException.ThrowIfNull(log);
        dialect ??= new();
        if (dialect.DecimalComma && dialect.Separator == ',')
            throw new ArgumentException("a comma cannot be both separator and decimal mark", nameof(dialect));
        List<CsvColumn> columns = CsvColumn.For(log, only);
        var text = new StringBuilder();
        foreach (string line in dialect.Preamble)
            text.Append(line).Append(dialect.NewLine);
        string header = HeaderOf(columns, dialect);
        text.Append(header);
        int rows = 0;
        for (int i = 0; i < log.Count; i++)
        {
            if (columns.TrueForAll(c => double.IsNaN(log[c.Role][i])))
                continue;
            if (rows > 0 && dialect.RepeatHeaderEvery > 0 && rows % dialect.RepeatHeaderEvery == 0)
                text.Append(header);
            rows++;
            string time = Time(log, log.TimeSec[i] + dialect.ClockOffsetSec, dialect);
            if (dialect.LongFormat)
            {
                foreach (CsvColumn c in columns)
                {
                    double value = log[c.Role][i];
                    if (!double.IsNaN(value))
                        text.Append(time).Append(dialect.Separator).Append(c.Snake).Append(dialect.Separator).Append(Cell(c, value, dialect)).Append(dialect.NewLine);
                }
                continue;
            }
            text.Append(time);
            foreach (CsvColumn c in columns)
                text.Append(dialect.Separator).Append(Cell(c, log[c.Role][i], dialect));
            EndRow(text, dialect);
        }
        return Encode(text.ToString(), dialect.Encoding);
    }

    private static string HeaderOf(List<CsvColumn> columns, CsvDialect dialect)
    {
        if (dialect.Header == CsvHeader.None)
            return "";
        var text = new StringBuilder();
        (string snake, string words, string unit)[] time = dialect.Time switch
        {
            CsvTime.ElapsedSeconds => [("time_s", "Time", "s")],
            CsvTime.ElapsedMilliseconds => [("time_ms", "Time", "ms")],
            CsvTime.Iso8601 => [("time_utc", "Time UTC", "")],
            CsvTime.EpochSeconds => [("unix_time_s", "Unix time", "s")],
            CsvTime.EpochMilliseconds => [("unix_time_ms", "Unix time", "ms")],
            _ => [("date", "Date", ""), ("time_utc", "Time UTC", "")],
        };
        if (dialect.LongFormat)
        {
            text.AppendJoin(dialect.Separator, time.Select(t => t.snake)).Append(dialect.Separator).Append("channel").Append(dialect.Separator).Append("value");
            EndRow(text, dialect);
            return text.ToString();
        }
        switch (dialect.Header)
        {
            case CsvHeader.WordsAndBrackets:
                text.AppendJoin(dialect.Separator, time.Select(t => Bracketed(t.words, t.unit)).Concat(columns.Select(c => Bracketed(c.Words, c.Unit))));
                break;
            case CsvHeader.UnitsRow:
                text.AppendJoin(dialect.Separator, time.Select(t => t.words).Concat(columns.Select(c => c.Words)));
                EndRow(text, dialect);
                text.AppendJoin(dialect.Separator, time.Select(t => t.unit).Concat(columns.Select(c => c.Unit)));
                break;
            default:
                text.AppendJoin(dialect.Separator, time.Select(t => t.snake).Concat(columns.Select(c => c.Snake)));
                break;
        }
        EndRow(text, dialect);
        return text.ToString();

        static string Bracketed(string words, string unit) => unit.Length == 0 ? words : $"{words} [{unit}]";
    }

    private static void EndRow(StringBuilder text, CsvDialect dialect)
    {
        if (dialect.TrailingSeparator)
            text.Append(dialect.Separator);
        text.Append(dialect.NewLine);
    }

    private static string Cell(CsvColumn column, double value, CsvDialect dialect) =>
        double.IsNaN(value) ? dialect.Missing : Number(value * column.Factor, column.Digits, dialect);

    private static string Number(double value, int digits, CsvDialect dialect)
    {
        string text = dialect.EveryDigit ? Plain(value) : Fixed(value, digits);
        return dialect.DecimalComma ? text.Replace('.', ',') : text;
    }

    /// <summary>Shortest digits that give the same number back, without an exponent.</summary>
    private static string Plain(double value)
    {
        string text = value.ToString("R", CultureInfo.InvariantCulture);
        return text.Contains('E', StringComparison.Ordinal) ? ((decimal)value).ToString(CultureInfo.InvariantCulture) : text;
    }

    private static string Fixed(double value, int digits)
    {
        string text = value.ToString("F" + digits.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return text.StartsWith('-') && text.AsSpan(1).IndexOfAnyExcept('0', '.') < 0 ? text[1..] : text; // no logger writes -0.0
    }

    private static string Time(FlightLog log, double seconds, CsvDialect dialect)
    {
        switch (dialect.Time)
        {
            case CsvTime.ElapsedSeconds:
                return Number(seconds, 2, dialect with { EveryDigit = false });
            case CsvTime.ElapsedMilliseconds:
                return Math.Round(seconds * 1000).ToString("F0", CultureInfo.InvariantCulture);
            default:
                break;
        }
        DateTimeOffset start = log.StartUtc ?? throw new ArgumentException("has no date, which this way of writing time needs", nameof(log));
        DateTime moment = start.UtcDateTime.AddMilliseconds(Math.Round(seconds * 1000));
        return dialect.Time switch
        {
            CsvTime.Iso8601 => moment.ToString("yyyy-MM-ddTHH:mm:ss.fff'Z'", CultureInfo.InvariantCulture),
            CsvTime.EpochSeconds => Number((moment - DateTime.UnixEpoch).TotalSeconds, 2, dialect with { EveryDigit = false }),
            CsvTime.EpochMilliseconds => (moment - DateTime.UnixEpoch).TotalMilliseconds.ToString("F0", CultureInfo.InvariantCulture),
            _ => moment.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture) + dialect.Separator
                + moment.ToString("HH:mm:ss.fff", CultureInfo.InvariantCulture),
        };
    }

    private static byte[] Encode(string text, CsvEncoding encoding)
    {
        switch (encoding)
        {
            case CsvEncoding.Utf8WithMark:
                return [0xEF, 0xBB, 0xBF, .. Encoding.UTF8.GetBytes(text)];
            case CsvEncoding.Utf16:
                return Encoding.Unicode.GetBytes(text);
            case CsvEncoding.Utf16WithMark:
                return [0xFF, 0xFE, .. Encoding.Unicode.GetBytes(text)];
            case CsvEncoding.Windows1252:
                return Encoding.Latin1.GetBytes(text); // the same bytes for every character a log writer uses, the degree sign included
            default:
                return Encoding.UTF8.GetBytes(text);
        }
    }
}
