using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Comparing;

/// <summary>What changed at one power between the first and the last setting.</summary>
/// <param name="Setting">Which power.</param>
/// <param name="Before">Pull with the first setting.</param>
/// <param name="After">Pull with the last setting.</param>
/// <param name="Change">After less before, rad/s.</param>
/// <param name="SizeChange95">95 % interval of |after| − |before|, rad/s: below 0 is better.</param>
public sealed record SettingChange(PowerSetting Setting, SetupPull Before, SetupPull After, PullDistribution Change, ConfidenceInterval SizeChange95)
{
    /// <summary>95 % interval of the change, rad/s.</summary>
    public ConfidenceInterval Interval95 { get; } = Change.Interval(0.95);
}

/// <summary>What changed in one coefficient of the turn model between the first and the last setting.</summary>
/// <param name="Name">Name of the coefficient, as in <see cref="Turns.TurnCoefficient"/>.</param>
/// <param name="Before">With the first setting; the unit of the coefficient, thrust in the comparison's own.</param>
/// <param name="After">With the last setting.</param>
/// <param name="Change">After less before.</param>
public sealed record CoefficientChange(string Name, PullDistribution Before, PullDistribution After, PullDistribution Change);
