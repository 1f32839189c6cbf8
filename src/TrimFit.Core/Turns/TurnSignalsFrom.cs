using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

public sealed partial class TurnSignals
{
    /// <summary>Reason of a span left out for a strong turn.</summary>
    internal const string StrongTurnReason = "strong turn";

    /// <summary>A turn is strong and intended beyond this rate, unless three times the flight's own median is more (a kite turns all the time).</summary>
    private static readonly double _strongTurnRadPerSec = double.DegreesToRadians(15);
    private const double Reached = 0.9; // of the samples stay below: the rest is the beginning of turns, and held courses
    private const double UsedHard = 0.5; // of the brake that only 1 % of the samples exceed
    private const double BeyondSteering = 3; // times a strong turn: a spiral, whatever made it
    private const double StrongTurnOverMedian = 3, AroundStrongTurnSec = 3, MostShare = 0.5;

    /// <summary>Makes a flight ready for an estimator.</summary>
    /// <param name="log">The flight.</param>
    /// <param name="rig">The rig: full thrust, throttle table, what the rpm counts.</param>
    /// <param name="legs">Legs of the pilot's sheet with their places in the flight; none without a sheet.</param>
    public static TurnSignals From(FlightLog log, Rig rig, params ReadOnlySpan<FoundLeg> legs)
    {
        ArgumentNullException.ThrowIfNull(log);
        ArgumentNullException.ThrowIfNull(rig);
        double[] time = log.TimeSec.ToArray();
        int count = time.Length;
        var findings = new List<Finding>();
        var thrust = ThrustSource.Of(log, rig, Propulsion.Of(rig), legs);
        findings.AddRange(thrust.Findings);
        double[] power = thrust.Known ? [.. thrust.Thrust.Select(t => t / thrust.FullThrust)] : [];
        PreparedSensors sensors = PreparedSensors.Of(log, power, rig.Log.GyroOrientation);
        findings.AddRange(sensors.Report.Findings);

        var leftOut = new List<SpanLeftOut>();
        bool[] use = Enumerable.Repeat(true, count).ToArray();
        void LeaveOut(Func<int, bool> left, string reason) => MarkSpans(time, use, left, reason, leftOut);

        if (sensors.Flight is FlightSpan flight)
        {
            LeaveOut(i => time[i] < flight.FromSec, "on the ground or launching");
            LeaveOut(i => time[i] > flight.ToSec, "landing or on the ground");
        }
        if (thrust.Known)
            LeaveOut(i => !double.IsFinite(thrust.Thrust[i]), "no reading of thrust");

        (double[] brakes, bool hasBrakes) = Difference(log, ChannelRole.BrakeLeft, ChannelRole.BrakeRight, ChannelRole.BrakeDifference);
        if (hasBrakes)
            LeaveOut(i => !double.IsFinite(brakes[i]), "no reading of the brakes");
        (double[] trimmers, bool hasTrimmers) = Difference(log, ChannelRole.TrimmerLeft, ChannelRole.TrimmerRight, null);
        if (hasTrimmers && trimmers.Where(double.IsFinite).Distinct().Take(2).Count() < 2)
            hasTrimmers = false; // never moved: nothing to learn

        double[] shift = CgShifts(time, rig, legs, LeaveOut);

        double[] rate = sensors.TurnRate;
        if (rate.Length > 0)
        {
            double[] sizes = [.. rate.Where((r, i) => use[i] && double.IsFinite(r)).Select(Math.Abs)];
            double strong = Math.Max(_strongTurnRadPerSec, sizes.Length > 0 ? StrongTurnOverMedian * QuantileType7.Of(sizes, 0.5) : 0);
            double steered = hasBrakes ? BrakeOfTurn(strong, rate, brakes, use) : double.NaN;
            bool[] turning = double.IsFinite(steered)
                ? Widen(time, [.. rate.Select((r, i) => Math.Abs(brakes[i]) > steered || Math.Abs(r) > BeyondSteering * strong)], AroundStrongTurnSec)
                : Widen(time, [.. rate.Select(r => Math.Abs(r) > strong)], AroundStrongTurnSec);
            // Where steered turns are most of the flight they are what there is to learn from, not an exception to leave out.
            bool mostOfIt = hasBrakes && use.Where((u, i) => u && turning[i]).Count() > MostShare * use.Count(u => u);
            if (!mostOfIt)
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
            CgShiftM = shift,
            GyroRadPerSec = sensors.Gyro,
            RotationRatioSquared = thrust.RotationRatioSquared,
            HeadingRad = sensors.Compass,
            VelocityNorth = sensors.North,
            VelocityEast = sensors.East,
            Wind = sensors.Report.Wind,
            Use = use,
            SpansLeftOut = [.. leftOut.OrderBy(s => s.StartSec).ThenBy(s => s.EndSec)],
            HandsOff = handsOff,
            HandsOffDeclared = declared,
            AltitudeM = log.Has(ChannelRole.Altitude) ? log[ChannelRole.Altitude].ToArray() : [],
            BrakeUnit = log.BrakeUnit,
            Gyro = sensors.Report.Gyro,
            YawSignConfirmed = sensors.Report.YawSignConfirmed,
            Findings = [.. findings],
        };
    }

