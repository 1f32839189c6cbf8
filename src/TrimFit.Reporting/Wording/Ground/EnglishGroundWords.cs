using System.Globalization;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Reporting.Wording;

#pragma warning disable CS8524 // a number that is no member of its enum has no words; a member without words is CS8509, an error

/// <summary>The ground work in English.</summary>
internal sealed record EnglishGroundWords : GroundWords
{
    private static readonly GroundLabels _labels = new()
    {
        ChecksTitle = "Checks before the flight",
        Told = "The complaint",
        Checks = "Checks, in this order",
        IfItStays = "What stays goes here",
        Check = "Check",
        WriteDown = "Write down",
        Why = "Why here",
        HowTo = "How to look",
        MendFirst = "Mend what is found and fly again before any geometry is moved. What cannot be mended goes where the lines below say.",
        ThenMeasure = "Nothing found, or the pull is still there: measure (trimfit rig RIG --sheet measuring=FILE.html), do the hang check (--sheet hang-check=FILE.html), then fly a test card.",
        HangCheck = "Hang check",
        EntryFaults = "Entries to look at again",
        Expected = "Readings that were to be expected after the change",
        Reading = "reading",
        First = "1st",
        Second = "2nd",
        Third = "3rd",
        NowInRig = "in the rig file now",
        LeftScale = "left scale",
        RightScale = "right scale",
        ExpectedNow = "Readings to expect from the rig file as it is",
        CentreLine = "frame's centre line",
        Pilot = "pilot",
        Flight = "flight",
        Level = "level",
        Scale = "scale",
        Rope = "rope",
        Post = "post",
        Clockwise = "clockwise",
        CheckRuler = "check ruler: 150 mm",
        PrintNote = "Print at 100 % (not \"fit to page\"), then lay a steel rule on the check ruler: 150 mm must be 150 mm within half a millimetre. If it is not, do not use the sheet.",
        Ruler = "ruler to wrap around a tube: 0 on the frame's centre line",
        Spacer = "spacer, outside diameter 40 mm, hole 12.5 mm",
        CutOut = "cut along the solid line",
        FoldHere = "fold here: frame's centre line",
        AngleScale = "hang-back: straight edge on the frame, thread with a weight at the dot, read in deg",
        Machine = "machine",
        DateAndName = "date, name",
        SkipHint = "Empty line: not measured.",
        YesNo = "(y/n)?",
    };

    public override GroundLabels Labels => _labels;

    public override string SheetTitle(SheetKind kind) => kind switch
    {
        SheetKind.Measuring => "Measuring sheet: tape and level",
        SheetKind.HangCheck => "Hang check on two scales",
        SheetKind.Weighing => "Weighing sheet: power unit and rear strap",
        SheetKind.Rotation => "Rotation and reduction",
        SheetKind.Thrust => "Static thrust on a tethered scale",
        SheetKind.Templates => "Paper templates, true to scale",
    };

    public override string SheetIntroduction(SheetKind kind) => kind switch
    {
        SheetKind.Measuring => "The frame stands upright, fuel out or noted. Find its centre line first: the middle of the hoop or of the two uprights, marked front and rear with tape. Every lateral reading starts there; right is the seated pilot's right and positive, left is negative. Take each reading three times, each time putting the tape down anew: the spread becomes the plus-minus.",
        SheetKind.HangCheck => "Pilot in full flying kit, fuel as flown, engine cold, plug cap off. Two hanging scales of the same kind hang level from a beam that carries five times the weight, as far apart as the riser carabiners hang in flight.",
        SheetKind.Weighing => "Power unit without pilot, engine cold, plug cap off. It stands level with its two feet on two scales, as far from the centre line left as right.",
        SheetKind.Rotation => "Plug out and plug cap off, ignition off. Stand behind the machine and look the way it flies. Mark one blade and the crank pulley with tape, turn the crank by hand the way the engine runs, and count.",
        SheetKind.Thrust => "Tether the frame to a post that carries ten times the pull: a bridle with equal legs outside the hoop, the scale in the rope behind it, so that the rope pulls along the propeller axis. Warm engine, no wind. Full power for five seconds, read, idle; three times.",
        SheetKind.Templates => "For spacers and readings where no vernier reaches.",
    };

