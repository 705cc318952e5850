using System.Globalization;
using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary><c>partcheck working</c> as a user runs it.</summary>
public class WorkingTests
{
    [Fact]
    public async Task AChannelOfWhichAllConformsEndsWithZeroAndFitsEightyColumns()
    {
        using BoardFolder board = new();
        Run run = await Working(board, "CH1");
        Assert.True(run.Code == 0, run.Output + run.Error);
        Assert.All(run.Output.Split('\n'), line => Assert.InRange(line.Length, 0, 80));
        Assert.Contains("CH1 power Q1 TQ-31: CONFORMS", run.Flat, StringComparison.Ordinal);
        Assert.Contains("Check: the solved figures satisfy the circuit", run.Output, StringComparison.Ordinal);
        Assert.DoesNotContain('\u00A0', run.Output);
    }

    // 30 mW of power rating: the same channel is nonconforming by power, but not by the voltages.
    [Fact]
    public async Task TheExitCodeIsThatOfTheFindingsShown()
    {
        using BoardFolder board = new(parts: BoardFolder.Parts.Replace("200,350,300", "200,30,300", StringComparison.Ordinal));
        Assert.Equal(1, (await Working(board, "CH1")).Code);
        Assert.Equal(1, (await Working(board, "CH1", "--rule", "power")).Code);
        Assert.Equal(0, (await Working(board, "ch1", "--rule", "VCE")).Code);
        Assert.Equal(0, (await Working(board, "CH1", "--reference", "R2")).Code);
    }

    [Fact]
    public async Task WhatIsNotVerifiedEndsWithTwoAndSaysWhatIsMissing()
    {
        using BoardFolder board = new(parts: BoardFolder.Parts.Replace("SOT-23,45,", "SOT-23,,", StringComparison.Ordinal));
        Run run = await Working(board, "CH1", "--rule", "vce");
        Assert.Equal(2, run.Code);
        Assert.Contains("NOT VERIFIED; missing VCEO of TQ-31", run.Flat, StringComparison.Ordinal);
    }

