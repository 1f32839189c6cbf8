namespace TrimFit.Reporting.Carrying;

/// <summary>One file that a report page carries.</summary>
/// <param name="Name">Name without its folder.</param>
/// <param name="Content">Its bytes as read.</param>
public sealed record CarriedFile(string Name, ReadOnlyMemory<byte> Content)
{
    /// <summary>The folder or zip it came out of, whose files share a clock; null for a file named by itself.</summary>
    public string? Recording { get; init; }
}
