using System.Runtime.Intrinsics;
using Lanes = System.Runtime.Intrinsics.Vector512<double>;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>
/// Newton on eight circuits side by side: the equations, unknowns and step limits of <see cref="SinkSolver"/>, which stays the
/// oracle and solves the lanes that this one leaves. Each transistor's own unknowns are eliminated first, so that a step costs a
/// fixed amount for each leg and one system of three for the node voltages. Converged means that the steps have died out and that the
/// currents balance at the point reached. Not thread-safe: one a thread.
/// </summary>
public sealed partial class LaneSolver
{
    private const int AllLanes = (1 << TransistorLanes.Width) - 1;
    private const int StepLimit = 40;
    private const double VoltageTolerance = 2e-7;
    private const double TemperatureTolerance = 2e-5;
    private const double BalanceTolerance = 1e-9;
    private const double EmitterBalance = 1e-12;
    private const double CollectorBalance = 1e-10;

    private readonly Lanes[] vbe = new Lanes[9];
    private readonly Lanes[] vbc = new Lanes[9];
    private readonly Lanes[] kelvins = new Lanes[9];
    private readonly Lanes[] ambient = new Lanes[9];
    private readonly Lanes[] logCurrent = new Lanes[9];
    private readonly TransistorCurrents[] currents = new TransistorCurrents[9];
    private readonly Lanes[] emitter = new Lanes[9];
    private readonly Response[] ofVbe = new Response[9];
    private readonly Response[] ofVbc = new Response[9];
    private readonly Response[] ofKelvins = new Response[9];
    private Lanes load;
    private CircuitShape startShape;
    private CircuitLanes c = null!;
    private bool heated;
    private bool crowded;
    private double? edge;

    /// <summary>Forgets the last solution: the next solve starts cold.</summary>
    public void Forget() => startShape = default;

    /// <summary>True where the control's junction conducts well above its leakage (<see cref="SinkSolver.SolveEdge"/>).</summary>
    public bool Regulates(int lane) => vbe[0][lane] > 3 * c.Devices[0].ForwardVoltage[lane];

    /// <summary>Solves the lanes.</summary>
    /// <param name="circuits">The circuits; every lane must hold one.</param>
    /// <param name="into">Takes the solution, and which lanes are solved.</param>
    /// <param name="edgeFactor">k': the edge of regulation instead of the fed base node; null: fed.</param>
    public void Solve(CircuitLanes circuits, LaneSolution into, double? edgeFactor = null)
    {
        c = circuits;
        edge = edgeFactor;
        heated = circuits.Heated && edgeFactor is null;
        Start();
        Lanes balanced = Lanes.Zero;
        int iterations = 0;
        while (balanced.ExtractMostSignificantBits() != AllLanes && iterations < StepLimit)
        {
            Assemble(final: false);
            iterations++;
            if (Step() == Lanes.Zero || iterations == StepLimit)
            {
                // A lane that is lost (not a number) moves no more, but it does not balance.
                balanced = Assemble(final: true);
            }
        }

        for (int d = 0; d <= c.Shape.Legs; d++)
        {
            balanced &= Vector512.LessThanOrEqual(kelvins[d], c.Limit(d));
            into.Store(d, currents[d], d == 0 ? Lanes.Zero : emitter[d], kelvins[d]);
            logCurrent[d] = (vbe[d] / c.Devices[d].ForwardVoltage) + c.Devices[d].LogSaturation;
        }

        into.Store(baseVoltage, controlBase, collector, loadCurrent);
        into.Solved = (int)balanced.ExtractMostSignificantBits();
        into.Iterations = iterations;
        startShape = into.Solved == AllLanes ? c.Shape : default;
    }

    /// <summary>From the last solution, each junction at its old current; else cold, as the scalar solver starts.</summary>
    private void Start()
    {
        int legs = c.Shape.Legs;
        crowded = false;
        bool warm = startShape == c.Shape && legs > 0;
        if (!warm)
        {
            ColdStart();
        }

        for (int d = 0; d <= legs; d++)
        {
            TransistorLanes device = c.Devices[d];
            kelvins[d] = warm && heated ? kelvins[d] + c.BaseTemperature(d) - ambient[d] : c.BaseTemperature(d);
            ambient[d] = c.BaseTemperature(d);

            device.Bring(kelvins[d]);
            crowded |= device.IsCrowded;
            if (warm)
            {
                // The same current in another device, or at another temperature.
                Lanes moved = (device.ForwardVoltage * (logCurrent[d] - device.LogSaturation)) - vbe[d];
                vbe[d] += moved;
                vbc[d] += moved;
            }
        }
    }

