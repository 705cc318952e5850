using PartCheck.Parts;
using Xunit;

namespace PartCheck.Tests.Parts;

/// <summary>Names of outlines as makers' sheets print them beside each other (the table's own Source column says where each was seen).</summary>
public class PackageTableTests
{
    [Theory]
    [InlineData("SOT-23", "TO-236AB", PackageRelation.Same)]
    [InlineData("sot23", "SOT-23", PackageRelation.Same)]
    [InlineData("SC-62", "TO-243", PackageRelation.Same)]
    [InlineData("TO-92", "SOT54", PackageRelation.Same)]
    [InlineData("SC-73", "SOT-223", PackageRelation.Same)]
    [InlineData("0603", "1608M", PackageRelation.Same)]
    [InlineData("R0805", "0805", PackageRelation.Same)]
    [InlineData("SC-59", "SOT-23", PackageRelation.Near)]
    [InlineData("TO-236AB", "SC-59", PackageRelation.Near)]
    [InlineData("TO-5", "TO-39", PackageRelation.Near)]
    [InlineData("SOT-23", "SOT-323", PackageRelation.Different)]
    [InlineData("SOT-223", "SOT-89", PackageRelation.Different)]
    [InlineData("0603", "0603M", PackageRelation.Different)]
    [InlineData("XQ-7", "XQ-8", PackageRelation.Different)]
    [InlineData("XQ-7", "xq7", PackageRelation.Same)]
    public void TwoNamesAreRelatedAsTheTableSays(string one, string other, PackageRelation relation)
    {
        Assert.Equal(relation, PackageTable.Relation(one, other));
        Assert.Equal(relation, PackageTable.Relation(other, one));
    }

    [Fact]
    public void APackageThatIsNumberedInBothDirectionsIsReadByPosition()
    {
        Assert.True(PackageTable.ReadByPosition("SC-62"));
        Assert.False(PackageTable.ReadByPosition("SOT-23"));
        Assert.False(PackageTable.ReadByPosition("XQ-7"));
    }

    [Fact]
    public void ThroughHolePartsComeInFourOrders()
    {
        Assert.Equal(["EBC", "CBE", "ECB", "CEB"], PackageTable.OrdersSeen("TO-226AA").Select(o => o.ToString()));
        Assert.Empty(PackageTable.OrdersSeen("XQ-7"));
    }

    [Theory]
    [InlineData("TO-236AB", "SOT-23", true)]
    [InlineData("R_0603_1608Metric", "0603", true)]
    [InlineData("0603 metric", "0603", false)]
    [InlineData("0603 metric", "0201", true)]
    [InlineData("SC-59", "SOT-23", false)]
    [InlineData("SOT-23-5", "SOT-23", false)]
    public void ABillsPackageAgreesWithTheTablesUnderEitherName(string bill, string table, bool agrees) =>
        Assert.Equal(agrees, PackageName.Agrees(bill, table));
}
