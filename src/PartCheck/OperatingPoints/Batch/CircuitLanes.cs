using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using Lanes = System.Runtime.Intrinsics.Vector512<double>;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>What circuits must have in common to be solved side by side.</summary>
/// <param name="Legs">Leg groups, 1 to 8.</param>
/// <param name="Fed">False: unfed, the collectors float.</param>
/// <param name="Resistor">True: the load is a pure resistance.</param>
public readonly record struct CircuitShape(int Legs, bool Fed, bool Resistor)
{
    public static CircuitShape Of(SinkCircuit circuit) =>
        new(circuit.Legs.Count, circuit.Load is not null, circuit.Load is { IsResistor: true });
}

/// <summary>Eight circuits of one shape side by side: <see cref="SinkCircuit"/> as lanes, SI units.</summary>
public sealed class CircuitLanes
{
    private const int Source = 0;
    private const int Conductance = 1;
    private const int BaseConductanceField = 2;
    private const int Leakage = 3;
    private const int SupplyField = 4;
    private const int EmissionField = 5;
    private const int InverseEmissionField = 6;
    private const int DropField = 7;
    private const int ScaleField = 8;
    private const int FloorField = 9;
    private const int SeriesField = 10;
    private const int CriticalField = 11;
    private const int HottestField = 12;
    private const int ChannelFields = 13;
    private const int InverseSenseField = 0;
    private const int AveragingField = 1;
    private const int ShareField = 2;
    private const int SensedField = 3;
    private const int CountField = 4;
    private const int CouplingField = 5;
    private const int BaseTemperatureField = 6;
    private const int RthField = 7;
    private const int LimitField = 8;
    private const int DeviceFields = 9;
    private const int Width = TransistorLanes.Width;
    private readonly double[] values = new double[(ChannelFields + (9 * DeviceFields)) * Width];

    /// <summary>The shape of all lanes.</summary>
    public CircuitShape Shape { get; private set; }

    /// <summary>True where a junction of some lane heats itself (or the control's is heated by a leg).</summary>
    public bool Heated { get; private set; }

    /// <summary>The transistors: the control, then the leg groups.</summary>
    internal TransistorLanes[] Devices { get; } = [.. Enumerable.Range(0, 9).Select(_ => new TransistorLanes())];

    internal Lanes FeedVoltage => Channel(Source);

    internal Lanes FeedConductance => Channel(Conductance);

    internal Lanes BaseConductance => Channel(BaseConductanceField);

    internal Lanes BaseLeakage => Channel(Leakage);

    internal Lanes Supply => Channel(SupplyField);

    internal Lanes Emission => Channel(EmissionField);

    internal Lanes InverseEmission => Channel(InverseEmissionField);

    internal Lanes ReferenceDrop => Channel(DropField);

    internal Lanes LoadScale => Channel(ScaleField);

    internal Lanes LoadFloor => Channel(FloorField);

    internal Lanes Series => Channel(SeriesField);

    internal Lanes LoadCritical => Channel(CriticalField);

    internal Lanes HottestLegCoupling => Channel(HottestField);

    internal Lanes InverseSense(int device) => Leg(device, InverseSenseField);

    internal Lanes Averaging(int device) => Leg(device, AveragingField);

    internal Lanes Share(int device) => Leg(device, ShareField);

    internal Lanes Sensed(int device) => Leg(device, SensedField);

    internal Lanes Count(int device) => Leg(device, CountField);

    internal Lanes Coupling(int device) => Leg(device, CouplingField);

    internal Lanes BaseTemperature(int device) => Leg(device, BaseTemperatureField);

    internal Lanes Rth(int device) => Leg(device, RthField);

    internal Lanes Limit(int device) => Leg(device, LimitField);

    /// <summary>Starts a new set of lanes.</summary>
    public void Begin(CircuitShape shape)
    {
        Shape = shape;
        Heated = false;
    }

