using System.Globalization;
using System.Text;

namespace TrimFit.Reporting.Documents;

/// <summary>A report as Markdown; figures are told, not shown, since a single Markdown file cannot carry them.</summary>
internal static class MarkdownRenderer
{
    public static string Render(ReportDocument document)
    {
        var text = new StringBuilder();
        text.Append("# ").Append(Escape(document.Title)).Append("\n\n").Append(Escape(document.Subtitle)).Append('\n');
        foreach (Block block in document.Blocks)
        {
            text.Append('\n');
            switch (block)
            {
                case AnswerBlock answer:
                    text.Append("**").Append(Escape(answer.Text)).Append("**\n");
                    break;
                case HeadingBlock heading:
                    text.Append("## ").Append(Escape(heading.Text)).Append('\n');
                    break;
                case ParagraphBlock paragraph:
                    text.Append(Escape(paragraph.Text)).Append('\n');
                    break;
                case InstructionBlock instruction:
                    text.Append("> ").Append(Escape(instruction.Text)).Append('\n');
                    break;
                case ListBlock list:
                    foreach (string item in list.Items)
                        text.Append("- ").Append(Escape(item)).Append('\n');
                    break;
                case StepsBlock steps:
                    for (int i = 0; i < steps.Items.Count; i++)
                        text.Append(CultureInfo.InvariantCulture, $"{i + 1}. ").Append(Escape(steps.Items[i])).Append('\n');
                    break;
                case ChecksBlock checks:
                    foreach (CheckItem item in checks.Items)
                        text.Append(item.Done == true ? "- [x] " : "- [ ] ").Append(Escape(item.Text)).Append('\n');
                    break;
                case FieldsBlock fields:
                    foreach (FieldItem item in fields.Items)
                        text.Append("- ").Append(Escape(item.Name)).Append(": ").Append(Escape(item.Value ?? TextRenderer.Line)).Append('\n');
                    break;
                case DrawnReadingsBlock drawn:
                    text.Append("### ").Append(Escape(drawn.Title)).Append("\n\n").Append(Escape(drawn.Text)).Append('\n');
                    foreach (ReadingRow row in drawn.Rows)
                        text.Append("- ").Append(Escape(row.Name)).Append(": ").AppendJoin(' ', Enumerable.Repeat(Escape(TextRenderer.Line), row.Cells)).Append('\n');
                    break;
                case SignaturesBlock signatures:
                    foreach (string name in signatures.Names)
                        text.Append("- ").Append(Escape(name)).Append(": ").Append(Escape(TextRenderer.Line)).Append('\n');
                    break;
                case LinesBlock lines:
                    for (int i = 0; i < lines.Count; i++)
                        text.Append(Escape(TextRenderer.Line)).Append("\n\n");
                    break;
                case PageBreakBlock:
                    text.Append("---\n");
                    break;
                case TableBlock table:
                    Row(text, table.Columns.Select(c => c.Head));
                    text.Append('|').AppendJoin('|', table.Columns.Select(c => c.Numeric ? " --: " : " :-- ")).Append("|\n");
                    foreach (IReadOnlyList<string> row in table.Rows)
                        Row(text, row);
                    break;
                case FigureBlock figure:
                    text.Append(Escape(figure.Caption)).Append('\n');
                    break;
                case CautionsBlock cautions:
                    foreach ((_, string caution) in cautions.Items)
                        text.Append("- ").Append(Escape(caution)).Append('\n');
                    break;
            }
        }
        return text.ToString();
    }

    private static void Row(StringBuilder text, IEnumerable<string> cells) => text.Append("| ").AppendJoin(" | ", cells.Select(Escape)).Append(" |\n");

    /// <summary>Text that stays text: markup characters escaped, tags made harmless, line breaks turned into spaces.</summary>
    internal static string Escape(string text)
    {
        var safe = new StringBuilder(text.Length);
        foreach (char c in TextRenderer.Safe(text))
        {
            _ = c switch
            {
                '<' => safe.Append("&lt;"),
                '>' => safe.Append("&gt;"),
                '&' => safe.Append("&amp;"),
                '\\' or '`' or '*' or '_' or '[' or ']' or '|' or '#' or '!' or '~' => safe.Append('\\').Append(c),
                _ => safe.Append(c),
            };
        }
        return safe.ToString();
    }
}
