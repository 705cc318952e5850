namespace PartCheck.Parts;

/// <summary>Part numbers of a table that are nearly the one looked for: suggested to a person, never taken.</summary>
public static class PartNearMiss
{
    private const int Most = 3;
    private const int Farthest = 2;
    private const int LettersForEach = 4;

    /// <summary>
    /// The nearest part numbers: at most two letters or digits wrong, missing, too many or exchanged (one for each four there are),
    /// dashes and blanks not counted.
    /// </summary>
    /// <param name="parts">The table.</param>
    /// <param name="partNumber">The part number that the table does not have.</param>
    /// <returns>At most three, the nearest first.</returns>
    public static IReadOnlyList<string> Of(PartTable parts, string partNumber)
    {
        ArgumentNullException.ThrowIfNull(parts);
        ArgumentNullException.ThrowIfNull(partNumber);
        string wanted = Plain(partNumber);
        int farthest = Math.Min(Farthest, wanted.Length / LettersForEach);
        return [.. parts.Parts.Select(p => p.PartNumber).Distinct(StringComparer.OrdinalIgnoreCase)
            .Where(n => Math.Abs(Plain(n).Length - wanted.Length) <= farthest)
            .Select(n => (Number: n, Distance: Distance(Plain(n), wanted)))
            .Where(n => n.Distance <= farthest)
            .OrderBy(n => n.Distance).ThenBy(n => n.Number, StringComparer.Ordinal)
            .Take(Most).Select(n => n.Number)];
    }

    private static string Plain(string text) => string.Concat(text.ToUpperInvariant().Where(char.IsLetterOrDigit));

    /// <summary>Edits from one text to the other: a letter changed, left out or added, two neighbours exchanged (optimal string alignment).</summary>
    private static int Distance(string one, string other)
    {
        int[,] edits = new int[one.Length + 1, other.Length + 1];
        for (int i = 0; i <= one.Length; i++)
        {
            edits[i, 0] = i;
        }

        for (int j = 0; j <= other.Length; j++)
        {
            edits[0, j] = j;
        }

        for (int i = 1; i <= one.Length; i++)
        {
            for (int j = 1; j <= other.Length; j++)
            {
                int change = one[i - 1] == other[j - 1] ? 0 : 1;
                edits[i, j] = Math.Min(Math.Min(edits[i - 1, j] + 1, edits[i, j - 1] + 1), edits[i - 1, j - 1] + change);
                if (i > 1 && j > 1 && one[i - 1] == other[j - 2] && one[i - 2] == other[j - 1])
                {
                    edits[i, j] = Math.Min(edits[i, j], edits[i - 2, j - 2] + 1);
                }
            }
        }

        return edits[one.Length, other.Length];
    }
}
