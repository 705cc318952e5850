using System.Globalization;
using System.Xml;
using ExcelNumberFormat;

namespace PartCheck.Sheets;

/// <summary>The number formats of a workbook, and the numbers shown in them.</summary>
internal sealed class XlsxStyles
{
    /// <summary>Formats that have a number and no text in the file (ECMA-376 part 1, 18.8.30).</summary>
    private static readonly Dictionary<int, string> BuiltIn = new()
    {
        [1] = "0",
        [2] = "0.00",
        [3] = "#,##0",
        [4] = "#,##0.00",
        [9] = "0%",
        [10] = "0.00%",
        [11] = "0.00E+00",
        [12] = "# ?/?",
        [13] = "# ??/??",
        [14] = "yyyy-mm-dd",
        [15] = "d-mmm-yy",
        [16] = "d-mmm",
        [17] = "mmm-yy",
        [18] = "h:mm AM/PM",
        [19] = "h:mm:ss AM/PM",
        [20] = "h:mm",
        [21] = "h:mm:ss",
        [22] = "yyyy-mm-dd h:mm",
        [37] = "#,##0;(#,##0)",
        [38] = "#,##0;(#,##0)",
        [39] = "#,##0.00;(#,##0.00)",
        [40] = "#,##0.00;(#,##0.00)",
        [45] = "mm:ss",
        [46] = "[h]:mm:ss",
        [47] = "mm:ss.0",
        [48] = "##0.0E+0",
        [49] = "@",
    };

    private readonly List<Shown> formats = [];
    private readonly bool from1904;

    private XlsxStyles(bool from1904) => this.from1904 = from1904;

    internal static XlsxStyles Read(XlsxPackage package, string? part, bool from1904)
    {
        XlsxStyles styles = new(from1904);
        if (part is null)
        {
            return styles;
        }

        Dictionary<int, string> custom = [];
        Dictionary<int, Shown> known = [];
        bool inCellFormats = false;
        using XmlReader x = package.Open(part);
        while (x.Read())
        {
            if (x.NodeType == XmlNodeType.EndElement)
            {
                inCellFormats = inCellFormats && x.LocalName != "cellXfs";
            }
            else if (x.NodeType == XmlNodeType.Element)
            {
                int? id = int.TryParse(x.GetAttribute("numFmtId"), NumberStyles.None, CultureInfo.InvariantCulture, out int n) ? n : null;
                switch (x.LocalName)
                {
                    case "numFmt" when id is { } own && x.GetAttribute("formatCode") is { } code:
                        custom[own] = code;
                        break;
                    case "cellXfs":
                        inCellFormats = !x.IsEmptyElement;
                        break;
                    case "xf" when inCellFormats:
                        if (!known.TryGetValue(id ?? 0, out Shown shown))
                        {
                            shown = known[id ?? 0] = Shown.Of(custom.GetValueOrDefault(id ?? 0) ?? BuiltIn.GetValueOrDefault(id ?? 0));
                        }

                        styles.formats.Add(shown);
                        break;
                    default:
                        break;
                }
            }
        }

        return styles;
    }

    /// <summary>A number cell: the number stored and the text shown; dates and numbers that a double cannot hold are text only.</summary>
    internal SheetCell? NumberCell(int row, int column, string stored, int? style)
    {
        if (stored.Length == 0)
        {
            return null;
        }

        if (!double.TryParse(stored, NumberStyles.Float, CultureInfo.InvariantCulture, out double value) || !double.IsFinite(value))
        {
            return new SheetCell(row, column, stored, null, false);
        }

        Shown shown = style is { } index && index < formats.Count ? formats[index] : default;
        string text = shown.Format is null ? General(stored, value) : Text(shown, value, stored);
        return new SheetCell(row, column, text, shown.Date ? null : value, shown.Percent) { Date = shown.Date };
    }

    private string Text(Shown shown, double value, string stored)
    {
        try
        {
            object given = shown.Format!.IsDateTimeFormat || !shown.Date ? value : TimeSpan.FromDays(value);
            string text = shown.Format.Format(given, CultureInfo.InvariantCulture, from1904).Trim();
            return text.Length > 0 ? text : General(stored, value);
        }
        catch (Exception e) when (e is FormatException or ArgumentException or OverflowException or InvalidCastException or IndexOutOfRangeException)
        {
            return General(stored, value);
        }
    }

    /// <summary>Without a format: whole numbers digit by digit as stored, others to 15 significant digits.</summary>
    private static string General(string stored, double value) =>
        stored.All(char.IsAsciiDigit) ? stored : value.ToString("G15", CultureInfo.InvariantCulture);

    private readonly record struct Shown(NumberFormat? Format, bool Percent, bool Date)
    {
        internal static Shown Of(string? code)
        {
            if (string.IsNullOrEmpty(code) || code.Equals("General", StringComparison.OrdinalIgnoreCase) || code == "@" || code.Length > 255)
            {
                return default;
            }

            NumberFormat format = new(code);
            return format.IsValid
                ? new Shown(format, HasPercent(code), format.IsDateTimeFormat || format.IsTimeSpanFormat)
                : default;
        }

        /// <summary>A percent sign outside of quotes and not escaped.</summary>
        private static bool HasPercent(string code)
        {
            bool quoted = false;
            for (int i = 0; i < code.Length; i++)
            {
                switch (code[i])
                {
                    case '"':
                        quoted = !quoted;
                        break;
                    case '\\' when !quoted:
                        i++;
                        break;
                    case '%' when !quoted:
                        return true;
                    default:
                        break;
                }
            }

            return false;
        }
    }
}
