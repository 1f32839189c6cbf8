using TrimFit.Core.Analysis;

namespace TrimFit.Reporting.Wording;

/// <summary>What the written report says beyond the terminal's summary: titles of its figures, what each shows, what would prove the answer wrong.</summary>
internal abstract record ReportWords
{
    public abstract string BehindTitle { get; }
    public abstract string BehindAsItIsTitle { get; }
    public abstract string ForcesTitle { get; }
    public abstract string YourLeft { get; }
    public abstract string YourRight { get; }
    public abstract string LeftScale { get; }
    public abstract string HangCheckAfter { get; }
    public abstract string RightScale { get; }
    public abstract string LeftRiserLoad { get; }
    public abstract string RightRiserLoad { get; }
    public abstract string TorqueOnFrame { get; }
    public abstract string LeaveIt { get; }
    public abstract string NothingToMoveYet { get; }
    public abstract string NowAndAfter { get; }
    public abstract string FlyAgain { get; }
    public abstract string ResidualsTitle { get; }
    public abstract string AxisResidual { get; }
    public abstract string TurnLeftTitle { get; }
    public abstract string AxisTurnLeft { get; }
    public abstract string AsItIs { get; }
    public abstract string ToleranceBand { get; }
    public abstract string WindTitle { get; }
    public abstract string TrackTitle { get; }
    public abstract string Start { get; }
    public abstract string GroundVelocity { get; }
    public abstract string AirspeedCircle { get; }
    public abstract string WindArrow { get; }
    public abstract string ProveWrongTitle { get; }
    public abstract string CovarianceTitle { get; }
    public abstract string CovarianceNote { get; }
    public abstract string ProvenanceTitle { get; }
    public abstract string RigFile { get; }
    public abstract string SheetFile { get; }
    public abstract string Sha256 { get; }
    public abstract string WhyTitle { get; }

    /// <summary>For a constant pull: simple causes before any part is moved.</summary>
    public abstract string CausesBeforeParts { get; }

    /// <summary>An axis to the east or north in a unit.</summary>
    public abstract string AxisEast(string unit);

    /// <summary>An axis to the north in a unit.</summary>
    public abstract string AxisNorth(string unit);

    /// <summary>How far to which side: <c>7 mm to your left</c>.</summary>
    public abstract string ToYourSide(string amount, double rightPositive);

    /// <summary>A torque that tips the frame to a side.</summary>
    public abstract string Tipping(string amount, double rightPositive);

    /// <summary>Legs to fly when the flight could not answer.</summary>
    public abstract IReadOnlyList<string> LegsToFly { get; }

    /// <summary>What the picture with the part to move shows.</summary>
    public abstract string BehindDescription(AdjustmentReport? first, string part, string travel, Numbers numbers);

    /// <summary>What the picture of the forces shows.</summary>
    public abstract string ForcesDescription(string left, string right, string torque, string cg);

    /// <summary>The pull over power in one sentence, for those who cannot see the plot.</summary>
    public abstract string PullFinding(PullReport pull, Numbers numbers);

    /// <summary>How far the windows lie off the fitted line.</summary>
    public abstract string ResidualDescription(double rmsRadPerSec, int windows, Numbers numbers);

    /// <summary>What the picture of the turn left over shows.</summary>
    public abstract string TurnLeftDescription(string part, double? atFull, Numbers numbers);

    /// <summary>What the wind circle shows.</summary>
    public abstract string WindDescription(string wind);

    /// <summary>What the ground track shows.</summary>
    public abstract string TrackDescription(double lengthM, Numbers numbers);

    /// <summary>What would show that the answer is wrong, first the cheapest.</summary>
    public abstract IReadOnlyList<string> ProveWrong(TrimAnalysis analysis, FitAnswer answer, Words words, Numbers numbers);

    /// <summary>Whether the file carries its own input, and how to run it again.</summary>
    public abstract string Carried(CarriedInput carried);
}
