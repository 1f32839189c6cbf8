using System.Collections.Concurrent;
using System.Globalization;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.SimulationTests;

/// <summary>Fits of a study kept in a file, one line each, so that what follows from them can be studied again without flying again.</summary>
/// <remarks>A line: seed, what was entered wrong, method, degrees of freedom, then name, value and standard error of each coefficient
/// (empty when the flight could not give it), then the covariance. Delete the file whenever simulator or estimator change.</remarks>
internal sealed class KeptFits
{
    private const char Separator = '\t';

    private readonly ConcurrentDictionary<(ulong Seed, EnteredWrong Wrong), TurnFit> _fits = new();
    private readonly string? _path;
    private readonly Lock _writing = new();

    public KeptFits(string? path)
    {
        _path = path;
        if (path is null || !File.Exists(path))
            return;
        foreach (string line in File.ReadLines(path))
        {
            string[] cells = line.Split(Separator);
            int n = cells.Length > 4 ? int.Parse(cells[4], CultureInfo.InvariantCulture) : -1;
            if (n < 0 || cells.Length != 5 + (3 * n) + (n * n))
                continue; // a line cut off when the study was stopped
            double Number(int i) => double.Parse(cells[i], CultureInfo.InvariantCulture);
            _fits[(ulong.Parse(cells[0], CultureInfo.InvariantCulture), Enum.Parse<EnteredWrong>(cells[1]))] = new TurnFit
            {
                Method = cells[2],
                ThrustBasis = ThrustBasis.Newton,
                DegreesOfFreedom = Number(3),
                EffectiveSamples = double.NaN,
                Condition = double.NaN,
                Coefficients = [.. Enumerable.Range(0, n).Select(i => 5 + (3 * i)).Select(at => new TurnCoefficient(
                    cells[at], cells[at + 1].Length == 0 ? null : new Estimate(Number(at + 1), Number(at + 2)), cells[at + 1].Length == 0 ? "kept" : ""))],
                Covariance = [.. Enumerable.Range(0, n * n).Select(i => Number(5 + (3 * n) + i))],
            };
        }
    }

    /// <summary>The kept fit, or a new one that is kept from now on.</summary>
    public TurnFit Get(ulong seed, EnteredWrong wrong, Func<TurnFit> fit)
    {
        if (_fits.TryGetValue((seed, wrong), out TurnFit? kept))
            return kept;
        TurnFit made = fit();
        if (_path is not null)
        {
            string Text(double value) => value.ToString("R", CultureInfo.InvariantCulture);
            string line = string.Join(Separator,
            [
                seed.ToString(CultureInfo.InvariantCulture), wrong.ToString(), made.Method, Text(made.DegreesOfFreedom),
                made.Coefficients.Length.ToString(CultureInfo.InvariantCulture),
                .. made.Coefficients.SelectMany(c => c.Estimate is Estimate e ? [c.Name, Text(e.Value), Text(e.StandardError)] : (string[])[c.Name, "", ""]),
                .. made.Covariance.Select(Text),
            ]);
            lock (_writing)
                File.AppendAllText(_path, line + "\n");
        }
        _fits[(seed, wrong)] = made;
        return made;
    }
}
