using System.Text.Json;
using TrimFit.Core.Analysis;
using TrimFit.Core.Planning;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Json;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting;

public static partial class ReportJson
{
    /// <summary>A test card (schema <c>trimfit-card/1</c>); the made-up flights of <c>synth</c> can fly it.</summary>
    public static string Card(CardReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        CardPlan plan = report.Plan;
        CardMachine m = plan.Machine;
        bool byStdError = plan.Refusal == CardRefusal.StdErrorUnreachable;
        bool electric = report.Rig.Propeller.Drive == Core.Rigging.PropellerDrive.Electric;
        var json = new CardJson
        {
            Name = report.Rig.Name,
            Rig = Source(report.RigFile),
            From = report.FromFile is SourceFile from ? Source(from) : null,
            ProgramVersion = report.Provenance.ProgramVersion,
            Asked = new()
            {
                WidthMm = Number(plan.Options.ShiftHalfWidthM, MmPerM),
                StdError = Number(plan.Options.PullStdErrorRadPerSec, DegPerRad),
                Minutes = Number(plan.Options.Minutes),
                BallastKg = plan.Options.BallastKg > 0 ? Number(plan.Options.BallastKg) : null,
                BallastArmMm = plan.Options.BallastKg > 0 ? Number(plan.Options.BallastArmM, MmPerM) : null,
                EngineOff = plan.Options.EngineOffLegs,
                FloorM = Number(plan.Options.FloorM),
                BalanceThrust = Snake.Of(plan.Options.BalanceThrust.Kind.ToString()),
            },
            Refusal = plan.Refusal is CardRefusal refusal ? new()
            {
                Code = Snake.Of(refusal.ToString()),
                Sentence = Words.Card.Refused(plan, Numbers.Invariant),
                LeastReachableMm = byStdError ? null : Number(plan.LeastReachable, MmPerM),
                LeastReachableDegS = byStdError ? Number(plan.LeastReachable, DegPerRad) : null,
            } : null,
            Flight = plan.Legs.IsEmpty ? null : new()
            {
                DurationS = Number(plan.Seconds),
                Runs = plan.Runs,
                StartHeightM = Number(plan.StartHeightM),
                FloorM = Number(plan.Options.FloorM),
                HighestAboveStartM = Number(plan.HighestAboveStartM),
                WindLimit = Number(plan.WindLimitMPerSec),
                DriftAtLimitM = Number(plan.DriftAtLimitM),
                FuelKg = electric ? null : Number(plan.FuelKg),
                BatteryWh = electric ? Number(plan.BatteryWh) : null,
                MinutesNeeded = Number(plan.MinutesNeeded),
            },
            Legs = [.. plan.Legs.Select((l, i) => new CardLegJson
            {
                Number = l.Number,
                Kind = Snake.Of(l.Kind.ToString()),
                Power = PowerWord(l.Power),
                ThrustFraction = Number(m.ThrustOf(l.Power)),
                StartS = Number(l.StartSec),
                Seconds = Number(l.Seconds),
                HeadingDeg = Number(l.HeadingRad, DegPerRad),
                TurnDeg = Number(l.TurnRad, DegPerRad),
                BrakeLeftPercent = Number(l.BrakeLeft, 100),
                BrakeRightPercent = Number(l.BrakeRight, 100),
                BallastKg = Number(l.BallastKg),
                BallastArmMm = Number(l.BallastArmM, MmPerM),
                HeightM = Number(plan.StartHeightM + plan.CautiousHeights[i]),
                Say = Words.Card.Say(l, report.Rig, Numbers.Invariant),
            })],
            Prediction = plan.Prediction is CardPrediction p ? Prediction(p, plan.Reaches) : null,
            Machine = new()
            {
                Logger = Snake.Of(m.Logger.ToString()),
                NoiseFrom = m.NoiseFromFlight ? "flight" : "usual",
                PullFrom = m.PullFromFlight ? "flight" : "rig",
                IdleFraction = Number(m.Idle),
                LevelFraction = Number(m.Level),
                BalanceFraction = Number(m.Balance),
                Pull = Number(m.PullAt(m.Balance), DegPerRad),
                Airspeed = Number(m.AirspeedMPerSec),
                Sink = Number(m.SinkMPerSec),
                Disturbance = Number(m.Noise.DisturbanceRms, DegPerRad),
                DisturbanceTauS = Number(m.Noise.DisturbanceTauSec),
            },
            SealedOrder = report.BlindCommitment,
            Cautions = CautionList(CardDocument.CautionsOf(plan)),
        };
        return JsonSerializer.Serialize(json, _context.CardJson) + "\n";
    }

    /// <summary>Power as flight sheets write it.</summary>
    internal static string PowerWord(PowerSetting power) => power == PowerSetting.Cruise ? "level" : Snake.Of(power.ToString());

    private static CardPredictionJson Prediction(CardPrediction p, bool? reaches)
    {
        int n = p.Coefficients.Length;
        double[] scale = [.. p.Coefficients.Select(c => c == TurnCoefficient.CgShift ? DegPerMmPerRadPerM : DegPerRad)];
        return new()
        {
            PullHalfWidth = Number(p.PullHalfWidthRadPerSec, DegPerRad),
            PullStdError = Number(p.PullStdErrorRadPerSec, DegPerRad),
            KnownNoiseStdError = Number(p.KnownNoiseStdErrorRadPerSec, DegPerRad),
            Inflation = Number(p.Inflation),
            TFactor = Number(p.TFactor),
            ShiftHalfWidthMm = Number(p.ShiftHalfWidthM, MmPerM),
            SensitivityFloorMm = Number(p.SensitivityFloorM, MmPerM),
            Sources = [.. p.Sources],
            Coefficients = [.. p.Coefficients],
            Covariance = [.. Enumerable.Range(0, n).Select(i => Enumerable.Range(0, n).Select(j => Number(p.Covariance[(i * n) + j], scale[i] * scale[j])).ToArray())],
            Draws = p.Draws,
            Reaches = reaches,
        };
    }

    private static CardOutcomeJson CardOutcomeOf(CardOutcome o) => new()
    {
        Reached = o.Reached,
        PredictedPull = Number(o.Promise.PullHalfWidthRadPerSec, DegPerRad),
        Pull = Number(o.PullHalfWidthRadPerSec, DegPerRad),
        PredictedShiftHalfWidthMm = Number(o.Promise.ShiftHalfWidthM, MmPerM),
        ShiftHalfWidthMm = Number(o.ShiftHalfWidthM, MmPerM),
        WantedShiftHalfWidthMm = Number(o.Promise.WantedShiftHalfWidthM, MmPerM),
        WantedPullStdError = Number(o.Promise.WantedPullStdErrorRadPerSec, DegPerRad),
        PullStdError = Number(o.PullStdErrorRadPerSec, DegPerRad),
        NextLegs = [.. o.NextLegs.Select(l => new NextLegJson
        {
            Kind = Snake.Of(l.Kind.ToString()),
            Power = PowerWord(l.Power),
            Seconds = Number(l.Seconds),
            PullFactor = Number(l.PullFactor),
            ShiftFactor = Number(l.ShiftFactor),
        })],
    };
}
