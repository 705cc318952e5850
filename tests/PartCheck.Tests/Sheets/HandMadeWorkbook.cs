using System.IO.Compression;
using System.Text;

namespace PartCheck.Tests.Sheets;

/// <summary>An .xlsx package put together part by part, so that tests can leave out or spoil what programs always write.</summary>
internal static class HandMadeWorkbook
{
    private const string Main = "xmlns=\"http://schemas.openxmlformats.org/spreadsheetml/2006/main\"";
    private const string Relation = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";

    /// <summary>A package with one sheet, Parts.</summary>
    /// <param name="path">File to write.</param>
    /// <param name="sheetData">What stands inside <c>sheetData</c>.</param>
    /// <param name="styles">What stands inside <c>styleSheet</c>; null: no such part.</param>
    /// <param name="strings">What stands inside <c>sst</c>; null: no such part.</param>
    /// <param name="spoil">Changes the parts before they are written.</param>
    internal static string Write(
        string path, string sheetData, string? styles = null, string? strings = null, Action<Dictionary<string, string>>? spoil = null)
    {
        Dictionary<string, string> parts = new()
        {
            ["_rels/.rels"] = Relations(("r1", "officeDocument", "xl/workbook.xml")),
            ["xl/workbook.xml"] = $"<workbook {Main} xmlns:r=\"{Relation}\"><sheets><sheet name=\"Parts\" sheetId=\"1\" r:id=\"r1\"/></sheets></workbook>",
            ["xl/worksheets/sheet1.xml"] = $"<worksheet {Main}><sheetData>{sheetData}</sheetData></worksheet>",
            ["xl/_rels/workbook.xml.rels"] = Relations(
                ("r1", "worksheet", "worksheets/sheet1.xml"), ("r2", "styles", "styles.xml"), ("r3", "sharedStrings", "/xl/sharedStrings.xml")),
        };
        if (styles is not null)
        {
            parts["xl/styles.xml"] = $"<styleSheet {Main}>{styles}</styleSheet>";
        }

        if (strings is not null)
        {
            parts["xl/sharedStrings.xml"] = $"<sst {Main}>{strings}</sst>";
        }

        spoil?.Invoke(parts);
        using FileStream file = File.Create(path);
        using ZipArchive zip = new(file, ZipArchiveMode.Create);
        foreach ((string name, string text) in parts)
        {
            using Stream part = zip.CreateEntry(name).Open();
            part.Write(Encoding.UTF8.GetBytes(text));
        }

        return path;
    }

    /// <summary>A row of inline texts in which the cells name no address.</summary>
    internal static string Texts(params string[] texts) =>
        "<row>" + string.Concat(texts.Select(text => $"<c t=\"inlineStr\"><is><t>{text}</t></is></c>")) + "</row>";

    private static string Relations(params (string Id, string Type, string Target)[] relations) =>
        "<Relationships xmlns=\"http://schemas.openxmlformats.org/package/2006/relationships\">"
        + string.Concat(relations.Select(r => $"<Relationship Id=\"{r.Id}\" Type=\"{Relation}/{r.Type}\" Target=\"{r.Target}\"/>"))
        + "</Relationships>";
}
