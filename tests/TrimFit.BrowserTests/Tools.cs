namespace TrimFit.BrowserTests;

/// <summary>Programs the tests need beside .NET. Without one a test is skipped by name; where TRIMFIT_NEED_TOOLS is 1 (CI) it fails.</summary>
internal static class Tools
{
    public static string Chromium => Need("chromium", "/usr/bin/chromium", "/usr/bin/chromium-browser", "/usr/bin/google-chrome");

    public static string Java => Need("java", [.. (Environment.GetEnvironmentVariable("PATH") ?? "").Split(Path.PathSeparator).Select(folder => Path.Combine(folder, "java"))]);

    /// <summary>The HTML checker of the W3C, from the npm package vnu-jar.</summary>
    public static string Vnu => Need("vnu.jar (TRIMFIT_VNU_JAR)", Environment.GetEnvironmentVariable("TRIMFIT_VNU_JAR") ?? "");

    /// <summary>A font that no page uses; Debian's fonts-dejavu-core has it.</summary>
    public static string OtherFont => Need("font DejaVu Sans Mono", "/usr/share/fonts/truetype/dejavu/DejaVuSansMono.ttf");

    private static string Need(string name, params string[] paths)
    {
        if (paths.FirstOrDefault(File.Exists) is string found)
            return found;
        if (Environment.GetEnvironmentVariable("TRIMFIT_NEED_TOOLS") == "1")
            Assert.Fail($"tool {name} is missing");
        Assert.Skip($"skipped: tool {name} is missing");
        return "";
    }
}
