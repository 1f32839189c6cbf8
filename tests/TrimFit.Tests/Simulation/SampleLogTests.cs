using System.Text;
using TrimFit.Simulation;

namespace TrimFit.Tests.Simulation;

public class SampleLogTests
{
    private static readonly string _folder = Path.Combine(RepositoryRoot.Path, "sample-logs");

    public static TheoryData<string> Stems => ["uncorrected", "ordinary", "flat-throttle", "balanced", "over-compensated", "constant-pull", "first-step"];

    [Theory]
    [MemberData(nameof(Stems))]
    public void A_sample_log_is_what_its_scenario_makes(string stem)
    {
        string name = stem + ".toml";
        Scenario scenario = Scenario.Read(name, File.ReadAllText(Path.Combine(_folder, "scenarios", name)));
        foreach (FlightFile file in FlightFiles.Of(FlightSimulator.Fly(scenario), stem))
        {
            string path = Path.Combine(_folder, file.Name);
            if (Environment.GetEnvironmentVariable("TRIMFIT_UPDATE_GOLDEN") == "1")
                File.WriteAllBytes(path, file.Content.ToArray());
            Assert.Equal(File.ReadAllText(path), Encoding.UTF8.GetString(file.Content.Span));
            Assert.True(file.Content.Length < 1_500_000, file.Name);
        }
    }

    [Fact]
    public void Every_sample_has_a_row_in_the_README()
    {
        string readme = File.ReadAllText(Path.Combine(_folder, "README.md"));
        foreach (string path in Directory.GetFiles(_folder))
        {
            string name = Path.GetFileName(path);
            if (name != "README.md")
                Assert.Contains($"| {name} |", readme, StringComparison.Ordinal);
        }
    }
}
