using PartCheck.Quantities;
using Xunit;

namespace PartCheck.Tests.Quantities;

public class QuantityUnitsTests
{
    // m is milli, M is mega, in every kind; u and both code points of micro are one.
    [Theory]
    [InlineData("mA", QuantityKind.Current, -3)]
    [InlineData("MA", QuantityKind.Current, 6)]
    [InlineData("ma", QuantityKind.Current, -3)]
    [InlineData("pA", QuantityKind.Current, -12)]
    [InlineData("nA", QuantityKind.Current, -9)]
    [InlineData("\u00B5A", QuantityKind.Current, -6)]
    [InlineData("\u03BCA", QuantityKind.Current, -6)]
    [InlineData("kV", QuantityKind.Voltage, 3)]
    [InlineData("KV", QuantityKind.Voltage, 3)]
    [InlineData("Mohm", QuantityKind.Resistance, 6)]
    [InlineData("mohm", QuantityKind.Resistance, -3)]
    [InlineData("MEG", QuantityKind.Resistance, 6)]
    [InlineData("G\u2126", QuantityKind.Resistance, 9)]
    [InlineData("k \u03A9", QuantityKind.Resistance, 3)]
    [InlineData("kR", QuantityKind.Resistance, 3)]
    [InlineData("K", QuantityKind.Resistance, 3)]
    [InlineData("K", QuantityKind.TemperatureDelta, 0)]
    [InlineData("\u00B0C", QuantityKind.TemperatureDelta, 0)]
    [InlineData("K/mW", QuantityKind.ThermalResistance, 3)]
    [InlineData("deg C / W", QuantityKind.ThermalResistance, 0)]
    [InlineData("mW/\u00B0C", QuantityKind.PowerSlope, -3)]
    [InlineData("mA/\u00B0C", QuantityKind.CurrentSlope, -3)]
    [InlineData("MHz", QuantityKind.Frequency, 6)]
    [InlineData("us", QuantityKind.Time, -6)]
    [InlineData("%", QuantityKind.Percent, -2)]
    [InlineData("ppm/\u00B0C", QuantityKind.TemperatureCoefficient, -6)]
    [InlineData("%/K", QuantityKind.TemperatureCoefficient, -2)]
    public void UnitsAndPrefixes(string text, QuantityKind kind, int exponent)
    {
        Assert.True(QuantityUnits.TryFind(text, kind, out QuantityUnit unit));
        Assert.Equal(new QuantityUnit(exponent), unit);
    }

    // 0 degC = 273.15 K (SI Brochure, 2.3.1).
    [Theory]
    [InlineData("degC", 273.15)]
    [InlineData("deg C", 273.15)]
    [InlineData("\u00B0C", 273.15)]
    [InlineData("\u00BAC", 273.15)]
    [InlineData("\u2103", 273.15)]
    [InlineData("C", 273.15)]
    [InlineData("K", 0)]
    public void TemperaturesHaveAnOffset(string text, double offset)
    {
        Assert.True(QuantityUnits.TryFind(text, QuantityKind.Temperature, out QuantityUnit unit));
        Assert.Equal(new QuantityUnit(0, offset), unit);
    }

    [Theory]
    [InlineData("V", QuantityKind.Current)]
    [InlineData("m", QuantityKind.Current)]
    [InlineData("", QuantityKind.Resistance)]
    [InlineData("S", QuantityKind.Time)]
    [InlineData("k", QuantityKind.Temperature)]
    [InlineData("\u00B0F", QuantityKind.Temperature)]
    [InlineData("k%", QuantityKind.Percent)]
    [InlineData("W", QuantityKind.PowerSlope)]
    [InlineData("mA", QuantityKind.CurrentSlope)]
    [InlineData("V", QuantityKind.Number)]
    public void OtherUnitsAreNone(string text, QuantityKind kind) => Assert.False(QuantityUnits.TryFind(text, kind, out _));

    [Fact]
    public void EveryKindSaysWhatIsWantedAndItsExampleIsReadByItself()
    {
        foreach (QuantityKind kind in Enum.GetValues<QuantityKind>().Where(kind => kind != QuantityKind.Number))
        {
            string wanted = QuantityUnits.WantedOf(kind);
            string example = wanted[(wanted.IndexOf("such as ", StringComparison.Ordinal) + 8)..].Split(',')[0];
            Assert.True(QuantityParser.TryParse(example, kind, false, null, out QuantityReading reading), wanted);
            Assert.False(reading.BareNumber);
        }

        Assert.Equal("a number", QuantityUnits.WantedOf(QuantityKind.Number));
    }
}
