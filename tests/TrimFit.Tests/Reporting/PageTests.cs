using TrimFit.Pages;
using TrimFit.Reporting.Documents;

namespace TrimFit.Tests.Reporting;

public class PageTests
{
    private const string Hostile = "<b>\"x\" 'y' & \u0007\u0085\ud800\ufffe\U0001f600";

    private static readonly Block[] _one =
    [
        new AnswerBlock(Hostile), new HeadingBlock(Hostile), new ParagraphBlock(Hostile), new InstructionBlock(Hostile), new ListBlock([Hostile]),
        new StepsBlock([Hostile]), new ChecksBlock([new(Hostile), new("done", true)]), new FieldsBlock([new(Hostile, Hostile), new("to write", null, 2)]),
        new DrawnReadingsBlock("<svg></svg>", Hostile, Hostile, [Hostile, Hostile, Hostile], [new(Hostile, Hostile, Hostile, 1)]),
        new SignaturesBlock([Hostile]), new LinesBlock(2), new TableBlock([new(Hostile, false), new("number")], [[Hostile, "1"]]), new FigureBlock("<svg></svg>", Hostile),
        new CautionsBlock([(Hostile, Hostile)]), new PageBreakBlock(),
    ];

    [Fact]
    public void Every_kind_of_block_has_a_template_and_a_sample_here()
    {
        Type[] kinds = [.. typeof(Block).Assembly.GetTypes().Where(t => t.IsSubclassOf(typeof(Block)) && !t.IsAbstract)];
        Assert.Empty(kinds.Except(_one.Select(b => b.GetType())));
        Assert.All(_one, b => Assert.Contains("<main>", Render(b), StringComparison.Ordinal));
    }

    [Fact]
    public void No_block_lets_text_become_markup() => Assert.All(_one, b =>
    {
        string page = Render(b);
        Assert.DoesNotContain("<b>", page, StringComparison.Ordinal);
        Assert.DoesNotContain('\u0007', page);
        Assert.DoesNotContain('\u0085', page);
        Assert.DoesNotContain('\ufffe', page);
        Assert.DoesNotContain("&#x", page, StringComparison.Ordinal);
    });

    [Fact]
    public void Letters_of_any_alphabet_stay_readable_and_half_a_pair_is_replaced() => Assert.Equal(
        "&lt;b&gt;&quot;x&quot; &#39;y&#39; &amp;   \ufffd \U0001f600 Žluťoučký Ωмега",
        PageEncoder.Instance.Encode("<b>\"x\" 'y' &\u0007\u0085 \ud800\ufffe\U0001f600 Žluťoučký Ωмега"));

    [Fact]
    public void A_value_that_is_missing_becomes_a_line_to_write_on()
    {
        string page = Render(new FieldsBlock([new("filled", "12 mm"), new("empty", null, 3)]));
        Assert.Equal(3, page.Split("<span class=\"line\">").Length - 1);
        Assert.Contains("<dd>12 mm</dd>", page, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(PaperSize.A4, false, "size: A4;")]
    [InlineData(PaperSize.A4, true, "size: A4 landscape;")]
    [InlineData(PaperSize.A5, false, "size: A5;")]
    [InlineData(PaperSize.A6, false, "size: 105mm 148mm;")]
    [InlineData(PaperSize.A6, true, "size: 148mm 105mm;")]
    [InlineData(PaperSize.Letter, false, "size: letter;")]
    public void The_paper_is_told_to_the_printer(PaperSize paper, bool landscape, string size) =>
        Assert.Contains(size, Page.Render(Document([]), new() { Paper = paper, Landscape = landscape }), StringComparison.Ordinal);

    private static string Render(Block block)
    {
        string page = Page.Render(Document([block]), new());
        return page[page.IndexOf("<main>", StringComparison.Ordinal)..];
    }

    private static ReportDocument Document(IReadOnlyList<Block> blocks) => new("en", "Title", "Subtitle", blocks);
}
