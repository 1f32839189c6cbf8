using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using static System.FormattableString;

namespace TrimFit.Core.Turns.FilterError;

/// <summary>The main estimator: filter-error maximum likelihood for the turn model.</summary>
/// <remarks>
/// <para>dr/dt = (u + w − r)/τ, or second order; u = c₀ + c_T T + c_TT T² + c_B (brake right − left); w a first-order Markov disturbance;
/// gyro = r + bias + vibration offset + frame twist + white; air heading = ψ + coloured gust error + wind error + white. Everything linear is
/// solved exactly by the augmented filter (de Jong 1991) with its priors; time constants and noise levels by maximum likelihood with weak
/// priors; the order of the response by AICc. (Klein and Morelli 2006, "Aircraft System Identification", ch. 6, for the filter-error method.)</para>
/// <para>The covariance holds the uncertainty of the noise parameters, and is raised to that of a sandwich over blocks wherever that one is
/// larger. How well the intervals cover is in DEVELOPERS.md, "Coverage".</para>
/// </remarks>
public sealed class FilterErrorEstimator : ITurnEstimator
{
    /// <summary>Name of the method in results.</summary>
    public const string MethodName = "filter_error";

    private const double LeastThrustRange = 0.05; // of full thrust, between the 5 % and 95 % quantiles: less shows no growth with power
    private const double NotableOutliers = 0.01; // share of measurements; clean ones give 0.0005
    private const double DeadBandGain = 10; // of log-likelihood: far beyond what one more parameter gives by chance
    private const double DecidedBy = 8; // of log-likelihood: one order is e^8 times as likely as the other
    private const double CollinearInflation = 100; // variance inflation: the standard error is ten times what separate inputs would give

    private const double CoarseRows = 2;
    private const double LeastSaving = 0.7; // of the rows: less saved is not worth a second preparation
    private const double NoGain = 1e-7; // rad/s: a prior that holds a gain at nothing
    private const double DoubtedPart = 0.5; // of the correction: its gains are constants here, while the state's uncertainty changes along a flight
    private readonly FilterErrorOptions _options;

    /// <summary>Makes an estimator with the given choices.</summary>
    public FilterErrorEstimator(FilterErrorOptions? options = null) => _options = options ?? new();

    /// <inheritdoc/>
    /// <exception cref="ArgumentNullException">No signals.</exception>
    public TurnFit Estimate(TurnSignals signals)
    {
        ArgumentNullException.ThrowIfNull(signals);
        return Fit(signals, null);
    }

    /// <summary>The same likelihood with noise levels, their time constants and the order of the response known, as a yardstick for what
    /// finding them costs. The wing's own time constants are estimated here too: they belong to the turn, not to the noise.</summary>
    /// <param name="signals">The flight.</param>
    /// <param name="perSample">Time constants and noise levels; white noise of one sample, before averaging in blocks.</param>
    internal TurnFit EstimateWith(TurnSignals signals, NoiseParameters perSample) => Fit(signals, perSample);

    private TurnFit Fit(TurnSignals signals, NoiseParameters? known)
    {
        if (signals.Count == 0 || !signals.Use.AsSpan().Contains(true))
            return Nothing(signals, "no part of the flight is usable");
        bool thrustMoves = ThrustMoves(signals, out double lowThrust, out double highThrust);
        FlightColumns? flight = FlightPreparation.Prepare(signals, _options, thrustMoves, out string reason);
        if (flight is null)
            return Nothing(signals, reason);

        var filter = new AugmentedFilter(flight);
        Chosen chosen = known is null ? Search(flight, filter, Coarse(signals, flight, thrustMoves)) : Evaluate(flight, filter, known);
        return Report(signals, flight, filter, chosen, thrustMoves, lowThrust, highThrust);
    }

    /// <summary>A fitted model: the search's result, or known noise without one.</summary>
    private sealed record Chosen(NoiseParameters Noise, SearchResult? Result, int Evaluations, double DeadBand);

    private Chosen Evaluate(FlightColumns flight, AugmentedFilter filter, NoiseParameters perSample)
    {
        NoiseParameters noise = perSample with
        {
            GyroNoise = perSample.GyroNoise / Math.Sqrt(flight.GyroSamplesPerRow),
            HeadingNoise = perSample.HeadingNoise / Math.Sqrt(flight.HeadingSamplesPerRow),
        };
        ParameterLayout layout = ParameterLayout.ResponseOnly(noise);
        var search = new NoiseSearch(filter, layout, flight.Measurements, flight.Coefficients);
        double[] theta = layout.ToVector(noise);
        SearchResult result = search.From(theta, _options.MostIterations);
        for (int round = 0; round < 2; round++) // the curvature's prior follows the slope
        {
            SetCurvaturePrior(flight, filter);
            result = search.From(result.Theta, _options.MostIterations);
        }
        return new(result.Noise, result, result.Evaluations, 0);
    }

