namespace PartCheck.Quantities;

/// <summary>Physical constants, exact in the SI since 2019 (CODATA 2018).</summary>
public static class PhysicalConstants
{
    /// <summary>Elementary charge q [C].</summary>
    public const double ElementaryCharge = 1.602176634e-19;

    /// <summary>Boltzmann constant k [J/K].</summary>
    public const double Boltzmann = 1.380649e-23;

    /// <summary>k/q [V/K].</summary>
    public const double BoltzmannOverCharge = Boltzmann / ElementaryCharge;

    /// <summary>The reference temperature of every datasheet point, 25 degC [K].</summary>
    public const double RoomTemperature = 298.15;

    /// <summary>The reference temperature of a resistor's temperature coefficient, 20 degC [K] (IEC 60115-1, from memory).</summary>
    public const double ResistorReferenceTemperature = 293.15;

    /// <summary>Thermal voltage kT/q [V] at a temperature [K].</summary>
    public static double ThermalVoltage(double kelvins) => BoltzmannOverCharge * kelvins;
}
