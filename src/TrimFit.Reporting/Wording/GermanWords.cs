using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

// CS8524 (an unnamed enum value) cannot happen here; without it CS8509 still makes a missing member an error, which `_ =>` would hide.
#pragma warning disable CS8524

namespace TrimFit.Reporting.Wording;

/// <summary>The German texts. Its terms stand in DEVELOPERS.md, "German".</summary>
internal sealed record GermanWords : Words
{
    private static readonly Labels _labels = new()
    {
        ReportTitle = "Bericht zur Geradeausflug-Einstellung",
        RigTitle = "Statik des Geräts",
        InspectTitle = "Was gelesen wurde",
        To = " bis ",
        Yes = "ja",
        No = "nein",
        None = "keine",
        NotKnown = "nicht bekannt",
        Left = "links",
        Right = "rechts",
        WhatToDo = "Was zu tun ist",
        WhatIsMissing = "Was fehlt",
        PullOverPower = "Seitenzug über der Leistung",
        Power = "Leistung",
        Thrust = "Schub",
        ThrustFraction = "% des vollen",
        TurnRate = "Drehrate °/s",
        Range95 = "95-%-Bereich",
        HeldBrake = "Bremse, die ihn hält",
        WaysToMakeIt = "Wege zum Ausgleich (einen wählen)",
        PartToMove = "zu verstellendes Teil",
        Travel = "Weg",
        Settable = "gerundet",
        FirstStep = "erster Schritt",
        HangCheckLeft = "Hängeprobe links",
        HangCheckRight = "Hängeprobe rechts",
        WhatElseChanges = "Was jeder Weg sonst noch ändert, bei vollem Schub nach dem ganzen Weg",
        ThrustLine = "Schublinie",
        TwistRatio = "Verdrehungsgrad",
        TwistUpTo = "bis zu (95 %)",
        TwistToward = "verdreht",
        RiserLoadLeft = "Last Tragegurt links",
        RiserLoadRight = "Last Tragegurt rechts",
        Limit = "Grenze",
        LimitInside = "eingehalten",
        LimitBeyond = "ÜBERSCHRITTEN",
        LimitNotGiven = "Herstellergrenze nicht angegeben",
        TurnLeftAfter = "Verbleibende Drehrate nach dem gerundeten Weg, °/s",
        TurnLeftNote = "Ein fester Versatz kann nicht jede Leistung ausgleichen.",
        FirstStepNote = "Hängeprobe: zwei Hängewaagen; angegeben sind die Anzeigen, die nach dem ersten Schritt zu erwarten sind. Schublinie: ihr Abstand von der Mitte zwischen den Karabinern der Tragegurte.",
        Model = "Drehmodell",
        Coefficient = "Koeffizient",
        Value = "Wert",
        StandardError = "Standardfehler",
        Unit = "Einheit",
        Lag = "Verzögerung der Drehung",
        SlowDisturbance = "Langsame Störung (Luft, kleine Bewegungen des Piloten)",
        EffectiveSamples = "Unabhängige Beobachtungen",
        Condition = "Konditionszahl",
        Method = "Verfahren",
        Sensitivity = "Empfindlichkeit: Drehrate je Verschiebung des Schwerpunkts",
        Source = "Quelle",
        Used = "verwendet",
        Together = "zusammen",
        YawRatio = "Drehung je Giermoment geteilt durch Drehung je Rollmoment",
        PriorPredictive = "Passung von Drehmoment und Steigung (p aus dem Vorwissen)",
        EffectiveDraws = "Wirksame Ziehungen",
        TwistNow = "Tragegurtverdrehung und Lasten, wie das Gerät jetzt ist",
        HangBack = "Rückneigung °",
        YawMoment = "Giermoment",
        RollMoment = "Rollmoment",
        Twist = "Verdrehung °",
        Data = "Was gelesen wurde",
        File = "Datei",
        Format = "Format",
        RowsRead = "Zeilen",
        RowsLeftOut = "ausgelassen",
        ClockShift = "Uhr verschoben um s",
        Columns = "Spalten",
        Column = "Spalte",
        Role = "Rolle",
        Basis = "entschieden durch",
        Missing = "leere Zellen",
        NotUsed = "nicht verwendet",
        SpansLeftOut = "Ausgelassene Abschnitte",
        From = "von s",
        Until = "bis s",
        Reason = "Grund",
        Assumptions = "Annahmen",
        AssumptionsNote = "Niemand hat diese Werte an diesem Gerät gemessen. Gemessene Werte in der Gerätedatei machen die Antwort enger.",
        Assumption = "angenommen",
        Warnings = "Warnungen",
        Cautions = "Sicherheitshinweise",
        Masses = "Massen und Orte",
        Quantity = "Größe",
        SuspendedMass = "angehängte Masse",
        PilotMass = "Pilot mit allem, was am Gurtzeug hängt",
        PowerUnitMass = "Antriebseinheit mit Kraftstoff",
        CgOffset = "Schwerpunkt, Abstand von der Mitte zwischen den Karabinern der Tragegurte",
        ThrustLineOffset = "Schublinie, Abstand von der Mitte zwischen den Karabinern der Tragegurte",
        CarabinerSpacing = "Abstand zwischen den Karabinern der Tragegurte",
        FullThrust = "voller Schub",
        FullTorque = "Drehmoment des Propellers bei vollem Schub",
        FigureOfMerit = "Gütegrad des Propellers",
        TwistStiffness = "Verdrehsteifigkeit der Tragegurte, N m/rad",
        HangCheckNow = "jetzt zu erwartende Hängeprobe",
        Adjustments = "Was jede Verstellung bewirkt",
        Efficiency = "Verschiebung des Schwerpunkts je Weg",
        ThrustLinePerTravel = "Schublinie je Weg",
        Drawing = "Das Gerät von oben",
        DrawingNote = "Seitlich maßstäblich; Orte in Längsrichtung sind nur skizziert.",
        CloseUp = "Die Mitte, vergrößert",
        CentreLine = "Mittellinie",
        LoggersZone = "Zeitzone nicht in der Aufzeichnung",
        Carabiner = "Karabiner der Tragegurte",
        CarabinerMiddle = "Mitte zwischen den Karabinern der Tragegurte",
        FrontHangPoints = "vordere Aufhängepunkte des Gurtzeugs",
        RearHangPoints = "hintere Aufhängepunkte des Gurtzeugs",
        Cg = "Schwerpunkt",
        FlightDirection = "Flugrichtung",
        Now = "jetzt",
        NowFilled = "jetzt (gefüllt)",
        After = "danach",
        AfterOutlined = "danach (umrandet)",
        TurnPlot = "Drehrate über dem Schub",
        FlightPlot = "Der Flug über der Zeit",
        AxisThrust = "Schub",
        AxisThrustRelative = "Schub, Anteil des vollen",
        AxisTurnRate = "Drehrate [°/s], rechts +",
        AxisTurnRateShort = "Drehrate [°/s]",
        AxisTime = "Zeit [min]",
        AxisBrake = "Bremsen",
        HandsOff = "freihändig",
        HandsOn = "mit Bremse, deren Anteil abgezogen",
        FittedLine = "angepasste Linie",
        Band = "95-%-Band",
        BalancePoint = "wo ausgeglichen werden soll",
        WindowsUsed = "verwendet",
        WindowsLeftOut = "ausgelassen",
        ProgramVersion = "TrimFit-Version",
    };

    public override GroundWords Ground { get; } = new GermanGroundWords();

    public override Comparing.CompareWords Comparing { get; } = new Comparing.GermanCompareWords();