    public override string Reading(string name) => name switch
    {
        "carabiners.left_mm" => "left riser carabiner from the frame's centre line, mm, negative",
        "carabiners.right_mm" => "right riser carabiner from the frame's centre line, mm, positive",
        "hang_points.front_left_mm" => "front left harness hang point from the frame's centre line, mm, negative",
        "hang_points.front_right_mm" => "front right harness hang point from the frame's centre line, mm, positive",
        "hang_points.rear_left_mm" => "rear left harness hang point from the frame's centre line, mm, negative",
        "hang_points.rear_right_mm" => "rear right harness hang point from the frame's centre line, mm, positive",
        "propeller.thrust_line_mm" => "propeller hub from the frame's centre line, mm, right positive",
        "propeller.thrust_line_depth_mm" => "propeller axis below the riser carabiners, machine hanging, mm",
        "propeller.hang_back_deg" => "hang-back: propeller axis against level, machine and pilot hanging, deg, positive when the axis points up in front",
        "mass.pilot_kg" => "pilot with all that hangs from the harness, kg",
        "mass.fuel_kg" => "fuel in the tank, kg",
        "mass.power_unit_kg" => "power unit without fuel and wheels, kg",
        "hang_check.carabiner_spacing_mm" => "distance between the two riser carabiners while hanging, mm",
        "hang_check.left_kg" => "left scale, one reading for each hang, kg",
        "hang_check.right_kg" => "right scale, one reading for each hang, kg",
        "hang_check.exchanged_left_kg" => "what the left riser carabiner carries with the two scales exchanged, kg",
        "hang_check.exchanged_right_kg" => "what the right riser carabiner carries with the two scales exchanged, kg",
        "hang_check.lean_right_left_kg" => "left scale while the pilot leans to the right, kg",
        "hang_check.lean_right_right_kg" => "right scale while the pilot leans to the right, kg",
        "weighing.rear_strap_kg" => "both rear straps together, pilot hanging, kg",
        "weighing.scale_spacing_mm" => "distance between the two feet on the scales, mm",
        "weighing.power_unit_left_kg" => "left scale under the power unit, kg",
        "weighing.power_unit_right_kg" => "right scale under the power unit, kg",
        "propeller.rotation" => "the propeller turns, seen from behind: clockwise, counter-clockwise or contra-rotating",
        "propeller.crank_rotation" => "the crank turns, seen from behind: clockwise or counter-clockwise",
        "propeller.drive" => "drive: direct, belt, gear, clutch or electric",
        "propeller.crank_turns" => "turns of the crank, counted",
        "propeller.propeller_turns" => "turns of the propeller in the same time (blade passes over the number of blades)",
        "thrust_test.pull_kg" => "pull at full power, kg",
        "thrust_test.temperature_c" => "air temperature, °C",
        "thrust_test.height_m" => "height above the sea, m",
        "thrust_test.rope_angle_deg" => "angle between rope and propeller axis, deg",
        _ => name,
    };

    public override string DrawingTitle(GroundDrawing drawing) => drawing switch
    {
        GroundDrawing.CarabinersFromAbove => "Riser carabiners",
        GroundDrawing.FrontHangPoints => "Front harness hang points",
        GroundDrawing.RearHangPoints => "Rear harness hang points",
        GroundDrawing.PropellerHub => "Propeller hub",
        GroundDrawing.ThrustLineDepth => "Depth of the thrust line",
        GroundDrawing.HangBack => "Hang-back",
        GroundDrawing.HangCheck => "Two scales, seen from behind",
        GroundDrawing.PowerUnitOnScales => "Power unit on two scales, seen from behind",
        GroundDrawing.RearStrap => "Scale in the rear straps",
        GroundDrawing.Rotation => "Sense of rotation, seen from behind",
        GroundDrawing.ThrustTether => "Tethered frame, seen from the side",
    };

