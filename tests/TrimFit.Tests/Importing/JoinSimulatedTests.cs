using TrimFit.Core.Logs;
using TrimFit.Core.Turns;
using TrimFit.Import;
using TrimFit.Import.Sheets;
using TrimFit.Simulation;
using TrimFit.Tests.Turns;

namespace TrimFit.Tests.Importing;

/// <summary>Sets of files written by the simulator, whose writers share no code with the import.</summary>
public class JoinSimulatedTests
{
    private const double EngineAheadSec = 17.4;

    [Theory]
    [InlineData(LogSet.EngineCsvAndIgc, 1u)]
    [InlineData(LogSet.EngineCsvAndIgc, 2u)]
    [InlineData(LogSet.EngineCsvAndGpx, 3u)]
    [InlineData(LogSet.EngineCsvAndNmea, 4u)]
    public void The_engine_loggers_clock_is_found_within_a_fifth_of_a_second(LogSet set, uint seed)
    {
        SimulatedFlight flight = Fly(set, seed, new() { GyroHz = 10 });
        FlightImport import = FlightReader.Read(Sources(flight));
        InputFile engine = import.Diagnostics.Files.Single(f => f.Name == "f-engine.csv");
        double expected = -EngineAheadSec - (import.Flight.StartUtc!.Value - flight.Log.StartUtc!.Value).TotalSeconds;
        Assert.InRange(engine.ClockOffsetSec!.Value - expected, -0.2, 0.2);
        Assert.InRange(Math.Abs(engine.ClockOffsetSec.Value - expected) / engine.ClockOffsetStdErrorSec!.Value, 0, 4);
    }

    [Fact]
    public void An_absolute_engine_clock_that_is_wrong_is_moved_by_what_it_is_wrong()
    {
        SimulatedFlight flight = Fly(LogSet.EngineCsvAndIgc, 5, new() { GyroHz = 10 }, new() { Time = CsvTime.Iso8601 });
        InputFile engine = FlightReader.Read(Sources(flight)).Diagnostics.Files.Single(f => f.Name == "f-engine.csv");
        Assert.InRange(engine.ClockOffsetSec!.Value, -EngineAheadSec - 0.2, -EngineAheadSec + 0.2);
    }

    [Fact]
    public void A_phone_folder_and_a_track_and_an_engine_log_are_one_flight()
    {
        SimulatedFlight flight = Fly(LogSet.PhoneAndGpx, 6, new() { InertialHz = 25 });
        FlightImport import = FlightReader.Read(Sources(flight));
        Assert.All<ChannelRole>([ChannelRole.GyroX, ChannelRole.GyroY, ChannelRole.GyroZ, ChannelRole.AccelerationX, ChannelRole.Latitude, ChannelRole.Rpm], role => Assert.True(import.Flight.Has(role), role.ToString()));
        Assert.All(import.Diagnostics.Files.Where(f => f.Name != "f-engine.csv"), file => Assert.Null(file.ClockOffsetSec));
        double expected = -EngineAheadSec - (import.Flight.StartUtc!.Value - flight.Log.StartUtc!.Value).TotalSeconds;
        InputFile engine = import.Diagnostics.Files.Single(f => f.Name == "f-engine.csv");
        Assert.InRange((engine.ClockOffsetSec!.Value - expected) / engine.ClockOffsetStdErrorSec!.Value, -3, 3);
    }

