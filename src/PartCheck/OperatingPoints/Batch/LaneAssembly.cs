using System.Runtime.Intrinsics;
using Lanes = System.Runtime.Intrinsics.Vector512<double>;

namespace PartCheck.OperatingPoints.Batch;

/// <content>Residuals of eight circuits and the elimination of each transistor's own unknowns (equations: <see cref="SinkEquations"/>).</content>
public sealed partial class LaneSolver
{
    private Lanes baseVoltage;
    private Lanes controlBase;
    private Lanes collector;
    private Lanes loadCurrent;
    private Lanes inverseCollectorSlope;
    private Response baseRow;
    private Response controlRow;
    private Response loadRow;
    private Response heatOfLegs;

    /// <summary>Evaluates at the unknowns.</summary>
    /// <param name="final">True: no step follows; only the slopes that a solution carries are made.</param>
    /// <returns>Lanes whose currents and voltages balance (final only).</returns>
    private Lanes Assemble(bool final)
    {
        bool slopes = heated || final;
        int legs = c.Shape.Legs;
        for (int d = 0; d <= legs; d++)
        {
            if (heated)
            {
                c.Devices[d].Bring(kelvins[d]);
            }

            c.Devices[d].Evaluate(vbe[d], vbc[d], slopes, out currents[d]);
        }

        ref TransistorCurrents q0 = ref currents[0];
        Lanes re0 = c.Devices[0].Re;
        Lanes rc0 = c.Devices[0].Rc;
        Lanes inner = ((q0.Ic + q0.Ib) * re0) + vbe[0];
        controlBase = inner + (q0.Ib * q0.Rbb);
        baseVoltage = inner - vbc[0] + (q0.Ic * rc0);
        Lanes loadSlope = Load();
        Lanes balanced = Lanes.AllBitsSet;
        controlRow = default;
        loadRow = default;
        baseRow = default;
        heatOfLegs = default;
        controlRow.Constant = -q0.Ib;
        loadRow.Constant = c.BaseLeakage - loadCurrent;
        Lanes controlScale = Vector512.Abs(q0.Ib);
        Lanes loadScale = Vector512.Abs(loadCurrent) + c.BaseLeakage;
        Lanes baseScale = Lanes.Zero;
        Lanes weight = Vector512.Create(edge is { } factor ? 1 - factor : -1);
        for (int g = 1; g <= legs; g++)
        {
            ref TransistorCurrents q = ref currents[g];
            Lanes count = c.Count(g);
            Lanes ie = q.Ic + q.Ib;
            Lanes inside = baseVoltage - (q.Ib * q.Rbb);
            Lanes ve = inside - vbe[g] - (ie * c.Devices[g].Re);
            emitter[g] = ve;
            Lanes throughSense = ve * c.InverseSense(g);
            Lanes sensed = c.Sensed(g);
            Lanes ofEmitter = (c.Share(g) * ve) - (c.Averaging(g) * ie) - (sensed * controlBase);
            Lanes ofCollector = inside - vbc[g] + (q.Ic * c.Devices[g].Rc) - collector;
            Lanes counted = count * sensed;
            controlRow.Constant += counted * (ie - throughSense);
            loadRow.Constant += count * q.Ic;
            baseRow.Constant += weight * count * q.Ib;
            if (final)
            {
                balanced &= Vector512.LessThanOrEqual(Vector512.Abs(ofEmitter), Vector512.Create(EmitterBalance))
                    & Vector512.LessThanOrEqual(Vector512.Abs(ofCollector), Vector512.Create(CollectorBalance));
                controlScale += counted * (Vector512.Abs(ie) + Vector512.Abs(throughSense));
                loadScale += count * (Vector512.Abs(q.Ic) + Vector512.Abs(q.Ib));
                baseScale += count * Vector512.Abs(q.Ib);
            }
            else
            {
                EliminateLeg(g, inside, ofEmitter, ofCollector, counted, weight * count);
            }
        }

        CloseBaseNode(q0, ref baseScale);
        if (final)
        {
            return balanced & Balanced(controlRow.Constant, controlScale) & Balanced(loadRow.Constant, loadScale)
                & Balanced(baseRow.Constant, baseScale) & HeatBalances();
        }

        loadRow.Vc -= loadSlope * inverseCollectorSlope;
        EliminateControl();
        return balanced;
    }

    /// <summary>As the scalar solver: below 10 fA (10 fV) rounding of the voltages decides.</summary>
    private static Lanes Balanced(Lanes residual, Lanes scale) => Vector512.LessThanOrEqual(
        Vector512.Abs(residual), Vector512.MaxNative(scale * BalanceTolerance, Vector512.Create(1e-14)));

    private void CloseBaseNode(in TransistorCurrents q0, ref Lanes scale)
    {
        scale += Vector512.Abs(q0.Ic);
        if (edge is not null)
        {
            baseRow.Constant += q0.Ic;
            return;
        }

        Lanes feed = c.FeedConductance;
        baseRow.Constant += ((c.FeedVoltage - baseVoltage) * feed) - (baseVoltage * c.BaseConductance) + c.BaseLeakage - q0.Ic;
        baseRow.Vb -= feed + c.BaseConductance;
        scale += (Vector512.Abs(c.FeedVoltage) + Vector512.Abs(baseVoltage)) * feed;
    }

    /// <summary>Load current and collector voltage; returns the current's slope with the load's unknown.</summary>
    private Lanes Load()
    {
        if (!c.Shape.Fed)
        {
            loadCurrent = Lanes.Zero;
            collector = load;
            inverseCollectorSlope = Lanes.One;
            return Lanes.Zero;
        }

        Lanes slope;
        if (c.Shape.Resistor)
        {
            slope = c.LoadScale;
            loadCurrent = load * slope;
        }
        else
        {
            Lanes exponential = ElementaryFunctions.Exp((load - c.ReferenceDrop) * c.InverseEmission);
            slope = c.LoadScale * exponential * c.InverseEmission;
            loadCurrent = c.LoadScale * (exponential - c.LoadFloor);
        }

        collector = c.Supply - load - (loadCurrent * c.Series);
        inverseCollectorSlope = -(Lanes.One / (Lanes.One + (slope * c.Series)));
        return slope;
    }

    /// <summary>Power of a device at the last point [W].</summary>
    private Lanes PowerOf(int device)
    {
        ref TransistorCurrents q = ref currents[device];
        return device == 0
            ? (baseVoltage * q.Ic) + (controlBase * q.Ib)
            : ((collector - emitter[device]) * q.Ic) + ((baseVoltage - emitter[device]) * q.Ib);
    }

    /// <summary>Heating of the control by a leg [K/W]: each leg's own coupling, and the hottest leg's share where none is given.</summary>
    private Lanes CouplingOf(int device)
    {
        Lanes coupling = c.Count(device) * c.Coupling(device);
        Lanes share = c.HottestLegCoupling;
        if (share == Lanes.Zero)
        {
            return coupling;
        }

        Lanes hottest = Lanes.AllBitsSet;
        Lanes rise = c.Rth(device) * PowerOf(device);
        for (int g = 1; g <= c.Shape.Legs; g++)
        {
            Lanes other = c.Rth(g) * PowerOf(g);
            hottest &= g < device ? Vector512.GreaterThan(rise, other) : Vector512.GreaterThanOrEqual(rise, other);
        }

        return coupling + (share * c.Rth(device) & hottest);
    }
}
