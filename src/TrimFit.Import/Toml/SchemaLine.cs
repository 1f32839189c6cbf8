using System.Globalization;

namespace TrimFit.Import.Toml;

/// <summary>The optional line <c>schema = "…/1"</c>.</summary>
internal static class SchemaLine
{
    /// <summary>Accepts a file without the line or with the schema wanted; a newer version is named as such.</summary>
    public static void Check(TomlTable root, string wanted, FaultList faults)
    {
        if (root.Items.Find(item => item.Key == "schema") is not TomlItem item || item.Value is string same && same == wanted)
            return;
        int slash = wanted.LastIndexOf('/');
        string kind = wanted[..(slash + 1)];
        if (item.Value is string text && text.StartsWith(kind, StringComparison.Ordinal)
            && int.TryParse(text.AsSpan(kind.Length), NumberStyles.None, CultureInfo.InvariantCulture, out int version)
            && version > int.Parse(wanted.AsSpan(slash + 1), CultureInfo.InvariantCulture))
        {
            faults.Add(item.Line, $"schema \"{text}\"", $"\"{wanted}\"", "The file was written for a newer TrimFit; update the program.");
            return;
        }
        faults.Add(item.Line, $"{item.Found} for schema", $"\"{wanted}\"", $"Write schema = \"{wanted}\", or check that this is the right file.");
    }
}
