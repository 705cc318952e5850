using PartCheck.Workings;
using Xunit;

namespace PartCheck.Tests.Workings;

/// <summary>The program's own reading of formulas, by hand.</summary>
public class FormulaTests
{
    [Theory]
    [InlineData("1 + 2 x 3", 7)]
    [InlineData("8 / 4 / 2", 1)]
    [InlineData("10 - 4 - 3", 3)]
    [InlineData("2 ^ 3 ^ 2", 512)]
    [InlineData("-2 ^ 2", -4)]
    [InlineData("min(3, 1, 2) + max(4, 6)", 7)]
    [InlineData("2 x ln(exp(3)) - sqrt(16) + abs(-1)", 3)]
    [InlineData("298.15 K - 20 degC", 278.15)]
    [InlineData("1 - 5 %", 0.95)]
    public void ItIsWorkedOutAsAPersonDoes(string text, double value) => Assert.Equal(value, Formula.Parse(text).Evaluate(_ => 0), 12);

    [Fact]
    public void FiguresTakeThePlaceOfSymbols()
    {
        Formula formula = Formula.Parse("(Ta + IC x k') / 2 - IC");
        Assert.Equal(["Ta", "IC", "k'"], formula.Symbols);
        Assert.Equal("((-10 degC) + 2 mA x 3) / 2 - 2 mA", formula.With(s => s switch { "Ta" => "-10 degC", "IC" => "2 mA", _ => "3" }));
    }

    [Theory]
    [InlineData("1 +")]
    [InlineData("(1")]
    [InlineData("1)")]
    [InlineData("min 3")]
    [InlineData("a b")]
    [InlineData("a * b")]
    [InlineData("1 parsec")]
    public void WhatIsNoFormulaIsAMistake(string text) => Assert.Throws<FormatException>(() => Formula.Parse(text));
}
