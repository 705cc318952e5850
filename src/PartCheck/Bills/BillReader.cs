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
        List<ColumnSpec> columns = [.. Columns, .. asked.Select(a => new ColumnSpec(a.Header, ColumnKind.Text))];
        BlockGathering bill = new();
        List<Table> tables = [];
        int left = MostReferences;
        for (Table? table = Table.Find(sheet, "BOM", columns, spellings, complaints); table is not null && left >= 0;)
        {
            tables.Add(table);
            left = ReadTable(table, asked, bill, left);
            if (tables.Count == MostTables && table.Below is not null)
            {
                complaints.Add(new Complaint(sheet.File, sheet.Sheet, null, null, null, null, "one table in one sheet", TooMany("tables", MostTables)));
                break;
            }

            table = table.Below is { } below ? Table.Find(below, "BOM", columns, spellings, complaints) : null;
        }

        if (bill.Lines.Count == 0)
        {
            if (tables.Count > 0)
            {
                complaints.Add(new Complaint(
                    sheet.File, sheet.Sheet, null, null, null, null, "at least one bill line", "The bill has a header row and no lines.")
                { Fatal = true });
            }

            return null;
        }

        return new Bill(sheet.File, bill.Lines)
        {
            Assemblies = [.. named.Where(n => n.Plausible || asked.Contains(n)).Select(n => n.Assembly).Distinct(StringComparer.OrdinalIgnoreCase)],
            Assembly = asked.Count == 0 ? null : asked[0].Assembly,
            Tables = [.. tables.Select((t, i) => BillTables.Of(t, i == 0, bill.Lines))],
        };
    }

    /// <summary>Reads one table, block by block.</summary>
    /// <returns>How many references the bill may still have; below 0: it has too many, and the rest is not read.</returns>
    private static int ReadTable(Table table, IReadOnlyList<AssemblyColumn> asked, BlockGathering bill, int left)
    {
        HashSet<TableRow> open = BlankMarks(table, asked);
        List<(TableRow Row, BillLine Line)> block = [];
        foreach (TableRow row in table.Rows)
        {
            if (block.Count > 0 && block[^1].Row.Block != row.Block)
            {
                bill.Add(block);
                block = [];
            }

            if (ReadLine(row, table.Sheet, asked) is not { } line)
            {
                continue;
            }

            left -= line.References.Count;
            if (left < 0)
            {
                row.Complain("References", "a bill of fewer parts", TooMany("references", MostReferences));
                break;
            }

            block.Add((row, open.Contains(row) ? line with { HasComplaints = true } : line));
        }

        bill.Add(block);
        return left;
    }

    private static string TooMany(string what, int most) =>
        $"The bill has more than {most.ToString(CultureInfo.InvariantCulture)} {what}: what follows is not read.";

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

    private static BillLine? ReadLine(TableRow row, SheetData sheet, IReadOnlyList<AssemblyColumn> assembly)
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
        (bool fitted, Cited<string>? mark) = FittedMarks.Read(row, value, assembly);
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
