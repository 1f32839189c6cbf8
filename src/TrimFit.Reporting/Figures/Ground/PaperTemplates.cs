using System.Globalization;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>Templates in millimetres of paper: one unit of the drawing is one millimetre.</summary>
internal static class PaperTemplates
{
    /// <summary>Length of the check ruler, mm.</summary>
    public const double CheckRulerMm = 150;

    /// <summary>Width of every template, mm: fits between the margins of A4 and of letter paper.</summary>
    private const double WidthMm = 176, LeftMm = 13;

    private const double Fine = 0.18, Bold = 0.4, Letter = 3;

    /// <summary>The check ruler: a line from 0 to 150 mm with the id <c>check-ruler</c> and a tick every 10 mm.</summary>
    public static string CheckRuler(GroundWords words)
    {
        var s = new Sketch(WidthMm, 14);
        s.Path($"M{Sketch.N(LeftMm)} 8 h{Sketch.N(CheckRulerMm)}", Sketch.Ink, Bold);
        for (int mm = 0; mm <= (int)CheckRulerMm; mm += 10)
        {
            double x = LeftMm + mm;
            s.Line(x, mm % 50 == 0 ? 3 : 5, x, 8, Sketch.Ink, mm % 50 == 0 ? Bold : Fine);
            if (mm % 50 == 0)
                s.Text(x, 12, mm.ToString(CultureInfo.InvariantCulture), size: Letter);
        }
        return s.SvgMillimetres(words.Labels.CheckRuler).Replace("<svg ", "<svg id=\"check-ruler\" ", StringComparison.Ordinal);
    }

    /// <summary>A strip to lay around a tube or along a bar: millimetres to both sides of 0.</summary>
    public static string Strip(GroundWords words)
    {
        var s = new Sketch(WidthMm, 20);
        const double Zero = WidthMm / 2;
        s.Box(2, 2, WidthMm - 4, 16, Sketch.Ink, Fine, "none", 0);
        for (int mm = -85; mm <= 85; mm++)
        {
            double length = mm % 10 == 0 ? 6 : mm % 5 == 0 ? 4 : 2.5;
            s.Line(Zero + mm, 2, Zero + mm, 2 + length, Sketch.Ink, mm % 10 == 0 ? 0.3 : Fine);
            if (mm % 10 == 0)
                s.Text(Zero + mm, 12, mm.ToString(CultureInfo.InvariantCulture).Replace('-', '−'), size: 2.8);
        }
        s.Line(Zero, 2, Zero, 18, Sketch.Mark, Bold, "1.5 1").Text(Zero + 2, 16.6, words.Labels.FoldHere, "start", 2.6, Sketch.Mark);
        return s.SvgMillimetres(words.Labels.Ruler);
    }

    /// <summary>Spacers as discs with a hole, and their thickness to lay a real one against.</summary>
    public static string Spacers(GroundWords words)
    {
        var s = new Sketch(WidthMm, 50);
        const double Outside = 40, Hole = 12.5;
        for (int i = 0; i < 2; i++)
        {
            double x = 24 + (i * 46), y = 23;
            s.Circle(x, y, Outside / 2, Sketch.Ink, Fine).Circle(x, y, Hole / 2, Sketch.Ink, Fine);
            s.Line(x - 3, y, x + 3, y, Sketch.Mark, Fine).Line(x, y - 3, x, y + 3, Sketch.Mark, Fine);
        }
        double left = 98;
        foreach (int thickness in (ReadOnlySpan<int>)[2, 3, 5, 8, 10, 15])
        {
            s.Box(left, 5, thickness, 36, Sketch.Ink, Fine, "#f3f5f8", 0).Text(left + (thickness / 2.0), 45, thickness.ToString(CultureInfo.InvariantCulture), size: Letter);
            left += thickness + 4;
        }
        s.Text(2, 48, words.Labels.CutOut, "start", 2.6, Sketch.Soft);
        return s.SvgMillimetres(words.Labels.Spacer);
    }

    /// <summary>A plumb protractor for the hang-back, −10 to 20 deg around a thread with a weight.</summary>
    public static string Protractor(GroundWords words)
    {
        var s = new Sketch(WidthMm, 87);
        const double X = WidthMm / 2, Y = 6, Radius = 74;
        s.Box(X - 60, 2, 120, 4, Sketch.Ink, Fine, "#f3f5f8", 0).Circle(X, Y, 0.7, Sketch.Ink, Fine, Sketch.Ink);
        for (int deg = -20; deg <= 20; deg++)
        {
            double angle = double.DegreesToRadians(deg), inner = Radius - (deg % 10 == 0 ? 8 : deg % 5 == 0 ? 6 : 3.5);
            (double sin, double cos) = Math.SinCos(angle);
            s.Line(X + (inner * sin), Y + (inner * cos), X + (Radius * sin), Y + (Radius * cos), Sketch.Ink, deg % 5 == 0 ? 0.3 : Fine);
            if (deg % 5 == 0)
                s.Text(X + ((Radius + 4) * sin), Y + ((Radius + 4) * cos) + 1, Math.Abs(deg).ToString(CultureInfo.InvariantCulture), size: Letter);
        }
        s.Line(X, Y, X, Y + Radius, Sketch.Mark, Fine, "2 1.5");
        return s.SvgMillimetres(words.Labels.AngleScale);
    }
}
