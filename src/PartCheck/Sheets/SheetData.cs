namespace PartCheck.Sheets;

/// <summary>One non-empty cell as the file holds it.</summary>
/// <param name="Row">One-based row.</param>
/// <param name="Column">One-based column.</param>
/// <param name="Text">The shown text, trimmed.</param>
/// <param name="Number">The number that a workbook cell stores; null for text cells and for CSV.</param>
/// <param name="Percent">True for a workbook number shown in a percent format.</param>
public sealed record SheetCell(int Row, int Column, string Text, double? Number, bool Percent)
{
    /// <summary>The cell's address, e.g. <c>D7</c>.</summary>
    public string Address => CellAddress.Of(Row, Column);
}

/// <summary>One sheet of a workbook, or one CSV file: its non-empty cells in row order.</summary>
/// <param name="File">The file's name as the user gave it (never an absolute path that the user did not give).</param>
/// <param name="Sheet">The sheet's name; null for CSV.</param>
/// <param name="DecimalComma">True where the file writes decimals with a comma.</param>
/// <param name="Rows">Cells by row, rows without cells left out.</param>
public sealed record SheetData(string File, string? Sheet, bool DecimalComma, IReadOnlyList<IReadOnlyList<SheetCell>> Rows)
{
    /// <summary>File and cell in one text, e.g. <c>parts.csv!K12</c> or <c>bench.xlsx!Parts!K12</c>.</summary>
    public string Cite(int row, int column) =>
        Sheet is null ? $"{File}!{CellAddress.Of(row, column)}" : $"{File}!{Sheet}!{CellAddress.Of(row, column)}";
}

/// <summary>A1-style addresses.</summary>
public static class CellAddress
{
    /// <summary>The address of a one-based row and column.</summary>
    public static string Of(int row, int column)
    {
        string letters = string.Empty;
        for (int c = column; c > 0; c = (c - 1) / 26)
        {
            letters = (char)('A' + ((c - 1) % 26)) + letters;
        }

        return letters + row.ToString(System.Globalization.CultureInfo.InvariantCulture);
    }
}
