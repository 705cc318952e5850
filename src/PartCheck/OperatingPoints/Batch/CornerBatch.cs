using PartCheck.Channels;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>
/// Solves consecutive corners of a box side by side, each block of eight from the one before: what <see cref="CornerSolver"/>
/// gives one after the other, which stays the oracle and solves the corners that a block leaves. One a thread and chunk.
/// </summary>
public sealed class CornerBatch
{
    private const int Width = TransistorLanes.Width;
    private readonly ChannelModel model;
    private readonly PinSource pin;
    private readonly double? driveFactor;
    private readonly CircuitLanes lanes = new();
    private readonly CircuitLanes edgeLanes = new();
    private readonly LaneSolution solution = new();
    private readonly LaneSolver solver = new();
    private readonly LaneSolver edgeSolver = new();
    private readonly SinkSolver scalar = new();

    /// <summary>Makes a batch for a channel.</summary>
    /// <param name="model">The channel.</param>
    /// <param name="pin">Its pin.</param>
    /// <param name="driveFactor">k' = max(drive factor, 1.2) of the edge of regulation; null: it is not solved.</param>
    public CornerBatch(ChannelModel model, PinSource pin, double? driveFactor)
    {
        this.model = model;
        this.pin = pin;
        this.driveFactor = driveFactor;
    }

    /// <summary>States solved so far.</summary>
    public long Solved { get; private set; }

    /// <summary>States among them that were left to the scalar solver.</summary>
    public long LeftToScalar { get; private set; }

    /// <summary>Solves corners and hands each state on, in the order of the index.</summary>
    /// <param name="box">The box.</param>
    /// <param name="from">First index, a multiple of <see cref="ChannelBox.InnerCount"/>.</param>
    /// <param name="to">Index behind the last.</param>
    /// <param name="offset">Added to the index in the state, where a channel has several boxes.</param>
    /// <param name="visit">Takes a state.</param>
    public void Solve(ChannelBox box, int from, int to, int offset, Action<SolvedState> visit)
    {
        ArgumentNullException.ThrowIfNull(box);
        ArgumentNullException.ThrowIfNull(visit);
        ArgumentOutOfRangeException.ThrowIfNotEqual(from % box.InnerCount, 0, nameof(from));
        int inner = box.InnerCount;

        // As many corners as eight edges of regulation serve.
        int stride = Width * inner;
        BoxCorner[] corners = new BoxCorner[stride];
        OperatingPoint?[] points = new OperatingPoint?[stride];
        OperatingPoint?[] edges = new OperatingPoint?[Width];
        bool[] edgeFailed = new bool[Width];
        solver.Forget();
        edgeSolver.Forget();
        for (int start = from; start < to; start += stride)
        {
            int count = Math.Min(stride, to - start);
            for (int i = 0; i < count; i++)
            {
                corners[i] = box.At(start + i);
            }

            Solve(corners, count, points);
            SolveEdges(box, corners, count, edges, edgeFailed);
            for (int i = 0; i < count; i++)
            {
                bool hasEdge = HasEdge(box, corners[i].Corner);
                visit(points[i] is not { } point || (hasEdge && edgeFailed[i / inner])
                    ? CornerSolver.Unsolved(box, corners[i], offset + start + i)
                    : StateAssembly.Build(
                        model, pin, box.State, corners[i], box.OddClass, point,
                        hasEdge ? CornerSolver.Edge(corners[i].Circuit, edges[i / inner], driveFactor!.Value) : null, offset + start + i));
            }
        }
    }

    private void Solve(BoxCorner[] corners, int count, OperatingPoint?[] points)
    {
        for (int block = 0; block < count; block += Width)
        {
            int used = Math.Min(Width, count - block);
            lanes.Begin(CircuitShape.Of(corners[block].Circuit));
            for (int i = 0; i < used; i++)
            {
                lanes.Set(i, corners[block + i].Circuit);
            }

            lanes.Repeat(used - 1);
            solver.Solve(lanes, solution);
            for (int i = 0; i < used; i++)
            {
                SinkCircuit circuit = corners[block + i].Circuit;
                points[block + i] = solution.IsSolved(i) ? solution.Point(circuit, i) : scalar.Solve(circuit);
                Solved++;
                LeftToScalar += solution.IsSolved(i) ? 0 : 1;
            }
        }
    }

    /// <summary>The edges of regulation, one for each <see cref="ChannelBox.InnerCount"/> corners.</summary>
    private void SolveEdges(ChannelBox box, BoxCorner[] corners, int count, OperatingPoint?[] edges, bool[] failed)
    {
        int inner = box.InnerCount;
        int used = (count + inner - 1) / inner;
        int first = -1;
        for (int i = 0; i < used; i++)
        {
            if (HasEdge(box, corners[i * inner].Corner))
            {
                first = first < 0 ? i : first;
            }
        }

        if (first < 0)
        {
            return;
        }

        // Lanes without an edge (h = 1) repeat one that has.
        edgeLanes.Begin(CircuitShape.Of(corners[first * inner].Circuit));
        for (int i = 0; i < Width; i++)
        {
            bool own = i < used && HasEdge(box, corners[i * inner].Corner);
            edgeLanes.Set(i, corners[(own ? i : first) * inner].Circuit);
        }

        edgeSolver.Solve(edgeLanes, solution, driveFactor);
        for (int i = 0; i < used; i++)
        {
            if (!HasEdge(box, corners[i * inner].Corner))
            {
                continue;
            }

            SinkCircuit circuit = corners[i * inner].Circuit;
            Solved++;
            failed[i] = false;
            if (solution.IsSolved(i) && edgeSolver.Regulates(i))
            {
                edges[i] = solution.Point(circuit, i);
                continue;
            }

            LeftToScalar++;
            edges[i] = scalar.SolveEdge(circuit, driveFactor!.Value);
            failed[i] = scalar.Failure is not null;
        }
    }

    private bool HasEdge(ChannelBox box, Corner corner) =>
        driveFactor is not null && box.State == ChannelState.On && corner.Heat == 0 && corner.OddPass.Vbe != Extreme.Match;
}
