using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>
/// Random whole channels, the same for the same seed on any machine: loads of LEDs with and without slope and of resistance alone, drop-out,
/// base drive that just suffices, PWM, cards and points, coupling given and not. About half of what may vary does, so that a channel of
/// several legs has thousands of corners and not hundreds of thousands; every pair of widths comes up among many channels.
/// </summary>
internal sealed class RandomChannels(int seed)
{
    private readonly Random random = new(seed);

    public static BoundChannel Of(int seed, int legs) => new RandomChannels(seed).Make(legs);

    private BoundChannel Make(int legs)
    {
        double target = LogBetween(3e-3, 30e-3);
        double total = legs * target;
        int leds = Chance(0.35) ? 0 : 1 + random.Next(6);
        double drop = leds == 0 ? Between(2, 16) : leds * Between(1.9, 3.2);
        double slope = leds > 0 && Chance(0.5) ? Between(0.05, 0.4) * drop / total : 0;
        double headroom = Chance(0.2) ? Between(0.3, 1.2) : leds == 0 ? Between(1, drop * 1.2) : Between(1.5, 9);
        double supply = drop + headroom;
        double pinSupply = Chance(0.5) ? 5 : 3.3;
        Transistor pass = Part("TQ-31", target);
        Transistor control = Part("TQ-30", target / 10) with { Coupling = null };
        double sense = 0.66 / target;
        double gain = pass.Hfe!.Value[0].Min!.Value;
        double feed = (pinSupply - 1.35) / (total / gain * Between(1.2, 8));
        BoundChannel channel = SampleChannel.Channel(legs);
        ResistorPart senseOhms = Ohms(sense);
        ResistorPart averaging = Ohms(legs == 1 ? 47 : sense * LogBetween(0.3, 4));
        (double coldest, double hottest) = Wide() ? (Between(-40, 10), Between(30, 85)) : (25, 25);
        return channel with
        {
            Conditions = channel.Conditions with
            {
                Supply = Spread(supply, 0.08, Voltage.FromVolts),
                SupplyPeak = Voltage.FromVolts(supply * 1.2),
                LoadDrop = Spread(drop, Chance(0.3) ? 0.2 : 0.08, Voltage.FromVolts),
                Leds = leds,
                LoadSlope = Resistance.FromOhms(slope),
                CurrentWindow = new(Current.FromAmperes(0.7 * total), Current.FromAmperes(1.3 * total)),
                CurrentNominal = Current.FromAmperes(total),
                Ambient = new(Temperature.FromCelsius(coldest), Temperature.FromCelsius(hottest)),
                Duty = Chance(0.25) ? Between(0.1, 0.9) : 1,
                Frequency = Chance(0.8) ? Frequency.FromHertz(LogBetween(50, 20e3)) : null,
                SharingMax = 1.3,
            },
            Logic = new LogicPin(
                "CTRL", Chance(0.7) ? PinOutput.Cmos : PinOutput.Ttl, Spread(pinSupply, 0.05, Voltage.FromVolts),
                [new HighLevel(Voltage.FromVolts(pinSupply * 0.85), Current.FromAmperes(20e-3))], null, null, null, null, "pins.csv!A2"),
            Legs = [.. channel.Legs.Select((l, i) => l with
            {
                Pass = l.Pass with { Part = pass },
                Sense = l.Sense with { Part = senseOhms },
                Averaging = legs == 1 ? null : l.Averaging! with { Part = averaging },
                Sensed = legs == 1 || i == 0 || Chance(0.9),
            })],
            Control = channel.Control with { Part = control },
            Feed = channel.Feed with { Part = Ohms(feed) },
            PullDown = Chance(0.4) ? SampleChannel.Place(Role.PullDown, -1, "R30", Ohms(LogBetween(10e3, 100e3))) : null,
            PullDownAt = Chance(0.5) ? PullDownAt.Base : PullDownAt.Pin,
        };
    }

    private Transistor Part(string number, double at)
    {
        Transistor part = SampleChannel.Transistor(number, LogBetween(80, 500));
        double vbe = Between(0.6, 0.68);
        double half = Wide() ? Between(0.01, 0.04) : 0;
        double gain = LogBetween(60, 250);
        double span = Wide() ? Between(1.5, 3.5) : 1;
        double tjMax = Chance(0.5) ? 150 : 175;
        Transistor made = part with
        {
            TjMax = Cite(Temperature.FromCelsius(tjMax)),
            Power = Cite(Power.FromWatts(Between(0.5, 1.25) * (tjMax - 25) / part.RthJa!.Value.KelvinsPerWatt)),
            PowerFlatTo = Chance(0.5) ? Cite(Temperature.FromCelsius(Between(25, 60))) : null,
            Coupling = Chance(0.6) ? Cite(ThermalResistance.FromKelvinsPerWatt(Between(0, 60))) : null,
            Vbe = Cite(new VbeWindow(
                Voltage.FromVolts(vbe - half), Voltage.FromVolts(vbe), Voltage.FromVolts(vbe + half), Current.FromAmperes(at), Voltage.FromVolts(5))),
            VbeMatch = Chance(0.3) && half > 0 ? Cite(Voltage.FromVolts(half / 3)) : null,
            Hfe = Cite<IReadOnlyList<HfePoint>>([
                new HfePoint(Current.FromAmperes(at / 5), gain, gain * span),
                new HfePoint(Current.FromAmperes(at), gain * 1.1, gain * 1.1 * span),
                new HfePoint(Current.FromAmperes(at * 5), gain * 0.7, gain * 0.7 * span)]),
            HfeCold = Chance(0.5) ? Cite(new ColdHfe(gain * 0.5, Current.FromAmperes(at), Temperature.FromCelsius(-40))) : null,
            Vaf = Chance(0.5) ? Cite(Voltage.FromVolts(Between(30, 120))) : null,
            RthJc = Cite(ThermalResistance.FromKelvinsPerWatt(Between(0.2, 0.5) * part.RthJa!.Value.KelvinsPerWatt)),
            Soa = Chance(0.5)
                ? Cite<IReadOnlyList<SoaPoint>>([
                    new SoaPoint(Voltage.FromVolts(2), Current.FromAmperes(0.1)), new SoaPoint(Voltage.FromVolts(Between(4, 8)), Current.FromAmperes(0.06)),
                    new SoaPoint(Voltage.FromVolts(40), Current.FromAmperes(0.01))])
                : null,
            SoaAtCase = Chance(0.5),
            Zth = Chance(0.5)
                ? [new(1e-3, ThermalResistance.FromKelvinsPerWatt(10)), new(10e-3, ThermalResistance.FromKelvinsPerWatt(30)), new(1, ThermalResistance.FromKelvinsPerWatt(70))]
                : [],
        };
        return made;
    }

    private ResistorPart Ohms(double ohms) => SampleChannel.Resistor(ohms, Wide() ? Between(0.01, 0.05) : 0) with
    {
        Tcr = Cite(Wide() ? 200e-6 : 0.0),
        Power = Cite(Power.FromWatts(Between(0.05, 0.25))),
    };

    private Interval<T> Spread<T>(double centre, double share, Func<double, T> make)
        where T : struct, IComparable<T>
    {
        double half = Wide() ? centre * share : 0;
        return new(make(centre - half), make(centre + half));
    }

    private static Cited<T> Cite<T>(T value) => new(value, "parts.csv!K2");

    private bool Wide() => Chance(0.55);

    private bool Chance(double share) => random.NextDouble() < share;

    private double Between(double low, double high) => low + ((high - low) * random.NextDouble());

    private double LogBetween(double low, double high) => low * Math.Pow(high / low, random.NextDouble());
}
