using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Planning;

/// <summary>Chooses the legs of a card: optimal input design over the information of the turn model.</summary>
/// <remarks>
/// <para>Mehra (1974), "Optimal input signals for parameter estimation in dynamic systems", IEEE Trans. Automatic Control 19:753, doi
/// 10.1109/TAC.1974.1100701: inputs are chosen by a scalar of the information matrix. Here an L-criterion (a weighted sum of variances of what is
/// wanted; Atkinson, Donev and Tobias 2007, "Optimum Experimental Designs, with SAS", ch. 10), minimised by coordinate exchange (Meyer and
/// Nachtsheim 1995, Technometrics 37:60, doi 10.1080/00401706.1995.10485889) over the stations of one run; length of legs and number of runs are
/// tried beforehand.</para>
/// </remarks>
internal sealed class CardDesign
{
    /// <summary>Weight of the pull at idle and at full power beside the pull at the balance thrust: the verdict asks whether the pull grows with
    /// power, and what is left at other powers; a card of level flight alone could not say.</summary>
    private const double OtherPowerWeight = 0.05;

    /// <summary>Weight of the brake's coefficient where brakes are logged: its error as a held brake of 5 % of the travel turns it into the pull.</summary>
    private const double HeldBrake = 0.05;

    private static readonly double[] _testSeconds = [15, 20, 25, 30, 40];

    private readonly CardMachine _machine;
    private readonly CardOptions _options;
    private readonly double _cgShiftWeight;

    /// <param name="machine">Machine, air, logger.</param>
    /// <param name="options">What is asked for.</param>
    public CardDesign(CardMachine machine, CardOptions options)
    {
        _machine = machine;
        _options = options;
        // shift = −P/S: var(shift) S² = var(P) + (P/S)² var(S), the delta method; S at its prior's median.
        double pull = machine.PullAt(machine.Balance), metres = pull / TrimPosterior.PriorMedian;
        _cgShiftWeight = options.BallastKg > 0 ? Math.Max(metres * metres, 1e-4) : 0; // at least 10 mm, so that a small pull still has ballast tried
    }

    /// <summary>Number of times a card was evaluated.</summary>
    public int Evaluations { get; private set; }

    /// <summary>The weighted sum of variances, (rad/s)²; infinite for a card that cannot be fitted.</summary>
    public double Criterion(CardLayout layout)
    {
        if (Information(layout) is not CardInformation information)
            return double.PositiveInfinity;
        double sum = information.PullVariance(_machine.Balance)
            + (OtherPowerWeight * (information.PullVariance(_machine.Idle) + information.PullVariance(1)));
        if (_machine.HasBrakes)
            sum += HeldBrake * HeldBrake * information.BrakeVariance;
        if (_cgShiftWeight > 0)
            sum += _cgShiftWeight * Math.Min(information.CgShiftVariance, TrimPosterior.PriorMedian * TrimPosterior.PriorMedian);
        return sum;
    }

    /// <summary>The information of a layout, on the flight that one seed draws (a pilot's steering is part of the inputs).</summary>
    public CardInformation? Information(CardLayout layout)
    {
        Evaluations++;
        return CardInformation.Of(CardFlight.Draw(layout.Legs(), _machine, new SeededRandom(_options.Seed)), _machine.Noise, _machine.Slope);
    }

    /// <summary>The best card of at most some minutes.</summary>
    public CardLayout Best(double minutes)
    {
        var starts = new List<(CardLayout Layout, double Value)>();
        // Two runs and their repeats; a run is as long as a pilot can keep in mind.
        const double ShortestRunMin = 1, LongestRunMin = 4.5;
        for (int runs = 2; runs * ShortestRunMin <= minutes; runs += 2)
        {
            if (runs * LongestRunMin < minutes && (runs + 2) * ShortestRunMin <= minutes)
                continue;
            foreach (double test in _testSeconds)
            {
                if (Start(runs, test, minutes) is CardLayout layout)
                    starts.Add((layout, Criterion(layout)));
            }
        }
        if (starts.Count == 0)
            starts.Add((Smallest(), 0));
        const int Tried = 3; // the length of legs matters less than what is flown on them: the best few are worth the exchange
        CardLayout best = starts[0].Layout;
        double least = double.PositiveInfinity;
        foreach ((CardLayout layout, double value) in starts.OrderBy(s => s.Value).Take(Tried))
        {
            (CardLayout exchanged, double reached) = Exchange(layout, value, minutes);
            if (reached < least)
                (best, least) = (exchanged, reached);
        }
        return best;
    }

    /// <summary>The same minutes spread evenly over the four powers, with brake steps on the way: what a card of habit looks like.</summary>
    public CardLayout Even(double minutes)
    {
        PowerSetting[] powers = [PowerSetting.Cruise, PowerSetting.Off, PowerSetting.Full, PowerSetting.Idle];
        const double Test = 16;
        ImmutableArray<CardStation> stations = [];
        for (int i = 0; ; i++)
        {
            CardStation next = _machine.HasBrakes && i % 5 == 4
                ? new(CardLegKind.BrakeStep, PowerSetting.Cruise, i % 2 == 0 ? 1 : -1)
                : new(CardLegKind.HandsOff, powers[i % 5 % 4], 0);
            CardLayout layout = Layout(2, Test, stations.Add(next));
            if (layout.Seconds > 60 * minutes)
            {
                // What is left over lengthens the legs, so that the minutes are the same.
                CardLayout full = Layout(2, Test, stations);
                int legs = 2 * stations.Count(s => s.Kind == CardLegKind.HandsOff);
                return full with { TestSec = Test + Math.Floor(Math.Max(0, (60 * minutes) - full.Seconds) / legs) };
            }
            stations = layout.Stations;
        }
    }

