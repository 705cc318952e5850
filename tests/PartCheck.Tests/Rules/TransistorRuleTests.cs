using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class VceRuleTests : RuleTests<VceRule>
{
    // The sample channel's Supply peak is 28 V.
    protected override Stress Below() => Judge(45);

    protected override Stress AtTheLimit() => States.Judge(Rule, States.Of(States.Pass(With(35))), States.Row("vce", 0.8));

    protected override Stress Above() => States.Judge(Rule, States.Of(States.Pass(With(34))), States.Row("vce", 0.8));

    protected override Stress WithoutTheRating() => States.Judge(Rule, States.Of(States.Pass(SampleChannel.Transistor() with { Vceo = null })));

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareTransistor, SampleChannel.Channel(1));

    [Fact]
    public void TheControlStandsUnderTheBaseNodeBoundedByThePin()
    {
        TransistorPoint control = States.Pass(With(5), Role.Control);
        Assert.Equal(0.26, States.Judge(Rule, States.Of(control, baseNode: 1.3)).Ratio!.Value, 9);
        Assert.Equal(0.24, States.Judge(Rule, States.Of(control, baseNode: 1.3, pinLevel: 1.2)).Ratio!.Value, 9);
    }

    private static Stress Judge(double rating) => States.Judge(Rule, States.Of(States.Pass(With(rating))));

    private static Transistor With(double rating) => SampleChannel.Transistor() with { Vceo = States.Cite(Voltage.FromVolts(rating)) };
}

public class VcbRuleTests : RuleTests<VcbRule>
{
    // On: 20 V in the corner, 28 V peak over 25.2 V supply: 22.8 V.
    protected override Stress Below() => Judge(25);

    protected override Stress AtTheLimit() => States.Judge(Rule, States.Of(States.Pass(With(28.5), vcb: 20)), States.Row("vcb", 0.8));

    protected override Stress Above() => Judge(22.7);

    protected override Stress WithoutTheRating() => States.Judge(Rule, States.Of(States.Pass(SampleChannel.Transistor() with { Vcbo = null })));

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareTransistor, SampleChannel.Channel(1));

    [Fact]
    public void WithThePinLowTheWholePeakStandsOnTheCollector()
    {
        Stress stress = States.Judge(Rule, States.Of(States.Pass(With(56)), state: ChannelState.Off, baseNode: 0));
        Assert.Equal(28, stress.Actual, 9);
        Assert.Equal(0.5, stress.Ratio!.Value, 9);
    }

    private static Stress Judge(double rating) => States.Judge(Rule, States.Of(States.Pass(With(rating), vcb: 20)));

    private static Transistor With(double rating) => SampleChannel.Transistor() with { Vcbo = States.Cite(Voltage.FromVolts(rating)) };
}

public class IcRuleTests : RuleTests<IcRule>
{
    // Rating 100 mA, factor 0.75: 75 mA.
    protected override Stress Below() => Judge(0.05);

    protected override Stress AtTheLimit() => Judge(0.075);

    protected override Stress Above() => Judge(0.076);

    protected override Stress WithoutTheRating() => States.Judge(Rule, States.Of(States.Pass(SampleChannel.Transistor() with { Ic = null })));

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareTransistor, SampleChannel.Channel(1));

    private static Stress Judge(double ic) => States.Judge(Rule, States.Of(States.Pass(ic: ic)), States.Row("ic", 0.75));
}

public class PowerRuleTests : RuleTests<PowerRule>
{
    // MIL-PRF-19500/255 1.3, 2N2222A: PT 0.50 W, 3.08 mW/K above TA 37.5 degC, RthJA 325 K/W, TJ 200 degC.
    private static readonly Transistor Slash255 = SampleChannel.Transistor() with
    {
        Power = States.Cite(Power.FromWatts(0.5)),
        PowerFlatTo = States.Cite(Temperature.FromCelsius(37.5)),
        PowerSlope = States.Cite(3.08e-3),
        RthJa = States.Cite(ThermalResistance.FromKelvinsPerWatt(325)),
        TjMax = States.Cite(Temperature.FromCelsius(200)),
    };

    protected override Stress Below() => Judge(Slash255, 0.3, 100);

    protected override Stress AtTheLimit() => Judge(Slash255, 0.5, 37.5);

    protected override Stress Above() => Judge(Slash255, 0.31, 100);

    // 0.6 W while on at 37.5 degC, of 0.5 W: too much; averaged over a duty of 60 % from 1 kHz up it is 0.36 W: ratio 0.72.
    [Theory]
    [InlineData(1, 1.2, Verdict.Nonconforming)]
    [InlineData(0.6, 0.72, Verdict.Conforms)]
    public void UnderPwmTheAverageIsJudged(double share, double ratio, Verdict verdict)
    {
        Stress stress = States.Judge(Rule, States.Of(States.Pass(Slash255, power: 0.6) with { AveragedShare = share }, celsius: 37.5));
        Assert.Equal(ratio, stress.Ratio!.Value, 9);
        Assert.Equal(0.6 * share, stress.Actual, 12);
        Assert.Equal(verdict, stress.Verdict);
    }

