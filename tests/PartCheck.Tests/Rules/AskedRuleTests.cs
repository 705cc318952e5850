using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class FilmRuleTests : RuleTests
{
    private static readonly FilmRule Rule = new();

    // Film maximum 155 degC, 25 K under it: 130 degC. Ambient 30 degC, 500 K/W: 0.2 W reaches it. 100 ohm.
    private static readonly ResistorPart Chip = SampleChannel.Resistor(100) with { RthJa = States.Cite(ThermalResistance.FromKelvinsPerWatt(500)) };

    protected override Stress Below() => Judge(Chip, 0.1);

    protected override Stress AtTheLimit() => Judge(Chip, 0.2);

    protected override Stress Above() => Judge(Chip, 0.21);

    protected override Stress WithoutTheRating() => Judge(Chip with { TjMax = null }, 0.1);

    [Fact]
    public void WithoutAThermalResistanceItIsNotAsked()
    {
        Assert.True(Rule.AppliesTo(Chip));
        Assert.False(Rule.AppliesTo(SampleChannel.Resistor(100)));
    }

    private static Stress Judge(ResistorPart part, double watts) => States.Judge(
        Rule, States.Of(resistor: States.Resistor(part, 10 * Math.Sqrt(watts), Math.Sqrt(watts) / 10), celsius: 30), States.Row("r-film", 1, 25));
}

public class SoaRuleTests : RuleTests
{
    private static readonly SoaRule Rule = new();

    // 5 V: 200 mA; 20 V: 80 mA. IC 300 mA, Tj max 150 degC.
    private static readonly Transistor Part = SampleChannel.Transistor() with
    {
        Ic = States.Cite(Current.FromAmperes(0.3)),
        Soa = States.Cite<IReadOnlyList<SoaPoint>>(
            [new SoaPoint(Voltage.FromVolts(5), Current.FromAmperes(0.2)), new SoaPoint(Voltage.FromVolts(20), Current.FromAmperes(0.08))]),
    };

    protected override Stress Below() => Judge(Part, 20, 0.05, 25);

    protected override Stress AtTheLimit() => Judge(Part, 20, 0.08 * (1 - 1e-12), 25);

    protected override Stress Above() => Judge(Part, 20, 0.081, 25);

    protected override Stress WithoutTheRating() => Judge(Part with { TjMax = null }, 20, 0.05, 25);

    // 10 V is half way from 5 to 20 V on a log scale: sqrt(200 x 80) = 126.49 mA. At 87.5 degC half of it: (150 - 87.5)/(150 - 25).
    // Below 25 degC no more than the boundary; below the first point the rating; above the last nothing.
    [Theory]
    [InlineData(10, 25, 0.126491)]
    [InlineData(10, 87.5, 0.0632456)]
    [InlineData(10, -40, 0.126491)]
    [InlineData(4, 25, 0.3)]
    [InlineData(20.1, 25, 0)]
    public void TheBoundaryIsStraightOnLogarithmicPaperAndShrinksWithTemperature(double vce, double celsius, double amperes) =>
        Assert.Equal(amperes, Judge(Part, vce, 0.01, celsius).Allowed, 6);

    [Fact]
    public void AtCaseTemperatureTheCaseCounts()
    {
        // Tj 120 degC, 0.1 W, RthJC 325 K/W: case 87.5 degC.
        Transistor part = Part with { SoaAtCase = true, RthJc = States.Cite(ThermalResistance.FromKelvinsPerWatt(325)) };
        Stress stress = States.Judge(Rule, States.Of(States.Pass(part, vce: 10, ic: 0.01, power: 0.1, tj: 120)));
        Assert.Equal(0.0632456, stress.Allowed, 6);
        Assert.Equal("RthJC of TQ-31", States.Judge(Rule, States.Of(States.Pass(part with { RthJc = null }))).Missing);
    }

    [Fact]
    public void WithoutABoundaryItIsNotAsked() => Assert.False(Rule.Asked(SampleChannel.Transistor(), States.Channel, default));

