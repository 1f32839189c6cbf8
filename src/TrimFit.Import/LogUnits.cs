using System.Globalization;
using System.Text;
using TrimFit.Core.Logs;

namespace TrimFit.Import;

/// <summary>The units that logs write, by their spellings. A new unit is one line in the table.</summary>
public static class LogUnits
{
    private const double Degree = Math.PI / 180;
    private const double Foot = 0.3048;           // m, exact: international foot, 1959
    private const double NauticalMile = 1852;     // m, exact: 1st Extraordinary Hydrographic Conference, 1929
    private const double StatuteMile = 1609.344;  // m, exact: 5280 ft
    private const double StandardGravity = 9.80665; // m/s², exact: 3rd CGPM, 1901
    private const double Horsepower = 745.69987158227022; // W, exact: 550 ft·lbf/s
    private const double MetricHorsepower = 735.49875; // W, exact: 75 kgf·m/s

    // First the name used in reports, then the other spellings. Spellings are compared after Simplify; where case decides (mW, MW), as written.
    private static readonly (LogUnit Unit, string Spellings)[] _table =
    [
        (new("s", Quantity.Time, 1), "sec secs second seconds sek sekunden secondes segundos secondi сек с 秒"),
        (new("ms", Quantity.Time, 1e-3), "msec millis milliseconds millisecond millisekunden мс"),
        (new("us", Quantity.Time, 1e-6), "usec micros microseconds microsecond"),
        (new("ns", Quantity.Time, 1e-9), "nsec nanos nanoseconds nanosecond"),
        (new("min", Quantity.Time, 60), "mins minute minutes minuten мин"),
        (new("h", Quantity.Time, 3600), "hr hrs hour hours"),
        (new("dmy", Quantity.DateOrder, 1), "dd/mm/yyyy dd.mm.yyyy d/m/y"),
        (new("mdy", Quantity.DateOrder, 2), "mm/dd/yyyy m/d/y"),
        (new("ymd", Quantity.DateOrder, 3), "yyyy-mm-dd yyyy/mm/dd"),
        (new("deg", Quantity.Angle, Degree), "° degree degrees grad @ degs grados gradi degrés градусы"), // "@": RC-telemetry radios without a degree sign
        (new("rad", Quantity.Angle, 1), "radian radians"),
        (new("mrad", Quantity.Angle, 1e-3), ""),
        (new("1e-7 deg", Quantity.Angle, 1e-7 * Degree), "dege7 deg*1e7 degx1e7 1e7deg"),
        (new("0.1 deg", Quantity.Angle, 0.1 * Degree), "decideg ddeg deg/10"),
        (new("0.01 deg", Quantity.Angle, 0.01 * Degree), "centideg cdeg deg/100"),
        (new("deg/s", Quantity.AngularRate, Degree), "dps °/s degs-1 deg*s-1 degrees/s degree/s deg/second degpersec degrees/second degreespersecond grad/s deg_s @/s °s-1"),
        (new("rad/s", Quantity.AngularRate, 1), "rads-1 rad*s-1 radians/s radians/second radpersec rps_rad rad_s"),
        (new("mdeg/s", Quantity.AngularRate, 1e-3 * Degree), "mdps"),
        (new("mrad/s", Quantity.AngularRate, 1e-3), ""),
        (new("cdeg/s", Quantity.AngularRate, 1e-2 * Degree), "cdps"),
        (new("rpm", Quantity.Rotation, 1.0 / 60), "1/min u/min min-1 rev/min tr/min r/min upm g/min об/мин giri/min revs/min /min"),
        (new("rev/s", Quantity.Rotation, 1), "rps hz 1/s rev/sec r/s u/s s-1"),
        (new("krpm", Quantity.Rotation, 1000.0 / 60), "1000rpm rpm*1000 rpmx1000"),
        (new("m/s", Quantity.Speed, 1), "mps ms-1 m*s-1 m/second meters/s meterspersecond metres/s mtr/s м/с m_s"),
        (new("km/h", Quantity.Speed, 1 / 3.6), "kmh kph kmph km*h-1 kmh-1 км/ч"),
        (new("kt", Quantity.Speed, NauticalMile / 3600), "kts kn knot knots nmi/h kt. kn."),
        (new("mph", Quantity.Speed, StatuteMile / 3600), "mi/h miles/h milesperhour"),
        (new("ft/s", Quantity.Speed, Foot), "fps feet/s ft*s-1"),
        (new("ft/min", Quantity.Speed, Foot / 60), "fpm feet/min ft*min-1"),
        (new("cm/s", Quantity.Speed, 0.01), "cms-1"),
        (new("mm/s", Quantity.Speed, 0.001), "mms-1"),
        (new("m/min", Quantity.Speed, 1.0 / 60), ""),
        (new("m", Quantity.Length, 1), "meter meters metre metres mtr metri metros м amsl msl agl mamsl"),
        (new("mm", Quantity.Length, 0.001), "millimeter millimeters millimetre millimetres мм"),
        (new("cm", Quantity.Length, 0.01), "centimeter centimeters centimetre centimetres см"),
        (new("ft", Quantity.Length, Foot), "feet foot fuss piedi"),
        (new("in", Quantity.Length, 0.0254), "inch inches \" zoll"),
        (new("km", Quantity.Length, 1000), ""),
        (new("m/s2", Quantity.Acceleration, 1), "m/s/s mps2 ms2 ms-2 m*s-2 m/sec2 mss м/с2 m_s2"),
        (new("g", Quantity.Acceleration, StandardGravity), "gs g0 gee"),
        (new("mg", Quantity.Acceleration, StandardGravity / 1000), ""),
        (new("Pa", Quantity.Pressure, 1), "pascal pascals"),
        (new("hPa", Quantity.Pressure, 100), "mbar mb millibar"),
        (new("kPa", Quantity.Pressure, 1000), ""),
        (new("bar", Quantity.Pressure, 1e5), ""),
        (new("inHg", Quantity.Pressure, 3386.389), ""), // Pa, conventional inch of mercury at 0 °C, 7 digits
        (new("%", Quantity.Fraction, 0.01), "percent pct perc prozent prc pc procent ％"),
        (new("0-1", Quantity.Fraction, 1), "fraction frac ratio unit norm normalized 0..1"),
        (new("count", Quantity.Count, 1), "counts raw lsb adc ticks steps"),
        (new("V", Quantity.Voltage, 1), "volt volts в"),
        (new("mV", Quantity.Voltage, 1e-3), "millivolt millivolts"),
        (new("A", Quantity.Current, 1), "amp amps ampere amperes"),
        (new("mA", Quantity.Current, 1e-3), "milliamp milliamps"),
        (new("W", Quantity.Power, 1), "watt watts вт"),
        (new("mW", Quantity.Power, 1e-3), ""),
        (new("kW", Quantity.Power, 1000), "kilowatt kilowatts квт"),
        (new("hp", Quantity.Power, Horsepower), "bhp"),
        (new("PS", Quantity.Power, MetricHorsepower), "cv ch"),
        (new("°C", Quantity.Other, 1), "degc celsius c °f f degf fahrenheit k kelvin"),
        (new("dB", Quantity.Other, 1), "dbm dba db(a)"),
        (new("Ah", Quantity.Other, 1), "mah wh kwh mwh l l/h lph gal gph kg n nm n*m gauss ut µt mt nt lux lx ohm mohm bpm ppm rh kb mb/s kbps byte bytes bits mhz psi gals fsd nm"),
    ];

