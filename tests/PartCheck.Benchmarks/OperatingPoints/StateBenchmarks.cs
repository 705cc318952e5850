using BenchmarkDotNet.Attributes;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.OperatingPoints.Batch;
using PartCheck.Tests.OperatingPoints;

namespace PartCheck.Benchmarks.OperatingPoints;

/// <summary>
/// Time of one solved state on one core. Swept: the circuit and the sweep that ngspice is timed with (printed before the run). Corners:
/// consecutive corners of a one-leg box, every device and resistance of which differs from block to block.
/// </summary>
[MemoryDiagnoser]
public class StateBenchmarks
{
    private const int Swept = 4096;
    private const int Width = 8;
    private readonly LaneSolver solver = new();
    private readonly LaneSolution solution = new();
    private readonly CircuitLanes lanes = new();
    private readonly SinkSolver scalar = new();
    private readonly StartPoint start = new();
    private SinkCircuit[] sweep = [];
    private SinkCircuit[] given = [];
    private SinkCircuit[] heated = [];

    /// <summary>Builds the circuits and times ngspice.</summary>
    [GlobalSetup]
    public void Setup()
    {
        sweep = [.. Enumerable.Range(0, Swept).Select(SweptCircuit.At)];
        ChannelModel model = new(SampleChannel.Channel(1, feed: 4700), p => new TransistorVariants(p));
        ChannelBox box = new(model, new PinSource(model.Channel.Logic), ChannelState.On, -1);
        BoxCorner[] corners = [.. Enumerable.Range(0, box.Count).Select(box.At)];
        given = [.. corners.Where(c => c.Corner.Heat == 0).Take(2048).Select(c => c.Circuit)];
        heated = [.. corners.Where(c => c.Corner.Heat == 1).Take(2048).Select(c => c.Circuit)];
        Console.WriteLine(FormattableString.Invariant($"// ngspice, fastest of 5: {Enumerable.Range(0, 5).Min(_ => SweptCircuit.NgspiceNanoseconds()):0} ns a point"));
    }

    /// <summary>The scalar solver over the sweep, each point from the one before.</summary>
    [Benchmark(OperationsPerInvoke = Swept, Baseline = true)]
    public double ScalarSweep()
    {
        double sum = 0;
        foreach (SinkCircuit circuit in sweep)
        {
            sum += scalar.Solve(circuit, start)!.LoadCurrent;
        }

        return sum;
    }

    /// <summary>The batch over the sweep.</summary>
    [Benchmark(OperationsPerInvoke = Swept)]
    public double BatchSweep() => Batch(sweep);

    /// <summary>Corners of a box at given junction temperatures.</summary>
    [Benchmark(OperationsPerInvoke = 2048)]
    public double BatchCorners() => Batch(given);

    /// <summary>Corners of a box that heat themselves.</summary>
    [Benchmark(OperationsPerInvoke = 2048)]
    public double BatchHeatedCorners() => Batch(heated);

    private double Batch(SinkCircuit[] circuits)
    {
        double sum = 0;
        solver.Forget();
        for (int block = 0; block < circuits.Length; block += Width)
        {
            lanes.Begin(CircuitShape.Of(circuits[block]));
            for (int i = 0; i < Width; i++)
            {
                lanes.Set(i, circuits[block + i]);
            }

            solver.Solve(lanes, solution);
            for (int i = 0; i < Width; i++)
            {
                sum += solution.LoadCurrent(i);
            }
        }

        return sum;
    }
}
