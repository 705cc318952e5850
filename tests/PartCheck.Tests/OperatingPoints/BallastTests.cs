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
        LegGroup rest = new(legs - 1, new BipolarDevice(Card), 56, averaging, true, Heat);
        LegGroup odd = rest with { Count = 1, Pass = new BipolarDevice(Card, shift: 1.039690) };
        OperatingPoint point = Solve(odd, rest);
        Assert.InRange(1e-3 / (point.Legs[0].Ic - point.Legs[1].Ic) / ohms, 0.99, 1.01);
    }

    // The first leg alone is sensed, through 120 ohm. ngspice prints 12.34282 and 12.32876 mA; with 1 mV at the second base 12.34281
    // and 12.34582 mA, at the first base 12.34298 and 12.31185 mA: 1 mV over 17.07 uA is 58.58 ohm either way. The sense resistor alone
    // with the device, 56 + 0.1 + 2.09 + 0.02, is 58.21 ohm; 56 parallel 120 would be 40.39.
    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void ALegThatIsSensedAloneHasItsSenseResistorForBallast(bool atTheSensed)
    {
        BipolarDevice shifted = new(Card, shift: 1.039690);
        LegGroup sensed = new(1, new BipolarDevice(Card), 56, 120, true, Heat);
        LegGroup other = sensed with { Sensed = false, Averaging = 0 };
        OperatingPoint even = Solve(sensed, other);
        OperatingPoint odd = atTheSensed ? Solve(sensed with { Pass = shifted }, other) : Solve(sensed, other with { Pass = shifted });
        double moved = (odd.Legs[0].Ic - odd.Legs[1].Ic) - (even.Legs[0].Ic - even.Legs[1].Ic);
        Assert.InRange((atTheSensed ? 1e-3 : -1e-3) / moved / 58.58, 0.99, 1.01);
    }

    private static readonly JunctionHeat Heat = new(298.15, 0, 1000);

    private static OperatingPoint Solve(LegGroup odd, LegGroup rest)
    {
        OperatingPoint? point = new SinkSolver().Solve(new SinkCircuit
        {
            PinVoltage = 5,
            Feed = 1e3,
            Supply = 12,
            Load = LoadElement.FromDrop(3, 12.3e-3 * (odd.Count + rest.Count), 0, 1),
            Control = new BipolarDevice(Card),
            ControlHeat = Heat,
            Legs = [odd, rest],
        });
        Assert.NotNull(point);
        Assert.InRange(point.Legs[1].Ic, 11.9e-3, 12.7e-3);
        return point;
    }
}
