namespace PartCheck.Quantities;

/// <summary>A point on the temperature scale (a difference is a <see cref="TemperatureDelta"/>).</summary>
public readonly record struct Temperature : IComparable<Temperature>
{
    /// <summary>0 degC in kelvins (BIPM, SI brochure, definition of the degree Celsius).</summary>
    public const double CelsiusZero = 273.15;

    private Temperature(double kelvins) => Kelvins = kelvins;

    /// <summary>Thermodynamic temperature [K].</summary>
    public double Kelvins { get; }

    /// <summary>The same temperature [degC].</summary>
    public double Celsius => Kelvins - CelsiusZero;

    /// <summary>Makes a temperature from kelvins.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not finite, or below absolute zero.</exception>
    public static Temperature FromKelvins(double value) =>
        Finite.Checked(value, nameof(value)) >= 0
            ? new(value)
            : throw new ArgumentOutOfRangeException(nameof(value), value, "A temperature is at least 0 K.");

    /// <summary>Makes a temperature from degrees Celsius.</summary>
    public static Temperature FromCelsius(double value) => FromKelvins(value + CelsiusZero);

    /// <inheritdoc/>
    public int CompareTo(Temperature other) => Kelvins.CompareTo(other.Kelvins);
}
