using System.Collections.Immutable;

namespace TrimFit.Core.Ground;

/// <summary>What the pilot tells before anything is measured.</summary>
public sealed record Complaint
{
    /// <summary>Which way it pulls.</summary>
    public PullSide Side { get; init; } = PullSide.Unknown;

    /// <summary>When it pulls; none when not told.</summary>
    public PullWhen When { get; init; }

    /// <summary>Since when.</summary>
    public PullSince Since { get; init; } = PullSince.Unknown;

    /// <summary>What changed before it began; empty when nothing or not told.</summary>
    public ImmutableArray<ChangedPart> Changed { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>What another wing did on this machine.</summary>
    public OtherWing OtherWing { get; init; } = OtherWing.NotTried;
}

/// <summary>Which way it pulls, as the seated pilot sees it.</summary>
public enum PullSide
{
    /// <summary>Not told.</summary>
    Unknown,
    /// <summary>Left.</summary>
    Left,
    /// <summary>Right.</summary>
    Right,
    /// <summary>Now left, now right.</summary>
    Changing,
}

/// <summary>When it pulls.</summary>
[Flags]
public enum PullWhen
{
    /// <summary>Not told.</summary>
    None = 0,
    /// <summary>While running and lifting off.</summary>
    Launch = 1,
    /// <summary>At full power.</summary>
    FullPower = 2,
    /// <summary>In level flight.</summary>
    Level = 4,
    /// <summary>With the engine off.</summary>
    EngineOff = 8,
    /// <summary>With the accelerator.</summary>
    Accelerator = 16,
}

/// <summary>Since when it pulls.</summary>
public enum PullSince
{
    /// <summary>Not told.</summary>
    Unknown,
    /// <summary>From the first flight of this machine on.</summary>
    Always,
    /// <summary>It grew little by little.</summary>
    Gradually,
    /// <summary>It came from one flight to the next, or grew in one flight: a fault, no trim matter.</summary>
    Suddenly,
    /// <summary>Since something was changed.</summary>
    AfterChange,
}

/// <summary>A part that was changed; the words of <c>--changed</c>.</summary>
public enum ChangedPart
{
    /// <summary>Suspension bars, riser carabiners, harness hang points, engine mounting.</summary>
    Geometry,
    /// <summary>The wing.</summary>
    Wing,
    /// <summary>Brake lines.</summary>
    BrakeLines,
    /// <summary>Trimmers.</summary>
    Trimmers,
    /// <summary>Harness.</summary>
    Harness,
    /// <summary>Propeller or engine.</summary>
    Propeller,
    /// <summary>Ballast, bags, reserve.</summary>
    Ballast,
}

/// <summary>What another wing did on this machine.</summary>
public enum OtherWing
{
    /// <summary>Not tried.</summary>
    NotTried,
    /// <summary>It pulls the same way.</summary>
    SamePull,
    /// <summary>It does not pull.</summary>
    NoPull,
    /// <summary>It pulls the other way.</summary>
    OtherWay,
}
