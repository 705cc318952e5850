using PartCheck.Workings;
using Xunit;

namespace PartCheck.Tests.Workings;

/// <summary>Rounding for print, by hand.</summary>
public class PrintedFigureTests
{
    [Theory]
    [InlineData(0.2180245, "W", "218.025 mW", 0.218025)]
    [InlineData(0.43605 * 0.5, "W", "218.025 mW", 0.218025)]
    [InlineData(-0.2180245, "W", "-218.025 mW", -0.218025)]
    [InlineData(0.9999996, "A", "1 A", 1)]
    [InlineData(0, "V", "0 V", 0)]
    [InlineData(1.23456789e-17, "A", "12.3457 aA", 1.23457e-17)]
    [InlineData(8.617333262e-5, "V/K", "86.1733 uV/K", 8.61733e-5)]
    [InlineData(0.01, "%", "1 %", 0.01)]
    [InlineData(1e-4, "ppm/K", "100 ppm/K", 1e-4)]
    [InlineData(55, "degC", "55 degC", 55)]
    [InlineData(-40.0005, "degC", "-40.001 degC", -40.001)]
    [InlineData(125.82649, "degC", "125.826 degC", 125.826)]
    [InlineData(1.366155, "", "1.36616", 1.36616)]
    public void AFigureIsRoundedHalfAwayFromZero(double value, string unit, string text, double printed)
    {
        PrintedFigure figure = PrintedFigure.Of(value, unit);
        Assert.Equal(text, figure.Text);
        Assert.Equal(printed, figure.Value, Math.Abs(printed) * 1e-12);
        Assert.InRange(Math.Abs(figure.Value - value), 0, figure.Half * (1 + 1e-9));
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void WhatIsNoNumberIsAMistake(double value) => Assert.ThrowsAny<ArgumentException>(() => PrintedFigure.Of(value, "V"));
}
