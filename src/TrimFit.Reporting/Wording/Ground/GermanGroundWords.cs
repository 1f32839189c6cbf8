using System.Globalization;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using static TrimFit.Reporting.Wording.GermanSides;

namespace TrimFit.Reporting.Wording;

#pragma warning disable CS8524 // a number that is no member of its enum has no words; a member without words is CS8509, an error

/// <summary>The ground work in German.</summary>
internal sealed record GermanGroundWords : GroundWords
{
    private static readonly GroundLabels _labels = new()
    {
        ChecksTitle = "Prüfungen vor dem Flug",
        Told = "Die Beanstandung",
        Checks = "Prüfungen, in dieser Reihenfolge",
        IfItStays = "Was bleibt, kommt hierhin",
        Check = "Prüfung",
        WriteDown = "Aufschreiben",
        Why = "Warum hier",
        HowTo = "Wie nachsehen",
        MendFirst = "Beheben Sie, was Sie finden, und fliegen Sie erneut, bevor an der Geometrie etwas verstellt wird. Was sich nicht beheben lässt, kommt dorthin, wo die Zeilen unten es sagen.",
        ThenMeasure = "Nichts gefunden, oder der Seitenzug ist noch da: messen (trimfit rig RIG --sheet measuring=FILE.html), die Hängeprobe machen (--sheet hang-check=FILE.html), dann eine Flugkarte fliegen.",
        HangCheck = "Hängeprobe",
        EntryFaults = "Einträge, die noch einmal anzusehen sind",
        Expected = "Anzeigen, die nach der Änderung zu erwarten waren",
        Reading = "Messwert",
        First = "1.",
        Second = "2.",
        Third = "3.",
        NowInRig = "jetzt in der Gerätedatei",
        LeftScale = "linke Waage",
        RightScale = "rechte Waage",
        ExpectedNow = "Anzeigen, die nach der jetzigen Gerätedatei zu erwarten sind",
        CentreLine = "Mittellinie des Gestells",
        Pilot = "Pilot",
        Flight = "Flugrichtung",
        Level = "waagerecht",
        Scale = "Waage",
        Rope = "Seil",
        Post = "Pfosten",
        Clockwise = "im Uhrzeigersinn",
        CheckRuler = "Prüflineal: 150 mm",
        PrintNote = "Mit 100 % drucken (nicht „an Seite anpassen“), dann ein Stahllineal an das Prüflineal legen: 150 mm müssen auf einen halben Millimeter 150 mm sein. Sind sie es nicht, verwenden Sie das Blatt nicht.",
        Ruler = "Lineal zum Umlegen um ein Rohr: 0 auf der Mittellinie des Gestells",
        Spacer = "Distanzscheibe, Außendurchmesser 40 mm, Loch 12,5 mm",
        CutOut = "an der durchgezogenen Linie ausschneiden",
        FoldHere = "hier falten: Mittellinie des Gestells",
        AngleScale = "Rückneigung: gerade Kante an das Gestell, Faden mit Gewicht am Punkt, ablesen in °",
        Machine = "Gerät",
        DateAndName = "Datum, Name",
        SkipHint = "Leere Zeile: nicht gemessen.",
        YesNo = "(j/n)?",
    };

    public override GroundLabels Labels => _labels;

    public override string SheetTitle(SheetKind kind) => kind switch
    {
        SheetKind.Measuring => "Messblatt: Maßband und Wasserwaage",
        SheetKind.HangCheck => "Hängeprobe an zwei Waagen",
        SheetKind.Weighing => "Wägeblatt: Antriebseinheit und hinterer Gurt",
        SheetKind.Rotation => "Drehrichtung und Untersetzung",
        SheetKind.Thrust => "Standschub an einer gesicherten Waage",
        SheetKind.Templates => "Papierschablonen, maßstäblich",
    };