    private static Stress Judge(Transistor part, double vce, double ic, double celsius) =>
        States.Judge(Rule, States.Of(States.Pass(part, vce: vce, ic: ic), celsius: celsius));
}

public class StabilityRuleTests : RuleTests
{
    private static readonly StabilityRule Rule = new();

    // VT at 298.15 K 25.693 mV; 25.693 mA makes VT/IC 1 ohm. Ballast 8.9, RE 0.1: 10 ohm. 300 K/W, 2 mV/K: 0.6 ohm a volt.
    protected override Stress Below() => Judge(10, 300);

    protected override Stress AtTheLimit() => Judge(16.666, 300);

    protected override Stress Above() => Judge(16.68, 300);

    protected override Stress WithoutTheRating() => Judge(10, double.NaN);

    // Own worked example: VCE 3 V, 325 K/W, 2 mV/K: 1.95 ohm; at 20 mA VT/IC is 1.285 ohm: RE of 0.66 ohm holds it just.
    [Theory]
    [InlineData(0.67, Verdict.Conforms)]
    [InlineData(0.65, Verdict.Nonconforming)]
    public void TheWorkedExampleNeedsTwoThirdsOfAnOhm(double ballast, Verdict verdict)
    {
        TransistorPoint point = States.Pass(vce: 3, ic: 0.02, tj: 25) with { Ib = 0, Ballast = ballast, RthJa = 325, VbeSlope = -2e-3 };
        Assert.Equal(verdict, States.Judge(Rule, States.Of(point)).Verdict);
    }

    [Fact]
    public void OneLegAloneIsNotAskedNorIsTheControl()
    {
        Assert.False(Rule.Asked(SampleChannel.Transistor(), SampleChannel.Channel(1), default));
        Assert.True(Rule.Asked(SampleChannel.Transistor(), SampleChannel.Channel(2), default));
        Assert.False(Rule.AppliesTo(Role.Control));
    }

    private static Stress Judge(double vce, double rth) => States.Judge(Rule, States.Of(
        States.Pass(vce: vce, ic: 25.693e-3, tj: 25) with { Ib = 0, Ballast = 8.9, EmitterResistance = 0.1, RthJa = rth, VbeSlope = -2e-3 }));
}

public class SharingRuleTests : RuleTests
{
    private static readonly SharingRule Rule = new();
    private static readonly DeratingRow Quarter = new() { Rule = "sharing", Limit = 1.25, Source = "test" };

    // Two legs of 10 ohm: 0.24 V against 0.16 V is 1.2 times the mean of 0.2 V; 0.25 V against 0.15 V exactly 1.25.
    protected override Stress Below() => Judge(0.24, 0.16);

    protected override Stress AtTheLimit() => Judge(0.25 - 1e-15, 0.15);

    protected override Stress Above() => Judge(0.26, 0.14);

    protected override Stress WithoutTheRating() => Judge(double.NaN, 0.2);

    [Fact]
    public void ItIsAskedByTheChannelOrTheTableForSeveralLegsOnly()
    {
        BoundChannel two = SampleChannel.Channel(2);
        RuleRows none = new(States.Row("sharing"), States.Row("r-power"));
        RuleRows asked = new(Quarter, States.Row("r-power"));
        Assert.False(Rule.Asked(two, none));
        Assert.True(Rule.Asked(two, asked));
        Assert.True(Rule.Asked(two with { Conditions = two.Conditions with { SharingMax = 1.1 } }, none));
        Assert.False(Rule.Asked(SampleChannel.Channel(1), asked));
    }

    // A match of 2 mV shares better than a window of 80 mV.
    [Fact]
    public void OneLotSharesBetterThanAnyTwoParts()
    {
        double matched = Ratio(SampleChannel.Transistor() with { VbeMatch = States.Cite(Voltage.FromVolts(2e-3)) });
        double any = Ratio(SampleChannel.Transistor());
        Assert.InRange(matched, 0.001, 0.6 * any);
    }

