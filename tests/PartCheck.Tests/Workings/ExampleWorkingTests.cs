using System.Runtime.CompilerServices;
using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Workings;
using Xunit;

namespace PartCheck.Tests.Workings;

/// <summary>Every finding of both examples, followed with a calculator.</summary>
public class ExampleWorkingTests
{
    internal static readonly Lazy<CheckReport> Greenhouse = new(() => Checked("greenhouse-lamps/board", "greenhouse-lamps/parts.csv"));
    private static readonly Lazy<CheckReport> Porch = new(() => Checked("porch-lamp"));

    [Fact]
    public void EveryFindingOfTheGreenhouseCanBeFollowed() => Follow(Greenhouse.Value, 1000);

    [Fact]
    public void EveryFindingOfThePorchLampCanBeFollowed() => Follow(Porch.Value, 100);

    [Fact]
    public void EveryRuleButThoseThatTheExamplesMayLeaveOutIsAmongThem() =>
        Assert.Empty(RuleBook.Judged.Except(["soa", "r-film", "led-current"])
            .Except(Greenhouse.Value.Boards[0].Findings.Concat(Porch.Value.Boards[0].Findings).Select(f => f.Rule)));

    // The last step is the ratio that the check prints: to the rounding of six figures that a difference of two of them can grow to.
    [Fact]
    public void TheRatioWorkedOutIsTheFindings()
    {
        foreach (Finding finding in Greenhouse.Value.Boards[0].Findings.Concat(Porch.Value.Boards[0].Findings))
        {
            Working working = FindingWorking.Of(finding);
            if (finding.StressRatio is { } ratio && working.Of(working.Ratio) is { } printed)
            {
                Assert.InRange(printed.Value, ratio - (1e-4 * Math.Max(ratio, 0.1)), ratio + (1e-4 * Math.Max(ratio, 0.1)));
            }
        }
    }

    // A limit in JSON and text comes with the cell that it was read from, where the finding names one.
    [Fact]
    public void TheCellThatDecidedAFindingStandsInItsWorking()
    {
        foreach (Finding finding in Greenhouse.Value.Boards[0].Findings.Where(f => f is { Cell: not null, Basis: not null, StressRatio: > 0 } && f.Rule is not ("drive" or "stability")))
        {
            Working working = FindingWorking.Of(finding);
            Assert.True(working.Lines.Concat(working.Checks).Any(l => l.Line.Cell == finding.Cell), $"{finding.Channel} {finding.Rule} {finding.Reference}: {finding.Cell}");
        }
    }

    private static void Follow(CheckReport report, int least)
    {
        BoardReport board = report.Boards[0];
        Assert.NotEmpty(board.Findings);
        int steps = 0;
        foreach (ChannelJudgement channel in board.Channels)
        {
            IReadOnlyList<Finding> findings = [.. board.Findings.Where(f => f.Channel == channel.Channel || f.Channels?.Contains(channel.Channel) == true)];
            string text = WorkingText.Write(new WorkingReport(report, channel.Channel, [.. findings.Select(FindingWorking.Of)]));
            PrintedWorking followed = PrintedWorking.Follow(text);
            steps += followed.Steps;
        }

        Assert.InRange(steps, least, int.MaxValue);
    }

    private static CheckReport Checked(string board, params string[] parts) =>
        CheckRun.Run(new CheckRequest { Boards = [Example(board)], Parts = [.. parts.Select(p => Example(p))] });

    private static string Example(string name, [CallerFilePath] string file = "") =>
        Path.Combine(Path.GetFullPath(Path.Combine(Path.GetDirectoryName(file)!, "..", "..", "..", "examples")), name);
}
