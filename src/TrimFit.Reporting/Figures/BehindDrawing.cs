using System.Text;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>The machine from behind, so that left and right are the seated pilot's: one unit of the drawing is one millimetre sideways, heights are sketched.</summary>
internal static class BehindDrawing
{
    private const int Top = -250, CarabinerY = -80, HangY = -32, CgY = 70, HubY = 60, Ring = 150, TextSize = 20; // on a phone 11 px
    private const double LongestLoad = 110; // units of the drawing for the larger riser load

    /// <summary>What to move: the part with an arrow, how far, and the readings of the hang check.</summary>
    /// <param name="rig">The rig.</param>
    /// <param name="report">Its statics.</param>
    /// <param name="first">The adjustment whose first step is shown; null when nothing is to be moved.</param>
    /// <param name="balanced">With nothing to move: leave it, or nothing yet.</param>
    /// <param name="description">For those who cannot see it.</param>
    /// <param name="words">Language.</param>
    /// <param name="numbers">Units and culture.</param>
    public static string Action(Rig rig, RigReport report, AdjustmentReport? first, bool balanced, string description, Words words, Numbers numbers)
    {
        ReportWords w = words.Report;
        double half = Half(rig);
        var svg = new StringBuilder();
        int height = first is null ? 556 : 626;
        Open(svg, "behind", half, height, first is null ? w.BehindAsItIsTitle : w.BehindTitle, description);
        Machine(svg, rig, report, half, words);
        if (first is null)
        {
            Centred(svg, 268, balanced ? w.LeaveIt : w.NothingToMoveYet, bold: true);
            return Close(svg);
        }
        Arrows(svg, rig, first);
        Centred(svg, 268, words.PartShort(first.Kind), bold: true);
        Centred(svg, 294, w.ToYourSide(numbers.Travel(first.FirstStep, first.Unit), first.FirstStep), bold: true);
        // The two scales of the hang check, each on its side.
        double x = half - 14;
        Centred(svg, 338, w.HangCheckAfter, bold: false);
        Label(svg, -x, 338, "start", w.LeftScale);
        Label(svg, -x, 362, "start", numbers.Mass(first.HangCheckLeftKg), bold: true);
        Label(svg, x, 338, "end", w.RightScale);
        Label(svg, x, 362, "end", numbers.Mass(first.HangCheckRightKg), bold: true);
        return Close(svg);
    }

    /// <summary>Riser loads, torque and CG offset at full thrust, now and after the whole travel.</summary>
    /// <param name="rig">The rig.</param>
    /// <param name="report">Its statics.</param>
    /// <param name="after">The adjustment made in full; null for now alone.</param>
    /// <param name="words">Language.</param>
    /// <param name="numbers">Units and culture.</param>
    /// <returns>The figure and what it shows; null without a full thrust.</returns>
    public static (string Svg, string Description)? Forces(Rig rig, RigReport report, AdjustmentReport? after, Words words, Numbers numbers)
    {
        RigAtSetting? full = report.At.FirstOrDefault(a => a.Setting == PowerSetting.Full);
        if (full is null || report.FullThrustN is null)
            return null;
        ReportWords w = words.Report;
        double half = Half(rig);
        double? leftAfter = after?.RiserLoadLeftN, rightAfter = after?.RiserLoadRightN;
        string left = Change(full.RiserLoadLeftN, leftAfter), right = Change(full.RiserLoadRightN, rightAfter);
        string torque = rig.Propeller.RotationSign == 0 ? words.Labels.None
            : w.Tipping(numbers.Moment(full.TorqueNm), -rig.Propeller.RotationSign);
        string cg = words.Lateral(report.CgOffsetM, numbers);
        string description = w.ForcesDescription(left, right, torque, cg);
        var svg = new StringBuilder();
        Open(svg, "forces", half, 600, w.ForcesTitle, description);
        Machine(svg, rig, report, half, words);
        double most = new[] { full.RiserLoadLeftN, full.RiserLoadRightN, leftAfter ?? 0, rightAfter ?? 0, 1 }.Max();
        foreach ((double place, double now, double? then) in new[] { (rig.Carabiners.LeftM.Value, full.RiserLoadLeftN, leftAfter), (rig.Carabiners.RightM.Value, full.RiserLoadRightN, rightAfter) })
        {
            double outwards = Math.Sign(place == 0 ? 1 : place);
            Up(svg, (place * 1000) + (outwards * 20), now / most * LongestLoad, Palette.Ink, 6);
            if (then is double t)
                Up(svg, (place * 1000) + (outwards * 34), t / most * LongestLoad, Palette.Vermilion, 3);
        }
        if (rig.Propeller.RotationSign != 0)
            Torque(svg, -rig.Propeller.RotationSign);
        double x = half - 14;
        Label(svg, -x, 250, "start", w.LeftRiserLoad);
        Label(svg, -x, 274, "start", left, bold: true);
        Label(svg, x, 250, "end", w.RightRiserLoad);
        Label(svg, x, 274, "end", right, bold: true);
        Centred(svg, 306, $"{w.TorqueOnFrame}: {torque}", bold: false);
        Centred(svg, 332, $"{words.Labels.Cg}: {cg}", bold: false);
        return (Close(svg), description);

        string Change(double now, double? then) => then is double t && numbers.ForceNumber(t) != numbers.ForceNumber(now)
            ? $"{numbers.ForceNumber(now)} → {numbers.Force(t)}"
            : numbers.Force(now);
    }

