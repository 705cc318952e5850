using System.Globalization;
using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

public class CheckTests
{
    [Fact]
    public async Task ABoardWithEverythingGivenConforms()
    {
        using BoardFolder board = new();
        Run run = await board.Check();
        Assert.True(run.Code == 0, run.Output + run.Error);
        Assert.Contains("CONFORMS (derating: workshop)", run.Output, StringComparison.Ordinal);
        Assert.DoesNotContain("nonconforming", run.Output, StringComparison.Ordinal);
        Assert.All(run.Output.Split('\n'), line => Assert.InRange(line.Length, 0, 80));
    }

    [Fact]
    public async Task TheSameInputGivesTheSameBytesInAnyCultureAndFormat()
    {
        using BoardFolder board = new();
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            Run text = await board.Check();
            Run json = await board.Check("--format", "json");
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo("de-DE");
            Assert.Equal(text.Output, (await board.Check()).Output);
            Assert.Equal(json.Output, (await board.Check("--format", "json")).Output);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    /// <summary>
    /// Two board conditions of one transistor, 300 and 150 K/W: blank takes the worse and lists it, a name takes its row. The control's heat,
    /// the currents and so the powers are nearly the same; the rated powers are 350 and 700 mW: twice the ratio of <c>power</c>.
    /// </summary>
    [Fact]
    public async Task BlankMountingIsTheWorstRowAndListedANameIsItsRow()
    {
        string parts = BoardFolder.Parts.Replace("Package,VCEO", "Package,Mounting,VCEO", StringComparison.Ordinal)
            .Replace("SOT-23,45", "SOT-23,bare,45", StringComparison.Ordinal).Replace("0603,,", "0603,,,", StringComparison.Ordinal);
        string row = parts.Split('\n').First(l => l.TrimStart().StartsWith("TQ-31", StringComparison.Ordinal));
        parts = parts.Replace(row, row + "\n" + row.Replace("bare", "copper", StringComparison.Ordinal).Replace(",350,300,", ",700,150,", StringComparison.Ordinal), StringComparison.Ordinal)
            .Replace("TQ-30,npn,Tarnwood,SOT-23,bare", "TQ-30,npn,Tarnwood,SOT-23,", StringComparison.Ordinal);
        async Task<(double Ratio, bool Listed)> Power(string? mounting)
        {
            string channels = mounting is null ? BoardFolder.Channels
                : BoardFolder.Channels.Replace(",Feed", ",Feed,Mounting", StringComparison.Ordinal).Replace(",Q2,R2", ",Q2,R2," + mounting, StringComparison.Ordinal);
            using BoardFolder board = new(channels: channels, parts: parts);
            Run run = await board.Check("--format", "json");
            using JsonDocument document = JsonDocument.Parse(run.Output);
            JsonElement one = document.RootElement.GetProperty("boards")[0];
            JsonElement finding = one.GetProperty("findings").EnumerateArray().Single(f => f.GetProperty("rule").GetString() == "power" && f.GetProperty("reference").GetString() == "Q1");
            return (finding.GetProperty("stressRatio").GetDouble(), one.GetProperty("assumed").EnumerateArray().Any(a => a.GetProperty("what").GetString() == "Mounting"));
        }

        (double blank, bool blankListed) = await Power(null);
        (double bare, bool bareListed) = await Power("bare");
        (double copper, bool copperListed) = await Power("Copper");
        Assert.Equal(bare, blank, 9);
        Assert.InRange(bare / copper, 1.9, 2.1);
        Assert.Equal((true, false, false), (blankListed, bareListed, copperListed));
    }

    [Fact]
    public void TheSameInputGivesTheSameReportWithAnyThreadCount()
    {
        using BoardFolder board = new();
        string Json(int threads) => Reports.JsonReport.Write(CheckRun.Run(new CheckRequest { Boards = [board.Folder], Threads = threads }, TestContext.Current.CancellationToken));
        string one = Json(1);
        Assert.Equal(one, Json(2));
        Assert.Equal(one, Json(5));
    }

    [Fact]
    public async Task JsonHoldsTheContractsKeys()
    {
        using BoardFolder board = new();
        Run run = await board.Check("--format", "json");
        using JsonDocument document = JsonDocument.Parse(run.Output);
        JsonElement one = document.RootElement.GetProperty("boards")[0];
        Assert.Equal("conforms", one.GetProperty("verdict").GetString());
        JsonElement channel = one.GetProperty("channels")[0];
        Assert.InRange(channel.GetProperty("loadCurrent").GetProperty("nominal").GetDouble(), 0.016, 0.022);
        Assert.Equal("Q1", channel.GetProperty("nominal").GetProperty("legs")[0].GetProperty("pass").GetString());
        Assert.Equal(
            ["vce", "vcb", "ic", "power", "junction"],
            one.GetProperty("rules").EnumerateArray().Select(r => r.GetString()).Take(5));
        Assert.NotEmpty(one.GetProperty("findings").EnumerateArray());
        Assert.All(one.GetProperty("findings").EnumerateArray(), f => Assert.Equal("conforms", f.GetProperty("verdict").GetString()));
        Assert.Equal(64, document.RootElement.GetProperty("inputs")[0].GetProperty("sha256").GetString()!.Length);
        Assert.DoesNotContain(board.Folder, run.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task OutIsWrittenOnceAndReplacedOnlyWhenTold()
    {
        using BoardFolder board = new();
        string target = board.At("report.json");
        Assert.Equal(0, (await board.Check("--format", "json", "--out", target)).Code);
        string first = await File.ReadAllTextAsync(target, TestContext.Current.CancellationToken);
        Run again = await board.Check("--out", target);
        Assert.Equal(73, again.Code);
        Assert.Equal(first, await File.ReadAllTextAsync(target, TestContext.Current.CancellationToken));
        Assert.Equal(0, (await board.Check("--out", target, "--replace")).Code);
        Assert.NotEqual(first, await File.ReadAllTextAsync(target, TestContext.Current.CancellationToken));
        Assert.Empty(Directory.GetFiles(board.Folder, "*.part"));
    }

    [Fact]
    public async Task AnInputIsNeverReplaced()
    {
        using BoardFolder board = new();
        Run run = await board.Check("--out", board.At("bom.csv"), "--replace");
        Assert.Equal(73, run.Code);
        Assert.Equal(BoardFolder.Bill, await File.ReadAllTextAsync(board.At("bom.csv"), TestContext.Current.CancellationToken));
    }

    [Fact]
    public async Task OutIntoAFolderThatIsNotThereCannotBeCreated()
    {
        using BoardFolder board = new();
        Assert.Equal(73, (await board.Check("--out", board.At("no/such/report.txt"))).Code);
    }

    [Theory]
    [InlineData("check")]
    [InlineData("check", "x", "--format", "xml")]
    [InlineData("check", "x", "--derating", "no-such-table")]
    [InlineData("check", "x", "y", "--bill", "b.csv")]
    [InlineData("chek", "x")]
    [InlineData]
    public async Task UsageErrorsAreOneMessageAndNoHelp(params string[] args)
    {
        Run run = await Run.Of(args);
        Assert.Equal(64, run.Code);
        Assert.Empty(run.Output);
        Assert.StartsWith("partcheck: ", run.Error, StringComparison.Ordinal);
        Assert.All(run.Error.TrimEnd('\n').Split('\n'), line => Assert.StartsWith("partcheck: ", line, StringComparison.Ordinal));
        Assert.DoesNotContain("--encoding", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task HelpAndVersionAreNoErrors()
    {
        Assert.Equal(0, (await Run.Of("--help")).Code);
        Assert.Equal(0, (await Run.Of("--version")).Code);
        Assert.Contains("--parts", (await Run.Of("check", "--help")).Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task TheDeratingTableOfACommandIsNamedInTheFirstLine()
    {
        using BoardFolder board = new();
        Run run = await board.Check("--derating", "ratings");
        Assert.EndsWith("(derating: ratings)", run.Output.Split('\n')[0], StringComparison.Ordinal);
    }
}
