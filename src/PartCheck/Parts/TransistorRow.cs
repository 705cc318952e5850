using PartCheck.Devices;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>One row of kind <c>npn</c>.</summary>
internal static class TransistorRow
{
    public static Transistor Read(TableRow row, string number, string? folder) => new()
    {
        PartNumber = number,
        Manufacturer = row.Text("Manufacturer"),
        Mounting = row.Text("Mounting"),
        Package = row.Text("Package"),
        Cell = row.Cite("Part number"),
        Lifecycle = row.Text("Lifecycle"),
        Stock = row.Number("Stock")?.Value,
        Source = row.Text("Source"),
        Pins = Pins(row),
        Elements = Elements(row),
        Vceo = row.Quantity("VCEO", Voltage.FromVolts),
        Vcbo = row.Quantity("VCBO", Voltage.FromVolts),
        Vebo = row.Quantity("VEBO", Voltage.FromVolts),
        Ic = row.Quantity("IC", Current.FromAmperes),
        Power = row.Quantity("Power", Power.FromWatts),
        PowerBoth = row.Quantity("Power both", Power.FromWatts),
        PowerFlatTo = row.Quantity("Power flat to", Temperature.FromKelvins),
        PowerSlope = row.Number("Power slope"),
        RthJa = row.Quantity("RthJA", ThermalResistance.FromKelvinsPerWatt),
        RthJaBoth = row.Quantity("RthJA both", ThermalResistance.FromKelvinsPerWatt),
        RthJc = row.Quantity("RthJC", ThermalResistance.FromKelvinsPerWatt),
        Coupling = row.Quantity("Coupling", ThermalResistance.FromKelvinsPerWatt),
        Zth = PointText.Zth(row),
        TjMax = row.Quantity("Tj max", Temperature.FromKelvins),
        Hfe = GainPoints.Read(row),
        HfeVce = row.Value("hFE VCE", Voltage.FromVolts) ?? Voltage.FromVolts(5),
        HfeCold = Cold(row),
        Vbe = Vbe(row),
        VbeMatch = row.Quantity("VBE match", Voltage.FromVolts),
        VbeSatMax = Beside(row, "VBEsat max", "VBEsat at", "its collector current") ? row.Quantity("VBEsat max", Voltage.FromVolts) : null,
        VbeSatAt = row.Value("VBEsat at", Current.FromAmperes),
        VceSatMax = Beside(row, "VCEsat max", "VCEsat at", "its collector current") ? row.Quantity("VCEsat max", Voltage.FromVolts) : null,
        VceSatAt = row.Value("VCEsat at", Current.FromAmperes),
        IcboMax = Beside(row, "ICBO max", "ICBO temperature", "its temperature") ? row.Quantity("ICBO max", Current.FromAmperes) : null,
        IcboTemperature = row.Value("ICBO temperature", Temperature.FromKelvins),
        Soa = PointText.Soa(row),
        SoaAtCase = SoaAtCase(row),
        Vaf = row.Quantity("VAF", Voltage.FromVolts),
        Card = Card(row, folder),
    };

    private static LeadOrder? Pins(TableRow row)
    {
        if (row.Text("Pins") is not { } text)
        {
            return null;
        }

        int elements = row.Number("Elements")?.Value is 2 ? 2 : 1;
        LeadOrder? order = LeadOrder.Parse(text, elements);
        if (order is null)
        {
            row.Complain(
                "Pins", elements == 1 ? "the leads in their order, the tab after a plus sign: BEC, BCE+C" : "the leads in their order: E1 B1 C2 E2 B2 C1",
                $"\"{text}\" is no order of leads.");
        }

        return order;
    }

    private static int Elements(TableRow row)
    {
        double count = row.Number("Elements")?.Value ?? 1;
        if (count != Math.Floor(count))
        {
            row.Complain("Elements", "a whole number", "The number of transistors in a package is a whole number.");
        }

        return (int)count;
    }

    private static Cited<ColdHfe>? Cold(TableRow row)
    {
        Cited<double>? min = row.Number("hFE cold min");
        Cited<double>? at = row.Number("hFE cold at");
        Cited<double>? temperature = row.Number("hFE cold temperature");
        if (min is null)
        {
            return null;
        }

        if (at is null || temperature is null)
        {
            row.Complain(at is null ? "hFE cold at" : "hFE cold temperature", "collector current and temperature of hFE cold min", "A gain in the cold needs its collector current and its temperature.");
            return null;
        }

        return new Cited<ColdHfe>(new ColdHfe(min.Value, Current.FromAmperes(at.Value), Temperature.FromKelvins(temperature.Value)), min.Cell);
    }

    private static Cited<VbeWindow>? Vbe(TableRow row)
    {
        Cited<double>? min = row.Number("VBE min");
        Cited<double>? typ = row.Number("VBE typ");
        Cited<double>? max = row.Number("VBE max");
        if ((min ?? typ ?? max) is not { } any)
        {
            return null;
        }

        if (row.Number("VBE at") is not { } at)
        {
            row.Complain("VBE at", "the collector current of VBE", "A base-emitter voltage without its collector current says nothing.");
            return null;
        }

        Voltage? Volts(Cited<double>? v) => v is null ? null : Voltage.FromVolts(v.Value);
        return new Cited<VbeWindow>(
            new VbeWindow(Volts(min), Volts(typ), Volts(max), Current.FromAmperes(at.Value), row.Value("VBE VCE", Voltage.FromVolts) ?? Voltage.FromVolts(5)),
            any.Cell);
    }

    private static bool Beside(TableRow row, string column, string partner, string what)
    {
        if (row.Number(column) is not null && row.Number(partner) is null)
        {
            if (row.Text(partner) is not (null or "-"))
            {
                return false; // unreadable, and complained about already
            }

            row.Complain(partner, what, $"{column} needs {what} beside it.");
            return false;
        }

        return true;
    }

    private static bool SoaAtCase(TableRow row)
    {
        string? text = row.Text("SOA at");
        if (text is not null && !text.Equals("ambient", StringComparison.OrdinalIgnoreCase) && !text.Equals("case", StringComparison.OrdinalIgnoreCase))
        {
            row.Complain("SOA at", "ambient or case", $"\"{text}\" says not where the boundary's temperature is taken.");
        }

        return string.Equals(text, "case", StringComparison.OrdinalIgnoreCase);
    }

    private static Cited<ModelCard>? Card(TableRow row, string? folder)
    {
        if (row.Text("Model") is not { } text)
        {
            return null;
        }

        const string Wanted = "a .MODEL card, or FILE or FILE:NAME beside the part table";
        string? name = null;
        string card = text;
        if (!text.Contains(".model", StringComparison.OrdinalIgnoreCase))
        {
            int colon = text.LastIndexOf(':');
            string file = colon > 1 ? text[..colon] : text;
            name = colon > 1 ? text[(colon + 1)..] : null;
            if (folder is null || Path.IsPathRooted(file) || file.Contains("..", StringComparison.Ordinal))
            {
                row.Complain("Model", Wanted, $"The model file \"{file}\" is not one beside the part table.");
                return null;
            }

            try
            {
                card = File.ReadAllText(Path.Combine(folder, file));
            }
            catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException)
            {
                row.Complain("Model", Wanted, $"The model file \"{file}\" cannot be read.");
                return null;
            }
        }

        ModelCardResult result = ModelCardReader.Read(card, name);
        foreach (string error in result.Errors)
        {
            row.Complain("Model", Wanted, error);
        }

        return result.Card is null ? null : new Cited<ModelCard>(result.Card, row.Cite("Model"));
    }
}
