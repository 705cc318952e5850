using PartCheck.Bills;
using Xunit;

namespace PartCheck.Tests.Bills;

public class AssemblyTests
{
    private readonly TypedSheet typed = new();

    [Theory]
    [InlineData("Populated LITE", "lite", "LITE")]
    [InlineData("POPULATED - Lite 2", "LITE2", "Lite 2")]
    [InlineData("Fitted (LITE)", "LITE", "LITE")]
    [InlineData("populated_lite", "Lite", "lite")]
    [InlineData("Mounted: LITE", "LITE", "LITE")]
    public void TheColumnIsFoundInAnySpelling(string header, string asked, string name)
    {
        Bill bill = Read(asked, "References|" + header, "Q1|yes", "Q2|no");
        Assert.Equal(name, bill.Assembly);
        Assert.Equal([name], bill.Assemblies);
        Assert.Equal([true, false], bill.Lines.Select(l => l.Fitted));
        Assert.Equal("no", bill.Lines[1].FittedMark?.Value);
        Assert.Equal("b.csv!B3", bill.Lines[1].FittedMark?.Cell);
        Assert.Empty(typed.Complaints);
    }

    [Fact]
    public void ADoNotFitColumnOfAnAssemblyReadsTheOtherWayRound() => Assert.Equal(
        [false, true, true], Read("LITE", "References|DNP LITE", "Q1|x", "Q2|", "Q3|no").Lines.Select(l => l.Fitted));

    [Fact]
    public void ItsWordCountsWhateverHoldsForTheBoardAndABlankLeavesThatAsItIs() => Assert.Equal(
        [true, false, false, true],
        Read("LITE", "References|Value|Fitted|Populated LITE", "R1|10k DNP|no|yes", "R2|10k|yes|no", "R3|10k|no|", "R4|10k|yes|yes").Lines.Select(l => l.Fitted));

    [Fact]
    public void WithoutAnAssemblyItsColumnsAreLeftAlone()
    {
        Bill bill = Read(null, "References|Fitted|Populated LITE|Populated FULL", "Q1|yes|no|yes", "Q2|no|no|yes");
        Assert.Null(bill.Assembly);
        Assert.Equal(["LITE", "FULL"], bill.Assemblies);
        Assert.Equal([true, false], bill.Lines.Select(l => l.Fitted));
    }

    [Theory]
    [InlineData("Placed by")]
    [InlineData("Fit notes")]
    [InlineData("Not fitted")]
    [InlineData("Reason populated")]
    public void WhatOnlyBeginsLikeOneIsNoAssembly(string header) => Assert.Empty(Read(null, "References|" + header, "Q1|machine 2", "Q2|yes").Assemblies);

    [Fact]
    public void AnUnknownAssemblyIsNotFound()
    {
        Bill bill = Read("FULL", "References|Populated LITE", "Q1|no", "Q2|yes");
        Assert.Null(bill.Assembly);
        Assert.Equal([true, true], bill.Lines.Select(l => l.Fitted));
    }

    // Crosses alone: a blank may mean "not fitted" or "as always". Nothing is chosen.
    [Fact]
    public void BlanksBesideYesMarksAloneAreAComplaint()
    {
        Bill bill = Read("LITE", "References|Populated LITE", "Q1|x", "Q2|", "Q3|", "Q4|x");
        Assert.Equal(
            "B3 Populated LITE marks what is fitted and says of no line that it is not: whether its blank cells mean that cannot be told.", typed.Only());
        Assert.Equal([false, true, true, false], bill.Lines.Select(l => l.HasComplaints));
    }

    [Fact]
    public void ACellThatSaysNeitherIsAComplaint()
    {
        Read("LITE", "References|Populated LITE", "Q1|perhaps", "Q2|no");
        Assert.Equal("B2 \"perhaps\" says neither that the line is fitted nor that it is not.", typed.Only());
    }

    private Bill Read(string? assembly, params string[] lines) => BillReader.Read(TypedSheet.Of("b.csv", lines), typed.Spellings, typed.List, assembly)!;
}
