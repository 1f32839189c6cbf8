using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Reporting.Jobs;
using static TrimFit.Reporting.Wording.GermanSides;

// CS8524 (an unnamed enum value) cannot happen here; without it CS8509 still makes a missing member an error, which `_ =>` would hide.
#pragma warning disable CS8524

namespace TrimFit.Reporting.Wording;

/// <summary>The job book in German.</summary>
internal sealed record GermanJobWords : JobWords
{
    private static Words German => Words.Of(ReportLanguage.German);

    public override string ListTitle => "Aufträge";
    public override string JobTitle(long number) => "Auftrag " + Text(number);
    public override string HistoryTitle => "Verlauf";
    public override string Job => "Auftrag";
    public override string Opened => "angelegt";
    public override string Machine => "Gerät";
    public override string Customer => "Kunde";
    public override string Wing => "Schirm";
    public override string Complaint => "Beanstandung";
    public override string Setups => "Einstellungen";
    public override string Setup => "Einstellung";
    public override string Flights => "Flüge";
    public override string Flight => "Flug";
    public override string Results => "Ergebnisse";
    public override string Adjustments => "Verstellungen";
    public override string Checks => "Prüfungen";
    public override string Check => "Prüfung";
    public override string Notes => "Notizen";
    public override string Signatures => "Unterschrieben";
    public override string Date => "Datum";
    public override string Time => "Zeit (UTC)";
    public override string What => "was";
    public override string RigFile => "Gerätedatei";
    public override string Files => "Dateien (mit dem Anfang ihres SHA-256)";
    public override string Turn => "Drehrate °/s";
    public override string Verdict => "Befund";
    public override string State => "Stand";
    public override string Signed => "unterschrieben";
    public override string Unsigned => "offen";
    public override string Outcome => "Ausgang";
    public override string Found => "gefunden";
    public override string By => "von";
    public override string Recommended => "empfohlen";
    public override string Readings => "Messwerte, wie gemessen";
    public override string SignedBy => "unterschrieben von";
    public override string Wings => "Schirme";
    public override string MemoryTitle => "Das Gedächtnis der Werkstatt";

    public override string VerdictWord(string code) => code switch
    {
        "insufficient" => "nicht zu sagen",
        "balanced" => "ausgeglichen",
        "over_compensated" => "überausgeglichen",
        "both" => "gleichbleibender Seitenzug und Seitenzug der Leistung",
        "power_pull" => "Seitenzug wächst mit der Leistung",
        "constant_pull" => "gleichbleibender Seitenzug",
        "fixed" => "behoben",
        "better" => "besser",
        "no_clear_change" => "keine deutliche Änderung",
        "worse" => "schlechter",
        _ => code.Replace('_', ' '),
    };

    public override string Answer(JobRecord job, Numbers numbers)
    {
        string state = job.IsSigned
            ? $"unterschrieben von {job.Signatures[^1].Name} am {JobDocuments.Date(job.Signatures[^1].Date)}"
            : "offen";
        string flights = Count(job.Flights.Length, "Flug", "Flüge"), setups = Count(job.Setups.Length, "Einstellung", "Einstellungen");
        string turn = job.LatestFit?.RateRadPerSec is double rate ? $" Der letzte Flug drehte mit {numbers.Rate(Math.Abs(rate))} nach {Side(rate)}." : "";
        return $"Auftrag {Text(job.Number)}, {job.Machine}: {state}; {setups}, {flights}.{turn}";
    }

    public override string ListAnswer(int jobs, int flights, long bytes, Numbers numbers) =>
        jobs == 0 ? $"Hier ist kein Auftrag. Das Buch belegt {Size(bytes, numbers)}." : $"{Count(jobs, "Auftrag", "Aufträge")} mit {Count(flights, "Flug", "Flügen")}; das Buch belegt {Size(bytes, numbers)}.";

    public override string SetupOrigin(SetupRecord setup) => setup.ChangedFrom is int from ? $"Einstellung {Text(from)} nach einer Verstellung" : "gemessen";

    public override string SignatureIsTheirs => "Eine Unterschrift ist das eigene Wort des Technikers. TrimFit schätzt; es genehmigt nichts.";

