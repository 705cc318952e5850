using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>
/// Cases solved once by hand-written netlists in ngspice 39 (reltol 1e-7, abstol 1e-16, gmin 1e-15; ideal load drop; card below,
/// TNOM 27 degC): the figures are what ngspice printed. The load element stands at the same drop at the printed current.
/// </summary>
public class CheckCasesTests
{
    private static readonly BipolarParameters Card = new()
    {
        Is = 1e-14,
        Nf = 1,
        Bf = 250,
        Vaf = 80,
        Ikf = 0.2,
        Ise = 1e-14,
        Ne = 1.5,
        Br = 4,
        Xti = 3,
        Eg = 1.11,
        Xtb = 1.5,
        Rb = 5,
        Rc = 0.5,
        Re = 0.1,
    };

    [Fact]
    public void OneLegAtTwentyFiveDegrees()
    {
        OperatingPoint p = Solve(Circuit(25, 10.8574e-3));
        Close(10.8574e-3, p.LoadCurrent);
        Close(1.33052, p.BaseVoltage);
        Close(0.610389, p.Legs[0].EmitterVoltage);
        Close(0.196948e-3, p.PinCurrent);
        Close(43.052e-6, p.Legs[0].Ib);
        Close(153.90e-6, p.Control.Ic);
    }

    [Theory]
    [InlineData(-40, 12.8818e-3, 1.54979, 100.41e-6)]
    [InlineData(85, 8.89726e-3, 1.11737, 191.72e-6)]
    public void OneLegColdAndHot(double celsius, double load, double baseNode, double control)
    {
        OperatingPoint p = Solve(Circuit(celsius, load));
        Close(load, p.LoadCurrent);
        Close(baseNode, p.BaseVoltage);
        Close(control, p.Control.Ic);
    }

    [Theory]
    [InlineData(0.4, 0, 8.146e-6)]
    [InlineData(0.1, 0, 0.506e-9)]
    [InlineData(0.4, 10e-6, 152.41e-6)]
    public void OffAtEightyFiveDegreesWithAndWithoutLeakage(double pin, double leakage, double load)
    {
        OperatingPoint p = Solve(Circuit(85, load) with { PinVoltage = pin, BaseLeakage = leakage });
        Assert.InRange(Math.Abs(p.LoadCurrent - load), 0, Math.Max(1e-3 * load, 1e-9));
    }

    [Fact]
    public void UnfedThePinFeedsTheJunctions()
    {
        SinkCircuit on = Circuit(25, 20.349e-3, sense: 33, feed: 1e3);
        Close(1.88747e-3, Solve(on).PinCurrent);
        Close(2.48243e-3, Solve(on with { Load = null }).PinCurrent);
    }

    [Theory]
    [InlineData(10e3, 6.10833e-3)]
    [InlineData(100e3, 4.81218e-3)]
    public void FiveVoltSupplyWithEnoughAndWithTooLittleFeed(double feed, double load)
    {
        OperatingPoint p = Solve(Circuit(25, load, sense: 100, feed: feed, supply: 5, drop: 2));
        Close(load, p.LoadCurrent);
        if (feed == 100e3)
        {
            // Not regulating: the control collects next to nothing.
            Assert.InRange(p.Control.Ic, 1.05e-6, 1.15e-6);
        }
    }

    [Theory]
    [InlineData(PullDownAt.Base, 4.93777e-3)]
    [InlineData(PullDownAt.Pin, 8.57854e-3)]
    public void ThePullDownsTwoPlacesAreTwoCircuits(PullDownAt at, double load)
    {
        OperatingPoint p = Solve(Circuit(-40, load, gain: 60) with { PullDown = 10e3, PullDownAt = at });
        Close(load, p.LoadCurrent);
        Assert.InRange(p.Control.Ic, 0, 1e-8);
    }

    [Fact]
    public void TwoLegsShareOneControl()
    {
        SinkCircuit one = Circuit(25, 23.8535e-3, feed: 2200, pin: 5);
        OperatingPoint p = Solve(one with { Legs = [one.Legs[0] with { Count = 2, Averaging = 120 }] });
        Close(23.8535e-3, p.LoadCurrent);
        Close(1.39319, p.BaseVoltage);
        Close(1.54444e-3, p.Control.Ic);

        // The same two legs written one by one.
        OperatingPoint apart = Solve(one with { Legs = [one.Legs[0] with { Averaging = 120 }, one.Legs[0] with { Averaging = 120 }] });
        Close(23.8535e-3, apart.LoadCurrent);
        Close(apart.Legs[0].Ic, apart.Legs[1].Ic);
    }

    // Two legs of which the control senses the first, through 120 ohm or directly: the second stands at the same base node with its
    // sense resistor alone. Pin 5 V, feed 1 k, sense 56 ohm, printed by ngspice 39 with the options above.
    [Theory]
    [InlineData(25, 0, 12.31176e-3, 12.29769e-3, 1.415115, 0.691386, 0.691386, 3.58489e-3)]
    [InlineData(85, 0, 10.55475e-3, 10.54348e-3, 1.215567, 0.592173, 0.592173, 3.78443e-3)]
    [InlineData(25, 120, 12.34282e-3, 12.32876e-3, 1.416934, 0.691370, 0.693133, 3.58307e-3)]
    [InlineData(85, 120, 10.57997e-3, 10.56871e-3, 1.217065, 0.592158, 0.593591, 3.78293e-3)]
    public void OneLegOfTwoIsSensed(
        double celsius, double averaging, double sensed, double other, double baseNode, double controlBase, double emitter, double pin)
    {
        SinkCircuit one = Circuit(celsius, sensed + other, feed: 1e3, pin: 5);
        OperatingPoint p = Solve(one with { Legs = [one.Legs[0] with { Averaging = averaging }, one.Legs[0] with { Sensed = false }] });
        Close(sensed, p.Legs[0].Ic);
        Close(other, p.Legs[1].Ic);
        Close(baseNode, p.BaseVoltage);
        Close(controlBase, p.ControlBaseVoltage);
        Close(emitter, p.Legs[0].EmitterVoltage);
        Close(pin, p.PinCurrent);
        Close(sensed + other, p.LoadCurrent);
    }

    private static SinkCircuit Circuit(
        double celsius, double load, double sense = 56, double feed = 10e3, double pin = 3.3, double supply = 12, double drop = 3, double gain = 250)
    {
        BipolarDevice device = new(Card with { Bf = gain });
        JunctionHeat heat = new(celsius + 273.15, 0, 1000);
        return new SinkCircuit
        {
            PinVoltage = pin,
            Feed = feed,
            Supply = supply,
            Load = LoadElement.FromDrop(drop, load, 0, 1),
            Control = device,
            ControlHeat = heat,
            Legs = [new LegGroup(1, device, sense, 0, true, heat)],
        };
    }

    private static OperatingPoint Solve(SinkCircuit circuit)
    {
        SinkSolver solver = new();
        OperatingPoint? point = solver.Solve(circuit);
        Assert.True(point is not null, $"{solver.Failure}");
        return point;
    }

    private static void Close(double expected, double actual) => Assert.InRange(actual / expected, 0.999, 1.001);
}
