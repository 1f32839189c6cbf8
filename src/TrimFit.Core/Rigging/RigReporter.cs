using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Rigging;

/// <summary>Makes a <see cref="RigReport"/>.</summary>
public static class RigReporter
{
    /// <summary>Draws behind the upper end of the twist; the 97.5 % quantile then moves by a few percent between seeds.</summary>
    private const int TwistDraws = 2000;

    /// <summary>Share of full thrust taken for idle and for level flight when no flight tells (interfaces page; idle: common practice, no source).</summary>
    internal const double AssumedIdleFraction = 0.05, AssumedCruiseFraction = 0.6;

    /// <summary>Statics and adjustment table of a rig.</summary>
    /// <param name="rig">The rig.</param>
    /// <param name="seed">Seed of the draws behind the twist's upper end.</param>
    public static RigReport Of(Rig rig, ulong seed = 1)
    {
        var spread = new RigSpread(rig);
        RigValues values = spread.Nominal;
        Propulsion propulsion = spread.Propulsion;
        double full = propulsion.FullThrustN;
        ImmutableArray<(PowerSetting Setting, double Fraction)> settings = propulsion.ThrustKnown
            ? [(PowerSetting.Off, 0), (PowerSetting.Idle, AssumedIdleFraction), (PowerSetting.Cruise, AssumedCruiseFraction), (PowerSetting.Full, 1)]
            : [(PowerSetting.Off, 0)];

        var random = new SeededRandom(seed);
        double[][] ratios = [.. settings.Select(_ => new double[TwistDraws])];
        for (int k = 0; k < TwistDraws; k++)
        {
            RigValues draw = spread.Draw(random);
            for (int i = 0; i < settings.Length; i++)
                ratios[i][k] = Math.Abs(RigStatics.Solve(draw, settings[i].Fraction * draw.FullThrustN).TwistSine);
        }

        double mass = values.SuspendedKg, spacing = values.CarabinerSpacingM;
        var findings = propulsion.Findings(rig).ToImmutableArray();
        if (!propulsion.ThrustKnown)
            findings = findings.Add(Finding.Of(FindingCode.ThrustRelative));
        return new RigReport
        {
            SuspendedKg = mass,
            SuspendedWeightN = values.WeightN,
            PilotKg = values.PilotKg,
            PowerUnitKg = values.PowerUnitKg,
            CgLateralM = values.CgLateralM,
            CarabinerMidM = values.CarabinerMidM,
            CarabinerSpacingM = spacing,
            CgOffsetM = values.CgOffsetM,
            ThrustLineOffsetM = values.ThrustLineOffsetM,
            FullThrustN = propulsion.ThrustKnown ? full : null,
            FullTorqueNm = values.RotationSign != 0 && propulsion.ThrustKnown ? propulsion.FullTorqueNm : null,
            FigureOfMerit = propulsion.ImpliedFigureOfMerit,
            TwistStiffnessNmPerRad = values.TwistStiffness,
            At = [.. settings.Select((s, i) => Describe(s.Setting, RigStatics.Solve(values, s.Fraction * full), ratios[i]))],
            Adjustments =
            [
                .. Adjustment.All.Where(a => a.AppliesTo(rig) && a.Move is not null && a.Unit == TravelUnit.Meter).Select(a => new RigAdjustment(
                    a.Kind, Math.Abs(a.CgOffsetPerTravel(values)), a.CgOffsetPerTravel(values), a.ThrustOffsetPerTravel(values),
                    rig.Limits.GetValueOrDefault(a.Kind)))
            ],
            HangCheckLeftKg = mass * (0.5 - (values.CgOffsetM / spacing)),
            HangCheckRightKg = mass * (0.5 + (values.CgOffsetM / spacing)),
            TorqueBalancingOffsetM = values.RotationSign != 0 && propulsion.ThrustKnown
                ? RigStatics.TorqueBalancingOffset(values.RotationSign * propulsion.FullTorqueNm * AssumedCruiseFraction, mass,
                    RigStatics.Solve(values, AssumedCruiseFraction * full).HangBackRad)
                : null,
            HangCheck = Ground.RigHang.Of(rig),
            Tape = Ground.LateralGeometry.Of(rig),
            GroundFaults = Ground.EntryChecks.OfHangCheck(rig),
            Findings = findings,
        };
    }

    private static RigAtSetting Describe(PowerSetting setting, StaticState state, double[] ratios) => new()
    {
        Setting = setting,
        ThrustN = state.ThrustN,
        TorqueNm = state.TorqueNm,
        HangBackRad = state.HangBackRad,
        YawMomentNm = state.YawMomentNm,
        RollMomentNm = state.RollMomentNm,
        RiserLoadLeftN = state.RiserLoadLeftN,
        RiserLoadRightN = state.RiserLoadRightN,
        TwistRad = state.TwistRad,
        TwistRatio = Math.Abs(state.TwistSine),
        TwistRatioHigh95 = QuantileType7.Of(ratios, 0.975),
    };
}
