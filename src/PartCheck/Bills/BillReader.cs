using FluentValidation;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>Cells to a bill of materials.</summary>
public static class BillReader
{
    private static readonly LineValidator Rules = new();

    /// <summary>Columns of the table.</summary>
    public static IReadOnlyList<ColumnSpec> Columns { get; } =
    [
        new("References", ColumnKind.Text, Required: true),
        new("Part number", ColumnKind.Text),
        new("Quantity", ColumnKind.Number),
        new("Value", ColumnKind.Text),
        new("Package", ColumnKind.Text),
        new("Manufacturer", ColumnKind.Text),
        new("Description", ColumnKind.Text),
        new("Fitted", ColumnKind.Text),
        new("Do not fit", ColumnKind.Text),
        new("Alternates", ColumnKind.Text),
        new("Channel", ColumnKind.Text),
        new("Role", ColumnKind.Text),
    ];

    /// <summary>The bill of a sheet; null where it has none.</summary>
    public static Bill? Read(SheetData sheet, ColumnSpellings spellings, ComplaintList complaints)
    {
        ArgumentNullException.ThrowIfNull(sheet);
        ArgumentNullException.ThrowIfNull(complaints);
        Table? table = Table.Find(sheet, "BOM", Columns, spellings, complaints);
        if (table is null)
        {
            return null;
        }

        List<BillLine> lines = [];
        Dictionary<string, int> seen = new(StringComparer.OrdinalIgnoreCase);
        foreach (TableRow row in table.Rows)
        {
            if (ReadLine(row, sheet.DecimalComma) is not { } line)
            {
                continue;
            }

            row.Check(Rules, line);
            foreach (string reference in line.References)
            {
                if (!seen.TryAdd(reference, lines.Count))
                {
                    int other = seen[reference];
                    string cell = other < lines.Count ? lines[other].Cell : line.Cell;
                    row.Complain("References", "each reference once", $"{reference} stands on the bill twice; the other place is {cell}.");
                    if (other < lines.Count)
                    {
                        lines[other] = lines[other] with { HasComplaints = true };
                    }
                }
            }

            lines.Add(row.HasComplaints ? line with { HasComplaints = true } : line);
        }

        if (lines.Count == 0)
        {
            complaints.Add(new Complaint(
                sheet.File, sheet.Sheet, null, null, null, null, "at least one bill line", "The bill has a header row and no lines.")
            { Fatal = true });
            return null;
        }

        return new Bill(sheet.File, lines);
    }

    private static BillLine? ReadLine(TableRow row, bool decimalComma)
    {
        if (row.Text("References") is not { } text)
        {
            return null;
        }

        if (ReferenceList.Read(text, out IReadOnlyList<string> references) is { } wrong)
        {
            row.Complain("References", "references such as R1, R2, R5-R8", wrong);
        }

        string? value = row.Text("Value");
        (bool fitted, Cited<string>? mark) = FittedMarks.Read(row, value);
        Resistance? ohms = value is not null
            && QuantityParser.TryParse(value, QuantityKind.Resistance, decimalComma, null, out QuantityReading reading)
            && reading.Si >= 0 ? Resistance.FromOhms(reading.Si) : null;
        return new BillLine
        {
            References = references,
            PartNumber = row.Text("Part number"),
            Quantity = row.Number("Quantity")?.Value,
            Value = value,
            Resistance = ohms,
            Package = row.Text("Package"),
            Manufacturer = row.Text("Manufacturer"),
            Description = row.Text("Description"),
            Fitted = fitted,
            FittedMark = mark,
            Alternates = [.. (row.Text("Alternates") ?? string.Empty).Split([',', ';', '\n', '\r'], StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries)],
            Channel = row.Text("Channel"),
            Role = row.Text("Role"),
            Cell = row.Cite("References"),
        };
    }

    private sealed class LineValidator : AbstractValidator<BillLine>
    {
        public LineValidator()
        {
            this.Demand("Quantity", l => l.Quantity is not { } q || (q >= 0 && q == Math.Floor(q) && q < 1e6), "a whole number, at least 0", l => "A quantity is a whole number, at least 0.");
            this.Demand("References", l => l.References.Count > 0, "references such as R1, R2, R5-R8", _ => "No reference designator stands in the cell.");
        }
    }
}
