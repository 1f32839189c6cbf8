using System.Collections.Immutable;
using System.Globalization;
using System.Text.RegularExpressions;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;
using static TrimFit.Tests.Reporting.ReportFixture;

namespace TrimFit.Tests.Reporting;

public partial class GermanWordsTests
{
    private static readonly ReportStyle _style = new() { Language = ReportLanguage.German };
    private static readonly Words _words = Words.Of(ReportLanguage.German);
    private static readonly Numbers _numbers = new(_style);

    public static TheoryData<FindingCode> FindingCodes => [.. Enum.GetValues<FindingCode>()];

    public static TheoryData<AdjustmentKind> AdjustmentKinds => [.. Enum.GetValues<AdjustmentKind>()];

    [Theory]
    [MemberData(nameof(FindingCodes))]
    public void Every_finding_is_a_whole_sentence_with_or_without_its_numbers(FindingCode code)
    {
        foreach (Finding finding in new[] { Finding.Of(code, 0.5, 0.25, 0.75), Finding.Of(code), Finding.Of(code, double.NaN, double.NaN, double.NaN), new Finding(code, default) })
        {
            string sentence = _words.Finding(finding, _numbers);
            Assert.Matches(@"^[A-ZÄÖÜ].*\.$", sentence);
            Assert.DoesNotContain("NaN", sentence, StringComparison.Ordinal);
            Assert.DoesNotMatch(PointBetweenDigits(), sentence);
            GermanText.UsesTheTradesWords(sentence);
        }
    }

    [Fact]
    public void No_text_says_carabiner_hang_point_or_bar_by_half_its_name()
    {
        Assert.All(SpokenTexts.Of(ReportLanguage.German), GermanText.UsesTheTradesWords);
        GermanText.UsesTheTradesWords(ReportText.Fit(Report(), _style).ReplaceLineEndings(" "));
        GermanText.UsesTheTradesWords(ReportText.Rig(Sheet(), _style).ReplaceLineEndings(" "));
    }

    [Fact]
    public void The_check_of_names_can_fail()
    {
        foreach (string half in new[] { "beide Karabiner verschieben", "der Aufhängepunkt", "die vorderen Aufhängepunkte", "der linke Arm", "am Pod" })
            Assert.ThrowsAny<Exception>(() => GermanText.UsesTheTradesWords(half));
        GermanText.UsesTheTradesWords("die Karabiner der Tragegurte, die Aufhängepunkte des Gurtzeugs, beide Aufhängearme");
    }

    [Fact]
    public void Every_caution_carries_its_figures_and_is_not_shorter_by_a_sentence()
    {
        foreach (CautionCode code in Enum.GetValues<CautionCode>())
        {
            string english = Words.English.Caution(code, Numbers.Invariant), german = _words.Caution(code, _numbers);
            Assert.Equal(Digits().Matches(english).Select(m => m.Value), Digits().Matches(german).Select(m => m.Value));
            Assert.True(german.Length > 0.8 * english.Length, german);
            Assert.True(Sentences().Count(german) >= Sentences().Count(english), german);
        }
    }

    /// <summary>A pull to the other side asks for everything to the other side, and for nothing else.</summary>
    [Theory]
    [MemberData(nameof(AdjustmentKinds))]
    public void A_mirrored_flight_swaps_left_and_right_and_nothing_else(AdjustmentKind kind)
    {
        TravelUnit unit = kind switch { AdjustmentKind.EngineCant => TravelUnit.Radian, AdjustmentKind.Ballast => TravelUnit.Kilogram, _ => TravelUnit.Meter };
        string Answer(double sign) => _words.Answer(FitAnswer.Of(Result(degPerSec: sign * 2.1,
            adjustments: [Adjustment(kind, sign * 0.014, Math.Min(sign * 0.009, sign * 0.020), Math.Max(sign * 0.009, sign * 0.020), unit)])), _numbers);
        string right = Answer(1), left = Answer(-1);
        Assert.NotEqual(right, left);
        Assert.Equal(right, GermanText.Mirrored(left));
        Assert.Contains("dreht das Gerät mit 2,1 °/s nach rechts", right, StringComparison.Ordinal);
        Assert.Contains("dreht das Gerät mit 2,1 °/s nach links", left, StringComparison.Ordinal);
        Assert.Matches(@"zu Ihrer rechten Seite hin|\brechts am rechten Karabiner der Tragegurte\b|\bden rechten Trimmer\b|\bdie rechte Bremsleine\b", right);
    }

    [Fact]
    public void Every_direction_in_the_mirrored_findings_is_swapped()
    {
        foreach (FindingCode code in new[] { FindingCode.StrongPull, FindingCode.RotationConflict })
        {
            string right = _words.Finding(Finding.Of(code, 0.12, 0.97), _numbers), left = _words.Finding(Finding.Of(code, -0.12, 0.97), _numbers);
            Assert.Contains("nach rechts", right, StringComparison.Ordinal);
            Assert.Equal(right, GermanText.Mirrored(left));
        }
    }

    [Fact]
    public void A_pull_with_a_travel_names_side_rate_part_direction_and_range() => Assert.Equal(
        "Im Horizontalflug dreht das Gerät mit 2,1 °/s nach rechts; ausgleichen würde das: die vorderen und die hinteren Aufhängepunkte des Gurtzeugs um 14 mm (9 bis 20) zu Ihrer linken Seite hin verschieben.",
        _words.Answer(FitAnswer.Of(Result()), _numbers));

