using System.Xml.Linq;

namespace TrimFit.Tests;

public class ArchitectureTests
{
    /// <summary>Projects from bottom to top: a project may reference only those before it, and only those listed for it.</summary>
    private static readonly Dictionary<string, string[]> _mayReference = new()
    {
        ["TrimFit.Core"] = [],
        ["TrimFit.Import"] = ["TrimFit.Core"],
        ["TrimFit.Simulation"] = ["TrimFit.Core"],
        ["TrimFit.Reporting"] = ["TrimFit.Core"],
        ["TrimFit.Pages"] = ["TrimFit.Core", "TrimFit.Reporting"],
        ["TrimFit.Jobs"] = ["TrimFit.Core"],
        ["TrimFit.Notebooks"] = ["TrimFit.Core", "TrimFit.Import", "TrimFit.Reporting"],
        ["TrimFit.Web"] = ["TrimFit.Core", "TrimFit.Import", "TrimFit.Reporting", "TrimFit.Pages", "TrimFit.Jobs"],
        ["TrimFit.Cli"] = ["TrimFit.Core", "TrimFit.Import", "TrimFit.Simulation", "TrimFit.Reporting", "TrimFit.Pages", "TrimFit.Jobs", "TrimFit.Web"],
    };

    [Fact]
    public void References_follow_the_arrows()
    {
        string[] projects = Projects();
        Assert.Contains(projects, p => Name(p) == "TrimFit.Core");
        foreach (string project in projects)
        {
            Assert.True(_mayReference.TryGetValue(Name(project), out string[]? allowed), $"{Name(project)} has no place among the arrows");
            string[] references = [.. XDocument.Load(project).Descendants("ProjectReference").Select(r => Name(r.Attribute("Include")!.Value))];
            Assert.Equal([], references.Except(allowed));
        }
    }

    [Fact]
    public void Every_library_can_be_compiled_ahead_of_time() => Assert.All(Projects().Where(p => Name(p) is not ("TrimFit.Cli" or "TrimFit.Notebooks" or "TrimFit.Web")),
        p => Assert.Equal("true", XDocument.Load(p).Descendants("IsAotCompatible").SingleOrDefault()?.Value));

    [Fact]
    public void Core_is_kept_from_reading_and_writing_by_the_build()
    {
        string core = Path.Combine(RepositoryRoot.Path, "src", "TrimFit.Core");
        string[] banned = [.. File.ReadAllLines(Path.Combine(core, "BannedSymbols.txt")).Select(l => l.Split(';')[0])];
        foreach (string symbol in new[] { "T:System.Console", "T:System.IO.File", "T:System.IO.Directory", "T:System.IO.FileStream", "P:System.DateTime.Now", "P:System.Globalization.CultureInfo.CurrentCulture" })
            Assert.Contains(symbol, banned);
        XDocument project = XDocument.Load(Path.Combine(core, "TrimFit.Core.csproj"));
        Assert.Contains(project.Descendants("PackageReference"), p => p.Attribute("Include")?.Value == "Microsoft.CodeAnalysis.BannedApiAnalyzers");
        Assert.Contains(project.Descendants("AdditionalFiles"), p => p.Attribute("Include")?.Value == "BannedSymbols.txt");
    }

    [Fact]
    public void The_simulator_shares_nothing_with_the_estimator_or_the_rig()
    {
        foreach (string file in Directory.EnumerateFiles(Path.Combine(RepositoryRoot.Path, "src", "TrimFit.Simulation"), "*.cs", SearchOption.AllDirectories))
        {
            string text = File.ReadAllText(file);
            foreach (string topic in new[] { "TrimFit.Core.Turns", "TrimFit.Core.Rigging", "TrimFit.Core.Analysis" })
                Assert.False(text.Contains(topic, StringComparison.Ordinal), $"{Path.GetFileName(file)} uses {topic}");
        }
    }

    private static string[] Projects() => [.. Directory.EnumerateFiles(Path.Combine(RepositoryRoot.Path, "src"), "*.csproj", SearchOption.AllDirectories).Order()];

    private static string Name(string path) => Path.GetFileNameWithoutExtension(path.Replace('\\', '/'));
}
