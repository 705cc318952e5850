using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.Rules;

/// <summary>
/// What every rule must show: a case below, at and above its limit and one with the rating missing. A rule's test class that
/// leaves one out does not compile.
/// </summary>
public abstract class RuleTests
{
    protected abstract Stress Below();

    protected abstract Stress AtTheLimit();

    protected abstract Stress Above();

    protected abstract Stress WithoutTheRating();

    [Fact]
    public void BelowTheLimitConforms()
    {
        Stress stress = Below();
        Assert.Equal(Verdict.Conforms, stress.Verdict);
        Assert.NotNull(stress.Ratio);
        Assert.InRange(stress.Ratio.Value, 0, 0.999);
    }

    [Fact]
    public void ExactlyAtTheLimitConforms()
    {
        Stress stress = AtTheLimit();
        Assert.Equal(Verdict.Conforms, stress.Verdict);
        Assert.NotNull(stress.Ratio);
        Assert.InRange(stress.Ratio.Value, 0.9999, 1.0);
    }

    [Fact]
    public void AboveTheLimitIsNonconforming()
    {
        Stress stress = Above();
        Assert.Equal(Verdict.Nonconforming, stress.Verdict);
        Assert.True(stress.Ratio is null or > 1.0, $"{stress.Ratio}");
    }

    [Fact]
    public void AMissingRatingIsNotVerifiedAndNamed()
    {
        Stress stress = WithoutTheRating();
        Assert.Equal(Verdict.NotVerified, stress.Verdict);
        Assert.False(string.IsNullOrEmpty(stress.Missing));
    }
}
