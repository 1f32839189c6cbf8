using TrimFit.Core.Analysis;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;

// CS8524 (an unnamed enum value) cannot happen here; without it CS8509 still makes a missing member an error, which `_ =>` would hide.
#pragma warning disable CS8524

namespace TrimFit.Reporting.Wording;

/// <summary>The English texts of test cards.</summary>
internal sealed record EnglishCardWords : CardWords
{
    /// <summary>Travel that a brake of unknown full travel is taken to have, m (common practice, no source).</summary>
    private const double UsualTravelM = 0.6;

    public override string Title => "Test card";
    public override string ShortTitle => "Short card";
    public override string LegsTitle => "Leg by leg";
    public override string BeforeTitle => "Before take-off";
    public override string PrecisionTitle => "Where the ranges come from";
    public override string NeedsTitle => "What it needs";
    public override string Number => "leg";
    public override string Time => "from";
    public override string Heading => "heading";
    public override string Do => "do";
    public override string Seconds => "s";
    public override string Height => "height at least";
    public override string RulesTitle => "In flight";
    public override string BlindTitle => "Blind trial of two settings, A and B";

    public override IEnumerable<string> Blind(string commitment) =>
    [
        "Fly this card four times, if you can on one day, with the same wing, straps, fuel and air.",
        "A helper sets the machine to A or B before each flight as the slip says, does the same work when nothing has to be moved, does the hang check without you, and keeps the slip.",
        "You fly without knowing which it is, and nobody tells you before the flights are compared.",
        $"Number of the sealed order: {commitment}. compare opens the order and shows the same number when nothing was changed.",
    ];

    public override IEnumerable<string> HelperSlip(IEnumerable<string> setups, string commitment) =>
    [
        "For who sets the machine. Keep it from the pilot until the flights are compared.",
        $"Number of the sealed order: {commitment}",
        "",
        .. setups.Select((setup, i) => $"Before flight {i + 1}: setting {setup}"),
        "",
        "Do the same work before every flight, also when the setting stays: the pilot must not tell by the time it takes.",
        "After each setting: hang check, carabiner gates, safety strap, reserve bridle routing.",
    ];

    public override string OutcomeTitle => "Test card";

    public override string Answer(CardPlan plan, Numbers numbers)
    {
        if (plan.Prediction is not CardPrediction p || plan.Legs.IsEmpty)
            return Refused(plan, numbers);
        string pull = $"the pull {At(plan)} to about {numbers.Rate(p.PullHalfWidthRadPerSec)} either way";
        string shift = p.ShiftHalfWidthM is double w ? $", the shift of the CG to about {numbers.Length(w)} either way" : "";
        return $"Start {numbers.Height(plan.StartHeightM)} above ground and fly {numbers.Duration(plan.Seconds)}: expect {pull}{shift}.";
    }

    public override string Refused(CardPlan plan, Numbers numbers) => plan.Refusal switch
    {
        CardRefusal.StrongPull => $"No card: the last flight pulled {numbers.Rate(Math.Abs(plan.RefusedFor ?? 0))} to the {(plan.RefusedFor > 0 ? "right" : "left")}, above {numbers.Plain(SafetyFigures.StrongPull.DegPerSec, 0)} deg/s. Do not fly another card; adjust on the ground first.",
        CardRefusal.HeldBrake => $"No card: the last flight needed {numbers.Percent(Math.Abs(plan.RefusedFor ?? 0))} of the {(plan.RefusedFor > 0 ? "right" : "left")} brake to fly straight, above {numbers.Percent(SafetyFigures.StrongHeldBrake)}. Do not fly another card; adjust on the ground first.",
        CardRefusal.WidthUnreachable => $"No card of up to {numbers.Plain(CardOptions.MostMinutes, 0)} min reaches {numbers.Length(plan.Options.ShiftHalfWidthM ?? 0)} either way: what a millimetre does to this machine is not known well enough. The least that can be reached is about {numbers.Length(plan.LeastReachable ?? 0)}{Floor(plan, numbers)}. Narrow it with ballast legs (--ballast), a second flight after a first step, or a measured sensitivity in the rig file.",
        CardRefusal.StdErrorUnreachable => $"No card of up to {numbers.Plain(CardOptions.MostMinutes, 0)} min reaches a standard error of {Rate2(plan.Options.PullStdErrorRadPerSec ?? 0, numbers)}. The least that can be reached is about {Rate2(plan.LeastReachable ?? 0, numbers)}. Fly in calmer air, or several cards.",
        null => "",
    };

