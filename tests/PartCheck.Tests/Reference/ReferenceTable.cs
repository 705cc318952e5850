using System.Globalization;
using System.Text;
using PartCheck.Channels;
using PartCheck.Devices;

namespace PartCheck.Tests.Reference;

/// <summary>Recorded tables of reference circuits: inputs and ngspice's outputs, one circuit a row, a header that says what made them.</summary>
public static class ReferenceTable
{
    /// <summary>Channels at given junction temperatures.</summary>
    public const string Channels = "ngspice-channels.csv";

    /// <summary>Channels that heat themselves.</summary>
    public const string Heated = "ngspice-heated.csv";

    /// <summary>Channels that heat themselves in pulses.</summary>
    public const string Pulsed = "ngspice-pulsed.csv";

    /// <summary>Every row of a table.</summary>
    public static IReadOnlyList<(ReferenceCircuit Circuit, ReferenceResult Result)> Read(string table = Channels)
    {
        string[] lines = File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "Reference", table));
        return [.. lines.Where(l => l.Length > 0 && l[0] != '#').Skip(1).Select(Row)];
    }

    /// <summary>Writes a table anew.</summary>
    /// <param name="path">The file, in the source folder.</param>
    /// <param name="header">Lines that say what the table is and what made it.</param>
    /// <param name="rows">Circuits and what ngspice printed.</param>
    public static void Write(string path, IEnumerable<string> header, IReadOnlyList<(ReferenceCircuit Circuit, ReferenceResult Result)> rows)
    {
        StringBuilder text = new();
        foreach (string line in header)
        {
            text.Append("# ").Append(line).Append('\n');
        }

        text.Append("# Constants: those of ngspice 39 (k 1.38064852e-23 J/K, q 1.6021766208e-19 C); the project's are CODATA 2018 (k/q apart by 3.4e-7, a collector current at 0.65 V by 1e-5)\n");
        text.Append("# Load: diode with emission coefficient LoadN and saturation current LoadIs at 25 degC in series with LoadR; LoadN 0: LoadR alone\n");
        text.Append("Name,Unfed,PinV,PinR,Feed,PullDown,PullDownAt,Supply,LoadN,LoadIs,LoadR,Control,Legs,ILoad,IPin,Vb,Vx,Vc,IC0,IB0,IC,IB,Ve\n");
        foreach ((ReferenceCircuit c, ReferenceResult r) in rows)
        {
            string legs = string.Join(" / ", c.Legs.Select(l => string.Create(
                CultureInfo.InvariantCulture, $"RS={l.Sense:R} RA={l.Averaging:R} SENSED={(l.Sensed ? 1 : 0)} T={l.Pass.Celsius:R} {ReferenceCircuit.CardText(l.Pass.Card)}")));
            text.Append(CultureInfo.InvariantCulture, $"{c.Name},{(c.Unfed ? 1 : 0)},{c.PinVoltage:R},{c.PinResistance:R},{c.Feed:R},{c.PullDown:R},{c.PullDownAt},{c.Supply:R},");
            text.Append(CultureInfo.InvariantCulture, $"{c.LoadEmission:R},{c.LoadSaturation:R},{c.LoadSeries:R},T={c.Control.Celsius:R} {ReferenceCircuit.CardText(c.Control.Card)},{legs},");
            text.Append(CultureInfo.InvariantCulture, $"{r.LoadCurrent:R},{r.PinCurrent:R},{r.BaseVoltage:R},{r.ControlBaseVoltage:R},{r.CollectorVoltage:R},{r.ControlIc:R},{r.ControlIb:R},");
            text.Append(string.Join(' ', r.Ic.Select(Number))).Append(',').Append(string.Join(' ', r.Ib.Select(Number))).Append(',').Append(string.Join(' ', r.Emitter.Select(Number))).Append('\n');
        }

        File.WriteAllText(path, text.ToString());
    }

    private static (ReferenceCircuit Circuit, ReferenceResult Result) Row(string line)
    {
        string[] f = line.Split(',');
        Dictionary<string, double> control = Items(f[11]);
        ReferenceCircuit circuit = new()
        {
            Name = f[0],
            Unfed = f[1] == "1",
            PinVoltage = Value(f[2]),
            PinResistance = Value(f[3]),
            Feed = Value(f[4]),
            PullDown = Value(f[5]),
            PullDownAt = Enum.Parse<PullDownAt>(f[6]),
            Supply = Value(f[7]),
            LoadEmission = Value(f[8]),
            LoadSaturation = Value(f[9]),
            LoadSeries = Value(f[10]),
            Control = new ReferenceTransistor(Card(control), control["T"]),
            Legs = [.. f[12].Split(" / ").Select(Items).Select(i => new ReferenceLeg(
                new ReferenceTransistor(Card(i), i["T"]), i["RS"], i["RA"], i["SENSED"] == 1))],
        };
        return (circuit, new ReferenceResult(
            Value(f[13]), Value(f[14]), Value(f[15]), Value(f[16]), Value(f[17]), Value(f[18]), Value(f[19]), Values(f[20]), Values(f[21]), Values(f[22])));
    }

    private static BipolarParameters Card(Dictionary<string, double> i)
    {
        double Limit(string key) => i.GetValueOrDefault(key, double.PositiveInfinity);
        return new BipolarParameters
        {
            Is = i["IS"],
            Bf = i["BF"],
            Nf = i["NF"],
            Vaf = Limit("VAF"),
            Ikf = Limit("IKF"),
            Ise = i["ISE"],
            Ne = i["NE"],
            Br = i["BR"],
            Nr = i["NR"],
            Var = Limit("VAR"),
            Ikr = Limit("IKR"),
            Isc = i["ISC"],
            Nc = i["NC"],
            Rb = i["RB"],
            Irb = Limit("IRB"),
            Rbm = i.GetValueOrDefault("RBM", double.NaN),
            Re = i["RE"],
            Rc = i["RC"],
            Xti = i["XTI"],
            Eg = i["EG"],
            Xtb = i["XTB"],
            Tnom = i["TNOM"] + 273.15,
        };
    }

    private static Dictionary<string, double> Items(string text) =>
        text.Split(' ').Select(i => i.Split('=')).ToDictionary(p => p[0], p => Value(p[1]));

    private static IReadOnlyList<double> Values(string text) => [.. text.Split(' ').Select(Value)];

    private static double Value(string text) => double.Parse(text, NumberStyles.Float, CultureInfo.InvariantCulture);

    private static string Number(double value) => value.ToString("R", CultureInfo.InvariantCulture);
}
