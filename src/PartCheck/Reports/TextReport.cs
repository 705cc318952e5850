using System.Globalization;
using System.Text;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Sheets;

namespace PartCheck.Reports;

/// <summary>The report for a person at a terminal: 80 columns, worst first.</summary>
public static class TextReport
{
    private const int Closest = 3;

    /// <summary>Writes a report.</summary>
    /// <param name="report">What a run found.</param>
    /// <param name="colour">True: verdict words are coloured (ANSI).</param>
    public static string Write(CheckReport report, bool colour)
    {
        ArgumentNullException.ThrowIfNull(report);
        StringBuilder text = new();
        foreach (BoardReport board in report.Boards)
        {
            Board(text, board with { Findings = FindingOrder.WorstFirst(board) });
        }

        ComplaintText.Append(text, report.Complaints);
        foreach (string caution in report.Boards.SelectMany(b => b.Cautions).Distinct(StringComparer.Ordinal))
        {
            Columns80.Wrap(text, "! ", caution, 2);
        }

        return colour ? Coloured(text.ToString()) : text.ToString();
    }

    private static void Board(StringBuilder text, BoardReport board)
    {
        if (board.Comparison is { } comparison)
        {
            ComparisonText.Write(text, comparison);
        }

        Columns80.Wrap(text, string.Empty, $"{board.Board}: {VerdictWords.Of(board.Verdict).ToUpperInvariant()} (derating: {board.Derating}{(board.Assembly is { } a ? "; assembly: " + a : string.Empty)}{AsOf(board)})", 2);
        if (board.DeratingNote is { } note)
        {
            Columns80.Wrap(text, "  ", note, 2);
        }

        if (board.ChannelsNotFitted.Count > 0)
        {
            Columns80.Wrap(text, "  ", $"Not fitted in this assembly, not judged: {string.Join(", ", board.ChannelsNotFitted)}", 4);
        }

        text.Append('\n');
        if (board.Channels.Count == 0)
        {
            text.Append(board.ChannelsNotFitted.Count > 0 ? "  No channel is fitted in this assembly.\n\n" : "  Nothing could be judged: see the complaints.\n\n");
            return;
        }

        Nonconforming(text, board.Findings.Where(f => f.Verdict == Verdict.Nonconforming));
        NotVerified(text, board.Findings.Where(f => f.Verdict == Verdict.NotVerified));
        UnderConcession(text, board.Findings.Where(f => f.Verdict == Verdict.Concession));
        Channels(text, board);
        Conforming(text, board);
        Bench(text, board);
        if (board.Totals is { } totals)
        {
            Totals(text, totals);
        }

        Columns80.Wrap(text, string.Empty, "Rules judged: " + string.Join(", ", board.Rules) + ".", 2);
        if (board.RulesNotJudged.Count > 0)
        {
            Columns80.Wrap(text, string.Empty, "Not judged by this version: " + string.Join(", ", board.RulesNotJudged) + ".", 2);
        }

        int solved = board.Channels.Sum(c => c.CornersSolved);
        int gaveUp = board.Channels.Sum(c => c.NotSolved);
        Columns80.Wrap(text, string.Empty, string.Create(CultureInfo.InvariantCulture, $"Corners solved: {solved}; given up: {gaveUp}."), 2);
        text.Append('\n');
        Listed(text, "Assumed", board.Assumed.Select(a => $"{a.What} of {a.Of}: {a.Value}" + Used(a, board)));
        Listed(text, "Advice", board.Advice.Select(a => Joined(" ", a.Channel, a.Reference) is { Length: > 0 } whom ? whom + ": " + a.Text : a.Text));
    }

