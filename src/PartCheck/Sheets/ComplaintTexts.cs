using System.Globalization;
using PartCheck.Quantities;

namespace PartCheck.Sheets;

/// <summary>Every sentence that this room says to a person.</summary>
internal static class ComplaintTexts
{
    internal const string WantedWorkbookOrCsv = "a CSV text or an .xlsx workbook";
    internal const string WantedEncoding = "the encoding named with --encoding";
    internal const string WantedUnprotected = "an unprotected .xlsx";

    internal const string LongCell = "The cell holds more than 32 767 characters, more than a spreadsheet takes";
    internal const string FormulaWithoutValue = "The cell holds a formula without a stored result: open the workbook in a spreadsheet program and save it";
    internal const string ErrorCell = "The cell holds an error instead of a value";

    internal static string Missing => "There is no such file.";

    internal static string Folder => "This is a folder; a CSV text or an .xlsx workbook is wanted.";

    internal static string NotOpened(string reason) => $"The file cannot be opened: {reason}";

    internal static string Empty => "The file is empty.";

    internal static string Protected =>
        "The file is password-protected or an old .xls: save it as an unprotected .xlsx.";

    internal static string NotAWorkbook => "The file is not a workbook, or it is damaged: save it again as .xlsx.";

    internal static string Damaged(string reason) => $"The workbook is damaged: {reason}";

    internal static string NoSheets => "The workbook has no sheet with cells.";

    internal static string TooLarge(string what) => $"The file is too large to be read: {what}.";

    internal static string BinaryText => "The file is neither text nor a workbook.";

    internal static string UnknownEncoding(string name) =>
        $"The encoding \"{name}\" is not known; names such as utf-8, windows-1252, windows-1251, shift_jis or macintosh are wanted.";

    internal static string EncodingNotFound(int line, IReadOnlyList<string> candidates) => candidates.Count > 1
        ? $"Line {Whole(line)} is not UTF-8; it may be {string.Join(" or ", candidates)}, and which cannot be told: name it with --encoding."
        : $"Line {Whole(line)} is not UTF-8, and which other encoding it is cannot be told: name it with --encoding.";

    internal static string Mixed(IReadOnlyList<int> lines) =>
        $"Bytes of two encodings stand in this file; in {(lines.Count == 1 ? "line" : "lines")} {Listed([.. lines.Select(Whole)])} they were read as Windows-1252, elsewhere as UTF-8: save it in one encoding.";

    internal static string EncodingDoesNotFit(string name) => $"The text is not {name}: name another encoding with --encoding.";

    internal static string QuoteNotClosed => "A quoted field that begins in this row is never closed: the rows after it cannot be told apart.";

    internal static string TextAfterQuote => "Text follows a closing quote: the fields of this row cannot be told apart.";

    internal static string RecordTooLong => "A row is longer than one million characters: a quote is probably not closed.";

    internal static string NoHeader(string table, IReadOnlyList<string> wanted, int? nearestRow, IReadOnlyList<string> nearest)
    {
        string looked = $"No header row of the table {table} stands in rows 1 to 20: looked for {Listed(wanted)}";
        return nearestRow is { } row
            ? $"{looked}; the nearest, row {Whole(row)}, has {Listed(nearest)}."
            : $"{looked}; those rows are empty.";
    }

    internal static string SecondHeader =>
        "Another header row with other columns stands here: what follows it is not read; put one table in one sheet.";

    internal static string HeaderUnit(string header, string wanted) =>
        $"The header \"{header}\" names a unit of another kind: the unit of {wanted} is wanted; its bare numbers are not read.";

    internal static string Unreadable(QuantityTrouble trouble, string column, string found, string wanted, bool decimalComma) => trouble switch
    {
        QuantityTrouble.WrongUnit => $"\"{found}\" in {column} has a unit of another kind or one that is not known: {wanted} is wanted.",
        QuantityTrouble.OutOfRange => $"\"{found}\" in {column} is too large or too small a number: {wanted} is wanted.",
        QuantityTrouble.DecimalSign when decimalComma =>
            $"\"{found}\" in {column} may be a decimal or a thousands point (this file writes decimals with a comma): {wanted} is wanted.",
        QuantityTrouble.DecimalSign => $"\"{found}\" in {column} has a comma, but this file writes decimals with a point: {wanted} is wanted.",
        _ => $"\"{found}\" in {column} cannot be read: {wanted} is wanted.",
    };

    internal static string ShownUnit(string column, string found, string stored) =>
        $"\"{found}\" in {column} is shown for the stored number {stored}, and which is meant cannot be told: write number and unit as text.";

    internal static string Implausible(string column, string found, string read, string range, bool guess) => guess
        ? $"\"{found}\" in {column} would be {read}, and {range} is wanted: it is most likely in another unit; write the unit with the number."
        : $"\"{found}\" in {column} is {read}, and {range} is wanted.";

    internal static string BareShare(string column, string found) =>
        $"\"{found}\" in {column} may be a share or a percentage: write it with a % sign.";

    internal static string NoSuchTable(string table) =>
        $"\"{table}\" is no table that has header spellings; BOM, Channels, Parts, Pins, Derating or Concessions is wanted.";

    internal static string SpellingIncomplete => "A header spelling needs Table, Column and Spelling.";

    internal static string SpellingTwice(string spelling, string first) =>
        $"The spelling \"{spelling}\" already stands for the column {first}.";

    /// <summary>A range in words, e.g. <c>0 A to 20 A</c>.</summary>
    internal static string Range(QuantityKind kind, double min, double max) => (double.IsFinite(min), double.IsFinite(max)) switch
    {
        (true, true) => $"{EngineeringNotation.FormatAs(kind, min)} to {EngineeringNotation.FormatAs(kind, max)}",
        (true, false) => $"at least {EngineeringNotation.FormatAs(kind, min)}",
        (false, true) => $"at most {EngineeringNotation.FormatAs(kind, max)}",
        _ => "a finite number",
    };

    private static string Listed(IReadOnlyList<string> names) =>
        names.Count <= 8 ? string.Join(", ", names) : string.Join(", ", names.Take(8)) + ", ...";

    private static string Whole(int value) => value.ToString(CultureInfo.InvariantCulture);
}
