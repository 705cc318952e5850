using System.Xml;

namespace PartCheck.Sheets;

/// <summary>An .xlsx workbook to sheets: values as stored, texts as shown, formulas by their stored results.</summary>
/// <remarks>
/// A reader of our own, so that nothing is dropped in silence: workbooks without styles, cells without addresses, pictures, strict
/// OOXML. Merged cells are stored in the first cell; hidden rows, columns and sheets are read like others, and known as hidden.
/// </remarks>
internal static class XlsxFile
{
    private const int MostSheets = 1000;

    /// <summary>Every worksheet in order, empty ones too; an empty list with a fatal complaint where the workbook cannot be read.</summary>
    internal static IReadOnlyList<SheetData> Read(Stream stream, string shownName, ComplaintList complaints)
    {
        try
        {
            using XlsxPackage package = new(stream);
            if (package.TargetOf(string.Empty, "/officeDocument") is not { } book)
            {
                return SheetFile.Refuse(shownName, ComplaintTexts.NotAWorkbook, complaints);
            }

            List<SheetData> sheets = ReadBook(package, book, shownName);
            return sheets.Exists(sheet => sheet.Rows.Count > 0)
                ? sheets
                : SheetFile.Refuse(shownName, ComplaintTexts.NoSheets, complaints);
        }
        catch (Exception e) when (e is InvalidDataException or XmlException or EndOfStreamException or NotSupportedException or ArgumentException)
        {
            string text = e is InvalidDataException { Message: ['i', 't', 's' or ' ', ..] } ? ComplaintTexts.Damaged(e.Message) : ComplaintTexts.NotAWorkbook;
            return SheetFile.Refuse(shownName, text, complaints);
        }
    }

    private static List<SheetData> ReadBook(XlsxPackage package, string book, string shownName)
    {
        List<XlsxPackage.Relation> relations = package.RelationsOf(book);
        string? Target(string typeEnd) =>
            relations.Find(r => r.Type.EndsWith(typeEnd, StringComparison.Ordinal)).Target is { Length: > 0 } target && package.Has(target) ? target : null;

        (List<(string Name, string Id, bool Hidden)> listed, bool from1904) = Listed(package, book);
        XlsxStyles styles = XlsxStyles.Read(package, Target("/styles"), from1904);
        List<string> shared = XlsxStrings.Read(package, Target("/sharedStrings"));
        List<SheetData> sheets = [];
        int cells = 0;
        long characters = 0;
        foreach ((string name, string id, bool hidden) in listed)
        {
            XlsxPackage.Relation relation = relations.Find(r => r.Id == id);
            if (relation.Type is null)
            {
                throw new InvalidDataException($"its sheet {name} has no part.");
            }

            if (relation.Type.EndsWith("/worksheet", StringComparison.Ordinal))
            {
                (List<IReadOnlyList<SheetCell>> rows, SheetLayout layout) = XlsxCells.Read(package, relation.Target, hidden, shared, styles, ref cells, ref characters);
                sheets.Add(new SheetData(shownName, name, DecimalSign.IsComma(rows), rows) { Layout = layout });
            }
        }

        return sheets;
    }

    private static (List<(string Name, string Id, bool Hidden)> Sheets, bool From1904) Listed(XlsxPackage package, string book)
    {
        List<(string, string, bool)> sheets = [];
        bool from1904 = false;
        using XmlReader x = package.Open(book);
        while (x.Read())
        {
            if (x.NodeType != XmlNodeType.Element)
            {
                continue;
            }

            if (x.LocalName == "workbookPr")
            {
                from1904 = x.GetAttribute("date1904") is "1" or "true";
            }
            else if (x.LocalName == "sheet")
            {
                string name = x.GetAttribute("name") ?? string.Empty;
                bool hidden = x.GetAttribute("state") is "hidden" or "veryHidden";
                string id = string.Empty;
                while (x.MoveToNextAttribute())
                {
                    id = x.LocalName == "id" && x.Prefix.Length > 0 ? x.Value : id;
                }

                sheets.Add((name, id, hidden));
                if (sheets.Count > MostSheets)
                {
                    throw new InvalidDataException("it has more than 1000 sheets.");
                }
            }
        }

        return (sheets, from1904);
    }
}
