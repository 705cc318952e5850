namespace PartCheck.Sheets;

/// <summary>A range of merged cells, one-based, both ends included.</summary>
public readonly record struct MergedRange(int FirstRow, int FirstColumn, int LastRow, int LastColumn);

/// <summary>What a sheet shows otherwise than cell by cell: hidden rows and columns, merged cells, a hidden sheet.</summary>
public sealed class SheetLayout
{
    private readonly Dictionary<int, List<MergedRange>> mergedByColumn = [];

    private SheetLayout(
        bool hidden, IReadOnlySet<int> hiddenRows, IReadOnlyList<(int First, int Last)> hiddenColumns, IReadOnlyList<MergedRange> merged)
    {
        Hidden = hidden;
        HiddenRows = hiddenRows;
        HiddenColumns = hiddenColumns;
        Merged = merged;
        foreach (MergedRange range in merged)
        {
            if (!mergedByColumn.TryGetValue(range.FirstColumn, out List<MergedRange>? ranges))
            {
                mergedByColumn[range.FirstColumn] = ranges = [];
            }

            ranges.Add(range);
        }

        foreach (List<MergedRange> ranges in mergedByColumn.Values)
        {
            ranges.Sort((a, b) => a.FirstRow.CompareTo(b.FirstRow));
        }
    }

    /// <summary>Nothing hidden, nothing merged.</summary>
    public static SheetLayout Plain { get; } = new(false, new HashSet<int>(), [], []);

    /// <summary>True where the sheet itself is hidden.</summary>
    public bool Hidden { get; }

    /// <summary>Hidden rows that have cells.</summary>
    public IReadOnlySet<int> HiddenRows { get; }

    /// <summary>Hidden columns, first and last of each run.</summary>
    public IReadOnlyList<(int First, int Last)> HiddenColumns { get; }

    /// <summary>Merged ranges of more than one cell.</summary>
    public IReadOnlyList<MergedRange> Merged { get; }

    internal static SheetLayout Of(
        bool hidden, IReadOnlySet<int> hiddenRows, IReadOnlyList<(int First, int Last)> hiddenColumns, IReadOnlyList<MergedRange> merged) =>
        !hidden && hiddenRows.Count == 0 && hiddenColumns.Count == 0 && merged.Count == 0 ? Plain : new(hidden, hiddenRows, hiddenColumns, merged);

    /// <summary>True where the column is hidden.</summary>
    public bool HidesColumn(int column) => HiddenColumns.Any(run => column >= run.First && column <= run.Last);

    /// <summary>The row in which a column's cell begins that is merged downwards over this row; null: none, or it begins here.</summary>
    public int? MergedFrom(int row, int column)
    {
        if (!mergedByColumn.TryGetValue(column, out List<MergedRange>? ranges))
        {
            return null;
        }

        int low = 0;
        int high = ranges.Count - 1;
        while (low < high)
        {
            int middle = (low + high + 1) / 2;
            (low, high) = ranges[middle].FirstRow <= row ? (middle, high) : (low, middle - 1);
        }

        MergedRange found = ranges[low];
        return found.FirstRow < row && row <= found.LastRow ? found.FirstRow : null;
    }

    /// <summary>The last column over which a cell is merged sideways; its own column where it is not.</summary>
    internal int LastColumnOf(int row, int column) =>
        mergedByColumn.TryGetValue(column, out List<MergedRange>? ranges)
        && ranges.Find(r => r.FirstRow == row) is { LastColumn: > 0 } range ? range.LastColumn : column;
}
