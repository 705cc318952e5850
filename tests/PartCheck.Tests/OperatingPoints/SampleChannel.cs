using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>A channel of invented parts, every datum given, for tests that need a whole one.</summary>
internal static class SampleChannel
{
    public static Transistor Transistor(string partNumber = "TQ-31", double rthJa = 300) => new()
    {
        PartNumber = partNumber,
        Cell = "parts.csv!A2",
        Package = "SOT-23",
        Vceo = Cite(Voltage.FromVolts(45)),
        Vcbo = Cite(Voltage.FromVolts(50)),
        Ic = Cite(Current.FromAmperes(0.1)),
        Power = Cite(Power.FromWatts(0.35)),
        RthJa = Cite(ThermalResistance.FromKelvinsPerWatt(rthJa)),
        TjMax = Cite(Temperature.FromCelsius(150)),
        Coupling = Cite(ThermalResistance.FromKelvinsPerWatt(20)),
        Hfe = Cite<IReadOnlyList<HfePoint>>(
        [
            new HfePoint(Current.FromAmperes(1e-3), 100, 300),
            new HfePoint(Current.FromAmperes(10e-3), 120, 360),
            new HfePoint(Current.FromAmperes(50e-3), 80, 300),
        ]),
        HfeCold = Cite(new ColdHfe(60, Current.FromAmperes(10e-3), Temperature.FromCelsius(-40))),
        Vbe = Cite(new VbeWindow(
            Voltage.FromVolts(0.62), Voltage.FromVolts(0.66), Voltage.FromVolts(0.70), Current.FromAmperes(10e-3), Voltage.FromVolts(5))),
        VceSatMax = Cite(Voltage.FromVolts(0.3)),
        VceSatAt = Current.FromAmperes(0.05),
        Vaf = Cite(Voltage.FromVolts(80)),
    };

    public static ResistorPart Resistor(double ohms, double tolerance = 0.01) => new()
    {
        PartNumber = string.Create(System.Globalization.CultureInfo.InvariantCulture, $"RK-{ohms}"),
        Cell = "parts.csv!A9",
        Resistance = Cite(Resistance.FromOhms(ohms)),
        Tolerance = Cite(tolerance),
        Tcr = Cite(100e-6),
        Power = Cite(Power.FromWatts(0.1)),
        TjMax = Cite(Temperature.FromCelsius(155)),
        WorkingVoltageMax = Cite(Voltage.FromVolts(75)),
    };

    public static BoundChannel Channel(int legs, double sense = 33, double feed = 2200, double averaging = 100)
    {
        Transistor pass = Transistor();
        ResistorPart senseResistor = Resistor(sense);
        ResistorPart? averagingResistor = legs > 1 ? Resistor(averaging) : null;
        return new BoundChannel
        {
            Name = "CH1",
            Cell = "channels.csv!A2",
            Conditions = new ChannelConditions
            {
                Supply = new(Voltage.FromVolts(22.8), Voltage.FromVolts(25.2)),
                SupplyPeak = Voltage.FromVolts(28),
                LoadDrop = new(Voltage.FromVolts(16), Voltage.FromVolts(18)),
                Leds = 6,
                CurrentWindow = new(Current.FromAmperes(0.014 * legs), Current.FromAmperes(0.028 * legs)),
                CurrentNominal = Current.FromAmperes(0.02 * legs),
                Ambient = new(Temperature.FromCelsius(-10), Temperature.FromCelsius(55)),
            },
            Logic = new LogicPin(
                "CTRL-5", PinOutput.Cmos, new(Voltage.FromVolts(4.75), Voltage.FromVolts(5.25)),
                [new HighLevel(Voltage.FromVolts(4.2), Current.FromAmperes(8e-3))], null, null, null, null, "pins.csv!A2"),
            Legs = [.. Enumerable.Range(0, legs).Select(i => new Leg(
                Place(Role.Pass, i, $"Q{i + 1}", pass),
                Place(Role.Sense, i, $"R{i + 1}", senseResistor),
                averagingResistor is null ? null : Place(Role.Averaging, i, $"R{i + 11}", averagingResistor),
                true))],
            Control = Place(Role.Control, -1, "Q20", Transistor("TQ-30")),
            Feed = Place(Role.Feed, -1, "R20", Resistor(feed)),
        };
    }

    public static Placement Place(Role role, int leg, string reference, Part part) => new(
        role, leg, reference, new BillLine { References = [reference], PartNumber = part.PartNumber, Cell = "bom.csv!A2" }, part);

    private static Cited<T> Cite<T>(T value) => new(value, "parts.csv!K2");
}
