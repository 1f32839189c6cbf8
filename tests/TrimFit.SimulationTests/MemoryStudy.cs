using System.Diagnostics;
using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.SimulationTests;

/// <summary>The shop's memory: does what nine wings say hold the tenth, is the tenth customer's shift narrower for it, and is a wing that behaves
/// otherwise set aside.</summary>
internal static class MemoryStudy
{
    /// <summary>Wings before the customer whose shift is looked at.</summary>
    public const int WingsBefore = 9;

    private const double ModelErrorLogSd = 0.25; // of each source, as the analysis takes it

    private static readonly TrimOptions _options = new() { Draws = 2000 };

    /// <summary>One shop without flights: true sensitivities, their measurements, and what the memory says of the next wing.</summary>
    /// <param name="Covers">The interval for the next wing holds its true sensitivity.</param>
    /// <param name="CoversMeasured">With the model error of a source it holds what that wing would measure.</param>
    /// <param name="LogSd">Standard deviation of the logarithm of the prediction.</param>
    /// <param name="OddSetAside">The wing that behaves otherwise was set aside; null when there is none.</param>
    /// <param name="OthersSetAside">How many of the other wings were.</param>
    internal sealed record Shop(bool Covers, bool CoversMeasured, double LogSd, bool? OddSetAside, int OthersSetAside);

    /// <summary>Draws a shop: wings of a spread between them, areas of 15 % and loads of 10 % either way, measured to 10 to 40 % and the model error.</summary>
    /// <param name="seed">Number of the draw.</param>
    /// <param name="wings">Wings measured before.</param>
    /// <param name="between">Standard deviation between wings of one size, of the logarithm.</param>
    /// <param name="scales">Whether the true sensitivity goes with area and load as similar wings do; else it does not depend on them.</param>
    /// <param name="odd">Factor on the sensitivity of the first wing; 1 for none.</param>
    public static Shop Draw(ulong seed, int wings, double between, bool scales, double odd = 1)
    {
        var random = SeededRandom.ForStream(seed, 41);
        var measured = new List<MeasuredSensitivity>();
        for (int i = 0; i < wings; i++)
        {
            (double truth, double area, double load) = Wing(random, between, scales);
            if (i == 0)
                truth += Math.Log(odd);
            double own = random.NextUniform(0.1, 0.4), sd = Math.Sqrt((own * own) + (ModelErrorLogSd * ModelErrorLogSd));
            measured.Add(new() { Job = i + 1, Source = "pair", LogMedian = truth + (sd * random.NextNormal()), LogSd = sd, WingAreaM2 = area, SuspendedKg = load });
        }
        (double next, double nextArea, double nextLoad) = Wing(random, between, scales);
        ShopMemory memory = ShopMemory.Of(measured, nextArea, nextLoad)!;
        double withModel = Math.Sqrt((memory.LogSd * memory.LogSd) + (ModelErrorLogSd * ModelErrorLogSd));
        double seen = next + (ModelErrorLogSd * random.NextNormal());
        bool isOdd = odd != 1;
        return new(Math.Abs(next - memory.LogMedian) <= 1.96 * memory.LogSd, Math.Abs(seen - memory.LogMedian) <= 1.96 * withModel, memory.LogSd,
            isOdd ? memory.SetAside.Any(s => s.Job == 1) : null, memory.SetAside.Count(s => !(isOdd && s.Job == 1)));
    }

    private static (double LogTruth, double Area, double Load) Wing(SeededRandom random, double between, bool scales)
    {
        double area = 26 * Math.Exp(0.15 * random.NextNormal()), load = 115 * Math.Exp(0.10 * random.NextNormal());
        double truth = Math.Log(double.DegreesToRadians(90)) + (between * random.NextNormal());
        if (scales) // S in proportion to (m/A)^½ / A
            truth += (0.5 * Math.Log(load / area / (115.0 / 26))) - Math.Log(area / 26);
        return (truth, area, load);
    }

    /// <summary>One customer after nine others, all flown and fitted.</summary>
    internal sealed record Customer(bool CoversAlone, double HalfWidthAlone, bool CoversWith, double HalfWidthWith, bool PairConflict, bool MemoryUsed);

    /// <summary>A customer who comes with one ordinary flight; the shop measured nine wings by ballast legs before.</summary>
    public static Customer? Next(IReadOnlyList<ShiftFlight> before, ShiftFlight flight)
    {
        if (flight.Fit[Core.Turns.TurnCoefficient.Thrust] is null || Memory(before, flight) is not ShopMemory memory)
            return null;
        PowerLevels levels = PowerLevels.Of(flight.Signals, flight.Fit, _options.BalanceThrust);
        ShiftReport alone = Shift(SensitivitySources.Torque, _options), with = Shift(SensitivitySources.Torque | SensitivitySources.Memory, _options with { ShopMemory = memory });
        // What the customer's own ballast legs would say of the memory.
        TrimPosterior own = flight.Posterior(SensitivitySources.Torque | SensitivitySources.Ballast | SensitivitySources.Memory, _options with { ShopMemory = memory });
        bool conflict = own.Findings.Any(f => f.Code == FindingCode.ShopMemoryConflict);
        return new(alone.Interval95.Contains(flight.Truth.EquivalentShiftM), alone.Interval95.HalfWidth, with.Interval95.Contains(flight.Truth.EquivalentShiftM), with.Interval95.HalfWidth,
            conflict, own.Report.Sources.Single(s => s.Kind == ShopMemory.Kind).Used);

        ShiftReport Shift(SensitivitySources sources, TrimOptions options) => ShiftSolver.Shift(flight.Posterior(sources, options), levels, flight.Signals, flight.Fit);
    }

