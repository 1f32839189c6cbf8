namespace TrimFit.Simulation;

/// <summary>How columns are named.</summary>
public enum CsvHeader
{
    /// <summary>One row such as <c>gyro_z_dps</c>.</summary>
    NameAndUnit,
    /// <summary>One row such as <c>Yaw rate [°/s]</c>.</summary>
    WordsAndBrackets,
    /// <summary>A row of names and a row of units.</summary>
    UnitsRow,
    /// <summary>No header.</summary>
    None,
}
