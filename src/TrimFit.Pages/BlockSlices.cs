using RazorSlices;
using TrimFit.Pages.Slices;
using TrimFit.Reporting.Documents;

namespace TrimFit.Pages;

/// <summary>Which template draws which block: one a kind.</summary>
internal static class BlockSlices
{
    public static RazorSlice Of(Block block) => block switch
    {
        AnswerBlock b => AnswerSlice.Create(b),
        HeadingBlock b => HeadingSlice.Create(b),
        ParagraphBlock b => ParagraphSlice.Create(b),
        InstructionBlock b => InstructionSlice.Create(b),
        ListBlock b => ListSlice.Create(b),
        StepsBlock b => StepsSlice.Create(b),
        ChecksBlock b => ChecksSlice.Create(b),
        FieldsBlock b => FieldsSlice.Create(b),
        DrawnReadingsBlock b => DrawnReadingsSlice.Create(b),
        SignaturesBlock b => SignaturesSlice.Create(b),
        LinesBlock b => LinesSlice.Create(b),
        TableBlock b => TableSlice.Create(b),
        FigureBlock b => FigureSlice.Create(b),
        CautionsBlock b => CautionsSlice.Create(b),
        PageBreakBlock => PageBreakSlice.Create(),
        _ => throw new ArgumentOutOfRangeException(nameof(block), block.GetType().Name, "has no HTML form"),
    };
}
