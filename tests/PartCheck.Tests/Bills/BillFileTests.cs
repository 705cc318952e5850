using System.Text;
using ClosedXML.Excel;
using PartCheck.Bills;
using PartCheck.Tests.Sheets;
using Xunit;

namespace PartCheck.Tests.Bills;

/// <summary>Bills as people have them, one oddity each; every file is made here.</summary>
public class BillFileTests : SheetsFixture
{
    [Fact]
    public void TitlesSectionsTotalsAndSignOffsAreLeftOutWithTheirReasons()
    {
        BillReading reading = Text("""
            Greenhouse lamp,,,
            Drawn:,K. Reed,,

            Ref,Qty,MPN,Price
            Resistors,,,
            "R1, R2",2,RK-33,0.1
            ,,,spare
            -,1,PCB-7,3.0
            Total,,,3.1
            Prepared by:,K. Reed,,

            """);
        BillTable table = Assert.Single(reading.Bill!.Tables);
        Assert.Equal(4, table.HeaderRow);
        Assert.Equal(["Ref", "Qty", "MPN"], table.Columns.Select(c => c.Header));
        Assert.Equal(
            ["1-2 title above the header", "5-5 section title", "7-7 section title", "8-8 no references", "9-9 totals", "10-10 note about the file"],
            table.Skipped.Select(s => $"{s.Row}-{s.LastRow} {s.Why}"));
        Assert.Equal(["R1", "R2"], Assert.Single(reading.Bill.Lines).References);
        Assert.Empty(reading.Complaints);
    }

    [Fact]
    public void HeaderNamesMayBeBrokenOverLines() =>
        Assert.Equal("RK-33", Line("\"Reference\nDesignator\",\"Manufacturer\nPart Number\"\nR1,RK-33\n").PartNumber);

    [Fact]
    public void AHeaderOfTwoLinesIsReadAsOne()
    {
        BillReading reading = Text("Ref,Manufacturer,,Price\n,Name,Part number,each\nR1,Kelbrook,RK-33,0.1\n");
        BillLine line = Assert.Single(reading.Bill!.Lines);
        Assert.Equal(("RK-33", "Kelbrook"), (line.PartNumber, line.Manufacturer));
        Assert.Equal(3, line.Row);
    }

    [Fact]
    public void SixtyColumnsAreSearchedForTheOnesThatCount()
    {
        string filler = string.Concat(Enumerable.Range(1, 57).Select(i => $"Stock place {i},"));
        string cells = string.Concat(Enumerable.Repeat("7,", 57));
        BillLine line = Line($"{filler}MPN,Qty,Ref\n{cells}RK-33,1,R1\n");
        Assert.Equal(("RK-33", 1.0), (line.PartNumber, line.Quantity));
    }

    // One row a part, then the same parts grouped: the second list has other columns, or the same ones.
    [Theory]
    [InlineData("Ref,MPN\nR1,RK-33\nR2,RK-33\n\nGrouped,\nMPN,Qty,Ref\nRK-33,2,\"R1, R2\"\n")]
    [InlineData("Qty,Ref,MPN\n,R1,RK-33\n,R2,RK-33\n\nQty,Ref,MPN\n2,\"R1, R2\",RK-33\n")]
    public void ASecondListOfTheSamePartsIsTakenOnce(string text)
    {
        BillReading reading = Text(text);
        Assert.Equal(["R1", "R2"], reading.Bill!.Lines.SelectMany(l => l.References));
        Assert.Contains(reading.Bill.Tables.SelectMany(t => t.Skipped), s => s.Why == "a second list of the same parts");
        Assert.Empty(reading.Complaints);
    }

    [Fact]
    public void ASecondListThatSaysAnotherPartNumberIsAComplaint()
    {
        BillReading reading = Text("Ref,MPN\nR1,RK-33\nR2,RK-33\n\nMPN,Qty,Ref\nRK-47,2,\"R1, R2\"\n");
        Assert.All(reading.Complaints, c => Assert.Contains("The list above says \"RK-33\"", c.Text, StringComparison.Ordinal));
        Assert.NotEmpty(reading.Complaints);
        Assert.All(reading.Bill!.Lines, l => Assert.True(l.HasComplaints));
    }

    [Fact]
    public void ASecondTableOfOtherPartsIsAdded() =>
        Assert.Equal(["R1", "Q1"], Text("Ref,MPN\nR1,RK-33\n\nMPN,Ref\nTQ-31,Q1\n").Bill!.Lines.SelectMany(l => l.References));

    [Fact]
    public void WithoutAQuantityColumnReferencesAreCounted()
    {
        BillReading reading = Text("Ref,MPN\n\"R1,R2\",RK-33\n");
        Assert.Contains("There is no quantity column: references are counted.", reading.Bill!.Tables[0].Notes);
        Assert.Equal(["R1", "R2"], reading.Bill.Lines[0].References);
        Assert.Empty(reading.Complaints);
    }

