using System.Globalization;
using ClosedXML.Excel;
using PartCheck.Sheets;

namespace PartCheck.Reports;

/// <summary>
/// A workbook to start from: every sheet of a board with headed columns, units, a comment that explains each column, lists where only
/// certain words are read, and one whole example channel. What it holds stands in <c>partdata/template</c>.
/// </summary>
public static class TemplateWorkbook
{
    private const string Folder = "partdata/template/";
    private const int RowsWithLists = 500;
    private const int LeastWidth = 9;
    private const int MostWidth = 40;
    private const int MostColumnsOfAPage = 15;

    private static readonly DateTime Made = new(2000, 1, 1, 0, 0, 0, DateTimeKind.Utc);

    /// <summary>Writes the workbook.</summary>
    /// <returns>The bytes of an .xlsx file.</returns>
    public static byte[] Write()
    {
        using XLWorkbook book = new();
        book.Properties.Author = "PartCheck";
        book.Properties.Created = Made;
        book.Properties.Modified = Made;
        foreach (IGrouping<string, Column> table in Explained().GroupBy(c => c.Table))
        {
            Fill(book.AddWorksheet(table.Key), [.. table], Rows(table.Key.ToLowerInvariant() + ".csv"));
        }

        using MemoryStream bytes = new();
        book.SaveAs(bytes);
        return bytes.ToArray();
    }

    private static void Fill(IXLWorksheet sheet, List<Column> columns, List<Dictionary<string, string>> rows)
    {
        for (int c = 0; c < columns.Count; c++)
        {
            Column column = columns[c];
            IXLCell header = sheet.Cell(1, c + 1);
            header.SetValue(column.Header);
            header.Style.Font.Bold = true;
            header.Style.Alignment.WrapText = true;
            header.Style.Alignment.Vertical = XLAlignmentVerticalValues.Top;
            header.Style.Fill.BackgroundColor = XLColor.FromArgb(0xE8, 0xEE, 0xF4);
            header.Comment.AddText(column.Explanation);
            header.Comment.Style.Size.SetAutomaticSize();
            int width = column.Header.Length;
            for (int r = 0; r < rows.Count; r++)
            {
                if (!ValueOf(rows[r], column, out string value))
                {
                    continue;
                }

                IXLCell cell = sheet.Cell(r + 2, c + 1);
                cell.Style.Alignment.Horizontal = XLAlignmentHorizontalValues.Left;
                cell.Style.Alignment.Vertical = XLAlignmentVerticalValues.Top;
                cell.Style.Alignment.WrapText = value.Length > MostWidth;
                if (column.Unit.Length > 0 && double.TryParse(value, NumberStyles.Float, CultureInfo.InvariantCulture, out double number))
                {
                    cell.SetValue(number);
                }
                else
                {
                    cell.Style.NumberFormat.Format = "@";
                    cell.SetValue(value);
                }

                width = Math.Max(width, Math.Min(value.Length, MostWidth));
            }

            sheet.Column(c + 1).Width = Math.Max(LeastWidth, width + 2);
            if (column.Choices.Length > 0)
            {
                IXLDataValidation list = sheet.Range(2, c + 1, RowsWithLists, c + 1).SetDataValidation();
                list.List($"\"{column.Choices}\"", true);
                list.IgnoreBlanks = true;
                list.ErrorTitle = column.Name;
                list.ErrorMessage = "One of: " + column.Choices.Replace(",", ", ", StringComparison.Ordinal);
            }
        }

        // A wide sheet is printed over several pages, each with the name of the row.
        sheet.SheetView.Freeze(1, 1);
        sheet.PageSetup.PageOrientation = XLPageOrientation.Landscape;
        sheet.PageSetup.PaperSize = XLPaperSize.A4Paper;

        // The name by which a workbook keeps its print titles. PageSetup writes it without dollar signs, which programs do not follow.
        sheet.NamedRanges.Add("_xlnm.Print_Titles", $"{sheet.Name}!$A:$A,{sheet.Name}!$1:$1");
        if (columns.Count <= MostColumnsOfAPage)
        {
            sheet.PageSetup.FitToPages(1, 0);
        }
    }

    /// <summary>The example's value of a column, whatever unit its file uses: the header of the file goes before the template's.</summary>
    private static bool ValueOf(Dictionary<string, string> row, Column column, out string value) =>
        row.TryGetValue(column.Header, out value!) || row.TryGetValue(column.Name, out value!);

    private static List<Dictionary<string, string>> Rows(string file)
    {
        IReadOnlyList<IReadOnlyList<SheetCell>> rows = Embedded(file).Rows;
        Dictionary<int, string> headers = rows[0].ToDictionary(cell => cell.Column, cell => cell.Text);
        return [.. rows.Skip(1).Select(row => row.ToDictionary(cell => headers[cell.Column], cell => cell.Text, StringComparer.Ordinal))];
    }

    private static List<Column> Explained() =>
        [.. Embedded("explained.csv").Rows.Skip(1).Select(row =>
        {
            string At(int column) => row.FirstOrDefault(cell => cell.Column == column)?.Text ?? string.Empty;
            return new Column(At(1), At(2), At(3), At(4), At(5));
        })];

    private static SheetData Embedded(string file)
    {
        ComplaintList complaints = new();
        return SheetFile.Embedded(Folder + file, complaints) is { } sheet && complaints.Items.Count == 0
            ? sheet
            : throw new InvalidOperationException($"The library's {Folder}{file} cannot be read.");
    }

    private sealed record Column(string Table, string Name, string Unit, string Choices, string Explanation)
    {
        public string Header => Unit is "" or "-" ? Name : $"{Name} [{Unit}]";
    }
}