    public override string DrawingDescription(GroundDrawing drawing) => drawing switch
    {
        GroundDrawing.CarabinersFromAbove => "The frame from above, flying up the page: from the frame's centre line to the middle of each riser carabiner where the riser will hang, suspension bars pulled forward as in flight.",
        GroundDrawing.FrontHangPoints => "The frame from above: from the frame's centre line to the middle of each front harness hang point.",
        GroundDrawing.RearHangPoints => "The frame from above: from the frame's centre line to the middle of each rear harness hang point.",
        GroundDrawing.PropellerHub => "The frame from behind: from the frame's centre line to the middle of the propeller hub; right is the pilot's right.",
        GroundDrawing.ThrustLineDepth => "The hanging machine from the side: straight down from the riser carabiners to the propeller axis, prolonged forward.",
        GroundDrawing.HangBack => "The hanging machine from the side, pilot in it: a level on the propeller axis or square to the propeller's plane; the angle to level.",
        GroundDrawing.HangCheck => "The pilot hangs from two scales, one above each riser carabiner; left is the pilot's left.",
        GroundDrawing.PowerUnitOnScales => "The power unit stands on two scales, one left and one right of the frame's centre line, their distance measured between the feet.",
        GroundDrawing.RearStrap => "From the side: the pilot hangs from the suspension bars, one scale takes both rear straps together.",
        GroundDrawing.Rotation => "Seen from behind, looking the way it flies: the arrow shows clockwise; tick which way crank and propeller turn.",
        GroundDrawing.ThrustTether => "The frame is tethered to a post, the scale in the rope, nobody in or ahead of the propeller's plane.",
    };

    public override IReadOnlyList<string> HangSteps { get; } =
    [
        "Hook in as for flight: both riser carabiners to the scales, chest strap as flown. Feet off the ground, hands in the lap, look straight ahead.",
        "Wait until nothing swings. A second person reads both scales and writes them down as the seated pilot's left and right.",
        "Out of the harness, in again, read again: three times. Sitting down anew is the largest error of the whole check, so it is repeated.",
        "Exchange the two scales and hang once more: readings are again written by side, not by scale.",
        "Lean to the right and read once: the right scale must show more. If it shows less, the scales or the entries are exchanged.",
        "After a change do all of this again with the same scales, the same kit and the same fuel, and let trimfit rig RIG --moved PART=TRAVEL compare.",
    ];

    public override string Fault(GroundFault fault, Numbers numbers)
    {
        double[] v = fault.Values;
        string Value(int i, Func<double, string> show) => i < v.Length && double.IsFinite(v[i]) ? show(v[i]) : "an unknown value";
        string Plain(double x) => numbers.Significant(x, 4);
        string E(int i) => Value(i, x => $"{numbers.Length(Math.Abs(x))} to your {Side(x)}");
        return fault.Code switch
        {
            GroundFaultCode.FactorTenInRepeats => $"Reading {Value(0, x => numbers.Integer((long)x))} of {fault.Key} is {Value(1, Plain)}, about ten times or a tenth of the others: a digit or the decimal point is wrong. Was it {Value(2, Plain)}?",
            GroundFaultCode.FactorTen => $"The value {Value(0, Plain)} of {fault.Key} does not fit the other readings, {Value(1, Plain)} would: a digit or the decimal point is wrong. Look at the scale again.",
            GroundFaultCode.ScalesSwappedByLean => "When the pilot leaned to the right, the right scale became lighter: the two scales, or their entries, are exchanged. Enter them by the seated pilot's side.",
            GroundFaultCode.ScalesSwappedByGeometry => $"The scales show the weight {E(0)}, tape and weighing {E(1)}: one is the mirror image of the other, so the two scales or the sides of the tape readings are exchanged. Let the pilot lean to the right and see which scale rises, then look at the tape readings.",
            GroundFaultCode.SidesSwapped => $"The new riser carabiner readings ({Value(0, numbers.Length)} and {Value(1, numbers.Length)}) are the earlier ones with left and right exchanged. Left is the seated pilot's left and negative.",
            GroundFaultCode.WeightMissing => $"The two scales carry {Value(0, numbers.Mass)} together, pilot and machine weigh {Value(1, numbers.Mass)} by the rig file. Something stands on the ground, is not in the rig file, or a scale is read wrongly.",
            GroundFaultCode.HangAgainstGeometry => $"The scales show the weight {E(0)}, tape and weighing {E(1)}: more apart than the {Value(2, numbers.Length)} that seat and rules explain. Sit down again, straight; then measure the riser carabiners and harness hang points again. The scales are used meanwhile.",
            GroundFaultCode.SpacingAgainstPlaces => $"The riser carabiners are {Value(0, numbers.Length)} apart by their places and {Value(1, numbers.Length)} by the tape of the hang check. Measure both again.",
            GroundFaultCode.PowerUnitWeight => $"The two scales under the power unit carry {Value(0, numbers.Mass)}, the rig file gives {Value(1, numbers.Mass)} with fuel. Weigh again, or correct power_unit_kg.",
            GroundFaultCode.RotationAgainstDrive => $"The crank turns {Value(0, x => x > 0 ? "clockwise" : "counter-clockwise")} seen from behind and the drive ({Value(1, x => Drive((PropellerDrive)(int)x))}) {Value(2, x => x > 0 ? "reverses it" : "keeps it")}, so the propeller cannot turn as {fault.Key} says. Stand behind the machine, look the way it flies, and turn it by hand; gears with an idler or planets do not reverse: gear_reverses = false.",
            GroundFaultCode.ReductionAgainstCount => $"The counted turns give a reduction of {Value(0, Plain)}, the rig file says {Value(1, Plain)}. Count ten turns again; the count is engine turns over propeller turns.",
        };
    }

