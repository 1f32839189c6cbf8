using System.Text;

namespace TrimFit.Reporting.Documents;

/// <summary>A report as one self-contained page: no script, no link, no outside file; reads well on paper and on a phone.</summary>
internal static class HtmlRenderer
{
    // Sober and printable: one column of 44 rem, system fonts, the answer in a ruled box. Tables scroll sideways on narrow screens.
    private const string Style = """
        :root { --ink: #1b1f24; --soft: #55606e; --rule: #c9ced6; --wash: #f3f5f8; --mark: #0072b2; --alert: #a94700; }
        * { box-sizing: border-box; }
        body { margin: 0; color: var(--ink); background: #fff; font: 1rem/1.5 "DejaVu Sans", Verdana, Geneva, sans-serif; }
        main { max-width: 50rem; margin: 0 auto; padding: 1.2rem 1rem 3rem; }
        h1 { font-size: 1.25rem; margin: 0; line-height: 1.25; overflow-wrap: anywhere; }
        .source { color: var(--soft); margin: .2rem 0 1.2rem; font-size: .9rem; overflow-wrap: anywhere; }
        .answer { font-size: 1.3rem; line-height: 1.4; margin: 0 0 1rem; padding: .9rem 1.1rem; background: var(--wash); border-left: .4rem solid var(--mark); overflow-wrap: anywhere; }
        .do { margin: 0 0 1rem; padding: .7rem 1rem; border: 2px solid var(--ink); overflow-wrap: anywhere; }
        h2 { font-size: 1.05rem; margin: 2rem 0 .5rem; padding-top: .5rem; border-top: 1px solid var(--rule); }
        p, ul { margin: 0 0 .8rem; }
        ul { padding-left: 1.3rem; }
        li { overflow-wrap: anywhere; }
        .table { overflow-x: auto; margin: 0 0 .8rem; }
        table { border-collapse: collapse; font-size: .86rem; font-variant-numeric: tabular-nums; }
        th { text-align: left; vertical-align: bottom; font-weight: 600; border-bottom: 2px solid var(--ink); padding: .2rem .55rem; }
        td { border-bottom: 1px solid var(--rule); padding: .25rem .55rem; vertical-align: top; }
        td:first-child, th:first-child { padding-left: 0; }
        .n { text-align: right; }
        td.n { white-space: nowrap; }
        th:first-child, td:first-child { min-width: 9rem; }
        td:last-child { min-width: 5rem; }
        figure { margin: 0 0 1rem; }
        figure svg { display: block; width: 100%; height: auto; max-width: 47rem; margin: 0 auto; }
        figure.rig svg { max-width: 34rem; }
        figcaption { color: var(--soft); font-size: .88rem; margin-top: .3rem; }
        .cautions { border: 2px solid var(--alert); padding: .8rem 1rem .1rem; margin: 0; list-style-position: inside; }
        .cautions li { margin-bottom: .6rem; padding-left: 0; }
        @media print { main { max-width: none; padding: 0; } h2 { break-after: avoid; } figure, .do, .answer, tr { break-inside: avoid; } body { font-size: 10pt; } .table { overflow: visible; } table { font-size: 7.5pt; } }
        @media (max-width: 30rem) { .answer { font-size: 1.1rem; } figure.plot { overflow-x: auto; } figure.plot svg { width: 38rem; max-width: none; } .cautions { padding-left: .7rem; } }
        """;

    public static string Render(ReportDocument document)
    {
        var text = new StringBuilder();
        text.Append(Html.Of($"<!DOCTYPE html>\n<html lang=\"{document.Language}\">\n<head>\n<meta charset=\"utf-8\">\n"));
        text.Append("<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\">\n<meta name=\"color-scheme\" content=\"light\">\n");
        // Names in this page come from files: even if one slipped through, the browser may run and load nothing.
        text.Append("<meta http-equiv=\"Content-Security-Policy\" content=\"default-src 'none'; style-src 'unsafe-inline'\">\n");
        text.Append(Html.Of($"<title>{document.Title}</title>\n<style>\n{new HtmlText(Style)}\n</style>\n</head>\n<body>\n<main>\n"));
        text.Append(Html.Of($"<h1>{document.Title}</h1>\n<p class=\"source\">{document.Subtitle}</p>\n"));
        foreach (Block block in document.Blocks)
            text.Append(Part(block).Markup).Append('\n');
        return text.Append("</main>\n</body>\n</html>\n").ToString();
    }

    private static HtmlText Part(Block block) => block switch
    {
        AnswerBlock answer => Html.Of($"<p class=\"answer\">{answer.Text}</p>"),
        HeadingBlock heading => Html.Of($"<h2>{heading.Text}</h2>"),
        ParagraphBlock paragraph => Html.Of($"<p>{paragraph.Text}</p>"),
        InstructionBlock instruction => Html.Of($"<p class=\"do\">{instruction.Text}</p>"),
        ListBlock list => Html.Of($"<ul>{Join(list.Items.Select(i => Html.Of($"<li>{i}</li>")))}</ul>"),
        TableBlock table => Table(table),
        FigureBlock figure => Html.Of($"<figure class=\"{(figure.Svg.Contains("aria-labelledby=\"rig-t", StringComparison.Ordinal) ? "rig" : "plot")}\">{new HtmlText(figure.Svg)}<figcaption>{figure.Caption}</figcaption></figure>"),
        CautionsBlock cautions => Html.Of($"<ul class=\"cautions\">{Join(cautions.Items.Select(c => Html.Of($"<li data-caution=\"{c.Code}\">{c.Text}</li>")))}</ul>"),
        _ => throw new ArgumentOutOfRangeException(nameof(block), block.GetType().Name, "has no HTML form"),
    };

    private static HtmlText Table(TableBlock table)
    {
        HtmlText heads = Join(table.Columns.Select(c => Html.Of($"<th scope=\"col\"{Class(c)}>{c.Head}</th>")));
        HtmlText rows = Join(table.Rows.Select(r => Html.Of($"<tr>{Join(r.Select((cell, i) => Html.Of($"<td{Class(table.Columns[i])}>{cell}</td>")))}</tr>\n")));
        return Html.Of($"<div class=\"table\" tabindex=\"0\"><table>\n<thead><tr>{heads}</tr></thead>\n<tbody>\n{rows}</tbody></table></div>");
    }

    private static HtmlText Class(TableColumn column) => new(column.Numeric ? " class=\"n\"" : "");

    private static HtmlText Join(IEnumerable<HtmlText> parts) => new(string.Concat(parts.Select(p => p.Markup)));
}
