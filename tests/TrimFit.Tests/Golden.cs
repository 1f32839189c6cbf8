namespace TrimFit.Tests;

/// <summary>Texts this program once wrote, in <c>Golden/</c>. They are no expected values: a difference asks whether the change was meant.
/// <c>TRIMFIT_UPDATE_GOLDEN=1</c> writes them anew.</summary>
internal static class Golden
{
    public static void Matches(string name, string text)
    {
        string path = Path.Combine(RepositoryRoot.Path, "tests", "TrimFit.Tests", "Golden", name);
        if (Environment.GetEnvironmentVariable("TRIMFIT_UPDATE_GOLDEN") == "1")
        {
            Directory.CreateDirectory(Path.GetDirectoryName(path)!);
            File.WriteAllText(path, text);
            return;
        }
        Assert.True(File.Exists(path), $"Golden/{name} is missing; TRIMFIT_UPDATE_GOLDEN=1 writes it.");
        Assert.Equal(File.ReadAllText(path).Split('\n'), text.Split('\n'));
    }
}
