using TrimFit.Core.Analysis;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using static TrimFit.Reporting.Wording.GermanSides;

// CS8524 (an unnamed enum value) cannot happen here; without it CS8509 still makes a missing member an error, which `_ =>` would hide.
#pragma warning disable CS8524

namespace TrimFit.Reporting.Wording;

/// <summary>The German texts of test cards.</summary>
internal sealed record GermanCardWords : CardWords
{
    /// <summary>Travel that a brake of unknown full travel is taken to have, m (common practice, no source).</summary>
    private const double UsualTravelM = 0.6;

    public override string Title => "Flugkarte";
    public override string ShortTitle => "Kurze Karte";
    public override string LegsTitle => "Abschnitt für Abschnitt";
    public override string BeforeTitle => "Vor dem Start";
    public override string PrecisionTitle => "Woher die Bereiche kommen";
    public override string NeedsTitle => "Was sie braucht";
    public override string Number => "Nr.";
    public override string Time => "ab";
    public override string Heading => "Kurs";
    public override string Do => "zu tun";
    public override string Seconds => "s";
    public override string Height => "Höhe mindestens";
    public override string RulesTitle => "Im Flug";
    public override string BlindTitle => "Blindversuch mit zwei Einstellungen, A und B";

    public override IEnumerable<string> Blind(string commitment) =>
    [
        "Fliegen Sie diese Karte viermal, wenn möglich an einem Tag, mit demselben Schirm, denselben Gurten, demselben Kraftstoff und derselben Luft.",
        "Ein Helfer stellt das Gerät vor jedem Flug auf A oder B, wie der Zettel sagt, macht dieselbe Arbeit, wenn nichts zu verstellen ist, macht die Hängeprobe ohne Sie und behält den Zettel.",
        "Sie fliegen, ohne zu wissen, welche es ist, und niemand sagt es Ihnen, bevor die Flüge verglichen sind.",
        $"Nummer der versiegelten Reihenfolge: {commitment}. trimfit compare öffnet die Reihenfolge und zeigt dieselbe Nummer, wenn nichts geändert wurde.",
    ];

    public override IEnumerable<string> HelperSlip(IEnumerable<string> setups, string commitment) =>
    [
        "Für die Person, die das Gerät einstellt. Dem Piloten nicht zeigen, bis die Flüge verglichen sind.",
        $"Nummer der versiegelten Reihenfolge: {commitment}",
        "",
        .. setups.Select((setup, i) => FormattableString.Invariant($"Vor Flug {i + 1}: Einstellung {setup}")),
        "",
        "Machen Sie vor jedem Flug dieselbe Arbeit, auch wenn die Einstellung bleibt: Der Pilot darf es nicht an der Dauer erkennen.",
        "Nach jedem Einstellen: Hängeprobe, Verschlüsse der Karabiner der Tragegurte, Sicherungsgurt, Führung der Rettungsverbindung.",
    ];

    public override string OutcomeTitle => "Flugkarte";

    public override string Answer(CardPlan plan, Numbers numbers)
    {
        if (plan.Prediction is not CardPrediction p || plan.Legs.IsEmpty)
            return Refused(plan, numbers);
        string pull = $"der Seitenzug {At(plan)} auf etwa {numbers.Rate(p.PullHalfWidthRadPerSec)} nach jeder Seite genau";
        string shift = p.ShiftHalfWidthM is double w ? $", die Verschiebung des Schwerpunkts auf etwa {numbers.Length(w)} nach jeder Seite" : "";
        return $"Beginnen Sie {numbers.Height(plan.StartHeightM)} über Grund und fliegen Sie {numbers.Duration(plan.Seconds)}: Zu erwarten ist {pull}{shift}.";
    }

