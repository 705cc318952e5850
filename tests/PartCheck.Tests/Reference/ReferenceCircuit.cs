using System.Globalization;
using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;

namespace PartCheck.Tests.Reference;

/// <summary>One transistor of a reference circuit: its card and its given junction temperature.</summary>
public sealed record ReferenceTransistor(BipolarParameters Card, double Celsius);

/// <summary>One leg of a reference circuit.</summary>
public sealed record ReferenceLeg(ReferenceTransistor Pass, double Sense, double Averaging, bool Sensed);

/// <summary>What ngspice printed for a circuit, SI units; currents into the terminals.</summary>
public sealed record ReferenceResult(
    double LoadCurrent, double PinCurrent, double BaseVoltage, double ControlBaseVoltage, double CollectorVoltage,
    double ControlIc, double ControlIb, IReadOnlyList<double> Ic, IReadOnlyList<double> Ib, IReadOnlyList<double> Emitter);

/// <summary>One channel at given junction temperatures: inputs of the reference table.</summary>
public sealed record ReferenceCircuit
{
    public required string Name { get; init; }

    public required bool Unfed { get; init; }

    public required double PinVoltage { get; init; }

    public required double PinResistance { get; init; }

    public required double Feed { get; init; }

    public required double PullDown { get; init; }

    public required PullDownAt PullDownAt { get; init; }

    public required double Supply { get; init; }

    public required double LoadEmission { get; init; }

    public required double LoadSaturation { get; init; }

    public required double LoadSeries { get; init; }

    public required ReferenceTransistor Control { get; init; }

    public required IReadOnlyList<ReferenceLeg> Legs { get; init; }

    /// <summary>The same circuit for the project's solver: every junction at its given temperature.</summary>
    public SinkCircuit ToSink() => new()
    {
        PinVoltage = PinVoltage,
        PinResistance = PinResistance,
        Feed = Feed,
        PullDown = PullDown,
        PullDownAt = PullDownAt,
        Supply = Supply,
        Load = Unfed ? null : LoadElement.FromConstants(LoadEmission, LoadSaturation, LoadSeries),
        Control = new BipolarDevice(Control.Card),
        ControlHeat = new JunctionHeat(Control.Celsius + 273.15, 0, 1000),
        Legs = [.. Legs.Select(l => new LegGroup(
            1, new BipolarDevice(l.Pass.Card), l.Sense, l.Averaging, l.Sensed, new JunctionHeat(l.Pass.Celsius + 273.15, 0, 1000)))],
    };

    /// <summary>The card as text, <c>KEY=value</c> with round-trip numbers; infinite limits left out.</summary>
    public static string CardText(BipolarParameters p)
    {
        List<string> items = [];
        void Add(string key, double value)
        {
            if (double.IsFinite(value))
            {
                items.Add(key + "=" + value.ToString("R", CultureInfo.InvariantCulture));
            }
        }

        Add("IS", p.Is);
        Add("BF", p.Bf);
        Add("NF", p.Nf);
        Add("VAF", p.Vaf);
        Add("IKF", p.Ikf);
        Add("ISE", p.Ise);
        Add("NE", p.Ne);
        Add("BR", p.Br);
        Add("NR", p.Nr);
        Add("VAR", p.Var);
        Add("IKR", p.Ikr);
        Add("ISC", p.Isc);
        Add("NC", p.Nc);
        Add("RB", p.Rb);
        Add("IRB", p.Irb);
        Add("RBM", p.Rbm);
        Add("RE", p.Re);
        Add("RC", p.Rc);
        Add("XTI", p.Xti);
        Add("EG", p.Eg);
        Add("XTB", p.Xtb);
        items.Add("TNOM=" + Math.Round(p.Tnom - 273.15, 6).ToString("R", CultureInfo.InvariantCulture));
        return string.Join(' ', items);
    }
}