    public override CardWords Card { get; } = new GermanCardWords();

    /// <summary>The local page speaks English until its German class is written; nothing on it asks for German.</summary>
    public override Web.WebWords Web { get; } = new Web.EnglishWebWords();

    public override JobWords Jobs { get; } = new GermanJobWords();

    public override ReportWords Report { get; } = new GermanReportWords();

    public override CustomerWords Customer { get; } = new GermanCustomerWords();

    public override Batch.BatchWords Batch { get; } = new Batch.GermanBatchWords();

    public override string Language => "de";

    public override Labels Labels => _labels;

    public override string Side(double rightPositive) => GermanSides.Side(rightPositive);

    public override string Lateral(double m, Numbers numbers) => IsZero(m, numbers)
        ? numbers.Length(0)
        : $"{numbers.Length(Math.Abs(m))} {Side(m)}";

    public override string Travel(double value, TravelUnit unit, Numbers numbers) =>
        IsZero(value, unit, numbers) ? numbers.Travel(0, unit) : $"{numbers.Travel(value, unit)} {Side(value)}";

    public override string Setting(PowerSetting setting) => setting switch
    {
        PowerSetting.Off => "Motor aus",
        PowerSetting.Idle => "Leerlauf",
        PowerSetting.Cruise => "Horizontalflug",
        PowerSetting.Full => "Vollgas",
    };

    public override string AtPower(BalanceThrust thrust, Numbers numbers) => thrust.Kind switch
    {
        BalanceThrustKind.Cruise => "im Horizontalflug",
        BalanceThrustKind.Full => "bei Vollgas",
        BalanceThrustKind.Even => "über den geflogenen Leistungsbereich",
        BalanceThrustKind.Newtons => $"bei {numbers.Force(thrust.Newtons)} Schub",
    };

    public override string PartShort(AdjustmentKind kind) => kind switch
    {
        AdjustmentKind.CarabinerPair => "beide Karabiner der Tragegurte",
        AdjustmentKind.CarabinerOneSide => "ein Karabiner der Tragegurte",
        AdjustmentKind.BarSpacer => "Aufhängearme + vordere Aufhängepunkte des Gurtzeugs",
        AdjustmentKind.HarnessFront => "vordere Aufhängepunkte des Gurtzeugs",
        AdjustmentKind.HarnessFrontRear => "vordere und hintere Aufhängepunkte des Gurtzeugs",
        AdjustmentKind.PowerUnit => "Antriebseinheit",
        AdjustmentKind.EngineCant => "Motor im Grundriss gedreht",
        AdjustmentKind.Ballast => "Ballast",
        AdjustmentKind.Trimmer => "Trimmer",
        AdjustmentKind.BrakeLine => "zu kürzende Bremsleine",
    };

    public override string Answer(FitAnswer answer, Numbers numbers)
    {
        string power = Capital(AtPower(answer.Power, numbers));
        string reason = answer.Reason is Finding f ? Finding(f, numbers) : "Die Gründe stehen unten.";
        string range = answer.Interval95 is ConfidenceInterval i ? numbers.RateRange(i, " bis ") : "";
        return answer.Kind switch
        {
            AnswerKind.CannotTell => $"Aus diesem Flug lässt sich nicht sagen, wie stark das Gerät dreht. {reason}",
            AnswerKind.Contradiction => $"{power} {Turns(answer.RateRadPerSec, numbers)}. Das widerspricht der Gerätedatei, deshalb darf noch nichts verstellt werden. {reason}",
            AnswerKind.Balanced => $"{power} {Turns(answer.RateRadPerSec, numbers)} ({range}; rechts ist positiv): Das ist ausgeglichen, innerhalb von "
                + $"{numbers.Rate(answer.ToleranceRadPerSec)}. Es muss nichts verstellt werden.",
            AnswerKind.Travel => $"{power} {Turns(answer.RateRadPerSec, numbers)}; ausgleichen würde das: {TravelOf(answer.Adjustment!, numbers)}.",
            AnswerKind.Direction => $"{power} {Turns(answer.RateRadPerSec, numbers)} ({range}; rechts ist positiv), aber wie weit ein Teil zu verstellen ist, lässt sich nicht sagen. {reason}",
            AnswerKind.SideUnknown => $"{power} {Turns(answer.RateRadPerSec, numbers)}, aber alles von {range} (rechts ist positiv) passt zu diesem Flug, also ist nicht einmal die Seite sicher. {reason}",
        };
    }

    public override string Verdict(VerdictCode code) => code switch
    {
        VerdictCode.Insufficient => "Die Daten können nicht die ganze Frage beantworten.",
        VerdictCode.Balanced => "Kein Seitenzug, für den es lohnt, etwas zu verstellen.",
        VerdictCode.OverCompensated => "Das Gerät ist zu weit gegen das Drehmoment des Motors versetzt: Der Seitenzug unter Leistung geht zur anderen Seite als der des Motors selbst.",
        VerdictCode.Both => "Ein Teil des Seitenzugs ist bei jeder Leistung da, ein Teil wächst mit der Leistung, beide zur selben Seite.",
        VerdictCode.PowerPull => "Der Seitenzug wächst mit der Leistung.",
        VerdictCode.ConstantPull => "Ein gleichbleibender Seitenzug, den der Motor nicht erklärt: zuerst Schirm, Leinen, Trimmer und Gurtzeug prüfen.",
    };

    public override string StrengthWord(VerdictStrength strength) => strength switch
    {
        VerdictStrength.None => "keine",
        VerdictStrength.Weak => "schwach",
        VerdictStrength.Fair => "mittel",
        VerdictStrength.Firm => "fest",
    };

    public override string Strength(VerdictStrength strength) => strength switch
    {
        VerdictStrength.None => "Belastbarkeit dieser Antwort: keine. Höchstens eine Richtung, niemals Millimeter.",
        VerdictStrength.Weak => "Belastbarkeit dieser Antwort: schwach. Ein einziger Flug; die Richtung ist sicher, die Größe nicht: Ein zweiter Flug nach dem ersten Schritt wird sie zeigen.",
        VerdictStrength.Fair => "Belastbarkeit dieser Antwort: mittel. Die Größe ist auf die Hälfte ihres Werts genau bekannt; gehen Sie in Schritten vor.",
        VerdictStrength.Firm => "Belastbarkeit dieser Antwort: fest. Richtung und Größe sind auf einen Schritt genau bekannt.",
    };

