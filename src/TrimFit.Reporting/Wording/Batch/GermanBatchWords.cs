namespace TrimFit.Reporting.Wording.Batch;

internal sealed record GermanBatchWords : BatchWords
{
    public override string Answer(int flights, int unreadable) =>
        (flights == 1 ? "1 Flug hat seine Zeile" : $"Alle {flights} Flüge haben ihre Zeile") + " in flights.csv und flights.parquet"
        + (unreadable == 0 ? "." : unreadable == 1 ? "; 1 ließ sich nicht lesen, seine Zeile sagt, warum." : $"; {unreadable} ließen sich nicht lesen, ihre Zeilen sagen, warum.");

    public override string Note =>
        "Seitenzug: mittlere Drehrate im Horizontalflug mit gleich stehenden Bremsen, rechts positiv. Sein Bereich zählt die Streuung zwischen den Flügen mit; er braucht mindestens zwei Flüge.";

    public override string Title => "Viele Flüge";

    public override (string Machine, string Flights, string Answered, string CannotTell, string Unreadable, string Pull, string Between) Heads =>
        ("Gerät", "Flüge", "beantwortet", "nicht zu sagen", "nicht gelesen", "Seitenzug °/s", "zwischen Flügen °/s");
}
