using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

// CS8524 (an unnamed enum value) cannot happen here; without it CS8509 still makes a missing member an error, which `_ =>` would hide.
#pragma warning disable CS8524

namespace TrimFit.Reporting.Wording;

/// <summary>The English texts.</summary>
internal sealed record EnglishWords : Words
{
    private static readonly Labels _labels = new()
    {
        ReportTitle = "Turn trim report",
        RigTitle = "Rig statics",
        InspectTitle = "What was read",
        To = " to ",
        Yes = "yes",
        No = "no",
        None = "none",
        NotKnown = "not known",
        Left = "left",
        Right = "right",
        WhatToDo = "What to do",
        WhatIsMissing = "What is missing",
        PullOverPower = "Pull over power",
        Power = "power",
        Thrust = "thrust",
        ThrustFraction = "% of full",
        TurnRate = "turn deg/s",
        Range95 = "95 % range",
        HeldBrake = "brake that holds it",
        WaysToMakeIt = "Ways to null it (choose one)",
        PartToMove = "part to move",
        Travel = "travel",
        Settable = "rounded",
        FirstStep = "first step",
        HangCheckLeft = "hang check left",
        HangCheckRight = "hang check right",
        WhatElseChanges = "What else each way changes, at full thrust after the whole travel",
        ThrustLine = "thrust line",
        TwistRatio = "twist ratio",
        TwistUpTo = "up to (95 %)",
        TwistToward = "twists",
        RiserLoadLeft = "riser load left",
        RiserLoadRight = "riser load right",
        Limit = "limit",
        LimitInside = "inside",
        LimitBeyond = "BEYOND",
        LimitNotGiven = "maker's limit not given",
        TurnLeftAfter = "Turn left over after the rounded travel, deg/s",
        TurnLeftNote = "A fixed shift cannot null every power.",
        FirstStepNote = "Hang check: two hanging scales, readings to expect after the first step. Thrust line: its offset from the middle between the riser carabiners.",
        Model = "Turn model",
        Coefficient = "coefficient",
        Value = "value",
        StandardError = "std error",
        Unit = "unit",
        Lag = "Lag of the turn",
        SlowDisturbance = "Slow disturbance (air, small movements of the pilot)",
        EffectiveSamples = "Independent observations",
        Condition = "Condition number",
        Method = "Method",
        Sensitivity = "Sensitivity: turn rate per shift of the CG",
        Source = "source",
        Used = "used",
        Together = "together",
        YawRatio = "Turn per yaw moment over turn per roll moment",
        PriorPredictive = "Fit of torque and slope (prior-predictive p)",
        EffectiveDraws = "Effective draws",
        TwistNow = "Riser twist and loads as the machine is now",
        HangBack = "hang-back deg",
        YawMoment = "yaw moment",
        RollMoment = "roll moment",
        Twist = "twist deg",
        Data = "What was read",
        File = "file",
        Format = "format",
        RowsRead = "rows",
        RowsLeftOut = "left out",
        ClockShift = "clock moved by s",
        Columns = "Columns",
        Column = "column",
        Role = "role",
        Basis = "decided by",
        Missing = "empty cells",
        NotUsed = "not used",
        SpansLeftOut = "Spans left out",
        From = "from s",
        Until = "to s",
        Reason = "reason",
        Assumptions = "Assumptions",
        AssumptionsNote = "Nobody measured these on this machine. Measured values in the rig file narrow the answer.",
        Assumption = "assumed",
        Warnings = "Warnings",
        Cautions = "Cautions",
        Masses = "Masses and places",
        Quantity = "quantity",
        SuspendedMass = "suspended mass",
        PilotMass = "pilot with harness load",
        PowerUnitMass = "power unit with fuel",
        CgOffset = "CG offset from the middle between the riser carabiners",
        ThrustLineOffset = "thrust line from the middle between the riser carabiners",
        CarabinerSpacing = "distance between the riser carabiners",
        FullThrust = "full thrust",
        FullTorque = "propeller torque at full thrust",
        FigureOfMerit = "figure of merit of the propeller",
        TwistStiffness = "twist stiffness of the risers, N m/rad",
        HangCheckNow = "hang check to expect now",
        Adjustments = "What each adjustment does",
        Efficiency = "shift of CG per travel",
        ThrustLinePerTravel = "thrust line per travel",
        Drawing = "The rig from above",
        DrawingNote = "To scale sideways; places along the machine are only sketched.",
        CloseUp = "The middle, enlarged",
        CentreLine = "centre line",
        LoggersZone = "time zone not in the log",
        Carabiner = "riser carabiner",
        CarabinerMiddle = "middle between the riser carabiners",
        FrontHangPoints = "front harness hang points",
        RearHangPoints = "rear harness hang points",
        Cg = "CG",
        FlightDirection = "flight",
        Now = "now",
        NowFilled = "now (filled)",
        After = "after",
        AfterOutlined = "after (outlined)",
        TurnPlot = "Turn rate against thrust",
        FlightPlot = "The flight over time",
        AxisThrust = "thrust",
        AxisThrustRelative = "thrust, fraction of full",
        AxisTurnRate = "turn rate [°/s], right +",
        AxisTurnRateShort = "turn [°/s]",
        AxisTime = "time [min]",
        AxisBrake = "brakes",
        HandsOff = "hands off",
        HandsOn = "hands on, brake part taken out",
        FittedLine = "fitted line",
        Band = "95 % band",
        BalancePoint = "where it is to be nulled",
        WindowsUsed = "used",
        WindowsLeftOut = "left out",
        ProgramVersion = "TrimFit version",
    };

    public override Batch.BatchWords Batch { get; } = new Batch.EnglishBatchWords();

    public override Comparing.CompareWords Comparing { get; } = new Comparing.EnglishCompareWords();

