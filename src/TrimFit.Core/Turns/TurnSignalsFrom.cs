using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

public sealed partial class TurnSignals
{
    /// <summary>Reason of a span left out for a strong turn.</summary>
    internal const string StrongTurnReason = "strong turn";

    /// <summary>Speed over ground that tells flight from standing, m/s, kept up for <see cref="TakeOffSec"/>.</summary>
    private const double FlyingSpeed = 4, TakeOffSec = 8;

    /// <summary>Left out after take-off and before landing: the wing is still being flown by hand there, s.</summary>
    private const double AfterTakeOffSec = 15, BeforeLandingSec = 10;

    /// <summary>A turn is strong and intended beyond this rate, unless three times the flight's own median is more (a kite turns all the time).</summary>
    private static readonly double _strongTurnRadPerSec = double.DegreesToRadians(15);
    private const double StrongTurnOverMedian = 3, AroundStrongTurnSec = 3, TurnRateSpanSec = 2;

    /// <summary>Bounds of gyro over GPS turn rate inside which the gyro is believed as it is.</summary>
    private const double SmallestScale = 0.6, LargestScale = 1.6;

    /// <summary>Makes a flight ready for an estimator.</summary>
    /// <param name="log">The flight.</param>
    /// <param name="rig">The rig: full thrust, throttle table, what the rpm counts.</param>
    public static TurnSignals From(FlightLog log, Rig rig)
    {
        ArgumentNullException.ThrowIfNull(log);
        ArgumentNullException.ThrowIfNull(rig);
        double[] time = log.TimeSec.ToArray();
        int count = time.Length;
        var findings = new List<Finding>();
        var thrust = ThrustSource.Of(log, rig, Propulsion.Of(rig));
        findings.AddRange(thrust.Findings);
        (double[] north, double[] east) = GroundVelocity.Of(log);
        bool hasVelocity = north.Any(double.IsFinite);
        if (!hasVelocity)
            (north, east) = ([], []);

        var leftOut = new List<SpanLeftOut>();
        bool[] use = Enumerable.Repeat(true, count).ToArray();
        void LeaveOut(Func<int, bool> left, string reason) => MarkSpans(time, use, left, reason, leftOut);

        if (hasVelocity && FlightSpan(time, north, east) is (double takeOff, double landing))
        {
            LeaveOut(i => time[i] < takeOff, "on the ground or launching");
            LeaveOut(i => time[i] > landing, "landing or on the ground");
        }
        if (thrust.Known)
            LeaveOut(i => !double.IsFinite(thrust.Thrust[i]), "no reading of thrust");

        (double[] brakes, bool hasBrakes) = Difference(log, ChannelRole.BrakeLeft, ChannelRole.BrakeRight, ChannelRole.BrakeDifference);
        if (hasBrakes)
            LeaveOut(i => !double.IsFinite(brakes[i]), "no reading of the brakes");
        (double[] trimmers, bool hasTrimmers) = Difference(log, ChannelRole.TrimmerLeft, ChannelRole.TrimmerRight, null);
        if (hasTrimmers && trimmers.Where(double.IsFinite).Distinct().Take(2).Count() < 2)
            hasTrimmers = false; // never moved: nothing to learn

        double arc = 0;
        Wind? wind = hasVelocity ? WindFit.Fit(time, north, east, use, out arc) : null;
        if (hasVelocity && wind is null)
            findings.Add(Finding.Of(FindingCode.WindUnknown, arc));

        double[] gyro = log.Has(ChannelRole.YawRate) ? log[ChannelRole.YawRate].ToArray()
            : log.Has(ChannelRole.GyroZ) ? log[ChannelRole.GyroZ].ToArray() : [];
        double[] compass = log.Has(ChannelRole.Heading) ? log[ChannelRole.Heading].ToArray() : [];
        double[] heading = hasVelocity ? AirHeading(north, east, wind) : compass;
        GyroReport? report = null;
        bool signConfirmed = hasVelocity || compass.Length > 0;
        if (gyro.Length > 0)
        {
            (report, gyro) = CheckGyro(time, gyro, heading, use, findings);
            if (report.Sign is null && signConfirmed == false)
                findings.Add(Finding.Of(FindingCode.YawSignUnconfirmed));
        }
        else if (heading.Length == 0)
        {
            findings.Add(Finding.Of(FindingCode.NoTurnRate));
        }

        double[] rate = gyro.Length > 0 ? SmoothedRate(time, gyro) : heading.Length > 0 ? HeadingRate(time, heading) : [];
        if (rate.Length > 0)
        {
            double[] sizes = [.. rate.Where((r, i) => use[i] && double.IsFinite(r)).Select(Math.Abs)];
            double strong = Math.Max(_strongTurnRadPerSec, sizes.Length > 0 ? StrongTurnOverMedian * QuantileType7.Of(sizes, 0.5) : 0);
            bool[] turning = Widen(time, [.. rate.Select(r => Math.Abs(r) > strong)], AroundStrongTurnSec);
            LeaveOut(i => turning[i], StrongTurnReason);
        }

        bool declared = log.Has(ChannelRole.HandsOff);
        bool[] handsOff = declared
            ? [.. ThrustSource.Held(log, ChannelRole.HandsOff).Select(h => h > 0.5)]
            : HandsOffByBrakes(time, log, hasBrakes);
        if (declared && !hasBrakes)
            LeaveOut(i => !handsOff[i], "not declared hands off, and no steering was logged");

        for (int i = 0; i < count; i++) // inputs must be finite everywhere; where they were not, the sample is not used
        {
            thrust.Thrust[i] = double.IsFinite(thrust.Thrust[i]) ? thrust.Thrust[i] : 0;
            brakes[i] = double.IsFinite(brakes[i]) ? brakes[i] : 0;
            if (hasTrimmers)
                trimmers[i] = double.IsFinite(trimmers[i]) ? trimmers[i] : 0;
        }
        return new TurnSignals
        {
            TimeSec = time,
            Thrust = thrust.Thrust,
            ThrustBasis = thrust.Basis,
            FullThrust = thrust.FullThrust,
            HasThrust = thrust.Known,
            BrakeDifference = brakes,
            HasBrakes = hasBrakes,
            TrimmerDifference = hasTrimmers ? trimmers : [],
            GyroRadPerSec = gyro,
            RotationRatioSquared = thrust.RotationRatioSquared,
            HeadingRad = compass,
            VelocityNorth = north,
            VelocityEast = east,
            Wind = wind,
            Use = use,
            SpansLeftOut = [.. leftOut.OrderBy(s => s.StartSec).ThenBy(s => s.EndSec)],
            HandsOff = handsOff,
            HandsOffDeclared = declared,
            AltitudeM = log.Has(ChannelRole.Altitude) ? log[ChannelRole.Altitude].ToArray() : [],
            BrakeUnit = log.BrakeUnit,
            Gyro = report,
            YawSignConfirmed = signConfirmed,
            Findings = [.. findings],
        };
    }

