using TrimFit.Core.Ground;

namespace TrimFit.Reporting.Wording;

/// <summary>Everything people read before the flight: complaint, checks, measuring, hang check, wrong entries.</summary>
internal abstract record GroundWords
{
    /// <summary>Titles and single words.</summary>
    public abstract GroundLabels Labels { get; }

    /// <summary>Title of a sheet.</summary>
    public abstract string SheetTitle(SheetKind kind);

    /// <summary>What a sheet is for and what is needed, in one paragraph.</summary>
    public abstract string SheetIntroduction(SheetKind kind);

    /// <summary>What one reading is and how it is taken; the name is <c>table.key</c> of the rig file.</summary>
    public abstract string Reading(string name);

    /// <summary>Title of a drawing.</summary>
    public abstract string DrawingTitle(GroundDrawing drawing);

    /// <summary>What a drawing shows, for those who cannot see it.</summary>
    public abstract string DrawingDescription(GroundDrawing drawing);

    /// <summary>Steps of the hang check, in order.</summary>
    public abstract IReadOnlyList<string> HangSteps { get; }

    /// <summary>A fault of the entries as a whole sentence, with what to do.</summary>
    public abstract string Fault(GroundFault fault, Numbers numbers);

    /// <summary>The hang check's result.</summary>
    public abstract string HangCheck(HangCheckResult hang, LateralGeometry? tape, Numbers numbers);

    /// <summary>Readings to expect, with their plus-minus.</summary>
    public abstract string Expected(HangReading expected, double plusMinusKg, Numbers numbers);

    /// <summary>Verdict on a change.</summary>
    public abstract string Change(HangChangeResult change, string part, Numbers numbers);

    /// <summary>First sentence of the checks.</summary>
    public abstract string ChecksAnswer(Complaint complaint);

    /// <summary>The complaint as told, one point a line.</summary>
    public abstract IReadOnlyList<string> Told(Complaint complaint);

    /// <summary>A simple cause in a few words.</summary>
    public abstract string Cause(SimpleCause cause);

    /// <summary>How it is looked for.</summary>
    public abstract string LookFor(SimpleCause cause);

    /// <summary>The number to write beside a check, without unit.</summary>
    public abstract string NumberToWrite(SimpleCause cause);

    /// <summary>Unit of that number.</summary>
    public abstract string UnitToWrite(SimpleCause cause, Numbers numbers);

    /// <summary>Where what cannot be mended goes.</summary>
    public abstract string IfItStays(SimpleCause cause);

    /// <summary>Why a check stands where it stands.</summary>
    public abstract string Reason(CheckReason reason);

    /// <summary>A question of the complaint, for a terminal.</summary>
    public abstract string Question(ComplaintQuestion question);

    /// <summary>What was written into the rig file.</summary>
    public abstract string Written(string file, int readings);
}

/// <summary>Questions of the complaint.</summary>
internal enum ComplaintQuestion
{
    Side,
    When,
    Since,
    Changed,
    OtherWing,
}

/// <summary>Drawings of the sheets.</summary>
internal enum GroundDrawing
{
    CarabinersFromAbove,
    FrontHangPoints,
    RearHangPoints,
    PropellerHub,
    ThrustLineDepth,
    HangBack,
    HangCheck,
    PowerUnitOnScales,
    RearStrap,
    Rotation,
    ThrustTether,
}

/// <summary>Titles and single words of the ground work.</summary>
internal sealed record GroundLabels
{
    public required string ChecksTitle { get; init; }
    public required string Told { get; init; }
    public required string Checks { get; init; }
    public required string IfItStays { get; init; }
    public required string Check { get; init; }
    public required string WriteDown { get; init; }
    public required string Why { get; init; }
    public required string HowTo { get; init; }
    public required string MendFirst { get; init; }
    public required string ThenMeasure { get; init; }
    public required string HangCheck { get; init; }
    public required string EntryFaults { get; init; }
    public required string Expected { get; init; }
    public required string Reading { get; init; }
    public required string First { get; init; }
    public required string Second { get; init; }
    public required string Third { get; init; }
    public required string NowInRig { get; init; }
    public required string LeftScale { get; init; }
    public required string RightScale { get; init; }
    public required string ExpectedNow { get; init; }
    public required string CentreLine { get; init; }
    public required string Pilot { get; init; }
    public required string Flight { get; init; }
    public required string Level { get; init; }
    public required string Scale { get; init; }
    public required string Rope { get; init; }
    public required string Post { get; init; }
    public required string Clockwise { get; init; }
    public required string CheckRuler { get; init; }
    public required string PrintNote { get; init; }
    public required string Ruler { get; init; }
    public required string Spacer { get; init; }
    public required string CutOut { get; init; }
    public required string FoldHere { get; init; }
    public required string AngleScale { get; init; }
    public required string Machine { get; init; }
    public required string DateAndName { get; init; }
    public required string SkipHint { get; init; }
    public required string YesNo { get; init; }
}
