using TrimFit.Core.Logs;

namespace TrimFit.Import.Csv;

/// <summary>Brings columns to SI: applies units that are known and infers the others where the data decide.</summary>
internal sealed class CsvUnits
{
    private const double EarthRadius = 6_371_008.8; // m, mean radius of WGS-84 (IUGG); good to 0.6 %, enough to tell km/h from m/s

    /// <summary>How far, as a factor, a fitted scale may lie from a unit's. Half-way between m/s·kt and m/s·mph is 1.07.</summary>
    private const double SpeedScaleRoom = 1.06, RateScaleRoom = 3;

    /// <summary>Values below which a range says nothing about a flight.</summary>
    private const int EnoughValues = 100;

    /// <summary>Yaw rates, in the unit as written, that only degrees per second (above) or only radians per second (below) give in a whole flight.</summary>
    private const double OnlyDegrees = 8;

    /// <summary>Median difference, deg, below which two directions are the same: positions a second apart give a course to about 2 deg.</summary>
    private const double SameDirectionDeg = 4;

    private readonly string _file;
    private readonly double[] _time;
    private readonly Dictionary<ChannelRole, CsvColumn> _columns;
    private readonly List<Notice> _notices;
    private double[]? _latitude, _longitude, _north, _east;

    private CsvUnits(string file, double[] time, IEnumerable<CsvColumn> columns, List<Notice> notices)
    {
        _file = file;
        _time = time;
        _columns = columns.Where(c => c.Role is not null and not ChannelRole.Time and not ChannelRole.Date).ToDictionary(c => c.Role!.Value);
        _notices = notices;
    }

    public ControlUnit BrakeUnit { get; private set; }
    public ControlUnit TrimmerUnit { get; private set; }

    /// <summary>Columns in SI by role. A column whose unit cannot be told loses its role, with a notice that asks.</summary>
    public static CsvUnits Resolve(string file, double[] time, IEnumerable<CsvColumn> columns, List<Notice> notices, out Dictionary<ChannelRole, double[]> si)
    {
        var units = new CsvUnits(file, time, columns, notices);
        foreach (CsvColumn column in units._columns.Values)
            units.DropSentinels(column);
        units.Positions();
        units.Course();
        units.Speeds();
        units.Angles();
        units.Rates();
        units.Others();
        units.BrakeUnit = units.Controls(ChannelRole.BrakeLeft, ChannelRole.BrakeRight, ChannelRole.BrakeDifference);
        units.TrimmerUnit = units.Controls(ChannelRole.TrimmerLeft, ChannelRole.TrimmerRight);
        si = [];
        foreach ((ChannelRole role, CsvColumn column) in units._columns)
        {
            if (column.Role == ChannelRole.Position)
            {
                si[ChannelRole.Latitude] = column.Values;
                si[ChannelRole.Longitude] = column.SecondValues;
            }
            else if (column.Role is not null)
            {
                si[role] = column.Values;
            }
        }
        return units;
    }

    private CsvColumn? Of(ChannelRole role) => _columns.TryGetValue(role, out CsvColumn? column) && column.Role is not null ? column : null;

    // Numbers that loggers write for "no value". They count as that only where they stand far outside everything else in the column.
    private void DropSentinels(CsvColumn column)
    {
        ReadOnlySpan<double> sentinels = [999999, -999999, 99999, -99999, 9999, -9999, -999, -32768, 32767, 65535, -2147483648, 2147483647, 4294967295, 999999.9, 9999.9, 9.99e9];
        // Most columns hold no number as large as the smallest of these words.
        if (!(Largest(column.Values) >= 999))
            return;
        double largest = 0;
        bool any = false;
        foreach (double v in column.Values)
        {
            if (double.IsNaN(v))
                continue;
            if (sentinels.Contains(v)) // exact: both were read from the same decimal digits
                any = true;
            else
                largest = Math.Max(largest, Math.Abs(v));
        }
        if (!any || largest == 0)
            return;
        int dropped = 0;
        double word = 0;
        for (int i = 0; i < column.Values.Length; i++)
        {
            if (sentinels.Contains(column.Values[i]) && Math.Abs(column.Values[i]) > 4 * largest)
            {
                word = column.Values[i];
                column.Values[i] = double.NaN;
                dropped++;
            }
        }
        column.Missing += dropped;
        if (dropped > 0)
            Say("no_value_number", FormattableString.Invariant($"column \"{column.Name}\": {word:R} stands for no value in {dropped} rows; it lies far outside everything else in the column."));
    }

