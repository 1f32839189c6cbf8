using System.Collections.Frozen;
using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;

namespace TrimFit.Reporting.Wording;

/// <summary>What readers and estimators say in a few words of English, in German: reasons, kinds of file, notices.</summary>
/// <remarks>They carry no codes, so they are found by their text: <c>{0}</c> stands for a name or text taken over as it is, <c>{0:n}</c> for a
/// number, whose decimal mark becomes the reader's, <c>{0:s}</c> for a part that is itself a saying. A test reads the sources and fails for one that is missing here.</remarks>
internal static partial class GermanSayings
{
    private static readonly (string English, string German)[] _sayings =
    [
        // Spans left out.
        ("strong turn", "starke Kurve"),
        ("on the ground or launching", "am Boden oder beim Start"),
        ("landing or on the ground", "bei der Landung oder am Boden"),
        ("no reading of thrust", "kein Messwert des Schubs"),
        ("no reading of the brakes", "kein Messwert der Bremsen"),
        ("not declared hands off, and no steering was logged", "nicht als freihändig angegeben, und keine Steuerung aufgezeichnet"),
        ("weight shift of unknown size", "Gewichtsverlagerung unbekannter Größe"),
        ("edge of a ballast or weight-shift leg", "Rand eines Abschnitts mit Ballast oder Gewichtsverlagerung"),
        ("logger slipped", "Logger verrutscht"),
        ("logger moved", "Logger bewegt"),
        // Coefficients.
        ("the log says nothing about thrust", "die Aufzeichnung sagt nichts über den Schub"),
        ("thrust hardly changed, so its effect cannot be told from a constant pull", "der Schub änderte sich kaum, deshalb ist seine Wirkung nicht von einem gleichbleibenden Seitenzug zu trennen"),
        ("thrust stayed between {0:n} and {1:n} N", "der Schub blieb zwischen {0} und {1} N"),
        ("thrust stayed between {0:n} and {1:n} % of full", "der Schub blieb zwischen {0} und {1} % des vollen"),
        ("thrust had too few levels", "der Schub hatte zu wenige Stufen"),
        ("cannot be told from the growth with thrust: {0:s}", "nicht vom Zuwachs mit dem Schub zu trennen: {0}"),
        ("no steering was logged", "keine Steuerung aufgezeichnet"),
        ("the brakes hardly moved", "die Bremsen bewegten sich kaum"),
        ("the brakes were never used", "die Bremsen wurden nie benutzt"),
        ("no brakes or steering channel logged", "weder Bremsen noch eine Steuerung aufgezeichnet"),
        ("the trimmers were not moved against each other", "die Trimmer wurden nicht gegeneinander verstellt"),
        ("nothing of the ballast or weight-shift legs is usable", "von den Abschnitten mit Ballast oder Gewichtsverlagerung ist nichts verwendbar"),
        ("the gyro's bias cannot be told from a constant pull without GPS, compass or standing still", "der Nullpunkt des Drehratensensors ist ohne GPS, Kompass oder Stillstand nicht von einem gleichbleibenden Seitenzug zu trennen"),
        ("the gyro's own bias cannot be told from a constant pull without GPS, compass or a spell of standing still", "der Nullpunkt des Drehratensensors ist ohne GPS, Kompass oder Stillstand nicht von einem gleichbleibenden Seitenzug zu trennen"),
        ("the log has neither a yaw rate nor a heading or GPS to take it from", "die Aufzeichnung enthält weder eine Drehrate noch Richtung oder GPS, aus denen sie zu gewinnen wäre"),
        ("only {0:n} s of flight with steady power, at least {1:n} s are needed", "nur {0} s Flug mit stetiger Leistung, mindestens {1} s werden gebraucht"),
        ("no part of the flight is usable", "kein Teil des Flugs ist verwendbar"),
        ("too little of the flight is marked hands-off and measured", "zu wenig vom Flug ist als freihändig angegeben und gemessen"),
        ("too few measurements of the turn are usable", "zu wenige Messungen der Drehung sind verwendbar"),
        // Kinds of file.
        ("comma", "Komma"),
        ("semicolon", "Semikolon"),
        ("tab", "Tabulator"),
        ("pipe", "Senkrechtstrich"),
        ("decimal point", "Dezimalpunkt"),
        ("decimal comma", "Dezimalkomma"),
        ("no header", "ohne Kopfzeile"),
        // How a column was decided.
        ("name", "Name"),
        ("told", "Angabe"),
        ("header", "Kopfzeile"),
        ("from header", "aus der Kopfzeile"),
        ("from units row", "aus der Einheitenzeile"),
        ("from name", "aus dem Namen"),
        ("from cells", "aus den Zellen"),
        ("file name", "Dateiname"),
        ("name and the data", "Name und Daten"),
        ("by convention", "nach Übereinkunft"),
        ("by convention of phones", "nach Übereinkunft der Telefone"),
        ("inferred from the data", "aus den Daten erschlossen"),
        ("not known", "nicht bekannt"),
        ("16-bit number put right", "16-Bit-Zahl berichtigt"),
        ("{0:s}; unit {1:s}", "{0}; Einheit {1}"),
        ("{0:s}; unit {1:s}, 16-bit number put right", "{0}; Einheit {1}, 16-Bit-Zahl berichtigt"),
        ("standard atmosphere", "Standardatmosphäre"),
        ("IGC B record", "IGC-B-Satz"),
        ("IGC I record", "IGC-I-Satz"),
        ("GPX trkpt", "GPX-Trackpunkt"),
        ("{0} is taken from {1}", "{0} kommt aus {1}"),
        // Rows left out.
        ("broken quotes", "fehlerhafte Anführungszeichen"),
        ("fewer cells than columns", "weniger Zellen als Spalten"),
        ("more cells than columns", "mehr Zellen als Spalten"),
        ("no time in the row", "keine Zeit in der Zeile"),
        ("time not readable", "Zeit nicht lesbar"),
        ("position not readable", "Position nicht lesbar"),
        ("number not with a decimal point in {0}", "Zahl ohne Dezimalpunkt in {0}"),
        ("number not with a decimal comma in {0}", "Zahl ohne Dezimalkomma in {0}"),
        ("not a number in {0}", "keine Zahl in {0}"),
        ("time runs back", "die Zeit läuft zurück"),
        ("time repeats", "die Zeit wiederholt sich"),
        ("the row is torn", "die Zeile ist zerrissen"),
        ("point with a position that is none", "Punkt mit ungültiger Position"),
        ("point without a time", "Punkt ohne Zeit"),
        ("point with a time that is none", "Punkt mit ungültiger Zeit"),
        ("the file breaks off or is damaged here", "die Datei bricht hier ab oder ist beschädigt"),
        ("not an IGC record", "kein IGC-Satz"),
        ("fix cut short", "abgeschnittener Punkt"),
        ("fix without a time", "Punkt ohne Zeit"),
        ("fix with a position that is none", "Punkt mit ungültiger Position"),
        ("fix with an altitude that is none", "Punkt mit ungültiger Höhe"),
        ("not an NMEA sentence", "kein NMEA-Satz"),
        ("sentence without a checksum", "Satz ohne Prüfsumme"),
        ("checksum does not agree", "Prüfsumme stimmt nicht"),
        ("sentence with a field that is none", "Satz mit ungültigem Feld"),
        ("no fix", "kein Fix"),
        ("{0}({1}): {2:s} Row left out.", "{0}({1}): {2} Zeile ausgelassen."),
        ("{0}({1}): {2:s} Row left out. {3:s}", "{0}({1}): {2} Zeile ausgelassen. {3}"),
        ("{0}({1}): {2:s} {3:n} rows left out for this, lines {4:n} to {5:n}.", "{0}({1}): {2} Deswegen {3} Zeilen ausgelassen, Zeilen {4} bis {5}."),
        ("{0}({1}): {2:s} {3:n} rows left out for this, lines {4:n} to {5:n}. {6:s}", "{0}({1}): {2} Deswegen {3} Zeilen ausgelassen, Zeilen {4} bis {5}. {6}"),
        ("a quote stands where none belongs.", "ein Anführungszeichen steht, wo keines hingehört."),
        ("the row has {0:n} cells, expected {1:n}.", "die Zeile hat {0} Zellen, erwartet sind {1}."),
        ("the row has {0:n} cells, expected {1:n}; perhaps a decimal comma.", "die Zeile hat {0} Zellen, erwartet sind {1}; vielleicht ein Dezimalkomma."),
        ("the row has no time.", "die Zeile hat keine Zeit."),
        ("the row has the time of the row before.", "die Zeile hat die Zeit der Zeile davor."),
        ("\"{0}\" is not a time here.", "„{0}“ ist hier keine Zeit."),
        ("\"{0}\" is not a position (latitude and longitude).", "„{0}“ ist keine Position (Breite und Länge)."),
        ("\"{0}\" is not a number here: this file has decimal points elsewhere.", "„{0}“ ist hier keine Zahl: Sonst hat diese Datei Dezimalpunkte."),
        ("\"{0}\" is not a number here: this file has decimal commas elsewhere.", "„{0}“ ist hier keine Zahl: Sonst hat diese Datei Dezimalkommas."),
        ("\"{0}\" is not a number.", "„{0}“ ist keine Zahl."),
        ("time runs back from {0:n} s to {1:n} s.", "die Zeit läuft von {0} s auf {1} s zurück."),
        ("time runs back from {0} to {1}.", "die Zeit läuft von {0} auf {1} zurück."),
        ("Split the log there if this was a restart.", "Teilen Sie die Aufzeichnung dort, falls neu gestartet wurde."),
        // Notices of the readers.
        ("{0}: column \"{1}\": {2:n} stands for no value in {3:n} rows; it lies far outside everything else in the column.", "{0}: Spalte „{1}“: {2} steht in {3} Zeilen für keinen Wert; es liegt weit außerhalb von allem anderen in der Spalte."),
        ("{0}: {1:n} positions are 0, 0, which receivers write without a fix; they count as missing.", "{0}: {1} Positionen sind 0, 0, wie Empfänger sie ohne Fix schreiben; sie gelten als fehlend."),
        ("{0}: column \"{1}\" is the direction of the way over ground (they differ by {2:n} deg in the median) and is used as ground_course. To use it as the nose's: --column heading={3}.", "{0}: Spalte „{1}“ ist die Richtung des Wegs über Grund (beide weichen im Median um {2}° ab) und wird als ground_course verwendet. Um sie als die der Nase zu verwenden: --column heading={3}."),
        ("{0}: column \"{1}\" is a 16-bit number that ran over: its negative numbers are raised by {2:n}, so that it runs over one full turn.", "{0}: Spalte „{1}“ ist eine übergelaufene 16-Bit-Zahl: Ihre negativen Zahlen werden um {2} erhöht, so dass sie über eine volle Drehung läuft."),
        ("{0}: column \"{1}\" is a 16-bit number that ran over: its negative numbers are raised by {2:n} and multiplied by {3:n}, so that it runs over one full turn.", "{0}: Spalte „{1}“ ist eine übergelaufene 16-Bit-Zahl: Ihre negativen Zahlen werden um {2} erhöht und mit {3} malgenommen, so dass sie über eine volle Drehung läuft."),
        ("{0}: column \"{1}\" is a 16-bit number that ran over: its negative numbers are raised by {2:n}, so that it runs over one full turn; it then differs from the course of the positions by {3:n} deg in the median.", "{0}: Spalte „{1}“ ist eine übergelaufene 16-Bit-Zahl: Ihre negativen Zahlen werden um {2} erhöht, so dass sie über eine volle Drehung läuft; sie weicht dann vom Kurs der Positionen im Median um {3}° ab."),
        ("{0}: column \"{1}\" is a 16-bit number that ran over: its negative numbers are raised by {2:n} and multiplied by {3:n}, so that it runs over one full turn; it then differs from the course of the positions by {4:n} deg in the median.", "{0}: Spalte „{1}“ ist eine übergelaufene 16-Bit-Zahl: Ihre negativen Zahlen werden um {2} erhöht und mit {3} malgenommen, so dass sie über eine volle Drehung läuft; sie weicht dann vom Kurs der Positionen im Median um {4}° ab."),
        ("{0}: column \"{1}\" has no unit; its numbers are used as they are. To say one: --column {2}.", "{0}: Spalte „{1}“ hat keine Einheit; ihre Zahlen werden verwendet, wie sie sind. Um eine anzugeben: --column {2}."),
        ("{0}: columns \"{1}\" and \"{2}\" are in different units; \"{3}\" is not used.", "{0}: Die Spalten „{1}“ und „{2}“ haben verschiedene Einheiten; „{3}“ wird nicht verwendet."),
        ("{0}: column \"{1}\" ({2}) has no unit; {3} is taken, since {4:s}. To say another: --column {5}.", "{0}: Spalte „{1}“ ({2}) hat keine Einheit; {3} wird angenommen, denn {4}. Um eine andere anzugeben: --column {5}."),
        ("{0}: column \"{1}\" ({2}) has no unit and {3:s}; not used. Say it: --column {4} (or another of {5}).", "{0}: Spalte „{1}“ ({2}) hat keine Einheit, und {3}; nicht verwendet. Geben Sie sie an: --column {4} (oder eine andere aus {5})."),
        ("its numbers are no degrees", "ihre Zahlen sind keine Grade"),
        ("its numbers are too large for degrees", "ihre Zahlen sind zu groß für Grade"),
        ("its numbers are too large for radians", "ihre Zahlen sind zu groß für Radiant"),
        ("its numbers are too large for radians per second", "ihre Zahlen sind zu groß für Radiant je Sekunde"),
        ("it is {0:n} times the speed from the positions, m/s", "sie ist das {0}-Fache der Geschwindigkeit aus den Positionen, m/s"),
        ("in degrees the wing would never have banked", "in Grad hätte sich der Schirm nie in die Kurve gelegt"),
        ("it jumps by a full turn of 6.28", "sie springt um eine volle Drehung von 6,28"),
        ("the turn rate of the ground course is {0:n} rad/s for each of its numbers", "die Drehrate des Kurses über Grund beträgt {0} rad/s je Zahl der Spalte"),
        ("the other turn rates of this file are in it", "die anderen Drehraten dieser Datei haben sie"),
        ("of its range", "ihr Bereich spricht dafür"),
        ("of its size", "ihre Größe spricht dafür"),
        ("of the pressure of the air", "der Luftdruck spricht dafür"),
        ("no propeller turns that often in a second", "kein Propeller dreht so oft in einer Sekunde"),
        ("nothing says otherwise", "nichts spricht dagegen"),
        ("its numbers lie between 0 and 1", "ihre Zahlen liegen zwischen 0 und 1"),
        ("its numbers lie between 0 and 100", "ihre Zahlen liegen zwischen 0 und 100"),
        ("its numbers lie between -1 and 1, as of a stick", "ihre Zahlen liegen zwischen -1 und 1, wie die eines Steuerknüppels"),
        ("its numbers lie between -100 and 100, as of a stick", "ihre Zahlen liegen zwischen -100 und 100, wie die eines Steuerknüppels"),
        ("its numbers begin at -1024, as of a transmitter's stick", "ihre Zahlen beginnen bei -1024, wie die eines Senderknüppels"),
        ("its numbers lie between 1000 and 2000, as of a servo pulse in us", "ihre Zahlen liegen zwischen 1000 und 2000, wie die eines Servoimpulses in us"),
        ("gravity has that size in it", "die Schwerkraft hat in ihr diese Größe"),
        ("its numbers lie within 1", "ihre Zahlen bleiben unter 1"),
        ("the data do not decide it", "die Daten entscheiden es nicht"),
        ("{0}({1}): the logger's clock begins again here. The rows from here on are placed {2:n} s after the ones before; how long the real pause was is not known.", "{0}({1}): Die Uhr des Loggers beginnt hier von vorn. Die Zeilen ab hier sind {2} s hinter die vorigen gelegt; wie lang die Pause wirklich war, ist nicht bekannt."),
        ("{0}: the stamps of column \"{1}\" are coarser than the sampling; they give the start, and column \"{2}\" gives the steps.", "{0}: Die Stempel der Spalte „{1}“ sind gröber als die Abtastung; sie geben den Anfang, und Spalte „{2}“ gibt die Schritte."),
        ("{0}: {1} can all give the time; \"{2}\" is used. To choose: --column time=NAME.", "{0}: {1} können alle die Zeit angeben; „{2}“ wird verwendet. Zum Auswählen: --column time=NAME."),
        ("{0}: column \"{1}\" has no unit; its numbers are taken as {2}, which makes the record as long as a flight. To say another: --column {3}.", "{0}: Spalte „{1}“ hat keine Einheit; ihre Zahlen gelten als {2}, womit die Aufzeichnung so lang wird wie ein Flug. Um eine andere anzugeben: --column {3}."),
        ("{0}: the dates of column \"{1}\" can be read as day/month and as month/day; only the time of day is used. To say which: --column {2}:dmy or :mdy.", "{0}: Die Daten der Spalte „{1}“ lassen sich als Tag/Monat und als Monat/Tag lesen; nur die Uhrzeit wird verwendet. Um es anzugeben: --column {2}:dmy oder :mdy."),
        ("{0}: column \"{1}\" has the name of {2}, but \"{3}\" is no unit known here; not used. To use it: --column {4}.", "{0}: Spalte „{1}“ heißt wie {2}, aber „{3}“ ist hier keine bekannte Einheit; nicht verwendet. Um sie zu verwenden: --column {4}."),
        ("{0}: column \"{1}\" has the name of {2}, but {3} is no unit of it; not used. To use it: --column {4}.", "{0}: Spalte „{1}“ heißt wie {2}, aber {3} ist keine Einheit davon; nicht verwendet. Um sie zu verwenden: --column {4}."),
        ("{0}: column \"{1}\" has the name of {2}, but holds other things than positions; not used.", "{0}: Spalte „{1}“ heißt wie {2}, enthält aber anderes als Positionen; nicht verwendet."),
        ("{0}: column \"{1}\" has the name of {2}, but holds other things than numbers; not used.", "{0}: Spalte „{1}“ heißt wie {2}, enthält aber anderes als Zahlen; nicht verwendet."),
        ("{0}: {1} all have the name of {2}; \"{3}\" is used. To choose: --column {4}.", "{0}: {1} heißen alle wie {2}; „{3}“ wird verwendet. Zum Auswählen: --column {4}."),
        ("{0}({1}): the time stamps are coarser than the sampling (about {2:n} rows share each); rows with the same stamp are spread evenly over its step.", "{0}({1}): Die Zeitstempel sind gröber als die Abtastung (etwa {2} Zeilen teilen sich einen); Zeilen mit demselben Stempel sind gleichmäßig über seinen Schritt verteilt."),
        ("{0}: {1} holds nothing that is used and is set aside.", "{0}: {1} enthält nichts, was verwendet wird, und bleibt beiseite."),
        ("{0} breaks off or is damaged at line {1:n}; the {2:n} points before are used.", "{0} bricht in Zeile {1} ab oder ist dort beschädigt; die {2} Punkte davor werden verwendet."),
        ("{0} has no GNSS altitude.", "{0} enthält keine GNSS-Höhe."),
        ("{0}: {1:n} of {2:n} fixes are marked V (no three-dimensional position); their positions are not used.", "{0}: {1} von {2} Punkten sind mit V markiert (keine dreidimensionale Position); ihre Positionen werden nicht verwendet."),
        ("{0} gives no date (HFDTE line); only its times of day are used.", "{0} nennt kein Datum (Zeile HFDTE); nur die Uhrzeiten werden verwendet."),
        ("{0} gives no date (RMC sentence); only its times of day are used.", "{0} nennt kein Datum (Satz RMC); nur die Uhrzeiten werden verwendet."),
        ("{0}: the recorder's ground speed (GSP) is {1:n} times the speed between its positions; it is not used.", "{0}: Die Geschwindigkeit über Grund des Rekorders (GSP) ist das {1}-Fache der Geschwindigkeit zwischen seinen Positionen; sie wird nicht verwendet."),
        // Clocks of several loggers.
        ("turn rate", "Drehrate"),
        ("climb", "Steigen"),
        ("engine", "Motor"),
        ("speed", "Geschwindigkeit"),
        ("engine and climb", "Motor und Steigen"),
        ("The clock of {0} is {1:n} s ahead of that of {2} by their {3:s} (correlation {4:n}); it is moved by that, good to {5:n} s.", "Die Uhr von {0} geht der von {2} um {1} s vor, nach dem Vergleich von: {3} (Korrelation {4}); sie ist darum verschoben, auf {5} s genau."),
        ("The clock of {0} is {1:n} s behind that of {2} by their {3:s} (correlation {4:n}); it is moved by that, good to {5:n} s.", "Die Uhr von {0} geht der von {2} um {1} s nach, nach dem Vergleich von: {3} (Korrelation {4}); sie ist darum verschoben, auf {5} s genau."),
        ("The clock of {0} was found from its {1:s} against {2}: correlation {3:n}, good to {4:n} s.", "Die Uhr von {0} wurde gegen {2} gefunden, nach dem Vergleich von: {1}; Korrelation {3}, auf {4} s genau."),
        ("The clock of {0} is taken to be {1:n} h ahead of that of {2}, as local time is; only so do the two overlap.", "Von der Uhr von {0} wird angenommen, dass sie der von {2} um {1} h vorgeht, wie Ortszeit es tut; nur so überschneiden sich beide."),
        ("The clock of {0} is taken to be {1:n} h behind that of {2}, as local time is; only so do the two overlap.", "Von der Uhr von {0} wird angenommen, dass sie der von {2} um {1} h nachgeht, wie Ortszeit es tut; nur so überschneiden sich beide."),
        ("{0}: taken from {1} ({2:n} Hz), not from {3}.", "{0}: kommt aus {1} ({2} Hz), nicht aus {3}."),
        // Flight sheet.
        ("three quick throttle blips", "drei kurzen Gasstößen"),
        ("a pause of the recorder", "einer Pause des Rekorders"),
        ("The marks of the flight sheet are taken from {0:s}: {1:n} found, at {2} s.", "Die Marken des Flugprotokolls stammen aus {0}: {1} gefunden, bei {2} s."),
        ("The flight sheet is of {0}, the log of {1}: check that they belong together.", "Das Flugprotokoll ist vom {0}, die Aufzeichnung vom {1}: Prüfen Sie, ob beide zusammengehören."),
        ("The leg on line {0:n} of the flight sheet runs from mark {1:n} to mark {2:n}, which the log does not hold; it is left out.", "Der Abschnitt in Zeile {0} des Flugprotokolls reicht von Marke {1} bis Marke {2}, die in der Aufzeichnung nicht stehen; er ist ausgelassen."),
        ("The leg on line {0:n} of the flight sheet, {1:n} to {2:n} s, lies outside the log, which runs from {3:n} to {4:n} s; it is left out.", "Der Abschnitt in Zeile {0} des Flugprotokolls, {1} bis {2} s, liegt außerhalb der Aufzeichnung, die von {3} bis {4} s reicht; er ist ausgelassen."),
        ("The hands-off leg on line {0:n} of the flight sheet is too short once {1:n} s are taken off edges that no control shows; it is left out.", "Der freihändige Abschnitt in Zeile {0} des Flugprotokolls ist zu kurz, wenn an Rändern, die keine Steuerung zeigt, {1} s abgezogen werden; er ist ausgelassen."),
        ("The flight sheet gives clock times, but the log knows no time of day; those legs are left out. Give seconds since the start of the log.", "Das Flugprotokoll nennt Uhrzeiten, aber die Aufzeichnung kennt keine Uhrzeit; diese Abschnitte sind ausgelassen. Geben Sie Sekunden seit Beginn der Aufzeichnung an."),
        ("The clock of the flight sheet is taken to be {0:n} h ahead of the log's, as a watch on local time is; only so do the legs lie in the flight.", "Von der Uhr des Flugprotokolls wird angenommen, dass sie der der Aufzeichnung um {0} h vorgeht, wie eine Armbanduhr mit Ortszeit; nur so liegen die Abschnitte im Flug."),
        ("The clock of the flight sheet is taken to be {0:n} h behind the log's, as a watch on local time is; only so do the legs lie in the flight.", "Von der Uhr des Flugprotokolls wird angenommen, dass sie der der Aufzeichnung um {0} h nachgeht, wie eine Armbanduhr mit Ortszeit; nur so liegen die Abschnitte im Flug."),
        ("The clock times of the flight sheet fit the log with more than one time zone; those legs are left out. Give seconds since the start of the log, or the log's own clock.", "Die Uhrzeiten des Flugprotokolls passen mit mehr als einer Zeitzone zur Aufzeichnung; diese Abschnitte sind ausgelassen. Geben Sie Sekunden seit Beginn der Aufzeichnung an oder die Uhr der Aufzeichnung selbst."),
    ];

