using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.SimulationTests;

/// <summary>A small part of the study of false alarms; the full one is `alarms` (DEVELOPERS.md, "False alarms"). Seeds are fixed. Counts are held
/// against the 99 % binomial band of 12 flights, which a right program leaves once in 100 draws of seeds.</summary>
public class AlarmTests
{
    private const int Flights = 12;
    private const ulong FirstSeed = 90_001;

    [Theory]
    [InlineData(Condition.HeldCourse, Skip = "does not hold: 7 of 12; the pull is the held brake times its effect, and soft brakes bias that (DEVELOPERS.md, Coverage)")]
    [InlineData(Condition.StrongWind)]
    [InlineData(Condition.Thermic)]
    [InlineData(Condition.LeftHandCircuits)]
    internal void The_pull_of_a_balanced_machine_is_inside_its_interval_and_hardly_ever_claimed(Condition condition)
    {
        AlarmOutcome[] found = Fly(condition, balanced: true);
        int covered = found.Count(o => o.PullCovered == true), given = found.Count(o => o.PullCovered is not null);
        Assert.True(given >= Flights - 2, $"{given} of {Flights} flights gave a pull");
        Assert.True(covered >= BinomialBand.Counts(given, 0.95, 0.99).Lowest, $"{covered} of {given}");
        Assert.True(found.Count(AlarmStudy.IsAlarm) <= AlarmStudy.MostAlarms(Flights), $"{found.Count(AlarmStudy.IsAlarm)} false alarms of {Flights}");
    }

    [Fact]
    public void A_held_course_of_which_nothing_is_logged_is_never_called_balanced_and_gives_no_travel()
    {
        foreach (bool balanced in (bool[])[false, true])
            Assert.DoesNotContain(Fly(Condition.HeldCourseUnlogged, balanced), AlarmStudy.IsForbiddenUnlogged);
    }

    [Fact]
    public void The_study_tells_a_claimed_pull_from_none()
    {
        Assert.True(AlarmStudy.IsAlarm(new(true, VerdictCode.PowerPull, false)));
        Assert.False(AlarmStudy.IsAlarm(new(true, VerdictCode.Insufficient, false)));
        Assert.True(AlarmStudy.IsForbiddenUnlogged(new(true, VerdictCode.Insufficient, true)));
        Assert.Equal(18, AlarmStudy.MostAlarms(200)); // by the binomial distribution
        // Machines as drawn pull, and most flights of the good card in wind see it.
        Assert.InRange(Fly(Condition.StrongWind, balanced: false).Count(AlarmStudy.IsAlarm), Flights / 3, Flights);
    }

    private static AlarmOutcome[] Fly(Condition condition, bool balanced)
    {
        var found = new AlarmOutcome[Flights];
        Parallel.For(0, Flights, i => found[i] = AlarmStudy.One(condition, FirstSeed + (ulong)i, balanced));
        return found;
    }
}
