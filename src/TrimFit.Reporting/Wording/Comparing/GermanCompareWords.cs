using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Statistics;
using static TrimFit.Reporting.Wording.GermanSides;

// CS8524 (an unnamed enum value) cannot happen here; without it CS8509 still makes a missing member an error, which `_ =>` would hide.
#pragma warning disable CS8524

namespace TrimFit.Reporting.Wording.Comparing;

/// <summary>Before and after in German.</summary>
internal sealed record GermanCompareWords : CompareWords
{
    private static readonly CompareHeads _heads = new()
    {
        BeforeAfter = "Vorher und nachher",
        Before = "vorher",
        After = "nachher",
        Change = "Änderung",
        Inside = "innerhalb der Toleranz",
        Next = "Was als Nächstes kommt",
        Noticed = "Was sonst noch auffiel",
        Flights = "Die Flüge",
        Flight = "Flug",
        Setting = "Einstellung",
        Day = "Tag",
        PullInLevelFlight = "Seitenzug im Horizontalflug °/s",
        Coefficients = "Drehmodell vorher und nachher",
        PowerPlot = "Seitenzug über der Leistung, vorher und nachher",
        History = "Die Flüge in ihrer Reihenfolge",
        Tolerance = "Toleranz",
        FlightNumber = "Flugnummer",
        Settings = "Einstellungen",
        HowPooled = "zusammengefasst durch",
    };

    private static Words German => Words.Of(ReportLanguage.German);

    public override string Title => "Vorher und nachher";

    public override CompareHeads Heads => _heads;

    public override string Answer(FlightComparison c, Numbers numbers)
    {
        if (c.Setups.IsEmpty)
            return "Keiner dieser Flüge kann seinen Seitenzug über der Leistung angeben, also gibt es nichts zu vergleichen.";
        string power = German.AtPower(c.Options.Trim.BalanceThrust, numbers);
        if (c.AtBalance is not SettingChange change || c.Verdict is not ComparisonVerdict verdict)
        {
            SetupPull only = c.Setups[0].AtBalance;
            return $"Alle Flüge haben dieselbe Einstellung: {power} dreht das Gerät {Turn(only.Rate.Mean, numbers)} ({Range(only.Interval95, numbers)}; rechts ist positiv).";
        }
        string both = $"{power} drehte das Gerät vorher {Turn(change.Before.Rate.Mean, numbers)} und dreht jetzt {Turn(change.After.Rate.Mean, numbers)}";
        string range = $"Änderung {Range(change.Interval95, numbers)}; rechts ist positiv";
        return verdict.Code switch
        {
            ComparisonVerdictCode.Fixed => $"Behoben: Im Leerlauf, im Horizontalflug und bei Vollgas liegt die verbleibende Drehrate innerhalb von {numbers.Rate(c.Options.Trim.Tolerance.RadPerSec)}; {both} ({range}).",
            ComparisonVerdictCode.Better => $"Besser: {both} ({range}).",
            ComparisonVerdictCode.Worse => $"Schlechter: {both} ({range}).",
            ComparisonVerdictCode.NoClearChange => verdict.ShownEqual
                ? $"Keine Änderung: {both}, und es ist gezeigt, dass die Änderung im Leerlauf, im Horizontalflug und bei Vollgas innerhalb von {numbers.Rate(c.Options.Trim.Tolerance.RadPerSec)} liegt ({range})."
                : change.Interval95.ExcludesZero
                    ? $"Die Drehung hat sich geändert, aber ob der Seitenzug kleiner wurde, können diese Flüge nicht sagen: {both} ({range})."
                    : $"Diese Flüge können nicht sagen, ob sich etwas geändert hat: {both} ({range}).",
        };
    }

    public override string Verdict(FlightComparison c, Numbers numbers)
    {
        if (c.Verdict is not ComparisonVerdict verdict)
            return "";
        string tolerance = numbers.Rate(c.Options.Trim.Tolerance.RadPerSec);
        return verdict.Code switch
        {
            ComparisonVerdictCode.Fixed => "Zwei einseitige Tests bei jeder der drei Leistungen, jeder zu 5 %, mit eingerechneter Streuung von Flug zu Flug.",
            ComparisonVerdictCode.Better => "Der Seitenzug wurde kleiner, aber " + NotInside(c, verdict, tolerance) + Larger(c),
            ComparisonVerdictCode.Worse => "Der Seitenzug wurde größer: Stellen Sie zurück, wie es war, oder gehen Sie in die andere Richtung.",
            ComparisonVerdictCode.NoClearChange when verdict.ShownEqual => "Was geändert wurde, spielt für den Seitenzug keine Rolle, oder etwas anderes hat sich mit verändert.",
            ComparisonVerdictCode.NoClearChange => "Kein Zeichen, dass es nicht geholfen hat. Was fehlt: ein zweiter Flug jeder Einstellung, abwechselnd (A-B-A), längere Flüge oder ruhigere Luft.",
        };
    }

