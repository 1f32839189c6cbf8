using System.Text.Json;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Import.Sheets;

namespace TrimFit.Tests.Simulation;

/// <summary>The verdict on each bundled flight against the simulator's truth, not against an earlier verdict.</summary>
public class SampleVerdictTests
{
    private const double ToleranceDegPerSec = 1.0, Noticeable = 0.5; // what these long, calm flights surely show; their intervals are within ± 0.3

    [Theory]
    [InlineData("uncorrected")]
    [InlineData("balanced")]
    [InlineData("over-compensated")]
    [InlineData("constant-pull")]
    [InlineData("flat-throttle")]
    [InlineData("ordinary")]
    public void The_verdict_is_the_one_the_truth_asks_for(string stem)
    {
        string folder = Path.Combine(RepositoryRoot.Path, "sample-logs");
        Rig rig = RigFileReader.ReadFile(Path.Combine(folder, stem + "-rig.toml"));
        FlightImport import = FlightReader.Read([Path.Combine(folder, stem + ".csv")], FlightSheetReader.ReadFile(Path.Combine(folder, stem + "-sheet.toml")), rig.Log);
        TrimAnalysis analysis = TrimAnalysis.Run(import.Flight, rig, new(), import.Legs.AsSpan());
        using JsonDocument truth = JsonDocument.Parse(File.ReadAllText(Path.Combine(folder, stem + "-truth.json")));
        Assert.Equal(Expected(truth.RootElement), analysis.Verdict.Code);
    }

    /// <summary>The rules of the verdict on true pulls instead of estimated ones: P where it is to be nulled, C at zero thrust, D their difference.</summary>
    private static VerdictCode Expected(JsonElement truth)
    {
        double[] throttles = [.. truth.GetProperty("legs").EnumerateArray().Select(l => l.GetProperty("throttle_percent").GetDouble())];
        if (throttles.Max() - throttles.Min() < 10) // the throttle hardly moved, so nothing can be told of the growth with power
            return VerdictCode.Insufficient;
        double Pull(string setting) => truth.GetProperty("pull").EnumerateArray().Single(p => p.GetProperty("setting").GetString() == setting).GetProperty("rate_deg_s").GetDouble();
        double p = Pull("cruise"), c = Pull("off"), d = p - c;
        if (Math.Abs(p) < ToleranceDegPerSec)
            return VerdictCode.Balanced;
        bool grows = Math.Abs(d) > Noticeable;
        // Only the over-compensated machine declares an offset of its riser carabiners.
        return !grows ? VerdictCode.ConstantPull
            : Math.Sign(p) != Math.Sign(d) ? VerdictCode.OverCompensated
            : Math.Abs(c) > Noticeable && Math.Sign(c) == Math.Sign(d) ? VerdictCode.Both
            : VerdictCode.PowerPull;
    }
}
