using PartCheck.Bills;
using PartCheck.Quantities;
using Xunit;

namespace PartCheck.Tests.Bills;

public class BillChangesTests
{
    private static readonly Bill Board = new("bom.csv",
    [
        new BillLine
        {
            References = ["Q1", "Q3", "Q5"], PartNumber = "TQ-31", Manufacturer = "Tarnwood", Quantity = 3, Package = "SOT-23", Alternates = ["TQ-35"], Cell = "bom.csv!A2",
        },
        new BillLine { References = ["R1"], PartNumber = "RK-33", Quantity = 2, Value = "33", Resistance = Resistance.FromOhms(33), Cell = "bom.csv!A3" },
        new BillLine { References = ["Q7.1", "Q7.2"], PartNumber = "TD-2", Quantity = 1, Cell = "bom.csv!A4" },
    ]);

    [Theory]
    [InlineData("TQ-31", "Q1 Q3 Q5")]
    [InlineData("tq-31", "Q1 Q3 Q5")]
    [InlineData("q3", "Q3")]
    [InlineData("Q7", "Q7.1 Q7.2")]
    [InlineData("Q1, Q5", "Q1 Q5")]
    [InlineData("Q1-Q9", null)]
    public void AReferenceAPartNumberOrARangeIsFound(string name, string? references)
    {
        string? wrong = BillChanges.Find(Board, name, out IReadOnlyList<(BillLine Line, IReadOnlyList<string> References)> found);
        Assert.Equal(references, wrong is null ? string.Join(' ', found.SelectMany(f => f.References)) : null);
    }

    [Theory]
    [InlineData("Q4", "\"Q4\" is neither a reference nor a part number of the bill; near it: Q1, Q3, Q5.")]
    [InlineData("RK-3", "\"RK-3\" is neither a reference nor a part number of the bill; near it: RK-33.")]
    [InlineData("Q5-Q6", "Q6 of \"Q5-Q6\" is not on the bill.")]
    [InlineData("Q7.2", "\"Q7.2\" is one element of Q7: a package is replaced as a whole.")]
    public void WhatIsNotThereIsSaid(string name, string text)
    {
        Assert.Equal(text, BillChanges.Find(Board, name, out IReadOnlyList<(BillLine, IReadOnlyList<string>)> found));
        Assert.Empty(found);
    }

    [Fact]
    public void AWholeLineLosesWhatWasTheReplacedParts()
    {
        Bill changed = Changed("TQ-31", "OX-9");
        BillLine line = changed.Lines[0];
        Assert.Equal(("OX-9", null, 3.0, "SOT-23"), (line.PartNumber, line.Manufacturer, line.Quantity, line.Package));
        Assert.Empty(line.Alternates);
        Assert.Same(Board.Lines[1], changed.Lines[1]);
        Assert.Equal(3, changed.Lines.Count);
    }

    [Fact]
    public void OneReferenceSplitsItsLineAndTheRestStaysAsItWas()
    {
        Bill changed = Changed("Q3", "OX-9");
        Assert.Equal(["Q1", "Q5"], changed.Lines[0].References);
        Assert.Equal(("TQ-31", "Tarnwood", 2.0), (changed.Lines[0].PartNumber, changed.Lines[0].Manufacturer, changed.Lines[0].Quantity));
        Assert.Equal(["TQ-35"], changed.Lines[0].Alternates);
        Assert.Equal(["Q3"], changed.Lines[1].References);
        Assert.Equal(("OX-9", 1.0), (changed.Lines[1].PartNumber, changed.Lines[1].Quantity));
    }

    // Two R1 were wrong before; a change must not put that right silently.
    [Fact]
    public void AQuantityThatWasWrongStaysWrong()
    {
        BillLine line = Changed("R1", "RK-30").Lines[1];
        Assert.Equal(2, line.Quantity);
        Assert.Null(line.Resistance);
    }

    [Fact]
    public void ADoublePackageCountsOnce() => Assert.Equal(1, Changed("Q7", "TD-3").Lines[2].Quantity);

    [Theory]
    [InlineData("Q1=A", "Q1>A")]
    [InlineData(" Q1 = A , Q2=B", "Q1>A Q2>B")]
    [InlineData("Q1=A,215,Q2=B", "Q1>A,215 Q2>B")]
    [InlineData("Q1=A=B", "Q1>A=B")]
    [InlineData("A,215=B", "A,215>B")]
    [InlineData("Q1=A,", "Q1>A")]
    public void LinesAndPartNumbersAreReadCommasInThemIncluded(string text, string read)
    {
        Assert.Null(AskedChange.Read([text], out IReadOnlyList<AskedChange> changes));
        Assert.Equal(read, string.Join(' ', changes.Select(c => c.Line + ">" + c.PartNumber)));
    }

    [Theory]
    [InlineData("Q1")]
    [InlineData("Q1=")]
    [InlineData("=A")]
    [InlineData("Q1=A,Q2=")]
    public void WhatIsNoChangeIsRefused(string text) =>
        Assert.Contains("is no change: LINE=PN is wanted", AskedChange.Read([text], out _), StringComparison.Ordinal);

    private static Bill Changed(string name, string part)
    {
        Assert.Null(BillChanges.Find(Board, name, out IReadOnlyList<(BillLine Line, IReadOnlyList<string> References)> found));
        return BillChanges.Apply(Board, [.. found.Select(f => new LineChange(f.Line, f.References, part, null))]);
    }
}
