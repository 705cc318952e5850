using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>What was accepted in writing, for a day that the user names.</summary>
public class ConcessionTests
{
    private const string Header = "Rule,Reference,Part number,Board,Reason,Accepted by,Date,Expires,Effectivity\n";
    private const string Accepted = "power,Q1,,,air is cooler,A. Wren,2026-02-01,2026-08-31,lot 7\n";

    // The pass transistor with a power rating of 60 mW breaks `power` and nothing else.
    private static readonly string Weak = BoardFolder.Parts.Replace("TQ-31,npn,Tarnwood,SOT-23,45,50,200,350,300,", "TQ-31,npn,Tarnwood,SOT-23,45,50,200,90,300,", StringComparison.Ordinal);

    [Fact]
    public async Task ANonconformingFindingThatWasAcceptedIsAConcessionAndExitsZero()
    {
        using BoardFolder board = new(parts: Weak);
        Assert.Equal(1, (await board.Check()).Code);
        board.Write("concessions.csv", Header + Accepted);
        Run run = await board.Check("--date", "2026-03-01");
        Assert.True(run.Code == 0, run.Output + run.Error);
        Assert.EndsWith(": CONCESSION (derating: workshop; concessions as of 2026-03-01)", string.Join(' ', run.Flat.Split(" Concession ")[0]), StringComparison.Ordinal);
        Assert.Contains("Concession CH1 power Q1 TQ-31: ", run.Flat, StringComparison.Ordinal);
        Assert.Contains("accepted by A. Wren, 2026-02-01 to 2026-08-31, for lot 7: air is cooler", run.Flat, StringComparison.Ordinal);
        Assert.Contains("CH1 concession", run.Flat, StringComparison.Ordinal);
        Assert.All(run.Output.Split('\n'), line => Assert.InRange(line.Length, 0, 80));

        using JsonDocument document = JsonDocument.Parse((await board.Check("--date", "2026-03-01", "--format", "json")).Output);
        JsonElement one = document.RootElement.GetProperty("boards")[0];
        Assert.Equal(("concession", "2026-03-01"), (one.GetProperty("verdict").GetString(), one.GetProperty("concessionsAsOf").GetString()));
        JsonElement finding = one.GetProperty("findings")[0];
        Assert.Equal(("power", "concession"), (finding.GetProperty("rule").GetString(), finding.GetProperty("verdict").GetString()));
        JsonElement granted = finding.GetProperty("concession");
        Assert.Equal(
            ["air is cooler", "A. Wren", "2026-02-01", "2026-08-31", "lot 7"],
            new[] { "reason", "acceptedBy", "date", "expires", "effectivity" }.Select(k => granted.GetProperty(k).GetString()));
        Assert.EndsWith("concessions.csv!A2", granted.GetProperty("cell").GetString(), StringComparison.Ordinal);
    }

    [Fact]
    public async Task AWorkingNamesTheConcessionAndWhatCannotBeAskedIsAUsageErrorThereToo()
    {
        using BoardFolder board = new(parts: Weak);
        board.Write("concessions.csv", Header + Accepted);
        Run run = await Run.Of("working", board.Folder, "CH1", "--rule", "power", "--reference", "Q1", "--date", "2026-03-01");
        Assert.True(run.Code == 0, run.Output + run.Error);
        Assert.Contains("CH1 power Q1 TQ-31: CONCESSION; ", run.Flat, StringComparison.Ordinal);
        Assert.Contains("accepted by A. Wren, 2026-02-01 to 2026-08-31, for lot 7: air is cooler", run.Flat, StringComparison.Ordinal);
        run = await Run.Of("working", board.Folder, "CH1", "--date", "2026-03-01", "--with", "Q1=TQ-3");
        Assert.Equal(64, run.Code);
        Assert.Equal("partcheck: \"TQ-3\" is not in the part table; near it: TQ-30, TQ-31.\n", run.Error);
    }