    public override string SheetIntroduction(SheetKind kind) => kind switch
    {
        SheetKind.Measuring => "Das Gestell steht aufrecht, Kraftstoff abgelassen oder notiert. Suchen Sie zuerst seine Mittellinie: die Mitte des Bügels oder der beiden Holme, vorn und hinten mit Klebeband markiert. Jedes seitliche Maß beginnt dort; rechts ist die rechte Seite des sitzenden Piloten und positiv, links ist negativ. Messen Sie jeden Wert dreimal und setzen Sie das Band jedes Mal neu an: Aus der Streuung wird das Plusminus.",
        SheetKind.HangCheck => "Pilot in voller Flugausrüstung, Kraftstoff wie geflogen, Motor kalt, Zündkerzenstecker ab. Zwei gleiche Hängewaagen hängen waagerecht an einem Balken, der das Fünffache des Gewichts trägt, so weit auseinander, wie die Karabiner der Tragegurte im Flug hängen.",
        SheetKind.Weighing => "Antriebseinheit ohne Pilot, Motor kalt, Zündkerzenstecker ab. Sie steht waagerecht mit ihren beiden Füßen auf zwei Waagen, links so weit von der Mittellinie wie rechts.",
        SheetKind.Rotation => "Zündkerze heraus und Zündkerzenstecker ab, Zündung aus. Stellen Sie sich hinter das Gerät und schauen Sie in Flugrichtung. Markieren Sie ein Blatt und die Kurbelwellenscheibe mit Klebeband, drehen Sie die Kurbelwelle von Hand so herum, wie der Motor läuft, und zählen Sie.",
        SheetKind.Thrust => "Binden Sie das Gestell an einen Pfosten, der das Zehnfache des Zugs trägt: eine Hahnepot mit gleich langen Enden außerhalb des Bügels, die Waage dahinter im Seil, so dass das Seil längs der Propellerachse zieht. Motor warm, kein Wind. Fünf Sekunden Vollgas, ablesen, Leerlauf; dreimal.",
        SheetKind.Templates => "Für Distanzscheiben und Maße, an die kein Messschieber herankommt.",
    };

    public override string Reading(string name) => name switch
    {
        "carabiners.left_mm" => "linker Karabiner der Tragegurte von der Mittellinie des Gestells, mm, negativ",
        "carabiners.right_mm" => "rechter Karabiner der Tragegurte von der Mittellinie des Gestells, mm, positiv",
        "hang_points.front_left_mm" => "vorderer linker Aufhängepunkt des Gurtzeugs von der Mittellinie des Gestells, mm, negativ",
        "hang_points.front_right_mm" => "vorderer rechter Aufhängepunkt des Gurtzeugs von der Mittellinie des Gestells, mm, positiv",
        "hang_points.rear_left_mm" => "hinterer linker Aufhängepunkt des Gurtzeugs von der Mittellinie des Gestells, mm, negativ",
        "hang_points.rear_right_mm" => "hinterer rechter Aufhängepunkt des Gurtzeugs von der Mittellinie des Gestells, mm, positiv",
        "propeller.thrust_line_mm" => "Propellernabe von der Mittellinie des Gestells, mm, rechts positiv",
        "propeller.thrust_line_depth_mm" => "Propellerachse unter den Karabinern der Tragegurte, Gerät hängend, mm",
        "propeller.hang_back_deg" => "Rückneigung: Propellerachse gegen die Waagerechte, Gerät und Pilot hängend, °, positiv, wenn die Achse vorn nach oben zeigt",
        "mass.pilot_kg" => "Pilot mit allem, was am Gurtzeug hängt, kg",
        "mass.fuel_kg" => "Kraftstoff im Tank, kg",
        "mass.power_unit_kg" => "Antriebseinheit ohne Kraftstoff und Räder, kg",
        "hang_check.carabiner_spacing_mm" => "Abstand zwischen den beiden Karabinern der Tragegurte im Hängen, mm",
        "hang_check.left_kg" => "linke Waage, eine Anzeige je Hängen, kg",
        "hang_check.right_kg" => "rechte Waage, eine Anzeige je Hängen, kg",
        "hang_check.exchanged_left_kg" => "was der linke Karabiner der Tragegurte mit vertauschten Waagen trägt, kg",
        "hang_check.exchanged_right_kg" => "was der rechte Karabiner der Tragegurte mit vertauschten Waagen trägt, kg",
        "hang_check.lean_right_left_kg" => "linke Waage, während sich der Pilot nach rechts lehnt, kg",
        "hang_check.lean_right_right_kg" => "rechte Waage, während sich der Pilot nach rechts lehnt, kg",
        "weighing.rear_strap_kg" => "beide hinteren Gurte zusammen, Pilot hängend, kg",
        "weighing.scale_spacing_mm" => "Abstand zwischen den beiden Füßen auf den Waagen, mm",
        "weighing.power_unit_left_kg" => "linke Waage unter der Antriebseinheit, kg",
        "weighing.power_unit_right_kg" => "rechte Waage unter der Antriebseinheit, kg",
        "propeller.rotation" => "der Propeller dreht, von hinten gesehen: im Uhrzeigersinn (clockwise), dagegen (counter-clockwise) oder gegenläufig (contra-rotating)",
        "propeller.crank_rotation" => "die Kurbelwelle dreht, von hinten gesehen: im Uhrzeigersinn (clockwise) oder dagegen (counter-clockwise)",
        "propeller.drive" => "Antrieb: direkt (direct), Riemen (belt), Getriebe (gear), Fliehkraftkupplung (clutch) oder elektrisch (electric)",
        "propeller.crank_turns" => "Umdrehungen der Kurbelwelle, gezählt",
        "propeller.propeller_turns" => "Umdrehungen des Propellers in derselben Zeit (Blattdurchgänge geteilt durch Blattzahl)",
        "thrust_test.pull_kg" => "Zug bei Vollgas, kg",
        "thrust_test.temperature_c" => "Lufttemperatur, °C",
        "thrust_test.height_m" => "Höhe über dem Meer, m",
        "thrust_test.rope_angle_deg" => "Winkel zwischen Seil und Propellerachse, °",
        _ => name,
    };