    public override string Reaches(CardPlan plan, Numbers numbers)
    {
        if (plan.Reaches is not bool reaches)
            return "";
        string wanted = plan.Options.ShiftHalfWidthM is double w ? $"{numbers.Length(w)} either way for the shift" : $"a standard error of {Rate2(plan.Options.PullStdErrorRadPerSec ?? 0, numbers)} for the pull";
        if (reaches)
            return $"Wanted: {wanted}. It is expected to be reached.";
        string need = plan.MinutesNeeded is double minutes ? $" It needs about {numbers.Plain(Math.Ceiling(minutes), 0)} min."
            : plan.LeastReachable is double least ? $" No longer card reaches it: the least is about {(plan.Options.ShiftHalfWidthM is null ? Rate2(least, numbers) : numbers.Length(least))}." : "";
        return $"Wanted: {wanted}. It is not expected in this time.{need}";
    }

    public override string HeadingName(double headingRad)
    {
        double turns = headingRad / Math.Tau;
        return ((int)Math.Round(4 * (turns - Math.Floor(turns))) % 4) switch { 0 => "out", 2 => "back", 1 => "across, right of out", _ => "across, left of out" };
    }

    public override string Run(double headingRad, IEnumerable<CardLeg> measuring, Rig rig, Numbers numbers) =>
        $"{Capital(HeadingName(headingRad))}: {string.Join(", ", measuring.Select(l => $"{Short(l)} {numbers.Plain(l.Seconds, 0)} s"))}";

    public override string ShortNote(CardPlan plan, Numbers numbers) =>
        $"Before each: set the power and hold the heading {numbers.Plain(plan.Legs[0].Seconds, 0)} s. Off, idle, level and full are hands off. Between the lines turn gently to the next heading, at level-flight power.";

    public override string Leg(CardLeg leg, CardLeg? hold, Rig rig, Numbers numbers)
    {
        string before = hold is null ? "" : $"{Capital(PowerName(hold.Power))}{(leg.Kind == CardLegKind.Ballast ? $", bring {numbers.Mass(leg.BallastKg)} out {numbers.Length(Math.Abs(leg.BallastArmM))} to the {Side(leg.BallastArmM)}" : "")}, hold the heading. ";
        return before + leg.Kind switch
        {
            CardLegKind.Hold => $"Set {PowerName(leg.Power)} and hold the heading.",
            CardLegKind.HandsOff => leg.Power == PowerSetting.Off ? "Engine off, then hands off." : "Hands off.",
            CardLegKind.BrakeStep => $"{Brake(leg, rig, numbers)}; keep it there.",
            CardLegKind.Circle => $"{Brake(leg, rig, numbers)}; circle.",
            CardLegKind.Ballast => "Hands off with the ballast out.",
            CardLegKind.Turn => $"Look out, turn gently {Side(leg.TurnRad)} by {numbers.Plain(Math.Abs(double.RadiansToDegrees(leg.TurnRad)), 0)} deg ({HeadingName(leg.HeadingRad)}), level-flight power.",
        };
    }

    public override string Say(CardLeg leg, Rig rig, Numbers numbers) => leg.Kind switch
    {
        CardLegKind.Hold => $"Set {PowerName(leg.Power)}. Hold heading.",
        CardLegKind.HandsOff => leg.Power == PowerSetting.Off ? "Engine off. Hands off now." : "Hands off now.",
        CardLegKind.BrakeStep => $"{SideName(leg)} brake to the mark. Keep it.",
        CardLegKind.Circle => $"{SideName(leg)} brake to the mark. Circle.",
        CardLegKind.Ballast => $"Ballast out {Side(leg.BallastArmM)}. Hands off now.",
        CardLegKind.Turn => $"Look out. Turn {Side(leg.TurnRad)} by {numbers.Plain(Math.Abs(double.RadiansToDegrees(leg.TurnRad)), 0)} degrees. Level power.",
    };

