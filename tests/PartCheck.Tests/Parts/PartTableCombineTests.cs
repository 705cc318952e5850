using PartCheck.Parts;
using PartCheck.Tests.Bills;
using Xunit;

namespace PartCheck.Tests.Parts;

public sealed class PartTableCombineTests
{
    private const string Card = ".model QX NPN(IS=3E-14 BF=200 VAF=80)";
    private readonly TypedSheet typed = new();

    [Fact]
    public void RowsThatAgreeAreOneWithoutAWord()
    {
        PartTable table = Combine(
            "Part number|Kind|Manufacturer|Mounting|IC|hFE points|Model",
            $"TQ-1|npn|Tarnwood|FR4|200mA|1mA:75..; 10mA:100..|{Card}",
            $"tq-1|npn|TARNWOOD|fr4|0.2|1mA:75..; 10mA:100..|{Card}");
        Assert.Empty(typed.Complaints);
        Assert.Single(table.Find("TQ-1"));
    }

    [Theory]
    [InlineData("IC", "200mA", "150mA", "IC")]
    [InlineData("Tj max", "150", "175", "Tj max")]
    [InlineData("hFE points", "1mA:75..", "1mA:80..", "hFE points")]
    [InlineData("Model", Card, ".model QX NPN(IS=4E-14 BF=200 VAF=80)", "Model")]
    public void RowsThatDisagreeAreToldWithBothCellsAndNeitherIsTaken(string column, string one, string other, string named)
    {
        PartTable table = Combine($"Part number|Kind|{column}", $"TQ-1|npn|{one}", "TQ-2|npn|", $"TQ-1|npn|{other}", $"TQ-1|npn|{one}");
        Assert.Equal($"A4 TQ-1 stands in the table twice and the rows disagree in {named}; the other row is p.csv!A2.", typed.Only());
        Assert.Empty(table.Find("TQ-1"));
        Assert.Single(table.Find("TQ-2"));
    }

    [Fact]
    public void MakersAndMountingsAreRowsOfTheirOwn()
    {
        PartTable table = Combine(
            "Part number|Kind|Manufacturer|Mounting|RthJA", "TQ-1|npn|Tarnwood|FR4|350", "TQ-1|npn|Tarnwood|1 cm2|250", "TQ-1|npn|Kelbrook|FR4|300");
        Assert.Empty(typed.Complaints);
        Assert.Equal(3, table.Find("TQ-1").Count);
    }

    [Fact]
    public void OneNumberOfTwoKindsDisagreesInItsKind()
    {
        Assert.Empty(Combine("Part number|Kind|Resistance", "X|npn|", "X|resistor|33").Parts);
        Assert.Contains("disagree in Kind", typed.Only(), StringComparison.Ordinal);
    }

    // The part is in the table: nobody is asked whether another one was meant.
    [Fact]
    public void ARowWithAComplaintIsKnownByItsNumberAlone()
    {
        PartTable table = Combine("Part number|Kind|VCEO", "TQ-31|npn|lots", "TQ-30|npn|45");
        Assert.Equal("TQ-30", Assert.Single(table.Parts).PartNumber);
        Assert.Equal(["TQ-31"], table.Unread);
        Assert.Empty(table.Find("TQ-31"));
    }

    private PartTable Combine(params string[] lines) =>
        PartTableReader.Combine(PartTableReader.Read(TypedSheet.Of("p.csv", lines), null, typed.Spellings, typed.List), typed.List);
}
