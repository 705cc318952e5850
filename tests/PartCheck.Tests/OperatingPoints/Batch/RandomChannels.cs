using PartCheck.Channels;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Tests.OperatingPoints.Batch;

/// <summary>Random bound channels from a seed: part data with gaps, conditions from comfortable to impossible (SplitMix64).</summary>
internal sealed class RandomChannels(ulong seed)
{
    private ulong state = seed;

    /// <summary>A channel; some dimensions have no width, so that a box stays within what full enumeration can do.</summary>
    /// <param name="legs">Legs.</param>
    /// <param name="narrow">Share of the dimensions without width.</param>
    public BoundChannel Channel(int legs, double narrow)
    {
        double target = LogBetween(2e-3, 30e-3);
        bool five = Chance(0.5);
        double pin = five ? 5 : 3.3;
        Transistor pass = Transistor("TQ-P", narrow);
        Transistor other = legs > 1 && Chance(0.3) ? Transistor("TQ-N", narrow) : pass;
        ResistorPart sense = Resistor("RK-S", 0.65 / target, narrow);
        ResistorPart? averaging = legs > 1 || Chance(0.2) ? Resistor("RK-A", LogBetween(10, 330), narrow) : null;
        int leds = Chance(0.12) ? 0 : 1 + (int)(Next() * 7);
        double drop = leds == 0 ? Between(2, 12) : leds * Between(1.9, 3.3);
        double supply = drop + Between(0.8, 10);
        double cold = Between(-40, 20);
        Part feed = Resistor("RK-F", (pin - 1.3) / (target * legs) * Between(8, 60), narrow);
        return SampleChannel.Channel(legs) with
        {
            Conditions = new ChannelConditions
            {
                Supply = Range(supply * 0.95, supply * 1.05, narrow, Voltage.FromVolts),
                SupplyPeak = Voltage.FromVolts(supply * 1.2),
                LoadDrop = Range(drop * 0.93, drop * 1.05, narrow, Voltage.FromVolts),
                LoadSlope = Resistance.FromOhms(leds > 0 && Chance(0.4) ? 0.1 * drop / (target * legs) : 0),
                Leds = leds,
                CurrentWindow = new(Current.FromAmperes(target * legs * Between(0.5, 0.8)), Current.FromAmperes(target * legs * Between(1.1, 1.5))),
                CurrentNominal = Current.FromAmperes(target * legs),
                Ambient = new(Temperature.FromCelsius(cold), Temperature.FromCelsius(cold + Between(20, 70))),
                SharingMax = Chance(0.5) ? Between(1.05, 1.4) : null,
            },
            Logic = new LogicPin(
                "CTRL", Chance(0.8) ? PinOutput.Cmos : PinOutput.Ttl, new(Voltage.FromVolts(pin * 0.95), Voltage.FromVolts(pin * 1.05)),
                [new HighLevel(Voltage.FromVolts(pin * 0.8), Current.FromAmperes(LogBetween(0.5e-3, 8e-3)))], null, null, null, null, "pins.csv!A2"),
            Legs = [.. Enumerable.Range(0, legs).Select(i => new Leg(
                SampleChannel.Place(Role.Pass, i, $"Q{i + 1}", i == legs - 1 ? other : pass),
                SampleChannel.Place(Role.Sense, i, $"R{i + 1}", sense),
                averaging is null ? null : SampleChannel.Place(Role.Averaging, i, $"R{i + 11}", averaging),
                true))],
            Control = SampleChannel.Place(Role.Control, -1, "Q20", Transistor("TQ-C", narrow)),
            Feed = SampleChannel.Place(Role.Feed, -1, "R20", feed),
            PullDown = Chance(0.4) ? SampleChannel.Place(Role.PullDown, -1, "R21", Resistor("RK-D", LogBetween(5e3, 100e3), narrow)) : null,
            PullDownAt = Chance(0.5) ? PullDownAt.Base : PullDownAt.Pin,
        };
    }

    private Transistor Transistor(string partNumber, double narrow)
    {
        double low = Between(60, 200);
        double vbe = Between(0.58, 0.68);
        double width = Chance(narrow) ? 0 : Between(0.02, 0.1);
        double ratio = Chance(narrow) ? 1 : Between(1.5, 4);
        return SampleChannel.Transistor(partNumber, Between(150, 500)) with
        {
            Coupling = Chance(0.6) ? new(ThermalResistance.FromKelvinsPerWatt(Between(0, 60)), "parts.csv!K2") : null,
            Hfe = new(
            [
                new HfePoint(Current.FromAmperes(1e-3), low, low * ratio),
                new HfePoint(Current.FromAmperes(10e-3), low * 1.15, low * 1.15 * ratio),
                new HfePoint(Current.FromAmperes(50e-3), low * 0.7, low * 0.9 * ratio),
            ], "parts.csv!K2"),
            HfeCold = Chance(0.5) ? new(new ColdHfe(low * 0.5, Current.FromAmperes(10e-3), Temperature.FromCelsius(-40)), "parts.csv!K2") : null,
            Vbe = new(new VbeWindow(
                Voltage.FromVolts(vbe), Voltage.FromVolts(vbe + (width / 2)), Voltage.FromVolts(vbe + width), Current.FromAmperes(10e-3), Voltage.FromVolts(5)), "parts.csv!K2"),
            VbeMatch = Chance(0.3) ? new(Voltage.FromVolts(0.005), "parts.csv!K2") : null,
            Soa = Chance(0.3)
                ? new(
                [
                    new SoaPoint(Voltage.FromVolts(1), Current.FromAmperes(0.1)), new SoaPoint(Voltage.FromVolts(10), Current.FromAmperes(0.03)),
                    new SoaPoint(Voltage.FromVolts(40), Current.FromAmperes(0.005)),
                ], "parts.csv!K2")
                : null,
            VceSatMax = Chance(0.8) ? new(Voltage.FromVolts(0.3), "parts.csv!K2") : null,
            Vaf = Chance(0.7) ? new(Voltage.FromVolts(Between(40, 120)), "parts.csv!K2") : null,
        };
    }

    private ResistorPart Resistor(string partNumber, double ohms, double narrow) => SampleChannel.Resistor(ohms) with
    {
        PartNumber = partNumber,
        Tolerance = new(Chance(narrow) ? 0 : Chance(0.5) ? 0.01 : 0.05, "parts.csv!K2"),
        Tcr = new(Chance(narrow) ? 0 : 100e-6, "parts.csv!K2"),
    };

    private Interval<T> Range<T>(double low, double high, double narrow, Func<double, T> make) =>
        Chance(narrow) ? new(make((low + high) / 2), make((low + high) / 2)) : new(make(low), make(high));

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
