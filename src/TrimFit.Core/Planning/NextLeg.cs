using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Planning;

/// <summary>What a leg more would have bought.</summary>
public sealed record NextLeg
{
    /// <summary>What would be flown.</summary>
    public required CardLegKind Kind { get; init; }

    /// <summary>At which power.</summary>
    public required PowerSetting Power { get; init; }

    /// <summary>For how long, s, both ways together.</summary>
    public required double Seconds { get; init; }

    /// <summary>The pull's range after it over the range now; 1 buys nothing.</summary>
    public required double PullFactor { get; init; }

    /// <summary>The same of the shift's range.</summary>
    public required double ShiftFactor { get; init; }

    /// <summary>A leg that narrows the range by less than this is said to add nothing.</summary>
    public const double AddsNothing = 0.01;

    /// <summary>Length of the leg on each of two headings, s.</summary>
    private const double EachWaySec = 20;

    /// <summary>Pause before the added leg, s: long enough that nothing of the turn is carried over.</summary>
    private const double PauseSec = 30;

    /// <summary>Ballast that most fields have at hand, kg and m (common practice, no source).</summary>
    private const double UsualBallastKg = 5, UsualBallastArmM = 0.45;

    /// <summary>Log-sd of the model error of a ballast leg as a source of the sensitivity (model page section 3).</summary>
    private const double ModelErrorLogSd = 0.25;

    /// <summary>Legs that could follow a flight, the most useful for the shift first; empty when the flight has no noise to go by.</summary>
    /// <remarks>The flight's own rows with the rows of the added leg behind them go through the same filter at the noise that was found: the covariance
    /// is that of a flight with that leg. Shift: the delta method with the sensitivity's spread, which only ballast narrows.</remarks>
    public static ImmutableArray<NextLeg> Of(TrimAnalysis analysis)
    {
        ArgumentNullException.ThrowIfNull(analysis);
        TurnSignals signals = analysis.Signals;
        if (analysis.Fit.Noise is not NoiseParameters noise || !signals.HasThrust || signals.Count == 0)
            return [];
        var options = new CardOptions { BalanceThrust = analysis.Options.BalanceThrust };
        CardMachine machine = CardMachine.Of(analysis.Rig, new RigSpread(analysis.Rig), options, PriorFlight.Of(analysis)) with
        {
            Logger = signals.HasBrakes ? CardLogger.Full : signals.HasGyro ? CardLogger.Phone : CardLogger.Gps,
            Noise = noise,
            Balance = analysis.Pull.AtBalance.ThrustFraction,
            FullThrust = signals.FullThrust,
            ThrustBasis = signals.ThrustBasis,
        };
        double slope = analysis.Fit[TurnCoefficient.Thrust]?.Value * signals.FullThrust ?? 0;
        if (CardInformation.Of(signals, noise, slope) is not CardInformation now)
            return [];
        double pull = analysis.Pull.AtBalance.RateRadPerSec ?? machine.PullAt(machine.Balance);
        double sensitivity = analysis.Sensitivity.RadPerSecPerM ?? TrimPosterior.PriorMedian;
        double metres = pull / sensitivity;
        double logSd = analysis.Sensitivity.Interval95 is ConfidenceInterval s && s.Lower > 0 ? Math.Log(s.Upper / s.Lower) / (2 * 1.96) : TrimPosterior.PriorLogSd;
        double sensitivityVariance = sensitivity * sensitivity * logSd * logSd;
        double shiftNow = now.PullVariance(machine.Balance) + (metres * metres * sensitivityVariance);

        var legs = ImmutableArray.CreateBuilder<NextLeg>();
        foreach (PowerSetting power in (PowerSetting[])[PowerSetting.Off, PowerSetting.Idle, PowerSetting.Cruise, PowerSetting.Full])
            Add(CardLegKind.HandsOff, power, EachWaySec);
        if (signals.HasBrakes && signals.BrakeUnit != ControlUnit.Count)
        {
            Add(CardLegKind.BrakeStep, PowerSetting.Cruise, CardLayout.BrakeStepSec);
            Add(CardLegKind.Ballast, PowerSetting.Cruise, EachWaySec);
        }
        return [.. legs.OrderBy(l => l.ShiftFactor).ThenBy(l => l.PullFactor)];

        void Add(CardLegKind kind, PowerSetting power, double seconds)
        {
            var layout = new CardLayout
            {
                Runs = 2,
                TestSec = seconds,
                Stations = [new(kind, power, kind == CardLegKind.HandsOff ? 0 : 1)],
                BallastKg = UsualBallastKg,
                BallastArmM = UsualBallastArmM,
            };
            TurnSignals more = CardFlight.Draw(layout.Legs(), machine, new SeededRandom(analysis.Options.Seed));
            if (CardInformation.Of(Append(signals, more, analysis.Rig), noise, slope) is not CardInformation then)
                return;
            double known = then.CgShiftVariance, ballast = known + (ModelErrorLogSd * ModelErrorLogSd * sensitivity * sensitivity);
            double after = kind == CardLegKind.Ballast && double.IsFinite(known) ? 1 / ((1 / sensitivityVariance) + (1 / ballast)) : sensitivityVariance;
            double shiftThen = then.PullVariance(machine.Balance) + (metres * metres * after);
            legs.Add(new()
            {
                Kind = kind,
                Power = power,
                Seconds = 2 * seconds,
                PullFactor = Math.Sqrt(then.PullVariance(machine.Balance) / now.PullVariance(machine.Balance)),
                ShiftFactor = Math.Sqrt(shiftThen / shiftNow),
            });
        }
    }

