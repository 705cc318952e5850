using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Tests.Reference;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

public class PulsedHeatTests
{
    private static readonly IReadOnlyList<ZthPoint> Points =
    [
        new(1e-3, ThermalResistance.FromKelvinsPerWatt(60)),
        new(10e-3, ThermalResistance.FromKelvinsPerWatt(150)),
        new(100e-3, ThermalResistance.FromKelvinsPerWatt(260)),
    ];

    // RthJA 330 K/W. Half way in logarithms between 1 and 10 ms is 3.16228 ms: sqrt(60 x 150) = 94.8683 K/W;
    // 0.5 x 330 + 0.5 x 94.8683 = 212.434. At the points: 0.1 x 330 + 0.9 x 150 = 168; 0.5 x 330 + 0.5 x 260 = 295.
    // Past the last (101 ms): 330 whatever the duty. Before the first (0.5 ms): 0.5 x 330 + 0.5 x 60 = 195.
    [Theory]
    [InlineData(0.5, 158.11388, 212.434)]
    [InlineData(0.1, 10, 168)]
    [InlineData(0.5, 5, 295)]
    [InlineData(0.5, 4.9505, 330)]
    [InlineData(0.5, 1000, 195)]
    [InlineData(1, 1000, 330)]
    public void ThePeakIsSteadyHeatingByTheAverageAndOnePulseOnTopOfIt(double duty, double hertz, double effective)
    {
        PulsedHeat heat = Heat(SampleChannel.Transistor() with { Zth = Points }, 330, duty, hertz);
        Assert.Equal(effective, heat.Effective!.Value, 2);
        Assert.Equal(330, heat.Steady);
        Assert.Equal(effective / 330, heat.Share, 4);
        Assert.Equal(duty, heat.CaseShare);
        Assert.Null(heat.Assumed);
    }

    // 0.4 x 330 = 132 from 1 kHz up; below, and without a frequency, the whole.
    [Theory]
    [InlineData(1000.0, 132, 0.4, "from 1 kHz up the average")]
    [InlineData(999.0, 330, 1.0, "below 1 kHz full power")]
    [InlineData(null, 330, 1.0, "full power")]
    public void WithoutPointsTheAverageCountsFrom1kHzAndIsListed(double? hertz, double effective, double caseShare, string assumed)
    {
        PulsedHeat heat = Heat(SampleChannel.Transistor(), 330, 0.4, hertz);
        Assert.Equal(effective, heat.Effective!.Value, 9);
        Assert.Equal(caseShare, heat.CaseShare);
        Assert.Contains(assumed, heat.Assumed, StringComparison.Ordinal);
    }

    // Points without a frequency say nothing: the length of a pulse is not known.
    [Fact]
    public void PointsNeedAFrequency()
    {
        PulsedHeat heat = Heat(SampleChannel.Transistor() with { Zth = Points }, 330, 0.4, null);
        Assert.Equal(330, heat.Effective);
        Assert.NotNull(heat.Assumed);
    }

    // An RthJA that was assumed from Tj max and Power may lie below the table's points: a pulse does not heat more than steady power.
    [Fact]
    public void NoPulseHeatsMoreThanSteadyPower() =>
        Assert.Equal(100, Heat(SampleChannel.Transistor() with { Zth = Points }, 100, 0.5, 5).Effective!.Value, 9);

    [Fact]
    public void WithoutAThermalResistanceThereIsNone()
    {
        Assert.Null(Heat(SampleChannel.Transistor() with { Zth = Points }, null, 0.5, 100).Effective);
        Assert.Null(Heat(SampleChannel.Transistor(), null, 0.5, 5000).Effective);
    }

    [Theory]
    [InlineData(0.4, 1000.0, 0.4)]
    [InlineData(0.4, 999.0, 1)]
    [InlineData(0.4, null, 1)]
    [InlineData(1, 5000.0, 1)]
    public void RatingsOfSteadyPowerReadTheAverageFrom1kHz(double duty, double? hertz, double share) =>
        Assert.Equal(share, PulsedHeat.AveragedShare(Conditions(duty, hertz)));

