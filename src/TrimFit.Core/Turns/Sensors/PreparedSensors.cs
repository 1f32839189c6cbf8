using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>The sensors of one flight, checked against each other and mended, on the flight's clock.</summary>
internal sealed record PreparedSensors
{
    private const double TurnRateSpanSec = 2;

    /// <summary>Yaw rate, rad/s; empty when there is no gyro that can be used.</summary>
    public required double[] Gyro { get; init; }

    /// <summary>Compass heading, rad; empty without one.</summary>
    public required double[] Compass { get; init; }

    /// <summary>Ground velocity, m/s; empty without a GPS.</summary>
    public required double[] North { get; init; }

    public required double[] East { get; init; }

    /// <summary>Turn rate smoothed over two seconds, from the best source; empty when there is none.</summary>
    public required double[] TurnRate { get; init; }

    public required FlightSpan? Flight { get; init; }

    public required SensorReport Report { get; init; }

    /// <summary>Checks and mends.</summary>
    /// <param name="log">The flight; at least one row.</param>
    /// <param name="power">Fraction of full thrust, held; empty or NaN where unknown.</param>
    /// <param name="orientation">The rig's words for how the gyro is mounted, or null.</param>
    public static PreparedSensors Of(FlightLog log, double[] power, string? orientation)
    {
        double[] time = log.TimeSec.ToArray();
        var findings = new List<Finding>();
        (double[] north, double[] east, bool[] repeated) = GroundVelocity.Of(log);
        bool hasVelocity = north.Any(double.IsFinite);
        FlightSpan? flight = null;
        if (hasVelocity)
        {
            (int wild, int fixes) = GpsCleaning.RemoveOutliers(time, north, east);
            if (wild > 0)
                findings.Add(Finding.Of(FindingCode.GpsOutliers, wild, fixes));
            flight = FlightSpan.Of(time, north, east);
            if (flight is FlightSpan span && GpsCleaning.Frozen(time, north, east, repeated, span) is (int frozen and > 0, double seconds))
                findings.Add(Finding.Of(FindingCode.GpsFrozen, frozen, seconds));
        }
        else
        {
            (north, east) = ([], []);
        }
        bool[] inFlight = [.. time.Select(t => flight is not FlightSpan f || (t >= f.FromSec && t <= f.ToSec))];
        double arc = 0;
        Wind? wind = hasVelocity ? WindFit.Fit(time, north, east, inFlight, out arc) : null;
        if (hasVelocity && wind is null)
            findings.Add(Finding.Of(FindingCode.WindUnknown, arc));

        double[] compass = log.Has(ChannelRole.Heading) ? log[ChannelRole.Heading].ToArray() : [];
        double[] heading = hasVelocity ? TurnSignals.AirHeading(north, east, wind) : compass;
        bool throughAir = hasVelocity ? wind is not null : compass.Length > 0;
        double[] unwrapped = heading.Length > 0 ? Angles.Unwrap(heading) : [];

        (double[] gyro, Estimate? bias, bool alongGravity) = YawRate(log, time, power, orientation, north, east, flight, unwrapped, inFlight, findings);
        if (alongGravity && gyro.Length > 0 && wind is not null)
            GyroLevelling.TakeBankOut(gyro, SmoothedRate(time, gyro), bias?.Value ?? 0, wind.AirspeedMPerSec);
        bool logged = gyro.Length > 0 || log.Has(ChannelRole.YawRate) || log.Has(ChannelRole.GyroZ);
        GyroReport? report = logged ? new GyroReport { BiasRadPerSec = bias } : null;
        if (gyro.Length > 0)
        {
            if (log.GyroDelaySec != 0)
                gyro = GyroCheck.Earlier(time, gyro, log.GyroDelaySec);
            GyroCheck.Result check = GyroCheck.Of(time, gyro, unwrapped, inFlight, throughAir, bias, findings);
            gyro = check.Gyro;
            for (int i = 0; i < findings.Count; i++) // the bias was read before the unit was known
            {
                if (findings[i] is { Code: FindingCode.GyroBiasFromStandstill } f)
                    findings[i] = Finding.Of(f.Code, f.Values[0] * check.Factor, f.Values[1] * Math.Abs(check.Factor), f.Values[2]);
            }
            report = check.Report with { DelaySec = check.Report.DelaySec + log.GyroDelaySec ?? (log.GyroDelaySec != 0 ? log.GyroDelaySec : null) };
            if (check.HeadingAheadSec > 0 && hasVelocity)
            {
                north = GyroCheck.MovedEarlier(time, north, check.HeadingAheadSec);
                east = GyroCheck.MovedEarlier(time, east, check.HeadingAheadSec);
                heading = TurnSignals.AirHeading(north, east, wind);
            }
            else if (check.HeadingAheadSec > 0)
            {
                heading = compass = GyroCheck.MovedEarlier(time, compass, check.HeadingAheadSec);
            }
            if (report.Sign is null && !hasVelocity && compass.Length == 0)
                findings.Add(Finding.Of(FindingCode.YawSignUnconfirmed));
            if (ControlChecks.Jitter(time, gyro) is Finding uneven)
                findings.Add(uneven);
        }
        if (gyro.Length == 0 && heading.Length == 0)
            findings.Add(Finding.Of(FindingCode.NoTurnRate));

        double[] rate = gyro.Length > 0 ? SmoothedRate(time, gyro) : heading.Length > 0 ? HeadingRate(time, heading) : [];
        if (ControlChecks.Throttle(log, inFlight) is Finding throttle)
            findings.Add(throttle);
        (double[] brakes, bool hasBrakes) = TurnSignals.Difference(log, ChannelRole.BrakeLeft, ChannelRole.BrakeRight, ChannelRole.BrakeDifference);
        if (hasBrakes && rate.Length > 0 && ControlChecks.Brakes(time, brakes, rate, inFlight) is Finding swapped)
            findings.Add(swapped);
        return new()
        {
            Gyro = gyro,
            Compass = compass,
            North = north,
            East = east,
            TurnRate = rate,
            Flight = flight,
            Report = new()
            {
                Gyro = report,
                Wind = wind,
                WindArcRad = arc,
                YawSignConfirmed = hasVelocity || compass.Length > 0,
                Findings = [.. findings],
            },
        };
    }

