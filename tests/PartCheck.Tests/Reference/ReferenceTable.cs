using System.Globalization;
using System.Text;
using PartCheck.Channels;
using PartCheck.Devices;

namespace PartCheck.Tests.Reference;

/// <summary>The recorded table <c>ngspice-channels.csv</c>: inputs and ngspice's outputs, one circuit a row.</summary>
public static class ReferenceTable
{
    private const string FileName = "ngspice-channels.csv";

    /// <summary>Every row.</summary>
    public static IReadOnlyList<(ReferenceCircuit Circuit, ReferenceResult Result)> Read()
    {
        string[] lines = File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "Reference", FileName));
        return [.. lines.Where(l => l.Length > 0 && l[0] != '#').Skip(1).Select(Row)];
    }

    /// <summary>Writes the table anew into the source folder.</summary>
    /// <param name="folder">The source folder.</param>
    /// <param name="rows">Circuits and what ngspice printed.</param>
    /// <param name="rungs">How many circuits each of <see cref="Ngspice.Options"/> solved.</param>
    /// <param name="dropped">How many none of them solved.</param>
    public static void Write(
        string folder, IReadOnlyList<(ReferenceCircuit Circuit, ReferenceResult Result)> rows, IReadOnlyList<int> rungs, int dropped)
    {
        StringBuilder text = new();
        text.Append("# Operating points of LED current-sink channels at given junction temperatures\n");
        text.Append(CultureInfo.InvariantCulture, $"# Source: {Ngspice.Version()} (Debian package), .options {Ngspice.Options[0]} ({rungs[0]} circuits)\n");
        for (int i = 1; i < rungs.Count; i++)
        {
            text.Append(CultureInfo.InvariantCulture, $"# Where that found no operating point: .options {Ngspice.Options[i]} ({rungs[i]} circuits)\n");
        }

        text.Append("# Constants: those of ngspice 39 (k 1.38064852e-23 J/K, q 1.6021766208e-19 C); the project's are CODATA 2018 (k/q apart by 1e-5)\n");
        text.Append("# Load: diode with emission coefficient LoadN and saturation current LoadIs at 25 degC in series with LoadR; LoadN 0: LoadR alone\n");
        text.Append(CultureInfo.InvariantCulture, $"# Made by: ReferenceGenerator (seeds 0x5EED0000 + i) and Ngspice, with PARTCHECK_RECORD_NGSPICE=1; {rows.Count} circuits, {dropped} dropped for want of an operating point with any of the options\n");
        text.Append("# Tolerance of the comparison: 0.1 %, or 1 nA and 10 uV where currents vanish. SI units, junction temperatures in degC\n");
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

        File.WriteAllText(Path.Combine(folder, FileName), text.ToString());
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
