using System.Collections.Immutable;
using System.Globalization;
using System.Text.Encodings.Web;
using System.Text.Json;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Reporting.Json;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting;

/// <summary>Results as JSON for scripts: schemas <c>trimfit-fit/1</c>, <c>trimfit-compare/1</c>, <c>trimfit-inspect/1</c>, <c>trimfit-rig-result/1</c>.</summary>
/// <remarks>Always English, metric and culture-free. Numbers are finite or null and carry nine significant digits: more would only show
/// the last bits of one processor. The text ends with a line feed.</remarks>
public static partial class ReportJson
{
    private const double DegPerRad = 180 / Math.PI;
    private const double MmPerM = 1000;
    private const double DegPerMmPerRadPerM = DegPerRad / MmPerM;

    // The results go into files and pipes, not into web pages, so letters of any alphabet stay readable.
    private static readonly ResultJsonContext _context = new(new JsonSerializerOptions(ResultJsonContext.Default.Options)
    {
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
    });

    private static Words Words => Words.English;

    /// <summary>The result of <c>fit</c>.</summary>
    public static string Fit(FitReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        return JsonSerializer.Serialize(FitResult(report), _context.FitJson) + "\n";
    }

    private static FitJson FitResult(FitReport report)
    {
        TrimAnalysis a = report.Analysis;
        ControlUnit brake = report.Import.Flight.BrakeUnit, trimmer = report.Import.Flight.TrimmerUnit;
        return new FitJson
        {
            Inputs = Inputs(report.Import.Diagnostics, report.RigFile, report.SheetFile, report.Provenance),
            Sampling = Sampling(report.Import.Diagnostics),
            Wind = Wind(a.Signals.Wind),
            Gyro = Gyro(a.Gyro),
            TurnModel = TurnModel(a.Fit, brake, trimmer),
            CrossCheck = CrossCheck(a, brake, trimmer),
            Pull = new()
            {
                At = PullAt(a.Pull.At, brake),
                AtBalance = PullAt(a.Pull.AtBalance, brake),
                CruiseBasis = Snake.Of(a.Pull.CruiseBasis.ToString()),
                SmallestDetectable = Number(a.Pull.SmallestDetectableRadPerSec, DegPerRad),
            },
            Sensitivity = Sensitivity(a.Sensitivity),
            Shift = a.Shift is ShiftReport s ? Shift(s, brake) : null,
            Adjustments = [.. a.Adjustments.Select(x => Adjustment(x, brake))],
            Verdict = new()
            {
                Code = Snake.Of(a.Verdict.Code.ToString()),
                Strength = Snake.Of(a.Verdict.Strength.ToString()),
                Sentence = Words.Answer(FitAnswer.Of(a), Numbers.Invariant),
                Reasons = Findings(a.Verdict.Reasons),
            },
            Assumptions = Assumptions(a.Assumptions),
            SpansLeftOut = [.. a.Fit.SpansLeftOut.Select(x => new SpanJson(Number(x.StartSec), Number(x.EndSec), x.Reason))],
            Warnings = [.. Notices(report.Import.Diagnostics.Warnings), .. GroundReports.Faults(a.RigReport.GroundFaults), .. Findings(a.Warnings)],
            Cautions = CautionList(Wording.Cautions.Of(a)),
            Card = report.CardOutcome is CardOutcome outcome ? CardOutcomeOf(outcome) : null,
        };
    }

    /// <summary>The result of <c>inspect</c>.</summary>
    public static string Inspect(InspectReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        var json = new InspectJson
        {
            Inputs = Inputs(report.Import.Diagnostics, null, null, report.Provenance),
            Sampling = Sampling(report.Import.Diagnostics),
            Wind = Wind(report.Wind),
            Gyro = Gyro(report.Gyro),
            Warnings = [.. Notices(report.Import.Diagnostics.Warnings), .. Findings(report.Findings)],
            Cautions = CautionList(Wording.Cautions.For(CautionPlaces.Everywhere)),
        };
        return JsonSerializer.Serialize(json, _context.InspectJson) + "\n";
    }

