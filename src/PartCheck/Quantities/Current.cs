namespace PartCheck.Quantities;

/// <summary>An electric current.</summary>
public readonly record struct Current : IComparable<Current>
{
    private Current(double si) => Amperes = si;

    /// <summary>The value in SI [A].</summary>
    public double Amperes { get; }

    /// <summary>Makes the quantity from SI [A].</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not a finite number.</exception>
    public static Current FromAmperes(double value) => new(Finite.Checked(value, nameof(value)));

    /// <inheritdoc/>
    public int CompareTo(Current other) => Amperes.CompareTo(other.Amperes);
}
