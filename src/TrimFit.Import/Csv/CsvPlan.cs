using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Import.Csv;

/// <summary>Decides by header, first rows and the person's word what each column is.</summary>
internal sealed class CsvPlan
{
    private readonly string _file;
    private readonly CsvHead _head;
    private readonly List<Notice> _notices = [];

    private readonly Func<CsvColumn, bool> _isEmpty;

    private CsvPlan(string file, CsvHead head, IReadOnlyList<CsvColumn>? channels = null)
    {
        _file = file;
        _head = head;
        Columns = channels ?? [.. head.Names.Select(NewColumn)];
        _isEmpty = channels is null ? IsEmptyInSample : column => !Array.Exists(column.Values, double.IsFinite);
    }

    public IReadOnlyList<CsvColumn> Columns { get; }
    public CsvTime Time { get; private set; } = null!;
    public IReadOnlyList<Notice> Notices => _notices;

    /// <summary>Makes the plan.</summary>
    /// <param name="file">Name of the file, for messages.</param>
    /// <param name="head">Its head.</param>
    /// <param name="options">The person's word on columns.</param>
    /// <param name="isPartOfRecording">Whether the file is one of several of a recording.</param>
    /// <exception cref="LogFormatException">A told column is not there, no column gives the time, or none but the time is known.</exception>
    public static CsvPlan Create(string file, CsvHead head, ImportOptions options, bool isPartOfRecording)
    {
        var plan = new CsvPlan(file, head);
        plan.ApplyRules(options.Columns, options.ColumnsMayBeElsewhere);
        plan.FindByName();
        if (!isPartOfRecording) // whoever joins the files of a recording says what their axes are
            plan.FindAxesByFileName();
        plan.KeepOnePerRole();
        plan.FindTime();
        plan.CheckSample();
        if (!plan.Columns.Any(c => c.Role is { } role && role is not (ChannelRole.Time or ChannelRole.Date)))
            throw plan.NothingKnown();
        return plan;
    }

    /// <summary>Makes the plan of a log with one value per row: here only its time.</summary>
    public static CsvPlan CreateForTime(string file, CsvHead head, ImportOptions options)
    {
        var plan = new CsvPlan(file, head);
        plan.ApplyRules([.. options.Columns.Where(r => r.Role is ChannelRole.Time or ChannelRole.Date)], options.ColumnsMayBeElsewhere);
        plan.FindByName();
        foreach (CsvColumn column in plan.Columns)
        {
            if (column.Role is not (null or ChannelRole.Time or ChannelRole.Date))
                column.Release();
        }
        plan._notices.Clear();
        plan.FindTime();
        return plan;
    }

    /// <summary>Makes the plan of the channels of such a log.</summary>
    public static CsvPlan CreateForChannels(string file, CsvHead head, IReadOnlyList<CsvColumn> channels, ImportOptions options)
    {
        var plan = new CsvPlan(file, head, channels);
        plan.ApplyRules([.. options.Columns.Where(r => r.Role is not (ChannelRole.Time or ChannelRole.Date))], options.ColumnsMayBeElsewhere);
        plan.FindByName();
        foreach (CsvColumn column in plan.Columns)
        {
            if (column.Role is ChannelRole.Time or ChannelRole.Date or ChannelRole.Position)
                column.Release();
        }
        plan.KeepOnePerRole();
        return plan.Columns.Any(c => c.Role is not null) ? plan : throw plan.NothingKnown();
    }

    private CsvColumn NewColumn(string name, int index)
    {
        HeaderName parts = HeaderName.Split(name);
        LogUnit? unit = parts.Unit;
        string basis = unit is null ? "" : "from header";
        if (unit is null && _head.Units is { } units && index < units.Length && LogUnits.TryParse(units[index], out LogUnit below))
            (unit, basis) = (below, "from units row");
        return new CsvColumn { Index = index, Name = name, BareName = parts.Name, Unit = unit, UnitBasis = basis };
    }

