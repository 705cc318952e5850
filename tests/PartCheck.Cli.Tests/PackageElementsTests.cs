using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>Two transistors in one package, end to end.</summary>
public class PackageElementsTests
{
    // RthJA 500 K/W, both 350 K/W: 2 x 350 - 500 = 200 K/W pass. Each pass transistor drops at most 12.6 - 8.5 - 0.55 = 3.5 V at some 22 mA,
    // 80 mW: the neighbour adds about 16 K, and the package takes twice what the element takes.
    [Fact]
    public async Task AnElementOfAnotherChannelWarmsItsNeighbour()
    {
        using BoardFolder apart = Board("Q1.1", "Q3.1");
        using BoardFolder joined = Board("Q1.1", "Q1.2");
        JsonElement cool = await Finding(apart, "junction", "Q1.1");
        JsonElement warm = await Finding(joined, "junction", "Q1.1");
        Assert.InRange(warm.GetProperty("actual").GetDouble() - cool.GetProperty("actual").GetDouble(), 11, 18);
        Assert.Equal(1, warm.GetProperty("corner").GetProperty("neighboursOn").GetDouble());
        Assert.Equal(JsonValueKind.Null, cool.GetProperty("corner").GetProperty("neighboursOn").ValueKind);

        // 200 mW for one, 250 mW for both: the package is what counts.
        JsonElement power = await Finding(joined, "power", "Q1.2");
        Assert.Equal("the whole package Q1, its elements together", power.GetProperty("text").GetString());
        Assert.InRange(power.GetProperty("actual").GetDouble(), 0.12, 0.18);
    }

    [Fact]
    public async Task WhatTheTableLeavesOutOfAPackageIsAssumedAndListed()
    {
        using BoardFolder board = Board("Q1.1", "Q1.2", both: ",", elements: "2");
        JsonElement[] assumed = await Assumed(board);
        Assert.Contains(assumed, a => a.GetProperty("what").GetString() == "RthJA both");
        Assert.Contains(assumed, a => a.GetProperty("what").GetString() == "Power both");

        using BoardFolder idle = Board("Q1.1", "Q3.1");
        Assert.Equal(["Q1.2", "Q3.2"], (await Assumed(idle)).Where(a => a.GetProperty("what").GetString() == "Element that no channel names").Select(a => a.GetProperty("of").GetString()));
    }

    [Fact]
    public async Task APackageAsAWholeIsAFindingAndSoIsAnElementTwice()
    {
        using BoardFolder whole = Board("Q1", "Q3.1");
        Assert.Contains("Q1 (pass) is a package of 2 transistors: name the element, Q1.1 to Q1.2.", (await whole.Check()).Flat, StringComparison.Ordinal);
        using BoardFolder twice = Board("Q1.1", "Q1.1");
        Assert.Contains("Q1.1 (pass) serves channel CH2 too.", (await twice.Check()).Flat, StringComparison.Ordinal);
        using BoardFolder single = Board("Q1.1", "Q3.1", both: ",", elements: "1");
        Assert.Contains("Q1.1 (pass) names element 1, and TQ-2 has 1 in a package", (await single.Check()).Flat, StringComparison.Ordinal);
    }

    // CH2 cannot be judged, so nobody knows what its element adds to CH1's.
    [Fact]
    public async Task ANeighbourInAChannelThatIsNotJudgedLeavesItsOwnNotVerified()
    {
        using BoardFolder board = Board("Q1.1", "Q1.2", feed: "R99");
        Run run = await board.Check("--format", "json");
        using JsonDocument document = JsonDocument.Parse(run.Output);
        JsonElement junction = document.RootElement.GetProperty("boards")[0].GetProperty("findings").EnumerateArray()
            .Single(f => f.GetProperty("rule").GetString() == "junction" && f.GetProperty("channel").GetString() == "CH1" && f.GetProperty("reference").GetString() == "Q1.1");
        Assert.Equal("not verified", junction.GetProperty("verdict").GetString());
        Assert.Equal("dissipation of Q1.2 in channel CH2", junction.GetProperty("missing")[0].GetString());
    }

    // The derivation of every finding comes to the figures that were judged, the heat between elements and channels included.
    [Theory]
    [InlineData("Q1.1", "Q1.2", "350,250")]
    [InlineData("Q1.1", "Q1.2", ",")]
    public async Task TheWorkingReproducesWhatWasJudged(string one, string other, string both)
    {
        using BoardFolder board = Board(one, other, both);
        Run run = await Run.Of("working", board.Folder, "CH1");
        Assert.True(run.Code != 70 && run.Error.Length == 0, run.Error + run.Output);
        Assert.Contains("CH1 junction Q1.1", run.Flat, StringComparison.Ordinal);
        Assert.Contains("what elements of other channels in the package of Q1.1 add", run.Flat, StringComparison.Ordinal);
        Assert.Contains("power of all elements of the package", run.Flat, StringComparison.Ordinal);
    }

