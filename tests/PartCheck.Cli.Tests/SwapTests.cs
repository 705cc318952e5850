using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>May it be fitted? The board with other parts, beside the bill as it stands.</summary>
public class SwapTests
{
    // TQ-31 with another name; with a third of its power; without its Tj max; in another package; RK-33 as 30 ohm.
    private static readonly string Pass = BoardFolder.Parts.Split('\n')[1];
    private static readonly string Others = string.Join('\n',
    [
        Pass.Replace("TQ-31", "OX-1", StringComparison.Ordinal).Replace("Tarnwood", "Oxmoor", StringComparison.Ordinal),
        Pass.Replace("TQ-31", "OX-WEAK", StringComparison.Ordinal).Replace(",200,350,300,20,150,", ",200,60,2000,20,150,", StringComparison.Ordinal),
        Pass.Replace("TQ-31", "OX-OPEN", StringComparison.Ordinal).Replace(",300,20,150,", ",300,20,,", StringComparison.Ordinal),
        Pass.Replace("TQ-31", "OX-BIG", StringComparison.Ordinal).Replace("SOT-23", "SOT-89", StringComparison.Ordinal),
        BoardFolder.Parts.Split('\n')[3].Replace("RK-33", "RK-30", StringComparison.Ordinal).Replace(",33,1%", ",30,1%", StringComparison.Ordinal),
        string.Empty,
    ]);

    [Theory]
    [InlineData("Q1=OX-1", 0, "Yes: with OX-1 for TQ-31 (Q1), CH1 conforms; closest to its limit is CH1 ")]
    [InlineData("TQ-31=ox-1", 0, "Yes: with OX-1 for TQ-31 (Q1), CH1 conforms")]
    [InlineData("Q1=Oxmoor OX-1", 0, "Yes: with OX-1 [Oxmoor] for TQ-31 (Q1), CH1 conforms")]
    [InlineData("Q1=OX-WEAK", 1, "No: CH1 power Q1 OX-WEAK: ")]
    [InlineData("Q1=OX-OPEN", 2, "Not verified: CH1 power")]
    [InlineData("Q1=OX-BIG", 1, "No: bill Q1 OX-BIG: The bill's package is SOT-23, the part table's SOT-89; without the change conforms.")]
    [InlineData("R1=RK-30", 0, "Yes: with RK-30 [30 ohm] for RK-33 [33 ohm] (R1), CH1 conforms")]
    [InlineData("Q2=RK-30", 1, "No: CH1 bill Q2: Q2 (control) is a resistor: a transistor is wanted; without the change conforms.")]
    public async Task TheFirstLineAnswersAndTheExitCodeIsTheChangedBoards(string with, int code, string first)
    {
        using BoardFolder board = new(parts: BoardFolder.Parts + "\n" + Others);
        Run run = await board.Check("--with", with);
        Assert.True(run.Code == code, $"{run.Code}\n{run.Output}{run.Error}");
        Assert.StartsWith(first, run.Flat, StringComparison.Ordinal);
        Assert.All(run.Output.Split('\n'), line => Assert.InRange(line.Length, 0, 80));
    }

    // The load current is about VBE/Rs (common practice, no source): 33 ohm to 30 ohm raises it by a tenth, a little less since a
    // VBE rises with the logarithm of the current.
    [Fact]
    public async Task TheComparisonHoldsBothLoadCurrentsAndEveryRatioThatChanges()
    {
        using BoardFolder board = new(parts: BoardFolder.Parts + "\n" + Others);
        using JsonDocument document = JsonDocument.Parse((await board.Check("--with", "R1=RK-30", "--format", "json")).Output);
        JsonElement comparison = document.RootElement.GetProperty("boards")[0].GetProperty("comparison");
        Assert.Equal("yes", comparison.GetProperty("answer").GetString());
        JsonElement change = comparison.GetProperty("changes")[0];
        Assert.Equal(["R1"], change.GetProperty("references").EnumerateArray().Select(r => r.GetString()));
        Assert.Equal((33.0, 30.0), (change.GetProperty("resistance").GetProperty("before").GetDouble(), change.GetProperty("resistance").GetProperty("after").GetDouble()));
        JsonElement channel = Assert.Single(comparison.GetProperty("channels").EnumerateArray());
        double Nominal(string when) => channel.GetProperty("loadCurrent").GetProperty(when).GetProperty("nominal").GetDouble();
        Assert.InRange(Nominal("after") / Nominal("before"), 1.08, 1.10);
        JsonElement power = channel.GetProperty("rules").EnumerateArray().First(r => r.GetProperty("rule").GetString() == "power");
        Assert.True(power.GetProperty("after").GetProperty("stressRatio").GetDouble() > power.GetProperty("before").GetProperty("stressRatio").GetDouble());
        Assert.DoesNotContain("bill", channel.GetProperty("rules").EnumerateArray().Select(r => r.GetProperty("rule").GetString()));
    }

