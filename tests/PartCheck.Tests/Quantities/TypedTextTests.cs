using System.Globalization;
using PartCheck.Quantities;
using Xunit;

namespace PartCheck.Tests.Quantities;

/// <summary>Notations and hostile texts beyond the ordinary ones.</summary>
public class TypedTextTests
{
    // Notations seen on bills of the trade.
    [Theory]
    [InlineData("9K09", 9090)]
    [InlineData("0R15", 0.15)]
    [InlineData("3k9\u03A9", 3900)]
    [InlineData("22k1R", 22100)]
    [InlineData("10kR", 10e3)]
    [InlineData("49.9R", 49.9)]
    [InlineData("2.49k", 2490)]
    [InlineData("1.5KOHMS", 1500)]
    [InlineData("10 k\u03A9", 10e3)]
    [InlineData("2m", 0.002)]
    [InlineData("7.5M", 7.5e6)]
    [InlineData("1.2e3", 1200)]
    [InlineData("1E3 ohm", 1000)]
    [InlineData(".47", 0.47)]
    [InlineData("0", 0)]
    public void ResistancesOfBills(string text, double ohms)
    {
        Assert.True(QuantityParser.TryParse(text, QuantityKind.Resistance, false, null, out QuantityReading reading), text);
        Assert.Equal(ohms, reading.Si);
    }

    [Theory]
    [InlineData("1e400", QuantityTrouble.OutOfRange)]
    [InlineData("-1e400", QuantityTrouble.OutOfRange)]
    [InlineData("1e-400", QuantityTrouble.OutOfRange)]
    [InlineData("1e99999999999999999999", QuantityTrouble.OutOfRange)]
    [InlineData("NaN", QuantityTrouble.NotANumber)]
    [InlineData("Infinity", QuantityTrouble.NotANumber)]
    [InlineData("\u221E", QuantityTrouble.NotANumber)]
    [InlineData("R", QuantityTrouble.NotANumber)]
    [InlineData("K", QuantityTrouble.NotANumber)]
    [InlineData("~", QuantityTrouble.NotANumber)]
    [InlineData("DNP", QuantityTrouble.NotANumber)]
    [InlineData("1.2.3", QuantityTrouble.NotANumber)]
    [InlineData("1,2,3", QuantityTrouble.NotANumber)]
    [InlineData("1/0", QuantityTrouble.NotANumber)]
    [InlineData("4.7 k 1", QuantityTrouble.WrongUnit)]
    [InlineData("10k?", QuantityTrouble.WrongUnit)]
    [InlineData("4K7X", QuantityTrouble.WrongUnit)]
    [InlineData("1 000", QuantityTrouble.NotANumber)]
    [InlineData("\u0664\u0667", QuantityTrouble.NotANumber)]
    [InlineData("   ", QuantityTrouble.Empty)]
    [InlineData(null, QuantityTrouble.Empty)]
    public void WhatIsNoResistance(string? text, QuantityTrouble trouble)
    {
        Assert.False(QuantityParser.TryParse(text, QuantityKind.Resistance, false, null, out QuantityReading reading));
        Assert.Equal((trouble, 0.0), (reading.Trouble, reading.Si));
    }

    [Fact]
    public void ALongTextIsRefusedAtOnce() =>
        Assert.False(QuantityParser.TryParse(new string('1', 1_000_000), QuantityKind.Number, false, null, out _));

    // The double nearest to the decimal typed: 33 x 1e-6 in doubles is 3.2999999999999996e-05, 17.3 x 1e-9 is 1.7300000000000003e-08.
    [Theory]
    [InlineData("4.1 mA", 0.0041)]
    [InlineData("33 uA", 0.000033)]
    [InlineData("0.1 mA", 0.0001)]
    [InlineData("17.3 nA", 0.0000000173)]
    public void PrefixesDoNotRoundTwice(string text, double amperes)
    {
        QuantityParser.TryParse(text, QuantityKind.Current, false, null, out QuantityReading reading);
        Assert.Equal(amperes, reading.Si);
    }

    [Theory]
    [InlineData("\u00B15 %", QuantityKind.Percent, 0.05)]
    [InlineData("+/-100 ppm/K", QuantityKind.TemperatureCoefficient, 1e-4)]
    [InlineData("\u221240 \u00B0C", QuantityKind.Temperature, 233.15)]
    [InlineData("25", QuantityKind.Temperature, 298.15)]
    [InlineData("1V8", QuantityKind.Voltage, 1.8)]
    public void SignsAndOffsets(string text, QuantityKind kind, double si)
    {
        Assert.True(QuantityParser.TryParse(text, kind, false, null, out QuantityReading reading), text);
        Assert.Equal(si, reading.Si);
    }