    private static double Ratio(Transistor part)
    {
        BoundChannel channel = SampleChannel.Channel(2, feed: 1500);
        channel = channel with { Legs = [.. channel.Legs.Select(l => l with { Pass = l.Pass with { Part = part } })] };
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        ReadingJudgement judged = new ChannelJudge(model, DeratingLibrary.Named("workshop")!).Judge(new PinSource(channel.Logic), 0, CancellationToken.None);
        return judged.Findings.Single(f => f.Rule == "sharing").StressRatio!.Value;
    }

    private static Stress Judge(double one, double other)
    {
        TransistorPoint leg = States.Pass() with { SenseResistance = 10, NominalSense = 10, Count = 1, SenseVoltage = one };
        SolvedState state = new()
        {
            State = ChannelState.On,
            Corner = States.Of().Corner,
            Transistors = new[] { leg, leg with { SenseVoltage = other } },
            Resistors = [],
        };
        return Rule.Evaluate(state, SampleChannel.Channel(2), new RuleRows(Quarter, States.Row("r-power")));
    }
}

public class OffRuleTests : RuleTests
{
    private static readonly OffRule Rule = new();

    // Off current max 100 uA; ICBO 1 uA at 100 degC, ambient up to 55 degC; pin low 0.4 V at 8 mA.
    protected override Stress Below() => Judge(Channel(1e-6, 100), 50e-6);

    protected override Stress AtTheLimit() => Judge(Channel(1e-6, 100), 100e-6);

    protected override Stress Above() => Judge(Channel(1e-6, 100), 101e-6);

    protected override Stress WithoutTheRating() => Judge(Channel(null, 100), 50e-6);

    [Fact]
    public void LeakageBelowTheHottestAmbientSaysNothingThere() =>
        Assert.Equal("ICBO at the hottest ambient of TQ-31", Judge(Channel(1e-6, 25), 50e-6).Missing);

    [Fact]
    public void APinWithoutALowLevelIsNamed() =>
        Assert.Equal("Low max of CTRL-5", Judge(Channel(1e-6, 100) with { Logic = SampleChannel.Channel(1).Logic }, 50e-6).Missing);

    [Fact]
    public void WhereNobodyAsksThereIsNoFinding()
    {
        Assert.DoesNotContain(Findings(SampleChannel.Channel(1, feed: 4700)), f => f.Rule == "off");
        Finding off = Findings(Channel(1e-6, 100)).Single(f => f.Rule == "off");
        Assert.Equal(ChannelState.Off, off.State);
        Assert.Equal(328.15, off.Corner!.Ambient, 9);

        // At least the leakage itself flows in the load, and more where it is amplified.
        Assert.InRange(off.Actual!.Value, 1e-6, 100e-6);
        Assert.True(Findings(Channel(5e-6, 100)).Single(f => f.Rule == "off").Actual > off.Actual);
    }

    private static IReadOnlyList<Finding> Findings(BoundChannel channel) =>
        new ChannelJudge(new ChannelModel(channel, p => new TransistorVariants(p)), DeratingLibrary.Named("workshop")!)
            .Judge(new PinSource(channel.Logic), 0, CancellationToken.None).Findings;

    private static BoundChannel Channel(double? icbo, double celsius)
    {
        BoundChannel channel = SampleChannel.Channel(1, feed: 4700);
        Transistor part = SampleChannel.Transistor() with
        {
            IcboMax = icbo is { } i ? States.Cite(Current.FromAmperes(i)) : null,
            IcboTemperature = Temperature.FromCelsius(celsius),
        };
        return channel with
        {
            Conditions = channel.Conditions with { OffCurrentMax = Current.FromAmperes(100e-6) },
            Logic = channel.Logic with { LowMax = Voltage.FromVolts(0.4), LowCurrent = Current.FromAmperes(8e-3) },
            Legs = [channel.Legs[0] with { Pass = channel.Legs[0].Pass with { Part = part } }],
        };
    }

    private static Stress Judge(BoundChannel channel, double amperes) =>
        States.Judge(Rule, States.Of(state: ChannelState.Off, load: amperes), channel);
}