    [Theory]
    [InlineData("Part,Value\nR1,4k7\nC1,100nF\nIC201,LM7\n", true)]
    [InlineData("Part,Value\n\"R1, R2\",4k7\nLED1,red\nCase,grey\nCable lug,M3\nScrew,M4\n", true)]
    [InlineData("Part,Value\nBC1847,NPN\nRK4700,4k7\nBC1847,NPN\nBC1847,NPN\n", false)]
    [InlineData("Part,Value\nCase,grey\nScrew,M4\n", false)]
    public void ADoubtfulHeaderIsTakenWhereItsCellsProveIt(string text, bool proven) => Assert.Equal(proven, Text(text).Bill is not null);

    [Fact]
    public void AValueUnderADoubtfulNameIsTakenWhereItsCellsProveIt()
    {
        Assert.Equal(4700.0, Line("Name,Designator\n4.7k\u03A9,R1\n").Resistance?.Ohms);
        Assert.Null(Line("Name,Designator\nFeed of lamp,R1\n").Value);
    }

    [Fact]
    public void AnUnquotedDecimalCommaMovesTheRowAndIsTold()
    {
        BillReading reading = Text("Ref,Value,Package,MPN\nR1,4k7,0603,RK-4K7\nR2,5,1 k\u03A9,0603,RK-5K1\n");
        Assert.Equal(
            "\"RK-5K1\" in column E stands right of the last header: a comma without quotes has most likely moved the fields of this row.",
            Assert.Single(reading.Complaints).Text);
    }

    [Fact]
    public void TrailingSeparatorsAndShortRowsAreNoMoves() => Assert.Empty(Text("Ref;Value;MPN;\nR1;4k7;RK-4K7;\nR2;4k7\n").Complaints);

    [Fact]
    public void AQuantityThatIsNotTheCountIsTold() =>
        Assert.Equal("The quantity is 2, the references are 3.", Assert.Single(Text("Ref,Qty\n\"R1,10,13\",2\n").Complaints).Text);

    [Theory]
    [InlineData("Ref;MPN;Manufacturer;Note\nR1;RK-33;Kelbrook;DNP\n", false)]
    [InlineData("Ref;MPN;Manufacturer;Note\nR1;RK-33;DNP\n", false)]
    [InlineData("Ref;Footprint\nR1;R_0603_DNP\n", false)]
    [InlineData("Ref;Remarks\nR1;not fitted\n", false)]
    [InlineData("Ref;Remarks\nR1;near the edge\n", true)]
    public void DoNotFitMarksStandInManyColumns(string text, bool fitted) => Assert.Equal(fitted, Line(text).Fitted);

    [Fact]
    public void ANoteThatSpeaksOfNotFittingIsTold() =>
        Assert.StartsWith("The note \"DNP on lamp B\"", Assert.Single(Text("Ref,Note\nR1,DNP on lamp B\n").Complaints).Text, StringComparison.Ordinal);

    [Fact]
    public void AFileWithoutABillIsRefusedWithTheReason()
    {
        BillReading reading = Text("54,0.1,Capacitor,Order Quantity\n15,10uF,Capacitor,15\n");
        Assert.Null(reading.Bill);
        Assert.StartsWith("No header row of the table BOM stands in rows 1 to 20", Assert.Single(reading.Complaints).Text, StringComparison.Ordinal);
    }

    [Fact]
    public void OfTwoRevisionsTheFirstSheetIsTakenAndTheOtherNamed()
    {
        string path = Book(book =>
        {
            Fill(book.AddWorksheet("Cover"), "Greenhouse lamp");
            Fill(book.AddWorksheet("rev B"), "Ref,MPN", "R1,RK-33");
            Fill(book.AddWorksheet("rev A"), "Ref,MPN", "R1,RK-47");
        });
        BillReading reading = BillFile.Read(path, null, null);
        Assert.Equal("RK-33", Assert.Single(reading.Bill!.Lines).PartNumber);
        Assert.Equal("The sheet rev B was taken. The sheet rev A holds a bill too, and was not added: FILE:SHEET chooses.", Assert.Single(reading.Notes));
        Assert.Equal("RK-47", Assert.Single(BillFile.Read(path + ":rev A", null, null).Bill!.Lines).PartNumber);
    }

    [Fact]
    public void HiddenRowsAndColumnsAreReadAndSaid()
    {
        string path = Book(book =>
        {
            IXLWorksheet sheet = book.AddWorksheet("BOM");
            Fill(sheet, "Ref,MPN,Qty", "R1,RK-33,1", "R2,RK-47,1");
            sheet.Row(3).Hide();
            sheet.Column(2).Hide();
        });
        BillReading reading = BillFile.Read(path, null, null);
        Assert.Equal(["R1", "R2"], reading.Bill!.Lines.SelectMany(l => l.References));
        Assert.Equal(
            ["Row 3 is hidden in the workbook and read like the others.", "Column B is hidden in the workbook and read like the others."],
            reading.Bill.Tables[0].Notes);
    }

