namespace TrimFit.Jobs;

/// <summary>What a book is opened for.</summary>
public enum BookAccess
{
    /// <summary>Reading only; works in a folder that cannot be written.</summary>
    Read,
    /// <summary>Writing into a book that is there.</summary>
    Write,
    /// <summary>Writing; a book that is not there is made.</summary>
    Create,
}
