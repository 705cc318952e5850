using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>What users get wrong: each with its complaint or finding and its exit code.</summary>
public class BadInputTests
{
    private const string Header = "Channel,Supply min [V],Supply max [V],Load drop min [V],Load drop max [V],LEDs,Current min [mA],Current max [mA],Logic,Ambient min [degC],Ambient max [degC],Pass,Sense,Control,Feed,Averaging\n";

    [Fact]
    public async Task AMissingBoardIsNoInput()
    {
        Run run = await Run.Of("check", "no-such-board.xlsx");
        Assert.Equal(66, run.Code);
        Assert.Contains("no-such-board.xlsx: There is no such workbook or folder.", run.Flat, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("bom.csv", "no bom.csv")]
    [InlineData("channels.csv", "no channels.csv")]
    public async Task AMissingTableOfAFolderIsNoInput(string file, string text)
    {
        using BoardFolder board = new();
        File.Delete(board.At(file));
        Run run = await board.Check();
        Assert.Equal(66, run.Code);
        Assert.Contains(text, run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AMissingPartTableFileIsNoInputAndTheRestIsStillJudged()
    {
        using BoardFolder board = new();
        Run run = await board.Check("--parts", board.At("nowhere.csv"));
        Assert.Equal(66, run.Code);
        Assert.Contains("nowhere.csv: There is no such file.", run.Flat, StringComparison.Ordinal);
        Assert.Contains("missing part table row of TQ-31", run.Flat, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(new byte[] { 0xD0, 0xCF, 0x11, 0xE0, 0xA1, 0xB1, 0x1A, 0xE1, 0, 0 }, "password-protected")]
    [InlineData(new byte[] { 0x50, 0x4B, 3, 4, 1, 2, 3, 4, 5, 6 }, "damaged")]
    [InlineData(new byte[] { 0x89, 0x50, 0x4E, 0x47, 0x0D, 0x0A, 0x1A, 0x0A }, "not a workbook")]
    [InlineData(new byte[0], "empty")]
    public async Task AWorkbookThatIsNoneIsToldApart(byte[] bytes, string text)
    {
        using BoardFolder board = new();
        string file = board.At("board.xlsx");
        await File.WriteAllBytesAsync(file, bytes, TestContext.Current.CancellationToken);
        Run run = await Run.Of("check", file);
        Assert.Equal(65, run.Code);
        Assert.Contains(text, run.Flat, StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public async Task ASheetThatIsNotThereIsNamedWithThoseThatAre()
    {
        using BoardFolder board = new();
        Run run = await board.Check("--bill", Workbooks.Write(board.At("b.xlsx"), ("Stuff", "References,Part number\nQ1,TQ-31\n"), ("More", "a,b\n1,2\n")) + ":BOM");
        Assert.Equal(65, run.Code);
        Assert.Contains("There is no sheet BOM. Its sheets are Stuff, More.", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task ABillWithoutHeaderRowNamesWhatWasLookedFor()
    {
        using BoardFolder board = new(bill: "a,b,c\n1,2,3\n");
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains("No header row of the table BOM stands in rows 1 to 20: looked for References", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task ABoardWithoutLinesIsAComplaint()
    {
        using BoardFolder board = new(bill: "References,Part number\n");
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains("The bill has a header row and no lines.", run.Flat, StringComparison.Ordinal);
    }

    // Cell, column, and what the complaint says.
    [Theory]
    [InlineData("twelve,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!B2 [Supply min [V]]", "twelve")]
    [InlineData("11.4,12.6 A,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!C2 [Supply max [V]]", "12.6 A")]
    [InlineData("13,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!B2", "Supply min is above Supply max.")]
    [InlineData("-11,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!B2", "-11")]
    [InlineData("0,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!B2", "\"0\"")]
    [InlineData("NaN,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!B2", "NaN")]
    [InlineData("Infinity,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!B2", "Infinity")]
    [InlineData("1e400,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!B2", "1e400")]
    [InlineData(",12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!B2", "Supply min of channel CH1 is missing.")]
    [InlineData("11.4,12.6,9.9,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!D2", "Load drop min is above Load drop max.")]
    [InlineData("11.4,12.6,8.5,9.5,3,28,28,P5,0,45,Q1,R1,Q2,R2,", "channels.csv!G2", "Current min is not below Current max.")]
    [InlineData("11.4,12.6,8.5,9.5,3,12,28,P9,0,45,Q1,R1,Q2,R2,", "channels.csv!I2", "The pin table has no row \"P9\": known are P5.")]
    [InlineData("11.4,12.6,8.5,9.5,3,12,28,P5,50,45,Q1,R1,Q2,R2,", "channels.csv!J2", "Ambient min is above Ambient max.")]
    [InlineData("11.4,12.6,8.5,9.5,3,12,28,P5,0,45,\"Q1, Q3\",R1,Q2,R2,\"R8, R9\"", "channels.csv!M2", "2 pass transistors need as many sense resistors, not 1 of them.")]
    [InlineData("11.4,12.6,8.5,9.5,3,12,28,P5,0,45,\"Q1, Q3\",\"R1, R3\",Q2,R2,R8", "channels.csv!P2", "2 legs need as many averaging resistors (or - or direct), not 1 of them.")]
    [InlineData("11.4,12.6,8.5,9.5,3,12,28,P5,0,45,\"Q1, Q3\",\"R1, R3\",Q2,R2,", "channels.csv!P2", "need an averaging resistor each")]
    [InlineData("11.4,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,-", "channels.csv!P2", "senses no leg")]
    [InlineData("11.4,12.6,8.5,9.5,3,12,28,P5,0,45,Q1-Q9,R1-R9,Q20,R20,R31-R39", "channels.csv!L2", "9 legs; more than eight are not solved")]
    [InlineData("11.4,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,,R2,", "channels.csv!N2", "The channel has no control.")]
    public async Task AChannelsMistakeIsToldWithItsCellAndCostsThatChannel(string row, string cell, string text)
    {
        using BoardFolder board = new(channels: Header + "CH1," + row + "\nGOOD,11.4,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2,\n");
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains(cell, run.Flat, StringComparison.Ordinal);
        Assert.Contains(text, run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("CH1 conforms", run.Flat, StringComparison.Ordinal);
        Assert.Contains("missing a channel row without complaints", run.Flat, StringComparison.Ordinal);
        Assert.Contains("GOOD conforms", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AWrongUnitInAHeaderIsAComplaintAndItsNumbersAreNotRead()
    {
        using BoardFolder board = new(channels: BoardFolder.Channels.Replace("Supply min [V]", "Supply min [mA]", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains("channels.csv!B1", run.Flat, StringComparison.Ordinal);
        Assert.Contains("names a unit of another kind", run.Flat, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("TQ-31,npn,Tarnwood,SOT-23,45,50,200 A", "parts.csv!G2")]
    [InlineData("TQ-31,npn,Tarnwood,SOT-23,45,50,90000", "parts.csv!G2")]
    [InlineData("TQ-31,npn,Tarnwood,SOT-23,45,40,200", "VCBO is below VCEO")]
    [InlineData("TQ-31,npn,Tarnwood,SOT-23,45,50,200,3000,300,20,150", "it is a power at case temperature")]
    [InlineData("TQ-31,npn,Tarnwood,SOT-23,45,50,200,350,300,20,150,10mA:360..120", "The smallest gain is above the largest.")]
    [InlineData("TQ-31,npn,Tarnwood,SOT-23,45,50,200,350,300,20,150,10mA", "is no point")]
    [InlineData("TQ-31,npn,Tarnwood,SOT-23,45,50,200,350,300,20,150,10mA:120..360,,,,0.70,0.63,10", "VBE min is above VBE max.")]
    [InlineData("TQ-31,npn,Tarnwood,SOT-23,45,50,200,350,300,20,150,10mA:120..360,,,,0.63,0.70,", "A base-emitter voltage without its collector current")]
    [InlineData("TQ-31,valve,Tarnwood,SOT-23,45,50,200", "The kind \"valve\" is not known.")]
    public async Task APartsMistakeIsToldAndThePartIsNotVerified(string row, string text)
    {
        using BoardFolder board = new(parts: BoardFolder.Parts.Split('\n')[0] + "\n" + row + "\n" + string.Join('\n', BoardFolder.Parts.Split('\n')[2..]) + "\n");
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains(text, run.Flat, StringComparison.Ordinal);
        Assert.Contains("missing part table row of TQ-31", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task TwoRowsOfOneKeyThatDisagreeAreAComplaint()
    {
        using BoardFolder board = new(parts: BoardFolder.Parts + "\nRK-33,resistor,Kelbrook,0603,,,,100,,,155,,,,,,,,,,33,5%,100,75\n");
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains("RK-33 stands in the table twice and the rows disagree in Tolerance", run.Flat, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("R1,RK-33,1,33,0603,Kelbrook\nR1,RK-33,1,33,0603,Kelbrook", 65, "R1 stands on the bill twice")]
    [InlineData("R1,RK-33,2,33,0603,Kelbrook", 1, "The quantity is 2, the references are 1.")]
    [InlineData("R1,RK-33,1,47,0603,Kelbrook", 1, "The bill's value is 47 ohm, the part table's 33 ohm.")]
    [InlineData("R1,RK-33,1,33,0805,Kelbrook", 1, "The bill's package is 0805, the part table's 0603.")]
    [InlineData("R9,RK-33,1,33,0603,Kelbrook", 1, "R1 (sense) is not on the bill.")]
    [InlineData("R1,RK-33,1,33 DNP,0603,Kelbrook", 1, "R1 (sense) is not fitted")]
    [InlineData("R1,TQ-31,1,,SOT-23,Tarnwood", 1, "R1 (sense) is a transistor: a resistor is wanted.")]
    [InlineData("R1,RK-99,1,33,0603,Kelbrook", 2, "missing part table row of RK-99")]
    [InlineData("R1,RK-33,1,33,0603,Otherone", 2, "missing part table row of RK-33 by Otherone")]
    [InlineData("R1,,1,33,0603,Kelbrook", 2, "missing part number of R1")]
    [InlineData("R1,RK-33,some,33,0603,Kelbrook", 65, "some")]
    [InlineData("R1,RK-33,-1,33,0603,Kelbrook", 65, "A quantity is a whole number, at least 0.")]
    [InlineData("R1-R20000,RK-33,1,33,0603,Kelbrook", 65, "longer than 10000 references")]
    public async Task ABillsMistakeIsAFindingOrAComplaint(string line, int code, string text)
    {
        using BoardFolder board = new(bill: BoardFolder.Bill.Replace("R1,RK-33,1,33,0603,Kelbrook", line, StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.True(run.Code == code, $"{run.Code}\n{run.Output}");
        Assert.Contains(text, run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("CH1 conforms", run.Flat, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("pnp", "does not fit a low-side sink")]
    [InlineData("npn darlington", "two junctions")]
    [InlineData("nmos", "no bipolar transistor")]
    public async Task ARefusedKindIsAFindingWithItsReason(string kind, string text)
    {
        using BoardFolder board = new(parts: BoardFolder.Parts.Replace("TQ-31,npn", "TQ-31," + kind, StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(1, run.Code);
        Assert.Contains(text, run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AChannelThatNamesAnUnknownDeratingTableIsAComplaint()
    {
        using BoardFolder board = new(channels: BoardFolder.Channels.Replace("Channel,", "Derating,Channel,", StringComparison.Ordinal).Replace("CH1,", "nothing,CH1,", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains("names the derating table \"nothing\", which there is not", run.Flat, StringComparison.Ordinal);
        Assert.Contains("CH1 not verified", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task APartThatServesTwoChannelsIsAFindingOfBoth()
    {
        string second = BoardFolder.Channels.Split('\n')[1].Replace("CH1", "CH2", StringComparison.Ordinal).Replace("R1", "r1", StringComparison.Ordinal);
        using BoardFolder board = new(channels: BoardFolder.Channels + "\n" + second + "\n");
        Run run = await board.Check();
        Assert.Equal(1, run.Code);
        Assert.Contains("R1 (sense) serves channel CH2 too.", run.Flat, StringComparison.Ordinal);
        Assert.Contains("r1 (sense) serves channel CH1 too.", run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("CH1 conforms", run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("CH2 conforms", run.Flat, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("mine,power,0.6\nmine,vce,80", "derating.csv!C3")]
    [InlineData("mine,powr,0.6", "derating.csv!B2")]
    [InlineData("mine,power,0.6\n,vce,0.8", "derating.csv!A3")]
    public async Task ADeratingTableWithARowThatCannotBeReadVerifiesNothing(string rows, string cell)
    {
        using BoardFolder board = new();
        board.Write("derating.csv", "Name,Rule,Factor\n" + rows + "\n");
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains(cell, run.Flat, StringComparison.Ordinal);
        Assert.Contains("missing derating table mine", run.Flat, StringComparison.Ordinal);
        Assert.Contains("CH1 not verified", run.Flat, StringComparison.Ordinal);
    }

    // The part is in the table, and its complaint says what is wrong: nobody is asked whether another part was meant.
    [Fact]
    public async Task APartWhoseRowHasAComplaintIsNotCalledAbsent()
    {
        using BoardFolder board = new(parts: BoardFolder.Parts.Replace("TQ-31,npn,Tarnwood,SOT-23,45,", "TQ-31,npn,Tarnwood,SOT-23,lots,", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains("\"lots\" in VCEO [V] cannot be read", run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("has no row", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AllComplaintsOfAllFilesComeAtOnce()
    {
        using BoardFolder board = new(
            channels: BoardFolder.Channels.Replace("11.4", "many", StringComparison.Ordinal),
            parts: BoardFolder.Parts.Replace("1%", "lots", StringComparison.Ordinal),
            pins: BoardFolder.Pins.Replace("4.75", "some", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains("many", run.Flat, StringComparison.Ordinal);
        Assert.Contains("lots", run.Flat, StringComparison.Ordinal);
        Assert.Contains("some", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task OneBadBoardDoesNotStopTheOthers()
    {
        using BoardFolder good = new();
        using BoardFolder bad = new(bill: "nothing\n");
        Run run = await Run.Of("check", bad.Folder, good.Folder);
        Assert.Equal(65, run.Code);
        Assert.Contains("Nothing could be judged", run.Flat, StringComparison.Ordinal);
        Assert.Contains("CH1 conforms", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AMissingDatumIsNotVerifiedAndNeverExitsZero()
    {
        using BoardFolder board = new(parts: BoardFolder.Parts.Replace(",0.3,50,,,,", ",,,,,,", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(2, run.Code);
        Assert.Contains("CH1 headroom: missing VCEsat of TQ-31", run.Flat, StringComparison.Ordinal);
    }
}
