using System.Globalization;

namespace TrimFit.Tests;

/// <summary>Columns of the small tables in Data/Statistics; where each comes from stands in the README beside them.</summary>
internal sealed class ReferenceData
{
    private readonly Dictionary<string, double[]> _columns;

    private ReferenceData(Dictionary<string, double[]> columns) => _columns = columns;

    public double[] this[string column] => _columns[column];

    public static ReferenceData Read(string file)
    {
        string[] lines = File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "Data", "Statistics", file));
        string[] names = lines[0].Split(',');
        double[][] rows = [.. lines.Skip(1).Select(line => line.Split(',').Select(cell => double.Parse(cell, NumberStyles.Float, CultureInfo.InvariantCulture)).ToArray())];
        return new(names.Select((name, j) => (name, values: rows.Select(row => row[j]).ToArray())).ToDictionary(c => c.name, c => c.values));
    }

    /// <summary>A design of a column of ones and named columns, column after column.</summary>
    public double[] DesignWithIntercept(params string[] names) => [.. Enumerable.Repeat(1.0, this[names[0]].Length), .. names.SelectMany(name => this[name])];
}
