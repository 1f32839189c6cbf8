using TrimFit.Core.Logs;
using TrimFit.Core.Units;

namespace TrimFit.Simulation;

/// <summary>The sensors of a flight: what each makes of the motion, at its own rate, with its own faults.</summary>
internal sealed class FlightRecorder
{
    private const double SemiMajorAxisM = 6378137;             // WGS-84
    private const double EccentricitySquared = 6.69437999014e-3; // WGS-84
    private const double ElectricEfficiency = 0.82;            // shaft power over battery power: an assumption of the made-up electric machine
    private const double BatteryVolt = 58;
    private const double BatteryOhm = 0.03;

    private readonly Scenario _s;
    private readonly SensorSuite _sensors;
    private readonly List<double> _time = [];
    private readonly Dictionary<ChannelRole, List<double>> _columns = [];
    private readonly RandomStream _gyro, _gps, _compass, _barometer, _rpm, _brakes, _airspeed, _phone;
    private readonly MarkovProcess _gpsNorth, _gpsEast;
    private readonly (double From, double To)[] _dropouts, _freezes;
    private readonly double[] _rateRing, _ratioRing;
    private readonly double[,] _fixRing;
    private readonly double _metersPerRadNorth, _metersPerRadEast;
    private readonly Rotation _mounted, _mountedAfterSlip;
    private (double Latitude, double Longitude, double North, double East) _lastFix;
    private double _bankBefore, _pitchBefore;

    public FlightRecorder(Scenario s, double longestSec)
    {
        _s = s;
        _sensors = s.Sensors;
        _gyro = new(s.Seed, 11);
        _gps = new(s.Seed, 12);
        _compass = new(s.Seed, 13);
        _barometer = new(s.Seed, 14);
        _rpm = new(s.Seed, 15);
        _brakes = new(s.Seed, 16);
        _airspeed = new(s.Seed, 17);
        _phone = new(s.Seed, 18);
        var position = new RandomStream(s.Seed, 19);
        _gpsNorth = new(position, _sensors.GpsPositionNoiseM, _sensors.GpsPositionTauSec, FlightMotion.StepSec);
        _gpsEast = new(position, _sensors.GpsPositionNoiseM, _sensors.GpsPositionTauSec, FlightMotion.StepSec);
        _dropouts = Spans(new RandomStream(s.Seed, 20), _sensors.GpsDropoutsPerHour, _sensors.GpsDropoutSec, longestSec);
        _freezes = Spans(new RandomStream(s.Seed, 21), _sensors.GpsFreezesPerHour, _sensors.GpsFreezeSec, longestSec);
        _rateRing = new double[1 + (int)Math.Round(_sensors.GyroDelaySec / FlightMotion.StepSec)];
        _ratioRing = new double[_rateRing.Length];
        _fixRing = new double[1 + (int)Math.Round(_sensors.GpsDelaySec / FlightMotion.StepSec), 4];
        double sin = Math.Sin(s.Start.LatitudeRad);
        double w = 1 - (EccentricitySquared * sin * sin);
        _metersPerRadNorth = SemiMajorAxisM * (1 - EccentricitySquared) / (w * Math.Sqrt(w));
        _metersPerRadEast = SemiMajorAxisM / Math.Sqrt(w) * Math.Cos(s.Start.LatitudeRad);
        _mounted = Mounted(_sensors.Mounting);
        _mountedAfterSlip = Mounted(_sensors.MountingAfterSlip);
    }

