using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>What a user relies on, end to end.</summary>
public class BehaviourTests
{
    // A published open-hardware LED module (values only): 100 ohm sense, 3.3 V pin. With 10 k feed it regulates, with 100 k the control
    // never conducts: base drive must break.
    [Theory]
    [InlineData("10k", false)]
    [InlineData("100k", true)]
    public async Task TheStarvedModuleBreaksBaseDrive(string feed, bool broken)
    {
        using BoardFolder board = new(
            bill: BoardFolder.Bill.Replace("RK-33,1,33", "RK-100,1,100", StringComparison.Ordinal).Replace("RK-4K7,1,4k7", "RK-F,1," + feed, StringComparison.Ordinal),
            parts: BoardFolder.Parts.Replace("RK-33,", "RK-100,", StringComparison.Ordinal).Replace(",33,1%", ",100,1%", StringComparison.Ordinal)
                .Replace("RK-4K7,", "RK-F,", StringComparison.Ordinal).Replace(",4k7,1%", "," + feed + ",1%", StringComparison.Ordinal),
            channels: BoardFolder.Channels.Replace("11.4,12.6,8.5,9.5,3,12,28,P5,0,45", "4.75,5.25,1.9,2.2,1,3,9,P5,15,35", StringComparison.Ordinal),
            pins: BoardFolder.Pins.Replace("4.75,5.25,4.25,8", "3.25,3.35,3.2,1", StringComparison.Ordinal));
        JsonElement[] drive = await Findings(board, "drive");
        Assert.Equal(broken ? "nonconforming" : "conforms", Assert.Single(drive).GetProperty("verdict").GetString());
    }

    [Fact]
    public async Task ALineWithoutManufacturerIsJudgedAgainstEveryRowAndTheWorstIsNamed()
    {
        string weak = BoardFolder.Parts.Split('\n')[1].Replace("Tarnwood", "Othermaker", StringComparison.Ordinal).Replace(",200,350,300,20,150,", ",200,120,700,20,150,", StringComparison.Ordinal);
        using BoardFolder board = new(
            bill: BoardFolder.Bill.Replace("Q1,TQ-31,1,,SOT-23,Tarnwood", "Q1,TQ-31,1,,SOT-23,", StringComparison.Ordinal), parts: BoardFolder.Parts + "\n" + weak + "\n");
        JsonElement power = (await Findings(board, "power")).Single(f => f.GetProperty("reference").GetString() == "Q1");
        Assert.Equal("Othermaker", power.GetProperty("manufacturer").GetString());

        using BoardFolder named = new(parts: BoardFolder.Parts + "\n" + weak + "\n");
        power = (await Findings(named, "power")).Single(f => f.GetProperty("reference").GetString() == "Q1");
        Assert.Equal("Tarnwood", power.GetProperty("manufacturer").GetString());
    }

    [Fact]
    public async Task FeedsOfOnePinLowerEachOtherAndCountTogether()
    {
        string twoBill = BoardFolder.Bill + "\nQ3,TQ-31,1,,SOT-23,Tarnwood\nQ4,TQ-30,1,,SOT-23,Tarnwood\nR3,RK-33,1,33,0603,Kelbrook\nR4,RK-4K7,1,4k7,0603,Kelbrook\n";
        string header = BoardFolder.Channels.Split('\n')[0].Replace("Logic", "Pin,Logic", StringComparison.Ordinal);
        string Rows(string one, string other) => header
            + $"\nCH1,11.4,12.6,8.5,9.5,3,12,28,{one},P5,0,45,Q1,R1,Q2,R2\nCH2,11.4,12.6,8.5,9.5,3,12,28,{other},P5,0,45,Q3,R3,Q4,R4\n";
        using BoardFolder apart = new(bill: twoBill, channels: Rows("A", "B"));
        using BoardFolder joined = new(bill: twoBill, channels: Rows("A", "A"));
        JsonElement[] two = await Findings(apart, "pin-current");
        JsonElement one = Assert.Single(await Findings(joined, "pin-current"));
        Assert.Equal(2, two.Length);
        Assert.Equal(2 * two[0].GetProperty("actual").GetDouble(), one.GetProperty("actual").GetDouble(), 9);

        double Available(JsonElement[] drive) => drive[0].GetProperty("actual").GetDouble();
        Assert.True(Available(await Findings(joined, "drive")) < Available(await Findings(apart, "drive")));
    }