    /// <summary>Where the pull became larger although it is smaller where it was to be nulled.</summary>
    private static string Larger(FlightComparison c)
    {
        string[] larger = [.. c.Changes.Where(x => x.SizeChange95.Lower > 0).Select(x => At(x.Setting))];
        return larger.Length == 0 ? "" : $" {Capital(Join(larger))} wurde er größer: Ein fester Versatz kann nicht jede Leistung ausgleichen.";
    }

    private static string NotInside(FlightComparison c, ComparisonVerdict verdict, string tolerance)
    {
        if (verdict.WithheldFixed)
            return "ob er behoben ist, lässt sich ohne die Bremsen oder freihändige Abschnitte in der Aufzeichnung nicht sagen.";
        string[] not = [.. c.Changes.Where(x => x.Setting != PowerSetting.Off && !Inside(x.After.Rate, c.Options.Trim.Tolerance.RadPerSec)).Select(x => At(x.Setting))];
        return $"es ist nicht gezeigt, dass er {Join(not)} innerhalb von {tolerance} liegt.";
    }

    private static string At(PowerSetting setting) => setting switch
    {
        PowerSetting.Off => "mit Motor aus",
        PowerSetting.Idle => "im Leerlauf",
        PowerSetting.Cruise => "im Horizontalflug",
        PowerSetting.Full => "bei Vollgas",
    };

    private static bool Inside(PullDistribution pull, double tolerance) => pull.Interval(0.90) is var i && i.Lower >= -tolerance && i.Upper <= tolerance;

    public override string Inside(SetupPull pull, double toleranceRadPerSec) => Inside(pull.Rate, toleranceRadPerSec) ? "ja"
        : pull.Interval95.Lower > toleranceRadPerSec || pull.Interval95.Upper < -toleranceRadPerSec ? "nein"
        : "nicht gezeigt";

    public override string Removed(FlightComparison c, Numbers numbers)
    {
        if (c.AtBalance is null)
            return "";
        if (c.Removed is not FiellerSet { Ratio: double share, Interval: ConfidenceInterval i })
            return "Welcher Anteil des Seitenzugs weg ist, lässt sich nicht angeben: Der Seitenzug vorher unterscheidet sich nicht von null.";
        return $"Vom Seitenzug vorher sind {numbers.Percent(share)} weg (95-%-Bereich {numbers.PercentNumber(i.Lower)} bis {numbers.Percent(i.Upper)}; über 100 % zieht es jetzt zur anderen Seite).";
    }

    public override string Attribution(ChangeAttribution? a, Numbers numbers)
    {
        if (a is null)
            return "";
        string what = a.Of switch
        {
            AttributedPull.Constant => "der gleichbleibende Seitenzug",
            AttributedPull.Power => "der Seitenzug der Leistung im Horizontalflug",
            AttributedPull.AtBalance => "der Seitenzug, wo ausgeglichen werden soll,",
        };
        string change = $"{Capital(what)} änderte sich mit {PartOf(a.Part)} um {numbers.Rate(a.ChangeRadPerSec)} ({Range(a.ChangeInterval95, numbers)})";
        return a.Share switch
        {
            { Kind: FiellerKind.Interval, Ratio: double share, Interval: ConfidenceInterval i } =>
                $"{change}: {numbers.Percent(share)} davon gingen mit {PartOf(a.Part)} (95-%-Bereich {numbers.PercentNumber(i.Lower)} bis {numbers.Percent(i.Upper)}).",
            _ => $"{change}. Als Anteil davon lässt sich das nicht angeben: Vorher unterschied er sich mit {numbers.Rate(a.BeforeRadPerSec)} nicht von null.",
        };
    }

    private static string PartOf(ChangedPart part) => part switch
    {
        ChangedPart.Geometry => "der Geometrie des Geräts",
        ChangedPart.Wing => "dem Schirm",
        ChangedPart.BrakeLines => "den Bremsleinen",
        ChangedPart.Trimmers => "den Trimmern",
        ChangedPart.Harness => "dem Gurtzeug",
        ChangedPart.Propeller => "dem Propeller",
        ChangedPart.Ballast => "dem Ballast",
    };

