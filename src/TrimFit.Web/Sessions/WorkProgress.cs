namespace TrimFit.Web.Sessions;

/// <summary>How far running work is. One thread writes, any reads.</summary>
internal sealed class WorkProgress
{
    private volatile string _phase = "";
    private double _share;

    /// <summary>Code of what is being done: waiting, reading, measuring, comparing, or empty.</summary>
    public string Phase => _phase;

    /// <summary>Share done, 0 to 1; negative when nobody can say.</summary>
    public double Share => Volatile.Read(ref _share);

    public void Set(string phase, double share)
    {
        Volatile.Write(ref _share, share);
        _phase = phase;
    }
}
