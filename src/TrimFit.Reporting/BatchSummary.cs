using System.Collections.Immutable;
using System.Text.Json;
using TrimFit.Core.Statistics;

namespace TrimFit.Reporting;

/// <summary>What a batch found, machine by machine.</summary>
public sealed record BatchSummary
{
    /// <summary>Flights asked for.</summary>
    public required int Flights { get; init; }

    /// <summary>Machines in the order of their names.</summary>
    public required ImmutableArray<Machine> Machines { get; init; }

    /// <summary>One machine's flights.</summary>
    public sealed record Machine
    {
        /// <summary>Name in the rig file.</summary>
        public required string Name { get; init; }

        /// <summary>Flights with this machine.</summary>
        public required int Flights { get; init; }

        /// <summary>Flights that answered.</summary>
        public required int Answered { get; init; }

        /// <summary>Flights read well that cannot answer.</summary>
        public required int CannotTell { get; init; }

        /// <summary>Flights that could not be read.</summary>
        public required int Unreadable { get; init; }

        /// <summary>Mean pull in level flight over the flights that show one, rad/s, with the scatter between flights counted; null without any.</summary>
        public double? PullRadPerSec { get; init; }

        /// <summary>Its interval after Hartung and Knapp; null for one flight.</summary>
        public ConfidenceInterval? Interval95 { get; init; }

        /// <summary>Standard deviation between flights beyond their own errors, rad/s; null for one flight.</summary>
        public double? BetweenRadPerSec { get; init; }
    }

    /// <summary>Collects rows.</summary>
    public sealed class Builder
    {
        private readonly SortedDictionary<string, Counts> _machines = new(StringComparer.Ordinal);
        private int _flights;

        /// <summary>Takes one row in.</summary>
        public void Add(IReadOnlyList<KeyValuePair<string, JsonElement>> cells)
        {
            ArgumentNullException.ThrowIfNull(cells);
            JsonElement Cell(string name) => cells.FirstOrDefault(c => c.Key == name).Value;
            double? Value(string name) => Cell(name) is { ValueKind: JsonValueKind.Number } value ? value.GetDouble() : null;
            string machine = Cell("machine") is { ValueKind: JsonValueKind.String } named ? named.GetString()! : "";
            if (!_machines.TryGetValue(machine, out Counts? counts))
                _machines[machine] = counts = new Counts();
            _flights++;
            counts.Codes.Add((int)(Value("exit_code") ?? 1));
            if (Value("pull_at_cruise_rate_deg_s") is double rate && Value("pull_at_cruise_low95") is double low && Value("pull_at_cruise_high95") is double high && high > low)
            {
                counts.Rates.Add(double.DegreesToRadians(rate));
                // The interval's own factor is near the normal one with the many effective samples of a flight.
                counts.Variances.Add(Math.Pow(double.DegreesToRadians(high - low) / (2 * StandardNormal.Quantile(0.975)), 2));
            }
        }

        /// <summary>The summary.</summary>
        public BatchSummary Build() => new()
        {
            Flights = _flights,
            Machines = [.. _machines.Select(m => m.Value.Describe(m.Key))],
        };
    }

    private sealed class Counts
    {
        public List<int> Codes { get; } = [];
        public List<double> Rates { get; } = [];
        public List<double> Variances { get; } = [];

        public Machine Describe(string name)
        {
            RandomEffectsFit? mean = Rates.Count > 0 ? RandomEffects.PauleMandel(Rates.ToArray(), Variances.ToArray()) : null;
            return new Machine
            {
                Name = name,
                Flights = Codes.Count,
                Answered = Codes.Count(c => c == 0),
                CannotTell = Codes.Count(c => c == 4),
                Unreadable = Codes.Count(c => c is not (0 or 4)),
                PullRadPerSec = mean?.Mean.Value,
                Interval95 = mean?.HartungKnappInterval(0.95),
                BetweenRadPerSec = Rates.Count > 1 ? Math.Sqrt(mean!.BetweenVariance) : null,
            };
        }
    }
}