    [Theory]
    [InlineData(7u)]
    [InlineData(8u)]
    public void A_sloppy_sheets_edges_are_found_where_the_brakes_were_let_go(uint seed)
    {
        SimulatedFlight flight = Fly(LogSet.Csv, seed, new() { GyroHz = 10 }, sheetSloppinessSec: 1.5);
        SheetedFlight sheeted = SheetLegs.Apply(flight.Log, FlightSheetReader.Read("s.toml", SheetText.Write(flight)));
        Assert.Empty(sheeted.Warnings);
        var errors = new List<double>();
        foreach ((FlownLeg flown, FoundLeg found) in flight.Legs.Zip(sheeted.Legs))
        {
            if (found.Leg.Kind != SheetLegKind.HandsOff)
                continue;
            if (found.StartFoundIn is not null)
                errors.Add(Math.Abs(found.StartSec - flown.StartSec));
            else
                Assert.True(found.StartSec >= flown.StartSec, "an edge that no control shows is moved inside the leg");
            if (found.EndFoundIn is not null)
                errors.Add(Math.Abs(found.EndSec - flown.EndSec));
            else
                Assert.True(found.EndSec <= flown.EndSec, "an edge that no control shows is moved inside the leg");
        }
        errors.Sort();
        Assert.True(errors.Count >= 12, $"{errors.Count} of 24 edges found");
        Assert.InRange(errors[errors.Count / 2], 0, 1);
        Assert.InRange(errors[(int)(0.9 * errors.Count)], 0, 2.5);
    }

    [Fact]
    public void The_wind_of_a_real_recordings_circles_agrees_with_its_readme()
    {
        string path = Logs.RealLog("napret.igc");
        FlightLog flight = FlightReader.Read([LogSource.FromFile(path)]).Flight;
        (double[] north, double[] east, _) = GroundVelocity.Of(flight);
        // The README's figures are of the full circles: there the pilot flies at one speed, on the straight legs he does not.
        bool[] circling = new bool[flight.Count];
        for (int i = 5; i < circling.Length - 5; i++)
        {
            double turned = 0;
            for (int k = i - 4; k <= i + 5; k++)
                turned += Math.IEEERemainder(Math.Atan2(east[k], north[k]) - Math.Atan2(east[k - 1], north[k - 1]), 2 * Math.PI);
            circling[i] = Math.Abs(turned) > 1.5; // rad in 10 s
        }
        Wind? wind = WindFit.Fit(flight.TimeSec, north, east, circling, out _);
        Assert.NotNull(wind);
        // README of the samples: about 2 m/s from about 175 deg, airspeed about 9.6 m/s.
        Assert.InRange(wind.AirspeedMPerSec, 8.6, 10.6);
        double from = 175 * Math.PI / 180;
        Assert.InRange(Math.Sqrt(Math.Pow(wind.NorthMPerSec + (2 * Math.Cos(from)), 2) + Math.Pow(wind.EastMPerSec + (2 * Math.Sin(from)), 2)), 0, 1);
    }

    [Fact]
    public void Short_lines_on_the_sphere_are_good_to_three_per_mille()
    {
        // WGS-84 geodesics by GeographicLib (Karney 2013, J. Geodesy 87, 43): (45, 7) to (45.001, 7) 111.131787 m; to (45, 7.001) 78.846835 m.
        static double Line(double latitude, double longitude) => Import.Tracks.TrackSpeed.Between([0, 1],
            [double.DegreesToRadians(45), double.DegreesToRadians(latitude)], [double.DegreesToRadians(7), double.DegreesToRadians(longitude)])[1];
        Assert.InRange(Line(45.001, 7) / 111.131787, 0.997, 1.003);
        Assert.InRange(Line(45, 7.001) / 78.846835, 0.997, 1.003);
    }

    private static SimulatedFlight Fly(LogSet set, uint seed, SensorSuite sensors, CsvDialect? dialect = null, double sheetSloppinessSec = 0) =>
        FlightSimulator.Fly(SensorFlights.Ordinary(sensors, seed) with
        {
            Output = new() { Logs = set, EngineClockOffsetSec = EngineAheadSec, Dialect = dialect ?? new(), SheetSloppinessSec = sheetSloppinessSec },
        });

    private static List<LogSource> Sources(SimulatedFlight flight) => [.. FlightFiles.Logs(flight, "f").Select(file =>
        LogSource.FromBytes(Path.GetFileName(file.Name), file.Content.ToArray()) with { Recording = Path.GetDirectoryName(file.Name) is { Length: > 0 } folder ? folder : null })];
}
