using PartCheck.Rules;
using PartCheck.Workings;
using Xunit;

namespace PartCheck.Tests.Workings;

/// <summary>A working that does not come to what the rule said is never shown.</summary>
public class FindingWorkingTests
{
    [Fact]
    public void AFigureThatIsNotTheRulesFailsLoudly()
    {
        IReadOnlyList<Finding> findings = [.. new RandomCorners(5).Findings(20).Where(f => f is { Basis: not null, StressRatio: > 0.001 and < 1000 }).DistinctBy(f => f.Rule)];
        Assert.InRange(findings.Count, 8, 17);
        Assert.All(findings, f =>
        {
            Assert.NotNull(FindingWorking.Of(f));
            Assert.Contains("does not reproduce", Fails(f with { Allowed = f.Allowed * 1.0001 }), StringComparison.Ordinal);
            Assert.Contains("does not reproduce", Fails(f with { StressRatio = f.StressRatio * 1.0001 }), StringComparison.Ordinal);
            Assert.Contains("does not reproduce", Fails(f with { Actual = f.Actual * 1.0001 }), StringComparison.Ordinal);
        });
    }

    private static string Fails(Finding finding) => Assert.Throws<NotReproducedException>(() => FindingWorking.Of(finding)).Message;
}
