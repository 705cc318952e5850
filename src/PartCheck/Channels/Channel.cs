using PartCheck.Bills;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Channels;

/// <summary>What a reference does in a channel.</summary>
public enum Role
{
    /// <summary>Pass transistor of a leg.</summary>
    Pass,

    /// <summary>Sense resistor of a leg.</summary>
    Sense,

    /// <summary>Averaging resistor of a leg.</summary>
    Averaging,

    /// <summary>Control transistor.</summary>
    Control,

    /// <summary>Feed resistor.</summary>
    Feed,

    /// <summary>Pull-down resistor.</summary>
    PullDown,

    /// <summary>LED of the load.</summary>
    Led,
}

/// <summary>Where the pull-down resistor sits.</summary>
public enum PullDownAt
{
    /// <summary>From the base node to ground.</summary>
    Base,

    /// <summary>From the pin to ground.</summary>
    Pin,
}

/// <summary>The operating conditions of one channel, as its row gives them, defaults filled in.</summary>
public sealed record ChannelConditions
{
    /// <summary>Load supply.</summary>
    public required Interval<Voltage> Supply { get; init; }

    /// <summary>Highest transient supply (default: Supply max).</summary>
    public required Voltage SupplyPeak { get; init; }

    /// <summary>Drop of the whole LED string at the nominal current.</summary>
    public required Interval<Voltage> LoadDrop { get; init; }

    /// <summary>Ohmic part of the load.</summary>
    public Resistance LoadSlope { get; init; }

    /// <summary>LEDs in the string; 0: a pure resistor.</summary>
    public required int Leds { get; init; }

    /// <summary>Strings of LEDs in parallel.</summary>
    public int Strings { get; init; } = 1;

    /// <summary>Largest current of one string over the mean of all; null: nobody knows how they share.</summary>
    public double? StringShareMax { get; init; }

    /// <summary>The current window.</summary>
    public required Interval<Current> CurrentWindow { get; init; }

    /// <summary>Current at which the drop holds (default: the window's centre).</summary>
    public required Current CurrentNominal { get; init; }

    /// <summary>Local air at the parts.</summary>
    public required Interval<Temperature> Ambient { get; init; }

    /// <summary>Largest duty, 0 to 1.</summary>
    public double Duty { get; init; } = 1;

    /// <summary>PWM frequency; null: none.</summary>
    public Frequency? Frequency { get; init; }

    /// <summary>Largest load current with the pin low; null: not asked.</summary>
    public Current? OffCurrentMax { get; init; }

    /// <summary>Largest ratio of a leg's sense voltage to the mean; null: as the derating table says.</summary>
    public double? SharingMax { get; init; }

    /// <summary>Board condition of the thermal figures; null: the part's worst row.</summary>
    public string? Mounting { get; init; }

    /// <summary>Name of the channel's own derating table; null: the run's.</summary>
    public string? Derating { get; init; }
}

/// <summary>One reference in one role, bound to its bill line and the part-table row that this reading of the bill takes.</summary>
/// <param name="Role">What it does.</param>
/// <param name="Leg">Zero-based leg for pass, sense and averaging; -1 otherwise.</param>
/// <param name="Reference">The reference designator.</param>
/// <param name="Line">Its bill line.</param>
/// <param name="Part">The part row.</param>
public sealed record Placement(Role Role, int Leg, string Reference, BillLine Line, Part Part)
{
    /// <summary>Reference of the component that is bought and placed: of an element its package's.</summary>
    public string Package => ElementReference.PackageOf(Reference);

    /// <summary>Number of the element in its package; null: the reference names none.</summary>
    public int? Element => ElementReference.ElementOf(Reference);
}

/// <summary>One leg, every role bound.</summary>
/// <param name="Pass">Pass transistor.</param>
/// <param name="Sense">Sense resistor.</param>
/// <param name="Averaging">Averaging resistor; null: none (the emitter is the control's base node, or the leg is not sensed).</param>
/// <param name="Sensed">False where the control does not sense this leg (<c>-</c> in Averaging).</param>
public sealed record Leg(Placement Pass, Placement Sense, Placement? Averaging, bool Sensed)
{
    /// <summary>The pass transistor's row.</summary>
    public Transistor PassPart => (Transistor)Pass.Part;

    /// <summary>The sense resistor's row.</summary>
    public ResistorPart SensePart => (ResistorPart)Sense.Part;

    /// <summary>The averaging resistor's row.</summary>
    public ResistorPart? AveragingPart => (ResistorPart?)Averaging?.Part;
}

/// <summary>One channel with every role bound to one part row: what the solver takes.</summary>
public sealed record BoundChannel
{
    /// <summary>The channel's name.</summary>
    public required string Name { get; init; }

    /// <summary>File and cell of the channel's name.</summary>
    public required string Cell { get; init; }

