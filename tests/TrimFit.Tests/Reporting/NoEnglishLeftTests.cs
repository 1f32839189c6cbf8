using System.Text.RegularExpressions;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;

namespace TrimFit.Tests.Reporting;

/// <summary>A German text holds no word of the English ones. The list is made, not written: every word of the English reports of the same flights,
/// of all English findings, cautions and labels. What is the same in both languages stands in <see cref="_shared"/>, each word looked at.</summary>
public partial class NoEnglishLeftTests
{
    private static readonly ReportStyle _german = new() { Language = ReportLanguage.German };

    /// <summary>German words that are spelt as English ones.</summary>
    private static readonly string[] _shared =
    [
        "an", "ballast", "band", "format", "hand", "in", "last", "likelihood", "logger", "maximum", "minus", "motor", "person", "pilot", "propeller", "propellers", "proportional",
        "regression", "sank", "so", "start", "tandem", "test", "trimmer", "version", "was", "wind",
    ];

    /// <summary>Names, units and abbreviations that are no English words.</summary>
    private static readonly string[] _names = ["csv", "gps", "hz", "kg", "kw", "min", "mm", "ms", "rad", "trimfit", "utf"];

    private static readonly Lazy<HashSet<string>> _english = new(EnglishVocabulary);

    [Theory]
    [MemberData(nameof(BundledFlights.Names), MemberType = typeof(BundledFlights))]
    public void A_report_of_a_bundled_flight_has_no_English_word(string flight)
    {
        NoEnglish(Without(ReportText.Fit(BundledFlights.Fit(flight), _german)));
        NoEnglish(Without(ReportMarkdown.Fit(BundledFlights.Fit(flight), _german)));
        NoEnglish(Without(GermanText.OfPage(ReportPage.Fit(BundledFlights.Fit(flight), _german))));
        NoEnglish(Without(ReportText.FitBrief(BundledFlights.Fit(flight), _german)));
    }

    [Theory]
    [MemberData(nameof(BundledFlights.Names), MemberType = typeof(BundledFlights))]
    public void A_rig_sheet_and_an_inspection_have_no_English_word(string flight)
    {
        NoEnglish(Without(ReportText.Rig(BundledFlights.RigSheet(flight), _german)));
        NoEnglish(Without(GermanText.OfPage(ReportPage.Rig(BundledFlights.RigSheet(flight), _german))));
        NoEnglish(Without(ReportText.Inspect(BundledFlights.Inspection(flight), _german)));
        NoEnglish(Without(GermanText.OfPage(ReportPage.Inspect(BundledFlights.Inspection(flight), _german))));
    }

    [Fact]
    public void Findings_cautions_and_labels_have_no_English_word()
    {
        var numbers = new Numbers(_german);
        Words german = Words.Of(ReportLanguage.German);
        NoEnglish(Without(string.Join("\n", Vocabulary(german, numbers))));
    }

    [Fact]
    public void An_English_word_is_found() => Assert.Equal(["the", "thrust"], Left("Der Schub ist the thrust."));

    [Fact]
    public void No_word_stands_in_the_lists_for_nothing()
    {
        HashSet<string> english = _english.Value;
        Assert.Empty(_shared.Concat(_names).Where(w => !english.Contains(w)));
        Assert.Equal(_shared.Length + _names.Length, _shared.Concat(_names).Distinct().Count());
    }

    private static void NoEnglish(string text)
    {
        string[] left = Left(text);
        if (left.Length > 0)
            Assert.Fail("English words in a German text: " + string.Join(' ', left));
    }

    private static string[] Left(string text) => [.. GermanText.Words(text).Distinct().Where(_english.Value.Contains).Except(_shared).Except(_names).Order(StringComparer.Ordinal)];

    /// <summary>The text without what comes from files and without what is typed: names of files and columns, the table that shows roles and units as
    /// the command line takes them, options, keys of the rig file, hashes.</summary>
    private static string Without(string text)
    {
        foreach (string name in BundledFlights.NamesInFiles)
            text = text.Replace(name, " ", StringComparison.Ordinal);
        text = Columns().Replace(text, "\n");
        return Typed().Replace(text, " ");
    }