    /// <summary>Puts a circuit into a lane.</summary>
    /// <exception cref="ArgumentException">Transistors share a package: lanes know no heat between them, the scalar solver does.</exception>
    public void Set(int lane, SinkCircuit circuit)
    {
        if (circuit.Package.Count > 0)
        {
            throw new ArgumentException($"The circuit has {circuit.Package.Count} couplings inside packages; lanes take none.", nameof(circuit));
        }

        Put(Source, lane, circuit.FeedVoltage);
        Put(Conductance, lane, 1 / circuit.FeedResistance);
        Put(BaseConductanceField, lane, circuit.BaseConductance);
        Put(Leakage, lane, circuit.BaseLeakage);
        Put(SupplyField, lane, circuit.Supply);
        Put(HottestField, lane, circuit.HottestLegCoupling);
        Heated |= circuit.HottestLegCoupling > 0 || circuit.ControlHeat.RthJa > 0;
        if (circuit.Load is { } load)
        {
            Set(lane, load);
        }

        Devices[0].Set(lane, circuit.Control);
        SetHeat(0, lane, circuit.ControlHeat);
        for (int g = 0; g < circuit.Legs.Count; g++)
        {
            Set(g + 1, lane, circuit.Legs[g]);
        }
    }

    /// <summary>Copies a lane into those behind it, so that every lane holds a circuit.</summary>
    public void Repeat(int lane)
    {
        for (int to = lane + 1; to < Width; to++)
        {
            for (int i = 0; i < values.Length; i += Width)
            {
                values[i + to] = values[i + lane];
            }

            for (int d = 0; d <= Shape.Legs; d++)
            {
                Devices[d].Set(to, Devices[d].At(lane));
            }
        }
    }

    private void Set(int lane, LoadElement load)
    {
        Put(EmissionField, lane, load.EmissionVoltage);
        Put(InverseEmissionField, lane, load.IsResistor ? 0 : 1 / load.EmissionVoltage);
        Put(DropField, lane, load.FirstGuess);
        Put(ScaleField, lane, load.IsResistor ? 1 / load.Series : load.JunctionScale);
        Put(FloorField, lane, load.JunctionFloor);
        Put(SeriesField, lane, load.IsResistor ? 0 : load.Series);
        Put(CriticalField, lane, load.IsResistor ? 0 : load.CriticalVoltage);
    }

    private void Set(int device, int lane, LegGroup leg)
    {
        // Unsensed: Ve - Rs IE = 0, sensed: (1 + Ra/Rs) Ve - Ra IE - Vx = 0: one form.
        PutLeg(device, InverseSenseField, lane, 1 / leg.Sense);
        PutLeg(device, AveragingField, lane, leg.Sensed ? leg.Averaging : leg.Sense);
        PutLeg(device, ShareField, lane, leg.Sensed ? 1 + (leg.Averaging / leg.Sense) : 1);
        PutLeg(device, SensedField, lane, leg.Sensed ? 1 : 0);
        PutLeg(device, CountField, lane, leg.Count);
        PutLeg(device, CouplingField, lane, leg.Coupling);
        Devices[device].Set(lane, leg.Pass);
        SetHeat(device, lane, leg.Heat);
        Heated |= leg.Coupling > 0;
    }

    private void SetHeat(int device, int lane, in JunctionHeat heat)
    {
        PutLeg(device, BaseTemperatureField, lane, heat.Base);
        PutLeg(device, RthField, lane, heat.RthJa);
        PutLeg(device, LimitField, lane, heat.Limit);
        Heated |= heat.RthJa > 0;
    }

    private void Put(int field, int lane, double value) => values[(field * Width) + lane] = value;

    private void PutLeg(int device, int field, int lane, double value) =>
        values[((ChannelFields + (device * DeviceFields) + field) * Width) + lane] = value;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Lanes Channel(int field) =>
        Vector512.LoadUnsafe(ref MemoryMarshal.GetArrayDataReference(values), (nuint)(field * Width));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Lanes Leg(int device, int field) =>
        Vector512.LoadUnsafe(ref MemoryMarshal.GetArrayDataReference(values), (nuint)((ChannelFields + (device * DeviceFields) + field) * Width));
}
