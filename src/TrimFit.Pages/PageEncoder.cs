using System.Text.Encodings.Web;

namespace TrimFit.Pages;

/// <summary>Encodes what files say for text and for quoted attributes. Letters of any alphabet stay readable; control characters, which HTML
/// does not allow even as references, become spaces.</summary>
internal sealed unsafe class PageEncoder : HtmlEncoder
{
    public static PageEncoder Instance { get; } = new();

    public override int MaxOutputCharactersPerInputCharacter => 6; // &quot;

    public override bool WillEncode(int unicodeScalar) => unicodeScalar switch
    {
        '<' or '>' or '&' or '"' or '\'' => true,
        '\n' or '\t' => false,
        < ' ' or (>= 0x7f and <= 0x9f) => true,
        >= 0xfdd0 and <= 0xfdef => true, // not characters, for ever (Unicode 15.0, section 23.7)
        _ => (unicodeScalar & 0xfffe) == 0xfffe,
    };

    public override int FindFirstCharacterToEncode(char* text, int textLength)
    {
        var span = new ReadOnlySpan<char>(text, textLength);
        for (int i = 0; i < span.Length; i++)
        {
            if (char.IsSurrogate(span[i]))
            {
                // A half pair is handed over to be replaced; so is a whole one, whose scalar WillEncode then judges.
                return i;
            }
            if (WillEncode(span[i]))
                return i;
        }
        return -1;
    }

    public override bool TryEncodeUnicodeScalar(int unicodeScalar, char* buffer, int bufferLength, out int numberOfCharactersWritten)
    {
        string text = unicodeScalar switch
        {
            '<' => "&lt;",
            '>' => "&gt;",
            '&' => "&amp;",
            '"' => "&quot;",
            '\'' => "&#39;",
            0xfffd => "\ufffd", // what a half pair becomes
            _ => " ",
        };
        bool fits = text.AsSpan().TryCopyTo(new Span<char>(buffer, bufferLength));
        numberOfCharactersWritten = fits ? text.Length : 0;
        return fits;
    }
}
