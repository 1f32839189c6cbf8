using System.Collections.Immutable;
using static System.FormattableString;

namespace TrimFit.Core.Logs;

/// <summary>Finds the legs of a flight sheet in the flight.</summary>
/// <remarks>
/// <para>An edge may be off by 5 s. It is moved to the largest change of a control near it: for hands-off, held and brake legs of a brake, else of
/// the throttle (or what follows it: rpm, power, current, engine noise). A change counts when the column's means on both sides differ by 15 % of
/// its range over the flight and by two standard deviations of what is left; its place is the split with the least sum of squares.</para>
/// <para>A hands-off leg whose edge shows in no control loses 5 s at that edge: what is called hands off must be.</para>
/// <para>Marks are those of <see cref="FlightMarks"/>.</para>
/// <para>Clock times are the log's own, or differ from it by whole quarters of an hour, as a watch on local time does.</para>
/// </remarks>
public static class SheetLegs
{
    /// <summary>How far an edge on a sheet may be off, s.</summary>
    public const double EdgeToleranceSec = 5;

    private const double LevelSec = 3;          // levels on both sides are taken over 3 s beyond the tolerance
    private const double LeastShareOfRange = 0.15;
    private const double LeastDeviations = 2;
    private const double ShortestLegSec = 3;
    private const double SecondsPerDay = 86_400, QuarterHour = 900;

    private static readonly ChannelRole[] _brakes = [ChannelRole.BrakeLeft, ChannelRole.BrakeRight, ChannelRole.BrakeDifference];
    private static readonly ChannelRole[] _throttles = [ChannelRole.Throttle, ChannelRole.Rpm, ChannelRole.Power, ChannelRole.Current, ChannelRole.EngineNoise];

    /// <summary>Places every leg, moves its edges to the data, and fills the hands-off column.</summary>
    public static SheetedFlight Apply(FlightLog flight, FlightSheet sheet)
    {
        ArgumentNullException.ThrowIfNull(flight);
        ArgumentNullException.ThrowIfNull(sheet);
        if (flight.Count == 0)
            return new() { Flight = flight, Legs = [] };
        var warnings = ImmutableArray.CreateBuilder<Notice>();
        if (sheet.Date is DateOnly date && flight.StartUtc is DateTimeOffset start && Math.Abs(date.DayNumber - DateOnly.FromDateTime(start.UtcDateTime).DayNumber) > 1)
            warnings.Add(new("sheet_date", Invariant($"The flight sheet is of {date:yyyy-MM-dd}, the log of {start.UtcDateTime:yyyy-MM-dd}: check that they belong together.")));
        double? clockToLog = ClockToLog(flight, sheet, warnings);
        ReadOnlySpan<double> time = flight.TimeSec;
        ImmutableArray<FlightMark> marks = sheet.Legs.Any(leg => leg.Start.Kind == SheetTimeKind.Marker) ? FlightMarks.Of(flight) : [];
        if (!marks.IsEmpty && marks[0].Kind != FlightMarkKind.Channel)
        {
            string what = marks[0].Kind == FlightMarkKind.Blips ? "three quick throttle blips" : "a pause of the recorder";
            warnings.Add(new("sheet_marks", Invariant($"The marks of the flight sheet are taken from {what}: {marks.Length} found, at {string.Join(", ", marks.Select(m => m.TimeSec.ToString("F0", System.Globalization.CultureInfo.InvariantCulture)))} s.")));
        }
        var legs = ImmutableArray.CreateBuilder<FoundLeg>();
        foreach (SheetLeg leg in sheet.Legs)
        {
            if (Stated(leg, clockToLog, marks) is not (double stated, double statedEnd))
            {
                if (leg.Start.Kind == SheetTimeKind.Marker)
                    warnings.Add(new("sheet_mark_missing", Invariant($"The leg on line {leg.Line} of the flight sheet runs from mark {leg.Start.Value} to mark {leg.End.Value}, which the log does not hold; it is left out.")));
                continue;
            }
            if (stated < time[0] - EdgeToleranceSec || statedEnd > time[^1] + EdgeToleranceSec)
            {
                warnings.Add(new("sheet_leg_outside", Invariant($"The leg on line {leg.Line} of the flight sheet, {stated:F0} to {statedEnd:F0} s, lies outside the log, which runs from {time[0]:F0} to {time[^1]:F0} s; it is left out.")));
                continue;
            }
            if (Find(flight, leg, stated, statedEnd) is FoundLeg found)
                legs.Add(found);
            else
                warnings.Add(new("sheet_leg_short", Invariant($"The hands-off leg on line {leg.Line} of the flight sheet is too short once {EdgeToleranceSec} s are taken off edges that no control shows; it is left out.")));
        }
        FlightLog marked = sheet.Legs.Any(leg => leg.Kind == SheetLegKind.HandsOff)
            ? flight.WithChannel(ChannelRole.HandsOff, HandsOff(flight, legs))
            : flight;
        return new() { Flight = marked, Legs = legs.ToImmutable(), Warnings = warnings.ToImmutable() };
    }