    public override string DrawingTitle(GroundDrawing drawing) => drawing switch
    {
        GroundDrawing.CarabinersFromAbove => "Karabiner der Tragegurte",
        GroundDrawing.FrontHangPoints => "Vordere Aufhängepunkte des Gurtzeugs",
        GroundDrawing.RearHangPoints => "Hintere Aufhängepunkte des Gurtzeugs",
        GroundDrawing.PropellerHub => "Propellernabe",
        GroundDrawing.ThrustLineDepth => "Tiefe der Schublinie",
        GroundDrawing.HangBack => "Rückneigung",
        GroundDrawing.HangCheck => "Zwei Waagen, von hinten gesehen",
        GroundDrawing.PowerUnitOnScales => "Antriebseinheit auf zwei Waagen, von hinten gesehen",
        GroundDrawing.RearStrap => "Waage in den hinteren Gurten",
        GroundDrawing.Rotation => "Drehrichtung, von hinten gesehen",
        GroundDrawing.ThrustTether => "Gesichertes Gestell, von der Seite gesehen",
    };

    public override string DrawingDescription(GroundDrawing drawing) => drawing switch
    {
        GroundDrawing.CarabinersFromAbove => "Das Gestell von oben, Flugrichtung nach oben: von der Mittellinie des Gestells zur Mitte jedes der Karabiner der Tragegurte, dort, wo der Tragegurt hängen wird, Aufhängearme wie im Flug nach vorn gezogen.",
        GroundDrawing.FrontHangPoints => "Das Gestell von oben: von der Mittellinie des Gestells zur Mitte jedes der vorderen Aufhängepunkte des Gurtzeugs.",
        GroundDrawing.RearHangPoints => "Das Gestell von oben: von der Mittellinie des Gestells zur Mitte jedes der hinteren Aufhängepunkte des Gurtzeugs.",
        GroundDrawing.PropellerHub => "Das Gestell von hinten: von der Mittellinie des Gestells zur Mitte der Propellernabe; rechts ist die rechte Seite des Piloten.",
        GroundDrawing.ThrustLineDepth => "Das hängende Gerät von der Seite: senkrecht von den Karabinern der Tragegurte hinunter zur nach vorn verlängerten Propellerachse.",
        GroundDrawing.HangBack => "Das hängende Gerät von der Seite, mit Pilot: eine Wasserwaage an der Propellerachse oder rechtwinklig zur Propellerebene; der Winkel zur Waagerechten.",
        GroundDrawing.HangCheck => "Der Pilot hängt an zwei Waagen, eine über jedem der Karabiner der Tragegurte; links ist die linke Seite des Piloten.",
        GroundDrawing.PowerUnitOnScales => "Die Antriebseinheit steht auf zwei Waagen, eine links und eine rechts von der Mittellinie des Gestells, ihr Abstand zwischen den Füßen gemessen.",
        GroundDrawing.RearStrap => "Von der Seite: Der Pilot hängt an den Aufhängearmen, eine Waage nimmt beide hinteren Gurte zusammen auf.",
        GroundDrawing.Rotation => "Von hinten gesehen, Blick in Flugrichtung: Der Pfeil zeigt den Uhrzeigersinn; kreuzen Sie an, wie herum Kurbelwelle und Propeller drehen.",
        GroundDrawing.ThrustTether => "Das Gestell ist an einem Pfosten gesichert, die Waage im Seil, niemand in der Propellerebene oder davor.",
    };

