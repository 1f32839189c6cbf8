using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Least squares of turn rate on thrust, thrust squared and brakes over windows of steady power: a check a person can redo.</summary>
/// <remarks>Rows are windows weighted by duration; errors are Newey-West with a small-sample factor and a t distribution, never crossing a
/// pause. The curvature is shrunk by a normal prior with mean 0 and sd <c>0.25 |cT|/T_full</c>. Windows of 8 s average the turn's own lag
/// out; slow air longer than a window stays in the errors, so intervals are somewhat too short (DEVELOPERS.md, "Coverage").</remarks>
public sealed class SteadyWindowEstimator : ITurnEstimator
{
    /// <summary>Thrust must range over this share of full before a slope is stated.</summary>
    public const double SmallestThrustRange = 0.2;

    private const double CurvaturePriorShare = 0.25; // of |cT|/T_full, model page section 2
    private const int FewestWindows = 6;
    private const double SmallestBrakeShare = 0.05, CollinearCorrelation = 0.95;

    /// <inheritdoc/>
    public TurnFit Estimate(TurnSignals signals)
    {
        ArgumentNullException.ThrowIfNull(signals);
        var notices = ImmutableArray.CreateBuilder<Finding>();
        Estimate? bias = null;
        Func<int, int, double>? rate = null;
        double[] heading = signals.HasVelocity ? TurnSignals.AirHeading(signals.VelocityNorth, signals.VelocityEast, signals.Wind) : signals.HeadingRad;
        if (signals.HasGyro)
        {
            bias = GyroBias(signals, heading) ?? (heading.Length == 0 ? signals.Gyro?.BiasRadPerSec : null); // else from standing still
            if (bias is null)
                notices.Add(Finding.Of(FindingCode.GyroBiasUnknown));
            double offset = bias?.Value ?? 0;
            rate = (first, last) => GyroMean(signals, first, last) - offset;
        }
        else if (heading.Length > 0)
        {
            double[] unwrapped = Angles.Unwrap(heading);
            rate = (first, last) => HeadingSlope(signals.TimeSec, unwrapped, first, last);
        }
        List<SteadyWindow> windows = rate is null ? [] : SteadyWindows.Cut(signals, rate);
        double steady = windows.Sum(w => w.EndSec - w.StartSec);
        double reach = windows.Count == 0 ? 0 : (windows.Max(w => w.Thrust) - windows.Min(w => w.Thrust)) / signals.FullThrust;

        string? whole = rate is null ? "the log has neither a yaw rate nor a heading or GPS to take it from"
            : windows.Count < FewestWindows ? FormattableString.Invariant($"only {steady:F0} s of flight with steady power, at least {FewestWindows * 8} s are needed")
            : null;
        if (rate is null)
            notices.Add(Finding.Of(FindingCode.NoTurnRate));
        else if (whole is not null)
            notices.Add(Finding.Of(FindingCode.TooLittleSteadyFlight, steady, FewestWindows * 8));

        string slopeReason = !signals.HasThrust ? "the log says nothing about thrust"
            : reach < SmallestThrustRange ? "thrust hardly changed, so its effect cannot be told from a constant pull" : "";
        if (whole is null && signals.HasThrust && slopeReason.Length > 0)
        {
            notices.Add(Finding.Of(FindingCode.ThrustRangeTooSmall,
                windows.Min(w => w.Thrust) / signals.FullThrust, windows.Max(w => w.Thrust) / signals.FullThrust));
        }

        double brakeReach = windows.Count == 0 ? 0 : windows.Max(w => w.Brakes) - windows.Min(w => w.Brakes);
        string brakeReason = !signals.HasBrakes ? "no steering was logged" : brakeReach < SmallestBrake(signals) ? "the brakes hardly moved" : "";
        bool hasTrimmers = signals.TrimmerDifference.Length > 0;

        bool fitSlope = whole is null && slopeReason.Length == 0;
        bool fitBrakes = whole is null && brakeReason.Length == 0;
        if (fitSlope && fitBrakes)
        {
            double correlation = Correlation([.. windows.Select(w => w.Thrust)], [.. windows.Select(w => w.Brakes)]);
            if (Math.Abs(correlation) > CollinearCorrelation)
                notices.Add(Finding.Of(FindingCode.BrakesCollinear, correlation));
        }

        var names = new List<(string Name, string Reason)>
        {
            (TurnCoefficient.Constant, whole ?? (signals.HasThrust ? slopeReason : "")),
            (TurnCoefficient.Thrust, whole ?? slopeReason),
            (TurnCoefficient.ThrustSquared, whole ?? slopeReason),
            (TurnCoefficient.BrakeDifference, whole ?? brakeReason),
        };
        if (hasTrimmers)
            names.Add((TurnCoefficient.TrimmerDifference, whole ?? ""));
        if (whole is not null)
            return Empty(signals, names, bias, notices);

        Solution solution = Solve(signals, windows, fitSlope, fitBrakes, hasTrimmers);
        // The bias is one number under all gyro windows: it shifts the constant and nothing else.
        double biasVariance = bias is Estimate b ? b.StandardError * b.StandardError : 0;
        int n = names.Count;
        var covariance = new double[n * n];
        var coefficients = ImmutableArray.CreateBuilder<TurnCoefficient>();
        bool[] stated = new bool[n];
        for (int i = 0; i < n; i++)
            stated[i] = names[i].Reason.Length == 0 && solution.Column(i) >= 0;
        for (int i = 0; i < n; i++)
        {
            int a = solution.Column(i);
            for (int j = 0; j < n; j++)
            {
                if (stated[i] && stated[j])
                    covariance[(i * n) + j] = solution.Covariance[(a * solution.Count) + solution.Column(j)];
            }
            if (i == 0 && stated[0])
                covariance[0] += biasVariance;
            coefficients.Add(stated[i]
                ? new(names[i].Name, new Estimate(solution.Values[a], Math.Sqrt(covariance[(i * n) + i])), "")
                : new(names[i].Name, null, names[i].Reason));
        }
        bool biasMissing = signals.HasGyro && bias is null;
        if (biasMissing && stated[0])
        {
            coefficients[0] = new(TurnCoefficient.Constant, null, "the gyro's bias cannot be told from a constant pull without GPS, compass or standing still");
            for (int j = 0; j < n; j++)
                covariance[j] = covariance[j * n] = 0;
        }
        return new TurnFit
        {
            Method = "steady_windows",
            ThrustBasis = signals.ThrustBasis,
            Coefficients = coefficients.ToImmutable(),
            Covariance = [.. covariance],
            DegreesOfFreedom = solution.DegreesOfFreedom,
            EffectiveSamples = solution.EffectiveSamples,
            Condition = solution.Condition,
            GyroBiasRadPerSec = bias,
            Points = [.. windows.Select(w => new TurnPoint(w.StartSec, w.EndSec, w.Thrust, w.TurnRate - solution.Controls(w), w.HandsOff))],
            SpansLeftOut = signals.SpansLeftOut,
            Notices = notices.ToImmutable(),
        };
    }

