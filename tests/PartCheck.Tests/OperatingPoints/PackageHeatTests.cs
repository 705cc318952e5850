using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Tests.Rules;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>Transistors that share a package.</summary>
public class PackageHeatTests
{
    private static readonly BipolarDevice Device = new(new BipolarParameters
    {
        Is = 1e-14,
        Nf = 1,
        Bf = 250,
        Vaf = 80,
        Ikf = 0.2,
        Ise = 1e-14,
        Ne = 1.5,
        Br = 4,
        Xti = 3,
        Eg = 1.11,
        Xtb = 1.5,
        Rb = 5,
        Rc = 0.5,
        Re = 0.1,
    });

    // One element on 500 K/W, both on 350 K/W over the sum: 1 W in each is 700 K, of which 500 its own and 200 the other's. Four elements,
    // 500 and 200 K/W: 4 W are 800 K, 500 its own and 100 of each other. Missing: none or all of it.
    [Theory]
    [InlineData(2, 350.0, 0, 200)]
    [InlineData(2, 250.0, 0, 0)]
    [InlineData(2, 500.0, 0, 500)]
    [InlineData(4, 200.0, 0, 100)]
    [InlineData(2, null, 0, 0)]
    [InlineData(2, null, 1, 500)]
    public void TheCouplingFollowsFromOneOnAndBothOn(int elements, double? both, double share, double coupling) =>
        Assert.Equal(coupling, PackageHeat.Coupling(Dual(both) with { Elements = elements }, 500, share), 9);

    // Fixed point in ngspice 39 (each junction at 40 degC plus RthJA times its printed power plus the coupling times the other's, until none
    // moves by 0.01 mK): sense 56 ohm, pin 5 V, feed 2.2 k, 12 V, drop 3 V, RthJA 500 and coupling 200 K/W. Apart the control stays at 41.1 degC.
    [Theory]
    [InlineData(200, 59.342, 86.174, 10.908440e-3, 1.2349719)]
    [InlineData(0, 41.055, 87.948, 11.473917e-3, 1.2655489)]
    public void PassAndControlInOnePackage(double coupling, double control, double pass, double load, double baseNode)
    {
        OperatingPoint p = Solve(Circuit(2.2e3, load, 500, Leg(56, 500)) with { Package = Pair(0, 1, coupling) });
        Assert.Equal(control + 273.15, p.Control.Tj, 2);
        Assert.Equal(pass + 273.15, p.Legs[0].Tj, 2);
        Assert.InRange(p.LoadCurrent / load, 0.9999, 1.0001);
        Assert.InRange(p.BaseVoltage / baseNode, 0.9999, 1.0001);
    }

    // The same with two legs, sense 56 and 82 ohm, averaging 120 ohm, feed 1 k, RthJA 400 (control 300) and coupling 240 K/W.
    [Fact]
    public void TwoPassTransistorsInOnePackage()
    {
        OperatingPoint p = Solve(Circuit(1e3, 19.966754e-3, 300, Leg(56, 400) with { Averaging = 120 }, Leg(82, 400) with { Averaging = 120 }) with { Package = Pair(1, 2, 240) });
        Assert.Equal(41.405 + 273.15, p.Control.Tj, 2);
        Assert.Equal(95.701 + 273.15, p.Legs[0].Tj, 2);
        Assert.Equal(90.821 + 273.15, p.Legs[1].Tj, 2);
        Assert.InRange(p.LoadCurrent / 19.966754e-3, 0.9999, 1.0001);
    }

    // Two equal legs in one package written as one group, whose power then heats itself once more.
    [Fact]
    public void EqualElementsMayBeCounted()
    {
        LegGroup leg = Leg(56, 400) with { Averaging = 120 };
        SinkCircuit apart = Circuit(1e3, 23e-3, 300, leg, leg) with { Package = Pair(1, 2, 240) };
        OperatingPoint one = Solve(apart);
        OperatingPoint counted = Solve(apart with { Legs = [leg with { Count = 2 }], Package = [new PackageCoupling(1, 1, 240)] });
        Assert.Equal(one.Legs[0].Tj, counted.Legs[0].Tj, 4);
        Assert.Equal(one.LoadCurrent, counted.LoadCurrent, 9);
        Assert.InRange(one.Legs[0].Tj - (313.15 + (640 * one.Legs[0].Power)), -1e-3, 1e-3);
    }

