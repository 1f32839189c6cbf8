namespace TrimFit.Core.Workshop;

/// <summary>One check with its outcome and number.</summary>
public sealed record CheckRecord
{
    /// <summary>Number in its job, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>When it was made, UTC.</summary>
    public required DateTimeOffset Made { get; init; }

    /// <summary>Number of the setup the machine had; null before the first.</summary>
    public int? Setup { get; init; }

    /// <summary>Code of the check, such as <c>brake_lines</c> or <c>hang_check</c>.</summary>
    public required string Code { get; init; }

    /// <summary>What came out.</summary>
    public required CheckOutcome Outcome { get; init; }

    /// <summary>The number found, in <see cref="Unit"/>; null when there is none.</summary>
    public double? Value { get; init; }

    /// <summary>Unit of the number; empty without one.</summary>
    public string Unit { get; init; } = "";

    /// <summary>Anything else; empty when nothing.</summary>
    public string Note { get; init; } = "";

    /// <summary>Who did it; empty when not given.</summary>
    public string By { get; init; } = "";
}