    /// <summary>The result of <c>rig</c>.</summary>
    public static string Rig(RigSheetReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        RigReport r = report.Statics;
        var json = new RigJson
        {
            Rig = Source(report.RigFile),
            ProgramVersion = report.Provenance.ProgramVersion,
            Masses = new()
            {
                SuspendedKg = Number(r.SuspendedKg),
                PilotKg = Number(r.PilotKg),
                PowerUnitKg = Number(r.PowerUnitKg),
                SuspendedWeightN = Number(r.SuspendedWeightN),
                CgLateralMm = Number(r.CgLateralM, MmPerM),
                CarabinerMiddleMm = Number(r.CarabinerMidM, MmPerM),
            },
            OffsetMm = Number(r.CgOffsetM, MmPerM),
            ThrustLineMm = Number(r.ThrustLineOffsetM, MmPerM),
            CarabinerSpacingMm = Number(r.CarabinerSpacingM, MmPerM),
            FullThrustN = Number(r.FullThrustN),
            FullTorqueNm = Number(r.FullTorqueNm),
            FigureOfMerit = Number(r.FigureOfMerit),
            TwistStiffnessNmPerRad = Number(r.TwistStiffnessNmPerRad),
            TorqueBalancingMm = Number(r.TorqueBalancingOffsetM, MmPerM),
            HangCheck = new(Number(r.HangCheckLeftKg), Number(r.HangCheckRightKg)),
            HangCheckMeasured = GroundReports.Measured(r),
            At = [.. r.At.Select(RigAt)],
            Adjustments = [.. r.Adjustments.Select(RigAdjustment)],
            Assumptions = Assumptions(report.Rig.Assumptions()),
            Warnings = [.. Findings(r.Findings), .. GroundReports.Faults(r.GroundFaults)],
            Cautions = CautionList(Wording.Cautions.For(Wording.Cautions.PlacesOf(r.Adjustments.Select(x => x.Kind)))),
        };
        return JsonSerializer.Serialize(json, _context.RigJson) + "\n";
    }

