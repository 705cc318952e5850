using PartCheck.Devices;
using PartCheck.Quantities;

namespace PartCheck.Parts;

/// <summary>One row of the part table: one purchasable part number of one manufacturer on one mounting.</summary>
public abstract record Part
{
    /// <summary>The part number.</summary>
    public required string PartNumber { get; init; }

    /// <summary>Manufacturer; null when the row names none.</summary>
    public string? Manufacturer { get; init; }

    /// <summary>Board condition that the thermal figures hold for; null when the row names none.</summary>
    public string? Mounting { get; init; }

    /// <summary>Package name.</summary>
    public string? Package { get; init; }

    /// <summary>File and cell of the row's part number.</summary>
    public required string Cell { get; init; }

    /// <summary>Rated power in ambient air [W].</summary>
    public Cited<Power>? Power { get; init; }

    /// <summary>Ambient up to which the rated power holds; null: 25 degC (transistor), 70 degC (resistor).</summary>
    public Cited<Temperature>? PowerFlatTo { get; init; }

    /// <summary>Slope of the rated power above that [W/K]; null: straight to zero at the maximum temperature.</summary>
    public Cited<double>? PowerSlope { get; init; }

    /// <summary>Thermal resistance junction (film) to ambient.</summary>
    public Cited<ThermalResistance>? RthJa { get; init; }

    /// <summary>Highest junction temperature; of a resistor its highest film temperature.</summary>
    public Cited<Temperature>? TjMax { get; init; }

    /// <summary>Continuous collector current rating; of a zero-ohm resistor its current rating.</summary>
    public Cited<Current>? Ic { get; init; }

    /// <summary>Lifecycle state as the table writes it.</summary>
    public string? Lifecycle { get; init; }

    /// <summary>Pieces in stock.</summary>
    public double? Stock { get; init; }

    /// <summary>Where the ratings were read.</summary>
    public string? Source { get; init; }

    /// <summary>Ambient up to which the rated power holds, the default filled in.</summary>
    public abstract Temperature FlatTo { get; }
}

/// <summary>One guaranteed point of the current gain.</summary>
/// <param name="At">Collector current of the point.</param>
/// <param name="Min">Smallest gain, null when not guaranteed.</param>
/// <param name="Max">Largest gain, null when not guaranteed.</param>
public sealed record HfePoint(Current At, double? Min, double? Max);

/// <summary>A guaranteed smallest gain in the cold.</summary>
public sealed record ColdHfe(double Min, Current At, Temperature Temperature);

/// <summary>The base-emitter voltage window VBE(on) at one collector current.</summary>
public sealed record VbeWindow(Voltage? Min, Voltage? Typ, Voltage? Max, Current At, Voltage Vce);

/// <summary>One point of the safe operating area's DC boundary.</summary>
public sealed record SoaPoint(Voltage Vce, Current Ic);

/// <summary>One point of the transient thermal resistance.</summary>
public sealed record ZthPoint(double Seconds, ThermalResistance Zth);

/// <summary>An NPN transistor (Kind <c>npn</c>).</summary>
public sealed record Transistor : Part
{
    /// <summary>Highest collector-emitter voltage, base open.</summary>
    public Cited<Voltage>? Vceo { get; init; }

    /// <summary>Highest collector-base voltage, emitter open.</summary>
    public Cited<Voltage>? Vcbo { get; init; }

    /// <summary>Highest emitter-base voltage, collector open.</summary>
    public Cited<Voltage>? Vebo { get; init; }

    /// <summary>Thermal resistance junction to case.</summary>
    public Cited<ThermalResistance>? RthJc { get; init; }

    /// <summary>Heating of the control transistor's junction by this one, as a pass transistor [K/W]; null: missing.</summary>
    public Cited<ThermalResistance>? Coupling { get; init; }

    /// <summary>Transient thermal resistance, rising in time; empty: none given.</summary>
    public IReadOnlyList<ZthPoint> Zth { get; init; } = [];

    /// <summary>Guaranteed gain points, rising in current; empty: none given.</summary>
    public Cited<IReadOnlyList<HfePoint>>? Hfe { get; init; }

    /// <summary>Collector-emitter voltage of the gain points (default 5 V).</summary>
    public Voltage HfeVce { get; init; } = Voltage.FromVolts(5);

    /// <summary>Guaranteed smallest gain in the cold.</summary>
    public Cited<ColdHfe>? HfeCold { get; init; }

    /// <summary>VBE(on) window.</summary>
    public Cited<VbeWindow>? Vbe { get; init; }

    /// <summary>Largest VBE difference within one lot.</summary>
    public Cited<Voltage>? VbeMatch { get; init; }

