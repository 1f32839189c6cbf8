using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;

#pragma warning disable CS8524 // see EnglishWords

namespace TrimFit.Reporting.Wording;

/// <summary>The English texts of the customer's page.</summary>
internal sealed record EnglishCustomerWords : CustomerWords
{
    public override string Title => "Turn trim: what was found and done";
    public override string Machine => "Machine";
    public override string Customer => "Pilot";
    public override string Wing => "Wing";
    public override string Date => "Date";
    public override string Told => "What you told us";
    public override string Checked => "What we checked first";
    public override string Measured => "What we measured";
    public override string Changed => "What was changed";
    public override string Reading => "reading";
    public override string Before => "before";
    public override string After => "after";
    public override string LeftAndNormal => "What is left and normal";
    public override string FirstFlight => "On the first flight";
    public override string ComeBack => "Come back";
    public override string SignedWorkshop => "workshop, date";
    public override string SignedCustomer => "pilot, date";

    public override IReadOnlyList<string> UsualChecks { get; } =
    [
        "brake lines equal, slack when released", "trimmers even, at the same mark", "lines and risers equal, no knot or twig",
        "harness and chest straps even", "frame, engine mounts and suspension bars: no crack, nothing loose", "safety straps and reserve bridle routed right",
    ];

    public override IReadOnlyList<string> FirstFlightSteps { get; } =
    [
        "Before the take-off: hang check, riser carabiner gates, safety straps, reserve bridle.",
        "Calm air, clear ground, height in hand. Full power in steps; if the frame starts to yaw: power off first, then steer.",
        "In level flight with your hands in the toggles and no load on them: does it hold its course? Then again at idle and at full power. Log the flight.",
    ];

    public override IReadOnlyList<string> ComeBackWhen { get; } =
    [
        "with the log of that flight, so that the change can be proved or the next step made;",
        "when wing, harness, propeller, pilot weight (5 kg) or trimmer habit change;",
        "at once, without flying, when a pull comes or grows suddenly: that is a fault, not a trim matter.",
    ];

    public override string MeasuredPull(FitAnswer answer, Numbers numbers)
    {
        double rate = Math.Abs(answer.RateRadPerSec);
        return answer.Kind switch
        {
            AnswerKind.CannotTell or AnswerKind.Contradiction => "The flight could not answer the question; another flight is needed before anything is moved.",
            AnswerKind.Balanced => "With the brakes released the machine holds its course well enough in level flight: nothing needs to be moved.",
            AnswerKind.SideUnknown => "If the machine turns by itself, it is too little for this flight to show to which side.",
            AnswerKind.Travel or AnswerKind.Direction =>
                $"With the brakes released the machine turns to your {(answer.RateRadPerSec < 0 ? "left" : "right")} in level flight, by about {numbers.Plain(double.RadiansToDegrees(rate), 1)} degrees in each second: "
                + $"a full circle in {numbers.Duration(Math.Max(1, Math.Round(Math.Tau / Math.Max(rate, 1e-4) / 10) * 10))}.",
        };
    }

    public override string Change(AdjustmentReport? first, bool balanced, string part, Numbers numbers) => (first, balanced) switch
    {
        (null, true) => "Nothing was moved.",
        (null, false) => "Nothing is moved before another flight.",
        ({ } a, _) => $"First step: {part}, {numbers.Travel(a.FirstStep, a.Unit)} to your {(a.FirstStep < 0 ? "left" : "right")} as you sit in the machine. One change at a time; the next flight says whether another step follows.",
    };

    public override string LeftOver(double? offRadPerSec, Numbers numbers) => offRadPerSec is double r && numbers.RateNumber(Math.Abs(r)) != numbers.RateNumber(0)
        ? $"With the engine off the machine will turn a little to your {(r < 0 ? "left" : "right")}. That is normal: the shift balances the engine in level flight and stays when the engine is off. At full power a little of the old pull stays."
        : "A fixed shift is made for one power, level flight. A small turn with the engine off and a small one to the other side at full power are normal.";

    public override string Carabiner(bool left) => left ? "left riser carabiner from the centre line" : "right riser carabiner from the centre line";

    public override string Scale(bool left) => left ? "hang check, left scale" : "hang check, right scale";

    public override string HangPoints(bool front) => front ? "front harness hang points, middle" : "rear harness hang points, middle";

    public override string OtherPart(AdjustmentKind kind, string part) => part;
}
