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
    /// <param name="sheet">The sheet.</param>
    /// <param name="spellings">Header spellings.</param>
    /// <param name="complaints">Where complaints go.</param>
    /// <param name="assembly">
    /// The assembly whose columns say what is fitted; one that the bill does not name leaves <see cref="Bill.Assembly"/> null.
    /// </param>
    public static Bill? Read(SheetData sheet, ColumnSpellings spellings, ComplaintList complaints, string? assembly = null)
    {
        ArgumentNullException.ThrowIfNull(sheet);
        ArgumentNullException.ThrowIfNull(complaints);
        IReadOnlyList<AssemblyColumn> named = Table.Find(sheet, "BOM", Columns, spellings, new ComplaintList()) is { } bare
            ? AssemblyColumn.Of(sheet, bare.HeaderRow, spellings) : [];
        List<AssemblyColumn> asked = assembly is null ? [] : [.. named.Where(n => n.Is(assembly))];
        Table? table = Table.Find(sheet, "BOM", [.. Columns, .. asked.Select(a => new ColumnSpec(a.Header, ColumnKind.Text))], spellings, complaints);
        if (table is null)
        {
            return null;
        }

        HashSet<TableRow> open = BlankMarks(table, asked);

        List<BillLine> lines = [];
        Dictionary<string, int> seen = new(StringComparer.OrdinalIgnoreCase);
        foreach (TableRow row in table.Rows)
        {
            if (ReadLine(row, sheet.DecimalComma, asked) is not { } line)
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

            lines.Add(row.HasComplaints || open.Contains(row) ? line with { HasComplaints = true } : line);
        }

        if (lines.Count == 0)
        {
            complaints.Add(new Complaint(
                sheet.File, sheet.Sheet, null, null, null, null, "at least one bill line", "The bill has a header row and no lines.")
            { Fatal = true });
            return null;
        }

        return new Bill(sheet.File, lines)
        {
            Assemblies = [.. named.Where(n => n.Plausible || asked.Contains(n)).Select(n => n.Assembly).Distinct(StringComparer.OrdinalIgnoreCase)],
            Assembly = asked.Count == 0 ? null : asked[0].Assembly,
        };
    }

    /// <summary>
    /// Rows that a column of yes-marks alone leaves blank: whether a blank means not fitted, nobody can tell. One complaint for the column.
    /// </summary>
    private static HashSet<TableRow> BlankMarks(Table table, IReadOnlyList<AssemblyColumn> asked)
    {
        HashSet<TableRow> open = [];
        foreach (AssemblyColumn column in asked.Where(a => a.YesMeansFitted))
        {
            List<TableRow> blank = [.. table.Rows.Where(r => r.Text("References") is not null && r.Text(column.Header) is null)];
            List<bool?> said = [.. table.Rows.Select(r => r.Text(column.Header) is { } text ? FittedMarks.Statement(text, true) : null)];
            if (blank.Count > 0 && said.Contains(true) && !said.Contains(false))
            {
                blank[0].Complain(column.Header, "yes or no in every row", $"{column.Header} marks what is fitted and says of no line that it is not: whether its blank cells mean that cannot be told.");
                open.UnionWith(blank);
            }
        }

        return open;
    }

    private static BillLine? ReadLine(TableRow row, bool decimalComma, IReadOnlyList<AssemblyColumn> assembly)
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
        (bool fitted, Cited<string>? mark) = FittedMarks.Read(row, value, assembly);
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
