using System.Collections.Immutable;
using System.Reflection;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Ground;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;
using TrimFit.Tests.Comparing;
using TrimFit.Tests.Planning;

namespace TrimFit.Tests.Reporting;

/// <summary>Everything the words of a language can say, as far as it can be asked for: every text, and every function of enums, numbers and the
/// records below with all members and a few values. A topic that is added to <see cref="Words"/> is in it by itself.</summary>
internal static class SpokenTexts
{
    private const int MostCalls = 5000;

    private static readonly Lazy<CompareReport[]> _comparisons = new(() => [.. Comparisons()]);

    /// <summary>Texts whose arguments need a whole result; documents of a result say them.</summary>
    public static IEnumerable<string> NotAskedFor(Words words) => Topics(words).SelectMany(t => Functions(t).Where(m => Arguments(m, words, new(new())) is null).Select(m => $"{t.GetType().BaseType!.Name}.{m.Name}"));

    public static IEnumerable<string> Of(ReportLanguage language)
    {
        var style = new ReportStyle { Language = language };
        Words words = Words.Of(language);
        var numbers = new Numbers(style);
        foreach (object topic in Topics(words))
        {
            foreach (PropertyInfo property in topic.GetType().GetProperties().Where(p => p.GetIndexParameters().Length == 0))
            {
                foreach (string text in Flat(property.GetValue(topic)))
                    yield return text;
            }
            foreach (MethodInfo function in Functions(topic))
            {
                foreach (object?[] arguments in Arguments(function, words, numbers) ?? [])
                {
                    foreach (string text in Flat(function.Invoke(topic, arguments)))
                        yield return text;
                }
            }
        }
        foreach (SheetKind kind in Enum.GetValues<SheetKind>())
            yield return GermanText.OfPage(GroundPage.Sheet(kind, ReportFixture.Rig(name: "7"), style));
        foreach (CardPlan plan in new[] { CardFixture.Plan, CardFixture.Phone, CardFixture.Ballast })
        {
            CardReport card = CardFixture.Report(plan) with { BlindCommitment = "7", Rig = CardFixture.Rig with { Name = "7" } };
            yield return GermanText.OfPage(Page.Render(ReportDocuments.Card(card, style), new()));
            foreach (string line in CardSheetText.Empty(card, style).Split('\n').Where(line => line.StartsWith('#') && !line.Split('{')[0].Contains('=', StringComparison.Ordinal)))
                yield return line; // the others are keys and values
            foreach (CardLeg leg in plan.Legs)
                yield return words.Card.Say(leg, card.Rig, numbers);
        }
        yield return ReportText.HelperSlip(["7", "8"], "9", style);
        foreach (double sign in new[] { -1.0, 1 })
        {
            FitReport fit = ReportFixture.Report(ReportFixture.Result(degPerSec: 2.1 * sign, rig: ReportFixture.Rig(name: "7")));
            yield return GermanText.OfPage(Page.Render(ReportDocuments.Customer(ReportDocuments.CustomerOf(fit, style), style), new()));
        }
        foreach (CompareReport report in _comparisons.Value)
            yield return GermanText.OfPage(ReportPage.Compare(report, style));
        foreach (AdjustmentKind kind in Enum.GetValues<AdjustmentKind>())
        {
            yield return words.FirstStep(ReportFixture.Adjustment(kind), ReportFixture.Rig(), numbers);
            yield return words.FirstStep(ReportFixture.Adjustment(kind) with { HangCheckPlusMinusKg = 0.4, HangCheckDifferenceKg = 1.2 }, ReportFixture.Rig(), numbers);
            yield return words.FirstStep(ReportFixture.Adjustment(kind, firstStep: 0), ReportFixture.Rig(), numbers);
        }
    }

    /// <summary>Comparisons with each verdict and with three settings.</summary>
    private static IEnumerable<CompareReport> Comparisons()
    {
        ComparedFlight Seven(double constant, double error, double slope = 0, double moved = 0) =>
            MadeUpPair.Flight(moved == 0 ? "7" : "8", constant, error, slope, rig: moved == 0 ? null : MadeUpPair.Moved(moved), name: "9", curveError: 0.3);
        ComparisonOptions known = MadeUpPair.Known(0.3, Core.Comparing.ChangedPart.Geometry), unknown = new() { WithNext = false };
        yield return CompareReportTests.Report(known, Seven(-3, 0.1, -2), Seven(-1, 0.1, -2, -0.02)); // better
        yield return CompareReportTests.Report(known, Seven(1, 0.1), Seven(3, 0.1, moved: 0.02)); // worse
        yield return CompareReportTests.Report(MadeUpPair.Known(0), Seven(3, 0.1), Seven(0, 0.1, moved: 0.03)); // fixed
        yield return CompareReportTests.Report(unknown, Seven(1.5, 0.9), Seven(1.2, 0.9, moved: 0.03)); // cannot tell
        yield return CompareReportTests.Report(unknown, Seven(1.5, 0.1), Seven(1.5, 0.1)); // one setting
        yield return CompareReportTests.Report(unknown, Seven(3, 0.1), Seven(1, 0.1, moved: 0.02), MadeUpPair.Flight("6", 0, 0.1, rig: MadeUpPair.Moved(0.04), name: "5")); // a trend
    }