    public override string Language => "en";

    public override JobWords Jobs { get; } = new EnglishJobWords();

    public override Labels Labels => _labels;

    public override Web.WebWords Web { get; } = new Web.EnglishWebWords();

    public override ReportWords Report { get; } = new EnglishReportWords();

    public override CustomerWords Customer { get; } = new EnglishCustomerWords();

    public override GroundWords Ground { get; } = new EnglishGroundWords();
    public override CardWords Card { get; } = new EnglishCardWords();

    public override string Side(double rightPositive) => rightPositive < 0 ? "left" : "right";

    public override string Lateral(double m, Numbers numbers) => IsZero(m, numbers)
        ? numbers.Length(0)
        : $"{numbers.Length(Math.Abs(m))} {Side(m)}";

    public override string Travel(double value, TravelUnit unit, Numbers numbers) =>
        IsZero(value, unit, numbers) ? numbers.Travel(0, unit) : $"{numbers.Travel(value, unit)} {Side(value)}";

    public override string Setting(PowerSetting setting) => setting switch
    {
        PowerSetting.Off => "off",
        PowerSetting.Idle => "idle",
        PowerSetting.Cruise => "level flight",
        PowerSetting.Full => "full",
    };

    public override string AtPower(BalanceThrust thrust, Numbers numbers) => thrust.Kind switch
    {
        BalanceThrustKind.Cruise => "in level flight",
        BalanceThrustKind.Full => "at full power",
        BalanceThrustKind.Even => "over the range of power flown",
        BalanceThrustKind.Newtons => $"at {numbers.Force(thrust.Newtons)} of thrust",
    };

    public override string PartShort(AdjustmentKind kind) => kind switch
    {
        AdjustmentKind.CarabinerPair => "both riser carabiners",
        AdjustmentKind.CarabinerOneSide => "one riser carabiner",
        AdjustmentKind.BarSpacer => "suspension bars + front harness hang points",
        AdjustmentKind.HarnessFront => "front harness hang points",
        AdjustmentKind.HarnessFrontRear => "front and rear harness hang points",
        AdjustmentKind.PowerUnit => "power unit",
        AdjustmentKind.EngineCant => "engine turned in plan",
        AdjustmentKind.Ballast => "ballast",
        AdjustmentKind.Trimmer => "trimmers",
        AdjustmentKind.BrakeLine => "brake line to shorten",
    };

    public override string Answer(FitAnswer answer, Numbers numbers)
    {
        string power = Capital(AtPower(answer.Power, numbers));
        string reason = answer.Reason is Finding f ? Finding(f, numbers) : "The reasons stand below.";
        string range = answer.Interval95 is ConfidenceInterval i ? numbers.RateRange(i, " to ") : "";
        return answer.Kind switch
        {
            AnswerKind.CannotTell => $"This flight cannot tell how hard the machine turns. {reason}",
            AnswerKind.Contradiction => $"{power} {Turns(answer.RateRadPerSec, numbers)}, which contradicts the rig file, so nothing may be moved yet. {reason}",
            AnswerKind.Balanced => $"{power} {Turns(answer.RateRadPerSec, numbers)} ({range}; right is positive): that is balanced within "
                + $"{numbers.Rate(answer.ToleranceRadPerSec)}. Nothing needs to be moved.",
            AnswerKind.Travel => $"{power} {Turns(answer.RateRadPerSec, numbers)}; {Gerund(answer.Adjustment!.Kind)} {TravelOf(answer.Adjustment, numbers)} would null it.",
            AnswerKind.Direction => $"{power} {Turns(answer.RateRadPerSec, numbers)} ({range}; right is positive), but how far to move a part cannot be said. {reason}",
            AnswerKind.SideUnknown => $"{power} {Turns(answer.RateRadPerSec, numbers)}, but anything from {range} (right is positive) fits this flight, so not even the side is certain. {reason}",
        };
    }

    public override string Verdict(VerdictCode code) => code switch
    {
        VerdictCode.Insufficient => "The data cannot answer the whole question.",
        VerdictCode.Balanced => "No pull worth moving anything for.",
        VerdictCode.OverCompensated => "The machine is offset too far against the engine's torque: the pull with power goes the other way than the engine's own.",
        VerdictCode.Both => "Part of the pull is there at any power, part of it grows with power, both to the same side.",
        VerdictCode.PowerPull => "The pull grows with power.",
        VerdictCode.ConstantPull => "A constant pull that the engine does not explain: wing, lines, trimmers and harness first.",
    };

    public override string StrengthWord(VerdictStrength strength) => strength switch
    {
        VerdictStrength.None => "none",
        VerdictStrength.Weak => "weak",
        VerdictStrength.Fair => "fair",
        VerdictStrength.Firm => "firm",
    };

    public override string Strength(VerdictStrength strength) => strength switch
    {
        VerdictStrength.None => "Strength of this answer: none. A direction at most, never millimetres.",
        VerdictStrength.Weak => "Strength of this answer: weak. One flight; the direction is certain, the size is not: a second flight after the first step will tell.",
        VerdictStrength.Fair => "Strength of this answer: fair. The size is known within a half; go in steps.",
        VerdictStrength.Firm => "Strength of this answer: firm. Direction and size are known within one step.",
    };

