using System.Text.RegularExpressions;
using CsvHelper;

namespace PartCheck.Sheets;

/// <summary>Separated text to one sheet. Rows are counted as a spreadsheet counts them: one a record, empty lines included.</summary>
internal static partial class CsvSheet
{
    private const int LongestRecord = 1 << 20;
    private const int MostCells = 2_000_000;

    /// <summary>The one sheet; an empty list with a fatal complaint where the text cannot be read.</summary>
    internal static IReadOnlyList<SheetData> Read(byte[] bytes, string shownName, string? encoding, ComplaintList complaints)
    {
        if (TextDecoding.Decode(bytes, shownName, encoding, complaints) is not { } decoded)
        {
            return [];
        }

        string text = WithoutShifts(decoded.Text);

        if (string.IsNullOrWhiteSpace(text))
        {
            return SheetFile.Refuse(shownName, ComplaintTexts.Empty, complaints);
        }

        if (text.Contains('\0', StringComparison.Ordinal))
        {
            return SheetFile.Refuse(shownName, ComplaintTexts.BinaryText, complaints);
        }

        char separator = Separator.Of(text, out string body);
        List<IReadOnlyList<SheetCell>> rows = [];
        Dictionary<int, int> fields = [];
        List<(CsvMalformedReason Reason, int Row)> malformed = [];
        int row = 0;
        int cells = 0;
        CsvReaderOptions options = CsvReaderOptions.Default with
        {
            HasHeader = false,
            Separator = separator,
            SkipEmptyLines = false,
            MaxRecordSize = LongestRecord,
            OnMalformedRecord = record => malformed.Add((record.Reason, row + 1)),
        };
        try
        {
            using CsvReader reader = CsvReader.FromText(body, options);
            while (reader.Read())
            {
                row++;
                List<SheetCell> found = Cells(reader.Current, row);
                cells += found.Count;
                if (cells > MostCells)
                {
                    return SheetFile.Refuse(shownName, ComplaintTexts.TooLarge("2 million cells are the most"), complaints);
                }

                if (found.Count > 0)
                {
                    fields[row] = reader.Current.FieldCount;
                    rows.Add(found);
                }
            }
        }
        catch (CsvFormatException)
        {
            return SheetFile.Refuse(shownName, ComplaintTexts.RecordTooLong, complaints);
        }

        if (malformed.Exists(m => m.Reason == CsvMalformedReason.UnterminatedQuote))
        {
            Complain(malformed.Find(m => m.Reason == CsvMalformedReason.UnterminatedQuote).Row, ComplaintTexts.QuoteNotClosed, fatal: true);
            return [];
        }

        foreach ((_, int at) in malformed.Where(m => m.Reason == CsvMalformedReason.TextAfterClosingQuote))
        {
            Complain(at, ComplaintTexts.TextAfterQuote, fatal: false);
        }

        if (decoded.MixedLines.Count > 0)
        {
            complaints.Add(new Complaint(
                shownName, null, null, null, null, null, "one encoding", ComplaintTexts.Mixed(decoded.MixedLines)));
        }

        bool decimalComma = separator != ',' && DecimalSign.IsComma(rows);
        return [new SheetData(shownName, null, decimalComma, rows) { Encoding = decoded.Encoding, Separator = Separator.NameOf(separator), Fields = fields }];

        void Complain(int at, string sentence, bool fatal) =>
            complaints.Add(new Complaint(shownName, null, at, null, CellAddress.Of(at, 1), null, "quotes in pairs", sentence) { Fatal = fatal });
    }

    /// <summary>The text without the escape sequences by which ISO 2022 texts change their character set (ISO/IEC 2022, 6).</summary>
    private static string WithoutShifts(string text) =>
        text.Contains('\u001B', StringComparison.Ordinal) ? Shift().Replace(text, string.Empty) : text;

    private static List<SheetCell> Cells(CsvRow record, int row)
    {
        List<SheetCell> cells = [];
        for (int i = 0; i < record.FieldCount; i++)
        {
            if (SheetCell.OfText(row, i + 1, record.GetString(i)) is { } cell)
            {
                cells.Add(cell);
            }
        }

        return cells;
    }

    [GeneratedRegex(@"\x1B[\x20-\x2F]{1,3}[\x30-\x7E]", RegexOptions.CultureInvariant)]
    private static partial Regex Shift();
}
