using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using Lanes = System.Runtime.Intrinsics.Vector512<double>;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>Currents of eight transistors with their slopes, as <see cref="Devices.BipolarCurrents"/>; A suffix names the variable.</summary>
internal struct TransistorCurrents
{
    public Lanes Ic;
    public Lanes IcVbe;
    public Lanes IcVbc;
    public Lanes IcT;
    public Lanes Ib;
    public Lanes IbVbe;
    public Lanes IbVbc;
    public Lanes IbT;
    public Lanes Rbb;
    public Lanes RbbVbe;
    public Lanes RbbVbc;
    public Lanes RbbT;
}

/// <content>The Gummel-Poon equations of <see cref="Devices.BipolarAtTemperature"/>, the same terms in lanes.</content>
internal sealed partial class TransistorLanes
{
    /// <summary>Currents at internal junction voltages.</summary>
    /// <param name="vbe">Internal base-emitter voltage [V].</param>
    /// <param name="vbc">Internal base-collector voltage [V].</param>
    /// <param name="slopes">True: the slopes with temperature, too.</param>
    /// <param name="r">The currents.</param>
    public void Evaluate(Lanes vbe, Lanes vbc, bool slopes, out TransistorCurrents r)
    {
        Lanes one = Lanes.One;
        Lanes beU = vbe * inverseNf;
        Lanes bcU = vbc * inverseNr;
        Lanes beX = Exponential(beU);
        Lanes bcX = Exponential(bcU);
        Lanes beI = isat * LessOne(beU, beX);
        Lanes beG = isat * beX * inverseNf;
        Lanes bcI = isat * LessOne(bcU, bcX);
        Lanes bcG = isat * bcX * inverseNr;

        Lanes inverseVaf = Constant(TransistorField.InverseVaf);
        Lanes inverseVar = Constant(TransistorField.InverseVar);
        Lanes inverseIkf = Constant(TransistorField.InverseIkf);
        Lanes q1 = one / (one - (vbc * inverseVaf) - (vbe * inverseVar));
        Lanes inverseIkr = Constant(TransistorField.InverseIkr);
        Lanes sum = (beI * inverseIkf) + (bcI * inverseIkr);
        Lanes argument = Vector512.Max(one + (sum * 4.0), Vector512.Create(1e-30));
        Lanes root;
        Lanes rootSlope;
        if (hasNkf)
        {
            Lanes nkf = Constant(TransistorField.Nkf);
            root = Vector512.Exp(nkf * Vector512.Log(argument));
            rootSlope = nkf * 4.0 * root / argument;
        }
        else
        {
            root = Vector512.Sqrt(argument);
            rootSlope = Vector512.Create(2.0) / root;
        }

        Lanes half = q1 * 0.5;
        Lanes qb = half * (one + root);
        Lanes perRoot = half * rootSlope;
        Lanes qbBe = (qb * q1 * inverseVar) + (perRoot * beG * inverseIkf);
        Lanes qbBc = (qb * q1 * inverseVaf) + (perRoot * bcG * inverseIkr);
        Lanes inverseQb = one / qb;
        Lanes transport = (beI - bcI) * inverseQb;
        Lanes reverse = bcI * inverseBr;
        Lanes reverseBc = bcG * inverseBr;
        Lanes forward = beI * inverseBf;
        Lanes forwardBe = beG * inverseBf;
        Lanes beT = Lanes.Zero;
        Lanes bcT = Lanes.Zero;
        Lanes qbT = Lanes.Zero;
        Lanes reverseT = Lanes.Zero;
        Lanes forwardT = Lanes.Zero;
        if (slopes)
        {
            beT = (beI * dlnIs) - (beG * vbe * inverseTemperature);
            bcT = (bcI * dlnIs) - (bcG * vbc * inverseTemperature);
            qbT = perRoot * ((beT * inverseIkf) + (bcT * inverseIkr));
            reverseT = (bcT - (bcI * dlnBr)) * inverseBr;
            forwardT = (beT - (beI * dlnBf)) * inverseBf;
        }

        if (hasIsc)
        {
            Lanes u = vbc * inverseNc;
            Lanes x = Exponential(u);
            Lanes current = isc * LessOne(u, x);
            Lanes conductance = isc * x * inverseNc;
            reverse += current;
            reverseBc += conductance;
            if (slopes)
            {
                Lanes law = (dlnIs * Constant(TransistorField.InverseNc)) - dlnBr;
                reverseT += (current * law) - (conductance * vbc * inverseTemperature);
            }
        }

        if (hasIse)
        {
            Lanes u = vbe * inverseNe;
            Lanes x = Exponential(u);
            Lanes current = ise * LessOne(u, x);
            Lanes conductance = ise * x * inverseNe;
            forward += current;
            forwardBe += conductance;
            if (slopes)
            {
                Lanes law = (dlnIs * Constant(TransistorField.InverseNe)) - dlnBf;
                forwardT += (current * law) - (conductance * vbe * inverseTemperature);
            }
        }

        r.Ic = transport - reverse;
        r.IcVbe = (beG - (transport * qbBe)) * inverseQb;
        r.IcVbc = ((-bcG - (transport * qbBc)) * inverseQb) - reverseBc;
        r.IcT = slopes ? ((beT - bcT - (transport * qbT)) * inverseQb) - reverseT : Lanes.Zero;

        Lanes factor = Gain(r.Ic, out Lanes factorSlope);
        Lanes through = forward * factorSlope;
        r.Ib = (factor * forward) + reverse;
        r.IbVbe = (factor * forwardBe) + (through * r.IcVbe);
        r.IbVbc = reverseBc + (through * r.IcVbc);
        r.IbT = slopes ? (factor * forwardT) + reverseT + (through * r.IcT) : Lanes.Zero;

        r.Rbb = Constant(TransistorField.Rbm);
        r.RbbVbe = Lanes.Zero;
        r.RbbVbc = Lanes.Zero;
        r.RbbT = Lanes.Zero;
        if (hasVariableRb)
        {
            Lanes variable = Constant(TransistorField.VariableRb);
            Lanes share = variable * inverseQb;
            Lanes slope = -share * inverseQb;
            r.RbbVbe = slope * qbBe;
            r.RbbVbc = slope * qbBc;
            r.RbbT = slope * qbT;
            if (hasCrowding)
            {
                Lanes crowds = Vector512.GreaterThan(Constant(TransistorField.InverseIrb), Lanes.Zero);
                share = Vector512.ConditionalSelect(crowds, variable * Crowding(r.Ib), share);
                r.RbbVbe = Vector512.AndNot(r.RbbVbe, crowds);
                r.RbbVbc = Vector512.AndNot(r.RbbVbc, crowds);
                r.RbbT = Vector512.AndNot(r.RbbT, crowds);
            }

            r.Rbb += share;
        }
    }

