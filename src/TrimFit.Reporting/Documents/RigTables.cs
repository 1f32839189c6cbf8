using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>Statics of the rig, as <c>rig</c> and <c>fit</c> both show them.</summary>
internal static class RigTables
{
    public static void At(DocumentBuilder document, RigReport report, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        document.Table(
            [new(l.Power, false), new($"{l.Thrust} {numbers.ForceUnit}"), new(l.HangBack), new($"{l.YawMoment} {numbers.MomentUnit}"),
                new($"{l.RollMoment} {numbers.MomentUnit}"), new(l.Twist), new(l.TwistRatio), new(l.TwistUpTo),
                new($"{l.RiserLoadLeft} {numbers.ForceUnit}"), new($"{l.RiserLoadRight} {numbers.ForceUnit}")],
            report.At.Select(s => (IReadOnlyList<string>)[Head(s, report, words, numbers), numbers.ForceNumber(s.ThrustN), numbers.AngleNumber(s.HangBackRad),
                numbers.MomentNumber(s.YawMomentNm), numbers.MomentNumber(s.RollMomentNm), s.TwistRad is double x ? numbers.AngleNumber(x) : "-",
                numbers.Plain(s.TwistRatio, 2), numbers.Plain(s.TwistRatioHigh95, 2), numbers.ForceNumber(s.RiserLoadLeftN), numbers.ForceNumber(s.RiserLoadRightN)]));
    }

    /// <summary>Without a flight nobody knows the thrust of level flight, so the row says which share it stands for.</summary>
    private static string Head(RigAtSetting s, RigReport report, Words words, Numbers numbers) => s.Setting == PowerSetting.Cruise && report.FullThrustN is double full && full > 0
        ? $"{numbers.PercentNumber(s.ThrustN / full)} {words.Labels.ThrustFraction}"
        : words.Setting(s.Setting);

    public static void Masses(DocumentBuilder document, RigReport r, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        List<IReadOnlyList<string>> rows =
        [
            [l.SuspendedMass, numbers.Mass(r.SuspendedKg)],
            [l.PilotMass, numbers.Mass(r.PilotKg)],
            [l.PowerUnitMass, numbers.Mass(r.PowerUnitKg)],
            [l.CarabinerSpacing, numbers.Length(r.CarabinerSpacingM)],
            [l.CgOffset, words.Lateral(r.CgOffsetM, numbers)],
            [l.ThrustLineOffset, words.Lateral(r.ThrustLineOffsetM, numbers)],
            [l.FullThrust, r.FullThrustN is double t ? numbers.Force(t) : l.NotKnown],
            [l.FullTorque, r.FullTorqueNm is double q ? numbers.Moment(q) : l.NotKnown],
            [l.FigureOfMerit, r.FigureOfMerit is double m ? numbers.Plain(m, 2) : l.NotKnown],
            [l.TwistStiffness, numbers.Plain(r.TwistStiffnessNmPerRad, 0)],
            [l.HangCheckNow, $"{l.Left} {numbers.Mass(r.HangCheckLeftKg)}, {l.Right} {numbers.Mass(r.HangCheckRightKg)}"],
        ];
        document.Table([new(l.Quantity, false), new(l.Value)], rows);
    }

    public static void Adjustments(DocumentBuilder document, RigReport report, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        document.Heading(l.Adjustments);
        document.Table([new(l.PartToMove, false), new(l.Efficiency), new(l.ThrustLinePerTravel), new(l.Limit, false)],
            report.Adjustments.Select(a => (IReadOnlyList<string>)[words.PartShort(a.Kind), Signed(a, a.CgOffsetPerTravel, numbers), Signed(a, a.ThrustOffsetPerTravel, numbers),
                a.Limit is AdjustmentLimit limit ? Range(limit, FitFacts.UnitOf(a.Kind), words, numbers) : l.LimitNotGiven]));
    }

    /// <summary>A ratio of lengths as it is; for a travel in degrees or kilograms the length for one of them.</summary>
    private static string Signed(RigAdjustment a, double perSi, Numbers numbers)
    {
        TravelUnit unit = FitFacts.UnitOf(a.Kind);
        string sign = perSi > 0 ? "+" : "";
        return unit switch
        {
            TravelUnit.Radian => $"{sign}{numbers.Length(perSi * double.DegreesToRadians(1))}/{numbers.AngleUnit}",
            TravelUnit.Kilogram => $"{sign}{numbers.Length(perSi)}/kg",
            _ => sign + numbers.Plain(perSi, 3),
        };
    }

    private static string Range(AdjustmentLimit limit, TravelUnit unit, Words words, Numbers numbers)
    {
        string min = limit.Min is double a ? words.Travel(a, unit, numbers) : words.Labels.NotKnown;
        string max = limit.Max is double b ? words.Travel(b, unit, numbers) : words.Labels.NotKnown;
        return min + words.Labels.To + max;
    }
}
