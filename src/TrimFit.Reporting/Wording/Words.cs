using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;

namespace TrimFit.Reporting.Wording;

/// <summary>Everything people read, in one language. A language is one class: a text it lacks does not compile, and a new member of
/// <see cref="FindingCode"/> or <see cref="CautionCode"/> without its sentence does not either (CS8509 is an error).</summary>
internal abstract record Words
{
    public static Words English { get; } = new EnglishWords();

    private static readonly Words _german = new GermanWords();

    /// <summary>The words of a language.</summary>
    public static Words Of(ReportLanguage language) => language switch
    {
        ReportLanguage.English => English,
        ReportLanguage.German => _german,
        _ => throw new ArgumentOutOfRangeException(nameof(language), language, "is no language of reports"),
    };

    /// <summary>BCP 47 tag, for the page's <c>lang</c>.</summary>
    public abstract string Language { get; }

    /// <summary>Titles, column heads and single words.</summary>
    public abstract Labels Labels { get; }

    /// <summary>Texts of the written report.</summary>
    public abstract ReportWords Report { get; }

    /// <summary>Texts of the customer's page.</summary>
    public abstract CustomerWords Customer { get; }

    /// <summary>Texts of the ground work.</summary>
    public abstract GroundWords Ground { get; }
    /// <summary>Texts of test cards.</summary>
    public abstract CardWords Card { get; }

    /// <summary>Words of the summary of many flights.</summary>
    public abstract Batch.BatchWords Batch { get; }

    /// <summary>Words of before and after.</summary>
    public abstract Comparing.CompareWords Comparing { get; }

    /// <summary>Texts of the local web page.</summary>
    public abstract Web.WebWords Web { get; }

    /// <summary>The job book.</summary>
    public abstract JobWords Jobs { get; }

    /// <summary>Right or left, from the seated pilot's place.</summary>
    public abstract string Side(double rightPositive);

    /// <summary>A lateral distance with its side: <c>14 mm left</c>.</summary>
    public abstract string Lateral(double m, Numbers numbers);

    /// <summary>A travel with its side: <c>14 mm left</c>.</summary>
    public abstract string Travel(double value, TravelUnit unit, Numbers numbers);

    /// <summary>Power as a row's head.</summary>
    public abstract string Setting(PowerSetting setting);

    /// <summary>The balance thrust as an adverbial: in level flight, at full power.</summary>
    public abstract string AtPower(BalanceThrust thrust, Numbers numbers);

    /// <summary>The adjustment's short name in a table.</summary>
    public abstract string PartShort(AdjustmentKind kind);

    /// <summary>The first sentence of every result.</summary>
    public abstract string Answer(FitAnswer answer, Numbers numbers);

    /// <summary>What the verdict means.</summary>
    public abstract string Verdict(VerdictCode code);

    /// <summary>Strength of the answer, with what it rests on.</summary>
    public abstract string Strength(VerdictStrength strength);

    /// <summary>Strength in one word.</summary>
    public abstract string StrengthWord(VerdictStrength strength);

    /// <summary>The first step as an instruction: part, direction, reference line, readings before and after, hang check.</summary>
    public abstract string FirstStep(AdjustmentReport adjustment, Rig rig, Numbers numbers);

    /// <summary>A finding as a whole sentence, with what to do; the unit is that of travels in it, for the note of an adjustment.</summary>
    public abstract string Finding(Finding finding, Numbers numbers, TravelUnit unit = TravelUnit.Meter);

    /// <summary>A caution.</summary>
    public abstract string Caution(CautionCode code, Numbers numbers);

    /// <summary>Name of an assumption in words; the name itself when it is unknown here.</summary>
    public abstract string Assumption(string name);

    /// <summary>Name of a coefficient of the turn model.</summary>
    public abstract string Coefficient(string name);

    /// <summary>Name of a source of the sensitivity.</summary>
    public abstract string SensitivitySource(string kind);

    /// <summary>Name of a method of the turn model.</summary>
    public abstract string Method(string method);

    /// <summary>How the propeller turns.</summary>
    public abstract string Propeller(PropellerRotation rotation);

    /// <summary>Twist direction.</summary>
    public abstract string Twist(TwistDirection direction);

    /// <summary>What the smallest detectable pull means.</summary>
    public abstract string SmallestDetectable(double radPerSec, Numbers numbers);

    /// <summary>Where the level-flight thrust comes from.</summary>
    public abstract string CruiseBasis(CruiseBasis basis);

    /// <summary>The shift of the CG in words, with the two parts it answers.</summary>
    public abstract string Shift(ShiftReport shift, Numbers numbers);

    /// <summary>What the cross-check says.</summary>
    public abstract string CrossCheck(bool? agrees);

    /// <summary>What the rig's statics say before any flight.</summary>
    public abstract string RigAnswer(RigReport report, Rig rig, Numbers numbers);

    /// <summary>What was read, in one sentence.</summary>
    public abstract string InspectAnswer(Core.Logs.ImportDiagnostics diagnostics, Numbers numbers);

    /// <summary>The wind in one sentence.</summary>
    public abstract string Wind(Core.Turns.Wind? wind, Numbers numbers);

    /// <summary>The gyro in one sentence; empty without a gyro.</summary>
    public abstract string Gyro(GyroReport? gyro, Numbers numbers);

    /// <summary>A pause in the record.</summary>
    public abstract string Gap(Core.Logs.TimeGap gap, Numbers numbers);

    /// <summary>Rows left out for one reason.</summary>
    public abstract string RowsLeftOut(string file, Core.Logs.RowsLeftOut left, Numbers numbers);

    /// <summary>What the reader or the estimator said in a few words of English (why a row, a span or a coefficient is missing, what a file is,
    /// a notice), in this language; the text itself where it is not known here, such as a name.</summary>
    public abstract string Said(string text, Numbers numbers);

    /// <summary>A unit that stands in a column of its own.</summary>
    public abstract string UnitName(string unit);

    /// <summary>What the drawing of the rig shows, for those who cannot see it.</summary>
    public abstract string DrawingDescription(bool after);

    /// <summary>What the turn plot shows, for those who cannot see it.</summary>
    public abstract string TurnPlotDescription(int points, bool fitted);

    /// <summary>What the flight plot shows, for those who cannot see it.</summary>
    public abstract string FlightPlotDescription(double durationSec, Numbers numbers);
}