    private void ApplyRules(IReadOnlyList<ColumnRule> rules, bool mayBeElsewhere)
    {
        var given = new HashSet<ChannelRole>();
        foreach (ColumnRule rule in rules)
        {
            CsvColumn? column = Find(rule.Name);
            if (column is null && mayBeElsewhere)
                continue;
            if (!given.Add(rule.Role)) // the person's word comes before the rig file's
                continue;
            if (column is null)
            {
                throw LogFormatException.At(_file, Math.Max(1, _head.HeaderLine), null, $"no column \"{rule.Name}\" for {ChannelRoles.NameOf(rule.Role)}",
                    $"one of {Names()}", $"Name it as the header does: --column {ChannelRoles.NameOf(rule.Role)}=NAME.");
            }
            column.Told = true;
            column.Role = rule.Role;
            column.RoleBasis = "told";
            if (rule.Unit is null)
                continue;
            if (!LogUnits.TryParse(rule.Unit, out LogUnit unit) || !LogUnits.Fits(rule.Role, unit))
            {
                throw LogFormatException.At(_file, Math.Max(1, _head.HeaderLine), column.Name, $"the unit \"{rule.Unit}\" for {ChannelRoles.NameOf(rule.Role)}",
                    $"a unit such as {Examples(rule.Role)}", $"Write --column {ChannelRoles.NameOf(rule.Role)}={column.Name}:UNIT.");
            }
            column.Unit = unit;
            column.UnitBasis = "told";
        }
    }

    private CsvColumn? Find(string name) =>
        Columns.FirstOrDefault(c => c.Name == name)
        ?? Columns.FirstOrDefault(c => string.Equals(c.Name.Trim(), name.Trim(), StringComparison.OrdinalIgnoreCase))
        ?? Columns.FirstOrDefault(c => ColumnNames.Key(c.Name) == ColumnNames.Key(name) && ColumnNames.Key(name).Length > 0)
        ?? Columns.FirstOrDefault(c => ColumnNames.Key(c.BareName) == ColumnNames.Key(name) && ColumnNames.Key(name).Length > 0);

    private void FindByName()
    {
        bool telemetry = Columns.Any(c => ColumnNames.Key(c.BareName) == "gspd");
        bool sticks = Columns.Any(c => ColumnNames.Key(c.BareName) is "ail" or "rud");
        foreach (CsvColumn column in Columns)
        {
            if (column.Told || !ColumnNames.TryFind(column.BareName, out ColumnName known, out int rank))
                continue;
            ChannelRole role = known.Role;
            // RC-telemetry radios name the GPS course Hdg, beside the GPS speed GSpd.
            if (telemetry && ColumnNames.Key(column.BareName) == "hdg")
                role = ChannelRole.GroundCourse;
            if (sticks && ColumnNames.Key(column.BareName) == "ele") // the elevator stick, where others shorten elevation
                continue;
            LogUnit? unit = column.Unit;
            string unitBasis = column.UnitBasis;
            if (unit is null && known.Unit is not null && LogUnits.TryParse(known.Unit, out LogUnit implied))
                (unit, unitBasis) = (implied, "from name");
            if (unit is not null && !LogUnits.Fits(role, unit))
            {
                if (HeaderName.OtherRole(role, unit) is { } other)
                {
                    role = other;
                }
                else
                {
                    _notices.Add(new("unit_does_not_fit",
                        $"{_file}: column \"{column.Name}\" has the name of {ChannelRoles.NameOf(role)}, but {unit.Name} is no unit of it; not used. To use it: --column {ChannelRoles.NameOf(role)}={column.BareName}:UNIT."));
                    continue;
                }
            }
            HeaderName parts = HeaderName.Split(column.Name);
            if (parts.UnknownUnit is { } strange && unit is null && role is not (ChannelRole.Time or ChannelRole.Date or ChannelRole.Position or ChannelRole.Marker))
            {
                _notices.Add(new("unit_not_known",
                    $"{_file}: column \"{column.Name}\" has the name of {ChannelRoles.NameOf(role)}, but \"{strange}\" is no unit known here; not used. To use it: --column {ChannelRoles.NameOf(role)}={column.BareName}:UNIT."));
                continue;
            }
            column.Role = role;
            column.Rank = rank;
            column.RoleBasis = "name";
            column.Unit = unit;
            column.UnitBasis = unitBasis;
        }
    }

