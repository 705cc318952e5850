using PartCheck.Derating;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class ResistorPowerRuleTests : RuleTests<ResistorPowerRule>
{
    private static readonly ResistorPart Chip = SampleChannel.Resistor(100);

    // 0.1 W, factor 0.5, up to 70 degC: 50 mW. 100 ohm: 2.236068 V is 50 mW.
    protected override Stress Below() => Judge(Chip, 2.0, 70);

    protected override Stress AtTheLimit() => Judge(Chip, Math.Sqrt(5) * (1 - 1e-9), 70);

    protected override Stress Above() => Judge(Chip, 2.3, 70);

    protected override Stress WithoutTheRating() => Judge(Chip with { Power = null }, 1, 25);

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareResistor(33));

    // NASA EEE-INST-002, R2 Table 4: style RM 0.6, 70, T2 118, T3 150 degC; RLR 350 ppm T2 103 at T3 125 (figures of the standard).
    [Theory]
    [InlineData(0.6, 150, 117.9, 118)]
    [InlineData(0.6, 125, 102.9, 103)]
    public void TheParallelLineMeetsZeroWhereTheStandardPrintsIt(double factor, double t3, double below, double zero)
    {
        ResistorPart part = Chip with { TjMax = States.Cite(Temperature.FromCelsius(t3)) };
        DeratingRow row = States.Row("r-power", factor, zero: ZeroTemperature.Parallel);
        Assert.True(ResistorPowerRule.Allowed(part, row, below + 273.15) > 0);
        Assert.Equal(0, ResistorPowerRule.Allowed(part, row, zero + 273.15), 9);
    }

    // 0603, 0.1 W by rule RM: 60 / 60 / 30 / 0 mW at 25 / 70 / 94 / 118 degC; commercial chip, 0.5, T3 155: 50 / 25 / 0 mW at 70 / 91.25 / 112.5.
    [Theory]
    [InlineData(0.6, 150, 25, 0.060)]
    [InlineData(0.6, 150, 70, 0.060)]
    [InlineData(0.6, 150, 94, 0.030)]
    [InlineData(0.5, 155, 70, 0.050)]
    [InlineData(0.5, 155, 91.25, 0.025)]
    [InlineData(0.5, 155, 112.5, 0.0)]
    public void WorkedValuesOfTheParallelLine(double factor, double t3, double celsius, double watts)
    {
        ResistorPart part = Chip with { TjMax = States.Cite(Temperature.FromCelsius(t3)) };
        Assert.Equal(watts, ResistorPowerRule.Allowed(part, States.Row("r-power", factor, zero: ZeroTemperature.Parallel), celsius + 273.15), 9);
    }

    // Thick film chip sheets: 100 % to 70 degC, 0 at 155 degC; half way, 112.5 degC, 50 %.
    [Fact]
    public void TheRatedLineGoesToTheFilmMaximum() =>
        Assert.Equal(0.05, ResistorPowerRule.Allowed(Chip, States.Row("r-power"), 112.5 + 273.15), 9);

    [Fact]
    public void WithoutAFilmMaximumNothingIsKnownAboveTheFlatPart()
    {
        Assert.Equal("Film max of RK-100", Judge(Chip with { TjMax = null }, 1, 71).Missing);
        Assert.Equal(Verdict.Conforms, Judge(Chip with { TjMax = null }, 1, 70).Verdict);
    }

    // 0.1 W with 2 mW/K above 70 degC is gone at 120 degC, not at the film's 155 degC: half at 95 degC.
    [Theory]
    [InlineData(95, 0.05)]
    [InlineData(120, 0.0)]
    public void ASlopeOfThePartsOwnGovernsWhereItIsSteeper(double celsius, double watts) =>
        Assert.Equal(watts, ResistorPowerRule.Allowed(Chip with { PowerSlope = States.Cite(2e-3) }, States.Row("r-power"), celsius + 273.15), 9);

    // Film maximum 155 degC: a stated 200 degC counts as 155 (half at 112.5); a stated 60 degC ends the curve below its flat end.
    [Theory]
    [InlineData(200, 112.5, 0.05)]
    [InlineData(200, 156, 0.0)]
    [InlineData(60, 59, 0.1)]
    [InlineData(60, 61, 0.0)]
    public void AStatedZeroTemperatureNeverPassesTheFilmMaximum(double zero, double celsius, double watts)
    {
        DeratingRow row = States.Row("r-power", zero: ZeroTemperature.Fixed) with { ZeroAt = Temperature.FromCelsius(zero) };
        Assert.Equal(watts, ResistorPowerRule.Allowed(Chip, row, celsius + 273.15), 9);
    }

    private static Stress Judge(ResistorPart part, double volts, double celsius) => States.Judge(
        Rule, States.Of(resistor: States.Resistor(part, volts, volts / 100), celsius: celsius), States.Row("r-power", 0.5, zero: ZeroTemperature.Parallel));
}

