using System.Collections.Immutable;
using TrimFit.Core.Workshop;

namespace TrimFit.Jobs;

/// <summary>A job with the bytes it rests on, ready to go to another book.</summary>
/// <param name="Job">The job.</param>
/// <param name="Contents">Bytes of every file and result it names, by SHA-256.</param>
public sealed record JobBundle(JobRecord Job, ImmutableSortedDictionary<string, ReadOnlyMemory<byte>> Contents)
{
    /// <summary>Every SHA-256 that a job names, each once.</summary>
    public static IEnumerable<string> NamedBy(JobRecord job)
    {
        ArgumentNullException.ThrowIfNull(job);
        return job.Setups.Select(s => s.RigSha256)
            .Concat(job.Flights.SelectMany(f => f.Inputs).Select(i => i.Sha256))
            .Concat(job.Results.Select(r => r.Sha256))
            .Concat(job.Results.SelectMany(r => r.Inputs).Select(i => i.Sha256))
            .Distinct(StringComparer.Ordinal);
    }
}
