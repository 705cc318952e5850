using PartCheck.Channels;
using PartCheck.Devices;

namespace PartCheck.Tests.Reference;

/// <summary>Random channels, the same for the same seed on any machine (SplitMix64; Steele, Lea and Flood 2014).</summary>
public sealed class ReferenceGenerator(ulong seed)
{
    private ulong state = seed;

    /// <summary>The circuits of the reference table: legs 1 to 8 in turn, four kinds in turn.</summary>
    public static IEnumerable<ReferenceCircuit> Circuits(int count)
    {
        string[] kinds = ["regulating", "drop-out", "off", "unfed"];
        for (int i = 0; i < count; i++)
        {
            ReferenceGenerator random = new(0x5EED_0000UL + (ulong)i);

            // Three of five in regulation or drop-out: that is where figures are judged.
            string kind = (i % 10) switch { < 4 => kinds[0], < 6 => kinds[1], < 8 => kinds[2], _ => kinds[3] };
            yield return random.Circuit(string.Create(System.Globalization.CultureInfo.InvariantCulture, $"{kind}-{i + 1}"), kind, 1 + (i / 10 % 8));
        }
    }

    private ReferenceCircuit Circuit(string name, string kind, int legs)
    {
        bool five = Chance(0.5);
        double pin = kind == "off" ? Between(0, 0.4) : five ? Between(4.4, 5.3) : Between(2.9, 3.5);
        double target = LogBetween(1e-3, 40e-3);
        double sense = 0.65 / target;
        bool ledLoad = Chance(0.8);
        int leds = 1 + (int)(Next() * 8);
        double drop = ledLoad ? leds * Between(1.8, 3.4) : Between(1, 15);
        double total = target * legs;
        double slope = ledLoad && Chance(0.5) ? Between(0, 0.2) * drop / total : 0;
        double emission = ledLoad ? 2 * leds : 0;
        double saturation = ledLoad
            ? total / (Math.Exp((drop - (total * slope)) / (emission * 1.380649e-23 * 298.15 / 1.602176634e-19)) - 1)
            : 0;
        double supply = kind == "drop-out" ? drop * Between(0.8, 1.05) : drop + Between(2, 20);
        double junction = Between(-40, 125);
        List<ReferenceLeg> group = [];
        ReferenceTransistor? last = null;
        for (int i = 0; i < legs; i++)
        {
            last = last is not null && Chance(0.4) ? last with { Celsius = Junction(junction) } : new ReferenceTransistor(Card(), Junction(junction));
            group.Add(new ReferenceLeg(
                last, sense * Between(0.7, 1.4), legs == 1 && Chance(0.6) ? 0 : LogBetween(1, 330), legs == 1 || i == 0 || Chance(0.85)));
        }

        int pull = (int)(Next() * 4);
        return new ReferenceCircuit
        {
            Name = name,
            Unfed = kind == "unfed",
            PinVoltage = pin,
            PinResistance = Chance(0.3) ? 0 : Between(1, 200),
            Feed = Chance(0.15) ? LogBetween(20e3, 100e3) : LogBetween(330, 20e3),
            PullDown = pull < 2 ? double.PositiveInfinity : LogBetween(2e3, 200e3),
            PullDownAt = pull == 2 ? PullDownAt.Base : PullDownAt.Pin,
            Supply = supply,
            LoadEmission = emission,
            LoadSaturation = saturation,
            LoadSeries = ledLoad ? slope : drop / total,
            Control = new ReferenceTransistor(Card(), Junction(junction)),
            Legs = group,
        };
    }

    private BipolarParameters Card()
    {
        bool baseSpread = Chance(0.3);
        double rb = Chance(0.2) ? 0 : Between(1, 50);
        double inf = double.PositiveInfinity;
        return new BipolarParameters
        {
            Is = LogBetween(1e-16, 1e-13),
            Nf = Between(0.98, 1.05),
            Bf = LogBetween(60, 400),
            Vaf = Chance(0.15) ? inf : Between(20, 150),
            Ikf = Chance(0.1) ? inf : LogBetween(0.03, 1),
            Ise = Chance(0.2) ? 0 : LogBetween(1e-16, 1e-12),
            Ne = Between(1.3, 2),
            Br = LogBetween(0.1, 10),
            Nr = Between(0.98, 1.05),
            Var = Chance(0.5) ? inf : Between(5, 60),
            Ikr = Chance(0.6) ? inf : LogBetween(0.005, 0.5),
            Isc = Chance(0.5) ? 0 : LogBetween(1e-15, 1e-12),
            Nc = Between(1.1, 2),
            Rb = rb,
            Rbm = baseSpread ? rb * Between(0.1, 0.9) : double.NaN,
            Irb = baseSpread && Chance(0.5) ? LogBetween(1e-5, 1e-2) : inf,
            Re = Chance(0.2) ? 0 : Between(0, 1),
            Rc = Chance(0.2) ? 0 : Between(0, 2),
            Xti = Between(2, 4),
            Eg = Between(1.05, 1.2),
            Xtb = Chance(0.3) ? 0 : Between(0, 2.2),
            Tnom = Chance(0.5) ? 298.15 : 300.15,
        };
    }

    private double Junction(double around) => Math.Clamp(around + Between(-10, 10), -40, 125);

    private bool Chance(double share) => Next() < share;

    private double Between(double low, double high) => low + ((high - low) * Next());

    private double LogBetween(double low, double high) => low * Math.Pow(high / low, Next());

    private double Next()
    {
        state += 0x9E3779B97F4A7C15;
        ulong z = state;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        z ^= z >> 31;
        return (z >> 11) * (1.0 / (1UL << 53));
    }
}
