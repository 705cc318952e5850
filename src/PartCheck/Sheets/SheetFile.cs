namespace PartCheck.Sheets;

/// <summary>Reads spreadsheet files into sheets.</summary>
public static class SheetFile
{
    private const long LargestText = 256L << 20;

    /// <summary>Every sheet of an XLSX workbook in order, or the one sheet of a CSV file. Failures are complaints and an empty list.</summary>
    /// <param name="path">Path to open.</param>
    /// <param name="shownName">The name used in complaints and citations.</param>
    /// <param name="encoding">Name of the text encoding for CSV; null: found out.</param>
    /// <param name="complaints">Where complaints go.</param>
    public static IReadOnlyList<SheetData> Read(string path, string shownName, string? encoding, ComplaintList complaints)
    {
        ArgumentNullException.ThrowIfNull(path);
        ArgumentNullException.ThrowIfNull(shownName);
        ArgumentNullException.ThrowIfNull(complaints);
        if (Directory.Exists(path))
        {
            return Refuse(shownName, ComplaintTexts.Folder, complaints, noInput: true);
        }

        try
        {
            if (!File.Exists(path))
            {
                return Refuse(shownName, ComplaintTexts.Missing, complaints, noInput: true);
            }

            using FileStream stream = new(path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite);
            return Read(stream, path, shownName, encoding, complaints);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            return Refuse(shownName, ComplaintTexts.NotOpened(Reason(e)), complaints, noInput: true);
        }
    }

    /// <summary>A CSV table that travels inside the tool.</summary>
    /// <param name="resource">Its name, such as <c>partdata/logic-pins.csv</c>; also the name it is cited by.</param>
    /// <param name="complaints">Where complaints go.</param>
    /// <returns>The sheet; null where there is none of that name.</returns>
    public static SheetData? Embedded(string resource, ComplaintList complaints)
    {
        using Stream? stream = typeof(SheetFile).Assembly.GetManifestResourceStream(resource);
        if (stream is null)
        {
            return null;
        }

        byte[] bytes = new byte[stream.Length];
        stream.ReadExactly(bytes);
        IReadOnlyList<SheetData> sheets = CsvSheet.Read(bytes, resource, "utf-8", complaints);
        return sheets.Count == 0 ? null : sheets[0];
    }

    private static IReadOnlyList<SheetData> Read(
        FileStream stream, string path, string shownName, string? encoding, ComplaintList complaints)
    {
        byte[] head = new byte[8];
        int count = stream.ReadAtLeast(head, head.Length, throwOnEndOfStream: false);
        stream.Position = 0;
        ReadOnlySpan<byte> magic = head.AsSpan(0, count);
        if (count == 0)
        {
            return Refuse(shownName, ComplaintTexts.Empty, complaints);
        }

        if (magic.StartsWith((ReadOnlySpan<byte>)[0xD0, 0xCF, 0x11, 0xE0]))
        {
            return Refuse(shownName, ComplaintTexts.Protected, complaints, ComplaintTexts.WantedUnprotected);
        }

        if (magic.StartsWith("PK"u8))
        {
            return XlsxFile.Read(stream, shownName, complaints);
        }

        if (Path.GetExtension(path).ToUpperInvariant() is ".XLSX" or ".XLSM" or ".XLS" or ".ODS")
        {
            return Refuse(shownName, ComplaintTexts.NotAWorkbook, complaints);
        }

        if (stream.Length > LargestText)
        {
            return Refuse(shownName, ComplaintTexts.TooLarge("a text may have 256 MiB"), complaints);
        }

        byte[] bytes = new byte[stream.Length];
        stream.ReadExactly(bytes);
        return CsvSheet.Read(bytes, shownName, encoding, complaints);
    }

    /// <summary>One fatal complaint about the whole file, and no sheet.</summary>
    internal static IReadOnlyList<SheetData> Refuse(
        string shownName, string text, ComplaintList complaints, string wanted = ComplaintTexts.WantedWorkbookOrCsv, bool noInput = false)
    {
        complaints.Add(new Complaint(shownName, null, null, null, null, null, wanted, text) { Fatal = true, NoInput = noInput });
        return [];
    }

    /// <summary>A reason in words that name no path of the machine.</summary>
    private static string Reason(Exception e) => e switch
    {
        UnauthorizedAccessException => "access is denied.",
        IOException => "reading failed.",
        _ => "the name is not one of a file.",
    };
}
