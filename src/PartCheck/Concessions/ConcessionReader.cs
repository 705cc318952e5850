using System.Globalization;
using PartCheck.Bills;
using PartCheck.Rules;
using PartCheck.Sheets;

namespace PartCheck.Concessions;

/// <summary>Cells to concessions.</summary>
public static class ConcessionReader
{
    /// <summary>The word in Board that stands for every board.</summary>
    public const string AnyBoard = "any";

    /// <summary>How a date is written.</summary>
    public const string DateForm = "yyyy-MM-dd";

    /// <summary>Columns of the table.</summary>
    public static IReadOnlyList<ColumnSpec> Columns { get; } =
    [
        new("Rule", ColumnKind.Text, Required: true),
        new("Reference", ColumnKind.Text),
        new("Part number", ColumnKind.Text),
        new("Board", ColumnKind.Text),
        new("Reason", ColumnKind.Text, Required: true),
        new("Accepted by", ColumnKind.Text, Required: true),
        new("Date", ColumnKind.Text, Required: true),
        new("Expires", ColumnKind.Text, Required: true),
        new("Effectivity", ColumnKind.Text),
    ];

    /// <summary>Every concession of a sheet; a row with a complaint is left out, so that nothing is accepted by it.</summary>
    /// <param name="sheet">The sheet.</param>
    /// <param name="ofBoard">True for a board's own table, where a blank Board means that board; elsewhere Board says which, or <c>any</c>.</param>
    /// <param name="spellings">Header spellings.</param>
    /// <param name="complaints">Where complaints go.</param>
    public static IReadOnlyList<Concession> Read(SheetData sheet, bool ofBoard, ColumnSpellings spellings, ComplaintList complaints)
    {
        Table? table = Table.Find(sheet, "Concessions", Columns, spellings, complaints);
        List<Concession> concessions = [];
        foreach (TableRow row in table?.Rows ?? [])
        {
            if (ReadRow(row, ofBoard) is { } concession)
            {
                concessions.Add(concession);
            }
        }

        return concessions;
    }

    /// <summary>Reads a date; null: it is none.</summary>
    public static DateOnly? DateOf(string text) =>
        DateOnly.TryParseExact(text, DateForm, CultureInfo.InvariantCulture, DateTimeStyles.None, out DateOnly date) ? date : null;

    private static Concession? ReadRow(TableRow row, bool ofBoard)
    {
        string? rule = row.Text("Rule");
        if (rule is null || !RuleBook.Order.Contains(rule, StringComparer.OrdinalIgnoreCase))
        {
            row.Complain("Rule", "one of " + string.Join(", ", RuleBook.Order), rule is null ? "The row names no rule." : $"The rule \"{rule}\" is not known.");
        }

        string? reference = row.Text("Reference");
        string? part = row.Text("Part number");
        IReadOnlyList<string> references = [];
        if (reference is not null && ReferenceList.Read(reference, out references) is { } wrong)
        {
            row.Complain("Reference", "references, or the name of a channel or a pin", wrong);
        }

        if (reference is null && part is null)
        {
            row.Complain("Reference", "a reference or a part number", "The row says neither for which reference nor for which part number it holds.");
        }

        string? board = row.Text("Board");
        if (board is null && !ofBoard)
        {
            row.Complain("Board", "a board's name, or any", "The row does not say for which board it holds.");
        }

        string reason = Needed(row, "Reason", "why it is accepted");
        string acceptedBy = Needed(row, "Accepted by", "a name");
        DateOnly? from = Date(row, "Date");
        DateOnly? until = Date(row, "Expires");
        if (until < from)
        {
            row.Complain("Expires", "a day at or after Date", "The concession expires before it begins.");
        }

        return row.HasComplaints ? null : new Concession
        {
            Rule = rule!.ToLowerInvariant(),
            Reference = reference,
            References = references,
            PartNumber = part,
            Board = string.Equals(board, AnyBoard, StringComparison.OrdinalIgnoreCase) ? null : board,
            Granted = new GrantedConcession(reason, acceptedBy, from!.Value, until!.Value, row.Text("Effectivity"), row.Cite("Rule")),
        };
    }

    private static string Needed(TableRow row, string column, string wanted)
    {
        if (row.Text(column) is { } text)
        {
            return text;
        }

        row.Complain(column, wanted, $"{column} is blank: a concession is accepted in writing, by someone, for a reason.");
        return string.Empty;
    }

    private static DateOnly? Date(TableRow row, string column)
    {
        string? text = row.Text(column);
        if (text is not null && DateOf(text) is { } date)
        {
            return date;
        }

        row.Complain(column, "a date such as 2026-12-31", text is null ? $"{column} is blank: a concession holds from a day to a day." : $"\"{text}\" is no date of the form YYYY-MM-DD.");
        return null;
    }
}
