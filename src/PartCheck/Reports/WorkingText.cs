using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using PartCheck.Rules;
using PartCheck.Workings;

namespace PartCheck.Reports;

/// <summary>
/// Workings for a person with a calculator, 80 columns: what is given with its cells, what the solve found, each step as symbol = formula =
/// figures = result, and the equations that the solved figures satisfy.
/// </summary>
public static partial class WorkingText
{
    private const int SymbolWidth = 10;
    private const int ValueWidth = 15;

    /// <summary>Writes the workings.</summary>
    public static string Write(WorkingReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        StringBuilder text = new();
        Columns80.Wrap(text, string.Empty, $"{report.Board.Board} {report.Channel}: workings (derating: {report.Board.Channels.FirstOrDefault(c => c.Channel == report.Channel)?.Derating ?? report.Board.Derating})", 2);
        if (report.Board.DeratingNote is { } note)
        {
            Columns80.Wrap(text, "  ", note, 2);
        }

        Columns80.Wrap(text, string.Empty, "Each result is made of the figures as printed; the solver works unrounded.", 2);
        text.Append('\n');
        List<(OperatingPoints.SolvedState State, string Where)> shown = [];
        foreach (Working working in report.Workings)
        {
            One(text, working, shown);
        }

        if (report.Assumed.Count > 0)
        {
            text.Append("Assumed\n");
            foreach (AssumedValue a in report.Assumed)
            {
                Columns80.Wrap(text, "  ", $"{a.What} of {a.Of}: {a.Value}", 4);
            }

            text.Append('\n');
        }

        TextReport.Complaints(text, report.Check.Complaints);
        foreach (string caution in report.Board.Cautions)
        {
            Columns80.Wrap(text, "! ", caution, 2);
        }

        return text.ToString();
    }

    private static void One(StringBuilder text, Working working, List<(OperatingPoints.SolvedState State, string Where)> shown)
    {
        Finding f = working.Finding;
        string whom = TextReport.Joined(" ", f.Channel, f.Rule, FindingText.Subject([f]));
        string missing = f.Missing.Count > 0 ? "missing " + string.Join(", ", f.Missing) : string.Empty;
        Columns80.Wrap(text, string.Empty, $"{whom}: {VerdictWords.Of(f.Verdict).ToUpperInvariant()}" + Led("; ", TextReport.Joined("; ", FindingText.Numbers(f), f.Text, missing)), 2);
        if (FindingText.Corner(f) is { Length: > 0 } corner)
        {
            Columns80.Wrap(text, "  ", corner, 4);
        }

        if (working.Lines.Count == 0)
        {
            text.Append("  There is nothing to work out.\n\n");
            return;
        }

        Block(text, working.Lines);
        if (f.Verdict != Verdict.NotVerified && working.Of(working.Ratio) is { } ratio && (ratio.Value <= 1) != (f.Verdict == Verdict.Conforms))
        {
            Columns80.Wrap(text, "  ", string.Create(CultureInfo.InvariantCulture, $"Unrounded the ratio is {f.StressRatio:R}: {VerdictWords.Of(f.Verdict)}."), 4);
        }

        if (working.Checks.Count > 0 && f.Basis is { } basis)
        {
            if (shown.Find(s => ReferenceEquals(s.State, basis.State)) is { Where: { } where })
            {
                Columns80.Wrap(text, "  ", $"The solved figures are those of {where} above, where they are checked.", 4);
            }
            else
            {
                shown.Add((basis.State, whom));
                text.Append("  Check: the solved figures satisfy the circuit\n");
                Block(text, working.Checks);
            }
        }

        text.Append('\n');
    }

    private static string Led(string before, string text) => text.Length == 0 ? string.Empty : before + text;

    private static void Block(StringBuilder text, IReadOnlyList<WorkingLine> lines)
    {
        Figures(text, "Given", lines.Where(l => l.Line.Kind == DerivationKind.Given));
        Figures(text, "Solved", lines.Where(l => l.Line.Kind == DerivationKind.Solved));
        foreach (WorkingLine line in lines)
        {
            switch (line.Line.Kind)
            {
                case DerivationKind.Step:
                    Step(text, line);
                    break;
                case DerivationKind.Balance:
                    Balance(text, line);
                    break;
                case DerivationKind.Note:
                    Columns80.Wrap(text, "  ", Meaning(line) + From(line), 4);
                    break;
            }
        }
    }

    private static void Figures(StringBuilder text, string title, IEnumerable<WorkingLine> lines)
    {
        bool first = true;
        foreach (WorkingLine line in lines)
        {
            if (first)
            {
                text.Append("  ").Append(title).Append('\n');
                first = false;
            }

            string beginning = "    " + line.Line.Symbol.PadRight(SymbolWidth) + " " + line.Figure!.Value.Text.PadRight(ValueWidth) + " ";
            Columns80.Wrap(text, beginning.Replace(' ', Columns80.Glue), line.Line.Meaning + From(line), SymbolWidth + ValueWidth + 6);
        }
    }

    private static void Step(StringBuilder text, WorkingLine line)
    {
        Columns80.Wrap(text, "  ", Meaning(line) + From(line), 4);
        string unrounded = line.Unrounded is { } u ? $" (unrounded {u.Text})" : string.Empty;
        string formula = line.Line.Formula == line.Numbers ? string.Empty : $" = {line.Numbers}";
        Columns80.Wrap(text, "      ", Glued($"{line.Line.Symbol} = {line.Line.Formula}{formula} = {line.Figure!.Value.Text}{unrounded}"), 8);
    }

    private static void Balance(StringBuilder text, WorkingLine line)
    {
        Columns80.Wrap(text, "  ", Meaning(line), 4);
        Columns80.Wrap(text, "      ", $"{line.Line.Formula} = {line.Line.Right}", 8);
        Columns80.Wrap(text, "      ", Glued($"left: {line.Numbers} = {line.Figure!.Value.Text}"), 8);
        Columns80.Wrap(text, "      ", Glued($"right: {line.RightNumbers} = {line.RightFigure!.Value.Text}"), 8);
    }

    private static string Meaning(WorkingLine line) => char.ToUpperInvariant(line.Line.Meaning[0]) + line.Line.Meaning[1..];

    private static string From(WorkingLine line)
    {
        string from = TextReport.Joined("; ", line.Line.Assumed ? "assumed" : null, line.Line.Cell, line.Line.Source);
        return from.Length == 0 ? string.Empty : $" [{from}]";
    }

    /// <summary>A number and its unit stay on one line.</summary>
    private static string Glued(string text) => NumberAndUnit().Replace(text, Columns80.Glue.ToString());

    [GeneratedRegex(@"(?<=[0-9]) (?=%|[A-Za-wyz])")]
    private static partial Regex NumberAndUnit();
}
