using System.IO.Compression;
using System.Security.Cryptography;

namespace TrimFit.Jobs;

/// <summary>Bytes as the book keeps them.</summary>
internal static class Packed
{
    public static string Sha256(ReadOnlySpan<byte> bytes) => Convert.ToHexStringLower(SHA256.HashData(bytes));

    /// <summary>Whether a text is a SHA-256 as the book writes it.</summary>
    public static bool IsSha256(string text) => text.Length == 64 && text.All(char.IsAsciiHexDigitLower);

    public static byte[] Pack(ReadOnlySpan<byte> bytes)
    {
        using var packed = new MemoryStream();
        using (var brotli = new BrotliStream(packed, CompressionLevel.Optimal, leaveOpen: true))
            brotli.Write(bytes);
        return packed.ToArray();
    }

    /// <summary>The bytes again; null when they are not those that were packed.</summary>
    public static byte[]? Unpack(byte[] packed, long length, string sha256)
    {
        if (length is < 0 or > int.MaxValue)
            return null;
        byte[] bytes = new byte[length];
        try
        {
            using var brotli = new BrotliStream(new MemoryStream(packed, writable: false), CompressionMode.Decompress);
            if (brotli.ReadAtLeast(bytes, bytes.Length, throwOnEndOfStream: false) != bytes.Length || brotli.ReadByte() >= 0)
                return null;
        }
        catch (Exception e) when (e is InvalidDataException or InvalidOperationException)
        {
            return null;
        }
        return Sha256(bytes) == sha256 ? bytes : null;
    }
}
