namespace TrimFit.Import;

/// <summary>A file that cannot be read as what it should be. The message says file, line, column, what was found, what was expected and what to do.</summary>
public sealed class LogFormatException : Exception
{
    /// <summary>A message that stands alone.</summary>
    public LogFormatException(string message) : base(message)
    {
    }

    /// <summary>A message that stands alone, with its cause.</summary>
    public LogFormatException(string message, Exception innerException) : base(message, innerException)
    {
    }

    /// <summary>An empty message; use the others.</summary>
    public LogFormatException()
    {
    }

    /// <summary>Builds the message <c>file(line, column): found …, expected …. What to do.</c></summary>
    public static LogFormatException At(string file, int? line, string? column, string found, string expected, string remedy)
    {
        string place = (line, column) switch
        {
            (null, null) => file,
            (int l, null) => FormattableString.Invariant($"{file}({l})"),
            (null, string c) => $"{file}({c})",
            (int l, string c) => FormattableString.Invariant($"{file}({l}, {c})"),
        };
        return new($"{place}: found {found}, expected {expected}. {remedy}");
    }
}
