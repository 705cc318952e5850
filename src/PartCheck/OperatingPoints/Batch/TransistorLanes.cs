using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using PartCheck.Devices;
using PartCheck.Quantities;
using Lanes = System.Runtime.Intrinsics.Vector512<double>;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>
/// Eight transistors side by side, each at its own junction temperature: the constants of <see cref="BipolarAtTemperature"/>
/// as lanes. The equations are in <see cref="Evaluate"/>'s file.
/// </summary>
internal sealed partial class TransistorLanes
{
    /// <summary>States solved side by side.</summary>
    public const int Width = 8;

    private readonly double[] constants = new double[TransistorField.Count * Width];
    private readonly TransistorConstants?[] devices = new TransistorConstants?[Width];
    private readonly double[][] cubics = new double[Width][];
    private bool changed;
    private bool gainVaries;
    private bool hasIse;
    private bool hasIsc;
    private bool hasIkr;
    private bool hasNkf;
    private bool hasVariableRb;
    private bool hasCrowding;
    private bool hasXtb;
    private Lanes temperature;
    private Lanes inverseTemperature;
    private Lanes isat;
    private Lanes ise;
    private Lanes isc;
    private Lanes inverseBf;
    private Lanes inverseBr;
    private Lanes inverseNf;
    private Lanes inverseNr;
    private Lanes inverseNe;
    private Lanes inverseNc;
    private Lanes dlnIs;
    private Lanes dlnBf;
    private Lanes dlnBr;

    /// <summary>ln of the saturation current at temperature [ln A].</summary>
    public Lanes LogSaturation { get; private set; }

    /// <summary>NF kT/q [V].</summary>
    public Lanes ForwardVoltage { get; private set; }

    /// <summary>NR kT/q [V].</summary>
    public Lanes ReverseVoltage { get; private set; }

    /// <summary>Junction temperature [K].</summary>
    public Lanes Temperature => temperature;

    /// <summary>True where current crowding counts in some lane.</summary>
    public bool IsCrowded => hasCrowding;

    /// <summary>Emitter resistance [ohm].</summary>
    public Lanes Re => Constant(TransistorField.Re);

    /// <summary>Collector resistance [ohm].</summary>
    public Lanes Rc => Constant(TransistorField.Rc);

    /// <summary>Puts a device into a lane.</summary>
    public void Set(int lane, BipolarDevice device)
    {
        if (ReferenceEquals(devices[lane]?.Device, device))
        {
            return;
        }

        TransistorConstants made = TransistorConstants.Of(device);
        devices[lane] = made;
        cubics[lane] = made.Cubics;
        double[] values = made.Values;
        for (int i = 0; i < values.Length; i++)
        {
            constants[(i * Width) + lane] = values[i];
        }

        changed = true;
    }

    /// <summary>The device in a lane.</summary>
    public BipolarDevice At(int lane) => devices[lane]!.Device;

    /// <summary>Brings the constants to a temperature [K] (the laws of <see cref="BipolarDevice"/>).</summary>
    public void Bring(Lanes kelvins)
    {
        if (changed)
        {
            Survey();
        }
        else if (kelvins == temperature)
        {
            return;
        }

        changed = false;
        temperature = kelvins;
        Lanes one = Lanes.One;
        Lanes inverse = one / kelvins;
        inverseTemperature = inverse;
        Lanes vt = kelvins * PhysicalConstants.BoltzmannOverCharge;
        Lanes logRatio = ElementaryFunctions.Log(kelvins * (1 / PhysicalConstants.RoomTemperature));
        Lanes gap = Constant(TransistorField.EnergyGap);
        Lanes xti = Constant(TransistorField.Xti);
        Lanes logIs = (xti * logRatio) + (gap * (Vector512.Create(1 / PhysicalConstants.RoomTemperature) - inverse));
        LogSaturation = Constant(TransistorField.LogIs) + logIs;
        isat = Constant(TransistorField.Is) * ElementaryFunctions.Exp(logIs);
        ForwardVoltage = Constant(TransistorField.Nf) * vt;
        ReverseVoltage = Constant(TransistorField.Nr) * vt;
        Lanes inverseVt = one / vt;
        inverseNf = one / ForwardVoltage;
        inverseNr = one / ReverseVoltage;
        dlnIs = (xti + (gap * inverse)) * inverse;
        Lanes inverseForward = one;
        Lanes inverseReverse = one;
        dlnBf = Lanes.Zero;
        dlnBr = Lanes.Zero;
        if (hasXtb)
        {
            Lanes xtb = Vector512.ConditionalSelect(
                Vector512.LessThan(kelvins, Vector512.Create(PhysicalConstants.RoomTemperature)),
                Constant(TransistorField.XtbCold), Constant(TransistorField.XtbHot));
            Lanes xtbReverse = Constant(TransistorField.XtbReverse);
            inverseForward = ElementaryFunctions.Exp(-(xtb * logRatio));
            inverseReverse = xtb == xtbReverse ? inverseForward
                : xtbReverse == Lanes.Zero ? one : ElementaryFunctions.Exp(-(xtbReverse * logRatio));
            dlnBf = xtb * inverse;
            dlnBr = xtbReverse * inverse;
        }

        inverseBf = Constant(TransistorField.InverseBf) * inverseForward;
        inverseBr = Constant(TransistorField.InverseBr) * inverseReverse;
        if (hasIse)
        {
            Lanes ne = Constant(TransistorField.InverseNe);
            inverseNe = ne * inverseVt;
            ise = Constant(TransistorField.Ise) * ElementaryFunctions.Exp(logIs * ne) * inverseForward;
        }

        if (hasIsc)
        {
            Lanes nc = Constant(TransistorField.InverseNc);
            inverseNc = nc * inverseVt;
            isc = Constant(TransistorField.Isc) * ElementaryFunctions.Exp(logIs * nc) * inverseReverse;
        }
    }

    /// <summary>Voltage above which a junction's steps are limited: scale ln(scale/(sqrt 2 IS)) [V].</summary>
    public Lanes Critical(Lanes scale) => scale * (ElementaryFunctions.Log(scale * (1 / Math.Sqrt(2))) - LogSaturation);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Lanes Constant(int field) =>
        Vector512.LoadUnsafe(ref MemoryMarshal.GetArrayDataReference(constants), (nuint)(field * Width));

    /// <summary>Finds which terms of the equations no lane needs.</summary>
    private void Survey()
    {
        gainVaries = hasIse = hasIsc = hasIkr = hasNkf = hasVariableRb = hasCrowding = hasXtb = false;
        foreach (TransistorConstants? device in devices)
        {
            if (device is not null)
            {
                gainVaries |= !device.GainIsConstant;
                hasIse |= device.HasIse;
                hasIsc |= device.HasIsc;
                hasIkr |= device.HasIkr;
                hasNkf |= device.HasNkf;
                hasVariableRb |= device.HasVariableRb;
                hasCrowding |= device.HasCrowding;
                hasXtb |= device.HasXtb;
            }
        }
    }
}
