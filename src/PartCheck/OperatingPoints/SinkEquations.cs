using PartCheck.Devices;

namespace PartCheck.OperatingPoints;

/// <summary>Which condition closes the base node.</summary>
internal enum BaseNodeCondition
{
    /// <summary>Kirchhoff: what feed and pull-down deliver flows into the control's collector and the pass bases.</summary>
    Fed,

    /// <summary>Edge of regulation: the control collects (k' - 1) times the sum of the pass bases.</summary>
    Edge,

    /// <summary>The base node is held at a voltage, whatever it takes.</summary>
    Driven,
}

/// <summary>
/// Residuals and Jacobian of one channel. The unknowns are every transistor's internal junction voltages, the voltage
/// over the load's junctions (unfed: of the floating collectors) and, where it heats itself, the junction temperature:
/// all else is explicit in them, so that no node is solved for twice and a zero averaging resistance is no special case.
/// Index of device d: 0 the control, 1 .. G the leg groups; vbe at 2d, vbc at 2d+1, the load at 2(G+1), temperatures after it.
/// </summary>
internal sealed class SinkEquations
{
    private const int MaximumUnknowns = 4 * 9;
    private readonly BipolarCurrents[] currents = new BipolarCurrents[9];
    private readonly double[] emitter = new double[9];
    private readonly double[] spread = new double[9];
    private readonly BipolarAtTemperature[] devices = new BipolarAtTemperature[9];
    private readonly double[] deviceTemperature = new double[9];
    private readonly BipolarDevice?[] deviceOf = new BipolarDevice?[9];

    /// <summary>Residuals.</summary>
    public double[] Residual { get; } = new double[MaximumUnknowns];

    /// <summary>Scale of each residual: the sum of the magnitudes that should cancel.</summary>
    public double[] Scale { get; } = new double[MaximumUnknowns];

    /// <summary>Jacobian, row by row, <see cref="Count"/> columns.</summary>
    public double[] Jacobian { get; } = new double[MaximumUnknowns * MaximumUnknowns];

    /// <summary>Unknowns in use.</summary>
    public int Count { get; private set; }

    /// <summary>Index of the load's unknown.</summary>
    public int LoadIndex { get; private set; }

    /// <summary>Index of device d's temperature; -1: it does not heat itself or is held.</summary>
    public int[] TemperatureIndex { get; } = new int[9];

    /// <summary>Temperature at which device d is held; NaN: not held.</summary>
    public double[] HeldAt { get; } = new double[9];

    /// <summary>The circuit.</summary>
    public SinkCircuit Circuit { get; private set; } = null!;

    /// <summary>What closes the base node.</summary>
    public BaseNodeCondition Condition { get; private set; }

    /// <summary>k' of the edge of regulation.</summary>
    public double EdgeFactor { get; private set; }

    /// <summary>Voltage at which a driven base node is held [V].</summary>
    public double DrivenVoltage { get; set; }

    /// <summary>Sum of the pass transistors' base currents at the last point evaluated [A].</summary>
    public double SumBaseCurrent { get; private set; }

    /// <summary>Share of the pin's source voltage that is switched on: 1, less on the way there.</summary>
    public double SourceShare { get; set; } = 1;

    /// <summary>Share of the thermal resistances that counts: 1, less on the way there.</summary>
    public double HeatShare { get; set; } = 1;

    public double BaseVoltage { get; private set; }

    public double ControlBaseVoltage { get; private set; }

    public double CollectorVoltage { get; private set; }

    public double LoadCurrent { get; private set; }

    public double AveragingCurrent(int device) => spread[device];

    public ref readonly BipolarCurrents Currents(int device) => ref currents[device];

    public double EmitterVoltage(int device) => emitter[device];

    public ref readonly BipolarAtTemperature Device(int device) => ref devices[device];

    public JunctionHeat Heat(int device) => device == 0 ? Circuit.ControlHeat : Circuit.Legs[device - 1].Heat;