    // Phones write one file per sensor, with the axes as x, y, z and the sensor in the file's name.
    private void FindAxesByFileName()
    {
        string key = ColumnNames.Key(Path.GetFileNameWithoutExtension(_file));
        if (key.Contains("uncalibrated", StringComparison.Ordinal) || key.Contains("linear", StringComparison.Ordinal) || key.Contains("user", StringComparison.Ordinal))
            return; // raw counts, or acceleration without gravity: not what the roles mean
        ChannelRole? x = key.Contains("gyro", StringComparison.Ordinal) || key.Contains("rotationrate", StringComparison.Ordinal) ? ChannelRole.GyroX
            : key.Contains("accel", StringComparison.Ordinal) ? ChannelRole.AccelerationX : null;
        if (x is null || _head.Names.Length > 12 || Columns.Any(c => c.Role >= ChannelRole.GyroX && c.Role <= ChannelRole.AccelerationZ))
            return;
        foreach (CsvColumn column in Columns)
        {
            int axis = column.Role is null ? ColumnNames.Key(column.BareName) switch { "x" => 0, "y" => 1, "z" => 2, _ => -1 } : -1;
            ChannelRole role = x.Value + axis;
            if (axis < 0 || column.Unit is not null && !LogUnits.Fits(role, column.Unit))
                continue;
            column.Role = role;
            column.RoleBasis = "file name";
            if (column.Unit is null && x == ChannelRole.GyroX && LogUnits.TryParse("rad/s", out LogUnit radians))
            {
                column.Unit = radians;
                column.UnitBasis = "by convention of phones";
            }
        }
    }

    // Several columns may have the names of one role: told before name, filled before empty, better-known name before others, left before right.
    private void KeepOnePerRole()
    {
        foreach (IGrouping<ChannelRole, CsvColumn> group in Columns.Where(c => c.Role is not null).GroupBy(c => c.Role!.Value).ToList())
        {
            if (group.Key is ChannelRole.Time or ChannelRole.Date)
                continue; // FindTime chooses
            List<CsvColumn> ordered = [.. group.OrderByDescending(c => c.Told).ThenBy(c => _isEmpty(c)).ThenBy(c => c.Rank).ThenBy(c => c.Index)];
            if (ordered.Count > 1 && !ordered[0].Told)
            {
                _notices.Add(new("several_columns",
                    $"{_file}: {Quoted(ordered)} all have the name of {ChannelRoles.NameOf(group.Key)}; \"{ordered[0].Name}\" is used. To choose: --column {ChannelRoles.NameOf(group.Key)}=NAME."));
            }
            foreach (CsvColumn other in ordered.Skip(1))
                other.Release();
        }
        // Latitude and longitude in columns of their own are finer than both in one cell.
        CsvColumn? position = Columns.FirstOrDefault(c => c.Role == ChannelRole.Position && !c.Told);
        if (position is not null && Columns.Any(c => c.Role == ChannelRole.Latitude) && Columns.Any(c => c.Role == ChannelRole.Longitude))
            position.Release();
    }

    private void FindTime() => Time = CsvTimeChoice.Choose(_file, _head, Columns, _notices, Names);

