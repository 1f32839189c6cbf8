using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>One small drawing a reading: where the tape, the level or the scale goes. From above flight is up the page; from behind the pilot's right is right;
/// from the side flight is to the right.</summary>
internal static class GroundDrawings
{
    private const double Width = 260, Height = 190, Middle = Width / 2;

    public static string Draw(GroundDrawing drawing, GroundWords words)
    {
        var s = new Sketch(Width, Height);
        GroundLabels l = words.Labels;
        switch (drawing)
        {
            case GroundDrawing.CarabinersFromAbove:
                FromAbove(s, l);
                Carabiner(s, 62, 42).Dimension(Middle, 42, 62, 42, "−");
                Carabiner(s, 198, 42).Dimension(Middle, 42, 198, 42, "+");
                break;
            case GroundDrawing.FrontHangPoints:
                FromAbove(s, l);
                Carabiner(s, 62, 42, Sketch.Soft);
                Carabiner(s, 198, 42, Sketch.Soft);
                Point(s, 64, 78).Dimension(Middle, 78, 64, 78, "−");
                Point(s, 196, 78).Dimension(Middle, 78, 196, 78, "+");
                break;
            case GroundDrawing.RearHangPoints:
                FromAbove(s, l);
                Carabiner(s, 62, 42, Sketch.Soft);
                Carabiner(s, 198, 42, Sketch.Soft);
                Point(s, 80, 146).Dimension(Middle, 124, 80, 124, "−").Line(80, 124, 80, 141, Sketch.Mark, 0.8);
                Point(s, 180, 146).Dimension(Middle, 124, 180, 124, "+").Line(180, 124, 180, 141, Sketch.Mark, 0.8);
                break;
            case GroundDrawing.PropellerHub:
                s.Circle(Middle, 100, 78, Sketch.Soft, 3).Line(Middle, 8, Middle, 186, Sketch.Soft, 1, "5 3").Text(Middle + 4, 16, l.CentreLine, "start", 8, Sketch.Soft);
                s.Path("M138 30 Q146 66 138 100 Q130 134 138 170", Sketch.Ink, 4).Circle(138, 100, 6, Sketch.Ink, 1.6, "#fff");
                s.Arrow(Middle - 34, 112, Middle, 112).Arrow(172, 112, 138, 112).Line(138, 106, 138, 120, Sketch.Mark, 0.8).Text(178, 115, "+", "start", 11, Sketch.Mark);
                break;
            case GroundDrawing.ThrustLineDepth:
                FromTheSide(s, l);
                s.Line(196, 42, 196, 120, Sketch.Mark, 0.8, "2 2").Dimension(212, 42, 212, 103, "mm", 16, 4).Line(196, 42, 218, 42, Sketch.Mark, 0.8);
                break;
            case GroundDrawing.HangBack:
                FromTheSide(s, l);
                s.Line(60, 124, 236, 124, Sketch.Mark, 1.2, "4 3").Text(236, 136, l.Level, "end", 9, Sketch.Mark);
                s.Path("M214 124 A154 154 0 0 0 212 101", Sketch.Mark, 1.8).Text(232, 116, "°", "middle", 9, Sketch.Mark);
                s.Box(128, 96, 46, 8, Sketch.Mark, 1.4, "#fff").Circle(151, 100, 2.4, Sketch.Mark, 1.2);
                break;
            case GroundDrawing.HangCheck:
                s.Box(30, 8, 200, 8, Sketch.Ink, 1.6, "#e6e9ee");
                Scale(s, 80, 36).Text(60, 40, l.LeftScale, "end", 8);
                Scale(s, 180, 36).Text(200, 40, l.RightScale, "start", 8);
                s.Line(80, 16, 80, 24).Line(180, 16, 180, 24).Line(80, 50, 80, 84).Line(180, 50, 180, 84);
                Carabiner(s, 80, 88);
                Carabiner(s, 180, 88);
                s.Circle(Middle, 130, 48, Sketch.Soft, 2.5).Line(82, 92, 104, 108, Sketch.Ink, 2.4).Line(178, 92, 156, 108, Sketch.Ink, 2.4);
                s.Circle(Middle, 106, 9, Sketch.Ink, 1.6, "#fff").Path("M113 150 Q112 118 130 117 Q148 118 147 150 Z", Sketch.Ink, 1.6, "#fff").Text(Middle, 140, l.Pilot, size: 8);
                s.Dimension(80, 70, 180, 70, "s");
                s.Line(Middle, 60, Middle, 184, Sketch.Soft, 0.8, "5 3");
                break;
            case GroundDrawing.PowerUnitOnScales:
                s.Circle(Middle, 78, 62, Sketch.Soft, 3).Box(112, 52, 40, 46, Sketch.Ink, 1.6, "#fff").Circle(Middle, 74, 5, Sketch.Ink, 1.6, "#fff");
                s.Line(84, 122, 70, 146, Sketch.Ink, 2.4).Line(176, 122, 190, 146, Sketch.Ink, 2.4);
                s.Box(46, 146, 48, 14, Sketch.Ink, 1.6, "#e6e9ee").Box(166, 146, 48, 14, Sketch.Ink, 1.6, "#e6e9ee");
                s.Text(70, 157, "kg", size: 9).Text(190, 157, "kg", size: 9).Text(40, 142, l.LeftScale, "start", 8).Text(220, 142, l.RightScale, "end", 8);
                s.Line(20, 160, 240, 160, Sketch.Soft, 1.2).Dimension(70, 174, 190, 174, "mm", 0, 12).Line(70, 148, 70, 178, Sketch.Mark, 0.8).Line(190, 148, 190, 178, Sketch.Mark, 0.8);
                s.Line(Middle, 6, Middle, 166, Sketch.Soft, 0.8, "5 3");
                break;
            case GroundDrawing.RearStrap:
                s.Line(196, 8, 196, 42);
                s.Line(78, 34, 70, 160, Sketch.Soft, 3).Line(76, 60, 196, 42, Sketch.Ink, 2.6);
                Carabiner(s, 196, 42);
                s.Circle(168, 84, 9, Sketch.Ink, 1.6, "#fff").Path("M150 144 Q150 98 166 96 Q180 100 178 126 L204 132 L204 142 L176 146 Z", Sketch.Ink, 1.6, "#fff");
                s.Line(168, 102, 184, 44, Sketch.Ink, 1.4).Line(152, 138, 128, 110, Sketch.Mark, 2).Line(104, 82, 78, 52, Sketch.Mark, 2);
                Scale(s, 116, 96, Sketch.Mark).Text(112, 122, l.Scale, "middle", 9, Sketch.Mark);
                s.Arrow(20, 178, 60, 178, Sketch.Soft).Text(64, 181, l.Flight, "start", 8, Sketch.Soft);
                break;
            case GroundDrawing.Rotation:
                s.Circle(Middle, 96, 72, Sketch.Soft, 3).Path("M130 30 Q138 62 130 96 Q122 130 130 162", Sketch.Ink, 4).Circle(Middle, 96, 6, Sketch.Ink, 1.6, "#fff");
                s.Path("M84 62 A57 57 0 0 1 166 52", Sketch.Mark, 2.2).Arrow(158, 46, 171, 58, Sketch.Mark, 2.2).Text(Middle, 184, l.Clockwise + " →", size: 9, colour: Sketch.Mark);
                s.Circle(100, 118, 10, Sketch.Ink, 1.6, "#fff").Line(100, 118, 100, 108);
                break;
            case GroundDrawing.ThrustTether:
                s.Line(10, 172, 250, 172, Sketch.Soft, 1.4).Box(18, 40, 10, 132, Sketch.Ink, 1.6, "#e6e9ee").Text(32, 52, l.Post, "start", 8);
                s.Line(28, 96, 60, 96, Sketch.Ink, 1.6);
                Scale(s, 72, 96).Text(72, 124, l.Scale, size: 8);
                s.Line(84, 96, 106, 96).Line(106, 96, 178, 32, Sketch.Ink, 1.2).Line(106, 96, 178, 160, Sketch.Ink, 1.2).Text(118, 70, l.Rope, "end", 8);
                s.Line(178, 28, 178, 168, Sketch.Soft, 4).Line(160, 46, 160, 146, Sketch.Ink, 3).Line(160, 96, 198, 96, Sketch.Ink, 2).Box(180, 82, 22, 28, Sketch.Ink, 1.6, "#fff");
                s.Arrow(206, 96, 244, 96, Sketch.Mark, 2.2).Text(226, 88, l.Flight, size: 8, colour: Sketch.Mark);
                break;
        }
        return s.Svg(words.DrawingDescription(drawing));
    }

