namespace PartCheck.Bills;

/// <summary>References of one transistor in a package of several: <c>Q1.2</c> is the second element of <c>Q1</c>.</summary>
public static class ElementReference
{
    /// <summary>The package of an element; any other reference is its own.</summary>
    public static string PackageOf(string reference)
    {
        ArgumentNullException.ThrowIfNull(reference);
        return ElementOf(reference) is null ? reference : reference[..reference.LastIndexOf('.')];
    }

    /// <summary>References with the packages of which they are elements, however the bill writes them; letter case is ignored.</summary>
    public static HashSet<string> WithPackages(IEnumerable<string> references)
    {
        ArgumentNullException.ThrowIfNull(references);
        return new HashSet<string>(references.SelectMany(r => (string[])[r, PackageOf(r)]), StringComparer.OrdinalIgnoreCase);
    }

    /// <summary>The element's number, from 1; null where the reference names no element.</summary>
    public static int? ElementOf(string reference)
    {
        ArgumentNullException.ThrowIfNull(reference);
        int dot = reference.LastIndexOf('.');
        ReadOnlySpan<char> number = reference.AsSpan(dot + 1);
        if (dot <= 0 || number.Length is 0 or > 2 || number[0] == '0')
        {
            return null;
        }

        int value = 0;
        foreach (char c in number)
        {
            if (!char.IsAsciiDigit(c))
            {
                return null;
            }

            value = (10 * value) + (c - '0');
        }

        return value;
    }
}