    public override string FirstStep(AdjustmentReport adjustment, Rig rig, Numbers numbers)
    {
        double d = adjustment.FirstStep;
        if (IsZero(d, adjustment.Unit, numbers))
            return "Der erste Schritt ist kleiner, als sich einstellen lässt; lassen Sie das Gerät, wie es ist.";
        string Goes(string what, double fromM) => $"{what} von {Lateral(fromM, numbers)} auf {Lateral(fromM + d, numbers)}";
        string left = Goes("der linke", rig.Carabiners.LeftM.Value), right = Goes("der rechte", rig.Carabiners.RightM.Value);
        string front = Goes("die Mitte des vorderen Paars", rig.HangPoints.FrontOffsetM.Value);
        string rear = Goes("die Mitte des hinteren Paars", rig.HangPoints.RearOffsetM.Value);
        string readings = adjustment.Kind switch
        {
            AdjustmentKind.CarabinerPair => $"{left}, {right}",
            AdjustmentKind.CarabinerOneSide => d < 0 ? left : right,
            AdjustmentKind.BarSpacer => $"von den Karabinern der Tragegurte {left}, {right}; von den Aufhängepunkten des Gurtzeugs {front}",
            AdjustmentKind.HarnessFront => front,
            AdjustmentKind.HarnessFrontRear => $"{front}, {rear}",
            AdjustmentKind.PowerUnit => Goes("ihre Mitte", rig.Mass.PowerUnitLateralM.Value),
            AdjustmentKind.EngineCant => $"von {Travel(rig.Propeller.CantRad.Value, TravelUnit.Radian, numbers)} auf {Travel(rig.Propeller.CantRad.Value + d, TravelUnit.Radian, numbers)}",
            AdjustmentKind.Ballast or AdjustmentKind.Trimmer or AdjustmentKind.BrakeLine => "",
        };
        string seen = readings.Length == 0 ? "" : $". Gemessen von der Mittellinie des Gestells, aus Sicht des sitzenden Piloten: {readings}";
        string check = adjustment.Kind is AdjustmentKind.Trimmer or AdjustmentKind.BrakeLine
            ? "Die Hängeprobe muss danach dasselbe zeigen wie vorher: "
            : "Die Hängeprobe muss danach zeigen: ";
        return $"Erster Schritt: {Phrase(adjustment.Kind, d, numbers.Travel(d, adjustment.Unit), "")}{seen}. "
            + $"{check}{numbers.Mass(adjustment.HangCheckLeftKg)} auf der linken Waage und {numbers.Mass(adjustment.HangCheckRightKg)} auf der rechten{HangCheckRange(adjustment, numbers)}. "
            + "Dann erneut fliegen und erneut auswerten.";
    }

    /// <summary>How far the readings may be off, and the difference against a hang check before, which is known far better.</summary>
    private static string HangCheckRange(AdjustmentReport a, Numbers numbers)
    {
        if (a.HangCheckPlusMinusKg is not double half || a.HangCheckDifferenceKg is not double more)
            return "";
        string within = $", jede auf {numbers.Mass(half)} genau";
        return numbers.MassNumber(more) == numbers.MassNumber(0) ? within
            : $"{within}; gegenüber einer Hängeprobe vor dem Schritt muss die {GermanSides.Plain(more)} Waage {numbers.Mass(Math.Abs(more))} gegen die {GermanSides.Plain(-more)} gewinnen";
    }

