using System.Globalization;
using FluentValidation;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>Cells to a bill of materials.</summary>
public static class BillReader
{
    /// <summary>Most references of one bill.</summary>
    public const int MostReferences = 200_000;

    private const int MostTables = 20;

    private static readonly LineValidator Rules = new();

    /// <summary>Columns of the table.</summary>
    public static IReadOnlyList<ColumnSpec> Columns { get; } =
    [
        new("References", ColumnKind.Text, Required: true) { Proof = ReferenceShape.AreReferences },
        new("Part number", ColumnKind.Text),
        new("Quantity", ColumnKind.Number),
        new("Value", ColumnKind.Text) { Proof = ReferenceShape.AreValues },
        new("Package", ColumnKind.Text),
        new("Manufacturer", ColumnKind.Text),
        new("Description", ColumnKind.Text),
        new("Fitted", ColumnKind.Text),
        new("Do not fit", ColumnKind.Text),
        new("Notes", ColumnKind.Text),
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

        BillAssembly bill = new();
        List<Table> tables = [];
        int references = 0;
        for (Table? next = table; next is not null; next = Following(next, spellings, complaints))
        {
            tables.Add(next);
            List<(TableRow Row, BillLine Line)> read = [];
            foreach (TableRow row in next.Rows)
            {
                if (read.Count > 0 && read[^1].Row.Block != row.Block)
                {
                    bill.Add(read);
                    read = [];
                }

                if (ReadLine(row, sheet) is { } line)
                {
                    references += line.References.Count;
                    if (references > MostReferences)
                    {
                        row.Complain("References", "a bill of fewer parts", ComplaintOfLength("references", MostReferences));
                        break;
                    }

                    read.Add((row, line));
                }
            }

            bill.Add(read);
            if (references > MostReferences)
            {
                break;
            }

            if (tables.Count == MostTables && next.Below is not null)
            {
                complaints.Add(new Complaint(sheet.File, sheet.Sheet, null, null, null, null, "one table in one sheet", ComplaintOfLength("tables", MostTables)));
                break;
            }
        }

        if (bill.Lines.Count == 0)
        {
            complaints.Add(new Complaint(
                sheet.File, sheet.Sheet, null, null, null, null, "at least one bill line", "The bill has a header row and no lines.")
            { Fatal = true });
            return null;
        }

        return new Bill(sheet.File, bill.Lines) { Tables = [.. tables.Select((t, i) => BillTables.Of(t, i == 0, bill.Lines))] };
    }

    private static Table? Following(Table table, ColumnSpellings spellings, ComplaintList complaints) =>
        table.Below is { } below ? Table.Find(below, "BOM", Columns, spellings, complaints) : null;

    private static string ComplaintOfLength(string what, int most) =>
        $"The bill has more than {most.ToString(CultureInfo.InvariantCulture)} {what}: what follows is not read.";

    private static BillLine? ReadLine(TableRow row, SheetData sheet)
    {
        if (row.Text("References") is not { } text || text.Trim('-', '\u2013', '\u2014', ' ').Length == 0)
        {
            // A cell without a value has been complained about.
            if (!row.HasComplaints)
            {
                row.Skip("no references");
            }

            return null;
        }

        if (row.ContinuesAbove("References") && row.Text("Part number") is { } second)
        {
            row.Complain("Part number", "one row for one line", $"The references are merged with the row above: \"{second}\" is a second part number of that line, and is not read; write it in a column Alternates.");
            return null;
        }

        if (ReferenceList.Read(text, out IReadOnlyList<string> references) is { } wrong)
        {
            row.Complain("References", "references such as R1, R2, R5-R8", wrong);
        }

        string? value = row.Text("Value");
        (bool fitted, Cited<string>? mark) = FittedMarks.Read(row, value);
        BillLine line = new()
        {
            References = references,
            PartNumber = row.Text("Part number"),
            Quantity = row.Number("Quantity")?.Value,
            Value = value,
            Resistance = ResistanceOf(row, value, sheet.DecimalComma),
            Package = row.Text("Package"),
            Manufacturer = row.Text("Manufacturer"),
            Description = row.Text("Description"),
            Fitted = fitted,
            FittedMark = mark,
            Alternates = [.. (row.Text("Alternates") ?? string.Empty).Split([',', ';', '\n', '\r'], StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries)],
            Channel = row.Text("Channel"),
            Role = row.Text("Role"),
            Cell = row.Cite("References"),
            Sheet = sheet.Sheet,
            Row = row.Row,
        };
        row.Check(Rules, line);
        return line with { Doubts = BillDoubts.Of(row, line, sheet) };
    }

    /// <summary>The resistance of the value; where the line has no value, of its part number or its description.</summary>
    private static Resistance? ResistanceOf(TableRow row, string? value, bool decimalComma)
    {
        double? ohms = value is not null ? ResistanceText.OfValue(value, decimalComma)
            : (row.Text("Part number") is { } number && (ResistanceText.SaysOhms(number) || row.HeaderOf("Part number").Contains("value", StringComparison.OrdinalIgnoreCase))
                    ? ResistanceText.OfValue(number, decimalComma) : null)
                ?? (row.Text("Description") is { } description ? ResistanceText.OfDescription(description, decimalComma) : null);
        return ohms is { } found ? Resistance.FromOhms(found) : null;
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