    public override IReadOnlyList<string> HangSteps { get; } =
    [
        "Einhängen wie zum Flug: beide Karabiner der Tragegurte an die Waagen, Brustgurt wie geflogen. Füße vom Boden, Hände in den Schoß, geradeaus schauen.",
        "Warten, bis nichts mehr schwingt. Eine zweite Person liest beide Waagen ab und schreibt sie als links und rechts des sitzenden Piloten auf.",
        "Aus dem Gurtzeug heraus, wieder hinein, erneut ablesen: dreimal. Das neue Hinsetzen ist der größte Fehler der ganzen Prüfung, deshalb wird es wiederholt.",
        "Die beiden Waagen vertauschen und noch einmal hängen: Die Anzeigen werden wieder nach der Seite aufgeschrieben, nicht nach der Waage.",
        "Nach rechts lehnen und einmal ablesen: Die rechte Waage muss mehr zeigen. Zeigt sie weniger, sind die Waagen oder die Einträge vertauscht.",
        "Nach einer Änderung all das mit denselben Waagen, derselben Ausrüstung und demselben Kraftstoff wiederholen und mit trimfit rig RIG --moved PART=TRAVEL vergleichen lassen.",
    ];

    public override string Fault(GroundFault fault, Numbers numbers)
    {
        double[] v = fault.Values;
        string Value(int i, Func<double, string> show) => i < v.Length && double.IsFinite(v[i]) ? show(v[i]) : "(unbekannt)";
        string Plain(double x) => numbers.Significant(x, 4);
        string E(int i) => Value(i, x => $"um {numbers.Length(Math.Abs(x))} {ToYourSide(x)}");
        return fault.Code switch
        {
            GroundFaultCode.FactorTenInRepeats => $"Messwert {Value(0, x => numbers.Integer((long)x))} von {fault.Key} ist {Value(1, Plain)}, etwa das Zehnfache oder ein Zehntel der anderen: Eine Ziffer oder das Komma ist falsch. War es {Value(2, Plain)}?",
            GroundFaultCode.FactorTen => $"Der Wert {Value(0, Plain)} von {fault.Key} passt nicht zu den anderen Messwerten, {Value(1, Plain)} würde passen: Eine Ziffer oder das Komma ist falsch. Sehen Sie noch einmal auf die Skala.",
            GroundFaultCode.ScalesSwappedByLean => "Als sich der Pilot nach rechts lehnte, wurde die rechte Waage leichter: Die beiden Waagen oder ihre Einträge sind vertauscht. Tragen Sie sie nach den Seiten des sitzenden Piloten ein.",
            GroundFaultCode.ScalesSwappedByGeometry => $"Die Waagen zeigen das Gewicht {E(0)}, Maßband und Wägung {E(1)}: Eines ist das Spiegelbild des anderen, also sind die beiden Waagen oder die Seiten der Bandmaße vertauscht. Lassen Sie den Piloten sich nach rechts lehnen und sehen Sie, welche Waage steigt; sehen Sie dann die Bandmaße an.",
            GroundFaultCode.SidesSwapped => $"Die neuen Messwerte der Karabiner der Tragegurte ({Value(0, numbers.Length)} und {Value(1, numbers.Length)}) sind die früheren mit vertauschtem Links und Rechts. Links ist die linke Seite des sitzenden Piloten und negativ.",
            GroundFaultCode.WeightMissing => $"Die beiden Waagen tragen zusammen {Value(0, numbers.Mass)}, Pilot und Gerät wiegen nach der Gerätedatei {Value(1, numbers.Mass)}. Etwas steht auf dem Boden, fehlt in der Gerätedatei, oder eine Waage ist falsch abgelesen.",
            GroundFaultCode.HangAgainstGeometry => $"Die Waagen zeigen das Gewicht {E(0)}, Maßband und Wägung {E(1)}: weiter auseinander als die {Value(2, numbers.Length)}, die Sitz und Maßstäbe erklären. Setzen Sie sich noch einmal gerade hin; messen Sie dann die Karabiner der Tragegurte und die Aufhängepunkte des Gurtzeugs noch einmal. Bis dahin gelten die Waagen.",
            GroundFaultCode.SpacingAgainstPlaces => $"Die Karabiner der Tragegurte sind nach ihren Orten {Value(0, numbers.Length)} auseinander und nach dem Maßband der Hängeprobe {Value(1, numbers.Length)}. Messen Sie beides noch einmal.",
            GroundFaultCode.PowerUnitWeight => $"Die beiden Waagen unter der Antriebseinheit tragen {Value(0, numbers.Mass)}, die Gerätedatei nennt {Value(1, numbers.Mass)} mit Kraftstoff. Wiegen Sie noch einmal oder berichtigen Sie power_unit_kg.",
            GroundFaultCode.RotationAgainstDrive => $"Die Kurbelwelle dreht von hinten gesehen {Value(0, x => x > 0 ? "im Uhrzeigersinn" : "gegen den Uhrzeigersinn")}, und der Antrieb ({Value(1, x => Drive((PropellerDrive)(int)x))}) {Value(2, x => x > 0 ? "kehrt die Richtung um" : "behält die Richtung bei")}, also kann der Propeller nicht so drehen, wie {fault.Key} sagt. Stellen Sie sich hinter das Gerät, schauen Sie in Flugrichtung und drehen Sie ihn von Hand; Getriebe mit Zwischenrad oder Planeten kehren nicht um: gear_reverses = false.",
            GroundFaultCode.ReductionAgainstCount => $"Die gezählten Umdrehungen ergeben eine Untersetzung von {Value(0, Plain)}, die Gerätedatei sagt {Value(1, Plain)}. Zählen Sie noch einmal zehn Umdrehungen; es sind Motorumdrehungen geteilt durch Propellerumdrehungen.",
        };
    }