    private static double Half(Rig rig) => Math.Max(Math.Max(Math.Abs(rig.Carabiners.LeftM.Value), Math.Abs(rig.Carabiners.RightM.Value)) * 1000, 150) + 90;

    private static void Open(StringBuilder svg, string id, double half, int height, string title, string description)
    {
        SvgFigure.Open(svg, id, Invariant($"{-half:0.#} {Top} {2 * half:0.#} {height}"), title, description);
        svg.Append(Invariant($"<g font-family=\"{PlotFont.CssFamilies}\" font-size=\"{TextSize}\" fill=\"{Palette.Ink}\">\n"));
    }

    private static string Close(StringBuilder svg) => svg.Append("</g>\n</svg>").ToString();

    private static void Machine(StringBuilder svg, Rig rig, RigReport report, double half, Words words)
    {
        ReportWords w = words.Report;
        double left = rig.Carabiners.LeftM.Value * 1000, right = rig.Carabiners.RightM.Value * 1000, thrust = rig.Propeller.ThrustLineM.Value * 1000;
        double front = rig.HangPoints.FrontOffsetM.Value * 1000, pair = 0.38 * (right - left), cg = report.CgLateralM * 1000;
        Label(svg, -half + 14, Top + 22, "start", w.YourLeft, Palette.Grey);
        Label(svg, half - 14, Top + 22, "end", w.YourRight, Palette.Grey);
        // Risers, then the frame with its propeller ring, then the pilot: nearest last.
        svg.Append(Invariant($"<path d=\"M{left:0.#} {CarabinerY}L{left * 1.02:0.#} {Top + 40}M{right:0.#} {CarabinerY}L{right * 1.02:0.#} {Top + 40}\" stroke=\"{Palette.Grey}\" stroke-width=\"3\"/>\n"));
        svg.Append(Invariant($"<circle cx=\"{thrust:0.#}\" cy=\"{HubY}\" r=\"{Ring}\" fill=\"none\" stroke=\"{Palette.Shade}\" stroke-width=\"9\"/>\n"));
        svg.Append(Invariant($"<path d=\"M{left:0.#} {CarabinerY}L{front - pair:0.#} {HangY}L{thrust - 110:0.#} {HubY - 40}M{right:0.#} {CarabinerY}L{front + pair:0.#} {HangY}L{thrust + 110:0.#} {HubY - 40}\" fill=\"none\" stroke=\"{Palette.Shade}\" stroke-width=\"9\" stroke-linecap=\"round\"/>\n"));
        svg.Append(Invariant($"<circle cx=\"{cg:0.#}\" cy=\"-38\" r=\"30\" fill=\"#fff\" stroke=\"{Palette.Grey}\" stroke-width=\"3\"/>"));
        svg.Append(Invariant($"<path d=\"M{cg - 58:0.#} 24Q{cg - 58:0.#} -4 {cg - 30:0.#} -4H{cg + 30:0.#}Q{cg + 58:0.#} -4 {cg + 58:0.#} 24V140Q{cg:0.#} 176 {cg - 58:0.#} 140Z\" fill=\"#fff\" stroke=\"{Palette.Grey}\" stroke-width=\"3\"/>\n"));
        svg.Append(Invariant($"<path d=\"M0 {Top + 40}V222\" stroke=\"{Palette.Grey}\" stroke-width=\"1.5\" fill=\"none\" stroke-dasharray=\"10 4 2 4\"/>\n"));
        svg.Append(Invariant($"<circle cx=\"{left:0.#}\" cy=\"{CarabinerY}\" r=\"10\" fill=\"{Palette.Ink}\"/><circle cx=\"{right:0.#}\" cy=\"{CarabinerY}\" r=\"10\" fill=\"{Palette.Ink}\"/>\n"));
        svg.Append(Invariant($"<rect x=\"{front - pair - 7:0.#}\" y=\"{HangY - 7}\" width=\"14\" height=\"14\" fill=\"{Palette.Blue}\"/><rect x=\"{front + pair - 7:0.#}\" y=\"{HangY - 7}\" width=\"14\" height=\"14\" fill=\"{Palette.Blue}\"/>\n"));
        svg.Append(Invariant($"<circle cx=\"{cg:0.#}\" cy=\"{CgY}\" r=\"11\" fill=\"#fff\" stroke=\"{Palette.Ink}\" stroke-width=\"2\"/><path d=\"M{cg:0.#} {CgY}v-11a11 11 0 0 1 11 11zM{cg:0.#} {CgY}v11a11 11 0 0 1 -11 -11z\" fill=\"{Palette.Ink}\"/>\n"));
    }