    private void ColdStart()
    {
        Lanes pin = c.FeedVoltage;
        Lanes forward = Vector512.ConditionalSelect(Vector512.GreaterThan(pin, Lanes.One), Vector512.Create(0.6), pin * 0.4);
        Lanes node = Vector512.Min(forward * 2.0, Vector512.Max(pin, Lanes.Zero));
        Lanes drop = Vector512.Min(c.ReferenceDrop, c.Supply);
        Lanes start = c.Shape.Fed ? c.Supply - drop : Vector512.Max(node - forward, Lanes.Zero);
        vbe[0] = forward;
        vbc[0] = forward - node;
        for (int g = 1; g <= c.Shape.Legs; g++)
        {
            vbe[g] = forward;
            vbc[g] = node - start;
        }

        load = c.Shape.Fed ? drop : start;
    }

    /// <summary>Solves for the node voltages, then every unknown takes its limited step. Returns the lanes that still move.</summary>
    private Lanes Step()
    {
        Inverse3 m = Inverse3.Of(
            controlRow.Vb, controlRow.Vx, controlRow.Vc,
            loadRow.Vb, loadRow.Vx, loadRow.Vc,
            baseRow.Vb, baseRow.Vx, baseRow.Vc);
        Lanes vb = -m.First(controlRow.Constant, loadRow.Constant, baseRow.Constant);
        Lanes vx = -m.Second(controlRow.Constant, loadRow.Constant, baseRow.Constant);
        Lanes vc = -m.Third(controlRow.Constant, loadRow.Constant, baseRow.Constant);
        Lanes largest = Lanes.Zero;
        Lanes warmest = Lanes.Zero;
        for (int d = 0; d <= c.Shape.Legs; d++)
        {
            TransistorLanes device = c.Devices[d];
            Lanes forward = ofVbe[d].At(vb, vx, vc);
            Lanes reverse = ofVbc[d].At(vb, vx, vc);
            Lanes limit = device.ForwardVoltage * 2.0;
            if (Vector512.GreaterThanAny(Vector512.Abs(forward), limit) || Vector512.GreaterThanAny(Vector512.Abs(reverse), limit))
            {
                forward = Junction(vbe[d], forward, device.ForwardVoltage, device.Critical(device.ForwardVoltage));
                reverse = Junction(vbc[d], reverse, device.ReverseVoltage, device.Critical(device.ReverseVoltage));
            }

            vbe[d] += forward;
            vbc[d] += reverse;
            largest = Vector512.MaxNative(largest, Vector512.MaxNative(Vector512.Abs(forward), Vector512.Abs(reverse)));
            if (heated)
            {
                Lanes step = Vector512.MaxNative(Vector512.MinNative(ofKelvins[d].At(vb, vx, vc), Vector512.Create(40.0)), Vector512.Create(-40.0));
                kelvins[d] = Vector512.MaxNative(Vector512.MinNative(kelvins[d] + step, Vector512.Create(900.0)), Vector512.Create(100.0));
                warmest = Vector512.MaxNative(warmest, Vector512.Abs(step));
            }
        }

        Lanes shift = vc * inverseCollectorSlope;
        if (c.Shape.Fed && !c.Shape.Resistor)
        {
            shift = Junction(load, shift, c.Emission, c.LoadCritical);
        }

        load += shift;
        largest = Vector512.MaxNative(largest, Vector512.Abs(shift));

        // The slope of a crowded base resistance is left to iteration: there the steps die out by a factor, not by squares.
        double tolerance = crowded ? VoltageTolerance / 1000 : VoltageTolerance;
        Lanes still = Vector512.LessThanOrEqual(largest, Vector512.Create(tolerance))
            & Vector512.LessThanOrEqual(warmest, Vector512.Create(TemperatureTolerance));
        return ~still;
    }

    /// <summary>The logarithmic limit of <see cref="SinkSolver"/>.</summary>
    private static Lanes Junction(Lanes old, Lanes step, Lanes scale, Lanes critical)
    {
        Lanes next = old + step;
        Lanes limited = Vector512.GreaterThan(next, critical) & Vector512.GreaterThan(Vector512.Abs(step), scale * 2.0);
        if (limited == Lanes.Zero)
        {
            return step;
        }

        Lanes argument = Lanes.One + (step / scale);
        Lanes forward = Vector512.ConditionalSelect(
            Vector512.GreaterThan(argument, Lanes.Zero),
            scale * ElementaryFunctions.Log(Vector512.Max(argument, Vector512.Create(1e-300))),
            Vector512.Max(critical, old - (scale * 10.0)) - old);
        Lanes fromBelow = (scale * ElementaryFunctions.Log(Vector512.Max(next / scale, Vector512.Create(1.01)))) - old;
        return Vector512.ConditionalSelect(
            limited, Vector512.ConditionalSelect(Vector512.GreaterThan(old, Lanes.Zero), forward, fromBelow), step);
    }
}
