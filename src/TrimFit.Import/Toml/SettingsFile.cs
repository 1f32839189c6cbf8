using System.Text;

namespace TrimFit.Import.Toml;

/// <summary>Rig files and flight sheets: their bytes and their text.</summary>
public static class SettingsFile
{
    /// <summary>Far above any rig file or sheet; a log given in its place is named as the wrong file instead of being parsed.</summary>
    private const long LargestBytes = 1 << 20;

    /// <summary>The bytes of a file on disk.</summary>
    /// <exception cref="LogFormatException">The file is missing, cannot be opened, or is too large.</exception>
    public static byte[] ReadBytes(string path)
    {
        string name = Path.GetFileName(path);
        try
        {
            if (new FileInfo(path).Length > LargestBytes)
                throw LogFormatException.At(name, null, null, "a file above 1 MB", "a settings file of a few lines", "Check whether a log was given in its place.");
            return File.ReadAllBytes(path);
        }
        catch (FileNotFoundException)
        {
            throw LogFormatException.At(name, null, null, "no such file", "a file", "Check the name and the folder.");
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            throw LogFormatException.At(name, null, null, "a file that cannot be opened", "a readable file", "Check its name, its rights and whether another program holds it.");
        }
    }

    /// <summary>The text of a settings file's bytes.</summary>
    /// <exception cref="LogFormatException">The bytes are not UTF-8.</exception>
    public static string TextOf(string name, ReadOnlySpan<byte> bytes)
    {
        try
        {
            return new UTF8Encoding(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true).GetString(bytes);
        }
        catch (DecoderFallbackException)
        {
            throw LogFormatException.At(name, null, null, "bytes that are not UTF-8", "text in UTF-8", "Save the file as UTF-8 in the editor.");
        }
    }

    /// <exception cref="LogFormatException">The file is missing, cannot be opened, is too large, or is not UTF-8.</exception>
    internal static string ReadText(string path) => TextOf(Path.GetFileName(path), ReadBytes(path));
}
