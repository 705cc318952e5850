using System.Globalization;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>What the corner gives: ambient, supply, load, pin and the resistances, each from its cell.</summary>
internal static class ConditionSymbols
{
    /// <summary>Adds the symbols.</summary>
    public static void Add(Derivation book, FindingBasis basis, IReadOnlyList<LegView> legs)
    {
        ChannelModel model = basis.Model;
        Corner corner = basis.State.Corner;
        ChannelConditions c = model.Channel.Conditions;
        string? Cell(string column) => model.Channel.ConditionCells.GetValueOrDefault(column);
        bool coldest = corner.Ambient == c.Ambient.Min.Kelvins;
        bool hottest = corner.Ambient == c.Ambient.Max.Kelvins;
        book.Given(
                "Ta", corner.Ambient - Temperature.CelsiusZero, "degC",
                coldest || hottest ? "ambient" : "ambient: inside the range, where a rated power starts to fall or the ratio peaks",
                coldest ? Cell("Ambient min") : hottest ? Cell("Ambient max") : null)
            .Given("Vsupply", corner.Supply, "V", "load supply" + Inside(corner.Supply, c.Supply), Cell(corner.Supply == c.Supply.Min.Volts ? "Supply min" : "Supply max"))
            .Given("Vdrop", corner.LoadDrop, "V", "drop of the load at Iref" + Inside(corner.LoadDrop, c.LoadDrop), Cell(corner.LoadDrop == c.LoadDrop.Min.Volts ? "Load drop min" : "Load drop max"))
            .Given("Iref", c.CurrentNominal.Amperes, "A", "current at which the drop holds (Current nominal, or the window's centre)", Cell("Current nominal"))
            .Given("Rload", c.LoadSlope.Ohms, "ohm", "ohmic part of the load", Cell("Load slope"))
            .Given("LEDs", c.Leds, string.Empty, "LEDs in the string", Cell("LEDs"))
            .Given("d", c.Duty, string.Empty, "largest duty", Cell("Duty max"))
            .Given("f", c.Frequency?.Hertz ?? 0, "Hz", "PWM frequency", Cell("Frequency"))
            .Given("kq", PhysicalConstants.BoltzmannOverCharge, "V/K", "Boltzmann constant over elementary charge (SI, exact)");
        AddPin(book, basis);
        foreach (LegView leg in legs)
        {
            Leg first = model.Classes[leg.Class].First;
            AddResistance(book, "Rs" + leg.N, model.Sense[leg.Class], basis.State, basis.State.Circuit?.Legs[leg.Index].Sense, leg.Odd ? corner.OddSense : corner.Sense, $"sense resistor {first.Sense.Part.PartNumber} of {leg.Who}");
            if (model.Averaging[leg.Class] is { } averaging)
            {
                AddResistance(book, "Ra" + leg.N, averaging, basis.State, basis.State.Circuit?.Legs[leg.Index].Averaging, leg.Odd ? corner.OddAveraging : corner.Averaging, $"averaging resistor {averaging.Part.PartNumber} of {leg.Who}");
            }
        }

        AddResistance(book, "Rf", model.Feed, basis.State, basis.State.Circuit?.Feed, corner.Feed, "feed resistor " + model.Channel.Feed.Reference);
        if (model.PullDown is { } down)
        {
            AddResistance(book, "Rp", down, basis.State, basis.State.Circuit?.PullDown, corner.PullDown, "pull-down resistor " + model.Channel.PullDown!.Reference);
        }

        if (model.Channel is { PullDown: not null, PullDownAt: PullDownAt.Pin })
        {
            book.Step("Vsource", "Vpin x Rp / (Rp + Rpin)", "V", "pin and pull-down as one source")
                .Step("Rsource", "Rf + Rpin x Rp / (Rp + Rpin)", "ohm", "resistance of that source, feed included");
        }
    }

    private static string Inside(double volts, Interval<Voltage> range) =>
        volts > range.Min.Volts && volts < range.Max.Volts ? ", inside its range, where the ratio peaks" : string.Empty;

