using System.Globalization;
using System.Text.Json;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Logs;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Json;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting;

public static partial class ReportJson
{
    /// <summary>The result of <c>compare</c>.</summary>
    public static string Compare(CompareReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        FlightComparison c = report.Comparison;
        ControlUnit brake = report.Flights[^1].Import.Flight.BrakeUnit;
        CompareSetupJson[] setups = [.. c.Setups.Select(s => CompareSetup(s, report))];
        TrimAnalysis? next = c.Next;
        var json = new CompareJson
        {
            ProgramVersion = report.Provenance.ProgramVersion,
            ThrustBasis = Snake.Of(c.ThrustBasis.ToString()),
            Changed = c.Options.Changed is ChangedPart part ? Snake.Of(part.ToString()) : null,
            Before = setups.Length > 1 ? setups[0] : null,
            After = setups.Length > 0 ? setups[^1] : null,
            Setups = setups.Length > 2 || setups.Length == 1 ? setups : [],
            Change = c.AtBalance is SettingChange balance
                ? new()
                {
                    At = [.. c.Changes.Select(CompareChangeAt)],
                    AtBalance = CompareChangeAt(balance),
                    Coefficients = [.. c.Coefficients.Select(x => CompareCoefficient(x, c.ThrustBasis, brake))],
                }
                : null,
            RemovedPercent = c.Removed?.Interval is null ? null : Number(c.Removed.Ratio, 100),
            RemovedLow95 = Number(c.Removed?.Interval?.Lower, 100),
            RemovedHigh95 = Number(c.Removed?.Interval?.Upper, 100),
            Attribution = c.Attribution is ChangeAttribution a
                ? new()
                {
                    Part = Snake.Of(a.Part.ToString()),
                    Of = Snake.Of(a.Of.ToString()),
                    Before = Number(a.BeforeRadPerSec, DegPerRad),
                    Change = Number(a.ChangeRadPerSec, DegPerRad),
                    ChangeLow95 = Number(a.ChangeInterval95.Lower, DegPerRad),
                    ChangeHigh95 = Number(a.ChangeInterval95.Upper, DegPerRad),
                    SharePercent = a.Share?.Interval is null ? null : Number(a.Share.Ratio, 100),
                    ShareLow95 = Number(a.Share?.Interval?.Lower, 100),
                    ShareHigh95 = Number(a.Share?.Interval?.Upper, 100),
                }
                : null,
            SwapBacks = [.. c.SwapBacks.Select(s => new CompareSwapBackJson
            {
                Setup = s.Setup,
                First = c.Flights[s.First].Name,
                Second = c.Flights[s.Second].Name,
                Change = Number(s.ChangeRadPerSec, DegPerRad),
                Low95 = Number(s.Interval95.Lower, DegPerRad),
                High95 = Number(s.Interval95.Upper, DegPerRad),
                Agrees = s.Agrees,
            })],
            Trend = c.Trend is SetupTrend t
                ? new()
                {
                    Slope = Number(t.SlopeRadPerSecPerM, DegPerMmPerRadPerM),
                    Low95 = Number(t.SlopeInterval95.Lower, DegPerMmPerRadPerM),
                    High95 = Number(t.SlopeInterval95.Upper, DegPerMmPerRadPerM),
                    BestCgOffsetMm = new(t.BestOffset.Interval is null ? null : Number(t.BestOffset.Ratio, MmPerM), Number(t.BestOffset.Interval?.Lower, MmPerM), Number(t.BestOffset.Interval?.Upper, MmPerM)),
                    BestSeen = c.Setups[t.BestSeen].Name,
                }
                : null,
            FlightScatter = c.Scatter is ScatterReport scatter
                ? new()
                {
                    Basis = scatter.Prior.IsKnown ? "known" : scatter.Learned ? "assumed_and_learned" : "assumed",
                    Assumed = Number(scatter.Prior.RadPerSec, DegPerRad),
                    StdDev = Number(scatter.MedianRadPerSec, DegPerRad),
                    Low95 = Number(scatter.Interval95.Lower, DegPerRad),
                    High95 = Number(scatter.Interval95.Upper, DegPerRad),
                }
                : null,
            Sensitivity = next is null ? null : Sensitivity(next.Sensitivity),
            PairUsed = c.PairUsed,
            Shift = next?.Shift is ShiftReport shift ? Shift(shift, brake) : null,
            Adjustments = next is null ? [] : [.. next.Adjustments.Select(x => Adjustment(x, brake))],
            Verdict = c.Verdict is ComparisonVerdict verdict
                ? new()
                {
                    Code = Snake.Of(verdict.Code.ToString()),
                    ShownEqual = verdict.ShownEqual,
                    Strength = next is null ? null : Snake.Of(next.Verdict.Strength.ToString()),
                    Sentence = Words.Comparing.Answer(c, Numbers.Invariant),
                    Reasons = next is null ? [] : Findings(next.Verdict.Reasons),
                }
                : null,
            SealedOrder = report.Order is OpenedOrder order ? new(Source(order.File), [.. order.Setups], order.Commitment) : null,
            Warnings = [.. c.Notices.Select(n => new MessageJson(Snake.Of(n.Code.ToString()), Words.Comparing.Notice(n, Numbers.Invariant)))],
            Cautions = CautionList(next is null ? Wording.Cautions.For(CautionPlaces.Everywhere) : Wording.Cautions.Of(next)),
        };
        return JsonSerializer.Serialize(json, _context.CompareJson) + "\n";
    }

