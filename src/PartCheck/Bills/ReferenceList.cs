using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;

namespace PartCheck.Bills;

/// <summary>
/// Reads a cell of reference designators: <c>R1, R2, R5-R8</c>; <c>R5,6,7</c>; <c>C6-7</c>; en dash; blanks, commas,
/// semicolons and slashes between; <c>Q1.1</c> for an element of a package, <c>Q1.1-Q1.4</c> for several. What is no such designator is kept as its text.
/// </summary>
public static partial class ReferenceList
{
    /// <summary>Longest range that is written out.</summary>
    public const int LongestRange = 10_000;

    /// <summary>Components to place: elements of one package (<c>Q1.1, Q1.2</c>) are one.</summary>
    public static int Components(IEnumerable<string> references)
    {
        ArgumentNullException.ThrowIfNull(references);
        return references.Select(ElementReference.PackageOf).Distinct(StringComparer.OrdinalIgnoreCase).Count();
    }

    /// <summary>The references of a cell.</summary>
    /// <param name="text">The cell's text.</param>
    /// <param name="references">The references, ranges written out.</param>
    /// <returns>What is wrong with the cell; null: nothing.</returns>
    public static string? Read(string text, out IReadOnlyList<string> references)
    {
        ArgumentNullException.ThrowIfNull(text);
        List<string> found = [];
        references = found;
        string normal = Dashes().Replace(text.Normalize(NormalizationForm.FormKC), "-");
        normal = BlanksAroundDash().Replace(normal, "-");
        normal = BlankInside().Replace(normal, string.Empty);
        string prefix = string.Empty;
        foreach (string token in Tokens(normal))
        {
            if (found.Count > LongestRange)
            {
                found.RemoveRange(LongestRange, found.Count - LongestRange);
                return $"The cell names more than {LongestRange.ToString(CultureInfo.InvariantCulture)} references.";
            }

            string item = char.IsAsciiDigit(token[0]) && prefix.Length > 0 ? prefix + token : token;
            Match range = Range().Match(item);
            if (!range.Success)
            {
                found.Add(item);
                prefix = Letters().Match(item).Value;
                continue;
            }

            string stem = range.Groups["p"].Value;
            prefix = Letters().Match(stem).Value;
            if (range.Groups["q"].Value is { Length: > 0 } other && other != stem)
            {
                return $"The range \"{item}\" runs from {stem} to {other}: a range keeps its letters.";
            }

            if (!long.TryParse(range.Groups["a"].Value, NumberStyles.None, CultureInfo.InvariantCulture, out long from)
                || !long.TryParse(range.Groups["b"].Value, NumberStyles.None, CultureInfo.InvariantCulture, out long to))
            {
                return $"The range \"{item}\" has a number that cannot be read.";
            }

            if (to < from)
            {
                return $"The range \"{item}\" runs backwards.";
            }

            if (to - from >= LongestRange)
            {
                return $"The range \"{item}\" is longer than {LongestRange.ToString(CultureInfo.InvariantCulture)} references.";
            }

            // R01-R12 keeps its leading zeros.
            string first = range.Groups["a"].Value;
            string digits = first[0] == '0' ? "D" + first.Length.ToString(CultureInfo.InvariantCulture) : "D";
            for (long i = from; i <= to; i++)
            {
                found.Add(stem + i.ToString(digits, CultureInfo.InvariantCulture));
            }
        }

        return null;
    }

    /// <summary>
    /// The names in a cell. Between commas, semicolons and line ends a text of several words that does not begin as a designator does
    /// (<c>PIR module</c>, <c>cable 10 cm</c>) is one name.
    /// </summary>
    private static IEnumerable<string> Tokens(string text)
    {
        foreach (string item in text.Split([',', ';', '\n', '\r'], StringSplitOptions.RemoveEmptyEntries))
        {
            string[] words = item.Split([' ', '\t', '\u00A0', '/'], StringSplitOptions.RemoveEmptyEntries);
            if (words.Length > 1 && !Designator().IsMatch(words[0]))
            {
                yield return item.Trim();
                continue;
            }

            foreach (string word in words)
            {
                yield return word;
            }
        }
    }

    [GeneratedRegex("^(?:[A-Za-z_]{1,8})?[0-9]+(?:[.-].*|[A-Za-z])?$")]
    private static partial Regex Designator();

    [GeneratedRegex("[\u2010-\u2015\u2212~]|\\.\\.+")]
    private static partial Regex Dashes();

    // "C  2, C  3": blanks between letters and number.
    [GeneratedRegex(@"(?<=(?:^|[,;/\s])[A-Za-z]{1,3})[ \t\u00A0]+(?=[0-9]+(?:$|[,;/\s-]))")]
    private static partial Regex BlankInside();

    [GeneratedRegex(@"\s*-\s*")]
    private static partial Regex BlanksAroundDash();

    [GeneratedRegex(@"^(?<p>[A-Za-z_]+(?:\d+\.)?)(?<a>\d+)-(?<q>[A-Za-z_]*(?:\d+\.)?)(?<b>\d+)$")]
    private static partial Regex Range();

    [GeneratedRegex("^[A-Za-z_]+")]
    private static partial Regex Letters();
}
