using System.Globalization;
using System.Text;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting;

/// <summary>The flight sheet of a card (TOML, schema <c>trimfit-flight/1</c>): empty, to be filled in after the flight.</summary>
public static class CardSheetText
{
    /// <summary>Travel that a brake of unknown full travel is taken to have, m (common practice, no source).</summary>
    private const double UsualTravelM = 0.6;

    /// <summary>Writes the sheet; start and end are left to be filled in.</summary>
    /// <param name="report">The card.</param>
    /// <param name="style">Language of its comments; English when null.</param>
    public static string Empty(CardReport report, ReportStyle? style = null)
    {
        ArgumentNullException.ThrowIfNull(report);
        style ??= new();
        CardWords words = style.Words.Card;
        var numbers = new Numbers(style);
        var text = new StringBuilder();
        foreach (string line in words.SheetHead(report.Plan, report.Rig))
            text.Append("# ").Append(line).Append('\n');
        text.Append("schema = \"trimfit-flight/1\"\n# date = 2026-05-17\n# wing_trim = \"\"\n# accelerator = 0\n# fuel_start_kg = \n# fuel_end_kg = \n# ground_altitude_m = \n");
        foreach (CardLeg leg in report.Plan.Legs)
        {
            int start = (int)Math.Round(leg.StartSec), end = (int)Math.Round(leg.EndSec);
            text.Append(CultureInfo.InvariantCulture, $"\n# {leg.Number}. {start / 60}:{start % 60:00}{style.Words.Labels.To}{end / 60}:{end % 60:00}  {words.Say(leg, report.Rig, numbers)}\n");
            text.Append("[[leg]]\n# start = \n# end = \n");
            foreach (string line in Keys(leg, report.Rig))
                text.Append(line).Append('\n');
        }
        return text.ToString();
    }

    /// <summary>The keys of a leg but for its time.</summary>
    internal static IEnumerable<string> Keys(CardLeg leg, Rig rig)
    {
        double travel = 1000 * (rig.BrakeFullTravelM ?? UsualTravelM);
        yield return $"kind = \"{Kind(leg.Kind)}\"";
        yield return $"power = \"{ReportJson.PowerWord(leg.Power)}\"";
        if (leg.Kind == CardLegKind.BrakeStep)
        {
            yield return string.Create(CultureInfo.InvariantCulture, $"brake_left = {leg.BrakeLeft * travel:0}");
            yield return string.Create(CultureInfo.InvariantCulture, $"brake_right = {leg.BrakeRight * travel:0}");
        }
        if (leg.Kind == CardLegKind.Ballast)
        {
            yield return string.Create(CultureInfo.InvariantCulture, $"ballast_kg = {leg.BallastKg:0.##}");
            yield return string.Create(CultureInfo.InvariantCulture, $"ballast_arm_mm = {leg.BallastArmM * 1000:0}");
        }
    }

    private static string Kind(CardLegKind kind) => kind switch
    {
        CardLegKind.HandsOff => "hands_off",
        CardLegKind.BrakeStep => "brake_step",
        CardLegKind.Ballast => "ballast",
        CardLegKind.Hold => "held",
        _ => "other",
    };
}
