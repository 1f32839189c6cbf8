namespace TrimFit.Core.Turns;

/// <summary>The part of a record that is flight.</summary>
/// <param name="FirstFlyingSec">First time at flying speed that was kept up, s.</param>
/// <param name="LastFlyingSec">Last time at flying speed, s.</param>
/// <param name="FromSec">Start of what may be analysed: some seconds after take-off.</param>
/// <param name="ToSec">End of what may be analysed: some seconds before landing.</param>
internal readonly record struct FlightSpan(double FirstFlyingSec, double LastFlyingSec, double FromSec, double ToSec)
{
    /// <summary>Speed over ground that tells flight from standing, m/s, kept up for <see cref="TakeOffSec"/>.</summary>
    public const double FlyingSpeed = 4, TakeOffSec = 8;

    /// <summary>Left out after take-off and before landing: the wing is still being flown by hand there, s.</summary>
    private const double AfterTakeOffSec = 15, BeforeLandingSec = 10;

    /// <summary>Finds it by ground speed; null when flying speed is never kept up.</summary>
    public static FlightSpan? Of(ReadOnlySpan<double> time, ReadOnlySpan<double> north, ReadOnlySpan<double> east)
    {
        double first = double.NaN, last = double.NaN, since = double.NaN;
        for (int i = 0; i < north.Length; i++)
        {
            if (!double.IsFinite(north[i]) || !double.IsFinite(east[i]))
                continue;
            if (Math.Sqrt((north[i] * north[i]) + (east[i] * east[i])) < FlyingSpeed)
            {
                since = double.NaN;
                continue;
            }
            if (double.IsNaN(since))
                since = time[i];
            if (time[i] - since >= TakeOffSec)
            {
                if (double.IsNaN(first))
                    first = since;
                last = time[i];
            }
        }
        if (double.IsNaN(first))
            return null;
        // A record that begins or ends in flight has no launch or landing to leave out.
        bool beginsFlying = first - time[0] < 1, endsFlying = time[^1] - last < 3;
        return new(first, last, beginsFlying ? time[0] : first + AfterTakeOffSec, endsFlying ? time[^1] : last - BeforeLandingSec);
    }
}