    public override string Refused(CardPlan plan, Numbers numbers) => plan.Refusal switch
    {
        CardRefusal.StrongPull => $"Keine Flugkarte: Der letzte Flug zog mit {numbers.Rate(Math.Abs(plan.RefusedFor ?? 0))} nach {(plan.RefusedFor > 0 ? "rechts" : "links")}, mehr als {numbers.Plain(SafetyFigures.StrongPull.DegPerSec, 0)} °/s. Fliegen Sie keine weitere Flugkarte; verstellen Sie zuerst am Boden.",
        CardRefusal.HeldBrake => $"Keine Flugkarte: Der letzte Flug brauchte {numbers.Percent(Math.Abs(plan.RefusedFor ?? 0))} der {(plan.RefusedFor > 0 ? "rechten" : "linken")} Bremse, um geradeaus zu fliegen, mehr als {numbers.Percent(SafetyFigures.StrongHeldBrake)}. Fliegen Sie keine weitere Flugkarte; verstellen Sie zuerst am Boden.",
        CardRefusal.WidthUnreachable => $"Keine Flugkarte bis zu {numbers.Plain(CardOptions.MostMinutes, 0)} min erreicht {numbers.Length(plan.Options.ShiftHalfWidthM ?? 0)} nach jeder Seite: Was ein Millimeter an diesem Gerät bewirkt, ist nicht gut genug bekannt. Das Kleinste, was sich erreichen lässt, sind etwa {numbers.Length(plan.LeastReachable ?? 0)}{Floor(plan, numbers)}. Enger wird es mit Ballastabschnitten (--ballast), einem zweiten Flug nach einem ersten Schritt oder einer gemessenen Empfindlichkeit in der Gerätedatei.",
        CardRefusal.StdErrorUnreachable => $"Keine Flugkarte bis zu {numbers.Plain(CardOptions.MostMinutes, 0)} min erreicht einen Standardfehler von {Rate2(plan.Options.PullStdErrorRadPerSec ?? 0, numbers)}. Das Kleinste, was sich erreichen lässt, sind etwa {Rate2(plan.LeastReachable ?? 0, numbers)}. Fliegen Sie in ruhigerer Luft oder mehrere Flugkarten.",
        null => "",
    };

    public override string Reaches(CardPlan plan, Numbers numbers)
    {
        if (plan.Reaches is not bool reaches)
            return "";
        string wanted = plan.Options.ShiftHalfWidthM is double w ? $"{numbers.Length(w)} nach jeder Seite für die Verschiebung" : $"ein Standardfehler von {Rate2(plan.Options.PullStdErrorRadPerSec ?? 0, numbers)} für den Seitenzug";
        if (reaches)
            return $"Gewünscht: {wanted}. Das wird voraussichtlich erreicht.";
        string need = plan.MinutesNeeded is double minutes ? $" Es braucht etwa {numbers.Plain(Math.Ceiling(minutes), 0)} min."
            : plan.LeastReachable is double least ? $" Auch keine längere Flugkarte erreicht es: Das Kleinste sind etwa {(plan.Options.ShiftHalfWidthM is null ? Rate2(least, numbers) : numbers.Length(least))}." : "";
        return $"Gewünscht: {wanted}. Das ist in dieser Zeit nicht zu erwarten.{need}";
    }

    public override string HeadingName(double headingRad)
    {
        double turns = headingRad / Math.Tau;
        return ((int)Math.Round(4 * (turns - Math.Floor(turns))) % 4) switch { 0 => "hin", 2 => "zurück", 1 => "quer, rechts vom Hinweg", _ => "quer, links vom Hinweg" };
    }

    public override string Run(double headingRad, IEnumerable<CardLeg> measuring, Rig rig, Numbers numbers) =>
        $"{Capital(HeadingName(headingRad))}: {string.Join(", ", measuring.Select(l => $"{Short(l)} {numbers.Plain(l.Seconds, 0)} s"))}";

    public override string ShortNote(CardPlan plan, Numbers numbers) =>
        $"Vor jedem: Leistung einstellen und den Kurs {numbers.Plain(plan.Legs[0].Seconds, 0)} s halten. Motor aus, Leerlauf, Horizontal und Vollgas sind freihändig. Zwischen den Zeilen sanft auf den nächsten Kurs kurven, mit der Leistung des Horizontalflugs.";

