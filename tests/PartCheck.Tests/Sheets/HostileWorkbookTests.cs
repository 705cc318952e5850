using System.IO.Compression;
using System.Text;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

/// <summary>Files made to harm: each is refused by a limit and a plain sentence, and nothing outside it is touched.</summary>
public class HostileWorkbookTests : SheetsFixture
{
    private const string Damaged = "The file is not a workbook, or it is damaged: save it again as .xlsx.";

    // Entities that swell, entities that fetch a file, a document type that names another host: no document type is read at all.
    [Theory]
    [InlineData("<!DOCTYPE x [<!ENTITY a \"aaaaaaaaaa\"><!ENTITY b \"&a;&a;&a;&a;&a;&a;&a;&a;\">]><worksheet>&b;</worksheet>")]
    [InlineData("<!DOCTYPE x [<!ENTITY a SYSTEM \"file:///etc/hostname\">]><worksheet>&a;</worksheet>")]
    [InlineData("<!DOCTYPE x SYSTEM \"http://127.0.0.1:9/x.dtd\"><worksheet/>")]
    public void DocumentTypesAreRefused(string sheet) =>
        Assert.Equal(Damaged, Refusal(HandMadeWorkbook.Write(At("x.xlsx"), string.Empty, spoil: parts => parts["xl/worksheets/sheet1.xml"] = sheet)));

    [Theory]
    [InlineData("../../../../../../etc/hostname")]
    [InlineData("..\\..\\secret.xml")]
    [InlineData("/etc/hostname")]
    public void APathOutOfThePackageLeadsNowhere(string target)
    {
        string path = HandMadeWorkbook.Write(At("path.xlsx"), string.Empty, spoil: parts =>
            parts["xl/_rels/workbook.xml.rels"] = parts["xl/_rels/workbook.xml.rels"].Replace("worksheets/sheet1.xml", target, StringComparison.Ordinal));
        Assert.StartsWith("The workbook is damaged: it has no part", Refusal(path), StringComparison.Ordinal);
    }

    [Fact]
    public void AnExternalLinkIsNotFollowed()
    {
        string path = HandMadeWorkbook.Write(At("link.xlsx"), string.Empty, spoil: parts =>
            parts["xl/_rels/workbook.xml.rels"] = parts["xl/_rels/workbook.xml.rels"].Replace("Target=\"worksheets/sheet1.xml\"", "Target=\"http://127.0.0.1:9/x.xml\" TargetMode=\"External\"", StringComparison.Ordinal));
        Assert.Equal("The workbook is damaged: its sheet Parts has no part.", Refusal(path));
    }

    [Fact]
    public void AllPartsTogetherHaveOneLimit()
    {
        // Three parts of 100 MiB each: none is over the limit alone.
        string path = At("many.xlsx");
        HandMadeWorkbook.Write(path, HandMadeWorkbook.Texts("a"), styles: string.Empty, strings: string.Empty);
        using (ZipArchive zip = new(File.Open(path, FileMode.Open), ZipArchiveMode.Update))
        {
            foreach (string name in (string[])["xl/styles.xml", "xl/sharedStrings.xml", "xl/worksheets/sheet1.xml"])
            {
                zip.GetEntry(name)!.Delete();
                using Stream part = zip.CreateEntry(name, CompressionLevel.Fastest).Open();
                part.Write("<x>"u8);
                byte[] blanks = new byte[1 << 20];
                Array.Fill(blanks, (byte)' ');
                "<y/>"u8.CopyTo(blanks);
                for (int i = 0; i < 100; i++)
                {
                    part.Write(blanks);
                }

                part.Write("</x>"u8);
            }
        }

        Assert.Equal("The workbook is damaged: its parts unpack to more than 256 MiB; part xl/worksheets/sheet1.xml is too large.", Refusal(path));
    }

    [Fact]
    public void EmptyStyledCellsAreReadPastAndNotHeld()
    {
        StringBuilder rows = new("<row r=\"1\"><c r=\"A1\" t=\"inlineStr\"><is><t>Ref</t></is></c></row>");
        for (int i = 2; i < 2002; i++)
        {
            rows.Append("<row r=\"").Append(i).Append("\">").Insert(rows.Length, "<c s=\"1\"/>", 500).Append("</row>");
        }

        SheetData sheet = Assert.Single(SheetFile.Read(HandMadeWorkbook.Write(At("empty.xlsx"), rows.ToString()), "empty.xlsx", null, Complaints));
        Assert.Equal("A1", Assert.Single(Assert.Single(sheet.Rows)).Address);
    }

    [Fact]
    public void AFarOffCellIsOneCell()
    {
        string path = HandMadeWorkbook.Write(At("far.xlsx"), "<row r=\"1\"><c r=\"A1\" t=\"inlineStr\"><is><t>Ref</t></is></c></row><row r=\"1048576\"><c r=\"XFD1048576\"><v>1</v></c></row>");
        SheetData sheet = Assert.Single(SheetFile.Read(path, "far.xlsx", null, Complaints));
        Assert.Equal("XFD1048576", sheet.Rows[1][0].Address);
        Assert.Equal(2, sheet.Rows.Count);
    }

