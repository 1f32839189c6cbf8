namespace TrimFit.Tests;

/// <summary>Finds the repository and the folders beside it from wherever the tests run.</summary>
internal static class RepositoryRoot
{
    public static string Path { get; } = Find();

    /// <summary>A folder beside the repository (real logs), or null when it is absent.</summary>
    public static string? SharedFolder(string name)
    {
        string folder = System.IO.Path.GetFullPath(System.IO.Path.Combine(Path, "..", "shared", name));
        return Directory.Exists(folder) ? folder : null;
    }

    private static string Find()
    {
        for (DirectoryInfo? folder = new(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            if (File.Exists(System.IO.Path.Combine(folder.FullName, "TrimFit.sln")))
                return folder.FullName;
        }
        throw new InvalidOperationException("The tests run from a folder that is not below TrimFit.sln.");
    }
}
