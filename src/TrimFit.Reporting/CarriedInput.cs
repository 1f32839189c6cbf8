namespace TrimFit.Reporting;

/// <summary>What a report page carries of its own input.</summary>
public enum CarriedInput
{
    /// <summary>Nothing: text and Markdown, and pages made without their files.</summary>
    None,
    /// <summary>Logs, rig file and sheet, byte for byte.</summary>
    Whole,
    /// <summary>The flight without positions, rig file and sheet.</summary>
    WithoutPlace,
    /// <summary>Nothing, since the log is too long.</summary>
    TooLong,
}