    private void Positions()
    {
        if (Of(ChannelRole.Position) is { } pair)
        {
            NoFixAtZero(pair.Values, pair.SecondValues, pair);
            Apply(pair, pair.Unit ?? Unit("deg"), pair.Unit is null ? "by convention" : pair.UnitBasis);
            for (int i = 0; i < pair.SecondValues.Length; i++)
                pair.SecondValues[i] *= pair.Unit!.Factor;
            (_latitude, _longitude) = (pair.Values, pair.SecondValues);
            return;
        }
        if (Of(ChannelRole.Latitude) is not { } latitude || Of(ChannelRole.Longitude) is not { } longitude)
            return;
        NoFixAtZero(latitude.Values, longitude.Values, latitude);
        double high = Math.Max(Largest(latitude.Values) / 90, Largest(longitude.Values) / 360);
        LogUnit unit = high > 1 ? Unit("1e-7 deg") : Unit("deg");
        string basis = high > 1 ? "inferred from the data" : "by convention";
        if (high * unit.Factor / Unit("deg").Factor > 1)
        {
            Ask(latitude, "deg", "its numbers are no degrees");
            Ask(longitude, "deg", "its numbers are no degrees");
            return;
        }
        if (high > 1)
            Inferred(latitude, unit, "its numbers are too large for degrees");
        Apply(latitude, latitude.Unit ?? unit, latitude.Unit is null ? basis : latitude.UnitBasis);
        Apply(longitude, longitude.Unit ?? unit, longitude.Unit is null ? basis : longitude.UnitBasis);
        (_latitude, _longitude) = (latitude.Values, longitude.Values);
    }

    private void NoFixAtZero(double[] latitude, double[] longitude, CsvColumn column)
    {
        int dropped = 0;
        for (int i = 0; i < latitude.Length; i++)
        {
            if (latitude[i] == 0 && longitude[i] == 0) // exact: receivers without a fix write zeros
            {
                latitude[i] = longitude[i] = double.NaN;
                dropped++;
            }
        }
        column.Missing += dropped;
        if (dropped > 0)
            Say("no_fix", FormattableString.Invariant($"{dropped} positions are 0, 0, which receivers write without a fix; they count as missing."));
    }

    // Ground velocity from positions that moved, over at least a second, on a local plane: enough to tell units, nothing else uses it. Made when asked for.
    private bool HasVelocity()
    {
        if (_north is null && _latitude is { } latitude && _longitude is { } longitude)
            Velocity(latitude, longitude);
        return _north is not null;
    }

    private void Velocity(double[] latitude, double[] longitude)
    {
        _north = NaNs();
        _east = NaNs();
        int last = -1;
        for (int i = 0; i < latitude.Length; i++)
        {
            if (double.IsNaN(latitude[i]) || double.IsNaN(longitude[i]))
                continue;
            if (last < 0)
            {
                last = i;
                continue;
            }
            double dt = _time[i] - _time[last];
            if (dt < 0.9)
                continue;
            if (dt < 5 && (latitude[i] != latitude[last] || longitude[i] != longitude[last]))
            {
                double dLongitude = Math.IEEERemainder(longitude[i] - longitude[last], 2 * Math.PI);
                double north = (latitude[i] - latitude[last]) * EarthRadius / dt;
                double east = dLongitude * Math.Cos(latitude[i]) * EarthRadius / dt;
                for (int k = last + 1; k <= i; k++)
                    (_north[k], _east[k]) = (north, east);
            }
            last = i;
        }
    }

    private void Course()
    {
        if (Of(ChannelRole.GroundCourse) is { } course)
            Angle(course, CourseReference);
    }

    private double[]? CourseReference()
    {
        if (!HasVelocity())
            return null;
        double[] reference = NaNs();
        for (int i = 0; i < reference.Length; i++)
        {
            // Below 2 m/s the rounding of positions turns the direction about.
            if (_north![i] * _north[i] + _east![i] * _east[i] > 4)
                reference[i] = Math.Atan2(_east[i], _north[i]);
        }
        return reference;
    }