    private static readonly Dictionary<string, LogUnit> _asWritten = new(StringComparer.Ordinal);
    private static readonly Dictionary<string, LogUnit> _anyCase = Index();

    /// <summary>Finds a unit by any spelling: brackets, spaces, case and superscripts do not matter.</summary>
    /// <param name="text">The unit as written, such as <c>[km/h]</c>, <c>°/s</c>, <c>m/s²</c>, or a range <c>0..255</c> that maps to 0 to 1.</param>
    /// <param name="unit">The unit.</param>
    public static bool TryParse(string text, out LogUnit unit)
    {
        string simple = Simplify(text);
        if (_asWritten.TryGetValue(simple, out unit!) || _anyCase.TryGetValue(simple.ToLowerInvariant(), out unit!))
            return true;
        // "ft msl": the word says from where, not in what.
        int space = text.LastIndexOf(' ');
        if (space > 0 && IsRemark(text[(space + 1)..].TrimEnd(')', ']')))
            return TryParse(text[..space], out unit);
        return TryParseRange(simple, out unit);
    }

    /// <summary>Names of the units that fit a role, in the table's order.</summary>
    public static IEnumerable<string> NamesFor(ChannelRole role) => _table.Select(row => row.Unit).Where(unit => Fits(role, unit)).Select(unit => unit.Name);

    /// <summary>Whether a word beside a name or unit says from where a value is, not in what unit: <c>msl</c>, <c>WGS84</c>, <c>utc</c>.</summary>
    internal static bool IsRemark(string word) =>
        word.ToLowerInvariant() is "msl" or "amsl" or "agl" or "baro" or "gps" or "gnss" or "wgs" or "wgs84" or "true" or "mag" or "utc" or "local" or "txt" or "text";