    private static double[] HandsOff(FlightLog flight, IEnumerable<FoundLeg> legs)
    {
        ReadOnlySpan<double> time = flight.TimeSec, logged = flight[ChannelRole.HandsOff];
        double[] column = new double[time.Length];
        for (int i = 0; i < logged.Length; i++)
            column[i] = logged[i] > 0 ? 1 : 0;
        foreach (FoundLeg found in legs.Where(l => l.Leg.Kind == SheetLegKind.HandsOff))
        {
            for (int i = 0; i < time.Length; i++)
            {
                if (time[i] >= found.StartSec && time[i] <= found.EndSec)
                    column[i] = 1;
            }
        }
        return column;
    }

    private static FoundLeg? Find(FlightLog flight, SheetLeg leg, double stated, double statedEnd)
    {
        double middle = (stated + statedEnd) / 2;
        (double at, ChannelRole role)? start = Edge(flight, leg.Kind, stated, double.NegativeInfinity, middle, first: true);
        (double at, ChannelRole role)? end = Edge(flight, leg.Kind, statedEnd, middle, double.PositiveInfinity, first: false);
        double margin = leg.Kind == SheetLegKind.HandsOff ? EdgeToleranceSec : 0;
        var found = new FoundLeg
        {
            Leg = leg,
            StatedStartSec = stated,
            StatedEndSec = statedEnd,
            StartSec = start?.at ?? Math.Max(stated + margin, flight.TimeSec[0]),
            EndSec = end?.at ?? Math.Min(statedEnd - margin, flight.TimeSec[^1]),
            StartFoundIn = start?.role,
            EndFoundIn = end?.role,
        };
        return leg.Kind == SheetLegKind.HandsOff && !(found.EndSec - found.StartSec >= ShortestLegSec) ? null
            : found.EndSec > found.StartSec ? found
            : found with { StartSec = stated, EndSec = statedEnd, StartFoundIn = null, EndFoundIn = null };
    }

    private static (double At, ChannelRole Role)? Edge(FlightLog flight, SheetLegKind kind, double stated, double after, double before, bool first)
    {
        ChannelRole[][] groups = kind is SheetLegKind.HandsOff or SheetLegKind.Held or SheetLegKind.BrakeStep ? [_brakes, _throttles] : [_throttles, _brakes];
        foreach (ChannelRole[] group in groups)
        {
            double largest = 0;
            (double, ChannelRole)? edge = null;
            foreach (ChannelRole role in group)
            {
                if (flight.Has(role) && Change(flight.TimeSec, flight[role], stated, after, before, first) is (double at, double size) && size > largest)
                    (largest, edge) = (size, (at, role));
            }
            if (edge is not null)
                return edge;
        }
        return null;
    }

    /// <summary>The best split of a column near a moment into two levels, with the step as a share of the column's range; null when there is none.</summary>
    private static (double At, double Size)? Change(ReadOnlySpan<double> time, ReadOnlySpan<double> column, double stated, double after, double before, bool first)
    {
        double from = Math.Max(stated - EdgeToleranceSec - LevelSec, after), to = Math.Min(stated + EdgeToleranceSec + LevelSec, before);
        var at = new List<double>();
        var values = new List<double>();
        for (int i = 0; i < time.Length; i++)
        {
            if (time[i] >= from && time[i] <= to && double.IsFinite(column[i]))
            {
                at.Add(time[i]);
                values.Add(column[i]);
            }
        }
        int n = values.Count;
        double range = Range(column);
        if (n < 6 || !(range > 0))
            return null;
        double mean = values.Average(), leftSum = 0, total = values.Sum(v => (v - mean) * (v - mean));
        int split = -1;
        double bestBetween = 0, bestStep = 0;
        for (int i = 1; i < n; i++)
        {
            leftSum += values[i - 1] - mean;
            if (i < 2 || n - i < 2 || Math.Abs(at[first ? i : i - 1] - stated) > EdgeToleranceSec)
                continue;
            // Sum of squares between the two levels; values are centred, so the right sum is minus the left one.
            double between = leftSum * leftSum * n / ((double)i * (n - i));
            if (between > bestBetween)
                (split, bestBetween, bestStep) = (i, between, Math.Abs(leftSum) * n / ((double)i * (n - i)));
        }
        if (split < 0)
            return null;
        double deviation = Math.Sqrt(Math.Max(0, total - bestBetween) / (n - 2));
        return bestStep >= LeastShareOfRange * range && bestStep >= LeastDeviations * deviation
            ? (at[first ? split : split - 1], bestStep / range)
            : null;
    }

