using PartCheck.Derating;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Derating;

public sealed class DeratingLibraryTests
{
    [Fact]
    public void TheTablesThatTravelInsideAreTheApprovedOnes() =>
        Assert.Equal(["nasa-eee-inst-002", "ratings", "workshop"], DeratingLibrary.Names);

    // Common practice, no source: the figures that the project states for its own table.
    [Theory]
    [InlineData("vce", "npn", 0.8)]
    [InlineData("vcb", "npn", 0.8)]
    [InlineData("ic", "npn", 0.75)]
    [InlineData("power", "npn", 0.6)]
    [InlineData("soa", "npn", 0.75)]
    [InlineData("stability", "npn", 0.5)]
    [InlineData("r-power", "resistor", 0.5)]
    [InlineData("r-voltage", "resistor", 0.8)]
    [InlineData("led-current", "led", 0.8)]
    [InlineData("pin-current", null, 0.8)]
    public void TheWorkshopsFactors(string rule, string? kind, double factor)
    {
        DeratingRow row = Named("workshop").For(rule, kind);
        Assert.Equal(factor, row.Factor);
        Assert.Equal("common practice, no source", row.Source);
    }

    [Fact]
    public void TheWorkshopsOtherLimits()
    {
        DeratingTable table = Named("workshop");
        Assert.Equal(25, table.For("junction", "npn").Offset.Kelvins);
        Assert.Equal(25, table.For("r-film", "resistor").Offset.Kelvins);
        Assert.Equal(1.5, table.For("drive").Limit);
        Assert.Equal(1.25, table.For("sharing").Limit);
        Assert.Equal(ZeroTemperature.Parallel, table.For("r-power", "resistor").Zero);
    }

    [Fact]
    public void RatingsAreTheRatingsThemselves()
    {
        DeratingTable table = Named("ratings");
        Assert.All(table.Rows, row => Assert.Equal(1, row.Factor));
        Assert.Null(table.For("sharing").Limit);
    }

    // NASA EEE-INST-002 (May 2003), S1 Table 4 with note 2 and R2 Table 4, read in full text; a 2N2222A by it: VCE 37.5, VCB 56.25 V, 600 mA, 300 mW, 125 degC.
    [Fact]
    public void TheStandardsFactorsAreThoseOfItsTables()
    {
        DeratingTable table = Named("nasa-eee-inst-002");
        Assert.Equal(37.5, 50 * table.For("vce", "npn").Factor, 9);
        Assert.Equal(56.25, 75 * table.For("vcb", "npn").Factor, 9);
        Assert.Equal(0.6, 0.8 * table.For("ic", "npn").Factor, 9);
        Assert.Equal(0.3, 0.5 * table.For("power", "npn").Factor, 9);
        Assert.Equal(125, JunctionRule.Allowed(Temperature.FromCelsius(200), table.For("junction", "npn")) - 273.15, 9);
        Assert.Equal(110, JunctionRule.Allowed(Temperature.FromCelsius(150), table.For("junction", "npn")) - 273.15, 9);
        Assert.Equal(0.5, table.For("r-power", "resistor").Factor);
        Assert.Equal(0.6, table.For("r-power", "resistor", "RM").Factor);
        Assert.Equal(0.8, table.For("r-voltage", "resistor", "RM").Factor);
        Assert.Equal(ZeroTemperature.Parallel, table.For("r-power", "resistor", "RNX").Zero);
    }

    [Fact]
    public void TheStandardSaysWhichEditionItIsAndWhatItLeavesOut()
    {
        string? note = Named("nasa-eee-inst-002").Note;
        Assert.Contains("May 2003, without Addendum 1", note, StringComparison.Ordinal);
        Assert.Contains("leaves plastic-encapsulated parts out", note, StringComparison.Ordinal);
    }

    [Fact]
    public void AnUnknownNameIsNoTable() => Assert.Null(DeratingLibrary.Named("no-such-table"));

