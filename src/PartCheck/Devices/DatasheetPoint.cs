using PartCheck.Quantities;

namespace PartCheck.Devices;

/// <summary>A device at a datasheet's test point: given collector current and collector-emitter voltage at 25 degC.</summary>
/// <param name="Vbe">Base-emitter voltage at the terminals [V].</param>
/// <param name="Gain">hFE = IC/IB [-]; infinity where the base current vanishes.</param>
public readonly record struct DatasheetPoint(double Vbe, double Gain)
{
    /// <summary>Solves a device for a collector current; bracketed, so it always ends.</summary>
    /// <param name="device">The device.</param>
    /// <param name="ic">Collector current [A], above 0.</param>
    /// <param name="vce">Collector-emitter voltage at the terminals [V].</param>
    public static DatasheetPoint Solve(BipolarDevice device, double ic, double vce)
    {
        ArgumentNullException.ThrowIfNull(device);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(ic);
        BipolarAtTemperature at = device.At(PhysicalConstants.RoomTemperature);
        BipolarParameters p = device.Parameters;
        double low = -0.5;
        double high = 3;
        BipolarCurrents q = default;
        double vbe = 0;
        for (int i = 0; i < 200 && high - low > 1e-14; i++)
        {
            vbe = (low + high) / 2;
            double vbc = vbe - (vce - (ic * p.Rc) - (ic * p.Re));
            at.Evaluate(vbe, vbc, out q);
            if (q.Ic < ic)
            {
                low = vbe;
            }
            else
            {
                high = vbe;
            }
        }

        double terminal = vbe + (q.Ib * q.Rbb) + ((q.Ic + q.Ib) * p.Re);
        return new DatasheetPoint(terminal, q.Ib > 0 ? q.Ic / q.Ib : double.PositiveInfinity);
    }
}