    [Fact]
    public void AMergedCellIsReadInEveryRowThatItCovers()
    {
        string path = Book(book =>
        {
            IXLWorksheet sheet = book.AddWorksheet("BOM");
            Fill(sheet, "Ref,MPN,Manufacturer", "R1,RK-33,Kelbrook", "R2,RK-47,");
            sheet.Range("C2:C3").Merge();
        });
        BillReading reading = BillFile.Read(path, null, null);
        Assert.Equal(["Kelbrook", "Kelbrook"], reading.Bill!.Lines.Select(l => l.Manufacturer));
        Assert.Contains("1 merged cell covers several rows: each of those rows reads its text.", reading.Bill.Tables[0].Notes);
    }

    [Fact]
    public void ASecondPartNumberBelowMergedReferencesIsNotReadAsAnotherLine()
    {
        string path = Book(book =>
        {
            IXLWorksheet sheet = book.AddWorksheet("BOM");
            Fill(sheet, "Ref,MPN", "R1,RK-33", ",RQ-33");
            sheet.Range("A2:A3").Merge();
        });
        BillReading reading = BillFile.Read(path, null, null);
        Assert.Equal("RK-33", Assert.Single(reading.Bill!.Lines).PartNumber);
        Assert.Contains("\"RQ-33\" is a second part number of that line", Assert.Single(reading.Complaints).Text, StringComparison.Ordinal);
    }

    [Fact]
    public void FormulasErrorsAndDatesInTheColumnsThatCountAreTold()
    {
        string path = HandMadeWorkbook.Write(At("cells.xlsx"),
            HandMadeWorkbook.Texts("Ref", "MPN", "Qty", "Price")
            + "<row><c t=\"inlineStr\"><is><t>R1</t></is></c><c t=\"e\"><v>#REF!</v></c><c><f>A9*2</f></c><c><f>C2*7</f></c></row>"
            + "<row><c s=\"1\"><v>45352</v></c><c t=\"inlineStr\"><is><t>RK-33</t></is></c><c><f>1+0</f><v>1</v></c></row>",
            styles: "<cellXfs count=\"2\"><xf numFmtId=\"0\"/><xf numFmtId=\"14\"/></cellXfs>");
        BillReading reading = BillFile.Read(path, null, null);
        Assert.Equal(
            [
                "B2 The cell holds an error instead of a value.",
                "C2 The cell holds a formula without a stored result: open the workbook in a spreadsheet program and save it.",
                "A3 \"2024-03-01\" is a date: a spreadsheet has most likely made it of a text.",
            ],
            reading.Complaints.Select(c => c.Cell + " " + c.Text));
    }

    // 21 cells of 10 000 references each: the bill stops at 200 000.
    [Fact]
    public void AnEndlessBillIsCutAndSaid()
    {
        BillReading reading = Text("Ref,MPN\n" + string.Concat(Enumerable.Range(1, 30).Select(i => $"R{i}0001-R{i + 1}0000,RK\n")));
        Assert.Equal(20, reading.Bill!.Lines.Count);
        Assert.Equal("The bill has more than 200000 references: what follows is not read.", Assert.Single(reading.Complaints).Text);
    }

    [Fact]
    public void TablesWithoutEndAreCutAndSaid()
    {
        BillReading reading = Text(string.Concat(Enumerable.Range(1, 30).Select(i => i % 2 == 0 ? $"Ref,MPN\nR{i},RK\n" : $"MPN,Ref\nRK,R{i}\n")));
        Assert.Equal(20, reading.Bill!.Lines.Count);
        Assert.Equal("The bill has more than 20 tables: what follows is not read.", Assert.Single(reading.Complaints).Text);
    }

    [Fact]
    public void AThousandComplaintsAreListedAndTheRestCounted()
    {
        BillReading reading = Text("Ref,Qty\n" + string.Concat(Enumerable.Range(1, 1500).Select(i => $"R{i},many\n")));
        Assert.Equal(1001, reading.Complaints.Count);
        Assert.Equal("500 further complaints are not listed: put these right first.", reading.Complaints[^1].Text);
    }

    [Fact]
    public void AMissingFileIsNoInput() => Assert.True(Assert.Single(BillFile.Read(At("nowhere.csv"), null, null).Complaints).NoInput);

    private BillLine Line(string text)
    {
        BillReading reading = Text(text);
        Assert.Empty(reading.Complaints);
        return Assert.Single(reading.Bill!.Lines);
    }

    private BillReading Text(string text)
    {
        File.WriteAllText(At("bill.csv"), text, new UTF8Encoding(false));
        return BillFile.Read(At("bill.csv"), null, null);
    }

    private string Book(Action<XLWorkbook> fill)
    {
        using XLWorkbook book = new();
        fill(book);
        book.SaveAs(At("bill.xlsx"));
        return At("bill.xlsx");
    }

    private static void Fill(IXLWorksheet sheet, params string[] rows)
    {
        for (int r = 0; r < rows.Length; r++)
        {
            string[] cells = rows[r].Split(',');
            for (int c = 0; c < cells.Length; c++)
            {
                if (cells[c].Length > 0)
                {
                    sheet.Cell(r + 1, c + 1).SetValue(cells[c]);
                }
            }
        }
    }
}