    private static void Nonconforming(StringBuilder text, IEnumerable<Finding> findings)
    {
        IReadOnlyList<IReadOnlyList<Finding>> groups = FindingText.Grouped(findings);
        if (groups.Count == 0)
        {
            return;
        }

        text.Append("Nonconforming\n");
        foreach (IReadOnlyList<Finding> group in groups)
        {
            Finding f = group[0];
            Columns80.Wrap(text, "  ", Head(group) + ": " + Joined("; ", FindingText.Numbers(f), f.Text), 4);
            if (FindingText.Mix(f) is { Length: > 0 } mix)
            {
                Columns80.Wrap(text, "    ", mix, 6);
            }

            if (FindingText.Corner(f) is { Length: > 0 } corner)
            {
                Columns80.Wrap(text, "    ", corner, 6);
            }

            if (f.Cell is not null)
            {
                Columns80.Wrap(text, "    ", $"limit from {f.Cell}; {f.Source}", 6);
            }
        }

        text.Append('\n');
    }

    private static void NotVerified(StringBuilder text, IEnumerable<Finding> findings)
    {
        IReadOnlyList<IReadOnlyList<Finding>> groups = FindingText.GroupedByGap(findings);
        if (groups.Count == 0)
        {
            return;
        }

        text.Append("Not verified\n");
        foreach (IReadOnlyList<Finding> group in groups)
        {
            string rules = string.Join(", ", group.Select(f => f.Rule).Distinct(StringComparer.Ordinal));
            string head = Joined(" ", group[0].Channel, rules, FindingText.Subject(group));
            Columns80.Wrap(text, "  ", head + ": missing " + Joined("; ", string.Join(", ", group[0].Missing), group[0].Text), 4);
        }

        text.Append('\n');
    }

    private static void UnderConcession(StringBuilder text, IEnumerable<Finding> findings)
    {
        IReadOnlyList<IReadOnlyList<Finding>> groups = FindingText.Grouped(findings);
        if (groups.Count == 0)
        {
            return;
        }

        text.Append("Concession\n");
        foreach (IReadOnlyList<Finding> group in groups)
        {
            Finding f = group[0];
            Columns80.Wrap(text, "  ", Head(group) + ": " + Joined("; ", FindingText.Numbers(f), f.Text), 4);
            if (FindingText.Mix(f) is { Length: > 0 } mix)
            {
                Columns80.Wrap(text, "    ", mix, 6);
            }

            Columns80.Wrap(text, "    ", FindingText.Accepted(f), 6);
        }

        text.Append('\n');
    }

    private static string AsOf(BoardReport board) => board.ConcessionsAsOf is { } day ? "; concessions as of " + FindingText.Day(day) : string.Empty;

    private static string Head(IReadOnlyList<Finding> group) => Joined(" ", group[0].Channel, group[0].Rule, FindingText.Subject(group));

    internal static string Joined(string between, params string?[] parts) => string.Join(between, parts.Where(p => !string.IsNullOrEmpty(p)));

    private static void Channels(StringBuilder text, BoardReport board)
    {
        text.Append("Channels\n");
        int width = Math.Min(20, board.Channels.Max(c => c.Channel.Length));
        foreach (ChannelJudgement c in board.Channels)
        {
            string current = c.LoadCurrent is { } i
                ? $"{FindingText.Value(i.Min, "A", 3)} .. {FindingText.Value(i.Nominal, "A", 3)} .. {FindingText.Value(i.Max, "A", 3)}"
                : "not solved";
            string word = VerdictWords.Of(c.Verdict);
            string table = c.Derating == board.Derating ? string.Empty : $" (derating {c.Derating})";
            Columns80.Wrap(text, $"  {c.Channel.PadRight(width)} {word.PadRight(13)} ", current + table + WorstOf(c, board), 4);
        }

        text.Append('\n');
    }

    private static void Bench(StringBuilder text, BoardReport board)
    {
        List<ChannelJudgement> solved = [.. board.Channels.Where(c => c.TestLimits is not null)];
        if (solved.Count == 0)
        {
            return;
        }

        text.Append("On the bench, at 25 degC and mean supply, a good channel measures\n");
        foreach (ChannelJudgement c in solved)
        {
            OperatingPoints.TestLimits l = c.TestLimits!;
            Columns80.Wrap(
                text, $"  {c.Channel} ",
                $"at {FindingText.Value(l.Supply, "V")}{Pulsed(c)}: load {Range(l.LoadCurrent, "A")}; sense {Range(l.SenseVoltage, "V")}; base {Range(l.BaseVoltage, "V")}; collector {Range(l.CollectorVoltage, "V")}",
                4);
        }

        text.Append('\n');
    }

