namespace TrimFit.Core.Ground;

/// <summary>Why a check stands where it stands.</summary>
public enum CheckReason
{
    /// <summary>Quick to look at and often the cause.</summary>
    QuickAndFrequent,
    /// <summary>The pull is there with the engine off: wing, harness or pilot.</summary>
    EngineOff,
    /// <summary>The pull comes with power: what carries or turns with the engine.</summary>
    WithPower,
    /// <summary>The pull is felt while running and lifting off.</summary>
    AtLaunch,
    /// <summary>The pull comes with the accelerator.</summary>
    WithAccelerator,
    /// <summary>It came suddenly: something broke, slipped or came loose.</summary>
    Sudden,
    /// <summary>This was changed before it began.</summary>
    Changed,
    /// <summary>Another wing pulls the same way: it is not the wing.</summary>
    SameWithOtherWing,
    /// <summary>Another wing does not pull that way: it is the wing.</summary>
    GoneWithOtherWing,
    /// <summary>The pull changes its side: something moves or is loose.</summary>
    ChangesSide,
}