    /// <summary>Brake difference that makes a turn of a rate: by the turn over brake that is reached where the brakes are used hard; NaN when they never are.</summary>
    /// <remarks>Intended turns are told by what the pilot did, not by how fast the machine turned. A rate is the brakes' and the air's together, so a
    /// choice by rate ends a span just where the air turns the machine hardest, and those ends then look like a pull (thermals, by 1 to 3 deg/s).</remarks>
    private static double BrakeOfTurn(double strong, double[] rate, double[] brakes, bool[] use)
    {
        double[] sizes = [.. brakes.Where((b, i) => use[i] && double.IsFinite(b)).Select(Math.Abs)];
        double hard = sizes.Length > 0 ? UsedHard * QuantileType7.Of(sizes, 0.99) : 0;
        if (!(hard > 0))
            return double.NaN;
        double[] turnPerBrake = [.. rate.Select((r, i) => use[i] && Math.Abs(brakes[i]) > hard ? Math.Abs(r / brakes[i]) : double.NaN).Where(double.IsFinite)];
        return turnPerBrake.Length > 0 && QuantileType7.Of(turnPerBrake, Reached) is double k and > 0 ? strong / k : double.NaN;
    }

    /// <summary>How much of a leg is left out at an edge that no control shows: the sheet's own tolerance.</summary>
    private const double UnseenEdgeSec = SheetLegs.EdgeToleranceSec;

    /// <summary>CG shift over time from the sheet's ballast and weight-shift legs; a leg of unknown size is left out of the flight, since it
    /// cannot be told from a pull.</summary>
    private static double[] CgShifts(double[] time, Rig rig, ReadOnlySpan<FoundLeg> legs, Action<Func<int, bool>, string> leaveOut)
    {
        double[] shift = [];
        double suspendedKg = RigSpread.SuspendedKg(rig);
        foreach (FoundLeg leg in legs)
        {
            if (leg.Leg.Kind is not (SheetLegKind.Ballast or SheetLegKind.WeightShift))
                continue;
            if (leg.Leg.BallastKg is not double kg || leg.Leg.BallastArmM is not double arm)
            {
                leaveOut(i => time[i] >= leg.StartSec - UnseenEdgeSec && time[i] <= leg.EndSec + UnseenEdgeSec, "weight shift of unknown size");
                continue;
            }
            if (shift.Length == 0)
                shift = new double[time.Length];
            for (int i = 0; i < time.Length; i++)
            {
                if (time[i] >= leg.StartSec && time[i] <= leg.EndSec)
                    shift[i] = kg * arm / suspendedKg; // carried all flight, so it counts in the pilot's mass and only its place changes
            }
            if (leg.StartFoundIn is null)
                leaveOut(i => Math.Abs(time[i] - leg.StartSec) <= UnseenEdgeSec, "edge of a ballast or weight-shift leg");
            if (leg.EndFoundIn is null)
                leaveOut(i => Math.Abs(time[i] - leg.EndSec) <= UnseenEdgeSec, "edge of a ballast or weight-shift leg");
        }
        return shift;
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

    internal static (double[] Values, bool Has) Difference(FlightLog log, ChannelRole left, ChannelRole right, ChannelRole? signed)
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