    /// <summary>A number as JSON gives it: nine significant digits, or null when there is none or it is not finite.</summary>
    internal static double? Number(double? value, double scale = 1)
    {
        if (value is not double v || !double.IsFinite(v * scale))
            return null;
        double rounded = double.Parse((v * scale).ToString("G9", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return rounded == 0 ? 0 : rounded; // never -0
    }

    private static InputsJson Inputs(ImportDiagnostics diagnostics, SourceFile? rig, SourceFile? sheet, Provenance provenance) => new()
    {
        Files = [.. diagnostics.Files.Select(f => new FileJson
        {
            Name = f.Name,
            Sha256 = f.Sha256,
            Format = f.Format,
            RowsRead = f.RowsRead,
            RowsLeftOut = [.. f.LeftOut.Select(l => new RowsLeftOutJson(l.Reason, l.Rows, l.FirstLine))],
            Columns = [.. f.Columns.Select(c => new ColumnJson(c.Name, c.Role is ChannelRole role ? ChannelRoles.NameOf(role) : null,
                NullWhenEmpty(c.Unit), NullWhenEmpty(c.Basis), c.Missing))],
        })],
        Rig = rig is null ? null : Source(rig),
        Sheet = sheet is null ? null : Source(sheet),
        ProgramVersion = provenance.ProgramVersion,
    };

    private static SourceJson Source(SourceFile file) => new(file.Name, file.Sha256);

    private static string? NullWhenEmpty(string text) => text.Length == 0 ? null : text;

    private static SamplingJson Sampling(ImportDiagnostics diagnostics) => new()
    {
        Start = diagnostics.Sampling.Start?.ToUniversalTime().ToString("yyyy-MM-dd'T'HH:mm:ss.fff'Z'", CultureInfo.InvariantCulture),
        DurationS = Number(diagnostics.Sampling.DurationSec),
        RateHz = Number(diagnostics.Sampling.RateHz),
        Gaps = [.. diagnostics.Sampling.Gaps.Select(g => new GapJson(Number(g.StartSec), Number(g.DurationSec)))],
        Clocks = [.. diagnostics.Files.Select(f => new ClockJson(f.Name, Number(f.ClockOffsetSec), Number(f.ClockOffsetStdErrorSec)))],
    };

    private static WindJson? Wind(Wind? wind) => wind is null ? null : new()
    {
        North = Number(wind.NorthMPerSec),
        East = Number(wind.EastMPerSec),
        Airspeed = Number(wind.AirspeedMPerSec),
        ArcDeg = Number(wind.ArcRad, DegPerRad),
        NorthStdError = Number(wind.NorthStdError),
        EastStdError = Number(wind.EastStdError),
        AirspeedStdError = Number(wind.AirspeedStdError),
    };

    private static GyroJson? Gyro(GyroReport? gyro) => gyro is null ? null : new()
    {
        Bias = Number(gyro.BiasRadPerSec?.Value, DegPerRad),
        BiasStdError = Number(gyro.BiasRadPerSec?.StandardError, DegPerRad),
        Scale = Number(gyro.Scale),
        Sign = gyro.Sign,
        DelayS = Number(gyro.DelaySec),
        ScaleStdError = Number(gyro.ScaleStdError),
        DelayStdErrorS = Number(gyro.DelayStdErrorSec),
    };

    private static TurnModelJson TurnModel(TurnFit fit, ControlUnit brake, ControlUnit trimmer)
    {
        double[] scales = Scales(fit, brake, trimmer);
        return new()
        {
            Method = fit.Method,
            ThrustBasis = Snake.Of(fit.ThrustBasis.ToString()),
            Coefficients = [.. fit.Coefficients.Select(c => Coefficient(fit, c, brake, trimmer))],
            Covariance = Covariance(fit, scales),
            LagS = Number(fit.LagSec),
            Disturbance = new() { Rms = Number(fit.DisturbanceRmsRadPerSec, DegPerRad), TauS = Number(fit.DisturbanceTauSec) },
            EffectiveSamples = Number(fit.EffectiveSamples),
            Condition = Number(fit.Condition),
            Noise = Noise(fit),
        };
    }

    private static NoiseJson? Noise(TurnFit fit) => fit.Noise is not NoiseParameters n ? null : new()
    {
        Response = Snake.Of(n.Order.ToString()),
        LagS = n.Order == ResponseOrder.First ? Number(n.LagSec) : null,
        FrequencyRadS = n.Order == ResponseOrder.Second ? Number(n.NaturalFrequency) : null,
        Damping = n.Order == ResponseOrder.Second ? Number(n.Damping) : null,
        DisturbanceDegS = Number(n.DisturbanceRms, DegPerRad),
        DisturbanceTauS = Number(n.DisturbanceTauSec),
        QuickDegSRootS = Number(n.QuickDisturbance, DegPerRad),
        GyroDegS = fit.GyroRowsPerSec > 0 ? Number(n.GyroNoise, DegPerRad) : null,
        HeadingDeg = fit.HeadingRowsPerSec > 0 ? Number(n.HeadingNoise, DegPerRad) : null,
        GustDeg = fit.HeadingRowsPerSec > 0 ? Number(n.GustRms, DegPerRad) : null,
        GustTauS = fit.HeadingRowsPerSec > 0 ? Number(n.GustTauSec) : null,
        GyroRowsPerS = Number(fit.GyroRowsPerSec),
        HeadingRowsPerS = Number(fit.HeadingRowsPerSec),
    };

    private static CrossCheckJson? CrossCheck(TrimAnalysis analysis, ControlUnit brake, ControlUnit trimmer)
    {
        if (analysis.CrossCheck is not TurnFit fit)
            return null;
        TurnModelJson model = TurnModel(fit, brake, trimmer);
        return new()
        {
            Method = model.Method,
            ThrustBasis = model.ThrustBasis,
            Coefficients = model.Coefficients,
            Covariance = model.Covariance,
            LagS = model.LagS,
            Disturbance = model.Disturbance,
            EffectiveSamples = model.EffectiveSamples,
            Condition = model.Condition,
            Agreement = FitFacts.CrossCheckAgrees(analysis) switch { true => "agrees", false => "differs", null => null },
        };
    }

    private static double[] Scales(TurnFit fit, ControlUnit brake, ControlUnit trimmer) =>
        [.. fit.Coefficients.Select(c => DegPerRad / (c.Name switch
        {
            TurnCoefficient.BrakeDifference => ControlUnits.ShownPerSi(brake),
            TurnCoefficient.TrimmerDifference => ControlUnits.ShownPerSi(trimmer),
            TurnCoefficient.CgShift => MmPerM,
            _ => 1,
        }))];

    private static CoefficientJson Coefficient(TurnFit fit, TurnCoefficient c, ControlUnit brake, ControlUnit trimmer)
    {
        double scale = DegPerRad / (c.Name switch
        {
            TurnCoefficient.BrakeDifference => ControlUnits.ShownPerSi(brake),
            TurnCoefficient.TrimmerDifference => ControlUnits.ShownPerSi(trimmer),
            TurnCoefficient.CgShift => MmPerM,
            _ => 1,
        });
        ConfidenceInterval? interval = c.Estimate is Estimate e ? fit.Interval95(e) : null;
        return new()
        {
            Name = c.Name,
            Unit = FitFacts.UnitOf(c.Name, fit.ThrustBasis, brake, trimmer),
            Value = Number(c.Estimate?.Value, scale),
            StdError = Number(c.Estimate?.StandardError, scale),
            Low95 = Number(interval?.Lower, scale),
            High95 = Number(interval?.Upper, scale),
            Reason = NullWhenEmpty(c.Reason),
        };
    }

    private static double?[][] Covariance(TurnFit fit, double[] scales)
    {
        int n = scales.Length;
        return [.. Enumerable.Range(0, n).Select(i => Enumerable.Range(0, n)
            .Select(j => fit.Coefficients[i].Estimate is null || fit.Coefficients[j].Estimate is null
                ? null
                : Number(fit.Covariance[(i * n) + j] * scales[i] * scales[j])).ToArray())];
    }

    private static PullAtJson[] PullAt(ImmutableArray<PullAtSetting> at, ControlUnit brake) => [.. at.Select(p => PullAt(p, brake))];

    private static PullAtJson PullAt(PullAtSetting p, ControlUnit brake) => new()
    {
        Setting = Snake.Of(p.Setting.ToString()),
        ThrustN = Number(p.ThrustN),
        ThrustFraction = Number(p.ThrustFraction),
        Rate = Number(p.RateRadPerSec, DegPerRad),
        Low95 = Number(p.Interval95?.Lower, DegPerRad),
        High95 = Number(p.Interval95?.Upper, DegPerRad),
        HeldBrake = Number(p.HeldBrake, ControlUnits.ShownPerSi(brake)),
    };

    private static SensitivityJson Sensitivity(SensitivityReport s) => new()
    {
        Value = Number(s.RadPerSecPerM, DegPerMmPerRadPerM),
        Low95 = Number(s.Interval95?.Lower, DegPerMmPerRadPerM),
        High95 = Number(s.Interval95?.Upper, DegPerMmPerRadPerM),
        Sources = [.. s.Sources.Select(x => new SensitivitySourceJson
        {
            Kind = x.Kind,
            Value = Number(x.RadPerSecPerM, DegPerMmPerRadPerM),
            Low95 = Number(x.Interval95.Lower, DegPerMmPerRadPerM),
            High95 = Number(x.Interval95.Upper, DegPerMmPerRadPerM),
            Used = x.Used,
        })],
        Conflict = s.Conflict,
        EffectiveSamples = Number(s.EffectiveSamples),
        PriorPredictiveP = Number(s.PriorPredictiveP),
        YawRatio = new(Number(s.YawRatio), Number(s.YawRatioInterval95.Lower), Number(s.YawRatioInterval95.Upper)),
    };

    private static ShiftJson Shift(ShiftReport s, ControlUnit brake) => new()
    {
        BalanceThrustN = Number(s.BalanceThrustN),
        BalanceThrustFraction = Number(s.BalanceThrustFraction),
        CgMm = Interval(s.CgShiftM, s.Interval95, MmPerM),
        ConstantPartMm = Number(s.ConstantPartM, MmPerM),
        PowerPartMm = Number(s.PowerPartM, MmPerM),
        TurnLeftAt = PullAt(s.TurnLeftAt, brake),
    };

    private static IntervalJson Interval(double value, ConfidenceInterval interval, double scale) =>
        new(Number(value, scale), Number(interval.Lower, scale), Number(interval.Upper, scale));

    private static AdjustmentJson Adjustment(AdjustmentReport a, ControlUnit brake) => new()
    {
        Kind = Snake.Of(a.Kind.ToString()),
        Part = Words.PartShort(a.Kind),
        Toward = a.Travel < 0 ? "left" : "right",
        Travel = Number(a.Travel, PerSi(a.Unit)),
        Unit = UnitName(a.Unit),
        Low95 = Number(a.Interval95.Lower, PerSi(a.Unit)),
        High95 = Number(a.Interval95.Upper, PerSi(a.Unit)),
        Rounded = Number(a.Rounded, PerSi(a.Unit)),
        FirstStep = Number(a.FirstStep, PerSi(a.Unit)),
        Efficiency = Number(a.Efficiency),
        ThrustLineOffsetMm = Number(a.ThrustLineOffsetM, MmPerM),
        TwistRatio = Number(a.TwistRatio),
        TwistRatioHigh95 = Number(a.TwistRatioHigh95),
        TwistDirection = Snake.Of(a.TwistDirection.ToString()),
        RiserLoadLeftN = Number(a.RiserLoadLeftN),
        RiserLoadRightN = Number(a.RiserLoadRightN),
        HangCheck = new(Number(a.HangCheckLeftKg), Number(a.HangCheckRightKg)),
        TurnLeftAt = PullAt(a.TurnLeftAt, brake),
        WithinLimits = a.WithinLimits,
        ProbabilityWrongSide = Number(a.ProbabilityWrongSide),
        Notes = Findings(a.Notes, a.Unit),
    };

    private static RigAtJson RigAt(RigAtSetting s) => new()
    {
        Setting = Snake.Of(s.Setting.ToString()),
        ThrustN = Number(s.ThrustN),
        TorqueNm = Number(s.TorqueNm),
        HangBackDeg = Number(s.HangBackRad, DegPerRad),
        YawMomentNm = Number(s.YawMomentNm),
        RollMomentNm = Number(s.RollMomentNm),
        RiserLoadLeftN = Number(s.RiserLoadLeftN),
        RiserLoadRightN = Number(s.RiserLoadRightN),
        TwistDeg = Number(s.TwistRad, DegPerRad),
        TwistRatio = Number(s.TwistRatio),
        TwistRatioHigh95 = Number(s.TwistRatioHigh95),
    };

    private static double PerSi(TravelUnit unit) => unit switch { TravelUnit.Meter => MmPerM, TravelUnit.Radian => DegPerRad, _ => 1 };

    private static string UnitName(TravelUnit unit) => unit switch { TravelUnit.Meter => "mm", TravelUnit.Radian => "deg", _ => "kg" };

    private static RigAdjustmentJson RigAdjustment(RigAdjustment a) => new()
    {
        Kind = Snake.Of(a.Kind.ToString()),
        Part = Words.PartShort(a.Kind),
        Efficiency = Number(a.Efficiency),
        CgMmPerTravel = Number(a.CgOffsetPerTravel, MmPerM / PerSi(FitFacts.UnitOf(a.Kind))),
        ThrustLineMmPerTravel = Number(a.ThrustOffsetPerTravel, MmPerM / PerSi(FitFacts.UnitOf(a.Kind))),
        Unit = UnitName(FitFacts.UnitOf(a.Kind)),
        Min = Number(a.Limit?.Min, PerSi(FitFacts.UnitOf(a.Kind))),
        Max = Number(a.Limit?.Max, PerSi(FitFacts.UnitOf(a.Kind))),
        Step = Number(a.Limit?.Step, PerSi(FitFacts.UnitOf(a.Kind))),
    };

    private static AssumptionJson[] Assumptions(ImmutableArray<Assumption> assumptions) => [.. assumptions.Select(x => new AssumptionJson
    {
        Name = x.Name,
        Value = Number(x.Value),
        Unit = x.Unit,
        Low95 = Number(x.Low95),
        High95 = Number(x.High95),
    })];

    private static MessageJson[] Notices(ImmutableArray<Notice> notices) => [.. notices.Select(n => new MessageJson(n.Code, n.Message))];

    private static MessageJson[] Findings(ImmutableArray<Finding> findings, TravelUnit unit = TravelUnit.Meter) =>
        [.. findings.Select(f => new MessageJson(Snake.Of(f.Code.ToString()), Words.Finding(f, Numbers.Invariant, unit)))];

    internal static MessageJson[] CautionList(IEnumerable<CautionCode> codes) =>
        [.. codes.Select(c => new MessageJson(Wording.Cautions.CodeOf(c), Words.Caution(c, Numbers.Invariant)))];
}
