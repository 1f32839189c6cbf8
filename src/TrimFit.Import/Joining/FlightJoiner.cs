using TrimFit.Core.Logs;
using static System.FormattableString;

namespace TrimFit.Import.Joining;

/// <summary>Brings the files of one flight to one clock and into one log.</summary>
/// <remarks>
/// <para>The clock that stays is UTC with positions before UTC, before date and time, before time of day, before seconds; then the first given.
/// Files of one folder or zip with the same kind of clock share it. Every other clock is placed by its stamps when both have them, and by what
/// both loggers felt (turn rate, climb, engine, speed) when they have not, or when that says clearly that the stamps are wrong. An offset that does not stand out
/// is refused: a wrong one would turn the pull into something else without a sign of it.</para>
/// <para>Time stamps are united; nothing is resampled. Where two loggers have the same quantity, the group it belongs to is taken from the
/// faster one (position and motion, body sensors, brakes, trimmers as groups; others one by one), the first given when they are alike.</para>
/// </remarks>
public static class FlightJoiner
{
    private const double SecondsPerDay = 86_400, HalfHour = 1800;

    /// <summary>Disagreement of stamps and data that is acted on: above this and above four standard errors. Below it lies the delay of a GPS receiver.</summary>
    private const double LeastClockErrorSec = 1.0;

    /// <summary>Time stamps closer than this are one, s: far below any logger's clock, far above rounding.</summary>
    private const double SameStampSec = 1e-6;

    /// <summary>Joins tables of loggers that have nothing to do with each other.</summary>
    /// <exception cref="LogFormatException">A clock cannot be placed.</exception>
    public static FlightImport Join(IReadOnlyList<LogTable> tables) => Join([.. tables.Select(table => (table, (string?)null))], []);

    /// <summary>Joins tables, each with the recording (folder or zip) it came out of.</summary>
    internal static FlightImport Join(IReadOnlyList<(LogTable Table, string? Recording)> tables, IEnumerable<Notice> before)
    {
        if (tables.Count == 0)
            throw new ArgumentException("needs at least one table", nameof(tables));
        var warnings = new List<Notice>(before);
        warnings.AddRange(tables.SelectMany(t => t.Table.Warnings));
        List<ClockUnit> units = Units(tables);
        ClockUnit reference = units.OrderByDescending(Rank).First(); // stable: the first given among equals
        PlaceAll(units, reference, warnings);

        double zero = units.Min(unit => unit.Members.Min(m => m.Table.TimeSec[0] + unit.ShiftOf(m)));
        foreach (ClockUnit unit in units)
            unit.Shift -= zero;
        var placed = new List<PlacedTable>();
        foreach ((LogTable table, _) in tables)
        {
            ClockUnit unit = units.First(u => u.Members.Exists(m => m.Table == table));
            ClockMember member = unit.Members.First(m => m.Table == table);
            placed.Add(new(table, unit.ShiftOf(member), member.Device, unit));
        }
        Dictionary<ChannelRole, PlacedTable> owners = Owners(placed, warnings);
        (double[] time, Dictionary<ChannelRole, double[]> columns) = Unite(placed, owners);
        (DateTimeOffset? start, TimeSpan? timeOfDay) = reference.StartAt(zero);
        var flight = FlightLog.TakeOver(time, columns, new()
        {
            StartUtc = start,
            StartTimeOfDay = timeOfDay,
            BrakeUnit = UnitOf(owners, t => t.BrakeUnit, ChannelRole.BrakeLeft, ChannelRole.BrakeRight, ChannelRole.BrakeDifference),
            TrimmerUnit = UnitOf(owners, t => t.TrimmerUnit, ChannelRole.TrimmerLeft, ChannelRole.TrimmerRight),
        });
        return new(flight, new()
        {
            Files = [.. placed.Select(p => FileOf(p, owners))],
            Sampling = FlightAssembler.Summarise(time, columns.Values, start) with { StartIsUtc = reference.IsUtc },
            Warnings = [.. warnings],
        });
    }

    private static List<ClockUnit> Units(IReadOnlyList<(LogTable Table, string? Recording)> tables)
    {
        var units = new List<ClockUnit>();
        for (int i = 0; i < tables.Count; i++)
        {
            (LogTable table, string? recording) = tables[i];
            object device = recording is null ? table : recording;
            ClockUnit? unit = recording is null ? null : units.Find(u => u.Recording == recording && u.Clock == table.Clock);
            if (unit is null)
                units.Add(unit = new(recording, table));
            unit.Add(table, device);
        }
        return units;
    }

    private static int Rank(ClockUnit unit) =>
        (unit.Clock switch { ClockKind.Absolute => 4, ClockKind.TimeOfDay => 2, _ => 0 } * 4) + (unit.IsUtc ? 2 : 0) + (unit.HasPositions ? 1 : 0);

