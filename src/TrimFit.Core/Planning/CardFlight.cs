using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Planning;

/// <summary>A flight of a card drawn from the turn model itself: what the estimator assumes of wing, air and sensors, under a pilot who flies the legs.</summary>
/// <remarks>The model is the estimator's, so what the information of such a flight says of an interval is what the fit of a real one will say as
/// far as the model holds. Steps of 0.2 s, the estimator's own rows, discretised exactly by <see cref="TurnDynamics"/>.</remarks>
internal static class CardFlight
{
    private const double Step = 0.2;
    private const double ReactionRows = 2; // 0.4 s between seeing and acting
    private static readonly double _steadyTurn = double.DegreesToRadians(9);

    /// <summary>How a pilot steers: turn asked for per heading error, 1/s; share of the difference to it taken at once; what his hands add by
    /// themselves (McRuer and Jex 1967, the remnant), fraction of travel.</summary>
    private const double HeadingGain = 0.3, RateGain = 0.5, HandRms = 0.02, HandTauSec = 0.7, MostBrake = 0.4;

    /// <summary>Scatter of climb, m/s, its correlation time, s, and of a reading of altitude, m (common practice, no source).</summary>
    private const double ClimbRms = 0.2, ClimbTauSec = 8, AltitudeNoise = 0.3;

    private const double WindNorth = 2, WindEast = -1.5, WindError = 0.3;

