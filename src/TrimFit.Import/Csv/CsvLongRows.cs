using System.Text;
using CsvHelper;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Import.Csv;

/// <summary>Columns of a log that writes one value per row.</summary>
/// <param name="Channel">Column of the channel's name.</param>
/// <param name="Value">Column of the value.</param>
/// <param name="Unit">Column of the unit; −1 without one.</param>
internal sealed record CsvLongLayout(int Channel, int Value, int Unit);

/// <summary>The one pass over a log that writes one value per row; values of the same time become one row, in whatever order they stand.</summary>
internal sealed class CsvLongRows(string file, CsvHead head, CsvLongLayout layout, CsvTime time, ImportOptions options) : ICsvRows
{
    /// <summary>Most different texts in a column that still are names of channels.</summary>
    private const int MostChannels = 500;

    private readonly CsvClock _clock = new(time, head.DecimalMark);
    private readonly Dictionary<string, int> _channelOf = new(StringComparer.Ordinal);
    private readonly List<CsvColumn> _channels = [];
    private readonly List<double> _time = [];
    private readonly List<int> _channel = [];
    private readonly List<double> _value = [];
    private bool _hasZero;

    public int RowsRead { get; private set; }
    public int Count => TimeSec.Length;
    public double[] TimeSec { get; private set; } = [];
    public long ZeroSec { get; private set; }
    public double? AnchorSec => null;
    public bool SawZone => _clock.SawZone;
    public CsvLeftOut LeftOut { get; } = new(file, options.Strict);
    public string Sha256 { get; private set; } = "";

    /// <summary>Recognises the layout: a column of names and one of values, and no other column that is known beside the time.</summary>
    public static CsvLongLayout? Layout(CsvHead head)
    {
        int channel = -1, value = -1, unit = -1;
        for (int i = 0; i < head.Names.Length; i++)
        {
            string name = HeaderName.Split(head.Names[i]).Name;
            if (ColumnNames.IsChannel(name) && HoldsNames(head, i))
                channel = i;
            else if (ColumnNames.IsValue(name))
                value = i;
            else if (ColumnNames.IsUnitColumn(name))
                unit = i;
            else if (ColumnNames.TryFind(name, out ColumnName known, out _) && known.Role is not (ChannelRole.Time or ChannelRole.Date))
                return null;
        }
        return channel >= 0 && value >= 0 ? new(channel, value, unit) : null;
    }

    private static bool HoldsNames(CsvHead head, int column)
    {
        var names = new HashSet<string>();
        foreach (CsvHead.CsvRecord row in head.Sample)
        {
            if (column >= row.Cells.Length || CsvHead.Classify(row.Cells[column]) != CsvHead.CellClass.Text)
                return false;
            names.Add(Encoding.UTF8.GetString(row.Cells[column]));
        }
        return names.Count is > 0 and <= MostChannels;
    }

    /// <summary>Reads the file.</summary>
    public void Read(LogSource source, Action<double>? progress)
    {
        using var text = new TextStream(source, head.Encoding, head.MendLineEnds, hash: true, progress);
        text.Skip(head.DataOffset);
        using (CsvReader reader = CsvReader.Create(text, new CsvReaderOptions
        {
            Separator = (char)head.Separator,
            HasHeader = false,
            TrackLineNumbers = true,
            CommentPrefix = '#',
            AllowLineBreaksInQuotes = false,
        }, leaveOpen: true))
        {
            while (reader.Read())
                ReadRow(reader, (int)reader.LineNumber + head.DataLine - 1);
        }
        Sha256 = text.Sha256();
    }

    /// <summary>The channels as columns over <see cref="TimeSec"/>.</summary>
    public IReadOnlyList<CsvColumn> Finish()
    {
        double[] stamps = [.. _time];
        int[] order = [.. Enumerable.Range(0, stamps.Length)];
        Array.Sort(stamps, order); // unstable, and that does no harm: values of one channel at one time are told apart below by their place
        var unique = new List<double>();
        int[] rowOf = new int[stamps.Length];
        for (int i = 0; i < stamps.Length; i++)
        {
            if (unique.Count == 0 || stamps[i] > unique[^1])
                unique.Add(stamps[i]);
            rowOf[order[i]] = unique.Count - 1;
        }
        TimeSec = [.. unique];
        foreach (CsvColumn channel in _channels)
        {
            channel.Values = new double[unique.Count];
            Array.Fill(channel.Values, double.NaN);
        }
        for (int i = 0; i < rowOf.Length; i++) // in the file's order: the last value of a time stays
        {
            if (!double.IsNaN(_value[i]))
                _channels[_channel[i]].Values[rowOf[i]] = _value[i];
        }
        foreach (CsvColumn channel in _channels)
            channel.Missing = channel.Values.Count(double.IsNaN);
        return _channels;
    }

