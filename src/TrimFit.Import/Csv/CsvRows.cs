using System.Text;
using CsvHelper;
using TrimFit.Core.Logs;

namespace TrimFit.Import.Csv;

/// <summary>The one pass over a file: cells of the wanted columns to numbers, rows counted, clock put in order.</summary>
internal sealed class CsvRows : ICsvRows
{
    /// <summary>Pause, s, put between the parts of a log whose elapsed clock began again; longer than any step, so the parts are told apart.</summary>
    internal const double RestartPauseSec = 60;

    /// <summary>Step back of a time of day, s, that is taken for midnight.</summary>
    private const double MidnightSec = 12 * 3600;

    /// <summary>Step back, s, of an elapsed clock to near its beginning that is taken for a restart.</summary>
    private const double RestartSec = 5;

    /// <summary>Beginning of the log, s, over which the coarser clock is compared; over hours the clocks drift apart.</summary>
    private const double AnchorRowsSec = 600;

    /// <summary>Longest record, bytes; an unclosed quote must not swallow the memory.</summary>
    private const int LongestRecord = 1 << 20;

    /// <summary>Bytes from which counting the lines first is cheaper than copying the columns later.</summary>
    private const long LongFile = 1 << 23;

    /// <summary>Rows to start with when the file's length is not known.</summary>
    private const int FirstRows = 1024;

    private readonly string _file;
    private readonly CsvHead _head;
    private readonly CsvColumn[] _wanted;
    private readonly CsvTime _time;
    private readonly CsvClock _clock;
    private readonly CsvClock? _anchorClock;
    private double _anchorSec = double.NegativeInfinity;
    private readonly CsvLeftOut _leftOut;
    private readonly double[] _row, _second;
    private readonly int[] _index;
    private readonly bool[] _isPosition;
    private readonly double[][] _values;
    private readonly string?[] _suffix;
    private readonly double[] _suffixFactor;
    private readonly List<Notice> _notices = [];
    private byte _decimalMark;
    private bool _markSeen;
    private double[] _timeSec;
    private long _zeroSec;
    private bool _hasZero;
    private double _carrySec;
    private int _repeats, _firstRepeatLine;
    private bool _restart;

    public CsvRows(LogSource source, CsvHead head, CsvPlan plan, bool strict)
    {
        string file = source.Name;
        _file = file;
        _head = head;
        _time = plan.Time;
        _wanted = [.. plan.Columns.Where(c => c.Role is not null and not ChannelRole.Time and not ChannelRole.Date)];
        _decimalMark = head.DecimalMark;
        _markSeen = head.DecimalMarkSeen;
        _clock = new CsvClock(plan.Time, head.DecimalMark);
        _anchorClock = plan.Time.Anchor is { } anchor ? new CsvClock(anchor, head.DecimalMark) : null;
        _leftOut = new CsvLeftOut(file, strict);
        _row = new double[_wanted.Length];
        _second = new double[_wanted.Length];
        _index = [.. _wanted.Select(c => c.Index)];
        _isPosition = [.. _wanted.Select(c => c.Role == ChannelRole.Position)];
        _suffix = new string?[_wanted.Length];
        _suffixFactor = [.. Enumerable.Repeat(1.0, _wanted.Length)];
        int capacity = Capacity(source, head);
        _timeSec = HugePages.Column(capacity);
        foreach (CsvColumn column in _wanted)
        {
            column.Values = HugePages.Column(capacity);
            if (column.Role == ChannelRole.Position)
                column.SecondValues = HugePages.Column(capacity);
        }
        _values = [.. _wanted.Select(c => c.Values)];
    }

    /// <summary>Rows to make room for: exactly as many as a long file has lines, so that its columns need not be copied to their length at the end.</summary>
    private static int Capacity(LogSource source, CsvHead head)
    {
        if (source.Length is not > LongFile)
            return head.EstimatedRows > 0 ? (int)Math.Min((head.EstimatedRows * 1.02) + 16, Array.MaxLength) : FirstRows;
        using Stream stream = source.Open();
        byte[] block = new byte[1 << 16];
        long lines = 0;
        byte last = 0;
        int read;
        while ((read = stream.Read(block)) > 0)
        {
            lines += block.AsSpan(0, read).Count((byte)'\n');
            last = block[read - 1];
        }
        lines += last == (byte)'\n' ? 0 : 1;
        long rows = lines - (head.DataLine - 1);
        return rows > 1 ? (int)Math.Min(rows, Array.MaxLength) : (int)Math.Min((head.EstimatedRows * 1.02) + 16, Array.MaxLength); // one line: line ends of another kind
    }

