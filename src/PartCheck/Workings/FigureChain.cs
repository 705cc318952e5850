using System.Globalization;
using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>
/// Works lines out twice: from the printed figures, which is what a working shows, and unrounded, which must be what the solver and the rule
/// said. The two may differ by what the rounding of the figures before them allows, and by no more.
/// </summary>
internal sealed class FigureChain
{
    private readonly Dictionary<string, Entry> entries = new(StringComparer.Ordinal);

    /// <summary>Works a line out; those that its formulas name must have been.</summary>
    /// <exception cref="NotReproducedException">A figure is off by more than rounding, or a balance does not balance.</exception>
    public WorkingLine Take(DerivationLine line)
    {
        switch (line.Kind)
        {
            case DerivationKind.Given:
            case DerivationKind.Solved:
                PrintedFigure figure = PrintedFigure.Of(line.Value, line.Unit);
                entries[line.Symbol] = new Entry(line.Value, figure.Value, Math.Max(figure.Half, 1e-15 * Math.Abs(line.Value)), figure.Text);
                return new WorkingLine { Line = line, Figure = figure };
            case DerivationKind.Step:
                Side side = Worked(line.Formula, line.Unit, line.Symbol);
                entries[line.Symbol] = new Entry(side.Exact, side.Figure.Value, side.Slack, side.Figure.Text);
                return new WorkingLine { Line = line, Figure = side.Figure, Numbers = side.Numbers, Unrounded = Differing(side, line.Unit) };
            case DerivationKind.Balance:
                Side left = Worked(line.Formula, line.Unit, line.Meaning);
                Side right = Worked(line.Right, line.Unit, line.Meaning);
                HoldBalance(line, left, right);
                return new WorkingLine
                {
                    Line = line,
                    Figure = left.Figure,
                    Numbers = left.Numbers,
                    RightFigure = right.Figure,
                    RightNumbers = right.Numbers,
                };
            default:
                return new WorkingLine { Line = line };
        }
    }

    /// <summary>Holds the unrounded value of a symbol to what the solver or the rule said.</summary>
    /// <param name="symbol">The symbol.</param>
    /// <param name="said">What was said, SI; degrees Celsius where the symbol is.</param>
    /// <param name="scale">Magnitude of what the value was made of, where it is a difference.</param>
    public void Hold(string symbol, double said, double scale = 0)
    {
        if (entries.TryGetValue(symbol, out Entry entry) && !(Math.Abs(entry.Exact - said) <= 1e-6 * Math.Max(Math.Max(Math.Abs(said), scale), 1e-9)))
        {
            throw new NotReproducedException(string.Create(CultureInfo.InvariantCulture, $"The working of {symbol} comes to {entry.Exact:R}, the solver said {said:R}."));
        }
    }

    private static PrintedFigure? Differing(in Side side, string unit) =>
        PrintedFigure.Of(side.Exact, unit) is { } unrounded && unrounded.Text != side.Figure.Text ? unrounded : null;

    /// <summary>Currents balance to 1 ppm of what flows (1 nA where nothing does), voltages to 2 uV, which the neglected reverse currents stay under.</summary>
    private static void HoldBalance(DerivationLine line, in Side left, in Side right)
    {
        double allowed = line.Unit == "V" ? 2e-6 : line.Unit == "A" ? 1e-9 + (1e-6 * Math.Abs(left.Exact)) : 1e-6 * Math.Abs(left.Exact);
        if (!(Math.Abs(left.Exact - right.Exact) <= allowed))
        {
            throw new NotReproducedException(string.Create(
                CultureInfo.InvariantCulture, $"{line.Meaning}: {line.Formula} comes to {left.Exact:R}, {line.Right} to {right.Exact:R}."));
        }
    }

    private Side Worked(string text, string unit, string name)
    {
        Formula formula = Formula.Parse(text);
        double exact = formula.Evaluate(s => entries[s].Exact);
        double printed = formula.Evaluate(s => entries[s].Printed);
        if (!double.IsFinite(exact) || !double.IsFinite(printed))
        {
            throw new NotReproducedException($"{name}: {text} has no value.");
        }

        double noise = 0;
        double spread = 0;
        foreach (string symbol in formula.Symbols)
        {
            Entry moved = entries[symbol];
            double Shifted(double by) => formula.Evaluate(s => s == symbol ? moved.Printed + by : entries[s].Printed);
            double most = Math.Max(Math.Abs(Shifted(moved.Slack) - printed), Math.Abs(Shifted(-moved.Slack) - printed));

            // Where a shift has no value (the logarithm of nothing) the figure may be anything.
            spread += double.IsFinite(most) ? 1.1 * most : double.PositiveInfinity;
            noise += Math.Abs(Shifted(1e-13 * Math.Abs(moved.Printed)) - printed);
        }

        // A sum that cancels to the last bit is nothing, as a calculator shows it.
        PrintedFigure figure = PrintedFigure.Of(Math.Abs(printed) <= noise ? 0 : printed, unit);

        // Double precision, and what the slopes leave out.
        double slack = figure.Half + spread + noise + (1e-9 * Math.Abs(printed));
        if (!(Math.Abs(exact - figure.Value) <= slack))
        {
            throw new NotReproducedException(string.Create(
                CultureInfo.InvariantCulture, $"{name}: {text} comes to {figure.Text} from the printed figures and to {exact:R} unrounded, more apart than {slack:R}."));
        }

        return new Side(exact, figure, slack, formula.With(s => entries[s].Text));
    }

    private readonly record struct Entry(double Exact, double Printed, double Slack, string Text);

    private readonly record struct Side(double Exact, PrintedFigure Figure, double Slack, string Numbers);
}
