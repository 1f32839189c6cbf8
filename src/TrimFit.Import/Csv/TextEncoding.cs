using System.Text;
using System.Text.Unicode;

namespace TrimFit.Import.Csv;

/// <summary>How a text file is stored.</summary>
/// <param name="Name">For people, such as <c>UTF-16 LE</c>.</param>
/// <param name="MarkBytes">Length of the byte order mark, 0 without one.</param>
internal sealed record TextEncoding(string Name, int MarkBytes)
{
    /// <summary>Share of control characters above which bytes are not taken for text; text has none but tab, line ends and NUL padding.</summary>
    private const double BinaryShare = 0.02;

    private readonly Encoding? _encoding;

    private TextEncoding(string name, int markBytes, Encoding? encoding) : this(name, markBytes) => _encoding = encoding;

    /// <summary>Bytes of a Latin letter.</summary>
    public int BytesPerAscii => _encoding is UnicodeEncoding ? 2 : _encoding is UTF32Encoding ? 4 : 1;

    /// <summary>A decoder to characters; null when the bytes are UTF-8 already.</summary>
    public Decoder? Decoder() => _encoding?.GetDecoder();

    /// <summary>Recognises the encoding of a file by its first bytes; null when they are no text.</summary>
    /// <remarks>Byte order marks first; UTF-16 without one by its NULs, which stand in every second byte of text in Latin letters; bytes that are
    /// valid UTF-8 are UTF-8; what remains is Windows-1252, the code page of western loggers.</remarks>
    /// <param name="head">The first bytes; a character cut off at their end does no harm.</param>
    public static TextEncoding? Detect(ReadOnlySpan<byte> head)
    {
        if (head.StartsWith("\uFEFF"u8))
            return new("UTF-8 with BOM", 3, null);
        if (head.StartsWith((ReadOnlySpan<byte>)[0xFF, 0xFE, 0, 0]))
            return new("UTF-32 LE", 4, Encoding.UTF32);
        if (head.StartsWith((ReadOnlySpan<byte>)[0xFF, 0xFE]))
            return new("UTF-16 LE", 2, Encoding.Unicode);
        if (head.StartsWith((ReadOnlySpan<byte>)[0xFE, 0xFF]))
            return new("UTF-16 BE", 2, Encoding.BigEndianUnicode);
        int nulsEven = 0, nulsOdd = 0;
        int probe = Math.Min(head.Length, 4096) & ~1;
        for (int i = 0; i < probe; i += 2)
        {
            nulsEven += head[i] == 0 ? 1 : 0;
            nulsOdd += head[i + 1] == 0 ? 1 : 0;
        }
        int pairs = probe / 2;
        if (pairs > 0 && nulsOdd > 0.7 * pairs && nulsEven < 0.1 * pairs)
            return new("UTF-16 LE without BOM", 0, Encoding.Unicode);
        if (pairs > 0 && nulsEven > 0.7 * pairs && nulsOdd < 0.1 * pairs)
            return new("UTF-16 BE without BOM", 0, Encoding.BigEndianUnicode);
        int controls = 0, other = 0;
        foreach (byte b in head)
        {
            if (b == 0)
                continue;
            other++;
            controls += b < 0x20 && b is not ((byte)'\t' or (byte)'\n' or (byte)'\r' or 0x0C or 0x1A or 0x1B) || b == 0x7F ? 1 : 0;
        }
        if (other == 0 || controls > BinaryShare * other)
            return null;
        if (IsUtf8(head))
            return new("UTF-8", 0, null);
        Encoding.RegisterProvider(CodePagesEncodingProvider.Instance);
        return new("Windows-1252", 0, Encoding.GetEncoding(1252));
    }

    private static bool IsUtf8(ReadOnlySpan<byte> head)
    {
        // The block may end inside a character: up to three bytes of it are not judged.
        for (int cut = 0; cut <= Math.Min(3, head.Length); cut++)
        {
            if (Utf8.IsValid(head[..^cut]))
                return true;
        }
        return false;
    }
}