    // The part of the bill itself: nothing changes, and the answer is the bill's own verdict.
    [Fact]
    public async Task ThePartThatStandsThereChangesNothing()
    {
        using BoardFolder board = new();
        Run run = await board.Check("--with", "Q1=TQ-31");
        Assert.Equal(0, run.Code);
        Assert.Contains("As before: CH1", run.Flat, StringComparison.Ordinal);
        string plain = (await board.Check()).Output;
        Assert.EndsWith(plain, run.Output, StringComparison.Ordinal);
    }

    // Mixed stock: one leg of a pair gets the new part, and the legs are judged as they then are.
    [Fact]
    public async Task OneLegOfAPairMayCarryAnotherPart()
    {
        const string Bill = """
            References,Part number,Quantity,Value,Package,Manufacturer
            "Q1, Q3",TQ-31,2,,SOT-23,Tarnwood
            Q2,TQ-30,1,,SOT-23,Tarnwood
            "R1, R3",RK-33,2,33,0603,Kelbrook
            R2,RK-4K7,1,4k7,0603,Kelbrook
            "R8, R9",RK-100,2,100,0603,Kelbrook
            """;
        string channels = BoardFolder.Channels.Replace("Control,", "Control,Averaging,", StringComparison.Ordinal).Replace("12,28,P5", "24,56,P5", StringComparison.Ordinal)
            .Replace("Q1,R1,Q2,R2", "\"Q1, Q3\",\"R1, R3\",Q2,\"R8, R9\",R2", StringComparison.Ordinal);
        string hundred = BoardFolder.Parts.Split('\n')[3].Replace("RK-33", "RK-100", StringComparison.Ordinal).Replace(",33,1%", ",100,1%", StringComparison.Ordinal);
        using BoardFolder board = new(bill: Bill, channels: channels, parts: BoardFolder.Parts + "\n" + hundred + "\n" + Others);
        using JsonDocument document = JsonDocument.Parse((await board.Check("--with", "Q3=OX-WEAK", "--format", "json")).Output);
        JsonElement one = document.RootElement.GetProperty("boards")[0];
        Dictionary<string, (string? Part, double Ratio)> power = one.GetProperty("findings").EnumerateArray()
            .Where(f => f.GetProperty("rule").GetString() == "power")
            .ToDictionary(f => f.GetProperty("reference").GetString()!, f => (f.GetProperty("partNumber").GetString(), f.GetProperty("stressRatio").GetDouble()));
        Assert.Equal(("TQ-31", "OX-WEAK"), (power["Q1"].Part, power["Q3"].Part));
        Assert.True(power["Q3"].Ratio > 2 * power["Q1"].Ratio);
        Assert.StartsWith("CH1 power Q3 OX-WEAK: ", one.GetProperty("comparison").GetProperty("reason").GetString(), StringComparison.Ordinal);
    }

    private static string WithAlternates(string pass, string control = "") => BoardFolder.Bill.Replace("Manufacturer", "Manufacturer,Alternates", StringComparison.Ordinal)
        .Replace("Q1,TQ-31,1,,SOT-23,Tarnwood", "Q1,TQ-31,1,,SOT-23,Tarnwood," + pass, StringComparison.Ordinal)
        .Replace("Q2,TQ-30,1,,SOT-23,Tarnwood", "Q2,TQ-30,1,,SOT-23,Tarnwood," + control, StringComparison.Ordinal);

    // Each mix asked for alone gives the figures that the bill with its alternates has to bring together.
    [Fact]
    public async Task TheWorstMixOfAlternatesCountsAndIsNamed()
    {
        string control = BoardFolder.Parts.Split('\n')[2].Replace("TQ-30", "OX-2", StringComparison.Ordinal).Replace("0.56,0.63,1,", "0.60,0.67,1,", StringComparison.Ordinal);
        string parts = BoardFolder.Parts + "\n" + Others + control + "\n";
        using BoardFolder board = new(bill: WithAlternates("OX-WEAK; OX-1", "OX-2"), parts: parts);
        using BoardFolder plain = new(parts: parts);
        Run run = await board.Check("--format", "json");
        Assert.Equal(1, run.Code);
        JsonElement worst = Power(run);
        JsonElement alone = Power(await plain.Check("--with", "Q1=OX-WEAK,Q2=OX-2", "--format", "json"));
        Assert.Equal("OX-WEAK", worst.GetProperty("partNumber").GetString());
        Assert.Equal(alone.GetProperty("stressRatio").GetDouble(), worst.GetProperty("stressRatio").GetDouble());
        Assert.Equal(
            ["Q1 OX-WEAK True", "Q2 OX-2 True"],
            worst.GetProperty("mix").EnumerateArray().Select(m => $"{m.GetProperty("references")[0].GetString()} {m.GetProperty("partNumber").GetString()} {m.GetProperty("alternate").GetBoolean()}"));
        Assert.Contains("with OX-WEAK by Tarnwood in Q1; OX-2 by Tarnwood in Q2", (await board.Check()).Flat, StringComparison.Ordinal);

        // The part asked for takes the place of the line's alternates; those of the other line still count.
        Run asked = await board.Check("--with", "Q1=OX-1", "--format", "json");
        Assert.Equal(0, asked.Code);
        Assert.Equal("Q2", Assert.Single(Power(asked).GetProperty("mix").EnumerateArray()).GetProperty("references")[0].GetString());
    }

