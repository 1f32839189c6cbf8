using TrimFit.Core.Analysis;
using static TrimFit.Reporting.Wording.GermanSides;

#pragma warning disable CS8524 // see GermanWords

namespace TrimFit.Reporting.Wording;

/// <summary>The German texts of the written report.</summary>
internal sealed record GermanReportWords : ReportWords
{
    public override string BehindTitle => "Was zu verstellen ist, von hinten gesehen";
    public override string BehindAsItIsTitle => "Das Gerät von hinten";
    public override string ForcesTitle => "Lasten von hinten, bei vollem Schub";
    public override string YourLeft => "Ihre linke Seite";
    public override string YourRight => "Ihre rechte Seite";
    public override string LeftScale => "linke Waage";
    public override string HangCheckAfter => "Hängeprobe danach";
    public override string RightScale => "rechte Waage";
    public override string LeftRiserLoad => "Tragegurte links";
    public override string RightRiserLoad => "Tragegurte rechts";
    public override string TorqueOnFrame => "Drehmoment auf das Gestell";
    public override string LeaveIt => "so lassen, wie es ist";
    public override string NothingToMoveYet => "noch nichts verstellen";
    public override string NowAndAfter => "jetzt → nach dem ganzen Weg";
    public override string FlyAgain => "Erneut fliegen, mit diesen Abschnitten";
    public override string ResidualsTitle => "Gemessene minus angepasste Drehrate";
    public override string AxisResidual => "gemessen − angepasst [°/s]";
    public override string TurnLeftTitle => "Verbleibende Drehrate bei jeder Leistung";
    public override string AxisTurnLeft => "verbleibende Drehrate [°/s], rechts +";
    public override string AsItIs => "wie es jetzt ist";
    public override string ToleranceBand => "gilt als kein Seitenzug";
    public override string WindTitle => "Windkreis";
    public override string TrackTitle => "Weg über Grund";
    public override string Start => "Anfang";
    public override string GroundVelocity => "über Grund";
    public override string AirspeedCircle => "gegen die Luft";
    public override string WindArrow => "Wind";
    public override string ProveWrongTitle => "Was dies widerlegen würde";
    public override string CovarianceTitle => "Kovarianz der Koeffizienten";
    public override string CovarianceNote => "In den miteinander malgenommenen Einheiten der Koeffizienten; die Diagonale enthält die Quadrate der Standardfehler.";
    public override string ProvenanceTitle => "Worauf dieser Bericht beruht";
    public override string RigFile => "Gerätedatei";
    public override string SheetFile => "Flugprotokoll";
    public override string Sha256 => "SHA-256";
    public override string WhyTitle => "Warum";

    public override string CausesBeforeParts =>
        "Bevor ein Teil verstellt wird: Bremsleinen gleich lang und in Freigabe locker, Trimmer gleich, beide Leinensätze und Tragegurte gleich, Gurte des Gurtzeugs gleich, "
        + "Befestigungen fest. Ein gleichbleibender Seitenzug kommt meistens von einem davon. Finden Sie etwas, beheben Sie es und fliegen Sie erneut; der Schritt unten gilt, wenn alles in Ordnung ist.";

    public override IReadOnlyList<string> LegsToFly { get; } =
    [
        "In ruhiger Luft mit Höhenreserve, jeder Abschnitt geradeaus und mit unveränderter Leistung.",
        "Motor aus: 15 s freihändig, dann 10 s mit einer etwas gezogenen und gehaltenen Bremse.",
        "Dasselbe im Leerlauf, mit der Leistung des Horizontalflugs und mit Vollgas.",
        "Dann auf Gegenkurs, die Leistungen in anderer Reihenfolge.",
        "Nennen Sie die freihändigen Abschnitte in einem Flugprotokoll, wenn die Aufzeichnung keine Bremsen enthält.",
    ];

    public override string AxisEast(string unit) => $"Osten [{unit}]";

    public override string AxisNorth(string unit) => $"Norden [{unit}]";

    public override string ToYourSide(string amount, double rightPositive) => $"{amount} {GermanSides.ToYourSide(rightPositive)}";

    public override string Tipping(string amount, double rightPositive) => $"{amount}, kippt es nach {Side(rightPositive)}";

    public override string BehindDescription(AdjustmentReport? first, string part, string travel, Numbers numbers) => first is null
        ? "Das Gerät von hinten, links und rechts wie aus Sicht des sitzenden Piloten. Jetzt ist kein Teil zu verstellen."
        : $"Das Gerät von hinten, links und rechts wie aus Sicht des sitzenden Piloten. Erster Schritt: {part}, {travel}. Hängeprobe danach: linke Waage "
            + $"{numbers.Mass(first.HangCheckLeftKg)}, rechte Waage {numbers.Mass(first.HangCheckRightKg)}. Punkte sind die Karabiner der Tragegurte, Quadrate die vorderen Aufhängepunkte des Gurtzeugs, die Scheibe ist der Schwerpunkt. Die Pfeile zeigen die Richtung, nicht die Strecke.";

    public override string ForcesDescription(string left, string right, string torque, string cg) =>
        $"Bei vollem Schub tragen die linken Tragegurte {left} und die rechten {right}; Drehmoment auf das Gestell {torque}; Abstand des Schwerpunkts von der Mitte zwischen den Karabinern der Tragegurte {cg}. "
        + "Seitlich maßstäblich; Höhen sind skizziert.";

