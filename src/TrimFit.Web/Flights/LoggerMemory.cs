using System.Collections.Immutable;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;

namespace TrimFit.Web.Flights;

/// <summary>What a person once said about the columns of a logger, found again by the names in its header. Holds no data of a flight.</summary>
internal sealed class LoggerMemory(string? path)
{
    private const int MostLoggers = 500;

    private readonly Lock _lock = new();

    /// <summary>The words that tell a logger: a hash over the names of its columns.</summary>
    public static string? KeyOf(IEnumerable<LogPreview> previews)
    {
        string[] names = [.. previews.SelectMany(p => p.Columns.Append("\u001e"))];
        return names.All(n => n == "\u001e") ? null : Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(string.Join('\u001f', names))));
    }

    /// <summary>What is remembered of a logger; none when nothing is.</summary>
    public ImmutableArray<ColumnRule> Recall(string? key)
    {
        if (key is null || !Read().TryGetValue(key, out string[]? rules))
            return [];
        return [.. rules.Select(text => ColumnRules.TryParse(text, out ColumnRule rule, out _) ? rule : null).OfType<ColumnRule>()];
    }

    /// <summary>Remembers; no rules forget. A folder that cannot be written is no fault: nothing is remembered then.</summary>
    public void Remember(string? key, IEnumerable<ColumnRule> rules)
    {
        if (key is null || path is null)
            return;
        string[] texts = [.. rules.Select(r => $"{ChannelRoles.NameOf(r.Role)}={r.Name}{(r.Unit is null ? "" : ":" + r.Unit)}")];
        lock (_lock)
        {
            SortedDictionary<string, string[]> all = Read();
            if (!all.Remove(key) && texts.Length == 0)
                return;
            if (texts.Length > 0 && all.Count < MostLoggers)
                all[key] = texts;
            try
            {
                Directory.CreateDirectory(Path.GetDirectoryName(Path.GetFullPath(path))!);
                string part = path + ".part";
                File.WriteAllText(part, JsonSerializer.Serialize(all, WebJson.Default.SortedDictionaryStringStringArray));
                File.Move(part, path, overwrite: true);
            }
            catch (Exception e) when (e is IOException or UnauthorizedAccessException)
            {
                return;
            }
        }
    }

    private SortedDictionary<string, string[]> Read()
    {
        try
        {
            if (path is not null && File.Exists(path))
                return JsonSerializer.Deserialize(File.ReadAllText(path), WebJson.Default.SortedDictionaryStringStringArray) ?? [];
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or JsonException)
        {
            return []; // a damaged memory is an empty one; the next mending writes it anew
        }
        return [];
    }
}
