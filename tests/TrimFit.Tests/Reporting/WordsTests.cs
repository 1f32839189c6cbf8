using System.Text.RegularExpressions;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;

namespace TrimFit.Tests.Reporting;

public partial class WordsTests
{
    public static TheoryData<FindingCode> FindingCodes => [.. Enum.GetValues<FindingCode>()];

    [Theory]
    [MemberData(nameof(FindingCodes))]
    public void Every_finding_is_a_whole_sentence_with_or_without_its_numbers(FindingCode code)
    {
        foreach (Finding finding in new[] { Finding.Of(code, 0.5, 0.25, 0.75), Finding.Of(code), Finding.Of(code, double.NaN, double.NaN, double.NaN), new Finding(code, default) })
        {
            string sentence = Words.English.Finding(finding, Numbers.Invariant);
            Assert.Matches(@"^[A-Z].*\.$", sentence);
            Assert.DoesNotContain("NaN", sentence, StringComparison.Ordinal);
            UsesTheTradesWords(sentence);
        }
    }

    [Fact]
    public void No_text_shown_says_bar_or_hang_point_alone()
    {
        Words words = Words.English;
        foreach (CautionCode code in Enum.GetValues<CautionCode>())
            UsesTheTradesWords(words.Caution(code, Numbers.Invariant));
        foreach (AdjustmentKind kind in Enum.GetValues<AdjustmentKind>())
        {
            UsesTheTradesWords(words.PartShort(kind));
            UsesTheTradesWords(words.FirstStep(ReportFixture.Adjustment(kind), ReportFixture.Rig(), Numbers.Invariant));
        }
        UsesTheTradesWords(ReportText.Fit(ReportFixture.Report(), new()).ReplaceLineEndings(" "));
        UsesTheTradesWords(ReportText.Rig(ReportFixture.Sheet(), new()).ReplaceLineEndings(" "));
    }

    [Fact]
    public void Cautions_stand_where_the_table_says()
    {
        Assert.Equal(["estimate", "limits", "causes-first"], Codes(CautionPlaces.None));
        Assert.Equal(["estimate", "limits", "causes-first", "one-change", "hang-check", "calm-air", "twist"], Codes(CautionPlaces.AnyAdjustment));
        Assert.Equal(["estimate", "limits", "causes-first", "calm-air", "twist", "hands-off", "engine-off", "eyes-out", "strong-pull"], Codes(CautionPlaces.Card));
        Assert.Equal(["estimate", "limits", "causes-first", "hang-check", "frame-running"], Codes(CautionPlaces.HangCheckSheet));
        Assert.Equal(["estimate", "limits", "causes-first", "frame-running", "thrust-test"], Codes(CautionPlaces.ThrustSheet));
        Assert.Equal(["estimate", "limits", "causes-first", "spacing"], Codes(CautionPlaces.SpacingChange));
        Assert.Equal(["estimate", "limits", "causes-first", "ballast"], Codes(CautionPlaces.Ballast));
        Assert.Equal(["estimate", "limits", "causes-first", "sudden"], Codes(CautionPlaces.ComplaintSheet));
        Assert.Equal(CautionPlaces.AnyAdjustment | CautionPlaces.SpacingChange, Cautions.PlacesOf([AdjustmentKind.CarabinerOneSide]));
        Assert.Equal(CautionPlaces.AnyAdjustment | CautionPlaces.Ballast, Cautions.PlacesOf([AdjustmentKind.Ballast]));
        Assert.Equal(CautionPlaces.None, Cautions.PlacesOf([]));
    }

    [Fact]
    public void The_cautions_name_the_figures_the_verdict_uses()
    {
        Assert.Equal(VerdictRules.StrongPullRadPerSec, SafetyFigures.StrongPull.RadPerSec);
        Assert.Equal(VerdictRules.LargestConstantPartM, SafetyFigures.ConstantPartFirstM);
        Assert.Equal("Above 6 deg/s, or a held brake above 15 %: do not fly another card; adjust on the ground first.", Words.English.Caution(CautionCode.StrongPull, Numbers.Invariant));
        Assert.Contains("no more than the smaller of half the predicted travel and 15 mm", Words.English.Caution(CautionCode.OneChange, Numbers.Invariant), StringComparison.Ordinal);
    }

    [Fact]
    public void A_strong_pull_brings_its_caution()
    {
        TrimAnalysis strong = ReportFixture.Result() with { Warnings = [Finding.Of(FindingCode.StrongPull, -0.12)] };
        Assert.Contains(CautionCode.StrongPull, Cautions.Of(strong));
        Assert.DoesNotContain(CautionCode.StrongPull, Cautions.Of(ReportFixture.Result()));
    }

    private static string[] Codes(CautionPlaces places) => [.. Cautions.For(places).Select(Cautions.CodeOf)];

    internal static void UsesTheTradesWords(string text)
    {
        Assert.DoesNotMatch(LoneHangPoint(), text);
        Assert.DoesNotMatch(LoneBar(), text);
        Assert.DoesNotContain("pod", text, StringComparison.OrdinalIgnoreCase);
    }

    [GeneratedRegex(@"(?<!harness )hang points?\b", RegexOptions.IgnoreCase)]
    private static partial Regex LoneHangPoint();

    [GeneratedRegex(@"(?<!suspension )\bbars?\b", RegexOptions.IgnoreCase)]
    private static partial Regex LoneBar();
}
