using System.Runtime.CompilerServices;
using System.Text;

namespace TrimFit.Reporting;

/// <summary>HTML text built so that every value is encoded unless it is already <see cref="HtmlText"/>: what files say can never become markup.</summary>
internal static class Html
{
    /// <summary>The interpolated text as HTML, its values encoded.</summary>
    public static HtmlText Of(HtmlHandler handler) => handler.ToHtml();

    /// <summary>Encodes for text and for quoted attributes; control characters are dropped.</summary>
    public static string Encode(string text)
    {
        var encoded = new StringBuilder(text.Length);
        foreach (char c in text)
        {
            _ = c switch
            {
                '<' => encoded.Append("&lt;"),
                '>' => encoded.Append("&gt;"),
                '&' => encoded.Append("&amp;"),
                '"' => encoded.Append("&quot;"),
                '\'' => encoded.Append("&#39;"),
                '\n' or '\t' => encoded.Append(c),
                < ' ' or (>= '\u007f' and <= '\u009f') => encoded.Append(' '),
                _ => encoded.Append(c),
            };
        }
        return encoded.ToString();
    }
}

/// <summary>Markup that needs no encoding: built by <see cref="Html.Of"/>, or drawn by this program itself.</summary>
internal readonly record struct HtmlText(string Markup)
{
    public override string ToString() => Markup;
}

/// <summary>Collects the pieces of an interpolated string; values are encoded. Numbers are not taken: they must be written as text first,
/// so that nobody's current culture gets in.</summary>
[InterpolatedStringHandler]
internal readonly ref struct HtmlHandler
{
    private readonly StringBuilder _text;

    public HtmlHandler(int literalLength, int formattedCount) => _text = new StringBuilder(literalLength + (formattedCount * 16));

    public void AppendLiteral(string literal) => _text.Append(literal);

    public void AppendFormatted(string? value) => _text.Append(Html.Encode(value ?? ""));

    public void AppendFormatted(HtmlText value) => _text.Append(value.Markup);

    internal HtmlText ToHtml() => new(_text.ToString());
}