    private static void PlaceAll(List<ClockUnit> units, ClockUnit reference, List<Notice> warnings)
    {
        var done = new List<ClockUnit> { reference };
        var left = new List<ClockUnit>(units.Where(u => u != reference));
        // A clock that shares no signal with the reference may share one with a logger placed after it, so those that fail wait for another round.
        while (left.Count > 0)
        {
            ClockUnit? placed = left.Find(unit => TryPlace(unit, reference, done, warnings, last: false)) ?? (TryPlace(left[0], reference, done, warnings, last: true) ? left[0] : null);
            if (placed is null)
                break;
            done.Add(placed);
            left.Remove(placed);
        }
    }

    private static bool TryPlace(ClockUnit unit, ClockUnit reference, List<ClockUnit> done, List<Notice> warnings, bool last)
    {
        TrackSignal[] first = [.. done.SelectMany(u => u.Signals())];
        TrackSignal[] second = [.. unit.Signals()];
        double from = done.Min(u => u.Start), to = done.Max(u => u.End);
        double? stamped = unit.StampShift(reference);
        ClockMatch? match = ClockMatch.Best(first, second);
        bool overlaps = stamped is double s0 && Overlap(unit, s0, from, to) > 0;
        if (stamped is double stamp && overlaps)
        {
            if (match is { IsFirm: true } firm && Math.Abs(firm.OffsetSec - stamp) > Math.Max(LeastClockErrorSec, 4 * firm.StdErrorSec))
            {
                warnings.Add(new("clocks_disagree", Invariant($"The clock of {unit.Name} is {Math.Abs(firm.OffsetSec - stamp):F1} s {(firm.OffsetSec < stamp ? "ahead of" : "behind")} that of {reference.Name} by their {firm.Signals} (correlation {firm.Correlation:F2}); it is moved by that, good to {1.96 * firm.StdErrorSec:F1} s.")));
                unit.Place(firm.OffsetSec, firm.OffsetSec - stamp, firm.StdErrorSec);
            }
            else
            {
                unit.Place(stamp, null, null);
            }
            return true;
        }
        if (match is { IsFirm: true } found)
        {
            double? moved = stamped is double at ? found.OffsetSec - at : null;
            warnings.Add(new("clock_found", Invariant($"The clock of {unit.Name} was found from its {found.Signals} against {reference.Name}: correlation {found.Correlation:F2}, good to {1.96 * found.StdErrorSec:F1} s.")));
            unit.Place(found.OffsetSec, moved, found.StdErrorSec);
            return true;
        }
        if (stamped is double zone && !(unit.IsUtc && reference.IsUtc) && ZoneShift(unit, zone, from, to) is double hours)
        {
            warnings.Add(new("clock_zone", Invariant($"The clock of {unit.Name} is taken to be {Math.Abs(hours) / 3600:0.#} h {(hours < 0 ? "ahead of" : "behind")} that of {reference.Name}, as local time is; only so do the two overlap.")));
            unit.Place(zone + hours, hours, null);
            return true;
        }
        if (!last)
            return false;
        string seen = match is null ? "no signal that both logged"
            : match.NextOffsetSec is double next ? Invariant($"no offset of their {match.Signals} that stands out (correlation {match.Correlation:F2} at {match.OffsetSec - done[0].Start + unit.Start:F0} s, {match.NextCorrelation:F2} at {next - done[0].Start + unit.Start:F0} s)")
            : Invariant($"too little agreement of their {match.Signals} (correlation {match.Correlation:F2})");
        throw LogFormatException.At(unit.Name, null, null, $"a clock that cannot be brought to that of {reference.Name}: {seen}", "date and time in both files, or a turn rate, climb or engine signal in both",
            "Check that the files are of one flight, or give them one at a time.");
    }

    private static double Overlap(ClockUnit unit, double shift, double from, double to) => Math.Min(to, unit.StartAtShift(shift) + unit.Length) - Math.Max(from, unit.StartAtShift(shift));

    /// <summary>The one whole or half hour that makes two loggers overlap by most of the shorter one; null when none or several do.</summary>
    private static double? ZoneShift(ClockUnit unit, double stamped, double from, double to)
    {
        double[] fits = [.. Enumerable.Range(-28, 57).Select(k => k * HalfHour).Where(shift => Overlap(unit, stamped + shift, from, to) >= 0.8 * Math.Min(unit.Length, to - from))];
        double[] whole = [.. fits.Where(shift => shift % 3600 == 0)];
        return fits.Length == 1 ? fits[0] : whole.Length == 1 ? whole[0] : null;
    }

