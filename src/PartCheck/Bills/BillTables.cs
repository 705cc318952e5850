using System.Globalization;
using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>How a table of a bill was read, in words.</summary>
internal static class BillTables
{
    private const int Named = 12;

    /// <summary>The description of a table.</summary>
    /// <param name="table">The table.</param>
    /// <param name="first">True for the first of its sheet.</param>
    /// <param name="lines">The lines read.</param>
    internal static BillTable Of(Table table, bool first, IReadOnlyList<BillLine> lines)
    {
        SheetData sheet = table.Sheet;
        return new BillTable
        {
            Sheet = sheet.Sheet,
            HeaderRow = table.HeaderRow,
            Encoding = sheet.Encoding,
            Separator = sheet.Separator,
            DecimalComma = sheet.DecimalComma,
            Columns = [.. table.Columns.Select(c => new BillColumn(c.Name, c.Header, CellAddress.LettersOf(c.Index)))],
            Skipped = [.. table.Skipped.OrderBy(s => s.Row)],
            Notes = [.. Notes(table, first, lines)],
        };
    }

    private static IEnumerable<string> Notes(Table table, bool first, IReadOnlyList<BillLine> lines)
    {
        SheetLayout layout = table.Sheet.Layout;
        if (!table.Has("Quantity"))
        {
            yield return "There is no quantity column: references are counted.";
        }

        if (!table.Has("Part number"))
        {
            yield return "There is no part number column.";
        }

        if (!first)
        {
            yield break;
        }

        if (layout.Hidden)
        {
            yield return "The sheet is hidden in the workbook; it is read.";
        }

        List<int> hidden = [.. lines.Select(l => l.Row).Where(layout.HiddenRows.Contains).Order()];
        if (hidden.Count > 0)
        {
            yield return (hidden.Count == 1 ? "Row " : "Rows ") + Listed(hidden) + (hidden.Count == 1 ? " is" : " are") + " hidden in the workbook and read like the others.";
        }

        List<string> columns = [.. table.Columns.Where(c => layout.HidesColumn(c.Index)).Select(c => CellAddress.LettersOf(c.Index))];
        if (columns.Count > 0)
        {
            yield return (columns.Count == 1 ? "Column " : "Columns ") + string.Join(", ", columns) + (columns.Count == 1 ? " is" : " are") + " hidden in the workbook and read like the others.";
        }

        int merged = layout.Merged.Count(m => m.LastRow > m.FirstRow && m.FirstRow > table.HeaderRow && table.Columns.Any(c => c.Index == m.FirstColumn));
        if (merged > 0)
        {
            yield return $"{merged.ToString(CultureInfo.InvariantCulture)} merged {(merged == 1 ? "cell covers" : "cells cover")} several rows: each of those rows reads its text.";
        }
    }

    private static string Listed(List<int> rows) =>
        string.Join(", ", rows.Take(Named).Select(r => r.ToString(CultureInfo.InvariantCulture))) + (rows.Count > Named ? ", ..." : string.Empty);
}
