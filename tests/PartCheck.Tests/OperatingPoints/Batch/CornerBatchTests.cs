using System.Globalization;
using CsCheck;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using Xunit;

namespace PartCheck.Tests.OperatingPoints.Batch;

/// <summary>Corners side by side against the same corners one by one.</summary>
public class CornerBatchTests
{
    [Theory]
    [InlineData(1, false)]
    [InlineData(1, true)]
    [InlineData(2, false)]
    [InlineData(3, false)]
    public void EveryCornerIsTheScalarSolversCorner(int legs, bool dropOut)
    {
        BoundChannel channel = SampleChannel.Channel(legs, feed: legs == 1 ? 4700 : 1500);
        if (dropOut)
        {
            channel = channel with { Conditions = channel.Conditions with { LoadDrop = new(Voltage.FromVolts(21), Voltage.FromVolts(24)), OffCurrentMax = Current.FromAmperes(1e-6) } };
        }

        Compare(channel);
    }

    // Random part data and conditions, from comfortable to impossible.
    [Theory]
    [InlineData(1, 0.5, 60)]
    [InlineData(2, 0.75, 20)]
    [InlineData(4, 0.85, 6)]
    public void RandomChannelsToo(int legs, double narrow, int channels) =>
        Gen.ULong.Sample(seed => Compare(new RandomChannels(seed).Channel(legs, narrow)), iter: channels);

    [Fact]
    public void AnyNumberOfThreadsGivesTheSameBits()
    {
        ChannelModel model = new(SampleChannel.Channel(2, feed: 1500), p => new TransistorVariants(p));
        PinSource pin = new(model.Channel.Logic);
        string[] prints = [.. new[] { 1, 2, 3, 8 }.Select(threads => string.Join(' ', Flat(WorstCase.Enumerate(
            model, pin, 1.5, threads, () => new List<long>(), (l, s) => l.Add(BitConverter.DoubleToInt64Bits(s.LoadCurrent + s.BaseVoltage)), TestContext.Current.CancellationToken))))];
        Assert.All(prints, p => Assert.Equal(prints[0], p));
    }

    private static void Compare(BoundChannel channel)
    {
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        PinSource pin = new(channel.Logic);
        List<SolvedState> batch = Flat(WorstCase.Enumerate(model, pin, 1.5, 1, () => new List<SolvedState>(), (l, s) => l.Add(s), CancellationToken.None));
        List<SolvedState> one = Flat(WorstCase.EnumerateOneByOne(model, pin, 1.5, 1, () => new List<SolvedState>(), (l, s) => l.Add(s), CancellationToken.None));
        Assert.Equal(one.Count, batch.Count);
        Assert.NotEmpty(one);
        for (int i = 0; i < one.Count; i++)
        {
            Assert.Equal(one[i].Index, batch[i].Index);
            Assert.Equal(one[i].Corner, batch[i].Corner);
            Assert.True(one[i].Solved && batch[i].Solved);
            Close(one[i], batch[i]);
        }
    }

    private static List<T> Flat<T>(IReadOnlyList<List<T>> chunks) => [.. chunks.SelectMany(c => c)];

    private static void Close(SolvedState expected, SolvedState actual)
    {
        Near("load", expected.LoadCurrent, actual.LoadCurrent, 1e-9);
        Near("base", expected.BaseVoltage, actual.BaseVoltage, 1e-6);
        Near("pin", expected.PinCurrent, actual.PinCurrent, 1e-9);
        Assert.Equal(expected.PinGuaranteed, actual.PinGuaranteed);
        Assert.Equal(expected.GainGuaranteed, actual.GainGuaranteed);
        for (int i = 0; i < expected.Transistors.Count; i++)
        {
            TransistorPoint a = expected.Transistors[i];
            TransistorPoint b = actual.Transistors[i];
            Assert.Equal((a.Slot, a.Part, a.Held, a.Count), (b.Slot, b.Part, b.Held, b.Count));
            Near("IC", a.Ic, b.Ic, 1e-9);
            Near("IB", a.Ib, b.Ib, 1e-9);
            Near("Tj", a.Tj, b.Tj, 1e-4);
            Near("power", a.Power, b.Power, 1e-8);
            if (a.Ic > 1e-6)
            {
                Near("slope", a.VbeSlope, b.VbeSlope, 1e-8);
            }
        }

        for (int i = 0; i < expected.Resistors.Count; i++)
        {
            // Steps of 1e-6 K, where the scalar solver stops, are 2e-9 V of a junction.
            Near("resistor", expected.Resistors[i].Voltage, actual.Resistors[i].Voltage, 1e-6);
        }

        Assert.Equal(expected.Drive.HasValue, actual.Drive.HasValue);
        if (expected.Drive is { } edge && actual.Drive is { } other)
        {
            Assert.Equal(edge.Exists, other.Exists);
            Near("edge", edge.BaseVoltage, other.BaseVoltage, 1e-6);
            Near("edge's sum", edge.SumBaseCurrent, other.SumBaseCurrent, 1e-9);
            Near("available", edge.Available, other.Available, 1e-9);
        }
    }

    /// <summary>1e-6, a thousandth of what the method allows between solvers; or its floors where a quantity vanishes: 1 nA, 1 uV, 10 nW.</summary>
    private static void Near(string what, double expected, double actual, double floor)
    {
        if (!(Math.Abs(expected - actual) <= Math.Max(1e-6 * Math.Abs(expected), floor)))
        {
            Assert.Fail(string.Create(CultureInfo.InvariantCulture, $"{what}: {actual:g12} where {expected:g12} stands"));
        }
    }
}
