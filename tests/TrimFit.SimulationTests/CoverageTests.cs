namespace TrimFit.SimulationTests;

/// <summary>A small part of the coverage study, sized so that a right program passes: with true coverage of 95 %, fewer than 88 of 100
/// intervals hold the truth once in 500 draws. The seeds are fixed; the full study is `coverage` (DEVELOPERS.md, "Coverage").</summary>
public class CoverageTests
{
    [Fact]
    public void Intervals_of_a_hundred_flights_with_gyro_and_GPS_hold_the_truth()
    {
        CoverageRow row = CoverageStudy.Run("gyro + GPS", Sensors.GyroAndGps, Hardship.None, 100, 5, true, Environment.ProcessorCount);
        Assert.Equal(0, row.Missing);
        Check(row.Level, 0.88);
        Check(row.Slope, 0.88);
        Check(row.Brake, 0.88);
        Assert.InRange(row.Level.Rmse / row.Level.RmseKnown, 0.9, 1.1);
        Assert.InRange(row.Slope.Rmse / row.Slope.RmseKnown, 0.9, 1.1);
        Assert.True(row.SecondOrderRight >= 0.95, $"order of the wing right in {100 * row.SecondOrderRight} %");
        Assert.True(row.NotConverged <= 2, $"{row.NotConverged} searches did not settle");
    }

    [Fact]
    public void Intervals_of_a_hundred_flights_with_GPS_and_a_sheet_hold_the_truth()
    {
        CoverageRow row = CoverageStudy.Run("GPS and sheet", Sensors.Gps5HzAndSheet, Hardship.None, 100, 6, false, Environment.ProcessorCount);
        Assert.Equal(0, row.Missing);
        Check(row.Level, 0.88);
        Check(row.Slope, 0.88);
    }

    [Fact]
    public void Intervals_of_a_hundred_flights_with_GPS_once_a_second_hold_the_truth()
    {
        CoverageRow row = CoverageStudy.Run("GPS 1 Hz", Sensors.Gps1Hz, Hardship.None, 100, 7, false, Environment.ProcessorCount);
        Assert.Equal(0, row.Missing);
        Check(row.Level, 0.88);
        Check(row.Slope, 0.88);
        Check(row.Brake, 0.88); // the pilot steers on a turn the fixes do not show: without its correction half a standard error too small
    }

    [Fact]
    public void The_study_notices_intervals_that_are_too_narrow()
    {
        // The same errors against intervals half as wide: 95 % becomes about 67 %, which the checks above would refuse.
        var outcomes = Enumerable.Range(0, 60).Select(i => CoverageStudy.One(Sensors.Gps1Hz, Hardship.None, 900 + i, i % 2 == 1, false).Level!).ToList();
        double half = outcomes.Average(o => Math.Abs(o.Value - o.Truth) <= o.HalfWidth / 2 ? 1.0 : 0.0);
        Assert.InRange(half, 0.4, 0.87);
    }

    private static void Check(QuantityCoverage q, double least)
    {
        Assert.True(q.Covered >= least, $"{100 * q.Covered} % of the intervals hold the truth");
        Assert.InRange(q.BiasInErrors, -0.35, 0.35); // 3.5 standard errors of the mean of 100
    }
}
