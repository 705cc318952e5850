using System.Text;
using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>A comparison in words: the answer first, then what changes.</summary>
internal static class ComparisonText
{
    /// <summary><c>Yes</c>, <c>No</c> or <c>Not verified</c>.</summary>
    internal static string Answer(Verdict answer) => answer switch
    {
        Verdict.Nonconforming => "No",
        Verdict.NotVerified => "Not verified",
        _ => "Yes",
    };

    internal static void Write(StringBuilder text, BoardComparison comparison)
    {
        Columns80.Wrap(text, string.Empty, $"{Answer(comparison.Answer)}: {comparison.Reason}", 2);
        text.Append('\n');
        Columns80.Wrap(text, string.Empty, $"Beside the bill as it stands ({VerdictWords.Of(comparison.Before)})", 2);
        foreach (PartChange change in comparison.Changes)
        {
            Columns80.Wrap(text, "  ", ComparisonAnswer.Words(change), 4);
        }

        foreach (ChannelShift channel in comparison.Channels)
        {
            string verdict = channel.Before == channel.After
                ? VerdictWords.Of(channel.After) + " as before" : $"{VerdictWords.Of(channel.Before)} -> {VerdictWords.Of(channel.After)}";
            string current = Current(channel.CurrentBefore) == Current(channel.CurrentAfter) ? string.Empty : $"; load {Current(channel.CurrentBefore)} -> {Current(channel.CurrentAfter)}";
            Columns80.Wrap(text, "  ", $"{channel.Channel}: {verdict}{current}", 4);
            List<string> rules = [.. channel.Rules.Where(r => Shown(r.Before) != Shown(r.After)).Select(r => $"{r.Rule} {Shown(r.Before)} -> {Shown(r.After)}".Replace(' ', Columns80.Glue))];
            if (rules.Count > 0)
            {
                Columns80.Wrap(text, "    ", string.Join("; ", rules), 4);
            }
        }

        if (comparison.Unchanged.Count > 0)
        {
            Columns80.Wrap(text, "  ", "As before: " + string.Join(", ", comparison.Unchanged), 4);
        }

        text.Append('\n');
    }

    private static string Shown(RuleStanding? standing)
    {
        if (standing is null)
        {
            return "none";
        }

        string? ratio = FindingText.Ratio(standing.StressRatio);
        return standing.Verdict == Verdict.Conforms && ratio is not null ? ratio : (ratio + " " + VerdictWords.Of(standing.Verdict)).TrimStart();
    }

    private static string Current(LoadCurrentRange? range) => range is null
        ? "not solved" : $"{FindingText.Value(range.Min, "A", 3)} .. {FindingText.Value(range.Nominal, "A", 3)} .. {FindingText.Value(range.Max, "A", 3)}";
}
