using System.Runtime.Intrinsics;
using static PartCheck.OperatingPoints.Batch.ElementaryFunctions;
using Lanes = System.Runtime.Intrinsics.Vector512<double>;

namespace PartCheck.OperatingPoints.Batch;

/// <content>
/// A transistor's unknowns expressed by the steps of three node voltages. A and B stand for its internal base-emitter and
/// base-collector voltages, T for its junction temperature; E, C, P for the rows of emitter, collector and heat.
/// </content>
public sealed partial class LaneSolver
{
    private void EliminateLeg(int g, Lanes inside, Lanes ofEmitter, Lanes ofCollector, Lanes counted, Lanes baseWeight)
    {
        ref TransistorCurrents q = ref currents[g];
        TransistorLanes device = c.Devices[g];
        Lanes re = device.Re;
        Lanes rc = device.Rc;
        Lanes share = c.Share(g);
        Lanes averaging = c.Averaging(g);
        Lanes sensed = c.Sensed(g);
        Lanes ieA = q.IcVbe + q.IbVbe;
        Lanes ieB = q.IcVbc + q.IbVbc;
        Lanes insideA = -Sum(q.IbVbe, q.Rbb, q.Ib, q.RbbVbe);
        Lanes insideB = -Sum(q.IbVbc, q.Rbb, q.Ib, q.RbbVbc);
        Lanes veA = insideA - Lanes.One - (ieA * re);
        Lanes veB = insideB - (ieB * re);
        Lanes eA = Difference(share, veA, averaging, ieA);
        Lanes eB = Difference(share, veB, averaging, ieB);
        Lanes cA = insideA + (rc * q.IcVbe);
        Lanes cB = insideB + (rc * q.IcVbc) - Lanes.One;
        ref Response a = ref ofVbe[g];
        ref Response b = ref ofVbc[g];
        Lanes ieT = Lanes.Zero;
        Lanes veT = Lanes.Zero;
        if (!heated)
        {
            Lanes inverse = Lanes.One / Difference(eA, cB, eB, cA);
            Lanes p = cB * inverse;
            Lanes s = cA * inverse;
            Lanes r = eB * inverse;
            Lanes t = eA * inverse;
            a.Constant = Difference(r, ofCollector, p, ofEmitter);
            a.Vb = r - (share * p);
            a.Vx = sensed * p;
            a.Vc = -r;
            b.Constant = Difference(s, ofEmitter, t, ofCollector);
            b.Vb = (share * s) - t;
            b.Vx = -(sensed * s);
            b.Vc = t;
        }
        else
        {
            ieT = q.IcT + q.IbT;
            Lanes insideT = -Sum(q.IbT, q.Rbb, q.Ib, q.RbbT);
            veT = insideT - (ieT * re);
            HeatedLeg(g, share, sensed, ofEmitter, ofCollector, eA, eB, (share * veT) - (averaging * ieT), cA, cB, insideT + (rc * q.IcT), veA, veB, veT);
        }

        Response ic = Response.Of(q.IcVbe, a, q.IcVbc, b);
        Response ib = Response.Of(q.IbVbe, a, q.IbVbc, b);
        Response ve = Response.Of(veA, a, veB, b);
        if (heated)
        {
            ic.Add(q.IcT, ofKelvins[g]);
            ib.Add(q.IbT, ofKelvins[g]);
            ve.Add(veT, ofKelvins[g]);
            HeatControl(g, ic, ib, ve);
        }

        ve.Vb += Lanes.One;
        controlRow.Add(counted, ic);
        controlRow.Add(counted, ib);
        controlRow.Add(-counted * c.InverseSense(g), ve);
        loadRow.Add(c.Count(g), ic);
        baseRow.Add(baseWeight, ib);
    }

    private void HeatedLeg(
        int g, Lanes share, Lanes sensed, Lanes ofEmitter, Lanes ofCollector,
        Lanes eA, Lanes eB, Lanes eT, Lanes cA, Lanes cB, Lanes cT, Lanes veA, Lanes veB, Lanes veT)
    {
        ref TransistorCurrents q = ref currents[g];
        Lanes rth = c.Rth(g);
        Lanes ie = q.Ic + q.Ib;
        Lanes vce = collector - emitter[g];
        Lanes across = baseVoltage - emitter[g];
        Lanes pA = -rth * ((vce * q.IcVbe) + (across * q.IbVbe) - (veA * ie));
        Lanes pB = -rth * ((vce * q.IcVbc) + (across * q.IbVbc) - (veB * ie));
        Lanes pT = Lanes.One - (rth * ((vce * q.IcT) + (across * q.IbT) - (veT * ie)));
        Lanes ofHeat = kelvins[g] - c.BaseTemperature(g) - (rth * PowerOf(g));
        Lanes rise = rth * q.Ic;
        Inverse3 m = Inverse3.Of(eA, eB, eT, cA, cB, cT, pA, pB, pT);
        ofVbe[g] = Row(m.M00, m.M01, m.M02);
        ofVbc[g] = Row(m.M10, m.M11, m.M12);
        ofKelvins[g] = Row(m.M20, m.M21, m.M22);

        Response Row(Lanes e, Lanes k, Lanes p) => new()
        {
            Constant = -((e * ofEmitter) + (k * ofCollector) + (p * ofHeat)),
            Vb = -((e * share) + k + (p * rise)),
            Vx = e * sensed,
            Vc = k + (p * rise),
        };
    }