    public override string Leg(CardLeg leg, CardLeg? hold, Rig rig, Numbers numbers)
    {
        string before = hold is null ? "" : $"{PowerName(hold.Power)}{(leg.Kind == CardLegKind.Ballast ? $", {numbers.Mass(leg.BallastKg)} um {numbers.Length(Math.Abs(leg.BallastArmM))} nach {Side(leg.BallastArmM)} hinaushalten" : "")}, Kurs halten. ";
        return before + leg.Kind switch
        {
            CardLegKind.Hold => $"{PowerName(leg.Power)} einstellen und den Kurs halten.",
            CardLegKind.HandsOff => leg.Power == PowerSetting.Off ? "Motor aus, dann freihändig." : "Freihändig.",
            CardLegKind.BrakeStep => $"{Brake(leg, rig, numbers)}; dort halten.",
            CardLegKind.Circle => $"{Brake(leg, rig, numbers)}; kreisen.",
            CardLegKind.Ballast => "Freihändig mit hinausgehaltenem Ballast.",
            CardLegKind.Turn => $"Hinausschauen, sanft um {numbers.Plain(Math.Abs(double.RadiansToDegrees(leg.TurnRad)), 0)}° nach {Side(leg.TurnRad)} kurven ({HeadingName(leg.HeadingRad)}), Leistung des Horizontalflugs.",
        };
    }

    public override string Say(CardLeg leg, Rig rig, Numbers numbers) => leg.Kind switch
    {
        CardLegKind.Hold => $"{PowerName(leg.Power)} einstellen. Kurs halten.",
        CardLegKind.HandsOff => leg.Power == PowerSetting.Off ? "Motor aus. Jetzt freihändig." : "Jetzt freihändig.",
        CardLegKind.BrakeStep => $"{SideName(leg)} Bremse bis zur Marke. Halten.",
        CardLegKind.Circle => $"{SideName(leg)} Bremse bis zur Marke. Kreisen.",
        CardLegKind.Ballast => $"Ballast nach {Side(leg.BallastArmM)} hinaus. Jetzt freihändig.",
        CardLegKind.Turn => $"Hinausschauen. Um {numbers.Plain(Math.Abs(double.RadiansToDegrees(leg.TurnRad)), 0)} Grad nach {Side(leg.TurnRad)} kurven. Leistung Horizontalflug.",
    };

    public override IEnumerable<string> Before(CardPlan plan, Rig rig, Numbers numbers)
    {
        yield return plan.Machine.Logger switch
        {
            CardLogger.Full => "Logger: Drehratensensor und GPS fest am Gestell, Gas oder Drehzahl und beide Bremsen angeschlossen und am Bildschirm in Bewegung gesehen.",
            CardLogger.Phone => "Telefon: flach, Bildschirm nach oben, Oberkante nach vorn, so festgebunden, dass es sich nicht drehen kann; Drehratensensor und GPS werden aufgezeichnet.",
            CardLogger.Gps => "GPS-Rekorder: einmal je Sekunde oder schneller, in einer Tasche mit Sicht zum Himmel; stellen Sie seine Uhr und die Uhr, nach der die Abschnitte notiert werden.",
        };
        yield return "Beginnen Sie die Aufzeichnung 30 s vor dem Start und stehen Sie still: Das gibt den Nullpunkt des Drehratensensors.";
        yield return "Trimmer in einer Stellung und gleich, Beschleuniger gelöst; bis zur Landung nicht mehr berühren.";
        if (plan.Machine.HasBrakes)
            yield return $"Markieren Sie {BrakeTravel(plan.Legs, rig, numbers)} an jeder Bremsleine, gemessen von der freien Bremse, wo die Hand es sieht.";
        if (plan.Legs.Any(l => l.Kind == CardLegKind.Ballast))
            yield return $"Ballast von {numbers.Mass(plan.Options.BallastKg)}, doppelt festgebunden, bis zu seinem Abschnitt in der Mitte getragen und dann {numbers.Length(plan.Options.BallastArmM)} von der Mitte hinausgehalten.";
        yield return "Sprechende Flugkarte: Lautstärke auf, Ohrhörer nur auf einer Seite, in der Höhe gestartet. Oder lernen Sie die kurze Karte auswendig.";
        if (!plan.Machine.HasBrakes)
            yield return "Ohne die sprechende Flugkarte: Rufen Sie die Abschnitte einem Helfer mit Uhr zu, drücken Sie fünf Sekunden die Pause des Rekorders oder geben Sie am Anfang jedes Abschnitts dreimal kurz Gas.";
    }