    /// <summary>exp, held at 200 like the scalar equations' and at -700, where it is nothing.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Lanes Exponential(Lanes u) =>
        Vector512.Exp(Vector512.Min(Vector512.Max(u, Vector512.Create(-700.0)), Vector512.Create(200.0)));

    /// <summary>exp(u) - 1 without cancellation near zero.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Lanes LessOne(Lanes u, Lanes exponential)
    {
        Lanes small = Vector512.LessThan(Vector512.Abs(u), Vector512.Create(1e-5));
        return Vector512.ConditionalSelect(small, u * (Lanes.One + (u * 0.5)), exponential - Lanes.One);
    }

    /// <summary>The gain factor and its slope, each lane from its own table (<see cref="Devices.GainFactor"/>).</summary>
    private Lanes Gain(Lanes ic, out Lanes slope)
    {
        slope = Lanes.Zero;
        if (!gainVaries)
        {
            return FirstCubics();
        }

        Lanes bounded = Vector512.Max(ic, Vector512.Create(1e-300));
        Lanes perLog = Constant(TransistorField.GainPointsPerLog);
        Lanes last = Constant(TransistorField.GainLast);
        Lanes position = (Vector512.Log(bounded) - Constant(TransistorField.GainFirstLog)) * perLog;
        Lanes inside = Vector512.GreaterThan(position, Lanes.Zero) & Vector512.LessThan(position, last);
        if (inside == Lanes.Zero && Vector512.LessThanOrEqualAll(position, Lanes.Zero))
        {
            return FirstCubics();
        }

        position = Vector512.Min(Vector512.Max(position, Lanes.Zero), last);
        Lanes cell = Vector512.Min(Vector512.Floor(position), last - Lanes.One);
        Lanes t = position - cell;
        Vector512<long> at = Vector512.ConvertToInt64(cell);
        Cells(at, out Lanes c0, out Lanes c1, out Lanes c2, out Lanes c3);
        slope = (c1 + (t * ((c2 * 2.0) + (c3 * 3.0 * t)))) * perLog / bounded & inside;
        return c0 + (t * (c1 + (t * (c2 + (c3 * t)))));
    }

    private Lanes FirstCubics() => Vector512.Create(
        cubics[0][0], cubics[1][0], cubics[2][0], cubics[3][0], cubics[4][0], cubics[5][0], cubics[6][0], cubics[7][0]);

    /// <summary>Four coefficients of each lane's cell: two transpositions of four by four.</summary>
    private void Cells(Vector512<long> at, out Lanes c0, out Lanes c1, out Lanes c2, out Lanes c3)
    {
        Transpose(Cell(0, at), Cell(1, at), Cell(2, at), Cell(3, at), out Vector256<double> a0, out Vector256<double> a1, out Vector256<double> a2, out Vector256<double> a3);
        Transpose(Cell(4, at), Cell(5, at), Cell(6, at), Cell(7, at), out Vector256<double> b0, out Vector256<double> b1, out Vector256<double> b2, out Vector256<double> b3);
        c0 = Vector512.Create(a0, b0);
        c1 = Vector512.Create(a1, b1);
        c2 = Vector512.Create(a2, b2);
        c3 = Vector512.Create(a3, b3);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Vector256<double> Cell(int lane, Vector512<long> at) => Vector256.Create((ReadOnlySpan<double>)cubics[lane].AsSpan((int)at[lane] * 4, 4));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Transpose(
        Vector256<double> r0, Vector256<double> r1, Vector256<double> r2, Vector256<double> r3,
        out Vector256<double> c0, out Vector256<double> c1, out Vector256<double> c2, out Vector256<double> c3)
    {
        c0 = Vector256.Create(r0[0], r1[0], r2[0], r3[0]);
        c1 = Vector256.Create(r0[1], r1[1], r2[1], r3[1]);
        c2 = Vector256.Create(r0[2], r1[2], r2[2], r3[2]);
        c3 = Vector256.Create(r0[3], r1[3], r2[3], r3[3]);
    }

    /// <summary>3 (tan z - z)/(z tan^2 z), a few cards only: lane by lane.</summary>
    private Lanes Crowding(Lanes ib)
    {
        Lanes share = ib * Constant(TransistorField.InverseIrb);
        Span<double> values = stackalloc double[Width];
        share.CopyTo(values);
        for (int i = 0; i < Width; i++)
        {
            values[i] = Devices.BipolarAtTemperature.Crowding(values[i]);
        }

        return Vector512.Create((ReadOnlySpan<double>)values);
    }
}
