namespace PartCheck.Sheets;

/// <summary>One non-empty cell as the file holds it.</summary>
/// <param name="Row">One-based row.</param>
/// <param name="Column">One-based column.</param>
/// <param name="Text">The shown text, trimmed.</param>
/// <param name="Number">The number that a workbook cell stores; null for text cells and for CSV.</param>
/// <param name="Percent">True for a workbook number shown in a percent format.</param>
public sealed record SheetCell(int Row, int Column, string Text, double? Number, bool Percent)
{
    /// <summary>Longest text of a cell [characters]: what spreadsheets take.</summary>
    public const int LongestText = 32_767;

    private const int Kept = 60;

    /// <summary>The cell's address, e.g. <c>D7</c>.</summary>
    public string Address => CellAddress.Of(Row, Column);

    /// <summary>Why the cell has no value that can be read (a formula without a stored result, an error); null: it has one.</summary>
    public string? Trouble { get; init; }

    /// <summary>True for a workbook number shown as a date or a time.</summary>
    public bool Date { get; init; }

    /// <summary>A text cell; null where the text is blank. A text that no spreadsheet takes is cut and cannot be read.</summary>
    internal static SheetCell? OfText(int row, int column, string text)
    {
        string trimmed = text.Trim();
        return trimmed.Length == 0 ? null
            : trimmed.Length <= LongestText ? new SheetCell(row, column, trimmed, null, false)
            : new SheetCell(row, column, trimmed[..Kept] + "...", null, false) { Trouble = ComplaintTexts.LongCell };
    }

    /// <summary>A cell that holds no value, with the reason.</summary>
    internal static SheetCell Without(int row, int column, string shown, string trouble) =>
        new(row, column, shown.Length <= Kept ? shown : shown[..Kept] + "...", null, false) { Trouble = trouble };
}

/// <summary>One sheet of a workbook, or one CSV file: its non-empty cells in row order.</summary>
/// <param name="File">The file's name as the user gave it (never an absolute path that the user did not give).</param>
/// <param name="Sheet">The sheet's name; null for CSV.</param>
/// <param name="DecimalComma">True where the file writes decimals with a comma.</param>
/// <param name="Rows">Cells by row, rows without cells left out.</param>
public sealed record SheetData(string File, string? Sheet, bool DecimalComma, IReadOnlyList<IReadOnlyList<SheetCell>> Rows)
{
    /// <summary>Hidden and merged cells.</summary>
    public SheetLayout Layout { get; init; } = SheetLayout.Plain;

    /// <summary>Name of the text encoding; null for a workbook.</summary>
    public string? Encoding { get; init; }

    /// <summary>What separates the fields: <c>comma</c>, <c>semicolon</c> or <c>tab</c>; null for a workbook.</summary>
    public string? Separator { get; init; }

    /// <summary>Fields of each row of a separated text, blank ones included; null for a workbook.</summary>
    internal IReadOnlyDictionary<int, int>? Fields { get; init; }

    /// <summary>True for the rows below a second header row of a sheet.</summary>
    internal bool IsRest { get; init; }

    /// <summary>File and cell in one text, e.g. <c>parts.csv!K12</c> or <c>bench.xlsx!Parts!K12</c>.</summary>
    public string Cite(int row, int column) =>
        Sheet is null ? $"{File}!{CellAddress.Of(row, column)}" : $"{File}!{Sheet}!{CellAddress.Of(row, column)}";
}

/// <summary>A1-style addresses.</summary>
public static class CellAddress
{
    /// <summary>The address of a one-based row and column.</summary>
    public static string Of(int row, int column) => LettersOf(column) + row.ToString(System.Globalization.CultureInfo.InvariantCulture);

    /// <summary>The letters of a one-based column.</summary>
    public static string LettersOf(int column)
    {
        string letters = string.Empty;
        for (int c = column; c > 0; c = (c - 1) / 26)
        {
            letters = (char)('A' + ((c - 1) % 26)) + letters;
        }

        return letters;
    }
}
