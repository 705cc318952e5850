using System.Globalization;
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
        IReadOnlyList<Accumulator> chunks = WorstCase.Enumerate(
            model, pin, driveFactor, threads, () => new Accumulator(rules.Count, model.Slots.Count + 1), Visit, cancel);
        Accumulator total = new(rules.Count, model.Slots.Count + 1);
        foreach (Accumulator chunk in chunks)
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
    private void Climb(Accumulator total, KneeSearch search, double driveFactor, int threads, CancellationToken cancel)
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

        List<SolvedState?> peaks = [.. Enumerable.Repeat<SolvedState?>(null, keys.Count + 4)];
        ParallelOptions options = new() { CancellationToken = cancel, MaxDegreeOfParallelism = threads > 0 ? threads : -1 };
        Parallel.For(0, keys.Count, options, i =>
        {
            (int r, int s) = keys[i];
            double? edge = rules[r] is DriveRule ? Math.Max(driveFactor, 1.2) : null;
            peaks[i] = search.Climb(total.At(r, s).State!, edge, state => Measure(r, s, state));
        });
        for (int i = 0; i < keys.Count; i++)
        {
            if (peaks[i] is { } peak)
            {
                Take(total.At(keys[i].Rule, keys[i].Slot), keys[i].Rule, keys[i].Slot, peak);
            }
        }

        foreach (SolvedState? peak in (ReadOnlySpan<SolvedState?>)[
            total.LeastLoad is { } least ? search.Climb(least, null, s => -s.LoadCurrent) : null,
            total.MostLoad is { } most ? search.Climb(most, null, s => s.LoadCurrent) : null,
            total.MostPin is { } pin ? search.Climb(pin, null, s => s.PinCurrent) : null,
            total.MostHeat is { } heat ? search.Climb(heat, null, Heat) : null])
        {
            if (peak is not null)
            {
                total.TakeExtremes(peak, Heat(peak));
            }
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

    /// <summary>Heat while on of everything on the board that belongs to the channel, the load left out [W].</summary>
    private static double Heat(SolvedState state)
    {
        double sum = 0;
        foreach (TransistorPoint point in (TransistorPoint[])state.Transistors)
        {
            sum += point.Power * (point.Role == Role.Pass ? point.Count : 1);
        }

        for (int i = 0; i < state.Resistors.Count; i++)
        {
            sum += state.Resistors[i].Power * state.Resistors[i].Count;
        }

        return sum;
    }

    private void Visit(Accumulator into, SolvedState state)
    {
        into.Corners++;
        if (!state.Solved)
        {
            into.NotSolved++;
            Fail(into, state);
            return;
        }

        into.TakeExtremes(state, state.State == ChannelState.On ? Heat(state) : 0);
        if (state.State == ChannelState.On)
        {
            into.ControlHeld |= !state.ControlGainGuaranteed;
            foreach (TransistorPoint point in (TransistorPoint[])state.Transistors)
            {
                into.Hottest[point.Slot] = Math.Max(into.Hottest[point.Slot], point.Tj);
                into.MostPower[point.Slot] = Math.Max(into.MostPower[point.Slot], point.Power * point.AveragedShare);
            }
        }

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
    private void Fail(Accumulator into, SolvedState state)
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

    private List<Finding> Findings(Accumulator total, PinSource pin)
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

    private string Averaged(bool package, Placement? placement)
    {
        List<string> words = [];
        if (package && placement is not null)
        {
            words.Add($"the whole package {placement.Package}, its elements together");
        }

        if (PulsedHeat.AveragedShare(model.Channel.Conditions) is < 1 and var duty)
        {
            words.Add(string.Create(CultureInfo.InvariantCulture, $"averaged over a duty of {duty * 100:0.###} %"));
        }

        return string.Join("; ", words);
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
        string? text = rule is ResistorVoltageRule && placement?.Part is ResistorPart { WorkingVoltageMax: null, Resistance.Value.Ohms: > 0 }
            ? "no limiting element voltage given: judged by sqrt(P R) alone"
            : rule is PowerRule && Averaged(stress.Package, placement) is { Length: > 0 } words ? words : null;
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
            Text = text,
            Missing = worst.Verdict == Verdict.NotVerified ? [.. worst.Missing.DefaultIfEmpty("a state to judge")] : [],
            Basis = worst.State is { } state ? new FindingBasis(model, pin, rule, rows[r, s], state, s, stress) : null,
        };
    }

    private sealed class Accumulator(int rules, int slots)
    {
        private readonly Worst?[] worst = new Worst?[rules * slots];

        public int Corners { get; set; }

        public int NotSolved { get; set; }

        public SolvedState? LeastLoad { get; private set; }

        public SolvedState? MostLoad { get; private set; }

        public SolvedState? MostPin { get; private set; }

        public SolvedState? MostHeat { get; private set; }

        public double LoadMin => LeastLoad?.LoadCurrent ?? double.PositiveInfinity;

        public double LoadMax => MostLoad?.LoadCurrent ?? double.NegativeInfinity;

        public double PinMax => Math.Max(0, MostPin?.PinCurrent ?? 0);

        public double HeatMax { get; private set; }

        public bool ControlHeld { get; set; }

        public double[] Hottest { get; } = new double[slots];

        public double[] MostPower { get; } = new double[slots];

        /// <summary>Load current and heat of the states on, pin current of all.</summary>
        public void TakeExtremes(SolvedState state, double heat)
        {
            MostPin = MostPin is null || state.PinCurrent > MostPin.PinCurrent ? state : MostPin;
            if (state.State != ChannelState.On)
            {
                return;
            }

            LeastLoad = LeastLoad is null || state.LoadCurrent < LeastLoad.LoadCurrent ? state : LeastLoad;
            MostLoad = MostLoad is null || state.LoadCurrent > MostLoad.LoadCurrent ? state : MostLoad;
            if (MostHeat is null || heat > HeatMax)
            {
                MostHeat = state;
                HeatMax = heat;
            }
        }

        public Worst At(int rule, int slot) => worst[(rule * slots) + slot] ??= new Worst();

        public void Merge(Accumulator later)
        {
            Corners += later.Corners;
            NotSolved += later.NotSolved;
            foreach (SolvedState? state in (ReadOnlySpan<SolvedState?>)[later.LeastLoad, later.MostLoad, later.MostPin])
            {
                if (state is not null)
                {
                    TakeExtremes(state, double.NegativeInfinity);
                }
            }

            if (later.MostHeat is { } hot)
            {
                TakeExtremes(hot, later.HeatMax);
            }

            ControlHeld |= later.ControlHeld;
            for (int s = 0; s < slots; s++)
            {
                Hottest[s] = Math.Max(Hottest[s], later.Hottest[s]);
                MostPower[s] = Math.Max(MostPower[s], later.MostPower[s]);
            }

            for (int i = 0; i < worst.Length; i++)
            {
                if (later.worst[i] is { } other)
                {
                    (worst[i] ??= new Worst()).Merge(other);
                }
            }
        }
    }
}

