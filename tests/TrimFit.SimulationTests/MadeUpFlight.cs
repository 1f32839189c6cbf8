using TrimFit.Core.Turns;

namespace TrimFit.SimulationTests;

/// <summary>Flies a scenario in small steps and logs it: equations written here anew, sharing nothing with the estimator.</summary>
internal static class MadeUpFlight
{
    private const double Step = 0.02;
    private const int PerLogRow = 5; // 10 Hz

    public static TurnSignals Fly(TurnScenario c, Gauss random)
    {
        int rows = (int)(c.DurationSec / (Step * PerLogRow));
        bool gyro = c.Sensors is Sensors.GyroAndGps or Sensors.PhoneGyro;
        bool brakesLogged = c.Sensors != Sensors.Gps5HzAndSheet;
        int fixEvery = c.Sensors is Sensors.Gps1Hz or Sensors.PhoneGyro ? 10 : 2;
        double[] time = new double[rows], thrustLog = new double[rows], brakeLog = new double[rows], rotation = new double[rows];
        double[] gyroLog = gyro ? new double[rows] : [];
        double[] north = new double[rows], east = new double[rows];
        bool[] use = new bool[rows], handsOff = new bool[rows];

        double r = c.PullAt(c.LevelShare), p = 0, psi = random.Between(-Math.PI, Math.PI);
        double w = c.DisturbanceRms * random.Normal(), gust = c.GustRms * random.Normal();
        double quick = 0, slow = 0;
        double wander = 0;
        double lagged = c.LevelShare, swing = 0, swingRate = 0;
        double share = c.LevelShare, shareWanted = c.LevelShare, nextLeg = random.Between(15, 30);
        bool hands = c.Hardship == Hardship.HeldLegs, stepping = false;
        double nextHands = random.Between(10, 30), target = psi, brake = 0, stepBrake = 0, stepEnds = 0, nextTarget = random.Between(30, 60);
        double thermal = 0, thermalEnds = 0, nextThermal = random.Between(10, 40);
        // A person is no servo: what a human operator does beyond answering what he sees is called remnant (McRuer and Jex 1967, "A review of
        // quasi-linear pilot models", IEEE Trans. Human Factors in Electronics 8:231, doi 10.1109/THFE.1967.234304). The hard case of held
        // legs has none.
        double remnantRms = c.Hardship == Hardship.HeldLegs ? 0 : random.Between(0.01, 0.04), remnant = 0;
        var seen = new Queue<(double Psi, double R)>(); // the pilot's reaction time
        int reaction = (int)(random.Between(0.3, 0.6) / Step);
        double eagerness = random.Between(0.15, 0.5), damping = random.Between(0.2, 0.8);

        for (int i = 0; i < rows; i++)
        {
            double t = i * Step * PerLogRow;
            // The pilot decides ten times a second; what is logged is what holds until the next row.
            if (t >= nextLeg)
            {
                double pick = random.Uniform();
                shareWanted = pick < 0.3 ? random.Between(0, 0.15) : pick < 0.7 ? c.LevelShare + random.Between(-0.05, 0.05) : random.Between(0.85, 1);
                nextLeg = t + random.Between(15, 40);
            }
            share += Math.Clamp(shareWanted - share, -0.08, 0.08);
            if (t >= nextHands && c.Hardship != Hardship.HeldLegs)
            {
                hands = !hands;
                nextHands = t + (hands ? random.Between(15, 45) : random.Between(15, 30));
                target = psi;
            }
            if (t >= nextTarget)
            {
                target += random.Between(-2.5, 2.5);
                nextTarget = t + random.Between(40, 80);
            }
            if (hands && !stepping && random.Uniform() < 0.002)
            {
                stepping = true;
                stepBrake = (random.Uniform() < 0.5 ? -1 : 1) * random.Between(0.08, 0.25);
                stepEnds = t + random.Between(4, 9);
            }
            if (stepping && t > stepEnds)
            {
                stepping = false;
                target = psi;
            }
            (double feltPsi, double feltR) = seen.Count >= reaction ? seen.Peek() : (psi, r);
            double wanted = !hands ? 0 : stepping ? stepBrake : remnant + Math.Clamp((-eagerness * (feltPsi - target)) - (damping * feltR), -0.4, 0.4);
            brake += Math.Clamp(wanted - brake, -0.08, 0.08);
            if (Math.Abs(brake) < 1e-12)
                brake = 0;

            time[i] = t;
            thrustLog[i] = share * c.FullThrust;
            brakeLog[i] = brakesLogged ? brake : 0;
            rotation[i] = share;
            use[i] = true;
            handsOff[i] = !hands && brake == 0;

            double twistRate = (share - lagged) / 0.7;
            if (c.Hardship == Hardship.Thermals)
            {
                if (t >= nextThermal)
                {
                    thermal = (random.Uniform() < 0.5 ? -1 : 1) * double.DegreesToRadians(random.Between(3, 8));
                    thermalEnds = t + random.Between(5, 15);
                    nextThermal = t + random.Between(20, 60);
                }
                if (t > thermalEnds)
                    thermal = 0;
            }
            if (gyro)
            {
                double frame = c.Hardship == Hardship.FrameTwist ? swingRate : c.Twist * twistRate;
                gyroLog[i] = r + c.GyroBias + wander + (c.RotationOffset * share) + frame + (c.GyroNoise * random.Normal());
            }
            if (i % fixEvery == 0)
            {
                double track = psi + gust;
                north[i] = (c.Airspeed * Math.Cos(track)) + c.WindNorth + (c.VelocityNoise * random.Normal());
                east[i] = (c.Airspeed * Math.Sin(track)) + c.WindEast + (c.VelocityNoise * random.Normal());
            }
            else
            {
                north[i] = east[i] = double.NaN;
            }

            double effective = c.Hardship == Hardship.BrakeDeadBand ? Math.Sign(brake) * Math.Max(0, Math.Abs(brake) - 0.08) : brake;
            double u = c.PullAt(share) + (c.Brake * effective);
            for (int j = 0; j < PerLogRow; j++)
            {
                double push = u + w + thermal + quick + slow;
                if (c.SecondOrder)
                {
                    double wn = c.NaturalFrequency;
                    // Midpoint rule; its error at this step is a thousandth of the lag.
                    double rMid = r + (p * Step / 2), pMid = p + (((wn * wn * (push - r)) - (2 * c.Damping * wn * p)) * Step / 2);
                    psi += rMid * Step;
                    r += pMid * Step;
                    p += ((wn * wn * (push - rMid)) - (2 * c.Damping * wn * pMid)) * Step;
                }
                else
                {
                    double rMid = r + ((push - r) / c.LagSec * Step / 2);
                    psi += rMid * Step;
                    r += (push - rMid) / c.LagSec * Step;
                }
                if (c.Hardship == Hardship.TwoTimeScales)
                {
                    w = 0;
                    quick = Markov(quick, 0.9 * c.DisturbanceRms, 2.5);
                    slow = Markov(slow, 0.6 * c.DisturbanceRms, 40);
                }
                else
                {
                    w = Markov(w, c.DisturbanceRms, c.DisturbanceTau);
                }
                remnant = Markov(remnant, remnantRms, 0.7);
                gust = Markov(gust, c.GustRms, c.GustTau);
                if (c.Sensors == Sensors.PhoneGyro)
                    wander = Markov(wander, double.DegreesToRadians(0.1), 200);
                lagged += (share - lagged) * Step / 0.7;
                // The frame swings about the risers with its own period of 2.5 s.
                double pull = (6.3 * ((c.Twist * share) - swing)) - (1.5 * swingRate);
                swing += swingRate * Step;
                swingRate += pull * Step;
                seen.Enqueue((psi, r));
                if (seen.Count > reaction)
                    seen.Dequeue();
            }
        }
        return new TurnSignals
        {
            TimeSec = time,
            Thrust = thrustLog,
            ThrustBasis = ThrustBasis.Newton,
            FullThrust = c.FullThrust,
            HasThrust = true,
            BrakeDifference = brakeLog,
            HasBrakes = brakesLogged,
            GyroRadPerSec = gyroLog,
            RotationRatioSquared = rotation,
            VelocityNorth = north,
            VelocityEast = east,
            Wind = new Wind
            {
                NorthMPerSec = c.WindNorth + (c.WindError * random.Normal()),
                EastMPerSec = c.WindEast + (c.WindError * random.Normal()),
                AirspeedMPerSec = c.Airspeed,
                NorthStdError = c.WindError,
                EastStdError = c.WindError,
                AirspeedStdError = c.WindError,
                ArcRad = Math.Tau,
            },
            Use = use,
            HandsOff = handsOff,
            HandsOffDeclared = !brakesLogged,
        };

        double Markov(double value, double rms, double tau)
        {
            double keep = Math.Exp(-Step / tau);
            return (keep * value) + (rms * Math.Sqrt(1 - (keep * keep)) * random.Normal());
        }
    }
}
