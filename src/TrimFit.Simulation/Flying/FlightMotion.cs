using TrimFit.Core.Units;

namespace TrimFit.Simulation;

/// <summary>The state of a flight and how it moves on: engine, frame, wing, air, path and pilot.</summary>
internal sealed class FlightMotion
{
    public const double StepSec = 1.0 / SensorSuite.StepsPerSecond;
    private const double SpeedLagSec = 2.5;
    private const double ClimbLagSec = 1.8;
    private const double SlowdownAtFullBrake = 0.35; // of trim speed, with both brakes at full travel: order of a paraglider's speed range
    private const double MaxPilotSteerM = 0.30;
    private const double SpeedNoiseMPerSec = 0.15;
    private const double MostTrimmedOutRadPerSec = 0.35; // what a pilot leans on a brake for in the long run: 20 deg/s
    private const double CircleGainPerSec = 0.3;
    private const double TurnLeadSec = 1.2; // a pilot lets up before the heading is reached, since the wing turns on
    private const double FlyingShareOfTrimSpeed = 0.5; // below it a take-off run is on the ground

    private readonly Scenario _s;
    private readonly Dictionary<double, ThrustTable> _tables = [];
    private readonly RandomStream _hand;
    private readonly MarkovProcess _slowNorth, _slowEast, _gustNorth, _gustEast, _disturbance, _second, _speedNoise, _handNoise;
    private readonly (double Time, double Lift, double Turn)[] _thermals;
    private readonly double[] _headingSeen, _rateSeen; // ring buffers: what the pilot saw a reaction time ago
    private readonly double _speedKeep, _handKeep, _engineKeep, _firstKeep;
    private readonly double _levelDragN, _allKg;

    private ThrustTable _table;
    private ThrustTable.Row _row;
    private FlightLeg _leg = new();
    private long _step, _legStart;
    private double _twist, _twistRate, _roll, _rollRate, _turnAcceleration;
    private double _target, _headingAtStart, _integral, _speedAtStart;
    private bool _turnDone, _landed;
    private LegControl _lastControl = LegControl.Ground;
    private int _thermalFrom;

    public FlightMotion(Scenario s)
    {
        _s = s;
        _table = _tables[0] = new ThrustTable(s);
        _allKg = s.Mass.PilotKg + s.Mass.PowerUnitKg + s.Mass.WingKg;
        _levelDragN = s.LevelThrustN;
        var air = new RandomStream(s.Seed, 1);
        var gust = new RandomStream(s.Seed, 2);
        var disturbance = new RandomStream(s.Seed, 3);
        _hand = new RandomStream(s.Seed, 4);
        AirSetup a = s.Air;
        _slowNorth = new(air, a.SlowWindMPerSec, a.SlowWindTauSec, StepSec);
        _slowEast = new(air, a.SlowWindMPerSec, a.SlowWindTauSec, StepSec);
        double gustTau = a.GustLengthM / s.Wing.TrimSpeedMPerSec;
        _gustNorth = new(gust, a.GustMPerSec, gustTau, StepSec);
        _gustEast = new(gust, a.GustMPerSec, gustTau, StepSec);
        _disturbance = new(disturbance, a.DisturbanceRadPerSec, a.DisturbanceTauSec, StepSec);
        _second = new(new RandomStream(s.Seed, 5), a.SecondDisturbanceRadPerSec, a.SecondDisturbanceTauSec, StepSec);
        _speedNoise = new(new RandomStream(s.Seed, 6), a.GustMPerSec > 0 ? SpeedNoiseMPerSec : 0, 6, StepSec);
        _handNoise = new(_hand, s.Pilot.HandNoiseM, 0.8, StepSec);
        _thermals = Thermals(s);
        int seen = Math.Max(1, (int)Math.Round(s.Pilot.ReactionSec / StepSec));
        _headingSeen = new double[seen];
        _rateSeen = new double[seen];
        _speedKeep = Math.Exp(-StepSec / SpeedLagSec);
        _handKeep = Math.Exp(-StepSec / s.Pilot.HandLagSec);
        _engineKeep = Math.Exp(-StepSec / s.Propeller.EngineLagSec);
        _firstKeep = Math.Exp(-StepSec / s.Wing.TurnLagSec);
        HeadingRad = s.Start.HeadingRad;
        AltitudeM = s.Start.AltitudeM;
        bool onGround = s.Legs[0].Control is LegControl.Ground or LegControl.TakeOff;
        SpeedMPerSec = onGround ? 0 : s.Wing.TrimSpeedMPerSec;
        Begin(s.Legs[0]); // so that the engine starts settled in the first leg's power
        RotationRatio = RatioFor(ThrottleSet, s.Legs[0]);
        ThrustN = ThrustAt(RotationRatio);
        _table.At(ThrustN, out _row);
        _twist = _row.Twist;
        _roll = _row.Roll;
        Array.Fill(_headingSeen, HeadingRad);
        UpdateWind();
    }

