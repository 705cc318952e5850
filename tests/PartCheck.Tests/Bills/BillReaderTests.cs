using PartCheck.Bills;
using Xunit;

namespace PartCheck.Tests.Bills;

public sealed class BillReaderTests
{
    private readonly TypedSheet typed = new();

    [Theory]
    [InlineData("Fitted", "yes", true)]
    [InlineData("Fitted", "x", true)]
    [InlineData("Fitted", "1", true)]
    [InlineData("Fitted", "no", false)]
    [InlineData("Fitted", "0", false)]
    [InlineData("Fitted", "DNP", false)]
    [InlineData("Fitted", "not fitted", false)]
    [InlineData("DNP", "x", false)]
    [InlineData("DNP", "1", false)]
    [InlineData("DNP", "DNP", false)]
    [InlineData("DNP", "no", true)]
    [InlineData("DNP", "-", true)]
    [InlineData("DNP", "fitted", true)]
    [InlineData("DNF", "yes", false)]
    [InlineData("Value", "DNP", false)]
    [InlineData("Value", "0R - DNP", false)]
    [InlineData("Value", "33 dnf", false)]
    [InlineData("Value", "not fitted", false)]
    [InlineData("Value", "10k (not fitted)", false)]
    [InlineData("Value", "33R/do not fit", false)]
    [InlineData("Value", "NF", false)]
    [InlineData("Value", "10 NF", true)]
    [InlineData("Value", "33", true)]
    public void FittedIsReadFromEveryMark(string column, string mark, bool fitted)
    {
        BillLine line = One($"References|Part number|{column}", $"R1|RK-33|{mark}");
        Assert.Equal(fitted, line.Fitted);
        Assert.Equal(fitted ? null : "b.csv!C2", line.FittedMark?.Cell);
        Assert.Empty(typed.Complaints);
    }

    [Theory]
    [InlineData("Fitted|DNP", "yes|x", "C2")]
    [InlineData("Fitted|DNP", "no|no", "B2")]
    [InlineData("Fitted|Value", "yes|33 DNP", "C2")]
    public void MarksThatContradictEachOtherAreToldAndNotChosenBetween(string columns, string marks, string cell)
    {
        BillLine line = One("References|" + columns, "R1|" + marks);
        Assert.StartsWith(cell + " ", typed.Only(), StringComparison.Ordinal);
        Assert.Contains("one of them fits the line", typed.Only(), StringComparison.Ordinal);
        Assert.True(line.HasComplaints);
        Assert.False(line.Fitted);
    }

    [Theory]
    [InlineData("Fitted", "perhaps")]
    [InlineData("DNP", "see note 3")]
    public void AMarkThatSaysNeitherIsAComplaint(string column, string mark)
    {
        Assert.True(One("References|" + column, "R1|" + mark).HasComplaints);
        Assert.Contains("says neither", typed.Only(), StringComparison.Ordinal);
    }

    // IEC 60062: the letter stands where the decimal sign would.
    [Theory]
    [InlineData("4k7", 4700.0)]
    [InlineData("47R", 47.0)]
    [InlineData("0R", 0.0)]
    [InlineData("33 ohm", 33.0)]
    [InlineData("SMALL NPN", null)]
    [InlineData("-5", null)]
    public void AValueIsAResistanceWhereItReadsAsOne(string value, double? ohms) =>
        Assert.Equal(ohms, One("References|Value", "R1|" + value).Resistance?.Ohms);

    [Fact]
    public void AReferenceTwiceIsToldWithBothCells()
    {
        Bill? bill = Read("References|Part number", "R1, R2|RK-33", "R2|RK-47");
        Assert.Equal("A3 R2 stands on the bill twice; the other place is b.csv!A2.", typed.Only());
        Assert.All(bill!.Lines, line => Assert.True(line.HasComplaints));
    }

    [Theory]
    [InlineData("-1")]
    [InlineData("1.5")]
    public void AQuantityIsAWholeNumber(string quantity)
    {
        Assert.True(One("References|Quantity", "R1|" + quantity).HasComplaints);
        Assert.Equal("B2 A quantity is a whole number, at least 0.", typed.Only());
    }

    [Theory]
    [InlineData("many")]
    [InlineData("NaN")]
    [InlineData("Infinity")]
    [InlineData("1e400")]
    public void AQuantityThatIsNoNumberIsAComplaint(string quantity)
    {
        Assert.True(One("References|Quantity", "R1|" + quantity).HasComplaints);
        Assert.Equal("B2", Assert.Single(typed.Complaints).Cell);
    }

    [Fact]
    public void ACellOfSeparatorsNamesNoReference()
    {
        Assert.True(One("References|Part number", ", ;|RK-33").HasComplaints);
        Assert.Equal("A2 No reference designator stands in the cell.", typed.Only());
    }

    [Fact]
    public void ABillWithoutLinesIsNoBill()
    {
        Assert.Null(Read("References|Part number"));
        Assert.True(Assert.Single(typed.Complaints).Fatal);
    }

    [Fact]
    public void AlternatesChannelAndRoleAreKept()
    {
        BillLine line = One("References|Part number|Alternates|Channel|Role", "Q1|TQ-31|TQ-32; TQ-33|CH1|pass");
        Assert.Equal(["TQ-32", "TQ-33"], line.Alternates);
        Assert.Equal(("CH1", "pass", "b.csv!A2"), (line.Channel, line.Role, line.Cell));
    }

    private Bill? Read(params string[] lines) => BillReader.Read(TypedSheet.Of("b.csv", lines), typed.Spellings, typed.List);

    private BillLine One(params string[] lines)
    {
        Bill? bill = Read(lines);
        Assert.NotNull(bill);
        return Assert.Single(bill.Lines);
    }
}
