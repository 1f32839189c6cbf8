using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using static TrimFit.Reporting.Wording.GermanSides;

#pragma warning disable CS8524 // see GermanWords

namespace TrimFit.Reporting.Wording;

/// <summary>The German texts of the customer's page.</summary>
internal sealed record GermanCustomerWords : CustomerWords
{
    public override string Title => "Geradeausflug-Einstellung: was gefunden und getan wurde";
    public override string Machine => "Gerät";
    public override string Customer => "Pilot";
    public override string Wing => "Schirm";
    public override string Date => "Datum";
    public override string Told => "Was Sie uns gesagt haben";
    public override string Checked => "Was wir zuerst geprüft haben";
    public override string Measured => "Was wir gemessen haben";
    public override string Changed => "Was geändert wurde";
    public override string Reading => "Messwert";
    public override string Before => "vorher";
    public override string After => "nachher";
    public override string LeftAndNormal => "Was bleibt und normal ist";
    public override string FirstFlight => "Beim ersten Flug";
    public override string ComeBack => "Kommen Sie wieder";
    public override string SignedWorkshop => "Werkstatt, Datum";
    public override string SignedCustomer => "Pilot, Datum";

    public override IReadOnlyList<string> UsualChecks { get; } =
    [
        "Bremsleinen gleich lang, in Freigabe locker", "Trimmer gleich, an derselben Marke", "Leinen und Tragegurte gleich, kein Knoten oder Zweig",
        "Gurte des Gurtzeugs und Brustgurt gleich", "Gestell, Motorlager und Aufhängearme: kein Riss, nichts lose", "Sicherungsgurte und Rettungsverbindung richtig geführt",
    ];

    public override IReadOnlyList<string> FirstFlightSteps { get; } =
    [
        "Vor dem Start: Hängeprobe, Verschlüsse der Karabiner der Tragegurte, Sicherungsgurte, Rettungsverbindung.",
        "Ruhige Luft, freies Gelände, Höhenreserve. Stufenweise auf Vollgas; beginnt das Gestell zu gieren: zuerst Gas weg, dann steuern.",
        "Im Horizontalflug mit den Händen in den Bremsschlaufen und ohne Zug: Hält es seinen Kurs? Dann ebenso im Leerlauf und mit Vollgas. Zeichnen Sie den Flug auf.",
    ];

    public override IReadOnlyList<string> ComeBackWhen { get; } =
    [
        "mit der Aufzeichnung dieses Flugs, damit sich die Änderung nachweisen oder der nächste Schritt machen lässt;",
        "wenn sich Schirm, Gurtzeug, Propeller, Pilotengewicht (5 kg) oder Trimmergewohnheit ändern;",
        "sofort und ohne zu fliegen, wenn ein Seitenzug plötzlich kommt oder wächst: Das ist ein Defekt, keine Frage der Einstellung.",
    ];

    public override string MeasuredPull(FitAnswer answer, Numbers numbers)
    {
        double rate = Math.Abs(answer.RateRadPerSec);
        return answer.Kind switch
        {
            AnswerKind.CannotTell or AnswerKind.Contradiction => "Der Flug konnte die Frage nicht beantworten; es braucht einen weiteren Flug, bevor etwas verstellt wird.",
            AnswerKind.Balanced => "Mit gelösten Bremsen hält das Gerät im Horizontalflug seinen Kurs gut genug: Es muss nichts verstellt werden.",
            AnswerKind.SideUnknown => "Wenn das Gerät von selbst dreht, dann so wenig, dass dieser Flug nicht zeigt, zu welcher Seite.",
            AnswerKind.Travel or AnswerKind.Direction =>
                $"Mit gelösten Bremsen dreht das Gerät im Horizontalflug zu Ihrer {Oblique(answer.RateRadPerSec)} Seite, um etwa {numbers.Plain(double.RadiansToDegrees(rate), 1)} Grad in jeder Sekunde: "
                + $"ein voller Kreis in {numbers.Duration(Math.Max(1, Math.Round(Math.Tau / Math.Max(rate, 1e-4) / 10) * 10))}.",
        };
    }

    public override string Change(AdjustmentReport? first, bool balanced, string part, Numbers numbers) => (first, balanced) switch
    {
        (null, true) => "Es wurde nichts verstellt.",
        (null, false) => "Vor einem weiteren Flug wird nichts verstellt.",
        ({ } a, _) => $"Erster Schritt: {part}, {numbers.Travel(a.FirstStep, a.Unit)} {ToYourSide(a.FirstStep)}, wie Sie im Gerät sitzen. Immer nur eine Änderung auf einmal; der nächste Flug zeigt, ob ein weiterer Schritt folgt.",
    };

    public override string LeftOver(double? offRadPerSec, Numbers numbers) => offRadPerSec is double r && numbers.RateNumber(Math.Abs(r)) != numbers.RateNumber(0)
        ? $"Mit Motor aus wird das Gerät ein wenig zu Ihrer {Oblique(r)} Seite drehen. Das ist normal: Die Verschiebung gleicht den Motor im Horizontalflug aus und bleibt, wenn der Motor aus ist. Bei Vollgas bleibt ein wenig vom alten Seitenzug."
        : "Eine feste Verschiebung ist für eine Leistung gemacht, den Horizontalflug. Eine kleine Drehung mit Motor aus und eine kleine zur anderen Seite bei Vollgas sind normal.";

    public override string Carabiner(bool left) => left ? "linker Karabiner der Tragegurte von der Mittellinie" : "rechter Karabiner der Tragegurte von der Mittellinie";

    public override string Scale(bool left) => left ? "Hängeprobe, linke Waage" : "Hängeprobe, rechte Waage";

    public override string HangPoints(bool front) => front ? "vordere Aufhängepunkte des Gurtzeugs, Mitte" : "hintere Aufhängepunkte des Gurtzeugs, Mitte";

    public override string OtherPart(AdjustmentKind kind, string part) => part;
}