    private void ReadRow(CsvReader reader, int line)
    {
        int fields = reader.FieldCount;
        if (fields == 1 && CsvNumber.Trim(reader.GetSpan(0)).IsEmpty || IsHeader(reader, fields))
            return;
        RowsRead++;
        if (fields <= Math.Max(layout.Channel, Math.Max(layout.Value, time.Time.Index)))
        {
            LeaveOut("short", line, null, "fewer cells than columns", FormattableString.Invariant($"the row has {fields} cells, expected {head.Width}."),
                FormattableString.Invariant($"{fields} cells"), FormattableString.Invariant($"{head.Width} cells, as in the header"), "Complete the row or delete it.");
            return;
        }
        CellKind kind = _clock.Read(reader.GetSpan(time.Time.Index), time.Date is null ? default : reader.GetSpan(time.Date.Index), out long seconds, out double fraction);
        if (kind != CellKind.Number)
        {
            string shown = Encoding.UTF8.GetString(reader.GetSpan(time.Time.Index));
            LeaveOut("time", line, time.Time.Name, "time not readable", $"\"{shown}\" is not a time here.", $"\"{shown}\"", "a time as in the other rows", "Correct the cell.");
            return;
        }
        int channel = ChannelOf(reader);
        if (channel < 0)
            return; // no role: not kept, as a column without a role is not
        CellKind value = CsvNumber.Parse(reader.GetSpan(layout.Value), head.DecimalMark, out double number, out ReadOnlySpan<byte> suffix);
        if (value == CellKind.Text || !suffix.IsEmpty)
        {
            string shown = Encoding.UTF8.GetString(reader.GetSpan(layout.Value));
            LeaveOut("number", line, head.Names[layout.Value], $"not a number in {head.Names[layout.Value]}", $"\"{shown}\" is not a number here.", $"\"{shown}\"", "a number", "Correct the cell.");
            return;
        }
        if (!_hasZero)
        {
            _hasZero = true;
            ZeroSec = seconds;
        }
        _time.Add(seconds - ZeroSec + fraction);
        _channel.Add(channel);
        _value.Add(number);
    }

    private void LeaveOut(string code, int line, string? column, string reason, string problem, string found, string expected, string remedy) =>
        LeftOut.Add(code, line, column, () => new(reason, problem, found, expected, remedy));

    private bool IsHeader(CsvReader reader, int fields) =>
        head.HeaderLine > 0 && fields > layout.Channel && Encoding.UTF8.GetString(reader.GetSpan(layout.Channel)) == head.Names[layout.Channel];

    private int ChannelOf(CsvReader reader)
    {
        string name = Encoding.UTF8.GetString(CsvNumber.Trim(reader.GetSpan(layout.Channel)));
        if (_channelOf.TryGetValue(name, out int known))
            return known;
        HeaderName parts = HeaderName.Split(name);
        bool told = options.Columns.Any((ColumnRule r) => ColumnNames.Key(r.Name) == ColumnNames.Key(name));
        if (!told && !ColumnNames.TryFind(parts.Name, out _, out _))
            return _channelOf[name] = -1;
        LogUnit? unit = parts.Unit;
        string basis = unit is null ? "" : "from header";
        if (unit is null && layout.Unit >= 0 && layout.Unit < reader.FieldCount && LogUnits.TryParse(Encoding.UTF8.GetString(reader.GetSpan(layout.Unit)), out LogUnit written))
            (unit, basis) = (written, "from units column");
        _channels.Add(new CsvColumn { Index = _channels.Count, Name = name, BareName = parts.Name, Unit = unit, UnitBasis = basis });
        return _channelOf[name] = _channels.Count - 1;
    }
}
