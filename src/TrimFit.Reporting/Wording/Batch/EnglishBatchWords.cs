namespace TrimFit.Reporting.Wording.Batch;

internal sealed record EnglishBatchWords : BatchWords
{
    public override string Answer(int flights, int unreadable) =>
        (flights == 1 ? "1 flight has its row" : $"All {flights} flights have their row") + " in flights.csv and flights.parquet"
        + (unreadable == 0 ? "." : unreadable == 1 ? "; 1 could not be read, its row says why." : $"; {unreadable} could not be read, their rows say why.");

    public override string Note =>
        "Pull: mean turn in level flight with brakes even, right positive. Its range counts the scatter between flights; it needs two flights at least.";

    public override string Title => "Many flights";

    public override (string Machine, string Flights, string Answered, string CannotTell, string Unreadable, string Pull, string Between) Heads =>
        ("machine", "flights", "answered", "cannot tell", "not read", "pull deg/s", "between flights deg/s");
}