    /// <summary>Adds a leg's answer in power to what heats the control; <paramref name="ve"/> without the base node's own step.</summary>
    private void HeatControl(int g, in Response ic, in Response ib, in Response ve)
    {
        Lanes coupling = CouplingOf(g);
        if (coupling == Lanes.Zero)
        {
            return;
        }

        ref TransistorCurrents q = ref currents[g];
        heatOfLegs.Add(coupling * (collector - emitter[g]), ic);
        heatOfLegs.Add(coupling * (baseVoltage - emitter[g]), ib);
        heatOfLegs.Add(-coupling * (q.Ic + q.Ib), ve);
        heatOfLegs.Vb -= coupling * q.Ic;
        heatOfLegs.Vc += coupling * q.Ic;
        heatOfLegs.Constant += coupling * PowerOf(g);
    }

    private void EliminateControl()
    {
        ref TransistorCurrents q = ref currents[0];
        TransistorLanes device = c.Devices[0];
        Lanes re = device.Re;
        Lanes rc = device.Rc;
        Lanes innerA = Lanes.One + ((q.IcVbe + q.IbVbe) * re);
        Lanes innerB = (q.IcVbc + q.IbVbc) * re;
        Lanes vxA = innerA + (q.IbVbe * q.Rbb) + (q.Ib * q.RbbVbe);
        Lanes vxB = innerB + (q.IbVbc * q.Rbb) + (q.Ib * q.RbbVbc);
        Lanes vbA = innerA + (q.IcVbe * rc);
        Lanes vbB = innerB - Lanes.One + (q.IcVbc * rc);
        ref Response a = ref ofVbe[0];
        ref Response b = ref ofVbc[0];
        a = default;
        b = default;
        if (!heated)
        {
            Lanes inverse = Lanes.One / Difference(vbA, vxB, vbB, vxA);
            a.Vb = vxB * inverse;
            a.Vx = -(vbB * inverse);
            b.Vb = -(vxA * inverse);
            b.Vx = vbA * inverse;
            controlRow.Vb -= Sum(q.IbVbe, a.Vb, q.IbVbc, b.Vb);
            controlRow.Vx -= Sum(q.IbVbe, a.Vx, q.IbVbc, b.Vx);
            Lanes sign = edge is null ? -Lanes.One : Lanes.One;
            baseRow.Vb += sign * Sum(q.IcVbe, a.Vb, q.IcVbc, b.Vb);
            baseRow.Vx += sign * Sum(q.IcVbe, a.Vx, q.IcVbc, b.Vx);
        }
        else
        {
            Lanes innerT = (q.IcT + q.IbT) * re;
            Lanes vxT = innerT + (q.IbT * q.Rbb) + (q.Ib * q.RbbT);
            Lanes rth = c.Rth(0);
            Lanes pA = -rth * ((baseVoltage * q.IcVbe) + (controlBase * q.IbVbe));
            Lanes pB = -rth * ((baseVoltage * q.IcVbc) + (controlBase * q.IbVbc));
            Lanes pT = Lanes.One - (rth * ((baseVoltage * q.IcT) + (controlBase * q.IbT)));
            Inverse3 m = Inverse3.Of(vbA, vbB, innerT + (q.IcT * rc), vxA, vxB, vxT, pA, pB, pT);
            Response heat = heatOfLegs;
            heat.Constant += c.BaseTemperature(0) + (rth * PowerOf(0)) - kelvins[0];
            heat.Vb += rth * q.Ic;
            heat.Vx += rth * q.Ib;
            a.Vb = m.M00;
            a.Vx = m.M01;
            a.Add(m.M02, heat);
            b.Vb = m.M10;
            b.Vx = m.M11;
            b.Add(m.M12, heat);
            ref Response t = ref ofKelvins[0];
            t = default;
            t.Vb = m.M20;
            t.Vx = m.M21;
            t.Add(m.M22, heat);
            Response ic = Response.Of(q.IcVbe, a, q.IcVbc, b);
            Response ib = Response.Of(q.IbVbe, a, q.IbVbc, b);
            ic.Add(q.IcT, t);
            ib.Add(q.IbT, t);
            controlRow.Add(-Lanes.One, ib);
            baseRow.Add(-Lanes.One, ic);
        }
    }

    /// <summary>Lanes where every junction stands where its power puts it.</summary>
    private Lanes HeatBalances()
    {
        Lanes balanced = Lanes.AllBitsSet;
        if (!heated)
        {
            return balanced;
        }

        Lanes coupled = Lanes.Zero;
        for (int g = 1; g <= c.Shape.Legs; g++)
        {
            balanced &= Stands(g, Lanes.Zero);
            coupled += CouplingOf(g) * PowerOf(g);
        }

        return balanced & Stands(0, coupled);
    }

    private Lanes Stands(int device, Lanes coupled)
    {
        Lanes wanted = c.BaseTemperature(device) + (c.Rth(device) * PowerOf(device)) + coupled;
        return Vector512.LessThanOrEqual(Vector512.Abs(kelvins[device] - wanted), Vector512.Create(1e-6));
    }
}