    public void Record(FlightMotion m)
    {
        double northError = _gpsNorth.Step();
        double eastError = _gpsEast.Step();
        double bank = m.BankRad;
        double pitch = m.PitchRad;
        double seen = (_sensors.GyroLevelled ? m.TurnRateRadPerSec : m.TurnRateRadPerSec * Math.Cos(bank) * Math.Cos(pitch)) + m.TwistRateRadPerSec;
        int oldest = (int)((m.StepNumber + 1) % _rateRing.Length);
        int newest = (int)(m.StepNumber % _rateRing.Length);
        _rateRing[newest] = seen;
        _ratioRing[newest] = m.RotationRatio * m.RotationRatio;
        int newestFix = (int)(m.StepNumber % _fixRing.GetLength(0));
        int oldestFix = (int)((m.StepNumber + 1) % _fixRing.GetLength(0));
        _fixRing[newestFix, 0] = m.NorthM;
        _fixRing[newestFix, 1] = m.EastM;
        _fixRing[newestFix, 2] = m.VelocityNorth;
        _fixRing[newestFix, 3] = m.VelocityEast;

        if (Due(_sensors.GyroHz, m))
        {
            Put(m, ChannelRole.YawRate, (_sensors.GyroScale * _rateRing[oldest]) + _sensors.GyroBiasRadPerSec
                + (_sensors.GyroVibrationRadPerSec * _ratioRing[oldest]) + (_sensors.GyroNoiseRadPerSec * _gyro.Normal()));
        }
        if (Due(_sensors.GpsHz, m))
            PutFix(m, oldestFix, northError, eastError);
        if (Due(_sensors.CompassHz, m))
        {
            double heading = m.HeadingRad + _sensors.CompassOffsetRad + (_sensors.CompassNoiseRad * _compass.Normal());
            Put(m, ChannelRole.Heading, heading - (Math.Tau * Math.Floor(heading / Math.Tau)));
        }
        if (Due(_sensors.BarometerHz, m))
        {
            Put(m, ChannelRole.Altitude, m.AltitudeM + (_sensors.AltitudeNoiseM * _barometer.Normal()));
            Put(m, ChannelRole.VerticalSpeed, m.ClimbMPerSec + (_sensors.VerticalSpeedNoiseMPerSec * _barometer.Normal()));
        }
        if (Due(_sensors.RpmHz, m))
        {
            double rev = PropellerRevPerSec(m);
            double noise = _sensors.RpmNoiseRevPerSec * _rpm.Normal();
            Put(m, ChannelRole.Rpm, _sensors.RpmFactor * (rev < 1 ? 0 : Math.Max(0, rev + noise)));
        }
        if (Due(_sensors.ThrottleHz, m))
            Put(m, ChannelRole.Throttle, m.ThrottleSet);
        if (Due(_sensors.ElectricHz, m))
            PutElectric(m);
        if (Due(_sensors.BrakesHz, m))
            PutBrakes(m);
        if (Due(_sensors.AirspeedHz, m))
            Put(m, ChannelRole.Airspeed, Math.Max(0, m.SpeedMPerSec + (_sensors.AirspeedNoiseMPerSec * _airspeed.Normal())));
        if (Due(_sensors.InertialHz, m))
            PutInertial(m, bank, pitch);
        if (_sensors.MarksHandsOff && Due(_sensors.BrakesHz > 0 ? _sensors.BrakesHz : Math.Max(_sensors.GyroHz, _sensors.GpsHz), m))
            Put(m, ChannelRole.HandsOff, m.HandsOff ? 1 : 0);
        if (Due(_sensors.TrimmersHz, m))
        {
            Put(m, ChannelRole.TrimmerLeft, m.Leg.TrimmerLeftM);
            Put(m, ChannelRole.TrimmerRight, m.Leg.TrimmerRightM);
        }
        if (Due(_sensors.EngineNoiseHz, m))
            Put(m, ChannelRole.EngineNoise, Math.Clamp(0.04 + (0.75 * m.RotationRatio) + (0.03 * _rpm.Normal()), 0, 0.999));
        if (_sensors.MarksLegs && m.AtLegStart)
            Put(m, ChannelRole.Marker, m.LegNumber);
        _bankBefore = bank;
        _pitchBefore = pitch;
    }

    public FlightLog ToLog()
    {
        if (_time.Count == 0)
            throw new SimulationException("The scenario's sensors log nothing: give at least one of them a rate.");
        return FlightLog.Create([.. _time], _columns.Select(column => new KeyValuePair<ChannelRole, double[]>(column.Key, Filled(column.Value))), new()
        {
            StartUtc = _s.Start.TimeUtc,
            BrakeUnit = _sensors.BrakesAsFraction ? ControlUnit.Fraction : ControlUnit.Meter,
            TrimmerUnit = ControlUnit.Meter,
        });
    }

    private double PropellerRevPerSec(FlightMotion m) => _s.Propeller.Clutch && m.ThrustN == 0 ? 0 : m.RotationRatio * _s.Propeller.FullRevPerSec;

    private void PutFix(FlightMotion m, int slot, double northError, double eastError)
    {
        double velocityNorth = _fixRing[slot, 2] + (_sensors.GpsVelocityNoiseMPerSec * _gps.Normal());
        double velocityEast = _fixRing[slot, 3] + (_sensors.GpsVelocityNoiseMPerSec * _gps.Normal());
        if (Inside(_dropouts, m.TimeSec))
            return;
        if (m.StepNumber == 0 || !Inside(_freezes, m.TimeSec))
        {
            double latitude = _s.Start.LatitudeRad + ((_fixRing[slot, 0] + northError) / _metersPerRadNorth);
            double longitude = _s.Start.LongitudeRad + ((_fixRing[slot, 1] + eastError) / _metersPerRadEast);
            _lastFix = (latitude, longitude, velocityNorth, velocityEast);
        }
        double course = Math.Atan2(_lastFix.East, _lastFix.North);
        Put(m, ChannelRole.Latitude, _lastFix.Latitude);
        Put(m, ChannelRole.Longitude, _lastFix.Longitude);
        Put(m, ChannelRole.GroundSpeed, Math.Sqrt((_lastFix.North * _lastFix.North) + (_lastFix.East * _lastFix.East)));
        Put(m, ChannelRole.GroundCourse, course < 0 ? course + Math.Tau : course);
    }

