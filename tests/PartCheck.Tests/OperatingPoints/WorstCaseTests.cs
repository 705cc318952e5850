using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

public class WorstCaseTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    public void EveryCornerIsSolvedAndSelfConsistent(int legs)
    {
        ChannelModel model = new(SampleChannel.Channel(legs, feed: legs == 1 ? 4700 : 1500), p => new TransistorVariants(p));
        IReadOnlyList<List<string>> chunks = WorstCase.Enumerate(
            model, new PinSource(model.Channel.Logic), 1.5, 0, () => new List<string>(), (wrong, s) =>
            {
                double collectors = 0;
                for (int i = 0; i < s.Transistors.Count && s.Transistors[i].Role == Role.Pass; i++)
                {
                    // The odd leg comes first, then the rest of its class.
                    collectors += s.Transistors[i].Ic * (i == 0 ? 1 : legs - 1);
                }

                bool balanced = !s.Solved || Math.Abs(collectors - s.LoadCurrent) <= (1e-6 * Math.Abs(collectors)) + 1e-10;
                bool edge = s.State != ChannelState.On || s.Corner.Heat == 1 || s.Drive is { Exists: true, Available: > 0 };
                if (!s.Solved || !balanced || !edge)
                {
                    wrong.Add($"{s.State} {s.Index}: solved {s.Solved}, collectors {collectors}, load {s.LoadCurrent}, edge {s.Drive}");
                }
            },
            TestContext.Current.CancellationToken);
        List<string> all = [.. chunks.SelectMany(c => c)];
        Assert.True(all.Count == 0, $"{all.Count}: {string.Join("\n", all.Take(5))}");
    }

    // 2 x 3 (cold, warm, hot with the knee at 25 degC) ... the product of every dimension with width; none twice.
    [Fact]
    public void CornersAreAllDifferentAndDimensionsWithoutWidthAreDropped()
    {
        BoundChannel channel = SampleChannel.Channel(1);
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        ChannelBox box = new(model, new PinSource(channel.Logic), ChannelState.On, -1);

        // ambient 3 (-10, 25, 55), heat 2, control 4, pass 4, sense 2, supply 2, drop 2, pin 2, feed 2.
        Assert.Equal(3 * 2 * 4 * 4 * 2 * 2 * 2 * 2 * 2, box.Count);
        Assert.Equal(box.Count, Enumerable.Range(0, box.Count).Select(i => box.At(i).Corner).Distinct().Count());

        BoundChannel narrow = channel with
        {
            Conditions = channel.Conditions with { Supply = new(Voltage.FromVolts(24), Voltage.FromVolts(24)), LoadDrop = new(Voltage.FromVolts(17), Voltage.FromVolts(17)) },
        };
        ChannelBox smaller = new(new ChannelModel(narrow, p => new TransistorVariants(p)), new PinSource(channel.Logic), ChannelState.On, -1);
        Assert.Equal(box.Count / 4, smaller.Count);
        Assert.All(Enumerable.Range(0, 50), i => Assert.True(smaller.At(i).LowestHeadroom));
    }

    [Fact]
    public void AMissingCouplingIsTakenBothWaysAndListed()
    {
        BoundChannel channel = SampleChannel.Channel(1);
        Transistor part = channel.Legs[0].PassPart with { Coupling = null };
        channel = channel with { Legs = [channel.Legs[0] with { Pass = channel.Legs[0].Pass with { Part = part } }] };
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        ChannelBox box = new(model, new PinSource(channel.Logic), ChannelState.On, -1);
        Assert.Equal([null, 0.0, 0.2], Enumerable.Range(0, box.Count).Select(i => box.At(i).Corner.AssumedCoupling).Distinct());
        Assert.Contains(model.Assumed, a => a is { What: "Coupling", Of: "CH1" });
    }

    [Fact]
    public void WithoutThermalDataOnlyTheColdStartIsSolved()
    {
        BoundChannel channel = SampleChannel.Channel(1);
        Transistor part = channel.Legs[0].PassPart with { RthJa = null, TjMax = null };
        channel = channel with { Legs = [channel.Legs[0] with { Pass = channel.Legs[0].Pass with { Part = part } }] };
        ChannelBox box = new(new ChannelModel(channel, p => new TransistorVariants(p)), new PinSource(channel.Logic), ChannelState.On, -1);
        Assert.All(Enumerable.Range(0, box.Count), i => Assert.Equal(0, box.At(i).Corner.Heat));
    }

    /// <summary>What the bench measures holds the nominal state and lies inside what the whole box allows.</summary>
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    public void BenchLimitsHoldTheNominalStateInsideTheWholeBox(int legs)
    {
        BoundChannel channel = SampleChannel.Channel(legs, feed: legs == 1 ? 4700 : 1500);
        PinSource pin = new(channel.Logic);
        TestLimits? limits = TestLimits.Of(channel, p => new TransistorVariants(p), pin, 0, TestContext.Current.CancellationToken);
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        SolvedState? nominal = WorstCase.Nominal(model, pin);
        Assert.NotNull(limits);
        Assert.NotNull(nominal);
        Assert.Equal(24, limits.Supply, 9);
        Assert.InRange(nominal.LoadCurrent, limits.LoadCurrent.Min, limits.LoadCurrent.Max);
        Assert.InRange(nominal.BaseVoltage, limits.BaseVoltage.Min, limits.BaseVoltage.Max);
        Assert.InRange(nominal.CollectorVoltage, limits.CollectorVoltage.Min, limits.CollectorVoltage.Max);
        Assert.InRange(nominal.Transistors[0].SenseVoltage, limits.SenseVoltage.Min, limits.SenseVoltage.Max);

        ReadingJudgement judged = new ChannelJudge(model, DeratingLibrary.Named("ratings")!).Judge(pin, 0, TestContext.Current.CancellationToken);
        Assert.InRange(limits.LoadCurrent.Min, judged.LoadMin, limits.LoadCurrent.Max);
        Assert.InRange(limits.LoadCurrent.Max, limits.LoadCurrent.Min, judged.LoadMax);

        // Everything that is taken from the supply and not by the load heats the board's parts: 25.2 V - 16 V at most.
        Assert.InRange(judged.HeatMax, 0.5 * judged.LoadMax * (25.2 - 16), judged.LoadMax * (25.2 - 15) + 0.05);
    }

    // cmos: (4.75 - 4.2) V / 8 mA = 68.75 ohm; with 2 mA drawn by others the level falls by 0.1375 V. Of two pairs the smaller
    // resistance counts, valid to the larger current. ttl: the level itself.
    [Fact]
    public void PinsAreWeakAsTheirTableGuarantees()
    {
        LogicPin pin = SampleChannel.Channel(1).Logic;
        PinSource alone = new(pin);
        Assert.Equal(68.75, alone.WeakResistance, 9);
        Assert.Equal(4.75, alone.WeakVoltage, 9);
        Assert.Equal(5.25, alone.StrongVoltage, 9);
        Assert.Equal(8e-3, alone.GuaranteedCurrent, 12);
        Assert.Equal(4.75 - 0.1375, new PinSource(pin, 2e-3).WeakVoltage, 9);

        PinSource two = new(pin with { High = [.. pin.High, new HighLevel(Voltage.FromVolts(4.65), Current.FromAmperes(20e-6))] });
        Assert.Equal(68.75, two.WeakResistance, 9);
        Assert.Equal(8e-3, two.GuaranteedCurrent, 12);

        PinSource ttl = new(pin with { Output = PinOutput.Ttl, High = [new HighLevel(Voltage.FromVolts(2.4), Current.FromAmperes(2e-3))] });
        Assert.Equal((2.4, 0.0), (ttl.WeakVoltage, ttl.WeakResistance));
        Assert.Equal((2.4 + 5.25) / 2, ttl.NominalVoltage, 9);
    }

    // 33 ohm, 1 %, 100 ppm/K at 120 degC: 33 x 1.01 x 1.01 and 33 x 0.99 x 0.99.
    [Fact]
    public void AResistorSpreadsByToleranceAndTemperatureTogether()
    {
        ResistorRange range = new(SampleChannel.Resistor(33));
        Assert.Equal(33.6633, range.At(Extreme.Max, 393.15), 9);
        Assert.Equal(32.3433, range.At(Extreme.Min, 393.15), 9);
        Assert.Equal(33, range.At(Extreme.Typical, 393.15), 9);
    }
}
