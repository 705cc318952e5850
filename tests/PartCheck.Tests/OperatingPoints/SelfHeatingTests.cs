using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

public class SelfHeatingTests
{
    private static readonly BipolarDevice Device = new(DatasheetFit.Fit([(1e-3, 150), (10e-3, 170), (100e-3, 90)], 0.68, 10e-3, 5, 80));

    // The definition of thermal resistance, with the power from the printed terminal voltages and currents.
    [Theory]
    [InlineData(100)]
    [InlineData(330)]
    [InlineData(700)]
    public void EveryJunctionStandsAtAmbientPlusPowerTimesResistance(double rth)
    {
        OperatingPoint p = Solve(Circuit(rth, 20, 0.3));
        SolvedTransistor pass = p.Legs[0];
        double power = ((p.CollectorVoltage - pass.EmitterVoltage) * pass.Ic) + ((p.BaseVoltage - pass.EmitterVoltage) * pass.Ib);
        Assert.InRange(pass.Tj - (300 + (rth * power)), -1e-3, 1e-3);
        double control = (p.BaseVoltage * p.Control.Ic) + (p.ControlBaseVoltage * p.Control.Ib);
        Assert.InRange(p.Control.Tj - (300 + (rth * control) + (20 * power) + (0.3 * rth * power)), -1e-3, 1e-3);
        Assert.False(pass.Held);
    }

    [Fact]
    public void WithoutResistanceTheJunctionsStayWhereTheyAre()
    {
        OperatingPoint p = Solve(Circuit(0, 0, 0));
        Assert.Equal(300, p.Legs[0].Tj);
        Assert.Equal(300, p.Control.Tj);
    }

    // 12 V, 2 V drop and 10 mA leave about 0.09 W: at 5000 K/W the junction would pass 700 K.
    [Fact]
    public void AJunctionThatRunsAwayIsHeldAndSaysSo()
    {
        OperatingPoint p = Solve(Circuit(5000, 0, 0));
        Assert.True(p.Legs[0].Held);
        Assert.Equal(473.15, p.Legs[0].Tj, 9);
        Assert.False(p.Control.Held);
        Assert.InRange(p.Legs[0].Power, 0.05, 0.12);
    }

    // An unsensed leg without ballast heats itself up, since nothing holds its current.
    [Fact]
    public void AnUnsensedLegWithoutBallastRunsAway()
    {
        SinkCircuit one = Circuit(400, 0, 0);
        LegGroup leg = one.Legs[0];
        OperatingPoint p = Solve(one with
        {
            Feed = 300,
            PinVoltage = 5,
            Load = LoadElement.FromDrop(2, 0.02, 0, 1),
            Supply = 24,
            Legs = [leg with { Averaging = 100 }, leg with { Sense = 0.5, Sensed = false }],
        });
        Assert.True(p.Legs[1].Held);
    }

    private static SinkCircuit Circuit(double rth, double coupling, double hottest)
    {
        JunctionHeat heat = new(300, rth, 473.15);
        return new SinkCircuit
        {
            PinVoltage = 3.3,
            Feed = 4700,
            Supply = 12,
            Load = LoadElement.FromDrop(2, 0.01, 0, 1),
            Control = Device,
            ControlHeat = heat with { RthJa = rth > 1000 ? 0 : rth },
            Legs = [new LegGroup(1, Device, 62, 0, true, heat, coupling)],
            HottestLegCoupling = hottest,
        };
    }

    private static OperatingPoint Solve(SinkCircuit circuit)
    {
        SinkSolver solver = new();
        OperatingPoint? point = solver.Solve(circuit);
        Assert.True(point is not null, $"{solver.Failure}");
        return point;
    }
}
