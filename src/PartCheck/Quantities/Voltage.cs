namespace PartCheck.Quantities;

/// <summary>An electric potential difference.</summary>
public readonly record struct Voltage : IComparable<Voltage>
{
    private Voltage(double si) => Volts = si;

    /// <summary>The value in SI [V].</summary>
    public double Volts { get; }

    /// <summary>Makes the quantity from SI [V].</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not a finite number.</exception>
    public static Voltage FromVolts(double value) => new(Finite.Checked(value, nameof(value)));

    /// <inheritdoc/>
    public int CompareTo(Voltage other) => Volts.CompareTo(other.Volts);
}
