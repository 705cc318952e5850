using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>May it be fitted? The verdict that answers, and the sentence that says why.</summary>
internal static class ComparisonAnswer
{
    /// <summary>The answer over the channels that a change reaches.</summary>
    internal static (Verdict Answer, string Reason) Of(
        BoardReport before, BoardReport after, IReadOnlyList<PartChange> changes, IReadOnlySet<string> reached)
    {
        List<ChannelJudgement> channels = [.. after.Channels.Where(c => reached.Contains(c.Channel))];
        Verdict answer = FindingSeverity.WorstOf(channels.Select(c => c.Verdict));
        Finding? worst = FindingOrder.WorstFirst(after).FirstOrDefault(f => channels.Exists(c => BoardComparison.CountsIn(f, c.Channel)));
        string rest = FindingSeverity.Rank(after.Verdict) > FindingSeverity.Rank(answer)
            ? $"; elsewhere the board is {VerdictWords.Of(after.Verdict)}, with and without this change" : string.Empty;
        string fitted = string.Join(", ", changes.Select(Words));
        string names = string.Join(", ", channels.Select(c => c.Channel));
        string why = (answer, worst) switch
        {
            (_, null) => $"nothing judges {fitted}",
            (Verdict.Nonconforming, { } f) => $"{Said(f)}{Without(before, f, channels)}",
            (Verdict.NotVerified, { } f) => $"{Said(f)}{Without(before, f, channels)}",
            (Verdict.Conforms, { } f) => $"with {fitted}, {names} {(channels.Count == 1 ? "conforms" : "conform")}{Closest(f)}",
            (_, { } f) => $"with {fitted}, {names} {(channels.Count == 1 ? "is" : "are")} covered by a concession: {Said(f)}",
        };
        return (answer, why + rest + ".");
    }

    /// <summary><c>TQ-32 for TQ-31 (Q1)</c>.</summary>
    internal static string Words(PartChange change) =>
        $"{Named(change.To, change.ToOhms, change.Manufacturer)} for {(change.From is null ? "no part number" : Named(change.From, change.FromOhms, null))} ({string.Join(", ", change.References)})";

    private static string Named(string part, double? ohms, string? maker)
    {
        string[] beside = [.. new[] { maker, ohms is { } r ? FindingText.Value(r, "ohm") : null }.OfType<string>()];
        return part + (beside.Length == 0 ? string.Empty : " [" + string.Join(", ", beside) + "]");
    }

    private static string Said(Finding f)
    {
        IReadOnlyList<Finding> alone = [f];
        string what = f.Verdict == Verdict.NotVerified
            ? "missing " + string.Join(", ", f.Missing)
            : string.Join("; ", new[] { FindingText.Numbers(f), f.Text?.TrimEnd('.'), f.Mix.Any(m => m.Alternate) ? FindingText.Mix(f) : null }.Where(t => !string.IsNullOrEmpty(t)));
        return string.Join(' ', new[] { f.Channel, f.Rule, FindingText.Subject(alone) }.Where(t => !string.IsNullOrEmpty(t))) + ": " + what;
    }

    /// <summary>How the same rule stands without the change, in the channel that the finding belongs to.</summary>
    private static string Without(BoardReport before, Finding f, List<ChannelJudgement> channels)
    {
        string channel = channels.First(c => BoardComparison.CountsIn(f, c.Channel)).Channel;
        if (BoardComparison.WorstByRule(before, channel).GetValueOrDefault(f.Rule) is not { } was)
        {
            return string.Empty;
        }

        string ratio = FindingText.Ratio(was) is { } r ? ", ratio " + r : string.Empty;
        bool same = was.Verdict == f.Verdict && FindingText.Ratio(was) == FindingText.Ratio(f);
        return same ? "; so it is without the change, too" : $"; without the change {VerdictWords.Of(was.Verdict)}{ratio}";
    }

    private static string Closest(Finding f) => FindingText.Ratio(f) is { } ratio
        ? $"; closest to its limit is {string.Join(' ', new[] { f.Channel, f.Rule, f.Pin ?? f.Reference }.OfType<string>())}, ratio {ratio}" : string.Empty;
}
