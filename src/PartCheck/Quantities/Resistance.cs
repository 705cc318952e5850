namespace PartCheck.Quantities;

/// <summary>An electric resistance.</summary>
public readonly record struct Resistance : IComparable<Resistance>
{
    private Resistance(double si) => Ohms = si;

    /// <summary>The value in SI [ohm].</summary>
    public double Ohms { get; }

    /// <summary>Makes the quantity from SI [ohm].</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not a finite number.</exception>
    public static Resistance FromOhms(double value) => new(Finite.Checked(value, nameof(value)));

    /// <inheritdoc/>
    public int CompareTo(Resistance other) => Ohms.CompareTo(other.Ohms);
}