    private static readonly ChannelRole[][] _groups =
    [
        [ChannelRole.Latitude, ChannelRole.Longitude, ChannelRole.GroundSpeed, ChannelRole.GroundCourse, ChannelRole.VelocityNorth, ChannelRole.VelocityEast],
        [ChannelRole.YawRate],
        [ChannelRole.GyroX, ChannelRole.GyroY, ChannelRole.GyroZ, ChannelRole.AccelerationX, ChannelRole.AccelerationY, ChannelRole.AccelerationZ],
        [ChannelRole.BrakeLeft, ChannelRole.BrakeRight, ChannelRole.BrakeDifference],
        [ChannelRole.TrimmerLeft, ChannelRole.TrimmerRight],
    ];

    /// <summary>Which table gives each role.</summary>
    private static Dictionary<ChannelRole, PlacedTable> Owners(List<PlacedTable> placed, List<Notice> warnings)
    {
        var owners = new Dictionary<ChannelRole, PlacedTable>();
        ChannelRole[] roles = [.. placed.SelectMany(p => p.Table.Columns.Keys).Distinct().Order()];
        IEnumerable<ChannelRole[]> groups = _groups.Concat(roles.Where(role => !_groups.Any(g => g.Contains(role))).Select(role => new[] { role }));
        foreach (ChannelRole[] group in groups)
        {
            // Files of one device complement each other; between devices one is chosen for the whole group, since axes and units of two do not mix.
            var devices = placed.Where(p => group.Any(p.Table.Columns.ContainsKey)).GroupBy(p => p.Device)
                .Select(d => (Device: d.ToList(), Rate: d.Max(p => group.Max(role => Rate(p.Table, role))))).ToList();
            if (devices.Count == 0)
                continue;
            (List<PlacedTable> Device, double Rate) best = devices.OrderByDescending(d => d.Rate).First(); // stable: the first given among equals
            foreach (ChannelRole role in group)
            {
                PlacedTable? owner = best.Device.Where(p => p.Table.Columns.ContainsKey(role)).OrderByDescending(p => Rate(p.Table, role)).FirstOrDefault();
                if (owner is not null)
                    owners[role] = owner;
            }
            if (devices.Count == 1)
                continue;
            PlacedTable chosen = best.Device.First(p => group.Any(p.Table.Columns.ContainsKey));
            string words = string.Join(", ", group.Where(owners.ContainsKey).Select(ChannelRoles.NameOf));
            string others = string.Join(", ", devices.Where(d => d.Device != best.Device).Select(d => Invariant($"{d.Device[0].Table.File.Name} ({d.Rate:0.##} Hz)")));
            warnings.Add(new("role_in_two_files", Invariant($"{words}: taken from {chosen.Table.File.Name} ({best.Rate:0.##} Hz), not from {others}.")));
        }
        return owners;
    }

    /// <summary>Values per second over the table's length.</summary>
    private static double Rate(LogTable table, ChannelRole role)
    {
        if (!table.Columns.TryGetValue(role, out double[]? column))
            return 0;
        double length = table.TimeSec[^1] - table.TimeSec[0];
        return length > 0 ? Math.Max(0, column.Count(double.IsFinite) - 1) / length : 0;
    }

    private static ControlUnit UnitOf(Dictionary<ChannelRole, PlacedTable> owners, Func<LogTable, ControlUnit> unit, params ReadOnlySpan<ChannelRole> roles)
    {
        foreach (ChannelRole role in roles)
        {
            if (owners.TryGetValue(role, out PlacedTable? owner))
                return unit(owner.Table);
        }
        return ControlUnit.Fraction;
    }

    private static (double[] Time, Dictionary<ChannelRole, double[]> Columns) Unite(List<PlacedTable> placed, Dictionary<ChannelRole, PlacedTable> owners)
    {
        List<PlacedTable> used = [.. placed.Where(p => owners.Count == 0 || owners.ContainsValue(p))]; // without any role the stamps alone are shown
        int[] next = new int[used.Count];
        int[][] rows = [.. used.Select(p => new int[p.Table.TimeSec.Length])];
        var time = new List<double>(used.Max(p => p.Table.TimeSec.Length));
        while (true)
        {
            double earliest = double.PositiveInfinity;
            for (int k = 0; k < used.Count; k++)
            {
                if (next[k] < rows[k].Length)
                    earliest = Math.Min(earliest, used[k].Table.TimeSec[next[k]] + used[k].Shift);
            }
            if (double.IsPositiveInfinity(earliest))
                break;
            for (int k = 0; k < used.Count; k++)
            {
                if (next[k] < rows[k].Length && used[k].Table.TimeSec[next[k]] + used[k].Shift - earliest < SameStampSec)
                    rows[k][next[k]++] = time.Count;
            }
            time.Add(earliest);
        }
        var columns = new Dictionary<ChannelRole, double[]>();
        foreach ((ChannelRole role, PlacedTable owner) in owners)
        {
            double[] column = new double[time.Count];
            Array.Fill(column, double.NaN);
            int[] row = rows[used.IndexOf(owner)];
            double[] values = owner.Table.Columns[role];
            for (int i = 0; i < row.Length; i++)
                column[row[i]] = values[i];
            columns[role] = column;
        }
        return ([.. time], columns);
    }

