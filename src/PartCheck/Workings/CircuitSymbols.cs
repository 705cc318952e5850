using System.Globalization;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>
/// The operating point of a state as lines: voltages that the solve found, currents, powers and temperatures that follow from them by the
/// circuit's own equations, and the balances that the solved figures satisfy.
/// </summary>
internal static class CircuitSymbols
{
    /// <summary>Share of the nominal current below which the load's logarithm says nothing.</summary>
    private const double LeastLoad = 1e-3;

    /// <summary>Share of the currents through its resistors below which an emitter current is no longer worked out from them.</summary>
    private const double LeastShare = 0.01;

    /// <summary>Adds the symbols.</summary>
    public static void Add(Derivation book, FindingBasis basis, IReadOnlyList<LegView> legs)
    {
        SolvedState state = basis.State;
        ChannelModel model = basis.Model;
        TransistorPoint control = state.Transistors[^1];
        string who = model.Channel.Control.Reference;
        book.Solved("Vb", state.BaseVoltage, "V", "base node")
            .Solved("Vx", state.ControlBaseVoltage, "V", VxMeaning(model, who, legs))
            .Solved("IC0", control.Ic, "A", "collector current of the control " + who)
            .Solved("IB0", control.Ib, "A", "base current of the control " + who)
            .Step("VCE0", "Vb", "V", $"collector-emitter voltage of {who}: the base node")
            .Step("VBE0", "Vx", "V", "base-emitter voltage of " + who)
            .Step("VCB0", "Vb - Vx", "V", "collector-base voltage of " + who)
            .Step("P0", "Vb x IC0 + Vx x IB0", "W", "dissipation of " + who);
        bool atPin = model.Channel is { PullDown: not null, PullDownAt: PullDownAt.Pin };
        string feed = atPin ? "(Vsource - Vb) / Rsource" : "(Vpin - Vb) / (Rf + Rpin)";
        book.Step("If", feed, "A", "feed current");
        foreach (LegView leg in legs)
        {
            AddLeg(book, basis, leg, legs.Count);
        }

        AddLoad(book, basis, legs);
        HeatSymbols.Add(book, basis, legs);
        AddBalances(book, basis, legs, feed);
    }

    private static string VxMeaning(ChannelModel model, string who, IReadOnlyList<LegView> legs)
    {
        string emitters = string.Join(", ", legs.Where(l => model.Classes[l.Class].First.Sensed && model.Averaging[l.Class] is not { Nominal: > 0 }).Select(l => l.Who));
        return $"base of the control {who}: its VBE at its current and temperature" + (emitters.Length == 0 ? string.Empty : $"; the emitter of {emitters}");
    }

    private static void AddLeg(Derivation book, FindingBasis basis, LegView leg, int groups)
    {
        SolvedState state = basis.State;
        TransistorPoint q = state.Transistors[leg.Index];
        (string n, string who) = (leg.N, leg.Who);
        bool sensed = basis.Model.Classes[leg.Class].First.Sensed;
        bool averaged = basis.Model.Averaging[leg.Class] is { Nominal: > 0 };
        string through = $"VE{n} / Rs{n}";
        double spread = q.Ic + q.Ib - (q.SenseVoltage / q.SenseResistance);
        if (!sensed)
        {
            book.Solved("VE" + n, q.SenseVoltage, "V", $"emitter of {who}, which the control does not sense");
        }
        else if (averaged)
        {
            book.Solved("Va" + n, q.SenseVoltage - state.ControlBaseVoltage, "V", "voltage over the averaging resistor of " + who)
                .Step("VE" + n, $"Vx + Va{n}", "V", $"emitter of {who}: the voltage over its sense resistor");
            through += $" + Va{n} / Ra{n}";
        }
        else
        {
            book.Step("VE" + n, "Vx", "V", $"emitter of {who}: the control's base sits on it");
            through += groups == 1 && q.Count == 1 ? " + IB0" : " + Ix" + n;
            book.Solved("Ix" + n, spread, "A", $"current from the emitter of {who} to the control's base");
        }

        // Where the currents through its resistors cancel, their printed figures no longer hold the difference.
        double emitter = q.Ic + q.Ib;
        if (sensed && Math.Abs(emitter) < LeastShare * (Math.Abs(q.SenseVoltage / q.SenseResistance) + Math.Abs(spread)))
        {
            book.Solved("IE" + n, emitter, "A", $"emitter current of {who}, the small difference of the currents through its resistors");
        }
        else
        {
            book.Step("IE" + n, through, "A", "emitter current of " + who);
        }

        if (state.State == ChannelState.On && q is { Ic: > 0, Ib: > 0 })
        {
            book.Solved("hFE" + n, q.Ic / q.Ib, string.Empty, $"gain of {who} in this corner ({GainEnd(leg.Odd ? state.Corner.OddPass.Hfe : state.Corner.Pass.Hfe)}), at its current, VCE and temperature", q.Part.Hfe?.Cell ?? q.Part.Card?.Cell)
                .Step("IC" + n, $"IE{n} x hFE{n} / (hFE{n} + 1)", "A", "collector current of " + who)
                .Step("IB" + n, $"IE{n} / (hFE{n} + 1)", "A", "base current of " + who);
        }
        else
        {
            book.Solved("IC" + n, q.Ic, "A", "collector current of " + who).Solved("IB" + n, q.Ib, "A", "base current of " + who);
        }

        book.Step("VCE" + n, $"Vc - VE{n}", "V", "collector-emitter voltage of " + who)
            .Step("VBE" + n, $"Vb - VE{n}", "V", "base-emitter voltage of " + who)
            .Step("VCB" + n, "Vc - Vb", "V", "collector-base voltage of " + who)
            .Step("P" + n, $"VCE{n} x IC{n} + VBE{n} x IB{n}", "W", "dissipation of " + who)
            .Step("Rball" + n, !sensed || basis.Model.OneLegSensed ? $"Rs{n}" : averaged ? $"Rs{n} x Ra{n} / (Rs{n} + Ra{n})" : "0 ohm", "ohm", "ballast of " + who);
    }