    public override IEnumerable<(string Name, string Value)> Needs(CardPlan plan, Rig rig, Numbers numbers)
    {
        yield return ("Anfangshöhe über Grund", $"{numbers.Height(plan.StartHeightM)}; kein Abschnitt geht unter {numbers.Height(plan.Options.FloorM)}");
        yield return ("Höchster Punkt", $"etwa {numbers.Height(plan.HighestAboveStartM)} über dem Anfang: Achten Sie auf den Luftraum");
        yield return ("Wind in dieser Höhe", $"höchstens {numbers.Speed(plan.WindLimitMPerSec)}{(plan.Machine.WindMPerSec is double w ? $" (letzter Flug: {numbers.Speed(w)})" : "")}, gleichmäßig, keine Thermik");
        yield return ("Versatz durch den Wind", $"{numbers.Distance(plan.DriftAtLimitM)} bei diesem Wind; beginnen Sie in Luv von freiem Gelände");
        bool electric = rig.Propeller.Drive == PropellerDrive.Electric;
        yield return electric
            ? ("Energie für die Flugkarte", $"etwa {numbers.Plain(plan.BatteryWh, 0)} Wh, zusätzlich zu Steigflug, Heimweg und Reserve")
            : ("Kraftstoff für die Flugkarte", $"etwa {numbers.Mass(Math.Max(0.1, plan.FuelKg))}, zusätzlich zu Steigflug, Heimweg und Reserve");
    }

    public override IEnumerable<string> Precision(CardPlan plan, Numbers numbers)
    {
        if (plan.Prediction is not CardPrediction p)
            yield break;
        yield return plan.Machine.NoiseFromFlight
            ? "Rauschen von Luft und Sensoren: wie im letzten Flug. Unruhigere Luft macht die Bereiche breiter."
            : "Rauschen von Luft und Sensoren: übliche Werte, da kein Flug angegeben ist. Planen Sie nach dem ersten Flug erneut mit --from.";
        yield return $"Seitenzug {At(plan)}: Standardfehler {Rate2(p.KnownNoiseStdErrorRadPerSec, numbers)} bei bekanntem Rauschen, mal {numbers.Plain(p.Inflation, 2)}, weil es aus dem Flug zu bestimmen ist, mal {numbers.Plain(p.TFactor, 2)} für den 95-%-Bereich (Student-t).";
        if (p.ShiftHalfWidthM is double width && p.SensitivityFloorM is double floor)
            yield return $"Verschiebung: {numbers.Length(width)} nach jeder Seite, davon blieben {numbers.Length(floor)} auch bei genau bekanntem Seitenzug, da nur auf einen Faktor bekannt ist, was ein Millimeter bewirkt.";
        yield return $"Die Bereiche sind Mediane aus {numbers.Integer(p.Draws)} Flügen dieser Karte, die aus dem Drehmodell gebildet und durch die ganze Auswertung geschickt wurden; ein einzelner Flug wird ein Drittel enger oder breiter.";
    }

    public override IEnumerable<string> Rules(CardPlan plan, Numbers numbers)
    {
        yield return $"Unter {numbers.Height(plan.Options.FloorM)}, in unruhiger Luft oder wenn jemand in der Nähe ist: Karte abbrechen, Hände an die Bremsen, fliegen.";
        yield return "Freihändig dreht das Gerät: Eben das wird gemessen. Nehmen Sie die Bremsen, wann immer Sie wollen; dieser Abschnitt wird dann im Flugprotokoll ausgelassen.";
        yield return "Ein missglückter Abschnitt wird im Flugprotokoll ausgelassen, nicht in Eile noch einmal geflogen.";
    }

