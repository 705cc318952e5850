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

/// <summary>A row read as a header.</summary>
internal sealed record TableHeader(int Row, IReadOnlyList<SheetCell> Cells, Dictionary<string, TableColumn> Columns, bool Complete);

/// <summary>Matches the cells of a row with the columns of a table.</summary>
internal sealed class HeaderMatcher
{
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
            if (cell.Number is not null || Column(cell) is not { } column)
            {
                continue;
            }

            // The first of two spellings of one column counts, unless the column's own name follows.
            if (!found.TryGetValue(column.Spec.Name, out TableColumn? earlier) || (column.OwnName && !earlier.OwnName))
            {
                found[column.Spec.Name] = column;
            }
        }

        bool complete = found.Count >= leastColumns && required.TrueForAll(spec => found.ContainsKey(spec.Name));
        return new TableHeader(row[0].Row, row, found, complete);
    }

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