    private static string GainEnd(Extreme end) => end switch { Extreme.Min => "hFE min", Extreme.Max => "hFE max", Extreme.Inside => "hFE inside its window", _ => "hFE has one value" };

    private static void AddLoad(Derivation book, FindingBasis basis, IReadOnlyList<LegView> legs)
    {
        SolvedState state = basis.State;
        ChannelConditions c = basis.Model.Channel.Conditions;
        if (state.State == ChannelState.On)
        {
            book.Step("I", string.Join(" + ", legs.Select(l => Times(state.Transistors[l.Index].Count, "IC" + l.N))), "A", "load current: the collectors together");
        }
        else
        {
            book.Solved("I", state.LoadCurrent, "A", "load current");
        }

        if (state.State != ChannelState.On || state.LoadCurrent < LeastLoad * c.CurrentNominal.Amperes)
        {
            book.Solved("Vc", state.CollectorVoltage, "V", "joined collectors, the low end of the load");
            return;
        }

        string load = c.Leds == 0 ? "I x Vdrop / Iref"
            : c.LoadSlope.Ohms > 0 ? "Vdrop - Iref x Rload + nVT x ln(I / Iref) + I x Rload" : "Vdrop + nVT x ln(I / Iref)";
        book.Step("nVT", "2 x LEDs x kq x 298.15 K", "V", "slope of the string's exponential: twice the LEDs, VT at 25 degC")
            .Step("Vload", load, "V", "drop of the load at its current")
            .Step("Vc", "Vsupply - Vload", "V", "joined collectors, the low end of the load");
    }

    private static void AddBalances(Derivation book, FindingBasis basis, IReadOnlyList<LegView> legs, string feed)
    {
        SolvedState state = basis.State;
        string right = string.Join(" + ", legs.Select(l => Times(state.Transistors[l.Index].Count, "IB" + l.N)).Prepend("IC0"));
        string left = basis.Model.Channel is { PullDown: not null, PullDownAt: PullDownAt.Base } ? feed + " - Vb / Rp" : feed;
        if (state is { State: ChannelState.Off, Index: >= 0 })
        {
            double leak = basis.Model.Channel.Legs.Sum(l => l.PassPart.IcboMax?.Value.Amperes ?? 0);
            book.Given("ICBO", leak, "A", "leakage of the pass transistors into the base node, all together", basis.Model.Channel.Legs[0].PassPart.IcboMax?.Cell);
            left += " + ICBO";
        }

        book.Balance(left, right, "A", "base node: what feed and pull-down deliver flows into the control and the bases");
        List<string> sensed = [];
        foreach (LegView leg in legs.Where(l => basis.Model.Classes[l.Class].First.Sensed))
        {
            bool averaged = basis.Model.Averaging[leg.Class] is { Nominal: > 0 };
            if (averaged || legs.Count > 1 || state.Transistors[leg.Index].Count > 1)
            {
                sensed.Add(Times(state.Transistors[leg.Index].Count, averaged ? $"Va{leg.N} / Ra{leg.N}" : "Ix" + leg.N));
            }
        }

        if (sensed.Count > 0)
        {
            book.Balance(string.Join(" + ", sensed), "IB0", "A", "base of the control: the sensed legs feed it");
        }
    }

    internal static string Times(int count, string term) => count == 1 ? term : string.Create(CultureInfo.InvariantCulture, $"{count} x {term}");
}