    public override string Finding(Finding finding, Numbers numbers, TravelUnit unit = TravelUnit.Meter)
    {
        ImmutableArray<double> values = finding.Values.IsDefault ? [] : finding.Values;
        string Value(int i, Func<double, string> show) => i < values.Length && double.IsFinite(values[i]) ? show(values[i]) : "(unbekannt)";
        double Sign(int i) => i < values.Length ? values[i] : 0;
        string Source(int i) => Sign(i) switch { 0 => "das Vorwissen", 1 => "das Drehmoment", 2 => "der Ballastabschnitt", 3 => "das Flugpaar", _ => "die Gerätedatei" };
        string ByWhat(int i) => Sign(i) switch { 0 => "aus dem Vorwissen", 1 => "durch das Drehmoment", 2 => "im Ballastabschnitt", 3 => "zwischen den beiden Flügen", _ => "nach der Gerätedatei" };
        return finding.Code switch
        {
            FindingCode.NoThrust => "Die Aufzeichnung sagt nichts über den Schub: weder Gas noch Drehzahl, Leistung oder Strom. Zeichnen Sie eines davon auf oder nennen Sie die Spalte, zum Beispiel --column rpm=NAME.",
            FindingCode.ThrustRangeTooSmall => $"Ob der Seitenzug mit der Leistung wächst, lässt sich nicht sagen: Der Schub blieb zwischen {Value(0, numbers.PercentNumber)} und {Value(1, numbers.Percent)} des vollen. Fliegen Sie je 20 s im Leerlauf und mit Vollgas.",
            FindingCode.NoTurnRate => "Die Aufzeichnung enthält weder eine Drehrate noch GPS oder Kompass, aus denen sie zu gewinnen wäre. Nennen Sie die Spalte, zum Beispiel --column yaw_rate=NAME:deg/s.",
            FindingCode.TooLittleSteadyFlight => $"Nur {Value(0, numbers.Duration)} stetigen Flugs wurden gefunden, {Value(1, numbers.Duration)} werden gebraucht. Fliegen Sie längere Abschnitte mit einer Leistung, ohne zu kurven.",
            FindingCode.PullTooUncertain => $"Der Seitenzug ist auf {Value(0, numbers.Rate)} genau bekannt und muss auf {Value(1, numbers.Rate)} genau bekannt sein. Fliegen Sie mehr Abschnitte, in ruhigerer Luft.",
            FindingCode.BalanceThrustNotFlown => $"Die Leistung, bei der ausgeglichen werden soll, {Value(0, numbers.Percent)} der vollen, wurde nicht geflogen: Der Flug enthält {Value(1, numbers.PercentNumber)} bis {Value(2, numbers.Percent)}. Fliegen Sie dort einen Abschnitt.",
            FindingCode.RotationConflict => $"Der Seitenzug wächst mit der Leistung nach {Side(Sign(0))}, aber die Gerätedatei sagt in {Value(1, numbers.Percent)} aller möglichen Fälle die andere Seite voraus. Prüfen Sie zuerst die Drehrichtung des Propellers (hinter dem Gerät stehen, in Flugrichtung schauen), dann die Vorzeichen von Drehratensensor und Steuerung, dann die Schublinie.",
            FindingCode.SensitivityConflict => $"Der Seitenzug wächst mit der Leistung {Value(1, r => numbers.Significant(r, 2))}-mal so stark, wie das Drehmoment erklärt (p = {Value(0, p => numbers.Plain(p, 3))}): Sehen Sie nach der Schublinie, bevor Sie etwas verstellen, dann nach Leistung, Propellerdrehzahl und Massen in der Gerätedatei.",
            FindingCode.SourcesConflict => $"Zwei Quellen der Empfindlichkeit widersprechen sich: {Capital(Source(1))} ergibt das {Value(2, r => numbers.Significant(r, 2))}-Fache dessen, was {Source(0)} ergibt (p = {Value(3, p => numbers.Plain(p, 3))}). Prüfen Sie Seite und Größe dessen, was verschoben wurde, bevor Sie etwas verstellen.",
            FindingCode.ShopMemoryConflict => $"Dieser Schirm verhält sich anders als die übrigen der Werkstatt: {Capital(Source(0))} ergibt das {Value(1, r => numbers.Significant(r, 2))}-Fache dessen, was diese ergäben (p = {Value(2, p => numbers.Plain(p, 3))}). Ihr Gedächtnis wurde hier nicht verwendet.",
            FindingCode.RatioUnbounded => $"Die Drehung {ByWhat(0)} lässt sich nicht von keiner Drehung unterscheiden, also grenzt sie für sich allein die Verschiebung nicht ein. Verschieben Sie mehr oder fliegen Sie längere Abschnitte.",
            FindingCode.TwistByCarabiners => $"Bei Vollgas bringt das Verstellen der Karabiner der Tragegurte den Verdrehungsgrad auf {Value(0, q => numbers.Plain(q, 2))}, das Verstellen der Aufhängepunkte des Gurtzeugs auf {Value(1, q => numbers.Plain(q, 2))}: Die Schublinie verläuft nahe der Höhe der Karabiner der Tragegurte, also verdreht, wie weit der Schub neben deren Mitte angreift. Das Verstellen der Karabiner der Tragegurte entfernt sie von der Schublinie; das Verstellen der Aufhängepunkte des Gurtzeugs lässt beide, wo sie sind.",
            FindingCode.TwistByHarness => $"Bei Vollgas bringt das Verstellen der Aufhängepunkte des Gurtzeugs den Verdrehungsgrad auf {Value(1, q => numbers.Plain(q, 2))}, das Verstellen der Karabiner der Tragegurte auf {Value(0, q => numbers.Plain(q, 2))}: Die Schublinie verläuft nahe der Höhe des Schwerpunkts, also verdreht, wie weit der Schub neben dem Schwerpunkt angreift. Das Verstellen der Aufhängepunkte des Gurtzeugs entfernt den Schwerpunkt von der Schublinie; das Verstellen der Karabiner der Tragegurte lässt beide beisammen.",
            FindingCode.NextCheck => "Die einfachste Prüfung, die diese Antwort umstoßen könnte: " + (NextCheck)Sign(0) switch
            {
                NextCheck.Rotation => "hinter dem Gerät stehend in Flugrichtung schauen und sehen, wie herum der Propeller dreht.",
                NextCheck.BrakeColumns => "sehen, welche Bremsspalte der Aufzeichnung sich ändert, wenn die rechte Bremse gezogen wird.",
                NextCheck.HandsOffLegs => "erneut fliegen, mit einem Flugprotokoll, das die freihändigen Abschnitte nennt, oder die Bremsen aufzeichnen.",
                NextCheck.HangCheck => "die Hängeprobe, zwei Waagen unter den Karabinern der Tragegurte, die zeigt, wo das Gewicht sitzt.",
                NextCheck.ThrustLine => "messen, wie weit neben der Mitte zwischen den Karabinern der Tragegurte die Schublinie verläuft.",
                NextCheck.Depths => "messen, wie tief Schublinie und Schwerpunkt unter den Karabinern der Tragegurte liegen.",
                NextCheck.HangBack => "die Rückneigung der Schubachse im Hängetest messen.",
                NextCheck.Torque => "die Motorleistung und die Propellerdrehzahl bei Vollgas herausfinden.",
                NextCheck.MoreLegs => "mehr Abschnitte fliegen, abwechselnd im Leerlauf, im Horizontalflug und mit Vollgas.",
                NextCheck.KnownShift => "den ersten Schritt fliegen und erneut auswerten, oder zu jeder Seite einen Ballastabschnitt fliegen.",
            },
            FindingCode.NoSteeringNoHandsOff => "In der Aufzeichnung stehen weder die Bremsen noch freihändige Abschnitte: Gewollte Kurven sehen aus wie ein Seitenzug, und ein gehaltener Kurs verdeckt ihn. Zeichnen Sie die Bremsen auf oder nennen Sie die freihändigen Abschnitte in einem Flugprotokoll.",
            FindingCode.BrakeSignReversed => "Der Zug an der rechten Bremse scheint nach links zu drehen: Die Bremsspalten könnten vertauscht sein, oder der Schirm reagiert umgekehrt. Die Bremsen wurden nicht verwendet; prüfen Sie, welche Spalte welche ist.",
            FindingCode.BrakesCollinear => $"Bremsen und Leistung änderten sich gemeinsam (Korrelation {Value(0, c => numbers.Plain(c, 2))}), deshalb lassen sich ihre Wirkungen nicht trennen. Fliegen Sie Bremsstufen bei gleichbleibender Leistung.",
            FindingCode.GyroBiasUnknown => "Der Nullpunkt des Drehratensensors lässt sich nicht von einem gleichbleibenden Seitenzug trennen. Zeichnen Sie GPS-Positionen auf oder lassen Sie den Logger vor dem Start 30 s ruhen.",
            FindingCode.GyroSignReversed => $"Der Drehratensensor dreht anders herum als die GPS-Spur (Steigung {Value(0, s => numbers.Significant(s, 3))}); er wurde umgekehrt. Prüfen Sie, wie der Logger befestigt ist, und das Vorzeichen seiner Drehrate.",
            FindingCode.WindUnknown => $"Der Wind ließ sich nicht bestimmen: Der Flug deckt {Value(0, a => numbers.Plain(double.RadiansToDegrees(a), 0))}° der Richtungen ab. Fliegen Sie einen vollen Kreis.",
            FindingCode.CruiseAssumed => $"Die Aufzeichnung zeigt nicht, bei welcher Leistung das Gerät horizontal fliegt; {Value(0, numbers.Percent)} des vollen Schubs werden angenommen.",
            FindingCode.ThrustRelative => "Der volle Schub ist nicht bekannt, deshalb ist der Schub nur als Anteil des vollen angegeben. Tragen Sie static_thrust_n in die Gerätedatei ein.",
            FindingCode.FigureOfMeritImplausible => $"Schub, Leistung und Durchmesser geben dem Propeller einen Gütegrad von {Value(0, m => numbers.Plain(m, 2))}; möglich sind {numbers.Plain(0.35, 2)} bis {numbers.Plain(0.8, 1)}. Prüfen Sie, ob full_power_rpm die Drehzahl des Motors oder des Propellers ist.",
            FindingCode.TipSpeedImplausible => $"Die Propellerspitzen liefen mit {Value(0, v => numbers.Plain(v, 0))} m/s; mehr als 260 m/s ist nicht möglich. Prüfen Sie, ob full_power_rpm die Drehzahl des Motors oder des Propellers ist.",
            FindingCode.TorqueNotUsed => Sign(0) switch
            {
                1 => "Das Drehmoment kann die Empfindlichkeit nicht bestimmen: Seine Wirkung oder die Steigung könnte beide Vorzeichen haben.",
                2 => "Das Drehmoment kann die Empfindlichkeit nicht bestimmen: Sie käme zu oft negativ heraus.",
                _ => "Das Drehmoment kann die Empfindlichkeit nicht bestimmen: Die Streuung ist zu groß.",
            },
            FindingCode.StrongPull => $"Der Seitenzug ist stark: {Value(0, r => numbers.Rate(Math.Abs(r)))} nach {Side(Sign(0))}. Verstellen Sie am Boden, bevor Sie einen weiteren Test fliegen.",
            FindingCode.ConstantPartFirst => $"Schon der Seitenzug ohne Leistung verlangt {Value(0, m => numbers.Length(Math.Abs(m)))} Verschiebung. Prüfen Sie Trimmer, Leinen, Bremsleinen und Gurte, bevor Sie Aufhängepunkte des Gurtzeugs verstellen.",
            FindingCode.LimitNotGiven => "Herstellergrenze nicht angegeben.",
            FindingCode.BeyondLimit => $"Der Weg überschreitet die Grenze von {Value(0, m => Travel(m, unit, numbers))} in der Gerätedatei.",
            FindingCode.TwistCaution => $"Tragegurtverdrehung: Der Verdrehungsgrad kann {Value(0, q => numbers.Plain(q, 2))} erreichen. Gehen Sie beim ersten Mal stufenweise auf Vollgas.",
            FindingCode.TwistWarning => $"Ein plötzlicher Gaswechsel kann die Tragegurte verdrehen: Der Verdrehungsgrad kann {Value(0, q => numbers.Plain(q, 2))} erreichen.",
            FindingCode.TwistRefused => $"Abgelehnt: Der Verdrehungsgrad kann {Value(0, q => numbers.Plain(q, 2))} erreichen; über 1 hält nichts mehr das Gestell gegen die Tragegurtverdrehung.",
            FindingCode.SpacingChanges => $"Der Abstand zwischen den Karabinern der Tragegurte wird {Value(0, numbers.Length)}.",
            FindingCode.EffectSignUnknown => $"Nicht angeboten, weil die Wirkung in beide Richtungen gehen kann: {PartShort((AdjustmentKind)Sign(0))}.",
            FindingCode.ContraRotating => "Die Drehmomente der Propeller heben sich auf, deshalb kann das Drehmoment einen mit der Leistung wachsenden Seitenzug nicht erklären.",
            FindingCode.FewThrustLevels => "Der Flug enthält wenige verschiedene Leistungen, deshalb würde eine Krümmung des Seitenzugs über der Leistung nicht auffallen.",
            FindingCode.ConstantPullSource => "Ein gleichbleibender Seitenzug kann von Schirm, Leinen, Gurtzeug, Sitzhaltung oder einer leicht gezogen ruhenden Bremse kommen; ein einziger Flug zeigt nicht, wovon.",
            FindingCode.WrongSideLikely => $"Schon der erste Schritt kann zu weit gehen, mit einer Wahrscheinlichkeit von {Value(0, numbers.Percent)}. Machen Sie ihn kleiner.",
            FindingCode.FullPowerSpeedAssumed => $"Die Propellerdrehzahl bei Vollgas steht nicht in der Gerätedatei; die größte der Aufzeichnung vertritt sie: {Value(0, n => numbers.Plain(n * 60, 0))} U/min. Tragen Sie full_power_rpm ein.",
            FindingCode.ThrottleTakenAsThrust => "In der Gerätedatei steht keine Gastabelle, deshalb gilt der Schub als proportional zum Gas. Tragen Sie throttle_thrust_percent ein oder zeichnen Sie die Drehzahl auf.",
            FindingCode.GyroUnitCorrected => $"Die Einheit des Drehratensensors passte nicht zu den GPS-Kurven und wurde um den Faktor {Value(0, g => numbers.Significant(g, 3))} berichtigt. Nennen Sie die Einheit: --column yaw_rate=NAME:deg/s.",
            FindingCode.GyroScaleOff => $"Der Drehratensensor zeigt das {Value(0, s => numbers.Significant(s, 3))}-Fache der Drehung der GPS-Spur; das ist keine Einheit einer Drehrate. "
                + (Sign(1) > 0 ? "Er wurde nach dem GPS geeicht." : "Der Drehratensensor wurde beiseitegelassen und die Drehung dem GPS entnommen.") + " Prüfen Sie die Einheit seiner Drehrate.",
            FindingCode.TurnSearchNotSettled => $"Die Suche nach den Zeitkonstanten von Schirm und Luft kam in {Value(0, n => numbers.Plain(n, 0))} Schritten nicht zur Ruhe; halten Sie die Bereiche für zu eng.",
            FindingCode.TurnOutliers => $"Messungen der Drehung, die aus der Reihe fallen, zählen weniger: {Value(0, n => numbers.Plain(n, 0))} von {Value(1, n => numbers.Plain(n, 0))}.",
            FindingCode.YawSignUnconfirmed => "Weder GPS noch Kompass bestätigen, wie herum die Drehrate zählt: Dass rechts positiv ist, wird auf Treu und Glauben angenommen.",
            FindingCode.GyroScaleCorrected => $"Der Drehratensensor zeigt {Value(0, numbers.Percent)} (± {Value(1, e => numbers.PercentNumber(1.96 * e))}) der Drehung der GPS-Spur"
                + (Sign(2) > 0 ? $", wie einer, der {Value(2, numbers.Angle)} neben der Senkrechten befestigt ist" : "") + "; seine Werte wurden dadurch geteilt.",
            FindingCode.GyroDelayed => $"Der Drehratensensor ist {Value(0, d => numbers.Plain(d, 2))} s (± {Value(1, e => numbers.Plain(1.96 * e, 2))}) hinter dem GPS zurück; er wurde darum verschoben.",
            FindingCode.GpsDelayed => $"Das GPS ist {Value(0, d => numbers.Plain(d, 2))} s (± {Value(1, e => numbers.Plain(1.96 * e, 2))}) hinter dem Drehratensensor zurück; es wurde darum verschoben.",
            FindingCode.GyroLevelled => $"Die drei Achsen des Drehratensensors wurden nach der Schwerkraft ausgerichtet; seine z-Achse steht im Mittel {Value(0, numbers.Angle)} neben der Senkrechten.",
            FindingCode.GyroAxisFromGps => $"Die Aufzeichnung enthält keine Schwerkraft, nach der sich die drei Achsen des Drehratensensors ausrichten ließen; die Achse der Drehung wurde aus der GPS-Spur gefunden, auf {Value(0, e => numbers.Angle(1.96 * e))} genau.",
            FindingCode.GyroAxisAssumed => $"Weder Schwerkraft noch GPS oder Kompass zeigen, wie der Drehratensensor liegt; es wird angenommen, dass seine {(Sign(0) switch { 0 => "x", 1 => "y", _ => "z" })}-Achse nach {(Sign(1) < 0 ? "oben" : "unten")} zeigt. Tragen Sie gyro_orientation in die Gerätedatei ein oder zeichnen Sie die Beschleunigung auf.",
            FindingCode.GyroSlipped => $"Der Logger hat sich bei {Value(0, t => numbers.Plain(t, 0))} s um {Value(1, numbers.Angle)} bewegt; "
                + (Sign(2) > 0 ? "der Drehratensensor wurde von dort an neu ausgerichtet." : "nur das längste Stück ohne Bewegung wurde verwendet. Zeichnen Sie GPS-Positionen auf oder lassen Sie ihn vor dem Start 30 s ruhen."),
            FindingCode.GyroLoose => $"Der Logger war lose: {(Sign(0) == 1 ? "1 Bewegung" : Value(0, n => numbers.Plain(n, 0)) + " Bewegungen")} im Flug, und seine Lage schwankt um {Value(1, numbers.Angle)}. Sein Drehratensensor wurde beiseitegelassen; binden Sie den Logger am Gestell fest.",
            FindingCode.GyroBiasFromStandstill => $"Der Nullpunkt des Drehratensensors wurde im Stillstand über {Value(2, numbers.Duration)} abgelesen: {Value(0, b => numbers.Plain(double.RadiansToDegrees(b), 2))} °/s (± {Value(1, e => numbers.Plain(double.RadiansToDegrees(1.96 * e), 2))}).",
            FindingCode.BrakesAgainstTurn => $"In {Value(1, numbers.Percent)} von {Value(0, numbers.Duration)} deutlicher Kurven dreht der Schirm von der gezogenen Bremse weg: Die Bremsspalten könnten vertauscht sein, oder der Schirm reagiert umgekehrt. Prüfen Sie, welche Spalte welche ist.",
            FindingCode.GpsOutliers => $"GPS-Punkte, die springen, wie kein Schirm fliegen kann, wurden ausgelassen: {Value(0, n => numbers.Plain(n, 0))} von {Value(1, n => numbers.Plain(n, 0))}.",
            FindingCode.GpsFrozen => $"Das GPS wiederholte seinen letzten Punkt im Flug {(Sign(0) == 1 ? "einmal" : Value(0, n => numbers.Plain(n, 0)) + "-mal")}, insgesamt {Value(1, numbers.Duration)} lang; die Wiederholungen wurden ausgelassen.",
            FindingCode.ThrottleAgainstRpm => $"Gas und Drehzahl steigen nicht gemeinsam (Rangkorrelation {Value(0, r => numbers.Plain(r, 2))}); der Schub wurde der Drehzahl entnommen. Prüfen Sie die Gasspalte.",
            FindingCode.TimeJitter => $"Die Zeitstempel sind ungleichmäßig: {Value(1, numbers.Percent)} der Schritte des Drehratensensors weichen um mehr als die Hälfte der üblichen {Value(0, t => numbers.Plain(1000 * t, 0))} ms ab. Sie wurden verwendet wie aufgezeichnet.",
            FindingCode.ThrustFromPower => $"Der Schub wurde aus der Leistung hoch zwei Drittel gewonnen, mit voller Leistung bei {Value(0, w => numbers.Plain(w / 1000, 1))} kW, "
                + (Sign(1) > 0 ? "der größten der Aufzeichnung." : "die aus der Gerätedatei folgt, da die Aufzeichnung darunter bleibt."),
            FindingCode.CurrentTakenAsPower => $"Die Aufzeichnung enthält einen Strom ohne Spannung; er gilt als Leistung bei gleichbleibender Spannung, mit voller Leistung bei {Value(0, a => numbers.Plain(a, 0))} A. Zeichnen Sie auch die Spannung auf.",
            FindingCode.ThrustFromMotorCurrent => $"Der Schub gilt als proportional zum Motorstrom, mit voller Leistung bei {Value(0, a => numbers.Plain(a, 0))} A, dem größten der Aufzeichnung.",
            FindingCode.ClutchEngageAssumed => $"Die Drehzahl, bei der die Kupplung greift, steht nicht in der Gerätedatei; {Value(0, n => numbers.Plain(n * 60, 0))} U/min vertreten sie, ein Viertel über dem Leerlauf der Aufzeichnung. Tragen Sie clutch_engage_rpm ein.",
            FindingCode.ThrustFromClimb => $"Die Aufzeichnung sagt nichts über den Motor, deshalb wurde der Schub aus Steigen und Gleitsinken gewonnen, jeder Wert auf {Value(0, n => numbers.Force(1.96 * n))} genau. Zeichnen Sie Drehzahl oder Gas auf.",
            FindingCode.ThrustFromSheet => $"Die Aufzeichnung sagt nichts über den Motor, deshalb wurde der Schub aus den Leistungen des Flugprotokolls gewonnen: Horizontalflug bei {Value(0, numbers.Percent)} des vollen Schubs, {(Sign(1) > 0 ? "nach dem Steigen der Abschnitte" : "wie üblich, da das Steigen der Abschnitte nichts darüber sagt")}.",
            FindingCode.ThrustScaleByClimb => $"Nach seinem Steigen hat das Gerät das {Value(0, r => numbers.Plain(r, 2))}-Fache (± {Value(1, e => numbers.Plain(1.96 * e, 2))}) des Schubs der Gerätedatei"
                + (Sign(2) > 0 ? $"; {Value(2, r => numbers.Plain(r, 2))} bleibt nach der Impulstheorie von einem Standschub im Flug übrig" : "")
                + (Sign(3) > 0 ? ". Der Schub der Gerätedatei wurde verwendet." : ". Der Schub der Gerätedatei wurde verwendet, aber prüfen Sie ihn zusammen mit Massen und Geschwindigkeiten."),
            FindingCode.FullThrustByClimb => $"Die Gerätedatei nennt keinen Schub; nach seinem Steigen hat das Gerät im Flug bei Vollgas {Value(0, numbers.Force)} (± {Value(1, e => numbers.Force(1.96 * e))}). Messen Sie ihn mit einer Zugwaage und tragen Sie static_thrust_n ein.",
            FindingCode.FirstStepTooSmall => $"Der erste Schritt wäre kleiner als die {Value(0, m => numbers.Travel(m, unit))}, in denen sich dieses Teil verstellen lässt.",
        };
    }

