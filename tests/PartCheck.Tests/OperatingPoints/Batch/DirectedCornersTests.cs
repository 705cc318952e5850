using System.Globalization;
using CsCheck;
using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.OperatingPoints.Batch;

/// <summary>A directed search against full enumeration: every ratio, verdict and missing datum of every rule.</summary>
public class DirectedCornersTests
{
    [Theory]
    [InlineData(1, 0.5, 80)]
    [InlineData(2, 0.75, 24)]
    [InlineData(4, 0.85, 8)]
    public void RandomChannelsAreJudgedAsByEnumeration(int legs, double narrow, int channels)
    {
        long all = 0;
        long part = 0;
        Gen.ULong.Sample(
            seed =>
            {
                ChannelJudge judge = Judge(new RandomChannels(seed).Channel(legs, narrow), out PinSource pin);
                ReadingJudgement full = judge.Judge(pin, 1, CancellationToken.None);
                ReadingJudgement directed = judge.JudgeDirected(pin, CancellationToken.None);
                Same(full, directed);
                Interlocked.Add(ref all, full.Corners);
                Interlocked.Add(ref part, directed.Corners);
            },
            iter: channels);
        Assert.InRange(part, 1, all);
        TestContext.Current.TestOutputHelper?.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{part} corners for {all}"));
    }

    [Theory]
    [InlineData(1, 4700)]
    [InlineData(2, 1500)]
    public void TheSampleChannelIsJudgedAsByEnumeration(int legs, double feed)
    {
        ChannelJudge judge = Judge(SampleChannel.Channel(legs, feed: feed), out PinSource pin);
        ReadingJudgement full = judge.Judge(pin, 1, TestContext.Current.CancellationToken);
        ReadingJudgement directed = judge.JudgeDirected(pin, TestContext.Current.CancellationToken);
        Same(full, directed);
        Assert.InRange(directed.Corners, 1, full.Corners / (legs == 1 ? 2 : 10));
    }

    private static ChannelJudge Judge(BoundChannel channel, out PinSource pin)
    {
        pin = new PinSource(channel.Logic);
        return new ChannelJudge(new ChannelModel(channel, p => new TransistorVariants(p)), DeratingLibrary.Named("workshop")!);
    }

    private static void Same(ReadingJudgement full, ReadingJudgement directed)
    {
        Near("load min", full.LoadMin, directed.LoadMin);
        Near("load max", full.LoadMax, directed.LoadMax);
        Near("pin max", full.PinMax, directed.PinMax);
        Near("heat", full.HeatMax, directed.HeatMax);
        Assert.Equal(0, full.NotSolved);
        Assert.Equal(0, directed.NotSolved);
        Assert.Equal(full.Assumed, directed.Assumed);
        Assert.Equal(full.Hottest.Count, directed.Hottest.Count);
        for (int i = 0; i < full.Hottest.Count; i++)
        {
            Assert.Equal(full.Hottest[i].Reference, directed.Hottest[i].Reference);
            Near("hottest", full.Hottest[i].Tj, directed.Hottest[i].Tj);
        }

        Assert.Equal(full.Findings.Count, directed.Findings.Count);
        for (int i = 0; i < full.Findings.Count; i++)
        {
            Finding a = full.Findings[i];
            Finding b = directed.Findings[i];
            string what = $"{a.Rule} {a.Reference}";
            Assert.Equal((what, a.Verdict, a.StressRatio.HasValue), ($"{b.Rule} {b.Reference}", b.Verdict, b.StressRatio.HasValue));
            Assert.Equal(a.Missing, b.Missing);
            Near(what, a.StressRatio ?? 0, b.StressRatio ?? 0);
        }
    }

    /// <summary>1e-7: the corner is the same, the solver comes to it from another neighbour.</summary>
    private static void Near(string what, double expected, double actual)
    {
        if (!(Math.Abs(expected - actual) <= 1e-7 * Math.Max(1e-3, Math.Abs(expected))))
        {
            Assert.Fail(string.Create(CultureInfo.InvariantCulture, $"{what}: {actual:g12} where {expected:g12} stands"));
        }
    }
}
