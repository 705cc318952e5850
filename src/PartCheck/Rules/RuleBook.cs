using System.Reflection;

namespace PartCheck.Rules;

/// <summary>Every rule, found by itself: adding a rule adds its file. Ordered as the approved list orders identifiers.</summary>
public static class RuleBook
{
    /// <summary>Identifiers in the order in which reports list them.</summary>
    public static IReadOnlyList<string> Order { get; } =
    [
        "vce", "vcb", "ic", "power", "junction", "soa", "stability", "sharing", "r-power", "r-voltage", "r-film", "led-current",
        "current", "headroom", "drive", "pin-current", "off", "bill",
    ];

    /// <summary>The rules that read solved states.</summary>
    public static IReadOnlyList<Rule> StateRules { get; } =
        [.. typeof(Rule).Assembly.GetTypes()
            .Where(t => t.IsSubclassOf(typeof(Rule)) && !t.IsAbstract)
            .Select(t => (Rule)Activator.CreateInstance(t)!)
            .OrderBy(r => Position(r.Id)).ThenBy(r => r.GetType().Name, StringComparer.Ordinal)];

    /// <summary>Every rule's data sheet, in the order of the approved list; two rules of one identifier judge two kinds of part.</summary>
    public static IReadOnlyList<RuleEntry> Entries { get; } =
        [.. StateRules.Select(r => new RuleEntry(r.Id, r.Title, r.Unit, r.AlwaysAsked, r.Source))
            .Append(new RuleEntry(PinCurrentRule.Id, PinCurrentRule.Title, "A", true, PinCurrentRule.Source))
            .Append(new RuleEntry(BillRule.Id, BillRule.Title, string.Empty, true, BillRule.Source))
            .OrderBy(e => Position(e.Id))];

    /// <summary>Identifiers of the rules judged.</summary>
    public static IReadOnlyList<string> Judged { get; } =
        [.. Entries.Select(e => e.Id).Distinct()];

    /// <summary>Identifiers of the design's rules that this version does not judge.</summary>
    public static IReadOnlyList<string> NotJudged { get; } = [.. Order.Except(Judged)];

    /// <summary>Position of an identifier in the approved list; one that is not there is a programmer's mistake.</summary>
    public static int Position(string id)
    {
        for (int i = 0; i < Order.Count; i++)
        {
            if (Order[i] == id)
            {
                return i;
            }
        }

        throw new ArgumentException($"The rule \"{id}\" is not on the approved list.", nameof(id));
    }
}

/// <summary>One rule as a list of rules shows it.</summary>
/// <param name="Id">Identifier.</param>
/// <param name="Title">What it demands, one line.</param>
/// <param name="Unit">SI unit of actual and allowed value; empty: none.</param>
/// <param name="AlwaysAsked">False where table or channel must ask for it.</param>
/// <param name="Source">Where it comes from.</param>
public sealed record RuleEntry(string Id, string Title, string Unit, bool AlwaysAsked, string Source);