    public override string Caution(CautionCode code, Numbers numbers) => code switch
    {
        CautionCode.Estimate => "TrimFit schätzt aus einer Aufzeichnung. Es genehmigt nichts. Es entscheiden Herstellerhandbuch, Zulassung, Versicherung, Ausbildungsvorschriften und örtliches Recht; eine sachkundige Person führt die Änderung aus oder prüft sie. Tandem und gewerblicher Einsatz: nur durch einen zugelassenen Fachbetrieb.",
        CautionCode.Limits => "Bleiben Sie innerhalb des Herstellerbereichs für Aufhängearme, Aufhängepunkte des Gurtzeugs und Karabiner der Tragegurte. Wo die Gerätedatei keine Grenze nennt, ist die Herstellergrenze hier nicht angegeben: Fragen Sie den Hersteller.",
        CautionCode.CausesFirst => "Prüfen Sie Bremsleinen, Trimmer, Gurte, Leinen und Befestigungen, bevor Sie die Geometrie ändern.",
        CautionCode.OneChange => $"Immer nur eine Änderung auf einmal. Im ersten Schritt nicht mehr als das Kleinere von halbem vorhergesagtem Weg und {numbers.Length(SafetyFigures.FirstStepMaxM)}, außer die Hängeprobe bestätigt mehr. Schrauben mit dem vorgeschriebenen Drehmoment nachziehen und mit Sicherungslack markieren; eine zweite Person prüft die Verschlüsse der Karabiner der Tragegurte und aller anderen Verbinder, den Sicherungsgurt und die Führung der Rettungsverbindung.",
        CautionCode.HangCheck => "Machen Sie nach einer Änderung vor jedem Flug die Hängeprobe: Sitzt das Gewicht dort, wo das Blatt es sagt?",
        CautionCode.CalmAir => "Erster Flug nach einer Änderung: in ruhiger Luft, über freiem Gelände, mit Höhenreserve.",
        CautionCode.Twist => "Eine verschobene Schublinie kann bei Vollgas die Tragegurte verdrehen. Gehen Sie beim ersten Mal stufenweise auf Vollgas, mit Höhenreserve; beginnt das Gestell zu gieren: zuerst Gas weg, dann steuern.",
        CautionCode.Spacing => "Ein anderer Abstand zwischen den Karabinern der Tragegurte ändert, wie sich der Schirm in Turbulenz verhält, und seine zugelassene Einstellung.",
        CautionCode.Ballast => "Ballast doppelt festbinden, frei von Propeller und Rettung.",
        CautionCode.HandsOff => "Freihändig heißt: Hände in den Bremsschlaufen, ohne Zug, bereit. Nicht mit Beschleuniger, nicht in unruhiger Luft, nicht unter der Mindesthöhe der Flugkarte, niemals beim Start. Reflexschirme: Die Vorschrift des Herstellers zu den Bremsen geht vor.",
        CautionCode.EngineOff => "Motor aus nur in Gleitweite eines Landeplatzes.",
        CautionCode.EyesOut => "Fliegen Sie die Flugkarte aus dem Gedächtnis oder nach Gehör, nicht vom Bildschirm. Schauen Sie hinaus.",
        CautionCode.StrongPull => $"Über {numbers.Plain(SafetyFigures.StrongPull.DegPerSec, 0)} °/s oder mit mehr als {numbers.Percent(SafetyFigures.StrongHeldBrake)} gehaltener Bremse: keine weitere Flugkarte fliegen; zuerst am Boden verstellen.",
        CautionCode.FrameRunning => "Niemals den Motor laufen lassen, während eine Person oder das Gerät in einem Prüfgestell hängt. Zündkerzenstecker ab, bevor Hände in die Nähe des Propellers kommen.",
        CautionCode.ThrustTest => "Schubmessung: Gestell an einem Pfosten gesichert, niemand in der Propellerebene oder davor, Helm, Augen und Ohren geschützt.",
        CautionCode.Sudden => "Ein plötzlich gewachsener Seitenzug ist ein Defekt, keine Frage der Einstellung: nicht fliegen. Suchen Sie nach einer gebrochenen Befestigung, einer gerissenen Leine oder einem gebrochenen Aufhängearm.",
    };

