using PartCheck.Concessions;
using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.Concessions;

public class ConcessionBookTests
{
    private static readonly Concession Hot = new()
    {
        Rule = "power",
        Reference = "Q1",
        References = ["Q1"],
        Granted = new GrantedConcession("air is 35 degC", "A. Wren", new DateOnly(2026, 2, 1), new DateOnly(2026, 8, 31), "lot 7", "c.csv!A2"),
    };

    private static readonly Finding Power = new()
    {
        Channel = "CH1",
        Rule = "power",
        Reference = "Q1",
        PartNumber = "TQ-31",
        StressRatio = 1.2,
        Verdict = Verdict.Nonconforming,
        Source = "s",
    };

    // The first and the last day are in force, the days beside them are not.
    [Theory]
    [InlineData(2026, 1, 31, false, "in force from 2026-02-01 only, not applied.")]
    [InlineData(2026, 2, 1, true, null)]
    [InlineData(2026, 8, 31, true, null)]
    [InlineData(2026, 9, 1, false, "expired on 2026-08-31, not applied.")]
    public void ItHoldsFromItsFirstDayToItsLast(int year, int month, int day, bool inForce, string? remark)
    {
        ConcessionBook book = Book(new DateOnly(year, month, day), Hot);
        Finding finding = book.Apply(Power);
        Assert.Equal(inForce ? (Verdict.Concession, Hot.Granted) : (Verdict.Nonconforming, null), (finding.Verdict, finding.Concession));
        Assert.Equal(remark is null ? [] : ["Concession for power Q1 (c.csv!A2): " + remark], book.Remarks);
    }

    [Fact]
    public void RuleReferenceAndPartNumberMustAgree()
    {
        Concession part = Hot with { Reference = null, References = [], PartNumber = "tq-31" };
        Concession both = Hot with { PartNumber = "TQ-32" };
        Assert.True(Hot.Concerns(Power));
        Assert.True(part.Concerns(Power));
        Assert.False(both.Concerns(Power));
        Assert.False(Hot.Concerns(Power with { Rule = "junction" }));
        Assert.False(Hot.Concerns(Power with { Reference = "Q2" }));
        Assert.False(part.Concerns(Power with { PartNumber = null }));
    }

    [Fact]
    public void ALineNeedsAllItsReferencesAndAChannelOrAPinItsName()
    {
        Finding line = new() { Rule = "bill", References = ["R1", "R2"], Channels = ["CH1"], Source = "s" };
        Assert.False((Hot with { Rule = "bill", Reference = "R1", References = ["R1"] }).Concerns(line));
        Assert.True((Hot with { Rule = "bill", Reference = "R1-R3", References = ["R1", "R2", "R3"] }).Concerns(line));
        Finding channel = new() { Rule = "drive", Channel = "Cold frame", Source = "s" };
        Assert.True((Hot with { Rule = "drive", Reference = "cold frame", References = ["cold", "frame"] }).Concerns(channel));
        Assert.False((Hot with { Rule = "drive", Reference = "Q1", References = ["Q1"] }).Concerns(channel));
        Finding pin = new() { Rule = "pin-current", Pin = "LAMP_A", Channels = ["CH1"], Source = "s" };
        Assert.True((Hot with { Rule = "pin-current", Reference = "LAMP_A", References = ["LAMP_A"] }).Concerns(pin));
    }

