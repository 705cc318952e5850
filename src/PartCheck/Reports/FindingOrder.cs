using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>
/// The order of findings in every report, worst first: nonconforming without a stress ratio, nonconforming by stress ratio
/// descending, not verified, under a concession, conforming by stress ratio descending. Ties go by the order of channels, of rules, then by
/// reference (Q2 before Q10), part number and manufacturer, so that the order never depends on how the findings were made.
/// </summary>
public static class FindingOrder
{
    /// <summary>Sorts a board's findings.</summary>
    /// <param name="board">The board; its <see cref="BoardReport.Channels"/> and <see cref="BoardReport.Rules"/> give the order of ties.</param>
    public static IReadOnlyList<Finding> WorstFirst(BoardReport board)
    {
        ArgumentNullException.ThrowIfNull(board);
        return WorstFirst(board.Findings, [.. board.Channels.Select(c => c.Channel)], board.Rules);
    }

    /// <summary>Sorts findings.</summary>
    /// <param name="findings">What to sort; it is left as it is.</param>
    /// <param name="channels">Names of the channels in order; findings of no channel come last.</param>
    /// <param name="rules">Identifiers of the rules in order; others come last.</param>
    public static IReadOnlyList<Finding> WorstFirst(
        IEnumerable<Finding> findings, IReadOnlyList<string> channels, IReadOnlyList<string> rules)
    {
        Dictionary<string, int> channelAt = Positions(channels);
        Dictionary<string, int> ruleAt = Positions(rules);
        return [.. findings
            .OrderBy(Group)
            .ThenByDescending(f => Ratio(f) ?? double.NegativeInfinity)
            .ThenBy(f => f.Channel is null ? int.MaxValue : channelAt.GetValueOrDefault(f.Channel, int.MaxValue))
            .ThenBy(f => f.Channel, NaturalOrder.Instance)
            .ThenBy(f => ruleAt.GetValueOrDefault(f.Rule, int.MaxValue))
            .ThenBy(f => f.Rule, StringComparer.Ordinal)
            .ThenBy(f => f.Pin, NaturalOrder.Instance)
            .ThenBy(f => f.Reference ?? (f.References is { Count: > 0 } all ? all[0] : null), NaturalOrder.Instance)
            .ThenBy(f => f.PartNumber, StringComparer.Ordinal)
            .ThenBy(f => f.Manufacturer, StringComparer.Ordinal)];
    }

    /// <summary>The stress ratio where it is a finite number, else null.</summary>
    internal static double? Ratio(Finding finding) =>
        finding.StressRatio is { } ratio && double.IsFinite(ratio) ? ratio : null;

    private static int Group(Finding finding) => finding.Verdict switch
    {
        Verdict.Nonconforming => Ratio(finding) is null ? 0 : 1,
        Verdict.NotVerified => 2,
        Verdict.Concession => 3,
        _ => 4,
    };

    private static Dictionary<string, int> Positions(IReadOnlyList<string> names)
    {
        var positions = new Dictionary<string, int>(StringComparer.Ordinal);
        for (int i = 0; i < names.Count; i++)
        {
            positions.TryAdd(names[i], i);
        }

        return positions;
    }
}
