namespace PartCheck.Sheets;

/// <summary>Names that a name which does not exist may have meant.</summary>
public static class NearMisses
{
    private const int Listed = 3;

    /// <summary>
    /// Up to three names: those at the smallest number of single-character edits (Levenshtein distance, letter case ignored),
    /// at most a third of the length of the name wanted, at least one edit.
    /// </summary>
    /// <param name="wanted">The name that does not exist.</param>
    /// <param name="known">Names that exist.</param>
    public static IReadOnlyList<string> Of(string wanted, IEnumerable<string> known)
    {
        ArgumentNullException.ThrowIfNull(wanted);
        ArgumentNullException.ThrowIfNull(known);
        string upper = wanted.ToUpperInvariant();
        int most = Math.Max(1, wanted.Length / 3);
        return [.. known.Distinct(StringComparer.OrdinalIgnoreCase)
            .Where(name => Math.Abs(name.Length - wanted.Length) <= most)
            .Select(name => (Name: name, Edits: Edits(upper, name.ToUpperInvariant())))
            .Where(n => n.Edits <= most)
            .OrderBy(n => n.Edits).ThenBy(n => n.Name, StringComparer.Ordinal)
            .Take(Listed).Select(n => n.Name)];
    }

    /// <summary>The names as the end of a sentence: <c>; near it: A, B</c>, or nothing.</summary>
    /// <param name="wanted">The name that does not exist.</param>
    /// <param name="known">Names that exist.</param>
    public static string Phrase(string wanted, IEnumerable<string> known) =>
        Of(wanted, known) is { Count: > 0 } near ? "; near it: " + string.Join(", ", near) : string.Empty;

    private static int Edits(string a, string b)
    {
        int[] row = [.. Enumerable.Range(0, b.Length + 1)];
        for (int i = 1; i <= a.Length; i++)
        {
            int diagonal = row[0];
            row[0] = i;
            for (int j = 1; j <= b.Length; j++)
            {
                int edits = Math.Min(Math.Min(row[j], row[j - 1]) + 1, diagonal + (a[i - 1] == b[j - 1] ? 0 : 1));
                diagonal = row[j];
                row[j] = edits;
            }
        }

        return row[b.Length];
    }
}
