using PartCheck.Channels;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>
/// Solves corners of a box side by side, each block of eight from the one before: what <see cref="CornerSolver"/> gives one after the
/// other, which stays the oracle and solves the corners that a block leaves. One a thread and chunk.
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
    private readonly List<int> edgeOf = [];
    private readonly List<SinkCircuit> edgeCircuits = [];
    private readonly List<(OperatingPoint? Point, bool Failed)> edges = [];
    private BoxCorner[] corners = [];
    private OperatingPoint?[] points = [];

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

    /// <summary>States solved so far, edges of regulation among them.</summary>
    public long Solved { get; private set; }

    /// <summary>States among them that were left to the scalar solver.</summary>
    public long LeftToScalar { get; private set; }

    /// <summary>Solves consecutive corners, from a cold start.</summary>
    /// <param name="box">The box.</param>
    /// <param name="from">First index.</param>
    /// <param name="to">Index behind the last.</param>
    /// <param name="offset">Added to the index in the state, where a channel has several boxes.</param>
    /// <param name="visit">Takes each state, in the order of the index.</param>
    public void Solve(ChannelBox box, int from, int to, int offset, Action<SolvedState> visit)
    {
        ArgumentNullException.ThrowIfNull(box);
        Forget();

        // As many corners as eight edges of regulation serve.
        int[] indices = new int[Width * box.InnerCount];
        for (int start = from; start < to; start += indices.Length)
        {
            int count = Math.Min(indices.Length, to - start);
            for (int i = 0; i < count; i++)
            {
                indices[i] = start + i;
            }

            Solve(box, indices.AsSpan(0, count), offset, visit);
        }
    }

    /// <summary>The next corner is solved from a cold start.</summary>
    public void Forget()
    {
        solver.Forget();
        edgeSolver.Forget();
    }

    /// <summary>Solves any corners, from the ones before.</summary>
    /// <param name="box">The box.</param>
    /// <param name="indices">Their indices.</param>
    /// <param name="offset">Added to the index in the state, where a channel has several boxes.</param>
    /// <param name="visit">Takes each state, in the order of <paramref name="indices"/>.</param>
    public void Solve(ChannelBox box, ReadOnlySpan<int> indices, int offset, Action<SolvedState> visit)
    {
        ArgumentNullException.ThrowIfNull(box);
        ArgumentNullException.ThrowIfNull(visit);
        if (corners.Length < indices.Length)
        {
            corners = new BoxCorner[indices.Length];
            points = new OperatingPoint?[indices.Length];
        }

        for (int i = 0; i < indices.Length; i++)
        {
            corners[i] = box.At(indices[i]);
        }

        SolvePoints(indices.Length);
        CollectEdges(box, indices);
        SolveEdges();
        for (int i = 0; i < indices.Length; i++)
        {
            int slot = HasEdge(box, corners[i].Corner) ? edgeOf.IndexOf(indices[i] / box.InnerCount) : -1;
            visit(points[i] is not { } point || (slot >= 0 && edges[slot].Failed)
                ? CornerSolver.Unsolved(box, corners[i], offset + indices[i])
                : StateAssembly.Build(
                    model, pin, box.State, corners[i], box.OddClass, point,
                    slot >= 0 ? CornerSolver.Edge(corners[i].Circuit, edges[slot].Point, driveFactor!.Value) : null, offset + indices[i]));
        }
    }

    private void SolvePoints(int count)
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

    /// <summary>The edge does not depend on pin, feed and pull-down: one serves <see cref="ChannelBox.InnerCount"/> corners.</summary>
    private void CollectEdges(ChannelBox box, ReadOnlySpan<int> indices)
    {
        edgeOf.Clear();
        edgeCircuits.Clear();
        edges.Clear();
        for (int i = 0; i < indices.Length; i++)
        {
            int outer = indices[i] / box.InnerCount;
            if (HasEdge(box, corners[i].Corner) && !edgeOf.Contains(outer))
            {
                edgeOf.Add(outer);
                edgeCircuits.Add(corners[i].Circuit);
            }
        }
    }

    private void SolveEdges()
    {
        for (int block = 0; block < edgeCircuits.Count; block += Width)
        {
            int used = Math.Min(Width, edgeCircuits.Count - block);
            edgeLanes.Begin(CircuitShape.Of(edgeCircuits[block]));
            for (int i = 0; i < used; i++)
            {
                edgeLanes.Set(i, edgeCircuits[block + i]);
            }

            edgeLanes.Repeat(used - 1);
            edgeSolver.Solve(edgeLanes, solution, driveFactor);
            for (int i = 0; i < used; i++)
            {
                SinkCircuit circuit = edgeCircuits[block + i];
                Solved++;
                if (solution.IsSolved(i) && edgeSolver.Regulates(i))
                {
                    edges.Add((solution.Point(circuit, i), false));
                    continue;
                }

                LeftToScalar++;
                OperatingPoint? edge = scalar.SolveEdge(circuit, driveFactor!.Value);
                edges.Add((edge, scalar.Failure is not null));
            }
        }
    }

    private bool HasEdge(ChannelBox box, Corner corner) =>
        driveFactor is not null && box.State == ChannelState.On && corner.Heat == 0 && corner.OddPass.Vbe != Extreme.Match;
}
