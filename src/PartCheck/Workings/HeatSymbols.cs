using System.Globalization;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>
/// Junction temperatures of a state: Tj = Ta + RthJA P, under PWM Tj = Ta + (d RthJA + (1 - d) Zth(ton)) P, or d RthJA P where the average heats
/// it; the control's with what the legs couple into it.
/// </summary>
internal static class HeatSymbols
{
    /// <summary>Adds the symbols.</summary>
    public static void Add(Derivation book, FindingBasis basis, IReadOnlyList<LegView> legs)
    {
        SolvedState state = basis.State;
        ChannelModel model = basis.Model;
        bool warm = state.Corner.Heat == 1;
        List<string> heat = [];
        string hottest = string.Empty;
        double most = double.NegativeInfinity;
        foreach (LegView leg in legs)
        {
            TransistorPoint q = state.Transistors[leg.Index];
            PulsedHeat pulsed = model.PassHeat[leg.Class];
            string peak = AddThermal(book, q, pulsed, model.Channel.Conditions, leg.N, leg.Who, warm, Beside(book, basis, leg.Index, leg.N, leg.Who, legs));
            double rise = (pulsed.Effective ?? 0) * q.Power;
            if (rise > most)
            {
                (most, hottest) = (rise, $"{peak} x P{leg.N}");
            }

            bool beside = model.Package.WithControl(IndexOf(model, leg));
            if (warm && model.CouplingGiven && !beside && q.Part.Coupling is { } coupling)
            {
                book.Given("Kc" + leg.N, coupling.Value.KelvinsPerWatt, "K/W", $"heating of the control by {leg.Who}", coupling.Cell);
                string share = pulsed.Share == 1 ? string.Empty : $" x {peak} / RthJA{leg.N}";
                heat.Add(CircuitSymbols.Times(q.Count, $"Kc{leg.N}{share} x P{leg.N}"));
            }
        }

        if (warm && state.Corner.AssumedCoupling is > 0 and var assumed && hottest.Length > 0)
        {
            book.Given("Kshare", assumed, string.Empty, "share of the hottest leg's own rise that heats the control", assumed: true);
            heat.Add("Kshare x " + hottest);
        }

        heat.AddRange(Beside(book, basis, state.Transistors.Count - 1, "0", model.Channel.Control.Reference, legs));
        AddThermal(
            book, state.Transistors[^1] with { RthJa = model.ControlRth ?? double.NaN }, model.ControlHeat, model.Channel.Conditions, "0",
            model.Channel.Control.Reference, warm, heat);
    }

    /// <summary>Terms by which the rest of its package and elements of other channels heat a transistor.</summary>
    private static List<string> Beside(Derivation book, FindingBasis basis, int index, string n, string who, IReadOnlyList<LegView> legs)
    {
        SolvedState state = basis.State;
        int device = index == state.Transistors.Count - 1 ? 0 : index + 1;
        TransistorPoint q = state.Transistors[index];
        List<string> terms = [];
        if (state.Warmed.Count > device && state.Warmed[device] > 0)
        {
            book.Given("dTn" + n, state.Warmed[device], "K", $"what elements of other channels in the package of {who} add, at their highest dissipation", q.Part.RthJaBoth?.Cell, assumed: q.Part.RthJaBoth is null);
            terms.Add("dTn" + n);
        }

        foreach (PackageCoupling pair in state.Package)
        {
            if (pair.Heated == device)
            {
                string by = pair.By == 0 ? "0" : legs.First(l => l.Index == pair.By - 1).N;
                string symbol = $"Kp{n}by{by}";
                book.Given(symbol, pair.Rth, "K/W", $"heating of {who} by the rest of its package: (n RthJA both - RthJA) / (n - 1)", q.Part.RthJaBoth?.Cell, assumed: q.Part.RthJaBoth is null);
                terms.Add($"{symbol} x P{by}");
            }
        }

        return terms;
    }

    private static int IndexOf(ChannelModel model, LegView leg)
    {
        for (int i = 0; i < model.Channel.Legs.Count; i++)
        {
            if (ReferenceEquals(model.Channel.Legs[i], model.Classes[leg.Class].First))
            {
                return i;
            }
        }

        return 0;
    }

    /// <summary>Adds thermal resistance and junction temperature of a transistor.</summary>
    /// <returns>Symbol of its peak rise over its power.</returns>
    private static string AddThermal(
        Derivation book, in TransistorPoint q, PulsedHeat pulsed, ChannelConditions conditions, string n, string who, bool warm, List<string> more)
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

        string peak = "RthJA" + n;
        if (pulsed.Share != 1)
        {
            peak = "Rpeak" + n;
            bool points = q.Part.Zth.Count > 0;
            if (points)
            {
                AddZth(book, q.Part, conditions, n);
            }

            book.Step(
                peak, points ? $"d x RthJA{n} + (1 - d) x Zth{n}" : $"d x RthJA{n}", "K/W",
                points ? $"peak rise of {who} over its power: the average, and one pulse on top" : $"peak rise of {who} over its power: the average heats it (assumed)");
        }

        if (q.Held)
        {
            book.Given("Tj" + n, q.Tj - Temperature.CelsiusZero, "degC", $"junction of {who}, held where it runs away: at least this");
            return peak;
        }

        string formula = string.Join(" + ", [warm ? $"Ta + {peak} x P{n}" : "Ta", .. more]);
        book.Step("Tj" + n, formula, "degC", $"junction temperature of {who}{(warm ? string.Empty : ", just switched on")}");
        return peak;
    }

    /// <summary>Zth at the length of a pulse: log-log between its points, the first value before the first, RthJA after the last and at most.</summary>
    private static void AddZth(Derivation book, Transistor part, ChannelConditions conditions, string n)
    {
        double seconds = conditions.Duty / conditions.Frequency!.Value.Hertz;
        book.Step("ton", "d / f", "s", "length of a pulse");
        int right = 0;
        while (right < part.Zth.Count && seconds > part.Zth[right].Seconds)
        {
            right++;
        }

        string meaning = $"transient thermal resistance of {part.PartNumber} at ton";
        if (right == part.Zth.Count)
        {
            book.Step("Zth" + n, "RthJA" + n, "K/W", meaning + ": past its last point");
            return;
        }

        ZthPoint b = part.Zth[right];
        book.Given("Z2" + n, b.Zth.KelvinsPerWatt, "K/W", "Zth points, the one to the right", part.Cell);
        if (right == 0 || !(part.Zth[right - 1].Zth.KelvinsPerWatt > 0))
        {
            book.Step("Zth" + n, $"min(Z2{n}, RthJA{n})", "K/W", meaning);
            return;
        }

        ZthPoint a = part.Zth[right - 1];
        book.Given("t2" + n, b.Seconds, "s", "its pulse length", part.Cell)
            .Given("Z1" + n, a.Zth.KelvinsPerWatt, "K/W", "Zth points, the one to the left", part.Cell)
            .Given("t1" + n, a.Seconds, "s", "its pulse length", part.Cell)
            .Step(
                "Zth" + n, string.Create(CultureInfo.InvariantCulture, $"min(Z1{n} x (Z2{n} / Z1{n}) ^ (ln(ton / t1{n}) / ln(t2{n} / t1{n})), RthJA{n})"), "K/W",
                meaning + ", log-log between its points");
    }
}
