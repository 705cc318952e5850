using PartCheck.Bills;
using Xunit;

namespace PartCheck.Tests.Bills;

/// <summary>Values as bills write them; the expected ohms are read by a person (IEC 60062 for the codes).</summary>
public sealed class ResistanceTextTests
{
    private readonly TypedSheet typed = new();

    [Theory]
    [InlineData("10k", 10e3)]
    [InlineData("10K", 10e3)]
    [InlineData("1M", 1e6)]
    [InlineData("2m", 2e-3)]
    [InlineData("10k\u03A9", 10e3)]
    [InlineData("2.2K\u2126", 2.2e3)]
    [InlineData("330", 330.0)]
    [InlineData("0.47", 0.47)]
    [InlineData("7.5M", 7.5e6)]
    [InlineData("62R", 62.0)]
    [InlineData("0R15", 0.15)]
    [InlineData("9K09", 9.09e3)]
    [InlineData("470R 1/10W 5% 0603", 470.0)]
    [InlineData("100K, 1%", 100e3)]
    [InlineData("22\u03A9, 1/10W, 5%", 22.0)]
    [InlineData("10k\u03A9 / 1%", 10e3)]
    [InlineData("100R/2W", 100.0)]
    [InlineData("10K R_0805_2012Metric", 10e3)]
    [InlineData("10 k\u03A9", 10e3)]
    [InlineData("3k9\u03A9", 3.9e3)]
    [InlineData("22k1R 1%", 22.1e3)]
    [InlineData("10kR 1%", 10e3)]
    [InlineData("0R 1%", 0.0)]
    [InlineData("49.9R", 49.9)]
    [InlineData("100ohm", 100.0)]
    [InlineData("15 Ohm", 15.0)]
    [InlineData("330OHMS", 330.0)]
    [InlineData("1.5KOHMS", 1.5e3)]
    [InlineData("0K", 0.0)]
    [InlineData("43k-RC0603FR-0743KL", 43e3)]
    [InlineData("RL1206FR-070R4L", null)]
    [InlineData("100n", null)]
    [InlineData("10u", null)]
    [InlineData("4u7", null)]
    [InlineData("22uF 25V", null)]
    [InlineData("10k or 12k", null)]
    [InlineData("R", null)]
    [InlineData("~", null)]
    [InlineData("DNP", null)]
    public void AValueIsReadInEveryNotation(string value, double? ohms) => Assert.Equal(ohms, One("Value", value).Resistance?.Ohms);

    [Theory]
    [InlineData("RES 0805 1K", 1e3)]
    [InlineData("Thick Film Resistor 1/16W 43K 1% 0402", 43e3)]
    [InlineData("Resistor SMD 0402 47k", 47e3)]
    [InlineData("RES 330 OHM 1/10W 5% 0603 SMD", 330.0)]
    [InlineData("RES 10K OHM 1% 1/16W 0402", 10e3)]
    [InlineData("R\u00E9sistance 4k7 1 %", 4.7e3)]
    [InlineData("RES ARRAY 4x 10K", null)]
    [InlineData("RES 0805", null)]
    [InlineData("CAP CER 100K cycles", null)]
    [InlineData("CABLE 1M", null)]
    public void WithoutAValueTheDescriptionIsReadAndTheSizeIsNotTheValue(string description, double? ohms) =>
        Assert.Equal(ohms, One("Description", description).Resistance?.Ohms);

    [Theory]
    [InlineData("MPN/Value", "549", 549.0)]
    [InlineData("MPN/Value", "10k, 1%", 10e3)]
    [InlineData("MPN", "61302221021", null)]
    public void APartNumberIsAValueOnlyWhereItSaysSo(string header, string text, double? ohms) => Assert.Equal(ohms, One(header, text).Resistance?.Ohms);

