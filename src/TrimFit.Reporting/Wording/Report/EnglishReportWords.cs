using TrimFit.Core.Analysis;

#pragma warning disable CS8524 // see EnglishWords

namespace TrimFit.Reporting.Wording;

/// <summary>The English texts of the written report.</summary>
internal sealed record EnglishReportWords : ReportWords
{
    public override string BehindTitle => "What to move, seen from behind";
    public override string BehindAsItIsTitle => "The machine from behind";
    public override string ForcesTitle => "Loads from behind, at full thrust";
    public override string YourLeft => "your left";
    public override string YourRight => "your right";
    public override string LeftScale => "left scale";
    public override string HangCheckAfter => "hang check after it";
    public override string RightScale => "right scale";
    public override string LeftRiserLoad => "left risers";
    public override string RightRiserLoad => "right risers";
    public override string TorqueOnFrame => "torque on the frame";
    public override string LeaveIt => "leave it as it is";
    public override string NothingToMoveYet => "nothing to move yet";
    public override string NowAndAfter => "now → after the whole travel";
    public override string FlyAgain => "Fly again, with these legs";
    public override string ResidualsTitle => "Measured turn less fitted turn";
    public override string AxisResidual => "measured − fitted [°/s]";
    public override string TurnLeftTitle => "Turn left over at each power";
    public override string AxisTurnLeft => "turn left over [°/s], right +";
    public override string AsItIs => "as it is now";
    public override string ToleranceBand => "counts as no pull";
    public override string WindTitle => "Wind circle";
    public override string TrackTitle => "Ground track";
    public override string Start => "start";
    public override string GroundVelocity => "over ground";
    public override string AirspeedCircle => "airspeed";
    public override string WindArrow => "wind";
    public override string ProveWrongTitle => "What would prove this wrong";
    public override string CovarianceTitle => "Covariance of the coefficients";
    public override string CovarianceNote => "In the units of the coefficients, multiplied; the diagonal holds the squares of the standard errors.";
    public override string ProvenanceTitle => "What this report rests on";
    public override string RigFile => "rig file";
    public override string SheetFile => "flight sheet";
    public override string Sha256 => "SHA-256";
    public override string WhyTitle => "Why";

    public override string CausesBeforeParts =>
        "Before any part is moved: brake lines equal and slack when released, trimmers even, both line sets and risers equal, harness straps even, mounts "
        + "tight. A constant pull most often comes from one of these. If one is found, mend it and fly again; the step below is for when all are right.";

    public override IReadOnlyList<string> LegsToFly { get; } =
    [
        "In calm air with height in hand, each leg straight and level power held still.",
        "Engine off, 15 s hands off, then 10 s with one brake pulled a little and held.",
        "The same at idle, at level-flight power and at full power.",
        "Then on the opposite heading, the powers in another order.",
        "Mark the hands-off legs in a flight sheet when the log has no brakes.",
    ];

    public override string AxisEast(string unit) => $"east [{unit}]";

    public override string AxisNorth(string unit) => $"north [{unit}]";

    public override string ToYourSide(string amount, double rightPositive) => $"{amount} to your {(rightPositive < 0 ? "left" : "right")}";

    public override string Tipping(string amount, double rightPositive) => $"{amount}, tipping it {Side(rightPositive)}";

    public override string BehindDescription(AdjustmentReport? first, string part, string travel, Numbers numbers) => first is null
        ? "The machine from behind, left and right as the seated pilot sees them. No part is to be moved now."
        : $"The machine from behind, left and right as the seated pilot sees them. First step: {part}, {travel}. Hang check after it: left scale "
            + $"{numbers.Mass(first.HangCheckLeftKg)}, right scale {numbers.Mass(first.HangCheckRightKg)}. Dots are the riser carabiners, squares the front harness hang points, the disc the CG. The arrows show the way, not the distance.";

    public override string ForcesDescription(string left, string right, string torque, string cg) =>
        $"At full thrust the left risers carry {left} and the right ones {right}; torque on the frame {torque}; CG offset from the middle between the riser carabiners {cg}. "
        + "To scale sideways; heights are sketched.";