    // 400 K/W alone leave it well below; with all of its neighbour's heat besides, 12 V and 24 mA a leg, it passes 473 K.
    [Fact]
    public void AJunctionThatItsNeighbourDrivesOverIsHeld()
    {
        LegGroup leg = Leg(27, 500) with { Averaging = 60, Heat = new JunctionHeat(313.15, 500, 423.15) };
        SinkCircuit circuit = Circuit(300, 45e-3, 0, leg, leg);
        OperatingPoint p = Solve(circuit with { Package = Pair(1, 2, 500) });
        Assert.Contains(p.Legs, l => l.Held);
        Assert.All(p.Legs.Where(l => l.Held), l => Assert.Equal(423.15, l.Tj, 9));
    }

    // Q1.1 Q1.2 | Q2.1 Q2.2: with one odd leg its partner is no longer like the other two.
    [Fact]
    public void TheOddLegsPartnerStandsApart()
    {
        ChannelModel model = Model(Channel(Dual(350), "Q1.1", "Q1.2", "Q2.1", "Q2.2"));
        Assert.Single(model.Classes);
        Assert.Equal(["0,1,2,3"], model.Cells(-1).Select(c => string.Join(',', c.Legs)));
        Assert.Equal(["0", "1", "2,3"], model.Cells(0).Select(c => string.Join(',', c.Legs)));
        Assert.Equal([true, false, false], model.Cells(0).Select(c => c.Odd));
    }

    // The leg beside the control sees another neighbour than the rest.
    [Fact]
    public void TheLegBesideTheControlIsAClassOfItsOwn()
    {
        BoundChannel channel = Channel(Dual(350), "Q1.1", "Q2.1", "Q3.1");
        ChannelModel model = Model(channel with { Control = SampleChannel.Place(Role.Control, -1, "Q2.2", Dual(350)) });
        Assert.Equal(["Q1.1,Q3.1", "Q2.1"], model.Classes.Select(c => string.Join(',', c.Legs.Select(l => l.Pass.Reference))));
        Assert.True(model.Package.WithControl(1));
        Assert.False(model.Package.WithControl(0));
    }

    /// <summary>
    /// Each junction of each corner: ambient, its own power, its partners' and its neighbours'. 200 and 140 K/W: 80 K/W pass; missing, none or 200.
    /// </summary>
    [Theory]
    [InlineData(140.0)]
    [InlineData(null)]
    public void EveryCornerHeatsAsTheModelSays(double? both)
    {
        BoundChannel channel = Channel(Dual(both, 200), "Q1.1", "Q1.2", "Q2.1") with { Neighbours = [new ElementNeighbour("Q2.1", "Q2.2", "CH2")] };
        ChannelModel model = Model(channel, new Dictionary<string, double> { ["Q2.2"] = 0.05 });
        PinSource pin = new(channel.Logic);
        HashSet<(int, double?, bool?)> seen = [];
        foreach (ChannelBox box in WorstCase.Boxes(model, pin).Where(b => b.State == ChannelState.On))
        {
            CornerSolver solver = new(model, pin, null);
            for (int i = 0; i < box.Count; i += 997)
            {
                SolvedState s = solver.Solve(box, i);
                Assert.True(s.Solved);
                Corner c = s.Corner;
                seen.Add((c.Heat, c.AssumedPackageCoupling, c.NeighboursOn));
                double coupling = both is null ? 200 * (c.AssumedPackageCoupling ?? 0) : 80;
                for (int g = 0; g < s.Transistors.Count - 1; g++)
                {
                    TransistorPoint q = s.Transistors[g];
                    LegCell cell = model.Cells(box.OddClass)[g];
                    double beside = cell.Legs[0] == 2 ? (c.NeighboursOn == true ? 0.05 : 0) : c.Heat * PartnerPower(model, box, s, cell);
                    Assert.InRange(q.Tj - (c.Ambient + (c.Heat * 200 * q.Power) + (coupling * beside)), -1e-3, 1e-3);
                    Assert.Equal(q.Power + (cell.Legs[0] == 2 ? beside : PartnerPower(model, box, s, cell)), q.PackagePower, 9);
                }
            }
        }

        Assert.Equal(both is null ? 7 : 4, seen.Count);
        Assert.Equal(both is null, model.Assumed.Any(a => a is { What: "RthJA both", Of: "TQ-2" }));
    }

