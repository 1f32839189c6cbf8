using TrimFit.Core.Workshop;

namespace TrimFit.Reporting.Jobs;

/// <summary>One thing that was done in a job.</summary>
public abstract record JobEvent(DateTimeOffset At)
{
    /// <summary>The job was opened.</summary>
    public sealed record Opened(JobRecord Job) : JobEvent(Job.Opened);

    /// <summary>A setup was measured.</summary>
    public sealed record Measured(SetupRecord Setup) : JobEvent(Setup.Made);

    /// <summary>A check was made.</summary>
    public sealed record Checked(CheckRecord Check) : JobEvent(Check.Made);

    /// <summary>A flight was added.</summary>
    public sealed record Flown(FlightRecord Flight) : JobEvent(Flight.Added);

    /// <summary>A result was made.</summary>
    public sealed record Found(ResultRecord Result) : JobEvent(Result.Made);

    /// <summary>A part was moved.</summary>
    public sealed record Adjusted(AdjustmentRecord Adjustment) : JobEvent(Adjustment.Made);

    /// <summary>A note was made.</summary>
    public sealed record Noted(NoteRecord Note) : JobEvent(Note.Made);

    /// <summary>A technician signed.</summary>
    public sealed record SignedOff(SignatureRecord Signature) : JobEvent(Signature.Made);

    /// <summary>Everything that was done in a job, in the order of time.</summary>
    public static IReadOnlyList<JobEvent> Of(JobRecord job)
    {
        ArgumentNullException.ThrowIfNull(job);
        HashSet<int> adjusted = [.. job.Adjustments.Select(a => a.ToSetup)];
        IEnumerable<JobEvent> all =
        [
            new Opened(job),
            .. job.Setups.Where(s => !adjusted.Contains(s.Number)).Select(s => new Measured(s)),
            .. job.Checks.Select(c => new Checked(c)),
            .. job.Flights.Select(f => new Flown(f)),
            .. job.Results.Select(r => new Found(r)),
            .. job.Adjustments.Select(a => new Adjusted(a)),
            .. job.Notes.Select(n => new Noted(n)),
            .. job.Signatures.Select(s => new SignedOff(s)),
        ];
        return [.. all.OrderBy(e => e.At)]; // stable: what one action wrote keeps its order
    }
}
