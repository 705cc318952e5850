using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.Rules;

/// <summary>
/// What every rule must show: a case below, at and above its limit, one with the rating missing and one where nobody asks for it. A
/// rule's test class that leaves one out does not compile; a rule without such a class fails <see cref="RuleBookTests"/>.
/// </summary>
public abstract class RuleTests
{
    /// <summary>Identifier of the rule.</summary>
    public abstract string Id { get; }

    /// <summary>The rule's own word on whether it is judged where neither table nor channel asks for it.</summary>
    protected abstract bool AlwaysAsked { get; }

    protected abstract Stress Below();

    protected abstract Stress AtTheLimit();

    protected abstract Stress Above();

    protected abstract Stress WithoutTheRating();

    /// <summary>True where the rule is judged although part, channel and derating table give nothing that asks for it.</summary>
    protected abstract bool AskedByNobody();

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

    /// <summary>A rule that nobody asks for is not listed; one that is always asked cannot be silenced by leaving its rating out.</summary>
    [Fact]
    public void WhereNobodyAsksOnlyARuleThatIsAlwaysAskedIsJudged() => Assert.Equal(AlwaysAsked, AskedByNobody());
}

/// <summary>The same for a rule that reads states.</summary>
public abstract class RuleTests<TRule> : RuleTests
    where TRule : Rule, new()
{
    public override string Id => Rule.Id;

    protected static TRule Rule { get; } = new();

    protected override bool AlwaysAsked => Rule.AlwaysAsked;
}

/// <summary>
/// What an exact rule must show, which has no limit to be below of: a case that agrees, one that does not, one where data is missing
/// and one that it does not judge.
/// </summary>
public abstract class ExactRuleTests
{
    /// <summary>Identifier of the rule.</summary>
    public abstract string Id { get; }

    protected abstract Finding Agreeing();

    protected abstract Finding Disagreeing();

    protected abstract Finding WithoutTheRow();

    protected abstract IReadOnlyList<Finding> NotAsked();

    [Fact]
    public void WhatAgreesConforms()
    {
        Assert.Equal(Verdict.Conforms, Agreeing().Verdict);
        Assert.Null(Agreeing().StressRatio);
    }

    [Fact]
    public void WhatDoesNotAgreeIsNonconformingAndSaysWhy()
    {
        Assert.Equal(Verdict.Nonconforming, Disagreeing().Verdict);
        Assert.False(string.IsNullOrEmpty(Disagreeing().Text));
    }

    [Fact]
    public void MissingDataIsNotVerifiedAndNamed()
    {
        Assert.Equal(Verdict.NotVerified, WithoutTheRow().Verdict);
        Assert.NotEmpty(WithoutTheRow().Missing);
    }

    [Fact]
    public void WhatItDoesNotJudgeIsNotListed() => Assert.Empty(NotAsked());
}
