namespace TrimFit.Simulation;

/// <summary>A scenario that reads well but cannot be flown; the message says why and what to change.</summary>
public sealed class SimulationException : Exception
{
    /// <summary>A fault with its message.</summary>
    public SimulationException(string message)
        : base(message)
    {
    }

    /// <summary>A fault with its message and cause.</summary>
    public SimulationException(string message, Exception inner)
        : base(message, inner)
    {
    }
}