    /// <summary>Rows of data in the file.</summary>
    public int RowsRead { get; private set; }
    /// <summary>Rows used.</summary>
    public int Count { get; private set; }
    /// <summary>Seconds since <see cref="ZeroSec"/>.</summary>
    public double[] TimeSec => _timeSec;
    /// <summary>The clock's reading at <c>TimeSec = 0</c>.</summary>
    public long ZeroSec => _zeroSec;
    public double? AnchorSec => double.IsFinite(_anchorSec) ? _anchorSec : null;
    public bool SawZone => (_anchorClock ?? _clock).SawZone;
    public CsvLeftOut LeftOut => _leftOut;
    public IReadOnlyList<Notice> Notices => _notices;
    /// <summary>SHA-256 of the file.</summary>
    public string Sha256 { get; private set; } = "";

    /// <summary>Reads the file.</summary>
    /// <returns>False when a quote was never closed; the file is to be read again without line breaks in quotes.</returns>
    public bool Read(LogSource source, bool lineBreaksInQuotes, Action<double>? progress)
    {
        using var text = new TextStream(source, _head.Encoding, _head.MendLineEnds, hash: true, progress);
        text.Skip(_head.DataOffset);
        bool openQuote = false;
        using (CsvReader reader = CsvReader.Create(text, new CsvReaderOptions
        {
            Separator = (char)_head.Separator,
            HasHeader = false,
            TrackLineNumbers = true,
            CommentPrefix = '#',
            MalformedData = CsvMalformedDataHandling.Skip,
            AllowLineBreaksInQuotes = lineBreaksInQuotes,
            MaxRecordSize = LongestRecord,
            OnMalformedRecord = record =>
            {
                openQuote |= record.Reason == CsvMalformedReason.UnterminatedQuote;
                RowsRead++;
                int line = (int)record.LineNumber + _head.DataLine - 1;
                _leftOut.Add("quotes", line, null, () => new("broken quotes", "a quote stands where none belongs.", "a quote where none belongs",
                    "quotes around a whole cell or none", "Correct the quotes in the file."));
            },
        }, leaveOpen: true))
        {
            try
            {
                while (reader.Read())
                    ReadRow(reader, (int)reader.LineNumber + _head.DataLine - 1);
            }
            catch (CsvFormatException) when (lineBreaksInQuotes)
            {
                return false;
            }
        }
        if (openQuote && lineBreaksInQuotes)
            return false;
        Sha256 = text.Sha256();
        return true;
    }

    /// <summary>Puts repeated stamps in order and cuts the columns to length.</summary>
    public void Finish()
    {
        CsvTimeLine.Repeats(_file, ref _timeSec, Count, _repeats, _firstRepeatLine, _wanted, _leftOut, _notices, out int kept);
        Count = kept;
        Array.Resize(ref _timeSec, Count);
        foreach (CsvColumn column in _wanted)
        {
            column.Values = Cut(column.Values);
            column.Missing = column.Values.Count(double.IsNaN);
            if (column.SecondValues.Length > 0)
                column.SecondValues = Cut(column.SecondValues);
        }
    }

    private double[] Cut(double[] values)
    {
        Array.Resize(ref values, Count);
        return values;
    }