    public override string Trend(FlightComparison c, Numbers numbers)
    {
        if (c.Trend is not SetupTrend t)
            return "";
        string seen = $"Kleinster gesehener Seitenzug: {c.Setups[t.BestSeen].Name}, das Gerät dreht {Turn(c.Setups[t.BestSeen].AtBalance.Rate.Mean, numbers)}.";
        string line = $"Über die Einstellungen ändert sich die Drehrate um {numbers.SensitivityNumber(t.SlopeRadPerSecPerM)} {numbers.SensitivityUnit} Versatz des Schwerpunkts "
            + $"({numbers.SensitivityNumber(t.SlopeInterval95.Lower)} bis {numbers.SensitivityNumber(t.SlopeInterval95.Upper)}).";
        string best = t.BestOffset is { Kind: FiellerKind.Interval, Ratio: double zero, Interval: ConfidenceInterval i }
            ? $"Die Linie erreicht null bei einem Versatz des Schwerpunkts von {German.Lateral(zero, numbers)} (95-%-Bereich {German.Lateral(i.Lower, numbers)} bis {German.Lateral(i.Upper, numbers)})."
            : "Wo die Linie null erreicht, lässt sich nicht eingrenzen: Die Einstellungen unterscheiden sich in ihrer Drehung zu wenig.";
        return $"{line} {best} {seen}";
    }

    public override string Scatter(ScatterReport s, Numbers numbers) => s.Prior.IsKnown
        ? s.Prior.RadPerSec == 0
            ? "Es ist keine Streuung von Flug zu Flug eingerechnet: Die Bereiche gelten nur für diese Flüge."
            : $"Der Seitenzug eines unveränderten Geräts streut nach Annahme von Flug zu Flug um {numbers.Plain(double.RadiansToDegrees(s.Prior.RadPerSec), 2)} °/s."
        : s.Learned
            ? $"Der Seitenzug eines unveränderten Geräts streut von Flug zu Flug um etwa {numbers.Plain(double.RadiansToDegrees(s.MedianRadPerSec), 2)} °/s "
                + $"({numbers.Plain(double.RadiansToDegrees(s.Interval95.Lower), 2)} bis {numbers.Plain(double.RadiansToDegrees(s.Interval95.Upper), 2)}), nach diesen Flügen und dem Üblichen."
            : "Wie weit der Seitenzug eines unveränderten Geräts von Flug zu Flug streut, zeigen diese Flüge nicht; das Übliche ist in jedem Bereich eingerechnet.";

    public override string Method(PoolingMethod method) => method switch
    {
        PoolingMethod.AssumedScatter => "eine gemeinsame Likelihood, Streuung ausintegriert",
        PoolingMethod.RandomEffects => "zufällige Effekte, Hartung und Knapp",
    };