    [Theory]
    [InlineData("OX-1", 0, "CONFORMS")]
    [InlineData("OX-1, GONE-9", 2, "bill Q1 TQ-31: missing part table row of GONE-9")]
    [InlineData("OX-BIG", 1, "The bill's package is SOT-23, that of the alternate OX-BIG SOT-89.")]
    [InlineData("RK-33", 1, "Alternate RK-33: Q1 (pass) is a resistor: a transistor is wanted.")]
    public async Task AnAlternateIsJudgedLikeThePartItself(string alternates, int code, string text)
    {
        using BoardFolder board = new(bill: WithAlternates("\"" + alternates + "\""), parts: BoardFolder.Parts + "\n" + Others);
        Run run = await board.Check();
        Assert.True(run.Code == code, $"{run.Code}\n{run.Output}");
        Assert.Contains(text, run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("not solved", run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("not judged by this version", run.Flat, StringComparison.Ordinal);
    }

    private static JsonElement Power(Run run)
    {
        using JsonDocument document = JsonDocument.Parse(run.Output);
        return document.RootElement.GetProperty("boards")[0].GetProperty("findings").EnumerateArray()
            .First(f => f.GetProperty("rule").GetString() == "power" && f.GetProperty("reference").GetString() == "Q1").Clone();
    }

    [Theory]
    [InlineData("Q9=TQ-30", "\"Q9\" is neither a reference nor a part number of the bill; near it: Q1, Q2.")]
    [InlineData("Q1=TQ-3", "\"TQ-3\" is not in the part table; near it: TQ-30, TQ-31.")]
    [InlineData("J1=TQ-30", "\"J1\" serves no channel: nothing here judges it.")]
    [InlineData("Q1=TQ-30,TQ-31=TQ-31", "Q1 is changed twice.")]
    [InlineData("Q1", "is no change: LINE=PN is wanted")]
    public async Task AQuestionThatCannotBeAskedIsAUsageError(string with, string text)
    {
        using BoardFolder board = new();
        Run run = await board.Check("--with", with);
        Assert.Equal(64, run.Code);
        Assert.Empty(run.Output);
        Assert.Contains(text, run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task EverythingWrongWithAQuestionIsSaidAtOnceAndNothingIsWritten()
    {
        using BoardFolder board = new();
        Run run = await board.Check("--with", "Q9=TQ-30", "--with", "Q1=TQ-3", "--out", board.At("report.txt"));
        Assert.Equal(64, run.Code);
        Assert.Equal(2, run.Error.TrimEnd('\n').Split('\n').Length);
        Assert.False(File.Exists(board.At("report.txt")));
        Assert.Equal(64, (await Run.Of("check", board.Folder, board.Folder, "--with", "Q1=TQ-30")).Code);
    }

    [Fact]
    public async Task WhatTheBoardHasWrongElsewhereIsSaidBesideTheAnswer()
    {
        string second = BoardFolder.Channels.Split('\n')[1].Replace("CH1", "CH2", StringComparison.Ordinal).Replace("Q1,R1,Q2,R2", "Q3,R3,Q4,R4", StringComparison.Ordinal);
        string bill = BoardFolder.Bill + "\nQ3,OX-WEAK,1,,SOT-23,\nQ4,TQ-30,1,,SOT-23,\nR3,RK-33,1,33,0603,\nR4,RK-4K7,1,4k7,0603,\n";
        using BoardFolder board = new(bill: bill, channels: BoardFolder.Channels + "\n" + second + "\n", parts: BoardFolder.Parts + "\n" + Others);
        Run run = await board.Check("--with", "Q1=OX-1");
        Assert.Equal(1, run.Code);
        Assert.StartsWith("Yes: ", run.Output, StringComparison.Ordinal);
        Assert.Contains("elsewhere the board is nonconforming, with and without this change.", run.Flat, StringComparison.Ordinal);
        Assert.Contains("As before: CH1, CH2", run.Flat, StringComparison.Ordinal);
    }
}
