using System.Globalization;
using System.Text.RegularExpressions;
using PartCheck.Quantities;

namespace PartCheck.Bills;

/// <summary>
/// Finds a resistance in a text that says more than it: <c>470R 1/10W 5% 0603</c>, <c>RES 0805 1K</c>, <c>10k, 1%</c>. Sizes, powers,
/// tolerances and voltages are no resistances.
/// </summary>
internal static partial class ResistanceText
{
    /// <summary>The resistance of a value cell, ohm; null where none or more than one stands there.</summary>
    /// <param name="text">The cell's text.</param>
    /// <param name="decimalComma">True where the file writes decimals with a comma.</param>
    internal static double? OfValue(string text, bool decimalComma)
    {
        // 100n and 10u are capacitances and inductances with their unit left out.
        if (BelowMilli().IsMatch(text))
        {
            return null;
        }

        if (QuantityParser.TryParse(text, QuantityKind.Resistance, decimalComma, null, out QuantityReading reading))
        {
            return reading.Si >= 0 ? reading.Si : null;
        }

        return Only(Found(text, decimalComma));
    }

    /// <summary>The resistance that a description names, ohm; null where it does not speak of a resistor, or names none or several.</summary>
    /// <param name="text">The description.</param>
    /// <param name="decimalComma">True where the file writes decimals with a comma.</param>
    internal static double? OfDescription(string text, bool decimalComma) =>
        Resistor().IsMatch(text) && !NoFixedResistor().IsMatch(text) ? Only(Found(text, decimalComma)) : null;

    /// <summary>True where a text names a resistance by a sign or letter and not by digits alone.</summary>
    internal static bool SaysOhms(string text) => Ohms().IsMatch(text);

    /// <summary>The text whose ohm sign was lost before the file was saved (<c>10k?</c>); null: it was not.</summary>
    internal static string? LostSign(string text) => Lost().Match(text) is { Success: true } match ? match.Value.Trim().TrimEnd('?', '\uFFFD').TrimEnd() : null;

    /// <summary>
    /// True where a resistor's part number (one that names a chip size) can mean the resistance: by its RKM group (IEC 60062) or, after
    /// a tolerance letter, by three or four digits. True also where it names neither: nothing contradicts.
    /// </summary>
    /// <param name="partNumber">The part number.</param>
    /// <param name="ohms">The resistance [ohm].</param>
    internal static bool MayMean(string partNumber, double ohms)
    {
        string upper = partNumber.ToUpperInvariant();
        if (Size().Match(upper) is not { Success: true } size)
        {
            return true;
        }

        string rest = upper[(size.Index + size.Length)..];
        List<double> codes = [];
        foreach (Match match in RkmGroup().Matches(rest))
        {
            // Packing digits may stand before the code (0743K is 43K): every ending of the digits is a reading.
            string before = match.Groups["before"].Value;
            for (int from = 0; from <= before.Length; from++)
            {
                if (RkmCode.TryParse(before[from..] + match.Groups["letter"].Value + match.Groups["after"].Value, out double code, out _))
                {
                    codes.Add(code);
                }
            }
        }

        foreach (Match match in DigitCode().Matches(rest))
        {
            string digits = match.Groups["digits"].Value;
            codes.Add(Figures(digits[..^1]) * Math.Pow(10, digits[^1] - '0'));
            if (match.Groups["below"].Value is { Length: > 0 } letter)
            {
                codes.Add(Figures(digits) * Math.Pow(10, -1 - (letter[0] - 'J')));
            }
        }

        return codes.Count == 0 || codes.Exists(code => Math.Abs(code - ohms) <= 0.005 * Math.Max(code, ohms));
    }

    private static double Figures(string digits) => double.Parse(digits, NumberStyles.None, CultureInfo.InvariantCulture);

    private static double? Only(List<double> found)
    {
        List<double> distinct = [.. found.Distinct()];
        return distinct.Count == 1 ? distinct[0] : null;
    }

    private static List<double> Found(string text, bool decimalComma)
    {
        List<double> found = [];
        foreach (Match match in Candidate().Matches(text))
        {
            string number = match.Groups["number"].Value;
            string plain = match.Groups["unit"].Value.Replace("R", "ohm", StringComparison.Ordinal);
            string unit = match.Groups["unit"].Value is "R" or "r" ? "R" : plain;
            if (QuantityParser.TryParse(match.Groups["rkm"].Success ? match.Groups["rkm"].Value : number + unit, QuantityKind.Resistance, decimalComma, null, out QuantityReading reading))
            {
                found.Add(reading.Si);
            }
        }

        return found;
    }

    [GeneratedRegex(@"(?<![A-Za-z0-9.,/_\u2013-])(?:(?<rkm>[0-9]+[RrkKM][0-9]+)(?:[R\u03A9\u2126]|[Oo]hms?)?|(?<number>[0-9]+(?:[.,][0-9]+)?)\s?(?<unit>[kKM]?(?:\u03A9|\u2126|[Oo][Hh][Mm][Ss]?)|m(?:\u03A9|\u2126|[Oo]hms?)|[kK]R|[RrkKM]))(?![A-Za-z0-9.\u03A9\u2126_])", RegexOptions.CultureInvariant)]
    private static partial Regex Candidate();

    [GeneratedRegex(@"\bres(?:istors?|istenza|istencia)?\b|r\u00E9sistance|widerstand|\u0440\u0435\u0437\u0438\u0441\u0442\u043E\u0440|\u62B5\u6297|\u7535\u963B|\u03A9|\u2126|\bohms?\b", RegexOptions.CultureInvariant | RegexOptions.IgnoreCase)]
    private static partial Regex Resistor();

    [GeneratedRegex(@"\b(?:dcr|impedance|ferrite|beads?|inductors?|choke|crystal|diode|transistor|mosfet|capacitors?|cap|arrays?|networks?|trimmers?|potentiometers?|ntc|thermistors?|varistors?|relays?|esr|speakers?|buzzers?|impedanz)\b", RegexOptions.CultureInvariant | RegexOptions.IgnoreCase)]
    private static partial Regex NoFixedResistor();

    [GeneratedRegex(@"^\s*[0-9]*(?:[.,][0-9]+)?\s*[pnu\u00B5\u03BC]\s*$", RegexOptions.CultureInvariant)]
    private static partial Regex BelowMilli();

    [GeneratedRegex(@"(?:^\s*[0-9]+(?:[.,][0-9]+)?\s*[kKMmRr]?[0-9]*\s*|(?<![A-Za-z0-9.])[0-9]+(?:[.,][0-9]+)?[kKM])[?\uFFFD](?=$|[\s,;/])", RegexOptions.CultureInvariant)]
    private static partial Regex Lost();

    [GeneratedRegex(@"[RrkKM\u03A9\u2126]|[Oo]hm", RegexOptions.CultureInvariant)]
    private static partial Regex Ohms();

    [GeneratedRegex(@"(?:01005|0201|0402|0603|0805|1206|1210|1812|2010|2512)", RegexOptions.CultureInvariant)]
    private static partial Regex Size();

    [GeneratedRegex(@"(?<before>[0-9]{0,8})(?<letter>[RKM])(?<after>[0-9]{1,3})|(?<before>[0-9]{1,8})(?<letter>[RKM])(?<after>)(?![0-9])", RegexOptions.CultureInvariant)]
    private static partial Regex RkmGroup();

    [GeneratedRegex(@"[BCDFGJK](?<digits>[0-9]{3,4})(?<below>[JKL])?(?![0-9])", RegexOptions.CultureInvariant)]
    private static partial Regex DigitCode();
}
