using PartCheck.Channels;

namespace PartCheck.OperatingPoints;

/// <summary>Solves corners of a box one after the other, each from the one before. One a thread and chunk.</summary>
public sealed class CornerSolver
{
    private readonly SinkSolver solver = new();
    private readonly StartPoint start = new();
    private readonly StartPoint edgeStart = new();
    private readonly ChannelModel model;
    private readonly PinSource pin;
    private readonly double? driveFactor;
    private int edgeOf = -1;
    private OperatingPoint? edge;
    private bool edgeFailed;

    /// <summary>Makes a solver for a channel.</summary>
    /// <param name="model">The channel.</param>
    /// <param name="pin">Its pin.</param>
    /// <param name="driveFactor">k' = max(drive factor, 1.2) of the edge of regulation; null: it is not solved.</param>
    public CornerSolver(ChannelModel model, PinSource pin, double? driveFactor)
    {
        this.model = model;
        this.pin = pin;
        this.driveFactor = driveFactor;
    }

    /// <summary>The solved state of a corner.</summary>
    /// <param name="box">The box.</param>
    /// <param name="index">The corner's index.</param>
    /// <param name="offset">Added to the index in the state, where a channel has several boxes.</param>
    public SolvedState Solve(ChannelBox box, int index, int offset = 0)
    {
        ArgumentNullException.ThrowIfNull(box);
        return Solve(box, box.At(index), index, offset);
    }

    /// <summary>The solved state of a point inside the box.</summary>
    /// <param name="box">The box.</param>
    /// <param name="inside">The point.</param>
    /// <param name="offset">Index of the state.</param>
    public SolvedState SolveInside(ChannelBox box, in BoxCorner inside, int offset)
    {
        ArgumentNullException.ThrowIfNull(box);
        edgeOf = -1;
        SolvedState state = Solve(box, inside, 0, offset);
        edgeOf = -1;
        return state;
    }

    private SolvedState Solve(ChannelBox box, in BoxCorner at, int index, int offset)
    {
        OperatingPoint? point = solver.Solve(at.Circuit, start);
        if (point is null)
        {
            return Unsolved(box, at, offset + index);
        }

        DriveEdge? drive = null;
        if (driveFactor is { } factor && box.State == ChannelState.On && at.Corner.Heat == 0 && at.Corner.OddPass.Vbe != Extreme.Match)
        {
            if (edgeOf != index / box.InnerCount)
            {
                edgeOf = index / box.InnerCount;
                edge = solver.SolveEdge(at.Circuit, factor, edgeStart);
                edgeFailed = solver.Failure is not null;
            }

            if (edgeFailed)
            {
                return Unsolved(box, at, offset + index);
            }

            drive = Edge(at.Circuit, edge, factor);
        }

        return StateAssembly.Build(model, pin, box.State, at, box.OddClass, point, drive, offset + index);
    }

    internal static SolvedState Unsolved(ChannelBox box, in BoxCorner at, int index) => new()
    {
        State = box.State,
        Corner = at.Corner,
        Index = index,
        Solved = false,
        Transistors = [],
        Resistors = [],
    };

    /// <summary>The edge of regulation as the rule reads it: what one corner's pin, feed and pull-down deliver there.</summary>
    internal static DriveEdge Edge(SinkCircuit circuit, OperatingPoint? edge, double factor)
    {
        if (edge is null)
        {
            return new DriveEdge(false, 0, 0, 0, factor);
        }

        double sum = 0;
        for (int g = 0; g < circuit.Legs.Count; g++)
        {
            sum += circuit.Legs[g].Count * edge.Legs[g].Ib;
        }

        double available = ((circuit.FeedVoltage - edge.BaseVoltage) / circuit.FeedResistance)
            - (edge.BaseVoltage * circuit.BaseConductance);
        return new DriveEdge(edge.BaseVoltage < circuit.PinVoltage, edge.BaseVoltage, sum, available, factor) { ControlCurrent = edge.Control.Ic };
    }
}
