using System.Text.RegularExpressions;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>
/// Whether a line is fitted: its column Fitted, its do-not-fit column, or a mark inside its value (<c>DNP</c>, <c>0R - DNP</c>,
/// <c>10k (not fitted)</c>). Marks that contradict each other are a complaint, and nothing is chosen between them.
/// </summary>
internal static partial class FittedMarks
{
    private static readonly string[] Marks = ["DNP", "DNF", "DNI", "DNM", "NF", "NC", "N/F", "NOFIT"];
    private static readonly string[] MarkWords = ["DNP", "DNF", "DNI", "DNM"];

    private static readonly string[] Phrases =
    [
        "NOT FITTED", "NOT PLACED", "NOT POPULATED", "NOT MOUNTED", "NOT INSTALLED", "UNFITTED", "NO FIT",
        "DO NOT FIT", "DO NOT PLACE", "DO NOT POPULATE", "DO NOT MOUNT", "DO NOT INSTALL",
    ];

    /// <summary>Columns in which a mark counts where it is the whole cell.</summary>
    private static readonly string[] Elsewhere = ["Notes", "Part number", "Manufacturer", "Description"];

    private static readonly string[] No = ["NO", "N", "0", "FALSE", "-"];
    private static readonly string[] Yes = ["YES", "Y", "1", "TRUE", "X", "\u2713", "\u2714"];
    private static readonly string[] FittedWords = ["FIT", "FITTED", "PLACE", "PLACED", "POPULATE", "POPULATED", "MOUNT", "MOUNTED", "INSTALL", "INSTALLED"];

    /// <summary>Fitted or not, and the mark that says not.</summary>
    /// <param name="row">The line.</param>
    /// <param name="value">Its value.</param>
    /// <param name="assembly">Columns of the assembly asked for: what they say of a line counts, whatever else stands there.</param>
    internal static (bool Fitted, Cited<string>? Mark) Read(TableRow row, string? value, IReadOnlyList<AssemblyColumn> assembly)
    {
        (string Column, bool? Fitted)[] set = [.. assembly.Select(a => (a.Header, Said(row, a.Header, a.YesMeansFitted)))];
        if (Array.Exists(set, s => s.Fitted is not null))
        {
            return Decide(row, set);
        }

        bool? byColumn = Said(row, "Fitted", yesMeansFitted: true);
        bool? byMark = Said(row, "Do not fit", yesMeansFitted: false);
        bool? byValue = value is not null && IsMark(value) ? false : null;
        return Decide(row,
        [
            ("Fitted", byColumn), ("Do not fit", byMark), ("Value", byValue),
            .. Elsewhere.Select(column => (column, IsWholeMark(row.Text(column)) ? (bool?)false : null)),
            ("Package", row.Text("Package") is { } package && PackageMark().IsMatch(package) ? false : null),
        ]);
    }

    /// <summary>What a text says of a line; null: neither that it is fitted nor that it is not.</summary>
    internal static bool? Statement(string text, bool yesMeansFitted)
    {
        string upper = text.ToUpperInvariant();
        if (Marks.Contains(upper) || Phrases.Contains(upper))
        {
            return false;
        }

        if (FittedWords.Contains(upper))
        {
            return true;
        }

        return Yes.Contains(upper) || No.Contains(upper) ? Yes.Contains(upper) == yesMeansFitted : null;
    }

    /// <summary>A dash, which in a do-not-fit column stands for a blank cell.</summary>
    internal static bool IsDash(string text) => text is "-" or "\u2013" or "\u2014";

    private static (bool Fitted, Cited<string>? Mark) Decide(TableRow row, IReadOnlyList<(string Column, bool? Fitted)> said)
    {
        List<(string Column, bool? Fitted)> clear = [.. said.Where(s => s.Fitted is not null)];
        if (clear.FirstOrDefault(s => s.Fitted == false) is not { Column: { } column })
        {
            return (true, null);
        }

        // A blank or a dash in the do-not-fit column is no statement; a plain "no" there says that the line is fitted.
        if (clear.FirstOrDefault(s => s.Fitted == true) is { Column: { } other })
        {
            row.Complain(
                column, "marks that agree",
                $"{column} says \"{row.Text(column)}\", {other} says \"{row.Text(other)}\": one of them fits the line, the other does not.");
        }

        return (false, new Cited<string>(row.Text(column)!, row.Cite(column)));
    }

    /// <summary>What a column says; null: nothing.</summary>
    private static bool? Said(TableRow row, string column, bool yesMeansFitted)
    {
        if (row.Text(column) is not { } text || (!yesMeansFitted && IsDash(text)))
        {
            return null;
        }

        if (Statement(text, yesMeansFitted) is { } statement)
        {
            return statement;
        }

        row.Complain(column, "yes or no", $"\"{text}\" says neither that the line is fitted nor that it is not.");
        return null;
    }

    /// <summary>A mark that is the whole text of a cell.</summary>
    private static bool IsWholeMark(string? text) =>
        text?.Trim().ToUpperInvariant() is { } upper && (MarkWords.Contains(upper) || Phrases.Contains(upper));

    /// <summary>A mark inside a longer note: what it says of the line cannot be told.</summary>
    internal static bool IsInside(string text) => !IsWholeMark(text) && IsMark(text);

    /// <summary>A mark that is the whole value, one of its words, or a phrase in it.</summary>
    private static bool IsMark(string value)
    {
        string[] words = value.ToUpperInvariant()
            .Split([' ', '\t', '\n', '\r', '\u00A0', ',', ';', '(', ')', '[', ']', '-', '\u2013', '_', '/', '*'], StringSplitOptions.RemoveEmptyEntries);
        string spaced = " " + string.Join(' ', words) + " ";
        return Marks.Contains(value.Trim().ToUpperInvariant())
            || words.Any(MarkWords.Contains)
            || Phrases.Any(phrase => spaced.Contains(" " + phrase + " ", StringComparison.Ordinal));
    }

    [GeneratedRegex("(?:^|[_ -])(?:DNP|DNF|DNI|DNM)$", RegexOptions.CultureInvariant | RegexOptions.IgnoreCase)]
    private static partial Regex PackageMark();
}