    /// <summary>Draws a flight.</summary>
    /// <param name="legs">The card.</param>
    /// <param name="machine">Machine, air, logger.</param>
    /// <param name="random">Random numbers; the same ones give the same flight.</param>
    public static TurnSignals Draw(IReadOnlyList<CardLeg> legs, CardMachine machine, SeededRandom random)
    {
        NoiseParameters noise = machine.Noise;
        int count = (int)Math.Round(legs[^1].EndSec / Step);
        bool gyro = machine.GyroRowsPerSec > 0, brakesLogged = machine.HasBrakes, sheet = !brakesLogged;
        int gyroEvery = gyro ? Every(machine.GyroRowsPerSec) : 1, fixEvery = Every(machine.HeadingRowsPerSec);
        var dynamics = TurnDynamics.Over(Step, noise);
        double[] root = NoiseRoot(dynamics);
        double[] time = new double[count], thrust = new double[count], brake = new double[count], shift = new double[count], rotation = new double[count];
        double[] gyroRate = gyro ? new double[count] : [], north = new double[count], east = new double[count], altitude = new double[count];
        bool[] handsOff = new bool[count], use = new bool[count];
        bool hasShift = legs.Any(l => l.BallastKg > 0);
        double full = machine.FullThrust, sensitivity = Analysis.TrimPosterior.PriorMedian;

        double r = machine.PullAt(machine.Level), p = 0, w = noise.DisturbanceRms * random.NextNormal(), psi = 0, gust = noise.GustRms * random.NextNormal();
        double hand = 0, climbError = 0, height = 1000;
        double keepGust = Math.Exp(-Step / noise.GustTauSec), keepHand = Math.Exp(-Step / HandTauSec), keepClimb = Math.Exp(-Step / ClimbTauSec);
        var seen = new Queue<(double Psi, double R)>();
        int at = 0;
        for (int i = 0; i < count; i++)
        {
            double t = i * Step;
            while (at + 1 < legs.Count && t >= legs[at].EndSec - 1e-9)
                at++;
            CardLeg leg = legs[at];
            double x = machine.ThrustOf(leg.Power);
            (double feltPsi, double feltR) = seen.Count >= ReactionRows ? seen.Dequeue() : (psi, r);
            seen.Enqueue((psi, r));
            hand = (keepHand * hand) + (HandRms * Math.Sqrt(1 - (keepHand * keepHand)) * random.NextNormal());
            double steer;
            switch (leg.Kind)
            {
                case CardLegKind.HandsOff or CardLegKind.Ballast:
                    steer = 0;
                    break;
                case CardLegKind.BrakeStep or CardLegKind.Circle:
                    steer = leg.BrakeRight - leg.BrakeLeft + (0.2 * hand);
                    break;
                default:
                    double error = leg.Kind == CardLegKind.Turn ? leg.HeadingRad - feltPsi : Math.IEEERemainder(leg.HeadingRad - feltPsi, Math.Tau);
                    double wanted = Math.Clamp(HeadingGain * error, -_steadyTurn, _steadyTurn);
                    steer = Math.Clamp((wanted + (RateGain * (wanted - feltR)) - machine.PullAt(x)) / machine.BrakePerTravel, -MostBrake, MostBrake) + hand;
                    break;
            }
            double cg = leg.Kind == CardLegKind.Ballast ? leg.BallastKg * leg.BallastArmM / machine.SuspendedKg : 0;

            time[i] = t;
            thrust[i] = x * full;
            brake[i] = brakesLogged ? steer : 0;
            shift[i] = cg;
            rotation[i] = gyro ? x : 0; // thrust goes with the square of the speed
            // Without a channel that shows an edge the sheet's tolerance is taken off a hands-off leg at both ends.
            handsOff[i] = leg.Kind == CardLegKind.HandsOff && (brakesLogged
                || (t >= leg.StartSec + Logs.SheetLegs.EdgeToleranceSec && t <= leg.EndSec - Logs.SheetLegs.EdgeToleranceSec));
            use[i] = !sheet || handsOff[i];
            if (gyro)
                gyroRate[i] = i % gyroEvery == 0 ? r + (noise.GyroNoise * random.NextNormal()) : double.NaN;
            double track = psi + gust + (noise.HeadingNoise * random.NextNormal());
            bool fix = i % fixEvery == 0;
            north[i] = fix ? (machine.AirspeedMPerSec * Math.Cos(track)) + WindNorth : double.NaN;
            east[i] = fix ? (machine.AirspeedMPerSec * Math.Sin(track)) + WindEast : double.NaN;
            altitude[i] = height + (AltitudeNoise * random.NextNormal());

            double u = machine.PullAt(x) + (machine.BrakePerTravel * steer) + (sensitivity * cg);
            double z0 = random.NextNormal(), z1 = random.NextNormal(), z2 = random.NextNormal(), z3 = random.NextNormal();
            double nr = (dynamics.Rr * r) + (dynamics.Rp * p) + (dynamics.Rw * w) + (dynamics.Gr * u) + (root[0] * z0);
            double np = (dynamics.Pr * r) + (dynamics.Pp * p) + (dynamics.Pw * w) + (dynamics.Gp * u) + (root[4] * z0) + (root[5] * z1);
            double nw = (dynamics.Ww * w) + (root[8] * z0) + (root[9] * z1) + (root[10] * z2);
            psi += (dynamics.Sr * r) + (dynamics.Sp * p) + (dynamics.Sw * w) + (dynamics.Gs * u) + (root[12] * z0) + (root[13] * z1) + (root[14] * z2) + (root[15] * z3);
            (r, p, w) = (nr, np, nw);
            gust = (keepGust * gust) + (noise.GustRms * Math.Sqrt(1 - (keepGust * keepGust)) * random.NextNormal());
            climbError = (keepClimb * climbError) + (ClimbRms * Math.Sqrt(1 - (keepClimb * keepClimb)) * random.NextNormal());
            height += Step * (machine.ClimbAt(x) + climbError);
        }
        return new TurnSignals
        {
            TimeSec = time,
            Thrust = thrust,
            ThrustBasis = machine.ThrustBasis,
            FullThrust = full,
            HasThrust = true,
            BrakeDifference = brake,
            HasBrakes = brakesLogged,
            CgShiftM = hasShift ? shift : [],
            GyroRadPerSec = gyroRate,
            RotationRatioSquared = rotation,
            VelocityNorth = north,
            VelocityEast = east,
            Wind = new Wind
            {
                NorthMPerSec = WindNorth,
                EastMPerSec = WindEast,
                AirspeedMPerSec = machine.AirspeedMPerSec,
                NorthStdError = WindError,
                EastStdError = WindError,
                AirspeedStdError = WindError,
                ArcRad = Math.Tau,
            },
            Use = use,
            HandsOff = handsOff,
            HandsOffDeclared = sheet,
            AltitudeM = altitude,
            YawSignConfirmed = true,
        };
    }

    private static int Every(double rowsPerSec) => Math.Max(1, (int)Math.Round(1 / (rowsPerSec * Step)));

    /// <summary>Lower factor of the noise of one step on r, p, w and psi; rows of states without noise are 0.</summary>
    private static double[] NoiseRoot(in TurnDynamics d)
    {
        double[] q = [d.Q00, d.Q01, d.Q02, d.Q03, d.Q01, d.Q11, d.Q12, d.Q13, d.Q02, d.Q12, d.Q22, d.Q23, d.Q03, d.Q13, d.Q23, d.Q33];
        double[] root = new double[16];
        for (int j = 0; j < 4; j++)
        {
            double sum = q[5 * j];
            for (int k = 0; k < j; k++)
                sum -= root[(4 * j) + k] * root[(4 * j) + k];
            if (!(sum > 1e-12 * q[5 * j])) // no noise of its own
                continue;
            root[5 * j] = Math.Sqrt(sum);
            for (int i = j + 1; i < 4; i++)
            {
                double dot = q[(4 * i) + j];
                for (int k = 0; k < j; k++)
                    dot -= root[(4 * i) + k] * root[(4 * j) + k];
                root[(4 * i) + j] = dot / root[5 * j];
            }
        }
        return root;
    }
}