    /// <summary>Whether numbers in the unit can stand in a column of the role.</summary>
    public static bool Fits(ChannelRole role, LogUnit unit)
    {
        ArgumentNullException.ThrowIfNull(unit);
        return role switch
        {
            ChannelRole.Time => unit.Quantity == Quantity.Time || unit.Quantity == Quantity.DateOrder,
            ChannelRole.Date => unit.Quantity == Quantity.DateOrder,
            ChannelRole.Throttle => unit.Quantity == Quantity.Fraction || unit.Name == "us" || unit.Quantity == Quantity.Count,
            ChannelRole.Accelerator or ChannelRole.EngineNoise => unit.Quantity == Quantity.Fraction,
            ChannelRole.Rpm => unit.Quantity == Quantity.Rotation,
            ChannelRole.Power => unit.Quantity == Quantity.Power,
            ChannelRole.Voltage => unit.Quantity == Quantity.Voltage,
            ChannelRole.Current or ChannelRole.MotorCurrent => unit.Quantity == Quantity.Current,
            ChannelRole.YawRate or ChannelRole.GyroX or ChannelRole.GyroY or ChannelRole.GyroZ or ChannelRole.RollRate => unit.Quantity == Quantity.AngularRate,
            ChannelRole.AccelerationX or ChannelRole.AccelerationY or ChannelRole.AccelerationZ => unit.Quantity == Quantity.Acceleration,
            ChannelRole.Heading or ChannelRole.Roll or ChannelRole.GroundCourse or ChannelRole.Latitude or ChannelRole.Longitude or ChannelRole.Position =>
                unit.Quantity == Quantity.Angle,
            ChannelRole.BrakeLeft or ChannelRole.BrakeRight or ChannelRole.BrakeDifference or ChannelRole.TrimmerLeft or ChannelRole.TrimmerRight =>
                unit.Quantity is Quantity.Fraction or Quantity.Length or Quantity.Count || unit.Name == "us",
            ChannelRole.Altitude => unit.Quantity == Quantity.Length,
            ChannelRole.Pressure => unit.Quantity == Quantity.Pressure,
            ChannelRole.VerticalSpeed or ChannelRole.GroundSpeed or ChannelRole.VelocityNorth or ChannelRole.VelocityEast or ChannelRole.Airspeed =>
                unit.Quantity == Quantity.Speed,
            ChannelRole.HandsOff or ChannelRole.Marker => unit.Quantity == Quantity.Count,
            _ => false,
        };
    }

    /// <summary>Unit spelling with the accidents of typing taken away.</summary>
    private static string Simplify(string text)
    {
        var simple = new StringBuilder(text.Length);
        foreach (char c in text)
        {
            switch (c)
            {
                case ' ' or '\t' or '\u00A0' or '(' or ')' or '[' or ']' or '{' or '}' or '<' or '>' or '^':
                    break;
                case '²':
                    simple.Append('2');
                    break;
                case '¹':
                    simple.Append('1');
                    break;
                case '⁻' or '−':
                    simple.Append('-');
                    break;
                case '·' or '×' or '∙':
                    simple.Append('*');
                    break;
                case 'µ' or 'μ':
                    simple.Append('u');
                    break;
                case 'º':
                    simple.Append('°');
                    break;
                default:
                    simple.Append(c);
                    break;
            }
        }
        simple.Replace("/seconds", "/s").Replace("/second", "/s").Replace("/sec", "/s");
        return simple.ToString();
    }

    private static bool TryParseRange(string text, out LogUnit unit)
    {
        unit = null!;
        int dots = text.IndexOf("..", StringComparison.Ordinal);
        if (dots <= 0
            || !double.TryParse(text.AsSpan(0, dots), NumberStyles.Float, CultureInfo.InvariantCulture, out double low)
            || !double.TryParse(text.AsSpan(dots + 2), NumberStyles.Float, CultureInfo.InvariantCulture, out double high)
            || !(high > low) || !double.IsFinite(high - low))
        {
            return false;
        }
        unit = new(text, Quantity.Fraction, 1 / (high - low), -low / (high - low));
        return true;
    }

    private static Dictionary<string, LogUnit> Index()
    {
        var anyCase = new Dictionary<string, LogUnit>(StringComparer.Ordinal);
        foreach ((LogUnit unit, string spellings) in _table)
        {
            _asWritten[Simplify(unit.Name)] = unit;
            anyCase.TryAdd(Simplify(unit.Name).ToLowerInvariant(), unit);
            foreach (string spelling in spellings.Split(' ', StringSplitOptions.RemoveEmptyEntries))
                anyCase.TryAdd(Simplify(spelling).ToLowerInvariant(), unit);
        }
        return anyCase;
    }
}