    private static TurnFit Empty(TurnSignals signals, List<(string Name, string Reason)> names, Estimate? bias, ImmutableArray<Finding>.Builder notices) => new()
    {
        Method = "steady_windows",
        ThrustBasis = signals.ThrustBasis,
        Coefficients = [.. names.Select(n => new TurnCoefficient(n.Name, null, n.Reason))],
        Covariance = [.. new double[names.Count * names.Count]],
        DegreesOfFreedom = 1,
        EffectiveSamples = 0,
        Condition = double.PositiveInfinity,
        GyroBiasRadPerSec = bias,
        SpansLeftOut = signals.SpansLeftOut,
        Notices = notices.ToImmutable(),
    };

    /// <summary>Smallest change of the brakes from which an effect can be learnt: 5 % of travel, 25 mm, or 5 % of the counts used.</summary>
    private static double SmallestBrake(TurnSignals signals) => signals.BrakeUnit switch
    {
        Logs.ControlUnit.Meter => 0.025,
        Logs.ControlUnit.Fraction => SmallestBrakeShare,
        _ => SmallestBrakeShare * (signals.BrakeDifference.Max() - signals.BrakeDifference.Min()),
    };

    private static double GyroMean(TurnSignals signals, int first, int last)
    {
        double sum = 0;
        int count = 0;
        for (int i = first; i <= last; i++)
        {
            if (double.IsFinite(signals.GyroRadPerSec[i]))
            {
                sum += signals.GyroRadPerSec[i];
                count++;
            }
        }
        return count > 2 ? sum / count : double.NaN;
    }

    private static double HeadingSlope(double[] time, double[] unwrapped, int first, int last)
    {
        double n = 0, meanT = 0, meanY = 0;
        for (int i = first; i <= last; i++)
        {
            if (double.IsFinite(unwrapped[i]))
            {
                n++;
                meanT += time[i];
                meanY += unwrapped[i];
            }
        }
        if (n < 4)
            return double.NaN;
        meanT /= n;
        meanY /= n;
        double top = 0, bottom = 0;
        for (int i = first; i <= last; i++)
        {
            if (double.IsFinite(unwrapped[i]))
            {
                top += (time[i] - meanT) * (unwrapped[i] - meanY);
                bottom += (time[i] - meanT) * (time[i] - meanT);
            }
        }
        return bottom > 0 ? top / bottom : double.NaN;
    }