    protected override Stress WithoutTheRating() => Judge(Slash255 with { Power = null }, 0.1, 25);

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareTransistor, SampleChannel.Channel(1));

    // 500 mW - 3.08 mW/K x 62.5 K = 307.5 mW, just under (200 - 100)/325 = 307.7 mW.
    [Theory]
    [InlineData(25, 0.5)]
    [InlineData(37.5, 0.5)]
    [InlineData(100, 0.3075)]
    [InlineData(150, 0.1535)]
    public void SlashSheet255RatesATwoN2222AByItsLine(double celsius, double watts) => Assert.Equal(watts, Judge(Slash255, 0.01, celsius).Allowed, 4);

    // The AUA of the same sheet: 0.65 W, 4.76 mW/K above 63.5 degC, 210 K/W: (200 - 150)/210 = 238.1 mW governs at 150 degC.
    [Theory]
    [InlineData(63.5, 0.65)]
    [InlineData(150, 0.2381)]
    public void SlashSheet255RatesTheSurfaceMountTypeByItsLine(double celsius, double watts)
    {
        Transistor aua = Slash255 with
        {
            Power = States.Cite(Power.FromWatts(0.65)),
            PowerFlatTo = States.Cite(Temperature.FromCelsius(63.5)),
            PowerSlope = States.Cite(4.76e-3),
            RthJa = States.Cite(ThermalResistance.FromKelvinsPerWatt(210)),
        };
        Assert.Equal(watts, Judge(aua, 0.01, celsius).Allowed, 4);
    }

    // MIL-PRF-19500/251, 2N2219A: 0.8 W at TA 25, RthJA 195 K/W, TJ 200; corner 200 - 0.8 x 195 = 44 degC; 100/195 = 512.8 mW at 100 degC.
    [Fact]
    public void SlashSheet251HasNoSlopeAndTheThermalResistanceGoverns()
    {
        Transistor part = Slash255 with
        {
            Power = States.Cite(Power.FromWatts(0.8)),
            PowerFlatTo = States.Cite(Temperature.FromCelsius(44)),
            PowerSlope = null,
            RthJa = States.Cite(ThermalResistance.FromKelvinsPerWatt(195)),
        };
        Assert.Equal(0.8, Judge(part, 0.01, 44).Allowed, 4);
        Assert.Equal(0.5128, Judge(part, 0.01, 100).Allowed, 4);
    }

    [Fact]
    public void WithoutSlopeAndMaximumNothingIsKnownAboveTheFlatPart()
    {
        Transistor part = Slash255 with { PowerSlope = null, TjMax = null };
        Assert.Equal(Verdict.NotVerified, Judge(part, 0.01, 60).Verdict);
        Assert.Equal("Tj max of TQ-31", Judge(part, 0.01, 60).Missing);
    }

    [Fact]
    public void AnAmbientAtTheMaximumAllowsNothing()
    {
        Stress stress = Judge(Slash255, 0.01, 210);
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.Null(stress.Ratio);
    }

    // (Tmax - T)/RthJA cannot be known: 0.5 W refuses 0.6 W, but does not clear 0.3 W.
    [Theory]
    [InlineData(0.3, Verdict.NotVerified)]
    [InlineData(0.6, Verdict.Nonconforming)]
    public void AThermalResistanceWithoutAMaximumDoesNotClear(double watts, Verdict verdict) =>
        Assert.Equal(verdict, Judge(Slash255 with { TjMax = null }, watts, 25).Verdict);

    // 500 mW - 2 mW/K x (210 - 37.5) K would still leave 155 mW, 10 K above the highest junction temperature.
    [Fact]
    public void ASlopeThatReachesPastTheMaximumAllowsNothingThere()
    {
        Transistor part = Slash255 with { PowerSlope = States.Cite(2e-3), RthJa = null };
        Assert.Equal(0.175, Judge(part, 0.01, 200 - 1e-6).Allowed, 6);
        Assert.Equal(0, Judge(part, 0.01, 210).Allowed, 9);
    }

    [Fact]
    public void WithoutThermalDataAnOverloadIsStillNonconforming()
    {
        Transistor part = Slash255 with { RthJa = null, TjMax = null, PowerSlope = States.Cite(3.08e-3) };
        Assert.Equal(Verdict.Nonconforming, Judge(part, 0.6, 25).Verdict);
        Assert.Equal(Verdict.NotVerified, Judge(part, 0.1, 25).Verdict);
    }

    // One element 200 mW and 500 K/W, both 300 mW and 350 K/W, to 150 degC. At 25 degC 100 mW of 200 mW and 250 mW of 300 mW: the package.
    // At 87.5 degC half of both ratings is left: 90 of 100 mW, 120 of 150 mW: the element. Without Power both the package has 200 mW.
    [Theory]
    [InlineData(0.1, 0.25, 25, 0.3, true, 0.833333)]
    [InlineData(0.09, 0.12, 87.5, 0.3, false, 0.9)]
    [InlineData(0.1, 0.25, 25, null, true, 1.25)]
    [InlineData(0.1, 0, 25, 0.3, false, 0.5)]
    public void AnElementIsHeldToItsOwnRatingAndThePackageToThatOfBoth(
        double element, double package, double celsius, double? both, bool whole, double ratio)
    {
        Transistor part = SampleChannel.Transistor(rthJa: 500) with
        {
            Elements = 2,
            Power = States.Cite(Power.FromWatts(0.2)),
            PowerBoth = both is { } watts ? States.Cite(Power.FromWatts(watts)) : null,
            RthJaBoth = States.Cite(ThermalResistance.FromKelvinsPerWatt(350)),
        };
        Stress stress = States.Judge(Rule, States.Of(States.Pass(part, power: element) with { PackagePower = package }, celsius: celsius));
        Assert.Equal(ratio, stress.Ratio!.Value, 6);
        Assert.Equal(whole, stress.Package);
        Assert.Equal(whole ? package : element, stress.Actual, 9);
    }

    // (150 - 130)/350 = 57.1 mW for both, below the 60 mW that are left of 375 mW.
    [Fact]
    public void ThePackageIsHeldToItsThermalResistanceToo()
    {
        Transistor part = SampleChannel.Transistor(rthJa: 500) with
        {
            Elements = 2,
            Power = States.Cite(Power.FromWatts(0.25)),
            PowerBoth = States.Cite(Power.FromWatts(0.375)),
            RthJaBoth = States.Cite(ThermalResistance.FromKelvinsPerWatt(350)),
        };
        Stress stress = States.Judge(Rule, States.Of(States.Pass(part, power: 0.02) with { PackagePower = 0.06 }, celsius: 130));
        Assert.Equal(0.0571429, stress.Allowed, 6);
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
    }

    private static Stress Judge(Transistor part, double watts, double celsius) =>
        States.Judge(Rule, States.Of(States.Pass(part, power: watts), celsius: celsius));
}