    public override string HangCheck(HangCheckResult hang, LateralGeometry? tape, Numbers numbers)
    {
        string text = $"Die Waagen zeigen den Schwerpunkt {At(hang.OffsetM, hang.Interval95, numbers)} ({numbers.Integer(hang.Hangs.Length)}-mal gehangen, {numbers.Mass(hang.SumKg)} auf beiden).";
        if (tape is not null)
        {
            double half = 1.96 * tape.StandardDeviation;
            text += $" Maßband und Wägung allein ergeben ihn {At(tape.OffsetM, new(tape.OffsetM - half, tape.OffsetM + half, 0.95), numbers)}. Die Waagen gelten.";
        }
        if (hang.ScattersMore)
            return text + $" Die Hängeversuche streuen um {numbers.Length(hang.SeatingSdM)}, mehr als bei Piloten üblich: Suchen Sie nach einem losen Gurt oder einem verdrehten Sitz und hängen Sie sechsmal oder öfter.";
        return hang.Hangs.Length < 3 ? text + " Dreimal hängen, jedes Mal heraus und hinein, würde den Bereich enger machen." : text;
    }

    public override string Expected(HangReading expected, double plusMinusKg, Numbers numbers) =>
        $"linke Waage {numbers.Mass(expected.LeftKg)}, rechte Waage {numbers.Mass(expected.RightKg)}, jede ± {numbers.Mass(plusMinusKg)}";

    public override string Change(HangChangeResult change, string part, Numbers numbers)
    {
        string expected = $"um {numbers.Length(Math.Abs(change.ExpectedChangeM))} {ToYourSide(change.ExpectedChangeM)}";
        string measured = At(change.MeasuredChangeM, change.Interval95, numbers);
        return change.Verdict switch
        {
            HangChangeVerdict.Confirmed => $"Bestätigt: Die Verstellung ({part}) sollte den Schwerpunkt unter dem Schirm {expected} bringen, und die Waagen zeigen eine Verschiebung {measured}. Die Hängeprobe stimmt in Richtung und Größe überein.",
            HangChangeVerdict.WrongWay => $"Falsche Richtung: Die Verstellung ({part}) sollte den Schwerpunkt {expected} bringen, aber die Waagen zeigen eine Verschiebung {measured}. Nicht fliegen. Sehen Sie nach, in welche Richtung das Teil verstellt wurde, ob die Waagen vertauscht sind und ob Links und Rechts in der Gerätedatei die des sitzenden Piloten sind.",
            HangChangeVerdict.OtherSize => $"Richtige Richtung, falsche Größe: Die Verstellung ({part}) sollte den Schwerpunkt {expected} bringen, und die Waagen zeigen eine Verschiebung {measured}. Nicht fliegen, bevor der Weg noch einmal gemessen ist und Gurte und Sitz wie vorher sind.",
            HangChangeVerdict.CannotTell => $"Nicht zu sagen: Die Verstellung ({part}) sollte den Schwerpunkt {expected} bringen, und die Waagen zeigen eine Verschiebung {measured}. {Repeat(change, numbers)}",
        };
    }

