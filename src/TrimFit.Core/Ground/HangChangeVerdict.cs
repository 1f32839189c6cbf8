namespace TrimFit.Core.Ground;

/// <summary>What two hang checks say about a change made between them.</summary>
public enum HangChangeVerdict
{
    /// <summary>The weight went the way and about as far as it should.</summary>
    Confirmed,
    /// <summary>The weight went the other way: the part was moved to the wrong side, or an entry is wrong.</summary>
    WrongWay,
    /// <summary>The right way, but not as far or farther than it should.</summary>
    OtherSize,
    /// <summary>The readings scatter too much for so small a change.</summary>
    CannotTell,
}
