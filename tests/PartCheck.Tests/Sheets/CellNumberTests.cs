using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

public class CellNumberTests : SheetsFixture
{
    private static readonly ColumnSpec[] Columns =
    [
        new("Name", ColumnKind.Text, Required: true),
        new("IC", ColumnKind.Current, 1e-4, 20),
        new("VCEO", ColumnKind.Voltage, 1, 2000),
        new("Duty max", ColumnKind.Percent, 0, 1),
        new("Tolerance", ColumnKind.Percent, 0, 0.5),
        new("TCR", ColumnKind.TemperatureCoefficient, 0, 5000e-6),
        new("Ambient max", ColumnKind.Temperature, 173, 523),
        new("Power flat to", ColumnKind.Temperature, 223, 473),
        new("RthJA", ColumnKind.ThermalResistance, 5, 5000),
        new("Frequency", ColumnKind.Frequency, 0.01),
        new("LEDs", ColumnKind.Number, 0, 1000),
    ];

    // Unit in the cell, in the header, or the column's own (degC 25 = 298.15 K, % 5 = 0.05, ppm/K 100 = 1e-4).
    [Theory]
    [InlineData("IC", "0.2", 0.2)]
    [InlineData("IC", "200 mA", 0.2)]
    [InlineData("IC (mA)", "200", 0.2)]
    [InlineData("IC [mA]", "200", 0.2)]
    [InlineData("IC, mA", "200", 0.2)]
    [InlineData("IC / mA", "200", 0.2)]
    [InlineData("IC in mA", "200", 0.2)]
    [InlineData("IC mA", "200", 0.2)]
    [InlineData("IC (mA)", "0.2 A", 0.2)]
    [InlineData("VCEO [kV]", "0.045", 45)]
    [InlineData("Ambient max", "25", 298.15)]
    [InlineData("Ambient max (K)", "300", 300)]
    [InlineData("Ambient max [\u00B0C]", "-40", 233.15)]
    [InlineData("Tolerance", "5", 0.05)]
    [InlineData("Tolerance", "0.05", 0.0005)]
    [InlineData("Tolerance", "\u00B11%", 0.01)]
    [InlineData("Tolerance (%)", "0.01", 0.0001)]
    [InlineData("Duty max", "50", 0.5)]
    [InlineData("Duty max", "0.5 %", 0.005)]
    [InlineData("Duty max", "1.5", 0.015)]
    [InlineData("TCR", "100", 1e-4)]
    [InlineData("TCR ppm/K", "\u00B150", 5e-5)]
    [InlineData("RthJA \u00B0C/W", "325", 325)]
    [InlineData("Frequency", "1.2k Hz", 1200)]
    [InlineData("LEDs", "3", 3)]
    [InlineData("IC", "20", 20)]
    [InlineData("IC", "0.1 mA", 1e-4)]
    public void AValueIsReadInItsUnit(string header, string text, double si)
    {
        Assert.Equal(si, Row(header, text).Number(Columns.First(c => header.StartsWith(c.Name, StringComparison.Ordinal)).Name)!.Value, 15);
        Assert.Empty(Complaints.Items);
    }

