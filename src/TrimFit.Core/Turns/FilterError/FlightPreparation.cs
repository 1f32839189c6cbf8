using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns.FilterError;

/// <summary>Turns <see cref="TurnSignals"/> into the rows of the filter.</summary>
internal static class FlightPreparation
{
    private const double LongestGapSec = 10; // after a longer pause nothing is known of the turn any more
    private const double LongestHeadingGapSec = 4; // without a gyro the heading may have gone round unseen
    private const double LeastAirspeedShare = 0.4; // of the fitted airspeed: below it the direction of the air velocity means nothing
    private const double SurpriseGainSd = Math.PI / 180; // rad/s or rad for one standard deviation of the surprise: as uncertain as the state itself is between fixes
    private const double TimeGrainSec = 1e-5; // steps equal to within this share one discretisation

    /// <summary>Why a flight has no rows, or null when it has.</summary>
    public static FlightColumns? Prepare(TurnSignals s, FilterErrorOptions options, bool withThrust, out string reason)
    {
        reason = "";
        int raw = s.Count;
        bool onlyHandsOff = !s.HasBrakes && s.HandsOffDeclared;
        bool hasHeading = s.HasVelocity && s.Wind is not null;
        bool hasCompass = s.HeadingRad.Length > 0;
        bool[] use = new bool[raw];
        for (int i = 0; i < raw; i++)
            use[i] = s.Use[i] && (!onlyHandsOff || s.HandsOff[i]);

        double[] air = hasHeading ? AirHeadings(s) : [];
        double block = BlockLength(s.TimeSec, options.BlockSec);
        List<Group> groups = GroupSamples(s, use, air, block);
        if (groups.Count(g => g.Gyro + g.Air + g.Compass > 0) < 60)
        {
            reason = onlyHandsOff ? "too little of the flight is marked hands-off and measured" : "too few measurements of the turn are usable";
            return null;
        }

        int n = groups.Count;
        var kinds = new List<ColumnKind> { ColumnKind.Constant };
        if (withThrust)
            kinds.AddRange([ColumnKind.Thrust, ColumnKind.ThrustSquared]);
        double brakeScale = s.HasBrakes ? RmsOf(s.BrakeDifference, use) : 0;
        if (brakeScale > 0)
            kinds.Add(ColumnKind.Brake);
        double trimmerScale = s.TrimmerDifference.Length > 0 ? SpreadOf(s.TrimmerDifference, use) : 0;
        if (trimmerScale > 0)
            kinds.Add(ColumnKind.Trimmer);
        double shiftScale = s.CgShiftM.Length > 0 ? SpreadOf(s.CgShiftM, use) : 0;
        if (shiftScale > 0)
            kinds.Add(ColumnKind.CgShift);
        bool hasGyro = s.HasGyro && groups.Any(g => g.Gyro > 0);
        hasHeading = hasHeading && groups.Any(g => g.Air > 0);
        hasCompass = hasCompass && groups.Any(g => g.Compass > 0);
        bool headingKnown = hasHeading || hasCompass;
        // With a heading the fit finds the bias itself, and the signals' bias may come from the same fixes; without one it comes from standing still.
        Estimate? still = headingKnown ? null : s.Gyro?.BiasRadPerSec;
        bool rotation = s.RotationRatioSquared.AsSpan().ContainsAnyExcept(0.0);
        if (hasGyro)
        {
            if (headingKnown || still is not null)
                kinds.Add(ColumnKind.GyroBias);
            if (rotation)
                kinds.Add(ColumnKind.GyroRotation);
            if (withThrust)
                kinds.Add(ColumnKind.GyroTwist);
        }
        if (hasHeading)
            kinds.AddRange([ColumnKind.WindNorth, ColumnKind.WindEast]);
        if (hasCompass)
        {
            if (hasHeading)
                kinds.Add(ColumnKind.CompassOffset);
            kinds.AddRange([ColumnKind.CompassSine, ColumnKind.CompassCosine]);
        }
        bool surprises = brakeScale > 0 && !hasGyro; // with a gyro the log knows the turn as well as the pilot does
        if (surprises)
            kinds.AddRange([ColumnKind.RateSurprise, ColumnKind.DisturbanceSurprise, ColumnKind.HeadingSurprise]);
        int k = kinds.Count;
        int stride = (k + 1 + 3) / 4 * 4;
        double full = s.FullThrust > 0 ? s.FullThrust : 1;
        double[] scale = new double[k];
        double[] priorSd = new double[k];
        double quarterTurn = double.DegreesToRadians(60);
        for (int j = 0; j < k; j++)
        {
            (scale[j], priorSd[j]) = kinds[j] switch
            {
                ColumnKind.Thrust => (full, quarterTurn),
                ColumnKind.ThrustSquared => (full * full, quarterTurn),
                ColumnKind.Brake => (brakeScale, quarterTurn),
                ColumnKind.Trimmer => (trimmerScale, quarterTurn),
                ColumnKind.CgShift => (shiftScale, quarterTurn),
                ColumnKind.GyroBias => (1, still is Estimate e ? Math.Max(e.StandardError, 1e-5) : double.DegreesToRadians(20)),
                ColumnKind.GyroRotation => (1, double.DegreesToRadians(0.5)),
                ColumnKind.GyroTwist => (1, double.DegreesToRadians(10)),
                // The circle fit's own error is small beside what the air does over a flight, so it only sets a floor.
                ColumnKind.WindNorth => (1, double.Hypot(1, 3 * s.Wind!.NorthStdError)),
                ColumnKind.WindEast => (1, double.Hypot(1, 3 * s.Wind!.EastStdError)),
                ColumnKind.CompassOffset => (1, double.DegreesToRadians(60)),
                ColumnKind.CompassSine or ColumnKind.CompassCosine => (1, double.DegreesToRadians(10)),
                ColumnKind.RateSurprise or ColumnKind.DisturbanceSurprise or ColumnKind.HeadingSurprise => (1, SurpriseGainSd),
                _ => (1.0, quarterTurn),
            };
        }

        double biasTaken = hasGyro && still is Estimate known ? known.Value : 0;
        double[] time = new double[n];
        for (int i = 0; i < n; i++)
            time[i] = groups[i].TimeSec;
        var steps = new List<double>();
        var stepOf = new Dictionary<long, int>();
        int[] stepIndex = new int[n];
        byte[] flags = new byte[n];
        for (int i = 0; i + 1 < n; i++)
        {
            double dt = time[i + 1] - time[i];
            long key = Math.Max(1, (long)Math.Round(Math.Min(dt, LongestGapSec) / TimeGrainSec));
            if (!stepOf.TryGetValue(key, out int index))
            {
                index = steps.Count;
                stepOf[key] = index;
                steps.Add(key * TimeGrainSec);
            }
            stepIndex[i] = index;
        }
        if (steps.Count == 0)
            steps.Add(1);

        double[] inputs = new double[n * stride];
        FillInputs(s, time, inputs, stride, kinds, full, brakeScale, trimmerScale, shiftScale);

        // Gyro, twist and rotation columns.
        double[] gyroRows = hasGyro ? new double[n * stride] : [];
        double[] twist = hasGyro && withThrust ? TwistRates(s, full, options.FrameTwistLagSec) : [];
        int measurements = 0;
        if (hasGyro)
        {
            for (int i = 0; i < n; i++)
            {
                Group g = groups[i];
                if (g.Gyro == 0)
                    continue;
                flags[i] |= FlightColumns.Gyro;
                measurements++;
                Span<double> row = gyroRows.AsSpan(i * stride, stride);
                double sum = 0, n2 = 0, tw = 0;
                for (int j = g.First; j <= g.Last; j++)
                {
                    if (!double.IsFinite(s.GyroRadPerSec[j]))
                        continue;
                    sum += s.GyroRadPerSec[j];
                    n2 += s.RotationRatioSquared[j];
                    tw += twist.Length > 0 ? twist[j] : 0;
                }
                row[0] = (sum / g.Gyro) - biasTaken;
                for (int j = 0; j < k; j++)
                {
                    row[j + 1] = kinds[j] switch
                    {
                        ColumnKind.GyroBias => -1,
                        ColumnKind.GyroRotation => -n2 / g.Gyro,
                        ColumnKind.GyroTwist => -tw / g.Gyro,
                        _ => 0,
                    };
                }
            }
        }

        double[] headingRows = hasHeading ? new double[n * stride] : [];
        double[] compassRows = hasCompass ? new double[n * stride] : [];
        double[] startHeading = new double[n];
        int start = 0;
        double lastHeading = 0, lastHeadingTime = double.NaN, lastRate = 0, turned = 0;
        // Wind and deviation columns are taken at the heading expected from what came before, never at the measured one: a column that
        // holds the measurement's own noise lets the fit explain the heading by itself (a likelihood without its Jacobian), and brake and
        // disturbance then shrink towards nothing.
        double expected = 0;
        double lastMeasuredTime = double.NaN;
        double compassAhead = double.NaN; // compass minus air heading, followed so that both stay on the same turn of the circle
        for (int i = 0; i < n; i++)
        {
            Group g = groups[i];
            bool anything = g.Gyro + g.Air + g.Compass > 0;
            bool fresh = i == 0 || g.AfterBreak || (anything && time[i] - lastMeasuredTime > LongestGapSec);
            if (anything || i == 0)
                lastMeasuredTime = time[i];
            if (!fresh && !hasGyro && headingKnown && (g.Air > 0 || g.Compass > 0) && time[i] - lastHeadingTime > LongestHeadingGapSec)
                fresh = true;
            if (fresh)
            {
                flags[i] |= FlightColumns.Reset;
                start = i;
                startHeading[i] = double.NaN;
                lastHeadingTime = double.NaN;
                lastRate = 0;
                turned = 0;
            }
            else if (hasGyro)
            {
                double rate = g.Gyro > 0 ? gyroRows[i * stride] : lastRate;
                turned += rate * (time[i] - time[i - 1]);
                lastRate = rate;
            }
            if (g.Air > 0)
            {
                double heading = Unwrap(MeanAngle(air, g, s.TimeSec, time[i], hasGyro ? lastRate : 0));
                Span<double> row = headingRows.AsSpan(i * stride, stride);
                row[0] = heading;
                double speed = s.Wind!.AirspeedMPerSec;
                int at = kinds.IndexOf(ColumnKind.WindNorth);
                row[at + 1] = Math.Sin(expected) / speed;
                row[at + 2] = -Math.Cos(expected) / speed;
                flags[i] |= FlightColumns.Heading;
                measurements++;
            }
            if (g.Compass > 0)
            {
                double measured = MeanAngle(s.HeadingRad, g, s.TimeSec, time[i], hasGyro ? lastRate : 0);
                // Declination and deviation part compass and air heading by tens of degrees; the parting itself is followed.
                double heading;
                if (hasHeading && double.IsFinite(lastHeadingTime))
                {
                    double predicted = lastHeading + (hasGyro ? turned : lastRate * (time[i] - lastHeadingTime)) + (double.IsFinite(compassAhead) ? compassAhead : 0);
                    heading = predicted + Math.IEEERemainder(measured - predicted, Math.Tau);
                    expected = predicted;
                    if (g.Air > 0)
                        compassAhead = heading - headingRows[i * stride];
                }
                else if (hasHeading)
                {
                    heading = double.NaN; // wait for the first air heading of the segment
                }
                else
                {
                    heading = Unwrap(measured);
                }
                if (double.IsFinite(heading))
                {
                    Span<double> row = compassRows.AsSpan(i * stride, stride);
                    row[0] = heading;
                    int offset = kinds.IndexOf(ColumnKind.CompassOffset);
                    if (offset >= 0)
                        row[offset + 1] = -1;
                    int sine = kinds.IndexOf(ColumnKind.CompassSine);
                    row[sine + 1] = -Math.Sin(expected);
                    row[sine + 2] = -Math.Cos(expected);
                    flags[i] |= FlightColumns.Compass;
                    measurements++;
                }
            }

            double Unwrap(double measured)
            {
                double heading;
                if (!double.IsFinite(lastHeadingTime))
                {
                    heading = expected = measured;
                    startHeading[start] = heading - (hasGyro ? turned : 0);
                }
                else
                {
                    double predicted = lastHeading + (hasGyro ? turned : lastRate * (time[i] - lastHeadingTime));
                    heading = predicted + Math.IEEERemainder(measured - predicted, Math.Tau);
                    expected = predicted;
                    if (!hasGyro)
                        lastRate = (heading - lastHeading) / (time[i] - lastHeadingTime);
                }
                lastHeading = heading;
                lastHeadingTime = time[i];
                turned = 0;
                return heading;
            }
        }
        for (int i = 0; i < n; i++)
        {
            if (!double.IsFinite(startHeading[i]))
                startHeading[i] = 0;
        }

        int[] blocks = Blocks(time, flags, inputs, stride, withThrust, options.SandwichBlockSec, out int blockCount);
        double used = 0;
        for (int i = 0; i + 1 < n; i++)
        {
            if ((flags[i + 1] & FlightColumns.Reset) == 0)
                used += time[i + 1] - time[i];
        }
        var flight = new FlightColumns
        {
            Count = n,
            Stride = stride,
            TimeSec = time,
            StepIndex = stepIndex,
            Steps = [.. steps],
            Flags = flags,
            InputRows = inputs,
            GyroRows = gyroRows,
            HeadingRows = headingRows,
            CompassRows = compassRows,
            StartHeading = startHeading,
            Block = blocks,
            Blocks = blockCount,
            Kinds = [.. kinds],
            Scale = scale,
            PriorSd = priorSd,
            HasGyro = hasGyro,
            HasHeading = hasHeading,
            HasCompass = hasCompass,
            GyroBiasTaken = biasTaken,
            GyroSamplesPerRow = MeanCount(groups, g => g.Gyro),
            HeadingSamplesPerRow = MeanCount(groups, g => g.Air),
            Measurements = measurements,
            UsedSec = used,
            HandsOff = [.. groups.Select(g => s.HandsOff[g.First])],
        };
        if (surprises)
            flight.Surprise = BrakeSurprise.Of(flight);
        return flight;
    }

