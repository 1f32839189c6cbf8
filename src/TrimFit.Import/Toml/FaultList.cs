namespace TrimFit.Import.Toml;

/// <summary>Faults of one file, collected so that a person sees all of them at once.</summary>
internal sealed class FaultList(string file)
{
    private readonly List<(int? Line, string Message)> _faults = [];

    /// <summary>File name without folder.</summary>
    public string File { get; } = file;

    /// <summary>The faults in the order of the file.</summary>
    public IEnumerable<(int? Line, string Message)> All => _faults.OrderBy(fault => fault.Line ?? 0);

    public bool Any => _faults.Count > 0;

    public int Count => _faults.Count;

    public void Add(int? line, string message) => _faults.Add((line, message));

    /// <summary>Found, expected and what to do, in one sentence form.</summary>
    public void Add(int? line, string found, string expected, string remedy) => Add(line, $"found {found}, expected {expected}. {remedy}");

    /// <summary>Throws one exception with a line for each fault, in the order of the file.</summary>
    /// <exception cref="LogFormatException">There is at least one fault.</exception>
    public void ThrowIfAny()
    {
        if (Any)
            throw new LogFormatException(string.Join('\n', All.Select(fault => fault.Line is int line
                ? FormattableString.Invariant($"{File}({line}): {fault.Message}")
                : $"{File}: {fault.Message}")));
    }
}