    /// <summary>Its operating conditions.</summary>
    public required ChannelConditions Conditions { get; init; }

    /// <summary>The logic pin's row.</summary>
    public required LogicPin Logic { get; init; }

    /// <summary>The pin's net name; null: its own pin.</summary>
    public string? Pin { get; init; }

    /// <summary>One to eight legs.</summary>
    public required IReadOnlyList<Leg> Legs { get; init; }

    /// <summary>Control transistor.</summary>
    public required Placement Control { get; init; }

    /// <summary>Feed resistor.</summary>
    public required Placement Feed { get; init; }

    /// <summary>Pull-down resistor; null: none.</summary>
    public Placement? PullDown { get; init; }

    /// <summary>Where the pull-down sits.</summary>
    public PullDownAt PullDownAt { get; init; }

    /// <summary>Which part this reading takes for each line that offers several part numbers or manufacturers; empty: none does.</summary>
    public IReadOnlyList<MixedLine> Mix { get; init; } = [];

    /// <summary>LEDs of the load; empty: the channel names none, and none is judged.</summary>
    public IReadOnlyList<Placement> Leds { get; init; } = [];

    /// <summary>Transistors that share a package with one of this channel's and serve another channel; empty: none.</summary>
    public IReadOnlyList<ElementNeighbour> Neighbours { get; init; } = [];

    /// <summary>Everything placed in the channel: leg by leg, then control, feed, pull-down and LEDs.</summary>
    public IEnumerable<Placement> Placements => Legs.SelectMany(l => new[] { l.Pass, l.Sense, l.Averaging })
        .Append(Control).Append(Feed).Append(PullDown).Concat(Leds).OfType<Placement>();

    /// <summary>The control transistor's row.</summary>
    public Transistor ControlPart => (Transistor)Control.Part;

    /// <summary>Cell of a condition's column (by the column's own name, e.g. <c>Current min</c>), for findings; may be empty.</summary>
    public IReadOnlyDictionary<string, string> ConditionCells { get; init; } = new Dictionary<string, string>();
}

/// <summary>What one mix of parts takes for a bill line that offers several.</summary>
/// <param name="References">References of the line that the channel names.</param>
/// <param name="PartNumber">Part number taken.</param>
/// <param name="Manufacturer">Its manufacturer; null: the table names none.</param>
/// <param name="Alternate">True where it is an approved alternate of the line, not its own part number.</param>
public sealed record MixedLine(IReadOnlyList<string> References, string PartNumber, string? Manufacturer, bool Alternate);

/// <summary>A value that the tables did not give and a stated default filled.</summary>
/// <param name="What">Which value, e.g. <c>TCR</c>.</param>
/// <param name="Of">Part number or channel it belongs to.</param>
/// <param name="Value">The value with its unit, as a person reads it.</param>
public sealed record Assumption(string What, string Of, string Value);

/// <summary>A channel as the sheet and the bill give it: every reading of the bill, or why there is none.</summary>
public sealed record Channel
{
    /// <summary>The channel's name.</summary>
    public required string Name { get; init; }

    /// <summary>File and cell of the name.</summary>
    public required string Cell { get; init; }

    /// <summary>One bound channel for every combination of part rows, alternates included, over its lines; empty where it cannot be judged.</summary>
    public required IReadOnlyList<BoundChannel> Readings { get; init; }

    /// <summary>Data that is missing, when <see cref="Readings"/> is empty: e.g. "part table row of ZX-117".</summary>
    public required IReadOnlyList<string> Missing { get; init; }

    /// <summary>Roles that the bill does not serve as it must: nonconforming `bill` findings of this channel.</summary>
    public required IReadOnlyList<RoleFault> RoleFaults { get; init; }

    /// <summary>What the channel's row assumed.</summary>
    public required IReadOnlyList<Assumption> Assumed { get; init; }

    /// <summary>Every reference the channel names.</summary>
    public required IReadOnlyList<string> References { get; init; }

    /// <summary>Name of the derating table the channel names; null: the run's.</summary>
    public string? Derating { get; init; }
}

/// <summary>A role whose reference is not on the bill, not fitted, there twice, or of the wrong kind.</summary>
/// <param name="Role">The role.</param>
/// <param name="Reference">The reference that the channel names.</param>
/// <param name="Text">What is wrong, one sentence.</param>
/// <param name="Cell">The cell that says so.</param>
public sealed record RoleFault(Role Role, string Reference, string Text, string Cell)
{
    /// <summary>True where an approved alternate cannot play the role: the channel's other mixes are judged all the same.</summary>
    public bool OfAlternate { get; init; }

    /// <summary>Data that the alternate lacks: the finding is then not verified instead of nonconforming; null: none.</summary>
    public string? Missing { get; init; }
}
