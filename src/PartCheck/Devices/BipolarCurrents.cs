namespace PartCheck.Devices;

/// <summary>
/// Terminal currents of a bipolar transistor at given internal junction voltages, with their slopes with respect to
/// the base-emitter voltage [.../V], the base-collector voltage [.../V] and the junction temperature [.../K].
/// </summary>
public record struct BipolarCurrents
{
    /// <summary>Collector current, into the terminal [A].</summary>
    public double Ic { get; set; }

    /// <summary>Slopes of the collector current.</summary>
    public Slopes DIc { get; set; }

    /// <summary>Base current, into the terminal [A].</summary>
    public double Ib { get; set; }

    /// <summary>Slopes of the base current.</summary>
    public Slopes DIb { get; set; }

    /// <summary>Effective base resistance [ohm].</summary>
    public double Rbb { get; set; }

    /// <summary>Slopes of the effective base resistance (of its base-charge part; that of IRB is left to iteration).</summary>
    public Slopes DRbb { get; set; }
}

/// <summary>Slopes of a quantity with respect to base-emitter voltage, base-collector voltage and temperature.</summary>
/// <param name="Vbe">[.../V].</param>
/// <param name="Vbc">[.../V].</param>
/// <param name="T">[.../K].</param>
public readonly record struct Slopes(double Vbe, double Vbc, double T);
