using System.Globalization;

namespace TrimFit.Reporting;

/// <summary>How results are shown to people. JSON never depends on it.</summary>
public sealed record ReportStyle
{
    /// <summary>Metric or imperial.</summary>
    public UnitSystem Units { get; init; } = UnitSystem.Metric;

    /// <summary>Language of the texts.</summary>
    public ReportLanguage Language { get; init; } = ReportLanguage.English;

    /// <summary>Culture of the numbers; unless asked for, that of the language: a decimal point in English, a decimal comma in German.</summary>
    public CultureInfo Culture { get => field ?? NumbersOf(Language); init; }

    /// <summary>The words of the language.</summary>
    internal Wording.Words Words => Wording.Words.Of(Language);

    // Made from the invariant culture, so that it is there on machines without any culture data.
    private static readonly CultureInfo _comma = WithComma();

    private static CultureInfo NumbersOf(ReportLanguage language) => language == ReportLanguage.German ? _comma : CultureInfo.InvariantCulture;

    private static CultureInfo WithComma()
    {
        var culture = (CultureInfo)CultureInfo.InvariantCulture.Clone();
        culture.NumberFormat.NumberDecimalSeparator = ",";
        return CultureInfo.ReadOnly(culture);
    }
}

/// <summary>Languages that results are told in. JSON, error messages and help are always English.</summary>
public enum ReportLanguage
{
    /// <summary>English.</summary>
    English,
    /// <summary>German.</summary>
    German,
}

/// <summary>Units shown to people.</summary>
public enum UnitSystem
{
    /// <summary>mm, kg, N, m/s.</summary>
    Metric,
    /// <summary>in, lb, lbf, mph.</summary>
    Imperial,
}
