namespace TrimFit.Reporting;

/// <summary>A sheet to print and fill in; the words of <c>--sheet</c> are these with hyphens.</summary>
public enum SheetKind
{
    /// <summary>Tape and level on the frame.</summary>
    Measuring,
    /// <summary>Pilot in full kit on two hanging scales.</summary>
    HangCheck,
    /// <summary>Power unit on two scales, rear strap.</summary>
    Weighing,
    /// <summary>Sense of rotation and reduction.</summary>
    Rotation,
    /// <summary>Static thrust on a tethered scale.</summary>
    Thrust,
    /// <summary>True-scale paper templates.</summary>
    Templates,
}
