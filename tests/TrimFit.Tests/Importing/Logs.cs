using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;

namespace TrimFit.Tests.Importing;

/// <summary>Short ways to read small logs in tests.</summary>
internal static class Logs
{
    public static FlightImport Read(string text, params ColumnRule[] rules) => ReadBytes(Encoding.UTF8.GetBytes(text), rules);

    public static FlightImport ReadBytes(byte[] bytes, params ColumnRule[] rules) =>
        FlightReader.Read([LogSource.FromBytes("log.csv", bytes)], new ImportOptions { Columns = rules });

    /// <summary>The message with which the import refuses a text.</summary>
    public static string Refusal(string text, bool strict = false, params ColumnRule[] rules) =>
        Assert.Throws<LogFormatException>(() => FlightReader.Read([LogSource.FromBytes("log.csv", Encoding.UTF8.GetBytes(text))],
            new ImportOptions { Columns = rules, Strict = strict })).Message;

    public static ColumnUse Column(this FlightImport import, string name) => import.Diagnostics.Files[0].Columns.Single(c => c.Name == name);

    /// <summary>A file beside the repository; the test is skipped where it is absent.</summary>
    public static string RealLog(string name)
    {
        string? folder = RepositoryRoot.SharedFolder("real-logs");
        Assert.SkipWhen(folder is null, "The folder shared/real-logs is not beside the repository.");
        return Path.Combine(folder!, name);
    }
}
