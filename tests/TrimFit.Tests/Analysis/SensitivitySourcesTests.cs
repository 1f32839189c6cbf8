using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Units;

namespace TrimFit.Tests.Analysis;

/// <summary>Sources of the sensitivity beside torque: ballast legs, another flight, what the user states; and where they contradict each other.</summary>
public class SensitivitySourcesTests
{
    private static readonly MadeUpFlight _flight = new() { ConstantDegPerSec = 0.1, PowerDegPerSec = -4, BallastDegPerSec = 1.8 };
    private static readonly FlightLog _log = _flight.Fly();

    private static double DegPerMm(double radPerM) => double.RadiansToDegrees(radPerM) / 1000;

    private static TurnSignals Signals(params ReadOnlySpan<FoundLeg> legs) => TurnSignals.From(_log, MadeUpFlight.Rig(), legs);

    /// <summary>A fit without a flight: pull in deg/s, slope and curvature in deg/s at full thrust, each with its standard error.</summary>
    internal static TurnFit FitOf(TurnSignals signals, (double Value, double Error) constant, (double Value, double Error) slope, (double Value, double Error)? cgShiftDegPerMm = null)
    {
        double unit = double.DegreesToRadians(1), full = signals.FullThrust;
        var coefficients = new List<TurnCoefficient>
        {
            new(TurnCoefficient.Constant, new Estimate(constant.Value * unit, constant.Error * unit), ""),
            new(TurnCoefficient.Thrust, new Estimate(slope.Value * unit / full, slope.Error * unit / full), ""),
            new(TurnCoefficient.ThrustSquared, new Estimate(0, 0.1 * unit / (full * full)), ""),
            new(TurnCoefficient.BrakeDifference, new Estimate(40 * unit, 1 * unit), ""),
        };
        if (cgShiftDegPerMm is (double value, double error))
            coefficients.Add(new(TurnCoefficient.CgShift, new Estimate(value * unit * 1000, error * unit * 1000), ""));
        int n = coefficients.Count;
        double[] covariance = new double[n * n];
        for (int i = 0; i < n; i++)
            covariance[(i * n) + i] = coefficients[i].Estimate!.Value.StandardError * coefficients[i].Estimate!.Value.StandardError;
        return new TurnFit
        {
            Method = "by hand",
            ThrustBasis = ThrustBasis.Newton,
            Coefficients = [.. coefficients],
            Covariance = [.. covariance],
            DegreesOfFreedom = 1e6,
            EffectiveSamples = 1000,
            Condition = 1,
        };
    }

    [Fact]
    public void A_ballast_leg_in_the_sheet_becomes_a_source_that_holds_the_true_sensitivity()
    {
        TrimAnalysis without = TrimAnalysis.Run(_log, MadeUpFlight.Rig(), new(), _flight.Legs(sized: false));
        TrimAnalysis with = TrimAnalysis.Run(_log, MadeUpFlight.Rig(), new(), _flight.Legs());
        SensitivitySource source = with.Sensitivity.Sources.Single(s => s.Kind == "ballast");
        Assert.True(source.Used);
        // By hand: 1.8 deg/s for 20 mm is 0.09 deg/s per mm of CG offset, the yaw moment that goes with it included.
        Estimate measured = with.Fit[TurnCoefficient.CgShift]!.Value;
        Assert.True(with.Fit.Interval95(measured)!.Value.Contains(double.DegreesToRadians(0.09) * 1000));
        Assert.True(with.Shift!.Interval95.HalfWidth < without.Shift!.Interval95.HalfWidth);
        Assert.Contains(without.Signals.SpansLeftOut, s => s.Reason == "weight shift of unknown size");
        Assert.Null(without.Fit[TurnCoefficient.CgShift]);
    }

    [Fact]
    public void A_ballast_leg_entered_on_the_wrong_side_is_a_conflict_and_gives_no_travel()
    {
        TrimAnalysis result = TrimAnalysis.Run(_log, MadeUpFlight.Rig(), new(), _flight.Legs(armSign: -1));
        Assert.Equal(VerdictCode.Insufficient, result.Verdict.Code);
        Assert.Contains(result.Verdict.Reasons, r => r.Code == FindingCode.SourcesConflict);
        Assert.True(result.Sensitivity.Conflict);
        Assert.Empty(result.Adjustments);
    }

    [Fact]
    public void The_prior_and_one_precise_source_combine_by_the_precision_of_their_logarithms()
    {
        // A rig without torque or spread, thrust off: moving both riser carabiners 10 mm left shifts the CG offset by +10 mm, and nothing twists.
        // Measured 0.6 deg/s for it: S = 0.06 deg/s per mm, times its model error of log-sd 0.25. Prior: 0.09, log-sd ln 3/1.96 = 0.56052.
        // By hand: precisions 1/0.314179 = 3.18290 and 1/0.0625 = 16; mean log = (3.18290 ln 0.09 + 16 ln 0.06)/19.18290 = −2.746135,
        // median 0.064175; log-sd 1/√19.18290 = 0.228320, so 0.041022 to 0.100397.
        Rig rig = MadeUpFlight.Rig(PropellerRotation.ContraRotating);
        TurnSignals signals = Signals();
        TurnFit now = FitOf(signals, (2, 1e-4), (0.01, 1e-4)), other = FitOf(signals, (2.6, 1e-4), (0.01, 1e-4));
        KnownChange change = KnownChange.Of(other, signals.FullThrust, r => r with { LeftM = r.LeftM - 0.010, RightM = r.RightM - 0.010 }, AngularRate.FromDegPerSec(1e-4), 0)!;
        var options = new TrimOptions { KnownChanges = [change], Draws = 40_000 };
        SensitivityReport report = TrimPosterior.Draw(rig, new RigSpread(rig), now, signals, options).Report;
        Assert.Equal(0.064175, DegPerMm(report.RadPerSecPerM!.Value), 0.0008); // 40,000 draws: 1 % of the median
        Assert.Equal(0.041022, DegPerMm(report.Interval95!.Value.Lower), 0.0012);
        Assert.Equal(0.100397, DegPerMm(report.Interval95.Value.Upper), 0.0025);
    }

