using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

/// <summary>The kinds of cells and of workbooks that ECMA-376 part 1 (18.3.1.4, 18.18.11) allows, one each.</summary>
public class XlsxKindsTests : SheetsFixture
{
    private const string Strict = "http://purl.oclc.org/ooxml/spreadsheetml/main";
    private const string Dates = "<cellXfs count=\"4\"><xf numFmtId=\"0\"/><xf numFmtId=\"14\"/><xf numFmtId=\"9\"/><xf numFmtId=\"49\"/></cellXfs>";

    [Theory]
    [InlineData("<c t=\"s\"><v>0</v></c>", "4k7", null)]
    [InlineData("<c t=\"inlineStr\"><is><r><t>4</t></r><r><t>k7</t></r></is></c>", "4k7", null)]
    [InlineData("<c s=\"3\" t=\"s\"><v>1</v></c>", "330", null)]
    [InlineData("<c><v>330</v></c>", "330", 330.0)]
    [InlineData("<c s=\"2\"><v>0.05</v></c>", "5%", 0.05)]
    [InlineData("<c t=\"b\"><v>1</v></c>", "TRUE", null)]
    [InlineData("<c><f>B9*7</f><v>7</v></c>", "7", 7.0)]
    [InlineData("<c t=\"str\"><f>B9</f><v>RK-33</v></c>", "RK-33", null)]
    [InlineData("<c s=\"1\"><v>45352</v></c>", "2024-03-01", null)]
    [InlineData("<c t=\"d\"><v>2024-03-01</v></c>", "2024-03-01", null)]
    public void ACellKeepsWhatItShows(string cell, string text, double? number)
    {
        SheetCell read = Only(cell);
        Assert.Equal((text, number, null), (read.Text, read.Number, read.Trouble));
    }

    // Serial 45352 is 1 March 2024 counted from 1900 (ECMA-376 part 1, 18.17.4.1), 1462 days later counted from 1904.
    [Fact]
    public void DatesMayBeCountedFrom1904()
    {
        SheetCell read = Only("<c s=\"1\"><v>43890</v></c>", parts => parts["xl/workbook.xml"] = parts["xl/workbook.xml"].Replace("<sheets>", "<workbookPr date1904=\"1\"/><sheets>", StringComparison.Ordinal));
        Assert.Equal(("2024-03-01", true), (read.Text, read.Date));
    }

    [Theory]
    [InlineData("<c><f>A1*2</f></c>", "=A1*2")]
    [InlineData("<c><f>A1*2</f><v/></c>", "=A1*2")]
    [InlineData("<c t=\"str\"><f>A1</f></c>", "=A1")]
    [InlineData("<c><f t=\"shared\" si=\"0\"/></c>", "=")]
    public void AFormulaWithoutAStoredResultHasNoValue(string cell, string text)
    {
        SheetCell read = Only(cell);
        Assert.Equal((text, "The cell holds a formula without a stored result: open the workbook in a spreadsheet program and save it"), (read.Text, read.Trouble));
    }

    [Fact]
    public void AFormulaWhoseResultIsTheEmptyTextIsABlankCell() => Assert.Empty(Rows("<c t=\"str\"><f>IF(1,\"\")</f><v></v></c>"));

    [Theory]
    [InlineData("#N/A")]
    [InlineData("#REF!")]
    [InlineData("#DIV/0!")]
    public void AnErrorCellHasNoValue(string error)
    {
        SheetCell read = Only($"<c t=\"e\"><v>{error}</v></c>");
        Assert.Equal((error, "The cell holds an error instead of a value"), (read.Text, read.Trouble));
    }

    [Fact]
    public void AStrictWorkbookIsReadLikeAnyOther()
    {
        SheetCell read = Only("<c t=\"s\"><v>0</v></c>", parts =>
        {
            foreach (string name in parts.Keys.ToList())
            {
                parts[name] = parts[name]
                    .Replace("http://schemas.openxmlformats.org/spreadsheetml/2006/main", Strict, StringComparison.Ordinal)
                    .Replace("http://schemas.openxmlformats.org/officeDocument/2006/relationships", "http://purl.oclc.org/ooxml/officeDocument/relationships", StringComparison.Ordinal);
            }
        });
        Assert.Equal("4k7", read.Text);
    }

    [Fact]
    public void HiddenRowsColumnsAndSheetsAndMergedCellsAreKnown()
    {
        string path = HandMadeWorkbook.Write(
            At("layout.xlsx"), "<row r=\"1\" hidden=\"1\"><c><v>1</v></c></row><row r=\"2\" hidden=\"1\"/><row r=\"3\"><c><v>3</v></c></row>", spoil: parts =>
            {
                parts["xl/worksheets/sheet1.xml"] = parts["xl/worksheets/sheet1.xml"]
                    .Replace("<sheetData>", "<cols><col min=\"2\" max=\"4\" hidden=\"1\"/><col min=\"6\" max=\"6\"/></cols><sheetData>", StringComparison.Ordinal)
                    .Replace("</sheetData>", "</sheetData><mergeCells><mergeCell ref=\"A1:A3\"/></mergeCells>", StringComparison.Ordinal);
                parts["xl/workbook.xml"] = parts["xl/workbook.xml"].Replace("sheetId=\"1\"", "sheetId=\"1\" state=\"veryHidden\"", StringComparison.Ordinal);
            });
        SheetLayout layout = Assert.Single(SheetFile.Read(path, "layout.xlsx", null, Complaints)).Layout;
        Assert.True(layout.Hidden);
        Assert.Equal([1], layout.HiddenRows);
        Assert.Equal([false, true, true, true, false, false], Enumerable.Range(1, 6).Select(layout.HidesColumn));
        Assert.Equal(new MergedRange(1, 1, 3, 1), Assert.Single(layout.Merged));
        Assert.Equal((null, 1, 1, null), (layout.MergedFrom(1, 1), layout.MergedFrom(2, 1), layout.MergedFrom(3, 1), layout.MergedFrom(4, 1)));
    }

    private SheetCell Only(string cell, Action<Dictionary<string, string>>? spoil = null) => Assert.Single(Assert.Single(Rows(cell, spoil)));

    private IReadOnlyList<IReadOnlyList<SheetCell>> Rows(string cell, Action<Dictionary<string, string>>? spoil = null)
    {
        // A second sheet row keeps a blank one from being an empty workbook.
        string path = HandMadeWorkbook.Write(At("kind.xlsx"), $"<row r=\"1\">{cell}</row><row r=\"2\"><c><v>2</v></c></row>", Dates, "<si><t>4k7</t></si><si><t>330</t></si>", spoil);
        return [.. Assert.Single(SheetFile.Read(path, "kind.xlsx", null, Complaints)).Rows.Where(row => row[0].Row == 1)];
    }
}
