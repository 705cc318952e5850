using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Judges one reading of one channel: every rule that reads states, over every corner. The one place where the worst is taken.
/// </summary>
public sealed class ChannelJudge
{
    private readonly ChannelModel model;
    private readonly DeratingTable derating;
    private readonly IReadOnlyList<Rule> rules = RuleBook.StateRules;
    private readonly RuleRows[,] rows;
    private readonly bool[,] applies;

    /// <summary>Makes a judge.</summary>
    /// <param name="model">The channel's model.</param>
    /// <param name="derating">Its derating table.</param>
    public ChannelJudge(ChannelModel model, DeratingTable derating)
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(derating);
        this.model = model;
        this.derating = derating;
        int slots = model.Slots.Count;
        rows = new RuleRows[rules.Count, slots + 1];
        applies = new bool[rules.Count, slots + 1];
        for (int r = 0; r < rules.Count; r++)
        {
            for (int s = 0; s <= slots; s++)
            {
                Part? part = s < slots && model.Slots.Of(s) is { Count: > 0 } placements ? placements[0].Part : null;
                string? kind = part switch { Transistor => "npn", ResistorPart => "resistor", LedPart => "led", _ => null };
                string? style = (part as ResistorPart)?.Style;
                rows[r, s] = new RuleRows(derating.For(rules[r].Id, kind, style), derating.For("r-power", kind, style));
                applies[r, s] = (rules[r], part) switch
                {
                    (TransistorRule rule, Transistor transistor) =>
                        rule.AppliesTo(model.Slots.Of(s)[0].Role) && rule.Asked(transistor, model.Channel, rows[r, s]),
                    (ResistorRule rule, ResistorPart resistor) => rule.AppliesTo(resistor),
                    (LedRule, LedPart) => true,
                    (ChannelRule rule, _) => s == slots && rule.Asked(model.Channel, rows[r, s]),
                    _ => false,
                };
            }
        }
    }

    /// <summary>Judges over all corners.</summary>
    /// <param name="pin">The channel's pin.</param>
    /// <param name="threads">Threads to use; 0: all.</param>
    /// <param name="cancel">Stops the enumeration.</param>
    public ReadingJudgement Judge(PinSource pin, int threads, CancellationToken cancel)
    {
        double driveFactor = derating.For("drive").Limit ?? 1;
        IReadOnlyList<ReadingWorst> chunks = WorstCase.Enumerate(
            model, pin, driveFactor, threads, () => new ReadingWorst(rules.Count, model.Slots.Count + 1), Visit, cancel);
        ReadingWorst total = new(rules.Count, model.Slots.Count + 1);
        foreach (ReadingWorst chunk in chunks)
        {
            total.Merge(chunk);
        }

        foreach (double ambient in (ReadOnlySpan<double>)[model.Channel.Conditions.Ambient.Min.Kelvins, model.Channel.Conditions.Ambient.Max.Kelvins])
        {
            if (WorstCase.PinLow(model, ambient) is { } off)
            {
                Visit(total, off);
            }
            else
            {
                total.NotSolved++;
            }
        }

        Climb(total, new KneeSearch(model, pin), driveFactor, threads, cancel);
        SolvedState? nominal = WorstCase.Nominal(model, pin);
        return new ReadingJudgement(model.Channel, Findings(total, pin), nominal, total.LoadMin, total.LoadMax, total.PinMax, total.Corners, total.NotSolved + (nominal is null ? 1 : 0))
        {
            HeatMax = total.HeatMax,
            PinState = total.MostPin,
            Assumed = total.ControlHeld
                ? [new Assumption("hFE of the control beyond its points", model.Control.Part.PartNumber, "the outermost value held")]
                : [],
            MostPower = Enumerable.Range(0, model.Slots.Count).Where(s => total.Hottest[s] > 0)
                .SelectMany(s => model.Slots.Of(s).Select(p => (p.Reference, Watts: total.MostPower[s])))
                .ToDictionary(p => p.Reference, p => p.Watts, StringComparer.OrdinalIgnoreCase),
            Hottest = [.. Enumerable.Range(0, model.Slots.Count).Where(s => total.Hottest[s] > 0)
                .SelectMany(s => model.Slots.Of(s).Select(p => (p.Reference, total.Hottest[s])))],
        };
    }

    /// <summary>From every worst corner to the knee that may be worse still.</summary>
    private void Climb(ReadingWorst total, KneeSearch search, double driveFactor, int threads, CancellationToken cancel)
    {
        List<(int Rule, int Slot)> keys = [];
        for (int r = 0; r < rules.Count; r++)
        {
            for (int s = 0; s <= model.Slots.Count; s++)
            {
                if (applies[r, s] && total.At(r, s).State is not null)
                {
                    keys.Add((r, s));
                }
            }
        }

        List<SolvedState?> peaks = [.. Enumerable.Repeat<SolvedState?>(null, keys.Count)];
        ParallelOptions options = new() { CancellationToken = cancel, MaxDegreeOfParallelism = threads > 0 ? threads : -1 };
        Parallel.For(0, keys.Count, options, i =>
        {
            (int r, int s) = keys[i];
            double? edge = rules[r] is DriveRule ? Math.Max(driveFactor, 1.2) : null;
            peaks[i] = search.Climb(total.At(r, s).State!, edge, state => Measure(r, s, state));
        });
        SolvedState?[] extremes =
        [
            total.LeastLoad is { } least ? search.Climb(least, null, s => -s.LoadCurrent) : null,
            total.MostLoad is { } most ? search.Climb(most, null, s => s.LoadCurrent) : null,
            total.MostPin is { } pin ? search.Climb(pin, null, s => s.PinCurrent) : null,
            total.MostHeat is { } heat ? search.Climb(heat, null, ReadingWorst.Heat) : null,
        ];
        for (int i = 0; i < keys.Count; i++)
        {
            if (peaks[i] is { } peak)
            {
                Take(total.At(keys[i].Rule, keys[i].Slot), keys[i].Rule, keys[i].Slot, peak);
                total.TakeExtremes(peak);
            }
        }

        foreach (SolvedState peak in extremes.OfType<SolvedState>())
        {
            total.TakeExtremes(peak);
        }
    }

    /// <summary>The ratio of a rule at a slot in a state, infinite where it is nonconforming at any size; NaN: not judged there.</summary>
    private double Measure(int r, int s, SolvedState state)
    {
        if (!rules[r].Reads(state))
        {
            return double.NaN;
        }

        Worst worst = new();
        Take(worst, r, s, state);
        return worst.State is null ? double.NaN : worst.Stress.Ratio ?? double.PositiveInfinity;
    }

    private void Visit(ReadingWorst into, SolvedState state)
    {
        into.Corners++;
        if (!state.Solved)
        {
            into.NotSolved++;
            Fail(into, state);
            return;
        }

        into.TakeExtremes(state);
        int channelSlot = model.Slots.Count;
        for (int r = 0; r < rules.Count; r++)
        {
            if (!rules[r].Reads(state))
            {
                continue;
            }

            for (int slot = 0; slot <= channelSlot; slot++)
            {
                if (applies[r, slot])
                {
                    Take(into.At(r, slot), r, slot, state);
                }
            }
        }
    }

    /// <summary>What a rule says of every point of a slot.</summary>
    private void Take(Worst into, int r, int slot, SolvedState state)
    {
        switch (rules[r])
        {
            case TransistorRule rule:
                foreach (TransistorPoint point in (TransistorPoint[])state.Transistors)
                {
                    if (point.Slot == slot)
                    {
                        into.Take(rule.Evaluate(state, point, model.Channel, rows[r, slot]), state);
                    }
                }

                break;
            case ResistorRule rule:
                for (int i = 0; i < state.Resistors.Count; i++)
                {
                    if (state.Resistors[i].Slot == slot)
                    {
                        into.Take(rule.Evaluate(state, state.Resistors[i], model.Channel, rows[r, slot]), state);
                    }
                }

                break;
            case LedRule rule:
                into.Take(rule.Evaluate(state, (LedPart)model.Slots.Of(slot)[0].Part, model.Channel, rows[r, slot]), state);
                break;
            case ChannelRule rule:
                into.Take(rule.Evaluate(state, model.Channel, rows[r, slot]), state);
                break;
        }
    }

    /// <summary>What every rule says of one state: rule, reference (null: the channel) and stress, worst of the points of a slot.</summary>
    public IReadOnlyList<(string Rule, string? Reference, Stress Stress)> Evaluate(SolvedState state)
    {
        ArgumentNullException.ThrowIfNull(state);
        List<(string, string?, Stress)> found = [];
        for (int r = 0; r < rules.Count; r++)
        {
            for (int slot = 0; slot <= model.Slots.Count && rules[r].Reads(state); slot++)
            {
                Worst worst = new();
                if (applies[r, slot])
                {
                    Take(worst, r, slot, state);
                }

                if (worst.State is not null)
                {
                    found.Add((rules[r].Id, slot == model.Slots.Count ? null : model.Slots.Of(slot)[0].Reference, worst.Stress));
                }
            }
        }

        return found;
    }

    /// <summary>A corner without a solution: nothing that reads its state is verified.</summary>
    private void Fail(ReadingWorst into, SolvedState state)
    {
        Stress failed = Stress.NotVerified("a solution: the solver gave up in a corner (NotSolved)");
        for (int r = 0; r < rules.Count; r++)
        {
            for (int s = 0; s <= model.Slots.Count; s++)
            {
                if (applies[r, s] && (rules[r].Reads(state) || (rules[r] is ChannelRule && state.State == ChannelState.On)))
                {
                    into.At(r, s).Take(failed, state);
                }
            }
        }
    }

    private List<Finding> Findings(ReadingWorst total, PinSource pin)
    {
        List<Finding> findings = [];
        for (int r = 0; r < rules.Count; r++)
        {
            for (int s = 0; s <= model.Slots.Count; s++)
            {
                if (!applies[r, s])
                {
                    continue;
                }

                Worst worst = total.At(r, s);
                if (s == model.Slots.Count)
                {
                    findings.Add(Make(r, s, worst, null, pin));
                    continue;
                }

                foreach (Placement placement in model.Slots.Of(s))
                {
                    findings.Add(Make(r, s, worst, placement, pin));
                }
            }
        }

        return findings;
    }

    private Finding Make(int r, int s, Worst worst, Placement? placement, PinSource pin)
    {
        Rule rule = rules[r];
        Stress stress = worst.Stress;
        bool judged = worst.State is not null;
        string? cell = (rule, placement?.Part) switch
        {
            (TransistorRule t, Transistor part) => t.DecidingCell(part),
            (ResistorRule t, ResistorPart part) => t.DecidingCell(part),
            (LedRule t, LedPart part) => t.DecidingCell(part),
            (ChannelRule t, _) => t.DecidingCell(model.Channel, stress),
            _ => null,
        };
        return new Finding
        {
            Channel = model.Channel.Name,
            Rule = rule.Id,
            Reference = placement?.Reference,
            PartNumber = placement?.Part.PartNumber,
            Manufacturer = placement?.Part.Manufacturer,
            Mix = model.Channel.Mix,
            State = worst.State?.State,
            Actual = judged && double.IsFinite(stress.Actual) ? stress.Actual : null,
            ActualIsAtLeast = stress.AtLeast,
            Allowed = judged && double.IsFinite(stress.Allowed) ? stress.Allowed : null,
            Unit = stress.Half ? "A" : rule.Unit,
            StressRatio = judged ? stress.Ratio : null,
            Verdict = worst.Verdict,
            Corner = worst.State?.Corner,
            Source = rows[r, s].Own.Source,
            Cell = cell,
            Text = placement is null ? null : rule.Remark(placement, model.Channel, stress),
            Missing = worst.Verdict == Verdict.NotVerified ? [.. worst.Missing.DefaultIfEmpty("a state to judge")] : [],
            Basis = worst.State is { } state ? new FindingBasis(model, pin, rule, rows[r, s], state, s, stress) : null,
        };
    }
}
