using System.Globalization;
using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Rules;

/// <summary>
/// Advice: the load shorted once (a bridged string, a slipped probe). The whole of Supply max stands on the collectors; everything else at
/// its worst. Which of the makers' ratings of a transistor break - not the derated ones, since this is a fault. Never a verdict.
/// </summary>
public static class ShortedLoad
{
    /// <summary>What a shorted load drops at the nominal current [V]: nothing that counts, but not nothing for the solver.</summary>
    private const double Drop = 1e-3;

    private static readonly TransistorRule[] Rules = [new VceRule(), new IcRule(), new PowerRule(), new JunctionRule(), new SoaRule()];

    /// <summary>Solves a reading with its load shorted.</summary>
    /// <param name="channel">The reading.</param>
    /// <param name="variants">Devices of a transistor's row.</param>
    /// <param name="pin">Its pin.</param>
    /// <param name="threads">Threads to use; 0: all.</param>
    /// <param name="cancel">Stops the enumeration.</param>
    /// <returns>What each rating says at its worst, the worst first.</returns>
    public static IReadOnlyList<(string Rule, string Reference, Stress Stress)> Judge(
        BoundChannel channel, Func<Transistor, TransistorVariants> variants, PinSource pin, int threads, CancellationToken cancel)
    {
        ArgumentNullException.ThrowIfNull(channel);
        ChannelConditions c = channel.Conditions;
        Voltage drop = Voltage.FromVolts(Drop);
        ChannelModel model = new(
            channel with { Conditions = c with { Supply = new(c.Supply.Max, c.Supply.Max), LoadDrop = new(drop, drop), LoadSlope = Resistance.FromOhms(0), Leds = 0 } },
            variants);
        DeratingTable ratings = DeratingLibrary.Named("ratings") ?? throw new InvalidOperationException("The table of the makers' ratings is missing.");
        KneeSearch search = new(model, pin);
        List<(TransistorRule Rule, int Slot, RuleRows Rows)> asked = [];
        foreach (TransistorRule rule in Rules)
        {
            RuleRows rows = new(ratings.For(rule.Id, "npn", null), ratings.For("r-power", "npn", null));
            for (int slot = 0; slot <= model.Slots.Control; slot++)
            {
                if (model.Slots.Of(slot) is [{ Part: Transistor part } first, ..] && rule.AppliesTo(first.Role) && rule.Asked(part, model.Channel, rows))
                {
                    asked.Add((rule, slot, rows));
                }
            }
        }

        // Every corner, then the knees, as for the channel itself.
        Worst[] worst = [.. asked.Select(_ => new Worst())];
        foreach (Worst[] chunk in WorstCase.Enumerate(
            model, pin, WorstCase.OnBoxes(model, pin), edge: null, threads, () => asked.Select(_ => new Worst()).ToArray(),
            (into, state) =>
            {
                for (int i = 0; i < asked.Count; i++)
                {
                    Take(into[i], asked[i].Rule, asked[i].Slot, state, model.Channel, asked[i].Rows);
                }
            },
            cancel))
        {
            for (int i = 0; i < asked.Count; i++)
            {
                worst[i].Merge(chunk[i]);
            }
        }

        List<(string, string, Stress)> found = [];
        for (int i = 0; i < asked.Count; i++)
        {
            (TransistorRule rule, int slot, RuleRows rows) = asked[i];
            SolvedState? peak = worst[i].State is not { } corner ? null : search.Climb(corner, null, state =>
            {
                Worst one = new();
                Take(one, rule, slot, state, model.Channel, rows);
                return one.State is null ? double.NaN : one.Stress.Ratio ?? double.PositiveInfinity;
            });
            if (peak is not null)
            {
                Take(worst[i], rule, slot, peak, model.Channel, rows);
            }

            Stress stress = worst[i].Verdict == Verdict.NotVerified ? Stress.NotVerified(worst[i].Missing.FirstOrDefault() ?? "a solution") : worst[i].Stress;
            found.Add((rule.Id, string.Join(", ", model.Slots.Of(slot).Select(p => p.Reference)), stress));
        }

        return [.. found.OrderByDescending(f => f.Item3.Verdict == Verdict.Nonconforming).ThenByDescending(f => f.Item3.Ratio ?? double.PositiveInfinity)];
    }

    /// <summary>One sentence.</summary>
    /// <param name="supply">The supply on the collectors [V].</param>
    /// <param name="judged">What <see cref="Judge"/> found.</param>
    public static string Text(double supply, IReadOnlyList<(string Rule, string Reference, Stress Stress)> judged)
    {
        ArgumentNullException.ThrowIfNull(judged);
        string fault = $"A load shorted once, {EngineeringNotation.Format(supply, "V", 3)} on the collectors, ";
        List<string> broken = [.. judged.Where(j => j.Stress.Verdict == Verdict.Nonconforming)
            .Select(j => string.Create(CultureInfo.InvariantCulture, $"{j.Rule} of {j.Reference}") + Size(j.Stress))];
        List<string> unknown = [.. judged.Where(j => j.Stress.Verdict == Verdict.NotVerified).Select(j => j.Stress.Missing ?? "data").Distinct(StringComparer.Ordinal)];
        string open = unknown.Count == 0 ? string.Empty : "; not verified for want of " + string.Join(", ", unknown);
        return broken.Count > 0
            ? fault + "breaks ratings: " + string.Join(", ", broken) + open + "."
            : fault + "breaks no rating" + (judged.FirstOrDefault(j => j.Stress.Ratio is not null) is { Rule: not null } next ? $" (the closest: {next.Rule} of {next.Reference}{Size(next.Stress)})" : string.Empty) + open + ".";
    }

    private static string Size(in Stress stress) =>
        stress.Ratio is { } ratio ? string.Create(CultureInfo.InvariantCulture, $" ({(stress.AtLeast ? "at least " : string.Empty)}{ratio:0.00})") : string.Empty;

    private static void Take(Worst into, TransistorRule rule, int slot, SolvedState state, BoundChannel channel, in RuleRows rows)
    {
        if (!state.Solved)
        {
            into.Take(Stress.NotVerified("a solution: the solver gave up in a corner (NotSolved)"), state);
            return;
        }

        foreach (TransistorPoint point in (TransistorPoint[])state.Transistors)
        {
            if (point.Slot == slot)
            {
                into.Take(rule.Evaluate(state, point, channel, rows), state);
            }
        }
    }
}
