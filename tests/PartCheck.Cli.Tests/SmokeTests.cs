using Xunit;

namespace PartCheck.Cli.Tests;

public class SmokeTests
{
    [Fact]
    public void ACellAddressCountsInLetters() => Assert.Equal("AB7", PartCheck.Sheets.CellAddress.Of(7, 28));
}
