using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Figures;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>Sheets to print and fill in.</summary>
internal static class SheetDocument
{
    private const int Repeats = 3;

    public static ReportDocument Build(SheetKind kind, Rig rig, Words words, Numbers numbers)
    {
        GroundWords g = words.Ground;
        GroundLabels l = g.Labels;
        var document = new DocumentBuilder(words);
        document.Fields([new(l.Machine, rig.Name), new(l.DateAndName)]);
        document.Paragraph(g.SheetIntroduction(kind));
        CautionPlaces places = CautionPlaces.None;
        switch (kind)
        {
            case SheetKind.Measuring:
                Drawn(document, g, numbers, GroundDrawing.CarabinersFromAbove, ("carabiners.left_mm", rig.Carabiners.LeftM), ("carabiners.right_mm", rig.Carabiners.RightM));
                Drawn(document, g, numbers, GroundDrawing.FrontHangPoints, ("hang_points.front_left_mm", null), ("hang_points.front_right_mm", null));
                Drawn(document, g, numbers, GroundDrawing.RearHangPoints, ("hang_points.rear_left_mm", null), ("hang_points.rear_right_mm", null));
                Drawn(document, g, numbers, GroundDrawing.PropellerHub, ("propeller.thrust_line_mm", rig.Propeller.ThrustLineM));
                Drawn(document, g, numbers, GroundDrawing.ThrustLineDepth, ("propeller.thrust_line_depth_mm", rig.Propeller.ThrustLineDepthM));
                Drawn(document, g, numbers, GroundDrawing.HangBack, ("propeller.hang_back_deg", rig.Propeller.HangBackRad));
                places = CautionPlaces.HangCheckSheet; // depth and hang-back are read with the pilot hanging
                break;
            case SheetKind.HangCheck:
                document.Steps(g.HangSteps);
                Drawn(document, g, numbers, GroundDrawing.HangCheck, ("hang_check.carabiner_spacing_mm", null), ("hang_check.left_kg", null), ("hang_check.right_kg", null),
                    ("hang_check.exchanged_left_kg", null), ("hang_check.exchanged_right_kg", null), ("hang_check.lean_right_left_kg", null), ("hang_check.lean_right_right_kg", null));
                (HangReading expected, double plusMinus) = Expected(rig);
                document.Paragraph($"{l.ExpectedNow}: {g.Expected(expected, plusMinus, numbers)}.");
                places = CautionPlaces.HangCheckSheet;
                break;
            case SheetKind.Weighing:
                Drawn(document, g, numbers, GroundDrawing.PowerUnitOnScales, ("weighing.scale_spacing_mm", null), ("weighing.power_unit_left_kg", null), ("weighing.power_unit_right_kg", null));
                Drawn(document, g, numbers, GroundDrawing.RearStrap, ("weighing.rear_strap_kg", null), ("mass.pilot_kg", rig.Mass.PilotKg), ("mass.fuel_kg", rig.Mass.FuelKg));
                places = CautionPlaces.HangCheckSheet; // the rear strap is read with the pilot hanging
                break;
            case SheetKind.Rotation:
                Drawn(document, g, numbers, GroundDrawing.Rotation, ("propeller.rotation", null), ("propeller.crank_rotation", null), ("propeller.drive", null),
                    ("propeller.crank_turns", null), ("propeller.propeller_turns", null));
                places = CautionPlaces.ThrustSheet; // hands near the propeller
                break;
            case SheetKind.Thrust:
                Drawn(document, g, numbers, GroundDrawing.ThrustTether, ("thrust_test.pull_kg", null), ("thrust_test.temperature_c", null), ("thrust_test.height_m", null), ("thrust_test.rope_angle_deg", null));
                places = CautionPlaces.ThrustSheet;
                break;
            case SheetKind.Templates:
                document.Instruction(l.PrintNote);
                document.Figure(PaperTemplates.CheckRuler(g), l.CheckRuler, FigureKind.FullSize);
                document.Figure(PaperTemplates.Strip(g), l.Ruler, FigureKind.FullSize);
                document.Figure(PaperTemplates.Spacers(g), l.Spacer, FigureKind.FullSize);
                document.Figure(PaperTemplates.Protractor(g), l.AngleScale, FigureKind.FullSize);
                places = CautionPlaces.AnyAdjustment; // spacers are for a change
                break;
        }
        document.Cautions(Wording.Cautions.For(places), numbers);
        return document.Build(g.SheetTitle(kind), "");
    }

    private static void Drawn(DocumentBuilder document, GroundWords g, Numbers numbers, GroundDrawing drawing, params ReadOnlySpan<(string Name, Reading? Now)> readings)
    {
        GroundLabels l = g.Labels;
        var rows = new List<ReadingRow>();
        foreach ((string name, Reading? now) in readings)
            rows.Add(new(g.Reading(name), name, now is { Source: ReadingSource.Measured } r ? Value(name, r.Value, numbers) : "", Cells(name)));
        document.Add(new DrawnReadingsBlock(GroundDrawings.Draw(drawing, g), g.DrawingTitle(drawing), g.DrawingDescription(drawing), [l.Reading, l.NowInRig, l.First, l.Second, l.Third], rows));
    }

    /// <summary>What is written down in the unit of the rig file, since that is where it goes.</summary>
    private static string Value(string name, double si, Numbers numbers) => numbers.Plain(
        name.EndsWith("_mm", StringComparison.Ordinal) ? si * 1000 : name.EndsWith("_deg", StringComparison.Ordinal) ? double.RadiansToDegrees(si) : si,
        name.EndsWith("_mm", StringComparison.Ordinal) ? 0 : 1);

    private static int Cells(string name) => name.StartsWith("mass.", StringComparison.Ordinal) || name.StartsWith("hang_check.lean", StringComparison.Ordinal)
        || name is "propeller.rotation" or "propeller.crank_rotation" or "propeller.drive" or "propeller.crank_turns" or "propeller.propeller_turns"
            or "thrust_test.temperature_c" or "thrust_test.height_m" or "thrust_test.rope_angle_deg" ? 1 : Repeats;

    /// <summary>Readings of the rig as its file is, with half of their 95 % range.</summary>
    private static (HangReading Expected, double PlusMinusKg) Expected(Rig rig)
    {
        RigValues values = new RigSpread(rig).Nominal;
        double sd = RigHang.Of(rig)?.NextFlightSdM ?? LateralGeometry.Of(rig).StandardDeviation;
        return (HangCheck.Expected(values.SuspendedKg, values.CgOffsetM, values.CarabinerSpacingM), 1.96 * sd * values.SuspendedKg / values.CarabinerSpacingM);
    }
}
