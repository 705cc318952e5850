using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

public class KneeSearchTests
{
    /// <summary>
    /// 12 V, a load of 600 ohm (6 V at 10 mA), sense 68 ohm +- 20 %, control VBE 0.60 V at 0.5 mA, 25 degC. What load and sense leave is the pass
    /// transistor's: P = (12 V - 600 ohm I - 0.60 V) I peaks at I = 11.40 V/1200 ohm = 9.5 mA with 11.40^2/2400 = 54.15 mW. The ends: 0.60/81.6 =
    /// 7.353 mA, (11.40 - 4.412) V x 7.353 mA = 51.38 mW; 0.60/54.4 = 11.029 mA, (11.40 - 6.618) V x 11.029 mA = 52.74 mW.
    /// </summary>
    [Fact]
    public void TheDissipationOfAResistiveLoadPeaksInsideTheBox()
    {
        BoundChannel channel = Resistive(0.2);
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        PinSource pin = new(channel.Logic);
        ReadingJudgement judged = new ChannelJudge(model, DeratingLibrary.Named("ratings")!).Judge(pin, 1, TestContext.Current.CancellationToken);
        Finding power = judged.Findings.Single(f => f.Rule == "power" && f.Reference == "Q1");
        Assert.InRange(power.Actual!.Value, 54.15e-3 * 0.99, 54.15e-3 * 1.01);
        Assert.Equal(Extreme.Inside, power.Corner!.Sense);

        // The corners alone stay below it.
        ChannelBox box = new(model, pin, ChannelState.On, -1);
        CornerSolver solver = new(model, pin, null);
        double corners = Enumerable.Range(0, box.Count).Max(i => solver.Solve(box, i).Transistors[0].Power);
        Assert.InRange(corners, 52.74e-3 * 0.985, 52.74e-3 * 1.01);
        Assert.Equal(0, judged.NotSolved);
    }

    // Without width there is no knee: the judge finds the corner itself. 0.60 V/68 ohm = 8.824 mA: (11.40 - 5.294) V x 8.824 mA = 53.88 mW.
    [Fact]
    public void WithoutWidthTheCornerIsTheWorst()
    {
        BoundChannel channel = Resistive(0);
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        ReadingJudgement judged = new ChannelJudge(model, DeratingLibrary.Named("ratings")!)
            .Judge(new PinSource(channel.Logic), 1, TestContext.Current.CancellationToken);
        Finding power = judged.Findings.Single(f => f.Rule == "power" && f.Reference == "Q1");
        Assert.InRange(power.Actual!.Value, 53.88e-3 * 0.99, 53.88e-3 * 1.01);
        Assert.Equal(Extreme.Typical, power.Corner!.Sense);
    }

    // A position is that of its corner at the ends, and the circuit there the corner's own.
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    public void AtTheEndsOfEveryDimensionStandTheCorners(int legs)
    {
        BoundChannel channel = SampleChannel.Channel(legs);
        ChannelModel model = new(channel, p => new TransistorVariants(p));
        PinSource pin = new(channel.Logic);
        foreach (ChannelBox box in WorstCase.Boxes(model, pin))
        {
            BoxInterior interior = new(model, pin, box);
            for (int i = 0; i < box.Count; i += 1 + (box.Count / 97))
            {
                BoxCorner corner = box.At(i);
                BoxCorner same = interior.At(i, interior.PositionOf(corner.Corner));
                Assert.Equal(corner.Corner with { Ambient = same.Corner.Ambient }, same.Corner);
                Assert.Equal(corner.Corner.Ambient, same.Corner.Ambient, 9);
                Assert.Equal(corner.Circuit.Feed, same.Circuit.Feed, 6);
                Assert.Equal(corner.Circuit.Legs.Select(l => l.Pass), same.Circuit.Legs.Select(l => l.Pass));
                Assert.Equal(corner.Circuit.Control, same.Circuit.Control);
                Assert.Equal(corner.LowestHeadroom && box.State == ChannelState.On, same.LowestHeadroom && box.State == ChannelState.On);
            }
        }
    }

    // Half way between gain 120 and 360 in base current is 1/((1/120 + 1/360)/2) = 180; half way between 0.62 and 0.70 V is 0.66 V.
    [Fact]
    public void HalfWayThroughTheWindowsStandsADeviceBetween()
    {
        TransistorVariants variants = new(SampleChannel.Transistor());
        (double vbe, double gain) = DatasheetPoint.Solve(variants.Between(0.5, 0.5), 10e-3, 5);
        Assert.Equal(0.66, vbe, 3);
        Assert.InRange(gain, 179, 181);
        Assert.Equal(120, DatasheetPoint.Solve(variants.Between(0.5, 0), 10e-3, 5).Gain, 0);
        Assert.Equal(0.70, DatasheetPoint.Solve(variants.Between(1, 1), 10e-3, 5).Vbe, 4);
    }

    private static BoundChannel Resistive(double tolerance)
    {
        Transistor Part(string number, double vbe, double at) => SampleChannel.Transistor(number) with
        {
            Vbe = new(new VbeWindow(Voltage.FromVolts(vbe), Voltage.FromVolts(vbe), Voltage.FromVolts(vbe), Current.FromAmperes(at), Voltage.FromVolts(1.3)), "parts.csv!K2"),
            Hfe = new([new HfePoint(Current.FromAmperes(at / 3), 200, 200), new HfePoint(Current.FromAmperes(at), 200, 200), new HfePoint(Current.FromAmperes(at * 3), 200, 200)], "parts.csv!K2"),
            Vaf = null,
        };
        ResistorPart Ohms(double ohms, double spread) => SampleChannel.Resistor(ohms, spread) with { Tcr = new(0, "parts.csv!K2") };
        Temperature room = Temperature.FromCelsius(25);
        BoundChannel channel = SampleChannel.Channel(1);

        // The pin: 5 V. (5 - 1.28) V/6.8 kohm = 0.547 mA, of which 9 mA/200 = 0.045 mA go into the base: 0.5 mA for the control.
        return channel with
        {
            Conditions = channel.Conditions with
            {
                Supply = new(Voltage.FromVolts(12), Voltage.FromVolts(12)),
                SupplyPeak = Voltage.FromVolts(12),
                LoadDrop = new(Voltage.FromVolts(6), Voltage.FromVolts(6)),
                Leds = 0,
                CurrentNominal = Current.FromAmperes(0.01),
                Ambient = new(room, room),
            },
            Logic = channel.Logic with { Supply = new(Voltage.FromVolts(5), Voltage.FromVolts(5)), High = [new HighLevel(Voltage.FromVolts(4.99), Current.FromAmperes(8e-3))] },
            Legs = [channel.Legs[0] with
            {
                Pass = channel.Legs[0].Pass with { Part = Part("TQ-31", 0.68, 9e-3) },
                Sense = channel.Legs[0].Sense with { Part = Ohms(68, tolerance) },
            }],
            Control = channel.Control with { Part = Part("TQ-30", 0.60, 0.5e-3) },
            Feed = channel.Feed with { Part = Ohms(6800, 0) },
        };
    }
}