    /// <summary>One yaw rate from whatever gyro the log has, and its bias when standing still or levelling showed it.</summary>
    private static (double[] Rate, Estimate? Bias, bool AlongGravity) YawRate(
        FlightLog log, double[] time, double[] power, string? orientation, double[] north, double[] east, FlightSpan? flight,
        double[] heading, bool[] inFlight, List<Finding> findings)
    {
        double[] altitude = log[ChannelRole.Altitude].ToArray();
        double[] speed = [.. north.Select((n, i) => Math.Sqrt((n * n) + (east[i] * east[i])))];
        Standstill? Still(double[][] axes) => Standstill.Of(time, axes, speed, power, altitude, flight);

        bool threeAxes = log.Has(ChannelRole.GyroX) && log.Has(ChannelRole.GyroY) && log.Has(ChannelRole.GyroZ);
        if (log.Has(ChannelRole.YawRate) || !threeAxes)
        {
            double[] single = log.Has(ChannelRole.YawRate) ? log[ChannelRole.YawRate].ToArray() : log[ChannelRole.GyroZ].ToArray();
            return single.Length == 0 ? ([], null, false) : Single(single, Still([single]));
        }
        double[][] gyro = [log[ChannelRole.GyroX].ToArray(), log[ChannelRole.GyroY].ToArray(), log[ChannelRole.GyroZ].ToArray()];
        if (log.Has(ChannelRole.AccelerationX) && log.Has(ChannelRole.AccelerationY) && log.Has(ChannelRole.AccelerationZ))
        {
            double[][] acceleration =
                [log[ChannelRole.AccelerationX].ToArray(), log[ChannelRole.AccelerationY].ToArray(), log[ChannelRole.AccelerationZ].ToArray()];
            if (GyroLevelling.ByGravity(time, gyro, acceleration, power, heading, inFlight, Still(gyro), findings) is GyroLevelling.Result levelled)
                return (levelled.YawRate, levelled.Bias, true);
        }
        if (GyroLevelling.ByHeading(time, gyro, heading, inFlight, findings) is GyroLevelling.Result found)
            return (found.YawRate, found.Bias, false);
        (int axis, int sign) = GyroLevelling.VerticalAxis(orientation);
        findings.Add(Finding.Of(FindingCode.GyroAxisAssumed, axis, sign));
        double[] taken = [.. gyro[axis].Select(g => sign * g)];
        return Single(taken, Still([taken]));

        (double[], Estimate?, bool) Single(double[] rate, Standstill? still)
        {
            if (still is null)
                return (rate, null, false);
            findings.Add(Finding.Of(FindingCode.GyroBiasFromStandstill, still.Bias[0].Value, still.Bias[0].StandardError, still.Seconds));
            return (rate, still.Bias[0], false);
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
}
