using System.Text.Json;
using Xunit;

namespace PartCheck.Cli.Tests;

public class BillCommandTests
{
    [Fact]
    public async Task ABillIsShownInEightyColumns()
    {
        using BoardFolder board = new();
        board.Write("bill.csv", "Greenhouse lamp\nRef.,Qty,MPN,Value,Footprint\n\"R1, R2, R3, R7\",4,RK-4K7,4k7,0603\nTotal,4\n");
        Run run = await Run.Of("bill", board.At("bill.csv"));
        Assert.Equal(0, run.Code);
        Assert.Equal(
            """
            bill.csv: 1 line, 4 references

            Header in row 2; ASCII; comma between the fields; decimal point
              References    A "Ref."
              Quantity      B "Qty"
              Part number   C "MPN"
              Value         D "Value"
              Package       E "Footprint"
              Left out
                row 1: title above the header, "Greenhouse lamp"
                row 4: totals, "Total"

            Lines
              3       R1..R3 R7; 4 pcs; RK-4K7; "4k7" = 4.7 kohm (0603)


            """.ReplaceLineEndings("\n"), run.Output);
        Assert.All(run.Output.Split('\n'), line => Assert.True(line.Length <= 80, line));
    }

    // M7 is a diode's type, though RKM code would read it as 700 kohm; 4040 is a counter.
    [Fact]
    public async Task OtherPartsHaveNoResistanceAndALineWithoutReferenceSaysSo()
    {
        using BoardFolder board = new();
        string many = string.Join(' ', Enumerable.Range(1, 40).Select(i => $"R{2 * i}"));
        board.Write("bill.csv", $"Ref;Qty;Value\nD1;1;M7\nIC1;1;4040\n,,,;3;1k\n{many};40;1k\n");
        Run run = await Run.Of("bill", board.At("bill.csv"));
        Assert.Contains("D1; 1 pcs; no part number; \"M7\"\n", run.Output, StringComparison.Ordinal);
        Assert.Contains("IC1; 1 pcs; no part number; \"4040\"\n", run.Output, StringComparison.Ordinal);
        Assert.Contains("no reference; 3 pcs;", run.Output, StringComparison.Ordinal);
        Assert.Contains("R28 R30 R32 ...; 40 pcs;", run.Flat, StringComparison.Ordinal);
        Run json = await Run.Of("bill", board.At("bill.csv"), "--format", "json");
        using JsonDocument read = JsonDocument.Parse(json.Output);
        Assert.Equal(JsonValueKind.Null, read.RootElement.GetProperty("lines")[0].GetProperty("resistance").ValueKind);
    }

    // A text in a far column of every row is left out row by row: 500 are shown, JSON has them all.
    [Fact]
    public async Task MoreThanFiveHundredRowsLeftOutAreCounted()
    {
        using BoardFolder board = new();
        board.Write("bill.csv", "Ref,Qty,Value\nR1,1,1k\n" + string.Concat(Enumerable.Range(0, 600).Select(i => $"\n,,,x{i}\n")));
        Run run = await Run.Of("bill", board.At("bill.csv"));
        Assert.Contains("    ... and 100 more; --format json lists them all\n", run.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task ComplaintsEndWith65AndTheRestIsShown()
    {
        using BoardFolder board = new();
        board.Write("bill.csv", "Ref,Qty,MPN\nR1,2,RK-33\nR2,1,RK-33\n");
        Run run = await Run.Of("bill", board.At("bill.csv"));
        Assert.Equal(65, run.Code);
        Assert.Contains("bill.csv!B2 [Qty]: The quantity is 2, the references are 1.", run.Flat, StringComparison.Ordinal);
        Assert.Contains("R2; 1 pcs; RK-33", run.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task JsonHoldsWhatTheContractNames()
    {
        using BoardFolder board = new();
        board.Write("bill.csv", "Title\nRef. des.;Wert\nR1;4k7\nR2;DNP\n");
        Run run = await Run.Of("bill", board.At("bill.csv"), "--format", "json");
        using JsonDocument json = JsonDocument.Parse(run.Output);
        JsonElement root = json.RootElement;
        Assert.Equal("bill.csv", root.GetProperty("file").GetString());
        JsonElement table = root.GetProperty("tables")[0];
        Assert.Equal((2, "Ref. des."), (table.GetProperty("headerRow").GetInt32(), table.GetProperty("columns").GetProperty("References").GetString()));
        JsonElement line = root.GetProperty("lines")[0];
        Assert.Equal(("R1", 4700.0, true), (line.GetProperty("references")[0].GetString(), line.GetProperty("resistance").GetDouble(), line.GetProperty("fitted").GetBoolean()));
        Assert.Equal(JsonValueKind.Null, line.GetProperty("partNumber").ValueKind);
        Assert.False(root.GetProperty("lines")[1].GetProperty("fitted").GetBoolean());
    }

    [Fact]
    public async Task AMissingFileIs66AndAnInputIsNeverReplaced()
    {
        using BoardFolder board = new();
        Assert.Equal(66, (await Run.Of("bill", board.At("nowhere.csv"))).Code);
        Assert.Equal(73, (await Run.Of("bill", board.At("bom.csv"), "--out", board.At("bom.csv"), "--replace")).Code);
        Assert.Equal(64, (await Run.Of("bill")).Code);
    }

    [Fact]
    public async Task AContradictionIsAComplaintOfTheChannelThatTheLineServes()
    {
        using BoardFolder board = new(BoardFolder.Bill.Replace("R2,RK-4K7,1,4k7", "R2,RK-4K7,1,4k7?", StringComparison.Ordinal).Replace("J1,CON-2,1,", "J1,CON-2,1,10k?", StringComparison.Ordinal));
        Run run = await board.Check();
        Assert.Equal(65, run.Code);
        Assert.Contains("The sign after \"4k7\" was lost before the file was saved", run.Flat, StringComparison.Ordinal);
        Assert.DoesNotContain("\"10k\" was lost", run.Flat, StringComparison.Ordinal);
        Assert.Contains("NOT VERIFIED", run.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task ANearMissIsSuggestedAndNotTaken()
    {
        using BoardFolder board = new(BoardFolder.Bill.Replace("Q1,TQ-31", "Q1,ZEBRA-900", StringComparison.Ordinal));
        Run none = await board.Check();
        Assert.DoesNotContain("meant?", none.Flat, StringComparison.Ordinal);

        using BoardFolder typed = new(BoardFolder.Bill.Replace("Q1,TQ-31", "Q1,TBQ-31", StringComparison.Ordinal));
        Run run = await typed.Check();
        Assert.Equal(2, run.Code);
        Assert.Contains("The part table has no row TBQ-31; is TQ-31 or TQ-30 meant?", run.Flat, StringComparison.Ordinal);
    }

    [Fact]
    public async Task TheTemplateConformsAndIsNotReplacedUnasked()
    {
        using BoardFolder board = new();
        string path = board.At("start.xlsx");
        Assert.Equal(0, (await Run.Of("template", path)).Code);
        Assert.Equal(73, (await Run.Of("template", path)).Code);
        Assert.Equal(0, (await Run.Of("template", path, "--replace")).Code);
        Assert.Equal(64, (await Run.Of("template", board.At("start.csv"))).Code);
        Run check = await Run.Of("check", path);
        Assert.True(check.Code == 0, check.Output);
        Assert.Contains("CONFORMS (derating: own)", check.Output, StringComparison.Ordinal);
        Assert.Equal(0, (await Run.Of("bill", path)).Code);
    }
}
