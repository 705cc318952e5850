using PartCheck.Concessions;
using PartCheck.Tests.Bills;
using Xunit;

namespace PartCheck.Tests.Concessions;

public class ConcessionReaderTests
{
    private const string Header = "Rule|Reference|Part number|Board|Reason|Accepted by|Date|Expires|Effectivity";

    private readonly TypedSheet typed = new();

    [Fact]
    public void ARowIsReadWithItsDaysAndItsCell()
    {
        Concession read = Assert.Single(Read(ofBoard: false, "POWER|Q81-Q83|TQ-31|bench|air is 35 degC|A. Wren|2026-02-01|2026-08-31|lot 7"));
        Assert.Empty(typed.Complaints);
        Assert.Equal(("power", "TQ-31", "bench"), (read.Rule, read.PartNumber, read.Board));
        Assert.Equal(["Q81", "Q82", "Q83"], read.References);
        Assert.Equal(
            ("air is 35 degC", "A. Wren", new DateOnly(2026, 2, 1), new DateOnly(2026, 8, 31), "lot 7", "c.csv!A2"),
            (read.Granted.Reason, read.Granted.AcceptedBy, read.Granted.Date, read.Granted.Expires, read.Granted.Effectivity, read.Granted.Cell));
    }

    [Theory]
    [InlineData(true, "", null)]
    [InlineData(true, "ANY", null)]
    [InlineData(false, "any", null)]
    [InlineData(false, "bench", "bench")]
    public void TheBoardIsNamedOrAny(bool ofBoard, string cell, string? board) =>
        Assert.Equal(board, Assert.Single(Read(ofBoard, $"power|Q1||{cell}|r|a|2026-01-01|2026-01-01|")).Board);

    [Theory]
    [InlineData("heat|Q1||b|r|a|2026-01-01|2026-01-02|", "A2 The rule \"heat\" is not known.")]
    [InlineData("|Q1||b|r|a|2026-01-01|2026-01-02|", "A2 The row names no rule.")]
    [InlineData("power|||b|r|a|2026-01-01|2026-01-02|", "B2 The row says neither for which reference nor for which part number it holds.")]
    [InlineData("power|Q9-Q1||b|r|a|2026-01-01|2026-01-02|", "B2 The range \"Q9-Q1\" runs backwards.")]
    [InlineData("power|Q1|||r|a|2026-01-01|2026-01-02|", "D2 The row does not say for which board it holds.")]
    [InlineData("power|Q1||b||a|2026-01-01|2026-01-02|", "E2 Reason is blank: a concession is accepted in writing, by someone, for a reason.")]
    [InlineData("power|Q1||b|r||2026-01-01|2026-01-02|", "F2 Accepted by is blank: a concession is accepted in writing, by someone, for a reason.")]
    [InlineData("power|Q1||b|r|a|01/02/2026|2026-03-02|", "G2 \"01/02/2026\" is no date of the form YYYY-MM-DD.")]
    [InlineData("power|Q1||b|r|a|2026-02-30|2026-03-02|", "G2 \"2026-02-30\" is no date of the form YYYY-MM-DD.")]
    [InlineData("power|Q1||b|r|a|2026-01-01||", "H2 Expires is blank: a concession holds from a day to a day.")]
    [InlineData("power|Q1||b|r|a|2026-01-02|2026-01-01|", "H2 The concession expires before it begins.")]
    public void WhatCannotBeReadIsAComplaintAndAcceptsNothing(string row, string text)
    {
        Assert.Empty(Read(ofBoard: false, row));
        Assert.Equal(text, typed.Only());
    }

    private IReadOnlyList<Concession> Read(bool ofBoard, string row) =>
        ConcessionReader.Read(TypedSheet.Of("c.csv", Header, row), ofBoard, typed.Spellings, typed.List);
}
