using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;

namespace TrimFit.Reporting.Wording.Comparing;

/// <summary>Words of before and after.</summary>
internal abstract record CompareWords
{
    /// <summary>Title of the report.</summary>
    public abstract string Title { get; }

    /// <summary>Section and column heads.</summary>
    public abstract CompareHeads Heads { get; }

    /// <summary>The first sentence.</summary>
    public abstract string Answer(FlightComparison comparison, Numbers numbers);

    /// <summary>What the verdict means and what it does not.</summary>
    public abstract string Verdict(FlightComparison comparison, Numbers numbers);

    /// <summary>Share of the pull that is gone; empty when it cannot be said.</summary>
    public abstract string Removed(FlightComparison comparison, Numbers numbers);

    /// <summary>How much went with what was changed; empty when nothing was declared.</summary>
    public abstract string Attribution(ChangeAttribution? attribution, Numbers numbers);

    /// <summary>Trend over the settings; empty with fewer than three.</summary>
    public abstract string Trend(FlightComparison comparison, Numbers numbers);

    /// <summary>What was taken for the scatter from flight to flight.</summary>
    public abstract string Scatter(ScatterReport scatter, Numbers numbers);

    /// <summary>How the flights of a setting were put together.</summary>
    public abstract string Method(PoolingMethod method);

    /// <summary>A notice as a whole sentence, with what to do.</summary>
    public abstract string Notice(CompareNotice notice, Numbers numbers);

    /// <summary>Whether the pull left at one power lies inside the tolerance: yes, no, or not shown.</summary>
    public abstract string Inside(SetupPull pull, double toleranceRadPerSec);

    /// <summary>The order of a blind trial, opened.</summary>
    public abstract string Order(OpenedOrder order, bool fits);

    /// <summary>What the two lines over power show, for those who cannot see them.</summary>
    public abstract string PowerPlotDescription(FlightComparison comparison);

    /// <summary>What the history shows, for those who cannot see it.</summary>
    public abstract string HistoryDescription(FlightComparison comparison);

    /// <summary>What the next step rests on.</summary>
    public abstract string NextNote(bool pairUsed);

    /// <summary>Strength of the next step, in words that fit more than one flight.</summary>
    public abstract string Strength(VerdictStrength strength);
}

/// <summary>Heads of the comparison's sections and tables.</summary>
internal sealed record CompareHeads
{
    public required string BeforeAfter { get; init; }
    public required string Before { get; init; }
    public required string After { get; init; }
    public required string Change { get; init; }
    public required string Inside { get; init; }
    public required string Next { get; init; }
    public required string Noticed { get; init; }
    public required string Flights { get; init; }
    public required string Flight { get; init; }
    public required string Setting { get; init; }
    public required string Day { get; init; }
    public required string PullInLevelFlight { get; init; }
    public required string Coefficients { get; init; }
    public required string PowerPlot { get; init; }
    public required string History { get; init; }
    public required string Tolerance { get; init; }
    public required string FlightNumber { get; init; }
    public required string Settings { get; init; }
    public required string HowPooled { get; init; }
}
