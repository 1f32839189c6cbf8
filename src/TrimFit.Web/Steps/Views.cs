using Microsoft.AspNetCore.Html;
using RazorSlices;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;
using TrimFit.Reporting.Wording.Web;
using TrimFit.Web.Flights;
using TrimFit.Web.Sessions;

namespace TrimFit.Web.Steps;

// Models of the templates. They are public only because the generator of RazorSlices writes public classes; nobody outside uses them.
#pragma warning disable CS1591

/// <summary>What every template may use: words, numbers, and the token that each form carries.</summary>
public sealed record WebContext
{
    internal WebContext(Session session, WebOptions options, string formToken) => (Session, Options, FormToken) = (session, options, formToken);

    internal Session Session { get; }

    internal WebOptions Options { get; }

    internal string FormToken { get; }

    /// <summary>Name of the field with the token.</summary>
    public const string TokenName = "form-token";

    internal Words Words { get; } = Words.English;

    internal WebLabels L => Words.Web.Labels;

    internal Numbers Numbers => new(Session.Style);

    public HtmlString TokenField => new(Html.Of($"<input type=\"hidden\" name=\"{TokenName}\" value=\"{FormToken}\">").Markup);

    /// <summary>The unit system that the button changes to.</summary>
    public string OtherUnits => Session.Style.Units == UnitSystem.Metric ? "imperial" : "metric";

    public string OtherUnitsLabel => Session.Style.Units == UnitSystem.Metric ? L.ShowImperial : L.ShowMetric;

    public string EstimateCaution => Words.Caution(CautionCode.Estimate, Numbers);
}

/// <summary>One step of the job in the row at the top.</summary>
public sealed record StepLink(string Path, string Name, string About, bool Current);

/// <summary>A page around a body.</summary>
public sealed record WebPage(WebContext Web, string Title, string Path, RazorSlice Body)
{
    public string Notice { get; init; } = "";

    public string Problem { get; init; } = "";

    /// <summary>Where a change of units comes back to.</summary>
    public string Back => Path;

    public IReadOnlyList<StepLink> Steps => StepsOf(Web, Path);

    public static IReadOnlyList<StepLink> StepsOf(WebContext web, string? path)
    {
        WebLabels l = web.L;
        return
        [
            .. new (string Path, string Name, string About)[]
            {
                ("/complaint", l.StepComplaint, l.AboutComplaint), ("/checks", l.StepChecks, l.AboutChecks), ("/readings", l.StepReadings, l.AboutReadings),
                ("/flight", l.StepFlight, l.AboutFlight), ("/answer", l.StepAnswer, l.AboutAnswer), ("/change", l.StepChange, l.AboutChange), ("/proof", l.StepProof, l.AboutProof),
                ("/book", l.StepBook, l.AboutBook),
            }.Where(s => s.Path != "/book" || web.Options.BookPath is not null)
            .Select(s => new StepLink(s.Path, s.Name, s.About, path is not null && (path == s.Path || path.StartsWith(s.Path + "/", StringComparison.Ordinal)))),
        ];
    }
}

public sealed record MessageView(IReadOnlyList<string> Lines, string Path, string Link);

public sealed record DropView(WebContext Web, bool Straight)
{
    public string MostBytes => Web.Options.MostUploadBytes.ToString(System.Globalization.CultureInfo.InvariantCulture);

    public string Job => Web.Session.Job?.ToString(System.Globalization.CultureInfo.InvariantCulture) ?? "";

    /// <summary>The question whether a flight that goes straight to its answer is kept; empty without a job.</summary>
    public string KeepInJob => Web.Session.Job is long job && Web.Options.BookPath is not null ? Web.Words.Web.KeepStraight(job) : "";

    public string TooLarge => Web.Words.Web.TooLarge(Web.Options.MostUploadBytes, Web.Numbers);
}

public sealed record ColumnView(string Key, string File, string Name, string Role, string Unit, string Basis, IReadOnlyList<string> Cells, string RoleLabel, string UnitLabel);

