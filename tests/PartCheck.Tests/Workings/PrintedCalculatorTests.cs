using Xunit;

namespace PartCheck.Tests.Workings;

/// <summary>The test's own calculator is held to sums done by hand.</summary>
public class PrintedCalculatorTests
{
    [Theory]
    [InlineData("1 + 2 x 3", 7)]
    [InlineData("(1 + 2) x 3", 9)]
    [InlineData("8 / 4 / 2", 1)]
    [InlineData("10 - 4 - 3", 3)]
    [InlineData("2 ^ 3 ^ 2", 512)]
    [InlineData("-2 + 5", 3)]
    [InlineData("(-40 degC) - 20 degC", -60)]
    [InlineData("abs((-10 degC) - 20 degC)", 30)]
    [InlineData("55 degC + 330 K/W x 200 mW", 121)]
    [InlineData("33 ohm x (1 - 1 %)", 32.67)]
    [InlineData("min(3, 1, 2) + max(4, 6)", 7)]
    [InlineData("sqrt(50 mW x 2 ohm)", 0.3162277660168379)]
    [InlineData("2 x ln(exp(3))", 6)]
    [InlineData("4.7 kohm x 2 mA", 9.4)]
    [InlineData("1 - 100 ppm/K x 50 K", 0.995)]
    [InlineData("86.1733 uV/K x 300 K", 0.02585199)]
    public void ItDoesSumsAsAPersonDoes(string text, double value) => Assert.Equal(value, PrintedCalculator.Evaluate(text, new Dictionary<string, double>()), 12);

    [Fact]
    public void ItKnowsSymbols() =>
        Assert.Equal(10, PrintedCalculator.Evaluate("IC x k' - 2", new Dictionary<string, double> { ["IC"] = 4, ["k'"] = 3 }), 12);

    [Theory]
    [InlineData("1 +")]
    [InlineData("1 2")]
    [InlineData("(1")]
    [InlineData("1 parsec")]
    [InlineData("Q")]
    public void WhatIsNoExpressionFails(string text) =>
        Assert.ThrowsAny<Exception>(() => PrintedCalculator.Evaluate(text, new Dictionary<string, double>()));
}
