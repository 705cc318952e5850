using PartCheck.Quantities;

namespace PartCheck.Devices;

/// <summary>
/// One transistor of a corner: static parameters referred to 25 degC, a VBE shift and a gain factor on top.
/// <para>VBE shift k: IS' = k IS, ISE' = k^(NF/NE) ISE, ISC' = k^(NR/NC) ISC, IKF and IKR kept (a shift of the whole
/// characteristic). Gain: the whole forward base current times f(IC).</para>
/// <para>Temperature (SPICE 3f5; ngspice bjttemp.c): IS(T) = IS (T/T0)^XTI exp(EG/Vt(T) (T/T0 - 1)), BF(T) = BF (T/T0)^XTB,
/// ISE(T) = ISE (IS(T)/IS)^(1/NE) / (T/T0)^XTB. The laws compose, so referring to 25 degC changes nothing.</para>
/// </summary>
public sealed class BipolarDevice
{
    /// <summary>Makes a device.</summary>
    /// <param name="parameters">Parameters at their own TNOM.</param>
    /// <param name="shift">k of the VBE shift [-], above 0.</param>
    /// <param name="gain">Factor on the forward base current; null: 1.</param>
    /// <param name="xtbCold">Exponent of the forward gain below 25 degC; null: the card's.</param>
    /// <param name="xtbHot">Exponent of the forward gain above 25 degC; null: the card's.</param>
    public BipolarDevice(
        BipolarParameters parameters, double shift = 1, GainFactor? gain = null, double? xtbCold = null, double? xtbHot = null)
    {
        ArgumentNullException.ThrowIfNull(parameters);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(shift);
        Parameters = parameters;
        Shift = shift;
        Gain = gain;
        XtbCold = xtbCold ?? parameters.Xtb;
        XtbHot = xtbHot ?? parameters.Xtb;

        double ratio = PhysicalConstants.RoomTemperature / parameters.Tnom;
        double logIs = LogSaturation(parameters.Tnom, PhysicalConstants.RoomTemperature);
        double gainRatio = Math.Pow(ratio, parameters.Xtb);
        Is = parameters.Is * Math.Exp(logIs) * shift;
        Bf = parameters.Bf * gainRatio;
        Br = parameters.Br * gainRatio;
        Ise = parameters.Ise * Math.Exp(logIs / parameters.Ne) / gainRatio * Math.Pow(shift, parameters.Nf / parameters.Ne);
        Isc = parameters.Isc * Math.Exp(logIs / parameters.Nc) / gainRatio * Math.Pow(shift, parameters.Nr / parameters.Nc);
        Rbm = double.IsNaN(parameters.Rbm) ? parameters.Rb : parameters.Rbm;
    }

    /// <summary>Parameters at their own TNOM.</summary>
    public BipolarParameters Parameters { get; }

    /// <summary>k of the VBE shift [-].</summary>
    public double Shift { get; }

    /// <summary>Factor on the forward base current; null: 1.</summary>
    public GainFactor? Gain { get; }

    /// <summary>Exponent of the forward gain below 25 degC.</summary>
    public double XtbCold { get; }

    /// <summary>Exponent of the forward gain above 25 degC.</summary>
    public double XtbHot { get; }

    /// <summary>Saturation current at 25 degC, shifted [A].</summary>
    internal double Is { get; }

    internal double Bf { get; }

    internal double Br { get; }

    internal double Ise { get; }

    internal double Isc { get; }

    internal double Rbm { get; }

    /// <summary>The device at a junction temperature.</summary>
    /// <param name="kelvins">Junction temperature [K], above 0.</param>
    public BipolarAtTemperature At(double kelvins) => new(this, kelvins);

    /// <summary>ln(IS(T)/IS(T0)).</summary>
    internal double LogSaturation(double t0, double t) =>
        (Parameters.Xti * Math.Log(t / t0)) + (Parameters.Eg / PhysicalConstants.BoltzmannOverCharge * ((1 / t0) - (1 / t)));
}