    private void Speeds()
    {
        foreach (ChannelRole role in (ReadOnlySpan<ChannelRole>)[ChannelRole.GroundSpeed, ChannelRole.VelocityNorth, ChannelRole.VelocityEast])
        {
            if (Of(role) is not { } column)
                continue;
            if (column.Unit is null && SpeedReference(role) is { } reference && Scale(column.Values, reference) is { } scale
                && Nearest(scale, SpeedScaleRoom, "m/s", "km/h", "kt", "mph", "cm/s") is { } unit)
            {
                Infer(column, unit.Name, FormattableString.Invariant($"it is {1 / scale:G3} times the speed from the positions, m/s"));
            }
            ApplyOrAsk(column, "m/s, km/h, kt, mph");
        }
        if (Of(ChannelRole.Airspeed) is { } airspeed)
            ApplyOrAsk(airspeed, "m/s, km/h, kt, mph");
    }

    private double[]? SpeedReference(ChannelRole role)
    {
        if (!HasVelocity() || role != ChannelRole.GroundSpeed)
            return role == ChannelRole.VelocityNorth ? _north : role == ChannelRole.VelocityEast ? _east : null;
        double[] speed = NaNs();
        for (int i = 0; i < speed.Length; i++)
            speed[i] = Math.Sqrt(_north![i] * _north[i] + _east![i] * _east[i]);
        return speed;
    }

    private void Angles()
    {
        if (Of(ChannelRole.Heading) is { } heading)
        {
            Angle(heading, () => null);
            HeadingThatIsACourse();
        }
        if (Of(ChannelRole.Roll) is not { } roll)
            return;
        if (roll.Unit is null)
        {
            double high = Largest(roll.Values);
            // 1.6 rad is over the side: a wing that flies stays below it nearly always.
            if (high > 2 * Math.PI || high > 3.2 && Share(roll.Values, 0.99) > 1.6)
                Infer(roll, "deg", "its numbers are too large for radians");
            else if (high < 1.6 && Share(roll.Values, 0.99) is > 0.3 and < 1.6)
                Infer(roll, "rad", "in degrees the wing would never have banked");
        }
        ApplyOrAsk(roll, "deg, rad");
    }

    // GPS receivers call the course a heading. Where it is the direction of the way over ground it is used as that; without wind both are the same.
    private void HeadingThatIsACourse()
    {
        if (Of(ChannelRole.Heading) is not { Told: false } heading || Of(ChannelRole.GroundCourse) is not null)
            return;
        double[]? course = Of(ChannelRole.VelocityNorth) is { } north && Of(ChannelRole.VelocityEast) is { } east ? Directions(north.Values, east.Values) : CourseReference();
        if (course is null || Disagreement(heading.Values, 1, course) is not { } degrees || !(degrees < SameDirectionDeg))
            return;
        Say("heading_is_course", FormattableString.Invariant(
            $"column \"{heading.Name}\" is the direction of the way over ground (they differ by {degrees:F1} deg in the median) and is used as ground_course. To use it as the nose's: --column heading={heading.BareName}."));
        _columns.Remove(ChannelRole.Heading);
        heading.Role = ChannelRole.GroundCourse;
        heading.RoleBasis = "name and the data";
        _columns[ChannelRole.GroundCourse] = heading;
    }

    // An angle of the full circle: its unit by its range, and a 16-bit number that ran over is put right.
    private void Angle(CsvColumn column, Func<double[]?> reference)
    {
        if (column.Unit is not null && column.Unit.Quantity == Quantity.Angle && Unwrap16Bit(column, reference))
            return;
        if (column.Unit is null)
        {
            double high = Largest(column.Values);
            if (high > 2 * Math.PI * 1.01)
                Infer(column, "deg", "its numbers are too large for radians");
            else if (Spread(column.Values) > Math.PI && CrossesFullTurn(column.Values, 2 * Math.PI))
                Infer(column, "rad", "it jumps by a full turn of 6.28");
        }
        ApplyOrAsk(column, "deg, rad");
    }