    public override string Assumption(string name) => name switch
    {
        "power_unit_lateral_mm" => "Schwerpunkt der Antriebseinheit von der Mittellinie",
        "fuel_lateral_mm" => "Kraftstoff von der Mittellinie",
        "posture_mm" => "Sitz des Piloten gegen die Aufhängepunkte des Gurtzeugs",
        "cg_depth_mm" => "Schwerpunkt unter den Karabinern der Tragegurte",
        "hang_back_deg" => "Rückneigung der Schubachse",
        "thrust_line_mm" => "Schublinie von der Mittellinie",
        "thrust_line_depth_mm" => "Schublinie unter den Karabinern der Tragegurte",
        "figure_of_merit" => "Gütegrad des Propellers",
        "front_share" => "Gewichtsanteil auf den vorderen Aufhängepunkten des Gurtzeugs",
        "front_offset_mm" => "vordere Aufhängepunkte des Gurtzeugs von der Mittellinie",
        "rear_offset_mm" => "hintere Aufhängepunkte des Gurtzeugs von der Mittellinie",
        "wing_mass_kg" => "Masse des Schirms",
        "line_length_m" => "Länge der Leinen",
        "cruise_thrust_percent" => "Schub im Horizontalflug",
        "yaw_stiffness_nm_per_rad" => "Verdrehsteifigkeit der Tragegurte",
        "torque_at_full_power_nm" => "Drehmoment bei Vollgas",
        "full_thrust_n" => "voller Schub",
        _ => name.Replace('_', ' '),
    };