    /// <summary>Bias of the gyro: slope over time of the integrated gyro less the heading, over each unbroken stretch.</summary>
    /// <remarks>The heading's gust error wanders, so the error is Newey-West over 1-s means; null without a heading or under a minute of it.</remarks>
    private static Estimate? GyroBias(TurnSignals signals, double[] heading)
    {
        if (heading.Length == 0)
            return null;
        double[] unwrapped = Angles.Unwrap(heading), time = signals.TimeSec;
        var stretches = new List<(List<double> Time, List<double> Difference)>();
        double integral = 0, lastGyro = double.NaN, lastTime = 0, lastTaken = double.NegativeInfinity, lastSeen = double.NegativeInfinity;
        for (int i = 0; i < time.Length; i++)
        {
            if (!double.IsFinite(signals.GyroRadPerSec[i]) && !double.IsFinite(unwrapped[i]))
                continue;
            if (double.IsFinite(signals.GyroRadPerSec[i]))
            {
                if (double.IsFinite(lastGyro) && time[i] - lastTime < 1)
                    integral += 0.5 * (signals.GyroRadPerSec[i] + lastGyro) * (time[i] - lastTime);
                else
                    lastSeen = double.NegativeInfinity; // a pause in the gyro: the angle turned during it is unknown
                lastGyro = signals.GyroRadPerSec[i];
                lastTime = time[i];
            }
            if (!double.IsFinite(unwrapped[i]) || double.IsNaN(lastGyro) || time[i] - lastTaken < 0.999 || !InFlight(signals, i))
                continue;
            if (time[i] - lastSeen > 10)
                stretches.Add(([], []));
            stretches[^1].Time.Add(time[i]);
            stretches[^1].Difference.Add(integral + (lastGyro * (time[i] - lastTime)) - unwrapped[i]);
            lastTaken = lastSeen = time[i];
        }
        stretches.RemoveAll(s => s.Time.Count < 20);
        int rows = stretches.Sum(s => s.Time.Count);
        if (rows < 60)
            return null;
        int columns = 1 + stretches.Count;
        var design = new double[rows * columns];
        var y = new double[rows];
        var segments = new int[rows];
        int row = 0;
        for (int s = 0; s < stretches.Count; s++)
        {
            for (int k = 0; k < stretches[s].Time.Count; k++, row++)
            {
                design[row] = stretches[s].Time[k];
                design[((1 + s) * rows) + row] = 1;
                y[row] = stretches[s].Difference[k];
                segments[row] = s;
            }
        }
        LeastSquaresFit fit = LeastSquares.Fit(design, y, columns);
        int lag = Math.Max(NeweyWest.AutomaticLag(rows), 20); // gusts and the wind's slow change wander over tens of seconds
        double[] covariance = NeweyWest.Covariance(design, fit.Residuals.AsSpan(), columns, lag, SmallSample.DegreesOfFreedom, segments);
        return new Estimate(fit.Coefficients[0], Math.Sqrt(Math.Max(0, covariance[0])));
    }

    /// <summary>In flight for the bias: strong turns are welcome here, ground and launch are not.</summary>
    private static bool InFlight(TurnSignals signals, int index)
    {
        if (signals.Use[index])
            return true;
        foreach (SpanLeftOut span in signals.SpansLeftOut)
        {
            if (span.Reason == TurnSignals.StrongTurnReason && signals.TimeSec[index] >= span.StartSec && signals.TimeSec[index] <= span.EndSec)
                return true;
        }
        return false;
    }

    private sealed record Solution(double[] Values, double[] Covariance, int[] Columns, double DegreesOfFreedom, double EffectiveSamples, double Condition)
    {
        public int Count => Values.Length;

        public int Column(int name) => name < Columns.Length ? Columns[name] : -1;

        public double Controls(SteadyWindow w) => (Column(3) >= 0 ? Values[Column(3)] * w.Brakes : 0) + (Column(4) >= 0 ? Values[Column(4)] * w.Trimmers : 0);
    }