    public double TimeSec => _step * StepSec;
    public long StepNumber => _step;
    public double HeadingRad { get; private set; }
    public double TurnRateRadPerSec { get; private set; }
    public double TwistRateRadPerSec => _twistRate;
    public double SpeedMPerSec { get; private set; }
    public double AltitudeM { get; private set; }
    public double ClimbMPerSec { get; private set; }
    public double NorthM { get; private set; }
    public double EastM { get; private set; }
    public double WindNorth { get; private set; }
    public double WindEast { get; private set; }
    public double VelocityNorth => Moving * ((SpeedMPerSec * Math.Cos(HeadingRad)) + WindNorth);
    public double VelocityEast => Moving * ((SpeedMPerSec * Math.Sin(HeadingRad)) + WindEast);
    public double ThrottleSet { get; private set; }
    public double RotationRatio { get; private set; }
    public double ThrustN { get; private set; }
    public FlightLeg Leg => _leg;
    public int LegNumber { get; private set; } = -1; // the constructor begins the first leg once more
    public bool AtLegStart => _step == _legStart;
    public double BrakeLeftM { get; private set; }
    public double BrakeRightM { get; private set; }
    public double BankRad => Math.Atan(SpeedMPerSec * TurnRateRadPerSec / PhysicalConstants.StandardGravity);

    /// <summary>The frame above the horizontal, rad: its axes as it hangs engine off.</summary>
    public double PitchRad => OnGround ? 0 : _row.Pitch - _s.Propeller.HangBackRad;
    public bool OnGround => _landed || _leg.Control == LegControl.Ground;
    public bool HandsOff => _leg.Control == LegControl.HandsOff;
    public bool LegDone => _turnDone || (_step - _legStart) * StepSec >= _leg.DurationSec - (StepSec / 2);

    /// <summary>Share of the air's motion that moves the machine: on the ground it stands still.</summary>
    private double Moving => OnGround ? 0 : Math.Min(1, SpeedMPerSec / (FlyingShareOfTrimSpeed * _s.Wing.TrimSpeedMPerSec));

    public void Begin(FlightLeg leg)
    {
        _leg = leg;
        LegNumber++;
        _legStart = _step;
        _turnDone = false;
        _headingAtStart = HeadingRad;
        _speedAtStart = SpeedMPerSec;
        if (leg.Control is LegControl.HoldHeading or LegControl.Land)
        {
            double wanted = leg.HeadingRad ?? HeadingRad;
            _target = HeadingRad + Math.IEEERemainder(wanted - HeadingRad, Math.Tau);
        }
        if (leg.Control != _lastControl)
            _integral = 0;
        _lastControl = leg.Control;
        if (leg.Control is not (LegControl.Ground or LegControl.Land))
            _landed = false;
        double shift = leg.Control switch
        {
            LegControl.WeightShift => leg.WeightShiftM,
            LegControl.Ballast => leg.BallastKg * leg.BallastArmM / (_s.Mass.PilotKg + _s.Mass.PowerUnitKg),
            _ => 0,
        };
        if (!_tables.TryGetValue(shift, out ThrustTable? table))
            _tables[shift] = table = new ThrustTable(_s.WithCgShift(shift));
        _table = table;
        ThrottleSet = leg.ThrottleFraction ?? leg.Power switch
        {
            LegPower.Off or LegPower.Idle => 0,
            LegPower.Full => 1,
            _ => LevelThrottle(),
        };
    }

    public void Step()
    {
        _step++;
        int slot = (int)(_step % _headingSeen.Length);
        double headingSeen = _headingSeen[slot];
        double rateSeen = _rateSeen[slot];
        _headingSeen[slot] = HeadingRad;
        _rateSeen[slot] = TurnRateRadPerSec;
        Steer(headingSeen, rateSeen);

        double ratio = RatioFor(ThrottleSet, _leg);
        RotationRatio = ratio + (_engineKeep * (RotationRatio - ratio));
        ThrustN = ThrustAt(RotationRatio);
        _table.At(ThrustN, out _row);
        StepFrame();
        UpdateWind();
        if (OnGround || (_leg.Control == LegControl.TakeOff && SpeedMPerSec < FlyingShareOfTrimSpeed * _s.Wing.TrimSpeedMPerSec))
        {
            StandOrRun();
            return;
        }
        (double lift, double thermalTurn) = ThermalNow();
        StepTurn(thermalTurn);
        StepSpeed(lift);
        NorthM += StepSec * VelocityNorth;
        EastM += StepSec * VelocityEast;
    }

