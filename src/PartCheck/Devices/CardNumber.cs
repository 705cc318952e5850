using System.Globalization;
using System.Text.RegularExpressions;

namespace PartCheck.Devices;

/// <summary>
/// Numbers of a model card: scale letters f p n u m k meg g t in any case (M is milli), mil = 25.4e-6; letters after the
/// scale are units (<c>0.3ns</c>, <c>45V</c>, <c>2pf</c>).
/// </summary>
internal static partial class CardNumber
{
    /// <summary>Reads a number; false where the text is none.</summary>
    public static bool TryParse(string text, out double value)
    {
        value = double.NaN;
        Match match = Pattern().Match(text);
        if (!match.Success || !double.TryParse(match.Groups["n"].Value, NumberStyles.Float, CultureInfo.InvariantCulture, out double number))
        {
            return false;
        }

        value = number * Scale(match.Groups["s"].Value.ToUpperInvariant());
        return double.IsFinite(value);
    }

    private static double Scale(string letters) =>
        letters.StartsWith("MEG", StringComparison.Ordinal) ? 1e6
        : letters.StartsWith("MIL", StringComparison.Ordinal) ? 25.4e-6
        : letters.Length == 0 ? 1
        : letters[0] switch
        {
            'F' => 1e-15,
            'P' => 1e-12,
            'N' => 1e-9,
            'U' => 1e-6,
            'M' => 1e-3,
            'K' => 1e3,
            'G' => 1e9,
            'T' => 1e12,
            _ => 1,
        };

    [GeneratedRegex(@"^(?<n>[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?)(?<s>[A-Za-z]*)$")]
    private static partial Regex Pattern();
}
