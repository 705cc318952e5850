using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>
/// What the trade knows of this circuit, as a check from outside. Unless another source is named: common practice, no source.
/// The devices are plain small-signal types: VBE 0.66 V at 10 mA, hFE about 150 to 200.
/// </summary>
public class TradeFactsTests
{
    private static readonly BipolarParameters SmallSignal = DatasheetFit.Fit([(1e-3, 150), (10e-3, 170), (100e-3, 90)], 0.68, 10e-3, 5, 80);

    [Fact]
    public void VbeOfASmallTransistorIsSixToSevenTenthsOfAVolt()
    {
        BipolarDevice device = new(SmallSignal);
        Assert.InRange(DatasheetPoint.Solve(device, 0.2e-3, 5).Vbe, 0.55, 0.65);
        Assert.InRange(DatasheetPoint.Solve(device, 20e-3, 5).Vbe, 0.62, 0.72);
    }

    // 0.7 V over 62 ohm sets about 11 mA; at 12 V with 2 V over the LED the rest, about 9.3 V and 0.1 W, is the transistor's.
    [Fact]
    public void SixtyTwoOhmSetAboutElevenMilliampsAndTheTransistorTakesTheRest()
    {
        BipolarDevice control = new(DatasheetFit.Fit([(1e-3, 150)], 0.70, 1e-3, 5, 80));
        OperatingPoint p = Solve(Circuit(62, 4700, 3.3, 12, 2, 0.011) with { Control = control });
        Assert.InRange(p.LoadCurrent, 10.2e-3, 11.8e-3);
        Assert.InRange(p.Legs[0].Vce, 9.1, 9.5);
        Assert.InRange(p.Legs[0].Power, 0.09, 0.11);
    }

    // Two legs of 62 ohm averaged through 100 ohm each: about 10.2 mA a leg, within 10 %.
    [Fact]
    public void TwoAveragedLegsCarryAboutTenMilliampsEach()
    {
        SinkCircuit c = Circuit(62, 2200, 3.3, 12, 2, 0.0204);
        OperatingPoint p = Solve(c with { Legs = [c.Legs[0] with { Count = 2, Averaging = 100 }] });
        Assert.InRange(p.Legs[0].Ic, 9.2e-3, 11.2e-3);
    }

    [Fact]
    public void MoreLegsNeedMoreBaseCurrentFromThePin()
    {
        double Needed(int legs)
        {
            SinkCircuit c = Circuit(62, 1000, 5, 12, 2, 0.01 * legs);
            OperatingPoint p = Solve(c with { Legs = [c.Legs[0] with { Count = legs, Averaging = 100 }] });
            return legs * p.Legs[0].Ib;
        }

        double two = Needed(2);
        double four = Needed(4);
        double eight = Needed(8);
        Assert.InRange(four / two, 1.8, 2.2);
        Assert.InRange(eight / four, 1.8, 2.2);
    }

    // Values of a published open-hardware LED module: 100 ohm sense, 10 k feed, 3.3 V pin. It gives 5.7 to 6.1 mA with
    // small-signal types, not the 10 mA aimed at.
    [Theory]
    [InlineData(0.68)]
    [InlineData(0.70)]
    public void AHundredOhmsGiveSixMilliampsNotTen(double vbe)
    {
        BipolarDevice device = new(DatasheetFit.Fit([(1e-3, 150), (10e-3, 170), (100e-3, 90)], vbe, 10e-3, 5, 80));
        SinkCircuit c = Circuit(100, 10e3, 3.3, 5, 2, 0.006);
        OperatingPoint p = Solve(c with { Control = device, Legs = [c.Legs[0] with { Pass = device }] });
        Assert.InRange(p.LoadCurrent, 5.65e-3, 6.15e-3);
    }

    // The same module with 100 k feed: 3.4 mA with hFE about 150, the control never conducts, and base drive must break.
    [Fact]
    public void AHundredKilohmsOfFeedStarveTheLoop()
    {
        BipolarDevice device = new(DatasheetFit.Fit([(1e-3, 150)], 0.66, 10e-3, 5, double.PositiveInfinity));
        SinkCircuit c = Circuit(100, 100e3, 3.3, 5, 2, 0.0034) with { Control = device };
        c = c with { Legs = [c.Legs[0] with { Pass = device }] };
        SinkSolver solver = new();
        OperatingPoint? p = solver.Solve(c);
        Assert.NotNull(p);
        Assert.InRange(p.LoadCurrent, 3.1e-3, 3.6e-3);
        Assert.InRange(p.Control.Ic, 0, 1e-7);

        OperatingPoint? edge = solver.SolveEdge(c, 1.5);
        Assert.NotNull(edge);
        double available = (3.3 - edge.BaseVoltage) / 100e3;
        Assert.True(available < 1.5 * edge.Legs[0].Ib, $"available {available}, sum IB {edge.Legs[0].Ib}");
        Assert.InRange(edge.Control.Ic / edge.Legs[0].Ib, 0.4999, 0.5001);
    }

    private static SinkCircuit Circuit(double sense, double feed, double pin, double supply, double drop, double current)
    {
        BipolarDevice device = new(SmallSignal);
        JunctionHeat heat = new(298.15, 0, 1000);
        return new SinkCircuit
        {
            PinVoltage = pin,
            Feed = feed,
            Supply = supply,
            Load = LoadElement.FromDrop(drop, current, 0, 1),
            Control = device,
            ControlHeat = heat,
            Legs = [new LegGroup(1, device, sense, 0, true, heat)],
        };
    }

    private static OperatingPoint Solve(SinkCircuit circuit)
    {
        OperatingPoint? point = new SinkSolver().Solve(circuit);
        Assert.NotNull(point);
        return point;
    }
}
