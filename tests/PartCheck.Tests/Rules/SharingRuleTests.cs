using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class SharingRuleTests : RuleTests<SharingRule>
{
    private static readonly Transistor Lot = SampleChannel.Transistor() with { VbeMatch = States.Cite(Voltage.FromVolts(0.002)) };

    // Allowed 1.1 - 1 = 0.1. Means 0.60 V: 0.63/0.60 - 1 = 0.05; 0.66/0.60 - 1 = 0.1; 0.67/0.60 - 1 = 0.1167.
    protected override Stress Below() => Judge(0.63, 0.57);

    protected override Stress AtTheLimit() => Judge(0.66, 0.54);

    protected override Stress Above() => Judge(0.67, 0.53);

    protected override Stress WithoutTheRating() =>
        States.Judge(Rule, States.OfLegs(Extreme.Min, Leg(0.63), Leg(0.57)), SampleChannel.Channel(2));

    protected override bool AskedByNobody() => States.Asks(Rule, SampleChannel.Channel(2));

    // One odd leg and seven others: mean (0.76 + 7 x 0.60)/8 = 0.62; 0.76/0.62 - 1 = 0.225806.
    [Fact]
    public void TheRestCountsAsOftenAsItStands()
    {
        SolvedState state = States.OfLegs(Extreme.Min, Leg(0.76), Leg(0.60) with { Count = 7 });
        Assert.Equal(0.225806, States.Judge(Rule, state, Limited(1.3)).Actual, 6);
    }

    // 20 ohm and 40 ohm nominal, in the corner 19.8 and 40.4 ohm, both at 0.6 V: 0.6/19.8 x 20 = 0.606061 V, 0.6/40.4 x 40 = 0.594059 V;
    // mean 0.600060; 0.606061/0.600060 - 1 = 0.0100.
    [Fact]
    public void ALegIsWeighedByItsNominalSense()
    {
        SolvedState state = States.OfLegs(
            Extreme.Min, Leg(0.6) with { SenseResistance = 19.8, NominalSense = 20 }, Leg(0.6) with { SenseResistance = 40.4, NominalSense = 40 });
        Assert.Equal(0.0100, States.Judge(Rule, state, Limited(1.1)).Actual, 5);
    }

    [Fact]
    public void TheChannelsLimitComesBeforeTheTables()
    {
        SolvedState state = States.OfLegs(Extreme.Min, Leg(0.63), Leg(0.57));
        DeratingRow row = States.Row("sharing") with { Limit = 1.2 };
        Assert.Equal(0.2, States.Judge(Rule, state, row, SampleChannel.Channel(2)).Allowed, 9);
        Assert.Equal(0.1, States.Judge(Rule, state, row, Limited(1.1)).Allowed, 9);
    }

    [Fact]
    public void AskedWhereSeveralLegsHaveALimit()
    {
        DeratingRow row = States.Row("sharing") with { Limit = 1.2 };
        Assert.True(States.Asks(Rule, Limited(1.1)));
        Assert.True(States.Asks(Rule, SampleChannel.Channel(2), row));
        Assert.False(States.Asks(Rule, SampleChannel.Channel(2)));
        Assert.False(States.Asks(Rule, SampleChannel.Channel(1), row));
    }

    // A table's limit at or below the mean can hold for nobody: it is judged, not dropped.
    [Fact]
    public void ALimitBelowTheMeanIsNotSilentlyDropped()
    {
        DeratingRow row = States.Row("sharing") with { Limit = 0.9 };
        Assert.True(States.Asks(Rule, SampleChannel.Channel(2), row));
        SolvedState state = States.OfLegs(Extreme.Min, Leg(0.601), Leg(0.599));
        Assert.Equal(Verdict.Nonconforming, States.Judge(Rule, state, row, SampleChannel.Channel(2)).Verdict);
    }

    [Theory]
    [InlineData(false, false, Extreme.Max, true)]
    [InlineData(false, false, Extreme.Match, false)]
    [InlineData(true, true, Extreme.Match, true)]
    [InlineData(true, true, Extreme.Max, false)]
    [InlineData(true, false, Extreme.Max, true)]
    [InlineData(true, false, Extreme.Match, false)]
    public void AMatchCountsWhereEveryLegHasOne(bool first, bool second, Extreme odd, bool reads)
    {
        SolvedState state = States.OfLegs(odd, Leg(0.6, first ? Lot : null), Leg(0.6, second ? Lot : null));
        Assert.Equal(reads, Rule.Reads(state));
    }

    [Theory]
    [InlineData(0.63, Verdict.NotVerified)]
    [InlineData(0.67, Verdict.Nonconforming)]
    public void WithoutThermalDataTheColdStartRefusesButDoesNotClear(double odd, Verdict verdict)
    {
        Transistor cold = SampleChannel.Transistor() with { RthJa = null, Power = null };
        SolvedState state = States.OfLegs(Extreme.Min, Leg(odd, cold), Leg(1.2 - odd, cold));
        Assert.Equal(verdict, States.Judge(Rule, state, Limited(1.1)).Verdict);
    }

    // Two legs, 24 V, 17 V, 25 degC, sense 33 ohm, averaging 100 ohm: VCE about 6.4 V at 17 mA. Ballast 24.8 ohm and VT/IC 1.5 ohm;
    // S = 6.4 x 300 x 1.8e-3/26.3 = 0.13. Sense voltage at the least VBE of the control about 0.55 V. The whole window, 80 mV:
    // 80 x 24.8/26.3/(1 - 0.13) = 87 mV between the senses, half of it over 550 mV = 0.079, and 1 % of the sense resistors:
    // about 0.09. A match of 2 mV: 0.002 and 0.01, about 0.0125.
    [Theory]
    [InlineData(false, 0.075, 0.105, Verdict.Nonconforming)]
    [InlineData(true, 0.0105, 0.0160, Verdict.Conforms)]
    public void LegsOfOneLotShareMuchBetterThanTheWholeWindow(bool matched, double least, double most, Verdict verdict)
    {
        Finding finding = EndToEnd(matched ? Lot : SampleChannel.Transistor(), 0.01);
        Assert.Equal(verdict, finding.Verdict);
        Assert.InRange(finding.Actual!.Value, least, most);
        Assert.Equal(0.05, finding.Allowed!.Value, 9);
        Assert.Equal(matched, finding.Corner!.OddPass.Vbe == Extreme.Match);
    }

    // The first leg alone is sensed, directly: the control holds its sense voltage at 0.55 V, the second's is 80 x 33/34.5/(1 - 0.10) =
    // 85 mV off. 0.55/0.5075 - 1 = 0.084 where it is below, and 1 % of the sense resistors: about 0.09.
    [Fact]
    public void ALegThatIsNotSensedStandsApartByItsWindow()
    {
        Finding finding = EndToEnd(SampleChannel.Transistor(), 0.01, sensedAlone: true);
        Assert.Equal(Verdict.Nonconforming, finding.Verdict);
        Assert.InRange(finding.Actual!.Value, 0.075, 0.105);
    }

    [Fact]
    public void AMissingToleranceDoesNotCountAsNone()
    {
        Finding finding = EndToEnd(Lot, null);
        Assert.Equal(Verdict.NotVerified, finding.Verdict);
        Assert.Equal(["Tolerance of RK-33"], finding.Missing);
    }

    private static Finding EndToEnd(Transistor pass, double? tolerance, bool sensedAlone = false)
    {
        BoundChannel sample = Limited(1.05);
        ResistorPart sense = SampleChannel.Resistor(33) with { Tolerance = tolerance is { } t ? States.Cite(t) : null };
        Temperature room = Temperature.FromCelsius(25);
        BoundChannel channel = sample with
        {
            Legs = [.. sample.Legs.Select((l, i) => l with
            {
                Pass = l.Pass with { Part = pass },
                Sense = l.Sense with { Part = sense },
                Averaging = sensedAlone ? null : l.Averaging,
                Sensed = !sensedAlone || i == 0,
            })],
            Conditions = sample.Conditions with
            {
                Supply = new(Voltage.FromVolts(24), Voltage.FromVolts(24)),
                LoadDrop = new(Voltage.FromVolts(17), Voltage.FromVolts(17)),
                Ambient = new(room, room),
            },
        };
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        ReadingJudgement judgement = new ChannelJudge(model, new DeratingTable("none", null, []))
            .Judge(new PinSource(channel.Logic), 0, TestContext.Current.CancellationToken);
        Assert.Equal(0, judgement.NotSolved);
        return Assert.Single(judgement.Findings, f => f.Rule == "sharing");
    }

    private static BoundChannel Limited(double ratio)
    {
        BoundChannel channel = SampleChannel.Channel(2, feed: 1500);
        return channel with { Conditions = channel.Conditions with { SharingMax = ratio } };
    }

    private static Stress Judge(double odd, double rest) => States.Judge(Rule, States.OfLegs(Extreme.Min, Leg(odd), Leg(rest)), Limited(1.1));

    private static TransistorPoint Leg(double senseVoltage, Transistor? part = null) => States.Pass(part) with
    {
        SenseVoltage = senseVoltage,
        SenseResistance = 33,
        NominalSense = 33,
        Count = 1,
    };
}
