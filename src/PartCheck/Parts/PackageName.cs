namespace PartCheck.Parts;

/// <summary>Whether a package as a bill writes it is the package of a part table row.</summary>
public static class PackageName
{
    private static readonly char[] Breaks = [' ', '_', '(', ')', ',', ';', '/', ':', '\t'];

    /// <summary>
    /// True where both names are the same without case, blanks, dashes and underscores, or where one stands as a word of its
    /// own in the other (<c>R_0603_1608Metric</c> is 0603, <c>SOT-23-5</c> is not SOT-23, and
    /// <c>0603 metric</c> is not the inch size 0603), or where both are names of one outline (<see cref="PackageTable"/>).
    /// </summary>
    /// <param name="onBill">The bill's text.</param>
    /// <param name="inTable">The part table's name.</param>
    public static bool Agrees(string onBill, string inTable) =>
        AgreesAsWritten(onBill, inTable) || PackageTable.Relation(onBill, inTable) == PackageRelation.Same;

    /// <summary>A name without case, blanks, dashes and underscores, by which names are compared.</summary>
    /// <param name="name">A package name.</param>
    public static string Plain(string name)
    {
        ArgumentNullException.ThrowIfNull(name);
        return string.Concat(name.Where(c => c is not (' ' or '-' or '_' or '\t'))).ToUpperInvariant();
    }

    private static bool AgreesAsWritten(string onBill, string inTable) =>
        string.Equals(Plain(onBill), Plain(inTable), StringComparison.Ordinal)
        || HasWord(onBill, inTable) || HasWord(inTable, onBill);

    private static bool HasWord(string text, string name)
    {
        string wanted = Plain(name);
        string[] words = text.Split(Breaks, StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries);
        for (int i = 0; i < words.Length; i++)
        {
            bool metric = i + 1 < words.Length && Plain(words[i + 1]) == "METRIC";
            if (!metric && string.Equals(Plain(words[i]), wanted, StringComparison.Ordinal))
            {
                return true;
            }
        }

        return false;
    }
}
