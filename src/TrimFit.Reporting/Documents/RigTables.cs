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
            report.At.Select(s => (IReadOnlyList<string>)[words.Setting(s.Setting), numbers.ForceNumber(s.ThrustN), numbers.AngleNumber(s.HangBackRad),
                numbers.MomentNumber(s.YawMomentNm), numbers.MomentNumber(s.RollMomentNm), s.TwistRad is double x ? numbers.AngleNumber(x) : "-",
                numbers.Plain(s.TwistRatio, 2), numbers.Plain(s.TwistRatioHigh95, 2), numbers.ForceNumber(s.RiserLoadLeftN), numbers.ForceNumber(s.RiserLoadRightN)]));
    }

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
            report.Adjustments.Select(a => (IReadOnlyList<string>)[words.PartShort(a.Kind), Signed(a.CgOffsetPerTravel, numbers), Signed(a.ThrustOffsetPerTravel, numbers),
                a.Limit is AdjustmentLimit limit ? Range(limit, words, numbers) : l.LimitNotGiven]));
    }

    private static string Signed(double value, Numbers numbers) => (value > 0 ? "+" : "") + numbers.Plain(value, 3);

    private static string Range(AdjustmentLimit limit, Words words, Numbers numbers)
    {
        string min = limit.Min is double a ? words.Lateral(a, numbers) : words.Labels.NotKnown;
        string max = limit.Max is double b ? words.Lateral(b, numbers) : words.Labels.NotKnown;
        return min + words.Labels.To + max;
    }
}
