namespace PartCheck.Quantities;

/// <summary>A thermal resistance, junction or film to ambient or case.</summary>
public readonly record struct ThermalResistance : IComparable<ThermalResistance>
{
    private ThermalResistance(double si) => KelvinsPerWatt = si;

    /// <summary>The value in SI [K/W].</summary>
    public double KelvinsPerWatt { get; }

    /// <summary>Makes the quantity from SI [K/W].</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not a finite number.</exception>
    public static ThermalResistance FromKelvinsPerWatt(double value) => new(Finite.Checked(value, nameof(value)));

    /// <inheritdoc/>
    public int CompareTo(ThermalResistance other) => KelvinsPerWatt.CompareTo(other.KelvinsPerWatt);
}
