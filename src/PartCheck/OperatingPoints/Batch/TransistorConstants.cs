using System.Runtime.CompilerServices;
using PartCheck.Devices;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>Where a constant of a transistor stands among its lanes.</summary>
internal static class TransistorField
{
    public const int Is = 0;
    public const int LogIs = 1;
    public const int Ise = 2;
    public const int Isc = 3;
    public const int InverseBf = 4;
    public const int InverseBr = 5;
    public const int Nf = 6;
    public const int Nr = 7;
    public const int InverseNe = 8;
    public const int InverseNc = 9;
    public const int InverseVaf = 10;
    public const int InverseVar = 11;
    public const int InverseIkf = 12;
    public const int InverseIkr = 13;
    public const int Nkf = 14;
    public const int Re = 15;
    public const int Rc = 16;
    public const int Rbm = 17;
    public const int VariableRb = 18;
    public const int InverseIrb = 19;
    public const int Xti = 20;
    public const int EnergyGap = 21;
    public const int XtbCold = 22;
    public const int XtbHot = 23;
    public const int XtbReverse = 24;
    public const int GainFirstLog = 25;
    public const int GainPointsPerLog = 26;
    public const int GainLast = 27;
    public const int Count = 28;
}

/// <summary>The constants of one device as the batch reads them, made once for a device: SI units, at 25 degC.</summary>
internal sealed class TransistorConstants
{
    private static readonly ConditionalWeakTable<BipolarDevice, TransistorConstants> Made = [];
    private static readonly GainFactor One = GainFactor.Constant(1);

    private TransistorConstants(BipolarDevice device)
    {
        Device = device;
        BipolarParameters p = device.Parameters;
        GainFactor gain = device.Gain ?? One;
        Cubics = gain.Cubics();
        double[] v = new double[TransistorField.Count];
        v[TransistorField.Is] = device.Is;
        v[TransistorField.LogIs] = Math.Log(device.Is);
        v[TransistorField.Ise] = device.Ise;
        v[TransistorField.Isc] = device.Isc;
        v[TransistorField.InverseBf] = 1 / device.Bf;
        v[TransistorField.InverseBr] = 1 / device.Br;
        v[TransistorField.Nf] = p.Nf;
        v[TransistorField.Nr] = p.Nr;
        v[TransistorField.InverseNe] = 1 / p.Ne;
        v[TransistorField.InverseNc] = 1 / p.Nc;
        v[TransistorField.InverseVaf] = 1 / p.Vaf;
        v[TransistorField.InverseVar] = 1 / p.Var;
        v[TransistorField.InverseIkf] = 1 / p.Ikf;
        v[TransistorField.InverseIkr] = 1 / p.Ikr;
        v[TransistorField.Nkf] = p.Nkf;
        v[TransistorField.Re] = p.Re;
        v[TransistorField.Rc] = p.Rc;
        v[TransistorField.Rbm] = device.Rbm;
        v[TransistorField.VariableRb] = p.Rb - device.Rbm;
        v[TransistorField.InverseIrb] = 1 / p.Irb;
        v[TransistorField.Xti] = p.Xti;
        v[TransistorField.EnergyGap] = p.Eg / Quantities.PhysicalConstants.BoltzmannOverCharge;
        v[TransistorField.XtbCold] = device.XtbCold;
        v[TransistorField.XtbHot] = device.XtbHot;
        v[TransistorField.XtbReverse] = p.Xtb;
        v[TransistorField.GainFirstLog] = gain.FirstLog;
        v[TransistorField.GainPointsPerLog] = gain.PointsPerLog;
        v[TransistorField.GainLast] = Cubics.Length / 4;
        Values = v;
        GainIsConstant = Cubics.Length == 4;
        HasIse = device.Ise != 0;
        HasIsc = device.Isc != 0;
        HasNkf = p.Nkf != 0.5;
        HasIkr = double.IsFinite(p.Ikr);
        HasVariableRb = v[TransistorField.VariableRb] != 0;
        HasCrowding = HasVariableRb && double.IsFinite(p.Irb);
        HasXtb = device.XtbCold != 0 || device.XtbHot != 0 || p.Xtb != 0;
    }

    /// <summary>The device.</summary>
    public BipolarDevice Device { get; }

    /// <summary>The constants, by <see cref="TransistorField"/>.</summary>
    public double[] Values { get; }

    /// <summary>The gain factor's cubics, four numbers a cell.</summary>
    public double[] Cubics { get; }

    public bool GainIsConstant { get; }

    public bool HasIse { get; }

    public bool HasIsc { get; }

    public bool HasIkr { get; }

    public bool HasNkf { get; }

    public bool HasVariableRb { get; }

    public bool HasCrowding { get; }

    public bool HasXtb { get; }

    /// <summary>The constants of a device.</summary>
    public static TransistorConstants Of(BipolarDevice device) => Made.GetValue(device, d => new TransistorConstants(d));
}
