using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>Collects blocks; empty tables and lists are left away together with a heading that would stand over nothing.</summary>
internal sealed class DocumentBuilder(Words words)
{
    private readonly List<Block> _blocks = [];

    public Words Words { get; } = words;

    public DocumentBuilder Answer(string text) => Add(new AnswerBlock(text));

    public DocumentBuilder Heading(string text) => Add(new HeadingBlock(text));

    public DocumentBuilder Paragraph(string text) => text.Length == 0 ? this : Add(new ParagraphBlock(text));

    public DocumentBuilder Instruction(string text) => Add(new InstructionBlock(text));

    public DocumentBuilder List(IEnumerable<string> items)
    {
        string[] list = [.. items];
        return list.Length == 0 ? this : Add(new ListBlock(list));
    }

    public DocumentBuilder Table(IReadOnlyList<TableColumn> columns, IEnumerable<IReadOnlyList<string>> rows)
    {
        IReadOnlyList<string>[] list = [.. rows];
        return list.Length == 0 ? this : Add(new TableBlock(columns, list));
    }

    public DocumentBuilder Figure(string? svg, string caption, FigureKind kind = FigureKind.Plot) => svg is null ? this : Add(new FigureBlock(svg, caption, kind));

    public DocumentBuilder Steps(IEnumerable<string> items) => Add(new StepsBlock([.. items]));

    public DocumentBuilder Checks(IEnumerable<CheckItem> items) => Add(new ChecksBlock([.. items]));

    public DocumentBuilder Fields(IEnumerable<FieldItem> items) => Add(new FieldsBlock([.. items]));

    public DocumentBuilder Signatures(IEnumerable<string> names) => Add(new SignaturesBlock([.. names]));

    public DocumentBuilder Lines(int count) => Add(new LinesBlock(count));

    public DocumentBuilder PageBreak() => Add(new PageBreakBlock());

    public DocumentBuilder Cautions(IEnumerable<CautionCode> codes, Numbers numbers) =>
        Heading(Words.Labels.Cautions).Add(new CautionsBlock([.. codes.Select(c => (Wording.Cautions.CodeOf(c), Words.Caution(c, numbers)))]));

    public ReportDocument Build(string title, string subtitle)
    {
        var kept = new List<Block>();
        for (int i = 0; i < _blocks.Count; i++)
        {
            bool overNothing = _blocks[i] is HeadingBlock && (i + 1 == _blocks.Count || _blocks[i + 1] is HeadingBlock);
            if (!overNothing)
                kept.Add(_blocks[i]);
        }
        return new(Words.Language, title, subtitle, kept);
    }

    public DocumentBuilder Add(Block block)
    {
        _blocks.Add(block);
        return this;
    }
}