    // Pass and control in one package; two legs of one package of which the first alone is sensed.
    [Theory]
    [InlineData("CH1,11.4,12.6,8.5,9.5,3,12,28,P5,0,45,Q1.1,R1,Q1.2,R2,", "Kpby0")]
    [InlineData("CH1,11.4,12.6,8.5,9.5,3,24,56,P5,0,45,\"Q1.1, Q1.2\",\"R1, R3\",Q2,R5,\"direct, -\"", "Kp1by2")]
    public async Task TheWorkingReproducesHeatInsideAChannel(string row, string symbol)
    {
        using BoardFolder board = Board("Q1.1", "Q1.2");
        board.Write("bom.csv", File.ReadAllText(board.At("bom.csv")) + "R5,RK-1K5,1,0603\n");
        board.Write("parts.csv", File.ReadAllText(board.At("parts.csv")) + "RK-1K5,resistor,Kelbrook,0603,,,,100,,,155,,,,,,,,,,1k5,1%,100,75,,,\n");
        board.Write("channels.csv", BoardFolder.Channels.ReplaceLineEndings("\n").Split('\n')[0] + ",Averaging\n" + row + "\n");
        Run run = await Run.Of("working", board.Folder, "CH1");
        Assert.True(run.Code is 0 or 1 or 2 && run.Error.Length == 0, run.Error + run.Output);
        Assert.Contains(symbol, run.Output, StringComparison.Ordinal);
    }

    // The bill has Q1 as a whole, the channels its elements: the same component.
    [Theory]
    [InlineData("Q1=TQ-3", 0, "Yes: with TQ-3 for TQ-2 (Q1), CH1, CH2 conform")]
    [InlineData("TQ-2=TQ-3", 0, "Yes: with TQ-3 for TQ-2 (Q1), TQ-3 for TQ-2 (Q3.1, Q3.2), CH1, CH2 conform")]
    [InlineData("Q1.1=TQ-3", 64, "\"Q1.1\" is one element of Q1: a package is replaced as a whole.")]
    public async Task APackageThatTheBillNamesAsAWholeIsReplaced(string with, int code, string text)
    {
        using BoardFolder board = WithAnother(vceo: "45");
        Run run = await board.Check("--with", with);
        Assert.True(run.Code == code, run.Output + run.Error);
        Assert.Contains(text, run.Flat + run.Error, StringComparison.Ordinal);
    }

    // 12.6 V against 0.8 x 12 V = 9.6 V. Accepted for the part of the bill, so not for the one in its place.
    [Fact]
    public async Task AConcessionDoesNotCoverAPackageInTheOnesPlace()
    {
        using BoardFolder board = WithAnother(vceo: "12");
        board.Write("concessions.csv", "Rule,Reference,Part number,Board,Reason,Accepted by,Date,Expires\nvce,\"Q1.1, Q1.2\",,,tried,A. Body,2026-01-01,2026-12-31\n");
        Run run = await board.Check("--with", "Q1=TQ-3", "--date", "2026-06-01");
        Assert.Equal(1, run.Code);
        Assert.Contains("vce Q1.1 TQ-3: 12.6 V of 9.6 V, ratio 1.31", run.Flat, StringComparison.Ordinal);
        Assert.Contains("accepted for the part of the bill, not for the one in its place: not applied.", run.Flat, StringComparison.Ordinal);
    }

