using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>Another part for some references, with the resistances of both where they are resistors [ohm].</summary>
public sealed record PartChange(
    IReadOnlyList<string> References, string? From, string To, string? Manufacturer, double? FromOhms, double? ToOhms);

/// <summary>The worst finding of one rule in one channel, before or after a change.</summary>
public sealed record RuleStanding(Verdict Verdict, double? StressRatio, string? Reference);

/// <summary>What a change does to one rule in one channel; null: the rule has no finding there.</summary>
public sealed record RuleShift(string Rule, RuleStanding? Before, RuleStanding? After);

/// <summary>What a change does to one channel.</summary>
public sealed record ChannelShift
{
    /// <summary>The channel.</summary>
    public required string Channel { get; init; }

    /// <summary>Verdict of the bill as it stands.</summary>
    public required Verdict Before { get; init; }

    /// <summary>Verdict with the change.</summary>
    public required Verdict After { get; init; }

    /// <summary>Load current of the bill as it stands; null: not solved.</summary>
    public LoadCurrentRange? CurrentBefore { get; init; }

    /// <summary>Load current with the change; null: not solved.</summary>
    public LoadCurrentRange? CurrentAfter { get; init; }

    /// <summary>Rules whose worst finding changes, in the order of rules.</summary>
    public required IReadOnlyList<RuleShift> Rules { get; init; }

    /// <summary>True where anything of the channel differs.</summary>
    public bool Differs => Before != After || CurrentBefore != CurrentAfter || Rules.Count > 0;
}

/// <summary>
/// A board with other parts beside the bill as it stands, and the answer to whether they may be fitted. The answer is the worst
/// verdict of the channels that the changed references serve and of those that the change reaches through a shared pin: yes where
/// they conform (a concession in force included), no where one is nonconforming, else not verified.
/// </summary>
public sealed record BoardComparison
{
    /// <summary>The answer as a verdict: conforms or concession is yes.</summary>
    public required Verdict Answer { get; init; }

    /// <summary>Why, one line.</summary>
    public required string Reason { get; init; }

    /// <summary>Verdict of the board as its bill stands.</summary>
    public required Verdict Before { get; init; }

    /// <summary>Verdict of the board with the change.</summary>
    public required Verdict After { get; init; }

    /// <summary>The parts changed, in the order asked.</summary>
    public required IReadOnlyList<PartChange> Changes { get; init; }

    /// <summary>Channels that differ, in the sheet's order.</summary>
    public required IReadOnlyList<ChannelShift> Channels { get; init; }

    /// <summary>Channels that do not differ.</summary>
    public required IReadOnlyList<string> Unchanged { get; init; }

    /// <summary>Compares two judgements of one board.</summary>
    /// <param name="before">The board as its bill stands.</param>
    /// <param name="after">The board with the change.</param>
    /// <param name="changes">The parts changed.</param>
    /// <param name="served">Channels that the changed references serve.</param>
    public static BoardComparison Of(
        BoardReport before, BoardReport after, IReadOnlyList<PartChange> changes, IReadOnlyCollection<string> served)
    {
        ArgumentNullException.ThrowIfNull(before);
        ArgumentNullException.ThrowIfNull(after);
        ArgumentNullException.ThrowIfNull(changes);
        ArgumentNullException.ThrowIfNull(served);
        List<ChannelShift> all = [.. after.Channels.Select(c => Shift(c, before, after))];
        HashSet<string> reached = [.. served, .. all.Where(s => s.Differs).Select(s => s.Channel)];
        (Verdict answer, string reason) = ComparisonAnswer.Of(before, after, changes, reached);
        return new BoardComparison
        {
            Answer = answer,
            Reason = reason,
            Before = before.Verdict,
            After = after.Verdict,
            Changes = changes,
            Channels = [.. all.Where(s => s.Differs)],
            Unchanged = [.. all.Where(s => !s.Differs).Select(s => s.Channel)],
        };
    }

    /// <summary>The worst finding of each rule that counts in a channel.</summary>
    internal static Dictionary<string, Finding> WorstByRule(BoardReport board, string channel)
    {
        Dictionary<string, Finding> worst = new(StringComparer.Ordinal);
        foreach (Finding finding in FindingOrder.WorstFirst(board).Where(f => CountsIn(f, channel)))
        {
            worst.TryAdd(finding.Rule, finding);
        }

        return worst;
    }

    /// <summary>True for a finding of the channel, and for one of a line or a pin that names it.</summary>
    internal static bool CountsIn(Finding finding, string channel) =>
        finding.Channel == channel || (finding.Channel is null && finding.Channels?.Contains(channel) == true);

    private static ChannelShift Shift(ChannelJudgement after, BoardReport reportBefore, BoardReport reportAfter)
    {
        ChannelJudgement before = reportBefore.Channels.First(c => c.Channel == after.Channel);
        Dictionary<string, Finding> was = WorstByRule(reportBefore, after.Channel);
        Dictionary<string, Finding> becomes = WorstByRule(reportAfter, after.Channel);
        IEnumerable<RuleShift> rules = was.Keys.Union(becomes.Keys).OrderBy(RuleBook.Position)
            .Select(rule => new RuleShift(rule, Standing(was.GetValueOrDefault(rule)), Standing(becomes.GetValueOrDefault(rule))));
        return new ChannelShift
        {
            Channel = after.Channel,
            Before = before.Verdict,
            After = after.Verdict,
            CurrentBefore = before.LoadCurrent,
            CurrentAfter = after.LoadCurrent,
            Rules = [.. rules.Where(r => r.Before != r.After)],
        };
    }

    private static RuleStanding? Standing(Finding? finding) =>
        finding is null ? null : new RuleStanding(finding.Verdict, FindingOrder.Ratio(finding), finding.Reference);
}