    private static string Repeat(HangChangeResult change, Numbers numbers) => (change.HangsAfter, change.HangsEach) switch
    {
        (int n, _) => $"Wiederholen: insgesamt {numbers.Integer(n)}-mal hängen in dieser Einstellung, jedes Mal heraus und hinein, würde es in neun von zehn Fällen zeigen.",
        (null, int n) => $"Wiederholen: Stellen Sie das Teil zurück; je {numbers.Integer(n)}-mal hängen in jeder der beiden Einstellungen würde es in neun von zehn Fällen zeigen.",
        _ => "Keine vernünftige Zahl von Hängeversuchen kann eine so kleine Änderung zeigen: Prüfen Sie den Weg mit dem Maßband, nach der Seite des sitzenden Piloten, und lassen Sie eine zweite Person nachsehen.",
    };

    public override string ChecksAnswer(Complaint complaint) => complaint.Since == PullSince.Suddenly
        ? "Ein plötzlich gekommener Seitenzug ist ein Defekt, keine Frage der Einstellung: nicht fliegen. Suchen Sie in dieser Reihenfolge, was gebrochen, verrutscht oder lose ist."
        : "Meist ist ein Seitenzug eine Bremsleine oder ein Gurt. Sehen Sie in dieser Reihenfolge nach, beheben Sie, was Sie finden, und fliegen Sie erneut, bevor an der Geometrie etwas verstellt wird.";

    public override IReadOnlyList<string> Told(Complaint complaint)
    {
        string when = complaint.When == PullWhen.None ? "nicht angegeben" : string.Join(", ",
            Enum.GetValues<PullWhen>().Where(w => w != PullWhen.None && complaint.When.HasFlag(w)).Select(When));
        string changed = complaint.Changed.IsEmpty ? "nichts angegeben" : string.Join(", ", complaint.Changed.Select(Part));
        return
        [
            $"Es zieht {complaint.Side switch { PullSide.Left => "nach links", PullSide.Right => "nach rechts", PullSide.Changing => "mal nach links, mal nach rechts", PullSide.Unknown => "zu einer Seite, die nicht angegeben ist" }}.",
            $"Wann: {when}.",
            $"Seit wann: {complaint.Since switch { PullSince.Always => "vom ersten Flug an", PullSince.Gradually => "allmählich gewachsen", PullSince.Suddenly => "plötzlich", PullSince.AfterChange => "seit etwas geändert wurde", PullSince.Unknown => "nicht angegeben" }}.",
            $"Vorher geändert: {changed}.",
            $"Ein anderer Schirm an diesem Gerät: {complaint.OtherWing switch { OtherWing.SamePull => "zieht ebenso", OtherWing.NoPull => "zieht nicht", OtherWing.OtherWay => "zieht zur anderen Seite", OtherWing.NotTried => "nicht versucht" }}.",
        ];
    }

    private static string When(PullWhen when) => when switch
    {
        PullWhen.Launch => "beim Start",
        PullWhen.FullPower => "bei Vollgas",
        PullWhen.Level => "im Horizontalflug",
        PullWhen.EngineOff => "mit Motor aus",
        PullWhen.Accelerator => "mit Beschleuniger",
        _ => "nicht angegeben",
    };

    private static string Part(ChangedPart part) => part switch
    {
        ChangedPart.Geometry => "Geometrie des Gestells",
        ChangedPart.Wing => "Schirm",
        ChangedPart.BrakeLines => "Bremsleinen",
        ChangedPart.Trimmers => "Trimmer",
        ChangedPart.Harness => "Gurtzeug",
        ChangedPart.Propeller => "Propeller oder Motor",
        ChangedPart.Ballast => "Ballast, Taschen oder Rettung",
    };

