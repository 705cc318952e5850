using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;

namespace PartCheck.Tests.OperatingPoints.Batch;

/// <summary>Random circuits of one shape from a seed (SplitMix64; Steele, Lea and Flood 2014): cards and fits with gain tables.</summary>
internal sealed class RandomStates(ulong seed)
{
    private static readonly BipolarDevice[] Pool = [.. Enumerable.Range(0, 400).Select(i => new RandomStates(0xD0_0000UL + (ulong)i).Device())];
    private ulong state = seed;

    /// <summary>Circuits that differ in everything but their shape.</summary>
    /// <param name="count">How many.</param>
    /// <param name="heated">True: every junction heats itself.</param>
    public SinkCircuit[] Circuits(int count, bool heated)
    {
        int groups = Chance(0.6) ? 1 : Chance(0.7) ? 2 : 3;
        bool fed = Chance(0.85);
        bool resistor = Chance(0.15);
        return [.. Enumerable.Range(0, count).Select(_ => Circuit(groups, fed, resistor, heated))];
    }

    private SinkCircuit Circuit(int groups, bool fed, bool resistor, bool heated)
    {
        double target = LogBetween(1e-3, 40e-3);
        double ambient = Between(233, 398);
        bool off = Chance(0.08);
        int leds = 1 + (int)(Next() * 8);
        double drop = resistor ? Between(1, 15) : leds * Between(1.8, 3.4);
        LegGroup[] legs = new LegGroup[groups];
        double total = 0;
        for (int g = 0; g < groups; g++)
        {
            int count = g > 0 && Chance(0.5) ? 1 + (int)(Next() * 5) : 1;
            total += target * count;
            legs[g] = new LegGroup(
                count, Any(), 0.65 / target * Between(0.7, 1.4), groups == 1 && Chance(0.6) ? 0 : LogBetween(1, 330),
                groups == 1 || g == 0 || Chance(0.85), Heat(ambient, heated), heated && Chance(0.5) ? Between(0, 60) : 0);
        }

        double slope = !resistor && Chance(0.5) ? Between(0, 0.2) * drop / total : 0;
        bool dropOut = Chance(0.25);
        return new SinkCircuit
        {
            PinVoltage = off ? Between(0, 0.4) : Chance(0.5) ? Between(4.4, 5.3) : Between(2.9, 3.5),
            PinResistance = Chance(0.3) ? 0 : Between(1, 200),
            Feed = LogBetween(330, 20e3),
            PullDown = Chance(0.5) ? double.PositiveInfinity : LogBetween(2e3, 200e3),
            PullDownAt = Chance(0.5) ? PullDownAt.Base : PullDownAt.Pin,
            Supply = dropOut ? drop * Between(0.8, 1.05) : drop + Between(1, 12),
            Load = fed ? LoadElement.FromDrop(drop, total, slope, resistor ? 0 : leds) : null,
            Control = Any(),
            ControlHeat = Heat(ambient, heated),
            Legs = legs,
            HottestLegCoupling = heated && Chance(0.3) ? 0.2 : 0,
            BaseLeakage = off && Chance(0.5) ? LogBetween(1e-9, 1e-6) : 0,
        };
    }

    private static JunctionHeat Heat(double ambient, bool heated) => new(ambient, heated ? 250 : 0, 473.15);

    private BipolarDevice Any() => Pool[(int)(Next() * Pool.Length)];

    private BipolarDevice Device()
    {
        bool card = Chance(0.5);
        BipolarParameters p = card
            ? new BipolarParameters
            {
                Is = LogBetween(1e-16, 1e-13),
                Nf = Between(0.98, 1.05),
                Bf = LogBetween(60, 400),
                Vaf = Between(20, 150),
                Ikf = LogBetween(0.03, 1),
                Nkf = Chance(0.2) ? Between(0.4, 0.9) : 0.5,
                Ise = LogBetween(1e-16, 1e-12),
                Ne = Between(1.3, 2),
                Br = LogBetween(0.1, 10),
                Nr = Between(0.98, 1.05),
                Var = Chance(0.5) ? double.PositiveInfinity : Between(5, 60),
                Ikr = Chance(0.6) ? double.PositiveInfinity : LogBetween(0.005, 0.5),
                Isc = Chance(0.5) ? 0 : LogBetween(1e-15, 1e-12),
                Nc = Between(1.1, 2),
                Rb = Between(1, 50),
                Rbm = Chance(0.5) ? double.NaN : 0.5,
                Irb = Chance(0.3) ? LogBetween(1e-5, 1e-2) : double.PositiveInfinity,
                Re = Between(0, 1),
                Rc = Between(0, 2),
                Xti = Between(2, 4),
                Eg = Between(1.05, 1.2),
                Xtb = Chance(0.3) ? 0 : Between(0, 2.2),
            }
            : DatasheetFit.Fit([(1e-3, Between(90, 300)), (10e-3, Between(100, 350)), (100e-3, Between(40, 200))], Between(0.6, 0.72), 10e-3, 5, Between(30, 150));
        double level = Between(0.5, 2);
        GainFactor? gain = Chance(0.15) ? GainFactor.Constant(Chance(0.5) ? 0 : level)
            : Chance(0.2) ? null
            : GainFactor.Tabulate(ic => level * (1 + (0.3 * Math.Sin(Math.Log(ic)))), 1e-7, 2, 220);
        return new BipolarDevice(p, LogBetween(0.1, 10), gain, card ? null : Between(0, 3.4), card ? null : Between(0, 1.5));
    }

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