    /// <summary>Takes a circuit and lays out its unknowns; <see cref="HeldAt"/> must be set first.</summary>
    public void Lay(SinkCircuit circuit, BaseNodeCondition condition, double edgeFactor, bool heated)
    {
        Circuit = circuit;
        Condition = condition;
        EdgeFactor = edgeFactor;
        int count = 2 * (circuit.Legs.Count + 1);
        LoadIndex = count++;
        for (int d = 0; d <= circuit.Legs.Count; d++)
        {
            bool heats = heated && double.IsNaN(HeldAt[d])
                && (Heat(d).RthJa > 0 || (d == 0 && HasCoupling(circuit)) || IsHeatedInPackage(circuit, d));
            TemperatureIndex[d] = heats ? count++ : -1;
        }

        Count = count;
    }

    /// <summary>Temperature of device d at a point.</summary>
    public double Temperature(int device, double[] x) =>
        TemperatureIndex[device] >= 0 ? x[TemperatureIndex[device]]
        : double.IsNaN(HeldAt[device]) ? Heat(device).Base
        : HeldAt[device];

    /// <summary>Fills residuals, scales and Jacobian at a point.</summary>
    public void Evaluate(double[] x)
    {
        int n = Count;
        Array.Clear(Jacobian, 0, n * n);
        Array.Clear(Residual, 0, n);
        Array.Clear(Scale, 0, n);
        SinkCircuit c = Circuit;
        int groups = c.Legs.Count;
        for (int d = 0; d <= groups; d++)
        {
            double t = Temperature(d, x);
            BipolarDevice device = d == 0 ? c.Control : c.Legs[d - 1].Pass;
            if (deviceTemperature[d] != t || !ReferenceEquals(deviceOf[d], device))
            {
                devices[d] = device.At(t);
                deviceTemperature[d] = t;
                deviceOf[d] = device;
            }

            devices[d].Evaluate(x[2 * d], x[(2 * d) + 1], out currents[d]);
        }

        // Control: emitter at ground, so base and collector terminals are explicit.
        ref BipolarCurrents q0 = ref currents[0];
        double re0 = c.Control.Parameters.Re;
        double rc0 = c.Control.Parameters.Rc;
        double inner = ((q0.Ic + q0.Ib) * re0) + x[0];
        ControlBaseVoltage = inner + (q0.Ib * q0.Rbb);
        BaseVoltage = inner - x[1] + (q0.Ic * rc0);
        Slopes innerSlope = new(
            1 + ((q0.DIc.Vbe + q0.DIb.Vbe) * re0), (q0.DIc.Vbc + q0.DIb.Vbc) * re0, (q0.DIc.T + q0.DIb.T) * re0);
        Slopes dVx = new(
            innerSlope.Vbe + (q0.DIb.Vbe * q0.Rbb) + (q0.Ib * q0.DRbb.Vbe),
            innerSlope.Vbc + (q0.DIb.Vbc * q0.Rbb) + (q0.Ib * q0.DRbb.Vbc),
            innerSlope.T + (q0.DIb.T * q0.Rbb) + (q0.Ib * q0.DRbb.T));
        Slopes dVb = new(
            innerSlope.Vbe + (q0.DIc.Vbe * rc0), innerSlope.Vbc - 1 + (q0.DIc.Vbc * rc0), innerSlope.T + (q0.DIc.T * rc0));

        double w = x[LoadIndex];
        double dVc;
        double dLoad;
        if (c.Load is null)
        {
            LoadCurrent = 0;
            dLoad = 0;
            CollectorVoltage = w;
            dVc = 1;
        }
        else
        {
            LoadCurrent = c.Load.Current(w, out dLoad);
            double series = c.Load.IsResistor ? 0 : c.Load.Series;
            CollectorVoltage = c.Supply - w - (LoadCurrent * series);
            dVc = -1 - (dLoad * series);
        }

        double vb = BaseVoltage;
        double vx = ControlBaseVoltage;
        double vc = CollectorVoltage;
        int rowLoad = LoadIndex;
        double sumBase = 0;
        double absBase = 0;

        // Row 0: base node. Row 1: control base. Load row: collectors.
        Residual[1] = -q0.Ib;
        Scale[1] = Math.Abs(q0.Ib);
        AddControl(1, q0.DIb, -1);
        Residual[rowLoad] = c.BaseLeakage - LoadCurrent;
        Scale[rowLoad] = Math.Abs(LoadCurrent) + c.BaseLeakage;
        At(rowLoad, rowLoad) = -dLoad;
        int rowHeat0 = TemperatureIndex[0];
        int hottest = c.HottestLegCoupling > 0 ? Hottest(vb, vc, x) : 0;
        double heat0 = 0;

        for (int g = 1; g <= groups; g++)
        {
            LegGroup leg = c.Legs[g - 1];
            ref BipolarCurrents q = ref currents[g];
            BipolarParameters p = leg.Pass.Parameters;
            double m = leg.Count;
            double ie = q.Ic + q.Ib;
            double inside = vb - (q.Ib * q.Rbb);
            double ve = inside - x[2 * g] - (ie * p.Re);
            emitter[g] = ve;
            Slopes dIe = new(q.DIc.Vbe + q.DIb.Vbe, q.DIc.Vbc + q.DIb.Vbc, q.DIc.T + q.DIb.T);
            Slopes dInside = new(
                -(q.DIb.Vbe * q.Rbb) - (q.Ib * q.DRbb.Vbe),
                -(q.DIb.Vbc * q.Rbb) - (q.Ib * q.DRbb.Vbc),
                -(q.DIb.T * q.Rbb) - (q.Ib * q.DRbb.T));
            Slopes dVe = new(
                dInside.Vbe - 1 - (dIe.Vbe * p.Re), dInside.Vbc - (dIe.Vbc * p.Re), dInside.T - (dIe.T * p.Re));
            double throughSense = ve / leg.Sense;
            double j = ie - throughSense;

            // Emitter: Ve - Ra (IE - Ve/Rs) = Vx when sensed, IE = Ve/Rs when not.
            int rowE = 2 * g;
            if (leg.Sensed)
            {
                spread[g] = j;
                double share = 1 + (leg.Averaging / leg.Sense);
                Residual[rowE] = ve - (leg.Averaging * j) - vx;
                Scale[rowE] = Math.Abs(ve) + Math.Abs(vx) + 1;
                AddOwn(rowE, g, dVe, share);
                AddOwn(rowE, g, dIe, -leg.Averaging);
                AddControl(rowE, dVb, share);
                AddControl(rowE, dVx, -1);

                Residual[1] += m * j;
                Scale[1] += m * (Math.Abs(ie) + Math.Abs(throughSense));
                AddOwn(1, g, dIe, m);
                AddOwn(1, g, dVe, -m / leg.Sense);
                AddControl(1, dVb, -m / leg.Sense);
            }
            else
            {
                spread[g] = 0;
                Residual[rowE] = j;
                Scale[rowE] = Math.Abs(ie) + Math.Abs(throughSense);
                AddOwn(rowE, g, dIe, 1);
                AddOwn(rowE, g, dVe, -1 / leg.Sense);
                AddControl(rowE, dVb, -1 / leg.Sense);
            }

            // Collector: the terminal stands at the joined collectors.
            int rowC = rowE + 1;
            Residual[rowC] = inside - x[rowC] + (q.Ic * p.Rc) - vc;
            Scale[rowC] = Math.Abs(inside) + Math.Abs(vc) + 1;
            AddOwn(rowC, g, dInside, 1);
            AddOwn(rowC, g, q.DIc, p.Rc);
            At(rowC, rowC) -= 1;
            AddControl(rowC, dVb, 1);
            At(rowC, rowLoad) -= dVc;

            Residual[rowLoad] += m * q.Ic;
            Scale[rowLoad] += m * (Math.Abs(q.Ic) + Math.Abs(q.Ib));
            AddOwn(rowLoad, g, q.DIc, m);

            sumBase += m * q.Ib;
            absBase += m * Math.Abs(q.Ib);
            double weight = Condition switch { BaseNodeCondition.Fed => m, BaseNodeCondition.Edge => m * (EdgeFactor - 1), _ => 0 };
            AddOwn(0, g, q.DIb, -weight);

            // Heat.
            double vce = vc - ve;
            double power = (vce * q.Ic) + ((vb - ve) * q.Ib);
            Slopes dPower = new(
                (vce * q.DIc.Vbe) + ((vb - ve) * q.DIb.Vbe) - (dVe.Vbe * ie),
                (vce * q.DIc.Vbc) + ((vb - ve) * q.DIb.Vbc) - (dVe.Vbc * ie),
                (vce * q.DIc.T) + ((vb - ve) * q.DIb.T) - (dVe.T * ie));
            int rowT = TemperatureIndex[g];
            if (rowT >= 0)
            {
                AddHeat(rowT, g, HeatShare * leg.Heat.RthJa, power, dPower, dVb, q.Ic, dVc);
                Residual[rowT] += x[rowT] - leg.Heat.Base;
                Scale[rowT] = Math.Abs(x[rowT]);
                At(rowT, rowT) += 1;
            }

            double coupling = HeatShare * ((m * leg.Coupling) + (g == hottest ? c.HottestLegCoupling * leg.Heat.RthJa : 0));
            for (int k = 0; k < c.Package.Count; k++)
            {
                PackageCoupling pair = c.Package[k];
                if (pair.By == g && pair.Heated == 0)
                {
                    coupling += HeatShare * pair.Rth;
                }
                else if (pair.By == g && TemperatureIndex[pair.Heated] is >= 0 and int heated)
                {
                    // Its own row: a leg of the same group beside it. AddHeat takes the residual of that alone.
                    Residual[heated] -= heated == rowT ? 0 : HeatShare * pair.Rth * power;
                    AddHeat(heated, g, HeatShare * pair.Rth, power, dPower, dVb, q.Ic, dVc);
                }
            }

            heat0 += coupling * power;
            if (rowHeat0 >= 0 && coupling > 0)
            {
                AddHeat(rowHeat0, g, coupling, power, dPower, dVb, q.Ic, dVc);
            }
        }

        SumBaseCurrent = sumBase;
        double conductance = 1 / c.FeedResistance;
        if (Condition == BaseNodeCondition.Fed)
        {
            double source = c.FeedVoltage * SourceShare;
            Residual[0] = ((source - vb) * conductance) - (vb * c.BaseConductance) + c.BaseLeakage - q0.Ic - sumBase;
            Scale[0] = ((Math.Abs(source) + Math.Abs(vb)) * conductance) + Math.Abs(q0.Ic) + absBase;
            AddControl(0, dVb, -conductance - c.BaseConductance);
            AddControl(0, q0.DIc, -1);
        }
        else if (Condition == BaseNodeCondition.Driven)
        {
            Residual[0] = vb - DrivenVoltage;
            Scale[0] = 1;
            AddControl(0, dVb, 1);
        }
        else
        {
            Residual[0] = q0.Ic - ((EdgeFactor - 1) * sumBase);
            Scale[0] = Math.Abs(q0.Ic) + ((EdgeFactor - 1) * absBase);
            AddControl(0, q0.DIc, 1);
        }

        bool heats = false;
        for (int k = 0; k < c.Package.Count; k++)
        {
            heats |= c.Package[k].By == 0;
        }

        if (rowHeat0 >= 0 || heats)
        {
            double rth = HeatShare * c.ControlHeat.RthJa;
            double power = (vb * q0.Ic) + (vx * q0.Ib);
            Slopes dPower = new(
                (dVb.Vbe * q0.Ic) + (vb * q0.DIc.Vbe) + (dVx.Vbe * q0.Ib) + (vx * q0.DIb.Vbe),
                (dVb.Vbc * q0.Ic) + (vb * q0.DIc.Vbc) + (dVx.Vbc * q0.Ib) + (vx * q0.DIb.Vbc),
                (dVb.T * q0.Ic) + (vb * q0.DIc.T) + (dVx.T * q0.Ib) + (vx * q0.DIb.T));
            if (rowHeat0 >= 0)
            {
                Residual[rowHeat0] = x[rowHeat0] - c.ControlHeat.Base - (rth * power) - heat0;
                Scale[rowHeat0] = Math.Abs(x[rowHeat0]);
                AddControl(rowHeat0, dPower, -rth);
                At(rowHeat0, rowHeat0) += 1;
            }

            for (int k = 0; heats && k < c.Package.Count; k++)
            {
                if (c.Package[k].By == 0 && TemperatureIndex[c.Package[k].Heated] is >= 0 and int heated)
                {
                    Residual[heated] -= HeatShare * c.Package[k].Rth * power;
                    AddControl(heated, dPower, -HeatShare * c.Package[k].Rth);
                }
            }
        }
    }

