using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

public class TableTests : SheetsFixture
{
    private static readonly ColumnSpec[] Bill =
    [
        new("References", ColumnKind.Text, Required: true),
        new("Part number", ColumnKind.Text),
        new("Quantity", ColumnKind.Number, 0, 1e6),
        new("Value", ColumnKind.Text),
        new("Package", ColumnKind.Text),
        new("Manufacturer", ColumnKind.Text),
        new("Description", ColumnKind.Text),
        new("Do not fit", ColumnKind.Text),
    ];

    private static readonly ColumnSpec[] Channels =
    [
        new("Channel", ColumnKind.Text, Required: true),
        new("Supply min", ColumnKind.Voltage, 0.5, 1000, Required: true),
        new("Supply max", ColumnKind.Voltage, 0.5, 1000, Required: true),
        new("Averaging", ColumnKind.Text),
    ];

    // Header spellings seen on bills of the trade.
    [Theory]
    [InlineData("Designator", "References")]
    [InlineData("*Designator", "References")]
    [InlineData("Reference(s)", "References")]
    [InlineData("Ref. Des.", "References")]
    [InlineData("REF_DES", "References")]
    [InlineData("Locations/RefDes", "References")]
    [InlineData("\"Reference\nDesignator\"", "References")]
    public void ReferencesGoByManyNames(string header, string column) =>
        Assert.Equal("R1", Find(Csv($"{header},Qty\nR1,1\n"), "BOM", Bill).Rows[0].Text(column));

    [Theory]
    [InlineData("MPN", "Part number")]
    [InlineData("Manufacturer Part Number 1", "Part number")]
    [InlineData("MANUFACTURER_PART_NUMBER", "Part number")]
    [InlineData("*Mfg Part #", "Part number")]
    [InlineData("Mfr. #", "Part number")]
    [InlineData("\"MPN\nHighlighted=No Sub\"", "Part number")]
    [InlineData("MPN/Value", "Part number")]
    [InlineData("Qty.", "Quantity")]
    [InlineData("Quantity Per PCB", "Quantity")]
    [InlineData("\u6570\u91CF", "Quantity")]
    [InlineData("Comment", "Value")]
    [InlineData("Value [Ohm]", "Value")]
    [InlineData("Package/Case", "Package")]
    [InlineData("MFG.", "Manufacturer")]
    [InlineData("Descripcion", "Description")]
    [InlineData("DNP", "Do not fit")]
    public void OtherColumnsGoByManyNames(string header, string column) =>
        Assert.Equal("7", Find(Csv($"Ref,{header}\nR1,7\n"), "BOM", Bill).Rows[0].Text(column));

    // A supplier's number is not the maker's; kilo-ohms in a header of texts would be lost; a case-temperature power is another column.
    [Theory]
    [InlineData("Supplier Part")]
    [InlineData("Item")]
    [InlineData("Value [kohm]")]
    [InlineData("Quantity (mA in stock)")]
    public void WhatIsNoSpellingIsNoColumn(string header)
    {
        Table table = Find(Csv($"Ref,{header}\nR1,7\n"), "BOM", Bill);
        Assert.All(Bill.Skip(1), spec => Assert.False(table.Has(spec.Name)));
    }

    [Fact]
    public void TheFirstOfTwoSpellingsCountsUnlessTheOwnNameFollows()
    {
        TableRow row = Find(Csv("Ref,Comment,Value,Manufacturer 1,MFR,MPN,Mfr. #\nR1,a,b,c,d,e,f\n"), "BOM", Bill).Rows[0];
        Assert.Equal(("b", "c", "e"), (row.Text("Value"), row.Text("Manufacturer"), row.Text("Part number")));
    }

    [Fact]
    public void SectionsTotalsRepeatedHeadersAndSignOffsAreNoData()
    {
        Table table = Find(Csv("""
            Board,Lamp 3
            ,
            Ref,MPN,Qty,Price
            Resistors,,,
            "R1, R2",RK-33,2,0.1
            ,,,
            ,Semiconductors,,
            Ref,MPN,Qty,Price
            Q1,TQ-31,1,0.1
            ,,,spare
            Total,,3,0.3
            Sum:,,,
            Approved by:,J. Doe,,
            Date: 2024-06-19,,,

            """), "BOM", Bill);
        Assert.Equal(["R1, R2", "Q1"], table.Rows.Select(row => row.Text("References")));
        Assert.Equal([5, 9], table.Rows.Select(row => row.Row));
        Assert.Equal(3, table.HeaderRow);
        Assert.Empty(Complaints.Items);
    }

