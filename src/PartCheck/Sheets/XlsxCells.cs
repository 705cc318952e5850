using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using System.Xml;

namespace PartCheck.Sheets;

/// <summary>Streams the cells of one worksheet part; empty ones are left out.</summary>
internal sealed partial class XlsxCells
{
    private const int LastRow = 1_048_576;
    private const int LastColumn = 16_384;
    private const int MostCells = 2_000_000;
    private const int MostRanges = 100_000;

    /// <summary>Characters of all cells of a workbook, a shared text counted in every cell: 2 million cells of 64.</summary>
    private const long MostCharacters = 128L << 20;

    private readonly List<string> shared;
    private readonly XlsxStyles styles;
    private readonly List<SheetCell> found = [];
    private readonly HashSet<int> hiddenRows = [];
    private readonly List<(int First, int Last)> hiddenColumns = [];
    private readonly List<MergedRange> merged = [];
    private bool inOrder = true;
    private long characters;

    private XlsxCells(List<string> shared, XlsxStyles styles) => (this.shared, this.styles) = (shared, styles);

    /// <summary>Reads one worksheet.</summary>
    /// <param name="package">The package.</param>
    /// <param name="part">The worksheet's part.</param>
    /// <param name="hidden">True where the workbook hides the sheet.</param>
    /// <param name="shared">The shared strings.</param>
    /// <param name="styles">The styles.</param>
    /// <param name="cells">Cells of the workbook read so far.</param>
    /// <param name="characters">Characters of those cells.</param>
    internal static (List<IReadOnlyList<SheetCell>> Rows, SheetLayout Layout) Read(
        XlsxPackage package, string part, bool hidden, List<string> shared, XlsxStyles styles, ref int cells, ref long characters)
    {
        XlsxCells sheet = new(shared, styles) { characters = characters };
        using XmlReader x = package.Open(part);
        sheet.Read(x, ref cells);
        characters = sheet.characters;
        List<IReadOnlyList<SheetCell>> rows = sheet.ByRow();
        sheet.hiddenRows.IntersectWith(rows.Select(row => row[0].Row));
        return (rows, SheetLayout.Of(hidden, sheet.hiddenRows, sheet.hiddenColumns, sheet.merged));
    }

    private void Read(XmlReader x, ref int cells)
    {
        int row = 0;
        int column = 0;
        while (x.Read())
        {
            if (x.NodeType != XmlNodeType.Element)
            {
                continue;
            }

            switch (x.LocalName)
            {
                case "row":
                    row = Within(Whole(x.GetAttribute("r")) ?? (row + 1), LastRow, "row");
                    column = 0;
                    if (IsTrue(x.GetAttribute("hidden")))
                    {
                        hiddenRows.Add(row);
                    }

                    break;
                case "c":
                    (int? addressRow, int? addressColumn) = Address(x.GetAttribute("r"));
                    column = Within(addressColumn ?? (column + 1), LastColumn, "column");
                    row = row == 0 ? 1 : row;
                    if (Cell(x, Within(addressRow ?? row, LastRow, "row"), column) is { } cell)
                    {
                        Add(cell);
                        if (++cells > MostCells)
                        {
                            throw new InvalidDataException("it has more than 2 million cells.");
                        }
                    }

                    break;
                case "col" when IsTrue(x.GetAttribute("hidden")):
                    int first = Within(Whole(x.GetAttribute("min")) ?? 1, LastColumn, "column");
                    hiddenColumns.Add((first, Within(Whole(x.GetAttribute("max")) ?? first, LastColumn, "column")));
                    Few(hiddenColumns.Count, "hidden columns");
                    break;
                case "mergeCell" when Range(x.GetAttribute("ref")) is { } range:
                    merged.Add(range);
                    Few(merged.Count, "merged cells");
                    break;
                default:
                    break;
            }
        }
    }

    private void Add(SheetCell cell)
    {
        characters += cell.Text.Length;
        if (characters > MostCharacters)
        {
            throw new InvalidDataException("its cells hold more than 128 million characters.");
        }

        inOrder = inOrder && (found.Count == 0 || (found[^1].Row, found[^1].Column).CompareTo((cell.Row, cell.Column)) < 0);
        found.Add(cell);
    }