    public override string Role(string role)
    {
        bool before = role.StartsWith(InputRecord.Before, StringComparison.Ordinal);
        string own = before ? role[InputRecord.Before.Length..] : role;
        string name = own switch
        {
            InputRecord.Log => "Aufzeichnung",
            InputRecord.LogWithoutPlace => "Aufzeichnung, Orte entfernt",
            InputRecord.Rig => "Gerätedatei",
            InputRecord.Sheet => "Flugprotokoll",
            _ => own.Replace('_', ' '),
        };
        return before ? "vorher: " + name : name;
    }

    public override string OutcomeOf(CheckOutcome outcome) => outcome switch
    {
        CheckOutcome.Pass => "in Ordnung",
        CheckOutcome.Fail => "nicht in Ordnung",
        CheckOutcome.NotDone => "nicht gemacht",
    };

    public override string CheckName(string code)
    {
        foreach (SimpleCause cause in Enum.GetValues<SimpleCause>())
        {
            if (Snake.Of(cause.ToString()) == code)
                return German.Ground.Cause(cause);
        }
        return code.Replace('_', ' ');
    }

    public override string Reading(ReadingRecord reading, Numbers numbers) => $"{ReadingName(reading.Key)} {ReadingValue(reading, numbers)}";

    public override string ReadingName(string key) => key switch
    {
        "carabiners.left_mm" => "linker Karabiner der Tragegurte",
        "carabiners.right_mm" => "rechter Karabiner der Tragegurte",
        "hang_points.front_offset_mm" => "Mitte der vorderen Aufhängepunkte des Gurtzeugs",
        "hang_points.rear_offset_mm" => "Mitte der hinteren Aufhängepunkte des Gurtzeugs",
        "hang_points.front_left_mm" => "linker vorderer Aufhängepunkt des Gurtzeugs",
        "hang_points.front_right_mm" => "rechter vorderer Aufhängepunkt des Gurtzeugs",
        "hang_points.rear_left_mm" => "linker hinterer Aufhängepunkt des Gurtzeugs",
        "hang_points.rear_right_mm" => "rechter hinterer Aufhängepunkt des Gurtzeugs",
        "hang_check.left_kg" => "Hängeprobe links",
        "hang_check.right_kg" => "Hängeprobe rechts",
        "propeller.thrust_line_mm" => "Schublinie",
        _ => key,
    };

    public override string ReadingValue(ReadingRecord reading, Numbers numbers)
    {
        bool lateral = reading.Key.StartsWith("carabiners.", StringComparison.Ordinal) || reading.Key.StartsWith("hang_points.", StringComparison.Ordinal) || reading.Key == "propeller.thrust_line_mm";
        // As measured: not rounded to what a workshop can set.
        string Shown(double mm) => (numbers.Imperial ? numbers.Plain(Math.Abs(mm) / 25.4, 2) : numbers.Tick(Math.Abs(mm))) + " " + numbers.LengthUnit;
        return lateral ? Shown(reading.Value) + (reading.Value == 0 ? "" : " " + Side(reading.Value))
            : reading.Key.StartsWith("hang_check.", StringComparison.Ordinal) ? numbers.Mass(reading.Value)
            : numbers.Tick(reading.Value);
    }

    public override string Measured(ResultRecord first, ResultRecord? last, Numbers numbers)
    {
        string before = first.RateRadPerSec is double b ? $"Im ersten Flug drehte das Gerät mit gleich stehenden Bremsen mit {numbers.Rate(Math.Abs(b))} nach {Side(b)}." : "Der erste Flug konnte den Seitenzug nicht bestimmen.";
        string after = last is null ? "" : last.RateRadPerSec is double a ? $" Im letzten drehte es mit {numbers.Rate(Math.Abs(a))} nach {Side(a)}." : " Der letzte konnte ihn nicht bestimmen.";
        return before + after;
    }

    public override string Changed(IEnumerable<AdjustmentRecord> adjustments, Numbers numbers) =>
        string.Join(" ", adjustments.Select(a => $"Verstellt, nach den Messwerten: {German.PartShort(a.Kind)} {German.Travel(a.Travel, FitFacts.UnitOf(a.Kind), numbers)}."));

    public override string CheckLine(CheckRecord check, Numbers numbers) =>
        $"{CheckName(check.Code)}: {OutcomeOf(check.Outcome)}{(check.Value is double v ? $", {numbers.Tick(v)} {check.Unit}" : "")}{Tail(check.Note)}";

    public override string SignedAs(SignatureRecord signature) => $"{signature.Name}, {JobDocuments.Date(signature.Date)}";

