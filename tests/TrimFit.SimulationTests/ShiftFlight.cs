using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Core.Units;
using TrimFit.Import.Rigs;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>What is entered the wrong way round.</summary>
internal enum EnteredWrong
{
    Nothing,
    Rotation,
    GyroSign,
    Brakes,
}

/// <summary>One made-up flight from simulator to fit, ready to be asked with several sources of the sensitivity.</summary>
internal sealed class ShiftFlight
{
    /// <summary>The part moved between the flights of a pair, m, and the scatter between them.</summary>
    private const double PairTravelM = 0.020;
    private static readonly AngularRate _pairScatter = AngularRate.FromDegPerSec(0.3);

    private const double BallastKg = 5, BallastArmM = 0.45;
    private static readonly double[] _pairThrusts = [0, 0.5, 1];

    private ShiftFlight(Scenario scenario, FlightTruth truth, Rig rig, TurnSignals signals, TurnFit fit)
    {
        Scenario = scenario;
        Truth = truth;
        Rig = rig;
        Signals = signals;
        Fit = fit;
    }

    public Scenario Scenario { get; }
    public FlightTruth Truth { get; }
    public Rig Rig { get; }
    public TurnSignals Signals { get; }
    public TurnFit Fit { get; }

    /// <summary>Draws a machine (its wing turning so many times as much), flies a short good card with two ballast legs each way, and fits it.</summary>
    public static ShiftFlight Fly(ulong seed, KeptFits kept, EnteredWrong wrong = EnteredWrong.Nothing, double sensitivityFactor = 1)
    {
        Scenario s = RandomScenarios.Draw(seed, seed % 2 == 0 ? TurnResponse.FirstOrder : TurnResponse.SecondOrder);
        s = s with { Legs = Card(), Knowledge = s.Knowledge with { RotationWrong = wrong == EnteredWrong.Rotation } };
        if (sensitivityFactor != 1)
            s = s with { Wing = s.Wing with { SensitivityRadPerSecPerM = sensitivityFactor * s.Wing.SensitivityRadPerSecPerM } };
        SimulatedFlight flight = FlightSimulator.Fly(s);
        Rig rig = RigFileReader.Read("machine.toml", RigText.Write(s));
        FlightLog log = wrong switch
        {
            EnteredWrong.GyroSign => flight.Log.WithChannel(ChannelRole.YawRate, Negated(flight.Log[ChannelRole.YawRate])),
            EnteredWrong.Brakes => flight.Log.WithChannel(ChannelRole.BrakeLeft, flight.Log[ChannelRole.BrakeRight])
                .WithChannel(ChannelRole.BrakeRight, flight.Log[ChannelRole.BrakeLeft]),
            _ => flight.Log,
        };
        ImmutableArray<FoundLeg> legs =
        [
            .. flight.Legs.Where(l => l.Leg.Control == LegControl.Ballast).Select(l => new FoundLeg
            {
                Leg = new()
                {
                    Start = SheetTime.FromSeconds(l.StartSec), End = SheetTime.FromSeconds(l.EndSec), Kind = SheetLegKind.Ballast,
                    BallastKg = l.Leg.BallastKg, BallastArmM = l.Leg.BallastArmM,
                },
                StatedStartSec = l.StartSec, StatedEndSec = l.EndSec, StartSec = l.StartSec, EndSec = l.EndSec,
                StartFoundIn = ChannelRole.Marker, EndFoundIn = ChannelRole.Marker,
            }),
        ];
        TurnSignals signals = TurnSignals.From(log, rig, legs.AsSpan());
        // The rotation is the rig's word: the fit does not know it.
        EnteredWrong fitted = wrong == EnteredWrong.Rotation ? EnteredWrong.Nothing : wrong;
        if (sensitivityFactor != 1) // no other flight of this seed
            return new(s, flight.Truth, rig, signals, new FilterErrorEstimator().Estimate(signals));
        return new(s, flight.Truth, rig, signals, kept.Get(seed, fitted, () => new FilterErrorEstimator().Estimate(signals)));
    }

