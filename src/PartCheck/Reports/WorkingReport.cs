using PartCheck.Rules;
using PartCheck.Workings;

namespace PartCheck.Reports;

/// <summary>The workings of one channel: what <c>working</c> prints.</summary>
/// <param name="Check">The whole run that they belong to.</param>
/// <param name="Channel">The channel; empty: the board could not be judged.</param>
/// <param name="Workings">The workings, worst finding first.</param>
public sealed record WorkingReport(CheckReport Check, string Channel, IReadOnlyList<Working> Workings)
{
    /// <summary>True: the text shows the check of the solved figures of every working, else of the first.</summary>
    public bool EveryCheck { get; init; } = true;

    /// <summary>The board.</summary>
    public BoardReport Board => Check.Boards[0];

    /// <summary>Name of the channel's derating table.</summary>
    public string Derating => Board.Channels.FirstOrDefault(c => c.Channel == Channel)?.Derating ?? Board.Derating;

    /// <summary>Worst verdict of the findings shown.</summary>
    public Verdict Verdict => FindingSeverity.WorstOf(Workings.Select(w => w.Finding.Verdict));

    /// <summary>Values of the channel that no table gave.</summary>
    public IReadOnlyList<AssumedValue> Assumed => [.. Board.Assumed.Where(a => a.Channels.Contains(Channel))];
}

/// <summary>Which findings of a channel are asked for.</summary>
/// <param name="Channel">The channel's name, compared without regard to case.</param>
/// <param name="Rule">A rule's identifier; null: every rule.</param>
/// <param name="Reference">A reference; null: all.</param>
public sealed record WorkingSelection(string Channel, string? Rule, string? Reference)
{
    /// <summary>
    /// The findings, worst first: of the rule and the reference asked for; where neither is, the worst of each rule.
    /// </summary>
    /// <param name="board">The judged board.</param>
    /// <param name="fault">What is not there, naming what is; null: nothing is amiss.</param>
    public IReadOnlyList<Finding> Of(BoardReport board, out string? fault)
    {
        ArgumentNullException.ThrowIfNull(board);
        fault = null;
        if (Name(board) is not { } channel)
        {
            fault = board.ChannelsNotFitted.FirstOrDefault(c => Same(c, Channel)) is { } absent
                ? $"{absent} is not fitted in assembly {board.Assembly}: there is nothing to derive."
                : $"there is no channel \"{Channel}\"; the channels are {string.Join(", ", board.Channels.Select(c => c.Channel).Concat(board.ChannelsNotFitted))}.";
            return [];
        }

        List<Finding> all = [.. FindingOrder.WorstFirst(board).Where(f => f.Channel == channel || (f.Channel is null && f.Channels?.Contains(channel) == true))];
        List<Finding> asked = [.. all.Where(f => Rule is null || Same(f.Rule, Rule)).Where(f => Reference is null || References(f).Any(r => Same(r, Reference)))];
        if (asked.Count > 0)
        {
            return Rule is null && Reference is null ? [.. asked.DistinctBy(f => f.Rule)] : asked;
        }

        string rules = string.Join(", ", all.Select(f => f.Rule).Distinct().OrderBy(RuleBook.Position));

        // A bill line serves other channels, too: what this one has is what its own findings are about.
        List<string> own = [.. all.Select(f => f.Reference).OfType<string>()];
        string references = string.Join(", ", (own.Count > 0 ? own : all.SelectMany(References)).Distinct(StringComparer.Ordinal).Order(NaturalOrder.Instance));
        fault = (Rule, Reference) switch
        {
            ({ } rule, _) when !all.Any(f => Same(f.Rule, rule)) => $"there is no finding of a rule \"{rule}\" in {channel}; its rules are {rules}.",
            (_, { } reference) when !all.Any(f => References(f).Any(r => Same(r, reference))) =>
                $"there is no finding about \"{reference}\" in {channel}; its references are {references}.",
            ({ } rule, { } reference) =>
                $"the rule {rule} says nothing of {reference} in {channel}; it speaks of {Spoken(all, rule)}.",
            _ => $"there is no finding in {channel}.",
        };
        return [];
    }

    /// <summary>The channel's name as the board writes it; null: there is none.</summary>
    public string? Name(BoardReport board)
    {
        ArgumentNullException.ThrowIfNull(board);
        return board.Channels.FirstOrDefault(c => c.Channel == Channel)?.Channel ?? board.Channels.FirstOrDefault(c => Same(c.Channel, Channel))?.Channel;
    }

    private static IEnumerable<string> References(Finding finding) => finding.References ?? (finding.Reference is { } one ? [one] : []);

    private static string Spoken(List<Finding> all, string rule)
    {
        string[] references = [.. all.Where(f => Same(f.Rule, rule)).SelectMany(References).Distinct(StringComparer.Ordinal).Order(NaturalOrder.Instance)];
        return references.Length == 0 ? "the channel as a whole" : string.Join(", ", references);
    }

    private static bool Same(string one, string other) => string.Equals(one, other, StringComparison.OrdinalIgnoreCase);
}
