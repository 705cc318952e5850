using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>
/// Which lines a rule's derivation needs, each after those that its formula names: the rule's own, and of the operating point's book what
/// they call for. A step that is but another name of a value (the base node is the control's collector) is not written: the value takes its
/// place. Where a solved value is among them, the balances that it satisfies follow.
/// </summary>
internal sealed class LineOrder
{
    private readonly Dictionary<string, DerivationLine> own;
    private readonly Dictionary<string, DerivationLine> known;
    private readonly Dictionary<string, string> aliases = new(StringComparer.Ordinal);
    private readonly HashSet<string> done = new(StringComparer.Ordinal);
    private readonly HashSet<string> open = new(StringComparer.Ordinal);
    private readonly List<DerivationLine> lines = [];

    /// <summary>Orders lines.</summary>
    /// <param name="rule">The rule's derivation.</param>
    /// <param name="book">What is known of the operating point.</param>
    public LineOrder(Derivation rule, Derivation book)
    {
        own = BySymbol(rule);
        known = BySymbol(book);
        foreach (DerivationLine line in own.Values)
        {
            if (known.TryGetValue(line.Symbol, out DerivationLine? other) && (line.Value, line.Formula) != (other.Value, other.Formula))
            {
                throw new InvalidOperationException($"The rule and the operating point both call something \"{line.Symbol}\".");
            }
        }

        string?[] judged = [rule.Actual, rule.Allowed];
        foreach (DerivationLine line in known.Values.Where(l => l.Kind == DerivationKind.Step && known.ContainsKey(l.Formula) && !judged.Contains(l.Symbol)).ToList())
        {
            aliases[line.Symbol] = line.Formula;
        }

        foreach (DerivationLine line in rule.Lines)
        {
            Take(line);
        }

        foreach (string? symbol in judged)
        {
            if (symbol is not null)
            {
                Take(symbol);
            }
        }

        Own = lines.Count;
        if (lines.Any(l => l.Kind == DerivationKind.Solved))
        {
            foreach (DerivationLine balance in book.Lines.Where(l => l.Kind == DerivationKind.Balance))
            {
                Take(balance);
            }
        }
    }

    /// <summary>The lines, each after what it needs.</summary>
    public IReadOnlyList<DerivationLine> Lines => lines;

    /// <summary>How many of them the rule needs; the rest belongs to the balances.</summary>
    public int Own { get; }

    private static Dictionary<string, DerivationLine> BySymbol(Derivation derivation)
    {
        Dictionary<string, DerivationLine> found = new(StringComparer.Ordinal);
        foreach (DerivationLine line in derivation.Lines.Where(l => l.Symbol.Length > 0))
        {
            found.TryAdd(line.Symbol, line);
        }

        return found;
    }

    /// <summary>The formula with every symbol that is but another name of a second one replaced by that.</summary>
    private string Named(string formula) => formula.Length == 0 ? formula : Formula.Parse(formula).With(Name);

    private string Name(string symbol)
    {
        string name = symbol;
        while (!own.ContainsKey(name) && aliases.TryGetValue(name, out string? other))
        {
            name = other;
        }

        return name;
    }

    private void Take(string symbol)
    {
        if (done.Contains(symbol))
        {
            return;
        }

        if (!own.TryGetValue(symbol, out DerivationLine? line) && !known.TryGetValue(symbol, out line))
        {
            throw new InvalidOperationException($"A derivation names \"{symbol}\", which nothing gives.");
        }

        Take(line);
    }

    private void Take(DerivationLine taken)
    {
        DerivationLine line = taken with { Formula = Named(taken.Formula), Right = Named(taken.Right) };
        if (line.Symbol.Length > 0 && done.Contains(line.Symbol))
        {
            return;
        }

        if (line.Symbol.Length > 0 && !open.Add(line.Symbol))
        {
            throw new InvalidOperationException($"The derivation of \"{line.Symbol}\" needs itself.");
        }

        foreach (string formula in (string[])[line.Formula, line.Right])
        {
            foreach (string needed in formula.Length == 0 ? [] : Formula.Parse(formula).Symbols)
            {
                Take(needed);
            }
        }

        if (line.Symbol.Length > 0)
        {
            done.Add(line.Symbol);
        }

        lines.Add(line);
    }
}
