using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;

namespace TrimFit.Reporting;

/// <summary>Small facts about a result that every form of it shows alike.</summary>
internal static class FitFacts
{
    /// <summary>Whether the two methods say the same pull at the balance thrust; null without a second method.</summary>
    public static bool? CrossCheckAgrees(TrimAnalysis analysis)
    {
        PullAtSetting at = analysis.Pull.AtBalance;
        double? thrust = analysis.Fit.ThrustBasis == ThrustBasis.Newton ? at.ThrustN : at.ThrustFraction;
        return thrust is double t && double.IsFinite(t) ? analysis.Fit.AgreesWith(analysis.CrossCheck, t) : null;
    }

    /// <summary>What an adjustment's travel is measured in.</summary>
    public static TravelUnit UnitOf(AdjustmentKind kind) => Adjustment.All.FirstOrDefault(a => a.Kind == kind)?.Unit ?? TravelUnit.Meter;

    /// <summary>Shown number of a coefficient's divisor over the log's: brakes in percent or mm, shifts in mm.</summary>
    public static double ShownPerSi(string coefficient, ControlUnit brake, ControlUnit trimmer) => coefficient switch
    {
        TurnCoefficient.BrakeDifference => ControlUnits.ShownPerSi(brake),
        TurnCoefficient.TrimmerDifference => ControlUnits.ShownPerSi(trimmer),
        TurnCoefficient.CgShift => 1000,
        _ => 1,
    };

    /// <summary>Unit of a coefficient as shown.</summary>
    public static string UnitOf(string coefficient, ThrustBasis basis, ControlUnit brake, ControlUnit trimmer) => (coefficient, basis) switch
    {
        (TurnCoefficient.Thrust, ThrustBasis.Newton) => "deg/s per N",
        (TurnCoefficient.Thrust, _) => "deg/s per full thrust",
        (TurnCoefficient.ThrustSquared, ThrustBasis.Newton) => "deg/s per N^2",
        (TurnCoefficient.ThrustSquared, _) => "deg/s per full thrust^2",
        (TurnCoefficient.BrakeDifference, _) => "deg/s per " + ControlUnits.Name(brake),
        (TurnCoefficient.CgShift, _) => "deg/s per mm",
        (TurnCoefficient.TrimmerDifference, _) => "deg/s per " + ControlUnits.Name(trimmer),
        _ => "deg/s",
    };
}

/// <summary>Brakes and trimmers as people read them: percent, millimetres or the sensor's counts.</summary>
internal static class ControlUnits
{
    /// <summary>Shown number over the log's.</summary>
    public static double ShownPerSi(ControlUnit unit) => unit switch { ControlUnit.Fraction => 100, ControlUnit.Meter => 1000, _ => 1 };

    /// <summary>The shown unit.</summary>
    public static string Name(ControlUnit unit) => unit switch { ControlUnit.Fraction => "%", ControlUnit.Meter => "mm", _ => "count" };
}
