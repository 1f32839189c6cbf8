namespace TrimFit.EndToEndTests;

/// <summary>A folder of a test's own, gone with it.</summary>
internal sealed class TemporaryFolder : IDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("trimfit-");

    public string this[string name] => Path.Combine(_folder.FullName, name);

    public string Write(string name, string text)
    {
        File.WriteAllText(this[name], text);
        return this[name];
    }

    public string[] Names => [.. _folder.GetFiles().Select(f => f.Name).Order(StringComparer.Ordinal)];

    public void Dispose() => _folder.Delete(recursive: true);
}
