using System.Globalization;
using System.Text.RegularExpressions;

namespace PartCheck.Devices;

/// <summary>
/// A number as SPICE writes it: a decimal number, a suffix f p n u m k meg g t in any case (<b>M is milli</b>), then letters of a unit
/// that mean nothing: <c>65.2M</c> is 0.0652, <c>2pf</c> is 2e-12, <c>45V</c> is 45.
/// </summary>
internal static partial class ModelCardNumber
{
    /// <summary>Reads a number; false where anything but a suffix and unit letters is glued to it.</summary>
    public static bool TryRead(string text, out double value)
    {
        value = 0;
        Match match = Pattern().Match(text);
        if (!match.Success || Power(match.Groups[3].Value.ToUpperInvariant()) is not int power)
        {
            return false;
        }

        // The suffix joins the exponent before the text becomes binary: rounded once, 65.2M is 0.0652 and nothing beside it.
        int written = 0;
        if (match.Groups[2].Length > 0
            && !int.TryParse(match.Groups[2].ValueSpan, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out written))
        {
            return false;
        }

        string whole = string.Create(CultureInfo.InvariantCulture, $"{match.Groups[1].ValueSpan}E{(long)written + power}");
        return double.TryParse(whole, NumberStyles.Float, CultureInfo.InvariantCulture, out value) && double.IsFinite(value);
    }

    private static int? Power(string letters) => letters switch
    {
        "" => 0,
        _ when letters.StartsWith("MEG", StringComparison.Ordinal) => 6,
        // A thousandth of an inch to some simulators, a milli-something to a reader: not guessed. An E is half an exponent.
        _ when letters.StartsWith("MIL", StringComparison.Ordinal) || letters[0] == 'E' => null,
        _ => letters[0] switch
        {
            'F' => -15,
            'P' => -12,
            'N' => -9,
            'U' => -6,
            'M' => -3,
            'K' => 3,
            'G' => 9,
            'T' => 12,
            _ => 0,
        },
    };

    [GeneratedRegex(@"^([+-]?(?:[0-9]+\.?[0-9]*|\.[0-9]+))(?:[eE]([+-]?[0-9]+))?([A-Za-z]*)$", RegexOptions.CultureInvariant)]
    private static partial Regex Pattern();
}
