using PartCheck.Quantities;

namespace PartCheck.OperatingPoints;

/// <summary>
/// The load: one diode-like element in series with a resistance,
/// Vload(I) = n Vt25 ln(I/Is + 1) + I Rslope, or a pure resistance where n = 0. Fixed with temperature (the drop's range is
/// the user's). Voltages in volts, currents in amperes, resistances in ohms.
/// </summary>
public sealed class LoadElement
{
    private readonly double referenceDrop;
    private readonly double referenceCurrent;
    private readonly double floor;

    private LoadElement(double emissionVoltage, double referenceDrop, double referenceCurrent, double series)
    {
        EmissionVoltage = emissionVoltage;
        Series = series;
        this.referenceDrop = referenceDrop;
        this.referenceCurrent = referenceCurrent;
        floor = emissionVoltage == 0 ? 0 : Math.Exp(-referenceDrop / emissionVoltage);
    }

    /// <summary>n Vt at 25 degC [V]; 0 for a pure resistance.</summary>
    public double EmissionVoltage { get; }

    /// <summary>Series resistance, or the whole load for a pure resistance [ohm].</summary>
    public double Series { get; }

    /// <summary>True for a pure resistance.</summary>
    public bool IsResistor => EmissionVoltage == 0;

    /// <summary>Drop of the junctions at the reference current, a good first guess [V].</summary>
    public double FirstGuess => referenceDrop;

    /// <summary>The element that drops <paramref name="drop"/> at <paramref name="current"/>.</summary>
    /// <param name="drop">Drop of the whole string [V], above 0.</param>
    /// <param name="current">Current at which it holds [A], above 0.</param>
    /// <param name="slope">Ohmic part [ohm], at least 0; drop - current x slope must stay above 0.</param>
    /// <param name="leds">LEDs in the string; 0: a pure resistance.</param>
    /// <exception cref="ArgumentOutOfRangeException">Outside the ranges above.</exception>
    public static LoadElement FromDrop(double drop, double current, double slope, int leds)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(drop);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(current);
        ArgumentOutOfRangeException.ThrowIfNegative(slope);
        ArgumentOutOfRangeException.ThrowIfNegative(leds);
        if (leds == 0)
        {
            return new LoadElement(0, drop, current, drop / current);
        }

        double junctions = drop - (current * slope);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(junctions, nameof(slope));
        return new LoadElement(
            2 * leds * PhysicalConstants.ThermalVoltage(PhysicalConstants.RoomTemperature), junctions, current, slope);
    }

    /// <summary>An element by its own constants.</summary>
    /// <param name="emission">n [-]; 0: a pure resistance.</param>
    /// <param name="saturation">Is [A].</param>
    /// <param name="series">Series resistance [ohm].</param>
    public static LoadElement FromConstants(double emission, double saturation, double series)
    {
        double scale = emission * PhysicalConstants.ThermalVoltage(PhysicalConstants.RoomTemperature);
        return emission == 0
            ? new LoadElement(0, 0.01 * series, 0.01, series)
            : new LoadElement(scale, scale * Math.Log((0.01 / saturation) + 1), 0.01, series);
    }

    /// <summary>Current of the junctions at a voltage across them; for a pure resistance, of the resistance.</summary>
    /// <param name="volts">Voltage across the junctions (the resistance) [V].</param>
    /// <param name="slope">dI/dV [S].</param>
    /// <returns>Current [A].</returns>
    public double Current(double volts, out double slope)
    {
        if (IsResistor)
        {
            slope = 1 / Series;
            return volts / Series;
        }

        double exponential = Math.Exp(Math.Min((volts - referenceDrop) / EmissionVoltage, 200));
        double scale = referenceCurrent / (1 - floor);
        slope = scale * exponential / EmissionVoltage;
        return scale * (exponential - floor);
    }

    /// <summary>Factor of the junctions' exponential [A].</summary>
    internal double JunctionScale => referenceCurrent / (1 - floor);

    /// <summary>The exponential at 0 V [-].</summary>
    internal double JunctionFloor => floor;

    /// <summary>Voltage above which a junction's steps are limited [V].</summary>
    internal double CriticalVoltage => referenceDrop + (EmissionVoltage * Math.Log(EmissionVoltage / (Math.Sqrt(2) * referenceCurrent)));
}
