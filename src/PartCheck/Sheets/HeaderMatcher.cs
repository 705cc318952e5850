using PartCheck.Quantities;

namespace PartCheck.Sheets;

/// <summary>A column found in a sheet.</summary>
/// <param name="Spec">What the column is.</param>
/// <param name="Index">One-based column in the sheet.</param>
/// <param name="Header">The header as it stands in the sheet, on one line.</param>
/// <param name="Unit">The unit that the header names for bare numbers; null: none.</param>
/// <param name="UnitWrong">True where the header names a unit of another kind.</param>
/// <param name="OwnName">True where the header is the column's own name.</param>
internal sealed record TableColumn(ColumnSpec Spec, int Index, string Header, QuantityUnit? Unit, bool UnitWrong, bool OwnName);

/// <summary>A row read as a header, or two rows read as one.</summary>
internal sealed record TableHeader(int Row, int LastRow, IReadOnlyList<SheetCell> Cells, Dictionary<string, TableColumn> Columns, bool Complete);

/// <summary>Matches the cells of a row with the columns of a table.</summary>
internal sealed class HeaderMatcher
{
    /// <summary>A longer text is no header.</summary>
    private const int LongestHeader = 200;

    private readonly string tableName;
    private readonly ColumnSpellings spellings;
    private readonly Dictionary<string, ColumnSpec> byName = new(StringComparer.Ordinal);
    private readonly List<ColumnSpec> required;
    private readonly int leastColumns;

    internal HeaderMatcher(string tableName, IReadOnlyList<ColumnSpec> columns, ColumnSpellings spellings)
    {
        this.tableName = tableName;
        this.spellings = spellings;
        foreach (ColumnSpec spec in columns)
        {
            byName.TryAdd(HeaderText.Matched(spec.Name), spec);
        }

        required = [.. columns.Where(spec => spec.Required)];
        leastColumns = required.Count > 0 ? 1 : Math.Min(2, columns.Count);
        LookedFor = [.. (required.Count > 0 ? required : columns).Select(spec => spec.Name)];
    }

    /// <summary>Names of the columns without which there is no table.</summary>
    internal IReadOnlyList<string> LookedFor { get; }

    /// <summary>The required columns.</summary>
    internal IReadOnlyList<ColumnSpec> Required => required;

    internal TableHeader Match(IReadOnlyList<SheetCell> row)
    {
        Dictionary<string, TableColumn> found = new(StringComparer.OrdinalIgnoreCase);
        foreach (SheetCell cell in row)
        {
            if (cell.Number is not null || cell.Text.Length > LongestHeader || Column(cell) is not { } column)
            {
                continue;
            }

            // The first of two spellings of one column counts, unless the column's own name follows.
            if (!found.TryGetValue(column.Spec.Name, out TableColumn? earlier) || (column.OwnName && !earlier.OwnName))
            {
                found[column.Spec.Name] = column;
            }
        }

        return new TableHeader(row[0].Row, row[0].Row, row, found, IsComplete(found));
    }

    /// <summary>The header with further columns.</summary>
    internal TableHeader WithColumns(TableHeader header, Dictionary<string, TableColumn> columns) =>
        header with { Columns = columns, Complete = IsComplete(columns) };

    /// <summary>A quick look: false where a data row cannot be a header, since none of its texts is a name of a required column.</summary>
    internal bool MayBeHeader(IReadOnlyList<SheetCell> row)
    {
        if (required.Count == 0)
        {
            return true;
        }

        foreach (SheetCell cell in row)
        {
            if (cell.Number is null && cell.Text.Length <= LongestHeader && Column(cell) is { Spec.Required: true })
            {
                return true;
            }
        }

        return false;
    }

    /// <summary>Columns that a row's texts may stand for if the cells below prove it.</summary>
    internal IEnumerable<TableColumn> Doubtful(IReadOnlyList<SheetCell> row)
    {
        foreach (SheetCell cell in row)
        {
            if (cell.Number is null && cell.Text.Length <= LongestHeader
                && spellings.DoubtfulOf(tableName, HeaderText.Matched(cell.Text)) is { } names)
            {
                foreach (string name in names)
                {
                    if (byName.TryGetValue(HeaderText.Matched(name), out ColumnSpec? spec) && spec.Proof is not null)
                    {
                        yield return new TableColumn(spec, cell.Column, Table.OneLine(cell.Text), null, false, false);
                    }
                }
            }
        }
    }

    private bool IsComplete(Dictionary<string, TableColumn> found) =>
        found.Count >= leastColumns && required.TrueForAll(spec => found.ContainsKey(spec.Name));

    private TableColumn? Column(SheetCell cell)
    {
        string header = Table.OneLine(cell.Text);
        if (Named(cell.Text, out bool own) is { } whole)
        {
            return new TableColumn(whole, cell.Column, header, null, false, own);
        }

        if (HeaderText.FirstLine(cell.Text) is { } line && Named(line, out own) is { } first)
        {
            return new TableColumn(first, cell.Column, header, null, false, own);
        }

        foreach ((string name, string unitText, bool bracketed) in HeaderText.WithUnit(cell.Text))
        {
            if (Named(name, out own) is not { } spec || !QuantityUnits.IsAnyUnit(unitText))
            {
                continue;
            }

            if (ColumnKindMap.QuantityOf(spec.Kind) is not { } kind)
            {
                // A text column keeps its unit only where leaving it out changes nothing: Value [ohm], but not Value [kohm].
                bool plain = bracketed && QuantityUnits.TryFind(unitText, QuantityKind.Resistance, out QuantityUnit ohm) && ohm == new QuantityUnit(0);
                if (plain)
                {
                    return new TableColumn(spec, cell.Column, header, null, false, own);
                }

                continue;
            }

            bool right = QuantityUnits.TryFind(unitText, kind, out QuantityUnit unit);
            return new TableColumn(spec, cell.Column, header, right ? unit : null, !right, own);
        }

        return null;
    }

    private ColumnSpec? Named(string header, out bool own)
    {
        string matched = HeaderText.Matched(header);
        own = byName.TryGetValue(matched, out ColumnSpec? spec);
        if (!own && spellings.ColumnOf(tableName, matched) is { } column)
        {
            byName.TryGetValue(HeaderText.Matched(column), out spec);
        }

        return spec;
    }
}