    public override string PullFinding(PullReport pull, Numbers numbers)
    {
        string[] parts = [.. pull.At.Where(p => p.RateRadPerSec is not null).Select(p => $"{Turn(p.RateRadPerSec!.Value, numbers)} {Power(p.Setting)}")];
        return parts.Length == 0 ? "No turn rate could be stated." : $"With brakes even it turns {string.Join(", ", parts)}.";
    }

    public override string ResidualDescription(double rmsRadPerSec, int windows, Numbers numbers) =>
        $"The {numbers.Integer(windows)} windows lie {numbers.Rate(rmsRadPerSec)} (root mean square) off the fitted line. A slope or a bend here would be something the model misses.";

    public override string TurnLeftDescription(string part, double? atFull, Numbers numbers) => atFull is double r
        ? $"One row for each way, one sign for each power. After moving {part} by the whole travel {numbers.Rate(Math.Abs(r))} to the {Side(r)} are left at full power: a fixed shift cannot null every power."
        : "One row for each way, one sign for each power. A fixed shift cannot null every power.";

    public override string WindDescription(string wind) =>
        $"{wind} Each dot is a velocity over ground; with constant airspeed they lie on a circle around the wind.";

    public override string TrackDescription(double lengthM, Numbers numbers) =>
        $"Where the machine flew over ground, {numbers.Distance(lengthM)} in all, from its first position. Nothing is measured here.";

    public override IReadOnlyList<string> ProveWrong(TrimAnalysis analysis, FitAnswer answer, Words words, Numbers numbers)
    {
        var list = new List<string>();
        if (answer.Adjustment is AdjustmentReport a)
        {
            list.Add($"The hang check after the first step does not show {numbers.Mass(a.HangCheckLeftKg)} left and {numbers.Mass(a.HangCheckRightKg)} right: then the part moved otherwise than said, or the masses in the rig file are wrong.");
            list.Add("The next flight, with nothing else changed, shows the pull unchanged or grown: then the side, the sensitivity or the cause is wrong. Undo the step.");
        }
        if (analysis.Pull.AtBalance.RateRadPerSec is not null)
            list.Add("The same flight flown again on another day gives a pull outside the range above: then something changes between flights (straps, posture, fuel, air).");
        if (analysis.Rig.Propeller.RotationSign != 0 && analysis.Fit["thrust"] is not null)
            list.Add($"The propeller does not turn as the rig file says ({words.Propeller(analysis.Rig.Propeller.Rotation)}): then every sign here that rests on the torque is wrong.");
        if (analysis.Verdict.Code is VerdictCode.ConstantPull or VerdictCode.Both or VerdictCode.OverCompensated)
            list.Add("Another wing of the same size on the same machine flies without the constant part: then the wing is the cause, and no part of the machine should be moved for it.");
        if (analysis.Verdict.Code == VerdictCode.Balanced)
            list.Add("Hands off for 15 s at level power the machine leaves its heading by more than a quarter turn, in calm air, to the same side each time.");
        if (analysis.CrossCheck is not null)
            list.Add("The regression on steady windows disagrees with the main method (see Turn model).");
        return list;
    }

    public override string Carried(CarriedInput carried) => carried switch
    {
        CarriedInput.None => "",
        CarriedInput.Whole => "This file carries its log, rig file and flight sheet as they were read, positions included. To run it again: trimfit fit with this file as the log.",
        CarriedInput.WithoutPlace => "This file carries its flight without positions, its rig file and its flight sheet. To run it again: trimfit fit with this file as the log.",
        CarriedInput.TooLong => "The log is too long to be carried in this file; keep it beside the report.",
    };

    private static string Side(double rightPositive) => rightPositive < 0 ? "left" : "right";

    private static string Turn(double radPerSec, Numbers numbers) => numbers.RateNumber(radPerSec) == numbers.RateNumber(0)
        ? "not at all"
        : $"{Side(radPerSec)} at {numbers.Rate(Math.Abs(radPerSec))}";

    private static string Power(PowerSetting setting) => setting switch
    {
        PowerSetting.Off => "with the engine off",
        PowerSetting.Idle => "at idle",
        PowerSetting.Cruise => "in level flight",
        PowerSetting.Full => "at full power",
    };
}
