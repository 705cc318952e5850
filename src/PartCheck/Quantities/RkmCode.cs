using System.Text.RegularExpressions;

namespace PartCheck.Quantities;

/// <summary>
/// Resistance codes of IEC 60062: a letter stands in the place of the decimal point, a tolerance letter may follow
/// (R47 = 0.47 ohm, 4R7 = 4.7 ohm, 4K7 = 4.7 kohm, 4L7 = 4.7 milliohm, 4K7K = 4.7 kohm 10 %).
/// </summary>
/// <remarks>
/// Letters: L = 1e-3, R = 1, K = 1e3, M = 1e6, G = 1e9, T = 1e12. As people type: lower-case r and k are taken, lower-case m is
/// milli, and an ohm sign, R or the word ohm may follow the code (<c>3k9 ohm</c>, <c>22k1R</c>).
/// K and M are multiplier and tolerance letters both: the multiplier is read first.
/// Source: IEC 60062:2016 with Amendment 1:2019.
/// </remarks>
public static partial class RkmCode
{
    /// <summary>Reads a code.</summary>
    /// <param name="text">The code, no blank inside it.</param>
    /// <param name="ohms">The resistance [ohm].</param>
    /// <param name="tolerance">The tolerance as a share (10 % is 0.1); null where no letter names it.</param>
    /// <returns>False where the text is not such a code.</returns>
    public static bool TryParse(string text, out double ohms, out double? tolerance)
    {
        ArgumentNullException.ThrowIfNull(text);
        ohms = 0;
        tolerance = null;
        Match match = Code().Match(text.Trim());
        if (!match.Success)
        {
            return false;
        }

        string before = match.Groups["before"].Value;
        string after = match.Groups["after"].Value;
        if (before.Length + after.Length is 0 or > 30)
        {
            return false;
        }

        int exponent = match.Groups["letter"].Value switch
        {
            "L" or "m" => -3,
            "R" or "r" => 0,
            "K" or "k" => 3,
            "M" => 6,
            "G" => 9,
            _ => 12,
        };
        if (match.Groups["tolerance"] is { Success: true } letter)
        {
            tolerance = ToleranceOf(letter.Value[0]);
        }

        return QuantityParser.Scaled($"{before}.{after}", exponent, 0, out ohms) == QuantityTrouble.None;
    }

    /// <summary>The tolerance that a letter stands for, as a share; null where the letter is none.</summary>
    public static double? ToleranceOf(char letter) => letter switch
    {
        'B' => 0.001,
        'C' => 0.0025,
        'D' => 0.005,
        'F' => 0.01,
        'G' => 0.02,
        'J' => 0.05,
        'K' => 0.10,
        'M' => 0.20,
        'N' => 0.30,
        _ => null,
    };

    [GeneratedRegex(@"^(?<before>[0-9]*)(?<letter>[LmRrKkMGT])(?<after>[0-9]*)(?:(?<tolerance>[BCDFGJKMN])|(?:\s*(?:\u03A9|\u2126|R|[Oo][Hh][Mm][Ss]?)))?$", RegexOptions.CultureInvariant)]
    private static partial Regex Code();
}
