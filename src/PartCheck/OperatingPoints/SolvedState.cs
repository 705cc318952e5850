using PartCheck.Channels;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>State of a channel.</summary>
public enum ChannelState
{
    /// <summary>Pin high, load supply present.</summary>
    On,

    /// <summary>Pin low.</summary>
    Off,

    /// <summary>Pin high, load supply absent or load unplugged.</summary>
    Unfed,
}

/// <summary>Which end of a window a corner takes.</summary>
public enum Extreme
{
    /// <summary>The typical value (nominal state), or the only one (a window of zero width).</summary>
    Typical,

    /// <summary>The smallest.</summary>
    Min,

    /// <summary>The largest.</summary>
    Max,

    /// <summary>The odd leg's VBE, one lot's match away from the rest's end of the window.</summary>
    Match,

    /// <summary>Between the ends: a knee, where a ratio peaks inside its range.</summary>
    Inside,
}

/// <summary>Ends of a transistor's two windows.</summary>
public readonly record struct TransistorCorner(Extreme Vbe, Extreme Hfe);

/// <summary>One combination of extremes (or knees) of what varies, SI units.</summary>
public sealed record Corner
{
    /// <summary>Load supply [V].</summary>
    public required double Supply { get; init; }

    /// <summary>Load drop at the nominal current [V].</summary>
    public required double LoadDrop { get; init; }

    /// <summary>Ambient temperature [K].</summary>
    public required double Ambient { get; init; }

    /// <summary>Source voltage of the pin [V].</summary>
    public required double PinLevel { get; init; }

    /// <summary>Source resistance of the pin [ohm].</summary>
    public required double PinResistance { get; init; }

    /// <summary>1: self-heated; 0: just switched on, every junction at ambient.</summary>
    public required int Heat { get; init; }

    /// <summary>Control transistor.</summary>
    public TransistorCorner Control { get; init; }

    /// <summary>Pass transistors (of the rest, where there is an odd leg).</summary>
    public TransistorCorner Pass { get; init; }

    /// <summary>Sense resistors (of the rest).</summary>
    public Extreme Sense { get; init; }

    /// <summary>Averaging resistors (of the rest).</summary>
    public Extreme Averaging { get; init; }

    /// <summary>Reference of the odd leg's pass transistor; null: no odd leg.</summary>
    public string? OddLeg { get; init; }

    /// <summary>Pass transistor of the odd leg.</summary>
    public TransistorCorner OddPass { get; init; }

    /// <summary>Sense resistor of the odd leg.</summary>
    public Extreme OddSense { get; init; }

    /// <summary>Averaging resistor of the odd leg.</summary>
    public Extreme OddAveraging { get; init; }

    /// <summary>Feed resistor.</summary>
    public Extreme Feed { get; init; }

    /// <summary>Pull-down resistor.</summary>
    public Extreme PullDown { get; init; }

    /// <summary>Share of the hottest leg's RthJA that heats the control, where no coupling is given: 0 or 0.2; null: given.</summary>
    public double? AssumedCoupling { get; init; }

    /// <summary>Share of RthJA that passes between elements of one package, where RthJA both is missing: 0 or 1; null: given, or none share one.</summary>
    public double? AssumedPackageCoupling { get; init; }

    /// <summary>True where elements of other channels in the same packages are on, at their highest dissipation; null: there are none.</summary>
    public bool? NeighboursOn { get; init; }
}

/// <summary>One transistor in a solved state, SI units.</summary>
/// <param name="Slot">Which references of the channel this point stands for.</param>
/// <param name="Role">Pass or control.</param>
/// <param name="Part">The part's row.</param>
/// <param name="Vce">Collector-emitter voltage at the terminals [V].</param>
/// <param name="Vcb">Collector-base voltage at the terminals [V].</param>
/// <param name="Ic">Collector current [A].</param>
/// <param name="Ib">Base current [A].</param>
/// <param name="Power">Dissipation while on [W].</param>
/// <param name="Tj">Junction temperature, under PWM its peak [K].</param>
/// <param name="Held">True where Tj ran away and is held at its bound: it is "at least" this.</param>
public readonly record struct TransistorPoint(
    int Slot, Role Role, Transistor Part, double Vce, double Vcb, double Ic, double Ib, double Power, double Tj, bool Held)
{
    /// <summary>Share of the power that a rating of steady power reads: the duty from 1 kHz up, else 1 [-].</summary>
    public double AveragedShare { get; init; } = 1;

    /// <summary>Share of the power that surely warms the case: the duty where pulses were solved, else 1 [-].</summary>
    public double CaseShare { get; init; } = 1;

    /// <summary>Slope of VBE with temperature at constant collector current, of the solved model [V/K].</summary>
    public double VbeSlope { get; init; }

    /// <summary>Emitter resistance of the device [ohm].</summary>
    public double EmitterResistance { get; init; }

    /// <summary>Effective base resistance of the device [ohm].</summary>
    public double BaseResistance { get; init; }

    /// <summary>Ballast between this leg and the others: sense parallel averaging; sense alone where not sensed, or sensed alone [ohm].</summary>
    public double Ballast { get; init; }

    /// <summary>Thermal resistance junction to ambient at steady power, given or assumed [K/W]; NaN: not to be had.</summary>
    public double RthJa { get; init; }

    /// <summary>Power of all elements of its package, averaged where <c>power</c> averages [W]; 0: a transistor that shares its package with none.</summary>
    public double PackagePower { get; init; }

    /// <summary>Emitter voltage of a pass transistor, the voltage over its sense resistor [V].</summary>
    public double SenseVoltage { get; init; }

    /// <summary>Sense resistance of the leg in this corner and nominal [ohm].</summary>
    public double SenseResistance { get; init; }

    /// <summary>Nominal sense resistance of the leg [ohm].</summary>
    public double NominalSense { get; init; }

    /// <summary>Legs that this point stands for.</summary>
    public int Count { get; init; }
}