    [Theory]
    [InlineData("t,vce,npn,1.5", "D2")]
    [InlineData("t,no-such-rule,npn,0.5", "The rule \"no-such-rule\" is not known.")]
    [InlineData("t,vce,valve,0.5", "The kind \"valve\" is not known here.")]
    [InlineData("t,vce,npn,0.5\nt,vce,npn,0.6", "keep one")]
    public void AMistakeInATableIsToldWithItsCell(string rows, string text)
    {
        string file = Path.Combine(Path.GetTempPath(), $"partcheck-derating-{Guid.NewGuid():N}.csv");
        try
        {
            File.WriteAllText(file, "Name,Rule,Kind,Factor\n" + rows + "\n");
            ComplaintList complaints = new();
            SheetData sheet = Assert.Single(SheetFile.Read(file, "d.csv", null, complaints));
            _ = DeratingReader.Read(sheet, ColumnSpellings.Load(null, complaints), complaints);
            Complaint complaint = Assert.Single(complaints.Items);
            Assert.Contains(text, complaint.Cell + " " + complaint.Text, StringComparison.Ordinal);
        }
        finally
        {
            File.Delete(file);
        }
    }

    // A number where its rule does not read it would derate nothing, and nobody would know.
    [Theory]
    [InlineData("Limit", "vce", "0.8", "The rule vce does not read Limit")]
    [InlineData("Factor", "drive", "0.5", "the row gives none")]
    [InlineData("Offset", "power", "25", "The rule power does not read Offset")]
    [InlineData("Cap", "ic", "125", "The rule ic does not read Cap")]
    [InlineData("Zero temperature", "r-voltage", "parallel", "The rule r-voltage does not read Zero temperature")]
    [InlineData("Factor", "headroom", "0.5", "nothing of it is derated")]
    [InlineData("Limit", "sharing", "1", "it is above 1")]
    [InlineData("Limit", "drive", "0.5", "A drive factor below 1")]
    [InlineData("Zero temperature", "r-power", "-300", "not plausible")]
    [InlineData("Zero temperature", "r-power", "soon", "cannot be read")]
    [InlineData("Factor", "vce", "-0.5", "C2")]
    public void ANumberThatWouldChangeNothingIsAComplaint(string column, string rule, string cell, string text)
    {
        Bills.TypedSheet typed = new();
        DeratingTable table = Assert.Single(DeratingReader.Read(Bills.TypedSheet.Of("d.csv", $"Name|Rule|{column}", $"t|{rule}|{cell}"), typed.Spellings, typed.List));
        Assert.True(table.Unknown);
        Assert.Empty(table.Rows);
        Assert.Contains(typed.Complaints, c => (c.Cell + " " + c.Text).Contains(text, StringComparison.Ordinal));
    }

    [Fact]
    public void RowsAreGroupedByNameInTheSheetsOrder()
    {
        Bills.TypedSheet typed = new();
        IReadOnlyList<DeratingTable> tables = DeratingReader.Read(
            Bills.TypedSheet.Of("d.csv", "Name|Rule|Factor|Zero temperature|Cap", "b|r-power|0.5|125|", "a|vce|0.7||", "B|junction|1||110"), typed.Spellings, typed.List);
        Assert.Empty(typed.Complaints);
        Assert.Equal(["b", "a"], tables.Select(t => t.Name));
        Assert.Equal((ZeroTemperature.Fixed, 398.15), (tables[0].Rows[0].Zero, tables[0].Rows[0].ZeroAt!.Value.Kelvins));
        Assert.Equal(383.15, tables[0].For("junction", "npn").Cap!.Value.Kelvins, 9);
        Assert.Equal(0.7, tables[1].For("vce", "npn").Factor);
    }

    private static DeratingTable Named(string name)
    {
        DeratingTable? table = DeratingLibrary.Named(name);
        Assert.NotNull(table);
        return table;
    }
}
