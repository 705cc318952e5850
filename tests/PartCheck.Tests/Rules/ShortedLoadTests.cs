using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class ShortedLoadTests
{
    // Highest current of the sample channel, cold: about 0.75 V over 32.7 ohm at -10 degC; at 55 degC about 0.62 V: 18.9 mA. The whole of 25.2 V less
    // 0.62 V stands on the pass transistor: 0.465 W, of 0.35 W x (150 - 55)/125 = 0.266 W: 1.75. 0.465 W x 300 K/W = 139 K from 55 degC: 194 degC of
    // 150 degC, (194 - 55)/(150 - 55) = 1.47, a little less since the warm control lowers the current. By hand to 10 %.
    [Fact]
    public void TheWholeSupplyOnTheCollectorsBreaksPowerAndJunction()
    {
        BoundChannel channel = SampleChannel.Channel(1);
        IReadOnlyList<(string Rule, string Reference, Stress Stress)> judged = Judge(channel);
        Assert.Equal(["power", "junction"], judged.Where(j => j.Stress.Verdict == Verdict.Nonconforming).Select(j => j.Rule));
        Assert.InRange(judged[0].Stress.Ratio!.Value, 1.75 * 0.9, 1.75 * 1.1);
        Assert.InRange(judged[1].Stress.Ratio!.Value, 1.47 * 0.9, 1.47 * 1.1);
        Assert.Matches(
            "^A load shorted once, 25.2 V on the collectors, breaks ratings: power of Q1 \\(1\\.\\d\\d\\), junction of Q1 \\(1\\.\\d\\d\\)\\.$",
            ShortedLoad.Text(25.2, judged));
    }

    // 1 kohm: 0.6 mA, 15 mW.
    [Fact]
    public void ASmallSinkSurvivesIt()
    {
        BoundChannel channel = SampleChannel.Channel(1, sense: 1000, feed: 10_000);
        Assert.Matches(
            "^A load shorted once, 25.2 V on the collectors, breaks no rating \\(the closest: vce of Q1 \\(0.62\\)\\)\\.$",
            ShortedLoad.Text(25.2, Judge(channel)));
    }

    [Fact]
    public void WhatIsMissingIsSaid()
    {
        BoundChannel channel = SampleChannel.Channel(1, sense: 1000, feed: 10_000);
        Transistor part = channel.Legs[0].PassPart with { Ic = null };
        channel = channel with { Legs = [channel.Legs[0] with { Pass = channel.Legs[0].Pass with { Part = part } }] };
        Assert.EndsWith("; not verified for want of IC of TQ-31.", ShortedLoad.Text(25.2, Judge(channel)), StringComparison.Ordinal);
    }

    /// <summary>The advice is what the judge says of the same channel with a load that drops nothing.</summary>
    [Theory]
    [InlineData(1, 10_000, 15)]
    [InlineData(2, 20_000, 5)]
    public void ItIsWhatTheJudgeSaysOfALoadThatDropsNothing(int legs, int seed, int channels)
    {
        for (int n = seed; n < seed + channels; n++)
        {
            BoundChannel channel = RandomChannels.Of(n, legs);
            ChannelConditions c = channel.Conditions;
            Voltage drop = Voltage.FromVolts(1e-3);
            BoundChannel shorted = channel with
            {
                Conditions = c with { Supply = new(c.Supply.Max, c.Supply.Max), LoadDrop = new(drop, drop), LoadSlope = Resistance.FromOhms(0), Leds = 0 },
            };
            ReadingJudgement every = new ChannelJudge(new ChannelModel(shorted, p => new TransistorVariants(p)), DeratingLibrary.Named("ratings")!)
                .Judge(new PinSource(channel.Logic), 0, TestContext.Current.CancellationToken);
            foreach ((string rule, string reference, Stress stress) in Judge(channel))
            {
                Finding finding = every.Findings.First(f => f.Rule == rule && f.Reference == reference.Split(',')[0]);
                Assert.True(
                    finding.Verdict == stress.Verdict && Math.Abs((finding.StressRatio ?? -1) - (stress.Ratio ?? -1)) <= 1e-6 * (finding.StressRatio ?? 1),
                    $"seed {n}: {rule} {reference} {stress.Ratio} {stress.Verdict}, every corner {finding.StressRatio} {finding.Verdict}");
            }
        }
    }

    // Given coupling says how much arrives; without it, and with the leg above 100 degC, the advice stands at the control.
    [Theory]
    [InlineData(false, 120, true)]
    [InlineData(false, 99, false)]
    [InlineData(true, 120, false)]
    public void AControlBesideAHotPassTransistorIsNamedWhereCouplingIsAssumed(bool given, double celsius, bool named)
    {
        BoundChannel channel = SampleChannel.Channel(1);
        Transistor part = channel.Legs[0].PassPart with { Coupling = given ? channel.Legs[0].PassPart.Coupling : null };
        channel = channel with { Legs = [channel.Legs[0] with { Pass = channel.Legs[0].Pass with { Part = part } }] };
        ReadingJudgement judgement = new(channel, [], null, 0, 0, 0, 0, 0) { Hottest = [("Q20", 500), ("Q1", celsius + 273.15)] };
        string? text = HotNeighbour.Text(new ChannelModel(channel, p => new TransistorVariants(p)), judgement);
        Assert.Equal(named, text is not null);
        Assert.Equal(named, text?.StartsWith("Stands beside Q1, which reaches 120.0 degC", StringComparison.Ordinal) ?? false);
    }

    private static IReadOnlyList<(string Rule, string Reference, Stress Stress)> Judge(BoundChannel channel) =>
        ShortedLoad.Judge(channel, p => new TransistorVariants(p), new PinSource(channel.Logic), 0, TestContext.Current.CancellationToken);
}