/// <summary>One resistor in a solved state, SI units.</summary>
/// <param name="Slot">Which references this point stands for.</param>
/// <param name="Role">Its role.</param>
/// <param name="Part">The part's row.</param>
/// <param name="Resistance">Its resistance in this corner [ohm].</param>
/// <param name="Voltage">Magnitude of the voltage across it [V].</param>
/// <param name="Current">Magnitude of the current through it [A].</param>
public readonly record struct ResistorPoint(
    int Slot, Role Role, ResistorPart Part, double Resistance, double Voltage, double Current)
{
    /// <summary>Resistors that this point stands for.</summary>
    public int Count { get; init; } = 1;

    /// <summary>Dissipation of one [W].</summary>
    public double Power => Voltage * Current;
}

/// <summary>
/// The edge of regulation of a corner at h = 0: the lowest base voltage at which the control collects (k' - 1) times the sum
/// of the base currents, and what flows there.
/// </summary>
/// <param name="Exists">False: no such voltage below the pin level.</param>
/// <param name="BaseVoltage">That voltage [V].</param>
/// <param name="SumBaseCurrent">Sum of the pass transistors' base currents there [A].</param>
/// <param name="Available">What pin level, source resistance, feed and pull-down deliver into the base node there [A].</param>
/// <param name="Factor">k' = max(drive factor, 1.2).</param>
public readonly record struct DriveEdge(bool Exists, double BaseVoltage, double SumBaseCurrent, double Available, double Factor)
{
    /// <summary>Collector current of the control there [A].</summary>
    public double ControlCurrent { get; init; }
}

/// <summary>One solved corner of one channel in one state, SI units: what a rule reads.</summary>
public sealed class SolvedState
{
    /// <summary>On, off or unfed.</summary>
    public required ChannelState State { get; init; }

    /// <summary>The corner.</summary>
    public required Corner Corner { get; init; }

    /// <summary>Index of the corner in its enumeration (ties go to the lowest).</summary>
    public int Index { get; init; }

    /// <summary>False: the solver gave up; nothing in this state may be judged.</summary>
    public bool Solved { get; init; } = true;

    /// <summary>Base node [V].</summary>
    public double BaseVoltage { get; init; }

    /// <summary>Base of the control transistor [V].</summary>
    public double ControlBaseVoltage { get; init; }

    /// <summary>Common collectors, the low end of the load [V].</summary>
    public double CollectorVoltage { get; init; }

    /// <summary>Load current [A].</summary>
    public double LoadCurrent { get; init; }

    /// <summary>Current out of the pin into this channel [A].</summary>
    public double PinCurrent { get; init; }

    /// <summary>False where the pin's current exceeds the current at which its level is guaranteed.</summary>
    public bool PinGuaranteed { get; init; } = true;

    /// <summary>False where a pass transistor's current lies beyond a factor 3 of its gain points.</summary>
    public bool GainGuaranteed { get; init; } = true;

    /// <summary>False where the control's current lies beyond a factor 3 of its gain points: the outermost value is held.</summary>
    public bool ControlGainGuaranteed { get; init; } = true;

    /// <summary>True where supply is at its minimum and load drop at its maximum.</summary>
    public bool LowestHeadroom { get; init; }

    /// <summary>Transistors: one point for every leg group, then the control.</summary>
    public required IReadOnlyList<TransistorPoint> Transistors { get; init; }

    /// <summary>Resistors.</summary>
    public required IReadOnlyList<ResistorPoint> Resistors { get; init; }

    /// <summary>The circuit that was solved, as numbers; null: the state was not solved.</summary>
    public SinkCircuit? Circuit { get; init; }

    /// <summary>Heating between transistors of one package; 0 is the control, from 1 the transistors in order. Empty: none share one.</summary>
    public IReadOnlyList<PackageCoupling> Package { get; init; } = [];

    /// <summary>By how much elements of other channels warm each device, the control first [K]; empty: nothing does.</summary>
    public IReadOnlyList<double> Warmed { get; init; } = [];

    /// <summary>Edge of regulation (state on, h = 0); null elsewhere.</summary>
    public DriveEdge? Drive { get; init; }
}
