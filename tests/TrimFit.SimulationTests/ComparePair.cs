using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Import.Rigs;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>One made-up machine whose flights before and after a change are flown, logged and fitted.</summary>
/// <remarks>The machine is drawn as in <see cref="RandomScenarios"/>, but its sensitivity from the model's own prior, and its torque so that the pull
/// changes with power by a wanted amount. Flight scatter is a constant pull of each flight, normal, 0.3 deg/s.</remarks>
internal sealed class ComparePair
{
    public static readonly double FlightScatterRadPerSec = double.DegreesToRadians(0.3);
    public static readonly TrimOptions Options = new() { Draws = 2000 };

    /// <summary>A sixth of the tolerance: what the card is planned for.</summary>
    public static readonly double WantedStdError = Options.Tolerance.RadPerSec / 6;

    /// <summary>Headings of the card: two last five and a half minutes.</summary>
    public const int Headings = 2;

    private const int MostDraws = 1000, Streams = 32;
    private const double LeastTorqueShare = 0.1; // less would be no propeller to the reader of rig files

    /// <summary>Standard error of the pull at level flight over that of a mean of the slow disturbance, sqrt(2 τ/T) of its size, on this card: most of
    /// it is thrust, brakes and wind that are fitted with it. From 40 flights.</summary>
    private const double CardFactor = 2.0;

    private readonly KeptFits _kept;

    private ComparePair(ulong seed, Scenario machine, KeptFits kept) => (Seed, Machine, _kept) = (seed, machine, kept);

    public ulong Seed { get; }

    /// <summary>The machine, level in no particular way; its pull changes from idle to full power by the wanted amount.</summary>
    public Scenario Machine { get; }

    /// <summary>Draws a machine and air in which the card gives the wanted standard error: planning, turned round so that all cards are equally short.</summary>
    /// <param name="seed">Seed of everything.</param>
    /// <param name="largestRange">Largest change of the pull from idle to full power, rad/s.</param>
    /// <param name="kept">Fits that are kept.</param>
    public static ComparePair Draw(ulong seed, double largestRange, KeptFits kept)
    {
        var random = SeededRandom.ForStream(seed, 501);
        for (int i = 0; i < MostDraws; i++)
        {
            Scenario s = RandomScenarios.Draw((seed * 1000) + (ulong)i, seed % 2 == 0 ? TurnResponse.FirstOrder : TurnResponse.SecondOrder);
            double sensitivity = double.DegreesToRadians(90) * Math.Exp(TrimPosterior.PriorLogSd * random.NextNormal());
            double seconds = TestCards.Alternating(Headings).Sum(l => l.DurationSec), tau = s.Air.DisturbanceTauSec;
            double disturbance = WantedStdError / (CardFactor * Math.Sqrt(2 * tau / seconds)) * (0.7 + (0.3 * random.NextDouble()));
            s = s with { Wing = s.Wing with { SensitivityRadPerSecPerM = sensitivity }, Air = s.Air with { DisturbanceRadPerSec = disturbance } };
            if (WithRange(s, largestRange, random.NextDouble()) is Scenario machine)
                return new(seed, machine, kept);
        }
        throw new InvalidOperationException("no machine with so small a change of its pull was met");
    }

    /// <summary>Standard error of a flight's pull at level flight, rad/s.</summary>
    public static double? Error(ComparedFlight flight) => flight.Analysis.Fit.PullAt(PowerLevels.Of(flight.Analysis.Signals, flight.Analysis.Fit, BalanceThrust.Cruise).Cruise
        * flight.Analysis.Signals.FullThrust) is Estimate e ? e.StandardError : null;

    /// <summary>Pulls at idle, level flight and full power.</summary>
    public static double[] Pulls(Scenario s) => [SteadyTurn.Rate(s, Idle(s)), SteadyTurn.Rate(s, s.LevelThrustN), SteadyTurn.Rate(s, s.Propeller.FullThrustN)];

