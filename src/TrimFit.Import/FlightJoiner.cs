using TrimFit.Core.Logs;

namespace TrimFit.Import;

/// <summary>Brings the tables of one flight to one clock.</summary>
internal static class FlightJoiner
{
    /// <summary>Joins tables; one table passes as it is.</summary>
    /// <exception cref="LogFormatException">More than one table was given.</exception>
    public static FlightImport Join(IReadOnlyList<LogTable> tables, ImportOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return tables.Count == 1
            ? FlightAssembler.FromOne(tables[0])
            : throw LogFormatException.At(tables[1].File.Name, null, null, "a second file", "one file with all columns", "Give the files one at a time.");
    }
}