public class ResistorVoltageRuleTests : RuleTests<ResistorVoltageRule>
{
    private static readonly ResistorPart Large = SampleChannel.Resistor(100_000);

    // 75 V x 0.8 = 60 V; sqrt(0.05 W x 100 kohm) = 70.7 V.
    protected override Stress Below() => Judge(Large, 50);

    protected override Stress AtTheLimit() => Judge(Large, 60);

    protected override Stress Above() => Judge(Large, 61);

    protected override Stress WithoutTheRating() => Judge(Large with { Power = null }, 10);

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareResistor(33));

    // NASA EEE-INST-002 note 2, worked: 47 ohm 0603 with 60 mW: sqrt(0.06 x 47) = 1.679 V.
    [Fact]
    public void SmallResistanceIsBoundByPower()
    {
        ResistorPart part = SampleChannel.Resistor(47);
        Stress stress = States.Judge(
            Rule, States.Of(resistor: States.Resistor(part, 0.6, 0.6 / 47)), States.Row("r-voltage", 0.8), States.Row("r-power", 0.6));
        Assert.Equal(1.679, stress.Allowed, 3);
    }

    [Fact]
    public void WithoutAnElementVoltageThePowerAloneCounts() =>
        Assert.Equal(70.71, Judge(Large with { WorkingVoltageMax = null }, 10).Allowed, 2);

    [Fact]
    public void ZeroOhmIsZeroOfZero()
    {
        Stress stress = Judge(SampleChannel.Resistor(0), 0);
        Assert.Equal(0, stress.Ratio);
        Assert.Equal(Verdict.Conforms, stress.Verdict);
    }

    private static Stress Judge(ResistorPart part, double volts) => States.Judge(
        Rule, States.Of(resistor: States.Resistor(part, volts, 0)), States.Row("r-voltage", 0.8), States.Row("r-power", 0.5));
}

public class ZeroOhmCurrentRuleTests : RuleTests<ZeroOhmCurrentRule>
{
    private static readonly ResistorPart Jumper = SampleChannel.Resistor(0) with { Ic = States.Cite(Current.FromAmperes(1)) };

    protected override Stress Below() => Judge(Jumper, 0.5);

    protected override Stress AtTheLimit() => Judge(Jumper, 0.75);

    protected override Stress Above() => Judge(Jumper, 0.76);

    protected override Stress WithoutTheRating() => Judge(Jumper with { Ic = null }, 0.1);

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareResistor(0));

    [Fact]
    public void ItIsARuleOfJumpersAlone()
    {
        Assert.True(Rule.AppliesTo(Jumper));
        Assert.False(Rule.AppliesTo(SampleChannel.Resistor(1)));
        Assert.False(new ResistorPowerRule().AppliesTo(Jumper));
    }

    private static Stress Judge(ResistorPart part, double amperes) =>
        States.Judge(Rule, States.Of(resistor: States.Resistor(part, 0, amperes)), States.Row("ic", 0.75));
}
