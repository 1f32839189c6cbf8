namespace TrimFit.Reporting.Documents;

/// <summary>How wide a figure is shown.</summary>
public enum FigureKind
{
    /// <summary>A plot: as wide as the text; on a narrow screen it scrolls sideways, so that its letters stay readable.</summary>
    Plot,
    /// <summary>A drawing: narrower than the text, whole on every screen.</summary>
    Drawing,
    /// <summary>A template to be printed true to scale: never shrunk; on a narrow screen it scrolls sideways.</summary>
    FullSize,
}
