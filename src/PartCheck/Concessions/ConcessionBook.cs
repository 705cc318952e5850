using System.Globalization;
using PartCheck.Bills;
using PartCheck.Rules;

namespace PartCheck.Concessions;

/// <summary>
/// The concessions of one board on one day. A nonconforming finding that one in force concerns becomes a concession; nothing else
/// does, least of all what is not verified. Every reading of the bill is covered by itself, so that a concession for one alternate
/// hides nothing of another. A concession that names no part number was accepted for the parts of the bill: it does not cover what
/// other parts, asked for in their place, do; and no concession covers what such parts make worse elsewhere.
/// </summary>
public sealed class ConcessionBook
{
    private readonly IReadOnlyList<Concession> concessions;
    private readonly DateOnly date;
    private readonly IReadOnlySet<string> changed;
    private readonly IReadOnlySet<string> changedChannels;
    private readonly HashSet<Concession> applied = new(ReferenceEqualityComparer.Instance);
    private readonly HashSet<Concession> refused = new(ReferenceEqualityComparer.Instance);
    private readonly HashSet<Concession> outgrown = new(ReferenceEqualityComparer.Instance);
    private readonly Dictionary<Concession, Verdict> met = new(ReferenceEqualityComparer.Instance);

    /// <summary>Makes the book.</summary>
    /// <param name="concessions">Concessions of the board.</param>
    /// <param name="date">The day they are held against.</param>
    /// <param name="changed">References that carry another part than the bill says.</param>
    /// <param name="changedChannels">Channels that such references serve.</param>
    public ConcessionBook(
        IReadOnlyList<Concession> concessions, DateOnly date, IReadOnlySet<string> changed, IReadOnlySet<string> changedChannels)
    {
        ArgumentNullException.ThrowIfNull(concessions);
        this.concessions = concessions;
        this.date = date;
        this.changed = changed;
        this.changedChannels = changedChannels;
    }

    /// <summary>Findings of the board as the bill stands, where other parts are asked for; null: none are.</summary>
    public IReadOnlyList<Finding>? Before { get; init; }

    /// <summary>Concessions that hold for a board.</summary>
    /// <param name="concessions">Concessions of any board.</param>
    /// <param name="names">Names that the board goes by.</param>
    public static IReadOnlyList<Concession> Of(IEnumerable<Concession> concessions, IReadOnlyList<string> names) =>
        [.. concessions.Where(c => c.Board is null || names.Contains(c.Board, StringComparer.OrdinalIgnoreCase))];

    /// <summary>A reading with its concessions.</summary>
    public ReadingJudgement Apply(ReadingJudgement reading)
    {
        ArgumentNullException.ThrowIfNull(reading);
        return reading with { Findings = [.. reading.Findings.Select(Apply)] };
    }

    /// <summary>A finding with its concession, where one in force concerns it.</summary>
    public Finding Apply(Finding finding)
    {
        ArgumentNullException.ThrowIfNull(finding);
        Concession? granted = null;
        foreach (Concession concession in concessions.Where(c => c.Concerns(finding)))
        {
            met[concession] = met.TryGetValue(concession, out Verdict before) && FindingSeverity.Rank(before) > FindingSeverity.Rank(finding.Verdict) ? before : finding.Verdict;
            if (finding.Verdict != Verdict.Nonconforming || date < concession.Granted.Date || date > concession.Granted.Expires)
            {
                continue;
            }

            if (concession.PartNumber is null && OfOtherParts(finding, byChannel: true))
            {
                refused.Add(concession);
                continue;
            }

            if (!OfOtherParts(finding, byChannel: false) && IsWorse(finding))
            {
                outgrown.Add(concession);
                continue;
            }

            applied.Add(concession);
            granted ??= concession;
        }

        return granted is null ? finding : finding with { Verdict = Verdict.Concession, Concession = granted.Granted };
    }

    /// <summary>What is to be said of concessions that covered nothing: one sentence each, with its cell.</summary>
    public IReadOnlyList<string> Remarks => [.. concessions.Where(c => !applied.Contains(c)).Select(c => $"Concession for {c.Subject} ({c.Granted.Cell}): {Why(c)}")];

    private string Why(Concession concession)
    {
        string Day(DateOnly day) => day.ToString(ConcessionReader.DateForm, CultureInfo.InvariantCulture);
        if (date > concession.Granted.Expires)
        {
            return $"expired on {Day(concession.Granted.Expires)}, not applied.";
        }

        if (date < concession.Granted.Date)
        {
            return $"in force from {Day(concession.Granted.Date)} only, not applied.";
        }

        if (refused.Contains(concession))
        {
            return "accepted for the part of the bill, not for the one in its place: not applied.";
        }

        if (outgrown.Contains(concession))
        {
            return "accepted for the board as its bill stands; with the change it is worse: not applied.";
        }

        return met.TryGetValue(concession, out Verdict verdict)
            ? verdict == Verdict.NotVerified ? "what it concerns is not verified, which a concession never covers." : "not needed, what it concerns conforms."
            : "concerns no finding of this board.";
    }

    /// <summary>True where the finding was no concession before the change, or its ratio has grown by it.</summary>
    private bool IsWorse(Finding finding)
    {
        if (Before is null)
        {
            return false;
        }

        Finding? before = Before.FirstOrDefault(b =>
            b.Verdict == Verdict.Concession && b.Rule == finding.Rule && b.Channel == finding.Channel && b.Reference == finding.Reference && b.Pin == finding.Pin
            && (b.References ?? []).SequenceEqual(finding.References ?? []));
        return before is null || (before.StressRatio is { } was && !(finding.StressRatio <= was * (1 + 1e-9)));
    }

    private bool OfOtherParts(Finding finding, bool byChannel) =>
        finding.Reference is { } reference ? IsChanged(reference)
        : finding.References is { } all ? all.Any(IsChanged)
        : !byChannel ? false
        : finding.Channel is { } channel ? changedChannels.Contains(channel)
        : finding.Channels?.Any(changedChannels.Contains) == true;

    /// <summary>A package is replaced as a whole, whether the bill names it or its elements.</summary>
    private bool IsChanged(string reference) => changed.Contains(reference) || changed.Contains(ElementReference.PackageOf(reference));
}
