using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class LedCurrentRuleTests : RuleTests<LedCurrentRule>
{
    // 30 mA up to 60 degC, 0.6 mA/K above: 30 - 0.6 x 25 = 15 mA at 85 degC; factor 0.8: 12 mA.
    private static readonly LedPart White = new()
    {
        PartNumber = "LW-3",
        Cell = "parts.csv!A7",
        ForwardCurrentMax = States.Cite(Current.FromAmperes(0.03)),
        ForwardCurrentFlatTo = States.Cite(Temperature.FromCelsius(60)),
        ForwardCurrentSlope = States.Cite(0.6e-3),
        TjMax = States.Cite(Temperature.FromCelsius(105)),
    };

    protected override Stress Below() => Judge(White, 0.010);

    protected override Stress AtTheLimit() => Judge(White, 0.012);

    protected override Stress Above() => Judge(White, 0.0121);

    protected override Stress WithoutTheRating() => Judge(White with { ForwardCurrentMax = null }, 0.001);

    // The sample channel names no LED: nothing is listed.
    protected override bool AskedByNobody() => EndToEnd(SampleChannel.Channel(1)).Count > 0;

    // Without a slope the line runs from 60 degC straight to zero at 105 degC: 30 x 20/45 = 13.33 mA at 85 degC. Without a flat part it
    // starts at 25 degC: 30 x 20/80 = 7.5 mA. At Tj max and above nothing is left, whatever the slope says.
    [Theory]
    [InlineData(true, true, 60, 30e-3)]
    [InlineData(true, true, 85, 15e-3)]
    [InlineData(false, true, 85, 13.3333e-3)]
    [InlineData(false, false, 85, 7.5e-3)]
    [InlineData(true, true, 104.9, 3.06e-3)]
    [InlineData(true, true, 105, 0)]
    [InlineData(true, true, 115, 0)]
    public void TheCurrentIsFlatThenFallsOnALine(bool slope, bool flat, double celsius, double amperes)
    {
        LedPart part = White with
        {
            ForwardCurrentSlope = slope ? White.ForwardCurrentSlope : null,
            ForwardCurrentFlatTo = flat ? White.ForwardCurrentFlatTo : null,
        };
        Assert.Equal(amperes, LedCurrentRule.Allowed(part, 0.03, celsius + 273.15, 1), 7);
    }

    [Fact]
    public void WithoutSlopeAndMaximumNothingIsKnownAboveTheFlatPart()
    {
        LedPart part = White with { ForwardCurrentSlope = null, TjMax = null };
        Assert.Equal("IF slope of LW-3", Judge(part, 0.001).Missing);
        Assert.Equal(Verdict.Conforms, Judge(part, 0.02, celsius: 60).Verdict);
    }

    // 12 mA allowed. Two strings of 22 mA: 11 mA each when even; one string at 1.05 times the mean 11.55 mA, at 1.2 times 13.2 mA.
    // Unknown shares: 22 mA may be in one string; 25 mA is 12.5 mA at least; 11 mA is below the limit even in one.
    [Theory]
    [InlineData(0.022, 1.05, Verdict.Conforms, 0.01155)]
    [InlineData(0.022, 1.2, Verdict.Nonconforming, 0.0132)]
    [InlineData(0.022, 5.0, Verdict.Nonconforming, 0.022)]
    [InlineData(0.022, null, Verdict.NotVerified, null)]
    [InlineData(0.025, null, Verdict.Nonconforming, 0.0125)]
    [InlineData(0.011, null, Verdict.Conforms, 0.011)]
    public void ParallelStringsShareAsTheChannelSays(double load, double? share, Verdict verdict, double? actual)
    {
        BoundChannel channel = SampleChannel.Channel(1);
        Stress stress = Judge(White, load, channel: channel with { Conditions = channel.Conditions with { Strings = 2, StringShareMax = share } });
        Assert.Equal(verdict, stress.Verdict);
        if (actual is { } amperes)
        {
            Assert.Equal(amperes, stress.Actual, 9);
            Assert.Equal(load == 0.025, stress.AtLeast);
        }
        else
        {
            Assert.Equal("String share max", stress.Missing);
        }
    }

    // An assumed VBE refuses, but does not clear.
    [Theory]
    [InlineData(0.010, Verdict.NotVerified)]
    [InlineData(0.013, Verdict.Nonconforming)]
    public void WithoutVbeNothingIsCleared(double load, Verdict verdict)
    {
        SolvedState state = States.Of(States.Pass(SampleChannel.Transistor() with { Vbe = null }), celsius: 85, load: load);
        Assert.Equal(verdict, States.Judge(Rule, state, White, States.Row("led-current", 0.8)).Verdict);
    }

    // The sample channel carries at most about VBE/Rs: (0.70 V + 65 K x 1.8 mV/K in the cold)/33 ohm, about 23 mA at -10 degC and 18 mA at
    // 55 degC. Flat to 40 degC and zero at 60 degC the LED allows 30 mA x 5/20 = 7.5 mA at 55 degC: there it is worst.
    [Fact]
    public void EachLedIsJudgedAtTheAmbientWhereTheRatioIsWorst()
    {
        LedPart part = White with
        {
            ForwardCurrentFlatTo = States.Cite(Temperature.FromCelsius(40)),
            ForwardCurrentSlope = null,
            TjMax = States.Cite(Temperature.FromCelsius(60)),
        };
        BoundChannel channel = SampleChannel.Channel(1);
        List<Finding> findings = EndToEnd(channel with { Leds = [Place("D1", part), Place("D2", part), Place("D3", White)] });
        Assert.Equal(["D1", "D2", "D3"], findings.Select(f => f.Reference));
        Assert.Equal(7.5e-3, findings[1].Allowed!.Value, 9);
        Assert.Equal(328.15, findings[1].Corner!.Ambient, 9);
        Assert.InRange(findings[1].StressRatio!.Value, 2.2, 3.0);
        Assert.Equal((Verdict.Nonconforming, "LW-3", "parts.csv!K2", "A"), (findings[1].Verdict, findings[1].PartNumber, findings[1].Cell, findings[1].Unit));

        // D3 keeps its 30 mA over the whole range: the coldest corner counts.
        Assert.Equal(Verdict.Conforms, findings[2].Verdict);
        Assert.Equal(263.15, findings[2].Corner!.Ambient, 9);
        Assert.InRange(findings[2].Actual!.Value, 0.020, 0.026);
    }

    // Flat to 40 degC, then 0 at 56 degC: inside -10 to 41 degC the current falls with the ambient and the rating does not up to 40 degC.
    [Fact]
    public void TheEndOfTheFlatPartIsACorner()
    {
        BoundChannel channel = SampleChannel.Channel(1);
        Assert.DoesNotContain(313.15, Ambients(channel));
        Assert.Contains(313.15, Ambients(channel with { Leds = [Place("D1", White with { ForwardCurrentFlatTo = States.Cite(Temperature.FromCelsius(40)) })] }));
    }

    [Fact]
    public void AnLedWithoutItsRowIsNotVerifiedAndTheChannelIsJudged()
    {
        BoundChannel channel = SampleChannel.Channel(1);
        LedPart absent = new() { PartNumber = "LW-9", Cell = "bom.csv!A2", Missing = "part table row of LW-9" };
        Finding finding = Assert.Single(EndToEnd(channel with { Leds = [Place("D1", absent)] }));
        Assert.Equal(Verdict.NotVerified, finding.Verdict);
        Assert.Equal(["part table row of LW-9"], finding.Missing);
    }

    private static HashSet<double> Ambients(BoundChannel channel)
    {
        ChannelBox box = new(new ChannelModel(channel, p => new TransistorVariants(p)), new PinSource(channel.Logic), ChannelState.On, -1);
        return [.. Enumerable.Range(0, box.Count).Select(i => Math.Round(box.At(i).Corner.Ambient, 6))];
    }

    private static Placement Place(string reference, LedPart part) => SampleChannel.Place(Role.Led, -1, reference, part);

    private static List<Finding> EndToEnd(BoundChannel channel)
    {
        ReadingJudgement judgement = new ChannelJudge(new ChannelModel(channel, p => new TransistorVariants(p)), new DeratingTable("none", null, []))
            .Judge(new PinSource(channel.Logic), 0, TestContext.Current.CancellationToken);
        Assert.Equal(0, judgement.NotSolved);
        Assert.Contains(judgement.Findings, f => f.Rule == "current");
        return [.. judgement.Findings.Where(f => f.Rule == "led-current")];
    }

    private static Stress Judge(LedPart part, double load, double celsius = 85, BoundChannel? channel = null) =>
        States.Judge(Rule, States.Of(States.Pass(), celsius: celsius, load: load), part, States.Row("led-current", 0.8), channel);
}