    /// <summary>Samples that become one row.</summary>
    private sealed class Group
    {
        public int First, Last, Gyro, Air, Compass;
        public double TimeSec;
        public bool AfterBreak;
    }

    private static double MeanCount(List<Group> groups, Func<Group, int> count)
    {
        int rows = groups.Count(g => count(g) > 0);
        return rows == 0 ? 1 : (double)groups.Sum(count) / rows;
    }

    private static double[] AirHeadings(TurnSignals s)
    {
        Wind wind = s.Wind!;
        double least = LeastAirspeedShare * wind.AirspeedMPerSec;
        double[] heading = new double[s.Count];
        for (int i = 0; i < heading.Length; i++)
        {
            double north = s.VelocityNorth[i] - wind.NorthMPerSec, east = s.VelocityEast[i] - wind.EastMPerSec;
            heading[i] = double.Hypot(north, east) >= least ? Math.Atan2(east, north) : double.NaN; // NaN velocities fail the test
        }
        return heading;
    }

    private static double BlockLength(double[] time, double wanted)
    {
        if (!(wanted > 0) || time.Length < 3)
            return 0;
        double[] steps = new double[time.Length - 1];
        for (int i = 0; i < steps.Length; i++)
            steps[i] = time[i + 1] - time[i];
        Array.Sort(steps);
        double median = steps[steps.Length / 2];
        int samples = (int)Math.Floor((wanted / median) + 0.05); // steps jitter: 0.1003 s is a step of 0.1 s
        return samples >= 2 ? samples * median : 0;
    }