    // One bill line serves both channels: a channel's references are its own.
    [Fact]
    public async Task TheReferencesOfferedAreTheChannelsOwn()
    {
        using BoardFolder board = new(
            bill: "References,Part number,Quantity\n\"Q1, Q3\",TQ-31,2\n\"Q2, Q4\",TQ-30,2\n\"R1, R3\",RK-33,2\n\"R2, R4\",RK-4K7,2\n",
            channels: BoardFolder.Channels + "\n" + BoardFolder.Channels.ReplaceLineEndings("\n").Split('\n')[1].Replace("CH1,", "CH2,", StringComparison.Ordinal)
                .Replace("Q1,R1,Q2,R2", "Q3,R3,Q4,R4", StringComparison.Ordinal) + "\n");
        Run run = await Working(board, "CH2", "--reference", "Q1X");
        Assert.Equal(64, run.Code);
        Assert.Contains("its references are Q3, Q4, R3, R4.", run.Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("there is no channel \"CH9\"; the channels are CH1.", "CH9")]
    [InlineData("there is no finding of a rule \"soa\" in CH1; its rules are vce, vcb, ic, power,", "CH1", "--rule", "soa")]
    [InlineData("there is no finding about \"Q9\" in CH1; its references are Q1, Q2, R1, R2.", "CH1", "--reference", "Q9")]
    [InlineData("the rule vce says nothing of R1 in CH1; it speaks of Q1, Q2.", "CH1", "--rule", "vce", "--reference", "R1")]
    [InlineData("the rule drive says nothing of R1 in CH1; it speaks of the channel as a whole.", "CH1", "--rule", "drive", "--reference", "R1")]
    public async Task WhatIsNotThereIsAUsageErrorThatNamesWhatIs(string message, string channel, params string[] more)
    {
        using BoardFolder board = new();
        Run run = await Working(board, channel, more);
        Assert.Equal(64, run.Code);
        Assert.Empty(run.Output);
        Assert.StartsWith("partcheck: " + message, run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AMissingChannelIsAUsageError()
    {
        using BoardFolder board = new();
        Assert.Equal(64, (await Run.Of("working", board.Folder)).Code);
    }

    [Fact]
    public async Task ABoardThatIsNotThereIsNoInput() => Assert.Equal(66, (await Run.Of("working", "no-such-board", "CH1")).Code);

    [Fact]
    public async Task AComplaintIsPrintedAndEndsWithSixtyFive()
    {
        using BoardFolder board = new(channels: BoardFolder.Channels + "\nCH2,twelve,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2");
        Run run = await Working(board, "CH1", "--rule", "vce");
        Assert.Equal(65, run.Code);
        Assert.Contains("found \"twelve\"", run.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task JsonGivesEveryStepItsSymbolFormulaNumbersResultUnitSourceAndCell()
    {
        using BoardFolder board = new();
        Run run = await Working(board, "CH1", "--rule", "power", "--reference", "Q1", "--format", "json");
        using JsonDocument document = JsonDocument.Parse(run.Output);
        JsonElement working = document.RootElement.GetProperty("workings")[0];
        Assert.Equal("Q1", working.GetProperty("finding").GetProperty("reference").GetString());
        List<JsonElement> steps = [.. working.GetProperty("steps").EnumerateArray()];
        JsonElement rating = steps.Single(s => s.GetProperty("symbol").GetString() == "Prated");
        Assert.Equal("given", rating.GetProperty("kind").GetString());
        Assert.Equal(0.35, rating.GetProperty("result").GetDouble(), 12);
        Assert.Equal("W", rating.GetProperty("unit").GetString());
        Assert.EndsWith("parts.csv!H2", rating.GetProperty("cell").GetString(), StringComparison.Ordinal);
        Assert.False(rating.GetProperty("assumed").GetBoolean());
        Assert.True(steps.Single(s => s.GetProperty("symbol").GetString() == "Tflat").GetProperty("assumed").GetBoolean());
        JsonElement factor = steps.Single(s => s.GetProperty("symbol").GetString() == "F");
        Assert.Equal("common practice, no source", factor.GetProperty("source").GetString());
        JsonElement ratio = steps.Single(s => s.GetProperty("symbol").GetString() == working.GetProperty("ratioSymbol").GetString());
        Assert.Equal("P / Pallowed", ratio.GetProperty("formula").GetString());
        Assert.Contains(" mW / ", ratio.GetProperty("numbers").GetString(), StringComparison.Ordinal);
        Assert.Equal(working.GetProperty("finding").GetProperty("stressRatio").GetDouble(), ratio.GetProperty("result").GetDouble(), 1e-5);
        Assert.Contains("balance", working.GetProperty("checks").EnumerateArray().Select(s => s.GetProperty("kind").GetString()));
        Assert.DoesNotContain(board.Folder, run.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task OutIsWrittenAndReplacedOnlyWhenTold()
    {
        using BoardFolder board = new();
        string target = board.At("working.txt");
        Assert.Equal(0, (await Working(board, "CH1", "--rule", "vce", "--out", target)).Code);
        Assert.StartsWith("Each result is made", (await File.ReadAllLinesAsync(target, TestContext.Current.CancellationToken))[1], StringComparison.Ordinal);
        Assert.Equal(73, (await Working(board, "CH1", "--rule", "vce", "--out", target)).Code);
        Assert.Equal(0, (await Working(board, "CH1", "--rule", "vce", "--out", target, "--replace")).Code);
    }

    [Fact]
    public async Task TheSameInputGivesTheSameBytesInAnyCulture()
    {
        using BoardFolder board = new();
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            string text = (await Working(board, "CH1")).Output;
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo("de-DE");
            Assert.Equal(text, (await Working(board, "CH1")).Output);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    private static Task<Run> Working(BoardFolder board, string channel, params string[] more) => Run.Of(["working", board.Folder, channel, .. more]);
}
