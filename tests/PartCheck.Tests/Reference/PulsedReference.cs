using System.Globalization;
using PartCheck.Channels;
using PartCheck.Devices;

namespace PartCheck.Tests.Reference;

/// <summary>One channel under PWM, as a part table and a channels sheet give it.</summary>
/// <param name="Name">The row's name: ambient, effective resistances and coupling by hand.</param>
/// <param name="Legs">Legs, all alike.</param>
/// <param name="Duty">Duty [-].</param>
/// <param name="Hertz">Frequency [Hz].</param>
/// <param name="Zth">True where the pass transistors have Zth points.</param>
public sealed record PulsedCase(string Name, int Legs, double Duty, double Hertz, bool Zth);

/// <summary>
/// Channels at the end of a pulse, iterated in ngspice at an effective thermal resistance that was worked out by hand, so that the project
/// has no part in it. RthJA 330 K/W (pass), 300 K/W (control, no Zth points), coupling 30 K/W; Zth points 1 ms: 60, 10 ms: 150, 100 ms: 260 K/W.
/// </summary>
public static class PulsedReference
{
    /// <summary>The cases, each with its arithmetic.</summary>
    public static IReadOnlyList<PulsedCase> Cases { get; } =
    [
        // ton = 0.5/100 Hz = 5 ms: log10 5 = 0.698970 of the way from 60 to 150 K/W in logarithms, 60 x 2.5^0.698970 = 60 x exp(0.640460)
        // = 113.841. Pass 0.5 x 330 + 0.5 x 113.841 = 221.921. Control: below 1 kHz without points, 300. Coupling 30 x 221.921/330 = 20.1746.
        new("zth@25_300_221.921@20.1746", 1, 0.5, 100, true),

        // From 1 kHz without points: 0.3 x 330 = 99; 0.3 x 300 = 90; 0.3 x 30 = 9.
        new("averaged@25_90_99@9", 1, 0.3, 2000, false),

        // Below 1 kHz without points: as at steady power.
        new("slow@25_300_330@30", 1, 0.6, 200, false),

        // ton = 0.25 ms, before the first point: 0.25 x 330 + 0.75 x 60 = 127.5. Control 0.25 x 300 = 75. Coupling 30 x 127.5/330 = 11.5909.
        new("fast-zth@25_75_127.5_127.5@11.5909", 2, 0.25, 1000, true),
    ];

    /// <summary>The card of the check cases, invented.</summary>
    public static BipolarParameters Card { get; } = new()
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
        Tnom = 300.15,
    };

    /// <summary>The circuits, iterated in ngspice.</summary>
    public static IReadOnlyList<(ReferenceCircuit, ReferenceResult)> Make() =>
        [.. Cases.Select(c =>
        {
            (double ambient, double[] rth, double coupling) = Numbers(c.Name);
            (HeatedCircuit heated, ReferenceResult result) = HeatedReference.Iterate(Circuit(c), ambient, rth, coupling)
                ?? throw new InvalidOperationException(c.Name + " has no fixed point.");
            return (heated.Circuit, result);
        })];

    /// <summary>Every row of the table.</summary>
    public static IReadOnlyList<(HeatedCircuit Heated, ReferenceResult Result)> Read() =>
        [.. ReferenceTable.Read(ReferenceTable.Pulsed).Select(r =>
        {
            (double ambient, double[] rth, double coupling) = Numbers(r.Circuit.Name);
            return (new HeatedCircuit(r.Circuit, ambient, rth, coupling), r.Result);
        })];

    // Pin: the centre of 4.75 to 5.25 V, half of (4.75 - 4.2) V/8 mA = 68.75 ohm. Load: a resistance of 8 V/20 mA (a leg).
    private static ReferenceCircuit Circuit(PulsedCase c) => new()
    {
        Name = c.Name,
        Unfed = false,
        PinVoltage = 5,
        PinResistance = 34.375,
        Feed = 2200,
        PullDown = double.PositiveInfinity,
        PullDownAt = PullDownAt.Base,
        Supply = 24,
        LoadEmission = 0,
        LoadSaturation = 0,
        LoadSeries = 400.0 / c.Legs,
        Control = new ReferenceTransistor(Card, 25),
        Legs = [.. Enumerable.Repeat(new ReferenceLeg(new ReferenceTransistor(Card, 25), 33, c.Legs > 1 ? 100 : 0, true), c.Legs)],
    };

    private static (double Ambient, double[] Rth, double Coupling) Numbers(string name)
    {
        string[] parts = name.Split('@');
        double[] numbers = [.. parts[1].Split('_').Select(n => double.Parse(n, CultureInfo.InvariantCulture))];
        return (numbers[0], numbers[1..], double.Parse(parts[2], CultureInfo.InvariantCulture));
    }
}