    private SheetCell? Cell(XmlReader x, int row, int column)
    {
        string type = x.GetAttribute("t") ?? "n";
        int? style = Whole(x.GetAttribute("s"));
        if (x.IsEmptyElement)
        {
            return null;
        }

        string? value = null;
        string? inline = null;
        string? formula = null;
        int depth = x.Depth;
        while (x.Read() && x.Depth > depth)
        {
            if (x.NodeType != XmlNodeType.Element)
            {
                continue;
            }

            switch (x.LocalName)
            {
                case "is":
                    inline = XlsxStrings.Item(x);
                    break;
                case "v":
                    value = ValueText(x);
                    break;
                case "f":
                    formula = "=" + ValueText(x);
                    break;
                default:
                    break;
            }
        }

        // A formula whose result is the empty text stores one (t="str"); a formula that was never worked out stores nothing.
        if (formula is not null && inline is null && string.IsNullOrWhiteSpace(value) && (value is null || type != "str"))
        {
            return SheetCell.Without(row, column, formula, ComplaintTexts.FormulaWithoutValue);
        }

        string stored = (type == "inlineStr" ? inline ?? value : value ?? inline) ?? string.Empty;
        return type switch
        {
            "s" when stored.Trim().Length == 0 => null,
            "s" => SheetCell.OfText(row, column, Whole(stored.Trim()) is { } i && i < shared.Count
                ? shared[i]
                : throw new InvalidDataException($"its cell {CellAddress.Of(row, column)} points at a text that is not there.")),
            "inlineStr" => SheetCell.OfText(row, column, stored),
            "str" => SheetCell.OfText(row, column, XlsxStrings.Unescaped(stored)),
            "b" => SheetCell.OfText(row, column, stored.Trim() is "1" or "true" ? "TRUE" : stored.Trim().Length == 0 ? string.Empty : "FALSE"),
            "e" when stored.Trim().Length > 0 => SheetCell.Without(row, column, stored.Trim(), ComplaintTexts.ErrorCell),
            "d" => SheetCell.OfText(row, column, stored) is { } day ? day with { Date = true } : null,
            _ => styles.NumberCell(row, column, stored.Trim(), style),
        };
    }

    /// <summary>The text inside the element at which the reader stands.</summary>
    private static string ValueText(XmlReader x)
    {
        if (x.IsEmptyElement)
        {
            return string.Empty;
        }

        StringBuilder text = new();
        int depth = x.Depth;
        while (x.Read() && x.Depth > depth)
        {
            if (x.NodeType is XmlNodeType.Text or XmlNodeType.CDATA or XmlNodeType.Whitespace or XmlNodeType.SignificantWhitespace)
            {
                XlsxStrings.Append(text, x);
            }
        }

        return text.ToString();
    }

    /// <summary>Cells in row and column order; of two cells at one address the later counts.</summary>
    private List<IReadOnlyList<SheetCell>> ByRow()
    {
        if (!inOrder)
        {
            return [.. found.GroupBy(cell => cell.Row).OrderBy(group => group.Key).Select(group => (IReadOnlyList<SheetCell>)
                [.. group.GroupBy(cell => cell.Column).OrderBy(same => same.Key).Select(same => same.Last())])];
        }

        List<IReadOnlyList<SheetCell>> rows = [];
        for (int start = 0; start < found.Count;)
        {
            int end = start + 1;
            while (end < found.Count && found[end].Row == found[start].Row)
            {
                end++;
            }

            rows.Add(found.GetRange(start, end - start));
            start = end;
        }

        return rows;
    }

    private static MergedRange? Range(string? text)
    {
        if (text is null || TwoAddresses().Match(text) is not { Success: true } match)
        {
            return null;
        }

        (int? row, int? column) = Address(match.Groups[1].Value);
        (int? lastRow, int? lastColumn) = Address(match.Groups[2].Value);
        return row is null || column is null || lastRow is null || lastColumn is null || lastRow < row || lastColumn < column
            ? null
            : new MergedRange(row.Value, column.Value, Math.Min(lastRow.Value, LastRow), Math.Min(lastColumn.Value, LastColumn));
    }

    private static void Few(int count, string what)
    {
        if (count > MostRanges)
        {
            throw new InvalidDataException($"it has more than 100 000 {what}.");
        }
    }

    private static bool IsTrue(string? text) => text is "1" or "true";

    private static int? Whole(string? text) =>
        int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out int value) ? value : null;

    private static int Within(int value, int last, string what) =>
        value >= 1 && value <= last ? value : throw new InvalidDataException($"its {what} number {value.ToString(CultureInfo.InvariantCulture)} is not one of a sheet.");

    private static (int? Row, int? Column) Address(string? address)
    {
        int column = 0;
        int i = 0;
        for (; address is not null && i < address.Length && i < 4 && char.IsAsciiLetter(address[i]); i++)
        {
            column = (column * 26) + char.ToUpperInvariant(address[i]) - 'A' + 1;
        }

        return column == 0 ? (null, null) : (Whole(address![i..]), column);
    }

    [GeneratedRegex(@"^([A-Za-z]{1,3}[0-9]{1,7}):([A-Za-z]{1,3}[0-9]{1,7})$", RegexOptions.CultureInvariant)]
    private static partial Regex TwoAddresses();
}