    public override string Outcome(CardOutcome outcome, Numbers numbers)
    {
        CardPromise promise = outcome.Promise;
        string reached = outcome.Reached ? "erreicht" : "nicht erreicht";
        if (promise.WantedShiftHalfWidthM is double wanted)
        {
            return outcome.ShiftHalfWidthM is double shift
                ? $"Die Flugkarte wollte die Verschiebung auf {numbers.Length(wanted)} nach jeder Seite; der Flug ergibt {numbers.Length(shift)}: {reached}."
                : $"Die Flugkarte wollte die Verschiebung auf {numbers.Length(wanted)} nach jeder Seite; der Flug ergibt keine Verschiebung: nicht erreicht.";
        }
        if (promise.WantedPullStdErrorRadPerSec is double error)
        {
            return outcome.PullStdErrorRadPerSec is double got
                ? $"Die Flugkarte wollte den Seitenzug mit einem Standardfehler von {Rate2(error, numbers)}; der Flug ergibt {Rate2(got, numbers)}: {reached}."
                : "Die Flugkarte wollte eine Genauigkeit des Seitenzugs; der Flug kann den Seitenzug nicht bestimmen: nicht erreicht.";
        }
        return outcome.PullHalfWidthRadPerSec is double half
            ? $"Die Flugkarte erwartete den Seitenzug auf {numbers.Rate(promise.PullHalfWidthRadPerSec)} nach jeder Seite; der Flug ergibt {numbers.Rate(half)}: {reached}."
            : "Die Flugkarte erwartete einen Bereich des Seitenzugs; der Flug kann den Seitenzug nicht bestimmen: nicht erreicht.";
    }

    public override string NextLegs(CardOutcome outcome, Numbers numbers)
    {
        if (outcome.NextLegs.IsEmpty)
            return "";
        bool forShift = outcome.ShiftHalfWidthM is not null;
        double Factor(NextLeg leg) => forShift ? leg.ShiftFactor : leg.PullFactor;
        NextLeg[] order = [.. outcome.NextLegs.OrderBy(Factor)];
        NextLeg best = order[0];
        string what = forShift ? "den Bereich der Verschiebung" : "den Bereich des Seitenzugs";
        string[] nothing = [.. order.Where(l => 1 - Factor(l) < NextLeg.AddsNothing).Select(More)];
        string rest = nothing.Length == 0 || nothing.Length == order.Length ? "" : $" Nichts bringen (unter {numbers.Percent(NextLeg.AddsNothing)}): {string.Join("; ", nothing)}.";
        return 1 - Factor(best) < NextLeg.AddsNothing
            ? $"Kein einzelner weiterer Abschnitt würde {what} um {numbers.Percent(NextLeg.AddsNothing)} enger machen."
            : $"Der beste nächste Abschnitt: {More(best)}, je zur Hälfte auf zwei entgegengesetzten Kursen, macht {what} um {numbers.Percent(1 - Factor(best))} enger.{rest}";

        string More(NextLeg leg) => $"{numbers.Plain(leg.Seconds, 0)} s mehr " + leg.Kind switch
        {
            CardLegKind.BrakeStep => "Bremsstufen, links und rechts",
            CardLegKind.Ballast => "freihändig mit hinausgehaltenem Ballast, links und rechts",
            _ => "freihändig " + (leg.Power switch { PowerSetting.Off => "mit Motor aus", PowerSetting.Idle => "im Leerlauf", PowerSetting.Cruise => "im Horizontalflug", PowerSetting.Full => "bei Vollgas" }),
        };
    }

