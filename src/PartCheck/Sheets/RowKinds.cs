using System.Text.RegularExpressions;

namespace PartCheck.Sheets;

/// <summary>What a row below the header is.</summary>
internal enum RowKind
{
    /// <summary>Data.</summary>
    Data,

    /// <summary>Blank in every known column.</summary>
    Unknown,

    /// <summary>A section title.</summary>
    Section,

    /// <summary>Totals.</summary>
    Total,

    /// <summary>A sign-off or a note about the file.</summary>
    SignOff,

    /// <summary>The header once more.</summary>
    RepeatedHeader,

    /// <summary>The header of another table.</summary>
    OtherHeader,
}

/// <summary>
/// Tells data rows from what stands between and below them. When in doubt a row is data: a row that is read wrongly makes a complaint,
/// a row that is left out makes none.
/// </summary>
internal sealed partial class RowKinds
{
    private readonly TableHeader header;
    private readonly HeaderMatcher matcher;
    private readonly SheetLayout layout;
    private readonly HashSet<int> known;
    private readonly HashSet<int> requiredColumns;
    private readonly bool partNumbers;
    private readonly bool bill;

    internal RowKinds(TableHeader header, HeaderMatcher matcher, string tableName, SheetLayout layout)
    {
        this.layout = layout;
        this.header = header;
        this.matcher = matcher;
        known = [.. header.Columns.Values.Select(column => column.Index)];
        requiredColumns = [.. matcher.Required.Select(spec => header.Columns[spec.Name].Index)];
        bill = tableName.Equals("BOM", StringComparison.OrdinalIgnoreCase);
        partNumbers = bill || tableName.Equals("Parts", StringComparison.OrdinalIgnoreCase);
    }

    internal RowKind Of(IReadOnlyList<SheetCell> row)
    {
        if (IsHeader(row, out bool same))
        {
            return same ? RowKind.RepeatedHeader : RowKind.OtherHeader;
        }

        return IsTotal(row) ? RowKind.Total
            : IsSignOff(row) ? RowKind.SignOff
            : IsSection(row) ? RowKind.Section
            : !row.Any(cell => known.Contains(cell.Column)) ? RowKind.Unknown
            : RowKind.Data;
    }

    /// <summary>The row names columns again: all the required ones and at least two, or every known column that it fills.</summary>
    private bool IsHeader(IReadOnlyList<SheetCell> row, out bool same)
    {
        same = false;
        if (!matcher.MayBeHeader(row))
        {
            return false;
        }

        TableHeader again = matcher.Match(row);
        same = again.Columns.All(pair => header.Columns.TryGetValue(pair.Key, out TableColumn? column) && column.Index == pair.Value.Index);
        return again.Complete && again.Columns.Count >= Math.Min(2, header.Columns.Count);
    }

    /// <summary>
    /// One text alone in its row, no required column filled by it. In bills and part tables also a text without a digit, since
    /// references and part numbers have digits.
    /// </summary>
    private bool IsSection(IReadOnlyList<SheetCell> row)
    {
        if (row is not [{ Number: null } only] || requiredColumns.Any(column => layout.MergedFrom(only.Row, column) is not null))
        {
            return false;
        }

        bool fillsRequired = requiredColumns.Contains(only.Column);
        return (!fillsRequired && requiredColumns.Count > 0)
            || (partNumbers && requiredColumns.Count + (bill ? 1 : 0) > 1 && !only.Text.Any(char.IsAsciiDigit));
    }

    /// <summary>A first text such as "Total", with no other required column filled.</summary>
    private bool IsTotal(IReadOnlyList<SheetCell> row) =>
        Total().IsMatch(row[0].Text) && !row.Skip(1).Any(cell => requiredColumns.Contains(cell.Column));

    /// <summary>
    /// In bills, a first text such as "Approved by:" in place of references; and a text that ends in a colon, with a text beside it,
    /// since no reference does.
    /// </summary>
    private bool IsSignOff(IReadOnlyList<SheetCell> row) =>
        bill && row.Count <= 3
        && (SignOff().IsMatch(row[0].Text)
            || (row[0].Text.EndsWith(':') && !row.Skip(1).Any(cell => requiredColumns.Contains(cell.Column))));

    [GeneratedRegex(@"^(?:(?:grand|sub)[\s-]?)?(?:totals?|sum)\b(?!\s*[0-9])", RegexOptions.CultureInvariant | RegexOptions.IgnoreCase)]
    private static partial Regex Total();

    [GeneratedRegex(@"^(?:(?:prepared|approved|checked|reviewed|released|drawn|designed|signed)(?:\s+(?:by|on))?|date|signature|revision|notes?|remarks?)\s*(?::.*)?$", RegexOptions.CultureInvariant | RegexOptions.IgnoreCase)]
    private static partial Regex SignOff();
}
