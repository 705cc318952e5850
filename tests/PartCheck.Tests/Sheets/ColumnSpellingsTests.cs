using System.Text;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

public class ColumnSpellingsTests : SheetsFixture
{
    private static readonly ColumnSpec[] Bill = [new("References", ColumnKind.Text, Required: true), new("Value", ColumnKind.Text)];

    [Fact]
    public void TheProjectsOwnSpellingsReadWithoutAComplaint()
    {
        ColumnSpellings.Load(null, Complaints);
        Assert.Empty(Complaints.Items);
    }

    [Fact]
    public void TheUsersSpellingsAreAddedAndWin()
    {
        File.WriteAllText(At("mine.csv"), "Table,Column,Spelling\nBOM,References,Kennung\nbom,Value,Designator\n", Encoding.UTF8);
        ColumnSpellings spellings = ColumnSpellings.Load(At("mine.csv"), Complaints);
        Table? table = Table.Find(Csv("Kennung,Designator\nR1,4k7\n"), "BOM", Bill, spellings, Complaints);
        Assert.NotNull(table);
        Assert.Equal(("R1", "4k7"), (table.Rows[0].Text("References"), table.Rows[0].Text("Value")));
        Assert.Empty(Complaints.Items);
    }

    [Fact]
    public void MistakesInTheUsersFileAreComplaintsWithTheirRows()
    {
        File.WriteAllText(At("mine.csv"), "Table,Column,Spelling\nBom,References,\nBill,References,Kennung\nBOM,References,Stelle\nBOM,Value,stelle\n");
        ColumnSpellings.Load(At("mine.csv"), Complaints);
        Assert.Equal(
            [
                "A header spelling needs Table, Column and Spelling.",
                "\"Bill\" is no table that has header spellings; BOM, Channels, Parts, Pins, Derating or Concessions is wanted.",
                "The spelling \"stelle\" already stands for the column References.",
            ],
            Complaints.Items.Select(c => c.Text));
        Assert.Equal([2, 3, 5], Complaints.Items.Select(c => c.Row));
    }

    [Fact]
    public void AMissingFileOfTheUserIsNoInput()
    {
        ColumnSpellings.Load(At("nowhere.csv"), Complaints);
        Assert.True(Assert.Single(Complaints.Items).NoInput);
    }

    // What may mean the drop of one LED, a typical value, or several columns must not be taken for one of them in silence.
    [Theory]
    [InlineData("BOM", "Name")]
    [InlineData("BOM", "Part")]
    [InlineData("BOM", "Item")]
    [InlineData("BOM", "Supplier Part Number")]
    [InlineData("Channels", "Vf min")]
    [InlineData("Channels", "LED drop max")]
    [InlineData("Parts", "VCEsat")]
    [InlineData("Parts", "VBEsat")]
    [InlineData("Parts", "Power at case 25 degC")]
    public void AmbiguousNamesAreNoSpellings(string table, string header)
    {
        ColumnSpec[] columns = [new("Anchor", ColumnKind.Text, Required: true), .. Names(table).Select(name => new ColumnSpec(name, ColumnKind.Text))];
        Table? found = Table.Find(Csv($"Anchor,{header}\na,b\n"), table, columns, ColumnSpellings.Load(null, Complaints), Complaints);
        Assert.NotNull(found);
        Assert.All(columns.Skip(1), column => Assert.False(found.Has(column.Name)));
    }

    private static string[] Names(string table) => table switch
    {
        "BOM" => ["References", "Part number", "Quantity", "Value", "Package", "Manufacturer", "Description", "Fitted", "Alternates"],
        "Channels" => ["Load drop min", "Load drop max", "LEDs", "Current min", "Current max"],
        _ => ["VBEsat max", "VBEsat at", "VCEsat max", "VCEsat at", "Power", "Power flat to"],
    };
}