    // Loggers that keep an angle in 16 bits let it run over: the number jumps from +32768 to −32768 units of its last digit and part of the circle
    // is written as negative numbers that no angle has. Putting 65536 units back makes it run from 0 to a full turn.
    private bool Unwrap16Bit(CsvColumn column, Func<double[]?> reference)
    {
        double low = double.PositiveInfinity, high = double.NegativeInfinity;
        foreach (double v in column.Values)
        {
            low = v < low ? v : low;
            high = v > high ? v : high;
        }
        double full = 2 * Math.PI / column.Unit!.Factor;
        for (int digits = 1; digits <= 4; digits++)
        {
            double limit = 32768 * Math.Pow(10, -digits);
            if (!(low < -0.95 * limit && low >= -limit * 1.0001 && high > 0.95 * limit && high <= limit * 1.0001))
                continue;
            double highest = 0;
            foreach (double v in column.Values)
                highest = Math.Max(highest, v < 0 ? v + 2 * limit : v);
            foreach (double times in (ReadOnlySpan<double>)[1, 10, 100, 0.1])
            {
                // A flight that turned all round reaches nearly the full turn and not more; half a turn each way would be an ordinary angle.
                if (highest * times > full * 1.005 || highest * times < full * 0.97 || high * times <= full / 2 * 1.005 && low * times >= -full / 2 * 1.005)
                    continue;
                for (int i = 0; i < column.Values.Length; i++)
                    column.Values[i] = (column.Values[i] < 0 ? column.Values[i] + 2 * limit : column.Values[i]) * times;
                string factor = times == 1 ? "" : FormattableString.Invariant($" and multiplied by {times:R}"); // exact: a constant of the list
                string agrees = reference() is { } course && Disagreement(column.Values, column.Unit.Factor, course) is { } degrees
                    ? FormattableString.Invariant($"; it then differs from the course of the positions by {degrees:F1} deg in the median") : "";
                Say("angle_ran_over", FormattableString.Invariant(
                    $"column \"{column.Name}\" is a 16-bit number that ran over: its negative numbers are raised by {2 * limit:R}{factor}, so that it runs over one full turn{agrees}."));
                Apply(column, column.Unit, $"{column.UnitBasis}, 16-bit number put right");
                return true;
            }
        }
        return false;
    }

    private static double? Disagreement(double[] values, double factor, double[] reference)
    {
        var differences = new List<double>();
        for (int i = 0; i < values.Length; i++)
        {
            double d = Math.Abs(Math.IEEERemainder(values[i] * factor - reference[i], 2 * Math.PI));
            if (!double.IsNaN(d))
                differences.Add(double.RadiansToDegrees(d));
        }
        return differences.Count < 20 ? null : Order.LowerMedian(differences.ToArray());
    }

    private void Rates()
    {
        foreach (ChannelRole role in (ReadOnlySpan<ChannelRole>)[ChannelRole.YawRate, ChannelRole.GyroZ])
        {
            if (Of(role) is not { Unit: null } column)
                continue;
            if (HeadingRate() is { } turning && Scale(column.Values, turning) is { } scale && Nearest(Math.Abs(scale), RateScaleRoom, "rad/s", "deg/s") is { } unit)
                Infer(column, unit.Name, FormattableString.Invariant($"the turn rate of the ground course is {scale:G3} rad/s for each of its numbers"));
            else if (Order.Finite(column.Values).Length >= EnoughValues && Share(column.Values, 0.99) > OnlyDegrees)
                Infer(column, "deg/s", "its numbers are too large for radians per second");
        }
        // The three axes of one gyro share a unit.
        LogUnit? shared = new[] { ChannelRole.GyroZ, ChannelRole.GyroX, ChannelRole.GyroY, ChannelRole.RollRate, ChannelRole.YawRate }.Select(r => Of(r)?.Unit).FirstOrDefault(u => u is not null);
        foreach (ChannelRole role in (ReadOnlySpan<ChannelRole>)[ChannelRole.YawRate, ChannelRole.GyroX, ChannelRole.GyroY, ChannelRole.GyroZ, ChannelRole.RollRate])
        {
            if (Of(role) is not { } column)
                continue;
            if (column.Unit is null && shared is not null)
                Infer(column, shared.Name, "the other turn rates of this file are in it");
            ApplyOrAsk(column, "deg/s, rad/s");
        }
    }

