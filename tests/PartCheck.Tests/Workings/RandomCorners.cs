using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;

namespace PartCheck.Tests.Workings;

/// <summary>Random channels of random parts, and what every rule says of random corners of them, worst or not.</summary>
internal sealed class RandomCorners
{
    private static readonly string[] Tables = ["workshop", "ratings", "nasa-eee-inst-002"];
    private readonly Random random;

    /// <summary>A source of random channels.</summary>
    public RandomCorners(int seed) => random = new Random(seed);

    /// <summary>Findings of some corners of one channel, each by every rule that reads the corner.</summary>
    public IReadOnlyList<Finding> Findings(int corners)
    {
        BoundChannel channel = Channel();
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        PinSource pin = new(channel.Logic, random.Next(3) == 0 ? 0.5e-3 : 0);
        DeratingTable table = DeratingLibrary.Named(Tables[random.Next(Tables.Length)])!;
        List<SolvedState> states = [];
        IReadOnlyList<ChannelBox> boxes = WorstCase.Boxes(model, pin);
        for (int i = 0; i < corners; i++)
        {
            ChannelBox box = boxes[random.Next(boxes.Count)];
            states.Add(new CornerSolver(model, pin, Math.Max(table.For("drive").Limit ?? 1, 1.2)).Solve(box, random.Next(box.Count)));
        }

        if (WorstCase.PinLow(model, channel.Conditions.Ambient.Max.Kelvins) is { } low)
        {
            states.Add(low);
        }

        return [.. states.Where(s => s.Solved).SelectMany(s => Of(model, pin, table, s))];
    }

    private static IEnumerable<Finding> Of(ChannelModel model, PinSource pin, DeratingTable table, SolvedState state)
    {
        foreach (Rule rule in RuleBook.StateRules.Where(r => r.Reads(state)))
        {
            if (rule is ChannelRule whole)
            {
                RuleRows rows = new(table.For(rule.Id), table.For("r-power"));
                if (whole.Asked(model.Channel, rows))
                {
                    yield return Made(new FindingBasis(model, pin, rule, rows, state, model.Slots.Count, whole.Evaluate(state, model.Channel, rows)));
                }

                continue;
            }

            if (rule is LedRule led)
            {
                for (int s = model.Slots.FirstLed; s < model.Slots.Count; s++)
                {
                    RuleRows rows = new(table.For(rule.Id, "led"), table.For("r-power", "led"));
                    yield return Made(new FindingBasis(model, pin, rule, rows, state, s, led.Evaluate(state, (LedPart)model.Slots.Of(s)[0].Part, model.Channel, rows)));
                }

                continue;
            }

            foreach (TransistorPoint point in rule is TransistorRule ? state.Transistors : [])
            {
                TransistorRule of = (TransistorRule)rule;
                RuleRows rows = new(table.For(rule.Id, "npn"), table.For("r-power", "npn"));
                if (of.AppliesTo(point.Role) && of.Asked(point.Part, model.Channel, rows))
                {
                    yield return Made(new FindingBasis(model, pin, rule, rows, state, point.Slot, of.Evaluate(state, point, model.Channel, rows)));
                }
            }

            foreach (ResistorPoint point in rule is ResistorRule ? state.Resistors : [])
            {
                ResistorRule of = (ResistorRule)rule;
                RuleRows rows = new(table.For(rule.Id, "resistor", point.Part.Style), table.For("r-power", "resistor", point.Part.Style));
                if (of.AppliesTo(point.Part))
                {
                    yield return Made(new FindingBasis(model, pin, rule, rows, state, point.Slot, of.Evaluate(state, point, model.Channel, rows)));
                }
            }
        }
    }

