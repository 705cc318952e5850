using PartCheck.Parts;
using PartCheck.Tests.Bills;
using Xunit;

namespace PartCheck.Tests.Parts;

public sealed class PartTableReaderTests
{
    private readonly TypedSheet typed = new();

    [Fact]
    public void ATransistorsRowIsReadInSi()
    {
        Transistor part = Npn(
            "VCEO [V]|IC [mA]|Power [mW]|RthJA [K/W]|Tj max [degC]|hFE points|hFE cold min|hFE cold at [mA]|hFE cold temperature [degC]|VBE min [mV]|VBE max [V]|VBE at [mA]|SOA|Zth points|ICBO max [nA]|ICBO temperature [degC]",
            "45|200|350|350|150|10mA:100..; 0.1mA:50..; 1mA:75..325|35|10|-55|600|0.7|10|20V:80mA; 5V:200mA|10ms:60; 1ms:25|100|125");
        Assert.Empty(typed.Complaints);
        Assert.Equal(0.2, part.Ic!.Value.Amperes, 12);
        Assert.Equal(0.35, part.Power!.Value.Watts, 12);
        Assert.Equal(423.15, part.TjMax!.Value.Kelvins, 9);
        Assert.Equal([1e-4, 1e-3, 1e-2], part.Hfe!.Value.Select(p => Math.Round(p.At.Amperes, 9)));
        Assert.Equal([(50.0, null), (75.0, 325.0), (100.0, (double?)null)], part.Hfe.Value.Select(p => (p.Min!.Value, p.Max)));
        Assert.Equal((35, 218.15), (part.HfeCold!.Value.Min, Math.Round(part.HfeCold.Value.Temperature.Kelvins, 9)));
        Assert.Equal(0.6, part.Vbe!.Value.Min!.Value.Volts, 12);
        Assert.Equal([5.0, 20.0], part.Soa!.Value.Select(p => p.Vce.Volts));
        Assert.Equal([25.0, 60.0], part.Zth.Select(p => p.Zth.KelvinsPerWatt));
        Assert.Equal(1e-7, part.IcboMax!.Value.Amperes, 15);
        Assert.Equal(398.15, part.IcboTemperature!.Value.Kelvins, 9);
        Assert.Equal("p.csv!D2", part.Ic.Cell);
    }

    [Fact]
    public void AResistorsToleranceIsAShareAndItsTcrPerKelvin()
    {
        ResistorPart part = Assert.IsType<ResistorPart>(Assert.Single(Read("Part number|Kind|Resistance|Tolerance|TCR", "RK|resistor|4k7|1%|100 ppm/K")));
        Assert.Equal((4700.0, 0.01, 1e-4), (part.Resistance.Value.Ohms, Math.Round(part.Tolerance!.Value, 12), Math.Round(part.Tcr!.Value, 12)));
    }

    [Fact]
    public void AnLedsRowIsReadInSi()
    {
        LedPart part = Assert.IsType<LedPart>(Assert.Single(Read(
            "Part number|Kind|IF [mA]|IF flat to [degC]|Forward current derating|Tj max", "LW|LED|30|60|0.6 mA/K|105")));
        Assert.Empty(typed.Complaints);
        Assert.Equal(0.03, part.ForwardCurrentMax!.Value.Amperes, 12);
        Assert.Equal(333.15, part.FlatTo.Kelvins, 9);
        Assert.Equal(0.6e-3, part.ForwardCurrentSlope!.Value, 12);
        Assert.Equal(378.15, part.TjMax!.Value.Kelvins, 9);
        Assert.Equal("p.csv!C2", part.ForwardCurrentMax.Cell);
    }

    [Theory]
    [InlineData("500", "350", "200", "300", "2", null)]
    [InlineData("500", "250", "200", "400", "2", null)]
    [InlineData("500", "249", "200", "300", "2", "RthJA both lies between RthJA and RthJA over the number of elements")]
    [InlineData("500", "501", "200", "300", "2", "RthJA both lies between RthJA and RthJA over the number of elements")]
    [InlineData("500", "", "200", "199", "2", "Power both lies between Power")]
    [InlineData("500", "", "200", "401", "2", "Power both lies between Power")]
    [InlineData("500", "350", "200", "", "", "RthJA both is of a package of several transistors, and Elements says one.")]
    [InlineData("500", "", "200", "300", "1", "Power both is of a package of several transistors, and Elements says one.")]
    public void FiguresOfAPackageFitThoseOfItsElements(string one, string both, string power, string powerBoth, string elements, string? told)
    {
        IReadOnlyList<Part> parts = Read("Part number|Kind|RthJA|RthJA both|Power [mW]|Power both [mW]|Elements", $"X|npn|{one}|{both}|{power}|{powerBoth}|{elements}");
        if (told is null)
        {
            Transistor part = Assert.IsType<Transistor>(Assert.Single(parts));
            Assert.Equal(double.Parse(both, System.Globalization.CultureInfo.InvariantCulture), part.RthJaBoth!.Value.KelvinsPerWatt);
            Assert.Equal(double.Parse(powerBoth, System.Globalization.CultureInfo.InvariantCulture) / 1000, part.PowerBoth!.Value.Watts, 9);
        }
        else
        {
            Assert.Empty(parts);
            Assert.Contains(told, typed.Only(), StringComparison.Ordinal);
        }
    }