    private void ReadRow(CsvReader reader, int line)
    {
        int fields = reader.FieldCount;
        if (fields != _head.Width && !WidthIsFine(reader, fields, line))
            return;
        RowsRead++;
        ReadOnlySpan<byte> timeCell = Cell(reader, _time.Time.Index, fields);
        ReadOnlySpan<byte> dateCell = _time.Date is null ? default : Cell(reader, _time.Date.Index, fields);
        CellKind kind = _clock.Read(timeCell, dateCell, out long seconds, out double fraction);
        if (kind != CellKind.Number)
        {
            if (IsHeaderAgain(reader, fields))
            {
                RowsRead--;
                _restart = true;
                return;
            }
            LeaveOutTime(timeCell, dateCell, kind, line);
            return;
        }
        for (int i = 0; i < _index.Length; i++)
        {
            ReadOnlySpan<byte> cell = Cell(reader, _index[i], fields);
            if (_markSeen && !_isPosition[i] && CsvNumber.TryParseOrdinary(cell, _decimalMark, out _row[i]))
                continue;
            if (!ReadCell(cell, i, line))
                return;
        }
        if (!_hasZero)
        {
            _hasZero = true;
            _zeroSec = seconds;
        }
        double t = seconds - _zeroSec + fraction + _carrySec;
        if (Count > 0 && !(t > _timeSec[Count - 1]) && !PutInOrder(ref t, line))
            return;
        _restart = false;
        if (_anchorClock is not null && _carrySec == 0 && t < AnchorRowsSec) // exact: nothing was shifted yet
            Anchor(reader, fields, t);
        if (Count == _timeSec.Length)
            Grow();
        _timeSec[Count] = t;
        for (int i = 0; i < _values.Length; i++)
        {
            _values[i][Count] = _row[i];
            if (_isPosition[i])
                _wanted[i].SecondValues[Count] = _second[i];
        }
        Count++;
    }

    // Clocks cut their stamps down, so the latest start that any row asks for is nearest to the true one.
    private void Anchor(CsvReader reader, int fields, double t)
    {
        CsvTime anchor = _time.Anchor!;
        ReadOnlySpan<byte> date = anchor.Date is null ? default : Cell(reader, anchor.Date.Index, fields);
        if (_anchorClock!.Read(Cell(reader, anchor.Time.Index, fields), date, out long seconds, out double fraction) == CellKind.Number)
            _anchorSec = Math.Max(_anchorSec, seconds + fraction - t);
    }

    private static ReadOnlySpan<byte> Cell(CsvReader reader, int index, int fields) => index < fields ? reader.GetSpan(index) : default;

    private bool WidthIsFine(CsvReader reader, int fields, int line)
    {
        if (fields == 1 && CsvNumber.Trim(reader.GetSpan(0)).IsEmpty)
            return false; // a line of spaces is no row
        if (reader.GetSpan(0) is var first && (first.StartsWith("//"u8) || first.StartsWith("%"u8)))
            return false;
        if (fields < _head.Width)
        {
            if (_head.ShortRowsAreUsual)
                return true;
            // A trailing delimiter in the header only makes the last column nameless.
            if (fields == _head.Width - 1 && _head.Names[^1] == FormattableString.Invariant($"column {_head.Width}"))
                return true;
            RowsRead++;
            _leftOut.Add("short", line, null, () => new("fewer cells than columns", FormattableString.Invariant($"the row has {fields} cells, expected {_head.Width}."),
                FormattableString.Invariant($"{fields} cells"), FormattableString.Invariant($"{_head.Width} cells, as in the header"), "Complete the row or delete it."));
            return false;
        }
        for (int i = _head.Width; i < fields; i++)
        {
            if (CsvNumber.Trim(reader.GetSpan(i)).IsEmpty)
                continue;
            RowsRead++;
            _leftOut.Add("long", line, null, () => new("more cells than columns", FormattableString.Invariant($"the row has {fields} cells, expected {_head.Width}; perhaps a decimal comma."),
                FormattableString.Invariant($"{fields} cells"), FormattableString.Invariant($"{_head.Width} cells, as in the header"), "Correct the row (a decimal comma perhaps) or delete it."));
            return false;
        }
        return true;
    }

    private bool IsHeaderAgain(CsvReader reader, int fields)
    {
        if (_head.HeaderLine == 0)
            return false;
        int same = 0;
        for (int i = 0; i < Math.Min(fields, _head.Width); i++)
        {
            string text = Encoding.UTF8.GetString(CsvNumber.Trim(reader.GetSpan(i)));
            bool name = _head.Names[i].Length > 0 && _head.Names[i].Contains(text, StringComparison.Ordinal) && text.Length > 0;
            bool unit = _head.Units is { } units && i < units.Length && units[i] == text;
            same += name || unit ? 1 : 0;
        }
        return same > 0.6 * _head.Width;
    }