    public override string HangCheck(HangCheckResult hang, LateralGeometry? tape, Numbers numbers)
    {
        string text = $"The scales show the CG {At(hang.OffsetM, hang.Interval95, numbers)} ({numbers.Integer(hang.Hangs.Length)} {(hang.Hangs.Length == 1 ? "hang" : "hangs")}, {numbers.Mass(hang.SumKg)} on both).";
        if (tape is not null)
        {
            double half = 1.96 * tape.StandardDeviation;
            text += $" Tape and weighing alone give {At(tape.OffsetM, new(tape.OffsetM - half, tape.OffsetM + half, 0.95), numbers)}. The scales are used.";
        }
        if (hang.ScattersMore)
            return text + $" The hangs scatter by {numbers.Length(hang.SeatingSdM)}, more than pilots usually do: look for a loose strap or a twisted seat, and hang six times or more.";
        return hang.Hangs.Length < 3 ? text + " Three hangs, out and in each time, would make the range narrower." : text;
    }

    public override string Expected(HangReading expected, double plusMinusKg, Numbers numbers) =>
        $"left scale {numbers.Mass(expected.LeftKg)}, right scale {numbers.Mass(expected.RightKg)}, each ± {numbers.Mass(plusMinusKg)}";

    public override string Change(HangChangeResult change, string part, Numbers numbers)
    {
        string expected = $"{numbers.Length(Math.Abs(change.ExpectedChangeM))} to your {Side(change.ExpectedChangeM)}";
        string measured = At(change.MeasuredChangeM, change.Interval95, numbers);
        return change.Verdict switch
        {
            HangChangeVerdict.Confirmed => $"Confirmed: moving {part} should carry the CG {expected} under the wing, and the scales show {measured}. The hang check agrees with direction and size.",
            HangChangeVerdict.WrongWay => $"Wrong way: moving {part} should carry the CG {expected}, but the scales show {measured}. Do not fly. Look which way the part was moved, whether the scales are exchanged, and whether left and right in the rig file are the seated pilot's.",
            HangChangeVerdict.OtherSize => $"Right way, wrong size: moving {part} should carry the CG {expected}, and the scales show {measured}. Do not fly before the travel has been measured again and straps and seat are as before.",
            HangChangeVerdict.CannotTell => $"Cannot tell: moving {part} should carry the CG {expected}, and the scales show {measured}. {Repeat(change, numbers)}",
        };
    }

    private static string Repeat(HangChangeResult change, Numbers numbers) => (change.HangsAfter, change.HangsEach) switch
    {
        (int n, _) => $"Repeat: {numbers.Integer(n)} hangs in all in this setting, out and in each time, would tell in nine of ten cases.",
        (null, int n) => $"Repeat: move the part back, then {numbers.Integer(n)} hangs in each of the two settings would tell in nine of ten cases.",
        _ => "No reasonable number of hangs can tell so small a change: check the travel with the tape, by the seated pilot's side, and let a second person look.",
    };

    public override string ChecksAnswer(Complaint complaint) => complaint.Since == PullSince.Suddenly
        ? "A pull that came suddenly is a fault, not a trim matter: do not fly. Look for what broke, slipped or came loose, in this order."
        : "Most pulls are a brake line or a strap. Look in this order, mend what is found, and fly again before any geometry is moved.";

