using System.Xml;

namespace PartCheck.Sheets;

/// <summary>An .xlsx workbook to sheets: values as stored, texts as shown, formulas by their stored results.</summary>
/// <remarks>
/// A reader of our own, so that nothing is dropped in silence: workbooks without styles, cells without addresses, pictures, strict
/// OOXML. Merged cells are read as they are stored (the first cell holds the text); hidden rows and sheets are read like others.
/// </remarks>
internal static class XlsxFile
{
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

        (List<(string Name, string Id)> listed, bool from1904) = Listed(package, book);
        XlsxStyles styles = XlsxStyles.Read(package, Target("/styles"), from1904);
        List<string> shared = XlsxStrings.Read(package, Target("/sharedStrings"));
        List<SheetData> sheets = [];
        int cells = 0;
        foreach ((string name, string id) in listed)
        {
            XlsxPackage.Relation relation = relations.Find(r => r.Id == id);
            if (relation.Type is null)
            {
                throw new InvalidDataException($"its sheet {name} has no part.");
            }

            if (relation.Type.EndsWith("/worksheet", StringComparison.Ordinal))
            {
                List<IReadOnlyList<SheetCell>> rows = XlsxCells.Read(package, relation.Target, shared, styles, ref cells);
                sheets.Add(new SheetData(shownName, name, DecimalSign.IsComma(rows), rows));
            }
        }

        return sheets;
    }

    private static (List<(string Name, string Id)> Sheets, bool From1904) Listed(XlsxPackage package, string book)
    {
        List<(string, string)> sheets = [];
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
                string id = string.Empty;
                while (x.MoveToNextAttribute())
                {
                    id = x.LocalName == "id" && x.Prefix.Length > 0 ? x.Value : id;
                }

                sheets.Add((name, id));
            }
        }

        return (sheets, from1904);
    }
}