    public override string Cause(SimpleCause cause) => cause switch
    {
        SimpleCause.BrakeLines => "Bremsleinen, links gegen rechts",
        SimpleCause.Trimmers => "Trimmer",
        SimpleCause.AcceleratorLines => "Beschleunigerleinen",
        SimpleCause.Risers => "Tragegurte und Leinen",
        SimpleCause.Harness => "Gurte und Sitzbrett des Gurtzeugs",
        SimpleCause.LoadOnOneSide => "Rettung, Tasche oder Kraftstoff auf einer Seite",
        SimpleCause.Seat => "Sitzgewohnheit des Piloten",
        SimpleCause.SuspensionBarPivots => "Drehpunkte der Aufhängearme",
        SimpleCause.EngineMounts => "Motorlager",
        SimpleCause.Frame => "Gestell",
        SimpleCause.PropellerTrack => "Spurlauf des Propellers",
    };

    public override string LookFor(SimpleCause cause) => cause switch
    {
        SimpleCause.BrakeLines => "Den Schirm an den Tragegurten nebeneinander aufhängen oder auslegen: Länge von der Rolle bis zum Bremsgriff, beide Seiten unter demselben leichten Zug, und der Leerweg, bis sich die Hinterkante bewegt. Eine verschlissene Rolle oder ein Knoten zählt.",
        SimpleCause.Trimmers => "Trimmer an der Marke, mit der geflogen wurde: Länge vom unteren Ende des Tragegurts bis zur Kante des Trimmers, beide Seiten; an beiden ziehen, einer, der rutscht, wird ersetzt.",
        SimpleCause.AcceleratorLines => "Länge vom jeweiligen Karabiner der Tragegurte bis zur Rolle auf beiden Seiten, und ob beide zugleich ziehen, wenn der Beschleuniger getreten wird.",
        SimpleCause.Risers => "Jeden Tragegurt links gegen rechts unter 5 kg, dann die Stammleinen jeder Ebene links gegen rechts.",
        SimpleCause.Harness => "Bein-, Brust-, Schulter- und Seitengurte links gegen rechts, wie geflogen; das Sitzbrett waagerecht, nicht gebrochen.",
        SimpleCause.LoadOnOneSide => "Was auf einer Seite hängt: Rettung, Tasche, Kamera, Tank. Wiegen und messen, wie weit von der Mittellinie es hängt; nach rechts positiv.",
        SimpleCause.Seat => "Ein Foto von hinten, im Prüfgestell hängend und im Flug: Mitte des Sitzes gegen die Mittellinie des Gestells.",
        SimpleCause.SuspensionBarPivots => "Spiel nach oben, unten und seitlich am Ende jedes der Aufhängearme, links gegen rechts; Schrauben, Buchsen, Verbiegungen.",
        SimpleCause.EngineMounts => "Die Propellernabe von Hand zur Seite drücken (Zündkerzenstecker ab): wie weit sie nach links und nach rechts nachgibt; gerissener Gummi, lose Schrauben.",
        SimpleCause.Frame => "Beide Diagonalen des Bügels oder der Holme und der Abstand von der Nabe zum Bügel links und rechts.",
        SimpleCause.PropellerTrack => "Zündkerzenstecker ab, einen Stab neben die Blattspitze: von Hand drehen und sehen, wie weit die Blätter auseinander laufen; Schrauben gleich fest.",
    };

    public override string NumberToWrite(SimpleCause cause) => cause switch
    {
        SimpleCause.BrakeLines => "links minus rechts",
        SimpleCause.Trimmers => "links minus rechts",
        SimpleCause.AcceleratorLines => "links minus rechts",
        SimpleCause.Risers => "größtes links minus rechts",
        SimpleCause.Harness => "größtes links minus rechts",
        SimpleCause.LoadOnOneSide => "Masse und Ort von der Mittellinie",
        SimpleCause.Seat => "Mitte des Sitzes von der Mittellinie",
        SimpleCause.SuspensionBarPivots => "Spiel links, Spiel rechts",
        SimpleCause.EngineMounts => "Spiel links, Spiel rechts",
        SimpleCause.Frame => "Unterschied der Diagonalen",
        SimpleCause.PropellerTrack => "Abstand der Blattspitzen",
    };

    public override string UnitToWrite(SimpleCause cause, Numbers numbers) =>
        cause == SimpleCause.LoadOnOneSide ? $"{numbers.MassUnit}, {numbers.LengthUnit}" : numbers.LengthUnit;

