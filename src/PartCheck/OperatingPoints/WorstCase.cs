using PartCheck.Channels;
using PartCheck.OperatingPoints.Batch;
using PartCheck.Quantities;

namespace PartCheck.OperatingPoints;

/// <summary>
/// The room's door: every corner of a channel, solved, by full enumeration; the nominal state; the state with the pin low.
/// Corners are solved in chunks of fixed length, each chunk from a cold start, so that no number depends on the thread count.
/// </summary>
public static class WorstCase
{
    private const int ChunkLength = 1024;

    /// <summary>Visits every corner in the states on and unfed.</summary>
    /// <typeparam name="T">What a chunk accumulates.</typeparam>
    /// <param name="model">The channel.</param>
    /// <param name="pin">Its pin.</param>
    /// <param name="driveFactor">Drive factor of the derating table.</param>
    /// <param name="threads">Threads to use; 0: all.</param>
    /// <param name="make">Makes a chunk's accumulator.</param>
    /// <param name="visit">Takes a solved state into it.</param>
    /// <param name="cancel">Stops the enumeration.</param>
    /// <returns>The accumulators in corner order.</returns>
    public static IReadOnlyList<T> Enumerate<T>(
        ChannelModel model, PinSource pin, double driveFactor, int threads, Func<T> make, Action<T, SolvedState> visit, CancellationToken cancel) =>
        Enumerate(model, pin, Boxes(model, pin), Math.Max(driveFactor, 1.2), threads, make, visit, cancel);

    /// <summary>The same, each corner solved by itself by the scalar solver: the oracle of the batch.</summary>
    public static IReadOnlyList<T> EnumerateOneByOne<T>(
        ChannelModel model, PinSource pin, double driveFactor, int threads, Func<T> make, Action<T, SolvedState> visit, CancellationToken cancel) =>
        Enumerate(model, pin, Boxes(model, pin), Math.Max(driveFactor, 1.2), threads, make, visit, cancel, sideBySide: false);

    /// <summary>
    /// The same over given boxes; <paramref name="edge"/> is k', null: the edge of regulation is not solved; <paramref name="sideBySide"/>:
    /// in lanes, else one by one (and so where legs heat each other inside packages, of which lanes know nothing).
    /// </summary>
    internal static IReadOnlyList<T> Enumerate<T>(
        ChannelModel model, PinSource pin, IReadOnlyList<ChannelBox> boxes, double? edge, int threads, Func<T> make,
        Action<T, SolvedState> visit, CancellationToken cancel, bool sideBySide = true)
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(make);
        ArgumentNullException.ThrowIfNull(visit);
        List<(ChannelBox Box, int From, int To, int Offset)> chunks = [];
        int offset = 0;
        foreach (ChannelBox box in boxes)
        {
            for (int from = 0; from < box.Count; from += ChunkLength)
            {
                chunks.Add((box, from, Math.Min(from + ChunkLength, box.Count), offset));
            }

            offset += box.Count;
        }

        T[] results = new T[chunks.Count];
        ParallelOptions options = new() { CancellationToken = cancel, MaxDegreeOfParallelism = threads > 0 ? threads : -1 };
        Parallel.For(0, chunks.Count, options, i =>
        {
            (ChannelBox box, int from, int to, int shift) = chunks[i];
            T accumulator = make();
            if (sideBySide && !model.Package.HasPartners)
            {
                new CornerBatch(model, pin, edge).Solve(box, from, to, shift, state => visit(accumulator, state));
            }
            else
            {
                CornerSolver solver = new(model, pin, edge);
                for (int index = from; index < to; index++)
                {
                    visit(accumulator, solver.Solve(box, index, shift));
                }
            }

            results[i] = accumulator;
        });
        return results;
    }

    /// <summary>
    /// The boxes of a channel: on, unfed and, where its current is asked for, off; each distinct odd leg, on once more with one lot's match.
    /// </summary>
    public static IReadOnlyList<ChannelBox> Boxes(ChannelModel model, PinSource pin)
    {
        ArgumentNullException.ThrowIfNull(model);
        List<ChannelBox> boxes = [.. OnBoxes(model, pin)];
        for (int c = 0; c < model.Classes.Count && model.Channel.Legs.Count > 1; c++)
        {
            if (model.Pass[c].Part.VbeMatch is not null)
            {
                boxes.Add(new ChannelBox(model, pin, ChannelState.On, c, matched: true));
            }
        }

        boxes.AddRange(OfState(model, pin, ChannelState.Unfed));
        if (model.Channel.Conditions.OffCurrentMax is not null)
        {
            boxes.AddRange(OfState(model, pin, ChannelState.Off));
        }

        return boxes;
    }

    /// <summary>The boxes of the state on, each distinct odd leg.</summary>
    internal static IReadOnlyList<ChannelBox> OnBoxes(ChannelModel model, PinSource pin) => OfState(model, pin, ChannelState.On);

    private static IReadOnlyList<ChannelBox> OfState(ChannelModel model, PinSource pin, ChannelState state) =>
        model.Channel.Legs.Count == 1
            ? [new ChannelBox(model, pin, state, -1)]
            : [.. Enumerable.Range(0, model.Classes.Count).Select(c => new ChannelBox(model, pin, state, c))];

    /// <summary>The nominal state at 25 degC ambient; null where the solver gave up.</summary>
    public static SolvedState? Nominal(ChannelModel model, PinSource pin)
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(pin);
        SinkCircuit circuit = CircuitAssembly.BuildNominal(model, pin, PhysicalConstants.RoomTemperature);
        OperatingPoint? point = new SinkSolver().Solve(circuit);
        ChannelConditions c = model.Channel.Conditions;
        Corner corner = new()
        {
            Supply = circuit.Supply,
            LoadDrop = (c.LoadDrop.Min.Volts + c.LoadDrop.Max.Volts) / 2,
            Ambient = PhysicalConstants.RoomTemperature,
            PinLevel = pin.NominalVoltage,
            PinResistance = pin.NominalResistance,
            Heat = model.Heats ? 1 : 0,
        };
        return point is null ? null : StateAssembly.BuildByLeg(model, ChannelState.On, corner, circuit, point);
    }

    /// <summary>
    /// The state with the pin at 0 V, the supply at its maximum, every part nominal, no self-heating: what the voltage rules
    /// read in the state off (there the transistors stand under the whole supply). Null where the solver gave up.
    /// </summary>
    public static SolvedState? PinLow(ChannelModel model, double ambient)
    {
        ArgumentNullException.ThrowIfNull(model);
        ChannelConditions c = model.Channel.Conditions;
        Corner corner = new()
        {
            Supply = c.Supply.Max.Volts,
            LoadDrop = c.LoadDrop.Min.Volts,
            Ambient = ambient,
            PinLevel = 0,
            PinResistance = 0,
            Heat = 0,
        };
        SinkCircuit nominal = CircuitAssembly.BuildNominal(model, new PinSource(model.Channel.Logic), ambient);
        SinkCircuit circuit = nominal with
        {
            PinVoltage = 0,
            PinResistance = 0,
            Supply = corner.Supply,
            Load = model.Load[0],
            ControlHeat = nominal.ControlHeat with { RthJa = 0 },
            Legs = [.. nominal.Legs.Select(l => l with { Heat = l.Heat with { RthJa = 0 }, Coupling = 0 })],
            HottestLegCoupling = 0,
            Package = [],
        };
        OperatingPoint? point = new SinkSolver().Solve(circuit);
        return point is null ? null : StateAssembly.BuildByLeg(model, ChannelState.Off, corner, circuit, point);
    }
}