    [Fact]
    public void EitherSignIsNoVoltage() => Assert.False(QuantityParser.TryParse("\u00B15 V", QuantityKind.Voltage, false, null, out _));

    [Theory]
    [InlineData("1.500", QuantityTrouble.DecimalSign)]
    [InlineData("999.999", QuantityTrouble.DecimalSign)]
    [InlineData("1.50", QuantityTrouble.None)]
    [InlineData("0.047", QuantityTrouble.None)]
    [InlineData("1,500", QuantityTrouble.None)]
    public void APointInAFileOfCommas(string text, QuantityTrouble trouble)
    {
        QuantityParser.TryParse(text, QuantityKind.Voltage, true, null, out QuantityReading reading);
        Assert.Equal(trouble, reading.Trouble);
    }

    // IEC 60062:2016 + Amd 1:2019: tolerance letters B 0.1 %, C 0.25 %, D 0.5 %, F 1 %, G 2 %, J 5 %, K 10 %, M 20 %, N 30 %.
    [Theory]
    [InlineData("4K7B", 4700, 0.001)]
    [InlineData("4K7C", 4700, 0.0025)]
    [InlineData("R22D", 0.22, 0.005)]
    [InlineData("R047F", 0.047, 0.01)]
    [InlineData("1MG", 1e6, 0.02)]
    [InlineData("470RJ", 470, 0.05)]
    [InlineData("47KK", 47e3, 0.10)]
    [InlineData("4M7M", 4.7e6, 0.20)]
    [InlineData("4L7N", 0.0047, 0.30)]
    public void ToleranceLettersFollowTheMultiplier(string text, double ohms, double tolerance)
    {
        Assert.True(RkmCode.TryParse(text, out double read, out double? letter));
        Assert.Equal((ohms, tolerance), (read, letter));
    }

    [Theory]
    [InlineData("47")]
    [InlineData("4K7K7")]
    [InlineData("47F")]
    [InlineData("K")]
    [InlineData("")]
    public void WhatIsNoCode(string text) => Assert.False(RkmCode.TryParse(text, out _, out _));

    [Theory]
    [InlineData(QuantityKind.Temperature, 298.15, "25 degC")]
    [InlineData(QuantityKind.Percent, 0.05, "5 %")]
    [InlineData(QuantityKind.TemperatureCoefficient, 1e-4, "100 ppm/K")]
    [InlineData(QuantityKind.ThermalResistance, 1234.56, "1235 K/W")]
    [InlineData(QuantityKind.PowerSlope, 0.00308, "3.08 mW/K")]
    [InlineData(QuantityKind.Number, 1234567, "1235000")]
    [InlineData(QuantityKind.Voltage, 1.5e12, "1500 GV")]
    [InlineData(QuantityKind.Current, -0.0, "0 A")]
    public void ValuesArePrintedInTheUnitOfTheirKind(QuantityKind kind, double si, string text)
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo("fr-FR");
        Assert.Equal(text, EngineeringNotation.FormatAs(kind, si));
        CultureInfo.CurrentCulture = before;
    }

    [Fact]
    public void WhatIsNoNumberIsNotPrinted() =>
        Assert.Throws<ArgumentOutOfRangeException>(() => EngineeringNotation.Format(double.NaN, "V"));

    // IEC 60063:2015: a 1 % part of 33 ohm or 4.7 kohm lies outside E96 (33.2, 4.64, 4.75); 4.7 kohm lies in E6.
    [Fact]
    public void NeighboursInASeries()
    {
        Assert.False(PreferredValues.Contains(PreferredSeries.E96, 33));
        Assert.Equal(33.2, PreferredValues.AtOrAbove(PreferredSeries.E96, 33));
        Assert.Equal(4640, PreferredValues.AtOrBelow(PreferredSeries.E96, 4700));
        Assert.Equal(4750, PreferredValues.AtOrAbove(PreferredSeries.E96, 4700));
        Assert.True(PreferredValues.Contains(PreferredSeries.E6, 4700));
        Assert.Equal(1000, PreferredValues.AtOrAbove(PreferredSeries.E24, 911));
        Assert.Equal(0.91, PreferredValues.AtOrBelow(PreferredSeries.E24, 0.99));
        Assert.False(PreferredValues.Contains(PreferredSeries.E24, 0));
        Assert.False(PreferredValues.Contains(PreferredSeries.E24, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => PreferredValues.AtOrAbove(PreferredSeries.E24, -1));
    }
}
