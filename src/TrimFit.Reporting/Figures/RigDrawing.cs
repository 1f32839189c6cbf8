using System.Text;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>The rig from above, nose up: one unit of the drawing is one millimetre sideways. Below it the middle, enlarged, with the readings.</summary>
/// <remarks>The rig file knows lateral places only, so places along the machine and the width of a pair of harness hang points are sketched.</remarks>
internal static class RigDrawing
{
    private const int BarFront = -150, CarabinerY = -70, FrontY = -120, CgY = 20, RearY = 95, FrameY = 140, PropellerY = 190, Bottom = 204;
    // A white rim keeps letters readable where they cross the centre line.
    private static readonly HtmlText _halo = new(" paint-order=\"stroke\" stroke=\"#fff\" stroke-width=\"6\"");
    private static readonly int[] _scales = [10, 5, 4, 3, 2];
    private const int LegendRow = 27, CloseRow = 46, Text = 17;

    /// <summary>Draws the rig now and, when an adjustment is given, after its rounded travel.</summary>
    public static string Draw(Rig rig, RigReport report, AdjustmentReport? adjustment, Words words, Numbers numbers)
    {
        Labels l = words.Labels;
        Places now = Places.Now(rig, report);
        Places? after = adjustment is null ? null : now.After(adjustment.Kind, adjustment.Rounded, report);
        double half = Math.Max(Math.Max(Math.Abs(now.Left), Math.Abs(now.Right)) * 1000, 150) + 90;
        var svg = new StringBuilder();

        // Legend and close-up stand below the machine, so no label can lie on a part.
        (string Symbol, string Text)[] legend =
        [
            (Line(0, 0, 30, 0, Palette.Grey, 1.5, "10 4 2 4"), l.CentreLine),
            (Line(0, 0, 30, 0, Palette.Green, 3, "7 5"), l.ThrustLine),
            (Ring(15, 0, false), l.Carabiner),
            (Square(15, 0, false), l.FrontHangPoints + ", " + l.RearHangPoints),
            (Cross(15, 0, false), l.CarabinerMiddle),
            (Centre(15, 0, false), l.Cg),
        ];
        int legendTop = PropellerY + 66;
        int closeTop = legendTop + (LegendRow * (legend.Length + (after is null ? 0 : 1))) + 16;
        (string Name, Func<double, double, bool, string> Draw, double Now, double? After)[] rows =
        [
            (l.CarabinerMiddle, Cross, now.Middle, after?.Middle),
            (l.Cg, Centre, now.Cg, after?.Cg),
            (l.ThrustLine, Arrow, now.Thrust, after?.Thrust),
            (l.FrontHangPoints, Square, now.Front, after?.Front),
            (l.RearHangPoints, Square, now.Rear, after?.Rear),
        ];
        int height = closeTop + 34 + (rows.Length * CloseRow) + 34 + 245;
        SvgFigure.Open(svg, "rig", Invariant($"{-half:0.#} -245 {2 * half:0.#} {height}"), l.Drawing, words.DrawingDescription(after is not null));
        svg.Append(Invariant($"<g font-family=\"{PlotFont.CssFamilies}\" font-size=\"{Text}\" fill=\"{Palette.Ink}\">\n"));
        Machine(svg, rig, now, after, half, words);
        for (int i = 0; i < legend.Length; i++)
            LegendLine(svg, -half + 14, legendTop + (i * LegendRow), legend[i].Symbol, legend[i].Text);
        if (after is not null)
        {
            string both = Square(4, 0, false) + Invariant($"<path d=\"M14 0H18\" stroke=\"{Palette.Vermilion}\" stroke-width=\"2\"/>") + Square(28, 0, true);
            LegendLine(svg, -half + 14, legendTop + (legend.Length * LegendRow), both, $"{l.NowFilled}, {l.AfterOutlined}");
        }
        CloseUp(svg, rows, half, closeTop, words, numbers);
        return svg.Append("</g>\n</svg>").ToString();
    }

