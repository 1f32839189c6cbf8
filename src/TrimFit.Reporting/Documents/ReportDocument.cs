namespace TrimFit.Reporting.Documents;

/// <summary>A whole report, sheet or card before it takes a form: terminal, Markdown or page.</summary>
/// <param name="Language">Two letters, such as <c>en</c>.</param>
/// <param name="Title">Title of the page.</param>
/// <param name="Subtitle">What it rests on, such as the names of the files; may be empty.</param>
/// <param name="Blocks">Its pieces in order.</param>
public sealed record ReportDocument(string Language, string Title, string Subtitle, IReadOnlyList<Block> Blocks);
