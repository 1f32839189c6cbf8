using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;

namespace TrimFit.Reporting.Wording;

/// <summary>Everything a test card and its speaking form say, in one language.</summary>
internal abstract record CardWords
{
    /// <summary>Title of a card.</summary>
    public abstract string Title { get; }
    /// <summary>Title of the legs in short, one line for each run.</summary>
    public abstract string ShortTitle { get; }
    /// <summary>Title of the legs in full.</summary>
    public abstract string LegsTitle { get; }
    /// <summary>Title of what to do before take-off.</summary>
    public abstract string BeforeTitle { get; }
    /// <summary>Title of the rules in flight.</summary>
    public abstract string RulesTitle { get; }
    /// <summary>Title of the precision.</summary>
    public abstract string PrecisionTitle { get; }
    /// <summary>Title of what it needs: height, wind, fuel.</summary>
    public abstract string NeedsTitle { get; }
    /// <summary>Head of the legs' numbers.</summary>
    public abstract string Number { get; }
    /// <summary>Head of the time since the card's start.</summary>
    public abstract string Time { get; }
    /// <summary>Head of the heading.</summary>
    public abstract string Heading { get; }
    /// <summary>Head of what to do.</summary>
    public abstract string Do { get; }
    /// <summary>Head of the seconds.</summary>
    public abstract string Seconds { get; }
    /// <summary>Head of the height at the end, at least.</summary>
    public abstract string Height { get; }

    /// <summary>The card in one sentence.</summary>
    public abstract string Answer(CardPlan plan, Numbers numbers);
    /// <summary>Why there is no card, and what to do instead.</summary>
    public abstract string Refused(CardPlan plan, Numbers numbers);
    /// <summary>Whether the wanted precision is expected, and what it needs; empty when none was asked for.</summary>
    public abstract string Reaches(CardPlan plan, Numbers numbers);
    /// <summary>Name of a run's heading.</summary>
    public abstract string HeadingName(double headingRad);
    /// <summary>A whole run in one line.</summary>
    public abstract string Run(double headingRad, IEnumerable<CardLeg> measuring, Rig rig, Numbers numbers);
    /// <summary>What goes before each leg of the short card.</summary>
    public abstract string ShortNote(CardPlan plan, Numbers numbers);
    /// <summary>What to do on a leg, with the hold before it.</summary>
    public abstract string Leg(CardLeg leg, CardLeg? hold, Rig rig, Numbers numbers);
    /// <summary>What the speaking card says when a leg begins.</summary>
    public abstract string Say(CardLeg leg, Rig rig, Numbers numbers);
    /// <summary>Things to do before take-off, in order.</summary>
    public abstract IEnumerable<string> Before(CardPlan plan, Rig rig, Numbers numbers);
    /// <summary>Names and values of what the card needs.</summary>
    public abstract IEnumerable<(string Name, string Value)> Needs(CardPlan plan, Rig rig, Numbers numbers);
    /// <summary>Where the precision comes from.</summary>
    public abstract IEnumerable<string> Precision(CardPlan plan, Numbers numbers);
    /// <summary>Rules in flight: what ends the card.</summary>
    public abstract IEnumerable<string> Rules(CardPlan plan, Numbers numbers);

    /// <summary>Title of a blind trial.</summary>
    public abstract string BlindTitle { get; }
    /// <summary>How a blind trial of two settings is flown; the number proves afterwards that the order is the one drawn.</summary>
    public abstract IEnumerable<string> Blind(string commitment);
    /// <summary>The slip for who sets the machine: which setting before which flight.</summary>
    public abstract IEnumerable<string> HelperSlip(IEnumerable<string> setups, string commitment);

    /// <summary>Title of what came of a card.</summary>
    public abstract string OutcomeTitle { get; }
    /// <summary>Whether the card's precision was reached.</summary>
    public abstract string Outcome(CardOutcome outcome, Numbers numbers);
    /// <summary>The next best leg with what it buys, and what adds nothing.</summary>
    public abstract string NextLegs(CardOutcome outcome, Numbers numbers);

    /// <summary>Texts of the speaking card by their keys.</summary>
    public abstract IReadOnlyDictionary<string, string> Speaking { get; }
    /// <summary>Head lines of an empty flight sheet.</summary>
    public abstract IEnumerable<string> SheetHead(CardPlan plan, Rig rig);
}
