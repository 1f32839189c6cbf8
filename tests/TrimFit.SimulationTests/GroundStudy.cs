using System.Collections.Immutable;
using System.Globalization;
using TrimFit.Core.Ground;
using TrimFit.Core.Statistics;

namespace TrimFit.SimulationTests;

/// <summary>Hang checks with known truth, by moments of weights about the riser carabiners: no code of the hang check makes the readings.</summary>
/// <remarks>Noise: each scale off by a normal of 0.2 kg for a whole check and read to 0.05 kg, the tape off by a normal of 2 mm, the pilot's seat by
/// a normal of <paramref name="SeatSdM"/> at each hang around his own habit (normal of 15 mm).</remarks>
internal sealed record GroundStudy(double SeatSdM = 0.005, int Hangs = 3, bool Exchange = false)
{
    private const double ScaleSdKg = 0.2, TapeSdM = 0.002, ReadKg = 0.05, HabitSdM = 0.015;

    /// <summary>One machine with its pilot: where the weight really sits.</summary>
    internal sealed record Machine(double PilotKg, double UnitKg, double SpacingM, double HabitM, double UnitLateralM, double FrontShare, double ScaleLeftKg, double ScaleRightKg, double TapeM)
    {
        public double Share => PilotKg / (PilotKg + UnitKg);
        public double OffsetM => (Share * HabitM) + ((1 - Share) * UnitLateralM);
    }

    public static Machine Draw(SeededRandom random) => new(
        random.NextUniform(60, 120), random.NextUniform(22, 40), random.NextUniform(0.38, 0.50), random.NextNormal(0, HabitSdM), random.NextNormal(0, 0.01),
        random.NextUniform(0.65, 0.95), random.NextNormal(0, ScaleSdKg), random.NextNormal(0, ScaleSdKg), random.NextNormal(0, TapeSdM));

    /// <summary>A hang check of the machine with its CG shifted by <paramref name="shiftM"/>.</summary>
    public HangCheckResult Check(Machine m, double shiftM, SeededRandom random)
    {
        var hangs = ImmutableArray.CreateBuilder<HangReading>();
        double total = m.PilotKg + m.UnitKg;
        for (int i = 0; i < Hangs; i++)
        {
            bool exchanged = Exchange && i >= Hangs / 2;
            double e = m.OffsetM + shiftM + (m.Share * random.NextNormal(0, SeatSdM));
            // Moments about the left riser carabiner: the right one carries total (s/2 + e)/s.
            double right = total * ((m.SpacingM / 2) + e) / m.SpacingM, left = total - right;
            hangs.Add(new(Read(left + (exchanged ? m.ScaleRightKg : m.ScaleLeftKg)), Read(right + (exchanged ? m.ScaleLeftKg : m.ScaleRightKg)), exchanged));
        }
        return HangCheck.Measure(hangs.ToImmutable(), m.SpacingM + m.TapeM, TapeSdM, m.Share);

        static double Read(double kg) => Math.Round(kg / ReadKg) * ReadKg;
    }

    /// <summary>How many of the intervals hold the true e.</summary>
    public (int Covered, double MedianHalfWidthM) Coverage(int cases, ulong seed)
    {
        int covered = 0;
        var widths = new double[cases];
        for (int i = 0; i < cases; i++)
        {
            var random = SeededRandom.ForStream(seed, (ulong)i);
            Machine m = Draw(random);
            HangCheckResult check = Check(m, 0, random);
            widths[i] = check.Interval95.HalfWidth;
            if (check.Interval95.Contains(m.OffsetM))
                covered++;
        }
        return (covered, Median.Of(widths));
    }

    /// <summary>Verdicts on changes: the part is to be moved so that e changes by a size drawn from a range, and is moved the right or the wrong way.</summary>
    /// <param name="cases">Changes.</param>
    /// <param name="seed">Seed.</param>
    /// <param name="smallestM">Smallest expected change of e, m.</param>
    /// <param name="largestM">Largest.</param>
    /// <param name="wrongWay">Whether the part goes to the wrong side.</param>
    public Dictionary<HangChangeVerdict, int> Verdicts(int cases, ulong seed, double smallestM, double largestM, bool wrongWay)
    {
        var count = Enum.GetValues<HangChangeVerdict>().ToDictionary(v => v, _ => 0);
        for (int i = 0; i < cases; i++)
        {
            var random = SeededRandom.ForStream(seed, (ulong)i);
            Machine m = Draw(random);
            double size = random.NextUniform(smallestM, largestM) * (random.NextDouble() < 0.5 ? -1 : 1);
            HangCheckResult before = Check(m, 0, random), after = Check(m, wrongWay ? -size : size, random);
            count[HangChange.Judge(before, after, size).Verdict]++;
        }
        return count;
    }

