using System.Globalization;
using PartCheck.Quantities;
using Xunit;

namespace PartCheck.Tests.Quantities;

public class QuantityParserTests
{
    [Theory]
    [InlineData("11 mA", QuantityKind.Current, 0.011)]
    [InlineData("11mA", QuantityKind.Current, 0.011)]
    [InlineData("0.2", QuantityKind.Current, 0.2)]
    [InlineData("200 \u00B5A", QuantityKind.Current, 200e-6)]
    [InlineData("200 \u03BCA", QuantityKind.Current, 200e-6)]
    [InlineData("10 uA", QuantityKind.Current, 10e-6)]
    [InlineData("3V3", QuantityKind.Voltage, 3.3)]
    [InlineData("-5 V", QuantityKind.Voltage, -5)]
    [InlineData("1/8 W", QuantityKind.Power, 0.125)]
    [InlineData("1/4W", QuantityKind.Power, 0.25)]
    [InlineData("250 mW", QuantityKind.Power, 0.25)]
    [InlineData("-40", QuantityKind.Temperature, 233.15)]
    [InlineData("85 \u00B0C", QuantityKind.Temperature, 358.15)]
    [InlineData("85 degC", QuantityKind.Temperature, 358.15)]
    [InlineData("300 K", QuantityKind.Temperature, 300)]
    [InlineData("325 K/W", QuantityKind.ThermalResistance, 325)]
    [InlineData("325 \u00B0C/W", QuantityKind.ThermalResistance, 325)]
    [InlineData("3.08 mW/K", QuantityKind.PowerSlope, 3.08e-3)]
    [InlineData("1 %", QuantityKind.Percent, 0.01)]
    [InlineData("5", QuantityKind.Percent, 0.05)]
    [InlineData("100 ppm/K", QuantityKind.TemperatureCoefficient, 100e-6)]
    [InlineData("50 ppm/\u00B0C", QuantityKind.TemperatureCoefficient, 50e-6)]
    [InlineData("1.2 kHz", QuantityKind.Frequency, 1200)]
    [InlineData("10 ms", QuantityKind.Time, 0.01)]
    public void ReadsWhatPeopleType(string text, QuantityKind kind, double si)
    {
        Assert.True(QuantityParser.TryParse(text, kind, false, null, out QuantityReading reading), reading.Wanted);
        Assert.Equal(si, reading.Si, 12);
    }

    // IEC 60062: the letter stands in the place of the decimal point (examples as published; R, K, M, L).
    [Theory]
    [InlineData("R47", 0.47)]
    [InlineData("4R7", 4.7)]
    [InlineData("470R", 470)]
    [InlineData("4K7", 4700)]
    [InlineData("47K", 47e3)]
    [InlineData("47K3", 47.3e3)]
    [InlineData("4M7", 4.7e6)]
    [InlineData("R047", 0.047)]
    [InlineData("4L7", 0.0047)]
    [InlineData("4K7K", 4700)]
    [InlineData("2k2", 2200)]
    [InlineData("10k", 10e3)]
    [InlineData("1M", 1e6)]
    [InlineData("2m", 0.002)]
    [InlineData("4.7 kohm", 4700)]
    [InlineData("10k\u03A9", 10e3)]
    [InlineData("10 k\u2126", 10e3)]
    [InlineData("100ohm", 100)]
    [InlineData("330OHMS", 330)]
    [InlineData("0R", 0)]
    [InlineData("330", 330)]
    public void ReadsResistances(string text, double ohms)
    {
        Assert.True(QuantityParser.TryParse(text, QuantityKind.Resistance, false, null, out QuantityReading reading), reading.Wanted);
        Assert.Equal(ohms, reading.Si, 9);
    }

    [Theory]
    [InlineData("4K7K", 0.10)]
    [InlineData("4K7F", 0.01)]
    [InlineData("47RJ", 0.05)]
    public void RkmCodesMayCarryATolerance(string text, double tolerance)
    {
        Assert.True(RkmCode.TryParse(text, out _, out double? read));
        Assert.Equal(tolerance, read);
    }

    [Theory]
    [InlineData("4,7k", 4700)]
    [InlineData("0,47", 0.47)]
    public void ADecimalCommaIsReadWhereTheFileWritesOne(string text, double ohms)
    {
        Assert.True(QuantityParser.TryParse(text, QuantityKind.Resistance, true, null, out QuantityReading reading));
        Assert.Equal(ohms, reading.Si, 9);
        Assert.False(QuantityParser.TryParse(text, QuantityKind.Resistance, false, null, out _));
    }

    [Theory]
    [InlineData("", QuantityKind.Voltage, QuantityTrouble.Empty)]
    [InlineData("twelve", QuantityKind.Voltage, QuantityTrouble.NotANumber)]
    [InlineData("NaN", QuantityKind.Voltage, QuantityTrouble.NotANumber)]
    [InlineData("1e400", QuantityKind.Voltage, QuantityTrouble.OutOfRange)]
    [InlineData("12 A", QuantityKind.Voltage, QuantityTrouble.WrongUnit)]
    [InlineData("12 V", QuantityKind.Current, QuantityTrouble.WrongUnit)]
    public void SaysWhatIsWrong(string text, QuantityKind kind, QuantityTrouble trouble)
    {
        Assert.False(QuantityParser.TryParse(text, kind, false, null, out QuantityReading reading));
        Assert.Equal(trouble, reading.Trouble);
        Assert.NotEmpty(reading.Wanted);
    }

    [Theory]
    [InlineData(0.010857, "A", "10.86 mA")]
    [InlineData(1.5, "V", "1.5 V")]
    [InlineData(0, "A", "0 A")]
    [InlineData(0.99996, "A", "1 A")]
    [InlineData(4700, "ohm", "4.7 kohm")]
    [InlineData(-0.002, "W", "-2 mW")]
    [InlineData(3.2e-14, "A", "32 fA")]
    [InlineData(1.40341e-19, "A", "140.3 zA")]
    [InlineData(2.5e-23, "A", "0.025 zA")]
    public void PrintsEngineeringNotationInAnyCulture(double si, string unit, string text)
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo("de-DE");
            Assert.Equal(text, EngineeringNotation.Format(si, unit));
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    // IEC 60063: E24 as printed there; E96 = round(100 x 10^(i/96)); E192 has its one exception at 920.
    [Fact]
    public void PreferredValuesAreTheStandards()
    {
        Assert.Equal(
            [100, 110, 120, 130, 150, 160, 180, 200, 220, 240, 270, 300, 330, 360, 390, 430, 470, 510, 560, 620, 680, 750, 820, 910],
            PreferredValues.Decade(PreferredSeries.E24));
        Assert.Equal(96, PreferredValues.Decade(PreferredSeries.E96).Count);
        Assert.Contains(332, PreferredValues.Decade(PreferredSeries.E96));
        Assert.Contains(976, PreferredValues.Decade(PreferredSeries.E96));
        Assert.Contains(920, PreferredValues.Decade(PreferredSeries.E192));
        Assert.DoesNotContain(919, PreferredValues.Decade(PreferredSeries.E192));
        Assert.Contains(298, PreferredValues.Decade(PreferredSeries.E192));
    }

    [Fact]
    public void AQuantityRefusesWhatIsNoNumber()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => Voltage.FromVolts(double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => Current.FromAmperes(double.PositiveInfinity));
        Assert.Throws<ArgumentOutOfRangeException>(() => Temperature.FromKelvins(-1));
        Assert.Equal(-40, Temperature.FromCelsius(-40).Celsius, 9);
    }
}
