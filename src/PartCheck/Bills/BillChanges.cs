using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>One change of a bill line, or of some of its references.</summary>
/// <param name="Line">The line as it stands.</param>
/// <param name="References">References that get the other part.</param>
/// <param name="PartNumber">Part number of the other part.</param>
/// <param name="Manufacturer">Its manufacturer; null: any.</param>
public sealed record LineChange(BillLine Line, IReadOnlyList<string> References, string PartNumber, string? Manufacturer);

/// <summary>
/// Puts other parts on a bill. Lines that nothing changes stay the same objects. A changed line keeps its package, which is the
/// board's footprint, and loses manufacturer, value and alternates, which are the replaced part's. Where only some references of
/// a line change, the line is split: the others stay as they are, their alternates included.
/// </summary>
public static class BillChanges
{
    /// <summary>Which references of which lines a name means.</summary>
    /// <param name="bill">The bill.</param>
    /// <param name="name">A reference, a package of several elements (<c>Q1</c> for <c>Q1.1, Q1.2</c>), a range, or a part number.</param>
    /// <param name="found">Lines with the references meant; empty where something is wrong.</param>
    /// <returns>What is wrong; null: nothing.</returns>
    public static string? Find(Bill bill, string name, out IReadOnlyList<(BillLine Line, IReadOnlyList<string> References)> found)
    {
        ArgumentNullException.ThrowIfNull(bill);
        ArgumentNullException.ThrowIfNull(name);
        found = [];
        List<(BillLine, IReadOnlyList<string>)> byNumber = [.. bill.Lines
            .Where(l => Same(l.PartNumber, name)).Select(l => (l, l.References))];
        List<(BillLine, IReadOnlyList<string>)> byReference = References(bill, [name]);
        if (byNumber.Count > 0 && byReference.Count > 0)
        {
            return $"\"{name}\" is a reference and a part number of the bill: write the references.";
        }

        if (byNumber.Count == 0 && byReference.Count == 0 && ReferenceList.Read(name, out IReadOnlyList<string> range) is null && range.Count > 1)
        {
            byReference = References(bill, range);
            List<string> absent = [.. range.Where(r => !byReference.Exists(f => f.Item2.Any(has => Meant(has, r))))];
            if (byReference.Count > 0 && absent.Count > 0)
            {
                return $"{string.Join(", ", absent)} of \"{name}\" {(absent.Count == 1 ? "is" : "are")} not on the bill.";
            }
        }

        // The bill has the package, the name one of its elements.
        if (byNumber.Count == 0 && byReference.Count == 0 && ElementReference.PackageOf(name) is var whole && whole != name && References(bill, [whole]).Count > 0)
        {
            return $"\"{name}\" is one element of {whole}: a package is replaced as a whole.";
        }

        found = byNumber.Count > 0 ? byNumber : byReference;
        if (found.Count == 0)
        {
            IEnumerable<string> known = bill.Lines.SelectMany(l => l.References).Concat(bill.Lines.Select(l => l.PartNumber).OfType<string>());
            return $"\"{name}\" is neither a reference nor a part number of the bill{NearMisses.Phrase(name, known)}.";
        }

        foreach ((BillLine line, IReadOnlyList<string> references) in found)
        {
            // Elements of one package are one component: no part of it can be replaced alone.
            if (references.Select(ElementReference.PackageOf).FirstOrDefault(p => line.References.Any(r => Same(ElementReference.PackageOf(r), p) && !references.Contains(r))) is { } split)
            {
                found = [];
                return $"\"{name}\" is one element of {split}: a package is replaced as a whole.";
            }
        }

        return null;
    }

    /// <summary>The bill with changes made.</summary>
    /// <param name="bill">The bill; it is left as it is.</param>
    /// <param name="changes">Changes; no reference stands in two of them.</param>
    public static Bill Apply(Bill bill, IReadOnlyList<LineChange> changes)
    {
        ArgumentNullException.ThrowIfNull(bill);
        ArgumentNullException.ThrowIfNull(changes);
        List<BillLine> lines = [];
        foreach (BillLine line in bill.Lines)
        {
            List<LineChange> mine = [.. changes.Where(c => ReferenceEquals(c.Line, line))];
            HashSet<string> moved = [.. mine.SelectMany(c => c.References)];
            List<string> kept = [.. line.References.Where(r => !moved.Contains(r))];
            if (mine.Count == 0)
            {
                lines.Add(line);
                continue;
            }

            // What the quantity was wrong by stays where it was: with the rest of the line, else with its first new part.
            double? excess = line.Quantity - ReferenceList.Components(line.References);
            if (kept.Count > 0)
            {
                lines.Add(line with { References = kept, Quantity = ReferenceList.Components(kept) + excess });
                excess = excess is null ? null : 0;
            }

            foreach (LineChange change in mine)
            {
                lines.Add(line with
                {
                    References = change.References,
                    PartNumber = change.PartNumber,
                    Manufacturer = change.Manufacturer,
                    Quantity = ReferenceList.Components(change.References) + excess,
                    Value = null,
                    Resistance = null,
                    Description = null,
                    Alternates = [],
                });
                excess = excess is null ? null : 0;
            }
        }

        return bill with { Lines = lines };
    }

    private static List<(BillLine, IReadOnlyList<string>)> References(Bill bill, IReadOnlyList<string> names) =>
        [.. bill.Lines
            .Select(l => (Line: l, References: (IReadOnlyList<string>)[.. l.References.Where(r => names.Any(n => Meant(r, n)))]))
            .Where(f => f.References.Count > 0)];

    private static bool Meant(string reference, string name) => Same(reference, name) || Same(ElementReference.PackageOf(reference), name);

    private static bool Same(string? a, string? b) => string.Equals(a, b, StringComparison.OrdinalIgnoreCase);
}
