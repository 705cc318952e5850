using System.IO.Compression;
using ClosedXML.Excel;
using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.Parts;
using PartCheck.Reports;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Reports;

public class TemplateTests
{
    public static TheoryData<string> Sheets => ["BOM", "Channels", "Parts", "Pins", "Derating"];

    // The template has every column that the rooms read, under its own name and in a unit of its kind, and no other.
    [Theory]
    [MemberData(nameof(Sheets))]
    public void EveryColumnThatIsReadIsInTheTemplateWithAComment(string name)
    {
        using XLWorkbook book = Template();
        IXLRow header = book.Worksheet(name).Row(1);
        IReadOnlyList<ColumnSpec> specs = SpecsOf(name);
        List<string> headers = [.. header.CellsUsed().Select(c => c.GetString())];
        Assert.Equal(specs.Count, headers.Count);
        Assert.Equal(specs.Select(s => s.Name).Order(StringComparer.Ordinal), headers.Select(NameOf).Order(StringComparer.Ordinal));
        Assert.All(header.CellsUsed(), cell => Assert.True(cell.HasComment && cell.Comment.Text.EndsWith('.'), cell.GetString()));
    }

    [Theory]
    [MemberData(nameof(Sheets))]
    public void TheTemplatesUnitsAreReadWithoutAComplaint(string name)
    {
        string path = Path.Combine(Directory.CreateTempSubdirectory("partcheck-template-").FullName, "board.xlsx");
        File.WriteAllBytes(path, TemplateWorkbook.Write());
        ComplaintList complaints = new();
        SheetData sheet = SheetFile.Read(path, "board.xlsx", null, complaints).Single(s => s.Sheet == name);
        Table? table = Table.Find(sheet, name, SpecsOf(name), ColumnSpellings.Load(null, complaints), complaints);
        Assert.NotNull(table);
        Assert.Equal(SpecsOf(name).Count, table.Columns.Count);
        foreach (TableRow row in table.Rows)
        {
            foreach (ColumnSpec spec in SpecsOf(name).Where(s => s.Kind != ColumnKind.Text))
            {
                row.Number(spec.Name);
            }
        }

        Assert.NotEmpty(table.Rows);
        Assert.Empty(complaints.Items);
        Directory.Delete(Path.GetDirectoryName(path)!, recursive: true);
    }

    [Theory]
    [InlineData("Parts", "Kind", "npn,resistor,led")]
    [InlineData("Pins", "Output", "cmos,ttl")]
    [InlineData("Channels", "Pull-down at", "base,pin")]
    public void ClosedListsAreDropDowns(string name, string column, string choices)
    {
        using XLWorkbook book = Template();
        IXLWorksheet sheet = book.Worksheet(name);
        int at = sheet.Row(1).CellsUsed().Single(c => c.GetString() == column).Address.ColumnNumber;
        IXLDataValidation list = sheet.DataValidations.Single(v => v.Ranges.Any(r => r.Contains(sheet.Cell(2, at).AsRange())));
        Assert.Equal($"\"{choices}\"", list.Value);
    }

    // ECMA-376 part 1, 18.2.5: print titles are a defined name; as LibreOffice 7.4 and spreadsheets write it, with dollar signs.
    [Theory]
    [MemberData(nameof(Sheets))]
    public void EveryPrintedPageHasTheHeaderAndTheNamesOfItsRows(string name)
    {
        using ZipArchive zip = new(new MemoryStream(TemplateWorkbook.Write()));
        using StreamReader text = new(zip.GetEntry("xl/workbook.xml")!.Open());
        Assert.Contains($">{name}!$A:$A,{name}!$1:$1</", text.ReadToEnd(), StringComparison.Ordinal);
    }

    [Fact]
    public void ATextLongerThanItsColumnIsWrapped()
    {
        using XLWorkbook book = Template();
        IXLWorksheet sheet = book.Worksheet("Parts");
        IXLCell points = sheet.CellsUsed(c => c.GetString().StartsWith("10uA:60..320", StringComparison.Ordinal)).Single();
        Assert.True(points.GetString().Length > points.WorksheetColumn().Width);
        Assert.True(points.Style.Alignment.WrapText);
    }

    private static XLWorkbook Template() => new(new MemoryStream(TemplateWorkbook.Write()));

    private static string NameOf(string header) => header.Split(" [")[0];

    private static IReadOnlyList<ColumnSpec> SpecsOf(string name) => name switch
    {
        "BOM" => BillReader.Columns,
        "Channels" => ChannelColumns.All,
        "Parts" => PartColumns.All,
        "Pins" => LogicPinReader.Columns,
        _ => DeratingReader.Columns,
    };
}