    private static Finding Made(FindingBasis basis) => new()
    {
        Channel = basis.Model.Channel.Name,
        Rule = basis.Rule.Id,
        Reference = basis.Slot < basis.Model.Slots.Count ? basis.Model.Slots.Of(basis.Slot)[0].Reference : null,
        State = basis.State.State,
        Actual = double.IsFinite(basis.Stress.Actual) ? basis.Stress.Actual : null,
        Allowed = double.IsFinite(basis.Stress.Allowed) ? basis.Stress.Allowed : null,
        Unit = basis.Stress.Half ? "A" : basis.Rule.Unit,
        StressRatio = basis.Stress.Ratio,
        Verdict = basis.Stress.Verdict,
        Corner = basis.State.Corner,
        Source = basis.Rows.Own.Source,
        Missing = basis.Stress.Missing is { } missing ? [missing] : [],
        Basis = basis.Stress.Verdict == Verdict.NotVerified ? null : basis,
    };

    private BoundChannel Channel()
    {
        int legs = random.Next(1, 5);
        BoundChannel sample = SampleChannel.Channel(legs, feed: Between(800, 6000) / legs);
        Transistor pass = Transistor("TQ-31");
        Transistor other = random.Next(3) == 0 ? Transistor("TQ-33") : pass;
        ResistorPart sense = Resistor(Between(20, 60));
        ResistorPart? averaging = legs == 1 && random.Next(2) == 0 ? null : Resistor(random.Next(5) == 0 ? 0 : Between(30, 300));
        bool unsensed = averaging is not null && legs > 1 && random.Next(3) == 0;
        bool down = random.Next(2) == 0;
        double drop = Between(14, 19);
        return sample with
        {
            Conditions = sample.Conditions with
            {
                Leds = random.Next(4) == 0 ? 0 : 6,
                LoadSlope = Resistance.FromOhms(random.Next(2) == 0 ? 0 : Between(1, 40) / legs),
                LoadDrop = new(Voltage.FromVolts(drop), Voltage.FromVolts(drop + Between(0, 3))),
                OffCurrentMax = Current.FromAmperes(1e-4),
                Duty = random.Next(2) == 0 ? 1 : Between(0.05, 0.95),
                Frequency = random.Next(4) switch { 0 => null, 1 => Frequency.FromHertz(200), _ => Frequency.FromHertz(Between(1000, 20000)) },
                Strings = random.Next(2) == 0 ? 1 : 3,
                StringShareMax = random.Next(2) == 0 ? null : 1.2,
                SharingMax = random.Next(2) == 0 ? null : 1.3,
            },
            Legs = [.. sample.Legs.Select((l, i) => l with
            {
                Pass = l.Pass with { Part = i == legs - 1 ? other : pass },
                Sense = l.Sense with { Part = sense },
                Averaging = averaging is null || (unsensed && i == 0) ? null : SampleChannel.Place(Role.Averaging, i, $"R{i + 11}", averaging),
                Sensed = !(unsensed && i == 0),
            })],
            Leds = [SampleChannel.Place(Role.Led, -1, "D1", Led())],
            Control = sample.Control with { Part = Transistor("TQ-30") },
            Feed = sample.Feed with { Part = Resistor(((ResistorPart)sample.Feed.Part).Resistance.Value.Ohms) },
            PullDown = down ? SampleChannel.Place(Role.PullDown, -1, "R21", Resistor(Between(5e3, 50e3))) : null,
            PullDownAt = random.Next(2) == 0 ? PullDownAt.Base : PullDownAt.Pin,
            Logic = sample.Logic with
            {
                Output = random.Next(3) == 0 ? PinOutput.Ttl : PinOutput.Cmos,
                LowMax = Voltage.FromVolts(0.4),
                LowCurrent = Current.FromAmperes(4e-3),
            },
        };
    }

