namespace TrimFit.Core.Workshop;

/// <summary>A file that a flight brought or a result rests on; the book keeps its bytes.</summary>
/// <param name="Role">What it is: <see cref="Log"/>, <see cref="Rig"/>, <see cref="Sheet"/>; of the earlier flights of a comparison with <see cref="Before"/> in front.</param>
/// <param name="Name">File name without its folder.</param>
/// <param name="Sha256">SHA-256 of its bytes, lower-case hex.</param>
public sealed record InputRecord(string Role, string Name, string Sha256)
{
    /// <summary>Role of a flight log.</summary>
    public const string Log = "log";

    /// <summary>Role of a log whose positions were taken out before it was kept.</summary>
    public const string LogWithoutPlace = "log_without_place";

    /// <summary>Role of a rig file.</summary>
    public const string Rig = "rig";

    /// <summary>Role of a flight sheet.</summary>
    public const string Sheet = "sheet";

    /// <summary>Stands before the role of a file of the flights before a change.</summary>
    public const string Before = "before_";
}