    public override IEnumerable<string> Before(CardPlan plan, Rig rig, Numbers numbers)
    {
        yield return plan.Machine.Logger switch
        {
            CardLogger.Full => "Logger: gyro and GPS fixed to the frame, throttle or rpm and both brakes connected and seen to move on the screen.",
            CardLogger.Phone => "Telephone: flat, screen up, top forward, strapped so that it cannot turn; gyro and GPS recorded.",
            CardLogger.Gps => "GPS recorder: once a second or faster, in a pocket with a view of the sky; set its clock, and the clock the legs are noted by.",
        };
        yield return "Start the recording 30 s before launch and stand still: that gives the gyro's zero.";
        yield return "Trimmers at one setting and alike, accelerator released; do not touch them until landing.";
        if (plan.Machine.HasBrakes)
            yield return $"Mark {BrakeTravel(plan.Legs, rig, numbers)} on each brake line, measured from the free brake, where the hand sees it.";
        if (plan.Legs.Any(l => l.Kind == CardLegKind.Ballast))
            yield return $"Ballast of {numbers.Mass(plan.Options.BallastKg)}, tied twice, carried in the middle until its leg, and held out {numbers.Length(plan.Options.BallastArmM)} from the middle.";
        yield return "Speaking card: volume up, an earphone on one side only, started at height. Or learn the short card by heart.";
        if (!plan.Machine.HasBrakes)
            yield return "Without the speaking card: call the legs to a helper with a clock, press the recorder's pause for five seconds, or give three quick blips of throttle at each leg's start.";
    }

    public override IEnumerable<(string Name, string Value)> Needs(CardPlan plan, Rig rig, Numbers numbers)
    {
        yield return ("Start height above ground", $"{numbers.Height(plan.StartHeightM)}; no leg goes below {numbers.Height(plan.Options.FloorM)}");
        yield return ("Highest point", $"about {numbers.Height(plan.HighestAboveStartM)} above the start: mind the airspace");
        yield return ("Wind at that height", $"at most {numbers.Speed(plan.WindLimitMPerSec)}{(plan.Machine.WindMPerSec is double w ? $" (last flight: {numbers.Speed(w)})" : "")}, steady, no thermals");
        yield return ("Drift", $"{numbers.Distance(plan.DriftAtLimitM)} at that wind; start upwind of open ground");
        bool electric = rig.Propeller.Drive == PropellerDrive.Electric;
        yield return electric
            ? ("Energy for the card", $"about {numbers.Plain(plan.BatteryWh, 0)} Wh, besides climb, way home and reserve")
            : ("Fuel for the card", $"about {numbers.Mass(Math.Max(0.1, plan.FuelKg))}, besides climb, way home and reserve");
    }

    public override IEnumerable<string> Precision(CardPlan plan, Numbers numbers)
    {
        if (plan.Prediction is not CardPrediction p)
            yield break;
        yield return plan.Machine.NoiseFromFlight
            ? "Noise of air and sensors: as the last flight had it. Rougher air widens the ranges."
            : "Noise of air and sensors: usual values, since no flight is given. After the first flight plan again with --from.";
        yield return $"Pull {At(plan)}: standard error {Rate2(p.KnownNoiseStdErrorRadPerSec, numbers)} with the noise known, times {numbers.Plain(p.Inflation, 2)} for finding it from the flight, times {numbers.Plain(p.TFactor, 2)} for the 95 % range (Student's t).";
        if (p.ShiftHalfWidthM is double width && p.SensitivityFloorM is double floor)
            yield return $"Shift: {numbers.Length(width)} either way, of which {numbers.Length(floor)} would stay with the pull known exactly, since what a millimetre does is known only to a factor.";
        yield return $"Ranges are medians of {numbers.Integer(p.Draws)} flights of this card made up from the turn model and put through the whole analysis; a single flight comes out a third narrower or wider.";
    }