    private void CheckSample()
    {
        foreach (CsvColumn column in Columns)
        {
            if (column.Role is null or ChannelRole.Time or ChannelRole.Date or ChannelRole.HandsOff or ChannelRole.Marker || column.Told)
                continue;
            int good = 0, bad = 0;
            string? example = null;
            foreach (CsvHead.CsvRecord row in _head.Sample)
            {
                if (column.Index >= row.Cells.Length || CsvNumber.IsMissing(row.Cells[column.Index]))
                    continue;
                bool fits = column.Role == ChannelRole.Position
                    ? CsvPosition.TryParse(row.Cells[column.Index], _head.DecimalMark, out _, out _)
                    : CsvHead.Classify(row.Cells[column.Index]) is CsvHead.CellClass.Integer or CsvHead.CellClass.Point or CsvHead.CellClass.Comma;
                good += fits ? 1 : 0;
                bad += fits ? 0 : 1;
                if (!fits)
                    example ??= Encoding.UTF8.GetString(row.Cells[column.Index]);
            }
            if (bad > good)
            {
                _notices.Add(new("column_not_numeric",
                    $"{_file}: column \"{column.Name}\" has the name of {ChannelRoles.NameOf(column.Role.Value)}, but holds other things than {(column.Role == ChannelRole.Position ? "positions" : "numbers")}; not used."));
                column.Release();
            }
        }
    }

    private bool IsEmptyInSample(CsvColumn column) =>
        _head.Sample.All(row => column.Index >= row.Cells.Length || CsvNumber.IsMissing(row.Cells[column.Index]));

    private string Names()
    {
        const int shown = 40;
        string names = string.Join(", ", Columns.Take(shown).Select(c => c.Name));
        return Columns.Count > shown ? FormattableString.Invariant($"{names} and {Columns.Count - shown} more") : names;
    }

    /// <summary>The refusal of a file without a header, for whose columns nobody gave names.</summary>
    public static LogFormatException NoHeader(string file, CsvHead head) => LogFormatException.At(file, 1, null,
        FormattableString.Invariant($"{head.Width} columns without a header"), "a header, or names for the columns",
        "Say what they are: --column time=\"column 1\":s --column yaw_rate=\"column 2\":deg/s and so on.");

    private LogFormatException NothingKnown() => _head.HeaderLine == 0
        ? NoHeader(_file, _head)
        : LogFormatException.At(_file, _head.HeaderLine, null, $"no column that is known beside the time; the header has {Names()}", "columns such as yaw_rate, throttle, rpm, latitude",
            "Name them: --column ROLE=NAME:UNIT.");

    private static string Quoted(IEnumerable<CsvColumn> columns) => string.Join(", ", columns.Select(c => $"\"{c.Name}\""));

    private static string Examples(ChannelRole role) => role switch
    {
        ChannelRole.Time => "s, ms, us",
        ChannelRole.Date => "dmy, mdy",
        ChannelRole.Throttle => "%, 0-1, us, -1024..1024",
        ChannelRole.Rpm => "rpm, rev/s",
        ChannelRole.YawRate or ChannelRole.GyroX or ChannelRole.GyroY or ChannelRole.GyroZ or ChannelRole.RollRate => "deg/s, rad/s",
        ChannelRole.AccelerationX or ChannelRole.AccelerationY or ChannelRole.AccelerationZ => "m/s2, g",
        ChannelRole.Heading or ChannelRole.Roll or ChannelRole.GroundCourse or ChannelRole.Latitude or ChannelRole.Longitude or ChannelRole.Position => "deg, rad",
        ChannelRole.BrakeLeft or ChannelRole.BrakeRight or ChannelRole.BrakeDifference or ChannelRole.TrimmerLeft or ChannelRole.TrimmerRight => "%, mm, cm, count",
        ChannelRole.Altitude => "m, ft",
        ChannelRole.Pressure => "hPa, Pa",
        ChannelRole.Power => "W, kW",
        ChannelRole.Voltage => "V, mV",
        ChannelRole.Current or ChannelRole.MotorCurrent => "A, mA",
        ChannelRole.Accelerator or ChannelRole.EngineNoise => "%, 0-1",
        ChannelRole.HandsOff or ChannelRole.Marker => "count",
        _ => "m/s, km/h",
    };
}