    private static InputFile FileOf(PlacedTable placed, Dictionary<ChannelRole, PlacedTable> owners) => placed.Table.File with
    {
        // A clock that only counts seconds had no place before: its offset is where on the flight's clock it shows 0.
        ClockOffsetSec = placed.Unit.OffsetSec ?? (placed.Unit.OffsetStdErrorSec is null ? null : placed.Shift - placed.Table.ElapsedStartSec),
        ClockOffsetStdErrorSec = placed.Unit.OffsetStdErrorSec,
        Columns = [.. placed.Table.File.Columns.Select(c => c.Role is ChannelRole role && owners.TryGetValue(role, out PlacedTable? owner) && owner != placed
            ? c with { Role = null, Basis = $"{ChannelRoles.NameOf(role)} is taken from {owner.Table.File.Name}" }
            : c)],
    };

    private sealed record PlacedTable(LogTable Table, double Shift, object Device, ClockUnit Unit);

    private sealed record ClockMember(LogTable Table, object Device, double InnerShift);

    /// <summary>Tables that share a clock.</summary>
    private sealed class ClockUnit(string? recording, LogTable first)
    {
        public string? Recording => recording;

        public string Name => recording ?? first.File.Name;

        public ClockKind Clock => first.Clock;

        public bool IsUtc => Members.Exists(m => m.Table.IsUtc);

        public bool HasPositions => Members.Exists(m => m.Table.Columns.ContainsKey(ChannelRole.Latitude));

        public List<ClockMember> Members { get; } = [];

        /// <summary>Added to the unit's clock to give the flight's, s.</summary>
        public double Shift { get; set; }

        public double? OffsetSec { get; private set; }

        public double? OffsetStdErrorSec { get; private set; }

        public double Start => StartAtShift(Shift);

        public double End => Start + Length;

        public double Length => Members.Max(m => m.Table.TimeSec[^1] + m.InnerShift) - Members.Min(m => m.Table.TimeSec[0] + m.InnerShift);

        public double StartAtShift(double shift) => Members.Min(m => m.Table.TimeSec[0] + m.InnerShift) + shift;

        public double ShiftOf(ClockMember member) => member.InnerShift + Shift;

        public IEnumerable<TrackSignal> Signals() => Members.SelectMany(m => TrackSignal.Of(m.Table, ShiftOf(m)));

        public void Add(LogTable table, object device) => Members.Add(new(table, device, Clock switch
        {
            ClockKind.Absolute => (table.Origin!.Value - first.Origin!.Value).TotalSeconds,
            ClockKind.Elapsed => table.ElapsedStartSec - first.ElapsedStartSec,
            _ => 0,
        }));

        /// <summary>Shift by the stamps of both; null when one of them only counts seconds.</summary>
        public double? StampShift(ClockUnit reference)
        {
            if (Clock == ClockKind.Elapsed || reference.Clock == ClockKind.Elapsed)
                return null;
            if (Clock == ClockKind.Absolute && reference.Clock == ClockKind.Absolute)
                return (first.Origin!.Value - reference.Origin!.Value).TotalSeconds;
            // One of them knows the time of day only: the day is the one that brings them closest together.
            double mine = OriginOfDay, its = reference.OriginOfDay;
            double shift = mine - its;
            double apart = StartAtShift(shift) + (Length / 2) - ((reference.Start + reference.End) / 2);
            return shift - (SecondsPerDay * Math.Round(apart / SecondsPerDay));
        }

        public void Place(double shift, double? offset, double? stdError) => (Shift, OffsetSec, OffsetStdErrorSec) = (shift, offset, stdError);

        /// <summary>Absolute time and time of day at a moment of the unit's clock.</summary>
        public (DateTimeOffset? Start, TimeSpan? TimeOfDay) StartAt(double zero) => Clock switch
        {
            ClockKind.Absolute => (Origin!.Value.AddTicks((long)Math.Round(zero * TimeSpan.TicksPerSecond)), null),
            ClockKind.TimeOfDay => (null, TimeSpan.FromSeconds(zero - (SecondsPerDay * Math.Floor(zero / SecondsPerDay)))),
            _ => (null, null),
        };

        private DateTimeOffset? Origin => first.Origin;

        /// <summary>Time of day at the clock's zero, s; a clock of times of day has its zero at midnight.</summary>
        private double OriginOfDay => Clock == ClockKind.Absolute ? Origin!.Value.UtcDateTime.TimeOfDay.TotalSeconds : 0;
    }
}
