using System.IO.Compression;
using ClosedXML.Excel;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

public class XlsxReadingTests : SheetsFixture
{
    private static readonly ColumnSpec[] Columns =
    [
        new("Part number", ColumnKind.Text, Required: true),
        new("IC", ColumnKind.Current, 1e-4, 20),
        new("Resistance", ColumnKind.Resistance, 0, 1e9),
        new("Tolerance", ColumnKind.Percent, 0, 0.5),
    ];

    [Fact]
    public void WithoutStylesStringsAndAddressesNothingIsDropped()
    {
        string path = HandMadeWorkbook.Write(At("bare.xlsx"),
            HandMadeWorkbook.Texts("Part number", "IC", "Tolerance") + "<row><c t=\"str\"><v>00123</v></c><c><v>0.2</v></c></row><row r=\"7\"><c r=\"B7\" s=\"9\"><v>1E-1</v></c></row>");
        SheetData sheet = Assert.Single(SheetFile.Read(path, "bare.xlsx", null, Complaints));
        Assert.Equal("Parts", sheet.Sheet);
        Assert.Equal([1, 2, 7], sheet.Rows.Select(row => row[0].Row));
        Assert.Equal("00123", sheet.Rows[1][0].Text);
        Assert.Equal(0.2, sheet.Rows[1][1].Number);
        Assert.Equal(("B7", 0.1), (sheet.Rows[2][0].Address, sheet.Rows[2][0].Number));
        Assert.Empty(Complaints.Items);
    }

    [Fact]
    public void RichTextIsJoinedPhoneticsLeftOutAndEscapesUndone()
    {
        string strings = "<si><r><t>TQ</t></r><r><t>-31</t></r><rPh sb=\"0\" eb=\"1\"><t>kana</t></rPh></si><si><t>a_x000A_b</t></si><si/>";
        string path = HandMadeWorkbook.Write(At("rich.xlsx"),
            "<row r=\"1\"><c r=\"A1\" t=\"s\"><v>0</v></c><c r=\"B1\" t=\"s\"><v>1</v></c><c r=\"C1\" t=\"s\"><v>2</v></c></row>", strings: strings);
        IReadOnlyList<SheetCell> row = Assert.Single(Assert.Single(SheetFile.Read(path, "rich.xlsx", null, Complaints)).Rows);
        Assert.Equal(["TQ-31", "a\nb"], row.Select(cell => cell.Text));
    }

    [Fact]
    public void BooleansErrorsAndFormulaResultsKeepTheirText()
    {
        string path = HandMadeWorkbook.Write(At("kinds.xlsx"),
            "<row r=\"1\"><c r=\"A1\" t=\"b\"><v>1</v></c><c r=\"B1\" t=\"b\"><v>0</v></c><c r=\"C1\" t=\"e\"><v>#N/A</v></c>"
            + "<c r=\"D1\"><f>1+1</f><v>2</v></c><c r=\"E1\" t=\"str\"><f>A2</f><v>4k7</v></c><c r=\"F1\"><v>1E+400</v></c></row>");
        IReadOnlyList<SheetCell> row = Assert.Single(Assert.Single(SheetFile.Read(path, "kinds.xlsx", null, Complaints)).Rows);
        Assert.Equal(["TRUE", "FALSE", "#N/A", "2", "4k7", "1E+400"], row.Select(cell => cell.Text));
        Assert.Equal([null, null, null, 2.0, null, null], row.Select(cell => cell.Number));
    }

    [Fact]
    public void AnErrorCellWhereANumberIsWantedIsAComplaint()
    {
        string path = HandMadeWorkbook.Write(At("error.xlsx"),
            HandMadeWorkbook.Texts("Part number", "IC") + "<row><c t=\"str\"><v>TQ-31</v></c><c t=\"e\"><v>#N/A</v></c></row>");
        Table table = Find(Assert.Single(SheetFile.Read(path, "error.xlsx", null, Complaints)), "Parts", Columns);
        Assert.Null(table.Rows[0].Number("IC"));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal(("#N/A", "a current such as 11 mA", "The cell holds an error instead of a value."), (complaint.Found, complaint.Wanted, complaint.Text));
    }