    /// <summary>A flight with another behind it, after a pause.</summary>
    private static TurnSignals Append(TurnSignals first, TurnSignals then, Rig rig)
    {
        double brakeUnit = first.BrakeUnit == ControlUnit.Meter ? rig.BrakeFullTravelM ?? 0.6 : 1; // drawn brakes are fractions of the travel
        double later = first.TimeSec[^1] + PauseSec;
        bool shifted = first.CgShiftM.Length > 0 || then.CgShiftM.Length > 0;
        bool rotation = first.RotationRatioSquared.AsSpan().ContainsAnyExcept(0.0);
        double[] Both(double[] a, double[] b, double without) => [.. a.Length > 0 ? a : Filled(first.Count, without), .. b.Length > 0 ? b : Filled(then.Count, without)];
        return new TurnSignals
        {
            TimeSec = [.. first.TimeSec, .. then.TimeSec.Select(t => t + later)],
            Thrust = [.. first.Thrust, .. then.Thrust],
            ThrustBasis = first.ThrustBasis,
            FullThrust = first.FullThrust,
            HasThrust = true,
            BrakeDifference = [.. first.BrakeDifference, .. then.BrakeDifference.Select(b => b * brakeUnit)],
            HasBrakes = first.HasBrakes,
            TrimmerDifference = first.TrimmerDifference.Length > 0 ? [.. first.TrimmerDifference, .. Filled(then.Count, first.TrimmerDifference[^1])] : [],
            CgShiftM = shifted ? Both(first.CgShiftM, then.CgShiftM, 0) : [],
            GyroRadPerSec = first.HasGyro ? Both(first.GyroRadPerSec, then.GyroRadPerSec, double.NaN) : [],
            RotationRatioSquared = [.. first.RotationRatioSquared, .. rotation ? then.RotationRatioSquared : Filled(then.Count, 0)],
            HeadingRad = first.HeadingRad.Length > 0 ? [.. first.HeadingRad, .. Filled(then.Count, double.NaN)] : [],
            VelocityNorth = first.HasVelocity ? [.. first.VelocityNorth, .. then.VelocityNorth] : [],
            VelocityEast = first.HasVelocity ? [.. first.VelocityEast, .. then.VelocityEast] : [],
            Wind = first.Wind,
            Use = [.. first.Use, .. then.Use],
            HandsOff = [.. first.HandsOff, .. then.HandsOff],
            HandsOffDeclared = first.HandsOffDeclared,
            BrakeUnit = first.BrakeUnit,
            Gyro = first.Gyro,
        };
    }

    private static double[] Filled(int count, double value)
    {
        double[] filled = new double[count];
        Array.Fill(filled, value);
        return filled;
    }
}