    public override string Coefficient(string name) => name switch
    {
        TurnCoefficient.Constant => "gleichbleibender Seitenzug",
        TurnCoefficient.Thrust => "Zuwachs mit dem Schub",
        TurnCoefficient.ThrustSquared => "Krümmung über dem Schub",
        TurnCoefficient.BrakeDifference => "rechte minus linke Bremse",
        TurnCoefficient.TrimmerDifference => "rechter minus linker Trimmer",
        TurnCoefficient.CgShift => "bekannte Verschiebung des Schwerpunkts",
        _ => name.Replace('_', ' '),
    };

    public override string SensitivitySource(string kind) => kind switch
    {
        "prior" => "Vorwissen (keine Messung)",
        "torque" => "Propellerdrehmoment in diesem Flug",
        "pair" => "zwei geflogene Einstellungen",
        "ballast" => "Ballastabschnitt",
        "user" => "Gerätedatei",
        _ => kind.Replace('_', ' '),
    };

    public override string Method(string method) => method switch
    {
        "filter_error" => "Maximum-Likelihood mit Filterfehler",
        "steady_windows" => "Regression über stetige Fenster",
        _ => method.Replace('_', ' '),
    };

    public override string Propeller(PropellerRotation rotation) => rotation switch
    {
        PropellerRotation.Clockwise => "Propeller: im Uhrzeigersinn, von hinten gesehen",
        PropellerRotation.CounterClockwise => "Propeller: gegen den Uhrzeigersinn, von hinten gesehen",
        PropellerRotation.ContraRotating => "Propeller: gegenläufig",
    };

    public override string Twist(TwistDirection direction) => direction switch
    {
        TwistDirection.Left => "Nase links",
        TwistDirection.Right => "Nase rechts",
        TwistDirection.Unknown => "Seite unbekannt",
    };

    public override string SmallestDetectable(double radPerSec, Numbers numbers) =>
        $"Der kleinste Seitenzug, den dieser Flug hätte zeigen können: {numbers.Rate(radPerSec)} (in 80 % solcher Flüge).";

    public override string CruiseBasis(CruiseBasis basis) => basis switch
    {
        Core.Analysis.CruiseBasis.ZeroClimb => "Horizontalflug: der Schub, bei dem dieser Flug weder stieg noch sank.",
        Core.Analysis.CruiseBasis.Assumed => "Horizontalflug: 60 % des vollen Schubs, angenommen, da keine Höhe es zeigt.",
    };

    public override string Shift(ShiftReport shift, Numbers numbers) =>
        $"Das entspricht einer Verschiebung des Schwerpunkts unter dem Schirm um {SignedRange(shift.CgShiftM, shift.Interval95, numbers)}: "
        + $"{Lateral(shift.ConstantPartM, numbers)} für den gleichbleibenden Seitenzug, {Lateral(shift.PowerPartM, numbers)} für den Seitenzug der Leistung.";

    public override string CrossCheck(bool? agrees) => agrees switch
    {
        true => "Die Regression über stetige Fenster, die sich von Hand nachrechnen lässt, stimmt überein.",
        false => "Die Regression über stetige Fenster, die sich von Hand nachrechnen lässt, WIDERSPRICHT: Trauen Sie keinem der beiden, bevor Sie wissen, warum.",
        null => "Es gibt kein zweites Verfahren zum Vergleich.",
    };

    public override string RigAnswer(RigReport report, Rig rig, Numbers numbers)
    {
        string now = IsZero(report.CgOffsetM, numbers)
            ? "Der Schwerpunkt liegt in der Mitte zwischen den Karabinern der Tragegurte"
            : $"Der Schwerpunkt liegt {Lateral(report.CgOffsetM, numbers)} von der Mitte zwischen den Karabinern der Tragegurte";
        if (rig.Propeller.RotationSign == 0)
            return now + "; die Drehmomente der Propeller heben sich auf, gegen sie ist also kein Versatz nötig.";
        return report.TorqueBalancingOffsetM is double needed
            ? $"{now}; um das Drehmoment des Propellers im Horizontalflug auszugleichen, müsste er {Lateral(needed, numbers)} davon liegen."
            : now + "; wie viel das Drehmoment des Propellers braucht, lässt sich ohne Schub und Leistung nicht sagen.";
    }

    public override string InspectAnswer(ImportDiagnostics diagnostics, Numbers numbers)
    {
        int files = diagnostics.Files.Length, rows = diagnostics.Files.Sum(f => f.RowsRead), left = diagnostics.RowsLeftOut;
        string leftOut = left == 0 ? "keine Zeile ausgelassen" : left == 1 ? "1 Zeile ausgelassen" : $"{numbers.Integer(left)} Zeilen ausgelassen";
        string gaps = diagnostics.Sampling.Gaps.Length switch { 0 => "keine Lücken", 1 => "1 Lücke", int n => $"{numbers.Integer(n)} Lücken" };
        return $"{(files == 1 ? "1 Datei" : numbers.Integer(files) + " Dateien")}, {numbers.Integer(rows)} Zeilen ({leftOut}), "
            + $"{numbers.Duration(diagnostics.Sampling.DurationSec)} mit {numbers.Significant(diagnostics.Sampling.RateHz, 3)} Hz, {gaps}.";
    }

