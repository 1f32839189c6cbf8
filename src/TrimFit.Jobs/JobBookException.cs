namespace TrimFit.Jobs;

/// <summary>A book that cannot do what was asked. The message says which book, what was found and what to do; the book is as it was.</summary>
public sealed class JobBookException : Exception
{
    /// <summary>A message that stands alone.</summary>
    public JobBookException(string message) : base(message)
    {
    }

    /// <summary>A message that stands alone, with its cause.</summary>
    public JobBookException(string message, Exception innerException) : base(message, innerException)
    {
    }

    /// <summary>An empty message; use the others.</summary>
    public JobBookException()
    {
    }
}