    public override IReadOnlyDictionary<string, string> Speaking { get; } = new Dictionary<string, string>
    {
        ["title"] = "Sprechende Flugkarte",
        ["read"] = "Ich habe die Sicherheitshinweise gelesen und kenne die Karte",
        ["start"] = "Start: erster Abschnitt in 10 s",
        ["stop"] = "STOPP",
        ["stopped"] = "Angehalten",
        ["done"] = "Karte fertig",
        ["save"] = "Flugprotokoll speichern",
        ["again"] = "Verwerfen und von vorn beginnen",
        ["next"] = "danach",
        ["test"] = "Ton prüfen",
        ["testSay"] = "Dies ist Ihre Flugkarte. Sie hören mich.",
        ["sound"] = "Dieser Browser kann nicht sprechen: langer Ton = neuer Abschnitt, kurze Töne = seine letzten drei Sekunden. Ein Ton Kurs halten, zwei freihändig, drei Bremse, vier Kurve.",
        ["getReady"] = "Flugkarte. Erster Abschnitt in zehn Sekunden. Hinausschauen.",
        ["sayStopped"] = "Karte angehalten. Hände an die Bremsen.",
        ["sayDone"] = "Karte fertig. Hände an die Bremsen. Flugprotokoll nach der Landung speichern.",
        ["resumed"] = "Karte geht weiter.",
        ["three"] = "drei",
        ["two"] = "zwei",
        ["one"] = "eins",
        ["unheard"] = "dieser Abschnitt wurde nicht rechtzeitig angesagt und ist deshalb ausgelassen",
        ["cautions"] = "Sicherheitshinweise",
        ["noScript"] = "Diese Karte braucht JavaScript, das nur im Telefon läuft; nichts wird gesendet oder geladen.",
        ["saved"] = "Gespeichert als",
        ["left"] = "s übrig",
        ["of"] = "von",
        ["leg"] = "Abschnitt",
    };

    public override IEnumerable<string> SheetHead(CardPlan plan, Rig rig)
    {
        yield return "Flugprotokoll einer Flugkarte. Tragen Sie Anfang und Ende jedes geflogenen Abschnitts ein: eine Uhrzeit wie 10:21:30,";
        yield return "Sekunden der Aufzeichnung wie 95 oder { marker = 3 } für die dritte Marke. Nehmen Sie das # vor ausgefüllten Zeilen weg.";
        yield return "Abschnitte, die nicht geflogen wurden oder missglückt sind: löschen.";
    }

    private static string At(CardPlan plan) => plan.Options.BalanceThrust.Kind switch
    {
        BalanceThrustKind.Full => "bei Vollgas",
        BalanceThrustKind.Cruise => "im Horizontalflug",
        BalanceThrustKind.Even => "zwischen Leerlauf und Vollgas",
        BalanceThrustKind.Newtons => "beim Schub, bei dem ausgeglichen werden soll",
    };

    private static string Floor(CardPlan plan, Numbers numbers) =>
        plan.Prediction?.SensitivityFloorM is double floor ? $", davon {numbers.Length(floor)}, was auch immer geflogen wird" : "";

    private static string PowerName(PowerSetting power) => power switch
    {
        PowerSetting.Off => "Motor aus",
        PowerSetting.Idle => "Leerlauf",
        PowerSetting.Cruise => "Leistung des Horizontalflugs",
        PowerSetting.Full => "Vollgas",
    };

    private static string Short(CardLeg leg) => leg.Kind switch
    {
        CardLegKind.BrakeStep => $"{SideName(leg).ToLowerInvariant()} Bremse",
        CardLegKind.Circle => $"Kreis {Side(leg.BrakeRight - leg.BrakeLeft)}",
        CardLegKind.Ballast => $"Ballast {Side(leg.BallastArmM)}",
        _ => leg.Power switch { PowerSetting.Off => "Motor aus", PowerSetting.Idle => "Leerlauf", PowerSetting.Cruise => "Horizontal", PowerSetting.Full => "Vollgas" },
    };

    private static string Capital(string text) => char.ToUpperInvariant(text[0]) + text[1..];

    private static string SideName(CardLeg leg) => leg.BrakeRight > leg.BrakeLeft ? "Rechte" : "Linke";

    private static string Brake(CardLeg leg, Rig rig, Numbers numbers) =>
        $"{SideName(leg)} Bremse bis zur Marke, {BrakeTravel([leg], rig, numbers)}";

    private static string BrakeTravel(IEnumerable<CardLeg> legs, Rig rig, Numbers numbers)
    {
        double fraction = legs.Select(l => Math.Max(l.BrakeLeft, l.BrakeRight)).DefaultIfEmpty(0).Max();
        return rig.BrakeFullTravelM is double travel ? numbers.Length(fraction * travel) : $"{numbers.Percent(fraction)} des Wegs, etwa {numbers.Length(fraction * UsualTravelM)}";
    }

    private static string Rate2(double radPerSec, Numbers numbers) => numbers.Plain(double.RadiansToDegrees(radPerSec), 2) + " °/s";
}