    private void PutBrakes(FlightMotion m)
    {
        double unit = _sensors.BrakesAsFraction ? _s.Brakes.FullTravelM : 1;
        double half = _sensors.BrakeZeroErrorM / 2;
        Put(m, ChannelRole.BrakeLeft, (m.BrakeLeftM - half + (_sensors.BrakeNoiseM * _brakes.Normal())) / unit);
        Put(m, ChannelRole.BrakeRight, (m.BrakeRightM + half + (_sensors.BrakeNoiseM * _brakes.Normal())) / unit);
    }

    private void PutElectric(FlightMotion m)
    {
        double power = Math.Tau * PropellerRevPerSec(m) * _s.Propeller.TorqueAt(m.ThrustN) / ElectricEfficiency;
        // P = (V0 − I R) I, the smaller root
        double current = (BatteryVolt - Math.Sqrt((BatteryVolt * BatteryVolt) - Math.Min(4 * BatteryOhm * power, BatteryVolt * BatteryVolt))) / (2 * BatteryOhm);
        double voltage = BatteryVolt - (BatteryOhm * current);
        Put(m, ChannelRole.Voltage, voltage + (0.02 * _rpm.Normal()));
        Put(m, ChannelRole.Current, Math.Max(0, current + (0.3 * _rpm.Normal())));
    }

    private void PutInertial(FlightMotion m, double bank, double pitch)
    {
        double bankRate = m.StepNumber == 0 ? 0 : (bank - _bankBefore) / FlightMotion.StepSec;
        double pitchRate = m.StepNumber == 0 ? 0 : (pitch - _pitchBefore) / FlightMotion.StepSec;
        (double sb, double cb) = Math.SinCos(bank);
        (double sp, double cp) = Math.SinCos(pitch);
        double turn = m.TurnRateRadPerSec;
        var rate = new Vector(
            bankRate - (turn * sp),
            (pitchRate * cb) + (turn * cp * sb),
            (turn * cp * cb) - (pitchRate * sb) + m.TwistRateRadPerSec);
        double felt = PhysicalConstants.StandardGravity / cb; // a coordinated turn: no side force in the frame
        var force = new Vector(felt * sp, 0, -felt * cp);
        Rotation mounted = _sensors.SlipTimeSec is double slip && m.TimeSec >= slip ? _mountedAfterSlip : _mounted;
        rate = mounted.Inward(rate);
        force = mounted.Inward(force);
        double offset = _sensors.GyroBiasRadPerSec + (_sensors.GyroVibrationRadPerSec * m.RotationRatio * m.RotationRatio);
        double shake = _sensors.AccelerationNoiseMPerSec2 + (_sensors.AccelerationVibrationMPerSec2 * m.RotationRatio * m.RotationRatio);
        Put(m, ChannelRole.GyroX, rate.X + offset + (_sensors.GyroNoiseRadPerSec * _phone.Normal()));
        Put(m, ChannelRole.GyroY, rate.Y + offset + (_sensors.GyroNoiseRadPerSec * _phone.Normal()));
        Put(m, ChannelRole.GyroZ, rate.Z + offset + (_sensors.GyroNoiseRadPerSec * _phone.Normal()));
        Put(m, ChannelRole.AccelerationX, force.X + (shake * _phone.Normal()));
        Put(m, ChannelRole.AccelerationY, force.Y + (shake * _phone.Normal()));
        Put(m, ChannelRole.AccelerationZ, force.Z + (shake * _phone.Normal()));
    }

    private void Put(FlightMotion m, ChannelRole role, double value)
    {
        if (_time.Count == 0 || _time[^1] != m.TimeSec) // the same step gives the same bits
            _time.Add(m.TimeSec);
        if (!_columns.TryGetValue(role, out List<double>? column))
            _columns[role] = column = [];
        while (column.Count < _time.Count - 1)
            column.Add(double.NaN);
        column.Add(value);
    }

    private double[] Filled(List<double> column)
    {
        while (column.Count < _time.Count)
            column.Add(double.NaN);
        return [.. column];
    }

    private static bool Due(int hertz, FlightMotion m) => hertz > 0 && m.StepNumber % (SensorSuite.StepsPerSecond / hertz) == 0;

    private static bool Inside((double From, double To)[] spans, double time)
    {
        foreach ((double from, double to) in spans)
        {
            if (time >= from && time < to)
                return true;
        }
        return false;
    }

    private static (double From, double To)[] Spans(RandomStream random, double perHour, double length, double until)
    {
        if (!(perHour > 0))
            return [];
        var spans = new List<(double, double)>();
        for (double t = Gap(); t < until; t += length + Gap())
            spans.Add((t, t + length));
        return [.. spans];

        double Gap() => -Math.Log(1 - random.Uniform()) * 3600 / perHour;
    }

    private static Rotation Mounted(MountingAttitude a) => Rotation.FromAngles(a.RollRad, a.PitchRad, a.YawRad);
}