    public override IEnumerable<string> Rules(CardPlan plan, Numbers numbers)
    {
        yield return $"Below {numbers.Height(plan.Options.FloorM)}, in rough air, or with anybody near: stop the card, hands on, fly.";
        yield return "Hands off the machine turns: that is what is measured. Take the brakes whenever you want to; that leg is then left out of the sheet.";
        yield return "A leg that went wrong is left out of the sheet, not flown again in a hurry.";
    }

    public override string Outcome(CardOutcome outcome, Numbers numbers)
    {
        CardPromise promise = outcome.Promise;
        if (promise.WantedShiftHalfWidthM is double wanted)
        {
            return outcome.ShiftHalfWidthM is double shift
                ? $"The card wanted the shift to {numbers.Length(wanted)} either way; the flight gives {numbers.Length(shift)}: {(outcome.Reached ? "reached" : "not reached")}."
                : $"The card wanted the shift to {numbers.Length(wanted)} either way; the flight gives no shift: not reached.";
        }
        if (promise.WantedPullStdErrorRadPerSec is double error)
        {
            return outcome.PullStdErrorRadPerSec is double got
                ? $"The card wanted the pull to a standard error of {Rate2(error, numbers)}; the flight gives {Rate2(got, numbers)}: {(outcome.Reached ? "reached" : "not reached")}."
                : "The card wanted a precision of the pull; the flight cannot tell the pull: not reached.";
        }
        return outcome.PullHalfWidthRadPerSec is double half
            ? $"The card expected the pull to {numbers.Rate(promise.PullHalfWidthRadPerSec)} either way; the flight gives {numbers.Rate(half)}: {(outcome.Reached ? "reached" : "not reached")}."
            : "The card expected a range of the pull; the flight cannot tell the pull: not reached.";
    }

    public override string NextLegs(CardOutcome outcome, Numbers numbers)
    {
        if (outcome.NextLegs.IsEmpty)
            return "";
        bool forShift = outcome.ShiftHalfWidthM is not null;
        double Factor(NextLeg leg) => forShift ? leg.ShiftFactor : leg.PullFactor;
        NextLeg[] order = [.. outcome.NextLegs.OrderBy(Factor)];
        NextLeg best = order[0];
        string what = forShift ? "the shift's range" : "the pull's range";
        string[] nothing = [.. order.Where(l => 1 - Factor(l) < NextLeg.AddsNothing).Select(More)];
        string rest = nothing.Length == 0 || nothing.Length == order.Length ? "" : $" These add nothing (below {numbers.Percent(NextLeg.AddsNothing)}): {string.Join("; ", nothing)}.";
        return 1 - Factor(best) < NextLeg.AddsNothing
            ? $"No single leg more would narrow {what} by {numbers.Percent(NextLeg.AddsNothing)}."
            : $"The next best leg: {More(best)}, half of it on each of two opposite headings, narrows {what} by {numbers.Percent(1 - Factor(best))}.{rest}";

        string More(NextLeg leg) => $"{numbers.Plain(leg.Seconds, 0)} s more " + leg.Kind switch
        {
            CardLegKind.BrakeStep => "of brake steps, left and right",
            CardLegKind.Ballast => "hands off with ballast out, left and right",
            _ => "hands off " + (leg.Power switch { PowerSetting.Off => "with the engine off", PowerSetting.Idle => "at idle", PowerSetting.Cruise => "in level flight", PowerSetting.Full => "at full power" }),
        };
    }

