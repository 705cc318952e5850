using System.Text;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

// The bytes are those of the code charts at unicode.org (Public/MAPPINGS), written out.
public class EncodingEvidenceTests : SheetsFixture
{
    // CP1251: D0 E5 E7 E8 F1 F2 EE F0 = "resistor" in Russian; Shift-JIS: 90 94 97 CA = "quantity" in Japanese;
    // Mac-Roman: BD = ohm sign, 8E = e acute; CP1252: E9 = e acute, B5 = micro sign.
    [Theory]
    [InlineData(new byte[] { 0xD0, 0xE5, 0xE7, 0xE8, 0xF1, 0xF2, 0xEE, 0xF0 }, "\u0420\u0435\u0437\u0438\u0441\u0442\u043E\u0440", "Windows-1251 (found out)")]
    [InlineData(new byte[] { 0x90, 0x94, 0x97, 0xCA }, "\u6570\u91CF", "Shift-JIS (found out)")]
    [InlineData(new byte[] { 0x31, 0x30, 0xBD }, "10\u2126", "Mac-Roman (found out)")]
    [InlineData(new byte[] { 0x72, 0x8E, 0x73 }, "r\u00E9s", "Mac-Roman (found out)")]
    [InlineData(new byte[] { 0x72, 0xE9, 0x73 }, "r\u00E9s", "Windows-1252 (found out)")]
    [InlineData(new byte[] { 0x31, 0x30, 0x20, 0xB5, 0x46 }, "10 \u00B5F", "Windows-1252 (found out)")]
    public void AnEncodingIsFoundOutWhereEveryCharacterIsPlausible(byte[] word, string text, string encoding)
    {
        SheetData sheet = Csv([.. "Ref;Value\nR1;"u8, .. word, .. "\n"u8]);
        Assert.Equal((text, encoding, "semicolon"), (sheet.Rows[1][1].Text, sheet.Encoding, sheet.Separator));
        Assert.Empty(Complaints.Items);
    }

    [Theory]
    [InlineData("Ref,Value\nR1,4k7\n", "ASCII", "comma")]
    [InlineData("Ref\tValue\nR1\t10 \u03A9\n", "UTF-8", "tab")]
    [InlineData("\uFEFFRef;Value\nR1;10 \u03A9\n", "UTF-8 (byte-order mark)", "semicolon")]
    public void HowATextWasReadIsSaid(string text, string encoding, string separator)
    {
        SheetData sheet = Csv(text);
        Assert.Equal((encoding, separator), (sheet.Encoding, sheet.Separator));
    }

    [Fact]
    public void ANamedEncodingIsSaidToBeNamed() => Assert.Equal("Windows-1251 (as named)", Csv([0x61, 0x2C, 0xC0], "cp1251").Encoding);

    // Two letters may be anything; two half-width kana are no word; 80 81 is none in any encoding of bills.
    [Theory]
    [InlineData(new byte[] { 0xD0, 0xE5 })]
    [InlineData(new byte[] { 0x31, 0xBE, 0xBE, 0x31 })]
    [InlineData(new byte[] { 0x41, 0x80, 0x81, 0x41 })]
    public void WithoutEvidenceTheEncodingIsAskedFor(byte[] word)
    {
        Assert.Empty(Read([.. "a,b\n"u8, .. word, .. ",1"u8]));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.StartsWith("Line 2 is not UTF-8", complaint.Text, StringComparison.Ordinal);
        Assert.True(complaint.Fatal);
    }

    [Fact]
    public void TwoEncodingsInOneFileAreReadAndComplainedAbout()
    {
        // UTF-8 C2 B5 (micro sign) in line 2, a lone B1 (plus-minus of CP1252) in line 3.
        SheetData sheet = Csv([.. "Ref,Value\nC1,10 "u8, 0xC2, 0xB5, .. "F\nR1,10k "u8, 0xB1, .. "1%\n"u8]);
        Assert.Equal(["10 \u00B5F", "10k \u00B11%"], [sheet.Rows[1][1].Text, sheet.Rows[2][1].Text]);
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal(
            "Bytes of two encodings stand in this file; in line 3 they were read as Windows-1252, elsewhere as UTF-8: save it in one encoding.",
            complaint.Text);
        Assert.False(complaint.Fatal);
    }

    // ISO/IEC 2022: ESC $ ) C announces a Korean set; a program that never left ASCII writes it all the same.
    [Fact]
    public void EscapeSequencesOfCharacterSetsAreLeftOut() =>
        Assert.Equal("Reference", Csv("\u001B$)CReference,Value\nR1,4k7\n").Rows[0][0].Text);

    [Fact]
    public void Utf16WithAMarkIsSaid() =>
        Assert.Equal("UTF-16 (byte-order mark)", Csv([0xFF, 0xFE, .. Encoding.Unicode.GetBytes("Ref\tValue\nR1\t4k7\n")]).Encoding);
}