    [Fact]
    public void The_first_step_gives_part_direction_reference_line_readings_and_hang_check() => Assert.Equal(
        "Erster Schritt: die vorderen und die hinteren Aufhängepunkte des Gurtzeugs um 7 mm zu Ihrer linken Seite hin verschieben. "
        + "Gemessen von der Mittellinie des Gestells, aus Sicht des sitzenden Piloten: "
        + "die Mitte des vorderen Paars von 3 mm rechts auf 4 mm links, die Mitte des hinteren Paars von 0 mm auf 7 mm links. "
        + "Die Hängeprobe muss danach zeigen: 60,2 kg auf der linken Waage und 57,8 kg auf der rechten. Dann erneut fliegen und erneut auswerten.",
        _words.FirstStep(Adjustment(), Rig(), _numbers));

    [Fact]
    public void Carabiners_move_from_their_own_readings() => Assert.Equal(
        "Erster Schritt: beide Karabiner der Tragegurte um 5 mm zu Ihrer rechten Seite hin verschieben. "
        + "Gemessen von der Mittellinie des Gestells, aus Sicht des sitzenden Piloten: "
        + "der linke von 215 mm links auf 210 mm links, der rechte von 215 mm rechts auf 220 mm rechts. "
        + "Die Hängeprobe muss danach zeigen: 60,2 kg auf der linken Waage und 57,8 kg auf der rechten. Dann erneut fliegen und erneut auswerten.",
        _words.FirstStep(Adjustment(AdjustmentKind.CarabinerPair, 0.010, 0.005, 0.015), Rig(), _numbers));

    [Fact]
    public void A_range_over_zero_names_both_sides() => Assert.Contains("um 4 mm (2 zu Ihrer linken bis 10 zu Ihrer rechten Seite) zu Ihrer rechten Seite hin verschieben",
        _words.Answer(FitAnswer.Of(Result(adjustments: [Adjustment(AdjustmentKind.CarabinerPair, 0.004, -0.002, 0.010)])), _numbers), StringComparison.Ordinal);

    [Fact]
    public void Strength_none_never_gives_millimetres() =>
        Assert.DoesNotContain("mm", _words.Answer(FitAnswer.Of(Result(strength: VerdictStrength.None)), _numbers), StringComparison.Ordinal);

    [Fact]
    public void Numbers_have_the_comma_unless_a_culture_is_asked_for()
    {
        Assert.Equal("1,5", _numbers.Plain(1.5, 1));
        Assert.Equal("1.5", new Numbers(_style with { Culture = CultureInfo.InvariantCulture }).Plain(1.5, 1));
        Assert.Equal("1.5", new Numbers(new()).Plain(1.5, 1));
        Assert.Equal("2,0°", _numbers.Angle(double.DegreesToRadians(2)));
        Assert.Equal("0,55 Zoll", new Numbers(_style with { Units = UnitSystem.Imperial }).Length(0.014));
        Assert.Equal("2.0 deg", Numbers.Invariant.Angle(double.DegreesToRadians(2)));
    }

    /// <summary>Every language with every number style and unit system, in every form.</summary>
    [Theory]
    [InlineData(null)]
    [InlineData("en-US")]
    [InlineData("de-DE")]
    [InlineData("de-CH")]
    [InlineData("fr-FR")]
    [InlineData("ar-SA")]
    public void Every_language_renders_with_every_culture(string? culture)
    {
        foreach (ReportLanguage language in Enum.GetValues<ReportLanguage>())
        {
            foreach (UnitSystem units in Enum.GetValues<UnitSystem>())
            {
                var style = new ReportStyle { Language = language, Units = units };
                if (culture is not null)
                    style = style with { Culture = CultureInfo.GetCultureInfo(culture) };
                string tag = language == ReportLanguage.German ? "de" : "en";
                string title = language == ReportLanguage.German ? "Bericht zur Geradeausflug-Einstellung" : "Turn trim report";
                Assert.StartsWith($"<!DOCTYPE html>\n<html lang=\"{tag}\">", ReportPage.Fit(Report(), style), StringComparison.Ordinal);
                Assert.StartsWith($"# {title}: Demo machine\n", ReportMarkdown.Fit(Report(), style), StringComparison.Ordinal);
                string mark = style.Culture.NumberFormat.NumberDecimalSeparator;
                Assert.Contains($"2{mark}1", ReportText.Fit(Report(), style), StringComparison.Ordinal);
                Assert.NotEmpty(ReportText.FitBrief(Report(), style));
                Assert.NotEmpty(ReportText.Rig(Sheet(), style));
                Assert.Contains($"<html lang=\"{tag}\">", ReportPage.Inspect(Inspection(), style), StringComparison.Ordinal);
            }
        }
    }

    [Fact]
    public void Json_does_not_change_with_the_language() => // there is no way to give it one
        Assert.DoesNotContain(typeof(ReportJson).GetMethods().SelectMany(m => m.GetParameters()), p => p.ParameterType == typeof(ReportStyle));

    [GeneratedRegex(@"[0-9]\.[0-9]")]
    private static partial Regex PointBetweenDigits();

    [GeneratedRegex("[0-9]+")]
    private static partial Regex Digits();

    [GeneratedRegex(@"[.?!](?:\s|$)")]
    private static partial Regex Sentences();
}
