using TrimFit.Import.Csv;
using TrimFit.Import.Tracks;

namespace TrimFit.Import;

public static partial class LogFormats
{
    /// <summary>Every kind of log file, in the order in which they are asked; a new kind is one line here.</summary>
    public static IReadOnlyList<ILogFormat> All { get; } =
    [
        new IgcLogFormat(),
        new GpxLogFormat(),
        new NmeaLogFormat(),
        new CsvLogFormat(),
    ];
}