    [Theory]
    [InlineData("4k7", "RK-4K7", true)]
    [InlineData("43K", "RC0603FR-0743KL", true)]
    [InlineData("10k", "FRC0603J103TS", true)]
    [InlineData("1k", "FRC0603J103TS", false)]
    [InlineData("100k", "0603WAF1003T5E", true)]
    [InlineData("47K", "0603WAF1003T5E", false)]
    [InlineData("22R", "0603WAF220JT5E", true)]
    [InlineData("2k2", "CRCW040210K5FKED", false)]
    [InlineData("5.6k", "CRCW06035K60FKEA", true)]
    [InlineData("0R3", "RL1206FR-070R3L", true)]
    [InlineData("10k", "TNPW0603", true)]
    public void AValueThatThePartNumberCannotMeanIsTold(string value, string number, bool agrees)
    {
        BillLine line = Read("References|Value|MPN", $"R1|{value}|{number}");
        Assert.Equal(agrees ? [] : ["B2"], line.Doubts.Select(d => d.Cell));
        Assert.Empty(typed.Complaints);
        Assert.False(line.HasComplaints);
    }

    [Theory]
    [InlineData("MMBT3904", "MMBT3904LT1G", true)]
    [InlineData("BC847", "BC847C,215", true)]
    [InlineData("2SC1815", "2SC1815-GR", true)]
    [InlineData("MMBT3904", "BC817-25", false)]
    [InlineData("SMALL NPN", "BC817-25", true)]
    public void ATypeNumberAndAPartNumberOfAnotherPartAreTold(string value, string number, bool agrees)
    {
        BillLine line = Read("References|Value|MPN", $"Q1|{value}|{number}");
        Assert.Equal(agrees ? 0 : 1, line.Doubts.Count);
    }

    // A ferrite bead: 0.3 ohm of copper, and 600 ohm at 100 MHz in its part number.
    [Fact]
    public void ABeadsResistanceIsNotHeldToItsPartNumber() =>
        Assert.Empty(Read("References|Value|MPN", "FB1|300m\u03A9|ZB0805E601R-10").Doubts);

    // A diode, a counter and a capacitor in microfarad: none is a resistance; W1 may be a resistor, R1 is one.
    [Theory]
    [InlineData("D1", "M7", null)]
    [InlineData("IC1", "4040", null)]
    [InlineData("C1, C2", ".1", null)]
    [InlineData("W1", "4k7", 4700.0)]
    [InlineData("R1, Q1", "4k7", 4700.0)]
    public void ANumberBesideAnotherPartIsNotToldAsAResistance(string references, string value, double? ohms) =>
        Assert.Equal(ohms, Read("References|Value", $"{references}|{value}").ToldResistance?.Ohms);

    [Fact]
    public void AValueAndADescriptionThatDisagreeAreTold()
    {
        BillLine line = Read("References|Value|Description", "R1|5.6K|RES 56K OHM 1% 0402");
        Assert.Equal("The value is 5.6 kohm, the description says 56 kohm.", Assert.Single(line.Doubts).Text);
    }

    [Theory]
    [InlineData("Value", "10k?", "The sign after \"10k\" was lost before the file was saved; it may have been an ohm sign.")]
    [InlineData("Description", "RES 1% 10k? 0603", "The sign after \"10k\" was lost before the file was saved; it may have been an ohm sign.")]
    [InlineData("Package", "SOT\uFFFD23", "A character of \"SOT\uFFFD23\" was lost before the file was saved.")]
    public void WhatWasLostBeforeSavingIsTold(string column, string text, string sentence) =>
        Assert.Equal(sentence, Assert.Single(One(column, text).Doubts).Text);

    private BillLine One(string column, string text) => Read("References|" + column, "R1|" + text);

    private BillLine Read(params string[] lines)
    {
        Bill? bill = BillReader.Read(TypedSheet.Of("b.csv", lines), typed.Spellings, typed.List);
        Assert.NotNull(bill);
        return Assert.Single(bill.Lines);
    }
}
