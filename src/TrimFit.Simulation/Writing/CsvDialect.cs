using System.Collections.Immutable;
using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>How a CSV log is written. The default is comma, point decimals, UTF-8, one header row, elapsed seconds.</summary>
public sealed record CsvDialect
{
    /// <summary>Separator between cells.</summary>
    public char Separator { get; init; } = ',';

    /// <summary>Whether numbers have a comma for the decimal mark.</summary>
    public bool DecimalComma { get; init; }

    /// <summary>Encoding of the text.</summary>
    public CsvEncoding Encoding { get; init; } = CsvEncoding.Utf8;

    /// <summary>End of a line.</summary>
    public string NewLine { get; init; } = "\n";

    /// <summary>Lines written before the header.</summary>
    public ImmutableArray<string> Preamble { get; init; } = [];

    /// <summary>How columns are named.</summary>
    public CsvHeader Header { get; init; } = CsvHeader.NameAndUnit;

    /// <summary>How time is written.</summary>
    public CsvTime Time { get; init; } = CsvTime.ElapsedSeconds;

    /// <summary>Whether numbers carry every digit they have instead of those a logger would write.</summary>
    public bool EveryDigit { get; init; }

    /// <summary>What stands in a cell without a value.</summary>
    public string Missing { get; init; } = "";

    /// <summary>Whether each row ends with a separator.</summary>
    public bool TrailingSeparator { get; init; }

    /// <summary>Whether rows hold one value each: time, channel, value.</summary>
    public bool LongFormat { get; init; }

    /// <summary>The header comes again after this many rows, as after a restart; 0 for never.</summary>
    public int RepeatHeaderEvery { get; init => field = (int)Guard.NotNegative(value); }

    /// <summary>Seconds added to this logger's clock.</summary>
    public double ClockOffsetSec { get; init => field = Guard.Finite(value); }
}
