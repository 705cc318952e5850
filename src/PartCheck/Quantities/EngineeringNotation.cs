using System.Globalization;

namespace PartCheck.Quantities;

/// <summary>Prints values with a prefix that keeps one to three digits before the decimal point: <c>10.86 mA</c>.</summary>
public static class EngineeringNotation
{
    private const int SmallestExponent = -21;
    private const int LargestExponent = 9;

    /// <summary>Prints a value, rounded to significant digits, without trailing zeros, in the invariant culture.</summary>
    /// <param name="si">The value in SI; finite.</param>
    /// <param name="unit">The unit. V, A, W, ohm, Hz, s, W/K, V/K and A/K take the prefixes z a f p n u m k M G; all others are printed plain.</param>
    /// <param name="digits">Significant digits, 1 to 15.</param>
    /// <returns>Number, blank, prefix and unit; the number alone where the unit is empty.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The value is not finite or the digits are out of range.</exception>
    public static string Format(double si, string unit, int digits = 4)
    {
        ArgumentNullException.ThrowIfNull(unit);
        ArgumentOutOfRangeException.ThrowIfLessThan(digits, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(digits, 15);
        Finite.Checked(si, nameof(si));
        bool prefixed = unit is "V" or "A" or "W" or "ohm" or "\u03A9" or "Hz" or "s" or "W/K" or "V/K" or "A/K";

        // Scientific notation rounds first, so that 999.96 mA becomes 1 A and not 1000 mA.
        string scientific = si.ToString("E" + (digits - 1).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        int mark = scientific.IndexOf('E', StringComparison.Ordinal);
        int exponent = int.Parse(scientific.AsSpan(mark + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        string figures = scientific[..mark].Replace("-", string.Empty, StringComparison.Ordinal).Replace(".", string.Empty, StringComparison.Ordinal);
        if (figures.AsSpan().IndexOfAnyExcept('0') < 0)
        {
            return Joined("0", string.Empty, unit);
        }

        int shift = prefixed ? Math.Clamp((int)Math.Floor(exponent / 3.0) * 3, SmallestExponent, LargestExponent) : 0;
        string number = Placed(figures, exponent - shift);
        return Joined(si < 0 ? "-" + number : number, PrefixOf(shift), unit);
    }

    /// <summary>Prints a value of a kind in the unit that its bare numbers have: temperatures in degC, shares in %, coefficients in ppm/K.</summary>
    /// <param name="kind">The kind.</param>
    /// <param name="si">The value in SI; finite.</param>
    /// <param name="digits">Significant digits, 1 to 15.</param>
    public static string FormatAs(QuantityKind kind, double si, int digits = 4)
    {
        QuantityUnit unit = QuantityUnits.BareUnitOf(kind);
        double shown = unit.Offset != 0 ? si - unit.Offset : unit.Exponent != 0 ? si * Math.Pow(10, -unit.Exponent) : si;
        return Format(shown, QuantityUnits.BareSymbolOf(kind), digits);
    }

    private static string Placed(string figures, int exponent)
    {
        int before = exponent + 1;
        string padded = before <= 0 ? new string('0', 1 - before) + figures : figures;
        int point = Math.Max(before, 1);
        padded = padded.PadRight(point, '0');
        string fraction = padded[point..].TrimEnd('0');
        return fraction.Length == 0 ? padded[..point] : padded[..point] + "." + fraction;
    }

    private static string Joined(string number, string prefix, string unit) =>
        unit.Length == 0 ? number : $"{number} {prefix}{unit}";

    private static string PrefixOf(int exponent) => exponent switch
    {
        -21 => "z",
        -18 => "a",
        -15 => "f",
        -12 => "p",
        -9 => "n",
        -6 => "u",
        -3 => "m",
        3 => "k",
        6 => "M",
        9 => "G",
        _ => string.Empty,
    };
}
