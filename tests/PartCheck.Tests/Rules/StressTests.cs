using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.Rules;

public class StressTests
{
    [Theory]
    [InlineData(0, 0, 0.0, Verdict.Conforms)]
    [InlineData(1, 0, null, Verdict.Nonconforming)]
    [InlineData(1, -5, null, Verdict.Nonconforming)]
    [InlineData(0, -5, 0.0, Verdict.Conforms)]
    [InlineData(3, 3, 1.0, Verdict.Conforms)]
    [InlineData(double.NaN, 3, null, Verdict.NotVerified)]
    [InlineData(3, double.NaN, null, Verdict.NotVerified)]
    [InlineData(3, double.PositiveInfinity, null, Verdict.NotVerified)]
    public void AtMostAtTheEdges(double actual, double allowed, double? ratio, Verdict verdict)
    {
        Stress stress = Stress.AtMostOf(actual, allowed);
        Assert.Equal(ratio, stress.Ratio);
        Assert.Equal(verdict, stress.Verdict);
    }

    [Theory]
    [InlineData(0, 1, null, Verdict.Nonconforming)]
    [InlineData(-1, 1, null, Verdict.Nonconforming)]
    [InlineData(0, 0, 0.0, Verdict.Conforms)]
    [InlineData(2, 1, 0.5, Verdict.Conforms)]
    [InlineData(-1, 0, null, Verdict.Nonconforming)]
    public void AtLeastAtTheEdges(double actual, double required, double? ratio, Verdict verdict)
    {
        Stress stress = Stress.AtLeastOf(actual, required);
        Assert.Equal(ratio, stress.Ratio);
        Assert.Equal(verdict, stress.Verdict);
    }

    // 45 V x 0.7 is 31.5 V, 0.6 W x 0.75 is 0.45 W; in doubles both products fall short by one part in 2^53.
    [Theory]
    [InlineData(31.5, 45, 0.7)]
    [InlineData(0.45, 0.6, 0.75)]
    public void TheRoundingOfAProductDecidesNothing(double actual, double rating, double factor)
    {
        Assert.True(actual > rating * factor);
        Stress stress = Stress.AtMostOf(actual, rating * factor);
        Assert.Equal(1.0, stress.Ratio);
        Assert.Equal(Verdict.Conforms, stress.Verdict);
        Assert.Equal(Verdict.Nonconforming, Stress.AtMostOf(actual + 1e-9, rating * factor).Verdict);
    }

    [Fact]
    public void TheDefaultIsNotVerified() => Assert.Equal(Verdict.NotVerified, default(Stress).Verdict);

    [Fact]
    public void NoRatioAndNonconformingIsWorst()
    {
        Stress none = Stress.AtMostOf(1, 0);
        Stress high = Stress.AtMostOf(9, 1);
        Assert.True(none.Worse(high) > 0);
        Assert.True(high.Worse(Stress.AtMostOf(1, 2)) > 0);
    }
}