    public override IReadOnlyList<string> Told(Complaint complaint)
    {
        string when = complaint.When == PullWhen.None ? "not told" : string.Join(", ",
            Enum.GetValues<PullWhen>().Where(w => w != PullWhen.None && complaint.When.HasFlag(w)).Select(When));
        string changed = complaint.Changed.IsEmpty ? "nothing told" : string.Join(", ", complaint.Changed.Select(Part));
        return
        [
            $"It pulls {complaint.Side switch { PullSide.Left => "to the left", PullSide.Right => "to the right", PullSide.Changing => "now left, now right", PullSide.Unknown => "to a side that was not told" }}.",
            $"When: {when}.",
            $"Since when: {complaint.Since switch { PullSince.Always => "from the first flight on", PullSince.Gradually => "it grew little by little", PullSince.Suddenly => "suddenly", PullSince.AfterChange => "since something was changed", PullSince.Unknown => "not told" }}.",
            $"Changed before it began: {changed}.",
            $"Another wing on this machine: {complaint.OtherWing switch { OtherWing.SamePull => "pulls the same way", OtherWing.NoPull => "does not pull", OtherWing.OtherWay => "pulls the other way", OtherWing.NotTried => "not tried" }}.",
        ];
    }

    private static string When(PullWhen when) => when switch
    {
        PullWhen.Launch => "at launch",
        PullWhen.FullPower => "at full power",
        PullWhen.Level => "in level flight",
        PullWhen.EngineOff => "with the engine off",
        PullWhen.Accelerator => "with the accelerator",
        _ => "not told",
    };

    private static string Part(ChangedPart part) => part switch
    {
        ChangedPart.Geometry => "geometry of the frame",
        ChangedPart.Wing => "wing",
        ChangedPart.BrakeLines => "brake lines",
        ChangedPart.Trimmers => "trimmers",
        ChangedPart.Harness => "harness",
        ChangedPart.Propeller => "propeller or engine",
        ChangedPart.Ballast => "ballast, bags or reserve",
    };

    public override string Cause(SimpleCause cause) => cause switch
    {
        SimpleCause.BrakeLines => "brake lines, left against right",
        SimpleCause.Trimmers => "trimmers",
        SimpleCause.AcceleratorLines => "accelerator lines",
        SimpleCause.Risers => "risers and lines",
        SimpleCause.Harness => "harness straps and seat board",
        SimpleCause.LoadOnOneSide => "reserve, bag or fuel on one side",
        SimpleCause.Seat => "the pilot's seat habit",
        SimpleCause.SuspensionBarPivots => "pivots of the suspension bars",
        SimpleCause.EngineMounts => "engine mounts",
        SimpleCause.Frame => "frame",
        SimpleCause.PropellerTrack => "propeller track",
    };

    public override string LookFor(SimpleCause cause) => cause switch
    {
        SimpleCause.BrakeLines => "Hang the wing by its risers side by side, or lay it out: length from pulley to toggle, both sides under the same light pull, and the slack before the trailing edge moves. A worn pulley or a knot counts.",
        SimpleCause.Trimmers => "Trimmers at the mark they were flown at: length from the lower riser end to the trimmer's edge, both sides; pull on both, one that slips is replaced.",
        SimpleCause.AcceleratorLines => "Length from carabiner to pulley on both sides, and whether both pull at once when the pedal is pushed.",
        SimpleCause.Risers => "Each riser left against right under 5 kg, then the main lines of each row left against right.",
        SimpleCause.Harness => "Leg, chest, shoulder and side straps left against right, as flown; the seat board level, not cracked.",
        SimpleCause.LoadOnOneSide => "What hangs on one side: reserve, bag, camera, tank. Weigh it and measure how far from the centre line it hangs; positive to the right.",
        SimpleCause.Seat => "A photo from behind, hanging from the check frame and in flight: middle of the seat against the frame's centre line.",
        SimpleCause.SuspensionBarPivots => "Play up and down and sideways at each suspension bar's end, left against right; bolts, bushes, bends.",
        SimpleCause.EngineMounts => "Push the propeller hub sideways by hand (plug cap off): how far it moves left and right; cracked rubber, loose bolts.",
        SimpleCause.Frame => "Both diagonals of the hoop or the uprights, and the distance of hub to hoop left and right.",
        SimpleCause.PropellerTrack => "Plug cap off, a stick beside the tip: turn by hand and see how far apart the blades pass; bolts evenly tight.",
    };