    private static Solution Solve(TurnSignals signals, List<SteadyWindow> windows, bool fitSlope, bool fitBrakes, bool fitTrimmers)
    {
        var columns = new List<Func<SteadyWindow, double>> { _ => 1 };
        int[] place = [0, -1, -1, -1, -1];
        double full = signals.FullThrust;
        void Add(int name, Func<SteadyWindow, double> column)
        {
            place[name] = columns.Count;
            columns.Add(column);
        }
        if (fitSlope)
        {
            Add(1, w => w.Thrust / full);
            Add(2, w => w.Thrust / full * (w.Thrust / full));
        }
        if (fitBrakes)
            Add(3, w => w.Brakes);
        if (fitTrimmers)
            Add(4, w => w.Trimmers);

        int p = columns.Count, n = windows.Count;
        double meanDuration = windows.Average(w => w.EndSec - w.StartSec);
        double[] weights = [.. windows.Select(w => Math.Sqrt((w.EndSec - w.StartSec) / meanDuration))];
        int[] segments = [.. windows.Select(w => w.Segment)];

        // Without the prior first, for the size of the slope and of the residuals; then with it, as one more row.
        (double[] design, double[] y) = Rows(prior: double.NaN);
        LeastSquaresFit fit = LeastSquares.Fit(design, y, p);
        if (fitSlope)
        {
            double linear = LinearSlope();
            double scale = Math.Max(fit.ResidualScale, 1e-6);
            double priorSd = Math.Max(CurvaturePriorShare * Math.Abs(linear), 1e-6);
            (design, y) = Rows(prior: scale / priorSd);
            fit = LeastSquares.Fit(design, y, p);
        }
        int lag = Math.Max(2, NeweyWest.AutomaticLag(n));
        int[] rowSegments = y.Length > n ? [.. segments, segments[^1] + 1] : segments;
        double[] covariance = NeweyWest.Covariance(design, fit.Residuals.AsSpan(), p, lag, SmallSample.DegreesOfFreedom, rowSegments);
        // A prior row has almost no residual, so its own uncertainty is missing from the sandwich: never below the plain covariance.
        for (int i = 0; i < p; i++)
        {
            double plain = fit.Covariance(i, i), robust = covariance[(i * p) + i];
            if (plain > robust && robust > 0)
            {
                double grow = Math.Sqrt(plain / robust);
                for (int j = 0; j < p; j++)
                {
                    covariance[(i * p) + j] *= grow;
                    covariance[(j * p) + i] *= grow;
                }
            }
        }
        // Back from thrust as a fraction of full to the fit's own unit.
        double[] unit = new double[p];
        Array.Fill(unit, 1);
        if (fitSlope)
            (unit[place[1]], unit[place[2]]) = (1 / full, 1 / (full * full));
        double[] values = [.. fit.Coefficients.Select((c, i) => c * unit[i])];
        for (int i = 0; i < p; i++)
        {
            for (int j = 0; j < p; j++)
                covariance[(i * p) + j] *= unit[i] * unit[j];
        }
        double effective = EffectiveSamples(fit, n, segments);
        return new(values, covariance, place, Math.Max(1, Math.Min(n, effective) - p), effective, fit.Condition);

        (double[] Design, double[] Y) Rows(double prior)
        {
            int rows = double.IsNaN(prior) ? n : n + 1;
            var x = new double[rows * p];
            var rhs = new double[rows];
            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < p; j++)
                    x[(j * rows) + i] = weights[i] * columns[j](windows[i]);
                rhs[i] = weights[i] * windows[i].TurnRate;
            }
            if (rows > n)
                x[(place[2] * rows) + n] = prior;
            return (x, rhs);
        }

        double LinearSlope()
        {
            int q = p - 1;
            var x = new double[n * q];
            for (int j = 0, k = 0; j < p; j++)
            {
                if (j == place[2])
                    continue;
                for (int i = 0; i < n; i++)
                    x[(k * n) + i] = weights[i] * columns[j](windows[i]);
                k++;
            }
            var rhs = new double[n];
            for (int i = 0; i < n; i++)
                rhs[i] = weights[i] * windows[i].TurnRate;
            return LeastSquares.Fit(x, rhs, q).Coefficients[1];
        }
    }

    /// <summary>n (1 - rho)/(1 + rho) with the residuals' correlation between neighbouring windows, not above n.</summary>
    private static double EffectiveSamples(LeastSquaresFit fit, int n, int[] segments)
    {
        double sum = 0, lag = 0;
        for (int i = 0; i < n; i++)
        {
            sum += fit.Residuals[i] * fit.Residuals[i];
            if (i > 0 && segments[i] == segments[i - 1])
                lag += fit.Residuals[i] * fit.Residuals[i - 1];
        }
        double rho = sum > 0 ? Math.Clamp(lag / sum, 0, 0.9) : 0;
        return n * (1 - rho) / (1 + rho);
    }

    private static double Correlation(double[] x, double[] y)
    {
        double mx = x.Average(), my = y.Average(), xy = 0, xx = 0, yy = 0;
        for (int i = 0; i < x.Length; i++)
        {
            xy += (x[i] - mx) * (y[i] - my);
            xx += (x[i] - mx) * (x[i] - mx);
            yy += (y[i] - my) * (y[i] - my);
        }
        return xx > 0 && yy > 0 ? xy / Math.Sqrt(xx * yy) : 0;
    }
}
