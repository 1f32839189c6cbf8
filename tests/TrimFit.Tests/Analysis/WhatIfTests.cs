using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Analysis;

public class WhatIfTests
{
    private static readonly Lazy<TrimAnalysis> _result = new(() =>
        TrimAnalysis.Run(new MadeUpFlight { ConstantDegPerSec = 0.1, PowerDegPerSec = -4 }.Fly(), MadeUpFlight.Rig(), new()));

    [Fact]
    public void The_rounded_travel_leaves_exactly_what_the_result_says()
    {
        var whatIf = new WhatIf(_result.Value);
        Assert.NotEmpty(_result.Value.Adjustments);
        foreach (AdjustmentReport way in _result.Value.Adjustments)
        {
            StateAfterTravel after = whatIf.After(way.Kind, way.Rounded).State;
            Assert.Equal<PullAtSetting>(way.TurnLeftAt, after.TurnLeftAt);
            Assert.Equal(way.TwistRatio, after.TwistRatio);
            Assert.Equal(way.TwistRatioHigh95, after.TwistRatioHigh95);
            Assert.Equal(way.TwistDirection, after.TwistDirection);
            Assert.Equal(way.RiserLoadLeftN, after.RiserLoadLeftN);
            Assert.Equal(way.RiserLoadRightN, after.RiserLoadRightN);
            StateAfterTravel first = whatIf.After(way.Kind, way.FirstStep).State;
            Assert.Equal(way.HangCheckLeftKg, first.HangCheckLeftKg);
            Assert.Equal(way.HangCheckRightKg, first.HangCheckRightKg);
        }
    }

    [Fact]
    public void Without_travel_everything_is_as_flown()
    {
        AdjustmentReport way = _result.Value.Adjustments[0];
        ImmutableArray<PullAtSetting> left = new WhatIf(_result.Value).After(way.Kind, 0).State.TurnLeftAt;
        for (int i = 0; i < left.Length; i++)
        {
            PullAtSetting flown = _result.Value.Pull.At[i];
            Assert.InRange(left[i].RateRadPerSec!.Value, flown.RateRadPerSec!.Value - (0.2 * flown.Interval95!.Value.HalfWidth), flown.RateRadPerSec.Value + (0.2 * flown.Interval95.Value.HalfWidth));
        }
    }

    [Fact]
    public void Travels_rise_hold_zero_first_step_and_rounded_travel_and_stay_inside_the_limits()
    {
        Rig rig = MadeUpFlight.Rig() with { Limits = ImmutableDictionary<AdjustmentKind, AdjustmentLimit>.Empty.Add(AdjustmentKind.CarabinerPair, new(-0.012, 0.006, 0.003)) };
        TrimAnalysis result = TrimAnalysis.Run(new MadeUpFlight { ConstantDegPerSec = 0.1, PowerDegPerSec = -4 }.Fly(), rig, new());
        var whatIf = new WhatIf(result);
        foreach (AdjustmentReport way in result.Adjustments)
        {
            ImmutableArray<double> travels = whatIf.Travels(way.Kind);
            Assert.InRange(travels.Length, 3, 65);
            Assert.Contains(way.FirstStep, travels);
            Assert.Contains(way.Rounded, travels);
            Assert.Contains(0.0, travels);
            for (int i = 1; i < travels.Length; i++)
                Assert.True(travels[i] - travels[i - 1] > 1e-9);
        }
        ImmutableArray<double> pair = whatIf.Travels(AdjustmentKind.CarabinerPair);
        Assert.All(pair.Where(d => d != result.Adjustments.Single(a => a.Kind == AdjustmentKind.CarabinerPair).Rounded), d => Assert.InRange(d, -0.012 - 1e-9, 0.006 + 1e-9));
    }

    [Fact]
    public void Where_a_guard_withholds_the_travel_nothing_can_be_asked()
    {
        TrimAnalysis silent = TrimAnalysis.Run(new MadeUpFlight { PowerDegPerSec = -4, Brakes = false }.Fly(), MadeUpFlight.Rig(), new());
        Assert.Empty(silent.Adjustments);
        var whatIf = new WhatIf(silent);
        Assert.Throws<ArgumentException>(() => whatIf.After(AdjustmentKind.CarabinerPair, -0.01));
        Assert.Throws<ArgumentException>(() => whatIf.Travels(AdjustmentKind.CarabinerPair));
    }
}
