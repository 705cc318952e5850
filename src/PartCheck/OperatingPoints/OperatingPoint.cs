namespace PartCheck.OperatingPoints;

/// <summary>One transistor of a solved circuit, terminal quantities in SI units.</summary>
/// <param name="Ic">Collector current [A].</param>
/// <param name="Ib">Base current [A].</param>
/// <param name="BaseVoltage">Base terminal [V].</param>
/// <param name="CollectorVoltage">Collector terminal [V].</param>
/// <param name="EmitterVoltage">Emitter terminal [V].</param>
/// <param name="Tj">Junction temperature [K].</param>
/// <param name="Held">True where the junction ran away and is held at its limit.</param>
public readonly record struct SolvedTransistor(
    double Ic, double Ib, double BaseVoltage, double CollectorVoltage, double EmitterVoltage, double Tj, bool Held)
{
    /// <summary>Slope of VBE with temperature at constant collector current [V/K].</summary>
    public double VbeSlope { get; init; }

    /// <summary>Effective base resistance [ohm].</summary>
    public double BaseResistance { get; init; }

    /// <summary>Collector-emitter voltage [V].</summary>
    public double Vce => CollectorVoltage - EmitterVoltage;

    /// <summary>Dissipation [W].</summary>
    public double Power => ((CollectorVoltage - EmitterVoltage) * Ic) + ((BaseVoltage - EmitterVoltage) * Ib);
}

/// <summary>The solved circuit, SI units.</summary>
public sealed record OperatingPoint
{
    /// <summary>Base node [V].</summary>
    public required double BaseVoltage { get; init; }

    /// <summary>Base of the control transistor [V].</summary>
    public required double ControlBaseVoltage { get; init; }

    /// <summary>Joined collectors [V].</summary>
    public required double CollectorVoltage { get; init; }

    /// <summary>Load current [A].</summary>
    public required double LoadCurrent { get; init; }

    /// <summary>Current out of the pin [A].</summary>
    public required double PinCurrent { get; init; }

    /// <summary>Current through the feed resistor [A].</summary>
    public required double FeedCurrent { get; init; }

    /// <summary>Control transistor.</summary>
    public required SolvedTransistor Control { get; init; }

    /// <summary>Pass transistor of each leg group.</summary>
    public required IReadOnlyList<SolvedTransistor> Legs { get; init; }

    /// <summary>Current through each leg group's averaging resistor, towards the control [A].</summary>
    public required IReadOnlyList<double> AveragingCurrents { get; init; }

    /// <summary>Newton steps taken, over all rungs.</summary>
    public required int Iterations { get; init; }
}

/// <summary>A solve that gave up: a named failure, never an unconverged number.</summary>
/// <param name="Residual">Largest residual of the last step, relative to its equation's scale [-].</param>
/// <param name="Iterations">Newton steps taken, over all rungs of the ladder.</param>
public sealed record NotSolved(double Residual, int Iterations);
