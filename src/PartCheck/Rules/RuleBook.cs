using System.Reflection;

namespace PartCheck.Rules;

/// <summary>Every rule, found by itself: adding a rule adds its file. Ordered as the approved list orders identifiers.</summary>
public static class RuleBook
{
    /// <summary>Identifiers in the order in which reports list them.</summary>
    public static IReadOnlyList<string> Order { get; } =
    [
        "vce", "vcb", "ic", "power", "junction", "soa", "stability", "sharing", "r-power", "r-voltage", "r-film",
        "current", "headroom", "drive", "pin-current", "off", "bill",
    ];

    /// <summary>The rules that read solved states.</summary>
    public static IReadOnlyList<Rule> StateRules { get; } =
        [.. typeof(Rule).Assembly.GetTypes()
            .Where(t => t.IsSubclassOf(typeof(Rule)) && !t.IsAbstract)
            .Select(t => (Rule)Activator.CreateInstance(t)!)
            .OrderBy(r => Position(r.Id)).ThenBy(r => r.GetType().Name, StringComparer.Ordinal)];

    /// <summary>Identifiers of the rules judged.</summary>
    public static IReadOnlyList<string> Judged { get; } =
        [.. StateRules.Select(r => r.Id).Append(PinCurrentRule.Id).Append(BillRule.Id).Distinct().OrderBy(Position)];

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