    /// <summary>The posterior with some of the sources.</summary>
    public TrimPosterior Posterior(SensitivitySources sources, TrimOptions options) =>
        TrimPosterior.Draw(Rig, new RigSpread(Rig), Fit, Signals, options, sources);

    /// <summary>Another flight with both riser carabiners moved: its fit is the simulator's truth for the moved machine with this fit's own
    /// covariance and a scatter from flight to flight; flying it too would double the study's time.</summary>
    public KnownChange? Pair(double travelM = PairTravelM)
    {
        if (Fit[TurnCoefficient.Thrust] is null)
            return null;
        var random = SeededRandom.ForStream(Scenario.Seed, 77);
        Scenario moved = Scenario.WithCarabinerPair(travelM);
        double full = Scenario.Propeller.FullThrustN;
        double off = SteadyTurn.Rate(moved, 0), half = SteadyTurn.Rate(moved, full / 2), most = SteadyTurn.Rate(moved, full);
        double[] truth = [off, ((4 * half) - (3 * off) - most) / full, 2 * (most + off - (2 * half)) / (full * full)];
        // The second fit would shrink its curve as this one did: mean of the truth under the same information and prior.
        int n = Fit.Coefficients.Length;
        double square = full * full;
        double priorSd = new FilterErrorOptions().CurvaturePriorSd(truth[1] * full, Fit.Covariance[n + 1] * square) / square;
        double pulled = Math.Min(1 / (priorSd * priorSd), 1 / Fit.Covariance[(2 * n) + 2]) * truth[2];
        for (int i = 0; i < 3; i++)
            truth[i] -= Fit.Covariance[(i * n) + 2] * pulled;
        double[] error = CorrelatedNormals(random);
        error[0] += _pairScatter.RadPerSec * random.NextNormal();
        TurnFit other = Fit with
        {
            Coefficients = [.. Fit.Coefficients.Select((c, i) => i < 3 && c.Estimate is Estimate e ? c with { Estimate = e with { Value = truth[i] + error[i] } } : c)],
        };
        Adjustment carabiners = Adjustment.All.Single(a => a.Kind == AdjustmentKind.CarabinerPair);
        return KnownChange.Of(other, Signals.FullThrust, rig => carabiners.Move!(rig, travelM), _pairScatter, _pairThrusts);
    }

    /// <summary>Three errors with the fit's covariance, by its Cholesky factor.</summary>
    private double[] CorrelatedNormals(SeededRandom random)
    {
        int n = Fit.Coefficients.Length;
        double[] factor = new double[9], result = new double[3], z = [random.NextNormal(), random.NextNormal(), random.NextNormal()];
        for (int i = 0; i < 3; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                double sum = Fit.Covariance[(i * n) + j];
                for (int k = 0; k < j; k++)
                    sum -= factor[(i * 3) + k] * factor[(j * 3) + k];
                factor[(i * 3) + j] = i == j ? Math.Sqrt(Math.Max(0, sum)) : factor[(j * 3) + j] > 0 ? sum / factor[(j * 3) + j] : 0;
            }
            for (int j = 0; j <= i; j++)
                result[i] += factor[(i * 3) + j] * z[j];
        }
        return result;
    }

    private static ImmutableArray<FlightLeg> Card()
    {
        var legs = ImmutableArray.CreateBuilder<FlightLeg>();
        legs.AddRange(TestCards.Alternating(headings: 2));
        foreach (double side in (ReadOnlySpan<double>)[1, -1, -1, 1])
        {
            legs.Add(new() { DurationSec = 20, Control = LegControl.Ballast, BallastKg = BallastKg, BallastArmM = side * BallastArmM });
            legs.Add(new() { DurationSec = 8, Control = LegControl.HoldHeading });
        }
        return legs.ToImmutable();
    }

    private static double[] Negated(ReadOnlySpan<double> column)
    {
        double[] result = column.ToArray();
        for (int i = 0; i < result.Length; i++)
            result[i] = -result[i];
        return result;
    }
}
