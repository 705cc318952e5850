using System.Globalization;
using System.Text.RegularExpressions;

namespace PartCheck.Quantities;

/// <summary>
/// Reads quantities as people type them: <c>11 mA</c>, <c>4k7</c>, <c>4.7 kohm</c>, <c>47R</c>, <c>1/8 W</c>, <c>100 ppm/K</c>, <c>3V3</c>.
/// </summary>
/// <remarks>
/// The result is the double nearest to the decimal value typed: prefixes are powers of ten joined to the digits before conversion.
/// RKM codes follow IEC 60062; m is milli and M is mega.
/// </remarks>
public static partial class QuantityParser
{
    private const int LongestText = 64;

    /// <summary>Reads a text as a quantity of a kind.</summary>
    /// <param name="text">The text.</param>
    /// <param name="kind">The kind that is wanted.</param>
    /// <param name="decimalComma">True where the file writes decimals with a comma.</param>
    /// <param name="bareUnit">Unit of a bare number (from a header); null: the kind's own.</param>
    /// <param name="reading">Value in SI, or the trouble and what is wanted.</param>
    /// <returns>True where the value was read; it is finite then.</returns>
    public static bool TryParse(
        string? text, QuantityKind kind, bool decimalComma, QuantityUnit? bareUnit, out QuantityReading reading)
    {
        string wanted = QuantityUnits.WantedOf(kind);
        string trimmed = (text ?? string.Empty).Replace('\u2212', '-').Trim();
        QuantityTrouble trouble = Read(trimmed, kind, decimalComma, bareUnit ?? QuantityUnits.BareUnitOf(kind), out double si, out bool bare);
        reading = new QuantityReading(trouble, trouble == QuantityTrouble.None ? si : 0, bare, wanted);
        return reading.Ok;
    }

    private static QuantityTrouble Read(
        string text, QuantityKind kind, bool decimalComma, QuantityUnit bareUnit, out double si, out bool bare)
    {
        si = 0;
        bare = false;
        if (text.Length == 0)
        {
            return QuantityTrouble.Empty;
        }

        if (text.Length > LongestText)
        {
            return QuantityTrouble.NotANumber;
        }

        if (kind == QuantityKind.Resistance && RkmCode.TryParse(text, out si, out _))
        {
            return QuantityTrouble.None;
        }

        if (kind == QuantityKind.Voltage && VoltageInfix().Match(text) is { Success: true } infix)
        {
            return Scaled($"{infix.Groups[1].Value}.{infix.Groups[2].Value}", 0, 0, out si);
        }

        if (SignedEitherWay().Match(text) is { Success: true } either && kind is QuantityKind.Percent or QuantityKind.TemperatureCoefficient)
        {
            text = text[either.Length..];
        }

        Match match = NumberAndUnit().Match(text);
        if (!match.Success)
        {
            return QuantityTrouble.NotANumber;
        }

        string unitText = match.Groups["unit"].Value.Trim();
        QuantityUnit unit = bareUnit;
        bare = unitText.Length == 0;
        if (!bare && !QuantityUnits.TryFind(unitText, kind, out unit))
        {
            return LooksLikeUnit().IsMatch(unitText) ? QuantityTrouble.WrongUnit : QuantityTrouble.NotANumber;
        }

        string number = match.Groups["number"].Value;
        if (!TryDecimalPoint(number, decimalComma, out string pointed))
        {
            return QuantityTrouble.DecimalSign;
        }

        int exponent = unit.Exponent;
        if (match.Groups["exponent"] is { Success: true } typed)
        {
            if (!int.TryParse(typed.Value, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out int power)
                || Math.Abs(power) > 10_000)
            {
                return QuantityTrouble.OutOfRange;
            }

            exponent += power;
        }

        if (match.Groups["denominator"] is not { Success: true } below)
        {
            return Scaled(pointed, exponent, unit.Offset, out si);
        }

        double denominator = double.Parse(below.Value, NumberStyles.None, CultureInfo.InvariantCulture);
        if (denominator == 0)
        {
            return QuantityTrouble.NotANumber;
        }

        QuantityTrouble trouble = Scaled(pointed, exponent, 0, out si);
        si = (si / denominator) + unit.Offset;
        return trouble;
    }

    /// <summary>Digits with a decimal point, times a power of ten, plus an offset: correctly rounded.</summary>
    internal static QuantityTrouble Scaled(string pointed, int exponent, double offset, out double si)
    {
        si = 0;
        string composed = string.Create(CultureInfo.InvariantCulture, $"{pointed}e{exponent}");
        if (!double.TryParse(composed, NumberStyles.Float, CultureInfo.InvariantCulture, out double value))
        {
            return QuantityTrouble.NotANumber;
        }

        bool vanished = value == 0 && pointed.AsSpan().IndexOfAnyInRange('1', '9') >= 0;
        if (!double.IsFinite(value) || vanished)
        {
            return QuantityTrouble.OutOfRange;
        }

        // Celsius offsets are added in decimal so that 25 degC is 298.15 K and not its neighbour.
        si = offset == 0 ? value + 0.0
            : Math.Abs(value) < 1e12 ? (double)((decimal)value + (decimal)offset)
            : value + offset;
        return QuantityTrouble.None;
    }

    /// <summary>
    /// Makes the decimal sign a point. A comma in a file of points is refused, and so is a point that may be a thousands
    /// separator in a file of commas (one to three digits before, exactly three after).
    /// </summary>
    private static bool TryDecimalPoint(string number, bool decimalComma, out string pointed)
    {
        pointed = number;
        if (!decimalComma)
        {
            return !number.Contains(',', StringComparison.Ordinal);
        }

        pointed = number.Replace(',', '.');
        return !MayBeThousands().IsMatch(number);
    }

    [GeneratedRegex(@"^\s*(?<number>[+-]?(?:[0-9]+(?:[.,][0-9]*)?|[.,][0-9]+))(?:[eE](?<exponent>[+-]?[0-9]+))?(?:/(?<denominator>[0-9]+))?(?<unit>.*)$", RegexOptions.CultureInvariant | RegexOptions.Singleline)]
    private static partial Regex NumberAndUnit();

    [GeneratedRegex(@"^[^0-9.,+-][^.,;=]*$", RegexOptions.CultureInvariant | RegexOptions.Singleline)]
    private static partial Regex LooksLikeUnit();

    [GeneratedRegex(@"^[+-]?[1-9][0-9]{0,2}\.[0-9]{3}$", RegexOptions.CultureInvariant)]
    private static partial Regex MayBeThousands();

    [GeneratedRegex(@"^(?:\u00B1|\+/-|\+-)\s*(?=[0-9.,])", RegexOptions.CultureInvariant)]
    private static partial Regex SignedEitherWay();

    [GeneratedRegex(@"^([+-]?[0-9]+)[Vv]([0-9]+)$", RegexOptions.CultureInvariant)]
    private static partial Regex VoltageInfix();
}
