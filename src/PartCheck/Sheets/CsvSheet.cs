using CsvHelper;

namespace PartCheck.Sheets;

/// <summary>Separated text to one sheet. Rows are counted as a spreadsheet counts them: one a record, empty lines included.</summary>
internal static class CsvSheet
{
    private const int LongestRecord = 1 << 20;
    private const int MostCells = 8_000_000;

    /// <summary>The one sheet; an empty list with a fatal complaint where the text cannot be read.</summary>
    internal static IReadOnlyList<SheetData> Read(byte[] bytes, string shownName, string? encoding, ComplaintList complaints)
    {
        if (TextDecoding.Decode(bytes, shownName, encoding, complaints) is not { } text)
        {
            return [];
        }

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
                    return SheetFile.Refuse(shownName, ComplaintTexts.TooLarge("8 million cells are the most"), complaints);
                }

                if (found.Count > 0)
                {
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

        bool decimalComma = separator != ',' && DecimalSign.IsComma(rows);
        return [new SheetData(shownName, null, decimalComma, rows)];

        void Complain(int at, string sentence, bool fatal) =>
            complaints.Add(new Complaint(shownName, null, at, null, CellAddress.Of(at, 1), null, "quotes in pairs", sentence) { Fatal = fatal });
    }

    private static List<SheetCell> Cells(CsvRow record, int row)
    {
        List<SheetCell> cells = [];
        for (int i = 0; i < record.FieldCount; i++)
        {
            string text = record.GetString(i).Trim();
            if (text.Length > 0)
            {
                cells.Add(new SheetCell(row, i + 1, text, null, false));
            }
        }

        return cells;
    }
}