    /// <summary>An arrow at each thing that moves; trimmers, brake lines and a turned engine have none, words tell them.</summary>
    private static void Arrows(StringBuilder svg, Rig rig, AdjustmentReport first)
    {
        double left = rig.Carabiners.LeftM.Value * 1000, right = rig.Carabiners.RightM.Value * 1000, side = first.FirstStep < 0 ? -1 : 1;
        double front = rig.HangPoints.FrontOffsetM.Value * 1000, pair = 0.38 * (right - left);
        (double X, double Y)[] places = first.Kind switch
        {
            AdjustmentKind.CarabinerPair => [(left, CarabinerY - 26), (right, CarabinerY - 26)],
            AdjustmentKind.CarabinerOneSide => [(side < 0 ? left : right, CarabinerY - 26)],
            AdjustmentKind.BarSpacer => [(left, CarabinerY - 26), (right, CarabinerY - 26), (front - pair, HangY + 26), (front + pair, HangY + 26)],
            AdjustmentKind.HarnessFront or AdjustmentKind.HarnessFrontRear => [(front - pair, HangY + 26), (front + pair, HangY + 26)],
            AdjustmentKind.PowerUnit => [(rig.Propeller.ThrustLineM.Value * 1000, HubY + Ring - 30)],
            _ => [],
        };
        foreach ((double x, double y) in places)
        {
            double from = x - (side * 32), to = x + (side * 32);
            svg.Append(Invariant($"<path d=\"M{from:0.#} {y:0.#}H{to - (side * 14):0.#}\" stroke=\"{Palette.Vermilion}\" stroke-width=\"6\"/><path d=\"M{to:0.#} {y:0.#}l{-side * 20:0.#} -12v24z\" fill=\"{Palette.Vermilion}\"/>\n"));
        }
        if (first.Kind == AdjustmentKind.Ballast)
            svg.Append(Invariant($"<path d=\"M{(side < 0 ? left : right):0.#} {CarabinerY + 14}v54\" stroke=\"{Palette.Vermilion}\" stroke-width=\"6\"/><path d=\"M{(side < 0 ? left : right):0.#} {CarabinerY + 86}l-12 -20h24z\" fill=\"{Palette.Vermilion}\"/>\n"));
    }

    private static void Up(StringBuilder svg, double x, double length, string color, int width) =>
        svg.Append(Invariant($"<path d=\"M{x:0.#} {CarabinerY}v{-Math.Max(0, length - 12):0.#}\" stroke=\"{color}\" stroke-width=\"{width}\"/><path d=\"M{x:0.#} {CarabinerY - length:0.#}l-8 16h16z\" fill=\"{color}\"/>\n"));

    /// <summary>The torque's turning arrow over the ring: side -1 tips the frame's top to the left.</summary>
    private static void Torque(StringBuilder svg, int side)
    {
        const double Radius = 172, Reach = 0.62; // rad to either side of the top
        double x = Radius * Math.Sin(Reach), y = HubY - (Radius * Math.Cos(Reach));
        svg.Append(Invariant($"<path d=\"M{-side * x:0.#} {y:0.#}A{Radius} {Radius} 0 0 {(side > 0 ? 1 : 0)} {side * x:0.#} {y:0.#}\" fill=\"none\" stroke=\"{Palette.Green}\" stroke-width=\"5\"/>"));
        svg.Append(Invariant($"<path d=\"M{side * (x + 14):0.#} {y + 10:0.#}l{-side * 24:0.#} 0l{side * 14:0.#} -20z\" fill=\"{Palette.Green}\"/>\n"));
    }

    private static void Centred(StringBuilder svg, int y, string text, bool bold) => Label(svg, 0, y, "middle", text, bold: bold);

    private static void Label(StringBuilder svg, double x, int y, string anchor, string text, string color = Palette.Ink, bool bold = false)
    {
        string weight = bold ? "bold" : "normal";
        svg.Append(Html.Of($"<text x=\"{Invariant($"{x:0.#}")}\" y=\"{Invariant($"{y}")}\" text-anchor=\"{anchor}\" fill=\"{color}\" font-weight=\"{weight}\">{text}</text>\n"));
    }

    private static string Invariant(FormattableString text) => FormattableString.Invariant(text);
}