    public override IReadOnlyDictionary<string, string> Speaking { get; } = new Dictionary<string, string>
    {
        ["title"] = "Speaking test card",
        ["read"] = "I have read the cautions and know the card",
        ["start"] = "Start: first leg in 10 s",
        ["stop"] = "STOP",
        ["stopped"] = "Stopped",
        ["done"] = "Card done",
        ["save"] = "Save the flight sheet",
        ["again"] = "Discard and begin again",
        ["next"] = "next",
        ["test"] = "Test the sound",
        ["testSay"] = "This is your test card. You hear me.",
        ["sound"] = "This browser cannot speak: long beep = a new leg, short beeps = its last three seconds. One beep hold, two hands off, three brake, four turn.",
        ["getReady"] = "Test card. First leg in ten seconds. Look out.",
        ["sayStopped"] = "Card stopped. Hands on.",
        ["sayDone"] = "Card done. Hands on. Save the sheet after landing.",
        ["resumed"] = "Card goes on.",
        ["three"] = "three",
        ["two"] = "two",
        ["one"] = "one",
        ["unheard"] = "this leg was not called in time, so it is left out",
        ["cautions"] = "Cautions",
        ["noScript"] = "This card needs JavaScript, which runs in the telephone only; nothing is sent or loaded.",
        ["saved"] = "Saved as",
        ["left"] = "s left",
        ["of"] = "of",
        ["leg"] = "leg",
    };

    public override IEnumerable<string> SheetHead(CardPlan plan, Rig rig)
    {
        yield return "Flight sheet of a test card. Fill in start and end of each leg that was flown: a clock time such as 10:21:30,";
        yield return "seconds of the log such as 95, or { marker = 3 } for the third mark. Take the # off the lines that are filled in.";
        yield return "Legs that were not flown or went wrong: delete them.";
    }

    private static string At(CardPlan plan) => plan.Options.BalanceThrust.Kind switch
    {
        BalanceThrustKind.Full => "at full power",
        BalanceThrustKind.Cruise => "in level flight",
        BalanceThrustKind.Even => "between idle and full power",
        BalanceThrustKind.Newtons => "at the balance thrust",
    };

    private static string Floor(CardPlan plan, Numbers numbers) =>
        plan.Prediction?.SensitivityFloorM is double floor ? $", {numbers.Length(floor)} of it whatever is flown" : "";

    private static string PowerName(PowerSetting power) => power switch
    {
        PowerSetting.Off => "engine off",
        PowerSetting.Idle => "idle",
        PowerSetting.Cruise => "level-flight power",
        PowerSetting.Full => "full power",
    };

    private static string Short(CardLeg leg) => leg.Kind switch
    {
        CardLegKind.BrakeStep => $"{SideName(leg).ToLowerInvariant()} brake",
        CardLegKind.Circle => $"circle {SideName(leg).ToLowerInvariant()}",
        CardLegKind.Ballast => $"ballast {Side(leg.BallastArmM)}",
        _ => leg.Power switch { PowerSetting.Off => "off", PowerSetting.Idle => "idle", PowerSetting.Cruise => "level", PowerSetting.Full => "full" },
    };

    private static string Capital(string text) => char.ToUpperInvariant(text[0]) + text[1..];

    private static string SideName(CardLeg leg) => leg.BrakeRight > leg.BrakeLeft ? "Right" : "Left";

    private static string Side(double rightPositive) => rightPositive < 0 ? "left" : "right";

    private static string Brake(CardLeg leg, Rig rig, Numbers numbers) =>
        $"{SideName(leg)} brake to the mark, {BrakeTravel([leg], rig, numbers)}";

    private static string BrakeTravel(IEnumerable<CardLeg> legs, Rig rig, Numbers numbers)
    {
        double fraction = legs.Select(l => Math.Max(l.BrakeLeft, l.BrakeRight)).DefaultIfEmpty(0).Max();
        return rig.BrakeFullTravelM is double travel ? numbers.Length(fraction * travel) : $"{numbers.Percent(fraction)} of the travel, about {numbers.Length(fraction * UsualTravelM)}";
    }

    private static string Rate2(double radPerSec, Numbers numbers) => numbers.Plain(double.RadiansToDegrees(radPerSec), 2) + " deg/s";
}
