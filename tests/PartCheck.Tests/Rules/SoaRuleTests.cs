using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class SoaRuleTests : RuleTests<SoaRule>
{
    // IC rating 250 mA, DC boundary 5 V: 200 mA, 20 V: 80 mA, 40 V: 20 mA; Tj max 150 degC.
    private static readonly Transistor Part = SampleChannel.Transistor() with
    {
        Ic = States.Cite(Current.FromAmperes(0.25)),
        Soa = States.Cite<IReadOnlyList<SoaPoint>>(
        [
            new SoaPoint(Voltage.FromVolts(5), Current.FromAmperes(0.2)),
            new SoaPoint(Voltage.FromVolts(20), Current.FromAmperes(0.08)),
            new SoaPoint(Voltage.FromVolts(40), Current.FromAmperes(0.02)),
        ]),
    };

    private static readonly Transistor AtCase = Part with { SoaAtCase = true, RthJc = States.Cite(ThermalResistance.FromKelvinsPerWatt(80)) };

    protected override Stress Below() => Judge(Part, 10, 0.1);

    // 87.5 degC is half way from 25 to 150: 80 mA x 0.5 x factor 0.8 = 32 mA.
    protected override Stress AtTheLimit() => Judge(Part, 20, 0.032, 87.5, 0.8);

    protected override Stress Above() => Judge(Part, 20, 0.0321, 87.5, 0.8);

    protected override Stress WithoutTheRating() => Judge(Part with { TjMax = null }, 10, 0.1);

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareTransistor, SampleChannel.Channel(1));

    // 10 V: ln 2/ln 4 = 1/2 of the way: sqrt(200 x 80) = 126.491 mA. 28.2843 V = 20 V x sqrt 2: sqrt(80 x 20) = 40 mA.
    // 8 V: ln 1.6/ln 4 = 0.339036; 200 x exp(-0.916291 x 0.339036) = 200 x 0.732966 = 146.593 mA. Below 5 V the IC rating.
    [Theory]
    [InlineData(4.99, 0.25)]
    [InlineData(5, 0.2)]
    [InlineData(8, 0.146593)]
    [InlineData(10, 0.126491)]
    [InlineData(20, 0.08)]
    [InlineData(28.2842712, 0.04)]
    [InlineData(40, 0.02)]
    public void BetweenThePointsTheBoundaryIsStraightInLogarithms(double vce, double amperes) =>
        Assert.Equal(amperes, Judge(Part, vce, 0.01).Allowed, 6);

    [Fact]
    public void AboveTheLastPointNothingIsAllowed()
    {
        Stress stress = Judge(Part, 40.01, 1e-6);
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.Null(stress.Ratio);
        Assert.Equal(0, stress.Allowed, 12);
    }

    // (150 - T)/125: 1 at 25 degC and no more below, 0.76 at 55 degC, 0 from 150 degC.
    [Theory]
    [InlineData(-40, 0.2)]
    [InlineData(25, 0.2)]
    [InlineData(55, 0.152)]
    [InlineData(150, 0)]
    [InlineData(170, 0)]
    public void TheShareFallsToZeroAtTheMaximum(double celsius, double amperes) => Assert.Equal(amperes, Judge(Part, 5, 0.01, celsius).Allowed, 9);

    // Tj 125 degC less 0.2 W x 80 K/W = 109 degC: (150 - 109)/125 = 0.328 of 200 mA.
    [Fact]
    public void AtCaseTheJunctionLessItsOwnRiseCounts() => Assert.Equal(0.0656, JudgeAtCase(AtCase, 125, 0.2).Allowed, 9);

    // On a quarter of the time: Tj 125 degC less 0.25 x 0.2 W x 80 K/W = 121 degC, (150 - 121)/125 = 0.232 of 200 mA. With all of the
    // power the case would be taken for 109 degC. The pair is that while on.
    [Fact]
    public void UnderPwmTheCaseIsNotTakenForCoolerThanItIs()
    {
        TransistorPoint pass = States.Pass(AtCase, vce: 5, ic: 0.01, power: 0.2, tj: 125) with { CaseShare = 0.25, AveragedShare = 0.25 };
        Stress stress = States.Judge(Rule, States.Of(pass, celsius: 55));
        Assert.Equal(0.0464, stress.Allowed, 9);
        Assert.Equal(0.01, stress.Actual, 12);
    }

    // Just switched on, Tj is the ambient of 55 degC: the case is there, too, not at 55 - 16 = 39 degC: 0.76 of 200 mA.
    [Fact]
    public void TheCaseIsNeverCoolerThanTheAmbient() => Assert.Equal(0.152, JudgeAtCase(AtCase, 55, 0.2).Allowed, 9);

    [Fact]
    public void AtCaseTheThermalResistanceToItIsNeeded()
    {
        Assert.Equal("RthJC of TQ-31", JudgeAtCase(AtCase with { RthJc = null }, 125, 0.2).Missing);
        Assert.NotNull(Judge(Part with { RthJc = null }, 10, 0.1).Ratio);
    }

    // Neither RthJA nor Power: what the case reaches is not known; 0.3 A is too much for any case.
    [Theory]
    [InlineData(0.02, Verdict.NotVerified)]
    [InlineData(0.3, Verdict.Nonconforming)]
    public void AtCaseWithoutThermalDataTheColdStartRefusesButDoesNotClear(double ic, Verdict verdict) =>
        Assert.Equal(verdict, JudgeAtCase(AtCase with { RthJa = null, Power = null }, 55, 0.1, ic).Verdict);

    [Fact]
    public void TheCurrentRatingIsNeeded() => Assert.Equal("IC of TQ-31", Judge(Part with { Ic = null }, 4, 0.1).Missing);

    [Fact]
    public void AskedOnlyWhereTheTableGivesABoundary()
    {
        Assert.True(States.Asks(Rule, Part, States.Channel));
        Assert.False(States.Asks(Rule, SampleChannel.Transistor(), States.Channel));
        Assert.True(Rule.AppliesTo(Role.Pass));
        Assert.True(Rule.AppliesTo(Role.Control));
    }

    private static Stress Judge(Transistor part, double vce, double ic, double celsius = 25, double factor = 1) =>
        States.Judge(Rule, States.Of(States.Pass(part, vce: vce, ic: ic), celsius: celsius), States.Row("soa", factor));

    private static Stress JudgeAtCase(Transistor part, double tj, double power, double ic = 0.01) =>
        States.Judge(Rule, States.Of(States.Pass(part, vce: 5, ic: ic, power: power, tj: tj), celsius: 55));
}