    public override string FirstStep(AdjustmentReport adjustment, Rig rig, Numbers numbers)
    {
        double d = adjustment.FirstStep;
        if (IsZero(d, adjustment.Unit, numbers))
            return "The first step is smaller than can be set; leave the machine as it is.";
        string Goes(string what, double fromM) => $"{what} from {Lateral(fromM, numbers)} to {Lateral(fromM + d, numbers)}";
        string left = Goes("the left one", rig.Carabiners.LeftM.Value), right = Goes("the right one", rig.Carabiners.RightM.Value);
        string front = Goes("the middle of the front pair", rig.HangPoints.FrontOffsetM.Value);
        string rear = Goes("the middle of the rear pair", rig.HangPoints.RearOffsetM.Value);
        string readings = adjustment.Kind switch
        {
            AdjustmentKind.CarabinerPair => $"{left}, {right}",
            AdjustmentKind.CarabinerOneSide => d < 0 ? left : right,
            AdjustmentKind.BarSpacer => $"of the riser carabiners {left}, {right}; {front} of harness hang points",
            AdjustmentKind.HarnessFront => front,
            AdjustmentKind.HarnessFrontRear => $"{front}, {rear}",
            AdjustmentKind.PowerUnit => Goes("its middle", rig.Mass.PowerUnitLateralM.Value),
            AdjustmentKind.EngineCant => $"from {Travel(rig.Propeller.CantRad.Value, TravelUnit.Radian, numbers)} to {Travel(rig.Propeller.CantRad.Value + d, TravelUnit.Radian, numbers)}",
            AdjustmentKind.Ballast or AdjustmentKind.Trimmer or AdjustmentKind.BrakeLine => "",
        };
        string seen = readings.Length == 0 ? "" : $". Measured from the frame's centre line, as the seated pilot sees it: {readings}";
        string check = adjustment.Kind is AdjustmentKind.Trimmer or AdjustmentKind.BrakeLine
            ? "The hang check must then show the same as before: "
            : "The hang check must then show ";
        return $"First step: {Verb(adjustment.Kind)} {Phrase(adjustment.Kind, d, numbers.Travel(d, adjustment.Unit), "")}{seen}. "
            + $"{check}{numbers.Mass(adjustment.HangCheckLeftKg)} on the left scale and {numbers.Mass(adjustment.HangCheckRightKg)} on the right one{HangCheckRange(adjustment, numbers)}. "
            + "Then fly again and fit again.";
    }

    /// <summary>How far the readings may be off, and the difference against a hang check before, which is known far better.</summary>
    private static string HangCheckRange(AdjustmentReport a, Numbers numbers)
    {
        if (a.HangCheckPlusMinusKg is not double half || a.HangCheckDifferenceKg is not double more)
            return "";
        string within = $", each within {numbers.Mass(half)}";
        return numbers.MassNumber(more) == numbers.MassNumber(0) ? within
            : $"{within}; against a hang check before the step the {(more > 0 ? "right" : "left")} scale must gain {numbers.Mass(Math.Abs(more))} on the {(more > 0 ? "left" : "right")} one";
    }

