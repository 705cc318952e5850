using System.Globalization;
using System.Text;
using System.Xml;

namespace PartCheck.Sheets;

/// <summary>Streams the cells of one worksheet part; empty ones are left out.</summary>
internal static class XlsxCells
{
    private const int LastRow = 1_048_576;
    private const int LastColumn = 16_384;
    private const int MostCells = 8_000_000;

    internal static List<IReadOnlyList<SheetCell>> Read(
        XlsxPackage package, string part, List<string> shared, XlsxStyles styles, ref int cells)
    {
        List<SheetCell> found = [];
        using XmlReader x = package.Open(part);
        int row = 0;
        int column = 0;
        while (x.Read())
        {
            if (x.NodeType != XmlNodeType.Element)
            {
                continue;
            }

            if (x.LocalName == "row")
            {
                row = Within(Whole(x.GetAttribute("r")) ?? (row + 1), LastRow, "row");
                column = 0;
            }
            else if (x.LocalName == "c")
            {
                (int? addressRow, int? addressColumn) = Address(x.GetAttribute("r"));
                column = Within(addressColumn ?? (column + 1), LastColumn, "column");
                row = row == 0 ? 1 : row;
                if (Cell(x, Within(addressRow ?? row, LastRow, "row"), column, shared, styles) is { } cell)
                {
                    found.Add(cell);
                    if (++cells > MostCells)
                    {
                        throw new InvalidDataException("it has more than 8 million cells.");
                    }
                }
            }
        }

        return ByRow(found);
    }

    private static SheetCell? Cell(XmlReader x, int row, int column, List<string> shared, XlsxStyles styles)
    {
        string type = x.GetAttribute("t") ?? "n";
        int? style = Whole(x.GetAttribute("s"));
        if (x.IsEmptyElement)
        {
            return null;
        }

        string? value = null;
        string? inline = null;
        int depth = x.Depth;
        while (x.Read() && x.Depth > depth)
        {
            if (x.NodeType == XmlNodeType.Element && x.LocalName == "is")
            {
                inline = XlsxStrings.Item(x);
            }
            else if (x.NodeType == XmlNodeType.Element && x.LocalName == "v")
            {
                value = ValueText(x);
            }
        }

        string stored = (type == "inlineStr" ? inline ?? value : value ?? inline) ?? string.Empty;
        return type switch
        {
            "s" => OfText(Whole(stored.Trim()) is { } i && i < shared.Count
                ? shared[i]
                : throw new InvalidDataException($"its cell {CellAddress.Of(row, column)} points at a text that is not there.")),
            "inlineStr" => OfText(stored),
            "str" => OfText(XlsxStrings.Unescaped(stored)),
            "b" => OfText(stored.Trim() is "1" or "true" ? "TRUE" : stored.Trim().Length == 0 ? string.Empty : "FALSE"),
            "e" or "d" => OfText(stored),
            _ => styles.NumberCell(row, column, stored.Trim(), style),
        };

        SheetCell? OfText(string text) =>
            text.Trim() is { Length: > 0 } trimmed ? new SheetCell(row, column, trimmed, null, false) : null;
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
                text.Append(x.Value);
            }
        }

        return text.ToString();
    }

    /// <summary>Cells in row and column order; of two cells at one address the later counts.</summary>
    private static List<IReadOnlyList<SheetCell>> ByRow(List<SheetCell> found) =>
        [.. found.GroupBy(cell => cell.Row).OrderBy(group => group.Key).Select(group => (IReadOnlyList<SheetCell>)
            [.. group.GroupBy(cell => cell.Column).OrderBy(same => same.Key).Select(same => same.Last())])];

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
}