    private static IEnumerable<CompareNotice> Notices() => Enum.GetValues<CompareNoticeCode>().SelectMany(code => new[] { CompareNotice.About(code, ["7", "8"], 0.3, 0.5, 0.01), CompareNotice.Of(code) });

    private static IEnumerable<object> Topics(Words words)
    {
        yield return words;
        foreach (PropertyInfo property in typeof(Words).GetProperties(BindingFlags.Public | BindingFlags.Instance).Where(p => p.PropertyType.IsClass && p.PropertyType != typeof(string) && p.Name != "EqualityContract"))
        {
            object topic = property.GetValue(words)!;
            yield return topic;
            foreach (PropertyInfo labels in topic.GetType().GetProperties().Where(p => p.PropertyType.IsClass && p.PropertyType.Namespace?.StartsWith("TrimFit", StringComparison.Ordinal) == true))
                yield return labels.GetValue(topic)!;
        }
    }

    private static IEnumerable<MethodInfo> Functions(object topic) => topic.GetType().GetMethods(BindingFlags.Public | BindingFlags.Instance)
        .Where(m => !m.IsSpecialName && m.GetBaseDefinition().DeclaringType is { IsAbstract: true } t && t.Namespace!.StartsWith("TrimFit", StringComparison.Ordinal)
            && m.Name is not ("Said" or "UnitName" or "ToString" or "GetHashCode" or "Equals" or "<Clone>$" or "PrintMembers"));

    /// <summary>All combinations of sample arguments; null when there is no sample for one of them.</summary>
    private static IEnumerable<object?[]>? Arguments(MethodInfo function, Words words, Numbers numbers)
    {
        IEnumerable<object?[]> all = [[]];
        foreach (ParameterInfo parameter in function.GetParameters())
        {
            object?[]? samples = Samples(parameter.ParameterType, words, numbers);
            if (samples is null)
                return null;
            all = all.SelectMany(before => samples.Select(s => (object?[])[.. before, s]));
        }
        return all.Take(MostCalls);
    }

    private static object?[]? Samples(Type type, Words words, Numbers numbers)
    {
        if (Nullable.GetUnderlyingType(type) is Type inner)
            return Samples(inner, words, numbers) is object?[] some ? [.. some, null] : null;
        if (type.IsEnum)
            return [.. Enum.GetValues(type).Cast<object>()];
        return type == typeof(Numbers) ? [numbers]
            : type == typeof(Words) ? [words]
            : type == typeof(bool) ? [false, true]
            : type == typeof(double) ? [-0.02, 0.0, 0.03]
            : type == typeof(int) ? [1, 3]
            : type == typeof(long) ? [1L, 3_000_000L]
            : type == typeof(string) ? ["7"]
            : type == typeof(ConfidenceInterval) ? [ReportFixture.Range(0.01, 0.02), ReportFixture.Range(-0.01, 0.02)]
            : type == typeof(BalanceThrust) ? [BalanceThrust.Cruise, BalanceThrust.Full, BalanceThrust.Even, BalanceThrust.At(300)]
            : type == typeof(Finding) ? [.. Findings()]
            : type == typeof(GroundFault) ? [.. Faults()]
            : type == typeof(CompareNotice) ? [.. Notices()]
            : type == typeof(Complaint) ? [.. Complaints()]
            : null;
    }

    private static IEnumerable<Finding> Findings()
    {
        foreach (FindingCode code in Enum.GetValues<FindingCode>())
        {
            int last = code == FindingCode.NextCheck ? Enum.GetValues<NextCheck>().Length - 1 : 3;
            for (int i = 0; i <= last; i++)
                yield return Finding.Of(code, i, 0.25, 0.75, 1);
            yield return Finding.Of(code, 1, -1, -1, -1);
            yield return Finding.Of(code);
        }
    }

    private static IEnumerable<GroundFault> Faults()
    {
        foreach (GroundFaultCode code in Enum.GetValues<GroundFaultCode>())
        {
            foreach (PropellerDrive drive in Enum.GetValues<PropellerDrive>())
                yield return new GroundFault(code, "hang_check.left_kg", 1, (double)drive, 1);
            yield return new GroundFault(code, "hang_check.left_kg", -1, 0, -1);
            yield return new GroundFault(code, "");
        }
    }

    private static IEnumerable<Complaint> Complaints()
    {
        PullWhen[] when = [.. Enum.GetValues<PullWhen>(), Enum.GetValues<PullWhen>().Aggregate(PullWhen.None, (all, one) => all | one)];
        foreach (PullSide side in Enum.GetValues<PullSide>())
        {
            foreach (PullSince since in Enum.GetValues<PullSince>())
            {
                foreach (OtherWing other in Enum.GetValues<OtherWing>())
                    yield return new() { Side = side, When = when[^1], Since = since, Changed = [.. Enum.GetValues<Core.Ground.ChangedPart>()], OtherWing = other };
            }
        }
        yield return new();
    }

    private static IEnumerable<string> Flat(object? value) => value switch
    {
        string text => [text],
        IEnumerable<string> list => list,
        IReadOnlyDictionary<string, string> table => table.Values,
        System.Runtime.CompilerServices.ITuple tuple => Enumerable.Range(0, tuple.Length).SelectMany(i => Flat(tuple[i])),
        _ => [],
    };
}