public sealed record FlightView(WebContext Web)
{
    internal DroppedFlight? Flight { get; init; }
    public IReadOnlyList<string> Lines { get; init; } = [];
    public IReadOnlyList<string> Warnings { get; init; } = [];
    public IReadOnlyList<ColumnView> Columns { get; init; } = [];
    public IReadOnlyList<string> Roles { get; init; } = [];
    public IReadOnlyList<string> Units { get; init; } = [];
    public IReadOnlyList<string> MachineLines { get; init; } = [];
    public IReadOnlyList<(string Value, string Name)> Balances { get; init; } = [];
    public IReadOnlyList<(string Value, string Name, bool Chosen)> Jobs { get; init; } = [];
    public bool CanMend { get; init; }
    public bool CanRun { get; init; }
}

public sealed record AnswerView(WebContext Web, Block First, ReportDocument Rest, IReadOnlyList<(string Path, string Name, bool Download)> Links, IReadOnlyList<(string Path, string Name, bool Current)> Others);

public sealed record MoveRow(string Travel, string Mark, IReadOnlyList<string> Cells);

public sealed record MoveView(WebContext Web)
{
    public required IReadOnlyList<(string Path, string Name, bool Current)> Parts { get; init; }
    public IReadOnlyList<string> Heads { get; init; } = [];
    public IReadOnlyList<MoveRow> Rows { get; init; } = [];
    public string SliderLabel { get; init; } = "";
    public string FirstStep { get; init; } = "";
    public string Start { get; init; } = "0";
    public string Last { get; init; } = "0";
    public string Figure { get; init; } = "";
    public string FigureCaption { get; init; } = "";
    public required ReportDocument Cautions { get; init; }
}

public sealed record FieldView(string Name, string Label, string Value, string Hint, string Fault, bool Needed, bool IsNumber, IReadOnlyList<(string Value, string Name)> Choices)
{
    public string Id => "f-" + Name.Replace('.', '-');
}

public sealed record FieldGroup(string Title, IReadOnlyList<string> Drawings, IReadOnlyList<FieldView> Fields);

public sealed record ReadingsView(WebContext Web, IReadOnlyList<FieldGroup> Groups, string Drawing, IReadOnlyList<string> OtherFaults, bool HasRig, IReadOnlyList<(string Path, string Name)> Sheets);

public sealed record ChoiceView(string Value, string Text, bool Chosen);

public sealed record QuestionView(string Name, string Text, bool Several, IReadOnlyList<ChoiceView> Choices);

public sealed record ComplaintView(WebContext Web, IReadOnlyList<QuestionView> Questions);

public sealed record CheckRowView(string Code, string Text, string Unit, string OutcomeLabel, string ValueLabel, string NoteLabel);

public sealed record ChecksView(WebContext Web, Block First, ReportDocument Rest, string JobName, IReadOnlyList<CheckRowView> Rows, IReadOnlyList<(string Value, string Name)> Outcomes);

public sealed record ChangeView(WebContext Web)
{
    public IReadOnlyList<(string Part, string Text)> Instructions { get; init; } = [];
    public bool HasRig { get; init; }
    public bool HasHangCheck { get; init; }
    public IReadOnlyList<(string Value, string Name, bool Chosen)> Parts { get; init; } = [];
    public string Travel { get; init; } = "";
    public string Left { get; init; } = "";
    public string Right { get; init; } = "";
    public ReportDocument? Proof { get; init; }
    public required ReportDocument Cautions { get; init; }
}

public sealed record ProofView(WebContext Web)
{
    public IReadOnlyList<(string Value, string Name)> Answers { get; init; } = [];
    public string Before { get; init; } = "";
    public string After { get; init; } = "";
    public IReadOnlyList<(string Value, string Name)> Changed { get; init; } = [];
    public string ChangedNow { get; init; } = "";
    public ReportDocument? Document { get; init; }
}

public sealed record BookView(WebContext Web)
{
    public IReadOnlyList<string> Heads { get; init; } = [];
    public IReadOnlyList<(string Path, IReadOnlyList<string> Cells, bool Current)> Jobs { get; init; } = [];
    public string Machine { get; init; } = "";
    public string Complaint { get; init; } = "";
}

public sealed record JobView(WebContext Web, string Path, ReportDocument Document, bool CanTakeRig, bool HasSetup);

public sealed record CardView(WebContext Web)
{
    public bool HasRig { get; init; }
    public string Width { get; init; } = "";
    public string Minutes { get; init; } = "";
    public string Floor { get; init; } = "";
    public bool EngineOff { get; init; }
    public IReadOnlyList<(string Value, string Name, bool Chosen)> Loggers { get; init; } = [];
    public bool HasCard { get; init; }
    public ReportDocument? Document { get; init; }
}