    public override string PullFinding(PullReport pull, Numbers numbers)
    {
        string[] parts = [.. pull.At.Where(p => p.RateRadPerSec is not null).Select(p => $"{Power(p.Setting)} {Turn(p.RateRadPerSec!.Value, numbers)}")];
        return parts.Length == 0 ? "Es ließ sich keine Drehrate angeben." : $"Mit gleich stehenden Bremsen dreht das Gerät {string.Join(", ", parts)}.";
    }

    public override string ResidualDescription(double rmsRadPerSec, int windows, Numbers numbers) =>
        $"Die {numbers.Integer(windows)} Fenster liegen {numbers.Rate(rmsRadPerSec)} (quadratisches Mittel) neben der angepassten Linie. Eine Neigung oder Krümmung hier wäre etwas, das dem Modell entgeht.";

    public override string TurnLeftDescription(string part, double? atFull, Numbers numbers) => atFull is double r
        ? $"Eine Zeile je Weg, ein Zeichen je Leistung. Nach dem ganzen Weg ({part}) bleiben bei Vollgas {numbers.Rate(Math.Abs(r))} nach {Side(r)}: Ein fester Versatz kann nicht jede Leistung ausgleichen."
        : "Eine Zeile je Weg, ein Zeichen je Leistung. Ein fester Versatz kann nicht jede Leistung ausgleichen.";

    public override string WindDescription(string wind) =>
        $"{wind} Jeder Punkt ist eine Geschwindigkeit über Grund; bei gleichbleibender Geschwindigkeit gegen die Luft liegen sie auf einem Kreis um den Wind.";

    public override string TrackDescription(double lengthM, Numbers numbers) =>
        $"Wo das Gerät über Grund flog, insgesamt {numbers.Distance(lengthM)}, von seiner ersten Position an. Hier wird nichts gemessen.";

    public override IReadOnlyList<string> ProveWrong(TrimAnalysis analysis, FitAnswer answer, Words words, Numbers numbers)
    {
        var list = new List<string>();
        if (answer.Adjustment is AdjustmentReport a)
        {
            list.Add($"Die Hängeprobe nach dem ersten Schritt zeigt nicht {numbers.Mass(a.HangCheckLeftKg)} links und {numbers.Mass(a.HangCheckRightKg)} rechts: Dann wurde das Teil anders verstellt als gesagt, oder die Massen in der Gerätedatei sind falsch.");
            list.Add("Der nächste Flug, an dem sonst nichts geändert ist, zeigt den Seitenzug unverändert oder größer: Dann ist die Seite, die Empfindlichkeit oder die Ursache falsch. Machen Sie den Schritt rückgängig.");
        }
        if (analysis.Pull.AtBalance.RateRadPerSec is not null)
            list.Add("Derselbe Flug, an einem anderen Tag erneut geflogen, ergibt einen Seitenzug außerhalb des obigen Bereichs: Dann ändert sich etwas zwischen den Flügen (Gurte, Haltung, Kraftstoff, Luft).");
        if (analysis.Rig.Propeller.RotationSign != 0 && analysis.Fit["thrust"] is not null)
            list.Add($"Der Propeller dreht nicht so, wie die Gerätedatei sagt ({words.Propeller(analysis.Rig.Propeller.Rotation)}): Dann ist hier jedes Vorzeichen falsch, das auf dem Drehmoment beruht.");
        if (analysis.Verdict.Code is VerdictCode.ConstantPull or VerdictCode.Both or VerdictCode.OverCompensated)
            list.Add("Ein anderer Schirm derselben Größe fliegt am selben Gerät ohne den gleichbleibenden Teil: Dann ist der Schirm die Ursache, und kein Teil des Geräts sollte dafür verstellt werden.");
        if (analysis.Verdict.Code == VerdictCode.Balanced)
            list.Add("Freihändig über 15 s mit der Leistung des Horizontalflugs verlässt das Gerät in ruhiger Luft seinen Kurs um mehr als eine Vierteldrehung, jedes Mal zur selben Seite.");
        if (analysis.CrossCheck is not null)
            list.Add("Die Regression über stetige Fenster widerspricht dem Hauptverfahren (siehe Drehmodell).");
        return list;
    }

    public override string Carried(CarriedInput carried) => carried switch
    {
        CarriedInput.None => "",
        CarriedInput.Whole => "Diese Datei trägt ihre Aufzeichnung, Gerätedatei und ihr Flugprotokoll mit sich, wie sie gelesen wurden, Positionen eingeschlossen. Um sie erneut auszuwerten: trimfit fit mit dieser Datei als Aufzeichnung.",
        CarriedInput.WithoutPlace => "Diese Datei trägt ihren Flug ohne Positionen, ihre Gerätedatei und ihr Flugprotokoll mit sich. Um sie erneut auszuwerten: trimfit fit mit dieser Datei als Aufzeichnung.",
        CarriedInput.TooLong => "Die Aufzeichnung ist zu lang, um in dieser Datei mitgeführt zu werden; bewahren Sie sie neben dem Bericht auf.",
    };

    private static string Turn(double radPerSec, Numbers numbers) => numbers.RateNumber(radPerSec) == numbers.RateNumber(0)
        ? "gar nicht"
        : $"mit {numbers.Rate(Math.Abs(radPerSec))} nach {Side(radPerSec)}";

    private static string Power(PowerSetting setting) => setting switch
    {
        PowerSetting.Off => "mit Motor aus",
        PowerSetting.Idle => "im Leerlauf",
        PowerSetting.Cruise => "im Horizontalflug",
        PowerSetting.Full => "bei Vollgas",
    };
}
