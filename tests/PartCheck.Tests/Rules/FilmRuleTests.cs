using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class FilmRuleTests : RuleTests<FilmRule>
{
    // Thick film 0603: 0.1 W at 70 degC, film 155 degC, so 85 K/0.1 W = 850 K/W. 0.6 V x 0.15 A = 0.09 W is 76.5 K.
    private static readonly ResistorPart ThickFilm = With(850);

    protected override Stress Below() => Judge(ThickFilm, 0.6, 0.15, 70);

    protected override Stress AtTheLimit() => Judge(ThickFilm, 0.5, 0.2, 70);

    protected override Stress Above() => Judge(ThickFilm, 0.5, 0.2, 71);

    protected override Stress WithoutTheRating() => Judge(ThickFilm with { TjMax = null }, 0.6, 0.15, 70);

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareResistor(33));

    [Fact]
    public void TheRatioIsOfTheRiseOverAmbient()
    {
        Stress stress = Below();
        Assert.Equal(0.9, stress.Ratio!.Value, 9);
        Assert.Equal(146.5 + 273.15, stress.Actual, 9);
        Assert.Equal(155 + 273.15, stress.Allowed, 9);
    }

    // Thin film 0603, 550 K/W (film sheets): 0.1 W at 70 degC is 125 degC, just 30 K under 155 degC; 31 K are too much: 55/54.
    [Theory]
    [InlineData(30, 1.0, Verdict.Conforms)]
    [InlineData(31, 1.018519, Verdict.Nonconforming)]
    public void TheOffsetIsTakenFromTheMaximum(double offset, double ratio, Verdict verdict)
    {
        Stress stress = States.Judge(
            Rule, States.Of(resistor: States.Resistor(With(550), 0.5, 0.2), celsius: 70), States.Row("r-film", offset: offset));
        Assert.Equal(ratio, stress.Ratio!.Value, 6);
        Assert.Equal(verdict, stress.Verdict);
    }

    [Fact]
    public void AnAmbientAtTheAllowedTemperatureHasNoRatio()
    {
        Stress stress = Judge(ThickFilm, 0.01, 0.01, 155);
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.Null(stress.Ratio);
    }

    [Fact]
    public void AppliesWhereAThermalResistanceIsGivenAndThereIsAFilm()
    {
        Assert.True(Rule.AppliesTo(ThickFilm));
        Assert.False(Rule.AppliesTo(SampleChannel.Resistor(33)));
        Assert.False(Rule.AppliesTo(ThickFilm with { Resistance = States.Cite(Resistance.FromOhms(0)) }));
        Assert.True(Rule.Reads(States.Of()));
        Assert.False(Rule.Reads(States.Of(state: ChannelState.Unfed)));
        Assert.False(Rule.Reads(States.Of(state: ChannelState.Off)));
    }

    private static ResistorPart With(double rth) =>
        SampleChannel.Resistor(2.5) with { RthJa = States.Cite(ThermalResistance.FromKelvinsPerWatt(rth)) };

    private static Stress Judge(ResistorPart part, double volts, double amperes, double celsius) =>
        States.Judge(Rule, States.Of(resistor: States.Resistor(part, volts, amperes), celsius: celsius));
}
