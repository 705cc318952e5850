using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.OperatingPoints;

/// <summary>
/// A resistor's range: R (1 +- tolerance)(1 +- TCR abs(T - 20 degC)), T the ambient, signs independent (each end of the
/// range takes both signs alike).
/// </summary>
public sealed record ResistorRange
{
    /// <summary>Coefficient assumed where the table gives none: 200 ppm/K [1/K].</summary>
    public const double AssumedTcr = 200e-6;

    /// <summary>The range of a row.</summary>
    public ResistorRange(ResistorPart part)
    {
        ArgumentNullException.ThrowIfNull(part);
        Part = part;
        Nominal = part.Resistance.Value.Ohms;
        Tolerance = part.Tolerance?.Value ?? 0;
        Tcr = part.Tcr?.Value ?? AssumedTcr;
    }

    /// <summary>The row.</summary>
    public ResistorPart Part { get; }

    /// <summary>Nominal resistance [ohm].</summary>
    public double Nominal { get; }

    /// <summary>Tolerance [-].</summary>
    public double Tolerance { get; }

    /// <summary>Temperature coefficient [1/K].</summary>
    public double Tcr { get; }

    /// <summary>True where the range has width.</summary>
    public bool Varies => Nominal > 0 && (Tolerance > 0 || Tcr > 0);

    /// <summary>The resistance at one end [ohm].</summary>
    /// <param name="end">Which end.</param>
    /// <param name="ambient">Ambient temperature [K].</param>
    public double At(Extreme end, double ambient)
    {
        double sign = end switch { Extreme.Min => -1, Extreme.Max => 1, _ => 0 };
        double drift = Tcr * Math.Abs(ambient - PhysicalConstants.ResistorReferenceTemperature);
        return Nominal * (1 + (sign * Tolerance)) * (1 + (sign * drift));
    }
}
