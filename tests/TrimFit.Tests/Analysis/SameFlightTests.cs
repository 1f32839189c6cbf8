using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Simulation;

namespace TrimFit.Tests.Analysis;

/// <summary>One simulated flight, written in every dialect and file set, gives one answer.</summary>
public class SameFlightTests
{
    private static readonly SimulatedFlight _flight = FlightSimulator.Fly(new Scenario { Seed = 31, Legs = TestCards.Alternating() });
    private static readonly Rig _rig = RigFileReader.Read("rig.toml", RigText.Write(_flight.Scenario, _flight.Scenario.Knowledge));
    private static readonly Lazy<TrimAnalysis> _plain = new(() => Fit(Read(CsvDialects.All["plain"])));

    public static TheoryData<string> Dialects => [.. CsvDialects.All.Keys.Where(k => k is not ("plain" or "every_digit"))];

    private static FlightLog Read(CsvDialect dialect) => FlightReader.Read([LogSource.FromBytes("flight.csv", LogWriters.Csv(_flight.Log, dialect))]).Flight;

    private static TrimAnalysis Fit(FlightLog log) => TrimAnalysis.Run(log, _rig, new());

    [Theory]
    [MemberData(nameof(Dialects))]
    public void Dialects_that_lose_nothing_against_each_other_give_the_same_fit(string dialect)
    {
        TrimAnalysis other = Fit(Read(CsvDialects.All[dialect]));
        for (int i = 0; i < _plain.Value.Fit.Coefficients.Length; i++)
            AssertClose(_plain.Value.Fit.Coefficients[i], other.Fit.Coefficients[i], 1e-9 * Math.Abs(_plain.Value.Fit.Coefficients[i].Estimate!.Value.Value));
    }

    [Fact]
    public void Every_digit_gives_the_fit_of_the_flight_itself_and_rounding_moves_it_by_less_than_a_tenth_of_its_error()
    {
        // A column named gyro_z comes back as the gyro's z axis, not as a yaw rate.
        var columns = _flight.Log.Roles.ToDictionary(r => r == ChannelRole.YawRate ? ChannelRole.GyroZ : r, r => _flight.Log[r].ToArray());
        FlightLog renamed = FlightLog.Create(_flight.Log.TimeSec, columns, new() { BrakeUnit = _flight.Log.BrakeUnit, TrimmerUnit = _flight.Log.TrimmerUnit });
        TrimAnalysis itself = Fit(renamed), exact = Fit(Read(CsvDialects.All["every_digit"]));
        for (int i = 0; i < itself.Fit.Coefficients.Length; i++)
        {
            // The last bit of a unit's conversion differs, and the search ends where the likelihood is settled to 0.002: not to 1e-9.
            AssertClose(itself.Fit.Coefficients[i], exact.Fit.Coefficients[i], 0.01 * itself.Fit.Coefficients[i].Estimate!.Value.StandardError);
            AssertClose(itself.Fit.Coefficients[i], _plain.Value.Fit.Coefficients[i], 0.1 * itself.Fit.Coefficients[i].Estimate!.Value.StandardError);
        }
    }

    [Theory]
    [InlineData(LogSet.EngineCsvAndIgc, 17.4)]
    [InlineData(LogSet.PhoneAndGpx, 0)]
    public void File_sets_on_two_clocks_give_the_pull_within_one_standard_error(LogSet set, double offsetSec)
    {
        Scenario s = _flight.Scenario with
        {
            Sensors = set == LogSet.PhoneAndGpx ? _flight.Scenario.Sensors with { GyroHz = 25, InertialHz = 25, Mounting = new(0.3, -0.4, 1) } : _flight.Scenario.Sensors,
            Output = new() { Logs = set, Dialect = new() { Time = CsvTime.Iso8601 }, EngineClockOffsetSec = offsetSec },
        };
        SimulatedFlight flight = FlightSimulator.Fly(s);
        FlightImport import = FlightReader.Read([.. FlightFiles.Logs(flight, "flight").Select(Source)]);
        if (set == LogSet.EngineCsvAndIgc)
        {
            double[] offsets = [.. import.Diagnostics.Files.Select(f => f.ClockOffsetSec ?? 0)];
            Assert.Equal(offsetSec, Math.Abs(offsets[0] - offsets[1]), 0.2);
        }
        TrimAnalysis other = Fit(import.Flight);
        PullAtSetting expected = Fit(flight.Log).Pull.At[2], found = other.Pull.At[2];
        double standardError = found.Interval95!.Value.HalfWidth / StudentT.TwoSidedFactor(0.95, other.Fit.DegreesOfFreedom);
        Assert.InRange(found.RateRadPerSec!.Value, expected.RateRadPerSec!.Value - standardError, expected.RateRadPerSec.Value + standardError);

        static LogSource Source(FlightFile file)
        {
            string[] path = file.Name.Split('/');
            LogSource source = LogSource.FromBytes(path[^1], file.Content.ToArray());
            return path.Length > 1 ? source with { Recording = path[0] } : source;
        }
    }

    private static void AssertClose(TurnCoefficient expected, TurnCoefficient actual, double within)
    {
        Assert.Equal(expected.Name, actual.Name);
        Assert.InRange(actual.Estimate!.Value.Value, expected.Estimate!.Value.Value - within, expected.Estimate.Value.Value + within);
    }
}
