using System.Text.RegularExpressions;

namespace PartCheck.Sheets;

/// <summary>Finds out from the cells whether decimals are written with a comma.</summary>
internal static partial class DecimalSign
{
    /// <summary>
    /// True where cells that can only be numbers with a decimal comma (<c>4,7k</c>, <c>0,47</c>) are not outnumbered by numbers
    /// with a decimal point. <c>1,500</c> is no evidence: it may be a thousands separator.
    /// </summary>
    internal static bool IsComma(IEnumerable<IReadOnlyList<SheetCell>> rows)
    {
        int commas = 0;
        int points = 0;
        foreach (SheetCell cell in rows.SelectMany(row => row))
        {
            if (cell.Number is null && cell.Text.Length <= 24)
            {
                commas += WithComma().IsMatch(cell.Text) ? 1 : 0;
                points += WithPoint().IsMatch(cell.Text) ? 1 : 0;
            }
        }

        return commas > 0 && commas >= points;
    }

    [GeneratedRegex(@"^[+-]?(?:0,[0-9]+|[0-9]+,(?:[0-9]{1,2}|[0-9]{4,}))\s*[^0-9.,;]{0,8}$", RegexOptions.CultureInvariant)]
    private static partial Regex WithComma();

    [GeneratedRegex(@"^[+-]?(?:0\.[0-9]+|[0-9]+\.(?:[0-9]{1,2}|[0-9]{4,}))\s*[^0-9.,;]{0,8}$", RegexOptions.CultureInvariant)]
    private static partial Regex WithPoint();
}
