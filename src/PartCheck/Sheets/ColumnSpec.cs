namespace PartCheck.Sheets;

/// <summary>What kind of value a column holds; it decides which units are accepted and what a bare number means.</summary>
public enum ColumnKind
{
    /// <summary>Free text.</summary>
    Text,

    /// <summary>Volts.</summary>
    Voltage,

    /// <summary>Amperes.</summary>
    Current,

    /// <summary>Watts.</summary>
    Power,

    /// <summary>Ohms; RKM codes (IEC 60062) are read.</summary>
    Resistance,

    /// <summary>Degrees Celsius at the edge; read as kelvins.</summary>
    Temperature,

    /// <summary>Kelvins (a difference).</summary>
    TemperatureDelta,

    /// <summary>K/W.</summary>
    ThermalResistance,

    /// <summary>W/K.</summary>
    PowerSlope,

    /// <summary>A/K.</summary>
    CurrentSlope,

    /// <summary>Hertz.</summary>
    Frequency,

    /// <summary>Seconds.</summary>
    Time,

    /// <summary>A share: percent, read as a number between 0 and 1 (1 % is 0.01). Bare numbers are percent.</summary>
    Percent,

    /// <summary>ppm/K, read as 1/K.</summary>
    TemperatureCoefficient,

    /// <summary>A pure number.</summary>
    Number,
}

/// <summary>One column that a table may have.</summary>
/// <param name="Name">The column's own name, as tables.md and the README print it.</param>
/// <param name="Kind">The kind of its values.</param>
/// <param name="Min">Smallest plausible value, SI; a bare number below it is a complaint.</param>
/// <param name="Max">Largest plausible value, SI; a bare number above it is most likely in another unit: a complaint.</param>
/// <param name="Required">True where the table makes no sense without the column.</param>
public sealed record ColumnSpec(
    string Name, ColumnKind Kind, double Min = double.NegativeInfinity, double Max = double.PositiveInfinity, bool Required = false)
{
    /// <summary>
    /// Says of the texts below a header whose name is doubtful (<c>Part</c>, <c>Name</c>) whether they are this column's; null: no
    /// doubtful name is taken.
    /// </summary>
    public Func<IReadOnlyList<string>, bool>? Proof { get; init; }
}
