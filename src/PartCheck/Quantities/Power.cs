namespace PartCheck.Quantities;

/// <summary>A power, here always a heat flow.</summary>
public readonly record struct Power : IComparable<Power>
{
    private Power(double si) => Watts = si;

    /// <summary>The value in SI [W].</summary>
    public double Watts { get; }

    /// <summary>Makes the quantity from SI [W].</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not a finite number.</exception>
    public static Power FromWatts(double value) => new(Finite.Checked(value, nameof(value)));

    /// <inheritdoc/>
    public int CompareTo(Power other) => Watts.CompareTo(other.Watts);
}
