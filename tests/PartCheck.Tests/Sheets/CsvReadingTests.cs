using System.Text;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

public class CsvReadingTests : SheetsFixture
{
    [Theory]
    [InlineData("a,b\n1,2\n", 2)]
    [InlineData("a;b\n1;2\n", 2)]
    [InlineData("a\tb\n1\t2\n", 2)]
    [InlineData("sep=;\na,x;b\n", 2)]
    // References between commas, fields between semicolons.
    [InlineData("Designator;Quantity;Value\nC1,C2,C3;3;100nF\nR1,R2;2;4,7k\n", 3)]
    // A quoted field full of separators that are none.
    [InlineData("\"Id\";\"Designator\"\n1;\",,,,,,,,,,,,,,\"\n2;\"R1,R2\"\n", 2)]
    // A title row without any separator above a table.
    [InlineData("Greenhouse lamps, revision C\nRef;Qty\nR1;1\nR2;1\n", 2)]
    public void TheSeparatorIsFoundOut(string text, int columns) => Assert.Equal(columns, Csv(text).Rows[^1][^1].Column);

    [Theory]
    [InlineData("Ref;Value\nR1;4,7k\nR2;0,47\n", true)]
    [InlineData("Ref;Value\nR1;4.7k\nR2;0.47\n", false)]
    [InlineData("Ref;Value\nR1;10k\n", false)]
    [InlineData("Ref;Value\nR1;1,500\n", false)]
    [InlineData("Ref;Value\nR1;4,7k\nR2;0.47\nR3;2.2\n", false)]
    [InlineData("Ref,Value\nR1,\"4,7k\"\n", false)]
    public void TheDecimalSignIsFoundOutByEvidence(string text, bool comma) => Assert.Equal(comma, Csv(text).DecimalComma);

    [Theory]
    [InlineData("a,b\n1,2\n\n3,4\n")]
    [InlineData("a,b\r\n1,2\r\n\r\n3,4\r\n")]
    [InlineData("a,b\r1,2\r\r3,4")]
    public void RowsAreCountedAsASpreadsheetCountsThem(string text) => Assert.Equal([1, 2, 4], Csv(text).Rows.Select(row => row[0].Row));

    [Fact]
    public void ALineBreakInsideAFieldBeginsNoRow()
    {
        SheetData sheet = Csv("\"Reference\nDesignator\",Value\r\n\"R1\nR2\",\"4k7 \"\"1%\"\"\"\r\n");
        Assert.Equal(["Reference\nDesignator", "Value", "R1\nR2", "4k7 \"1%\""], sheet.Rows.SelectMany(row => row).Select(cell => cell.Text));
        Assert.Equal("table.csv!B2", sheet.Cite(2, 2));
    }

    [Fact]
    public void Windows1252IsReadWhereItFitsPlainly()
    {
        byte[] bytes = [.. "C1;10 "u8, 0xB5, .. "F\nR1;25 "u8, 0xB0, .. "C "u8, 0xB1, .. "5 %\nJ1;Geh"u8, 0xE4, .. "use\n"u8];
        Assert.Equal(
            ["C1", "10 \u00B5F", "R1", "25 \u00B0C \u00B15 %", "J1", "Geh\u00E4use"],
            Csv(bytes).Rows.SelectMany(row => row).Select(cell => cell.Text));
    }

    [Theory]
    [InlineData("windows-1251", new byte[] { 0xD0, 0xE5, 0xE7 }, "\u0420\u0435\u0437")]
    [InlineData("Shift-JIS", new byte[] { 0x90, 0x94, 0x97, 0xCA }, "\u6570\u91CF")]
    [InlineData("Mac-Roman", new byte[] { 0x31, 0x30, 0xBD }, "10\u2126")]
    [InlineData("macintosh", new byte[] { 0x31, 0x30, 0xBD }, "10\u2126")]
    [InlineData("utf-16", new byte[] { 0x52, 0, 0x31, 0 }, "R1")]
    public void ANamedEncodingIsUsed(string name, byte[] bytes, string text) => Assert.Equal(text, Csv(bytes, name).Rows[0][0].Text);

    [Fact]
    public void AByteOrderMarkOutweighsTheNamedEncoding() =>
        Assert.Equal("10\u03A9", Csv([0xEF, 0xBB, 0xBF, .. "10\u03A9"u8], "windows-1251").Rows[0][0].Text);

    [Fact]
    public void Utf16WithoutAMarkIsFoundOut() =>
        Assert.Equal("4k7", Csv(Encoding.Unicode.GetBytes("Ref\tValue\r\nR1\t4k7\r\n")).Rows[1][1].Text);

    [Theory]
    [InlineData("klingon", "The encoding \"klingon\" is not known; names such as utf-8, windows-1252, windows-1251, shift_jis or macintosh are wanted.")]
    [InlineData("shift_jis", "The text is not shift_jis: name another encoding with --encoding.")]
    public void AnEncodingThatIsNotKnownOrDoesNotFitIsAComplaint(string name, string text)
    {
        Assert.Empty(Read([0x61, 0xFF, 0xFF], name));
        Assert.Equal(text, Assert.Single(Complaints.Items).Text);
    }

    [Fact]
    public void AQuoteThatIsNeverClosedCostsTheFile()
    {
        Assert.Empty(Read("a,b\n1,2\n\"R1,3\nR2,4\n"u8.ToArray()));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal("A quoted field that begins in this row is never closed: the rows after it cannot be told apart.", complaint.Text);
        Assert.Equal((3, "A3", true), (complaint.Row, complaint.Cell, complaint.Fatal));
    }

    [Fact]
    public void TextAfterAClosingQuoteIsAComplaintAboutItsRow()
    {
        Assert.Equal(3, Csv("a,b\n\"R1\"x,2\nR2,4\n").Rows.Count);
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal("Text follows a closing quote: the fields of this row cannot be told apart.", complaint.Text);
        Assert.Equal((2, false), (complaint.Row, complaint.Fatal));
    }

    [Fact]
    public void AStrayQuoteIsText() => Assert.Equal("19\" rack", Csv("a,b\n19\" rack,2\n").Rows[1][0].Text);

    [Fact]
    public void AHugeRecordIsRefusedAndNotHeld()
    {
        Assert.Empty(Read(Encoding.ASCII.GetBytes("a,b\n\"" + new string('x', 3_000_000))));
        Assert.True(Assert.Single(Complaints.Items).Fatal);
    }
}
