using System.Globalization;
using System.Text;

namespace TrimFit.Reporting.Documents;

/// <summary>A report for the terminal: plain text without colour, so that it can be piped and read aloud.</summary>
internal static class TextRenderer
{
    /// <summary>A line to write on.</summary>
    public const string Line = "____________________";

    private const int MostHeadLines = 3;
    private const int Width = 100; // fits a terminal beside another window; tables may be wider when their cells are

    public static string Render(ReportDocument document)
    {
        var text = new StringBuilder();
        foreach (Block block in document.Blocks)
        {
            switch (block)
            {
                case AnswerBlock answer:
                    Wrap(text, Safe(answer.Text), "", "");
                    break;
                case HeadingBlock heading:
                    text.Append('\n').Append(Safe(heading.Text)).Append('\n');
                    break;
                case ParagraphBlock paragraph:
                    Wrap(text, Safe(paragraph.Text), "", "");
                    break;
                case InstructionBlock instruction:
                    Wrap(text, Safe(instruction.Text), "> ", "> ");
                    break;
                case ListBlock list:
                    foreach (string item in list.Items)
                        Wrap(text, Safe(item), "- ", "  ");
                    break;
                case StepsBlock steps:
                    for (int i = 0; i < steps.Items.Count; i++)
                    {
                        string number = string.Create(CultureInfo.InvariantCulture, $"{i + 1}. ");
                        Wrap(text, Safe(steps.Items[i]), number, new string(' ', number.Length));
                    }
                    break;
                case ChecksBlock checks:
                    foreach (CheckItem item in checks.Items)
                        Wrap(text, Safe(item.Text), item.Done == true ? "[x] " : "[ ] ", "    ");
                    break;
                case FieldsBlock fields:
                    foreach (FieldItem item in fields.Items)
                        Wrap(text, $"{Safe(item.Name)}: {Safe(item.Value ?? Line)}", "", "  ");
                    break;
                case DrawnReadingsBlock drawn:
                    text.Append('\n').Append(Safe(drawn.Title)).Append('\n');
                    Wrap(text, Safe(drawn.Text), "", "");
                    foreach (ReadingRow row in drawn.Rows)
                        Wrap(text, $"{Safe(row.Name)} ({Safe(row.Key)}): {string.Join(' ', Enumerable.Repeat("________", row.Cells))}", "- ", "  ");
                    break;
                case SignaturesBlock signatures:
                    foreach (string name in signatures.Names)
                        Wrap(text, $"{Safe(name)}: {Line}", "", "  ");
                    break;
                case LinesBlock lines:
                    for (int i = 0; i < lines.Count; i++)
                        text.Append(Line).Append('\n');
                    break;
                case PageBreakBlock:
                    text.Append('\n');
                    break;
                case TableBlock table:
                    Table(text, table);
                    break;
                case CautionsBlock cautions:
                    foreach ((_, string caution) in cautions.Items)
                        Wrap(text, Safe(caution), "! ", "  ");
                    break;
            }
        }
        return text.ToString();
    }

    /// <summary>Text without control characters: names come from files, and an escape sequence could rewrite the terminal.</summary>
    internal static string Safe(string text)
    {
        var safe = new StringBuilder(text.Length);
        foreach (char c in text)
        {
            UnicodeCategory category = char.GetUnicodeCategory(c);
            safe.Append(category is UnicodeCategory.Control or UnicodeCategory.Format or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator ? ' ' : c);
        }
        return safe.ToString();
    }

    private static void Wrap(StringBuilder text, string paragraph, string first, string next)
    {
        string lead = first;
        var line = new StringBuilder();
        foreach (string word in paragraph.Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            if (line.Length > 0 && lead.Length + line.Length + 1 + word.Length > Width)
            {
                text.Append(lead).Append(line).Append('\n');
                line.Clear();
                lead = next;
            }
            if (line.Length > 0)
                line.Append(' ');
            line.Append(word);
        }
        text.Append(lead).Append(line).Append('\n');
    }

    private static void Table(StringBuilder text, TableBlock table)
    {
        int n = table.Columns.Count;
        string[] heads = [.. table.Columns.Select(c => Safe(c.Head))];
        string[][] rows = [.. table.Rows.Select(r => r.Select(Safe).ToArray())];
        // A head longer than its cells breaks over two or three lines rather than widen the column.
        int[] widths = [.. Enumerable.Range(0, n).Select(i => Math.Max(rows.Max(r => r[i].Length), heads[i].Split(' ').Max(w => w.Length)))];
        for (int i = 0; i < n; i++)
        {
            while (Break(heads[i], widths[i]).Length > MostHeadLines)
                widths[i]++;
        }
        string[][] broken = [.. heads.Select((h, i) => Break(h, widths[i]))];
        int height = broken.Max(b => b.Length);
        for (int line = 0; line < height; line++)
        {
            int start = height - line;
            Row(text, table, widths, i => broken[i].Length >= start ? broken[i][broken[i].Length - start] : "");
        }
        text.Append("  ").AppendJoin("  ", widths.Select(w => new string('-', w))).Append('\n');
        foreach (string[] row in rows)
            Row(text, table, widths, i => row[i]);
    }

    private static void Row(StringBuilder text, TableBlock table, int[] widths, Func<int, string> cell)
    {
        var line = new StringBuilder(" ");
        for (int i = 0; i < widths.Length; i++)
            line.Append(i == 0 ? " " : "  ").Append(table.Columns[i].Numeric ? cell(i).PadLeft(widths[i]) : cell(i).PadRight(widths[i]));
        text.Append(line.ToString().TrimEnd()).Append('\n');
    }

    private static string[] Break(string head, int width)
    {
        var lines = new List<string>();
        string line = "";
        foreach (string word in head.Split(' '))
        {
            if (line.Length > 0 && line.Length + 1 + word.Length > width)
            {
                lines.Add(line);
                line = word;
            }
            else
            {
                line = line.Length == 0 ? word : line + " " + word;
            }
        }
        lines.Add(line);
        return [.. lines];
    }
}
