namespace TrimFit.Pages;

/// <summary>How a page lies on paper; screens do not care.</summary>
public sealed record PageOptions
{
    /// <summary>Paper it is made for. Default A4; a printer with other paper scales it.</summary>
    public PaperSize Paper { get; init; } = PaperSize.A4;

    /// <summary>Wider than high.</summary>
    public bool Landscape { get; init; }

    /// <summary>Small print and narrow margins, for what must fit on one side.</summary>
    public bool Compact { get; init; }

    /// <summary>What the page carries of its own input, as <see cref="Reporting.Carrying.ReportInput.Pack"/> writes it; null for nothing.</summary>
    public string? Input { get; init; }
}