    private static void FromAbove(Sketch s, GroundLabels l)
    {
        s.Line(Middle, 10, Middle, 184, Sketch.Soft, 1, "5 3").Text(Middle, 188, l.CentreLine, size: 8, colour: Sketch.Soft);
        s.Box(40, 142, 180, 8, Sketch.Soft, 2, "#e6e9ee").Line(62, 142, 62, 46, Sketch.Ink, 2.8).Line(198, 142, 198, 46, Sketch.Ink, 2.8);
        s.Path("M100 168 Q130 160 160 168", Sketch.Ink, 3.4).Circle(Middle, 164, 4, Sketch.Ink, 1.4, "#fff");
        s.Arrow(24, 60, 24, 20, Sketch.Soft).Text(24, 72, l.Flight, size: 8, colour: Sketch.Soft);
        s.Circle(Middle, 110, 8, Sketch.Soft, 1.2).Path("M104 118 Q130 104 156 118", Sketch.Soft, 1.2).Text(Middle + 24, 108, l.Pilot, "start", 8, Sketch.Soft);
    }

    /// <summary>Frame, propeller and suspension bar from the side, hanging a little back, the axis rising forward.</summary>
    private static void FromTheSide(Sketch s, GroundLabels l)
    {
        s.Line(92, 30, 78, 176, Sketch.Soft, 3).Line(70, 44, 60, 170, Sketch.Ink, 3).Box(70, 96, 20, 26, Sketch.Ink, 1.6, "#fff");
        s.Line(60, 115, 240, 97, Sketch.Ink, 1, "6 3").Line(88, 62, 196, 42, Sketch.Ink, 2.6).Line(196, 6, 196, 40);
        Carabiner(s, 196, 42);
        s.Circle(150, 72, 8, Sketch.Soft, 1.2).Path("M136 140 Q136 86 150 82 Q162 88 160 118 L186 124 L186 134 L158 140 Z", Sketch.Soft, 1.2);
        s.Arrow(14, 182, 52, 182, Sketch.Soft).Text(56, 185, l.Flight, "start", 8, Sketch.Soft);
    }

    private static Sketch Carabiner(Sketch s, double x, double y, string colour = Sketch.Ink) =>
        s.Path(FormattableString.Invariant($"M{x - 4} {y - 3} a4 4 0 0 1 8 0 v6 a4 4 0 0 1 -8 0 Z"), colour, 1.8, "#fff");

    private static Sketch Point(Sketch s, double x, double y) => s.Circle(x, y, 5, Sketch.Ink, 1.8, "#fff").Circle(x, y, 1.6, Sketch.Ink, 0, Sketch.Ink);

    private static Sketch Scale(Sketch s, double x, double y, string colour = Sketch.Ink) =>
        s.Circle(x, y, 13, colour, 1.8, "#fff").Line(x, y, x + 6, y - 7, colour).Text(x, y + 9, "kg", size: 7, colour: colour);
}
