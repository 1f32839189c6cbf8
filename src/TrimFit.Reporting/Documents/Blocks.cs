namespace TrimFit.Reporting.Documents;

/// <summary>One piece of a report. Terminal, Markdown and HTML draw the same pieces, so they cannot say different things.</summary>
internal abstract record Block;

/// <summary>The answer: the first sentence of every result.</summary>
internal sealed record AnswerBlock(string Text) : Block;

/// <summary>Title of a section.</summary>
internal sealed record HeadingBlock(string Text) : Block;

/// <summary>A paragraph.</summary>
internal sealed record ParagraphBlock(string Text) : Block;

/// <summary>What to do: stands out where the form allows.</summary>
internal sealed record InstructionBlock(string Text) : Block;

/// <summary>Short points.</summary>
internal sealed record ListBlock(IReadOnlyList<string> Items) : Block;

/// <summary>A table; cells of a column that is numeric are flush right.</summary>
internal sealed record TableBlock(IReadOnlyList<TableColumn> Columns, IReadOnlyList<IReadOnlyList<string>> Rows) : Block;

/// <summary>Head of a table's column.</summary>
internal sealed record TableColumn(string Head, bool Numeric = true);

/// <summary>A figure as SVG, with the text for those who cannot see it. The terminal leaves it out.</summary>
internal sealed record FigureBlock(string Svg, string Caption) : Block;

/// <summary>The cautions; last in every report.</summary>
internal sealed record CautionsBlock(IReadOnlyList<(string Code, string Text)> Items) : Block;

/// <summary>A whole report.</summary>
internal sealed record ReportDocument(string Language, string Title, string Subtitle, IReadOnlyList<Block> Blocks);