    public override string Finding(Finding finding, Numbers numbers, TravelUnit unit = TravelUnit.Meter)
    {
        ImmutableArray<double> values = finding.Values.IsDefault ? [] : finding.Values;
        string Value(int i, Func<double, string> show) => i < values.Length && double.IsFinite(values[i]) ? show(values[i]) : "an unknown value";
        double Sign(int i) => i < values.Length ? values[i] : 0;
        string Source(int i) => Sign(i) switch { 0 => "the prior", 1 => "the torque", 2 => "the ballast leg", 3 => "the pair of flights", _ => "the rig file" };
        return finding.Code switch
        {
            FindingCode.NoThrust => "The log says nothing about thrust: no throttle, rpm, power or current. Log one of them, or name its column, such as --column rpm=NAME.",
            FindingCode.ThrustRangeTooSmall => $"The pull's growth with power cannot be told: thrust stayed between {Value(0, numbers.PercentNumber)} and {Value(1, numbers.Percent)} of full. Fly 20 s each at idle and full power.",
            FindingCode.NoTurnRate => "The log has neither a turn rate nor a GPS or compass from which to take it. Name its column, such as --column yaw_rate=NAME:deg/s.",
            FindingCode.TooLittleSteadyFlight => $"Only {Value(0, numbers.Duration)} of steady flight were found and {Value(1, numbers.Duration)} are needed. Fly longer legs at one power without turning.",
            FindingCode.PullTooUncertain => $"The pull is known to within {Value(0, numbers.RateNumber)} deg/s and must be known to within {Value(1, numbers.Rate)}. Fly more legs, in calmer air.",
            FindingCode.BalanceThrustNotFlown => $"The power at which it is to be nulled, {Value(0, numbers.Percent)} of full, was not flown: the flight has {Value(1, numbers.PercentNumber)} to {Value(2, numbers.Percent)}. Fly a leg there.",
            FindingCode.RotationConflict => $"The pull grows to the {Side(Sign(0))} with power, but the rig file predicts the other side in {Value(1, numbers.Percent)} of what is possible. Check first the propeller's rotation (stand behind, look the way it flies), then the signs of gyro and steering, then the thrust line.",
            FindingCode.SensitivityConflict => $"The growth of the pull with power is {Value(1, r => numbers.Significant(r, 2))} times what the torque explains (p = {Value(0, p => numbers.Plain(p, 3))}): look at the thrust line before moving anything, then at power, propeller speed and masses in the rig file.",
            FindingCode.SourcesConflict => $"Two sources of the sensitivity contradict each other: {Source(1)} gives {Value(2, r => numbers.Significant(r, 2))} times what {Source(0)} gives (p = {Value(3, p => numbers.Plain(p, 3))}). Check side and size of what was shifted before moving anything.",
            FindingCode.ShopMemoryConflict => $"This wing behaves otherwise than the workshop's others: {Source(0)} gives {Value(1, r => numbers.Significant(r, 2))} times what they would (p = {Value(2, p => numbers.Plain(p, 3))}). Their memory was not used here.",
            FindingCode.RatioUnbounded => $"The turn by {Source(0)} cannot be told from no turn, so by itself it puts no bound on the shift. Shift more, or fly longer legs.",
            FindingCode.TwistByCarabiners => $"At full power moving the riser carabiners brings the twist ratio to {Value(0, q => numbers.Plain(q, 2))}, moving the harness hang points to {Value(1, q => numbers.Plain(q, 2))}: the thrust line passes near the height of the riser carabiners, so what twists is how far beside their middle the thrust pulls. Moving the riser carabiners takes them away from the thrust line; moving the harness hang points leaves both where they are.",
            FindingCode.TwistByHarness => $"At full power moving the harness hang points brings the twist ratio to {Value(1, q => numbers.Plain(q, 2))}, moving the riser carabiners to {Value(0, q => numbers.Plain(q, 2))}: the thrust line passes near the height of the CG, so what twists is how far beside the CG the thrust pulls. Moving the harness hang points takes the CG away from the thrust line; moving the riser carabiners leaves the two together.",
            FindingCode.NextCheck => "The cheapest check that could overturn this answer: " + (NextCheck)Sign(0) switch
            {
                NextCheck.Rotation => "stand behind the machine and see which way the propeller turns, looking the way it flies.",
                NextCheck.BrakeColumns => "see which brake column of the log moves when the right brake is pulled.",
                NextCheck.HandsOffLegs => "fly again with a flight sheet that marks the hands-off legs, or log the brakes.",
                NextCheck.HangCheck => "the hang check, two scales under the riser carabiners, which shows where the weight sits.",
                NextCheck.ThrustLine => "measure how far beside the middle between the riser carabiners the thrust line passes.",
                NextCheck.Depths => "measure how deep the thrust line and the CG hang below the riser carabiners.",
                NextCheck.HangBack => "measure the hang-back of the thrust axis in the hang test.",
                NextCheck.Torque => "find the engine's power and the propeller's speed at full power.",
                NextCheck.MoreLegs => "fly more legs at idle, level flight and full power, in turn.",
                NextCheck.KnownShift => "fly the first step and fit again, or fly a ballast leg to each side.",
            },
            FindingCode.NoSteeringNoHandsOff => "Neither the brakes nor hands-off spans are in the log: intended turns look like a pull and a held course hides it. Log the brakes, or mark hands-off spans in a flight sheet.",
            FindingCode.BrakeSignReversed => "Pulling the right brake seems to turn it left: the brake columns may be swapped, or the wing reverses. The brakes were not used; check which column is which.",
            FindingCode.BrakesCollinear => $"Brakes and power moved together (correlation {Value(0, c => numbers.Plain(c, 2))}), so their effects cannot be told apart. Fly brake steps at constant power.",
            FindingCode.GyroBiasUnknown => "The gyro's zero cannot be told from a constant pull. Log GPS positions, or let the logger rest for 30 s before the start.",
            FindingCode.GyroSignReversed => $"The gyro turns the other way than the GPS track (slope {Value(0, s => numbers.Significant(s, 3))}); it was turned over. Check how the logger is mounted and the sign of its yaw rate.",
            FindingCode.WindUnknown => $"The wind could not be found: the flight covers {Value(0, a => numbers.Plain(double.RadiansToDegrees(a), 0))} deg of directions. Fly a full circle.",
            FindingCode.CruiseAssumed => $"The log does not show at which power the machine flies level; {Value(0, numbers.Percent)} of full thrust is assumed.",
            FindingCode.ThrustRelative => "Full thrust is not known, so thrust is only a fraction of full. Give static_thrust_n in the rig file.",
            FindingCode.FigureOfMeritImplausible => $"Thrust, power and diameter give the propeller a figure of merit of {Value(0, m => numbers.Plain(m, 2))}; 0.35 to 0.8 is possible. Check whether full_power_rpm is the engine's or the propeller's.",
            FindingCode.TipSpeedImplausible => $"The propeller's tips would run at {Value(0, v => numbers.Plain(v, 0))} m/s; 260 m/s is the most that is possible. Check whether full_power_rpm is the engine's or the propeller's.",
            FindingCode.TorqueNotUsed => Sign(0) switch
            {
                1 => "The torque cannot tell the sensitivity: its effect or the slope may have either sign.",
                2 => "The torque cannot tell the sensitivity: it would come out negative too often.",
                _ => "The torque cannot tell the sensitivity: the spread is too wide.",
            },
            FindingCode.StrongPull => $"The pull is strong: {Value(0, r => numbers.Rate(Math.Abs(r)))} to the {Side(Sign(0))}. Adjust on the ground before flying another test.",
            FindingCode.ConstantPartFirst => $"The pull without power alone asks for {Value(0, m => numbers.Length(Math.Abs(m)))} of shift. Check trimmers, lines, brake lines and straps before moving harness hang points.",
            FindingCode.LimitNotGiven => "Maker's limit not given.",
            FindingCode.BeyondLimit => $"The travel goes beyond the limit of {Value(0, m => Travel(m, unit, numbers))} in the rig file.",
            FindingCode.TwistCaution => $"Riser twist: the twist ratio may reach {Value(0, q => numbers.Plain(q, 2))}. First full power in steps.",
            FindingCode.TwistWarning => $"A sudden throttle change can twist the risers: the twist ratio may reach {Value(0, q => numbers.Plain(q, 2))}.",
            FindingCode.TwistRefused => $"Refused: the twist ratio may reach {Value(0, q => numbers.Plain(q, 2))}; above 1 nothing holds the frame against riser twist.",
            FindingCode.SpacingChanges => $"The distance between the riser carabiners becomes {Value(0, numbers.Length)}.",
            FindingCode.EffectSignUnknown => $"Not offered, because its effect may go either way: {PartShort((AdjustmentKind)Sign(0))}.",
            FindingCode.ContraRotating => "The propellers' torques cancel, so the torque cannot explain a pull that grows with power.",
            FindingCode.FewThrustLevels => "The flight has few different powers, so a curve in the pull over power would not show.",
            FindingCode.ConstantPullSource => "A constant pull can come from the wing, the lines, the harness, the way of sitting or a brake that rests pulled; one flight cannot tell which.",
            FindingCode.WrongSideLikely => $"The first step may already go too far, with a probability of {Value(0, numbers.Percent)}. Make it smaller.",
            FindingCode.FullPowerSpeedAssumed => $"Propeller speed at full power is not in the rig file; the largest in the log stands in: {Value(0, n => numbers.Plain(n * 60, 0))} rpm. Give full_power_rpm.",
            FindingCode.ThrottleTakenAsThrust => "There is no throttle table in the rig file, so thrust is taken as proportional to throttle. Give throttle_thrust_percent, or log the rpm.",
            FindingCode.GyroUnitCorrected => $"The gyro's unit did not fit the GPS turns and was corrected by a factor of {Value(0, g => numbers.Significant(g, 3))}. Name the unit: --column yaw_rate=NAME:deg/s.",
            FindingCode.GyroScaleOff => $"The gyro shows {Value(0, s => numbers.Significant(s, 3))} times the turn of the GPS track, which is no unit of a turn rate. "
                + (Sign(1) > 0 ? "It was calibrated by the GPS." : "The gyro was set aside and the turn taken from the GPS.") + " Check the unit of its yaw rate.",
            FindingCode.TurnSearchNotSettled => $"The search for the wing's and the air's time constants did not settle in {Value(0, n => numbers.Plain(n, 0))} steps; take the intervals as too narrow.",
            FindingCode.TurnOutliers => $"Measurements of the turn that are out of line with the rest count less: {Value(0, n => numbers.Plain(n, 0))} of {Value(1, n => numbers.Plain(n, 0))}.",
            FindingCode.YawSignUnconfirmed => "Neither GPS nor compass confirm which way the yaw rate turns: that right is positive is taken on trust.",
            FindingCode.GyroScaleCorrected => $"The gyro shows {Value(0, numbers.Percent)} (± {Value(1, e => numbers.PercentNumber(1.96 * e))}) of the turn of the GPS track"
                + (Sign(2) > 0 ? $", as one mounted {Value(2, numbers.Angle)} off the vertical would" : "") + "; its readings were divided by that.",
            FindingCode.GyroDelayed => $"The gyro is {Value(0, d => numbers.Plain(d, 2))} s (± {Value(1, e => numbers.Plain(1.96 * e, 2))}) behind the GPS; it was moved by that.",
            FindingCode.GpsDelayed => $"The GPS is {Value(0, d => numbers.Plain(d, 2))} s (± {Value(1, e => numbers.Plain(1.96 * e, 2))}) behind the gyro; it was moved by that.",
            FindingCode.GyroLevelled => $"The gyro's three axes were levelled by gravity; its z axis stands {Value(0, numbers.Angle)} from the vertical on average.",
            FindingCode.GyroAxisFromGps => $"The log has no gravity to level the gyro's three axes; the axis of the turn was found from the GPS track, to within {Value(0, e => numbers.Angle(1.96 * e))}.",
            FindingCode.GyroAxisAssumed => $"Neither gravity nor GPS nor compass show how the gyro lies; its {(Sign(0) switch { 0 => "x", 1 => "y", _ => "z" })} axis is taken to point {(Sign(1) < 0 ? "up" : "down")}. Give gyro_orientation in the rig file, or log the accelerometer.",
            FindingCode.GyroSlipped => $"The logger moved by {Value(1, numbers.Angle)} at {Value(0, t => numbers.Plain(t, 0))} s; "
                + (Sign(2) > 0 ? "the gyro was levelled anew from there." : "only the longest stretch without a move was used. Log GPS positions, or let it rest for 30 s before the start."),
            FindingCode.GyroLoose => $"The logger was loose: {(Sign(0) == 1 ? "1 move" : Value(0, n => numbers.Plain(n, 0)) + " moves")} in flight, and its attitude strays by {Value(1, numbers.Angle)}. Its gyro was set aside; strap it to the frame.",
            FindingCode.GyroBiasFromStandstill => $"The gyro's zero was read while standing still for {Value(2, numbers.Duration)}: {Value(0, b => numbers.Plain(double.RadiansToDegrees(b), 2))} deg/s (± {Value(1, e => numbers.Plain(double.RadiansToDegrees(1.96 * e), 2))}).",
            FindingCode.BrakesAgainstTurn => $"In {Value(1, numbers.Percent)} of {Value(0, numbers.Duration)} of clear turns the wing turns away from the pulled brake: the brake columns may be swapped, or the wing reverses. Check which column is which.",
            FindingCode.GpsOutliers => $"GPS fixes that jump as no wing can fly were left out: {Value(0, n => numbers.Plain(n, 0))} of {Value(1, n => numbers.Plain(n, 0))}.",
            FindingCode.GpsFrozen => $"The GPS repeated its last fix {(Sign(0) == 1 ? "once" : Value(0, n => numbers.Plain(n, 0)) + " times")} in flight, for {Value(1, numbers.Duration)} in all; the repeats were left out.",
            FindingCode.ThrottleAgainstRpm => $"Throttle and rpm do not rise together (rank correlation {Value(0, r => numbers.Plain(r, 2))}); thrust was taken from the rpm. Check the throttle column.",
            FindingCode.TimeJitter => $"Time stamps are uneven: {Value(1, numbers.Percent)} of the gyro's steps are off by more than half of the usual {Value(0, t => numbers.Plain(1000 * t, 0))} ms. They were used as logged.",
            FindingCode.ThrustFromPower => $"Thrust was taken from power to the two-thirds, with full power at {Value(0, w => numbers.Plain(w / 1000, 1))} kW, "
                + (Sign(1) > 0 ? "the largest in the log." : "which follows from the rig file, since the log stays below it."),
            FindingCode.CurrentTakenAsPower => $"The log has a current without a voltage; it was taken as power at constant voltage, with full power at {Value(0, a => numbers.Plain(a, 0))} A. Log the voltage too.",
            FindingCode.ThrustFromMotorCurrent => $"Thrust was taken as proportional to motor current, with full power at {Value(0, a => numbers.Plain(a, 0))} A, the largest in the log.",
            FindingCode.ClutchEngageAssumed => $"The speed at which the clutch engages is not in the rig file; {Value(0, n => numbers.Plain(n * 60, 0))} rpm stands in, a quarter above the idle of the log. Give clutch_engage_rpm.",
            FindingCode.ThrustFromSheet => $"The log says nothing about the engine, so thrust was taken from the powers on the flight sheet: level flight at {Value(0, numbers.Percent)} of full thrust, {(Sign(1) > 0 ? "by how the legs climbed" : "as is usual, since the climb of the legs does not tell")}.",
            FindingCode.ThrustFromClimb => $"The log says nothing about the engine, so thrust was taken from climb and glide sink, each reading good to {Value(0, n => numbers.Force(1.96 * n))}. Log rpm or throttle.",
            FindingCode.ThrustScaleByClimb => $"By its climb the machine has {Value(0, r => numbers.Plain(r, 2))} (± {Value(1, e => numbers.Plain(1.96 * e, 2))}) times the thrust of the rig file"
                + (Sign(2) > 0 ? $"; {Value(2, r => numbers.Plain(r, 2))} is what momentum theory leaves of a static thrust in flight" : "")
                + (Sign(3) > 0 ? ". The rig file's thrust was used." : ". The rig file's thrust was used, but check it with masses and speeds."),
            FindingCode.FullThrustByClimb => $"The rig file gives no thrust; by its climb the machine has {Value(0, numbers.Force)} (± {Value(1, e => numbers.Force(1.96 * e))}) in flight at full power. Pull it on a scale and give static_thrust_n.",
            FindingCode.FirstStepTooSmall => $"The first step would be smaller than the {Value(0, m => numbers.Travel(m, unit))} in which this part moves.",
        };
    }