    /// <summary>A channel that pulses is measured while on, and is as warm as its largest duty makes it.</summary>
    private static string Pulsed(ChannelJudgement c) => c.Reading is { Conditions.Duty: < 1 and var duty }
        ? string.Create(CultureInfo.InvariantCulture, $" while on, duty up to {duty * 100:0.###} %") : string.Empty;

    private static string Range(OperatingPoints.ValueRange range, string unit) =>
        $"{FindingText.Value(range.Min, unit, 3)} .. {FindingText.Value(range.Max, unit, 3)}";

    private static void Totals(StringBuilder text, BoardTotals totals)
    {
        if (totals.Hottest.Count == 0)
        {
            Columns80.Wrap(text, string.Empty, "Board: no channel was solved, so neither current nor heat is known.", 2);
            return;
        }

        string without = totals.Without.Count == 0 ? string.Empty : $" (without {string.Join(", ", totals.Without)})";
        Columns80.Wrap(
            text, string.Empty,
            $"Board{without}: load supplies {FindingText.Value(totals.SupplyMin, "A", 3)} .. {FindingText.Value(totals.SupplyMax, "A", 3)}; heat of its parts while on up to {FindingText.Value(totals.HeatMax, "W", 3)}; hottest "
            + string.Join(", ", totals.Hottest.Select(h => $"{h.Reference} {FindingText.Value(h.Tj, "K")}")) + ".",
            2);
    }

    private static string WorstOf(ChannelJudgement channel, BoardReport board)
    {
        Finding? worst = board.Findings.FirstOrDefault(f => f.Channel == channel.Channel || (f.Channel is null && f.Channels?.Contains(channel.Channel) == true));
        if (worst is null)
        {
            return string.Empty;
        }

        string ratio = FindingText.Ratio(worst) is { } r ? " " + r : string.Empty;
        return $"; {worst.Rule}{(worst.Reference is null ? string.Empty : " " + worst.Reference)}{ratio}";
    }

    private static void Conforming(StringBuilder text, BoardReport board)
    {
        List<Finding> conforming = [.. board.Findings.Where(f => f.Verdict == Verdict.Conforms)];
        text.Append(CultureInfo.InvariantCulture, $"Conforming findings: {conforming.Count}");
        List<Finding> measured = [.. conforming.Where(f => FindingOrder.Ratio(f) is not null)];
        text.Append(measured.Count > 0 ? "; the closest to their limits:\n" : ".\n");
        foreach (IReadOnlyList<Finding> group in FindingText.Grouped(measured).Take(Closest))
        {
            Finding f = group[0];
            Columns80.Wrap(text, "  ", Head(group) + ": " + FindingText.Numbers(f), 4);
        }

        text.Append('\n');
    }

    private static void Listed(StringBuilder text, string title, IEnumerable<string> items)
    {
        List<string> all = [.. items];
        if (all.Count == 0)
        {
            return;
        }

        text.Append(title).Append('\n');
        foreach (string item in all)
        {
            Columns80.Wrap(text, "  ", item, 4);
        }

        text.Append('\n');
    }

    private static string Used(AssumedValue value, BoardReport board) =>
        value.Channels.Count == board.Channels.Count && board.Channels.Count > 1 ? " (every channel)"
        : value.Channels.Count == 1 && value.Channels[0] == value.Of ? string.Empty
        : " (" + string.Join(", ", value.Channels) + ")";

    private static string Coloured(string text) => text
        .Replace("NONCONFORMING", "\u001b[31mNONCONFORMING\u001b[0m", StringComparison.Ordinal)
        .Replace("nonconforming", "\u001b[31mnonconforming\u001b[0m", StringComparison.Ordinal)
        .Replace("NOT VERIFIED", "\u001b[33mNOT VERIFIED\u001b[0m", StringComparison.Ordinal)
        .Replace("not verified", "\u001b[33mnot verified\u001b[0m", StringComparison.Ordinal);
}
