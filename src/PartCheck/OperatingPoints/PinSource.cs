using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>
/// A logic pin as the box sees it: weak (lowest level, highest resistance) or strong (highest level, resistance 0).
/// <para><c>cmos</c>: source resistance up to (Supply min - High min)/High current, valid up to High current; of two High
/// pairs the smaller resistance, valid to the larger current. <c>ttl</c>: the lowest High min at any current up to the
/// largest High current.</para>
/// </summary>
public sealed record PinSource
{
    /// <summary>The pin's row as source voltages [V], resistances [ohm] and the current up to which the weak level holds [A].</summary>
    /// <param name="pin">The row.</param>
    /// <param name="others">Highest current that other feeds draw from the same pin [A].</param>
    public PinSource(LogicPin pin, double others = 0)
    {
        ArgumentNullException.ThrowIfNull(pin);
        Others = others;
        double supplyMin = pin.Supply.Min.Volts;
        double supplyMax = pin.Supply.Max.Volts;
        GuaranteedCurrent = pin.High.Max(h => h.Current.Amperes);
        StrongVoltage = supplyMax;
        LowGuaranteed = pin.LowMax is not null && (pin.Output == PinOutput.Ttl || pin.LowCurrent is not null);
        LowVoltage = pin.Output == PinOutput.Ttl ? pin.LowMax?.Volts ?? 0 : 0;
        LowResistance = pin is { Output: PinOutput.Cmos, LowMax: { } low, LowCurrent: { } lowCurrent } ? low.Volts / lowCurrent.Amperes : 0;
        if (pin.Output == PinOutput.Cmos)
        {
            WeakResistance = pin.High.Min(h => Math.Max(0, supplyMin - h.Min.Volts) / h.Current.Amperes);
            WeakVoltage = supplyMin - (WeakResistance * others);
            NominalVoltage = (supplyMin + supplyMax) / 2;
            NominalResistance = WeakResistance / 2;
        }
        else
        {
            WeakVoltage = pin.High.Min(h => h.Min.Volts);
            NominalVoltage = (WeakVoltage + supplyMax) / 2;
        }
    }

    /// <summary>Lowest source voltage [V].</summary>
    public double WeakVoltage { get; }

    /// <summary>Highest source resistance [ohm].</summary>
    public double WeakResistance { get; }

    /// <summary>Highest source voltage, at resistance 0 [V].</summary>
    public double StrongVoltage { get; }

    /// <summary>Source voltage of the nominal state [V].</summary>
    public double NominalVoltage { get; }

    /// <summary>Source resistance of the nominal state [ohm].</summary>
    public double NominalResistance { get; }

    /// <summary>Current up to which the weak level is guaranteed, all feeds together [A].</summary>
    public double GuaranteedCurrent { get; }

    /// <summary>True where the row says how low the pin goes.</summary>
    public bool LowGuaranteed { get; }

    /// <summary>Highest source voltage with the pin low: <c>ttl</c> Low max, <c>cmos</c> 0 [V].</summary>
    public double LowVoltage { get; }

    /// <summary>Highest resistance to ground with the pin low: <c>cmos</c> Low max/Low current, <c>ttl</c> 0 [ohm].</summary>
    public double LowResistance { get; }

    /// <summary>Highest current that other feeds draw from the same pin [A].</summary>
    public double Others { get; }
}
