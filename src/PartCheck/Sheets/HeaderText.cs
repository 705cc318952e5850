using System.Text;
using System.Text.RegularExpressions;

namespace PartCheck.Sheets;

/// <summary>Header texts: what is ignored when they are matched, and the unit that may stand in them.</summary>
internal static partial class HeaderText
{
    /// <summary>The text as it is matched: without case, blanks, line breaks, dashes, underscores, dots, brackets and leading asterisks.</summary>
    internal static string Matched(string header)
    {
        StringBuilder kept = new(header.Length);
        foreach (char c in header.TrimStart(' ', '\t', '*', '\uFEFF'))
        {
            bool ignored = char.IsWhiteSpace(c) || char.IsControl(c)
                || c is '-' or '_' or '.' or '(' or ')' or '[' or ']' or ':' or '\u2010' or '\u2011' or '\u2013' or '\u2014' or '\u2212' or '\u200B';
            if (!ignored)
            {
                kept.Append(char.ToUpperInvariant(c));
            }
        }

        return kept.ToString();
    }

    /// <summary>The header's first line where it has several.</summary>
    internal static string? FirstLine(string header)
    {
        int end = header.AsSpan().IndexOfAny('\r', '\n');
        return end > 0 ? header[..end] : null;
    }

    /// <summary>Splits <c>IC (mA)</c>, <c>VCEO [V]</c>, <c>IC, mA</c>, <c>IC / mA</c> and <c>IC mA</c> into name and unit.</summary>
    internal static IEnumerable<(string Name, string Unit, bool Bracketed)> WithUnit(string header)
    {
        Match bracket = InBrackets().Match(header);
        if (bracket.Success)
        {
            yield return (bracket.Groups["name"].Value, bracket.Groups["unit"].Value.Trim(), true);
        }

        Match comma = AfterSign().Match(header);
        if (comma.Success)
        {
            yield return (comma.Groups["name"].Value, comma.Groups["unit"].Value.Trim(), false);
        }

        Match blank = AfterBlank().Match(header);
        if (blank.Success)
        {
            yield return (blank.Groups["name"].Value, blank.Groups["unit"].Value.Trim(), false);
        }
    }

    [GeneratedRegex(@"^(?<name>.*\S)\s*[\(\[](?:in\s+)?(?<unit>[^\(\)\[\]]+)[\)\]]\s*$", RegexOptions.CultureInvariant | RegexOptions.Singleline)]
    private static partial Regex InBrackets();

    [GeneratedRegex(@"^(?<name>[^,;/]*[^,;/\s])\s*[,;/]\s*(?:in\s+)?(?<unit>[^,;]+)$", RegexOptions.CultureInvariant | RegexOptions.Singleline)]
    private static partial Regex AfterSign();

    [GeneratedRegex(@"^(?<name>.*?\S)(?:\s+in)?\s+(?<unit>\S+)\s*$", RegexOptions.CultureInvariant | RegexOptions.Singleline)]
    private static partial Regex AfterBlank();
}