    // What contradicts itself in the line of a package counts where only its elements serve.
    [Fact]
    public async Task ADoubtfulLineOfAPackageIsAComplaint()
    {
        using BoardFolder board = Board("Q1.1", "Q1.2");
        board.Write("bom.csv", File.ReadAllText(board.At("bom.csv")).Replace("Package\n", "Package,Notes\n", StringComparison.Ordinal)
            .Replace("Q1,TQ-2,1,SOT-363\n", "Q1,TQ-2,1,SOT-363,perhaps DNP for now\n", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.True(run.Code == 65, run.Output);
        Assert.Contains("bill Q1 TQ-2: missing a bill line without complaints", run.Flat, StringComparison.Ordinal);
    }

    // CH1 keeps its parts, and its neighbour Q1.2 takes more from another sense resistor in CH2: what --with says is what the changed bill says.
    [Fact]
    public async Task WithAnotherPartInOneChannelItsNeighbourInTheOtherIsJudgedAnew()
    {
        using BoardFolder board = Board("Q1.1", "Q1.2");
        string parts = File.ReadAllText(board.At("parts.csv"));
        string sense = parts.Split('\n').Single(l => l.StartsWith("RK-33,", StringComparison.Ordinal));
        board.Write("parts.csv", parts + sense.Replace("RK-33,", "RK-27,", StringComparison.Ordinal).Replace(",33,1%", ",27,1%", StringComparison.Ordinal) + "\n");
        string bill = File.ReadAllText(board.At("bom.csv")).Replace("\"R1, R3\",RK-33,2,0603\n", "R1,RK-33,1,0603\nR3,RK-33,1,0603\n", StringComparison.Ordinal);
        board.Write("bom.csv", bill);
        JsonElement before = await Finding(board, "junction", "Q1.1");
        JsonElement asked = await Finding(board, "junction", "Q1.1", "--with", "R3=RK-27");
        board.Write("bom.csv", bill.Replace("R3,RK-33", "R3,RK-27", StringComparison.Ordinal));
        JsonElement changed = await Finding(board, "junction", "Q1.1");
        Assert.Equal(changed.GetProperty("actual").GetDouble(), asked.GetProperty("actual").GetDouble());
        Assert.InRange(changed.GetProperty("actual").GetDouble() - before.GetProperty("actual").GetDouble(), 1, 10);
    }

    [Fact]
    public async Task AMistypedPackageIsSuggested()
    {
        using BoardFolder board = Board("Q1.1", "Q1.2");
        board.Write("bom.csv", File.ReadAllText(board.At("bom.csv")).Replace("Q1,TQ-2,", "Q1,TQ-2X,", StringComparison.Ordinal));
        Assert.Contains("Q1: The part table has no row TQ-2X; is TQ-2 meant?", (await board.Check()).Flat, StringComparison.Ordinal);
    }

    private static BoardFolder WithAnother(string vceo)
    {
        BoardFolder board = Board("Q1.1", "Q1.2", "350,350");
        string parts = File.ReadAllText(board.At("parts.csv"));
        string dual = parts.Split('\n').Single(l => l.StartsWith("TQ-2,", StringComparison.Ordinal));
        board.Write("parts.csv", parts + dual.Replace("TQ-2,", "TQ-3,", StringComparison.Ordinal).Replace("SOT-363,45,", $"SOT-363,{vceo},", StringComparison.Ordinal) + "\n");
        return board;
    }

    private static BoardFolder Board(string one, string other, string both = "350,250", string elements = "2", string feed = "R4")
    {
        string[] parts = BoardFolder.Parts.ReplaceLineEndings("\n").Split('\n');
        string dual = parts[1].Replace("TQ-31", "TQ-2", StringComparison.Ordinal).Replace("SOT-23", "SOT-363", StringComparison.Ordinal)
            .Replace(",200,350,300,20,150,", ",200,200,500,20,150,", StringComparison.Ordinal).TrimEnd(',');
        int blanks = parts[0].Count(c => c == ',') - dual.Count(c => c == ',');
        return new BoardFolder(
            bill: "References,Part number,Quantity,Package\nQ1,TQ-2,1,SOT-363\n\"Q3.1, Q3.2\",TQ-2,1,SOT-363\n\"Q2, Q4\",TQ-30,2,SOT-23\n\"R1, R3\",RK-33,2,0603\n\"R2, R4\",RK-4K7,2,0603\n",
            channels: BoardFolder.Channels.ReplaceLineEndings("\n").Split('\n')[0]
                + $"\nCH1,11.4,12.6,8.5,9.5,3,12,28,P5,0,45,{one},R1,Q2,R2\nCH2,11.4,12.6,8.5,9.5,3,12,28,P5,0,45,{other},R3,Q4,{feed}\n",
            parts: string.Join('\n', new[] { parts[0] + ",RthJA both [K/W],Power both [mW],Elements" }.Concat(parts[1..].Where(p => p.Length > 0).Select(p => p + ",,,")))
                + "\n" + dual + new string(',', blanks) + $",{both},{elements}\n");
    }

    private static async Task<JsonElement> Finding(BoardFolder board, string rule, string reference, params string[] more)
    {
        Run run = await board.Check(["--format", "json", .. more]);
        Assert.True(run.Error.Length == 0, run.Error);
        using JsonDocument document = JsonDocument.Parse(run.Output);
        return document.RootElement.GetProperty("boards")[0].GetProperty("findings").EnumerateArray()
            .Single(f => f.GetProperty("rule").GetString() == rule && f.GetProperty("reference").GetString() == reference).Clone();
    }

    private static async Task<JsonElement[]> Assumed(BoardFolder board)
    {
        Run run = await board.Check("--format", "json");
        using JsonDocument document = JsonDocument.Parse(run.Output);
        return [.. document.RootElement.GetProperty("boards")[0].GetProperty("assumed").EnumerateArray().Select(a => a.Clone())];
    }
}
