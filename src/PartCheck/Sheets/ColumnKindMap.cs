using PartCheck.Quantities;

namespace PartCheck.Sheets;

/// <summary>What a column's kind is as a quantity.</summary>
internal static class ColumnKindMap
{
    /// <summary>The kind of quantity; null for text.</summary>
    internal static QuantityKind? QuantityOf(ColumnKind kind) => kind switch
    {
        ColumnKind.Text => null,
        ColumnKind.Voltage => QuantityKind.Voltage,
        ColumnKind.Current => QuantityKind.Current,
        ColumnKind.Power => QuantityKind.Power,
        ColumnKind.Resistance => QuantityKind.Resistance,
        ColumnKind.Temperature => QuantityKind.Temperature,
        ColumnKind.TemperatureDelta => QuantityKind.TemperatureDelta,
        ColumnKind.ThermalResistance => QuantityKind.ThermalResistance,
        ColumnKind.PowerSlope => QuantityKind.PowerSlope,
        ColumnKind.CurrentSlope => QuantityKind.CurrentSlope,
        ColumnKind.Frequency => QuantityKind.Frequency,
        ColumnKind.Time => QuantityKind.Time,
        ColumnKind.Percent => QuantityKind.Percent,
        ColumnKind.TemperatureCoefficient => QuantityKind.TemperatureCoefficient,
        ColumnKind.Number => QuantityKind.Number,
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "No such kind of column."),
    };
}
