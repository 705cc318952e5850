using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class OffRuleTests : RuleTests<OffRule>
{
    // Hottest ambient of the sample channel: 55 degC.
    private static readonly Transistor Leaky = SampleChannel.Transistor() with
    {
        IcboMax = States.Cite(Current.FromAmperes(10e-6)),
        IcboTemperature = Temperature.FromCelsius(55),
    };

    protected override Stress Below() => Judge(15e-6);

    protected override Stress AtTheLimit() => Judge(20e-6);

    protected override Stress Above() => Judge(20.1e-6);

    protected override Stress WithoutTheRating() => States.Judge(Rule, Off(15e-6), Channel(Leaky with { IcboMax = null }));

    protected override bool AskedByNobody() => States.Asks(Rule, SampleChannel.Channel(1));

    [Fact]
    public void WhatIsMissingIsNamed()
    {
        BoundChannel channel = Channel(Leaky);
        Assert.Equal("Low max of CTRL-5", Missing(channel with { Logic = channel.Logic with { LowMax = null } }));
        Assert.Equal("Low current of CTRL-5", Missing(channel with { Logic = channel.Logic with { LowCurrent = null } }));
        Assert.Null(Missing(channel with { Logic = channel.Logic with { LowCurrent = null, Output = PinOutput.Ttl } }));
        Assert.Equal("ICBO of TQ-31", Missing(Channel(Leaky with { IcboTemperature = null })));
        Assert.Equal("ICBO at the hottest ambient of TQ-31", Missing(Channel(Leaky with { IcboTemperature = Temperature.FromCelsius(54.9) })));
        Assert.Equal("Off current max", Missing(channel with { Conditions = channel.Conditions with { OffCurrentMax = null } }));
    }

    // An assumed VBE refuses, but does not clear.
    [Theory]
    [InlineData(15e-6, Verdict.NotVerified)]
    [InlineData(25e-6, Verdict.Nonconforming)]
    public void WithoutVbeNothingIsCleared(double load, Verdict verdict)
    {
        Transistor part = Leaky with { Vbe = null };
        Assert.Equal(verdict, States.Judge(Rule, States.Of(States.Pass(part), state: ChannelState.Off, load: load), Channel(part)).Verdict);
    }

    [Fact]
    public void ReadsTheEnumeratedStatesWithThePinLow()
    {
        BoundChannel channel = Channel(Leaky);
        SolvedState? pinLow = WorstCase.PinLow(new ChannelModel(channel, p => new TransistorVariants(p)), 328.15);
        Assert.NotNull(pinLow);
        Assert.False(Rule.Reads(pinLow));
        Assert.True(Rule.Reads(Off(1e-6)));
        Assert.False(Rule.Reads(States.Of()));
        Assert.False(Rule.Reads(States.Of(state: ChannelState.Unfed)));
    }

    [Fact]
    public void AskedOnlyByTheChannelsLimit()
    {
        Assert.True(States.Asks(Rule, Channel(Leaky)));
        Assert.False(States.Asks(Rule, SampleChannel.Channel(1)));
    }

    // The pin: 0.4 V/8 mA = 50 ohm to ground, with the feed of 2200 ohm (+1 %): 10 uA lift the base to 23 mV, far below the
    // 0.55 V or so of a junction that conducts; so the load carries the 10 uA of leakage, half of 20 uA and twice 5 uA.
    [Theory]
    [InlineData(20e-6, 0.5, Verdict.Conforms)]
    [InlineData(5e-6, 2.0, Verdict.Nonconforming)]
    public void TheLeakageReachesTheLoad(double limit, double ratio, Verdict verdict)
    {
        Finding finding = Assert.Single(EndToEnd(Channel(Leaky, limit)));
        Assert.Equal(verdict, finding.Verdict);
        Assert.Equal(ChannelState.Off, finding.State);
        Assert.InRange(finding.Actual!.Value, 9.999e-6, 10.01e-6);
        Assert.InRange(finding.StressRatio!.Value / ratio, 0.9999, 1.001);
        Assert.Equal("A", finding.Unit);
        Assert.Equal(328.15, finding.Corner!.Ambient, 9);
        Assert.Equal(0, finding.Corner.Heat);
    }

    // Two legs leak twice as much.
    [Fact]
    public void EveryLegLeaks() =>
        Assert.InRange(Assert.Single(EndToEnd(Channel(Leaky, 50e-6, legs: 2))).Actual!.Value, 19.998e-6, 20.02e-6);

    [Fact]
    public void LeakageGivenBelowTheHottestAmbientIsNotVerified()
    {
        Finding finding = Assert.Single(EndToEnd(Channel(Leaky with { IcboTemperature = Temperature.FromCelsius(25) })));
        Assert.Equal(Verdict.NotVerified, finding.Verdict);
        Assert.Equal(["ICBO at the hottest ambient of TQ-31"], finding.Missing);
    }

    [Fact]
    public void WithoutALimitThereIsNoFinding()
    {
        BoundChannel channel = Channel(Leaky);
        Assert.Empty(EndToEnd(channel with { Conditions = channel.Conditions with { OffCurrentMax = null } }));
    }

    private static List<Finding> EndToEnd(BoundChannel channel)
    {
        Temperature hottest = Temperature.FromCelsius(55);
        BoundChannel narrow = channel with
        {
            Conditions = channel.Conditions with
            {
                Supply = new(Voltage.FromVolts(24), Voltage.FromVolts(24)),
                LoadDrop = new(Voltage.FromVolts(17), Voltage.FromVolts(17)),
                Ambient = new(hottest, hottest),
            },
        };
        ReadingJudgement judgement = new ChannelJudge(new ChannelModel(narrow, p => new TransistorVariants(p)), new DeratingTable("none", null, []))
            .Judge(new PinSource(narrow.Logic), 0, TestContext.Current.CancellationToken);
        Assert.Equal(0, judgement.NotSolved);
        Assert.Contains(judgement.Findings, f => f.Rule == "current");
        return [.. judgement.Findings.Where(f => f.Rule == "off")];
    }

    private static BoundChannel Channel(Transistor pass, double limit = 20e-6, int legs = 1)
    {
        BoundChannel sample = SampleChannel.Channel(legs);
        return sample with
        {
            Conditions = sample.Conditions with { OffCurrentMax = Current.FromAmperes(limit) },
            Logic = sample.Logic with { LowMax = Voltage.FromVolts(0.4), LowCurrent = Current.FromAmperes(8e-3) },
            Legs = [.. sample.Legs.Select(l => l with { Pass = l.Pass with { Part = pass } })],
        };
    }

    private static SolvedState Off(double load) => States.Of(States.Pass(Leaky), state: ChannelState.Off, load: load);

    private static string? Missing(BoundChannel channel) => States.Judge(Rule, Off(15e-6), channel).Missing;

    private static Stress Judge(double load) => States.Judge(Rule, Off(load), Channel(Leaky));
}
