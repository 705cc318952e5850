using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using Lanes = System.Runtime.Intrinsics.Vector512<double>;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>Eight solved circuits, SI units: what <see cref="OperatingPoint"/> holds, lane by lane.</summary>
public sealed class LaneSolution
{
    private const int Width = TransistorLanes.Width;
    private const int ChannelFields = 4;
    private const int DeviceFields = 6;
    private readonly double[] values = new double[(ChannelFields + (9 * DeviceFields)) * Width];

    /// <summary>Lanes that are solved, a bit each; the others are left to the scalar solver.</summary>
    public int Solved { get; internal set; }

    /// <summary>Newton steps of the slowest lane.</summary>
    public int Iterations { get; internal set; }

    /// <summary>True where a lane is solved.</summary>
    public bool IsSolved(int lane) => ((Solved >> lane) & 1) != 0;

    public double BaseVoltage(int lane) => values[lane];

    public double ControlBaseVoltage(int lane) => values[Width + lane];

    public double CollectorVoltage(int lane) => values[(2 * Width) + lane];

    public double LoadCurrent(int lane) => values[(3 * Width) + lane];

    public double Ic(int device, int lane) => Value(device, 0, lane);

    public double Ib(int device, int lane) => Value(device, 1, lane);

    public double EmitterVoltage(int device, int lane) => Value(device, 2, lane);

    public double Temperature(int device, int lane) => Value(device, 3, lane);

    public double VbeSlope(int device, int lane) => Value(device, 4, lane);

    public double BaseResistance(int device, int lane) => Value(device, 5, lane);

    internal void Store(Lanes baseVoltage, Lanes controlBase, Lanes collector, Lanes load)
    {
        baseVoltage.StoreUnsafe(ref Row(0));
        controlBase.StoreUnsafe(ref Row(1));
        collector.StoreUnsafe(ref Row(2));
        load.StoreUnsafe(ref Row(3));
    }

    internal void Store(int device, in TransistorCurrents q, Lanes emitter, Lanes temperature)
    {
        int row = ChannelFields + (device * DeviceFields);
        q.Ic.StoreUnsafe(ref Row(row));
        q.Ib.StoreUnsafe(ref Row(row + 1));
        emitter.StoreUnsafe(ref Row(row + 2));
        temperature.StoreUnsafe(ref Row(row + 3));
        Lanes conducts = Vector512.GreaterThan(q.IcVbe, Lanes.Zero);
        (-(q.IcT / q.IcVbe) & conducts).StoreUnsafe(ref Row(row + 4));
        q.Rbb.StoreUnsafe(ref Row(row + 5));
    }

    /// <summary>One lane as the scalar solver would return it.</summary>
    public OperatingPoint Point(SinkCircuit circuit, int lane)
    {
        double vb = BaseVoltage(lane);
        double vc = CollectorVoltage(lane);
        double vx = ControlBaseVoltage(lane);
        SolvedTransistor[] legs = new SolvedTransistor[circuit.Legs.Count];
        double[] averaging = new double[legs.Length];
        for (int g = 0; g < legs.Length; g++)
        {
            int d = g + 1;
            double ve = EmitterVoltage(d, lane);
            legs[g] = new SolvedTransistor(Ic(d, lane), Ib(d, lane), vb, vc, ve, Temperature(d, lane), false)
            {
                VbeSlope = VbeSlope(d, lane),
                BaseResistance = BaseResistance(d, lane),
            };
            averaging[g] = circuit.Legs[g].Sensed ? Ic(d, lane) + Ib(d, lane) - (ve / circuit.Legs[g].Sense) : 0;
        }

        double feed = (circuit.FeedVoltage - vb) / circuit.FeedResistance;
        double pinNode = vb + (feed * circuit.Feed);
        bool atPin = circuit.PullDownAt == Channels.PullDownAt.Pin;
        return new OperatingPoint
        {
            BaseVoltage = vb,
            ControlBaseVoltage = vx,
            CollectorVoltage = vc,
            LoadCurrent = LoadCurrent(lane),
            FeedCurrent = feed,
            PinCurrent = feed + (atPin ? pinNode / circuit.PullDown : 0),
            Control = new SolvedTransistor(Ic(0, lane), Ib(0, lane), vx, vb, 0, Temperature(0, lane), false)
            {
                BaseResistance = BaseResistance(0, lane),
            },
            Legs = legs,
            AveragingCurrents = averaging,
            Iterations = Iterations,
        };
    }

    private double Value(int device, int field, int lane) =>
        values[((ChannelFields + (device * DeviceFields) + field) * Width) + lane];

    private ref double Row(int row) => ref values[row * Width];
}
