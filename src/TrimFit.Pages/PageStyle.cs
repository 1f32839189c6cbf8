using System.Text;

namespace TrimFit.Pages;

/// <summary>The style sheet of all pages with its fonts inside: the page needs nothing from outside and looks the same without any font of the machine.</summary>
internal static class PageStyle
{
    private static readonly string _sheet = Text("Style.page.css");

    private static readonly string _fonts = Face("DejaVuSans-latin.woff2", 400) + Face("DejaVuSans-Bold-latin.woff2", 700);

    /// <summary>The sheet without its fonts.</summary>
    public static string Sheet => _sheet;

    /// <summary>The fonts by themselves.</summary>
    public static string Fonts => _fonts;

    public static string For(PageOptions options)
    {
        string paper = options.Paper switch
        {
            PaperSize.A4 => "A4",
            PaperSize.A5 => "A5",
            PaperSize.A6 => "105mm 148mm", // CSS has no name for A6
            PaperSize.Letter => "letter",
            _ => throw new ArgumentOutOfRangeException(nameof(options), options.Paper, "has no size"),
        };
        string size = options.Paper == PaperSize.A6 && options.Landscape ? "148mm 105mm" : paper + (options.Landscape ? " landscape" : "");
        string margin = options.Compact ? "9mm" : "14mm";
        return $"{_fonts}@page {{ size: {size}; margin: {margin}; }}\n{_sheet}";
    }

    private static string Face(string file, int weight) => FormattableString.Invariant(
        $"@font-face {{ font-family: \"DejaVu Sans\"; font-weight: {weight}; src: url(data:font/woff2;base64,{Convert.ToBase64String(Bytes("Fonts." + file))}) format(\"woff2\"); }}\n");

    private static string Text(string name) => Encoding.UTF8.GetString(Bytes(name));

    private static byte[] Bytes(string name)
    {
        using Stream stream = typeof(PageStyle).Assembly.GetManifestResourceStream("TrimFit.Pages." + name)
            ?? throw new InvalidOperationException($"{name} is missing from the program.");
        byte[] bytes = new byte[stream.Length];
        stream.ReadExactly(bytes);
        return bytes;
    }
}
