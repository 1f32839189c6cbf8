namespace TrimFit.Cli;

/// <summary>What the program's exit code tells a script.</summary>
internal static class ExitCode
{
    /// <summary>Done.</summary>
    public const int Done = 0;

    /// <summary>A fault of the program.</summary>
    public const int Fault = 1;

    /// <summary>Wrong command line.</summary>
    public const int CommandLine = 2;

    /// <summary>An input cannot be read.</summary>
    public const int Input = 3;

    /// <summary>Read well, but the data cannot answer.</summary>
    public const int NoAnswer = 4;
}

/// <summary>A command line that cannot be carried out; the message says what was found, what was expected.</summary>
internal sealed class CommandLineException(string message) : Exception(message);