    public override string Caution(CautionCode code, Numbers numbers) => code switch
    {
        CautionCode.Estimate => "TrimFit estimates from a log. It approves nothing. The maker's manual, certification, insurance, training rules and local law decide; a qualified person makes or checks the change. Tandem and commercial use: licensed shop only.",
        CautionCode.Limits => "Stay inside the maker's range for suspension bars, harness hang points and riser carabiners. Where the rig file gives no limit, the maker's limit is not given here: ask the maker.",
        CautionCode.CausesFirst => "Check brake lines, trimmers, straps, lines and mounts before you change the geometry.",
        CautionCode.OneChange => $"One change at a time. In the first step no more than the smaller of half the predicted travel and {numbers.Length(SafetyFigures.FirstStepMaxM)}, unless the hang check agrees. Re-torque and witness-mark; a second person checks carabiner gates, safety strap and reserve bridle routing.",
        CautionCode.HangCheck => "Before every flight after a change do the hang check: does the weight sit where the sheet says?",
        CautionCode.CalmAir => "First flight after a change: in calm air, over clear ground, with height in hand.",
        CautionCode.Twist => "A moved thrust line can twist the risers at full power. Go to full power in steps the first time, with height in hand; if the frame starts to yaw: power off first, then steer.",
        CautionCode.Spacing => "Changing the distance between the riser carabiners changes how the wing behaves in turbulence, and its certified set-up.",
        CautionCode.Ballast => "Tie ballast twice, clear of propeller and reserve.",
        CautionCode.HandsOff => "Hands off means: hands in the toggles, no load, ready. Not with accelerator, not in rough air, not below the card's floor, never during launch. Reflex wings: the maker's rule on brakes comes first.",
        CautionCode.EngineOff => "Engine off only in glide of a landing place.",
        CautionCode.EyesOut => "Fly the card from memory or by ear, not by screen. Look out.",
        CautionCode.StrongPull => $"Above {numbers.Plain(SafetyFigures.StrongPull.DegPerSec, 0)} deg/s, or a held brake above {numbers.Percent(SafetyFigures.StrongHeldBrake)}: do not fly another card; adjust on the ground first.",
        CautionCode.FrameRunning => "Never run the engine with a person or the machine hanging from a check frame. Plug cap off before hands go near the propeller.",
        CautionCode.ThrustTest => "Thrust test: frame tethered to a post, nobody in or ahead of the propeller's plane, helmet, eyes and ears protected.",
        CautionCode.Sudden => "A pull that grew suddenly is a fault, not a trim matter: do not fly. Look for a broken mount, line or suspension bar.",
    };

