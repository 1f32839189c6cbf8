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
}