    private static HashSet<string> EnglishVocabulary()
    {
        var style = new ReportStyle();
        var texts = new List<string>(Vocabulary(Words.English, new Numbers(style)));
        foreach (string flight in BundledFlights.Names.Select(row => row.Data))
        {
            texts.Add(Without(ReportText.Fit(BundledFlights.Fit(flight), style)));
            texts.Add(Without(GermanText.OfPage(ReportPage.Fit(BundledFlights.Fit(flight), style))));
            texts.Add(Without(GermanText.OfPage(ReportPage.Rig(BundledFlights.RigSheet(flight), style))));
            texts.Add(Without(GermanText.OfPage(ReportPage.Inspect(BundledFlights.Inspection(flight), style))));
        }
        return [.. texts.SelectMany(GermanText.Words)];
    }

    private static IEnumerable<string> Vocabulary(Words words, Numbers numbers)
    {
        foreach (FindingCode code in Enum.GetValues<FindingCode>())
        {
            for (int i = 0; i < 10; i++)
                yield return words.Finding(Finding.Of(code, i, 0.25, 0.75), numbers);
            yield return words.Finding(Finding.Of(code), numbers);
            yield return words.Finding(Finding.Of(code, 1, -1, -1, -1), numbers);
        }
        foreach (CautionCode code in Enum.GetValues<CautionCode>())
            yield return words.Caution(code, numbers);
        foreach (AdjustmentKind kind in Enum.GetValues<AdjustmentKind>())
        {
            yield return words.PartShort(kind);
            yield return words.FirstStep(ReportFixture.Adjustment(kind), ReportFixture.Rig(), numbers);
            yield return words.FirstStep(ReportFixture.Adjustment(kind, firstStep: 0), ReportFixture.Rig(), numbers);
        }
        foreach (VerdictCode code in Enum.GetValues<VerdictCode>())
            yield return words.Verdict(code);
        foreach (VerdictStrength strength in Enum.GetValues<VerdictStrength>())
            yield return words.Strength(strength) + " " + words.StrengthWord(strength);
        foreach (PowerSetting setting in Enum.GetValues<PowerSetting>())
            yield return words.Setting(setting);
        foreach (BalanceThrust thrust in new[] { BalanceThrust.Cruise, BalanceThrust.Full, BalanceThrust.Even, BalanceThrust.At(300) })
            yield return words.AtPower(thrust, numbers);
        foreach (PropellerRotation rotation in Enum.GetValues<PropellerRotation>())
            yield return words.Propeller(rotation);
        foreach (TwistDirection direction in Enum.GetValues<TwistDirection>())
            yield return words.Twist(direction);
        foreach (CruiseBasis basis in Enum.GetValues<CruiseBasis>())
            yield return words.CruiseBasis(basis);
        foreach (bool? agrees in new bool?[] { true, false, null })
            yield return words.CrossCheck(agrees);
        foreach (string label in GermanText.Strings(words.Labels))
            yield return label;
        yield return words.Batch.Title + " " + words.Batch.Note + " " + words.Batch.Answer(1, 1) + " " + words.Batch.Answer(3, 0) + " " + words.Batch.Answer(3, 2) + " " + words.Batch.Heads;
    }

    [GeneratedRegex(@"(?<=^|\n)[#\s]*(?:Spalten|Columns)[ \t]*\r?\n.*?(?=\r?\n[ \t]*\r?\n(?![ \t]*\r?\n|[ \t]*\|)|$)", RegexOptions.Singleline)]
    private static partial Regex Columns();

    [GeneratedRegex(@"--[a-z-]+(?: [a-z_]+=\S+)?|\b[a-z0-9]+_[a-z0-9_]+\b|flights\.(?:csv|parquet)|\b[0-9a-f]{64}\b")]
    private static partial Regex Typed();
}