    private void StandOrRun()
    {
        TurnRateRadPerSec = 0;
        _turnAcceleration = 0;
        ClimbMPerSec = 0;
        double progress = (_step - _legStart) * StepSec / _leg.DurationSec;
        SpeedMPerSec = _leg.Control == LegControl.TakeOff ? Math.Max(SpeedMPerSec, progress * _s.Wing.TrimSpeedMPerSec) : 0;
        NorthM += StepSec * VelocityNorth;
        EastM += StepSec * VelocityEast;
    }

    /// <summary>The frame's swing in yaw and roll on its risers under the moments of weight, thrust and torque.</summary>
    private void StepFrame()
    {
        double stiffness = _table.StiffnessNmPerRad * _row.Riser / _table.WeightN;
        double omega = Math.Sqrt(stiffness / _s.Mass.YawInertiaKgM2);
        _twistRate += StepSec * ((omega * omega * (_row.Twist - _twist)) - (2 * _s.Mass.SwingDamping * omega * _twistRate));
        _twist += StepSec * _twistRate;
        double omegaRoll = Math.Tau * _s.Mass.RollFrequencyHz;
        double wanted = _row.Roll - (ThrustN * _row.ThrustArm * (Math.Sin(_twist) - Math.Sin(_row.Twist)));
        _rollRate += StepSec * ((omegaRoll * omegaRoll * (wanted - _roll)) - (2 * _s.Mass.SwingDamping * omegaRoll * _rollRate));
        _roll += StepSec * _rollRate;
    }

    private void StepTurn(double thermalTurn)
    {
        WingSetup wing = _s.Wing;
        double stiffness = _table.StiffnessNmPerRad * _row.Riser / _table.WeightN;
        double yaw = _row.Yaw + (stiffness * (_twist - _row.Twist));
        double input = (wing.SensitivityRadPerSecPerM * (_roll + (wing.YawRatio * yaw)) / _table.WeightN)
            + wing.ConstantPullRadPerSec
            + _s.Brakes.Turn(BrakeLeftM, BrakeRightM)
            + (wing.TrimmerTurnPerMeter * (_leg.TrimmerRightM - _leg.TrimmerLeftM))
            + _disturbance.Step() + _second.Step() + thermalTurn;
        double before = TurnRateRadPerSec;
        if (wing.Response == TurnResponse.FirstOrder)
        {
            TurnRateRadPerSec = input + (_firstKeep * (TurnRateRadPerSec - input));
        }
        else
        {
            double omega = Math.Tau / wing.TurnPeriodSec;
            _turnAcceleration += StepSec * ((omega * omega * (input - TurnRateRadPerSec)) - (2 * wing.TurnDamping * omega * _turnAcceleration));
            TurnRateRadPerSec += StepSec * _turnAcceleration;
        }
        HeadingRad += StepSec * (before + TurnRateRadPerSec) / 2;
    }

    private void StepSpeed(double lift)
    {
        double brakes = (BrakeLeftM + BrakeRightM) / (2 * _s.Brakes.FullTravelM);
        double wanted = (_s.Wing.TrimSpeedMPerSec * (1 - (SlowdownAtFullBrake * Math.Min(1, brakes)))) + _speedNoise.Step();
        SpeedMPerSec = wanted + (_speedKeep * (SpeedMPerSec - wanted));
        double load = 1 / Math.Cos(BankRad);
        double drag = _levelDragN * load * Math.Sqrt(load); // sink grows as load to 3/2 at one angle of attack
        double climb = ((ThrustN - drag) / (_allKg * PhysicalConstants.StandardGravity) * SpeedMPerSec) + lift;
        ClimbMPerSec += StepSec * (climb - ClimbMPerSec) / ClimbLagSec;
        AltitudeM += StepSec * ClimbMPerSec;
        if (_leg.Control == LegControl.Land && AltitudeM <= _s.Start.AltitudeM)
        {
            AltitudeM = _s.Start.AltitudeM;
            _landed = true;
        }
    }