    private Transistor Transistor(string number)
    {
        Transistor part = SampleChannel.Transistor(number, Between(100, 500)) with
        {
            VbeMatch = random.Next(2) == 0 ? null : Cite(Voltage.FromVolts(0.005)),
            IcboMax = Cite(Current.FromAmperes(Between(1e-8, 2e-6))),
            IcboTemperature = Temperature.FromCelsius(100),
            Coupling = random.Next(3) == 0 ? null : Cite(ThermalResistance.FromKelvinsPerWatt(Between(0, 60))),
            PowerSlope = random.Next(2) == 0 ? null : Cite(Between(1e-3, 4e-3)),
            PowerFlatTo = random.Next(2) == 0 ? null : Cite(Temperature.FromCelsius(Between(25, 50))),
            Vaf = random.Next(3) == 0 ? null : Cite(Voltage.FromVolts(Between(20, 150))),
            Zth = random.Next(2) == 0 ? [] : [Point(1e-6, Between(1, 5)), Point(1e-4, Between(10, 30)), Point(1e-2, Between(50, 90))],
            SoaAtCase = random.Next(2) == 0,
            RthJc = Cite(ThermalResistance.FromKelvinsPerWatt(Between(10, 90))),
            Soa = Cite<IReadOnlyList<SoaPoint>>([Soa(Between(2, 8), 0.1), Soa(Between(10, 20), Between(0.03, 0.09)), Soa(Between(22, 30), Between(0.005, 0.02))]),
            Hfe = random.Next(4) > 0 ? SampleChannel.Transistor().Hfe : Cite<IReadOnlyList<HfePoint>>([new HfePoint(Current.FromAmperes(10e-3), 90, null)]),
        };
        return random.Next(3) > 0 ? part : part with
        {
            RthJa = random.Next(3) == 0 ? null : part.RthJa,
            Card = Cite(new ModelCard(
                "INVENTED",
                new BipolarParameters
                {
                    Is = Between(5e-15, 5e-14),
                    Bf = Between(100, 300),
                    Vaf = Between(30, 120),
                    Ikf = Between(0.02, 0.3),
                    Ise = 1e-15,
                    Ne = 1.6,
                    Br = 4,
                    Nf = Between(0.99, 1.03),
                    Rb = random.Next(2) == 0 ? 0 : Between(5, 200),
                    Re = random.Next(2) == 0 ? 0 : Between(0.05, 1),
                    Rc = Between(0, 2),
                    Var = random.Next(2) == 0 ? double.PositiveInfinity : Between(10, 40),
                    Nkf = random.Next(2) == 0 ? 0.5 : 0.6,
                },
                [], [])),
        };
    }

    private LedPart Led() => new()
    {
        PartNumber = "LM-2",
        Cell = "parts.csv!A7",
        ForwardCurrentMax = Cite(Current.FromAmperes(Between(0.02, 0.1))),
        ForwardCurrentFlatTo = random.Next(2) == 0 ? null : Cite(Temperature.FromCelsius(40)),
        ForwardCurrentSlope = random.Next(2) == 0 ? null : Cite(Between(1e-4, 1e-3)),
        TjMax = Cite(Temperature.FromCelsius(110)),
    };

    private ResistorPart Resistor(double ohms) => SampleChannel.Resistor(ohms) with
    {
        Ic = Cite(Current.FromAmperes(1)),
        Tcr = random.Next(3) == 0 ? null : Cite(Between(25e-6, 400e-6)),
        PowerSlope = random.Next(3) == 0 ? Cite(Between(1e-3, 3e-3)) : null,
        PowerFlatTo = random.Next(2) == 0 ? null : Cite(Temperature.FromCelsius(Between(40, 70))),
        WorkingVoltageMax = random.Next(3) == 0 ? null : Cite(Voltage.FromVolts(Between(1, 75))),
        RthJa = random.Next(2) == 0 ? null : Cite(ThermalResistance.FromKelvinsPerWatt(Between(100, 900))),
    };

    private static ZthPoint Point(double seconds, double kelvinsPerWatt) => new(seconds, ThermalResistance.FromKelvinsPerWatt(kelvinsPerWatt));

    private static SoaPoint Soa(double volts, double amperes) => new(Voltage.FromVolts(volts), Current.FromAmperes(amperes));

    private double Between(double low, double high) => low + ((high - low) * random.NextDouble());

    private static Cited<T> Cite<T>(T value) => new(value, "parts.csv!K2");
}