    /// <summary>The same flight in rows of twice the length, on which the time constants and noise levels are found at half the work; they are then
    /// settled on the flight itself. Null where rows are not averaged.</summary>
    private FlightColumns? Coarse(TurnSignals signals, FlightColumns flight, bool thrustMoves)
    {
        if (!(_options.BlockSec > 0))
            return null;
        FlightColumns? coarse = FlightPreparation.Prepare(signals, _options with { BlockSec = CoarseRows * _options.BlockSec }, thrustMoves, out _);
        return coarse is not null && coarse.Kinds.AsSpan().SequenceEqual(flight.Kinds) && coarse.Count < LeastSaving * flight.Count ? coarse : null;
    }

    private Chosen Search(FlightColumns flight, AugmentedFilter filter, FlightColumns? coarse)
    {
        (ParameterLayout layout, double[] theta, int evaluations) = coarse is null ? FindOrder(flight, filter) : FindOrder(coarse, new AugmentedFilter(coarse));
        var search = new NoiseSearch(filter, layout, flight.Measurements, flight.Coefficients);
        if (coarse is not null)
        {
            // White noise of a mean goes with the root of the samples in it.
            NoiseParameters found = layout.FromVector(theta);
            theta = layout.ToVector(found with
            {
                GyroNoise = found.GyroNoise * Math.Sqrt(coarse.GyroSamplesPerRow / flight.GyroSamplesPerRow),
                HeadingNoise = found.HeadingNoise * Math.Sqrt(coarse.HeadingSamplesPerRow / flight.HeadingSamplesPerRow),
            });
            layout.Clamp(theta);
        }
        filter.Run(layout.FromVector(theta));
        SetCurvaturePrior(flight, filter);
        filter.RunRobust(layout.FromVector(theta), _options.OutlierLimit);
        double deadBand = FindDeadBand(flight, search, theta, ref evaluations);
        // Always searched last, so that the filter holds the chosen model's run.
        SearchResult chosen = search.From(theta, _options.MostIterations);
        return new(chosen.Noise, chosen, evaluations + chosen.Evaluations + 2, deadBand);
    }

    /// <summary>Finds the order of the response, time constants and noise levels, roughly.</summary>
    private (ParameterLayout Layout, double[] Theta, int Evaluations) FindOrder(FlightColumns flight, AugmentedFilter filter)
    {
        ParameterLayout firstLayout = new(ResponseOrder.First, flight.HasGyro, flight.HasHeading, flight.HasCompass);
        var first = new NoiseSearch(filter, firstLayout, flight.Measurements, flight.Coefficients);
        int evaluations = 0;

        // Coarse starts: the likelihood has a ridge between a quick wing with slow air and the other way round.
        double[] best = [];
        double bestValue = double.PositiveInfinity;
        foreach (double lag in (ReadOnlySpan<double>)[0.8, 2.2])
        {
            foreach (double tau in (ReadOnlySpan<double>)[3, 14])
            {
                foreach (double level in (ReadOnlySpan<double>)[0.7, 2.5])
                {
                    double[] theta = firstLayout.ToVector(new()
                    {
                        Order = ResponseOrder.First,
                        LagSec = lag,
                        DisturbanceTauSec = tau,
                        DisturbanceRms = double.DegreesToRadians(level),
                        QuickDisturbance = double.DegreesToRadians(0.3 * level),
                        GyroNoise = double.DegreesToRadians(0.4 * level),
                    });
                    double value = first.Evaluate(theta);
                    evaluations++;
                    if (value < bestValue)
                    {
                        bestValue = value;
                        best = theta;
                    }
                }
            }
        }
        if (best.Length == 0)
            best = firstLayout.ToVector(new() { Order = ResponseOrder.First, DisturbanceRms = 0.03, DisturbanceTauSec = 8, QuickDisturbance = 0.005 });

        // Gross errors (a gyro spike of 100 deg/s) would otherwise set the noise level of the first search.
        first.Evaluate(best);
        filter.RunRobust(firstLayout.FromVector(best), 3 * _options.OutlierLimit);
        SearchResult one = first.From(best, _options.MostIterations, NoiseSearch.Coarse);
        SetCurvaturePrior(flight, filter);
        filter.RunRobust(one.Noise, _options.OutlierLimit);
        evaluations += one.Evaluations + 3;
        one = first.From(one.Theta, _options.MostIterations, NoiseSearch.Rough);
        evaluations += one.Evaluations;

        ParameterLayout secondLayout = new(ResponseOrder.Second, flight.HasGyro, flight.HasHeading, flight.HasCompass);
        var second = new NoiseSearch(filter, secondLayout, flight.Measurements, flight.Coefficients);
        SearchResult? two = null;
        foreach (double damping in (ReadOnlySpan<double>)[0.6, 1.0])
        {
            // A well damped second start, where the first did not decide between the orders.
            if (two is { Convergence.Converged: true } && Math.Abs(one.Objective - two.Objective) > DecidedBy)
                break;
            NoiseParameters start = one.Noise with
            {
                Order = ResponseOrder.Second,
                Damping = damping,
                NaturalFrequency = Math.Clamp(2 * damping / one.Noise.LagSec, 0.5, 2.5),
            };
            SearchResult candidate = second.From(secondLayout.ToVector(start), _options.MostIterations, NoiseSearch.Rough);
            evaluations += candidate.Evaluations;
            if (two is null || candidate.Objective < two.Objective)
                two = candidate;
        }
        // Both orders are compared on the same weights of measurements and the same prior of the curvature.
        double gain = Aicc(one, firstLayout.Count, flight.Measurements) - Aicc(two!, secondLayout.Count, flight.Measurements);
        bool takeSecond = gain > 0;
        return takeSecond ? (secondLayout, two!.Theta, evaluations) : (firstLayout, one.Theta, evaluations);
    }

