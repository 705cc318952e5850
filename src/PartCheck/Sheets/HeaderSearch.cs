namespace PartCheck.Sheets;

/// <summary>
/// Looks for the header of a table. The first row that names every required column counts; only a title that happens to match one
/// column gives way to a later row that matches more. Where no row has all required columns by its plain names, doubtful names
/// (<c>Part</c>, <c>Name</c>) are tried, and taken only where the cells below prove them. A header of two lines is read as one.
/// </summary>
internal sealed class HeaderSearch
{
    private const int MostProofs = 200;
    private const int MostRowsLookedAt = 2000;

    private readonly SheetData sheet;
    private readonly HeaderMatcher matcher;
    private readonly int lastRow;

    internal HeaderSearch(SheetData sheet, HeaderMatcher matcher, int lastRow)
    {
        this.sheet = sheet;
        this.matcher = matcher;
        this.lastRow = lastRow;
        Best = Find(doubtful: false) ?? Find(doubtful: true);
        if (Best is { } found)
        {
            Best = Proven(TwoLines(found));
        }
    }

    /// <summary>The header; null where there is none.</summary>
    internal TableHeader? Best { get; }

    /// <summary>The row that came nearest.</summary>
    internal TableHeader? Nearest { get; private set; }

    private TableHeader? Find(bool doubtful)
    {
        TableHeader? best = null;
        foreach (IReadOnlyList<SheetCell> row in sheet.Rows)
        {
            if (row[0].Row > lastRow)
            {
                break;
            }

            TableHeader header = matcher.Match(row);
            if (doubtful)
            {
                header = Proven(header);
            }

            Nearest = Nearest is null || header.Columns.Count > Nearest.Columns.Count ? header : Nearest;
            if (header.Complete && (best is null || (best.Columns.Count == 1 && header.Columns.Count > 1)))
            {
                best = header;
            }
        }

        return best;
    }

    /// <summary>The header with the columns that doubtful names stand for, where the cells below them say so.</summary>
    private TableHeader Proven(TableHeader header)
    {
        Dictionary<string, TableColumn> columns = new(header.Columns, StringComparer.OrdinalIgnoreCase);
        HashSet<int> taken = [.. columns.Values.Select(c => c.Index)];
        foreach (TableColumn column in matcher.Doubtful(header.Cells).Where(c => !columns.ContainsKey(c.Spec.Name)))
        {
            List<SheetCell> below = [.. sheet.Rows
                .Where(row => row[0].Row > header.LastRow).Take(MostRowsLookedAt)
                .Select(row => row.FirstOrDefault(cell => cell.Column == column.Index)).OfType<SheetCell>().Take(MostProofs)];
            if (!taken.Contains(column.Index) && below.Count > 0 && !columns.ContainsKey(column.Spec.Name) && column.Spec.Proof!([.. below.Select(c => c.Text)]))
            {
                columns[column.Spec.Name] = column;
                taken.Add(column.Index);
            }
        }

        return columns.Count == header.Columns.Count ? header : matcher.WithColumns(header, columns);
    }

    /// <summary>
    /// The header and the row below as one, where that row has only texts, none in a required column, and names columns that the
    /// first row leaves open. A cell merged sideways is the upper line of every column that it covers.
    /// </summary>
    private TableHeader TwoLines(TableHeader header)
    {
        IReadOnlyList<SheetCell>? below = sheet.Rows.FirstOrDefault(row => row[0].Row == header.Row + 1);
        HashSet<int> required = [.. matcher.Required.Select(spec => header.Columns.GetValueOrDefault(spec.Name)?.Index ?? 0)];
        if (below is null || below.Any(cell => cell.Number is not null || cell.Date || required.Contains(cell.Column)))
        {
            return header;
        }

        Dictionary<int, SheetCell> upper = [];
        foreach (SheetCell cell in header.Cells)
        {
            int last = sheet.Layout.LastColumnOf(cell.Row, cell.Column);
            for (int column = cell.Column; column <= Math.Min(last, cell.Column + 50); column++)
            {
                upper.TryAdd(column, cell with { Column = column });
            }
        }

        List<SheetCell> joined = [.. upper.Keys.Union(below.Select(cell => cell.Column)).Order().Select(column =>
        {
            SheetCell? lower = below.FirstOrDefault(cell => cell.Column == column);
            return upper.TryGetValue(column, out SheetCell? top)
                ? lower is null ? top : top with { Text = top.Text + " " + lower.Text }
                : lower! with { Row = header.Row };
        })];
        TableHeader both = matcher.Match(joined);
        return both.Complete && both.Columns.Count > header.Columns.Count ? both with { LastRow = header.Row + 1 } : header;
    }
}
