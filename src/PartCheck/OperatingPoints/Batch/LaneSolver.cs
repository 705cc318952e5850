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
    private const int StepLimit = 40;
    private const double VoltageTolerance = 2e-7;
    private const double TemperatureTolerance = 2e-5;
    private const double BalanceTolerance = 1e-9;

    private readonly Lanes[] vbe = new Lanes[9];
    private readonly Lanes[] vbc = new Lanes[9];
    private readonly Lanes[] kelvins = new Lanes[9];
    private readonly Lanes[] ambient = new Lanes[9];
    private readonly Lanes[] charge = new Lanes[9];
    private readonly TransistorCurrents[] currents = new TransistorCurrents[9];
    private readonly Lanes[] emitter = new Lanes[9];
    private readonly Response[] ofVbe = new Response[9];
    private readonly Response[] ofVbc = new Response[9];
    private readonly Response[] ofKelvins = new Response[9];
    private Lanes load;
    private CircuitShape startShape;
    private CircuitLanes c = null!;
    private bool heated;
    private double? edge;

    /// <summary>Forgets the last solution: the next solve starts cold.</summary>
    public void Forget() => startShape = default;

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
        Lanes open = Lanes.AllBitsSet;
        Lanes failed = Lanes.Zero;
        Lanes balanced = Lanes.Zero;
        int iterations = 0;
        for (; iterations < StepLimit && open != Lanes.Zero; iterations++)
        {
            Assemble(final: false);
            Step(out Lanes moving, out Lanes lost);
            failed |= lost;
            open = Vector512.AndNot(moving, failed);
            if (open == Lanes.Zero)
            {
                balanced = Assemble(final: true);
                open = Vector512.AndNot(~balanced, failed);
            }
        }

        if (open != Lanes.Zero)
        {
            balanced = Vector512.AndNot(Assemble(final: true), open);
        }

        for (int d = 0; d <= c.Shape.Legs; d++)
        {
            balanced &= Vector512.LessThanOrEqual(kelvins[d], c.Limit(d));
            into.Store(d, currents[d], d == 0 ? Lanes.Zero : emitter[d], kelvins[d]);
            charge[d] = c.Devices[d].LogSaturation;
        }

        into.Store(baseVoltage, controlBase, collector, loadCurrent);
        into.Solved = (int)Vector512.AndNot(balanced, failed).ExtractMostSignificantBits();
        into.Iterations = iterations;
        startShape = into.Solved == 0xFF ? c.Shape : default;
    }

    /// <summary>From the last solution, each junction at its old current; else cold, as the scalar solver starts.</summary>
    private void Start()
    {
        int legs = c.Shape.Legs;
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

            Lanes before = device.ForwardVoltage;
            device.Bring(kelvins[d]);
            if (warm)
            {
                // The same current in another device, or at another temperature.
                Lanes moved = (device.ForwardVoltage * ((vbe[d] / before) + charge[d] - device.LogSaturation)) - vbe[d];
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

    /// <summary>Solves for the node voltages, then every unknown takes its limited step.</summary>
    private void Step(out Lanes moving, out Lanes lost)
    {
        Inverse3 m = Inverse3.Of(
            controlRow.Vb, controlRow.Vx, controlRow.Vc,
            loadRow.Vb, loadRow.Vx, loadRow.Vc,
            baseRow.Vb, baseRow.Vx, baseRow.Vc);
        Lanes vb = -((m.M00 * controlRow.Constant) + (m.M01 * loadRow.Constant) + (m.M02 * baseRow.Constant));
        Lanes vx = -((m.M10 * controlRow.Constant) + (m.M11 * loadRow.Constant) + (m.M12 * baseRow.Constant));
        Lanes vc = -((m.M20 * controlRow.Constant) + (m.M21 * loadRow.Constant) + (m.M22 * baseRow.Constant));
        moving = Lanes.Zero;
        Lanes sum = Lanes.Zero;
        for (int d = 0; d <= c.Shape.Legs; d++)
        {
            TransistorLanes device = c.Devices[d];
            vbe[d] += Bounded(vbe[d], ofVbe[d].At(vb, vx, vc), device.ForwardVoltage, device, ref moving, ref sum);
            vbc[d] += Bounded(vbc[d], ofVbc[d].At(vb, vx, vc), device.ReverseVoltage, device, ref moving, ref sum);
            if (heated)
            {
                Lanes step = Vector512.Max(Vector512.Min(ofKelvins[d].At(vb, vx, vc), Vector512.Create(40.0)), Vector512.Create(-40.0));
                Lanes next = Vector512.Max(Vector512.Min(kelvins[d] + step, Vector512.Create(900.0)), Vector512.Create(100.0));
                moving |= Vector512.GreaterThan(Vector512.Abs(step), Vector512.Create(TemperatureTolerance));
                sum += step;
                kelvins[d] = next;
            }
        }

        Lanes shift = vc * inverseCollectorSlope;
        if (c.Shape.Fed && !c.Shape.Resistor)
        {
            shift = Junction(load, shift, c.Emission, c.LoadCritical);
        }

        moving |= Vector512.GreaterThan(Vector512.Abs(shift), (Lanes.One + Vector512.Abs(load)) * VoltageTolerance);
        sum += shift;
        load += shift;
        lost = ~Vector512.LessThan(Vector512.Abs(sum), Vector512.Create(1e12));
    }

    private static Lanes Bounded(Lanes old, Lanes step, Lanes scale, TransistorLanes device, ref Lanes moving, ref Lanes sum)
    {
        if (Vector512.GreaterThanAny(Vector512.Abs(step), scale * 2.0))
        {
            Lanes critical = scale * (Vector512.Log(scale * (1 / Math.Sqrt(2))) - device.LogSaturation);
            step = Junction(old, step, scale, critical);
        }

        moving |= Vector512.GreaterThan(Vector512.Abs(step), (Lanes.One + Vector512.Abs(old)) * VoltageTolerance);
        sum += step;
        return step;
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
            scale * Vector512.Log(Vector512.Max(argument, Vector512.Create(1e-300))),
            Vector512.Max(critical, old - (scale * 10.0)) - old);
        Lanes fromBelow = (scale * Vector512.Log(Vector512.Max(next / scale, Vector512.Create(1.01)))) - old;
        return Vector512.ConditionalSelect(
            limited, Vector512.ConditionalSelect(Vector512.GreaterThan(old, Lanes.Zero), forward, fromBelow), step);
    }
}