    /// <summary>Between the 5 % and the 95 % point of a column, so that single wild values do not count.</summary>
    private static double Range(ReadOnlySpan<double> column)
    {
        var finite = new List<double>();
        foreach (double value in column)
        {
            if (double.IsFinite(value))
                finite.Add(value);
        }
        if (finite.Count == 0)
            return 0;
        finite.Sort();
        return finite[(int)(0.95 * (finite.Count - 1))] - finite[(int)(0.05 * (finite.Count - 1))];
    }

    private static (double Start, double End)? Stated(SheetLeg leg, double? clockToLog, ImmutableArray<FlightMark> marks)
    {
        switch (leg.Start.Kind)
        {
            case SheetTimeKind.Seconds:
                return (leg.Start.Value, leg.End.Value);
            case SheetTimeKind.Marker:
                return Mark(marks, leg.Start.Value) is double start && Mark(marks, leg.End.Value) is double end ? (start, end) : null;
            default:
                return clockToLog is double shift ? ClockSpan(leg, shift) : null;
        }
    }

    private static (double Start, double End) ClockSpan(SheetLeg leg, double clockToLog)
    {
        double start = leg.Start.Value + clockToLog;
        start -= SecondsPerDay * Math.Floor((start + (SecondsPerDay / 2)) / SecondsPerDay); // to within half a day of the log's zero
        double length = leg.End.Value - leg.Start.Value;
        return (start, start + length + (length < 0 ? SecondsPerDay : 0));
    }

    /// <summary>What is added to seconds since midnight on the sheet to get the log's time; null when it cannot be told.</summary>
    private static double? ClockToLog(FlightLog flight, FlightSheet sheet, ImmutableArray<Notice>.Builder warnings)
    {
        SheetLeg[] legs = [.. sheet.Legs.Where(leg => leg.Start.Kind == SheetTimeKind.Clock)];
        if (legs.Length == 0)
            return null;
        if (flight.StartTimeOfDay is not TimeSpan clock)
        {
            warnings.Add(new("sheet_clock_unknown", "The flight sheet gives clock times, but the log knows no time of day; those legs are left out. Give seconds since the start of the log."));
            return null;
        }
        double first = flight.TimeSec[0], last = flight.TimeSec[^1];
        bool Fits(double shift) => legs.All(leg => ClockSpan(leg, shift) is (double start, double end)
            && start >= first - EdgeToleranceSec && end <= last + EdgeToleranceSec);
        double same = -clock.TotalSeconds;
        if (Fits(same))
            return same;
        double[] quarters = [.. Enumerable.Range(-56, 105).Select(k => k * QuarterHour).Where(q => Fits(same + q))];
        double[] hours = [.. quarters.Where(q => q % 3600 == 0)];
        if (quarters.Length == 0)
            return same;
        if (hours.Length == 1 || quarters.Length == 1)
        {
            double ahead = -(hours.Length == 1 ? hours[0] : quarters[0]);
            warnings.Add(new("sheet_clock_shifted", Invariant($"The clock of the flight sheet is taken to be {Math.Abs(ahead) / 3600:0.##} h {(ahead > 0 ? "ahead of" : "behind")} the log's, as a watch on local time is; only so do the legs lie in the flight.")));
            return same - ahead;
        }
        warnings.Add(new("sheet_clock_ambiguous", "The clock times of the flight sheet fit the log with more than one time zone; those legs are left out. Give seconds since the start of the log, or the log's own clock."));
        return null;
    }

    private static double? Mark(ImmutableArray<FlightMark> marks, double number)
    {
        foreach (FlightMark mark in marks)
        {
            if (mark.Number == number)
                return mark.TimeSec;
        }
        return null;
    }
}
