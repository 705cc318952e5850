using System.Runtime.CompilerServices;
using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>The example as a user runs it: what its README says is what the run prints.</summary>
public class ExampleTests
{
    private static readonly string Folder = Path.Combine(Root(), "examples", "greenhouse-lamps");

    [Fact]
    public async Task TheFolderGivesTheVerdictsOfItsReadme()
    {
        Run run = await Run.Of("check", Path.Combine(Folder, "board"), "--parts", Path.Combine(Folder, "parts.csv"), "--format", "json");
        Assert.Equal(1, run.Code);
        AssertVerdicts(run.Output);
    }

    [Fact]
    public async Task TheWorkbookSaysTheSame()
    {
        Run run = await Run.Of("check", Path.Combine(Folder, "greenhouse.xlsx"), "--format", "json");
        Assert.Equal(1, run.Code);
        AssertVerdicts(run.Output);
    }

    [Fact]
    public async Task FolderAndWorkbookAgreeInEveryFigure()
    {
        Run folder = await Run.Of("check", Path.Combine(Folder, "board"), "--parts", Path.Combine(Folder, "parts.csv"), "--format", "json");
        Run workbook = await Run.Of("check", Path.Combine(Folder, "greenhouse.xlsx"), "--format", "json");
        Assert.Equal(Figures(folder.Output), Figures(workbook.Output));
    }

    [Fact]
    public async Task TheTextFitsEightyColumnsAndNamesTheHotPartFirstAmongItsChannels()
    {
        Run run = await Run.Of("check", Path.Combine(Folder, "board"), "--parts", Path.Combine(Folder, "parts.csv"));
        Assert.All(run.Output.Split('\n'), line => Assert.InRange(line.Length, 0, 80));
        Assert.Contains("POTTING power Q31 VELM-S45B", run.Output, StringComparison.Ordinal);
        Assert.Contains("given up: 0", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task TheQuestionsOfItsReadmeHaveTheAnswersOfItsReadme()
    {
        string[] check = ["check", Path.Combine(Folder, "board"), "--parts", Path.Combine(Folder, "parts.csv")];
        Assert.StartsWith("No: POTTING power Q31 OSKE-118: ", (await Run.Of([.. check, "--with", "Q31=OSKE-118"])).Flat, StringComparison.Ordinal);
        Assert.StartsWith("Yes: with OSKE-118 for VELM-S45A (Q11), ", (await Run.Of([.. check, "--with", "Q11=OSKE-118"])).Flat, StringComparison.Ordinal);
        Run run = await Run.Of([.. check, "--concessions", Path.Combine(Folder, "concessions.csv"), "--date", "2026-05-04"]);
        Assert.Equal(1, run.Code);
        Assert.Contains("POTTING concession", run.Flat, StringComparison.Ordinal);
        Assert.Contains("COLDFRAME nonconforming", run.Flat, StringComparison.Ordinal);
        Assert.Contains("expired on 2026-03-31, not applied.", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task ThePorchLampConformsAndNothingIsAssumed()
    {
        Run run = await Run.Of("check", Path.Combine(Root(), "examples", "porch-lamp"), "--format", "json");
        Assert.True(run.Code == 0, run.Output);
        using JsonDocument document = JsonDocument.Parse(run.Output);
        JsonElement board = document.RootElement.GetProperty("boards")[0];
        Assert.Empty(board.GetProperty("assumed").EnumerateArray());
        Assert.Contains("off", board.GetProperty("findings").EnumerateArray().Select(f => f.GetProperty("rule").GetString()));
    }

    /// <summary>Every folder of examples is a test: one of these names it, and each has a README that gives its command.</summary>
    [Fact]
    public void EveryExampleIsRun()
    {
        IEnumerable<string?> folders = Directory.GetDirectories(Path.Combine(Root(), "examples")).Select(Path.GetFileName);
        Assert.Equal(["greenhouse-lamps", "porch-lamp"], folders.Order(StringComparer.Ordinal));
        Assert.All(folders, f => Assert.Contains(
            "dotnet run --project src/PartCheck.Cli -- check examples/" + f, File.ReadAllText(Path.Combine(Root(), "examples", f!, "README.md")), StringComparison.Ordinal));
    }

    private static void AssertVerdicts(string json)
    {
        using JsonDocument document = JsonDocument.Parse(json);
        JsonElement board = document.RootElement.GetProperty("boards")[0];
        Assert.Equal(
            [
                "SEEDLING conforms", "CUTTINGS conforms", "POTTING nonconforming", "SHELF conforms", "COLDFRAME nonconforming",
                "MISTING nonconforming", "RIPENING not verified", "AISLE conforms",
            ],
            board.GetProperty("channels").EnumerateArray().Select(c => $"{c.GetProperty("channel").GetString()} {c.GetProperty("verdict").GetString()}"));
        Assert.Equal(
            ["COLDFRAME drive ", "MISTING bill R60", "POTTING junction Q31", "POTTING power Q31"],
            board.GetProperty("findings").EnumerateArray()
                .Where(f => f.GetProperty("verdict").GetString() == "nonconforming")
                .Select(f => $"{f.GetProperty("channel").GetString()} {f.GetProperty("rule").GetString()} {f.GetProperty("reference").GetString()}")
                .Order(StringComparer.Ordinal));
        Assert.Empty(document.RootElement.GetProperty("complaints").EnumerateArray());
    }

    /// <summary>Findings without the cells they cite.</summary>
    private static List<string> Figures(string json)
    {
        using JsonDocument document = JsonDocument.Parse(json);
        return [.. document.RootElement.GetProperty("boards")[0].GetProperty("findings").EnumerateArray().Select(f =>
            string.Join(' ', new[] { "channel", "rule", "reference", "pin", "partNumber", "verdict", "actual", "allowed", "stressRatio" }
                .Select(k => f.TryGetProperty(k, out JsonElement value) ? value.GetRawText() : string.Empty)))];
    }

    private static string Root([CallerFilePath] string file = "") => Path.GetFullPath(Path.Combine(Path.GetDirectoryName(file)!, "..", ".."));
}