    public override string Assumption(string name) => name switch
    {
        "power_unit_lateral_mm" => "power unit's CG from the centre line",
        "fuel_lateral_mm" => "fuel from the centre line",
        "posture_mm" => "pilot's seat against the harness hang points",
        "cg_depth_mm" => "CG below the riser carabiners",
        "hang_back_deg" => "hang-back of the thrust axis",
        "thrust_line_mm" => "thrust line from the centre line",
        "thrust_line_depth_mm" => "thrust line below the riser carabiners",
        "figure_of_merit" => "figure of merit of the propeller",
        "front_share" => "share of the weight on the front harness hang points",
        "front_offset_mm" => "front harness hang points from the centre line",
        "rear_offset_mm" => "rear harness hang points from the centre line",
        "wing_mass_kg" => "mass of the wing",
        "line_length_m" => "length of the lines",
        "cruise_thrust_percent" => "thrust of level flight",
        "yaw_stiffness_nm_per_rad" => "twist stiffness of the risers",
        _ => name.Replace('_', ' '),
    };

    public override string Coefficient(string name) => name switch
    {
        TurnCoefficient.Constant => "constant pull",
        TurnCoefficient.Thrust => "growth with thrust",
        TurnCoefficient.ThrustSquared => "curve over thrust",
        TurnCoefficient.BrakeDifference => "right minus left brake",
        TurnCoefficient.TrimmerDifference => "right minus left trimmer",
        TurnCoefficient.CgShift => "known shift of the CG",
        _ => name.Replace('_', ' '),
    };