    // At 2 kHz and a duty of 25 % without Zth points the average power heats: a quarter of the 200 K/W while on, and the package is judged by
    // a quarter of what its elements take while on.
    [Fact]
    public void UnderPwmTheAverageHeatsTheOtherElement()
    {
        BoundChannel channel = Channel(Dual(350), "Q1.1", "Q1.2");
        channel = channel with { Conditions = channel.Conditions with { Duty = 0.25, Frequency = Frequency.FromHertz(2000) } };
        ChannelModel model = Model(channel);
        PinSource pin = new(channel.Logic);
        ChannelBox box = WorstCase.Boxes(model, pin)[0];
        int hot = Enumerable.Range(0, box.Count).First(i => box.At(i).Corner.Heat == 1);
        Assert.Equal([50.0, 50.0], box.At(hot).Circuit.Package.Select(p => p.Rth));
        SolvedState s = new CornerSolver(model, pin, null).Solve(box, hot);
        Assert.Equal(0.25 * (s.Transistors[0].Power + s.Transistors[1].Power), s.Transistors[0].PackagePower, 9);
    }

    [Fact]
    public void ANeighbourWhoseChannelIsNotSolvedIsMissing()
    {
        BoundChannel channel = Channel(Dual(350), "Q1.1") with { Neighbours = [new ElementNeighbour("Q1.1", "Q1.2", "CH2")] };
        Assert.Equal("dissipation of Q1.2 in channel CH2", Model(channel, new Dictionary<string, double>()).Package.Missing);
        Assert.Null(Model(channel, new Dictionary<string, double> { ["q1.2"] = 0.1 }.ToDictionary(StringComparer.OrdinalIgnoreCase)).Package.Missing);
        Assert.False(Model(channel).Package.HasNeighbours);
    }

    private static double PartnerPower(ChannelModel model, ChannelBox box, SolvedState s, LegCell cell)
    {
        int partner = cell.Legs[0] == 0 ? 1 : 0;
        return s.Transistors[model.Cells(box.OddClass).ToList().FindIndex(c => c.Legs.Contains(partner))].Power;
    }

    private static ChannelModel Model(BoundChannel channel, IReadOnlyDictionary<string, double>? powers = null)
    {
        Dictionary<Transistor, TransistorVariants> made = new(ReferenceEqualityComparer.Instance);
        return new ChannelModel(channel, p => made.TryGetValue(p, out TransistorVariants? v) ? v : made[p] = new TransistorVariants(p), powers);
    }

    private static BoundChannel Channel(Transistor part, params string[] references)
    {
        BoundChannel sample = SampleChannel.Channel(references.Length, feed: 1500);
        return sample with { Legs = [.. sample.Legs.Select((l, i) => l with { Pass = SampleChannel.Place(Role.Pass, i, references[i], part) })] };
    }

    private static Transistor Dual(double? both, double one = 500) => SampleChannel.Transistor("TQ-2", one) with
    {
        Elements = 2,
        RthJaBoth = both is { } rth ? States.Cite(ThermalResistance.FromKelvinsPerWatt(rth)) : null,
    };

    private static PackageCoupling[] Pair(int one, int other, double rth) =>
        rth == 0 ? [] : [new PackageCoupling(one, other, rth), new PackageCoupling(other, one, rth)];

    private static LegGroup Leg(double sense, double rth) => new(1, Device, sense, 0, true, new JunctionHeat(313.15, rth, 1000));

    private static SinkCircuit Circuit(double feed, double load, double controlRth, params LegGroup[] legs) => new()
    {
        PinVoltage = 5,
        Feed = feed,
        Supply = 12,
        Load = LoadElement.FromDrop(3, load, 0, 1),
        Control = Device,
        ControlHeat = new JunctionHeat(313.15, controlRth, 1000),
        Legs = legs,
    };

    private static OperatingPoint Solve(SinkCircuit circuit)
    {
        SinkSolver solver = new();
        OperatingPoint? point = solver.Solve(circuit);
        Assert.True(point is not null, $"{solver.Failure}");
        return point;
    }
}
