namespace TrimFit.Core.Analysis;

/// <summary>The four powers at which a pull is stated.</summary>
public enum PowerSetting
{
    /// <summary>Engine off: no thrust.</summary>
    Off,
    /// <summary>Idle.</summary>
    Idle,
    /// <summary>Level flight (JSON: cruise).</summary>
    Cruise,
    /// <summary>Full power.</summary>
    Full,
}
