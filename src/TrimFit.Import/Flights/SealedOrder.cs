using System.Collections.Immutable;
using System.Security.Cryptography;
using System.Text;
using TrimFit.Import.Toml;

namespace TrimFit.Import.Flights;

/// <summary>An order of two settings that the pilot does not know: A-B-B-A or B-A-A-B, drawn when it is made, closed until the flights are compared.</summary>
/// <remarks>
/// Against peeking, not against an attacker: the file holds a random salt, the order covered by SHA-256 of the salt, and SHA-256 of salt and order,
/// whose first digits are printed on the card before the flights. So nobody reads the order by eye, and nobody changes it afterwards unnoticed.
/// A mirrored order of four flights takes a steady change of the air out of the difference of the settings.
/// </remarks>
public sealed record SealedOrder
{
    /// <summary>Schema of the file.</summary>
    public const string Schema = "trimfit-sealed-order/1";

    private const int SaltBytes = 16, CommitmentDigits = 12;

    private SealedOrder(ImmutableArray<string> setups, byte[] salt) => (Setups, _salt) = (setups, salt);

    private readonly byte[] _salt;

    /// <summary>Settings in the order to be flown.</summary>
    public ImmutableArray<string> Setups { get; }

    /// <summary>Number that is printed on the card: the first digits of SHA-256 of salt and order.</summary>
    public string Commitment => Hash(_salt, Setups)[..CommitmentDigits];

    /// <summary>Draws an order of two settings.</summary>
    /// <param name="first">Word of one setting.</param>
    /// <param name="second">Word of the other.</param>
    /// <exception cref="ArgumentException">The words are the same, empty or hold a comma.</exception>
    public static SealedOrder Draw(string first, string second)
    {
        if (string.IsNullOrWhiteSpace(first) || string.IsNullOrWhiteSpace(second) || first == second || first.Contains(',') || second.Contains(','))
            throw new ArgumentException("needs two different words without a comma", nameof(second));
        (string a, string b) = RandomNumberGenerator.GetInt32(2) == 0 ? (first, second) : (second, first);
        return new([a, b, b, a], RandomNumberGenerator.GetBytes(SaltBytes));
    }

    /// <summary>The sealed file (TOML).</summary>
    public string ToText() => string.Join('\n',
        $"schema = \"{Schema}\"",
        "# Which setting is flown when; closed until the flights are compared.",
        $"salt = \"{Convert.ToHexStringLower(_salt)}\"",
        $"closed = \"{Convert.ToHexStringLower(Cover(Encoding.UTF8.GetBytes(string.Join(',', Setups)), _salt))}\"",
        $"commitment = \"{Hash(_salt, Setups)}\"",
        "");

    /// <summary>Opens a sealed file.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="text">The whole file.</param>
    /// <exception cref="LogFormatException">It is no such file, or was changed after it was sealed.</exception>
    public static SealedOrder Open(string fileName, string text)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(text);
        string name = Path.GetFileName(fileName);
        var faults = new FaultList(name);
        TomlTable table = TomlDocument.Read(text, faults);
        faults.ThrowIfAny();
        SchemaLine.Check(table, Schema, faults);
        var root = new TableReader(table, "", faults);
        root.Item("schema");
        byte[] salt = Bytes(root, "salt", faults), closed = Bytes(root, "closed", faults);
        string commitment = root.Text("commitment", "0f3a") ?? "";
        root.ReportUnknown();
        faults.ThrowIfAny();
        var order = new SealedOrder([.. Encoding.UTF8.GetString(Cover(closed, salt)).Split(',')], salt);
        return salt.Length > 0 && Hash(salt, order.Setups) == commitment
            ? order
            : throw LogFormatException.At(name, root.LineOf("commitment"), null, "an order that does not match its commitment", "the file as it was sealed", "Use the file that was written with the card; a changed one proves nothing.");
    }

    private static byte[] Bytes(TableReader root, string key, FaultList faults)
    {
        if (root.Text(key, "0f3a") is not string hex)
        {
            if (root.Item(key) is null)
                faults.Add(root.Line, $"a sealed order without {key}", "the file as it was sealed", "Use the file that was written with the card.");
            return [];
        }
        try
        {
            return Convert.FromHexString(hex);
        }
        catch (FormatException)
        {
            faults.Add(root.LineOf(key), $"\"{hex}\" for {key}", "hexadecimal digits", "Use the file that was written with the card.");
            return [];
        }
    }

    /// <summary>Covers or uncovers: each block of 32 bytes against SHA-256 of the salt and the block's number.</summary>
    private static byte[] Cover(byte[] text, byte[] salt)
    {
        byte[] result = [.. text];
        for (int block = 0; block * SHA256.HashSizeInBytes < text.Length; block++)
        {
            byte[] key = SHA256.HashData([.. salt, (byte)block]);
            for (int i = 0; i < key.Length && (block * key.Length) + i < text.Length; i++)
                result[(block * key.Length) + i] ^= key[i];
        }
        return result;
    }

    private static string Hash(byte[] salt, ImmutableArray<string> setups) =>
        Convert.ToHexStringLower(SHA256.HashData([.. salt, .. Encoding.UTF8.GetBytes(string.Join(',', setups))]));
}
