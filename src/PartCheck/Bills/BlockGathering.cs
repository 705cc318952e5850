using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>
/// Puts the lines of a bill together, block by block: each reference once. A block whose references all stand above already is the
/// same list once more (grouped, or one row a part), and is taken once.
/// </summary>
internal sealed class BlockGathering
{
    private readonly List<BillLine> lines = [];
    private readonly Dictionary<string, int> seen = new(StringComparer.OrdinalIgnoreCase);

    /// <summary>The lines so far.</summary>
    internal List<BillLine> Lines => lines;

    /// <summary>Adds a block of rows that stand below one header.</summary>
    internal void Add(IReadOnlyList<(TableRow Row, BillLine Line)> block)
    {
        List<string> all = [.. block.SelectMany(read => read.Line.References)];
        if (lines.Count > 0 && all.Count > 0 && all.TrueForAll(seen.ContainsKey))
        {
            foreach ((TableRow row, BillLine line) in block)
            {
                row.Skip("a second list of the same parts");
                CompareAgain(row, line);
            }

            return;
        }

        foreach ((TableRow row, BillLine line) in block)
        {
            AddLine(row, line);
        }
    }

    private void AddLine(TableRow row, BillLine line)
    {
        foreach (string reference in line.References)
        {
            // A text of several words is no designator: cables and cases may come twice.
            if (!seen.TryAdd(reference, lines.Count) && !reference.Contains(' ', StringComparison.Ordinal))
            {
                int other = seen[reference];
                string cell = other < lines.Count ? lines[other].Cell : line.Cell;
                row.Complain("References", "each reference once", $"{reference} stands on the bill twice; the other place is {cell}.");
                if (other < lines.Count)
                {
                    lines[other] = lines[other] with { HasComplaints = true };
                }
            }
        }

        lines.Add(row.HasComplaints ? line with { HasComplaints = true } : line);
    }

    /// <summary>The second list must say what the first says.</summary>
    private void CompareAgain(TableRow row, BillLine line)
    {
        foreach (int index in line.References.Select(r => seen[r]).Distinct())
        {
            BillLine first = lines[index];
            if (line.PartNumber is { } number && first.PartNumber is { } other && !string.Equals(number, other, StringComparison.OrdinalIgnoreCase))
            {
                row.Complain("Part number", "the same part number in both lists", $"The list above says \"{other}\" for the same references, in {first.Cell}.");
                lines[index] = first with { HasComplaints = true };
            }
        }
    }
}