    public override string Event(JobEvent what, Numbers numbers) => what switch
    {
        JobEvent.Opened e => $"angelegt: {e.Job.Complaint}",
        JobEvent.Measured e => $"Einstellung {Text(e.Setup.Number)} gemessen: {e.Setup.RigName}{Tail(e.Setup.Note)}",
        JobEvent.Checked e => "Prüfung: " + CheckLine(e.Check, numbers),
        JobEvent.Flown e => $"Flug {Text(e.Flight.Number)} mit Einstellung {Text(e.Flight.Setup)}: {string.Join(", ", e.Flight.Inputs.Select(i => i.Name))}",
        JobEvent.Found e => Found1(e.Result, numbers),
        JobEvent.Adjusted e => $"{Moved(e.Adjustment, numbers)}; aus Einstellung {Text(e.Adjustment.FromSetup)} wurde Einstellung {Text(e.Adjustment.ToSetup)}{Tail(e.Adjustment.Note)}",
        JobEvent.Noted e => $"Notiz: {e.Note.Text}",
        JobEvent.SignedOff e => $"unterschrieben von {e.Signature.Name} für Einstellung {Text(e.Signature.Setup)}",
        _ => throw new ArgumentOutOfRangeException(nameof(what)),
    };

    public override string Kept(JobEvent what, long job, Numbers numbers) => what switch
    {
        JobEvent.Opened e => $"Auftrag {Text(job)} ist angelegt: {e.Job.Machine}.",
        JobEvent.Measured e => $"Auftrag {Text(job)} hat Einstellung {Text(e.Setup.Number)} ({e.Setup.RigName}).",
        JobEvent.Checked e => $"Auftrag {Text(job)}, Prüfung {Text(e.Check.Number)}: {CheckLine(e.Check, numbers)}.",
        JobEvent.Flown e => $"Auftrag {Text(job)}, Flug {Text(e.Flight.Number)} ist mit seinem Ergebnis aufbewahrt (Einstellung {Text(e.Flight.Setup)}).",
        JobEvent.Found e => $"Auftrag {Text(job)}, Ergebnis {Text(e.Result.Number)} ist aufbewahrt: {Found1(e.Result, numbers)}.",
        JobEvent.Adjusted e => $"Auftrag {Text(job)}, Einstellung {Text(e.Adjustment.ToSetup)}: {Moved(e.Adjustment, numbers)}.",
        JobEvent.Noted => $"Auftrag {Text(job)}: Die Notiz ist aufbewahrt.",
        JobEvent.SignedOff e => $"Auftrag {Text(job)}, Einstellung {Text(e.Signature.Setup)} ist unterschrieben von {e.Signature.Name} am {JobDocuments.Date(e.Signature.Date)}. Das Wort ist das der Person; TrimFit genehmigt nichts.",
        _ => throw new ArgumentOutOfRangeException(nameof(what)),
    };

    public override string Memory(ShopMemory? memory, int wings, Numbers numbers) => memory is null
        ? $"Bisher {Count(wings, "Messung", "Messungen")} der Drehung je Verschiebung; {Text(ShopMemory.FewestWings)} Schirme sind die wenigsten, die etwas über den nächsten sagen. Ein Ballastabschnitt oder ein zweiter Flug nach dem ersten Schritt (trimfit job compare) bringt eine hinzu."
        : $"{Count(memory.Wings, "Schirm", "Schirme")} dieser Werkstatt sagen, dass der nächste, bei {numbers.Mass(_usualKg)} und ohne Größenangabe, mit {numbers.SensitivityNumber(memory.RadPerSecPerM)} {numbers.SensitivityUnit} Verschiebung des Schwerpunkts dreht ({numbers.SensitivityNumber(memory.Interval95.Lower)} bis {numbers.SensitivityNumber(memory.Interval95.Upper)}).";

    public override string SetAside(SetAsideWing wing, Numbers numbers) =>
        $"Der Schirm von Auftrag {Text(wing.Job)}{(wing.WingId.Length > 0 ? " (" + wing.WingId + ")" : "")} verhält sich anders als die übrigen, {numbers.SensitivityNumber(wing.RadPerSecPerM)} {numbers.SensitivityUnit} (p = {numbers.Plain(wing.P, 3)}), und bleibt aus dem Gedächtnis heraus.";