    /// <summary>Looks for a dead band of the brakes and puts it into the inputs when the flight asks for it clearly.</summary>
    /// <remarks>Published turn rates over brake are flat near zero (the slack of the brake lines). The width is profiled over shares of the
    /// largest brake difference; the noise parameters are held meanwhile, and searched anew with the width that is taken.</remarks>
    /// <returns>Half-width in the unit of the brakes as logged; 0 when there is none.</returns>
    private static double FindDeadBand(FlightColumns flight, NoiseSearch search, double[] theta, ref int evaluations)
    {
        double[] brakes = flight.BrakeColumn();
        if (brakes.Length == 0)
            return 0;
        double largest = brakes.Max(Math.Abs);
        double without = search.Evaluate(theta), best = without, width = 0;
        foreach (double coarse in (ReadOnlySpan<double>)[0.1, 0.2, 0.3, 0.4])
            Try(coarse * largest, ref evaluations);
        if (without - best > DeadBandGain)
        {
            for (double step = 0.05 * largest; step > 0.01 * largest; step /= 2)
            {
                double centre = width;
                Try(centre - step, ref evaluations);
                Try(centre + step, ref evaluations);
            }
        }
        else
        {
            width = 0;
        }
        flight.SetBrakes(brakes, width);
        search.Evaluate(theta);
        evaluations++;
        return width * flight.Scale[flight.IndexOf(ColumnKind.Brake)];

        void Try(double candidate, ref int count)
        {
            flight.SetBrakes(brakes, candidate);
            double value = search.Evaluate(theta);
            count++;
            if (value < best)
                (best, width) = (value, candidate);
        }
    }

    private static double Aicc(SearchResult result, int parameters, int measurements) =>
        (2 * result.Objective) + (2 * parameters) + (2.0 * parameters * (parameters + 1) / Math.Max(1, measurements - parameters - 1));

    /// <summary>Sets the curvature's prior by the slope found so far.</summary>
    private void SetCurvaturePrior(FlightColumns flight, AugmentedFilter filter)
    {
        int slope = flight.IndexOf(ColumnKind.Thrust), curvature = flight.IndexOf(ColumnKind.ThrustSquared);
        if (slope < 0 || curvature < 0)
            return;
        double[] covariance = filter.ConditionalCovariance();
        filter.SetPriorSd(curvature, _options.CurvaturePriorSd(filter.Coefficients[slope], covariance[(slope * flight.Coefficients) + slope]));
    }

    private static bool ThrustMoves(TurnSignals s, out double low, out double high)
    {
        low = high = 0;
        if (!s.HasThrust)
            return false;
        var used = new List<double>(s.Count);
        for (int i = 0; i < s.Count; i++)
        {
            if (s.Use[i])
                used.Add(s.Thrust[i]);
        }
        used.Sort();
        low = used[(int)(0.05 * (used.Count - 1))];
        high = used[(int)(0.95 * (used.Count - 1))];
        double full = s.FullThrust > 0 ? s.FullThrust : 1;
        return high - low >= LeastThrustRange * full;
    }

