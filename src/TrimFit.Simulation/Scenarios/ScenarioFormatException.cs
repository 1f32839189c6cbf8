namespace TrimFit.Simulation;

/// <summary>A scenario file that cannot be used; the message has one line for each fault, naming file and line, and reads as it stands.</summary>
public sealed class ScenarioFormatException : Exception
{
    /// <summary>A fault with its message.</summary>
    public ScenarioFormatException(string message)
        : base(message)
    {
    }

    /// <summary>A fault with its message and cause.</summary>
    public ScenarioFormatException(string message, Exception inner)
        : base(message, inner)
    {
    }
}
