using PartCheck.Devices;
using PartCheck.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>
/// Ballast between two of N legs, printed by ngspice 39 (reltol 1e-7, abstol 1e-16, gmin 1e-15): 1 mV in series with one base over the
/// change of the difference of the two collector currents. Pin 5 V, feed 1 k, sense 56 ohm, about 12.3 mA a leg, 25 degC.
/// Here the millivolt is a shift of that transistor's characteristic: k = exp(1 mV/25.693 mV) = 1.039690.
/// </summary>
public class BallastTests
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

    [Theory]
    [InlineData(120, 2, 40.67)]
    [InlineData(120, 8, 40.68)]
    [InlineData(47, 2, 27.99)]
    [InlineData(10, 2, 10.84)]
    public void TheSolverGivesWhatNgspiceGives(double averaging, int legs, double ohms)
    {
        JunctionHeat heat = new(298.15, 0, 1000);
        LegGroup rest = new(legs - 1, new BipolarDevice(Card), 56, averaging, true, heat);
        LegGroup odd = new(1, new BipolarDevice(Card, shift: 1.039690), 56, averaging, true, heat);
        SinkCircuit circuit = new()
        {
            PinVoltage = 5,
            Feed = 1e3,
            Supply = 12,
            Load = LoadElement.FromDrop(3, 12.3e-3 * legs, 0, 1),
            Control = new BipolarDevice(Card),
            ControlHeat = heat,
            Legs = [odd, rest],
        };
        OperatingPoint? point = new SinkSolver().Solve(circuit);
        Assert.NotNull(point);
        Assert.InRange(point.Legs[1].Ic, 11.9e-3, 12.7e-3);
        Assert.InRange(1e-3 / (point.Legs[0].Ic - point.Legs[1].Ic) / ohms, 0.99, 1.01);
    }
}