    public override string Wind(Wind? wind, Numbers numbers)
    {
        if (wind is null)
            return "Wind: nicht gefunden.";
        double speed = Math.Sqrt((wind.NorthMPerSec * wind.NorthMPerSec) + (wind.EastMPerSec * wind.EastMPerSec));
        double from = (double.RadiansToDegrees(Math.Atan2(-wind.EastMPerSec, -wind.NorthMPerSec)) + 360) % 360;
        return $"Wind: {numbers.Speed(speed)} aus {numbers.Plain(from, 0)}°, Fluggeschwindigkeit gegen die Luft {numbers.Speed(wind.AirspeedMPerSec)}, "
            + $"aus {numbers.Plain(double.RadiansToDegrees(wind.ArcRad), 0)}° geflogener Richtungen.";
    }

    public override string Gyro(GyroReport? gyro, Numbers numbers)
    {
        if (gyro is null)
            return "";
        string bias = gyro.BiasRadPerSec is Estimate b
            ? $"Nullpunkt bei {numbers.Plain(double.RadiansToDegrees(b.Value), 2)} °/s (± {numbers.Significant(double.RadiansToDegrees(1.96 * b.StandardError), 1)})"
            : "Nullpunkt nicht bekannt";
        string sign = gyro.Sign switch { null => "Vorzeichen nicht bestätigt", < 0 => "Vorzeichen UMGEKEHRT gegenüber dem GPS", _ => "Vorzeichen stimmt mit dem GPS überein" };
        string scale = gyro.Scale is double s ? $", Maßstab {numbers.Plain(s, 2)}" : "";
        string delay = gyro.DelaySec is double d ? $", Verzug {numbers.Plain(d, 2)} s" : "";
        return $"Drehratensensor: {bias}, {sign}{scale}{delay}.";
    }

    public override string Gap(TimeGap gap, Numbers numbers) =>
        $"Lücke von {numbers.Duration(gap.DurationSec)} nach {numbers.Plain(gap.StartSec, 1)} s.";

    public override string RowsLeftOut(string file, RowsLeftOut left, Numbers numbers) =>
        $"{file}: {(left.Rows == 1 ? "1 Zeile" : numbers.Integer(left.Rows) + " Zeilen")} ausgelassen, die erste in Zeile {numbers.Integer(left.FirstLine)}: {Said(left.Reason, numbers)}";

    public override string DrawingDescription(bool after) => after
        ? "Das Gerät von oben gesehen: Mittellinie des Gestells, Schublinie, Karabiner der Tragegurte, Aufhängepunkte des Gurtzeugs und Schwerpunkt, jetzt (gefüllt) und nach dem gerundeten Weg (umrandet)."
        : "Das Gerät von oben gesehen: Mittellinie des Gestells, Schublinie, Karabiner der Tragegurte, Aufhängepunkte des Gurtzeugs und Schwerpunkt.";

    public override string TurnPlotDescription(int points, bool fitted) =>
        FormattableString.Invariant($"Drehrate über dem Schub: {points} Fenster des Flugs, der Anteil der Bremsen abgezogen{(fitted ? ", die angepasste Linie und ihr 95-%-Band" : "; es ließ sich keine Linie anpassen")}.");

    public override string FlightPlotDescription(double durationSec, Numbers numbers) =>
        $"Schub, Bremsen und Drehrate über {numbers.Duration(durationSec)}; rechts ist positiv, ausgelassene Abschnitte sind schattiert, Balken sind die verwendeten Fenster.";

    public override string Said(string text, Numbers numbers) => GermanSayings.Translate(text, numbers);

    public override string UnitName(string unit) => string.Join(' ', unit.Split(' ').Select(part => part switch
    {
        "deg/s" => "°/s",
        "deg" => "°",
        "per" => "je",
        "full" => "vollem",
        "thrust" => "Schub",
        "thrust^2" => "Schub^2",
        "count" => "Zählwert",
        "in" => "Zoll",
        "rpm" => "U/min",
        "miles" => "Meilen",
        _ => part,
    }));

    private string Turns(double radPerSec, Numbers numbers) => numbers.RateNumber(radPerSec) == numbers.RateNumber(0)
        ? "fliegt das Gerät geradeaus"
        : $"dreht das Gerät mit {numbers.Rate(Math.Abs(radPerSec))} nach {Side(radPerSec)}";

    /// <summary>What moves, how far, which way, as an instruction in the infinitive: never a part by half its name, always the side by the part.</summary>
    private static string Phrase(AdjustmentKind kind, double travel, string amount, string range)
    {
        string toYourSide = GermanSides.ToYourSide(travel), theOne = GermanSides.Oblique(travel);
        return kind switch
        {
            AdjustmentKind.CarabinerPair => $"beide Karabiner der Tragegurte um {amount}{range} {toYourSide} verschieben",
            AdjustmentKind.CarabinerOneSide => $"nur den {theOne} Karabiner der Tragegurte um {amount}{range} {toYourSide} verschieben",
            AdjustmentKind.BarSpacer => $"beide Aufhängearme mit ihren vorderen Aufhängepunkten des Gurtzeugs um {amount}{range} {toYourSide} verschieben",
            AdjustmentKind.HarnessFront => $"die vorderen Aufhängepunkte des Gurtzeugs um {amount}{range} {toYourSide} verschieben",
            AdjustmentKind.HarnessFrontRear => $"die vorderen und die hinteren Aufhängepunkte des Gurtzeugs um {amount}{range} {toYourSide} verschieben",
            AdjustmentKind.PowerUnit => $"die Antriebseinheit um {amount}{range} {toYourSide} verschieben",
            AdjustmentKind.EngineCant => $"die Schubachse des Motors um {amount}{range} im Grundriss so drehen, dass sie mehr {toYourSide} drückt",
            AdjustmentKind.Ballast => $"{amount}{range} Ballast {GermanSides.Side(travel)} am {theOne} Karabiner der Tragegurte anhängen",
            AdjustmentKind.Trimmer => $"den {theOne} Trimmer um {amount}{range} weiter einstellen als den anderen, gezählt wie in der Aufzeichnung",
            AdjustmentKind.BrakeLine => $"die {GermanSides.Plain(travel)} Bremsleine um {amount}{range} kürzer machen als die andere",
        };
    }

    private static string TravelOf(AdjustmentReport a, Numbers numbers) =>
        Phrase(a.Kind, a.Travel, numbers.Travel(a.Travel, a.Unit), " " + Range(a.Interval95, a.Unit, numbers));

    /// <summary><c>14 mm (9 bis 20) zu Ihrer linken Seite hin</c>.</summary>
    private static string SignedRange(double m, ConfidenceInterval interval, Numbers numbers) =>
        $"{numbers.Length(Math.Abs(m))} {Range(interval, TravelUnit.Meter, numbers)} {GermanSides.ToYourSide(m)}";

    /// <summary><c>(9 bis 20)</c>; with both sides named when the range spans zero.</summary>
    private static string Range(ConfidenceInterval interval, TravelUnit unit, Numbers numbers)
    {
        string Size(double value) => numbers.TravelNumber(Math.Abs(value), unit);
        (double near, double far) = Math.Abs(interval.Lower) < Math.Abs(interval.Upper) ? (interval.Lower, interval.Upper) : (interval.Upper, interval.Lower);
        return interval.ExcludesZero ? $"({Size(near)} bis {Size(far)})" : $"({Size(interval.Lower)} zu Ihrer linken bis {Size(interval.Upper)} zu Ihrer rechten Seite)";
    }

    private static bool IsZero(double m, Numbers numbers) => IsZero(m, TravelUnit.Meter, numbers);

    private static bool IsZero(double value, TravelUnit unit, Numbers numbers) => numbers.TravelNumber(value, unit) == numbers.TravelNumber(0, unit);

    private static string Capital(string text) => char.ToUpperInvariant(text[0]) + text[1..];
}
