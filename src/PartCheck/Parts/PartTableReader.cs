using PartCheck.Devices;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>Cells to parts.</summary>
public static class PartTableReader
{
    private static readonly Dictionary<string, string> Refused = new(StringComparer.OrdinalIgnoreCase)
    {
        ["pnp"] = "a PNP transistor does not fit a low-side sink",
        ["npn darlington"] = "a Darlington has two junctions and no gain window of one transistor",
        ["npn with resistors"] = "built-in resistors change base drive and leakage; the table has no columns for them",
        ["nmos"] = "a MOSFET is no bipolar transistor: it has a threshold, not a base current",
        ["resistor array"] = "an array as a whole is refused: give the resistors one by one",
        ["resistor network"] = "an array as a whole is refused: give the resistors one by one",
    };

    private static readonly TransistorValidator TransistorRules = new();
    private static readonly ResistorValidator ResistorRules = new();

    /// <summary>Every part of a sheet; a row with a complaint is an <see cref="UnreadPart"/>.</summary>
    /// <param name="sheet">The sheet.</param>
    /// <param name="folder">Folder that model files are relative to; null: no files.</param>
    /// <param name="spellings">Header spellings.</param>
    /// <param name="complaints">Where complaints go.</param>
    public static IReadOnlyList<Part> Read(SheetData sheet, string? folder, ColumnSpellings spellings, ComplaintList complaints)
    {
        Table? table = Table.Find(sheet, "Parts", PartColumns.All, spellings, complaints);
        List<Part> parts = [];
        foreach (TableRow row in table?.Rows ?? [])
        {
            if (ReadRow(row, folder) is { } part && !row.HasComplaints)
            {
                parts.Add(part);
            }
            else if (row.Text("Part number") is { } number)
            {
                parts.Add(new UnreadPart { PartNumber = number, Cell = row.Cite("Part number") });
            }
        }

        return parts;
    }

    /// <summary>
    /// One table out of several; two rows of one part number, manufacturer and mounting must agree. Where they do not, neither
    /// is taken: what reads the part is then not verified.
    /// </summary>
    public static PartTable Combine(IEnumerable<Part> parts, ComplaintList complaints)
    {
        ArgumentNullException.ThrowIfNull(parts);
        ArgumentNullException.ThrowIfNull(complaints);
        List<Part> kept = [];
        HashSet<Part> contradicted = new(ReferenceEqualityComparer.Instance);
        Dictionary<string, Part> byKey = new(StringComparer.OrdinalIgnoreCase);
        List<Part> all = [.. parts];
        foreach (Part part in all.Where(p => p is not UnreadPart))
        {
            string key = string.Join('\n', part.PartNumber, part.Manufacturer, part.Mounting);
            if (!byKey.TryGetValue(key, out Part? twin))
            {
                byKey[key] = part;
                kept.Add(part);
            }
            else if (PartAgreement.FirstDifference(twin, part) is { } difference)
            {
                contradicted.Add(twin);
                complaints.Add(Complaint.At(
                    part.Cell, difference, part.PartNumber, "rows that agree, or one row",
                    $"{part.PartNumber} stands in the table twice and the rows disagree in {difference}; the other row is {twin.Cell}."));
            }
        }

        return new PartTable([.. kept.Where(p => !contradicted.Contains(p))])
        {
            Unread = all.OfType<UnreadPart>().Concat(contradicted).Select(p => p.PartNumber).ToHashSet(StringComparer.OrdinalIgnoreCase),
        };
    }

    private static Part? ReadRow(TableRow row, string? folder)
    {
        string? number = row.Text("Part number");
        string? kind = row.Text("Kind");
        if (number is null)
        {
            row.Complain("Part number", "a part number", "The row has no part number.");
            return null;
        }

        if (kind is null)
        {
            row.Complain("Kind", "npn, resistor or led", $"{number} has no kind.");
            return null;
        }

        if (Refused.TryGetValue(kind, out string? reason))
        {
            return new RefusedPart
            {
                PartNumber = number,
                Manufacturer = row.Text("Manufacturer"),
                Package = row.Text("Package"),
                Mounting = row.Text("Mounting"),
                Cell = row.Cite("Part number"),
                Kind = kind,
                Reason = reason,
            };
        }

        if (string.Equals(kind, "npn", StringComparison.OrdinalIgnoreCase))
        {
            Transistor transistor = TransistorRow.Read(row, number, folder);
            row.Check(TransistorRules, transistor);
            return transistor;
        }

        if (string.Equals(kind, "resistor", StringComparison.OrdinalIgnoreCase))
        {
            return Resistor(row, number);
        }

        if (string.Equals(kind, "led", StringComparison.OrdinalIgnoreCase))
        {
            return LedRow.Read(row, number);
        }

        row.Complain("Kind", "npn, resistor or led", $"The kind \"{kind}\" is not known.");
        return null;
    }

    private static ResistorPart Resistor(TableRow row, string number)
    {
        Cited<double>? ohms = row.Number("Resistance");
        if (ohms is null && row.Text("Resistance") is null or "-")
        {
            row.Complain("Resistance", "a resistance", $"The resistor {number} has no resistance.");
        }

        ResistorPart part = new()
        {
            PartNumber = number,
            Manufacturer = row.Text("Manufacturer"),
            Mounting = row.Text("Mounting"),
            Package = row.Text("Package"),
            Cell = row.Cite("Part number"),
            Lifecycle = row.Text("Lifecycle"),
            Stock = row.Number("Stock")?.Value,
            Source = row.Text("Source"),
            Style = row.Text("Style"),
            Resistance = new Cited<Resistance>(Resistance.FromOhms(ohms?.Value ?? 0), row.Cite("Resistance")),
            Tolerance = row.Number("Tolerance"),
            Tcr = row.Number("TCR"),
            WorkingVoltageMax = row.Quantity("Working voltage max", Voltage.FromVolts),
            Ic = row.Quantity("IC", Current.FromAmperes),
            Power = row.Quantity("Power", Power.FromWatts),
            PowerFlatTo = row.Quantity("Power flat to", Temperature.FromKelvins),
            PowerSlope = row.Number("Power slope"),
            RthJa = row.Quantity("RthJA", ThermalResistance.FromKelvinsPerWatt),
            TjMax = row.Quantity("Tj max", Temperature.FromKelvins),
        };
        row.Check(ResistorRules, part);
        return part;
    }
}
