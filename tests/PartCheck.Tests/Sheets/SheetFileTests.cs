using System.Text;
using ClosedXML.Excel;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

public sealed class SheetFileTests : IDisposable
{
    private static readonly ColumnSpec[] Columns =
    [
        new("Part number", ColumnKind.Text, Required: true),
        new("IC", ColumnKind.Current, 1e-4, 20),
        new("VCEO", ColumnKind.Voltage, 1, 2000),
        new("Tolerance", ColumnKind.Percent, 0, 0.5),
        new("Resistance", ColumnKind.Resistance, 0, 1e9),
    ];

    private readonly string folder = Directory.CreateTempSubdirectory("partcheck-sheets-").FullName;
    private readonly ComplaintList complaints = new();

    [Theory]
    [InlineData("utf-8", false)]
    [InlineData("utf-8", true)]
    [InlineData("utf-16", true)]
    [InlineData("utf-16BE", true)]
    public void TextEncodingsAreFoundOut(string name, bool mark)
    {
        Encoding encoding = name == "utf-8" ? new UTF8Encoding(mark) : Encoding.GetEncoding(name);
        byte[] bytes = [.. mark ? encoding.GetPreamble() : [], .. encoding.GetBytes("Part number,Resistance\nRK-1,10k\u03A9\n")];
        TableRow row = Assert.Single(Table(Csv(bytes)).Rows);
        Assert.Equal(10e3, row.Number("Resistance")!.Value, 9);
        Assert.Empty(complaints.Items);
    }

    [Theory]
    [InlineData(",", "0.2")]
    [InlineData(";", "0,2")]
    [InlineData("\t", "0.2")]
    public void SeparatorsAndDecimalSignsAreFoundOut(string separator, string number)
    {
        string text = string.Join(separator, "Part number", "IC", "VCEO") + "\r\n" + string.Join(separator, "TQ-1", number, "45") + "\r\n";
        TableRow row = Assert.Single(Table(Csv(Encoding.UTF8.GetBytes(text))).Rows);
        Assert.Equal(0.2, row.Number("IC")!.Value, 12);
        Assert.Equal(45, row.Number("VCEO")!.Value, 12);
    }

    [Fact]
    public void CarriageReturnsAloneEndLines()
    {
        Assert.Equal(2, Table(Csv("Part number,IC\rTQ-1,0.1\rTQ-2,0.2\r"u8.ToArray())).Rows.Count);
    }

    [Theory]
    [InlineData("IC (mA)")]
    [InlineData("IC [mA]")]
    [InlineData("ic, mA")]
    public void AUnitInTheHeaderHoldsForBareNumbers(string header)
    {
        Table table = Table(Csv(Encoding.UTF8.GetBytes($"Part number;{header}\nTQ-1;200\nTQ-2;0.3 A\n")));
        Assert.Equal(0.2, table.Rows[0].Number("IC")!.Value, 12);
        Assert.Equal(0.3, table.Rows[1].Number("IC")!.Value, 12);
    }

    [Fact]
    public void ABareNumberOutsideThePlausibleRangeIsAComplaintWithItsCell()
    {
        Table table = Table(Csv("Part number,IC\nTQ-1,200\n"u8.ToArray()));
        Assert.Null(table.Rows[0].Number("IC"));
        Complaint c = Assert.Single(complaints.Items);
        Assert.Equal(("table.csv", 2, "IC", "B2", "200"), (c.File, c.Row, c.Column, c.Cell, c.Found));
        Assert.Contains("most likely in another unit", c.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void ABareToleranceBelowFiveHundredthsIsAComplaint()
    {
        Table table = Table(Csv("Part number,Tolerance\nRK-1,0.01\nRK-2,1\nRK-3,0.01%\n"u8.ToArray()));
        Assert.Null(table.Rows[0].Number("Tolerance"));
        Assert.Equal(0.01, table.Rows[1].Number("Tolerance")!.Value, 12);
        Assert.Equal(0.0001, table.Rows[2].Number("Tolerance")!.Value, 12);
        Assert.Single(complaints.Items);
    }

    [Fact]
    public void TitleRowsAboveAndTotalsBelowAreNoData()
    {
        Table table = Table(Csv("Greenhouse lamps\nRevision C\n\nPart number,IC\nTQ-1,0.1\n\nTransistors,\nTQ-2,0.2\nPart number,IC\nTQ-3,0.3\n"u8.ToArray()));
        Assert.Contains("TQ-1", table.Rows.Select(r => r.Text("Part number")));
        Assert.Contains("TQ-3", table.Rows.Select(r => r.Text("Part number")));
        Assert.DoesNotContain("Part number", table.Rows.Select(r => r.Text("Part number")));
        Assert.Equal(4, table.HeaderRow);
    }

    [Fact]
    public void WorkbookCellsKeepTextNumbersAndPercents()
    {
        string path = Path.Combine(folder, "book.xlsx");
        using (XLWorkbook book = new())
        {
            IXLWorksheet sheet = book.AddWorksheet("Parts");
            sheet.Cell("A1").SetValue("Part number");
            sheet.Cell("B1").SetValue("Tolerance");
            sheet.Cell("C1").SetValue("IC (mA)");
            sheet.Cell("A2").SetValue("00123");
            sheet.Cell("B2").SetValue(0.05).Style.NumberFormat.Format = "0%";
            sheet.Cell("C2").SetValue(200);
            book.SaveAs(path);
        }

        SheetData data = Assert.Single(SheetFile.Read(path, "book.xlsx", null, complaints));
        Table table = Table(data);
        TableRow row = Assert.Single(table.Rows);
        Assert.Equal("00123", row.Text("Part number"));
        Assert.Equal(0.05, row.Number("Tolerance")!.Value, 12);
        Assert.Equal(0.2, row.Number("IC")!.Value, 12);
        Assert.Equal("book.xlsx!Parts!C2", row.Number("IC")!.Cell);
        Assert.Empty(complaints.Items);
    }

    [Fact]
    public void ATruncatedWorkbookIsAComplaintAndNoException()
    {
        string path = Path.Combine(folder, "cut.xlsx");
        using (XLWorkbook book = new())
        {
            book.AddWorksheet("Parts").Cell("A1").SetValue("Part number");
            book.SaveAs(path);
        }

        byte[] bytes = File.ReadAllBytes(path);
        for (int length = 8; length < bytes.Length; length += Math.Max(1, bytes.Length / 40))
        {
            File.WriteAllBytes(path, bytes[..length]);
            ComplaintList found = new();
            Assert.Empty(SheetFile.Read(path, "cut.xlsx", null, found));
            Assert.NotEmpty(found.Items);
        }
    }

    public void Dispose() => Directory.Delete(folder, recursive: true);

    private SheetData Csv(byte[] bytes)
    {
        string path = Path.Combine(folder, "table.csv");
        File.WriteAllBytes(path, bytes);
        return Assert.Single(SheetFile.Read(path, "table.csv", null, complaints));
    }

    private Table Table(SheetData sheet)
    {
        Table? table = PartCheck.Sheets.Table.Find(sheet, "Parts", Columns, ColumnSpellings.Load(null, complaints), complaints);
        Assert.NotNull(table);
        return table;
    }
}
