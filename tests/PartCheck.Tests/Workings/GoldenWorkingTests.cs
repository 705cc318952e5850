using System.Runtime.CompilerServices;
using PartCheck.Reports;
using PartCheck.Tests.Golden;
using PartCheck.Workings;
using Xunit;

namespace PartCheck.Tests.Workings;

/// <summary>A few workings of the example boards, gone through by hand and approved.</summary>
public class GoldenWorkingTests
{
    [Theory]
    [InlineData("POTTING", "power", "working-power.txt")]
    [InlineData("COLDFRAME", "drive", "working-drive.txt")]
    [InlineData("SHELF", "sharing", "working-sharing.txt")]
    public void TextIsTheApprovedOne(string channel, string rule, string file) => ApprovedFile.Holds(file, WorkingText.Write(Report(channel, rule)));

    [Fact]
    public void JsonIsTheApprovedOne() => ApprovedFile.Holds("working-power.json", JsonWorking.Write(Report("POTTING", "power")));

    /// <summary>What the README shows of a working is what is printed, line by line.</summary>
    [Fact]
    public void TheReadmesExcerptIsAsItIsPrinted()
    {
        string readme = File.ReadAllText(Path.Combine(Root(), "README.md"));
        string excerpt = readme[readme.IndexOf("  Emitter current of Q31", StringComparison.Ordinal)..];
        excerpt = excerpt[..excerpt.IndexOf("```", StringComparison.Ordinal)];
        Assert.InRange(excerpt.Split('\n').Length, 10, 60);
        string printed = WorkingText.Write(Report("POTTING", "power"));
        Assert.All(excerpt.Split("  ...\n"), part => Assert.Contains(part, printed, StringComparison.Ordinal));
    }

    private static WorkingReport Report(string channel, string rule)
    {
        CheckReport check = ExampleWorkingTests.Greenhouse.Value;
        WorkingSelection selection = new(channel, rule, null);
        return new WorkingReport(check, channel, [.. selection.Of(check.Boards[0], out string? fault).Take(1).Select(FindingWorking.Of)]) { EveryCheck = fault is null };
    }

    private static string Root([CallerFilePath] string file = "") => Path.GetFullPath(Path.Combine(Path.GetDirectoryName(file)!, "..", "..", ".."));
}