    public override string SensitivitySource(string kind) => kind switch
    {
        "prior" => "prior (no measurement)",
        "torque" => "propeller torque in this flight",
        "pair" => "two set-ups flown",
        "ballast" => "ballast leg",
        "user" => "rig file",
        "shop_memory" => "the workshop's own jobs",
        _ => kind.Replace('_', ' '),
    };

    public override string Method(string method) => method switch
    {
        "filter_error" => "filter-error maximum likelihood",
        "steady_windows" => "regression on steady windows",
        _ => method.Replace('_', ' '),
    };

    public override string Propeller(PropellerRotation rotation) => rotation switch
    {
        PropellerRotation.Clockwise => "propeller: clockwise seen from behind",
        PropellerRotation.CounterClockwise => "propeller: counter-clockwise seen from behind",
        PropellerRotation.ContraRotating => "propellers: contra-rotating",
    };

    public override string Twist(TwistDirection direction) => direction switch
    {
        TwistDirection.Left => "nose left",
        TwistDirection.Right => "nose right",
        TwistDirection.Unknown => "side unknown",
    };

    public override string SmallestDetectable(double radPerSec, Numbers numbers) =>
        $"The smallest pull this flight could have shown: {numbers.Rate(radPerSec)} (in 80 % of such flights).";

    public override string CruiseBasis(CruiseBasis basis) => basis switch
    {
        Core.Analysis.CruiseBasis.ZeroClimb => "Level flight: the thrust at which this flight neither climbed nor sank.",
        Core.Analysis.CruiseBasis.Assumed => "Level flight: 60 % of full thrust, assumed, since no altitude tells.",
    };

    public override string Shift(ShiftReport shift, Numbers numbers) =>
        $"This is the same as moving the CG {SignedRange(shift.CgShiftM, shift.Interval95, numbers)} under the wing: "
        + $"{Lateral(shift.ConstantPartM, numbers)} for the constant pull, {Lateral(shift.PowerPartM, numbers)} for the pull of power.";

    public override string CrossCheck(bool? agrees) => agrees switch
    {
        true => "The regression on steady windows, which can be redone by hand, agrees.",
        false => "The regression on steady windows, which can be redone by hand, DISAGREES: trust neither before you know why.",
        null => "There is no second method to compare with.",
    };

    public override string RigAnswer(RigReport report, Rig rig, Numbers numbers)
    {
        string now = IsZero(report.CgOffsetM, numbers)
            ? "The CG sits in the middle between the riser carabiners"
            : $"The CG sits {Lateral(report.CgOffsetM, numbers)} of the middle between the riser carabiners";
        if (rig.Propeller.RotationSign == 0)
            return now + "; the propellers' torques cancel, so none is needed against them.";
        return report.TorqueBalancingOffsetM is double needed
            ? $"{now}; balancing the propeller's torque in level flight takes {Lateral(needed, numbers)}."
            : now + "; how much the propeller's torque needs cannot be said without thrust and power.";
    }

    public override string InspectAnswer(ImportDiagnostics diagnostics, Numbers numbers)
    {
        int files = diagnostics.Files.Length, rows = diagnostics.Files.Sum(f => f.RowsRead), left = diagnostics.RowsLeftOut;
        string leftOut = left == 0 ? "no row left out" : left == 1 ? "1 row left out" : $"{numbers.Integer(left)} rows left out";
        string gaps = diagnostics.Sampling.Gaps.Length switch { 0 => "no gaps", 1 => "1 gap", int n => $"{numbers.Integer(n)} gaps" };
        return $"{(files == 1 ? "1 file" : numbers.Integer(files) + " files")}, {numbers.Integer(rows)} rows ({leftOut}), "
            + $"{numbers.Duration(diagnostics.Sampling.DurationSec)} at {numbers.Significant(diagnostics.Sampling.RateHz, 3)} Hz, {gaps}.";
    }

    public override string Wind(Wind? wind, Numbers numbers)
    {
        if (wind is null)
            return "Wind: not found.";
        double speed = Math.Sqrt((wind.NorthMPerSec * wind.NorthMPerSec) + (wind.EastMPerSec * wind.EastMPerSec));
        double from = (double.RadiansToDegrees(Math.Atan2(-wind.EastMPerSec, -wind.NorthMPerSec)) + 360) % 360;
        return $"Wind: {numbers.Speed(speed)} from {numbers.Plain(from, 0)} deg, airspeed {numbers.Speed(wind.AirspeedMPerSec)}, "
            + $"from {numbers.Plain(double.RadiansToDegrees(wind.ArcRad), 0)} deg of directions flown.";
    }