    private static readonly FrozenDictionary<string, string> _whole =
        _sayings.Where(s => !s.English.Contains('{', StringComparison.Ordinal)).ToFrozenDictionary(s => s.English, s => s.German, StringComparer.Ordinal);

    private static readonly Lazy<(Regex Pattern, string German)[]> _patterns = new(() =>
        [.. _sayings.Where(s => s.English.Contains('{', StringComparison.Ordinal)).Select(s => (Pattern(s.English), s.German))]);

    /// <summary>The text in German; a list joined by commas part by part; the text itself where nothing here fits.</summary>
    public static string Translate(string text, Numbers numbers)
    {
        ArgumentNullException.ThrowIfNull(text);
        return TryTranslate(text, numbers) ?? (text.Contains(", ", StringComparison.Ordinal)
            ? string.Join(", ", text.Split(", ").Select(part => TryTranslate(part, numbers) ?? part))
            : text);
    }

    private static string? TryTranslate(string text, Numbers numbers)
    {
        if (_whole.TryGetValue(text, out string? whole))
            return whole;
        foreach ((Regex pattern, string german) in _patterns.Value)
        {
            if (pattern.Match(text) is not { Success: true } match || !NestedFit(match, numbers))
                continue;
            return Place().Replace(german, place => Filled(match, place.Groups["n"].Value, numbers));
        }
        return null;
    }

