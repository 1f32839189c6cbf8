using System.Collections.Immutable;
using System.Text;
using TrimFit.Core.Logs;

namespace TrimFit.Simulation;

/// <summary>The files that <c>trimfit synth</c> writes for a scenario.</summary>
public static class FlightFiles
{
    private static readonly HashSet<ChannelRole> _engine =
    [
        ChannelRole.Rpm, ChannelRole.Throttle, ChannelRole.Voltage, ChannelRole.Current, ChannelRole.YawRate, ChannelRole.Heading,
        ChannelRole.BrakeLeft, ChannelRole.BrakeRight, ChannelRole.TrimmerLeft, ChannelRole.TrimmerRight, ChannelRole.Airspeed,
        ChannelRole.HandsOff, ChannelRole.Marker,
    ];

    /// <summary>Logs, rig, sheet and truth of a flight.</summary>
    /// <param name="flight">The flight.</param>
    /// <param name="stem">Start of each file's name, such as <c>uncorrected</c>.</param>
    /// <exception cref="ArgumentException">The flight lacks a sensor that its kind of log file needs.</exception>
    public static ImmutableArray<FlightFile> Of(SimulatedFlight flight, string stem)
    {
        ArgumentNullException.ThrowIfNull(flight);
        ArgumentException.ThrowIfNullOrEmpty(stem);
        return
        [
            .. Logs(flight, stem),
            new(stem + "-rig.toml", Encoding.UTF8.GetBytes(RigText.Write(flight.Scenario))),
            new(stem + "-sheet.toml", Encoding.UTF8.GetBytes(SheetText.Write(flight))),
            new(stem + "-truth.json", Encoding.UTF8.GetBytes(TruthJson.Write(flight))),
        ];
    }

    /// <summary>The log files alone.</summary>
    /// <param name="flight">The flight.</param>
    /// <param name="stem">Start of each file's name.</param>
    /// <exception cref="ArgumentException">The flight lacks a sensor that its kind of log file needs.</exception>
    public static ImmutableArray<FlightFile> Logs(SimulatedFlight flight, string stem)
    {
        ArgumentNullException.ThrowIfNull(flight);
        ArgumentException.ThrowIfNullOrEmpty(stem);
        FlightLog log = flight.Log;
        OutputSetup output = flight.Scenario.Output;
        CsvDialect engine = output.Dialect with { ClockOffsetSec = output.Dialect.ClockOffsetSec + output.EngineClockOffsetSec };
        FlightFile EngineCsv() => new(stem + "-engine.csv", LogWriters.Csv(log, engine, _engine));
        return output.Logs switch
        {
            LogSet.Csv => [new(stem + ".csv", LogWriters.Csv(log, output.Dialect))],
            LogSet.EngineCsvAndIgc => [EngineCsv(), new(stem + ".igc", LogWriters.Igc(log))],
            LogSet.EngineCsvAndGpx => [EngineCsv(), new(stem + ".gpx", LogWriters.Gpx(log))],
            LogSet.EngineCsvAndNmea => [EngineCsv(), new(stem + ".nmea", LogWriters.Nmea(log))],
            LogSet.PhoneAndGpx =>
            [
                .. PhoneFolder(log, stem + "-phone"),
                new(stem + ".gpx", LogWriters.Gpx(log)),
                .. log.Has(ChannelRole.Rpm) || log.Has(ChannelRole.Throttle) || log.Has(ChannelRole.BrakeLeft) ? [EngineCsv()] : (FlightFile[])[],
            ],
            _ => [new(stem + ".igc", LogWriters.Igc(log))],
        };
    }

    /// <summary>The folder a phone writes: one CSV file for each of its sensors, on one clock.</summary>
    /// <param name="log">A log with a three-axis gyro and accelerometer.</param>
    /// <param name="folder">Name of the folder.</param>
    /// <exception cref="ArgumentException">The log has no three-axis gyro or no date.</exception>
    public static ImmutableArray<FlightFile> PhoneFolder(FlightLog log, string folder)
    {
        ArgumentNullException.ThrowIfNull(log);
        if (!log.Has(ChannelRole.GyroZ))
            throw new ArgumentException("has no three-axis gyro: set inertial_hz in [sensors]", nameof(log));
        var dialect = new CsvDialect { Time = CsvTime.EpochMilliseconds };
        ImmutableArray<FlightFile>.Builder files = ImmutableArray.CreateBuilder<FlightFile>();
        Add("gyroscope.csv", [ChannelRole.GyroX, ChannelRole.GyroY, ChannelRole.GyroZ]);
        Add("accelerometer.csv", [ChannelRole.AccelerationX, ChannelRole.AccelerationY, ChannelRole.AccelerationZ]);
        Add("location.csv", [ChannelRole.Latitude, ChannelRole.Longitude, ChannelRole.GroundSpeed, ChannelRole.GroundCourse]);
        Add("barometer.csv", [ChannelRole.Altitude, ChannelRole.VerticalSpeed]);
        Add("compass.csv", [ChannelRole.Heading]);
        return files.ToImmutable();

        void Add(string name, HashSet<ChannelRole> roles)
        {
            if (roles.Any(log.Has))
                files.Add(new(folder + "/" + name, LogWriters.Csv(log, dialect, roles)));
        }
    }
}