    /// <summary>Power of device d at the last point evaluated [W].</summary>
    public double Power(int device)
    {
        ref BipolarCurrents q = ref currents[device];
        return device == 0
            ? (BaseVoltage * q.Ic) + (ControlBaseVoltage * q.Ib)
            : ((CollectorVoltage - emitter[device]) * q.Ic) + ((BaseVoltage - emitter[device]) * q.Ib);
    }

    private static bool IsHeatedInPackage(SinkCircuit circuit, int device)
    {
        for (int k = 0; k < circuit.Package.Count; k++)
        {
            if (circuit.Package[k].Heated == device && circuit.Package[k].Rth > 0)
            {
                return true;
            }
        }

        return false;
    }

    private static bool HasCoupling(SinkCircuit circuit)
    {
        if (circuit.HottestLegCoupling > 0)
        {
            return true;
        }

        foreach (LegGroup leg in circuit.Legs)
        {
            if (leg.Coupling > 0)
            {
                return true;
            }
        }

        return false;
    }

    /// <summary>The leg group whose dissipation heats its junction most.</summary>
    private int Hottest(double vb, double vc, double[] x)
    {
        int best = 1;
        double most = double.NegativeInfinity;
        for (int g = 1; g <= Circuit.Legs.Count; g++)
        {
            ref BipolarCurrents q = ref currents[g];
            double ie = q.Ic + q.Ib;
            double ve = vb - (q.Ib * q.Rbb) - x[2 * g] - (ie * Circuit.Legs[g - 1].Pass.Parameters.Re);
            double rise = Circuit.Legs[g - 1].Heat.RthJa * (((vc - ve) * q.Ic) + ((vb - ve) * q.Ib));
            if (rise > most)
            {
                most = rise;
                best = g;
            }
        }

        return best;
    }

    private ref double At(int row, int column) => ref Jacobian[(row * Count) + column];

    /// <summary>Adds factor x slope of a quantity of device g in its own unknowns.</summary>
    private void AddOwn(int row, int device, in Slopes slopes, double factor)
    {
        int start = row * Count;
        Jacobian[start + (2 * device)] += factor * slopes.Vbe;
        Jacobian[start + (2 * device) + 1] += factor * slopes.Vbc;
        int t = TemperatureIndex[device];
        if (t >= 0)
        {
            Jacobian[start + t] += factor * slopes.T;
        }
    }

    private void AddControl(int row, in Slopes slopes, double factor) => AddOwn(row, 0, slopes, factor);

    /// <summary>Subtracts rth x power of leg g from a temperature's row (Ve moves with Vb, Vc with the load).</summary>
    private void AddHeat(
        int row, int device, double rth, double power, in Slopes dPower, in Slopes dVb, double ic, double dVc)
    {
        Residual[row] -= row == TemperatureIndex[device] ? rth * power : 0;
        AddOwn(row, device, dPower, -rth);
        AddControl(row, dVb, rth * ic);
        At(row, LoadIndex) -= rth * ic * dVc;
    }
}