    private static TurnFit Report(TurnSignals signals, FlightColumns flight, AugmentedFilter filter, Chosen chosen, bool thrustMoves, double lowThrust, double highThrust)
    {
        int k = flight.Coefficients;
        double meanThrust = MeanThrust(flight);
        double[] doubt = SurpriseShift(flight, filter, chosen.Noise);
        FitCovariance covariance = FitCovariance.Of(flight, filter, chosen.Result, chosen.Noise.DisturbanceRms, meanThrust, doubt);
        NoiseParameters noise = chosen.Noise;
        var notices = new List<Finding>();

        int constant = flight.IndexOf(ColumnKind.Constant);
        int slope = flight.IndexOf(ColumnKind.Thrust), curvature = flight.IndexOf(ColumnKind.ThrustSquared);
        int brake = flight.IndexOf(ColumnKind.Brake), trimmer = flight.IndexOf(ColumnKind.Trimmer);
        bool biasHidden = flight.HasGyro && !flight.HasHeading && !flight.HasCompass && flight.IndexOf(ColumnKind.GyroBias) < 0;

        string thrustReason = thrustMoves ? ""
            : !signals.HasThrust ? "the log says nothing about thrust"
            : signals.ThrustBasis == ThrustBasis.Newton
                ? Invariant($"thrust stayed between {lowThrust:F0} and {highThrust:F0} N")
                : Invariant($"thrust stayed between {100 * lowThrust:F0} and {100 * highThrust:F0} % of full");
        string constantReason = biasHidden ? "the gyro's own bias cannot be told from a constant pull without GPS, compass or a spell of standing still"
            : !thrustMoves && signals.HasThrust ? "cannot be told from the growth with thrust: " + thrustReason
            : "";
        string brakeReason = brake >= 0 ? "" : signals.HasBrakes ? "the brakes were never used" : "no brakes or steering channel logged";
        if (brake >= 0)
        {
            double inflation = covariance.Inflation[brake];
            if (inflation > CollinearInflation)
            {
                notices.Add(Finding.Of(FindingCode.BrakesCollinear, Math.Sqrt(1 - (1 / inflation))));
            }
        }
        var names = new List<(string Name, int Column, string Reason)>
        {
            (TurnCoefficient.Constant, constant, constantReason),
            (TurnCoefficient.Thrust, slope, thrustReason),
            (TurnCoefficient.ThrustSquared, curvature, thrustReason),
            (TurnCoefficient.BrakeDifference, brake, brakeReason),
        };
        if (signals.TrimmerDifference.Length > 0)
            names.Add((TurnCoefficient.TrimmerDifference, trimmer, trimmer >= 0 ? "" : "the trimmers were not moved against each other"));
        if (signals.CgShiftM.Length > 0)
        {
            int shift = flight.IndexOf(ColumnKind.CgShift);
            names.Add((TurnCoefficient.CgShift, shift, shift >= 0 ? "" : "nothing of the ballast or weight-shift legs is usable"));
        }

        int count = names.Count;
        var coefficients = ImmutableArray.CreateBuilder<TurnCoefficient>(count);
        double[] matrix = new double[count * count];
        for (int i = 0; i < count; i++)
        {
            int a = names[i].Column;
            if (a < 0 || names[i].Reason.Length > 0)
            {
                coefficients.Add(new(names[i].Name, null, names[i].Reason));
                continue;
            }
            double se = Math.Sqrt(covariance.Matrix[(a * k) + a]) / flight.Scale[a];
            coefficients.Add(new(names[i].Name, new Estimate(filter.Coefficients[a] / flight.Scale[a], se), ""));
            for (int j = 0; j < count; j++)
            {
                int b = names[j].Column;
                if (b >= 0 && names[j].Reason.Length == 0)
                    matrix[(i * count) + j] = covariance.Matrix[(a * k) + b] / (flight.Scale[a] * flight.Scale[b]);
            }
        }

        Estimate? gyroBias = null;
        int bias = flight.IndexOf(ColumnKind.GyroBias);
        if (bias >= 0)
            gyroBias = new Estimate(filter.Coefficients[bias] + flight.GyroBiasTaken, Math.Sqrt(covariance.Matrix[(bias * k) + bias]));
        if (biasHidden)
            notices.Add(Finding.Of(FindingCode.GyroBiasUnknown));
        if (!thrustMoves)
        {
            notices.Add(signals.HasThrust
                ? Finding.Of(FindingCode.ThrustRangeTooSmall, lowThrust / signals.FullThrust, highThrust / signals.FullThrust)
                : Finding.Of(FindingCode.NoThrust));
        }
        if (!signals.HasBrakes && !signals.HandsOffDeclared)
            notices.Add(Finding.Of(FindingCode.NoSteeringNoHandsOff));
        if (chosen.Result is { Convergence.Converged: false })
            notices.Add(Finding.Of(FindingCode.TurnSearchNotSettled, chosen.Result.Convergence.Iterations));
        int outliers = filter.ExtraVariance.Count(v => v > 0);
        if (outliers > NotableOutliers * flight.Measurements)
            notices.Add(Finding.Of(FindingCode.TurnOutliers, outliers, flight.Measurements));

        return new TurnFit
        {
            Method = MethodName,
            ThrustBasis = signals.ThrustBasis,
            Coefficients = coefficients.MoveToImmutable(),
            Covariance = ImmutableArray.Create(matrix),
            DegreesOfFreedom = covariance.DegreesOfFreedom,
            LagSec = noise.SteadyLagSec,
            ResponseIsSecondOrder = noise.Order == ResponseOrder.Second,
            BrakeDeadBand = chosen.DeadBand > 0 ? chosen.DeadBand : null,
            BrakeFeedbackShare = BrakeFeedback.Share(flight),
            DisturbanceRmsRadPerSec = noise.DisturbanceRms,
            DisturbanceTauSec = noise.DisturbanceTauSec,
            Noise = noise,
            GyroRowsPerSec = RowsPerSec(flight, FlightColumns.Gyro),
            HeadingRowsPerSec = RowsPerSec(flight, FlightColumns.Heading),
            EffectiveSamples = covariance.EffectiveSamples,
            Condition = covariance.Condition,
            GyroBiasRadPerSec = gyroBias,
            Convergence = chosen.Result?.Convergence,
            Points = TurnPoints.Of(signals, flight, filter),
            SpansLeftOut = signals.SpansLeftOut,
            Notices = [.. notices],
        };
    }

