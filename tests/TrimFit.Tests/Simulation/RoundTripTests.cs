using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Import.Sheets;
using TrimFit.Simulation;

namespace TrimFit.Tests.Simulation;

/// <summary>What the simulator writes, the import reads back.</summary>
public class RoundTripTests
{
    private static readonly SimulatedFlight _flight = FlightSimulator.Fly(new Scenario { Legs = TestCards.Alternating(headings: 1) });

    public static TheoryData<string> Dialects => [.. CsvDialects.All.Keys];

    [Theory]
    [MemberData(nameof(Dialects))]
    public void A_log_in_any_dialect_comes_back(string dialect)
    {
        FlightImport import = FlightReader.Read([LogSource.FromBytes("flight.csv", LogWriters.Csv(_flight.Log, CsvDialects.All[dialect]))]);
        FlightLog back = import.Flight;
        Assert.Equal(_flight.Log.Count, back.Count);
        Assert.Equal(0, import.Diagnostics.Files[0].LeftOut.Where(l => !l.Reason.Contains("header", StringComparison.Ordinal)).Sum(l => l.Rows));
        foreach ((ChannelRole role, double rounding) in new[] { (ChannelRole.BrakeLeft, 6e-5), (ChannelRole.Rpm, 0.009), (ChannelRole.Altitude, 0.06), (ChannelRole.VerticalSpeed, 0.006), (ChannelRole.GroundSpeed, 0.002), (ChannelRole.Latitude, 1e-9) })
            Alike(_flight.Log[role], back[role], rounding);
        Alike(_flight.Log[ChannelRole.YawRate], back.Has(ChannelRole.YawRate) ? back[ChannelRole.YawRate] : back[ChannelRole.GyroZ], 1e-4);
    }

    [Fact]
    public void Tracks_come_back_with_their_positions()
    {
        foreach ((string name, byte[] bytes, double rounding) in new[]
        {
            ("flight.gpx", LogWriters.Gpx(_flight.Log), 1e-9),
            ("flight.nmea", LogWriters.Nmea(_flight.Log), 3e-9),
            ("flight.igc", LogWriters.Igc(_flight.Log), 1.5e-7),
        })
        {
            FlightLog back = FlightReader.Read([LogSource.FromBytes(name, bytes)]).Flight;
            ReadOnlySpan<double> latitude = back[ChannelRole.Latitude];
            Assert.Equal(_flight.Log[ChannelRole.Latitude][0], latitude[0], rounding);
            Assert.True(latitude.Length >= (int)_flight.Log.TimeSec[^1], name);
        }
    }

    [Fact]
    public void The_rig_file_comes_back_in_SI()
    {
        for (ulong seed = 0; seed < 20; seed++)
        {
            Scenario s = RandomScenarios.Draw(seed);
            Rig rig = RigFileReader.Read("rig.toml", RigText.Write(s, s.Knowledge with { ThrustLine = true, Lines = true }));
            Assert.Equal(s.Mass.PilotKg, rig.Mass.PilotKg.Value, 1e-4);
            Assert.Equal(s.Propeller.Rotation, rig.Propeller.RotationSign);
            Assert.Equal(s.Propeller.FullThrustN, rig.Propeller.StaticThrustN!.Value.Value, 1e-3);
            Assert.Equal(s.Propeller.ThrustLineDepthM, rig.Propeller.ThrustLineDepthM.Value, 1e-6);
            Assert.Equal(s.Geometry.RightCarabinerM + s.Knowledge.CarabinerErrorM, rig.Carabiners.RightM.Value, 1e-6);
            Assert.Equal(s.Wing.LineSpreadM, rig.Wing.LineSpreadM!.Value.Value, 1e-4);
        }
    }

    [Theory]
    [InlineData(0)]
    [InlineData(2)]
    public void The_sheet_comes_back_leg_by_leg(double sloppiness)
    {
        SimulatedFlight flight = FlightSimulator.Fly(_flight.Scenario with { Output = new() { SheetSloppinessSec = sloppiness } });
        FlightSheet sheet = FlightSheetReader.Read("sheet.toml", SheetText.Write(flight));
        Assert.Equal(flight.Legs.Length, sheet.Legs.Length);
    }

    [Theory]
    [InlineData(LogSet.EngineCsvAndIgc)]
    [InlineData(LogSet.EngineCsvAndGpx)]
    [InlineData(LogSet.EngineCsvAndNmea)]
    public void Two_loggers_with_clocks_apart_are_joined(LogSet set)
    {
        Scenario s = new()
        {
            Legs = TestCards.Alternating(),
            Output = new() { Logs = set, Dialect = new() { Time = CsvTime.Iso8601 }, EngineClockOffsetSec = 17.4 },
        };
        FlightImport import = FlightReader.Read(
            [.. FlightFiles.Logs(FlightSimulator.Fly(s), "flight").Select(f => LogSource.FromBytes(f.Name, f.Content.ToArray()))]);
        double[] offsets = [.. import.Diagnostics.Files.Select(f => f.ClockOffsetSec ?? 0)];
        Assert.Equal(17.4, Math.Abs(offsets[0] - offsets[1]), 0.3); // fixes of an IGC file are a second apart
        Assert.True(import.Flight.Has(ChannelRole.Rpm));
        Assert.True(import.Flight.Has(ChannelRole.Latitude));
    }

    [Fact]
    public void A_phone_folder_comes_back_with_its_three_axes()
    {
        Scenario s = new() { Legs = TestCards.Alternating(headings: 1), Sensors = new() { GyroHz = 0, InertialHz = 25, Mounting = new(0.5, -0.9, 2) } };
        FlightLog flown = FlightSimulator.Fly(s).Log;
        FlightLog back = FlightReader.Read([.. FlightFiles.PhoneFolder(flown, "phone")
            .Select(f => LogSource.FromBytes(f.Name.Split('/')[1], f.Content.ToArray()) with { Recording = "phone" })]).Flight;
        double[] there = [.. flown[ChannelRole.GyroZ].ToArray().Where(double.IsFinite)];
        double[] here = [.. back[ChannelRole.GyroZ].ToArray().Where(double.IsFinite)];
        Alike(there, here, 1e-5);
        Alike(flown[ChannelRole.AccelerationX].ToArray().Where(double.IsFinite).ToArray(), back[ChannelRole.AccelerationX].ToArray().Where(double.IsFinite).ToArray(), 6e-4);
    }

    private static void Alike(ReadOnlySpan<double> expected, ReadOnlySpan<double> actual, double rounding)
    {
        Assert.Equal(expected.Length, actual.Length);
        for (int i = 0; i < expected.Length; i++)
        {
            Assert.Equal(double.IsNaN(expected[i]), double.IsNaN(actual[i]));
            if (!double.IsNaN(expected[i]))
                Assert.Equal(expected[i], actual[i], rounding);
        }
    }
}