    private void Others()
    {
        foreach (CsvColumn column in _columns.Values.ToList())
        {
            double high = Largest(column.Values);
            switch (column.Role)
            {
                case ChannelRole.Throttle:
                    Throttle(column);
                    break;
                case ChannelRole.Accelerator or ChannelRole.EngineNoise:
                    if (column.Unit is null)
                        Infer(column, high <= 1 ? "0-1" : high <= 100.5 ? "%" : null, "of its range");
                    ApplyOrAsk(column, "%, 0-1");
                    break;
                case ChannelRole.Rpm:
                    if (column.Unit is null && high > 300)
                        Infer(column, "rpm", "no propeller turns that often in a second");
                    ApplyOrAsk(column, "rpm, rev/s");
                    break;
                case ChannelRole.Voltage:
                    if (column.Unit is null)
                        Infer(column, high > 1000 ? "mV" : "V", "of its size");
                    ApplyOrAsk(column, "V, mV");
                    break;
                case ChannelRole.Current or ChannelRole.MotorCurrent:
                    if (column.Unit is null)
                        Infer(column, high > 2000 ? "mA" : "A", "of its size");
                    ApplyOrAsk(column, "A, mA");
                    break;
                case ChannelRole.Power:
                    if (column.Unit is null)
                        Infer(column, high > 200 ? "W" : null, "of its size");
                    ApplyOrAsk(column, "W, kW");
                    break;
                case ChannelRole.Pressure:
                    if (column.Unit is null)
                        Infer(column, high is > 30_000 and < 120_000 ? "Pa" : high is > 300 and < 1200 ? "hPa" : high is > 30 and < 120 ? "kPa" : null, "of the pressure of the air");
                    ApplyOrAsk(column, "hPa, Pa");
                    break;
                case ChannelRole.Altitude:
                    if (column.Unit is null)
                        Infer(column, "m", "nothing says otherwise");
                    ApplyOrAsk(column, "m, ft");
                    break;
                case ChannelRole.VerticalSpeed:
                    if (column.Unit is null)
                        Infer(column, high < 30 ? "m/s" : null, "of its size");
                    ApplyOrAsk(column, "m/s, ft/min");
                    break;
                case ChannelRole.AccelerationX or ChannelRole.AccelerationY or ChannelRole.AccelerationZ:
                    Acceleration(column);
                    break;
                case ChannelRole.HandsOff or ChannelRole.Marker:
                    column.Unit ??= Unit("count");
                    break;
            }
        }
    }

    private void Throttle(CsvColumn column)
    {
        if (column.Unit is { Name: "us" } or { Quantity: Quantity.Count })
        {
            column.Unit = column.Unit.Name == "us" ? new LogUnit("us", Quantity.Fraction, 1e-3, -1) : null; // 1000 to 2000 µs
        }
        if (column.Unit is null)
        {
            double low = Lowest(column.Values), high = Highest(column.Values);
            if (low >= 0 && high <= 1.0001)
                Infer(column, "0-1", "its numbers lie between 0 and 1");
            else if (low >= -1e-9 && high is > 1 and <= 105)
                Infer(column, "%", "its numbers lie between 0 and 100");
            else if (low >= -1.0001 && high <= 1.0001)
                Infer(column, "-1..1", "its numbers lie between -1 and 1, as of a stick");
            else if (low >= -105 && low < -50 && high <= 105)
                Infer(column, "-100..100", "its numbers lie between -100 and 100, as of a stick");
            else if (low is >= -1100 and <= -900 && high <= 1100)
                Infer(column, "-1024..1024", "its numbers begin at -1024, as of a transmitter's stick");
            else if (low is >= 800 and <= 1300 && high is > 1300 and <= 2200)
                Infer(column, "1000..2000", "its numbers lie between 1000 and 2000, as of a servo pulse in us");
        }
        ApplyOrAsk(column, "%, 0-1, 0..255");
    }

    private void Acceleration(CsvColumn column)
    {
        if (column.Unit is null)
        {
            double square = 0;
            foreach (ChannelRole role in (ReadOnlySpan<ChannelRole>)[ChannelRole.AccelerationX, ChannelRole.AccelerationY, ChannelRole.AccelerationZ])
            {
                if (_columns.TryGetValue(role, out CsvColumn? axis) && axis.UnitBasis.Length == 0)
                    square += MeanSquare(axis.Values);
                else if (axis is not null && axis.Unit is not null)
                    square += MeanSquare(axis.Values) / (axis.Unit.Factor * axis.Unit.Factor);
            }
            double size = Math.Sqrt(square);
            Infer(column, size is > 7 and < 16 ? "m/s2" : size is > 0.7 and < 1.6 ? "g" : size is > 700 and < 1600 ? "mg" : null, "gravity has that size in it");
        }
        ApplyOrAsk(column, "m/s2, g");
    }