    [Theory]
    [InlineData("99999")]
    [InlineData("-1")]
    [InlineData("x")]
    public void ASharedTextThatIsNotThereIsNamedWithItsCell(string index) =>
        Assert.Equal(
            "The workbook is damaged: its cell B3 points at a text that is not there.",
            Refusal(HandMadeWorkbook.Write(At("shared.xlsx"), $"<row r=\"3\"><c r=\"B3\" t=\"s\"><v>{index}</v></c></row>", strings: "<si><t>a</t></si>")));

    [Fact]
    public void AGiantCellIsAComplaintWhereItCounts()
    {
        string path = HandMadeWorkbook.Write(At("giant.xlsx"), HandMadeWorkbook.Texts("Part number", "IC") + HandMadeWorkbook.Texts(new string('x', 40_000), "11 mA"));
        Table table = Find(Assert.Single(SheetFile.Read(path, "giant.xlsx", null, Complaints)), "Parts", new ColumnSpec("Part number", ColumnKind.Text, Required: true));
        Assert.Null(Assert.Single(table.Rows).Text("Part number"));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal("The cell holds more than 32 767 characters, more than a spreadsheet takes.", complaint.Text);
        Assert.True(complaint.Found!.Length < 100);
    }

    // A million is far over the 32 767 of a cell; each would be held whole by an XML reader, some in two copies.
    [Theory]
    [InlineData("<row><c t=\"inlineStr\"><is><t>", "x", "</t></is></c></row>")]
    [InlineData("<row><c t=\"inlineStr\"><is><t><![CDATA[", "<", "]]></t></is></c></row>")]
    [InlineData("<row><c t=\"inlineStr\"><is>", "<t>xx</t>", "</is></c></row>")]
    [InlineData("<row><c t=\"str\"><v><![CDATA[", "<", "]]></v></c></row>")]
    [InlineData("<row a=\"", "x", "\"/>")]
    [InlineData("<", "x", "/>")]
    public void ATextOrTagOfMoreThanAMillionCharactersIsRefused(string before, string piece, string after)
    {
        string path = HandMadeWorkbook.Write(At("long.xlsx"), before + string.Concat(Enumerable.Repeat(piece, 1_100_000)) + after);
        Assert.Equal("The workbook is damaged: it has a tag or a text of more than one million characters.", Refusal(path));
    }

    [Fact]
    public void OneSheetListedOverAThousandTimesIsRefused()
    {
        string path = HandMadeWorkbook.Write(At("sheets.xlsx"), HandMadeWorkbook.Texts("a"), spoil: parts =>
        {
            string book = parts["xl/workbook.xml"];
            string sheet = book[book.IndexOf("<sheet ", StringComparison.Ordinal)..book.IndexOf("</sheets>", StringComparison.Ordinal)];
            parts["xl/workbook.xml"] = book.Replace(sheet, string.Concat(Enumerable.Repeat(sheet, 1001)), StringComparison.Ordinal);
        });
        Assert.Equal("The workbook is damaged: it has more than 1000 sheets.", Refusal(path));
    }

    // 20 000 cells of 7 000 characters are 140 million: the file is small, what has to be read is not.
    [Fact]
    public void OneLongTextInManyCellsCountsInEachOfThem()
    {
        string cells = string.Concat(Enumerable.Repeat("<row><c t=\"s\"><v>0</v></c></row>", 20_000));
        string path = HandMadeWorkbook.Write(At("shared.xlsx"), cells, strings: $"<si><t>{new string('x', 7_000)}</t></si>");
        Assert.Equal("The workbook is damaged: its cells hold more than 128 million characters.", Refusal(path));
    }

    // 32 767 characters are what a spreadsheet's cell takes; that many are read.
    [Fact]
    public void TheLongestTextIsRead() =>
        Assert.Equal(32_767, Csv("a,b\n" + new string('x', 32_767) + ",2\n").Rows[1][0].Text.Length);

    [Fact]
    public void MoreMergedCellsThanAnySheetHasAreRefused()
    {
        string merges = string.Concat(Enumerable.Repeat("<mergeCell ref=\"A1:B2\"/>", 100_001));
        string path = HandMadeWorkbook.Write(At("merged.xlsx"), HandMadeWorkbook.Texts("a"), spoil: parts =>
            parts["xl/worksheets/sheet1.xml"] = parts["xl/worksheets/sheet1.xml"].Replace("</sheetData>", $"</sheetData><mergeCells>{merges}</mergeCells>", StringComparison.Ordinal));
        Assert.Equal("The workbook is damaged: it has more than 100 000 merged cells.", Refusal(path));
    }

    [Fact]
    public void MacrosPicturesAndChartsAreLeftAlone()
    {
        string path = HandMadeWorkbook.Write(At("macro.xlsm"), HandMadeWorkbook.Texts("Ref"), spoil: parts =>
        {
            parts["xl/vbaProject.bin"] = "not read";
            parts["xl/drawings/drawing1.xml"] = "<broken";
            parts["xl/charts/chart1.xml"] = "<broken";
            parts["xl/worksheets/sheet1.xml"] = parts["xl/worksheets/sheet1.xml"].Replace("</worksheet>", "<drawing/></worksheet>", StringComparison.Ordinal);
        });
        Assert.Equal("Ref", Assert.Single(SheetFile.Read(path, "macro.xlsm", null, Complaints)).Rows[0][0].Text);
        Assert.Empty(Complaints.Items);
    }

    private string Refusal(string path)
    {
        Assert.Empty(SheetFile.Read(path, Path.GetFileName(path), null, Complaints));
        return Assert.Single(Complaints.Items).Text;
    }
}