    /// <summary>Direction of the air velocity, rad, NaN where there is no fix; over ground when the wind is unknown.</summary>
    internal static double[] AirHeading(double[] north, double[] east, Wind? wind)
    {
        double windNorth = wind?.NorthMPerSec ?? 0, windEast = wind?.EastMPerSec ?? 0;
        var heading = new double[north.Length];
        for (int i = 0; i < heading.Length; i++)
            heading[i] = Math.Atan2(east[i] - windEast, north[i] - windNorth); // NaN stays NaN
        return heading;
    }

    private static void MarkSpans(double[] time, bool[] use, Func<int, bool> left, string reason, List<SpanLeftOut> spans)
    {
        int start = -1;
        for (int i = 0; i <= time.Length; i++)
        {
            bool now = i < time.Length && use[i] && left(i);
            if (now && start < 0)
                start = i;
            if (!now && start >= 0)
            {
                spans.Add(new(time[start], time[i - 1], reason));
                Array.Fill(use, false, start, i - start);
                start = -1;
            }
        }
    }

    /// <summary>From a while after the machine first keeps flying speed to a while before it last does; null when it never does.</summary>
    private static (double TakeOff, double Landing)? FlightSpan(double[] time, double[] north, double[] east)
    {
        double first = double.NaN, last = double.NaN, since = double.NaN;
        for (int i = 0; i < time.Length; i++)
        {
            if (!double.IsFinite(north[i]) || !double.IsFinite(east[i]))
                continue;
            if (Math.Sqrt((north[i] * north[i]) + (east[i] * east[i])) < FlyingSpeed)
            {
                since = double.NaN;
                continue;
            }
            if (double.IsNaN(since))
                since = time[i];
            if (time[i] - since >= TakeOffSec)
            {
                if (double.IsNaN(first))
                    first = since;
                last = time[i];
            }
        }
        if (double.IsNaN(first))
            return null;
        // A record that begins or ends in flight has no launch or landing to leave out.
        bool beginsFlying = first - time[0] < 1, endsFlying = time[^1] - last < 3;
        return (beginsFlying ? time[0] : first + AfterTakeOffSec, endsFlying ? time[^1] : last - BeforeLandingSec);
    }