    [Theory]
    [InlineData("IF", "30", "most likely in another unit")]
    [InlineData("IF slope", "0.6 mA/K", "A slope of the forward current needs IF beside it.")]
    [InlineData("Tj max", "20 degC", "F2")]
    [InlineData("IF flat to", "110", "Tj max is not above the temperature up to which the forward current holds.")]
    public void AnLedsMistakeIsTold(string column, string text, string told)
    {
        string[] columns = ["IF", "IF flat to", "IF slope", "Tj max"];
        string[] cells = [.. columns.Select(c => c == column ? text : c switch { "Tj max" => "105", "IF" when column != "IF slope" => "30 mA", _ => string.Empty })];
        Assert.Empty(Read("Part number|Kind|" + string.Join('|', columns), "LW|led|" + string.Join('|', cells)));
        Assert.Contains(told, typed.Only(), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("pnp")]
    [InlineData("NPN Darlington")]
    [InlineData("npn with resistors")]
    [InlineData("nmos")]
    [InlineData("resistor array")]
    public void AKindThatIsRefusedKeepsItsReason(string kind)
    {
        RefusedPart part = Assert.IsType<RefusedPart>(Assert.Single(Read("Part number|Kind", "X|" + kind)));
        Assert.Equal(kind, part.Kind);
        Assert.NotEmpty(part.Reason);
        Assert.Empty(typed.Complaints);
    }

    // Column, cell, and what the complaint says.
    [Theory]
    [InlineData("IC|VCEO", "200|45", "most likely in another unit")]
    [InlineData("IC|VCEO", "-0.1|45", "C2")]
    [InlineData("IC|VCEO", "0|45", "C2")]
    [InlineData("IC|VCEO", "NaN|45", "C2")]
    [InlineData("IC|VCEO", "Infinity|45", "C2")]
    [InlineData("IC|VCEO", "1e400|45", "C2")]
    [InlineData("IC|VCEO", "0.1 V|45", "unit of another kind")]
    [InlineData("IC|VCEO", "0.1|3000", "D2")]
    [InlineData("Power|RthJA", "100|300", "C2")]
    [InlineData("Power|RthJA", "0.3|9000", "D2")]
    [InlineData("VCEO|VCBO", "45|40", "VCBO is below VCEO")]
    [InlineData("RthJA|RthJC", "80|300", "RthJC is above RthJA")]
    [InlineData("Elements|VCEO", "1.5|45", "is a whole number")]
    [InlineData("hFE min|hFE max|hFE at", "300|100|10mA", "smallest gain is above the largest")]
    [InlineData("hFE min|hFE max", "100|300", "A gain without its collector current")]
    [InlineData("hFE min|hFE at", "30000|10mA", "C2")]
    [InlineData("hFE min|hFE at|hFE points", "100|10mA|1mA:75..", "given twice")]
    [InlineData("hFE points", "1mA:75..; 1mA:80..", "same current")]
    [InlineData("hFE points", "1mA:..", "has no gain")]
    [InlineData("hFE points", "1mA=75", "is no point")]
    [InlineData("hFE points", "1V:75..", "unit of another kind")]
    [InlineData("hFE points", "-1mA:75..", "not plausible")]
    [InlineData("hFE points", "100:75..", "not plausible")]
    [InlineData("hFE points", "1mA:0..", "not plausible")]
    [InlineData("hFE points|hFE cold min", "1mA:75..|30", "needs its collector current and its temperature")]
    [InlineData("hFE cold min|hFE cold at|hFE cold temperature", "30|10mA|-55", "needs the gain at 25 degC")]
    [InlineData("VBE min|VBE max", "0.6|0.7", "A base-emitter voltage without its collector current")]
    [InlineData("VBE min|VBE max|VBE at", "0.7|0.6|10mA", "VBE min is above VBE max")]
    [InlineData("VBE min|VBE typ|VBE at", "0.7|0.6|10mA", "VBE typ lies outside")]
    [InlineData("VBE typ|VBE at", "660|10mA", "most likely in another unit")]
    [InlineData("VBEsat max", "0.9", "VBEsat max needs its collector current")]
    [InlineData("VCEsat max", "0.3", "VCEsat max needs its collector current")]
    [InlineData("ICBO max", "10nA", "ICBO max needs its temperature")]
    [InlineData("SOA", "5V:200mA; -20V:80mA", "not plausible")]
    [InlineData("SOA", "5V:200; 20V:80", "not plausible")]
    [InlineData("SOA", "5V:80mA; 20V:200mA", "rises with the voltage")]
    [InlineData("SOA", "5V:80mA; 5V:60mA", "stand at the same place")]
    [InlineData("SOA", ";", "holds no point")]
    [InlineData("SOA|SOA at", "5V:80mA|lead", "says not where")]
    [InlineData("Zth points", "0ms:25", "not plausible")]
    [InlineData("Zth points", "1ms:25; 10:60", "The time of the point \"10:60\" has no unit: ms, us or s.")]
    [InlineData("Zth points", "1ms:60; 10ms:25", "falls with time")]
    [InlineData("Zth points|RthJA", "1ms:25; 10ms:600|300", "lies above RthJA")]
    [InlineData("Tj max|Power flat to", "100|125", "not above the temperature")]
    [InlineData("Model", "../secret.lib", "is not one beside the part table")]
    [InlineData("Model", "no-such-file.lib", "is not one beside the part table")]
    public void ATransistorsMistakeIsToldAndTheRowLeftOut(string columns, string cells, string text)
    {
        Assert.Empty(Read("Part number|Kind|" + columns, "TQ|npn|" + cells));
        Assert.Contains(typed.Complaints, c => (c.Cell + " " + c.Text).Contains(text, StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("Resistance|Tolerance", "|1%", "has no resistance")]
    [InlineData("Resistance|Tolerance", "-33|1%", "C2")]
    [InlineData("Resistance|Tolerance", "33|0.01", "with a % sign")]
    [InlineData("Resistance|Tolerance", "33|60%", "D2")]
    [InlineData("Resistance|TCR", "33|9000", "D2")]
    [InlineData("Resistance|Working voltage max", "33|-75", "D2")]
    [InlineData("Resistance|Tj max|Power flat to", "33|60|70", "not above the temperature")]
    public void AResistorsMistakeIsToldAndTheRowLeftOut(string columns, string cells, string text)
    {
        Assert.Empty(Read("Part number|Kind|" + columns, "RK|resistor|" + cells));
        Assert.Contains(text, typed.Only(), StringComparison.Ordinal);
    }

    [Fact]
    public void AResistorsComplaintsComeAllAtOnce()
    {
        Read("Part number|Kind|Resistance|Tolerance|TCR", "RK|resistor|much|lots|warm");
        Assert.Equal(["C2", "D2", "E2"], typed.Complaints.Select(c => c.Cell).Order(StringComparer.Ordinal));
    }

    [Theory]
    [InlineData("|npn|SOT-23", "The row has no part number.")]
    [InlineData("TQ||x", "TQ has no kind.")]
    [InlineData("TQ|valve", "The kind \"valve\" is not known.")]
    public void ARowNeedsItsPartNumberAndAKnownKind(string row, string text)
    {
        Assert.Empty(Read("Part number|Kind|Package", row));
        Assert.Contains(text, typed.Only(), StringComparison.Ordinal);
    }

    // (150 - 25)/250 = 0.5 W; 1.3 times that is 0.65 W.
    [Theory]
    [InlineData("0.5", true)]
    [InlineData("0.649", true)]
    [InlineData("0.651", false)]
    [InlineData("1.5", false)]
    public void APowerAtCaseTemperatureIsFoundOut(string watts, bool good)
    {
        Assert.Equal(good ? 1 : 0, Read("Part number|Kind|Power|RthJA|Tj max", $"TQ|npn|{watts}|250|150").Count);
        Assert.Equal(!good, typed.Complaints.Any(c => c.Text.Contains("power at case temperature", StringComparison.Ordinal)));
    }

    private IReadOnlyList<Part> Read(params string[] lines) =>
        [.. PartTableReader.Read(TypedSheet.Of("p.csv", lines), null, typed.Spellings, typed.List).Where(p => p is not UnreadPart)];

    private Transistor Npn(string columns, string cells) =>
        Assert.IsType<Transistor>(Assert.Single(Read("Part number|Kind|" + columns, "TQ|npn|" + cells)));
}