    public override string IfItStays(SimpleCause cause) => cause switch
    {
        SimpleCause.BrakeLines => "beide auf die Länge des Herstellers einstellen, niemals kürzer",
        SimpleCause.Trimmers => "Flugprotokoll: wing_trim; beide Trimmer aufzeichnen",
        SimpleCause.AcceleratorLines => "Flugprotokoll: accelerator; Flüge ohne ihn auswerten",
        SimpleCause.Risers => "Leinencheck beim Fachbetrieb; keine Geometrie gegen einen vertrimmten Schirm",
        SimpleCause.Harness => "Gerätedatei: [hang_check] zeigt, was bleibt",
        SimpleCause.LoadOnOneSide => "Gerätedatei: in pilot_kg; [hang_check] zeigt den Ort; Kraftstoff: fuel_lateral_mm",
        SimpleCause.Seat => "Gerätedatei: [hang_check] misst sie",
        SimpleCause.SuspensionBarPivots => "Gerätedatei: [carabiners], unter Last gemessen",
        SimpleCause.EngineMounts => "nicht fliegen, bis es behoben ist",
        SimpleCause.Frame => "Gerätedatei: [carabiners], [hang_points] neu gemessen",
        SimpleCause.PropellerTrack => "nicht fliegen, bis es behoben ist",
    };

    public override string Reason(CheckReason reason) => reason switch
    {
        CheckReason.QuickAndFrequent => "schnell anzusehen",
        CheckReason.EngineOff => "es zieht mit Motor aus",
        CheckReason.WithPower => "es zieht unter Leistung",
        CheckReason.AtLaunch => "beim Start zu spüren",
        CheckReason.WithAccelerator => "es kommt mit dem Beschleuniger",
        CheckReason.Sudden => "es kam plötzlich",
        CheckReason.Changed => "es wurde geändert",
        CheckReason.SameWithOtherWing => "ein anderer Schirm zieht ebenso",
        CheckReason.GoneWithOtherWing => "ein anderer Schirm zieht nicht so",
        CheckReason.ChangesSide => "es wechselt die Seite",
    };

    public override string Question(ComplaintQuestion question) => question switch
    {
        ComplaintQuestion.Side => "Nach welcher Seite zieht es? left (links), right (rechts) oder changing (wechselnd)",
        ComplaintQuestion.When => "Wann? launch (Start), full_power (Vollgas), level (Horizontalflug), engine_off (Motor aus), accelerator (Beschleuniger), mit Kommas",
        ComplaintQuestion.Since => "Seit wann? always (immer), gradually (allmählich), suddenly (plötzlich) oder after_change (seit einer Änderung)",
        ComplaintQuestion.Changed => "Was wurde vorher geändert? geometry (Geometrie), wing (Schirm), brake_lines (Bremsleinen), trimmers (Trimmer), harness (Gurtzeug), propeller (Propeller), ballast (Ballast), mit Kommas",
        ComplaintQuestion.OtherWing => "Ein anderer Schirm an diesem Gerät? not_tried (nicht versucht), same_pull (zieht ebenso), no_pull (zieht nicht) oder other_way (zur anderen Seite)",
    };

    public override string Written(string file, int readings) => string.Create(CultureInfo.InvariantCulture, $"{readings} {(readings == 1 ? "Messwert" : "Messwerte")} in {file} geschrieben; frühere Werte bleiben dort als Kommentare.");

    private static string Drive(PropellerDrive drive) => drive switch
    {
        PropellerDrive.Direct => "direkt",
        PropellerDrive.Belt => "Riemen",
        PropellerDrive.Gear => "Getriebe",
        PropellerDrive.Clutch => "Fliehkraftkupplung",
        PropellerDrive.Electric => "elektrisch",
        PropellerDrive.Unknown => "nicht angegeben",
        _ => "unbekannt",
    };

    /// <summary><c>um 10 mm (4 bis 16) zu Ihrer rechten Seite hin</c>; with both sides named when the range spans zero.</summary>
    private static string At(double m, ConfidenceInterval interval, Numbers numbers)
    {
        string Size(double value) => numbers.LengthNumber(Math.Abs(value));
        (double near, double far) = Math.Abs(interval.Lower) < Math.Abs(interval.Upper) ? (interval.Lower, interval.Upper) : (interval.Upper, interval.Lower);
        string range = interval.ExcludesZero ? $"({Size(near)} bis {Size(far)})" : $"({Size(interval.Lower)} zu Ihrer linken bis {Size(interval.Upper)} zu Ihrer rechten Seite)";
        return $"um {numbers.Length(Math.Abs(m))} {range} {ToYourSide(m)}";
    }
}