    private void LeaveOutTime(ReadOnlySpan<byte> cell, ReadOnlySpan<byte> dateCell, CellKind kind, int line)
    {
        string shown = Show(cell.IsEmpty || !dateCell.IsEmpty && CsvNumber.IsMissing(dateCell) ? dateCell : cell);
        if (kind == CellKind.Missing)
        {
            _leftOut.Add("no time", line, _time.Time.Name, () => new("no time in the row", "the row has no time.", "no time", "the time of the row", "Give the row its time or delete it."));
            return;
        }
        _leftOut.Add("time", line, _time.Time.Name, () => new("time not readable", $"\"{shown}\" is not a time here.", $"\"{shown}\"", "a time as in the other rows", "Correct the cell."));
    }

    private bool ReadCell(ReadOnlySpan<byte> cell, int i, int line)
    {
        CsvColumn column = _wanted[i];
        if (column.Role == ChannelRole.Position)
        {
            if (CsvPosition.TryParse(cell, _decimalMark, out _row[i], out _second[i]))
                return true;
            (_row[i], _second[i]) = (double.NaN, double.NaN);
            if (CsvNumber.IsMissing(cell))
                return true;
            string place = Show(cell);
            _leftOut.Add("position", line, column.Name, () => new("position not readable", $"\"{place}\" is not a position (latitude and longitude).", $"\"{place}\"",
                "latitude and longitude in degrees", "Correct the cell."));
            return false;
        }
        CellKind kind = CsvNumber.Parse(cell, _decimalMark, out double value, out ReadOnlySpan<byte> suffix);
        _row[i] = value;
        if (kind == CellKind.Number && suffix.IsEmpty || kind == CellKind.Missing)
        {
            if (!_markSeen && kind == CellKind.Number && cell.Contains(_decimalMark))
                _markSeen = true;
            return true;
        }
        if (kind == CellKind.Number ? TakeSuffix(suffix, i) : TakeWord(cell, i))
            return true;
        return LeaveOutNumber(cell, i, line);
    }

    // A unit in the cell: the first one is the column's, another of the same kind is converted to it.
    private bool TakeSuffix(ReadOnlySpan<byte> suffix, int i)
    {
        CsvColumn column = _wanted[i];
        if (suffix.Length > 16)
            return false;
        if (column.Role is ChannelRole.Latitude or ChannelRole.Longitude && CsvPosition.IsHemisphere(suffix) && _row[i] >= 0)
        {
            if ((suffix[0] & ~0x20) is 'S' or 'W')
                _row[i] = -_row[i];
            return true;
        }
        string text = Encoding.UTF8.GetString(suffix);
        if (_suffix[i] == text)
        {
            _row[i] *= _suffixFactor[i];
            return true;
        }
        if (!LogUnits.TryParse(text, out LogUnit unit) || !LogUnits.Fits(column.Role!.Value, unit))
            return false;
        if (column.Unit is null)
        {
            column.Unit = unit;
            column.UnitBasis = "from cells";
        }
        if (column.Unit.Quantity != unit.Quantity || column.Unit.Offset != 0 || unit.Offset != 0)
            return false;
        _suffix[i] = text;
        _suffixFactor[i] = unit.Factor == column.Unit.Factor ? 1 : unit.Factor / column.Unit.Factor;
        _row[i] *= _suffixFactor[i];
        return true;
    }

    private bool TakeWord(ReadOnlySpan<byte> cell, int i)
    {
        if (_wanted[i].Role is not (ChannelRole.HandsOff or ChannelRole.Marker))
            return false;
        switch (Encoding.UTF8.GetString(CsvNumber.Trim(cell)).ToLowerInvariant())
        {
            case "true" or "yes" or "on" or "y" or "t" or "x":
                _row[i] = 1;
                return true;
            case "false" or "no" or "off" or "n" or "f":
                _row[i] = 0;
                return true;
            default:
                return false;
        }
    }

