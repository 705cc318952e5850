using System.Globalization;
using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>
/// The transistors' own equation where they conduct in forward operation, Gummel-Poon without the reverse currents:
/// VBE = NF VT ln(IC qb/IS(T) + 1), qb = q1/2 (1 + (1 + 4 IC qb/IKF)^NKF), q1 = 1/(1 - VBC/VAF - VBE/VAR), with the internal voltages.
/// (Antognetti and Massobrio, Semiconductor Device Modeling with SPICE; the temperature law of IS likewise.)
/// </summary>
internal static class DeviceSymbols
{
    /// <summary>Smallest collector current [A] and collector-base voltage [V] of forward operation here.</summary>
    private const double LeastCurrent = 1e-6;
    private const double LeastCollectorBase = 0.1;

    /// <summary>Adds the symbols of a transistor and its balances.</summary>
    /// <param name="book">Where to.</param>
    /// <param name="q">The transistor's point.</param>
    /// <param name="device">Its device in this corner.</param>
    /// <param name="n">What stands after its symbols.</param>
    /// <param name="who">Its reference, in words.</param>
    /// <param name="end">End of the VBE window that the corner takes.</param>
    /// <param name="variants">The row's devices, which say what was assumed.</param>
    public static void Add(Derivation book, in TransistorPoint q, BipolarDevice device, string n, string who, Extreme end, TransistorVariants variants)
    {
        BipolarParameters p = device.Parameters;
        string? card = q.Part.Card?.Cell;
        bool none = card is null;
        bool window = variants.Assumed.Any(a => a.What == "VBE window");
        book.Given("RE" + n, p.Re, "ohm", "emitter resistance of the model of " + who, card)
            .Solved("Rbb" + n, q.BaseResistance, "ohm", "effective base resistance of the model of " + who)
            .Step("VT" + n, $"kq x (Tj{n} + 273.15 K)", "V", "thermal voltage of " + who);
        BipolarAtTemperature hot = device.At(q.Tj);
        double reverse = (hot.SaturationCurrent * (1 + (1 / device.Br))) + (device.Isc * Math.Pow(hot.SaturationCurrent / device.Is, 1 / p.Nc));
        if (q.Ic < LeastCurrent || q.Vcb < LeastCollectorBase || reverse > 1e-7 * q.Ic)
        {
            return;
        }

        string drops = (q.BaseResistance > 0 ? $" - IB{n} x Rbb{n}" : string.Empty) + (p.Re > 0 ? $" - (IC{n} + IB{n}) x RE{n}" : string.Empty);
        book.Given("ISr" + n, device.Is, "A", $"saturation current of {who} at 25 degC, {EndOf(end)}", q.Part.Vbe?.Cell ?? card, assumed: window)
            .Given("EG" + n, p.Eg, "V", none ? "energy gap: the SPICE default" : "energy gap", card, assumed: none)
            .Given("XTI" + n, p.Xti, string.Empty, none ? "temperature exponent of IS: the SPICE default" : "temperature exponent of IS", card, assumed: none)
            .Step(
                "IS" + n, $"ISr{n} x ((Tj{n} + 273.15 K) / 298.15 K) ^ XTI{n} x exp(EG{n} / VT{n} x ((Tj{n} + 273.15 K) / 298.15 K - 1))", "A",
                $"saturation current of {who} at its junction temperature")
            .Step("vbe" + n, $"VBE{n}" + drops, "V", "its internal base-emitter voltage");
        string charge = Charge(book, q, device, n, who);
        string law = $"VT{n} x ln(IC{n}{(charge.Length > 0 ? " x " + charge : string.Empty)} / IS{n} + 1)";
        if (p.Nf != 1)
        {
            book.Given("NF" + n, p.Nf, string.Empty, "emission coefficient of the model", card);
        }

        book.Balance("vbe" + n, (p.Nf == 1 ? string.Empty : $"NF{n} x ") + law, "V", $"{who}: VBE at its current and temperature");
    }

    private static string EndOf(Extreme end) => end switch
    {
        Extreme.Min => "such that VBE takes the window's smallest value",
        Extreme.Max => "such that VBE takes the window's largest value",
        Extreme.Inside => "such that VBE lies inside its window, where the ratio peaks",
        Extreme.Match => "such that VBE lies one lot's match off the rest",
        _ => "of the window's only value",
    };

    /// <summary>Adds the base charge and returns its symbol; empty: it is 1.</summary>
    private static string Charge(Derivation book, in TransistorPoint q, BipolarDevice device, string n, string who)
    {
        BipolarParameters p = device.Parameters;
        double vbe = q.Vce - q.Vcb - (q.Ib * q.BaseResistance) - ((q.Ic + q.Ib) * p.Re);
        double vbc = -q.Vcb - (q.Ib * q.BaseResistance) + (q.Ic * p.Rc);
        double q1 = 1 / (1 - (vbc / p.Vaf) - (vbe / p.Var));
        string early = string.Empty;
        if (!double.IsInfinity(p.Vaf))
        {
            string internals = (q.BaseResistance > 0 ? $" - IB{n} x Rbb{n}" : string.Empty) + (p.Rc > 0 ? $" + IC{n} x RC{n}" : string.Empty);
            book.Given("VAF" + n, p.Vaf, "V", "forward Early voltage", q.Part.Card?.Cell ?? q.Part.Vaf?.Cell).Given("RC" + n, p.Rc, "ohm", "collector resistance of the model", q.Part.Card?.Cell)
                .Step("vbc" + n, $"VBE{n} - VCE{n}" + internals, "V", "internal base-collector voltage");
            early += $" - vbc{n} / VAF{n}";
        }

        if (!double.IsInfinity(p.Var))
        {
            book.Given("VAR" + n, p.Var, "V", "reverse Early voltage", q.Part.Card?.Cell);
            early += $" - vbe{n} / VAR{n}";
        }

        if (early.Length > 0)
        {
            book.Step("qe" + n, $"1 / (1{early})", string.Empty, "base charge, its Early part");
        }

        if (double.IsInfinity(p.Ikf))
        {
            return early.Length > 0 ? "qe" + n : string.Empty;
        }

        book.Given("IKF" + n, p.Ikf, "A", q.Part.Card is null ? "knee current, fitted to the hFE points" : "knee current of the model", q.Part.Card?.Cell ?? q.Part.Hfe?.Cell);
        double charge = q1;
        for (int i = 0; i < 500; i++)
        {
            charge = (charge + (q1 / 2 * (1 + Math.Pow(1 + (4 * q.Ic * charge / p.Ikf), p.Nkf)))) / 2;
        }

        string root = $"(1 + 4 x IC{n} x qb{n} / IKF{n})";
        string high = p.Nkf == 0.5 ? "sqrt" + root : string.Create(CultureInfo.InvariantCulture, $"{root} ^ {p.Nkf}");
        book.Solved("qb" + n, charge, string.Empty, "base charge of " + who)
            .Balance("qb" + n, (early.Length > 0 ? $"qe{n} / 2" : "1 / 2") + $" x (1 + {high})", string.Empty, "base charge of " + who);
        return "qb" + n;
    }
}