    [Fact]
    public async Task APinThatNobodyGuaranteesAtThisCurrentLeavesDriveOpen()
    {
        using BoardFolder board = new(pins: BoardFolder.Pins.Replace("4.25,8,20", "4.7,0.1,20", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(2, run.Code);
        Assert.Contains("missing pin level at this current", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AHotPartIsNonconformingAndNeverMerelyNotVerified()
    {
        using BoardFolder board = new(parts: BoardFolder.Parts.Replace(",200,350,300,20,150,", ",200,350,5000,20,150,", StringComparison.Ordinal).Replace("350,5000", "30,5000", StringComparison.Ordinal));
        JsonElement junction = (await Findings(board, "junction")).Single(f => f.GetProperty("reference").GetString() == "Q1");
        Assert.Equal("nonconforming", junction.GetProperty("verdict").GetString());
        Assert.True(junction.GetProperty("actualIsAtLeast").GetBoolean());
        Assert.Equal("nonconforming", (await Findings(board, "power")).Single(f => f.GetProperty("reference").GetString() == "Q1").GetProperty("verdict").GetString());
    }

    [Fact]
    public async Task WhatIsAssumedIsListed()
    {
        using BoardFolder board = new(
            channels: BoardFolder.Channels.Replace(",3,12,28", ",,12,28", StringComparison.Ordinal),
            parts: BoardFolder.Parts.Replace(",100,75", ",,75", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(0, run.Code);
        Assert.Contains("LEDs of CH1: 3", run.Flat, StringComparison.Ordinal);
        Assert.Contains("TCR of RK-33: 200 ppm/K", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task ABoardsOwnDeratingTableIsUsedUnlessAnotherIsNamed()
    {
        using BoardFolder board = new();
        board.Write("derating.csv", "Name,Rule,Factor,Source\nhouse,power,0.01,our own\n");
        Run own = await board.Check();
        Assert.Contains("(derating: house)", own.Output, StringComparison.Ordinal);
        Assert.Equal(1, own.Code);
        Assert.Contains("(derating: workshop)", (await board.Check("--derating", "workshop")).Output, StringComparison.Ordinal);
        Assert.Contains("(derating: house)", (await board.Check("--derating", board.At("derating.csv"))).Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AModelCardServesBesideItsWindowsAndIsRefusedOutsideThem()
    {
        string header = BoardFolder.Parts.Split('\n')[0] + ",Model";
        string rest = string.Join('\n', BoardFolder.Parts.Split('\n')[1..]);
        using BoardFolder board = new(parts: header + "\n" + rest.Replace(",0.3,50,,,,", ",0.3,50,,,,,cards.txt:tq", StringComparison.Ordinal));
        board.Write("cards.txt", ".model tq NPN(IS=7e-14 BF=200 VAF=80)\n");
        Run good = await board.Check();
        Assert.True(good.Code == 0, good.Output);
        board.Write("cards.txt", ".model tq NPN(IS=4e-9 BF=200 VAF=80)\n");
        Run bad = await board.Check();
        Assert.Equal(65, bad.Code);
        Assert.Contains("is another part's, or wrong", bad.Flat, StringComparison.Ordinal);
        Assert.Contains("CH1 not verified", bad.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AdviceIsSaidAndIsNoVerdict()
    {
        using BoardFolder board = new(
            bill: BoardFolder.Bill.Replace("RK-33,1,33,", "RK-33,1,33.5,", StringComparison.Ordinal),
            parts: string.Join('\n', BoardFolder.Parts.Split('\n').Select((l, i) => l.TrimEnd() + (i == 0 ? ",Lifecycle,Stock" : i == 1 ? ",last time buy,0" : ",active,5000")))
                .Replace(",33,1%", ",33.5,1%", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(0, run.Code);
        Assert.Contains("CH1: no pull-down", run.Flat, StringComparison.Ordinal);
        Assert.Contains("TQ-31: lifecycle \"last time buy\".", run.Flat, StringComparison.Ordinal);
        Assert.Contains("TQ-31: none in stock.", run.Flat, StringComparison.Ordinal);
        Assert.Contains("RK-33: 33.5 ohm is neither an E24 nor an E96 value.", run.Flat, StringComparison.Ordinal);
    }

    // Three LEDs in series of which two are named: the third is judged by nobody, and that is said.
    [Theory]
    [InlineData("\"D1,D2\"", true)]
    [InlineData("\"D1,D2,D3\"", false)]
    public async Task LedsThatNobodyNamesAreTold(string leds, bool told)
    {
        string[] channels = BoardFolder.Channels.ReplaceLineEndings("\n").Split('\n');
        using BoardFolder board = new(
            bill: BoardFolder.Bill + "\nD1-D3,LW-3,3,,,\n", channels: $"{channels[0]},LED\n{channels[1]},{leds}\n",
            parts: BoardFolder.Parts + "\nLW-3,led" + new string(',', 22) + "\n");
        Run run = await board.Check();
        Assert.True(run.Code == 2, run.Output);
        Assert.Equal(told, run.Flat.Contains("CH1: LED names 2 of the load's 3 LEDs; the others are not judged.", StringComparison.Ordinal));
    }

    private static async Task<JsonElement[]> Findings(BoardFolder board, string rule)
    {
        Run run = await board.Check("--format", "json");
        using JsonDocument document = JsonDocument.Parse(run.Output);
        return [.. document.RootElement.GetProperty("boards")[0].GetProperty("findings").EnumerateArray()
            .Where(f => f.GetProperty("rule").GetString() == rule).Select(f => f.Clone())];
    }
}