    /// <summary>What the shop measured.</summary>
    public static ShopMemory? Memory(IReadOnlyList<ShiftFlight> before, ShiftFlight next) => ShopMemory.Of(before.SelectMany((f, i) =>
        MeasuredSensitivity.From(f.Posterior(SensitivitySources.Torque | SensitivitySources.Ballast, _options).Report, f.Rig, i + 1, "")), next.Rig.Wing.AreaM2, RigSpread.SuspendedKg(next.Rig));

    /// <summary>Tables for DEVELOPERS.md.</summary>
    public static int Run(string[] args)
    {
        int shops = Number("--shops", 4000), flights = Number("--flights", 300), minutes = Number("--minutes", 24 * 60);
        ulong seed = (ulong)Number("--seed", 1);
        Console.WriteLine("| wings before | sd between | size matters | shops | true S covered | with model error | 99 % band of 95 % | log-sd | wings set aside |");
        Console.WriteLine("|--:|--:|---|--:|--:|--:|---|--:|--:|");
        foreach ((int wings, double between, bool scales) in Cells)
        {
            Shop[] row = [.. Enumerable.Range(0, shops).Select(i => Draw(seed + (ulong)i, wings, between, scales))];
            (int low, int high) = BinomialBand.Counts(shops, 0.95, 0.99);
            Line($"| {wings} | {between:F2} | {(scales ? "yes" : "no")} | {shops} | {Percent(row.Count(s => s.Covers), shops)} | {Percent(row.Count(s => s.CoversMeasured), shops)} | {100.0 * low / shops:F1} to {100.0 * high / shops:F1} % | {QuantileType7.Of([.. row.Select(s => s.LogSd)], 0.5):F2} | {Percent(row.Sum(s => s.OthersSetAside), shops * wings)} |");
        }
        Console.WriteLine();
        Console.WriteLine("| one of nine wings turns | shops | set aside | next wing covered |");
        Console.WriteLine("|--:|--:|--:|--:|");
        foreach (double odd in (ReadOnlySpan<double>)[2, 3, 5, 8])
        {
            Shop[] row = [.. Enumerable.Range(0, shops).Select(i => Draw(seed + (ulong)i, WingsBefore, 0.2, scales: true, odd))];
            Line($"| {odd:F0} times as much | {shops} | {Percent(row.Count(s => s.OddSetAside == true), shops)} | {Percent(row.Count(s => s.Covers), shops)} |");
        }
        Console.WriteLine();
        var clock = Stopwatch.StartNew();
        var kept = new KeptFits(null);
        var shopFlights = new List<ShiftFlight>();
        var customers = new List<Customer>();
        var odds = new List<Customer>();
        for (int i = 0; i < flights && clock.Elapsed.TotalMinutes < minutes; i++)
        {
            ShiftFlight flight = ShiftFlight.Fly(seed + (ulong)i, kept);
            if (shopFlights.Count >= WingsBefore)
            {
                if (Next(shopFlights, flight) is Customer customer)
                    customers.Add(customer);
                if (i % 3 == 0 && Next(shopFlights, ShiftFlight.Fly(seed + (ulong)i, kept, sensitivityFactor: 5)) is Customer odd)
                    odds.Add(odd);
                shopFlights.RemoveAt(0);
            }
            shopFlights.Add(flight);
            if (i % 20 == 0)
                Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\r{i}/{flights}, {clock.Elapsed.TotalSeconds:F0} s "));
        }
        Console.Error.WriteLine();
        if (customers.Count == 0)
            return 0;
        (int least, int most) = BinomialBand.Counts(customers.Count, 0.95, 0.99);
        Console.WriteLine("| tenth customer, one flight, torque | customers | shift: cover | median half-width mm |");
        Console.WriteLine("|---|--:|--:|--:|");
        Line($"| without the memory | {customers.Count} | {Percent(customers.Count(c => c.CoversAlone), customers.Count)} | {1000 * QuantileType7.Of([.. customers.Select(c => c.HalfWidthAlone)], 0.5):F1} |");
        Line($"| with the memory of nine | {customers.Count} | {Percent(customers.Count(c => c.CoversWith), customers.Count)} | {1000 * QuantileType7.Of([.. customers.Select(c => c.HalfWidthWith)], 0.5):F1} |");
        Line($"99 % band of 95 %: {100.0 * least / customers.Count:F1} to {100.0 * most / customers.Count:F1} %. Own ballast legs against the memory: {Percent(customers.Count(c => c.PairConflict), customers.Count)} of ordinary wings, {Percent(odds.Count(c => c.PairConflict), odds.Count)} of {odds.Count} that turn five times as much; memory left out there: {Percent(odds.Count(c => !c.MemoryUsed), odds.Count)}.");
        return 0;

        int Number(string option, int otherwise)
        {
            int at = Array.IndexOf(args, option);
            return at >= 0 && at + 1 < args.Length ? int.Parse(args[at + 1], CultureInfo.InvariantCulture) : otherwise;
        }
    }

    /// <summary>Cells of the first table.</summary>
    public static IReadOnlyList<(int Wings, double Between, bool Scales)> Cells { get; } =
        [(4, 0.2, true), (4, 0.35, true), (9, 0, true), (9, 0.2, true), (9, 0.35, true), (9, 0.35, false), (20, 0.2, true), (20, 0.35, true), (20, 0.35, false)];

    private static string Percent(int count, int of) => of == 0 ? "–" : string.Create(CultureInfo.InvariantCulture, $"{100.0 * count / of:F1} %");

    private static void Line(FormattableString text) => Console.WriteLine(text.ToString(CultureInfo.InvariantCulture));
}