/// <summary>One reading of a channel, judged.</summary>
/// <param name="Channel">The reading.</param>
/// <param name="Findings">Findings of all rules that read states.</param>
/// <param name="Nominal">The nominal state; null: not solved.</param>
/// <param name="LoadMin">Smallest load current, state on [A].</param>
/// <param name="LoadMax">Largest load current, state on [A].</param>
/// <param name="PinMax">Largest current out of the pin into this channel, on and unfed [A].</param>
/// <param name="Corners">Corners solved.</param>
/// <param name="NotSolved">Corners that the solver gave up on.</param>
public sealed record ReadingJudgement(
    BoundChannel Channel, IReadOnlyList<Finding> Findings, SolvedState? Nominal, double LoadMin, double LoadMax, double PinMax,
    int Corners, int NotSolved)
{
    /// <summary>Largest heat of the channel's parts on the board while on, whatever the duty, the load left out [W].</summary>
    public double HeatMax { get; init; }

    /// <summary>The state of <see cref="PinMax"/>; null: the pin delivers nothing.</summary>
    public SolvedState? PinState { get; init; }

    /// <summary>Each transistor with its highest junction temperature [K].</summary>
    public IReadOnlyList<(string Reference, double Tj)> Hottest { get; init; } = [];

    /// <summary>Highest dissipation of each transistor, state on, averaged where <c>power</c> averages [W], by reference.</summary>
    public IReadOnlyDictionary<string, double> MostPower { get; init; } = new Dictionary<string, double>();

    /// <summary>What a good channel measures on the bench; null: not solved.</summary>
    public TestLimits? TestLimits { get; init; }

    /// <summary>What the solved corners turned out to assume.</summary>
    public IReadOnlyList<Assumption> Assumed { get; init; } = [];
}
