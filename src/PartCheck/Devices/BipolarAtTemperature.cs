using PartCheck.Quantities;

namespace PartCheck.Devices;

/// <summary>A <see cref="BipolarDevice"/> at one junction temperature: the Gummel-Poon equations of SPICE level 1, static part.</summary>
public readonly struct BipolarAtTemperature
{
    private readonly BipolarDevice device;
    private readonly double temperature;
    private readonly double vt;
    private readonly double isat;
    private readonly double ise;
    private readonly double isc;
    private readonly double bf;
    private readonly double br;
    private readonly double dlnIs;
    private readonly double dlnBf;
    private readonly double dlnBr;

    internal BipolarAtTemperature(BipolarDevice device, double kelvins)
    {
        this.device = device;
        temperature = kelvins;
        BipolarParameters p = device.Parameters;
        vt = PhysicalConstants.ThermalVoltage(kelvins);
        double logRatio = Math.Log(kelvins / PhysicalConstants.RoomTemperature);
        double logIs = (p.Xti * logRatio)
            + (p.Eg / PhysicalConstants.BoltzmannOverCharge * ((1 / PhysicalConstants.RoomTemperature) - (1 / kelvins)));
        double xtb = kelvins < PhysicalConstants.RoomTemperature ? device.XtbCold : device.XtbHot;
        double forward = xtb == 0 ? 1 : Math.Exp(xtb * logRatio);
        double reverse = p.Xtb == xtb ? forward : p.Xtb == 0 ? 1 : Math.Exp(p.Xtb * logRatio);
        isat = device.Is * Math.Exp(logIs);
        bf = device.Bf * forward;
        br = device.Br * reverse;
        ise = device.Ise == 0 ? 0 : device.Ise * Math.Exp(logIs / p.Ne) / forward;
        isc = device.Isc == 0 ? 0 : device.Isc * Math.Exp(logIs / p.Nc) / reverse;
        dlnIs = (p.Xti + (p.Eg / vt)) / kelvins;
        dlnBf = xtb / kelvins;
        dlnBr = p.Xtb / kelvins;
    }

    /// <summary>Saturation current at this temperature [A].</summary>
    public double SaturationCurrent => isat;

    /// <summary>Thermal voltage times the forward emission coefficient [V].</summary>
    public double ForwardVoltage => device.Parameters.Nf * vt;

    /// <summary>Thermal voltage times the reverse emission coefficient [V].</summary>
    public double ReverseVoltage => device.Parameters.Nr * vt;

    /// <summary>
    /// Currents at internal junction voltages.
    /// <para>IC = (Ibe - Ibc)/qb - Ibc/BR - Ibcn; IB = f(IC) (Ibe/BF + Iben) + Ibc/BR + Ibcn;
    /// qb = q1/2 (1 + (1 + 4 q2)^NKF), q1 = 1/(1 - vbc/VAF - vbe/VAR), q2 = Ibe/IKF + Ibc/IKR.</para>
    /// </summary>
    /// <param name="vbe">Internal base-emitter voltage [V].</param>
    /// <param name="vbc">Internal base-collector voltage [V].</param>
    /// <param name="r">The currents and their slopes.</param>
    public void Evaluate(double vbe, double vbc, out BipolarCurrents r)
    {
        r = default;
        BipolarParameters p = device.Parameters;
        Diode be = Junction(isat, p.Nf, vbe, dlnIs);
        Diode bc = Junction(isat, p.Nr, vbc, dlnIs);
        Diode ben = ise == 0 ? default : Junction(ise, p.Ne, vbe, (dlnIs / p.Ne) - dlnBf);
        Diode bcn = isc == 0 ? default : Junction(isc, p.Nc, vbc, (dlnIs / p.Nc) - dlnBr);

        double inverseVaf = 1 / p.Vaf;
        double inverseVar = 1 / p.Var;
        double q1 = 1 / (1 - (vbc * inverseVaf) - (vbe * inverseVar));
        double q1be = q1 * q1 * inverseVar;
        double q1bc = q1 * q1 * inverseVaf;
        double inverseIkf = 1 / p.Ikf;
        double inverseIkr = 1 / p.Ikr;
        double sum = (be.I * inverseIkf) + (bc.I * inverseIkr);
        double argument = Math.Max(1 + (4 * sum), 1e-30);
        double root = p.Nkf == 0.5 ? Math.Sqrt(argument) : Math.Pow(argument, p.Nkf);
        double rootSlope = 4 * p.Nkf * root / argument;
        double qb = q1 * (1 + root) / 2;
        double qbBe = (q1be * (1 + root) / 2) + (q1 / 2 * rootSlope * be.G * inverseIkf);
        double qbBc = (q1bc * (1 + root) / 2) + (q1 / 2 * rootSlope * bc.G * inverseIkr);
        double qbT = q1 / 2 * rootSlope * ((be.T * inverseIkf) + (bc.T * inverseIkr));

        double transport = (be.I - bc.I) / qb;
        double reverse = bc.I / br;
        double reverseBc = bc.G / br;
        double reverseT = (bc.T / br) - (reverse * dlnBr);
        r.Ic = transport - reverse - bcn.I;
        r.DIc = new Slopes(
            (be.G - (transport * qbBe)) / qb,
            ((-bc.G - (transport * qbBc)) / qb) - reverseBc - bcn.G,
            ((be.T - bc.T - (transport * qbT)) / qb) - reverseT - bcn.T);

        double forward = (be.I / bf) + ben.I;
        double forwardBe = (be.G / bf) + ben.G;
        double forwardT = (be.T / bf) - (be.I / bf * dlnBf) + ben.T;
        double factor = 1;
        double factorSlope = 0;
        if (device.Gain is { } gain)
        {
            factor = gain.At(r.Ic, out factorSlope);
        }

        double through = forward * factorSlope;
        r.Ib = (factor * forward) + reverse + bcn.I;
        r.DIb = new Slopes(
            (factor * forwardBe) + (through * r.DIc.Vbe),
            reverseBc + bcn.G + (through * r.DIc.Vbc),
            (factor * forwardT) + reverseT + bcn.T + (through * r.DIc.T));

        r.Rbb = p.Rb;
        r.DRbb = default;
        double variable = p.Rb - device.Rbm;
        if (variable != 0)
        {
            if (double.IsInfinity(p.Irb))
            {
                double slope = -variable / (qb * qb);
                r.Rbb = device.Rbm + (variable / qb);
                r.DRbb = new Slopes(slope * qbBe, slope * qbBc, slope * qbT);
            }
            else
            {
                r.Rbb = device.Rbm + (variable * Crowding(r.Ib / p.Irb));
            }
        }
    }

    /// <summary>Current crowding in the base: 3 (tan z - z)/(z tan^2 z) with z of IB/IRB (SPICE; constants 144/pi^2 and 24/pi^2).</summary>
    internal static double Crowding(double share)
    {
        double x = Math.Max(share, 1e-9);
        double z = (-1 + Math.Sqrt(1 + (14.59025 * x))) / 2.4317 / Math.Sqrt(x);
        double tan = Math.Tan(z);
        return 3 * (tan - z) / z / tan / tan;
    }

    /// <summary>Current, conductance and temperature slope of one exponential.</summary>
    private Diode Junction(double saturation, double emission, double v, double dlnSaturation)
    {
        double scale = emission * vt;
        double u = v / scale;
        double bounded = Math.Min(u, 200);
        double exponential = Math.Exp(bounded);
        double i = saturation * (Math.Abs(u) < 1e-5 ? u * (1 + (u / 2)) : exponential - 1);
        double g = saturation * exponential / scale;
        return new Diode(i, g, (i * dlnSaturation) - (g * v / temperature));
    }

    private readonly record struct Diode(double I, double G, double T);
}
