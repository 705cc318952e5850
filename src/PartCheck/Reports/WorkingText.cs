using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using PartCheck.OperatingPoints;
using PartCheck.Rules;
using PartCheck.Workings;

namespace PartCheck.Reports;

/// <summary>
/// Workings for a person with a calculator, 80 columns: what is given with its cells, what the solve found, each step as symbol = formula =
/// figures = result, and the equations that the solved figures satisfy.
/// </summary>
public sealed partial class WorkingText
{
    private const int SymbolWidth = 10;
    private const int ValueWidth = 15;
    private const int Equation = 6;
    private readonly StringBuilder text = new();
    private readonly List<(SolvedState State, string Where)> shown = [];
    private readonly WorkingReport report;
    private readonly Dictionary<string, string> names = new(StringComparer.Ordinal);

    private WorkingText(WorkingReport report)
    {
        this.report = report;
        foreach (IGrouping<string, InputFile> file in report.Check.Inputs.GroupBy(i => i.File.Split('/', '\\')[^1], StringComparer.OrdinalIgnoreCase).Where(g => g.Count() == 1))
        {
            names[file.First().File] = file.Key;
        }
    }

    /// <summary>Writes the workings.</summary>
    public static string Write(WorkingReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        return new WorkingText(report).Written();
    }

    private string Written()
    {
        Columns80.Wrap(text, string.Empty, $"{report.Board.Board} {report.Channel}: workings (derating: {report.Derating})", 2);
        if (report.Board.DeratingNote is { } note)
        {
            Columns80.Wrap(text, "  ", note, 2);
        }

        Columns80.Wrap(text, string.Empty, "Each result is made of the figures as printed; the solver works unrounded. Cells are of " + string.Join(", ", report.Check.Inputs.Select(i => i.File)) + ".", 2);
        text.Append('\n');
        foreach (Working working in report.Workings)
        {
            One(working);
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

        ComplaintText.Append(text, report.Check.Complaints);
        foreach (string caution in report.Board.Cautions)
        {
            Columns80.Wrap(text, "! ", caution, 2);
        }

        return text.ToString();
    }

    private void One(Working working)
    {
        Finding f = working.Finding;
        string whom = TextReport.Joined(" ", f.Channel, f.Rule, FindingText.Subject([f]));
        string missing = f.Missing.Count > 0 ? "missing " + string.Join(", ", f.Missing) : string.Empty;
        Columns80.Wrap(text, string.Empty, $"{whom}: {VerdictWords.Of(f.Verdict).ToUpperInvariant()}" + Led("; ", TextReport.Joined("; ", FindingText.Numbers(f), f.Text, missing)), 2);
        foreach (string beside in (string[])[FindingText.Mix(f), FindingText.Accepted(f)])
        {
            if (beside.Length > 0)
            {
                Columns80.Wrap(text, "  ", beside, 4);
            }
        }

        if (FindingText.Corner(f) is { Length: > 0 } corner)
        {
            Columns80.Wrap(text, "  ", corner, 4);
        }

        if (working.Lines.Count == 0)
        {
            text.Append("  There is nothing to work out.\n\n");
            return;
        }

        Block(working.Lines, [working.Actual, working.Allowed, working.Ratio]);
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
            else if (report.EveryCheck || shown.Count == 0)
            {
                shown.Add((basis.State, whom));
                text.Append("  Check: the solved figures satisfy the circuit\n");
                Block(working.Checks, []);
            }
            else
            {
                Columns80.Wrap(text, "  ", $"With --rule {f.Rule} the solved figures are checked, too.", 4);
            }
        }

        text.Append('\n');
    }

    private static string Led(string before, string text) => text.Length == 0 ? string.Empty : before + text;

