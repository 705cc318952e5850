using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>One line of a bill of materials.</summary>
public sealed record BillLine
{
    /// <summary>Reference designators in the order of the cell, ranges written out.</summary>
    public required IReadOnlyList<string> References { get; init; }

    /// <summary>The part number; null where the cell is blank.</summary>
    public string? PartNumber { get; init; }

    /// <summary>Quantity for one board; null where the bill has none.</summary>
    public double? Quantity { get; init; }

    /// <summary>The value's text.</summary>
    public string? Value { get; init; }

    /// <summary>The value as a resistance, where it reads as one.</summary>
    public Resistance? Resistance { get; init; }

    /// <summary>The resistance to tell a person of: null where every reference has the letters of another part.</summary>
    public Resistance? ToldResistance => References.Count > 0 && References.All(ReferenceShape.IsOfAnotherPart) ? null : Resistance;

    /// <summary>Package name.</summary>
    public string? Package { get; init; }

    /// <summary>Manufacturer.</summary>
    public string? Manufacturer { get; init; }

    /// <summary>Description.</summary>
    public string? Description { get; init; }

    /// <summary>False where a mark says do not fit.</summary>
    public bool Fitted { get; init; } = true;

    /// <summary>The mark that said so, with its cell.</summary>
    public Cited<string>? FittedMark { get; init; }

    /// <summary>Further part numbers approved for the line.</summary>
    public IReadOnlyList<string> Alternates { get; init; } = [];

    /// <summary>Channel column (instead of the reference columns in Channels).</summary>
    public string? Channel { get; init; }

    /// <summary>Role column.</summary>
    public string? Role { get; init; }

    /// <summary>True where something in the line could not be read or contradicts another line: it is not verified.</summary>
    public bool HasComplaints { get; init; }

    /// <summary>
    /// What contradicts itself in the line, or was lost before the file was saved. It is no matter while the line serves no channel;
    /// a line that does is not verified.
    /// </summary>
    public IReadOnlyList<Complaint> Doubts { get; init; } = [];

    /// <summary>File and cell of the references.</summary>
    public required string Cell { get; init; }

    /// <summary>The sheet of the line; null for CSV.</summary>
    public string? Sheet { get; init; }

    /// <summary>One-based row of the line.</summary>
    public int Row { get; init; }

    /// <summary>True where the line holds a reference, or the package of which the reference is an element.</summary>
    public bool Holds(string reference) => References.Contains(reference, StringComparer.OrdinalIgnoreCase)
        || References.Contains(ElementReference.PackageOf(reference), StringComparer.OrdinalIgnoreCase);
}

/// <summary>A bill of materials.</summary>
/// <param name="Name">File name as given.</param>
/// <param name="Lines">Its lines, in order.</param>
public sealed record Bill(string Name, IReadOnlyList<BillLine> Lines)
{
    /// <summary>The tables that the lines stand in.</summary>
    public IReadOnlyList<BillTable> Tables { get; init; } = [];

    /// <summary>Assemblies that columns such as <c>Populated LITE</c> name, in the order of the columns.</summary>
    public IReadOnlyList<string> Assemblies { get; init; } = [];

    /// <summary>The assembly that was asked for and found, as its header writes it; null: none.</summary>
    public string? Assembly { get; init; }
}
