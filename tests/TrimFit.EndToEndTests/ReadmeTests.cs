namespace TrimFit.EndToEndTests;

public class ReadmeTests
{
    private const string Begin = "<!-- first screen -->\n```\n", End = "\n```\n", After = "\n\nTurn left over after";

    [Fact]
    public void The_README_shows_the_first_screen_as_it_is()
    {
        string path = Path.Combine(BuiltProgram.Root, "README.md"), readme = File.ReadAllText(path);
        int from = readme.IndexOf(Begin, StringComparison.Ordinal) + Begin.Length, to = readme.IndexOf(End, from, StringComparison.Ordinal);
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"));
        string screen = run.Output[..run.Output.IndexOf(After, StringComparison.Ordinal)];
        if (Environment.GetEnvironmentVariable("TRIMFIT_UPDATE_GOLDEN") == "1")
        {
            File.WriteAllText(path, readme[..from] + screen + readme[to..]);
            return;
        }
        Assert.Equal(screen, readme[from..to]); // golden: TRIMFIT_UPDATE_GOLDEN=1 writes it anew
    }

    [Fact]
    public void The_README_shows_the_comparison_as_it_is()
    {
        const string Mark = "<!-- compare -->\n```\n", Last = "\n\nWhat else was noticed";
        string path = Path.Combine(BuiltProgram.Root, "README.md"), readme = File.ReadAllText(path);
        int from = readme.IndexOf(Mark, StringComparison.Ordinal) + Mark.Length, to = readme.IndexOf("```\n", from, StringComparison.Ordinal);
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "compare", "--before", BuiltProgram.Sample("uncorrected.csv"), "--before-rig", BuiltProgram.Sample("uncorrected-rig.toml"),
            "--after", BuiltProgram.Sample("balanced.csv"), "--after-rig", BuiltProgram.Sample("balanced-rig.toml"), "--changed", "geometry", "--flight-scatter", "0.2");
        string screen = run.Output[..run.Output.IndexOf(Last, StringComparison.Ordinal)] + "\n";
        if (Environment.GetEnvironmentVariable("TRIMFIT_UPDATE_GOLDEN") == "1")
        {
            File.WriteAllText(path, readme[..from] + screen + readme[to..]);
            return;
        }
        Assert.Equal(screen, readme[from..to]); // golden: TRIMFIT_UPDATE_GOLDEN=1 writes it anew
    }
}
