using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>A bill read from a file, with what was understood.</summary>
/// <param name="File">The file as given.</param>
/// <param name="Bill">The bill; null where there is none.</param>
/// <param name="Notes">What must be said about the file: sheets that were not read.</param>
/// <param name="Complaints">Everything that could not be read, and everything that contradicts itself.</param>
public sealed record BillReading(string File, Bill? Bill, IReadOnlyList<string> Notes, IReadOnlyList<Complaint> Complaints);

/// <summary>The bill of a file: which of its sheets it is, and its lines.</summary>
public static class BillFile
{
    private const string TableName = "BOM";

    /// <summary>Reads a bill alone, as <c>partcheck bill</c> does: contradictions of every line are complaints.</summary>
    /// <param name="argument">FILE or FILE:SHEET.</param>
    /// <param name="columns">Further header spellings; null: none.</param>
    /// <param name="encoding">Text encoding; null: found out.</param>
    public static BillReading Read(string argument, string? columns, string? encoding)
    {
        ComplaintList complaints = new();
        ColumnSpellings spellings = ColumnSpellings.Load(columns, complaints);
        BoardSource source = new(encoding, complaints);
        List<string> notes = [];
        SheetData? sheet = SheetOf(source, argument, spellings, notes, complaints);
        Bill? bill = sheet is null ? null : BillReader.Read(sheet, spellings, complaints);
        foreach (Complaint doubt in bill?.Lines.SelectMany(l => l.Doubts) ?? [])
        {
            complaints.Add(doubt);
        }

        return new BillReading(BoardSource.Shown(BoardSource.Split(argument).Path), bill, notes, complaints.Items);
    }

    /// <summary>
    /// The sheet that holds the bill: the one named, the one called BOM, the only one with a bill's header, else the first with one;
    /// then the others are named in a note, and not added.
    /// </summary>
    /// <param name="source">Where files are read.</param>
    /// <param name="argument">FILE or FILE:SHEET.</param>
    /// <param name="spellings">Header spellings.</param>
    /// <param name="notes">Where it is said which sheet was taken and which were not.</param>
    /// <param name="complaints">Where complaints go.</param>
    public static SheetData? SheetOf(
        BoardSource source, string argument, ColumnSpellings spellings, ICollection<string> notes, ComplaintList complaints)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(notes);
        ArgumentNullException.ThrowIfNull(complaints);
        (IReadOnlyList<SheetData> sheets, string shown, string? name) = source.Sheets(argument);
        if (sheets.Count == 0)
        {
            return null;
        }

        if (name is not null || sheets.Any(s => Same(s.Sheet, TableName)))
        {
            return source.File(argument, TableName);
        }

        List<SheetData> filled = [.. sheets.Where(s => s.Rows.Count > 0)];
        List<SheetData> bills = [.. filled.Where(s => HasBill(s, spellings)).OrderBy(s => s.Layout.Hidden)];
        if (bills.Count == 0 && filled.Count > 1)
        {
            complaints.Add(new Complaint(
                shown, null, null, null, null, null, "a sheet with a bill",
                $"None of the sheets {string.Join(", ", filled.Select(s => s.Sheet))} holds a bill: no header row with References stands in rows 1 to 20.")
            { Fatal = true });
            return null;
        }

        SheetData taken = bills.Count > 0 ? bills[0] : filled[0];
        if (bills.Count > 1)
        {
            bool one = bills.Count == 2;
            notes.Add($"The sheet {taken.Sheet} was taken. {(one ? "The sheet" : "The sheets")} {string.Join(", ", bills.Skip(1).Select(s => s.Sheet))} {(one ? "holds a bill" : "hold bills")} too, and {(one ? "was" : "were")} not added: FILE:SHEET chooses.");
        }

        return taken;
    }

    private static bool HasBill(SheetData sheet, ColumnSpellings spellings) =>
        Table.Find(sheet, TableName, BillReader.Columns, spellings, new ComplaintList()) is { Rows.Count: > 0 };

    private static bool Same(string? one, string other) => string.Equals(one?.Trim(), other, StringComparison.OrdinalIgnoreCase);
}