    /// <summary>Voltage and resistance of the pin, from the row's guaranteed levels.</summary>
    private static void AddPin(Derivation book, FindingBasis basis)
    {
        Corner corner = basis.State.Corner;
        LogicPin logic = basis.Model.Channel.Logic;
        if (basis.State.Index < 0 || basis.State.State == ChannelState.Off)
        {
            book.Given("Vpin", corner.PinLevel, "V", "source voltage of the pin, low", logic.Cell);
            if (corner.PinResistance > 0 && logic is { LowMax: { } low, LowCurrent: { } lowCurrent })
            {
                book.Given("Vlow", low.Volts, "V", "Low max of " + logic.Name, logic.Cell).Given("Ilow", lowCurrent.Amperes, "A", "Low current", logic.Cell)
                    .Step("Rpin", "Vlow / Ilow", "ohm", "resistance of the pin to ground");
                return;
            }

            book.Given("Rpin", corner.PinResistance, "ohm", "its resistance to ground", logic.Cell);
            return;
        }

        if (corner.PinLevel != basis.Pin.WeakVoltage && corner.PinLevel != basis.Pin.StrongVoltage)
        {
            book.Given("Vpin", corner.PinLevel, "V", "level of the pin, inside its range, where the ratio peaks", logic.Cell)
                .Given("Rpin", corner.PinResistance, "ohm", "its source resistance there", logic.Cell);
            return;
        }

        HighLevel? level = corner.PinResistance > 0
            ? logic.High.MinBy(h => Math.Max(0, logic.Supply.Min.Volts - h.Min.Volts) / h.Current.Amperes) : null;
        if (level is null)
        {
            bool strong = corner.PinLevel == basis.Pin.StrongVoltage;
            book.Given("Vpin", corner.PinLevel, "V", strong ? "highest level of the pin: Supply max of " + logic.Name : "lowest level of the pin: High min of " + logic.Name, logic.Cell)
                .Given("Rpin", 0, "ohm", "source resistance of the pin");
            return;
        }

        book.Given("Vlogic", logic.Supply.Min.Volts, "V", "Supply min of " + logic.Name, logic.Cell)
            .Given("Vhigh", level.Min.Volts, "V", "High min", logic.Cell)
            .Given("Ihigh", level.Current.Amperes, "A", "High current", logic.Cell)
            .Step("Rpin", "(Vlogic - Vhigh) / Ihigh", "ohm", "highest source resistance of the pin");
        if (basis.Pin.Others > 0)
        {
            book.Given("Iothers", basis.Pin.Others, "A", "highest current of the other feeds on the pin")
                .Step("Vpin", "Vlogic - Rpin x Iothers", "V", "lowest level of the pin");
        }
        else
        {
            book.Given("Vpin", corner.PinLevel, "V", "lowest level of the pin: Supply min of " + logic.Name, logic.Cell);
        }
    }

    /// <summary>R (1 +- tolerance)(1 +- TCR abs(T - 20 degC)) at one end.</summary>
    private static void AddResistance(Derivation book, string symbol, ResistorRange range, SolvedState state, double? solved, Extreme end, string who)
    {
        ResistorPart part = range.Part;
        if (state.Index < 0 || end == Extreme.Typical || range.Nominal == 0)
        {
            book.Given(symbol, range.Nominal, "ohm", who, part.Resistance.Cell);
            return;
        }

        if (end == Extreme.Inside)
        {
            book.Given(symbol, solved ?? range.Nominal, "ohm", who + ", inside its range, where the ratio peaks", part.Resistance.Cell);
            return;
        }

        string sign = end == Extreme.Min ? "-" : "+";
        book.Given("n" + symbol, range.Nominal, "ohm", who + ", nominal", part.Resistance.Cell)
            .Given("t" + symbol, range.Tolerance, "%", "tolerance", part.Tolerance?.Cell, assumed: part.Tolerance is null)
            .Given("a" + symbol, range.Tcr, "ppm/K", "temperature coefficient", part.Tcr?.Cell, assumed: part.Tcr is null)
            .Step(
                symbol, string.Create(CultureInfo.InvariantCulture, $"n{symbol} x (1 {sign} t{symbol}) x (1 {sign} a{symbol} x abs(Ta - 20 degC))"), "ohm",
                $"{who}, its {(end == Extreme.Min ? "smallest" : "largest")} value");
    }
}
