using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>One board, several assemblies: what is not fitted is not judged, what is half fitted is a finding.</summary>
public class AssemblyTests
{
    private const string Bill = """
        References,Part number,Quantity,Populated FULL,Populated LITE,Populated BARE,Populated ODD
        Q1,TQ-31,1,yes,yes,no,yes
        Q2,TQ-30,1,yes,yes,no,yes
        R1,RK-33,1,yes,yes,no,yes
        R2,RK-4K7,1,yes,yes,no,yes
        Q3,TQ-31,1,yes,no,no,yes
        Q4,TQ-30,1,yes,no,no,no
        R3,RK-33,1,yes,no,no,yes
        R4,RK-4K7,1,yes,no,no,yes
        """;

    private static readonly string Channels = BoardFolder.Channels + "\n"
        + BoardFolder.Channels.Split('\n')[1].Replace("CH1", "CH2", StringComparison.Ordinal).Replace("Q1,R1,Q2,R2", "Q3,R3,Q4,R4", StringComparison.Ordinal) + "\n";

    [Theory]
    [InlineData("FULL", 0, "CH1 conforms; CH2 conforms", "")]
    [InlineData("lite", 0, "CH1 conforms", "CH2")]
    [InlineData("ODD", 1, "CH1 conforms; CH2 nonconforming", "")]
    [InlineData("BARE", 2, "", "CH1 CH2")]
    public async Task AChannelIsJudgedWhereItIsFitted(string assembly, int code, string channels, string without)
    {
        using BoardFolder board = new(bill: Bill, channels: Channels);
        Run run = await board.Check("--assembly", assembly, "--format", "json");
        Assert.True(run.Code == code, run.Output + run.Error);
        using JsonDocument document = JsonDocument.Parse(run.Output);
        JsonElement one = document.RootElement.GetProperty("boards")[0];
        Assert.Equal(assembly.ToUpperInvariant(), one.GetProperty("assembly").GetString());
        Assert.Equal(channels, string.Join("; ", one.GetProperty("channels").EnumerateArray().Select(c => c.GetProperty("channel").GetString() + " " + c.GetProperty("verdict").GetString())));
        Assert.Equal(without, string.Join(' ', one.GetProperty("channelsNotFitted").EnumerateArray().Select(c => c.GetString())));
    }

    [Fact]
    public async Task TheTextNamesTheAssemblyAndWhatIsNotThere()
    {
        using BoardFolder board = new(bill: Bill, channels: Channels);
        Run lite = await board.Check("--assembly", "LITE");
        Assert.Contains("CONFORMS (derating: workshop; assembly: LITE)", lite.Flat, StringComparison.Ordinal);
        Assert.Contains("Not fitted in this assembly, not judged: CH2", lite.Flat, StringComparison.Ordinal);
        Assert.Contains("No channel is fitted in this assembly.", (await board.Check("--assembly", "BARE")).Flat, StringComparison.Ordinal);
        Assert.Contains("CH2 bill Q4: Q4 (control) is not fitted: the bill says \"no\".", (await board.Check("--assembly", "ODD")).Flat, StringComparison.Ordinal);
        Assert.Contains("The bill names assemblies: FULL, LITE, BARE, ODD.", (await board.Check()).Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AnAssemblyThatTheBillDoesNotNameIsAUsageError()
    {
        using BoardFolder board = new(bill: Bill, channels: Channels);
        Run run = await board.Check("--assembly", "LIGHT");
        Assert.Equal(64, run.Code);
        Assert.Empty(run.Output);
        Assert.Contains("has no assembly \"LIGHT\": it has FULL, LITE, BARE, ODD.", run.Error, StringComparison.Ordinal);
        using BoardFolder plain = new();
        Assert.Contains("no column such as \"Populated LIGHT\" names one.", (await plain.Check("--assembly", "LIGHT")).Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("LITE", "ch2", "CH2 is not fitted in assembly LITE: there is nothing to derive.")]
    [InlineData("BARE", "CH1", "CH1 is not fitted in assembly BARE: there is nothing to derive.")]
    [InlineData("BARE", "CH9", "there is no channel \"CH9\"; the channels are CH1, CH2.")]
    public async Task AChannelThatIsNotFittedHasNoWorking(string assembly, string channel, string text)
    {
        using BoardFolder board = new(bill: Bill, channels: Channels);
        Run run = await Run.Of("working", board.Folder, channel, "--assembly", assembly);
        Assert.True(run.Code == 64, run.Output + run.Error);
        Assert.Empty(run.Output);
        Assert.Contains(text, run.Error, StringComparison.Ordinal);
    }

    // CH1 lacks one part and is not solved: no figure of the board is known, and none is 0.
    [Fact]
    public async Task ABoardOfWhichNothingIsSolvedShowsNoFigures()
    {
        using BoardFolder board = new(bill: BoardFolder.Bill.Replace("R1,", "R9,", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(1, run.Code);
        Assert.Contains("Board: no channel was solved, so neither current nor heat is known.", run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("hottest", run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("the closest to their limits", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task AChangeIsAskedOfAnAssemblyToo()
    {
        using BoardFolder board = new(bill: Bill, channels: Channels);
        Run run = await board.Check("--assembly", "LITE", "--with", "Q1=TQ-30");
        Assert.StartsWith("Yes: with TQ-30 for TQ-31 (Q1), CH1 conforms", run.Flat, StringComparison.Ordinal);
        Assert.Equal(64, (await board.Check("--assembly", "LITE", "--with", "Q3=TQ-30")).Code);
    }
}
