using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

public class NearMissesTests
{
    // Edits counted by hand: one letter changed, two left out, letter case is none.
    [Theory]
    [InlineData("VELM-S46A", "VELM-S45A")]
    [InlineData("VLM-45A", "VELM-S45A")]
    [InlineData("velm-s45a", "VELM-S45A")]
    public void AMistypedNameIsFound(string wanted, string near) => Assert.Equal([near], NearMisses.Of(wanted, ["VELM-S45A", "TIND-K60", "Q1"]));

    [Fact]
    public void TheNearestComeFirstAndTiesGoByName() =>
        Assert.Equal(["TQ-30", "TQ-32", "TQ-33"], NearMisses.Of("TQ-31", ["TQ-33", "TQ-99", "TQ-32", "TQ-30", "TQ-34"]));

    [Fact]
    public void NothingNearIsNothingSaid() => Assert.Equal(string.Empty, NearMisses.Phrase("TQ-31", ["RK-4K7", "X"]));
}
