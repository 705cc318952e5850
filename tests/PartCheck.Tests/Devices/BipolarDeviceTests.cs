using PartCheck.Devices;
using Xunit;

namespace PartCheck.Tests.Devices;

public class BipolarDeviceTests
{
    // Saturation current against temperature for EG 1.11 eV, XTI 3, Tn 300.15 K: computed once from the SPICE law and kept
    // (regression; the law itself is held to ngspice by the channel reference table).
    [Theory]
    [InlineData(-55, 3.789e-8)]
    [InlineData(-40, 2.065e-6)]
    [InlineData(0, 1.084e-2)]
    [InlineData(25, 0.7350)]
    [InlineData(85, 1772)]
    [InlineData(125, 9.029e4)]
    [InlineData(150, 7.329e5)]
    public void TheSaturationCurrentFollowsTheSpiceLaw(double celsius, double ratio)
    {
        BipolarDevice device = new(new BipolarParameters { Is = 1e-14 });
        double actual = device.At(celsius + 273.15).SaturationCurrent / 1e-14;
        Assert.InRange(actual / ratio, 0.9985, 1.0015);
    }

    // Textbook (Sedra and Smith): about -2 mV/K at constant current; closed form at VBE 0.6 V, 300 K: -1.96 mV/K.
    [Fact]
    public void VbeFallsByAboutTwoMillivoltsAKelvin()
    {
        BipolarDevice device = new(new BipolarParameters { Is = 1e-14 });
        double Vbe(double kelvins)
        {
            double low = 0.3;
            double high = 0.9;
            for (int i = 0; i < 60; i++)
            {
                double middle = (low + high) / 2;
                device.At(kelvins).Evaluate(middle, -5, out BipolarCurrents q);
                (low, high) = q.Ic < 1.197e-4 ? (middle, high) : (low, middle);
            }

            return low;
        }

        Assert.InRange(Vbe(300), 0.595, 0.605);
        Assert.InRange((Vbe(301) - Vbe(299)) / 2, -2.02e-3, -1.90e-3);
    }

    // One operating point of ngspice 39 (card and currents printed by it): VBE inside 0.718829 V, VBC inside -7.66426 V, 25 degC.
    [Fact]
    public void CurrentsAgreeWithNgspiceAtOnePoint()
    {
        BipolarDevice device = new(new BipolarParameters
        {
            Is = 1e-14,
            Bf = 250,
            Vaf = 80,
            Ikf = 0.2,
            Ise = 1e-14,
            Ne = 1.5,
            Br = 4,
            Xtb = 1.5,
            Rb = 5,
            Rc = 0.5,
            Re = 0.1,
        });
        device.At(298.15).Evaluate(0.7188289, -7.66426, out BipolarCurrents q);
        Assert.InRange(q.Ic / 1.085744e-2, 0.9999, 1.0001);
        Assert.InRange(q.Ib / 4.305226e-5, 0.9999, 1.0001);
        Assert.InRange(q.DIc.Vbe / 0.4034184, 0.999, 1.001);
        Assert.InRange(-q.DIc.Vbc / 1.238525e-4, 0.99, 1.01);
    }

    // ngspice 39, no ohmic resistances, VBE 0.8 V: VCE 5 V at 25 degC, then VCE 0.1 V at 85 degC.
    [Theory]
    [InlineData(-4.2, 25, 3.414337479e-2, 1.669208390e-3)]
    [InlineData(0.7, 85, 8.387161239e-3, 7.873703410e-2)]
    public void ARollOffExponentAgreesWithNgspice(double vbc, double celsius, double ic, double ib)
    {
        BipolarDevice device = new(new BipolarParameters
        {
            Is = 1e-14,
            Bf = 200,
            Vaf = 60,
            Var = 20,
            Ikf = 0.02,
            Nkf = 0.7,
            Ikr = 0.01,
            Ise = 1e-14,
            Ne = 1.6,
            Br = 3,
            Tnom = 298.15,
        });
        device.At(celsius + 273.15).Evaluate(0.8, vbc, out BipolarCurrents q);
        Assert.InRange(q.Ic / ic, 0.9999, 1.0001);
        Assert.InRange(q.Ib / ib, 0.9999, 1.0001);
    }

    [Theory]
    [InlineData(0.65, -3, 320)]
    [InlineData(0.72, 0.55, 300)]
    [InlineData(0.2, 0.1, 390)]
    [InlineData(-1, -8, 400)]
    public void SlopesAreThoseOfTheCurrents(double vbe, double vbc, double kelvins)
    {
        BipolarDevice device = new(
            new BipolarParameters
            {
                Is = 3e-14,
                Bf = 180,
                Vaf = 60,
                Var = 12,
                Ikf = 0.05,
                Ikr = 0.02,
                Ise = 2e-13,
                Isc = 1e-13,
                Xtb = 1.4,
                Rb = 40,
                Rbm = 8,
            },
            gain: GainFactor.Tabulate(ic => 1 + (0.1 * Math.Log10(ic)), 1e-9, 1, 60));
        BipolarCurrents At(double be, double bc, double t)
        {
            device.At(t).Evaluate(be, bc, out BipolarCurrents q);
            return q;
        }

        BipolarCurrents here = At(vbe, vbc, kelvins);
        const double Step = 1e-6;
        BipolarCurrents up = At(vbe + Step, vbc, kelvins);
        BipolarCurrents down = At(vbe - Step, vbc, kelvins);
        Close((up.Ic - down.Ic) / (2 * Step), here.DIc.Vbe);
        Close((up.Ib - down.Ib) / (2 * Step), here.DIb.Vbe);
        Close((up.Rbb - down.Rbb) / (2 * Step), here.DRbb.Vbe);
        up = At(vbe, vbc + Step, kelvins);
        down = At(vbe, vbc - Step, kelvins);
        Close((up.Ic - down.Ic) / (2 * Step), here.DIc.Vbc);
        Close((up.Ib - down.Ib) / (2 * Step), here.DIb.Vbc);
        up = At(vbe, vbc, kelvins + 1e-3);
        down = At(vbe, vbc, kelvins - 1e-3);
        Close((up.Ic - down.Ic) / 2e-3, here.DIc.T);
        Close((up.Ib - down.Ib) / 2e-3, here.DIb.T);
    }

    private static void Close(double expected, double actual) =>
        Assert.InRange(Math.Abs(actual - expected), 0, (2e-4 * Math.Abs(expected)) + 1e-15);
}