    [Fact]
    public void NumbersAreShownAsTheirFormatsShowThem()
    {
        using (XLWorkbook book = new())
        {
            IXLWorksheet sheet = book.AddWorksheet("Parts");
            sheet.Cell("A1").SetValue(402).Style.NumberFormat.Format = "0000000000";
            sheet.Cell("B1").SetValue(0.5).Style.NumberFormat.Format = "0%";
            sheet.Cell("C1").SetValue(0.125).Style.NumberFormat.Format = "# ?/?";
            sheet.Cell("D1").SetValue(11).Style.NumberFormat.Format = "0.0 \"mA\"";
            sheet.Cell("E1").SetValue(5).Style.NumberFormat.Format = "0 \"%\"";
            sheet.Cell("F1").SetValue(new DateTime(2024, 6, 19)).Style.NumberFormat.Format = "yyyy-mm-dd";
            book.SaveAs(At("shown.xlsx"));
        }

        IReadOnlyList<SheetCell> row = Assert.Single(Assert.Single(SheetFile.Read(At("shown.xlsx"), "shown.xlsx", null, Complaints)).Rows);
        Assert.Equal(["0000000402", "50%", "1/8", "11.0 mA", "5 %", "2024-06-19"], row.Select(cell => cell.Text));
        Assert.Equal([402, 0.5, 0.125, 11, 5, null], row.Select(cell => cell.Number));
        Assert.Equal([false, true, false, false, false, false], row.Select(cell => cell.Percent));
    }

    // The number stored and the unit shown: 11 shown as "11.0 mA" is 11 mA; 4700 shown as "4.7k" is 4700 ohm either way; 0.4 shown as "0 mA" is 0.4 mA.
    [Theory]
    [InlineData("IC", 11.0, "0.0 \"mA\"", 0.011)]
    [InlineData("IC", 0.4, "0 \"mA\"", 0.0004)]
    [InlineData("IC", 0.2, "0.00", 0.2)]
    [InlineData("Resistance", 4700.0, "0.0,\"k\"", 4700.0)]
    [InlineData("Resistance", 47.0, "0 \"k\u03A9\"", 47000.0)]
    [InlineData("Tolerance", 0.05, "0%", 0.05)]
    [InlineData("Tolerance", 5.0, "0 \"%\"", 0.05)]
    [InlineData("Tolerance", 5.0, "0", 0.05)]
    public void AFormatMayCarryTheUnit(string column, double stored, string format, double si)
    {
        Assert.Equal(si, Stored(column, stored, format).Number(column)!.Value, 1e-15 + (si * 1e-12));
        Assert.Empty(Complaints.Items);
    }

    [Theory]
    [InlineData("IC", 11000.0, "0.0,\"mA\"", "\"11.0mA\" in IC is shown for the stored number 11000, and which is meant cannot be told")]
    [InlineData("IC", 0.05, "0%", "\"5%\" in IC has a unit of another kind")]
    [InlineData("IC", 45462.0, "yyyy-mm-dd", "\"2024-06-19\" in IC cannot be read")]
    [InlineData("IC", 5.0, "0 \"V\"", "\"5 V\" in IC has a unit of another kind")]
    [InlineData("Tolerance", 0.01, "0.00", "\"0.01\" in Tolerance may be a share or a percentage")]
    public void AFormatThatContradictsIsAComplaint(string column, double stored, string format, string text)
    {
        Assert.Null(Stored(column, stored, format).Number(column));
        Assert.StartsWith(text, Assert.Single(Complaints.Items).Text, StringComparison.Ordinal);
    }

    [Fact]
    public void SheetsComeInOrderAndAddressesNameThem()
    {
        using (XLWorkbook book = new())
        {
            book.AddWorksheet("BOM").Cell("B3").SetValue("x");
            book.AddWorksheet("Channels");
            book.AddWorksheet("Parts").Cell("AB7").SetValue("y");
            book.SaveAs(At("board.xlsx"));
        }

        IReadOnlyList<SheetData> sheets = SheetFile.Read(At("board.xlsx"), "board.xlsx", null, Complaints);
        Assert.Equal(["BOM", "Channels", "Parts"], sheets.Select(sheet => sheet.Sheet));
        Assert.Equal("AB7", sheets[2].Rows[0][0].Address);
        Assert.Equal("board.xlsx!Parts!AB7", sheets[2].Cite(7, 28));
    }

