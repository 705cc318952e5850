using System.Globalization;

namespace PartCheck.Quantities;

/// <summary>A series of preferred values (IEC 60063); the number is how many values a decade holds.</summary>
public enum PreferredSeries
{
    /// <summary>Six values a decade.</summary>
    E6 = 6,

    /// <summary>Twelve values a decade.</summary>
    E12 = 12,

    /// <summary>24 values a decade.</summary>
    E24 = 24,

    /// <summary>48 values a decade.</summary>
    E48 = 48,

    /// <summary>96 values a decade.</summary>
    E96 = 96,

    /// <summary>192 values a decade.</summary>
    E192 = 192,
}

/// <summary>
/// Preferred values of IEC 60063:2015. E24 and its halves are the standard's list (not the rounded geometric series); E48, E96 and E192
/// are round(100 x 10^(i/N)) with one exception, 920 in E192 where the equation gives 919. E24 is not a part of E96.
/// </summary>
public static class PreferredValues
{
    private const double SameValue = 1e-9;
    private const double SmallestValue = 1e-15;
    private const double LargestValue = 1e15;

    private static readonly int[] TwentyFour =
    [
        100, 110, 120, 130, 150, 160, 180, 200, 220, 240, 270, 300, 330, 360, 390, 430, 470, 510, 560, 620, 680, 750, 820, 910,
    ];

    private static readonly Dictionary<PreferredSeries, int[]> Decades = new()
    {
        [PreferredSeries.E6] = Every(4),
        [PreferredSeries.E12] = Every(2),
        [PreferredSeries.E24] = TwentyFour,
        [PreferredSeries.E48] = Geometric(48),
        [PreferredSeries.E96] = Geometric(96),
        [PreferredSeries.E192] = Geometric(192),
    };

    /// <summary>One decade of a series in three figures, 100 to 999, ascending.</summary>
    public static IReadOnlyList<int> Decade(PreferredSeries series) => Decades[series];

    /// <summary>True where the value stands in the series, in any decade.</summary>
    /// <param name="series">The series.</param>
    /// <param name="value">The value; zero, negative values and what lies outside 1e-15 to 1e15 stand in no series.</param>
    public static bool Contains(PreferredSeries series, double value) =>
        value is >= SmallestValue and <= LargestValue && Same(AtOrAbove(series, value), value);

    /// <summary>The smallest value of the series that is not below the given one.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not within 1e-15 to 1e15.</exception>
    public static double AtOrAbove(PreferredSeries series, double value)
    {
        (int[] decade, int exponent) = Start(series, value);
        for (int e = exponent - 1; ; e++)
        {
            foreach (int figures in decade)
            {
                double candidate = Value(figures, e);
                if (candidate >= value || Same(candidate, value))
                {
                    return candidate;
                }
            }
        }
    }

    /// <summary>The largest value of the series that is not above the given one.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not within 1e-15 to 1e15.</exception>
    public static double AtOrBelow(PreferredSeries series, double value)
    {
        (int[] decade, int exponent) = Start(series, value);
        for (int e = exponent + 1; ; e--)
        {
            for (int i = decade.Length - 1; i >= 0; i--)
            {
                double candidate = Value(decade[i], e);
                if (candidate <= value || Same(candidate, value))
                {
                    return candidate;
                }
            }
        }
    }

    private static (int[] Decade, int Exponent) Start(PreferredSeries series, double value)
    {
        Finite.Checked(value, nameof(value));
        ArgumentOutOfRangeException.ThrowIfLessThan(value, SmallestValue);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(value, LargestValue);
        return (Decades[series], (int)Math.Floor(Math.Log10(value)) - 2);
    }

    private static double Value(int figures, int exponent) =>
        double.Parse(string.Create(CultureInfo.InvariantCulture, $"{figures}e{exponent}"), CultureInfo.InvariantCulture);

    private static bool Same(double a, double b) => Math.Abs(a - b) <= SameValue * Math.Abs(b);

    private static int[] Every(int step) => [.. TwentyFour.Where((_, i) => i % step == 0)];

    private static int[] Geometric(int count)
    {
        int[] values = new int[count];
        for (int i = 0; i < count; i++)
        {
            values[i] = (int)Math.Round(100 * Math.Pow(10, (double)i / count), MidpointRounding.AwayFromZero);
        }

        if (count == 192)
        {
            values[185] = 920;
        }

        return values;
    }
}