    private CardLayout Layout(int runs, double test, ImmutableArray<CardStation> stations) =>
        new() { Runs = runs, TestSec = test, Stations = stations, BallastKg = _options.BallastKg, BallastArmM = _options.BallastArmM };

    private CardLayout Smallest() => Layout(2, 15,
        [new(CardLegKind.HandsOff, PowerSetting.Full, 0), new(CardLegKind.HandsOff, PowerSetting.Cruise, 0), new(CardLegKind.HandsOff, PowerSetting.Idle, 0)]);

    /// <summary>A card with every power once and level flight for the rest; null when that does not fit.</summary>
    private CardLayout? Start(int runs, double test, double minutes)
    {
        var stations = new List<CardStation>
        {
            new(CardLegKind.HandsOff, PowerSetting.Full, 0),
            new(CardLegKind.HandsOff, PowerSetting.Idle, 0),
            new(CardLegKind.HandsOff, PowerSetting.Cruise, 0),
        };
        if (_machine.HasBrakes)
            stations.Add(new(CardLegKind.BrakeStep, PowerSetting.Cruise, 1));
        if (_options.BallastKg > 0 && _machine.HasBrakes)
            stations.Add(new(CardLegKind.Ballast, PowerSetting.Cruise, 1));
        if (Layout(runs, test, [.. stations]).Seconds > 60 * minutes)
            return null;
        while (true)
        {
            CardStation next = new(CardLegKind.HandsOff, stations.Count % 2 == 0 ? PowerSetting.Full : PowerSetting.Cruise, 0);
            List<CardStation> more = [.. stations];
            more.Insert(1 + (stations.Count / 2), next);
            if (Layout(runs, test, [.. more]).Seconds > 60 * minutes)
                return Layout(runs, test, [.. stations]);
            stations = more;
        }
    }

    private IEnumerable<CardStation> Candidates()
    {
        PowerSetting[] powers = _options.EngineOffLegs
            ? [PowerSetting.Off, PowerSetting.Idle, PowerSetting.Cruise, PowerSetting.Full]
            : [PowerSetting.Idle, PowerSetting.Cruise, PowerSetting.Full];
        foreach (PowerSetting power in powers)
            yield return new(CardLegKind.HandsOff, power, 0);
        if (_machine.HasBrakes)
        {
            foreach (int side in (int[])[-1, 1])
            {
                yield return new(CardLegKind.BrakeStep, PowerSetting.Cruise, side);
                yield return new(CardLegKind.Circle, PowerSetting.Cruise, side);
            }
        }
        if (_options.BallastKg > 0 && _machine.HasBrakes)
        {
            yield return new(CardLegKind.Ballast, PowerSetting.Cruise, -1);
            yield return new(CardLegKind.Ballast, PowerSetting.Cruise, 1);
        }
    }

    /// <summary>Exchanges one station at a time for the candidate that lowers the criterion most, until none does.</summary>
    private (CardLayout Layout, double Value) Exchange(CardLayout layout, double value, double minutes)
    {
        const int MostPasses = 4;
        const double WorthIt = 0.995; // less than half a percent is not worth another leg to fly
        CardStation[] candidates = [.. Candidates()];
        for (int pass = 0; pass < MostPasses; pass++)
        {
            bool improved = false;
            for (int i = 0; i < layout.Stations.Length; i++)
            {
                (CardLayout Layout, double Value)? better = null;
                foreach (CardStation candidate in candidates)
                {
                    if (candidate == layout.Stations[i])
                        continue;
                    CardLayout changed = Fill(layout with { Stations = layout.Stations.SetItem(i, candidate) }, minutes);
                    if (!Flyable(changed, minutes))
                        continue;
                    double there = Criterion(changed);
                    if (there < WorthIt * (better?.Value ?? value))
                        better = (changed, there);
                }
                if (better is (CardLayout found, double reached))
                {
                    (layout, value, improved) = (found, reached, true);
                }
            }
            if (!improved)
                break;
        }
        return (layout, value);
    }

    /// <summary>Adds level flight where an exchange for something shorter left room.</summary>
    private static CardLayout Fill(CardLayout layout, double minutes)
    {
        CardLayout more = layout with { Stations = layout.Stations.Add(new(CardLegKind.HandsOff, PowerSetting.Cruise, 0)) };
        return more.Seconds <= 60 * minutes ? more : layout;
    }

    /// <summary>A card keeps idle and full power hands off, or the growth with power rests on the prior; and two opposite brake steps where brakes are
    /// logged (the mirrored run flies the other side), or brake and thrust could not be told apart under a perfect hold.</summary>
    private bool Flyable(CardLayout layout, double minutes)
    {
        bool Has(Func<CardStation, bool> wanted) => layout.Stations.Any(wanted);
        return layout.Seconds <= 60 * minutes
            && Has(s => s.Kind == CardLegKind.HandsOff && s.Power is PowerSetting.Idle or PowerSetting.Off)
            && Has(s => s.Kind == CardLegKind.HandsOff && s.Power == PowerSetting.Full)
            && Has(s => s.Kind == CardLegKind.HandsOff && s.Power == PowerSetting.Cruise)
            && (!_machine.HasBrakes || Has(s => s.Kind is CardLegKind.BrakeStep or CardLegKind.Circle));
    }
}
