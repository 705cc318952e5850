using PartCheck.Parts;
using Xunit;

namespace PartCheck.Tests.Parts;

public class LeadOrderTests
{
    [Theory]
    [InlineData("BEC", "BEC")]
    [InlineData("b-e-c", "BEC")]
    [InlineData("E, B, C", "EBC")]
    [InlineData("BCE+C", "BCE+C")]
    [InlineData("BE + C", "BE+C")]
    [InlineData("NBEC", "NBEC")]
    public void AnOrderIsReadFromItsLetters(string text, string printed) => Assert.Equal(printed, LeadOrder.Parse(text, 1)?.ToString());

    [Theory]
    [InlineData("BE", 1)]
    [InlineData("BDS", 1)]
    [InlineData("1=B 2=E 3=C", 1)]
    [InlineData("BEC+C+C", 1)]
    [InlineData("BEC+CE", 1)]
    [InlineData("E1 B1 C1", 1)]
    [InlineData("BEC", 2)]
    [InlineData("E1 B1 C2 E2 B2", 2)]
    [InlineData("E1 B1 C2 E2 B2 C1 C", 2)]
    [InlineData("", 1)]
    public void WhatIsNoOrderIsNone(string text, int elements) => Assert.Null(LeadOrder.Parse(text, elements));

    [Fact]
    public void TwoTransistorsHaveTheirLeadsNumbered() =>
        Assert.Equal("E1 B1 C2 E2 B2 C1", LeadOrder.Parse("e1b1c2e2b2c1", 2)?.ToString());

    [Fact]
    public void DifferencesNameTheLeads()
    {
        LeadOrder laidOut = LeadOrder.Parse("EBC", 1)!;
        Assert.Equal(["lead 1 is C, not E", "lead 3 is E, not C"], LeadOrder.Parse("CBE", 1)!.DifferencesFrom(laidOut));
        Assert.Empty(LeadOrder.Parse("EBC+C", 1)!.DifferencesFrom(laidOut));
        Assert.Equal(["the tab is E, not C"], LeadOrder.Parse("BCE+E", 1)!.DifferencesFrom(LeadOrder.Parse("BCE+C", 1)!));
        Assert.Equal(["4 leads, not 3"], LeadOrder.Parse("EBCN", 1)!.DifferencesFrom(laidOut));
    }

    [Fact]
    public void AnOrderCountedFromTheFarEndIsAMirror()
    {
        Assert.True(LeadOrder.Parse("BCE", 1)!.IsMirrorOf(LeadOrder.Parse("ECB+C", 1)!));
        Assert.False(LeadOrder.Parse("BCE", 1)!.IsMirrorOf(LeadOrder.Parse("EBC", 1)!));
    }
}
