namespace TrimFit.Import.Csv;

/// <summary>The rows of a file after its one pass.</summary>
internal interface ICsvRows
{
    /// <summary>Rows of data in the file.</summary>
    int RowsRead { get; }
    /// <summary>Times of the result.</summary>
    int Count { get; }
    /// <summary>Seconds since <see cref="ZeroSec"/>, strictly increasing.</summary>
    double[] TimeSec { get; }
    /// <summary>The clock's reading at <c>TimeSec = 0</c>, s.</summary>
    long ZeroSec { get; }
    /// <summary>What the coarser clock of the file shows at <c>TimeSec = 0</c>, s since 1970 or midnight; null without one.</summary>
    double? AnchorSec { get; }
    /// <summary>Whether a stamp carried its zone.</summary>
    bool SawZone { get; }
    /// <summary>Rows left out.</summary>
    CsvLeftOut LeftOut { get; }
    /// <summary>SHA-256 of the file, lower-case hex.</summary>
    string Sha256 { get; }
}
