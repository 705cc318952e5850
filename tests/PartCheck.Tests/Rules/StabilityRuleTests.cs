using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class StabilityRuleTests : RuleTests<StabilityRule>
{
    // VCE 3 V, RthJA 325 K/W, 2 mV/K: 1.95 ohm. VT/IC at 25 degC and 20 mA: 25.6926 mV/20 mA = 1.28463 ohm; so the edge is at
    // RE = 0.66537 ohm. Below: 1.95/2.28463 = 0.853530. Above: 1.95/1.88463 = 1.034686.
    protected override Stress Below() => Judge(1.0);

    protected override Stress AtTheLimit() => Judge(0.66538);

    protected override Stress Above() => Judge(0.6);

    protected override Stress WithoutTheRating() => States.Judge(Rule, States.Of(Leg(1) with { RthJa = double.NaN }));

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareTransistor, SampleChannel.Channel(1));

    [Theory]
    [InlineData(1.0, 0.853530)]
    [InlineData(0.6, 1.034686)]
    public void TheLoopGainIsTheThermalOverTheElectricalResistance(double re, double gain)
    {
        Stress stress = Judge(re);
        Assert.Equal(gain, stress.Actual, 5);
        Assert.Equal(gain, stress.Ratio!.Value, 5);
    }

    // 5 V x 300 K/W x 2 mV/K = 3 ohm. Sense 56 ohm, averaging 120/47/10 ohm: 56 x 120/176 = 38.1818, 56 x 47/103 = 25.5534,
    // 56 x 10/66 = 8.48485 ohm; with RE 0.1, VT/IC 25.6926 mV/12.3 mA = 2.0888 and RB/hFE 5/250 = 0.02 ohm: 40.39, 27.77 (27.762),
    // 10.70 (10.694) ohm; unsensed 56 ohm alone: 58.21. ngspice 39 measures 40.67, 27.99, 10.84 ohm between two such legs.
    [Theory]
    [InlineData(38.1818, 40.39, 40.67)]
    [InlineData(25.5534, 27.77, 27.99)]
    [InlineData(8.48485, 10.70, 10.84)]
    [InlineData(56, 58.21, null)]
    public void TheBallastIsSenseParallelAveraging(double ballast, double byHand, double? measured)
    {
        double ohms = 3 / States.Judge(Rule, States.Of(Ballasted(ballast))).Actual;
        Assert.InRange(ohms / byHand, 0.999, 1.001);
        Assert.InRange(ohms / (measured ?? byHand), 0.985, 1.001);
    }

    // Half of the edge of stability: 0.853530/0.5.
    [Fact]
    public void TheFactorLowersTheEdge()
    {
        Stress stress = States.Judge(Rule, States.Of(Leg(1)), States.Row("stability", 0.5));
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.Equal(1.70706, stress.Ratio!.Value, 5);
    }

    // Half the time on, from 1 kHz up: half of 0.853530 is 0.426765. Whatever the peak, below 1 kHz the share is 1.
    [Fact]
    public void AveragedPowerHeatsByItsDuty() =>
        Assert.Equal(0.42677, States.Judge(Rule, States.Of(Leg(1) with { AveragedShare = 0.5 })).Actual, 4);

    [Fact]
    public void ALegWithoutCurrentIsStable() => Assert.Equal(0, States.Judge(Rule, States.Of(Leg(0) with { Ic = 0, Ib = 0 })).Ratio!.Value, 12);

    // The leg's own RthJA is known, but another transistor's is not, so no junction was solved warm.
    [Theory]
    [InlineData(1.0, Verdict.NotVerified)]
    [InlineData(0.6, Verdict.Nonconforming)]
    public void WithoutThermalDataTheColdStartRefusesButDoesNotClear(double re, Verdict verdict)
    {
        Transistor cold = SampleChannel.Transistor("TQ-30") with { RthJa = null, Power = null };
        SolvedState state = States.OfLegs(Extreme.Min, Leg(re), States.Pass(cold, Role.Control));
        Stress stress = States.Judge(Rule, state);
        Assert.Equal(verdict, stress.Verdict);
        Assert.Equal(verdict == Verdict.NotVerified ? "RthJA of TQ-30" : null, stress.Missing);
    }

    [Fact]
    public void AskedOfThePassTransistorsOfSeveralLegs()
    {
        Assert.False(States.Asks(Rule, SampleChannel.Transistor(), SampleChannel.Channel(1)));
        Assert.True(States.Asks(Rule, SampleChannel.Transistor(), SampleChannel.Channel(2)));
        Assert.True(Rule.AppliesTo(Role.Pass));
        Assert.False(Rule.AppliesTo(Role.Control));
        Assert.True(Rule.Reads(States.Of()));
        Assert.False(Rule.Reads(States.Of(state: ChannelState.Unfed)));
    }

    // 33 x 100/133 = 24.812 ohm; unsensed 33 ohm. Silicon at constant current: about -(1.206 V - VBE)/T, that is -1.7 mV/K at 0.66 V
    // and 330 K.
    [Theory]
    [InlineData(true, 1, 24.812)]
    [InlineData(false, 1, 33.0)]
    [InlineData(false, 0, 33.0)]
    public void TheSolvedStateCarriesWhatTheRuleReads(bool sensed, int of, double ballast)
    {
        BoundChannel channel = SampleChannel.Channel(2, feed: 1500);
        channel = channel with { Legs = [channel.Legs[0], channel.Legs[1] with { Sensed = sensed }] };
        SolvedState? state = WorstCase.Nominal(new ChannelModel(channel, p => new TransistorVariants(p)), new PinSource(channel.Logic));
        Assert.NotNull(state);
        TransistorPoint leg = state.Transistors[of];
        Assert.Equal(ballast, leg.Ballast, 3);
        Assert.Equal(300, leg.RthJa, 9);
        Assert.InRange(leg.VbeSlope, -2.2e-3, -1.3e-3);
    }

    private static Stress Judge(double re) => States.Judge(Rule, States.Of(Leg(re)));

    private static TransistorPoint Leg(double re) => States.Pass(vce: 3, ic: 0.02, tj: 25) with
    {
        RthJa = 325,
        VbeSlope = -2e-3,
        EmitterResistance = re,
        Count = 1,
    };

    private static TransistorPoint Ballasted(double ballast) => States.Pass(vce: 5, ic: 0.0123, tj: 25) with
    {
        Ib = 0.0123 / 250,
        RthJa = 300,
        VbeSlope = -2e-3,
        EmitterResistance = 0.1,
        BaseResistance = 5,
        Ballast = ballast,
        Count = 1,
    };
}
