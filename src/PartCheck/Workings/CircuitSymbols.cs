using System.Globalization;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Quantities;
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
        AddTemperatures(book, basis, legs);
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

        book.Step("IE" + n, through, "A", "emitter current of " + who);
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
            .Step("Rball" + n, sensed ? averaged ? $"Rs{n} x Ra{n} / (Rs{n} + Ra{n})" : "0 ohm" : $"Rs{n}", "ohm", "ballast of " + who);
    }

    private static string GainEnd(Extreme end) => end switch { Extreme.Min => "hFE min", Extreme.Max => "hFE max", _ => "hFE has one value" };

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

    private static void AddTemperatures(Derivation book, FindingBasis basis, IReadOnlyList<LegView> legs)
    {
        SolvedState state = basis.State;
        ChannelModel model = basis.Model;
        bool warm = state.Corner.Heat == 1;
        List<string> heat = [];
        int hottest = -1;
        foreach (LegView leg in legs)
        {
            TransistorPoint q = state.Transistors[leg.Index];
            AddThermal(book, q, model, model.PassHeat[leg.Class], leg.N, leg.Who, warm, []);
            if (hottest < 0 || q.RthJa * q.Power > state.Transistors[hottest].RthJa * state.Transistors[hottest].Power)
            {
                hottest = leg.Index;
            }

            if (warm && model.CouplingGiven && q.Part.Coupling is { } coupling)
            {
                book.Given("Kc" + leg.N, coupling.Value.KelvinsPerWatt, "K/W", $"heating of the control by {leg.Who}", coupling.Cell);
                string pulsed = Pulsed(model.PassHeat[leg.Class]) ? $" x RthP{leg.N} / RthJA{leg.N}" : string.Empty;
                heat.Add(Times(q.Count, $"Kc{leg.N}{pulsed} x P{leg.N}"));
            }
        }

        if (warm && state.Corner.AssumedCoupling is > 0 and var share && hottest >= 0)
        {
            string n = legs.First(l => l.Index == hottest).N;
            book.Given("Kshare", share, string.Empty, "share of the hottest leg's RthJA that heats the control", assumed: true);
            heat.Add($"Kshare x {(Pulsed(model.PassHeat[legs.First(l => l.Index == hottest).Class]) ? "RthP" : "RthJA")}{n} x P{n}");
        }

        AddThermal(book, state.Transistors[^1] with { RthJa = model.ControlRth ?? double.NaN }, model, model.ControlHeat, "0", model.Channel.Control.Reference, warm, heat);
    }

    private static void AddThermal(
        Derivation book, in TransistorPoint q, ChannelModel model, PulsedHeat pulses, string n, string who, bool warm, List<string> more)
    {
        if (q.Part.RthJa is { } given)
        {
            book.Given("RthJA" + n, given.Value.KelvinsPerWatt, "K/W", "thermal resistance of " + q.Part.PartNumber, given.Cell);
        }
        else if (!double.IsNaN(q.RthJa))
        {
            book.Given("Tmax" + n, q.Part.TjMax!.Value.Celsius, "degC", "Tj max of " + q.Part.PartNumber, q.Part.TjMax.Cell)
                .Given("Tflat" + n, q.Part.FlatTo.Celsius, "degC", "the rated power holds up to here", q.Part.PowerFlatTo?.Cell, assumed: q.Part.PowerFlatTo is null)
                .Given("Prated" + n, q.Part.Power!.Value.Watts, "W", "rated power of " + q.Part.PartNumber, q.Part.Power.Cell)
                .Step("RthJA" + n, $"(Tmax{n} - Tflat{n}) / Prated{n}", "K/W", $"thermal resistance of {q.Part.PartNumber}: none is given (assumed)");
        }

        if (q.Held)
        {
            book.Given("Tj" + n, q.Tj - Temperature.CelsiusZero, "degC", $"junction of {who}, held where it runs away: at least this");
            return;
        }

        if (warm && Pulsed(pulses))
        {
            double duty = model.Channel.Conditions.Duty;
            book.Given("d" + n, duty, string.Empty, "largest duty", model.Channel.ConditionCells.GetValueOrDefault("Duty max"));
            string formulaOfPulse = $"d{n} x RthJA{n}";
            if (q.Part.Zth.Count > 0)
            {
                book.Given("Zth" + n, (pulses.Effective!.Value - (duty * pulses.Steady!.Value)) / (1 - duty), "K/W", "thermal resistance of one pulse, log-log between the Zth points of " + q.Part.PartNumber);
                formulaOfPulse += $" + (1 - d{n}) x Zth{n}";
            }

            book.Step("RthP" + n, formulaOfPulse, "K/W", "peak rise of the junction over the power while on");
        }

        string formula = !warm ? "Ta" : string.Join(" + ", [$"Ta + {(Pulsed(pulses) ? "RthP" : "RthJA")}{n} x P{n}", .. more]);
        book.Step("Tj" + n, formula, "degC", $"junction temperature of {who}{(warm ? string.Empty : ", just switched on")}");
    }

    /// <summary>True where the junction is not that of steady power.</summary>
    private static bool Pulsed(PulsedHeat heat) => heat.Effective != heat.Steady;

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

    private static string Times(int count, string term) => count == 1 ? term : string.Create(CultureInfo.InvariantCulture, $"{count} x {term}");
}
