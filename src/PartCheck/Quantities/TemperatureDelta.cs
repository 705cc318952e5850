namespace PartCheck.Quantities;

/// <summary>A difference of two temperatures.</summary>
public readonly record struct TemperatureDelta : IComparable<TemperatureDelta>
{
    private TemperatureDelta(double si) => Kelvins = si;

    /// <summary>The value in SI [K].</summary>
    public double Kelvins { get; }

    /// <summary>Makes the quantity from SI [K].</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not a finite number.</exception>
    public static TemperatureDelta FromKelvins(double value) => new(Finite.Checked(value, nameof(value)));

    /// <inheritdoc/>
    public int CompareTo(TemperatureDelta other) => Kelvins.CompareTo(other.Kelvins);
}
