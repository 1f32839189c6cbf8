using System.Globalization;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Units;

namespace TrimFit.Reporting.Wording;

/// <summary>SI numbers as people read them: unit system and culture in one place. Nothing here looks at the current culture.</summary>
internal sealed class Numbers
{
    private const double KilogramsPerPound = 0.45359237; // exact, international yard and pound agreement, 1959
    private const double MetersPerFoot = 0.3048;         // exact, same
    private const double MetersPerMile = 1609.344;       // exact, same

    private readonly NumberFormatInfo _format;
    private readonly Words _words;

    public Numbers(ReportStyle style)
    {
        Imperial = style.Units == UnitSystem.Imperial;
        _words = style.Words;
        _format = (NumberFormatInfo)style.Culture.NumberFormat.Clone();
        _format.NegativeSign = "-"; // some cultures add direction marks or a typographic minus, which break columns and copying
        _format.NumberGroupSeparator = "";
    }

    public bool Imperial { get; }

    public static Numbers Invariant { get; } = new(new ReportStyle());

    public string LengthUnit => Unit(Imperial ? "in" : "mm");
    public string ForceUnit => Imperial ? "lbf" : "N";
    public string MassUnit => Imperial ? "lb" : "kg";
    public string SpeedUnit => Imperial ? "mph" : "m/s";
    public string RateUnit => Unit("deg/s");
    public string AngleUnit => Unit("deg");

    /// <summary>What stands between whole and fraction.</summary>
    public string DecimalMark => _format.NumberDecimalSeparator;

    public string MomentUnit => Imperial ? "lbf ft" : "N m";

    /// <summary>A plain number; never "-0".</summary>
    public string Plain(double value, int decimals)
    {
        double rounded = Math.Round(value, decimals, MidpointRounding.AwayFromZero);
        return (rounded == 0 ? 0 : rounded).ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), _format);
    }

    /// <summary>A number with a given count of significant digits, for quantities of any size.</summary>
    public string Significant(double value, int digits)
    {
        if (value == 0 || !double.IsFinite(value))
            return Plain(double.IsFinite(value) ? 0 : throw new ArgumentOutOfRangeException(nameof(value), value, "must be finite"), 0);
        int decimals = digits - 1 - (int)Math.Floor(Math.Log10(Math.Abs(value)));
        if (decimals < 0 && Math.Abs(value) < 1e7)
            return Plain(value, 0);
        return decimals is >= 0 and <= 6 ? Plain(value, decimals) : value.ToString("G" + digits.ToString(CultureInfo.InvariantCulture), _format);
    }

    /// <summary>A number on an axis.</summary>
    public string Tick(double value)
    {
        double rounded = Math.Round(value, 6); // the axis adds steps up, which leaves dust such as 1E-17 where zero is meant
        return (rounded == 0 ? 0 : rounded).ToString("0.######", _format);
    }

    public string Integer(long value) => value.ToString("D", _format);

    public string Rate(double radPerSec) => RateNumber(radPerSec) + " " + RateUnit;
    public string RateNumber(double radPerSec) => Plain(double.RadiansToDegrees(radPerSec), 1);

    public string Length(double m) => LengthNumber(m) + " " + LengthUnit;

    /// <summary>Whole millimetres, or hundredths of an inch: about what a workshop can set.</summary>
    public string LengthNumber(double m) => Imperial ? Plain(m / PhysicalConstants.MetersPerInch, 2) : Plain(m * 1000, 0);

    /// <summary>A travel of an adjustment, without its sign: millimetres, degrees or kilograms as its kind is set.</summary>
    public string Travel(double value, TravelUnit unit) => With(TravelNumber(Math.Abs(value), unit), TravelUnitName(unit));

    public string TravelNumber(double value, TravelUnit unit) => unit switch
    {
        TravelUnit.Radian => AngleNumber(value),
        TravelUnit.Kilogram => MassNumber(value),
        _ => LengthNumber(value),
    };

    public string TravelUnitName(TravelUnit unit) => unit switch { TravelUnit.Radian => AngleUnit, TravelUnit.Kilogram => MassUnit, _ => LengthUnit };

    /// <summary>A distance flown: kilometres or miles.</summary>
    public string Distance(double m) => Imperial ? Plain(m / MetersPerMile, 1) + " " + Unit("miles") : Plain(m / 1000, 1) + " km";

    public string Force(double n) => ForceNumber(n) + " " + ForceUnit;
    public string ForceNumber(double n) => Plain(ForceValue(n), 0);
    public double ForceValue(double n) => Imperial ? n / PhysicalConstants.NewtonsPerPoundForce : n;
    public string Mass(double kg) => MassNumber(kg) + " " + MassUnit;
    public string MassNumber(double kg) => Plain(Imperial ? kg / KilogramsPerPound : kg, 1);
    public double SpeedValue(double mPerSec) => Imperial ? mPerSec / MetersPerMile * 3600 : mPerSec;
    public string Speed(double mPerSec) => Plain(Imperial ? mPerSec / MetersPerMile * 3600 : mPerSec, 1) + " " + SpeedUnit;
    public string Moment(double nm) => MomentNumber(nm) + " " + MomentUnit;
    public string MomentNumber(double nm) => Plain(Imperial ? nm / PhysicalConstants.NewtonsPerPoundForce / MetersPerFoot : nm, 1);
    /// <summary>Height above ground, in feet rounded up to tens so that a floor stays a floor.</summary>
    public string Height(double m) => Imperial ? Plain(10 * Math.Ceiling((m / MetersPerFoot / 10) - 1e-9), 0) + " ft" : Plain(m, 0) + " m";
    public string Angle(double rad) => With(AngleNumber(rad), AngleUnit);
    public string AngleNumber(double rad) => Plain(double.RadiansToDegrees(rad), 1);
    public string Percent(double fraction) => PercentNumber(fraction) + " %";
    public string PercentNumber(double fraction) => Plain(fraction * 100, 0);

    /// <summary>Minutes and seconds, as a pilot reads a flight.</summary>
    public string Duration(double sec)
    {
        long whole = (long)Math.Round(Math.Max(0, sec), MidpointRounding.AwayFromZero);
        return whole < 60 ? Plain(sec, sec < 10 ? 1 : 0) + " s" : Integer(whole / 60) + " min " + Integer(whole % 60) + " s";
    }

    /// <summary>Sensitivity per millimetre, or per inch.</summary>
    public string SensitivityNumber(double radPerSecPerM)
    {
        double degPerM = double.RadiansToDegrees(radPerSecPerM);
        return Imperial ? Plain(degPerM * PhysicalConstants.MetersPerInch, 2) : Plain(degPerM / 1000, 3);
    }

    public string SensitivityUnit => Unit(Imperial ? "deg/s per in" : "deg/s per mm");

    private string Unit(string unit) => _words.UnitName(unit);

    private static string With(string number, string unit) => unit[0] == '°' ? number + unit : number + " " + unit; // ISO 80000-1, 7.1.4: no space before a degree sign

    /// <summary>Rate interval without unit, in brackets' content form: <c>0.9 to 3.3</c>, joined by the language's word.</summary>
    public string RateRange(ConfidenceInterval interval, string to) => RateNumber(interval.Lower) + to + RateNumber(interval.Upper);
}