    // Leaving out a row makes no complaint, so a row that may be data is data.
    [Theory]
    [InlineData("CH1,,\n")]
    [InlineData("RED,,\n")]
    [InlineData("Total 1,5,6\n")]
    public void AnUnfinishedChannelIsDataAndNotASection(string row) =>
        Assert.Single(Find(Csv("Channel,Supply min,Supply max\n" + row), "Channels", Channels).Rows);

    [Fact]
    public void ASecondGroupedTableOfABillIsTakenOnceAndElsewhereComplainedAbout()
    {
        Table bill = Find(Csv("Ref,MPN\nR1,RK-33\nR2,RK-33\n\nMPN,Qty,Ref\nRK-33,2,\"R1, R2\"\n"), "BOM", Bill);
        Assert.Equal(["R1", "R2"], bill.Rows.Select(row => row.Text("References")));
        Assert.Empty(Complaints.Items);

        Table channels = Find(Csv("Channel,Supply min,Supply max\nCH1,5,6\nSupply min,Supply max,Channel\n5,6,CH2\n"), "Channels", Channels);
        Assert.Single(channels.Rows);
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal("Another header row with other columns stands here: what follows it is not read; put one table in one sheet.", complaint.Text);
        Assert.Equal((3, "A3"), (complaint.Row, complaint.Cell));
    }

    [Fact]
    public void ATitleThatMatchesOneColumnIsNotTheHeader() =>
        Assert.Equal(3, Find(Csv("Lamp 3\nReference:,12-345\nRef,MPN,Qty\nR1,RK-33,1\n"), "BOM", Bill).HeaderRow);

    [Fact]
    public void ASheetWithoutTheRequiredColumnsNamesThemAndTheNearestRow()
    {
        SheetData sheet = Csv("Lamp,\nChannel,Supply max,Remark\nCH1,5,x\n");
        Assert.Null(Table.Find(sheet, "Channels", Channels, ColumnSpellings.Load(null, Complaints), Complaints));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal(
            "No header row of the table Channels stands in rows 1 to 20: looked for Channel, Supply min, Supply max; the nearest, row 2, has Channel, Supply max, Remark.",
            complaint.Text);
        Assert.True(complaint.Fatal);
    }

    [Theory]
    [InlineData(19, true)]
    [InlineData(20, false)]
    public void TheHeaderIsLookedForInTwentyRows(int above, bool found)
    {
        SheetData sheet = Csv(string.Concat(Enumerable.Repeat("x\n", above)) + "Ref,MPN\nR1,RK-33\n");
        Assert.Equal(found, Table.Find(sheet, "BOM", Bill, ColumnSpellings.Load(null, Complaints), Complaints) is not null);
    }

    [Fact]
    public void ARowCitesItsCellsAndCarriesItsChannelIntoComplaints()
    {
        TableRow row = Find(Csv("Channel,Supply min,Supply max\nCH1,low,6\n"), "Channels", Channels).Rows[0];
        row.Channel = "CH1";
        Assert.False(row.HasComplaints);
        Assert.Null(row.Number("Supply min"));
        Assert.Null(row.Number("Supply min"));
        Assert.True(row.HasComplaints);
        Assert.Equal(("table.csv!C2", "table.csv!A2"), (row.Cite("Supply max"), row.Cite("Averaging")));
        Assert.Null(row.Text("Averaging"));
        Assert.Equal(
            new Complaint("table.csv", null, 2, "Supply min", "B2", "low", "a voltage such as 5 V", "\"low\" in Supply min cannot be read: a voltage such as 5 V is wanted.")
            {
                Channel = "CH1",
            },
            Assert.Single(Complaints.Items));
    }

    [Fact]
    public void PartsOfACellAreReadWithTheDecimalSignOfTheFile()
    {
        TableRow row = Find(Csv("Channel;Supply min;Supply max;Averaging\nCH1;4,75;5,25;0,1mA:50\n"), "Channels", Channels).Rows[0];
        Assert.Equal(0.0001, row.Part("Averaging", "0,1mA", ColumnKind.Current));
        Assert.Null(row.Part("Averaging", "0,1mV", ColumnKind.Current));
        Assert.Equal(
            ("D2", "\"0,1mV\" in Averaging has a unit of another kind or one that is not known: a current such as 11 mA is wanted."),
            (Complaints.Items[0].Cell, Complaints.Items[0].Text));
    }
}
