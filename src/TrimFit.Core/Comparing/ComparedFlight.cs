using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;

namespace TrimFit.Core.Comparing;

/// <summary>One flight of a comparison.</summary>
public sealed record ComparedFlight
{
    /// <summary>Name for people, such as the log's file name.</summary>
    public required string Name { get; init; }

    /// <summary>The setting the machine was flown with; flights with the same word belong together.</summary>
    public required string Setup { get; init; }

    /// <summary>The flight by itself.</summary>
    public required TrimAnalysis Analysis { get; init; }

    /// <summary>The pilot's sheet; null without one.</summary>
    public FlightSheet? Sheet { get; init; }

    /// <summary>Day of the flight; null when nobody knows.</summary>
    public DateOnly? Date { get; init; }
}