    private bool LeaveOutNumber(ReadOnlySpan<byte> cell, int i, int line)
    {
        CsvColumn column = _wanted[i];
        byte other = _decimalMark == (byte)'.' ? (byte)',' : (byte)'.';
        if (!_markSeen && _head.Separator != (byte)',' && CsvNumber.Parse(cell, other, out double first, out ReadOnlySpan<byte> rest) == CellKind.Number && rest.IsEmpty)
        {
            // The head held whole numbers only; the first decimal mark of the file decides.
            (_decimalMark, _markSeen) = (other, true);
            _clock.DecimalMark = other;
            _row[i] = first;
            return true;
        }
        bool wrongMark = CsvNumber.Parse(cell, other, out _, out ReadOnlySpan<byte> suffix) == CellKind.Number && suffix.IsEmpty;
        string shown = Show(cell);
        (string has, string mark) = _decimalMark == (byte)'.' ? ("decimal points", "a decimal point") : ("decimal commas", "a decimal comma");
        _leftOut.Add(wrongMark ? "mark" : "number", line, column.Name, () => wrongMark
            ? new($"number not with {mark} in {column.Name}", $"\"{shown}\" is not a number here: this file has {has} elsewhere.", $"\"{shown}\"", $"a number with {mark}, as elsewhere in this file", "Correct the cell.")
            : new($"not a number in {column.Name}", $"\"{shown}\" is not a number.", $"\"{shown}\"", "a number", "Correct the cell."));
        return false;
    }

    /// <summary>Deals with a time that does not follow the one before.</summary>
    /// <returns>False when the row is left out.</returns>
    private bool PutInOrder(ref double t, int line)
    {
        double last = _timeSec[Count - 1];
        double back = last - t;
        if (back == 0) // exact: the same stamp written twice gives the same number
        {
            if (_repeats++ == 0)
                _firstRepeatLine = line;
            return true;
        }
        if (_time.Kind is CsvTimeKind.TimeOfDay or CsvTimeKind.ClockOfDateTime && back > MidnightSec)
        {
            _carrySec += 86400;
            t += 86400;
            return t > last;
        }
        bool toBeginning = _time.Kind == CsvTimeKind.Elapsed && back > RestartSec && t - _carrySec - _timeSec[0] < RestartSec;
        if (_time.Kind == CsvTimeKind.Elapsed && (_restart || toBeginning))
        {
            double shift = last + RestartPauseSec - t;
            _carrySec += shift;
            t += shift;
            _notices.Add(new("clock_restarted", FormattableString.Invariant(
                $"{_file}({line}): the logger's clock begins again here. The rows from here on are placed {RestartPauseSec} s after the ones before; how long the real pause was is not known.")));
            return true;
        }
        string from = Reading(last), to = Reading(t);
        _leftOut.Add("back", line, null, () => new("time runs back", $"time runs back from {from} to {to}.", $"a step back from {from} to {to}",
            "a time after that of the row before", "Split the log there if this was a restart.", "Split the log there if this was a restart."));
        return false;
    }

    // A time as the file shows it.
    private string Reading(double t)
    {
        double clock = _zeroSec + t - _carrySec;
        if (_time.Kind == CsvTimeKind.Elapsed)
            return FormattableString.Invariant($"{clock:F2} s");
        TimeSpan ofDay = TimeSpan.FromSeconds(clock - 86400 * Math.Floor(clock / 86400));
        return ofDay.ToString(@"hh\:mm\:ss\.ff", System.Globalization.CultureInfo.InvariantCulture);
    }

    private void Grow()
    {
        int size = (int)Math.Min(Math.Max(FirstRows, 2L * _timeSec.Length), Array.MaxLength);
        Array.Resize(ref _timeSec, size);
        for (int i = 0; i < _wanted.Length; i++)
        {
            CsvColumn column = _wanted[i];
            double[] values = column.Values;
            Array.Resize(ref values, size);
            column.Values = values;
            _values[i] = values;
            if (column.SecondValues.Length > 0)
            {
                values = column.SecondValues;
                Array.Resize(ref values, size);
                column.SecondValues = values;
            }
        }
    }

    private static string Show(ReadOnlySpan<byte> cell)
    {
        const int longest = 24;
        string text = Encoding.UTF8.GetString(cell).Trim();
        return text.Length > longest ? $"{text[..longest]}…" : text;
    }
}