    public override string Notice(CompareNotice notice, Numbers numbers)
    {
        ImmutableArray<double> v = notice.Values.IsDefault ? [] : notice.Values;
        ImmutableArray<string> n = notice.Names.IsDefault ? [] : notice.Names;
        string Value(int i, Func<double, string> show) => i < v.Length && double.IsFinite(v[i]) ? show(v[i]) : "(unbekannt)";
        string Name(int i) => i < n.Length ? n[i] : "Ein Flug";
        string Pair(Func<double, string> show) => $"{Value(0, show)} ({Name(0)}) und {Value(1, show)} ({Name(1)})";
        return notice.Code switch
        {
            CompareNoticeCode.RegressionToTheMean => "Vorher nur ein Flug, und vielleicht ist er ausgewählt, weil er schlecht war: Dann ist ein Teil jeder Verbesserung Zufall. Stellen Sie zurück, fliegen Sie noch einmal, ändern Sie erneut (A-B-A): Das zeigt es.",
            CompareNoticeCode.ScatterAssumed => $"Die Streuung von Flug zu Flug (Gurte, Sitzhaltung, Kraftstoff, Luft) ist angenommen: ein halbnormales Vorwissen mit Maßstab {Value(0, numbers.Rate)}, ausintegriert. Drei Flüge jeder Einstellung messen sie.",
            CompareNoticeCode.FlightNotUsed => $"{Name(0)} kann seinen Seitenzug über der Leistung nicht angeben und ist aus dem Vergleich ausgelassen.",
            CompareNoticeCode.NothingChanged => "Die Gerätedateien sind gleich, und es ist keine Änderung angegeben. Geben Sie für jede Einstellung ihre Gerätedatei an oder sagen Sie mit --changed, was geändert wurde.",
            CompareNoticeCode.DeclaredButSame => "Was als geändert angegeben ist, ist in den Gerätedateien gleich. Prüfen Sie, ob jeder Flug seine eigene Gerätedatei hat.",
            CompareNoticeCode.GeometryDiffers => $"Die Gerätedateien unterscheiden sich auch in den Orten der Karabiner der Tragegurte, der Aufhängepunkte des Gurtzeugs, der Antriebseinheit oder der Schublinie, um bis zu {Value(0, numbers.Length)}: Die Änderung lässt sich nicht einer Sache zuschreiben.",
            CompareNoticeCode.WingDiffers => $"Die Gerätedateien nennen verschiedene Schirme ({Join([.. n])}), was nicht angegeben war: Die Änderung lässt sich nicht einer Sache zuschreiben. Sagen Sie --changed wing, wenn das geändert wurde.",
            CompareNoticeCode.PropellerDiffers => "Die Gerätedateien unterscheiden sich in Propeller, Leistung oder Schub, was nicht angegeben war: Die Änderung lässt sich nicht einer Sache zuschreiben.",
            CompareNoticeCode.MassDiffers => $"Die Beladungen unterscheiden sich: {Pair(numbers.Mass)}. Ein schwereres Gerät fliegt schneller, braucht mehr Leistung und dreht anders. Fliegen Sie beide Einstellungen mit derselben Beladung.",
            CompareNoticeCode.HangHeightDiffers => $"Der Schwerpunkt hängt in einer Gerätedatei {Value(0, numbers.Length)} unter den Karabinern der Tragegurte und in einer anderen {Value(1, numbers.Length)}: Eine andere Hängehöhe dreht anders.",
            CompareNoticeCode.DensityDiffers => $"Die Luft war verschieden dicht: {Pair(d => numbers.Plain(d, 3) + " kg/m³")} nach der Höhe. Schub und Drehmoment richten sich danach.",
            CompareNoticeCode.HeightDiffers => $"Die Flüge waren in verschiedenen Höhen: {Pair(h => numbers.Plain(h, 0) + " m")}.",
            CompareNoticeCode.WindDiffers => $"Der Wind war verschieden: {Pair(numbers.Speed)}. Stärkerer Wind bringt unruhigere Luft.",
            CompareNoticeCode.AirspeedDiffers => $"Die Geschwindigkeiten gegen die Luft unterscheiden sich mehr, als Beladung und Luft erklären: {Pair(numbers.Speed)}. Prüfen Sie Trimmer, Beschleuniger und die Beladung in den Gerätedateien.",
            CompareNoticeCode.PowerRangesApart => $"{Name(0)} und {Name(1)} wurden mit verschiedenen Leistungen geflogen: Sie teilen {Value(0, numbers.Percent)} des Bereichs. Fliegen Sie beide Einstellungen nach derselben Flugkarte.",
            CompareNoticeCode.BrakeResponseChanged => $"Die Bremsen wirken anders als vorher ({Value(1, b => numbers.Percent((b / v[0]) - 1))} mehr Drehung bei gleichem Zug; p = {Value(2, p => numbers.Plain(p, 3))}), obwohl an ihnen keine Änderung angegeben ist. Das macht eine verkürzte oder gedehnte Bremsleine, und sie zieht von selbst: Messen Sie beide Leinen.",
            CompareNoticeCode.TrimmersDiffer => $"Die Flugprotokolle von {Name(0)} und {Name(1)} nennen verschiedene Trimmerstellungen.",
            CompareNoticeCode.AcceleratorDiffers => $"Der Beschleuniger wurde verschieden benutzt: {Pair(numbers.Percent)}.",
            CompareNoticeCode.SensorRemounted => $"Der Logger hing in verschiedenen Winkeln: {Pair(numbers.Angle)}. Sein Nullpunkt kann sich damit geändert haben.",
            CompareNoticeCode.TurnDirectionsDiffer => $"Ein Flug kurvte meist nach links, der andere meist nach rechts: Rechtskurven waren {Pair(numbers.Percent)}.",
            CompareNoticeCode.PairNotUsed => "Die Änderung wurde nicht verwendet, um die Empfindlichkeit zu messen, weil sich die Einstellungen in mehr als der Geometrie des Geräts unterscheiden.",
            CompareNoticeCode.SwapLimits => "Was ein Schirmtausch nicht zeigen kann: Gurtzeug, Pilot und Gerät bleiben gleich und behalten ihren Teil des Seitenzugs, und der andere Schirm bringt einen eigenen mit. Gemessen ist nur der Unterschied der beiden Schirme. Ein Rücktausch (A-B-A) zeigt, ob sich sonst etwas geändert hat.",
            CompareNoticeCode.SwapBackDiffers => $"Dieselbe Einstellung ergibt erneut geflogen nicht denselben Seitenzug: {Name(1)} minus {Name(0)} sind {Value(0, numbers.Rate)}, mehr als Fehler und Streuung. Etwas anderes hat sich geändert: Gurte, Sitzhaltung, Trimmer, Leinen, Beladung.",
            CompareNoticeCode.SwapBackAgrees => $"Dieselbe Einstellung stimmt erneut geflogen überein: {Name(1)} minus {Name(0)} sind {Value(0, numbers.Rate)}, innerhalb von Fehlern und Streuung. Sonst scheint sich nichts geändert zu haben.",
            CompareNoticeCode.BeforeAlreadyInside => "Schon vor der Änderung lag der Seitenzug innerhalb der Toleranz.",
            CompareNoticeCode.NoSteering => $"Ohne Bremsen oder freihändige Abschnitte in der Aufzeichnung kann nichts behoben genannt werden: {Join([.. n])}.",
            CompareNoticeCode.ThrustBasesDiffer => "Einige Gerätedateien kennen den Schub in Newton, andere nicht: Alle Flüge werden bei Anteilen des vollen Schubs verglichen. Tragen Sie static_thrust_n in jede Gerätedatei ein.",
        };
    }

