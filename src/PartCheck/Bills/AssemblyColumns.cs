using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>A column that says what is fitted in one assembly: <c>Populated LITE</c>, <c>DNP (LITE)</c>.</summary>
/// <param name="Assembly">Name of the assembly, as the header writes it.</param>
/// <param name="Header">The header.</param>
/// <param name="YesMeansFitted">False for a do-not-fit column.</param>
/// <param name="Plausible">True where every cell below says fitted or not fitted, and one does.</param>
internal sealed record AssemblyColumn(string Assembly, string Header, bool YesMeansFitted, bool Plausible)
{
    /// <summary>True where a name means this assembly: letter case, blanks and dashes are ignored.</summary>
    internal bool Is(string name) => HeaderText.Matched(name) == HeaderText.Matched(Assembly);

    /// <summary>The columns of a header row: any spelling of the columns Fitted and Do not fit, then a name.</summary>
    internal static IReadOnlyList<AssemblyColumn> Of(SheetData sheet, int headerRow, ColumnSpellings spellings)
    {
        List<AssemblyColumn> found = [];
        foreach (SheetCell cell in sheet.Rows.FirstOrDefault(r => r[0].Row == headerRow) ?? [])
        {
            // A header that is a column by itself names no assembly.
            if (cell.Number is null && Marking(cell.Text, spellings) is null && Split(cell.Text, spellings) is var (name, fitted))
            {
                List<string> below = [.. sheet.Rows.Where(r => r[0].Row > headerRow)
                    .SelectMany(r => r).Where(c => c.Column == cell.Column).Select(c => c.Text)];
                bool plausible = below.Count > 0 && below.TrueForAll(t => FittedMarks.Statement(t, fitted) is not null || FittedMarks.IsDash(t));
                found.Add(new AssemblyColumn(name, cell.Text, fitted, plausible));
            }
        }

        return found;
    }

    /// <summary>The longest beginning that marks fitting, up to a blank, dash or bracket; the rest is the name.</summary>
    private static (string Name, bool YesMeansFitted)? Split(string header, ColumnSpellings spellings)
    {
        for (int i = header.Length - 1; i > 0; i--)
        {
            if (!char.IsLetterOrDigit(header[i]) && Marking(header[..i], spellings) is { } fitted)
            {
                string name = string.Join(' ', header[i..].Trim(' ', '\t', '-', '\u2013', '_', ':', '/', '(', ')', '[', ']', '\r', '\n').Split((char[])['\r', '\n'], StringSplitOptions.RemoveEmptyEntries));
                return HeaderText.Matched(name).Length > 0 ? (name, fitted) : null;
            }
        }

        return null;
    }

    /// <summary>True for a spelling of Fitted, false for one of Do not fit, null for neither.</summary>
    private static bool? Marking(string text, ColumnSpellings spellings)
    {
        string matched = HeaderText.Matched(text);
        string? column = spellings.ColumnOf("BOM", matched);
        return column == "Fitted" || matched == "FITTED" ? true : column == "Do not fit" || matched == "DONOTFIT" ? false : null;
    }
}
