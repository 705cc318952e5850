using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>Packages as bills write them, footprint names included.</summary>
public class PackageTests
{
    [Theory]
    [InlineData("0603", 0)]
    [InlineData("R_0603_1608Metric", 0)]
    [InlineData("RES 0603", 0)]
    [InlineData("0805", 1)]
    [InlineData("R_0805_2012Metric", 1)]
    [InlineData("0603 metric", 1)]
    [InlineData("06035", 1)]
    public async Task TheSizeIsLookedForAsAWordOfItsOwn(string package, int code)
    {
        using BoardFolder board = new(bill: BoardFolder.Bill.Replace("R1,RK-33,1,33,0603", "R1,RK-33,1,33," + package, StringComparison.Ordinal));
        Assert.Equal(code, (await board.Check()).Code);
    }

    [Theory]
    [InlineData("SOT23", 0)]
    [InlineData("Package_TO_SOT_SMD:SOT-23", 0)]
    [InlineData("SOT-23-5", 1)]
    [InlineData("SOT-323", 1)]
    public async Task ATransistorsPackageToo(string package, int code)
    {
        using BoardFolder board = new(bill: BoardFolder.Bill.Replace("Q1,TQ-31,1,,SOT-23", "Q1,TQ-31,1,," + package, StringComparison.Ordinal));
        Assert.Equal(code, (await board.Check()).Code);
    }
}