    public override string Gyro(GyroReport? gyro, Numbers numbers)
    {
        if (gyro is null)
            return "";
        string bias = gyro.BiasRadPerSec is Estimate b
            ? $"zero at {numbers.Plain(double.RadiansToDegrees(b.Value), 2)} deg/s (± {numbers.Significant(double.RadiansToDegrees(1.96 * b.StandardError), 1)})"
            : "zero not known";
        string sign = gyro.Sign switch { null => "sign not verified", < 0 => "sign REVERSED against the GPS", _ => "sign agrees with the GPS" };
        string scale = gyro.Scale is double s ? $", scale {numbers.Plain(s, 2)}" : "";
        string delay = gyro.DelaySec is double d ? $", delay {numbers.Plain(d, 2)} s" : "";
        return $"Gyro: {bias}, {sign}{scale}{delay}.";
    }

    public override string Gap(TimeGap gap, Numbers numbers) =>
        $"Gap of {numbers.Duration(gap.DurationSec)} after {numbers.Plain(gap.StartSec, 1)} s.";

    public override string RowsLeftOut(string file, RowsLeftOut left, Numbers numbers) =>
        $"{file}: {(left.Rows == 1 ? "1 row" : numbers.Integer(left.Rows) + " rows")} left out, first in line {numbers.Integer(left.FirstLine)}: {left.Reason}";

    public override string Said(string text, Numbers numbers) => text;

    public override string UnitName(string unit) => unit;

    public override string DrawingDescription(bool after) => after
        ? "The machine seen from above: frame's centre line, thrust line, riser carabiners, harness hang points and CG, now (filled) and after the rounded travel (outlined)."
        : "The machine seen from above: frame's centre line, thrust line, riser carabiners, harness hang points and CG.";

    public override string TurnPlotDescription(int points, bool fitted) =>
        FormattableString.Invariant($"Turn rate against thrust: {points} windows of the flight with the brakes' part taken out{(fitted ? ", the fitted line and its 95 % band" : "; no line could be fitted")}.");

    public override string FlightPlotDescription(double durationSec, Numbers numbers) =>
        $"Thrust, brakes and turn rate over {numbers.Duration(durationSec)}; right is positive, spans left out are shaded, bars are the windows used.";

    private string Turns(double radPerSec, Numbers numbers) =>
        numbers.RateNumber(radPerSec) == numbers.RateNumber(0) ? "it flies straight" : $"it turns {Side(radPerSec)} at {numbers.Rate(Math.Abs(radPerSec))}";

    private static string Verb(AdjustmentKind kind) => kind switch
    {
        AdjustmentKind.EngineCant => "turn",
        AdjustmentKind.Ballast => "hang",
        AdjustmentKind.Trimmer => "set",
        AdjustmentKind.BrakeLine => "make",
        _ => "move",
    };

    private static string Gerund(AdjustmentKind kind) => kind switch
    {
        AdjustmentKind.EngineCant => "turning",
        AdjustmentKind.Ballast => "hanging",
        AdjustmentKind.Trimmer => "setting",
        AdjustmentKind.BrakeLine => "making",
        _ => "moving",
    };

    /// <summary>What moves, how far, which way: never a bar or a hang point alone, always the side by the part.</summary>
    private string Phrase(AdjustmentKind kind, double travel, string amount, string range)
    {
        string side = Side(travel);
        return kind switch
        {
            AdjustmentKind.CarabinerPair => $"both riser carabiners {amount} to your {side}{range}",
            AdjustmentKind.CarabinerOneSide => $"the {side} riser carabiner alone {amount} to your {side}{range}",
            AdjustmentKind.BarSpacer => $"both suspension bars with their front harness hang points {amount} to your {side}{range}",
            AdjustmentKind.HarnessFront => $"the front harness hang points {amount} to your {side}{range}",
            AdjustmentKind.HarnessFrontRear => $"both harness hang points, front and rear, {amount} to your {side}{range}",
            AdjustmentKind.PowerUnit => $"the power unit {amount} to your {side}{range}",
            AdjustmentKind.EngineCant => $"the engine's thrust axis {amount}{range} in plan so that it pushes more to your {side}",
            AdjustmentKind.Ballast => $"{amount} of ballast{range} at the {side} riser carabiner",
            AdjustmentKind.Trimmer => $"the {side} trimmer {amount}{range} further than the other, counted as in the log",
            AdjustmentKind.BrakeLine => $"the {side} brake line {amount}{range} shorter than the other",
        };
    }

    private string TravelOf(AdjustmentReport a, Numbers numbers) =>
        Phrase(a.Kind, a.Travel, numbers.Travel(a.Travel, a.Unit), " " + Range(a.Interval95, a.Unit, numbers));

    /// <summary><c>14 mm to your left (9 to 20)</c>.</summary>
    private string SignedRange(double m, ConfidenceInterval interval, Numbers numbers) =>
        $"{numbers.Length(Math.Abs(m))} to your {Side(m)} {Range(interval, TravelUnit.Meter, numbers)}";

    /// <summary><c>(9 to 20)</c>; with both sides named when the range spans zero.</summary>
    private static string Range(ConfidenceInterval interval, TravelUnit unit, Numbers numbers)
    {
        string Size(double value) => numbers.TravelNumber(Math.Abs(value), unit);
        (double near, double far) = Math.Abs(interval.Lower) < Math.Abs(interval.Upper) ? (interval.Lower, interval.Upper) : (interval.Upper, interval.Lower);
        return interval.ExcludesZero ? $"({Size(near)} to {Size(far)})" : $"({Size(interval.Lower)} to your left up to {Size(interval.Upper)} to your right)";
    }

    private static bool IsZero(double m, Numbers numbers) => IsZero(m, TravelUnit.Meter, numbers);

    private static bool IsZero(double value, TravelUnit unit, Numbers numbers) => numbers.TravelNumber(value, unit) == numbers.TravelNumber(0, unit);

    private static string Capital(string text) => char.ToUpperInvariant(text[0]) + text[1..];
}