    public override string AskAgain(AdjustmentKind kind, MovedPart moved, double? recommended, Numbers numbers)
    {
        TravelUnit unit = FitFacts.UnitOf(kind);
        string part = German.PartShort(kind), travel = German.Travel(moved.Travel, unit, numbers);
        string step = numbers.Travel(moved.Step, unit);
        if (moved.Misfit > moved.Step)
            return $"Die Messwerte passen nicht zu einem einzigen Weg ({part}): Sie liegen bis zu {numbers.Length(moved.Misfit)} neben dem, was {travel} ergäbe, und ein Schritt ist {step}. Links ist negativ, rechts positiv. Messen Sie noch einmal.";
        return recommended is double wanted
            ? $"Nach den Messwerten ({part}) ging es {travel}; empfohlen war {German.Travel(wanted, unit, numbers)}, und ein Schritt ist {step}. Messen Sie noch einmal und sehen Sie nach, ob zur richtigen Seite verstellt wurde."
            : $"Nach den Messwerten ({part}) ging es {travel}, und das letzte Ergebnis empfiehlt das nicht. Messen Sie noch einmal und sehen Sie nach, ob es das richtige Teil ist.";
    }

    public override string NoHangChange => "Keine Hängeprobe vorher und nachher: Machen Sie nach einer Änderung vor jedem Flug eine, zwei Waagen unter den Karabinern der Tragegurte (--reading hang_check.left_kg=KG --reading hang_check.right_kg=KG).";

    public override string AfterAdjustment => "Vor dem nächsten Flug:";

    public override string BookAt(string path) => $"trimfit: Auftragsbuch {path}";

    public override string Exported(long job, string file, long bytes, Numbers numbers) =>
        $"Auftrag {Text(job)} ist in {file} ({Size(bytes, numbers)}). Die Datei enthält Namen und Flüge des Kunden: Geben Sie sie nur weiter, an wen sie gehen dürfen.";

    public override string Imported(long job, long numberThere) => $"Eingelesen als Auftrag {Text(job)} (dort, woher er kommt, war er Auftrag {Text(numberThere)}).";

    public override string Deleted(long job, int flights, int files, bool roomGivenBack) =>
        $"Auftrag {Text(job)} ist gelöscht, mit {Count(flights, "Flug", "Flügen")} und {Count(files, "Datei", "Dateien")}, die kein anderer Auftrag verwendet."
        + (roomGivenBack ? "" : " Ein anderes Programm benutzt das Buch oder der Datenträger ist voll, deshalb können bis zum nächsten Löschen Spuren auf dem Datenträger bleiben.");

    public override string AskDelete(JobRecord job) =>
        $"Das löscht Auftrag {Text(job.Number)} ({job.Machine}, {Count(job.Flights.Length, "Flug", "Flüge")}) endgültig. Sagen Sie es mit --yes; „trimfit job export“ bewahrt eine Kopie auf.";

    public override string Size(long bytes, Numbers numbers) => bytes switch
    {
        < 1_000_000 => numbers.Plain(bytes / 1e3, 0) + " kB",
        < 1_000_000_000 => numbers.Plain(bytes / 1e6, 1) + " MB",
        _ => numbers.Plain(bytes / 1e9, 2) + " GB",
    };

    /// <summary>Load that the sentence about the memory speaks of; a result uses its own machine's.</summary>
    private const double _usualKg = ShopMemoryFacts.UsualKg;

    private string Found1(ResultRecord result, Numbers numbers)
    {
        string about = result.Kind == ResultRecord.CompareKind ? "Vergleich bis Flug " : "Ergebnis von Flug ";
        string turn = result.RateRadPerSec is double r ? $", dreht mit {numbers.Rate(Math.Abs(r))} nach {Side(r)}" : "";
        return $"{about}{Text(result.Flight)}: {VerdictWord(result.Verdict)}{turn}";
    }

    private static string Moved(AdjustmentRecord a, Numbers numbers) =>
        $"{German.PartShort(a.Kind)} {German.Travel(a.Travel, FitFacts.UnitOf(a.Kind), numbers)} nach den Messwerten"
        + (a.Recommended is double d ? $", empfohlen {German.Travel(d, FitFacts.UnitOf(a.Kind), numbers)}" : "");

    private static string Tail(string note) => note.Length > 0 ? "; " + note : "";

    private static string Count(int count, string one, string many) => $"{Text(count)} {(count == 1 ? one : many)}";

    private static string Text(long number) => number.ToString(CultureInfo.InvariantCulture);
}
