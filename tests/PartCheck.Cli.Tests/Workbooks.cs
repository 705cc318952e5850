using ClosedXML.Excel;

namespace PartCheck.Cli.Tests;

/// <summary>Workbooks made for tests.</summary>
internal static class Workbooks
{
    /// <summary>Writes a workbook whose sheets hold CSV-like texts (no quoting), numbers as numbers.</summary>
    public static string Write(string path, params (string Sheet, string Rows)[] sheets)
    {
        using XLWorkbook book = new();
        foreach ((string name, string rows) in sheets)
        {
            IXLWorksheet sheet = book.AddWorksheet(name);
            int row = 1;
            foreach (string line in rows.Split('\n', StringSplitOptions.RemoveEmptyEntries))
            {
                int column = 1;
                foreach (string cell in line.Split(','))
                {
                    if (double.TryParse(cell, System.Globalization.CultureInfo.InvariantCulture, out double number))
                    {
                        sheet.Cell(row, column).SetValue(number);
                    }
                    else if (cell.Length > 0)
                    {
                        sheet.Cell(row, column).SetValue(cell);
                    }

                    column++;
                }

                row++;
            }
        }

        book.SaveAs(path);
        return path;
    }
}
