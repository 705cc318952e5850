using PartCheck.Channels;
using PartCheck.Devices;

namespace PartCheck.OperatingPoints;

/// <summary>Thermal surroundings of one transistor.</summary>
/// <param name="Base">Temperature of the junction without dissipation [K].</param>
/// <param name="RthJa">Thermal resistance that counts, h included [K/W]; 0: the junction stays at <paramref name="Base"/>.</param>
/// <param name="Limit">Temperature at which a junction that runs away is held [K].</param>
public readonly record struct JunctionHeat(double Base, double RthJa, double Limit);

/// <summary>Legs that are alike in a corner: solved once, counted <paramref name="Count"/> times.</summary>
/// <param name="Count">How many legs.</param>
/// <param name="Pass">Pass transistor.</param>
/// <param name="Sense">Sense resistance [ohm], above 0.</param>
/// <param name="Averaging">Averaging resistance [ohm]; 0: the emitter is the control's base node.</param>
/// <param name="Sensed">False: the control does not sense these legs.</param>
/// <param name="Heat">Thermal surroundings.</param>
/// <param name="Coupling">Heating of the control's junction by each of these legs, h included [K/W].</param>
public sealed record LegGroup(
    int Count, BipolarDevice Pass, double Sense, double Averaging, bool Sensed, JunctionHeat Heat, double Coupling = 0);

/// <summary>Heating of one device's junction by another's power, inside a package; 0 is the control, from 1 the leg groups.</summary>
/// <param name="Heated">Device that is heated.</param>
/// <param name="By">Device whose power heats it, of one leg where it stands for several.</param>
/// <param name="Rth">Coupling, times the legs of that group in the package, h included [K/W].</param>
public readonly record struct PackageCoupling(int Heated, int By, double Rth);

/// <summary>One channel in one corner as numbers, SI units: what the solver takes.</summary>
public sealed record SinkCircuit
{
    /// <summary>Source voltage of the pin [V].</summary>
    public required double PinVoltage { get; init; }

    /// <summary>Source resistance of the pin [ohm].</summary>
    public double PinResistance { get; init; }

    /// <summary>Feed resistance [ohm], above 0.</summary>
    public required double Feed { get; init; }

    /// <summary>Pull-down resistance [ohm]; infinity: none.</summary>
    public double PullDown { get; init; } = double.PositiveInfinity;

    /// <summary>Where the pull-down sits.</summary>
    public PullDownAt PullDownAt { get; init; }

    /// <summary>Load supply [V]; not read when unfed.</summary>
    public double Supply { get; init; }

    /// <summary>The load; null: unfed, the collectors are joined and floating.</summary>
    public LoadElement? Load { get; init; }

    /// <summary>Control transistor.</summary>
    public required BipolarDevice Control { get; init; }

    /// <summary>Thermal surroundings of the control.</summary>
    public required JunctionHeat ControlHeat { get; init; }

    /// <summary>Leg groups.</summary>
    public required IReadOnlyList<LegGroup> Legs { get; init; }

    /// <summary>Share of the hottest leg's RthJA that heats the control, where no coupling is given [-].</summary>
    public double HottestLegCoupling { get; init; }

    /// <summary>Heating between transistors of one package; empty: none share one.</summary>
    public IReadOnlyList<PackageCoupling> Package { get; init; } = [];

    /// <summary>Leakage injected from the collectors into the base node [A].</summary>
    public double BaseLeakage { get; init; }

    /// <summary>Source voltage behind the feed, the pull-down at the pin folded in (Thevenin) [V].</summary>
    public double FeedVoltage => PullDownAt == PullDownAt.Pin && !double.IsInfinity(PullDown)
        ? PinVoltage * PullDown / (PullDown + PinResistance)
        : PinVoltage;

    /// <summary>Resistance between that source and the base node [ohm].</summary>
    public double FeedResistance => Feed + (PullDownAt == PullDownAt.Pin && !double.IsInfinity(PullDown)
        ? PinResistance * PullDown / (PullDown + PinResistance)
        : PinResistance);

    /// <summary>Conductance from the base node to ground [S].</summary>
    public double BaseConductance => PullDownAt == PullDownAt.Base ? 1 / PullDown : 0;
}