    [Theory]
    [InlineData("IC", "45 V", "\"45 V\" in IC has a unit of another kind or one that is not known: a current such as 11 mA is wanted.")]
    [InlineData("IC", "fast", "\"fast\" in IC cannot be read: a current such as 11 mA is wanted.")]
    [InlineData("IC", "NaN", "\"NaN\" in IC cannot be read: a current such as 11 mA is wanted.")]
    [InlineData("IC", "1e400", "\"1e400\" in IC is too large or too small a number: a current such as 11 mA is wanted.")]
    [InlineData("IC", "0,2", "\"0,2\" in IC has a comma, but this file writes decimals with a point: a current such as 11 mA is wanted.")]
    [InlineData("IC", "200", "\"200\" in IC would be 200 A, and 100 uA to 20 A is wanted: it is most likely in another unit; write the unit with the number.")]
    [InlineData("IC", "200 A", "\"200 A\" in IC is 200 A, and 100 uA to 20 A is wanted.")]
    [InlineData("IC (uA)", "0.2", "\"0.2\" in IC (uA) is 200 nA, and 100 uA to 20 A is wanted.")]
    [InlineData("IC", "-0.2", "\"-0.2\" in IC is -200 mA, and 100 uA to 20 A is wanted.")]
    [InlineData("VCEO", "45000", "\"45000\" in VCEO would be 45 kV, and 1 V to 2 kV is wanted: it is most likely in another unit; write the unit with the number.")]
    [InlineData("TCR", "6000", "\"6000\" in TCR would be 6000 ppm/K, and 0 ppm/K to 5000 ppm/K is wanted: it is most likely in another unit; write the unit with the number.")]
    [InlineData("Power flat to", "300", "\"300\" in Power flat to would be 300 degC, and -50.15 degC to 199.9 degC is wanted: it is most likely in another unit; write the unit with the number.")]
    [InlineData("Frequency", "0", "\"0\" in Frequency is 0 Hz, and at least 10 mHz is wanted.")]
    [InlineData("LEDs", "-1", "\"-1\" in LEDs is -1, and 0 to 1000 is wanted.")]
    [InlineData("Duty max", "0.5", "\"0.5\" in Duty max may be a share or a percentage: write it with a % sign.")]
    [InlineData("Duty max", "1", "\"1\" in Duty max may be a share or a percentage: write it with a % sign.")]
    [InlineData("Tolerance", "0.01", "\"0.01\" in Tolerance may be a share or a percentage: write it with a % sign.")]
    [InlineData("Tolerance", "0.049", "\"0.049\" in Tolerance may be a share or a percentage: write it with a % sign.")]
    public void WhatCannotBeMeantIsOneComplaint(string header, string text, string sentence)
    {
        Assert.Null(Row(header, text).Number(Columns.First(c => header.StartsWith(c.Name, StringComparison.Ordinal)).Name));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal((sentence, "B2", header, text), (complaint.Text, complaint.Cell, complaint.Column, complaint.Found));
    }

    [Theory]
    [InlineData("")]
    [InlineData("  ")]
    [InlineData("-")]
    [InlineData("\u2014")]
    public void ABlankOrADashIsNoValueAndNoComplaint(string text)
    {
        Assert.Null(Row("IC", text).Number("IC"));
        Assert.Empty(Complaints.Items);
    }

    [Fact]
    public void AnAmbiguousPointInAFileOfCommasIsAComplaint()
    {
        TableRow row = Find(Csv("Name;IC;VCEO\na;0,2;1.500\n"), "Channels", Columns).Rows[0];
        Assert.Equal(0.2, row.Number("IC")!.Value);
        Assert.Null(row.Number("VCEO"));
        Assert.Equal(
            "\"1.500\" in VCEO may be a decimal or a thousands point (this file writes decimals with a comma): a voltage such as 5 V is wanted.",
            Assert.Single(Complaints.Items).Text);
    }

    [Theory]
    [InlineData("IC (V)")]
    [InlineData("IC [degC]")]
    [InlineData("IC, ohm")]
    public void AHeaderWithAUnitOfAnotherKindIsOneComplaintAndItsBareNumbersAreNotRead(string header)
    {
        Table table = Find(Csv($"Name;{header}\na;0.2\nb;0.3\nc;0.4 A\n"), "Channels", Columns);
        Assert.Equal([null, null, 0.4], table.Rows.Select(row => row.Number("IC")?.Value));
        Assert.Equal([true, true, false], table.Rows.Select(row => row.HasComplaints));
        Complaint complaint = Assert.Single(Complaints.Items);
        Assert.Equal(
            $"The header \"{header}\" names a unit of another kind: the unit of a current such as 11 mA is wanted; its bare numbers are not read.", complaint.Text);
        Assert.Equal((1, "B1"), (complaint.Row, complaint.Cell));
    }

    private TableRow Row(string header, string text) => Find(Csv($"Name,\"{header}\"\na,\"{text}\"\n"), "Channels", Columns).Rows[0];
}