    /// <summary>Largest saturated VBE, an upper bound of VBE(on).</summary>
    public Cited<Voltage>? VbeSatMax { get; init; }

    /// <summary>Collector current of <see cref="VbeSatMax"/>.</summary>
    public Current? VbeSatAt { get; init; }

    /// <summary>Largest saturated collector-emitter voltage.</summary>
    public Cited<Voltage>? VceSatMax { get; init; }

    /// <summary>Collector current of <see cref="VceSatMax"/>.</summary>
    public Current? VceSatAt { get; init; }

    /// <summary>Largest collector-base leakage.</summary>
    public Cited<Current>? IcboMax { get; init; }

    /// <summary>Temperature at which <see cref="IcboMax"/> holds.</summary>
    public Temperature? IcboTemperature { get; init; }

    /// <summary>Safe operating area, DC boundary, rising in voltage.</summary>
    public Cited<IReadOnlyList<SoaPoint>>? Soa { get; init; }

    /// <summary>True where the boundary holds for a case temperature, false for ambient.</summary>
    public bool SoaAtCase { get; init; }

    /// <summary>Forward Early voltage.</summary>
    public Cited<Voltage>? Vaf { get; init; }

    /// <summary>The user's model card, already held to the part's own windows.</summary>
    public Cited<ModelCard>? Card { get; init; }

    /// <summary>What the leads are, in order; null: not known.</summary>
    public LeadOrder? Pins { get; init; }

    /// <summary>Transistors in one package.</summary>
    public int Elements { get; init; } = 1;

    /// <summary>
    /// Thermal resistance with every element of the package on at the same power: Tj = Ta + (sum of their powers) x this;
    /// <see cref="Part.RthJa"/> is of one element on alone. Null: missing, or a single transistor.
    /// </summary>
    public Cited<ThermalResistance>? RthJaBoth { get; init; }

    /// <summary>Rated power of the whole package in ambient air; <see cref="Part.Power"/> is of one element. Null: missing, or a single transistor.</summary>
    public Cited<Power>? PowerBoth { get; init; }

    /// <inheritdoc/>
    public override Temperature FlatTo => PowerFlatTo?.Value ?? Temperature.FromCelsius(25);
}

/// <summary>A resistor (Kind <c>resistor</c>).</summary>
public sealed record ResistorPart : Part
{
    /// <summary>Nominal resistance; zero is allowed for averaging.</summary>
    public required Cited<Resistance> Resistance { get; init; }

    /// <summary>Tolerance as a share (1 % is 0.01).</summary>
    public Cited<double>? Tolerance { get; init; }

    /// <summary>Largest magnitude of the temperature coefficient [1/K].</summary>
    public Cited<double>? Tcr { get; init; }

    /// <summary>Limiting element voltage.</summary>
    public Cited<Voltage>? WorkingVoltageMax { get; init; }

    /// <summary>Film style, where a derating table tells them apart.</summary>
    public string? Style { get; init; }

    /// <inheritdoc/>
    public override Temperature FlatTo => PowerFlatTo?.Value ?? Temperature.FromCelsius(70);
}

/// <summary>An LED of a channel's load (Kind <c>led</c>).</summary>
public sealed record LedPart : Part
{
    /// <summary>Highest continuous forward current.</summary>
    public Cited<Current>? ForwardCurrentMax { get; init; }

    /// <summary>Ambient up to which it holds; null: 25 degC.</summary>
    public Cited<Temperature>? ForwardCurrentFlatTo { get; init; }

    /// <summary>Slope of the forward current maximum above that [A/K]; null: straight to zero at the highest junction temperature.</summary>
    public Cited<double>? ForwardCurrentSlope { get; init; }

    /// <summary>What is missing, where this stands for a row that the part table does not have; null: it is a row.</summary>
    public string? Missing { get; init; }

    /// <summary>The ambient up to which the forward current maximum holds: the load has no power rating here.</summary>
    public override Temperature FlatTo => ForwardCurrentFlatTo?.Value ?? Temperature.FromCelsius(25);
}

/// <summary>A row that has complaints: the part stands in the table, and nothing of it is known.</summary>
public sealed record UnreadPart : Part
{
    /// <inheritdoc/>
    public override Temperature FlatTo => Temperature.FromCelsius(25);
}

/// <summary>A part whose kind is known and refused, with the reason.</summary>
public sealed record RefusedPart : Part
{
    /// <summary>The kind as the table writes it.</summary>
    public required string Kind { get; init; }

    /// <summary>Why a low-side current sink cannot use it.</summary>
    public required string Reason { get; init; }

    /// <inheritdoc/>
    public override Temperature FlatTo => Temperature.FromCelsius(25);
}
