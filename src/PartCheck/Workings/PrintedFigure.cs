using System.Globalization;
using PartCheck.Quantities;

namespace PartCheck.Workings;

/// <summary>
/// A figure as a working prints it: rounded to six significant digits (temperatures to 0.001 degC), half away from zero, and the value that
/// the printed text has. A person who types the text into a calculator goes on with exactly that value.
/// </summary>
/// <param name="Text">The text with its unit, e.g. <c>218.024 mW</c>.</param>
/// <param name="Value">The value of the text, SI; degrees Celsius for <c>degC</c>.</param>
/// <param name="Half">Half a unit of its last digit: how far the figure behind it may lie off.</param>
public readonly record struct PrintedFigure(string Text, double Value, double Half)
{
    /// <summary>Significant digits.</summary>
    public const int Digits = 6;

    private const int Decimals = 3;

    /// <summary>Rounds a value for print.</summary>
    /// <param name="value">SI; degrees Celsius for <c>degC</c>.</param>
    /// <param name="unit">Unit; empty: a plain number.</param>
    public static PrintedFigure Of(double value, string unit)
    {
        Finite.Checked(value, nameof(value));
        ArgumentNullException.ThrowIfNull(unit);
        if (unit == "degC")
        {
            decimal rounded = Math.Round((decimal)value, Decimals, MidpointRounding.AwayFromZero);
            return new(rounded.ToString("0.###", CultureInfo.InvariantCulture) + " degC", (double)rounded, 0.5e-3);
        }

        (double shown, double half) = Rounded(value);
        string text = unit switch
        {
            "%" => EngineeringNotation.Format(Rounded(100 * shown).Value, "%", Digits),
            "ppm/K" => EngineeringNotation.Format(Rounded(1e6 * shown).Value, "ppm/K", Digits),
            _ => EngineeringNotation.Format(shown, unit, Digits),
        };
        return new(text, shown, half);
    }

    /// <summary>
    /// Six significant digits. The twelve that a calculator shows are rounded half away from zero, so that 0.2180245 does not fall to the
    /// wrong side because its binary form is a little smaller.
    /// </summary>
    private static (double Value, double Half) Rounded(double value)
    {
        string twelve = Math.Abs(value).ToString("E11", CultureInfo.InvariantCulture);
        int exponent = int.Parse(twelve.AsSpan(14), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        long figures = long.Parse(twelve[0] + twelve[2..13], CultureInfo.InvariantCulture);
        long kept = (figures + 500_000) / 1_000_000;
        double rounded = double.Parse(
            string.Create(CultureInfo.InvariantCulture, $"{kept}E{exponent - (Digits - 1)}"), NumberStyles.Float, CultureInfo.InvariantCulture);
        return value == 0 ? (0, 0) : (Math.Sign(value) * rounded, 0.5 * Math.Pow(10, exponent - (Digits - 1)));
    }
}