    /// <summary>How far the gains of the brake's surprise move the coefficients, times the part of it that is doubted; empty without them.</summary>
    private static double[] SurpriseShift(FlightColumns flight, AugmentedFilter filter, NoiseParameters noise)
    {
        int first = flight.IndexOf(ColumnKind.RateSurprise);
        if (first < 0 || flight.Surprise.Length == 0)
            return [];
        double[] with = [.. filter.Coefficients];
        for (int j = first; j < first + 3; j++)
            filter.SetPriorSd(j, NoGain);
        filter.Run(noise);
        double[] shift = [.. with.Zip(filter.Coefficients, (a, b) => DoubtedPart * (a - b))];
        for (int j = first; j < first + 3; j++)
            filter.SetPriorSd(j, flight.PriorSd[j]);
        filter.Run(noise);
        return shift;
    }

    private static double RowsPerSec(FlightColumns flight, byte flag) =>
        flight.UsedSec > 0 ? flight.Flags.Count(f => (f & flag) != 0) / flight.UsedSec : 0;

    private static double MeanThrust(FlightColumns flight)
    {
        int slope = flight.IndexOf(ColumnKind.Thrust);
        if (slope < 0)
            return 0;
        double sum = 0;
        for (int i = 0; i < flight.Count; i++)
            sum += flight.InputRows[(i * flight.Stride) + slope + 1];
        return sum / flight.Count;
    }

    private static TurnFit Nothing(TurnSignals signals, string reason)
    {
        var names = new List<string> { TurnCoefficient.Constant, TurnCoefficient.Thrust, TurnCoefficient.ThrustSquared, TurnCoefficient.BrakeDifference };
        if (signals.TrimmerDifference.Length > 0)
            names.Add(TurnCoefficient.TrimmerDifference);
        if (signals.CgShiftM.Length > 0)
            names.Add(TurnCoefficient.CgShift);
        return new TurnFit
        {
            Method = MethodName,
            ThrustBasis = signals.ThrustBasis,
            Coefficients = [.. names.Select(n => new TurnCoefficient(n, null, reason))],
            Covariance = [.. new double[names.Count * names.Count]],
            DegreesOfFreedom = 1,
            EffectiveSamples = 0,
            Condition = double.PositiveInfinity,
            SpansLeftOut = signals.SpansLeftOut,
            Notices = signals.HasGyro || signals.HasVelocity || signals.HeadingRad.Length > 0 ? [] : [Finding.Of(FindingCode.NoTurnRate)],
        };
    }
}