    private static (double[] Values, bool Has) Difference(FlightLog log, ChannelRole left, ChannelRole right, ChannelRole? signed)
    {
        if (log.Has(left) && log.Has(right))
        {
            double[] l = ThrustSource.Held(log, left), r = ThrustSource.Held(log, right);
            return ([.. r.Zip(l, (a, b) => a - b)], true);
        }
        if (signed is ChannelRole role && log.Has(role))
            return (ThrustSource.Held(log, role), true);
        return (new double[log.Count], false);
    }

    /// <summary>Both brakes within 2 % of their smallest reading: let go.</summary>
    private static bool[] HandsOffByBrakes(double[] time, FlightLog log, bool hasBrakes)
    {
        var off = new bool[time.Length];
        if (!hasBrakes || !log.Has(ChannelRole.BrakeLeft))
            return off;
        double[] left = ThrustSource.Held(log, ChannelRole.BrakeLeft), right = ThrustSource.Held(log, ChannelRole.BrakeRight);
        double[] all = [.. left.Concat(right).Where(double.IsFinite)];
        double zeroLeft = QuantileType7.Of([.. left.Where(double.IsFinite)], 0.02), zeroRight = QuantileType7.Of([.. right.Where(double.IsFinite)], 0.02);
        double range = QuantileType7.Of(all, 0.99) - Math.Min(zeroLeft, zeroRight);
        double slack = Math.Max(0.02 * range, log.BrakeUnit == ControlUnit.Meter ? 0.005 : 0.01);
        for (int i = 0; i < off.Length; i++)
            off[i] = left[i] - zeroLeft <= slack && right[i] - zeroRight <= slack; // NaN compares false
        return off;
    }