    // Brakes and trimmers stay in fraction, metres or counts; all of a kind must share it.
    private ControlUnit Controls(params ReadOnlySpan<ChannelRole> roles)
    {
        ControlUnit? found = null;
        CsvColumn? first = null;
        foreach (ChannelRole role in roles)
        {
            if (Of(role) is not { } column)
                continue;
            if (column.Unit is null)
            {
                // A travel in percent, millimetres or counts looks alike, so only a fraction is inferred.
                bool fraction = Lowest(column.Values) >= -1.0001 && Highest(column.Values) <= 1.0001 && HasFractions(column.Values);
                if (fraction)
                {
                    Infer(column, "0-1", "its numbers lie within 1");
                }
                else
                {
                    column.Unit = Unit("count");
                    column.UnitBasis = "not known";
                    Say("control_without_unit", $"column \"{column.Name}\" has no unit; its numbers are used as they are. To say one: --column {ChannelRoles.NameOf(role)}={column.BareName}:% or :mm.");
                }
            }
            ControlUnit kind = column.Unit!.Quantity switch { Quantity.Fraction => ControlUnit.Fraction, Quantity.Length => ControlUnit.Meter, _ => ControlUnit.Count };
            if (found is not null && kind != found)
            {
                Say("control_units_differ", $"columns \"{first!.Name}\" and \"{column.Name}\" are in different units; \"{column.Name}\" is not used.");
                column.Release();
                continue;
            }
            (found, first) = (kind, first ?? column);
            Apply(column, column.Unit, column.UnitBasis);
        }
        return found ?? ControlUnit.Fraction;
    }

    // Turn rate of the ground course, rad/s, over at least two seconds.
    private double[]? HeadingRate()
    {
        double[]? course = Of(ChannelRole.GroundCourse) is { Unit: not null } column ? column.Values
            : Of(ChannelRole.VelocityNorth) is { } north && Of(ChannelRole.VelocityEast) is { } east ? Directions(north.Values, east.Values)
            : CourseReference();
        if (course is null)
            return null;
        const double overSec = 2;
        double[] rate = NaNs();
        int from = -1;
        for (int i = 0; i < course.Length; i++)
        {
            if (double.IsNaN(course[i]))
                continue;
            if (from >= 0)
            {
                double dt = _time[i] - _time[from];
                if (dt < overSec)
                    continue;
                if (dt < 2 * overSec)
                {
                    double turn = Math.IEEERemainder(course[i] - course[from], 2 * Math.PI) / dt;
                    for (int k = from + 1; k <= i; k++)
                        rate[k] = turn;
                }
            }
            from = i;
        }
        return rate;
    }

    private static double[] Directions(double[] north, double[] east)
    {
        double[] directions = new double[north.Length];
        for (int i = 0; i < directions.Length; i++)
            directions[i] = Math.Atan2(east[i], north[i]);
        return directions;
    }

    // Least-squares scale of reference on values where the two go together (correlation above 0.5 over at least 30 values), else null.
    private static double? Scale(double[] values, double[] reference)
    {
        int n = 0;
        double sumX = 0, sumY = 0;
        for (int i = 0; i < values.Length; i++)
        {
            if (double.IsFinite(values[i]) && double.IsFinite(reference[i]))
            {
                n++;
                sumX += values[i];
                sumY += reference[i];
            }
        }
        if (n < 30)
            return null;
        double meanX = sumX / n, meanY = sumY / n, xx = 0, xy = 0, yy = 0;
        for (int i = 0; i < values.Length; i++)
        {
            if (double.IsFinite(values[i]) && double.IsFinite(reference[i]))
            {
                double x = values[i] - meanX, y = reference[i] - meanY;
                xx += x * x;
                xy += x * y;
                yy += y * y;
            }
        }
        if (!(xx > 0 && yy > 0) || !(Math.Abs(xy) / Math.Sqrt(xx * yy) > 0.5))
            return null;
        // The geometric mean of both regressions: noise on either side pulls one down and the other up.
        return Math.Sign(xy) * Math.Sqrt(yy / xx);
    }

