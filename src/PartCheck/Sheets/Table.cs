namespace PartCheck.Sheets;

/// <summary>A table found in a sheet: header row and data rows.</summary>
public sealed class Table
{
    private const int LastHeaderRow = 20;

    private readonly Dictionary<string, TableColumn> columns;

    private Table(SheetData sheet, TableHeader header, ComplaintList complaints)
    {
        Sheet = sheet;
        HeaderRow = header.Row;
        Complaints = complaints;
        columns = header.Columns;
    }

    /// <summary>Data rows in order (section, totals and repeated header rows left out).</summary>
    public IReadOnlyList<TableRow> Rows { get; private set; } = [];

    /// <summary>The sheet that the table stands in.</summary>
    public SheetData Sheet { get; }

    /// <summary>One-based row of the header.</summary>
    public int HeaderRow { get; }

    /// <summary>Where complaints go.</summary>
    internal ComplaintList Complaints { get; }

    /// <summary>Finds the header row (rows 1 to 20), maps its columns; complains and returns null where there is none.</summary>
    /// <param name="sheet">The sheet.</param>
    /// <param name="tableName">Name in the spellings file: BOM, Channels, Parts, Pins, Derating.</param>
    /// <param name="columns">Columns the table may have.</param>
    /// <param name="spellings">Header spellings.</param>
    /// <param name="complaints">Where complaints go.</param>
    public static Table? Find(
        SheetData sheet, string tableName, IReadOnlyList<ColumnSpec> columns, ColumnSpellings spellings, ComplaintList complaints)
    {
        ArgumentNullException.ThrowIfNull(sheet);
        ArgumentNullException.ThrowIfNull(tableName);
        ArgumentNullException.ThrowIfNull(columns);
        ArgumentNullException.ThrowIfNull(spellings);
        ArgumentNullException.ThrowIfNull(complaints);
        HeaderMatcher matcher = new(tableName, columns, spellings);
        TableHeader? best = null;
        TableHeader? nearest = null;
        foreach (IReadOnlyList<SheetCell> row in sheet.Rows.Where(row => row[0].Row <= LastHeaderRow))
        {
            TableHeader header = matcher.Match(row);
            nearest = nearest is null || header.Columns.Count > nearest.Columns.Count ? header : nearest;

            // The first header counts; only a title that happens to match one column gives way to a later row that matches more.
            if (header.Complete && (best is null || (best.Columns.Count == 1 && header.Columns.Count > 1)))
            {
                best = header;
            }
        }

        if (best is null)
        {
            string text = ComplaintTexts.NoHeader(
                tableName, matcher.LookedFor, nearest?.Row, [.. nearest?.Cells.Select(cell => OneLine(cell.Text)) ?? []]);
            complaints.Add(new Complaint(
                sheet.File, sheet.Sheet, null, null, null, null, string.Join(", ", matcher.LookedFor), text)
            { Fatal = true });
            return null;
        }

        Table table = new(sheet, best, complaints);
        foreach (TableColumn column in best.Columns.Values.Where(column => column.UnitWrong).OrderBy(column => column.Index))
        {
            string wanted = ColumnKindMap.QuantityOf(column.Spec.Kind) is { } kind ? Quantities.QuantityUnits.WantedOf(kind) : "a text";
            complaints.Add(new Complaint(
                sheet.File, sheet.Sheet, best.Row, column.Header, CellAddress.Of(best.Row, column.Index), column.Header, wanted,
                ComplaintTexts.HeaderUnit(column.Header, wanted)));
        }

        table.Rows = DataRows(table, best, matcher, tableName);
        return table;
    }

    /// <summary>True where the sheet has the column.</summary>
    public bool Has(string column) => columns.ContainsKey(column);

    /// <summary>The header of a column as it stands in the sheet; null where the sheet has no such column.</summary>
    public string? HeaderOf(string column) => columns.TryGetValue(column, out TableColumn? found) ? found.Header : null;

    internal TableColumn? ColumnOf(string column) => columns.GetValueOrDefault(column);

    private static List<TableRow> DataRows(Table table, TableHeader header, HeaderMatcher matcher, string tableName)
    {
        List<TableRow> rows = [];
        RowKinds kinds = new(header, matcher, tableName);
        foreach (IReadOnlyList<SheetCell> row in table.Sheet.Rows.Where(row => row[0].Row > header.Row))
        {
            RowKind kind = kinds.Of(row);
            if (kind == RowKind.OtherHeader)
            {
                SheetCell first = row[0];
                if (!tableName.Equals("BOM", StringComparison.OrdinalIgnoreCase))
                {
                    table.Complaints.Add(new Complaint(
                        table.Sheet.File, table.Sheet.Sheet, first.Row, null, first.Address, first.Text, "one table in one sheet", ComplaintTexts.SecondHeader));
                }

                break;
            }

            if (kind == RowKind.Data)
            {
                rows.Add(new TableRow(table, row));
            }
        }

        return rows;
    }

    internal static string OneLine(string text) => string.Join(' ', text.Split((char[])['\r', '\n'], StringSplitOptions.RemoveEmptyEntries));
}