    [Fact]
    public void TheChannelListsWhatItAssumedOnce()
    {
        BoundChannel channel = SampleChannel.Channel(2) with { Conditions = Conditions(0.4, 200) };
        IReadOnlyList<Assumption> assumed = new ChannelModel(channel, p => new TransistorVariants(p)).Assumed;
        Assert.Equal(["TQ-30", "TQ-31"], assumed.Where(a => a.What == "Zth points").Select(a => a.Of).Order());
        channel = channel with { Conditions = Conditions(0.4, null) };
        assumed = new ChannelModel(channel, p => new TransistorVariants(p)).Assumed;
        Assert.Equal("CH1", Assert.Single(assumed, a => a.What == "Frequency").Of);
        Assert.DoesNotContain(assumed, a => a.What is "Zth points" or "Duty");
    }

    /// <summary>Table, duty, frequency and points in, the end of a pulse out: 0.1 % and 0.05 K of ngspice at the resistances by hand.</summary>
    [Fact]
    public void TheEndOfAPulseIsThatOfNgspice()
    {
        IReadOnlyList<(HeatedCircuit Heated, ReferenceResult Result)> rows = PulsedReference.Read();
        Assert.Equal(PulsedReference.Cases.Count, rows.Count);
        foreach ((PulsedCase given, (HeatedCircuit heated, ReferenceResult expected)) in PulsedReference.Cases.Zip(rows))
        {
            BoundChannel channel = Channel(given);
            ChannelModel model = new(channel, p => new TransistorVariants(p));
            Assert.Equal(heated.Rth[0], model.ControlHeat.Effective!.Value, 2);
            Assert.Equal(heated.Rth[1], model.PassHeat[0].Effective!.Value, 2);
            SolvedState? state = WorstCase.Nominal(model, new PinSource(channel.Logic));
            Assert.NotNull(state);
            Assert.InRange(state.LoadCurrent / expected.LoadCurrent, 0.999, 1.001);
            for (int i = 0; i < given.Legs; i++)
            {
                Assert.InRange(state.Transistors[i].Tj - 273.15 - heated.Circuit.Legs[i].Pass.Celsius, -0.05, 0.05);
            }

            Assert.InRange(state.Transistors[^1].Tj - 273.15 - heated.Circuit.Control.Celsius, -0.05, 0.05);
        }

        // The cases mean something only where a pulse heats by tens of kelvins.
        Assert.All(rows, r => Assert.InRange(r.Heated.Circuit.Legs[0].Pass.Celsius, 45, 150));
    }

    private static PulsedHeat Heat(Transistor part, double? rth, double duty, double? hertz) => PulsedHeat.Of(part, rth, Conditions(duty, hertz));

    private static ChannelConditions Conditions(double duty, double? hertz) => SampleChannel.Channel(1).Conditions with
    {
        Duty = duty,
        Frequency = hertz is { } f ? Frequency.FromHertz(f) : null,
    };

    private static BoundChannel Channel(PulsedCase given)
    {
        Transistor Carded(string number, double rth) => SampleChannel.Transistor(number, rth) with
        {
            Card = new Cited<ModelCard>(new ModelCard("g", PulsedReference.Card, [], []), "parts.csv!K2"),
            Coupling = new Cited<ThermalResistance>(ThermalResistance.FromKelvinsPerWatt(30), "parts.csv!K2"),
        };
        BoundChannel channel = SampleChannel.Channel(given.Legs);
        Transistor pass = Carded("TQ-31", 330) with { Zth = given.Zth ? Points : [] };
        return channel with
        {
            Conditions = channel.Conditions with
            {
                Duty = given.Duty,
                Frequency = Frequency.FromHertz(given.Hertz),
                Supply = new(Voltage.FromVolts(23), Voltage.FromVolts(25)),
                LoadDrop = new(Voltage.FromVolts(7), Voltage.FromVolts(9)),
                Leds = 0,
            },
            Legs = [.. channel.Legs.Select(l => l with { Pass = l.Pass with { Part = pass } })],
            Control = channel.Control with { Part = Carded("TQ-30", 300) },
        };
    }
}