    private void Steer(double headingSeen, double rateSeen)
    {
        PilotSetup pilot = _s.Pilot;
        double left = 0;
        double right = 0;
        double noise = _handNoise.Step();
        switch (_leg.Control)
        {
            case LegControl.Brakes:
                left = _leg.BrakeLeftM + (_leg.BrakeLeftM > 0 ? noise : 0);
                right = _leg.BrakeRightM + (_leg.BrakeRightM > 0 ? noise : 0);
                break;
            case LegControl.HoldHeading:
            case LegControl.Land:
            case LegControl.TakeOff when SpeedMPerSec > FlyingShareOfTrimSpeed * _s.Wing.TrimSpeedMPerSec:
                double error = (_leg.Control == LegControl.TakeOff ? _headingAtStart : _target) - headingSeen;
                error = Math.CopySign(Math.Max(0, Math.Abs(error) - pilot.HeadingDeadBandRad), error);
                _integral = Math.Clamp(_integral + (StepSec * pilot.IntegralGain * error), -MostTrimmedOutRadPerSec, MostTrimmedOutRadPerSec);
                Difference((((pilot.HeadingGain * error) - (pilot.RateGain * rateSeen) + _integral) / _s.Brakes.TurnPerMeter) + noise);
                break;
            case LegControl.Turn:
                double turned = HeadingRad - _headingAtStart;
                double lead = Math.Abs(TurnRateRadPerSec) * TurnLeadSec;
                _turnDone = Math.Abs(turned) >= Math.Abs(_leg.TurnRad) - lead && turned * _leg.TurnRad >= 0;
                Difference(Math.CopySign(pilot.TurnBrakeM, _leg.TurnRad) + noise);
                break;
            case LegControl.Circle:
                _integral = Math.Clamp(_integral + (StepSec * CircleGainPerSec * (_leg.TurnRateRadPerSec - rateSeen)), -MostTrimmedOutRadPerSec, MostTrimmedOutRadPerSec);
                Difference(((_leg.TurnRateRadPerSec + _integral) / _s.Brakes.TurnPerMeter) + noise);
                break;
            default:
                break;
        }
        BrakeLeftM = Math.Clamp(left + (_handKeep * (BrakeLeftM - left)), 0, _s.Brakes.FullTravelM);
        BrakeRightM = Math.Clamp(right + (_handKeep * (BrakeRightM - right)), 0, _s.Brakes.FullTravelM);

        void Difference(double wanted)
        {
            double d = Math.Clamp(wanted, -MaxPilotSteerM, MaxPilotSteerM);
            left = pilot.RestingBrakeM + Math.Max(0, -d);
            right = pilot.RestingBrakeM + Math.Max(0, d);
        }
    }

    private void UpdateWind()
    {
        double height = Math.Max(-200, AltitudeM - _s.Start.AltitudeM);
        double shear = 1 + (_s.Air.ShearPer100M * height / 100);
        WindNorth = (_s.Air.WindNorthMPerSec * shear) + _slowNorth.Step() + _gustNorth.Step();
        WindEast = (_s.Air.WindEastMPerSec * shear) + _slowEast.Step() + _gustEast.Step();
    }

    private (double Lift, double Turn) ThermalNow()
    {
        double width = _s.Air.ThermalCrossingSec / 2;
        double lift = 0;
        double turn = 0;
        while (_thermalFrom < _thermals.Length && _thermals[_thermalFrom].Time < TimeSec - (4 * width))
            _thermalFrom++;
        for (int i = _thermalFrom; i < _thermals.Length && _thermals[i].Time < TimeSec + (4 * width); i++)
        {
            double z = (TimeSec - _thermals[i].Time) / width;
            double bell = Math.Exp(-0.5 * z * z);
            lift += _thermals[i].Lift * bell;
            turn += _thermals[i].Turn * bell;
        }
        return (lift, turn);
    }

    private static (double Time, double Lift, double Turn)[] Thermals(Scenario s)
    {
        if (!(s.Air.ThermalsPerHour > 0))
            return [];
        var random = new RandomStream(s.Seed, 7);
        var met = new List<(double, double, double)>();
        double longest = s.Legs.Sum(leg => leg.DurationSec);
        for (double t = Gap(); t < longest; t += Gap())
            met.Add((t, s.Air.ThermalLiftMPerSec * random.Normal(), s.Air.ThermalTurnRadPerSec * random.Normal()));
        return [.. met];

        double Gap() => -Math.Log(1 - random.Uniform()) * 3600 / s.Air.ThermalsPerHour;
    }

    private double Density()
    {
        // ICAO standard atmosphere below 11 km, density over that at sea level: (1 − 0.0065 h/288.15)^4.25588
        return _s.Air.DensityFollowsAltitude ? Math.Pow(1 - (0.0065 * AltitudeM / 288.15), 4.25588) : 1;
    }

    private double ThrustAt(double ratio) =>
        _s.Propeller.Clutch && ratio < PropellerSetup.ClutchOverIdle * _s.Propeller.IdleRatio ? 0 : _s.Propeller.FullThrustN * Density() * ratio * ratio;

    private double RatioFor(double throttle, FlightLeg leg)
    {
        PropellerSetup p = _s.Propeller;
        return leg.Power == LegPower.Off && leg.ThrottleFraction is null
            ? 0
            : p.IdleRatio + ((1 - p.IdleRatio) * Math.Pow(throttle, p.ThrottleExponent));
    }

    private double LevelThrottle()
    {
        PropellerSetup p = _s.Propeller;
        double ratio = Math.Sqrt(_levelDragN / (p.FullThrustN * Density()));
        double x = Math.Clamp((ratio - p.IdleRatio) / (1 - p.IdleRatio), 0, 1);
        return Math.Pow(x, 1 / p.ThrottleExponent);
    }
}