    private static List<Group> GroupSamples(TurnSignals s, bool[] use, double[] air, double block)
    {
        var groups = new List<Group>();
        bool gap = false;
        Group? open = null;
        double openUntil = double.NegativeInfinity;
        for (int i = 0; i < s.Count; i++)
        {
            if (!use[i])
            {
                Close();
                gap = groups.Count > 0;
                continue;
            }
            // Half a millisecond of slack: stamps such as 0.1, 0.2, 0.30000000000000004 must fall into equal groups.
            if (open is not null && s.TimeSec[i] > openUntil - 5e-4)
                Close();
            if (open is null)
            {
                open = new Group { First = i, AfterBreak = gap };
                openUntil = s.TimeSec[i] + block;
            }
            open.Last = i;
            if (s.HasGyro && double.IsFinite(s.GyroRadPerSec[i]))
                open.Gyro++;
            if (air.Length > 0 && double.IsFinite(air[i]))
                open.Air++;
            if (s.HeadingRad.Length > 0 && double.IsFinite(s.HeadingRad[i]))
                open.Compass++;
            if (block == 0)
                Close();
        }
        Close();
        return groups;

        void Close()
        {
            if (open is null)
                return;
            Group g = open;
            open = null;
            // A row without a measurement carries the inputs on: over a second between fixes their mean is no substitute.
            if (g.Gyro + g.Air + g.Compass == 0 && (block == 0 || groups.Count == 0))
                return;
            double sum = 0;
            int count = 0;
            for (int j = g.First; j <= g.Last; j++)
            {
                bool counts = g.Gyro + g.Air + g.Compass == 0 || (g.Gyro > 0 ? double.IsFinite(s.GyroRadPerSec[j])
                    : g.Air > 0 ? double.IsFinite(air[j])
                    : double.IsFinite(s.HeadingRad[j]));
                if (counts)
                {
                    sum += s.TimeSec[j];
                    count++;
                }
            }
            g.TimeSec = sum / count;
            groups.Add(g);
            gap = false;
        }
    }