    // Another part elsewhere in the channel must not lean on what was accepted for the bill as it stands.
    [Theory]
    [InlineData(1.2, Verdict.Concession, 1.2, true)]
    [InlineData(1.2, Verdict.Concession, 1.19, true)]
    [InlineData(1.2, Verdict.Concession, 1.82, false)]
    [InlineData(0.92, Verdict.Conforms, 1.36, false)]
    [InlineData(1.2, Verdict.Concession, null, false)]
    public void WithOtherPartsItCoversNoMoreThanItDid(double was, Verdict before, double? now, bool covered)
    {
        ConcessionBook book = new([Hot], new DateOnly(2026, 3, 1), new HashSet<string> { "R1" }, new HashSet<string> { "CH1" })
        {
            Before = [Power with { StressRatio = was, Verdict = before }],
        };
        Assert.Equal(covered ? Verdict.Concession : Verdict.Nonconforming, book.Apply(Power with { StressRatio = now }).Verdict);
        Assert.Equal(
            covered ? [] : ["Concession for power Q1 (c.csv!A2): accepted for the board as its bill stands; with the change it is worse: not applied."],
            book.Remarks);
    }

    [Theory]
    [InlineData(Verdict.NotVerified, "what it concerns is not verified, which a concession never covers.")]
    [InlineData(Verdict.Conforms, "not needed, what it concerns conforms.")]
    public void WhatIsNotNonconformingStaysAsItIs(Verdict verdict, string remark)
    {
        ConcessionBook book = Book(new DateOnly(2026, 3, 1), Hot);
        Finding finding = Power with { Verdict = verdict };
        Assert.Same(finding, book.Apply(finding));
        Assert.EndsWith(remark, Assert.Single(book.Remarks), StringComparison.Ordinal);
    }

    [Fact]
    public void OneThatConcernsNothingIsSaid()
    {
        ConcessionBook book = Book(new DateOnly(2026, 3, 1), Hot);
        book.Apply(Power with { Reference = "Q2" });
        Assert.EndsWith("concerns no finding of this board.", Assert.Single(book.Remarks), StringComparison.Ordinal);
    }

    [Fact]
    public void WhatWasAcceptedForThePartOfTheBillHoldsForNoOther()
    {
        DateOnly day = new(2026, 3, 1);
        Finding other = Power with { PartNumber = "OX-9" };
        ConcessionBook byReference = new([Hot], day, new HashSet<string> { "Q1" }, new HashSet<string> { "CH1" });
        Assert.Equal(Verdict.Nonconforming, byReference.Apply(other).Verdict);
        Assert.EndsWith("accepted for the part of the bill, not for the one in its place: not applied.", Assert.Single(byReference.Remarks), StringComparison.Ordinal);
        ConcessionBook byPart = new([Hot with { PartNumber = "OX-9" }], day, new HashSet<string> { "Q1" }, new HashSet<string> { "CH1" });
        Assert.Equal(Verdict.Concession, byPart.Apply(other).Verdict);
        ConcessionBook channel = new([Hot with { Rule = "drive", Reference = "CH1" }], day, new HashSet<string> { "Q1" }, new HashSet<string> { "CH1" });
        Assert.Equal(Verdict.Nonconforming, channel.Apply(Power with { Rule = "drive", Reference = null, PartNumber = null }).Verdict);
    }

    [Fact]
    public void OnlyTheBoardsOwnCount() => Assert.Equal(
        [null, "BENCH"], ConcessionBook.Of([Hot, Hot with { Board = "BENCH" }, Hot with { Board = "porch" }], ["lamps/bench.xlsx", "bench.xlsx", "bench"]).Select(c => c.Board));

    // ISO 9000:2015 sets a concession between what conforms and what does not; what nobody could judge stays above it.
    [Fact]
    public void AConcessionRanksAboveConformsAndBelowNotVerified()
    {
        Assert.Equal(Verdict.Concession, FindingSeverity.WorstOf([Verdict.Conforms, Verdict.Concession]));
        Assert.Equal(Verdict.NotVerified, FindingSeverity.WorstOf([Verdict.Concession, Verdict.NotVerified]));
        Assert.Equal(Verdict.Nonconforming, FindingSeverity.WorstOf([Verdict.NotVerified, Verdict.Nonconforming, Verdict.Concession]));
    }

    private static ConcessionBook Book(DateOnly day, Concession concession) => new([concession], day, new HashSet<string>(), new HashSet<string>());
}
