using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;

namespace TrimFit.Reporting.Wording;

/// <summary>Texts of the page a workshop hands over: plain, no statistics.</summary>
internal abstract record CustomerWords
{
    public abstract string Title { get; }
    public abstract string Machine { get; }
    public abstract string Customer { get; }
    public abstract string Wing { get; }
    public abstract string Date { get; }
    public abstract string Told { get; }
    public abstract string Checked { get; }
    public abstract string Measured { get; }
    public abstract string Changed { get; }
    public abstract string Reading { get; }
    public abstract string Before { get; }
    public abstract string After { get; }
    public abstract string LeftAndNormal { get; }
    public abstract string FirstFlight { get; }
    public abstract string ComeBack { get; }
    public abstract string SignedWorkshop { get; }
    public abstract string SignedCustomer { get; }

    /// <summary>What is checked before any part is moved.</summary>
    public abstract IReadOnlyList<string> UsualChecks { get; }

    /// <summary>What to do on the first flight.</summary>
    public abstract IReadOnlyList<string> FirstFlightSteps { get; }

    /// <summary>When to come back.</summary>
    public abstract IReadOnlyList<string> ComeBackWhen { get; }

    /// <summary>The pull in plain words.</summary>
    public abstract string MeasuredPull(FitAnswer answer, Numbers numbers);

    /// <summary>The change in plain words: part, way, how far.</summary>
    public abstract string Change(AdjustmentReport? first, bool balanced, string part, Numbers numbers);

    /// <summary>What stays with the engine off and is normal.</summary>
    public abstract string LeftOver(double? offRadPerSec, Numbers numbers);

    /// <summary>Names of readings for the riser carabiners, the harness hang points and the two scales.</summary>
    public abstract string Carabiner(bool left);

    /// <summary>Names of the hang-check scales.</summary>
    public abstract string Scale(bool left);

    /// <summary>Names of the harness hang points' middles.</summary>
    public abstract string HangPoints(bool front);

    /// <summary>A part other than those.</summary>
    public abstract string OtherPart(AdjustmentKind kind, string part);
}