    private static double MeanAngle(double[] angle, Group g, double[] time, double at, double rate)
    {
        double sine = 0, cosine = 0;
        for (int j = g.First; j <= g.Last; j++)
        {
            if (!double.IsFinite(angle[j]))
                continue;
            double a = angle[j] + (rate * (at - time[j])); // carried to the row's time with the measured turn
            sine += Math.Sin(a);
            cosine += Math.Cos(a);
        }
        return Math.Atan2(sine, cosine);
    }

    private static double RmsOf(double[] values, bool[] use)
    {
        double sum = 0;
        int count = 0;
        for (int i = 0; i < values.Length; i++)
        {
            if (use[i])
            {
                sum += values[i] * values[i];
                count++;
            }
        }
        return count == 0 ? 0 : Math.Sqrt(sum / count);
    }

    private static double SpreadOf(double[] values, bool[] use)
    {
        double low = double.PositiveInfinity, high = double.NegativeInfinity;
        for (int i = 0; i < values.Length; i++)
        {
            if (use[i])
            {
                low = Math.Min(low, values[i]);
                high = Math.Max(high, values[i]);
            }
        }
        return high > low ? high - low : 0;
    }

    /// <summary>Rate of the lagged thrust, per full thrust and second, at each sample.</summary>
    private static double[] TwistRates(TurnSignals s, double full, double lagSec)
    {
        double[] rate = new double[s.Count];
        double lagged = s.Thrust[0] / full;
        for (int i = 0; i < rate.Length; i++)
        {
            double thrust = s.Thrust[i] / full;
            rate[i] = (thrust - lagged) / lagSec;
            if (i + 1 < rate.Length)
                lagged += (thrust - lagged) * (1 - Math.Exp(-(s.TimeSec[i + 1] - s.TimeSec[i]) / lagSec));
        }
        return rate;
    }