    [Fact]
    public void What_the_user_states_narrows_the_answer()
    {
        Rig stated = MadeUpFlight.Rig() with { Wing = new() { SensitivityRadPerSecPerM = Reading.Measured(double.DegreesToRadians(80), double.DegreesToRadians(4)) } };
        TurnSignals signals = Signals();
        TurnFit fit = FitOf(signals, (0.1, 0.1), (-4, 0.3));
        double Width(Rig rig) => TrimPosterior.Draw(rig, new RigSpread(rig), fit, signals, new()).Report.Interval95!.Value.HalfWidth;
        Assert.True(Width(stated) < 0.4 * Width(MadeUpFlight.Rig()));
    }

    [Fact]
    public void A_ballast_whose_turn_cannot_be_told_from_none_puts_no_bound_on_the_shift_and_says_so()
    {
        TurnSignals signals = Signals(_flight.Legs());
        TrimAnalysis vague = TrimAnalysis.Run(signals, FitOf(signals, (0.1, 0.1), (-4, 0.3), (0.03, 0.04)), MadeUpFlight.Rig(), new());
        Assert.Contains(vague.Warnings, w => w.Code == FindingCode.RatioUnbounded && w.Values[0] == 2);
        Assert.Null(Assert.Single(vague.Shift!.Ratios).Interval);
        TrimAnalysis clear = TrimAnalysis.Run(signals, FitOf(signals, (0.1, 0.1), (-4, 0.3), (0.09, 0.005)), MadeUpFlight.Rig(), new());
        Assert.DoesNotContain(clear.Warnings, w => w.Code == FindingCode.RatioUnbounded);
        // Level flight is at 0.6 of full: pull 0.1 − 2.4 = −2.3 deg/s, 2.3/0.09 = 25.6 mm.
        Assert.True(Assert.Single(clear.Shift!.Ratios).Interval!.Value.Contains(0.0256));
    }

    [Fact]
    public void A_slope_the_torque_cannot_explain_is_told_with_its_ratio()
    {
        // The user is certain of a small sensitivity, so a steep slope cannot be torque alone.
        Rig rig = MadeUpFlight.Rig() with
        {
            Wing = new() { SensitivityRadPerSecPerM = Reading.Measured(double.DegreesToRadians(20), double.DegreesToRadians(1)) },
            Mass = MadeUpFlight.Rig().Mass with { PostureM = Reading.Measured(0, 0.001), CgDepthM = Reading.Measured(0.40, 0.005) },
            HangPoints = new() { FrontShare = Reading.Measured(0.8), FrontOffsetM = Reading.Measured(0), RearOffsetM = Reading.Measured(0) },
            Propeller = MadeUpFlight.Rig().Propeller with
            {
                ThrustLineDepthM = Reading.Measured(0.40, 0.005),
                HangBackRad = Reading.Measured(0, 0.005),
                ThrustLineM = Reading.Measured(0, 0.001),
            },
        };
        TurnSignals signals = Signals();
        TrimAnalysis result = TrimAnalysis.Run(signals, FitOf(signals, (0.1, 0.05), (-8, 0.2)), rig, new());
        Finding conflict = result.Verdict.Reasons.Single(r => r.Code == FindingCode.SensitivityConflict);
        Assert.True(conflict.Values[0] < 0.05);
        Assert.True(conflict.Values[1] > 2);
        Assert.Equal(VerdictCode.Insufficient, result.Verdict.Code);
        Assert.Contains(result.Warnings, w => w.Code == FindingCode.NextCheck && w.Values[0] == (int)NextCheck.ThrustLine);
    }

    [Fact]
    public void A_pair_of_flights_with_brakes_stepped_and_coarse_steps_is_a_firm_answer()
    {
        static Rig WithSteps(double step) => MadeUpFlight.Rig() with { Limits = Adjustment.All.ToImmutableDictionary(a => a.Kind, _ => new AdjustmentLimit(null, null, step)) };
        TurnSignals signals = Signals();
        TurnFit now = FitOf(signals, (0.1, 0.05), (-4, 0.1)), other = FitOf(signals, (1.0, 0.05), (-3.9, 0.1));
        KnownChange change = KnownChange.Of(other, signals.FullThrust, r => r with { LeftM = r.LeftM - 0.010, RightM = r.RightM - 0.010 }, AngularRate.FromDegPerSec(0.02), 0.6)!;
        TrimAnalysis coarse = TrimAnalysis.Run(signals, now, WithSteps(0.030), new() { KnownChanges = [change] });
        Assert.Contains(coarse.Sensitivity.Sources, s => s.Kind == "pair" && s.Used);
        Assert.Equal(VerdictStrength.Firm, coarse.Verdict.Strength);
        TrimAnalysis fine = TrimAnalysis.Run(signals, now, WithSteps(0.001), new() { KnownChanges = [change] });
        // The same travel is not known to a millimetre, and with one source's model error of log-sd 0.25 (1.57 times at 95 %) not to a half either.
        Assert.Equal(VerdictStrength.Weak, fine.Verdict.Strength);
    }
}