    public override string NumberToWrite(SimpleCause cause) => cause switch
    {
        SimpleCause.BrakeLines => "left less right",
        SimpleCause.Trimmers => "left less right",
        SimpleCause.AcceleratorLines => "left less right",
        SimpleCause.Risers => "largest left less right",
        SimpleCause.Harness => "largest left less right",
        SimpleCause.LoadOnOneSide => "mass, and place from the centre line",
        SimpleCause.Seat => "middle of the seat from the centre line",
        SimpleCause.SuspensionBarPivots => "play left, play right",
        SimpleCause.EngineMounts => "play left, play right",
        SimpleCause.Frame => "difference of the diagonals",
        SimpleCause.PropellerTrack => "blade tips apart",
    };

    public override string UnitToWrite(SimpleCause cause, Numbers numbers) =>
        cause == SimpleCause.LoadOnOneSide ? $"{numbers.MassUnit}, {numbers.LengthUnit}" : numbers.LengthUnit;

    public override string IfItStays(SimpleCause cause) => cause switch
    {
        SimpleCause.BrakeLines => "set both to the maker's length, never shorter",
        SimpleCause.Trimmers => "flight sheet: wing_trim; log both trimmers",
        SimpleCause.AcceleratorLines => "flight sheet: accelerator; fit flights without it",
        SimpleCause.Risers => "line check by a workshop; no geometry against a wing out of trim",
        SimpleCause.Harness => "rig file: [hang_check] shows what remains",
        SimpleCause.LoadOnOneSide => "rig file: in pilot_kg; [hang_check] shows its place; fuel: fuel_lateral_mm",
        SimpleCause.Seat => "rig file: [hang_check] measures it",
        SimpleCause.SuspensionBarPivots => "rig file: [carabiners] measured under load",
        SimpleCause.EngineMounts => "do not fly until mended",
        SimpleCause.Frame => "rig file: [carabiners], [hang_points] measured anew",
        SimpleCause.PropellerTrack => "do not fly until mended",
    };

    public override string Reason(CheckReason reason) => reason switch
    {
        CheckReason.QuickAndFrequent => "quick to look at",
        CheckReason.EngineOff => "it pulls with the engine off",
        CheckReason.WithPower => "it pulls with power",
        CheckReason.AtLaunch => "it is felt at launch",
        CheckReason.WithAccelerator => "it comes with the accelerator",
        CheckReason.Sudden => "it came suddenly",
        CheckReason.Changed => "it was changed",
        CheckReason.SameWithOtherWing => "another wing pulls alike",
        CheckReason.GoneWithOtherWing => "another wing does not pull so",
        CheckReason.ChangesSide => "it changes its side",
    };

    public override string Question(ComplaintQuestion question) => question switch
    {
        ComplaintQuestion.Side => "Which way does it pull? left, right or changing",
        ComplaintQuestion.When => "When? Any of launch, full_power, level, engine_off, accelerator, with commas",
        ComplaintQuestion.Since => "Since when? always, gradually, suddenly or after_change",
        ComplaintQuestion.Changed => "What was changed before? Any of geometry, wing, brake_lines, trimmers, harness, propeller, ballast, with commas",
        ComplaintQuestion.OtherWing => "Another wing on this machine? not_tried, same_pull, no_pull or other_way",
    };

    public override string Written(string file, int readings) => string.Create(CultureInfo.InvariantCulture, $"{readings} {(readings == 1 ? "reading" : "readings")} written into {file}; earlier values stay there as comments.");

    private static string Drive(PropellerDrive drive) => drive switch
    {
        PropellerDrive.Direct => "direct",
        PropellerDrive.Belt => "belt",
        PropellerDrive.Gear => "gear",
        PropellerDrive.Clutch => "clutch",
        PropellerDrive.Electric => "electric",
        PropellerDrive.Unknown => "not given",
        _ => "unknown",
    };

    private static string Side(double rightPositive) => rightPositive < 0 ? "left" : "right";

    /// <summary><c>10 mm to your right (4 to 16)</c>; with both sides named when the range spans zero.</summary>
    private static string At(double m, ConfidenceInterval interval, Numbers numbers)
    {
        string Size(double value) => numbers.LengthNumber(Math.Abs(value));
        (double near, double far) = Math.Abs(interval.Lower) < Math.Abs(interval.Upper) ? (interval.Lower, interval.Upper) : (interval.Upper, interval.Lower);
        string range = interval.ExcludesZero ? $"({Size(near)} to {Size(far)})" : $"({Size(interval.Lower)} to your left up to {Size(interval.Upper)} to your right)";
        return $"{numbers.Length(Math.Abs(m))} to your {Side(m)} {range}";
    }
}