    private static bool NestedFit(Match match, Numbers numbers)
    {
        for (int i = 0; i < 10; i++)
        {
            if (match.Groups["s" + i.ToString(CultureInfo.InvariantCulture)] is { Success: true } nested && TryTranslate(nested.Value, numbers) is null)
                return false;
        }
        return true;
    }

    private static string Filled(Match match, string n, Numbers numbers) =>
        match.Groups["s" + n] is { Success: true } nested ? TryTranslate(nested.Value, numbers)!
        : match.Groups["n" + n] is { Success: true } number ? number.Value.Replace(".", numbers.DecimalMark, StringComparison.Ordinal)
        : match.Groups["t" + n].Value;

    private static Regex Pattern(string english)
    {
        var pattern = new StringBuilder("^");
        int done = 0;
        foreach (Match place in Place().Matches(english))
        {
            pattern.Append(Regex.Escape(english[done..place.Index]));
            done = place.Index + place.Length;
            string n = place.Groups["n"].Value;
            pattern.Append(place.Groups["kind"].Value switch
            {
                "n" => $@"(?<n{n}>-?[0-9]+(?:\.[0-9]+)?(?:E[+-]?[0-9]+)?)",
                "s" => $"(?<s{n}>.+?)",
                _ => $"(?<t{n}>.+?)",
            });
        }
        return new Regex(pattern.Append(Regex.Escape(english[done..])).Append('$').ToString(), RegexOptions.CultureInvariant);
    }

    [GeneratedRegex(@"\{(?<n>[0-9])(?::(?<kind>[ns]))?\}")]
    private static partial Regex Place();
}
