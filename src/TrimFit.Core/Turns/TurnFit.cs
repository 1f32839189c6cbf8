using System.Collections.Immutable;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>What any turn estimator reports: how the turn rate follows thrust and brakes, with everything needed to doubt it.</summary>
public sealed record TurnFit
{
    /// <summary>Name of the method: <c>filter_error</c> or <c>steady_windows</c>.</summary>
    public required string Method { get; init; }

    /// <summary>Whether thrust is in newtons or relative to full thrust.</summary>
    public required ThrustBasis ThrustBasis { get; init; }

    /// <summary>Coefficients in the order constant, thrust, thrust_squared, brake_difference, trimmer_difference; those the flight cannot
    /// give have a null estimate and a reason. Units: rad/s; rad/s per N (or per full thrust); …; rad/s per brake unit as logged.</summary>
    public required ImmutableArray<TurnCoefficient> Coefficients { get; init; }

    /// <summary>Covariance of the coefficients, row by row, in the order of <see cref="Coefficients"/>; rows of missing ones are 0.</summary>
    public required ImmutableArray<double> Covariance { get; init; }

    /// <summary>Degrees of freedom of the t distribution behind the intervals.</summary>
    public required double DegreesOfFreedom { get; init; }

    /// <summary>Lag of the turn behind its cause, s; null when not estimated.</summary>
    public double? LagSec { get; init; }

    /// <summary>Whether the wing was taken to answer with second order (it can swing) rather than first; null when not estimated.</summary>
    public bool? ResponseIsSecondOrder { get; init; }

    /// <summary>Brake difference below which nothing happens, in the unit of the brakes as logged; <c>brake_difference</c> then holds beyond it.
    /// Null when the flight shows none.</summary>
    public double? BrakeDeadBand { get; init; }

    /// <summary>Share of the brake's variance, hands on, that answers to the turn just before it (a pilot holding course): 0 to 1. Near 1 the
    /// brake coefficient leans on the disturbance model. Null without brakes.</summary>
    public double? BrakeFeedbackShare { get; init; }

    /// <summary>Root mean square of the slow disturbance, rad/s; null when not estimated.</summary>
    public double? DisturbanceRmsRadPerSec { get; init; }

    /// <summary>Correlation time of the slow disturbance, s; null when not estimated.</summary>
    public double? DisturbanceTauSec { get; init; }

    /// <summary>Time constants and noise levels found, of rows as the estimator averaged them; null for a method without them. A test card is
    /// planned from the last flight's.</summary>
    public FilterError.NoiseParameters? Noise { get; init; }

    /// <summary>Gyro rows a second of used flight; 0 without a gyro.</summary>
    public double GyroRowsPerSec { get; init; }

    /// <summary>Rows with an air heading from GPS a second of used flight; 0 without GPS.</summary>
    public double HeadingRowsPerSec { get; init; }

    /// <summary>Independent observations the data are worth.</summary>
    public required double EffectiveSamples { get; init; }

    /// <summary>Condition number of the scaled design; infinite ones are reported as null in JSON.</summary>
    public required double Condition { get; init; }

    /// <summary>Gyro bias found with the turn, rad/s; null without a gyro.</summary>
    public Estimate? GyroBiasRadPerSec { get; init; }

    /// <summary>How the search ended; null for a method without one.</summary>
    public Convergence? Convergence { get; init; }

    /// <summary>Points to draw: mean turn rate against thrust, brakes taken out.</summary>
    public ImmutableArray<TurnPoint> Points { get; init; } = [];

    /// <summary>Spans left out and why.</summary>
    public ImmutableArray<SpanLeftOut> SpansLeftOut { get; init; } = [];

    /// <summary>Things the fit wants said.</summary>
    public ImmutableArray<Analysis.Finding> Notices { get; init; } = [];

    /// <summary>The coefficient of a name, or null when the flight could not give it.</summary>
    public Estimate? this[string name]
    {
        get
        {
            foreach (TurnCoefficient c in Coefficients)
            {
                if (c.Name == name)
                    return c.Estimate;
            }
            return null;
        }
    }

    /// <summary>Turn rate at a thrust with brakes even, and its standard error, rad/s; null when a needed coefficient is missing.</summary>
    /// <param name="thrust">N, or fraction of full thrust, as <see cref="ThrustBasis"/> says.</param>
    public Estimate? PullAt(double thrust)
    {
        int n = Coefficients.Length;
        Span<double> x = stackalloc double[n];
        double value = 0;
        for (int i = 0; i < n; i++)
        {
            x[i] = Coefficients[i].Name switch
            {
                TurnCoefficient.Constant => 1,
                TurnCoefficient.Thrust => thrust,
                TurnCoefficient.ThrustSquared => thrust * thrust,
                _ => 0,
            };
            if (Coefficients[i].Estimate is Estimate e)
                value += x[i] * e.Value;
            else if (x[i] != 0 && Coefficients[i].Name != TurnCoefficient.ThrustSquared) // a curvature that is not estimated is taken as none
                return null;
        }
        double variance = 0;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
                variance += x[i] * Covariance[(i * n) + j] * x[j];
        }
        return new Estimate(value, Math.Sqrt(Math.Max(0, variance)));
    }
}

/// <summary>One coefficient of the turn model.</summary>
/// <param name="Name">One of the names below.</param>
/// <param name="Estimate">Value and standard error; null when the flight cannot give it.</param>
/// <param name="Reason">Why it is missing, or empty.</param>
public sealed record TurnCoefficient(string Name, Estimate? Estimate, string Reason)
{
    /// <summary>Turn rate without thrust, brakes even.</summary>
    public const string Constant = "constant";
    /// <summary>Growth with thrust.</summary>
    public const string Thrust = "thrust";
    /// <summary>Curvature over thrust.</summary>
    public const string ThrustSquared = "thrust_squared";
    /// <summary>Turn rate per right-minus-left brake.</summary>
    public const string BrakeDifference = "brake_difference";
    /// <summary>Turn rate per right-minus-left trimmer.</summary>
    public const string TrimmerDifference = "trimmer_difference";
    /// <summary>Turn rate per known shift of the suspended CG on ballast and weight-shift legs, (rad/s)/m.</summary>
    public const string CgShift = "cg_shift";
}

/// <summary>Unit of thrust in a fit.</summary>
public enum ThrustBasis
{
    /// <summary>Newtons.</summary>
    Newton,
    /// <summary>Fraction of full thrust.</summary>
    Relative,
}

/// <summary>A point of the turn-rate-against-thrust picture.</summary>
/// <param name="StartSec">Start of the window it stands for.</param>
/// <param name="EndSec">End of the window.</param>
/// <param name="Thrust">Mean thrust in the fit's basis.</param>
/// <param name="TurnRateRadPerSec">Mean turn rate, brake and trimmer part taken out.</param>
/// <param name="HandsOff">Whether the brakes were let go.</param>
public sealed record TurnPoint(double StartSec, double EndSec, double Thrust, double TurnRateRadPerSec, bool HandsOff);

/// <summary>A span of the flight the estimator did not use.</summary>
/// <param name="StartSec">Start, s.</param>
/// <param name="EndSec">End, s.</param>
/// <param name="Reason">Why, in words.</param>
public sealed record SpanLeftOut(double StartSec, double EndSec, string Reason);
