using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>The thrusts at which pulls are stated, as fractions of full.</summary>
internal sealed record PowerLevels
{
    public required double Idle { get; init; }
    public required double Cruise { get; init; }
    public required double CruiseStdError { get; init; }
    public required CruiseBasis CruiseBasis { get; init; }
    public required double Balance { get; init; }
    public required double BalanceStdError { get; init; }
    public required PowerSetting BalanceSetting { get; init; }
    /// <summary>Range flown with steady power.</summary>
    public required double FlownLow { get; init; }
    public required double FlownHigh { get; init; }

    /// <summary>Flown thrust may be left by this share of full before an answer there is refused (model page section 2).</summary>
    public const double Beyond = 0.10;

    private const double HighestIdle = 0.15, RunningShare = 0.005;

    public bool BalanceFlown => Balance >= FlownLow - Beyond && Balance <= FlownHigh + Beyond;

    public static PowerLevels Of(TurnSignals signals, TurnFit fit, BalanceThrust wanted)
    {
        double full = signals.FullThrust;
        double[] used = [.. signals.Thrust.Where((_, i) => signals.Use[i]).Select(t => t / full)];
        double[] running = [.. used.Where(t => t > RunningShare)];
        double idle = running.Length > 0 ? QuantileType7.Of(running, 0.02) : RigReporter.AssumedIdleFraction;
        if (idle > HighestIdle)
            idle = RigReporter.AssumedIdleFraction; // idle was not flown
        Estimate? level = CruiseThrust.Find(signals);
        double cruise = level?.Value ?? RigReporter.AssumedCruiseFraction;
        double cruiseError = level?.StandardError ?? 0;
        (double low, double high) = fit.Points.IsEmpty
            ? used.Length > 0 ? (QuantileType7.Of(used, 0.02), QuantileType7.Of(used, 0.98)) : (0, 0)
            : (fit.Points.Min(p => p.Thrust) / full, fit.Points.Max(p => p.Thrust) / full);
        (double balance, double balanceError, PowerSetting setting) = wanted.Kind switch
        {
            BalanceThrustKind.Full => (1.0, 0.0, PowerSetting.Full),
            BalanceThrustKind.Newtons when signals.ThrustBasis == ThrustBasis.Newton => (wanted.Newtons / full, 0.0, PowerSetting.Cruise),
            BalanceThrustKind.Even => (EvenThrust(fit, full, idle), 0.0, PowerSetting.Cruise),
            _ => (cruise, cruiseError, PowerSetting.Cruise),
        };
        return new PowerLevels
        {
            Idle = idle,
            Cruise = cruise,
            CruiseStdError = cruiseError,
            CruiseBasis = level is null ? CruiseBasis.Assumed : CruiseBasis.ZeroClimb,
            Balance = balance,
            BalanceStdError = balanceError,
            BalanceSetting = setting,
            FlownLow = low,
            FlownHigh = high,
        };
    }

    /// <summary>The thrust whose turn, once nulled, leaves the smallest worst turn between idle and full.</summary>
    /// <remarks>A shift adds the same turn at every power to first order, so the best one takes the middle of the range of turns away.</remarks>
    private static double EvenThrust(TurnFit fit, double full, double idle)
    {
        const int Steps = 200;
        double lowest = double.PositiveInfinity, highest = double.NegativeInfinity;
        Span<double> rates = stackalloc double[Steps + 1];
        for (int i = 0; i <= Steps; i++)
        {
            double x = idle + ((1 - idle) * i / Steps);
            rates[i] = fit.PullAt(x * full)?.Value ?? 0;
            lowest = Math.Min(lowest, rates[i]);
            highest = Math.Max(highest, rates[i]);
        }
        double middle = (lowest + highest) / 2;
        int best = 0;
        for (int i = 1; i <= Steps; i++)
        {
            if (Math.Abs(rates[i] - middle) < Math.Abs(rates[best] - middle))
                best = i;
        }
        return idle + ((1 - idle) * best / Steps);
    }
}
