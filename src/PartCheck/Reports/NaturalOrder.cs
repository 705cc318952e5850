namespace PartCheck.Reports;

/// <summary>
/// Order in which a person lists references: runs of digits compare as numbers (Q2 before Q10), everything else by code unit.
/// The result does not depend on the culture.
/// </summary>
public sealed class NaturalOrder : IComparer<string?>
{
    /// <summary>The only instance.</summary>
    public static NaturalOrder Instance { get; } = new();

    /// <inheritdoc/>
    /// <remarks>null comes first. Texts that are equal but for leading zeros compare by code unit.</remarks>
    public int Compare(string? x, string? y)
    {
        if (x is null || y is null)
        {
            return (x is null ? 0 : 1) - (y is null ? 0 : 1);
        }

        int i = 0;
        int j = 0;
        while (i < x.Length && j < y.Length)
        {
            int order;
            if (char.IsAsciiDigit(x[i]) && char.IsAsciiDigit(y[j]))
            {
                ReadOnlySpan<char> left = Digits(x, ref i);
                ReadOnlySpan<char> right = Digits(y, ref j);
                order = left.Length != right.Length ? left.Length - right.Length : left.SequenceCompareTo(right);
            }
            else
            {
                order = x[i++].CompareTo(y[j++]);
            }

            if (order != 0)
            {
                return order;
            }
        }

        int rest = (x.Length - i) - (y.Length - j);
        return rest != 0 ? rest : string.CompareOrdinal(x, y);
    }

    private static ReadOnlySpan<char> Digits(string text, ref int at)
    {
        int start = at;
        while (at < text.Length && char.IsAsciiDigit(text[at]))
        {
            at++;
        }

        return text.AsSpan(start, at - start).TrimStart('0');
    }
}
