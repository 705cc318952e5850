using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;
using static PartCheck.OperatingPoints.Batch.ElementaryFunctions;
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
        Lanes beX = Exp(vbe * inverseNf);
        Lanes bcX = Exp(vbc * inverseNr);
        Lanes beI = isat * (beX - one);
        Lanes beG = isat * beX * inverseNf;
        Lanes bcI = isat * (bcX - one);
        Lanes bcG = isat * bcX * inverseNr;

        Lanes inverseVaf = Constant(TransistorField.InverseVaf);
        Lanes inverseVar = Constant(TransistorField.InverseVar);
        Lanes inverseIkf = Constant(TransistorField.InverseIkf);
        Lanes q1 = one / (one - (vbc * inverseVaf) - (vbe * inverseVar));
        Lanes inverseIkr = Constant(TransistorField.InverseIkr);
        Lanes sum = Sum(beI, inverseIkf, bcI, inverseIkr);
        Lanes argument = Vector512.MaxNative(one + (sum * 4.0), Vector512.Create(1e-30));
        Lanes root;
        Lanes rootSlope;
        if (hasNkf)
        {
            Lanes nkf = Constant(TransistorField.Nkf);
            root = Exp(nkf * Log(argument));
            rootSlope = nkf * 4.0 * root / argument;
        }
        else
        {
            root = Vector512.Sqrt(argument);
            rootSlope = Vector512.Create(2.0) / root;
        }

        Lanes half = q1 * 0.5;
        Lanes qb = half * (one + root);
        Lanes charge = qb * q1;
        Lanes perRoot = half * rootSlope;
        Lanes qbBe = Sum(charge, inverseVar, perRoot * beG, inverseIkf);
        Lanes qbBc = Sum(charge, inverseVaf, perRoot * bcG, inverseIkr);
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
            Lanes x = Exp(vbc * inverseNc);
            Lanes current = isc * (x - one);
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
            Lanes x = Exp(vbe * inverseNe);
            Lanes current = ise * (x - one);
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
        r.IcVbe = Vector512.FusedMultiplyAdd(-transport, qbBe, beG) * inverseQb;
        r.IcVbc = -Vector512.FusedMultiplyAdd(Vector512.FusedMultiplyAdd(transport, qbBc, bcG), inverseQb, reverseBc);
        r.IcT = slopes ? ((beT - bcT - (transport * qbT)) * inverseQb) - reverseT : Lanes.Zero;

        Lanes factor = Gain(r.Ic, out Lanes factorSlope);
        Lanes through = forward * factorSlope;
        r.Ib = Vector512.FusedMultiplyAdd(factor, forward, reverse);
        r.IbVbe = Sum(factor, forwardBe, through, r.IcVbe);
        r.IbVbc = Vector512.FusedMultiplyAdd(through, r.IcVbc, reverseBc);
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

    /// <summary>The gain factor and its slope, each lane from its own table (<see cref="Devices.GainFactor"/>).</summary>
    private Lanes Gain(Lanes ic, out Lanes slope)
    {
        slope = Lanes.Zero;
        if (!gainVaries)
        {
            return FirstCubics();
        }

        Lanes bounded = Vector512.MaxNative(ic, Vector512.Create(1e-300));
        Lanes perLog = Constant(TransistorField.GainPointsPerLog);
        Lanes last = Constant(TransistorField.GainLast);
        Lanes position = (Log(bounded) - Constant(TransistorField.GainFirstLog)) * perLog;
        Lanes inside = Vector512.GreaterThan(position, Lanes.Zero) & Vector512.LessThan(position, last);
        if (inside == Lanes.Zero && Vector512.LessThanOrEqualAll(position, Lanes.Zero))
        {
            return FirstCubics();
        }

        position = Vector512.MinNative(Vector512.MaxNative(position, Lanes.Zero), last);
        Lanes cell = Vector512.MinNative(Vector512.Floor(position), last - Lanes.One);
        Lanes t = position - cell;
        Vector512<long> at = Vector512.ConvertToInt64(cell);
        Cells(at, out Lanes c0, out Lanes c1, out Lanes c2, out Lanes c3);
        Lanes quadratic = Vector512.FusedMultiplyAdd(c3, t, c2);
        Lanes secant = Vector512.FusedMultiplyAdd(quadratic, t, c1);

        // The cubic's slope: c1 + 2 c2 t + 3 c3 t^2.
        Lanes tangent = Vector512.FusedMultiplyAdd(Vector512.FusedMultiplyAdd(c3, t, quadratic), t, secant);
        slope = tangent * perLog / bounded & inside;
        return Vector512.FusedMultiplyAdd(secant, t, c0);
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
        if (Avx.IsSupported)
        {
            Vector256<double> low01 = Avx.UnpackLow(r0, r1);
            Vector256<double> high01 = Avx.UnpackHigh(r0, r1);
            Vector256<double> low23 = Avx.UnpackLow(r2, r3);
            Vector256<double> high23 = Avx.UnpackHigh(r2, r3);
            c0 = Avx.Permute2x128(low01, low23, 0x20);
            c1 = Avx.Permute2x128(high01, high23, 0x20);
            c2 = Avx.Permute2x128(low01, low23, 0x31);
            c3 = Avx.Permute2x128(high01, high23, 0x31);
            return;
        }

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
