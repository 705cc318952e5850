namespace PartCheck.Sheets;

/// <summary>Rows of a sheet that are no data, with the reason.</summary>
/// <param name="Row">One-based first row.</param>
/// <param name="LastRow">Last row.</param>
/// <param name="Why">Why they were left out, e.g. <c>section title</c>.</param>
/// <param name="Text">The first text that stands there.</param>
public sealed record SkippedRows(int Row, int LastRow, string Why, string Text);

/// <summary>A table found in a sheet: header row and data rows.</summary>
public sealed class Table
{
    private const int LastHeaderRow = 20;

    private readonly Dictionary<string, TableColumn> columns;
    private readonly List<SkippedRows> skipped = [];

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

    /// <summary>The columns found, in the sheet's order: own name, header as it stands there, one-based column.</summary>
    public IReadOnlyList<(string Name, string Header, int Index)> Columns =>
        [.. columns.Values.OrderBy(c => c.Index).Select(c => (c.Spec.Name, c.Header, c.Index))];

    /// <summary>Rows that are no data.</summary>
    public IReadOnlyList<SkippedRows> Skipped => skipped;

    /// <summary>What stands below another header row, as a sheet of its own; null: nothing.</summary>
    public SheetData? Below { get; private set; }

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
        HeaderSearch search = new(sheet, matcher, FirstRow(sheet) + LastHeaderRow - 1);
        if (search.Best is not { } best)
        {
            string text = ComplaintTexts.NoHeader(
                tableName, matcher.LookedFor, search.Nearest?.Row, [.. search.Nearest?.Cells.Select(cell => OneLine(cell.Text)) ?? []]);
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

        table.ReadRows(best, new RowKinds(best, matcher, tableName, sheet.Layout), tableName);
        return table;
    }

    /// <summary>True where the sheet has the column.</summary>
    public bool Has(string column) => columns.ContainsKey(column);

    /// <summary>The header of a column as it stands in the sheet; null where the sheet has no such column.</summary>
    public string? HeaderOf(string column) => columns.TryGetValue(column, out TableColumn? found) ? found.Header : null;

    internal TableColumn? ColumnOf(string column) => columns.GetValueOrDefault(column);

    /// <summary>The cell at an address; null where it is empty.</summary>
    internal SheetCell? CellAt(int row, int column)
    {
        int low = 0;
        int high = Sheet.Rows.Count - 1;
        while (low <= high)
        {
            int middle = (low + high) / 2;
            int at = Sheet.Rows[middle][0].Row;
            if (at == row)
            {
                return Sheet.Rows[middle].FirstOrDefault(cell => cell.Column == column);
            }

            (low, high) = at < row ? (middle + 1, high) : (low, middle - 1);
        }

        return null;
    }

    /// <summary>The row from which a header is looked for: 1, or where a second table begins.</summary>
    private static int FirstRow(SheetData sheet) => sheet.IsRest && sheet.Rows.Count > 0 ? sheet.Rows[0][0].Row : 1;

    private void ReadRows(TableHeader header, RowKinds kinds, string tableName)
    {
        List<TableRow> rows = [];
        bool bill = tableName.Equals("BOM", StringComparison.OrdinalIgnoreCase);
        int block = 0;
        for (int i = 0; i < Sheet.Rows.Count; i++)
        {
            IReadOnlyList<SheetCell> row = Sheet.Rows[i];
            if (row[0].Row < header.Row)
            {
                Skip(row, "title above the header");
            }

            if (row[0].Row <= header.LastRow)
            {
                continue;
            }

            RowKind kind = kinds.Of(row);
            if (kind == RowKind.Data)
            {
                rows.Add(new TableRow(this, row, block));
                continue;
            }

            block += kind == RowKind.RepeatedHeader ? 1 : 0;
            if (kind == RowKind.OtherHeader)
            {
                // In a bill the rows below may be the same parts once more: the bill's reader compares.
                if (bill)
                {
                    Below = Sheet with { Rows = [.. Sheet.Rows.Skip(i)], IsRest = true };
                }
                else
                {
                    SheetCell first = row[0];
                    Complaints.Add(new Complaint(
                        Sheet.File, Sheet.Sheet, first.Row, null, first.Address, first.Text, "one table in one sheet", ComplaintTexts.SecondHeader));
                }

                break;
            }

            Skip(row, kind switch
            {
                RowKind.Section => "section title",
                RowKind.Total => "totals",
                RowKind.SignOff => "note about the file",
                RowKind.RepeatedHeader => "header once more",
                _ => "nothing in the columns that are read",
            });
        }

        Rows = rows;
    }

    /// <summary>Notes a row that is left out; runs of one reason are one entry.</summary>
    internal void Skip(IReadOnlyList<SheetCell> row, string why)
    {
        int at = row[0].Row;
        if (skipped.Count > 0 && skipped[^1] is { } last && last.Why == why && last.LastRow == at - 1)
        {
            skipped[^1] = last with { LastRow = at };
            return;
        }

        skipped.Add(new SkippedRows(at, at, why, OneLine(row[0].Text)));
    }

    internal static string OneLine(string text) => string.Join(' ', text.Split((char[])['\r', '\n'], StringSplitOptions.RemoveEmptyEntries));
}
