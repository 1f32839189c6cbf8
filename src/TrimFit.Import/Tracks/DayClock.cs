namespace TrimFit.Import.Tracks;

/// <summary>Turns times of day into seconds since the first midnight; a jump back by more than half a day is a midnight.</summary>
internal sealed class DayClock
{
    private const double SecondsPerDay = 86_400;

    private double? _last;

    /// <summary>Midnights passed so far.</summary>
    public int Days { get; private set; }

    /// <summary>Seconds since the first midnight.</summary>
    public double Unroll(double secondsOfDay)
    {
        double time = (Days * SecondsPerDay) + secondsOfDay;
        if (_last is double last && last - time > SecondsPerDay / 2)
        {
            Days++;
            time += SecondsPerDay;
        }
        _last = time;
        return time;
    }
}
