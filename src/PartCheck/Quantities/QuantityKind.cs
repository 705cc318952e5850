namespace PartCheck.Quantities;

/// <summary>The kinds of quantity that a person types; each knows its units and what a bare number of it means.</summary>
public enum QuantityKind
{
    /// <summary>Voltage, bare numbers in volts [V].</summary>
    Voltage,

    /// <summary>Current, bare numbers in amperes [A].</summary>
    Current,

    /// <summary>Power, bare numbers in watts [W].</summary>
    Power,

    /// <summary>Resistance, bare numbers in ohms [ohm]; RKM codes (IEC 60062) are read.</summary>
    Resistance,

    /// <summary>Temperature, bare numbers in degrees Celsius; the value is in kelvins [K].</summary>
    Temperature,

    /// <summary>Difference of temperatures, bare numbers in kelvins [K].</summary>
    TemperatureDelta,

    /// <summary>Thermal resistance [K/W].</summary>
    ThermalResistance,

    /// <summary>Power slope [W/K].</summary>
    PowerSlope,

    /// <summary>Current slope [A/K].</summary>
    CurrentSlope,

    /// <summary>Frequency [Hz].</summary>
    Frequency,

    /// <summary>Time [s].</summary>
    Time,

    /// <summary>A share: bare numbers in percent, the value between 0 and 1 (1 % is 0.01).</summary>
    Percent,

    /// <summary>Temperature coefficient: bare numbers in ppm/K, the value in 1/K.</summary>
    TemperatureCoefficient,

    /// <summary>A pure number.</summary>
    Number,
}
