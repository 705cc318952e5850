using PartCheck.Bills;
using Xunit;

namespace PartCheck.Tests.Bills;

public class ReferenceListTests
{
    [Theory]
    [InlineData("R1, R2, R5-R8", "R1 R2 R5 R6 R7 R8")]
    [InlineData("R5,6,7", "R5 R6 R7")]
    [InlineData("C6-7", "C6 C7")]
    [InlineData("R1\u2013R3", "R1 R2 R3")]
    [InlineData("R1 - R3", "R1 R2 R3")]
    [InlineData("Q1.1, Q1.2", "Q1.1 Q1.2")]
    [InlineData("Q1.1-Q1.3", "Q1.1 Q1.2 Q1.3")]
    [InlineData("Q2.1-2, 5", "Q2.1 Q2.2 Q5")]
    [InlineData("R08-R10", "R08 R09 R10")]
    [InlineData("R8-R10", "R8 R9 R10")]
    [InlineData("R1;R2 R3", "R1 R2 R3")]
    [InlineData("R1,", "R1")]
    [InlineData("LED1 DS2", "LED1 DS2")]
    [InlineData("C  2,C  3,C1", "C2 C3 C1")]
    [InlineData("C4/C5", "C4 C5")]
    [InlineData("REF**", "REF**")]
    [InlineData("MP?; G***", "MP? G***")]
    [InlineData("R_SCL,R_SDA", "R_SCL R_SDA")]
    [InlineData("C61,81", "C61 C81")]
    [InlineData("R1-R4 R7-R9 ", "R1 R2 R3 R4 R7 R8 R9")]
    public void ReadsEveryUsualWayOfListing(string text, string references)
    {
        Assert.Null(ReferenceList.Read(text, out IReadOnlyList<string> found));
        Assert.Equal(references.Split(' '), found);
    }

    [Theory]
    [InlineData("R8-R5", "backwards")]
    [InlineData("R1-C4", "keeps its letters")]
    [InlineData("R1-R20000", "longer than 10000")]
    [InlineData("R1-R10001", "longer than 10000")]
    [InlineData("R1-R2000000000", "longer than 10000")]
    [InlineData("R1-R99999999999999999999", "cannot be read")]
    [InlineData("R\u0661-R\u0663", "cannot be read")]
    [InlineData("Q1.1-Q2.4", "keeps its letters")]
    public void RefusesWhatIsNoRange(string text, string reason) =>
        Assert.Contains(reason, ReferenceList.Read(text, out _), StringComparison.Ordinal);

    [Fact]
    public void ATextOfWordsIsOneName()
    {
        Assert.Null(ReferenceList.Read("R1, PIR module, cable 10 cm", out IReadOnlyList<string> found));
        Assert.Equal(["R1", "PIR module", "cable 10 cm"], found);
    }

    [Fact]
    public void ACellOfTooManyReferencesIsRefusedAndNotHeld()
    {
        string text = string.Join(' ', Enumerable.Range(1, 1000).Select(i => "R1-R9999"));
        Assert.Equal("The cell names more than 10000 references.", ReferenceList.Read(text, out IReadOnlyList<string> found));
        Assert.Equal(10_000, found.Count);
    }

    [Fact]
    public void TheLongestRangeIsWrittenOut()
    {
        Assert.Null(ReferenceList.Read("R1-R10000", out IReadOnlyList<string> found));
        Assert.Equal(10_000, found.Count);
        Assert.Equal("R10000", found[^1]);
    }
}