    private static LogUnit? Nearest(double scale, double room, params ReadOnlySpan<string> names)
    {
        foreach (string name in names)
        {
            LogUnit unit = Unit(name);
            double ratio = scale / unit.Factor;
            if (ratio < room && ratio > 1 / room)
                return unit;
        }
        return null;
    }

    private void Infer(CsvColumn column, string? unit, string because)
    {
        if (unit is null)
            return;
        column.Unit = Unit(unit);
        column.UnitBasis = "inferred from the data";
        Inferred(column, column.Unit, because);
    }

    private void Inferred(CsvColumn column, LogUnit unit, string because) => Say("unit_inferred",
        $"column \"{column.Name}\" ({ChannelRoles.NameOf(column.Role!.Value)}) has no unit; {unit.Name} is taken, since {because}. To say another: --column {ChannelRoles.NameOf(column.Role.Value)}={column.BareName}:UNIT.");

    private void ApplyOrAsk(CsvColumn column, string choices)
    {
        if (column.Unit is null)
            Ask(column, choices, "the data do not decide it");
        else
            Apply(column, column.Unit, column.UnitBasis);
    }

    private void Ask(CsvColumn column, string choices, string why)
    {
        string example = choices.Split(',')[0];
        Say("unit_unknown", $"column \"{column.Name}\" ({ChannelRoles.NameOf(column.Role!.Value)}) has no unit and {why}; not used. Say it: --column {ChannelRoles.NameOf(column.Role.Value)}={column.BareName}:{example} (or another of {choices}).");
        column.Release();
    }

    private static void Apply(CsvColumn column, LogUnit unit, string basis)
    {
        column.Unit = unit;
        column.UnitBasis = basis;
        if (unit.Factor == 1 && unit.Offset == 0) // exact: constants of the table
            return;
        double[] values = column.Values;
        for (int i = 0; i < values.Length; i++)
            values[i] = values[i] * unit.Factor + unit.Offset;
    }

    private void Say(string code, string sentence) => _notices.Add(new(code, $"{_file}: {sentence}"));

    private static LogUnit Unit(string name) => LogUnits.TryParse(name, out LogUnit unit) ? unit : throw new ArgumentException("no unit", nameof(name));

    private double[] NaNs()
    {
        double[] values = new double[_time.Length];
        Array.Fill(values, double.NaN);
        return values;
    }

    private static double Largest(double[] values) => Math.Max(Math.Abs(Highest(values)), Math.Abs(Lowest(values)));

    private static double Highest(double[] values)
    {
        double high = double.NegativeInfinity;
        foreach (double v in values)
            high = v > high ? v : high;
        return double.IsFinite(high) ? high : 0;
    }

    private static double Lowest(double[] values)
    {
        double low = double.PositiveInfinity;
        foreach (double v in values)
            low = v < low ? v : low;
        return double.IsFinite(low) ? low : 0;
    }

    private static double Spread(double[] values) => Highest(values) - Lowest(values);

    private static double Share(double[] values, double p)
    {
        double[] finite = Order.Finite(values);
        for (int i = 0; i < finite.Length; i++)
            finite[i] = Math.Abs(finite[i]);
        return finite.Length == 0 ? 0 : Order.Share(finite, p);
    }

    private static double MeanSquare(double[] values)
    {
        double sum = 0;
        int n = 0;
        foreach (double v in values)
        {
            if (double.IsFinite(v))
            {
                sum += v * v;
                n++;
            }
        }
        return n == 0 ? 0 : sum / n;
    }

    private static bool HasFractions(double[] values)
    {
        foreach (double v in values)
        {
            if (v != Math.Floor(v)) // exact: whole numbers
                return true;
        }
        return false;
    }

    private static bool CrossesFullTurn(double[] values, double turn)
    {
        double last = double.NaN;
        foreach (double v in values)
        {
            if (Math.Abs(v - last) > 0.8 * turn)
                return true;
            if (double.IsFinite(v))
                last = v;
        }
        return false;
    }
}
