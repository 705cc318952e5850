using PartCheck.Parts;
using PartCheck.Sheets;
using PartCheck.Tests.Bills;
using Xunit;

namespace PartCheck.Tests.Parts;

public sealed class LogicPinReaderTests
{
    private const string Header = "Name|Output|Supply min|Supply max|High min|High current|High min 2|High current 2|Low max|Low current|Pin current max";
    private readonly TypedSheet typed = new();

    [Fact]
    public void ARowIsReadInSi()
    {
        LogicPin pin = Assert.Single(Read("P5|CMOS|4.5|5.5|3.84|4mA|4.4|20uA|0.4|4mA|20mA"));
        Assert.Equal(PinOutput.Cmos, pin.Output);
        Assert.Equal([(3.84, 0.004), (4.4, 0.00002)], pin.High.Select(h => (h.Min.Volts, Math.Round(h.Current.Amperes, 9))));
        Assert.Equal(0.02, pin.PinCurrentMax!.Value.Amperes, 12);
        Assert.Empty(typed.Complaints);
    }

    [Theory]
    [InlineData("P5|open|4.5|5.5|3.84|4mA", "The output kind \"open\" is not known.")]
    [InlineData("|cmos|4.5|5.5|3.84|4mA", "The row names no pin.")]
    [InlineData("P5|cmos|5.5|4.5|3.84|4mA", "Supply min is above Supply max.")]
    [InlineData("P5|cmos|4.5|5.5||4mA", "High min of the pin is missing.")]
    [InlineData("P5|cmos|4.5|5.5|3.84|", "High current of the pin is missing.")]
    [InlineData("P5|cmos|4.5|5.5|3.84|4", "most likely in another unit")]
    [InlineData("P5|cmos|4.5|5.5|3.84|-4mA", "F2")]
    [InlineData("P5|cmos|3|3.6|4.2|4mA", "The high level is above the pin's supply.")]
    [InlineData("P5|cmos|3|3.6|2.4|2mA|4.4|20uA", "The second high level is above the pin's supply.")]
    [InlineData("P5|cmos|4.5|5.5|3.84|4mA|4.4|", "needs both its voltage and its current")]
    [InlineData("P5|cmos|4.5|5.5|0.4|4mA|||3.84|4mA", "The low level is not below the high level.")]
    [InlineData("P5|cmos|4.5|5.5|3.84|4mA|||0.4|4mA|5 V", "unit of another kind")]
    public void AMistakeIsToldAndTheRowLeftOut(string row, string text)
    {
        Assert.Empty(Read(row));
        Assert.Contains(text, typed.Only(), StringComparison.Ordinal);
    }

    [Fact]
    public void APinTwiceIsToldWithBothCells()
    {
        Read("P5|cmos|4.5|5.5|3.84|4mA", "p5|ttl|4.5|5.5|2.4|4mA");
        Assert.Equal("A3 The pin p5 stands in the table twice; the other row is pins.csv!A2.", typed.Only());
    }

    // Levels as makers' tables print them; none of these pages carries a pin rating.
    [Theory]
    [InlineData("LVTTL-3V0", PinOutput.Ttl, 2.4, 0.002)]
    [InlineData("LVCMOS-3V0", PinOutput.Cmos, 2.8, 0.0001)]
    [InlineData("LVCMOS-2V5", PinOutput.Cmos, 2.0, 0.001)]
    [InlineData("LVCMOS-1V8", PinOutput.Cmos, 1.26, 0.002)]
    [InlineData("HC-5V", PinOutput.Cmos, 3.84, 0.004)]
    [InlineData("AHCT-5V", PinOutput.Cmos, 3.8, 0.008)]
    public void ThePinsThatTravelInsideHaveTheirPrintedLevelsAndNoRating(string name, PinOutput output, double volts, double amperes)
    {
        SheetData? sheet = SheetFile.Embedded("partdata/logic-pins.csv", typed.List);
        IReadOnlyList<LogicPin> pins = LogicPinReader.Read(sheet!, typed.Spellings, typed.List);
        Assert.Empty(typed.Complaints);
        Assert.Equal(6, pins.Count);
        LogicPin pin = Assert.Single(pins, p => p.Name == name);
        Assert.Equal((output, volts, amperes), (pin.Output, pin.High[0].Min.Volts, Math.Round(pin.High[0].Current.Amperes, 9)));
        Assert.Null(pin.PinCurrentMax);
        Assert.False(string.IsNullOrEmpty(pin.Source));
    }

    private IReadOnlyList<LogicPin> Read(params string[] rows) =>
        LogicPinReader.Read(TypedSheet.Of("pins.csv", [Header, .. rows]), typed.Spellings, typed.List);
}
