namespace PartCheck.Parts;

/// <summary>One lead of a transistor package.</summary>
/// <param name="Terminal">B, E or C; N: not connected.</param>
/// <param name="Element">1 or 2 where the package holds two transistors, 0 otherwise.</param>
public readonly record struct Lead(char Terminal, int Element)
{
    /// <inheritdoc/>
    public override string ToString() => Element == 0 ? $"{Terminal}" : $"{Terminal}{Element}";
}

/// <summary>
/// What each lead of a package is, from lead 1 on, and what its tab is: <c>BEC</c>, <c>BCE+C</c>, <c>E1 B1 C2 E2 B2 C1</c>.
/// Where makers number a package in both directions (SOT-89), the order is read by position: from the left, marking up, leads
/// towards the reader.
/// </summary>
public sealed class LeadOrder : IEquatable<LeadOrder>
{
    private LeadOrder(IReadOnlyList<Lead> leads, Lead? tab)
    {
        Leads = leads;
        Tab = tab;
    }

    /// <summary>Lead 1 first.</summary>
    public IReadOnlyList<Lead> Leads { get; }

    /// <summary>What the tab is; null: not said.</summary>
    public Lead? Tab { get; }

    /// <summary>Reads an order.</summary>
    /// <param name="text">Letters B, E, C, N in any case, an element's number behind its letter, blanks, dashes and commas between; the tab after a plus sign.</param>
    /// <param name="elements">Transistors in the package, 1 or 2.</param>
    /// <returns>Null where the text is no order: a letter that is none, a terminal that is missing.</returns>
    public static LeadOrder? Parse(string text, int elements)
    {
        ArgumentNullException.ThrowIfNull(text);
        string[] halves = text.Split('+');
        if (halves.Length > 2 || Read(halves[0]) is not { } leads)
        {
            return null;
        }

        Lead? tab = null;
        if (halves.Length == 2)
        {
            if (Read(halves[1]) is not [var one])
            {
                return null;
            }

            tab = one;
        }

        // Every terminal of every transistor is on a lead or on the tab.
        for (int element = elements == 1 ? 0 : 1; element <= (elements == 1 ? 0 : elements); element++)
        {
            foreach (char terminal in "BEC")
            {
                Lead wanted = new(terminal, element);
                if (!leads.Contains(wanted) && tab != wanted)
                {
                    return null;
                }
            }
        }

        return leads.Exists(l => l.Terminal != 'N' && (elements == 1 ? l.Element != 0 : l.Element < 1 || l.Element > elements)) ? null : new LeadOrder(leads, tab);
    }

    /// <summary>The leads that differ, in words: "lead 1 is E, not B"; empty where the orders agree. A tab that one side does not say does not count.</summary>
    /// <param name="old">The order that the board was laid out for.</param>
    public IReadOnlyList<string> DifferencesFrom(LeadOrder old)
    {
        ArgumentNullException.ThrowIfNull(old);
        List<string> differences = [];
        if (Leads.Count != old.Leads.Count)
        {
            differences.Add($"{Leads.Count} leads, not {old.Leads.Count}");
        }
        else
        {
            for (int i = 0; i < Leads.Count; i++)
            {
                if (Leads[i] != old.Leads[i])
                {
                    differences.Add($"lead {i + 1} is {Leads[i]}, not {old.Leads[i]}");
                }
            }
        }

        if (Tab is { } tab && old.Tab is { } before && tab != before)
        {
            differences.Add($"the tab is {tab}, not {before}");
        }

        return differences;
    }

    /// <summary>True where one order is the other counted from the far end, as where one of them was given by the wrong direction.</summary>
    /// <param name="other">Another order.</param>
    public bool IsMirrorOf(LeadOrder other)
    {
        ArgumentNullException.ThrowIfNull(other);
        return Leads.SequenceEqual(other.Leads.Reverse()) && !Leads.SequenceEqual(other.Leads);
    }

    /// <inheritdoc/>
    public bool Equals(LeadOrder? other) => other is not null && Tab == other.Tab && Leads.SequenceEqual(other.Leads);

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as LeadOrder);

    /// <inheritdoc/>
    public override int GetHashCode() => ToString().GetHashCode(StringComparison.Ordinal);

    /// <inheritdoc/>
    public override string ToString() =>
        string.Join(Leads.Any(l => l.Element > 0) ? " " : string.Empty, Leads) + (Tab is { } tab ? "+" + tab : string.Empty);

    private static List<Lead>? Read(string text)
    {
        List<Lead> leads = [];
        foreach (char c in text)
        {
            char upper = char.ToUpperInvariant(c);
            if (upper is 'B' or 'E' or 'C' or 'N')
            {
                leads.Add(new Lead(upper, 0));
            }
            else if (c is '1' or '2' && leads.Count > 0 && leads[^1] is { Element: 0, Terminal: not 'N' } last)
            {
                leads[^1] = last with { Element = c - '0' };
            }
            else if (c is not (' ' or '-' or ',' or '\u00A0'))
            {
                return null;
            }
        }

        return leads.Count == 0 ? null : leads;
    }
}
