using System.Reflection;

namespace PartCheck.Sheets;

/// <summary>Header spellings of every table's columns: the project's own (<c>partdata/columns.csv</c>) and the user's.</summary>
public sealed class ColumnSpellings
{
    private const string OwnFile = "partdata/columns.csv";

    private static readonly string[] Tables = ["BOM", "Channels", "Parts", "Pins", "Derating", "Concessions"];

    private readonly Dictionary<(string Table, string Spelling), string> columns = [];

    private readonly Dictionary<(string Table, string Spelling), List<string>> doubtful = [];

    private ColumnSpellings()
    {
    }

    /// <summary>Loads the embedded spellings and, where given, the user's file (same columns: Table, Column, Spelling; Doubtful where the cells below must prove it).</summary>
    /// <param name="userFile">The user's file; its spellings win over the project's own. Null: none.</param>
    /// <param name="complaints">Where complaints about the user's file go.</param>
    public static ColumnSpellings Load(string? userFile, ComplaintList complaints)
    {
        ArgumentNullException.ThrowIfNull(complaints);
        ColumnSpellings spellings = new();
        using (Stream stream = Assembly.GetExecutingAssembly().GetManifestResourceStream(OwnFile)
            ?? throw new InvalidOperationException($"The library lacks its resource {OwnFile}."))
        {
            using MemoryStream bytes = new();
            stream.CopyTo(bytes);
            spellings.AddAll([.. CsvSheet.Read(bytes.ToArray(), OwnFile, "utf-8", complaints)], complaints);
        }

        if (userFile is not null)
        {
            spellings.AddAll(SheetFile.Read(userFile, userFile, null, complaints), complaints);
        }

        return spellings;
    }

    /// <summary>The column that a header stands for; null where the spelling is not known.</summary>
    internal string? ColumnOf(string table, string matchedHeader) =>
        columns.TryGetValue((table.ToUpperInvariant(), matchedHeader), out string? column) ? column : null;

    /// <summary>The columns that a doubtful header may stand for; null: none.</summary>
    internal IReadOnlyList<string>? DoubtfulOf(string table, string matchedHeader) =>
        doubtful.GetValueOrDefault((table.ToUpperInvariant(), matchedHeader));

    /// <summary>Every spelling with its table and column, as matched.</summary>
    internal IEnumerable<(string Table, string Column, string Spelling)> All =>
        columns.Select(entry => (entry.Key.Table, entry.Value, entry.Key.Spelling));

    private void AddAll(IReadOnlyList<SheetData> sheets, ComplaintList complaints)
    {
        Dictionary<(string, string), string> added = [];
        foreach (SheetData sheet in sheets)
        {
            foreach (IReadOnlyList<SheetCell> row in sheet.Rows)
            {
                string TextAt(int column) => row.FirstOrDefault(cell => cell.Column == column)?.Text ?? string.Empty;
                (string table, string column, string spelling) = (TextAt(1), TextAt(2), TextAt(3));
                bool header = table.Equals("Table", StringComparison.OrdinalIgnoreCase)
                    && column.Equals("Column", StringComparison.OrdinalIgnoreCase);
                if (header)
                {
                    continue;
                }

                if (Trouble(table, column, spelling, added) is { } text)
                {
                    SheetCell cell = row[0];
                    complaints.Add(new Complaint(
                        sheet.File, sheet.Sheet, cell.Row, null, cell.Address, string.Join(", ", row.Select(c => c.Text)),
                        "a table, one of its columns and a spelling", text));
                    continue;
                }

                (string, string) key = (table.ToUpperInvariant(), HeaderText.Matched(spelling));
                if (TextAt(4).Equals("doubtful", StringComparison.OrdinalIgnoreCase))
                {
                    doubtful.TryAdd(key, []);
                    doubtful[key].Add(column);
                    continue;
                }

                added[key] = column;
            }
        }

        foreach (((string, string) key, string column) in added)
        {
            columns[key] = column;
        }
    }

    private static string? Trouble(string table, string column, string spelling, Dictionary<(string, string), string> added)
    {
        if (table.Length == 0 || column.Length == 0 || HeaderText.Matched(spelling).Length == 0)
        {
            return ComplaintTexts.SpellingIncomplete;
        }

        if (!Tables.Contains(table, StringComparer.OrdinalIgnoreCase))
        {
            return ComplaintTexts.NoSuchTable(table);
        }

        bool twice = added.TryGetValue((table.ToUpperInvariant(), HeaderText.Matched(spelling)), out string? first)
            && !string.Equals(first, column, StringComparison.OrdinalIgnoreCase);
        return twice ? ComplaintTexts.SpellingTwice(spelling, first!) : null;
    }
}
