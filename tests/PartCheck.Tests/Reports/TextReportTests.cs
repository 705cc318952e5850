using PartCheck.OperatingPoints;
using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Reports;

/// <summary>What a text report keeps to, whatever stands in the tables.</summary>
public class TextReportTests
{
    private static readonly string[] Names =
    [
        "A", new('A', 79), new('B', 200), "two\nlines", "tab\tand\u001b[31mred", "a b  c", "\u00A0", "R\u0301sum\u0301",
        new('\u4E2D', 70), string.Concat(Enumerable.Repeat("\U0001F600", 60)), "half \ud83d", "\u202Eturned",
    ];

    public static TheoryData<string> EveryName => [.. Names];

    [Theory]
    [MemberData(nameof(EveryName))]
    public void NoTextOfAUserBreaksTheEightyColumnsOrReachesTheTerminalAsACommand(string name)
    {
        string text = TextReport.Write(Report(name, 1.5), colour: false);
        Assert.All(text.Split('\n'), line => Assert.InRange(PrintedColumns(line), 0, 80));
        Assert.DoesNotContain(text, c => (char.IsControl(c) && c != '\n') || c == '\u202E');
        Assert.DoesNotContain("\n\n\n", text, StringComparison.Ordinal);
        for (int i = 0; i < text.Length; i++)
        {
            Assert.False(char.IsHighSurrogate(text[i]) && !char.IsLowSurrogate(text[i + 1]), "half a character");
        }
    }

    [Fact]
    public void ALongWordIsCutAndNothingOfItIsLost()
    {
        string name = string.Concat(Enumerable.Range(0, 300).Select(i => (char)('a' + (i % 26))));
        string joined = string.Concat(TextReport.Write(Report(name, 1.5), colour: false).Split('\n').Select(l => l.Trim()));
        Assert.Contains(name, joined, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    [InlineData(double.NegativeInfinity)]
    public void WhatIsNoNumberIsNotPrinted(double value)
    {
        CheckReport report = Report("CH1", value, value, value);
        string text = TextReport.Write(report, colour: false);
        Assert.DoesNotContain("NaN", text, StringComparison.Ordinal);
        Assert.DoesNotContain("Infinity", text, StringComparison.Ordinal);
        Assert.Contains("load not known .. not known", Flat(text), StringComparison.Ordinal);
        Assert.DoesNotContain("NaN", JsonReport.Write(report), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(1.37, "ratio 1.37")]
    [InlineData(1.0004, "ratio 1.0004")]
    [InlineData(0.9996, "ratio 0.9996")]
    [InlineData(1, "ratio 1.00")]
    public void ABrokenLimitDoesNotPrintAsMetExactly(double ratio, string shown) =>
        Assert.Contains(shown + "\n", TextReport.Write(Report("CH1", ratio), colour: false), StringComparison.Ordinal);

    [Fact]
    public void TheWorstStandsFirstHoweverTheFindingsAreMade()
    {
        CheckReport report = Report("CH1", 1.5);
        BoardReport board = report.Boards[0];
        Finding worse = board.Findings[0] with { Reference = "Q2", StressRatio = 3, Actual = 0.3 };
        Finding none = board.Findings[0] with { Reference = "Q3", StressRatio = null, Actual = null, Text = "It is not fitted." };
        string text = TextReport.Write(report with { Boards = [board with { Findings = [.. board.Findings, worse, none] }] }, colour: false);
        int[] at = [.. new[] { "power Q3", "power Q2", "power Q1" }.Select(q => text.IndexOf(q, StringComparison.Ordinal))];
        Assert.Equal(at.Order(), at);
        Assert.DoesNotContain(-1, at);
    }

    [Fact]
    public void ABoardThatCouldNotBeReadIsNotVerified()
    {
        BoardReport board = Report("CH1", 1).Boards[0] with { Channels = [], Findings = [], Verdict = default };
        string text = TextReport.Write(new CheckReport([board], [], []), colour: false);
        Assert.StartsWith("CH1: NOT VERIFIED (derating: workshop)\n", text, StringComparison.Ordinal);
        Assert.Contains("Nothing could be judged", text, StringComparison.Ordinal);
    }

    private static string Flat(string text) => string.Join(' ', text.Split((char[])[' ', '\n'], StringSplitOptions.RemoveEmptyEntries));

    // Wide characters take two columns, combining marks none: counted here by the blocks that the names use.
    private static int PrintedColumns(string line) => line.EnumerateRunes().Sum(r => r.Value switch { 0x301 => 0, 0x4E2D or 0x1F600 => 2, _ => 1 });

    private static CheckReport Report(string name, double ratio, double actual = 0.15, double current = 0.02)
    {
        Finding finding = new()
        {
            Channel = name,
            Rule = "power",
            Reference = "Q1",
            PartNumber = name,
            State = ChannelState.On,
            Actual = actual,
            Allowed = 0.1,
            Unit = "W",
            StressRatio = ratio,
            Verdict = Verdict.Nonconforming,
            Source = name,
            Cell = name + "!K3",
        };
        Finding gap = finding with { Rule = "vce", Verdict = Verdict.NotVerified, Actual = null, StressRatio = null, Missing = ["VCEO of " + name] };
        Finding pin = finding with { Rule = "pin-current", Channel = null, Reference = null, Pin = name, Channels = [name], Verdict = Verdict.Conforms };
        ValueRange range = new(current, current);
        return new CheckReport(
            [
                new BoardReport
                {
                    Board = name,
                    Verdict = Verdict.Nonconforming,
                    Derating = "workshop",
                    Channels =
                    [
                        new ChannelJudgement
                        {
                            Channel = name, Verdict = Verdict.Nonconforming, Derating = "ratings", Findings = [], Assumed = [],
                            LoadCurrent = new LoadCurrentRange(current, current, current), TestLimits = new TestLimits(24, range, range, range, range),
                        },
                    ],
                    Findings = [finding, gap, pin],
                    Totals = new BoardTotals(current, current, current, [(name, current)], [(name, name, 300)], [name]),
                    Rules = ["vce", "power", "pin-current"],
                    Assumed = [new AssumedValue("TCR", name, name, [name])],
                    Advice = [new Advice(name, name, name)],
                    Cautions = ["Parts are hot."],
                },
            ],
            [new Complaint(name, name, 7, name, "D7", name, name, name)],
            [new InputFile(name, new string('a', 64))]);
    }
}