public class JunctionRuleTests : RuleTests<JunctionRule>
{
    // Sample: Tj max 150 degC, 25 K under it: 125 degC; ambient 25 degC.
    protected override Stress Below() => Judge(100);

    protected override Stress AtTheLimit() => Judge(125);

    protected override Stress Above() => Judge(126);

    protected override Stress WithoutTheRating() => States.Judge(Rule, States.Of(States.Pass(SampleChannel.Transistor() with { TjMax = null })));

    protected override bool AskedByNobody() => States.Asks(Rule, States.BareTransistor, SampleChannel.Channel(1));

    // NASA EEE-INST-002 (May 2003), S1 Table 4 and note 2: 0.80 Tj max, at most 125 degC, at most Tj max - 40 K.
    [Theory]
    [InlineData(200, 125)]
    [InlineData(175, 125)]
    [InlineData(150, 110)]
    [InlineData(125, 85)]
    public void TheLowestOfFactorOffsetAndCapCounts(double maximum, double allowed) =>
        Assert.Equal(allowed, JunctionRule.Allowed(Temperature.FromCelsius(maximum), States.Row("junction", 0.8, 40, 125)) - 273.15, 9);

    [Fact]
    public void TheRatioIsOfTheRiseOverAmbient() => Assert.Equal(0.75, Judge(100).Ratio!.Value, 9);

    [Fact]
    public void AJunctionThatRanAwayIsNonconformingAtLeast()
    {
        Stress stress = States.Judge(Rule, States.Of(States.Pass(tj: 200, held: true)));
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.True(stress.AtLeast);
    }

    // Without a maximum the solver holds the junction at 200 degC.
    [Fact]
    public void AJunctionThatRanAwayIsNonconformingWithoutAMaximum()
    {
        Stress stress = States.Judge(Rule, States.Of(States.Pass(SampleChannel.Transistor() with { TjMax = null }, tj: 200, held: true)));
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.Equal(473.15, stress.Actual, 9);
        Assert.True(stress.AtLeast);
    }

    [Fact]
    public void AnAmbientAtTheAllowedTemperatureHasNoRatio()
    {
        Stress stress = States.Judge(Rule, States.Of(States.Pass(tj: 130), celsius: 125), States.Row("junction", 1, 25));
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.Null(stress.Ratio);
    }

    private static Stress Judge(double celsius) => States.Judge(Rule, States.Of(States.Pass(tj: celsius)), States.Row("junction", 1, 25));
}
