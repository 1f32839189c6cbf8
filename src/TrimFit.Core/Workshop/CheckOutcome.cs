namespace TrimFit.Core.Workshop;

/// <summary>What came out of a check.</summary>
public enum CheckOutcome
{
    /// <summary>In order.</summary>
    Pass,
    /// <summary>Not in order.</summary>
    Fail,
    /// <summary>Not done.</summary>
    NotDone,
}
