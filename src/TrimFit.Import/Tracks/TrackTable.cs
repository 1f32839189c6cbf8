using System.Collections.Immutable;
using TrimFit.Core.Logs;

namespace TrimFit.Import.Tracks;

/// <summary>Collects fixes of a position log and makes the table of them.</summary>
internal sealed class TrackTable
{
    private readonly List<double> _time = [];
    private readonly List<(string Name, ChannelRole? Role, string Unit, string Basis, List<double> Values)> _columns = [];
    private readonly Dictionary<string, (int Rows, int FirstLine)> _leftOut = [];
    private readonly List<Notice> _warnings = [];

    /// <summary>Rows taken so far.</summary>
    public int Count => _time.Count;

    /// <summary>Rows read so far, taken or not.</summary>
    public int RowsRead { get; private set; }

    /// <summary>Adds a column and gives its number. Columns without a role are listed only.</summary>
    public int AddColumn(string name, ChannelRole? role, string unit, string basis)
    {
        _columns.Add((name, role, unit, basis, []));
        return _columns.Count - 1;
    }

    /// <summary>Counts a row that cannot be used.</summary>
    public void LeaveOut(string reason, int line)
    {
        RowsRead++;
        (int rows, int first) = _leftOut.GetValueOrDefault(reason, (0, line));
        _leftOut[reason] = (rows + 1, first);
    }

    /// <summary>Says something about the file.</summary>
    public void Warn(string code, string message) => _warnings.Add(new(code, message));

    /// <summary>Takes a row; a time that does not follow the one before is counted and left out.</summary>
    /// <param name="time">Seconds on the file's clock.</param>
    /// <param name="values">One value per column, NaN where there is none.</param>
    /// <param name="line">Line in the file.</param>
    public void Add(double time, ReadOnlySpan<double> values, int line)
    {
        if (_time.Count > 0 && !(time > _time[^1]))
        {
            LeaveOut(time == _time[^1] ? "time repeats" : "time runs back", line);
            return;
        }
        RowsRead++;
        _time.Add(time);
        for (int i = 0; i < _columns.Count; i++)
            _columns[i].Values.Add(values[i]);
    }

    /// <summary>Whether a column has a value other than 0 anywhere.</summary>
    public bool HasValues(int column) => _columns[column].Values.Exists(v => double.IsFinite(v) && v != 0);

    /// <summary>Times taken so far, s.</summary>
    public IReadOnlyList<double> Times => _time;

    /// <summary>Values of a column.</summary>
    public IReadOnlyList<double> Values(int column) => _columns[column].Values;

    /// <summary>Takes the role away from a column.</summary>
    public void SetAside(int column) => _columns[column] = _columns[column] with { Role = null, Basis = "" };

    /// <summary>The finished table.</summary>
    /// <param name="file">Name, hash and format.</param>
    /// <param name="clock">What the times count.</param>
    /// <param name="origin">Absolute time of the clock's zero.</param>
    /// <param name="strict">Whether a row left out is an error.</param>
    /// <exception cref="LogFormatException">A row was left out although that is an error.</exception>
    public LogTable Build((string Name, string Sha256, string Format) file, ClockKind clock, DateTimeOffset? origin, bool strict)
    {
        ImmutableArray<RowsLeftOut> leftOut = [.. _leftOut.Select(l => new RowsLeftOut(l.Key, l.Value.Rows, l.Value.FirstLine)).OrderBy(l => l.FirstLine)];
        if (strict && leftOut.Length > 0)
        {
            throw LogFormatException.At(file.Name, leftOut[0].FirstLine, null, $"a row that must be left out ({leftOut[0].Reason})", "every row to be usable under --strict",
                "Correct the file or run without --strict.");
        }
        var columns = new Dictionary<ChannelRole, double[]>();
        foreach ((_, ChannelRole? role, _, _, List<double> values) in _columns)
        {
            if (role is ChannelRole r && values.Exists(double.IsFinite))
                columns[r] = [.. values];
        }
        return new()
        {
            File = new()
            {
                Name = file.Name,
                Sha256 = file.Sha256,
                Format = file.Format,
                RowsRead = RowsRead,
                LeftOut = leftOut,
                Columns = [.. _columns.Select(c => new ColumnUse(c.Name, c.Role is ChannelRole r && columns.ContainsKey(r) ? r : null, c.Unit, c.Role is null ? "" : c.Basis, c.Values.Count(v => !double.IsFinite(v))))],
            },
            Clock = clock,
            Origin = origin,
            IsUtc = true, // satellite time in all of these formats
            TimeSec = [.. _time],
            Columns = columns,
            Warnings = [.. _warnings],
        };
    }
}
