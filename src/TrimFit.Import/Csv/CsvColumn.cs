using TrimFit.Core.Logs;

namespace TrimFit.Import.Csv;

/// <summary>One column of a file and what becomes of it.</summary>
internal sealed class CsvColumn
{
    public required int Index { get; init; }
    /// <summary>Name in the header.</summary>
    public required string Name { get; init; }
    /// <summary>Name without its unit.</summary>
    public required string BareName { get; init; }
    public ChannelRole? Role { get; set; }
    /// <summary>Unit of the file's numbers; null until it is inferred.</summary>
    public LogUnit? Unit { get; set; }
    /// <summary>How the role was found.</summary>
    public string RoleBasis { get; set; } = "";
    /// <summary>How the unit was found; empty while it is not.</summary>
    public string UnitBasis { get; set; } = "";
    /// <summary>Rank of the name among those of its role; lower is preferred.</summary>
    public int Rank { get; set; }
    /// <summary>Whether the person named this column.</summary>
    public bool Told { get; set; }
    /// <summary>Cells without a value.</summary>
    public int Missing { get; set; }
    /// <summary>The numbers as written, then in SI.</summary>
    public double[] Values { get; set; } = [];
    /// <summary>Longitudes of a position column.</summary>
    public double[] SecondValues { get; set; } = [];

    /// <summary>Takes the role away.</summary>
    public void Release()
    {
        Role = null;
        Unit = null;
        RoleBasis = UnitBasis = "";
        Values = SecondValues = [];
    }

    public ColumnUse ToUse() => new(Name, Role, Role is null ? "" : Unit?.Name ?? "", UnitBasis.Length == 0 ? RoleBasis : RoleBasis.Length == 0 ? "" : $"{RoleBasis}; unit {UnitBasis}", Missing);
}