    private static CompareSetupJson CompareSetup(ComparedSetup s, CompareReport report) => new()
    {
        Setup = s.Name,
        Pooling = Snake.Of(s.Method.ToString()),
        CgOffsetMm = Number(s.CgOffsetM, MmPerM),
        At = [.. s.At.Select(ComparePull)],
        AtBalance = ComparePull(s.AtBalance),
        Flights = [.. s.Flights.Select(i => new CompareFlightJson(report.Comparison.Flights[i].Name,
            report.Comparison.Flights[i].Date?.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture), FitResult(report.Flights[i])))],
    };

    private static ComparePullJson ComparePull(SetupPull p)
    {
        ConfidenceInterval ninety = p.Rate.Interval(0.90);
        return new()
        {
            Setting = Snake.Of(p.Setting.ToString()),
            ThrustN = Number(p.ThrustN),
            ThrustFraction = Number(p.ThrustFraction),
            Rate = Number(p.Rate.Mean, DegPerRad),
            Low95 = Number(p.Interval95.Lower, DegPerRad),
            High95 = Number(p.Interval95.Upper, DegPerRad),
            Low90 = Number(ninety.Lower, DegPerRad),
            High90 = Number(ninety.Upper, DegPerRad),
        };
    }

    private static CompareChangeAtJson CompareChangeAt(SettingChange x) => new()
    {
        Setting = Snake.Of(x.Setting.ToString()),
        Rate = Number(x.Change.Mean, DegPerRad),
        Low95 = Number(x.Interval95.Lower, DegPerRad),
        High95 = Number(x.Interval95.Upper, DegPerRad),
        SizeLow95 = Number(x.SizeChange95.Lower, DegPerRad),
        SizeHigh95 = Number(x.SizeChange95.Upper, DegPerRad),
    };

    private static CompareCoefficientJson CompareCoefficient(CoefficientChange x, ThrustBasis basis, ControlUnit brake)
    {
        double scale = DegPerRad / (x.Name == TurnCoefficient.BrakeDifference ? ControlUnits.ShownPerSi(brake) : 1);
        ConfidenceInterval i = x.Change.Interval(0.95);
        return new()
        {
            Name = x.Name,
            Unit = FitFacts.UnitOf(x.Name, basis, brake, brake),
            Before = Number(x.Before.Mean, scale),
            After = Number(x.After.Mean, scale),
            Change = Number(x.Change.Mean, scale),
            Low95 = Number(i.Lower, scale),
            High95 = Number(i.Upper, scale),
        };
    }
}