    /// <summary>Mean of each held input between the rows' times.</summary>
    private static void FillInputs(TurnSignals s, double[] time, double[] inputs, int stride, List<ColumnKind> kinds, double full, double brakeScale, double trimmerScale, double shiftScale)
    {
        int n = time.Length;
        for (int c = 0; c < kinds.Count; c++)
        {
            int at = c + 1;
            if (kinds[c] == ColumnKind.Constant)
            {
                for (int i = 0; i < n; i++)
                    inputs[(i * stride) + at] = 1;
                continue;
            }
            if (kinds[c] is not (ColumnKind.Thrust or ColumnKind.ThrustSquared or ColumnKind.Brake or ColumnKind.Trimmer or ColumnKind.CgShift))
                continue;
            int j = 0;
            for (int i = 0; i < n; i++)
            {
                double from = time[i], to = i + 1 < n ? time[i + 1] : time[i];
                while (j + 1 < s.Count && s.TimeSec[j + 1] <= from)
                    j++;
                double sum = 0, t = from;
                int l = j;
                while (t < to)
                {
                    double end = l + 1 < s.Count ? Math.Min(s.TimeSec[l + 1], to) : to;
                    sum += ValueAt(l) * (end - t);
                    t = end;
                    l++;
                }
                inputs[(i * stride) + at] = to > from ? sum / (to - from) : ValueAt(j);
            }

            double ValueAt(int l) => kinds[c] switch
            {
                ColumnKind.Thrust => s.Thrust[l] / full,
                ColumnKind.ThrustSquared => s.Thrust[l] / full * (s.Thrust[l] / full),
                ColumnKind.Brake => s.BrakeDifference[l] / brakeScale,
                ColumnKind.CgShift => s.CgShiftM[l] / shiftScale,
                _ => s.TrimmerDifference[l] / trimmerScale,
            };
        }
    }

    /// <summary>Blocks of the sandwich: the given length, or one throttle leg when that lasts longer.</summary>
    private static int[] Blocks(double[] time, byte[] flags, double[] inputs, int stride, bool withThrust, double length, out int count)
    {
        int n = time.Length;
        int[] block = new int[n];
        const double LegChange = 0.10; // of full thrust: a smaller move is the same leg
        int current = 0;
        double start = time[0], legLow = double.PositiveInfinity, legHigh = double.NegativeInfinity;
        for (int i = 0; i < n; i++)
        {
            double thrust = withThrust ? inputs[(i * stride) + 2] : 0;
            bool sameLeg = withThrust && Math.Max(legHigh, thrust) - Math.Min(legLow, thrust) < LegChange;
            if (time[i] - start >= length && !(sameLeg && time[i] - start < 3 * length))
            {
                current++;
                start = time[i];
            }
            if (!sameLeg)
            {
                legLow = legHigh = thrust;
            }
            else
            {
                legLow = Math.Min(legLow, thrust);
                legHigh = Math.Max(legHigh, thrust);
            }
            block[i] = current;
        }
        // A short rest at the end joins the block before it.
        if (current > 0 && time[n - 1] - start < length / 2)
        {
            for (int i = n - 1; i >= 0 && block[i] == current; i--)
                block[i]--;
            current--;
        }
        count = current + 1;
        return block;
    }
}