    public override string Order(OpenedOrder order, bool fits) => $"Blindversuch. Vor den Flügen versiegelte Reihenfolge: {Join([.. order.Setups])}. Nummer auf der Karte: {order.Commitment}."
        + (fits ? "" : " Es gibt weniger oder mehr Flüge, als die Reihenfolge hat.");

    public override string PowerPlotDescription(FlightComparison c) =>
        $"Drehrate über dem Schub mit den Einstellungen „{c.Setups[0].Name}“ und „{c.Setups[^1].Name}“, jede mit ihrem 95-%-Band, und die Toleranz zu beiden Seiten der Null.";

    public override string HistoryDescription(FlightComparison c) =>
        FormattableString.Invariant($"Seitenzug im Horizontalflug für jeden von {c.Flights.Length} Flügen in ihrer Reihenfolge, mit 95-%-Balken des Flugs allein; ein Zeichen je Einstellung und die Toleranz zu beiden Seiten der Null.");

    public override string Strength(VerdictStrength strength) => strength switch
    {
        VerdictStrength.None => "Belastbarkeit: keine. Höchstens eine Richtung, niemals Millimeter.",
        VerdictStrength.Weak => "Belastbarkeit: schwach. Die Richtung ist sicher, die Größe nicht: Gehen Sie in Schritten vor und fliegen Sie nach jedem.",
        VerdictStrength.Fair => "Belastbarkeit: mittel. Die Größe ist auf die Hälfte ihres Werts genau bekannt; gehen Sie in Schritten vor.",
        VerdictStrength.Firm => "Belastbarkeit: fest. Richtung und Größe sind auf einen Schritt genau bekannt.",
    };

    public override string NextNote(bool pairUsed) => pairUsed
        ? "Das beruht auf allen Flügen zusammen: Was die Änderung zwischen den Einstellungen bewirkte, misst, wie stark eine Verschiebung dieses Gerät dreht."
        : "Die Änderung zwischen den Einstellungen misst nicht, wie stark eine Verschiebung dieses Gerät dreht; die Größe des nächsten Schritts beruht auf den Flügen der letzten Einstellung.";

    private static string Turn(double radPerSec, Numbers numbers) => numbers.RateNumber(Math.Abs(radPerSec)) == numbers.RateNumber(0)
        ? "kaum"
        : $"mit {numbers.Rate(Math.Abs(radPerSec))} nach {Side(radPerSec)}";

    private static string Range(ConfidenceInterval interval, Numbers numbers) => numbers.RateRange(interval, " bis ");

    private static string Capital(string text) => char.ToUpperInvariant(text[0]) + text[1..];
}