    /// <summary>The machine with the largest pull at idle, level flight and full power exactly so large, to one side.</summary>
    public static Scenario WithLargestPull(Scenario s, double largest, bool right)
    {
        double[] pulls = Pulls(s);
        return Pulled(s, right ? largest - pulls.Max() : -largest - pulls.Min());
    }

    /// <summary>The machine with the pulls at idle, level flight and full power around zero.</summary>
    public static Scenario Centred(Scenario s)
    {
        double[] pulls = Pulls(s);
        return Pulled(s, -(pulls.Max() + pulls.Min()) / 2);
    }

    public static Scenario Pulled(Scenario s, double more) => s with { Wing = s.Wing with { ConstantPullRadPerSec = s.Wing.ConstantPullRadPerSec + more } };

    /// <summary>Flies the card; null when the machine does not fly so.</summary>
    /// <param name="setup">Word of the setting.</param>
    /// <param name="flown">The machine as it is.</param>
    /// <param name="written">The machine as the rig file has it.</param>
    /// <param name="number">Number of the flight, which makes its air and its scatter.</param>
    /// <param name="scatter">Standard deviation of the flight's own pull, rad/s.</param>
    /// <param name="headings">Headings of the card.</param>
    public ComparedFlight? TryFly(string setup, Scenario flown, Scenario written, int number, double scatter = 0, int headings = Headings)
    {
        ulong seed = (Seed * Streams) + (ulong)number;
        double own = scatter * SeededRandom.ForStream(seed, 502).NextNormal();
        try
        {
            SimulatedFlight flight = FlightSimulator.Fly(Pulled(flown, own) with { Seed = seed, Legs = TestCards.Alternating(headings) });
            Rig rig = RigFileReader.Read("machine.toml", RigText.Write(written));
            TurnSignals signals = TurnSignals.From(flight.Log, rig);
            TurnFit fit = _kept.Get(seed, EnteredWrong.Nothing, () => new FilterErrorEstimator().Estimate(signals));
            return new() { Name = $"{setup} {number}", Setup = setup, Analysis = OnlyFit(signals, fit, rig) };
        }
        catch (SimulationException)
        {
            return null;
        }
    }

    /// <summary>A flight's analysis of which a comparison only takes signals, fit and rig; the rest would take most of the study's time.</summary>
    private static TrimAnalysis OnlyFit(TurnSignals signals, TurnFit fit, Rig rig) => new()
    {
        Rig = rig,
        Options = Options,
        Signals = signals,
        Fit = fit,
        Pull = new() { At = [], AtBalance = new() { Setting = PowerSetting.Cruise, ThrustFraction = 0 }, CruiseBasis = CruiseBasis.Assumed },
        Sensitivity = new() { Sources = [], Conflict = false, EffectiveSamples = 0, YawRatio = 0, YawRatioInterval95 = default },
        RigReport = null!,
        Verdict = new() { Code = VerdictCode.Insufficient, Strength = VerdictStrength.None, TravelGiven = false },
        Assumptions = [],
    };

    private static double Idle(Scenario s) => s.Propeller.Clutch ? 0 : s.Propeller.FullThrustN * s.Propeller.IdleRatio * s.Propeller.IdleRatio;

    /// <summary>The machine with less torque, so that its pull at full power differs from that at idle by no more than wanted; null when it does not even so.</summary>
    private static Scenario? WithRange(Scenario s, double largest, double share)
    {
        double low = LeastTorqueShare * s.Propeller.FullTorqueNm, high = s.Propeller.FullTorqueNm;
        try
        {
            if (Range(low) > largest)
                return null;
            for (int i = 0; i < 30 && Range(high) > largest; i++)
                high = low + (0.8 * (high - low));
            Scenario drawn = With(low + (share * (high - low)));
            return Range(drawn.Propeller.FullTorqueNm) <= largest ? drawn : null;
        }
        catch (SimulationException)
        {
            return null;
        }

        Scenario With(double torque) => s with { Propeller = s.Propeller with { FullTorqueNm = torque } };

        double Range(double torque)
        {
            Scenario x = With(torque);
            double[] pulls = Pulls(x);
            return pulls.Max() - pulls.Min();
        }
    }
}
