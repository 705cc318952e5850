using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class CurrentRuleTests : RuleTests<CurrentRule>
{
    // The sample's window is 14 to 28 mA.
    protected override Stress Below() => Judge(0.024);

    protected override Stress AtTheLimit() => Judge(0.028 * (1 - 1e-12));

    protected override Stress Above() => Judge(0.0281);

    protected override Stress WithoutTheRating() => States.Judge(Rule, States.Of(States.Pass(SampleChannel.Transistor() with { Vbe = null }), load: 0.02));

    protected override bool AskedByNobody() => States.Asks(Rule, SampleChannel.Channel(1));

    // Centre 21 mA, half width 7 mA: 24.5 and 17.5 mA stand half way out, 12.6 mA 1.2 times.
    [Theory]
    [InlineData(0.0245, 0.5, 0.028)]
    [InlineData(0.0175, 0.5, 0.014)]
    [InlineData(0.0126, 1.2, 0.014)]
    public void TheRatioIsTheDistanceFromTheCentre(double load, double ratio, double end)
    {
        Stress stress = Judge(load);
        Assert.Equal(ratio, stress.Ratio!.Value, 9);
        Assert.Equal(end, stress.Allowed, 9);
    }

    [Fact]
    public void APinBeyondItsGuaranteeLeavesTheLowerHalfOpenOnly()
    {
        Assert.Equal(Verdict.NotVerified, States.Judge(Rule, States.Of(States.Pass(), load: 0.012, pinHolds: false)).Verdict);
        Assert.Equal(Verdict.Nonconforming, States.Judge(Rule, States.Of(States.Pass(), load: 0.030, pinHolds: false)).Verdict);
    }

    // 25 mA is in the upper half, but at a level that nobody guarantees the current may be any lower one.
    [Fact]
    public void APinBeyondItsGuaranteeClearsNothing() =>
        Assert.Equal(Verdict.NotVerified, States.Judge(Rule, States.Of(States.Pass(), load: 0.025, pinHolds: false)).Verdict);

    [Theory]
    [InlineData(0.02, Verdict.NotVerified)]
    [InlineData(0.03, Verdict.Nonconforming)]
    public void WithoutThermalDataTheColdStartRefusesButDoesNotClear(double load, Verdict verdict) =>
        Assert.Equal(verdict, States.Judge(Rule, States.Of(States.Pass(NoHeat), load: load)).Verdict);

    [Fact]
    public void OneEndOfTheVbeWindowAloneIsNotEnough()
    {
        VbeWindow window = new(null, null, Voltage.FromVolts(0.7), Current.FromAmperes(0.01), Voltage.FromVolts(5));
        Assert.Equal("VBE of TQ-31", Judge(window).Missing);
        Assert.Equal(Verdict.Conforms, Judge(window with { Min = Voltage.FromVolts(0.6) }).Verdict);
        Assert.Equal(Verdict.Conforms, Judge(window with { Typ = Voltage.FromVolts(0.65) }).Verdict);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void GainBeyondItsPointsIsNotVerified(bool holds) =>
        Assert.Equal(holds ? Verdict.Conforms : Verdict.NotVerified, States.Judge(Rule, States.Of(States.Pass(), load: 0.02, gainHolds: holds)).Verdict);

    [Fact]
    public void AMissingToleranceIsNamed()
    {
        ResistorPart part = SampleChannel.Resistor(33) with { Tolerance = null };
        Assert.Equal("Tolerance of RK-33", States.Judge(Rule, States.Of(States.Pass(), States.Resistor(part, 0.66, 0.02))).Missing);
    }

    private static readonly Transistor NoHeat = SampleChannel.Transistor() with { RthJa = null, Power = null };

    private static Stress Judge(double load) => States.Judge(Rule, States.Of(States.Pass(), load: load));

    private static Stress Judge(VbeWindow window) =>
        States.Judge(Rule, States.Of(States.Pass(SampleChannel.Transistor() with { Vbe = States.Cite(window) }), load: 0.02));
}

public class HeadroomRuleTests : RuleTests<HeadroomRule>
{
    // VCEsat max 0.3 V at 50 mA; at 20 mA it counts as it stands. Window from 14 mA.
    protected override Stress Below() => Judge(0.5, 0.02);

    protected override Stress AtTheLimit() => Judge(0.3, 0.02);

    protected override Stress Above() => Judge(0.29, 0.02);

    protected override Stress WithoutTheRating() => States.Judge(
        Rule, States.Of(States.Pass(SampleChannel.Transistor() with { VceSatMax = null }, vce: 2), lowest: true));

    protected override bool AskedByNobody() => States.Asks(Rule, SampleChannel.Channel(1));

    // At 100 mA twice the saturation voltage is wanted: 0.6 V.
    [Fact]
    public void AboveTheTestCurrentMoreVoltageIsWanted() => Assert.Equal(0.6, Judge(0.6, 0.1).Allowed, 9);

    [Fact]
    public void TooLittleCurrentIsTheOtherHalf()
    {
        Stress stress = Judge(5, 0.007);
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.Equal(2, stress.Ratio!.Value, 9);
        Assert.True(stress.Half);
    }

    [Fact]
    public void WithoutASaturationVoltageTooLittleCurrentIsStillNonconforming() => Assert.Equal(Verdict.Nonconforming, States.Judge(
        Rule, States.Of(States.Pass(SampleChannel.Transistor() with { VceSatMax = null }, vce: 2), load: 0.01, lowest: true)).Verdict);

    [Theory]
    [InlineData(0.02, Verdict.NotVerified)]
    [InlineData(0.01, Verdict.Nonconforming)]
    public void WithoutThermalDataTheColdStartRefusesButDoesNotClear(double load, Verdict verdict) => Assert.Equal(verdict, States.Judge(
        Rule, States.Of(States.Pass(SampleChannel.Transistor() with { RthJa = null, Power = null }), load: load, lowest: true)).Verdict);

    [Fact]
    public void OnlyLowestSupplyWithHighestDropIsRead()
    {
        Assert.False(Rule.Reads(States.Of(States.Pass())));
        Assert.True(Rule.Reads(States.Of(States.Pass(), lowest: true)));
    }

    private static Stress Judge(double vce, double load) => States.Judge(Rule, States.Of(States.Pass(vce: vce, ic: load), load: load, lowest: true));
}

public class DriveRuleTests : RuleTests<DriveRule>
{
    // Sum IB 1 mA, k' 1.5: 1.5 mA required.
    protected override Stress Below() => Judge(2e-3);

    protected override Stress AtTheLimit() => Judge(1.5e-3);

    protected override Stress Above() => Judge(1.4e-3);

    protected override Stress WithoutTheRating() => States.Judge(
        Rule, States.Of(States.Pass(SampleChannel.Transistor() with { Hfe = null }), drive: new DriveEdge(true, 1.3, 1e-3, 2e-3, 1.5)));

    protected override bool AskedByNobody() => States.Asks(Rule, SampleChannel.Channel(1));

    [Theory]
    [InlineData(false, 2e-3)]
    [InlineData(true, 0)]
    [InlineData(true, -1e-4)]
    public void ALoopThatDoesNotRegulateIsNonconformingWithoutARatio(bool exists, double available)
    {
        Stress stress = States.Judge(Rule, States.Of(States.Pass(), drive: new DriveEdge(exists, 1.3, 1e-3, available, 1.5)));
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.Null(stress.Ratio);
    }

    [Fact]
    public void AnEdgeWithoutANumberIsNotVerified() => Assert.Equal(Verdict.NotVerified, Judge(double.NaN).Verdict);

    [Fact]
    public void APinBeyondItsGuaranteeIsNotVerified() => Assert.Equal(
        Verdict.NotVerified, States.Judge(Rule, States.Of(States.Pass(), drive: new DriveEdge(true, 1.3, 1e-3, 2e-3, 1.5), pinHolds: false)).Verdict);

    private static Stress Judge(double available) =>
        States.Judge(Rule, States.Of(States.Pass(), drive: new DriveEdge(true, 1.3, 1e-3, available, 1.5)));
}

public class PinCurrentRuleTests : RuleTests
{
    private static readonly DeratingTable Table = new("test", null, [States.Row("pin-current", 0.8)]);

    public override string Id => PinCurrentRule.Id;

    protected override bool AlwaysAsked => true;

    // 20 mA x 0.8: 16 mA.
    protected override Stress Below() => Judge(0.01, 0.02);

    protected override Stress AtTheLimit() => Judge(0.016, 0.02);

    protected override Stress Above() => Judge(0.0161, 0.02);

    protected override Stress WithoutTheRating() => Judge(0.001, null);

    protected override bool AskedByNobody() => Judge(0.001, null).Missing is not null;

    // Two feeds of 8 mA together on a 20 mA pin at 0.8: exactly the 16 mA allowed.
    [Theory]
    [InlineData(0.007, Verdict.Conforms)]
    [InlineData(0.008, Verdict.Conforms)]
    [InlineData(0.0081, Verdict.Nonconforming)]
    public void AllFeedsOfAPinCountTogether(double each, Verdict verdict)
    {
        Finding finding = PinCurrentRule.Judge("P1", [new("A", each), new("B", each)], Pin(0.02), Table);
        Assert.Equal(verdict, finding.Verdict);
        Assert.Equal(2 * each, finding.Actual!.Value, 12);
        Assert.Equal(0.016, finding.Allowed!.Value, 12);
    }

    [Fact]
    public void AMissingRatingOrFeedIsNotVerified()
    {
        Finding rating = PinCurrentRule.Judge("P1", [new("A", 0.001)], Pin(null), Table);
        Assert.Equal(Verdict.NotVerified, rating.Verdict);
        Assert.Equal(["Pin current max of CTRL-5"], rating.Missing);
        Assert.Equal(Verdict.NotVerified, PinCurrentRule.Judge("P1", [new("A", 0.001), new("B", double.NaN)], Pin(0.02), Table).Verdict);
        Assert.Equal(Verdict.Nonconforming, PinCurrentRule.Judge("P1", [new("A", 0.03), new("B", double.NaN)], Pin(0.02), Table).Verdict);
    }

    private static Stress Judge(double amperes, double? rating)
    {
        Finding finding = PinCurrentRule.Judge("P1", [new("A", amperes)], Pin(rating), Table);
        return new Stress(
            finding.Actual ?? double.NaN, finding.Allowed ?? double.NaN, finding.StressRatio, finding.Verdict, finding.Missing is [string first, ..] ? first : null);
    }

    private static LogicPin Pin(double? rating) => SampleChannel.Channel(1).Logic with
    {
        PinCurrentMax = rating is { } r ? States.Cite(Current.FromAmperes(r)) : null,
    };
}
