namespace PartCheck.Quantities;

/// <summary>A frequency.</summary>
public readonly record struct Frequency : IComparable<Frequency>
{
    private Frequency(double si) => Hertz = si;

    /// <summary>The value in SI [Hz].</summary>
    public double Hertz { get; }

    /// <summary>Makes the quantity from SI [Hz].</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not a finite number.</exception>
    public static Frequency FromHertz(double value) => new(Finite.Checked(value, nameof(value)));

    /// <inheritdoc/>
    public int CompareTo(Frequency other) => Hertz.CompareTo(other.Hertz);
}