    private void Block(IReadOnlyList<WorkingLine> lines, IReadOnlyList<string?> judged)
    {
        Figures("Given", lines.Where(l => l.Line.Kind == DerivationKind.Given));
        Figures("Solved", lines.Where(l => l.Line.Kind == DerivationKind.Solved));
        foreach (WorkingLine line in lines)
        {
            switch (line.Line.Kind)
            {
                case DerivationKind.Step:
                    Step(line, judged.Contains(line.Line.Symbol));
                    break;
                case DerivationKind.Balance:
                    Balance(line);
                    break;
                case DerivationKind.Note:
                    Columns80.Wrap(text, "  ", Meaning(line) + From(line), 4);
                    break;
            }
        }
    }

    private void Figures(string title, IEnumerable<WorkingLine> lines)
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
            Columns80.Wrap(text, beginning, line.Line.Meaning + From(line), SymbolWidth + ValueWidth + 6);
        }
    }

    /// <summary>Symbol = formula = figures = result, on as many lines as it needs; each begins with the symbol or an equals sign.</summary>
    private void Step(WorkingLine line, bool judged)
    {
        Columns80.Wrap(text, "  ", Meaning(line) + From(line), 4);
        string result = line.Figure!.Value.Text + (judged && line.Unrounded is { } u ? $" (unrounded {u.Text})" : string.Empty);
        List<string> sides = [line.Line.Formula];
        if (line.Numbers != line.Line.Formula && line.Numbers != line.Figure!.Value.Text)
        {
            sides.Add(line.Numbers!);
        }

        sides.Add(result);
        string whole = Glued($"{line.Line.Symbol} = {string.Join(" = ", sides)}");
        if (Columns80.Width - Equation >= whole.Length)
        {
            Columns80.Wrap(text, new string(' ', Equation), whole, Equation + 2);
            return;
        }

        string next = new(' ', Equation + line.Line.Symbol.Length + 1);
        for (int i = 0; i < sides.Count; i++)
        {
            string side = Glued("= " + sides[i]);
            if (i == 1 && sides.Count == 3 && next.Length + side.Length + 3 + sides[2].Length <= Columns80.Width)
            {
                side += Glued(" = " + sides[++i]);
            }

            Columns80.Wrap(text, i == 0 ? new string(' ', Equation) + line.Line.Symbol + " " : next, side, next.Length + 2);
        }
    }

    private void Balance(WorkingLine line)
    {
        Columns80.Wrap(text, "  ", Meaning(line), 4);
        Columns80.Wrap(text, new string(' ', Equation), $"{line.Line.Formula} = {line.Line.Right}", Equation + 2);
        Columns80.Wrap(text, new string(' ', Equation), Glued("left: " + Side(line.Numbers, line.Figure)), Equation + 2);
        Columns80.Wrap(text, new string(' ', Equation), Glued("right: " + Side(line.RightNumbers, line.RightFigure)), Equation + 2);
    }

    private static string Side(string? numbers, PrintedFigure? figure) => numbers == figure?.Text ? numbers! : $"{numbers} = {figure?.Text}";

    private static string Meaning(WorkingLine line) => char.ToUpperInvariant(line.Line.Meaning[0]) + line.Line.Meaning[1..];

    private string From(WorkingLine line)
    {
        string from = TextReport.Joined("; ", line.Line.Assumed ? "assumed" : null, Short(line.Line.Cell), line.Line.Source);
        return from.Length == 0 ? string.Empty : $" [{from}]";
    }

    /// <summary>A cell by its file's bare name, where no other input has that name.</summary>
    private string? Short(string? cell) =>
        cell?.IndexOf('!', StringComparison.Ordinal) is > 0 and int mark && names.TryGetValue(cell[..mark], out string? name) ? name + cell[mark..] : cell;

    /// <summary>A number and its unit stay on one line.</summary>
    private static string Glued(string text) => NumberAndUnit().Replace(text, Columns80.Glue.ToString());

    [GeneratedRegex(@"(?<=[0-9]) (?=%|[A-Za-wyz])")]
    private static partial Regex NumberAndUnit();
}