    [Theory]
    [InlineData("2026-09-01", Accepted, "expired on 2026-08-31, not applied.")]
    [InlineData("2026-01-31", Accepted, "in force from 2026-02-01 only, not applied.")]
    [InlineData("2026-03-01", "power,Q2,,,r,A. Wren,2026-02-01,2026-08-31,\n", "not needed, what it concerns conforms.")]
    [InlineData("2026-03-01", "power,Q7,,,r,A. Wren,2026-02-01,2026-08-31,\n", "concerns no finding of this board.")]
    [InlineData("2026-03-01", "power,Q1,,other,r,A. Wren,2026-02-01,2026-08-31,\n", "Concessions for other boards are left alone: other.")]
    public async Task OneThatDoesNotHoldIsAdviceAndCoversNothing(string day, string row, string text)
    {
        using BoardFolder board = new(parts: Weak);
        board.Write("concessions.csv", Header + row);
        Run run = await board.Check("--date", day);
        Assert.Equal(1, run.Code);
        Assert.Contains(text, run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task TheDayIsNeverTheClocks()
    {
        using BoardFolder board = new(parts: Weak);
        board.Write("concessions.csv", Header + Accepted);
        Run own = await board.Check();
        Assert.Equal(64, own.Code);
        Assert.Empty(own.Output);
        Assert.Contains("has concessions: --date YYYY-MM-DD says for which day.", own.Error, StringComparison.Ordinal);
        Assert.Equal(64, (await board.Check("--concessions", board.At("concessions.csv"))).Code);
        Assert.Equal(64, (await board.Check("--date", "1.3.2026")).Code);
        Assert.Equal(64, (await board.Check("--date", "2026-02-30")).Code);
    }

    [Fact]
    public async Task AFileNamesItsBoardAndWinsOverTheBoardsOwn()
    {
        using BoardFolder board = new(parts: Weak);
        board.Write("concessions.csv", Header + Accepted);
        string name = Path.GetFileName(board.Folder);
        board.Write("accepted.csv", Header + Accepted.Replace("Q1,,,", "Q1,,elsewhere,", StringComparison.Ordinal));
        Assert.Equal(1, (await board.Check("--concessions", board.At("accepted.csv"), "--date", "2026-03-01")).Code);
        board.Write("accepted.csv", Header + Accepted.Replace("Q1,,,", $"Q1,,{name},", StringComparison.Ordinal));
        Assert.Equal(0, (await board.Check("--concessions", board.At("accepted.csv"), "--date", "2026-03-01")).Code);
        board.Write("accepted.csv", Header + Accepted);
        Run run = await board.Check("--concessions", board.At("accepted.csv"), "--date", "2026-03-01");
        Assert.Equal(65, run.Code);
        Assert.Contains("The row does not say for which board it holds.", run.Flat, StringComparison.Ordinal);
        Assert.Contains("CH1 nonconforming", run.Flat, StringComparison.Ordinal);
        Assert.Equal(66, (await board.Check("--concessions", board.At("none.csv"), "--date", "2026-03-01")).Code);
    }

    [Fact]
    public async Task WhatIsNotVerifiedIsNeverCovered()
    {
        using BoardFolder board = new(parts: BoardFolder.Parts.Replace(",200,350,300,20,150,1mA:100", ",200,,300,20,150,1mA:100", StringComparison.Ordinal));
        board.Write("concessions.csv", Header + Accepted);
        Run run = await board.Check("--date", "2026-03-01");
        Assert.Equal(2, run.Code);
        Assert.Contains("what it concerns is not verified, which a concession never covers.", run.Flat, StringComparison.Ordinal);
    }

    // Accepted for one alternate, the other one is still judged; accepted for the part of the bill, not for one in its place.
    [Fact]
    public async Task AConcessionForOnePartHidesNoOther()
    {
        string pass = Weak.Split('\n')[1];
        string parts = Weak + "\n" + pass.Replace("TQ-31", "OX-1", StringComparison.Ordinal).Replace(",90,", ",80,", StringComparison.Ordinal)
            + "\n" + pass.Replace("TQ-31", "OX-2", StringComparison.Ordinal).Replace(",90,", ",85,", StringComparison.Ordinal) + "\n";
        string bill = BoardFolder.Bill.Replace("Manufacturer", "Manufacturer,Alternates", StringComparison.Ordinal).Replace("Tarnwood\nQ2", "Tarnwood,OX-1\nQ2", StringComparison.Ordinal);
        using BoardFolder board = new(bill: bill, parts: parts);
        string Row(string part) => $"power,Q1,{part},,r,A. Wren,2026-02-01,2026-08-31,\n";
        board.Write("concessions.csv", Header + Row("OX-1"));
        Run run = await board.Check("--date", "2026-03-01");
        Assert.Equal(1, run.Code);
        Assert.Contains("CH1 power Q1 TQ-31: ", run.Flat, StringComparison.Ordinal);
        board.Write("concessions.csv", Header + Row("OX-1") + Row("TQ-31"));
        Assert.Equal(0, (await board.Check("--date", "2026-03-01")).Code);
        board.Write("concessions.csv", Header + Row(string.Empty));
        Assert.Equal(0, (await board.Check("--date", "2026-03-01")).Code);
        run = await board.Check("--date", "2026-03-01", "--with", "Q1=OX-2");
        Assert.Equal(1, run.Code);
        Assert.StartsWith("No: CH1 power Q1 OX-2: ", run.Flat, StringComparison.Ordinal);
        Assert.Contains("accepted for the part of the bill, not for the one in its place: not applied.", run.Flat, StringComparison.Ordinal);
    }
}