    private static void Machine(StringBuilder svg, Rig rig, Places now, Places? after, double half, Words words)
    {
        Labels l = words.Labels;
        double left = now.Left * 1000, right = now.Right * 1000, pair = 0.38 * (right - left);
        svg.Append(Invariant($"<path d=\"M{left:0.#} {BarFront}V{FrameY}M{right:0.#} {BarFront}V{FrameY}\" stroke=\"{Palette.Shade}\" stroke-width=\"14\" stroke-linecap=\"round\"/>\n"));
        svg.Append(Invariant($"<path d=\"M{left - 30:0.#} {FrameY}Q0 {FrameY + 34} {right + 30:0.#} {FrameY}\" fill=\"none\" stroke=\"{Palette.Shade}\" stroke-width=\"10\" stroke-linecap=\"round\"/>\n"));
        double tip = Math.Min(half - 20, 260);
        svg.Append(Invariant($"<path d=\"M{(now.Thrust * 1000) - tip:0.#} {PropellerY}H{(now.Thrust * 1000) + tip:0.#}\" stroke=\"{Palette.Grey}\" stroke-width=\"5\" stroke-linecap=\"round\"/>\n"));
        svg.Append(Html.Of($"<text x=\"{Invariant($"{-half + 14:0.#}")}\" y=\"{Invariant($"{PropellerY + 32}")}\" fill=\"{Palette.Grey}\"{_halo}>{words.Propeller(rig.Propeller.Rotation)}</text>\n"));
        svg.Append(Line(0, -222, 0, Bottom, Palette.Grey, 1.5, "10 4 2 4"));
        svg.Append(Invariant($"<path d=\"M0 -240l-9 20h18z\" fill=\"{Palette.Grey}\"/>"));
        svg.Append(Html.Of($"<text x=\"16\" y=\"-224\" fill=\"{Palette.Grey}\">{l.FlightDirection}</text>\n"));
        double ahead = PropellerY - CarabinerY;
        double x0 = now.Thrust * 1000, x1 = x0 + (Math.Tan(rig.Propeller.CantRad.Value) * ahead);
        svg.Append(Line(x0, PropellerY, x1, CarabinerY - 90, Palette.Green, 3, "7 5"));
        svg.Append(Invariant($"<path d=\"M{x1:0.#} {CarabinerY - 102}l-7 14h14z\" fill=\"{Palette.Green}\"/>\n"));
        foreach ((Places places, bool outlined) in after is null ? new[] { (now, false) } : [(now, false), (after, true)])
        {
            bool Same(Func<Places, double> place) => outlined && Math.Abs(place(places) - place(now)) < 0.0005; // what stays is drawn once
            foreach ((double middle, int y, bool same) in new[] { (places.Front * 1000, FrontY, Same(p => p.Front)), (places.Rear * 1000, RearY, Same(p => p.Rear)) })
            {
                if (same)
                    continue;
                svg.Append(Line(middle - pair, y, middle + pair, y, outlined ? Palette.Vermilion : Palette.Blue, 1, outlined ? "4 3" : ""));
                svg.Append(Square(middle - pair, y, outlined)).Append(Square(middle + pair, y, outlined)).Append('\n');
            }
            svg.Append(Same(p => p.Left) ? "" : Ring(places.Left * 1000, CarabinerY, outlined)).Append(Same(p => p.Right) ? "" : Ring(places.Right * 1000, CarabinerY, outlined));
            svg.Append(Same(p => p.Middle) ? "" : Cross(places.Middle * 1000, CarabinerY, outlined)).Append(Same(p => p.Cg) ? "" : Centre(places.Cg * 1000, CgY, outlined)).Append('\n');
        }
    }

    private static void CloseUp(StringBuilder svg, (string Name, Func<double, double, bool, string> Draw, double Now, double? After)[] rows, double half, int top,
        Words words, Numbers numbers)
    {
        Labels l = words.Labels;
        double reach = rows.Max(r => Math.Max(Math.Abs(r.Now), Math.Abs(r.After ?? 0))) * 1000;
        double usable = half - 30;
        int scale = _scales.FirstOrDefault(k => reach * k <= usable, 1);
        int bottom = top + 34 + (rows.Length * CloseRow);
        svg.Append(Html.Of($"<text x=\"{Invariant($"{-half + 14:0.#}")}\" y=\"{Invariant($"{top + 6}")}\" font-weight=\"bold\">{l.CloseUp} ({Invariant($"{scale}")} ×)</text>\n"));
        svg.Append(Line(0, top + 18, 0, bottom, Palette.Grey, 1.5, "10 4 2 4"));
        double step = numbers.Imperial ? 25.4 / 4 : 10; // a quarter of an inch, or a centimetre
        while (step * scale < 38)
            step *= 2;
        for (double x = 0; x * scale <= usable; x += step)
        {
            foreach (double side in x == 0 ? [1.0] : new[] { -1.0, 1.0 })
            {
                svg.Append(Line(side * x * scale, bottom - 6, side * x * scale, bottom, Palette.Grey, 1, ""));
                svg.Append(Html.Of($"<text x=\"{Invariant($"{side * x * scale:0.#}")}\" y=\"{Invariant($"{bottom + 17}")}\" text-anchor=\"middle\" font-size=\"14\" fill=\"{Palette.Grey}\">{numbers.LengthNumber(x / 1000)}</text>"));
            }
        }
        svg.Append(Line(-usable, bottom, usable, bottom, Palette.Grey, 1, "")).Append('\n');
        for (int i = 0; i < rows.Length; i++)
        {
            (string name, Func<double, double, bool, string> draw, double now, double? after) = rows[i];
            int y = top + 34 + (i * CloseRow);
            string reading = after is double a && words.Lateral(a, numbers) != words.Lateral(now, numbers)
                ? $"{words.Lateral(now, numbers)} → {words.Lateral(a, numbers)}"
                : words.Lateral(now, numbers);
            svg.Append(Html.Of($"<text x=\"{Invariant($"{-half + 14:0.#}")}\" y=\"{Invariant($"{y + 8}")}\" font-size=\"15\"{_halo}>{name}: {reading}</text>"));
            double x = now * 1000 * scale;
            if (after is double moved && Math.Abs(moved - now) * 1000 * scale > 3)
            {
                double to = moved * 1000 * scale;
                svg.Append(Line(x, y + 26, to, y + 26, Palette.Vermilion, 2, "")).Append(draw(x, y + 26, false)).Append(draw(to, y + 26, true));
            }
            else
            {
                svg.Append(draw(x, y + 26, false));
            }
            svg.Append('\n');
        }
    }

    private static void LegendLine(StringBuilder svg, double x, double y, string symbol, string text)
    {
        svg.Append(Invariant($"<g transform=\"translate({x:0.#} {y:0.#})\">{symbol}"));
        svg.Append(Html.Of($"<text x=\"46\" y=\"6\">{text}</text></g>\n"));
    }

    private static string Line(double x0, double y0, double x1, double y1, string color, double width, string dash)
    {
        string dashes = dash.Length == 0 ? "" : $" stroke-dasharray=\"{dash}\"";
        return Invariant($"<path d=\"M{x0:0.##} {y0:0.##}L{x1:0.##} {y1:0.##}\" stroke=\"{color}\" stroke-width=\"{width:0.#}\" fill=\"none\"{dashes}/>");
    }

    private static string Ring(double x, double y, bool after) =>
        Invariant($"<circle cx=\"{x:0.##}\" cy=\"{y:0.##}\" r=\"9\" {Paint(after, Palette.Ink)}/>");

    private static string Square(double x, double y, bool after) =>
        Invariant($"<rect x=\"{x - 6.5:0.##}\" y=\"{y - 6.5:0.##}\" width=\"13\" height=\"13\" {Paint(after, Palette.Blue)}/>");

    private static string Arrow(double x, double y, bool after) =>
        Invariant($"<path d=\"M{x:0.##} {y - 9:0.##}l-8 17h16z\" {Paint(after, Palette.Green)}/>");

    private static string Cross(double x, double y, bool after) =>
        Invariant($"<path d=\"M{x - 8:0.##} {y:0.##}h16M{x:0.##} {y - 8:0.##}v16\" fill=\"none\" stroke=\"{(after ? Palette.Vermilion : Palette.Ink)}\" stroke-width=\"{(after ? 2 : 3)}\"/>");

    /// <summary>The sign for a centre of gravity: a disc with two dark quarters.</summary>
    private static string Centre(double x, double y, bool after)
    {
        string color = after ? Palette.Vermilion : Palette.Ink;
        return Invariant($"<circle cx=\"{x:0.##}\" cy=\"{y:0.##}\" r=\"10\" fill=\"#fff\" fill-opacity=\"{(after ? 0 : 1)}\" stroke=\"{color}\" stroke-width=\"2\"/>")
            + Invariant($"<path d=\"M{x:0.##} {y:0.##}v-10a10 10 0 0 1 10 10zM{x:0.##} {y:0.##}v10a10 10 0 0 1 -10 -10z\" {(after ? Paint(true, color) : Paint(false, color))}/>");
    }

    private static string Paint(bool after, string color) => after
        ? $"fill=\"none\" stroke=\"{Palette.Vermilion}\" stroke-width=\"2\""
        : $"fill=\"{color}\" stroke=\"{color}\" stroke-width=\"1\"";

    private static string Invariant(FormattableString text) => FormattableString.Invariant(text);

    /// <summary>Lateral places, m from the centre line, right positive.</summary>
    private sealed record Places(double Left, double Right, double Front, double Rear, double Cg, double Thrust)
    {
        public double Middle => (Left + Right) / 2;

        public static Places Now(Rig rig, RigReport report) => new(rig.Carabiners.LeftM.Value, rig.Carabiners.RightM.Value,
            rig.HangPoints.FrontOffsetM.Value, rig.HangPoints.RearOffsetM.Value, report.CgLateralM, rig.Propeller.ThrustLineM.Value);

        public Places After(AdjustmentKind kind, double d, RigReport report)
        {
            Places moved = kind switch
            {
                AdjustmentKind.CarabinerPair => this with { Left = Left + d, Right = Right + d },
                AdjustmentKind.CarabinerOneSide => d < 0 ? this with { Left = Left + d } : this with { Right = Right + d },
                AdjustmentKind.BarSpacer => this with { Left = Left + d, Right = Right + d, Front = Front + d },
                AdjustmentKind.HarnessFront => this with { Front = Front + d },
                AdjustmentKind.HarnessFrontRear => this with { Front = Front + d, Rear = Rear + d },
                _ => this,
            };
            // The table gives places from the middle between the carabiners; the drawing wants them from the centre line.
            RigAdjustment? row = report.Adjustments.FirstOrDefault(a => a.Kind == kind);
            double middle = moved.Middle - Middle;
            return row is null ? moved : moved with
            {
                Cg = Cg + middle + (row.CgOffsetPerTravel * d),
                Thrust = Thrust + middle + (row.ThrustOffsetPerTravel * d),
            };
        }
    }
}