    /// <summary>Compares the gyro with the turn of the GPS or compass heading over spans of 4 s and mends a reversed sign or a wrong unit.</summary>
    private static (GyroReport Report, double[] Gyro) CheckGyro(double[] time, double[] gyro, double[] heading, bool[] use, List<Finding> findings)
    {
        const double SpanSec = 4;
        if (heading.Length == 0)
            return (new GyroReport(), gyro);
        double[] unwrapped = Angles.Unwrap(heading);
        var fromGyro = new List<double>();
        var fromHeading = new List<double>();
        int start = -1;
        double integral = 0;
        for (int i = 0; i < time.Length; i++)
        {
            if (!use[i] || (i > 0 && time[i] - time[i - 1] > 1))
                start = -1;
            else if (i > 0 && start >= 0 && double.IsFinite(gyro[i]))
                integral += gyro[i] * (time[i] - LastGyroTime(i));
            if (!use[i] || !double.IsFinite(unwrapped[i]))
                continue;
            if (start >= 0 && time[i] - time[start] >= SpanSec)
            {
                double dt = time[i] - time[start];
                fromGyro.Add(integral / dt);
                fromHeading.Add((unwrapped[i] - unwrapped[start]) / dt);
                start = -1;
            }
            if (start < 0)
            {
                start = i;
                integral = 0;
            }
        }
        if (fromGyro.Count < 8)
            return (new GyroReport(), gyro);
        // The heading is the noisier of the two and the gyro the predictor's error is small against it: regress heading on gyro.
        double[] x = [.. fromGyro], y = [.. fromHeading];
        var design = new double[x.Length * 2];
        Array.Fill(design, 1, 0, x.Length);
        x.CopyTo(design, x.Length);
        LeastSquaresFit fit = LeastSquares.Fit(design, y, 2);
        double slope = fit.Coefficients[1], slopeError = fit[1].StandardError;
        bool clear = double.IsFinite(slope) && Math.Abs(slope) > 5 * slopeError;
        if (!clear)
            return (new GyroReport(), gyro);
        double scale = 1 / slope;
        int sign = Math.Sign(scale);
        double[] mended = gyro;
        double factor = Math.Abs(scale);
        const double DegreesInRadian = 180 / Math.PI;
        if (factor is < SmallestScale or > LargestScale)
        {
            double unit = factor > 1 ? DegreesInRadian : 1 / DegreesInRadian;
            if (factor / unit is > SmallestScale and < LargestScale)
            {
                mended = [.. mended.Select(g => g / unit)];
                findings.Add(Finding.Of(FindingCode.GyroUnitCorrected, factor));
            }
            else
            {
                findings.Add(Finding.Of(FindingCode.GyroScaleOff, factor));
            }
        }
        if (sign < 0)
        {
            mended = [.. mended.Select(g => -g)];
            findings.Add(Finding.Of(FindingCode.GyroSignReversed, scale));
        }
        double bias = -fit.Coefficients[0] / slope * sign;
        return (new GyroReport
        {
            Scale = scale,
            Sign = sign,
            BiasRadPerSec = new Estimate(bias, Math.Abs(fit[0].StandardError / slope)),
        }, mended);

        double LastGyroTime(int index)
        {
            for (int k = index - 1; k >= 0; k--)
            {
                if (double.IsFinite(gyro[k]))
                    return time[k];
            }
            return time[index];
        }
    }

    /// <summary>Mean of the gyro over the last <see cref="TurnRateSpanSec"/> seconds.</summary>
    private static double[] SmoothedRate(double[] time, double[] gyro)
    {
        var smooth = new double[time.Length];
        double sum = 0;
        int inside = 0, tail = 0;
        for (int i = 0; i < smooth.Length; i++)
        {
            if (double.IsFinite(gyro[i]))
            {
                sum += gyro[i];
                inside++;
            }
            while (time[i] - time[tail] > TurnRateSpanSec)
            {
                if (double.IsFinite(gyro[tail]))
                {
                    sum -= gyro[tail];
                    inside--;
                }
                tail++;
            }
            smooth[i] = inside > 0 ? sum / inside : double.NaN;
        }
        return smooth;
    }

    /// <summary>Change of heading over the last <see cref="TurnRateSpanSec"/> seconds or a little more; held between fixes.</summary>
    private static double[] HeadingRate(double[] time, double[] heading)
    {
        double[] unwrapped = Angles.Unwrap(heading);
        var rate = new double[time.Length];
        var fixes = new List<int>();
        int tail = 0;
        double last = double.NaN;
        for (int i = 0; i < rate.Length; i++)
        {
            if (double.IsFinite(unwrapped[i]))
            {
                fixes.Add(i);
                while (tail + 1 < fixes.Count && time[i] - time[fixes[tail + 1]] >= TurnRateSpanSec)
                    tail++;
                double dt = time[i] - time[fixes[tail]];
                last = dt is >= TurnRateSpanSec and < 4 * TurnRateSpanSec ? (unwrapped[i] - unwrapped[fixes[tail]]) / dt : double.NaN;
            }
            rate[i] = last;
        }
        return rate;
    }

    private static bool[] Widen(double[] time, bool[] marked, double aroundSec)
    {
        var wide = new bool[marked.Length];
        double last = double.NegativeInfinity;
        for (int i = 0; i < wide.Length; i++)
        {
            if (marked[i])
                last = time[i];
            wide[i] = time[i] - last <= aroundSec;
        }
        double next = double.PositiveInfinity;
        for (int i = wide.Length - 1; i >= 0; i--)
        {
            if (marked[i])
                next = time[i];
            wide[i] |= next - time[i] <= aroundSec;
        }
        return wide;
    }
}