    [Theory]
    [InlineData("no sheet", "xl/worksheets/sheet1.xml", null, "The workbook is damaged: it has no part xl/worksheets/sheet1.xml.")]
    [InlineData("no workbook", "_rels/.rels", null, "The file is not a workbook, or it is damaged: save it again as .xlsx.")]
    [InlineData("cut", "xl/worksheets/sheet1.xml", "<worksheet><sheetData><row>", "The file is not a workbook, or it is damaged: save it again as .xlsx.")]
    [InlineData("entity", "xl/worksheets/sheet1.xml", "<!DOCTYPE a [<!ENTITY b \"c\">]><worksheet>&b;</worksheet>", "The file is not a workbook, or it is damaged: save it again as .xlsx.")]
    [InlineData("string", "xl/worksheets/sheet1.xml", "<worksheet><row r=\"1\"><c r=\"A1\" t=\"s\"><v>5</v></c></row></worksheet>", "The workbook is damaged: its cell A1 points at a text that is not there.")]
    [InlineData("row", "xl/worksheets/sheet1.xml", "<worksheet><row r=\"2000000\"><c><v>5</v></c></row></worksheet>", "The workbook is damaged: its row number 2000000 is not one of a sheet.")]
    [InlineData("column", "xl/worksheets/sheet1.xml", "<worksheet><row r=\"1\"><c r=\"ZZZ1\"><v>5</v></c></row></worksheet>", "The workbook is damaged: its column number 18278 is not one of a sheet.")]
    [InlineData("empty", "xl/worksheets/sheet1.xml", "<worksheet/>", "The workbook has no sheet with cells.")]
    public void ASpoiledWorkbookIsOneFatalComplaint(string what, string part, string? content, string text)
    {
        string path = HandMadeWorkbook.Write(At("spoiled.xlsx"), string.Empty, spoil: parts =>
        {
            parts.Remove(part);
            if (content is not null)
            {
                parts[part] = content;
            }
        });
        Assert.Empty(SheetFile.Read(path, "spoiled.xlsx", null, Complaints));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.True(complaint.Text == text, $"{what}: {complaint.Text}");
        Assert.Equal(("spoiled.xlsx", true, false), (complaint.File, complaint.Fatal, complaint.NoInput));
    }

    [Fact]
    public void APartThatUnpacksToHundredsOfMegabytesIsRefusedBySize()
    {
        using (FileStream file = File.Create(At("bomb.xlsx")))
        using (ZipArchive zip = new(file, ZipArchiveMode.Create))
        using (Stream part = zip.CreateEntry("_rels/.rels", CompressionLevel.Fastest).Open())
        {
            byte[] blanks = new byte[1 << 20];
            Array.Fill(blanks, (byte)' ');
            for (int i = 0; i < 257; i++)
            {
                part.Write(blanks);
            }
        }

        Assert.Empty(SheetFile.Read(At("bomb.xlsx"), "bomb.xlsx", null, Complaints));
        Assert.Equal("The workbook is damaged: its parts unpack to more than 256 MiB; part _rels/.rels is too large.", Assert.Single(Complaints.Items).Text);
    }

    [Theory]
    [InlineData("old.xlsx", new byte[] { 0xD0, 0xCF, 0x11, 0xE0, 0xA1, 0xB1, 0x1A, 0xE1, 0, 0 }, "The file is password-protected or an old .xls: save it as an unprotected .xlsx.")]
    [InlineData("garbage.xlsx", new byte[] { 0x50, 0x4B, 3, 4, 9, 9, 9, 9, 9 }, "The file is not a workbook, or it is damaged: save it again as .xlsx.")]
    [InlineData("text.xlsx", new byte[] { 0x61, 0x2C, 0x62 }, "The file is not a workbook, or it is damaged: save it again as .xlsx.")]
    [InlineData("empty.xlsx", new byte[0], "The file is empty.")]
    [InlineData("empty.csv", new byte[0], "The file is empty.")]
    [InlineData("blank.csv", new byte[] { 0x20, 0x0D, 0x0A, 0x09 }, "The file is empty.")]
    [InlineData("picture.csv", new byte[] { 0x89, 0x50, 0, 0, 0, 0x0D, 0x49, 0x48 }, "The file is neither text nor a workbook.")]
    public void WhatIsNoTableIsToldApart(string name, byte[] bytes, string text)
    {
        File.WriteAllBytes(At(name), bytes);
        Assert.Empty(SheetFile.Read(At(name), name, null, Complaints));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal((name, text, true, false), (complaint.File, complaint.Text, complaint.Fatal, complaint.NoInput));
    }

    [Fact]
    public void AMissingFileAndAFolderAreNoInput()
    {
        Assert.Empty(SheetFile.Read(At("nowhere.csv"), "nowhere.csv", null, Complaints));
        Assert.Empty(SheetFile.Read(At("."), "folder", null, Complaints));
        Assert.Equal(
            ["There is no such file.", "This is a folder; a CSV text or an .xlsx workbook is wanted."], Complaints.Items.Select(c => c.Text));
        Assert.All(Complaints.Items, c => Assert.True(c.NoInput && c.Fatal));
    }

    private TableRow Stored(string column, double value, string format)
    {
        using (XLWorkbook book = new())
        {
            IXLWorksheet sheet = book.AddWorksheet("Parts");
            sheet.Cell("A1").SetValue("Part number");
            sheet.Cell("B1").SetValue(column);
            sheet.Cell("A2").SetValue("TQ-31");
            sheet.Cell("B2").SetValue(value).Style.NumberFormat.Format = format;
            book.SaveAs(At("stored.xlsx"));
        }

        return Assert.Single(Find(Assert.Single(SheetFile.Read(At("stored.xlsx"), "stored.xlsx", null, Complaints)), "Parts", Columns).Rows);
    }
}
