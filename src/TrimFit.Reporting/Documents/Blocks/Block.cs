namespace TrimFit.Reporting.Documents;

/// <summary>One piece of a report. Terminal, Markdown and HTML draw the same pieces, so they cannot say different things.</summary>
public abstract record Block;
