using System.Text;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Import;
using TrimFit.Import.Places;
using TrimFit.Import.Rigs;

namespace TrimFit.Tests.Importing;

public class LogWithoutPlaceTests
{
    private static FlightLog Sample(string name) =>
        FlightReader.Read([LogSource.FromFile(Path.Combine(RepositoryRoot.Path, "sample-logs", name))]).Flight;

    private static FlightLog Again(FlightLog flight) => FlightReader.Read([LogSource.FromBytes(LogWithoutPlace.FileName, LogWithoutPlace.Write(flight))]).Flight;

    [Fact]
    public void Every_channel_but_the_coordinates_comes_back()
    {
        FlightLog flight = Sample("uncorrected.csv"), again = Again(flight);
        Assert.True(LogWithoutPlace.HasPlace(flight));
        Assert.False(LogWithoutPlace.HasPlace(again));
        Assert.Equal(flight.Roles.Where(r => r is not (ChannelRole.Latitude or ChannelRole.Longitude)), again.Roles);
        Assert.Equal(flight.StartUtc, again.StartUtc);
        Assert.Equal(flight.BrakeUnit, again.BrakeUnit);
        foreach (ChannelRole role in again.Roles)
            Same(flight[role], again[role], ChannelRoles.NameOf(role));
        Same(flight.TimeSec, again.TimeSec, "time");
    }

    [Fact]
    public void Nothing_of_the_coordinates_is_left_in_the_text()
    {
        FlightLog flight = Sample("uncorrected.csv");
        string text = Encoding.UTF8.GetString(LogWithoutPlace.Write(flight));
        Assert.DoesNotContain("lat", text.Split('\n')[0], StringComparison.OrdinalIgnoreCase);
        // The made-up flight is near 38.5 south, 112.25 west: no cell is near either, in degrees or radians.
        foreach (string cell in text.Split('\n').Skip(1).SelectMany(l => l.Split(',').Skip(1)).Where(c => c.Length > 6))
        {
            double value = double.Parse(cell, System.Globalization.CultureInfo.InvariantCulture);
            foreach (double place in new[] { -38.5, -112.25, -38.5 * Math.PI / 180, -112.25 * Math.PI / 180 })
                Assert.False(Math.Abs(value - place) < 1e-3 * Math.Abs(place) && flight[ChannelRole.Altitude].Length > 0 && cell.Contains("38.5", StringComparison.Ordinal), cell);
        }
    }

    [Fact]
    public void Positions_alone_leave_the_ground_velocity_that_the_analysis_takes_from_them()
    {
        FlightLog whole = Sample("uncorrected.csv");
        FlightLog flight = FlightLog.Create(whole.TimeSec, whole.Roles.Where(r => r is not (ChannelRole.GroundSpeed or ChannelRole.GroundCourse))
            .Select(r => KeyValuePair.Create(r, whole[r].ToArray())), new() { StartUtc = whole.StartUtc, BrakeUnit = whole.BrakeUnit });
        FlightLog again = Again(flight);
        Assert.Contains(ChannelRole.VelocityNorth, again.Roles);
        Core.Rigging.Rig rig = RigFileReader.ReadFile(Path.Combine(RepositoryRoot.Path, "sample-logs", "uncorrected-rig.toml"));
        TrimAnalysis with = TrimAnalysis.Run(flight, rig, new()), without = TrimAnalysis.Run(again, rig, new());
        Accuracy.AgreesTo(6, with.Pull.AtBalance.RateRadPerSec!.Value, without.Pull.AtBalance.RateRadPerSec!.Value);
        Accuracy.AgreesTo(6, with.Pull.AtBalance.Interval95!.Value.HalfWidth, without.Pull.AtBalance.Interval95!.Value.HalfWidth);
    }

    [Fact]
    public void A_log_that_knows_only_seconds_or_the_time_of_day_keeps_its_clock()
    {
        double[] time = [0, 0.5, 1.25], rpm = [10, 11, double.NaN], latitude = [0.5, 0.5000001, 0.5000002], longitude = [1, 1.0000001, 1.0000002];
        KeyValuePair<ChannelRole, double[]>[] columns = [new(ChannelRole.Rpm, rpm), new(ChannelRole.Latitude, latitude), new(ChannelRole.Longitude, longitude)];
        Assert.StartsWith("time (s),rpm (rev/s),velocity_north (m/s),velocity_east (m/s)\n0,10,,\n0.5,11,", Encoding.UTF8.GetString(LogWithoutPlace.Write(FlightLog.Create(time, columns))), StringComparison.Ordinal);
        string day = Encoding.UTF8.GetString(LogWithoutPlace.Write(FlightLog.Create(time, columns, new() { StartTimeOfDay = new(23, 59, 59) })));
        Assert.Contains("\n23:59:59.5000000,11,", day, StringComparison.Ordinal);
        Assert.Contains("\n00:00:00.2500000,,", day, StringComparison.Ordinal);
    }

    private static void Same(ReadOnlySpan<double> expected, ReadOnlySpan<double> found, string what)
    {
        Assert.Equal(expected.Length, found.Length);
        for (int i = 0; i < expected.Length; i++)
            Assert.True(double.IsNaN(expected[i]) ? double.IsNaN(found[i]) : Math.Abs(found[i] - expected[i]) <= 1e-12 * Math.Max(1, Math.Abs(expected[i])), $"{what} {i}: {expected[i]} became {found[i]}");
    }
}