    /// <summary>Verdicts on riser-carabiner, hang-point and suspension-bar travels of 5 mm and more, whatever they do to e.</summary>
    public Dictionary<HangChangeVerdict, int> TravelVerdicts(int cases, ulong seed, double smallestTravelM, double largestTravelM, bool wrongWay)
    {
        var count = Enum.GetValues<HangChangeVerdict>().ToDictionary(v => v, _ => 0);
        for (int i = 0; i < cases; i++)
        {
            var random = SeededRandom.ForStream(seed, (ulong)i);
            Machine m = Draw(random);
            double travel = random.NextUniform(smallestTravelM, largestTravelM) * (random.NextDouble() < 0.5 ? -1 : 1);
            double efficiency = random.NextInt32(4) switch // the trade's table: DEVELOPERS.md, "Adjustments"
            {
                0 => -1,
                1 => -(1 - (m.FrontShare * m.Share)),
                2 => m.FrontShare * m.Share,
                _ => m.Share,
            };
            double size = efficiency * travel;
            HangCheckResult before = Check(m, 0, random), after = Check(m, wrongWay ? -size : size, random);
            count[HangChange.Judge(before, after, size).Verdict]++;
        }
        return count;
    }

    /// <summary>The study as a table.</summary>
    public static int Run(int cases)
    {
        (int low, int high) = BinomialBand.Counts(cases, 0.95, 0.99);
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"| hang check, {cases} machines | inside 95 % interval (99 % band {100.0 * low / cases:F1} to {100.0 * high / cases:F1} %) | median half-width mm |"));
        Console.WriteLine("|---|--:|--:|");
        foreach ((string name, GroundStudy study) in (ReadOnlySpan<(string, GroundStudy)>)
        [
            ("three hangs, seat 5 mm", new()), ("one hang, seat 5 mm", new(Hangs: 1)), ("six hangs, scales exchanged after three", new(Hangs: 6, Exchange: true)),
            ("three hangs, seat 3 mm", new(SeatSdM: 0.003)), ("three hangs, seat 8 mm", new(SeatSdM: 0.008)), ("six hangs, seat 8 mm", new(SeatSdM: 0.008, Hangs: 6)),
        ])
        {
            (int covered, double width) = study.Coverage(cases, 1);
            Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"| {name} | {100.0 * covered / cases:F1} % | {1000 * width:F1} |"));
        }
        Console.WriteLine();
        Console.WriteLine("| change | cases | confirmed | wrong way | other size | cannot tell |");
        Console.WriteLine("|---|--:|--:|--:|--:|--:|");
        var usual = new GroundStudy();
        Row("wrong way, travel 5 to 30 mm", usual.TravelVerdicts(cases, 2, 0.005, 0.030, wrongWay: true));
        Row("wrong way, e 15 to 40 mm", usual.Verdicts(cases, 3, 0.015, 0.040, wrongWay: true));
        Row("wrong way, e 15 mm, seat 8 mm", new GroundStudy(SeatSdM: 0.008).Verdicts(cases, 4, 0.015, 0.015001, wrongWay: true));
        Row("right way, travel 5 to 30 mm", usual.TravelVerdicts(cases, 2, 0.005, 0.030, wrongWay: false));
        Row("right way, e 15 to 40 mm", usual.Verdicts(cases, 3, 0.015, 0.040, wrongWay: false));
        Row("right way, e 5 mm", usual.Verdicts(cases, 5, 0.005, 0.005001, wrongWay: false));
        return 0;

        void Row(string name, Dictionary<HangChangeVerdict, int> v) => Console.WriteLine(string.Create(CultureInfo.InvariantCulture,
            $"| {name} | {cases} | {v[HangChangeVerdict.Confirmed]} | {v[HangChangeVerdict.WrongWay]} | {v[HangChangeVerdict.OtherSize]} | {v[HangChangeVerdict.CannotTell]} |"));
    }
}
