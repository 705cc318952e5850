using System.Collections.Concurrent;
using CsCheck;
using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Workings;
using Xunit;

namespace PartCheck.Tests.Workings;

/// <summary>Random channels in random corners, on, unfed and off: no working fails to reproduce, and each can be followed with a calculator.</summary>
public class RandomWorkingTests
{
    [Fact]
    public void WhateverARuleSaysItsPrintedFiguresComeToThePrintedFigures()
    {
        ConcurrentDictionary<string, int> rules = new(StringComparer.Ordinal);
        int balances = 0;
        Gen.Int[0, int.MaxValue - 1].Sample(
            seed =>
            {
                IReadOnlyList<Working> workings = [.. new RandomCorners(seed).Findings(8).Select(FindingWorking.Of)];
                foreach (Working working in workings.Where(w => w.Lines.Count > 0))
                {
                    rules.AddOrUpdate(working.Finding.Rule, 1, (_, n) => n + 1);
                }

                PrintedWorking followed = PrintedWorking.Follow(WorkingText.Write(new WorkingReport(Empty, "CH1", workings)));
                Interlocked.Add(ref balances, followed.Balances);
                Assert.InRange(followed.Steps, 1, int.MaxValue);
            },
            iter: 40);

        // Nothing is proved by corners that no rule reads: each rule that reads states was there, off through its leakage too.
        Assert.Equal(
            RuleBook.Judged.Except(["pin-current", "bill"]).Order(StringComparer.Ordinal), rules.Keys.Order(StringComparer.Ordinal));
        Assert.InRange(balances, 1000, int.MaxValue);
    }

    private static CheckReport Empty { get; } = new(
        [new BoardReport { Board = "random", Derating = "workshop", Channels = [], Findings = [], Rules = [], Assumed = [], Advice = [], Cautions = [] }], [], []);
}
