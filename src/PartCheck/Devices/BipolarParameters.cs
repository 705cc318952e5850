namespace PartCheck.Devices;

/// <summary>
/// The static parameters of the SPICE level-1 bipolar transistor (Gummel-Poon), NPN, SI units, at <see cref="Tnom"/>.
/// Source: Antognetti and Massobrio, Semiconductor Device Modeling with SPICE; the manual of any SPICE program.
/// Infinity stands for "no limit" (VAF, VAR, IKF, IKR); 0 for "none" (ISE, ISC, RB, RC, RE).
/// </summary>
public sealed record BipolarParameters
{
    /// <summary>Transport saturation current [A].</summary>
    public double Is { get; init; } = 1e-16;

    /// <summary>Ideal maximum forward current gain [-].</summary>
    public double Bf { get; init; } = 100;

    /// <summary>Forward emission coefficient [-].</summary>
    public double Nf { get; init; } = 1;

    /// <summary>Forward Early voltage [V].</summary>
    public double Vaf { get; init; } = double.PositiveInfinity;

    /// <summary>Corner of forward gain roll-off at high current [A].</summary>
    public double Ikf { get; init; } = double.PositiveInfinity;

    /// <summary>Roll-off exponent of the high-current corner [-].</summary>
    public double Nkf { get; init; } = 0.5;

    /// <summary>Base-emitter leakage saturation current [A].</summary>
    public double Ise { get; init; }

    /// <summary>Base-emitter leakage emission coefficient [-].</summary>
    public double Ne { get; init; } = 1.5;

    /// <summary>Ideal maximum reverse current gain [-].</summary>
    public double Br { get; init; } = 1;

    /// <summary>Reverse emission coefficient [-].</summary>
    public double Nr { get; init; } = 1;

    /// <summary>Reverse Early voltage [V].</summary>
    public double Var { get; init; } = double.PositiveInfinity;

    /// <summary>Corner of reverse gain roll-off at high current [A].</summary>
    public double Ikr { get; init; } = double.PositiveInfinity;

    /// <summary>Base-collector leakage saturation current [A].</summary>
    public double Isc { get; init; }

    /// <summary>Base-collector leakage emission coefficient [-].</summary>
    public double Nc { get; init; } = 2;

    /// <summary>Zero-bias base resistance [ohm].</summary>
    public double Rb { get; init; }

    /// <summary>Current where the base resistance falls halfway to its minimum [A]; infinity: not used.</summary>
    public double Irb { get; init; } = double.PositiveInfinity;

    /// <summary>Minimum base resistance at high current [ohm]; NaN: equal to <see cref="Rb"/>.</summary>
    public double Rbm { get; init; } = double.NaN;

    /// <summary>Emitter resistance [ohm].</summary>
    public double Re { get; init; }

    /// <summary>Collector resistance [ohm].</summary>
    public double Rc { get; init; }

    /// <summary>Exponent of the saturation current's temperature law [-].</summary>
    public double Xti { get; init; } = 3;

    /// <summary>Energy gap of the saturation current's temperature law [eV].</summary>
    public double Eg { get; init; } = 1.11;

    /// <summary>Exponent of the gain's temperature law [-].</summary>
    public double Xtb { get; init; }

    /// <summary>Temperature at which the parameters hold [K].</summary>
    public double Tnom { get; init; } = 300.15;
}
