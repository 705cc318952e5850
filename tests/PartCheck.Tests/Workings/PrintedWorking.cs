using System.Text.RegularExpressions;
using Xunit;

namespace PartCheck.Tests.Workings;

/// <summary>
/// Goes through a printed text of workings as an auditor does: every result is calculated from the printed figures and must be the printed
/// result to its last digit; every formula must be its figures with the symbols in place; both sides of every balance must agree.
/// </summary>
internal sealed partial class PrintedWorking
{
    private readonly Dictionary<string, double> symbols = new(StringComparer.Ordinal);
    private string balance = string.Empty;
    private double left;
    private string leftText = string.Empty;

    /// <summary>Steps and balances gone through.</summary>
    public int Steps { get; private set; }

    /// <summary>Balances gone through.</summary>
    public int Balances { get; private set; }

    /// <summary>Follows a whole text.</summary>
    public static PrintedWorking Follow(string text)
    {
        PrintedWorking working = new();
        string? open = null;
        foreach (string line in text.Split('\n').Append(string.Empty))
        {
            Assert.InRange(line.Length, 0, 80);
            int indent = line.Length - line.TrimStart(' ').Length;
            if (open is not null && indent > 6)
            {
                open += " " + line.Trim();
                continue;
            }

            if (open is not null)
            {
                working.Equation(open);
            }

            open = indent == 6 ? line.Trim() : null;
            if (indent == 0)
            {
                working.symbols.Clear();
            }

            if (indent == 4 && Figure().Match(line) is { Success: true } figure)
            {
                working.symbols[figure.Groups[1].Value] = PrintedCalculator.Number(figure.Groups[2].Value);
            }
        }

        return working;
    }

    private void Equation(string text)
    {
        if (text.StartsWith("left: ", StringComparison.Ordinal))
        {
            leftText = text;
            left = SideOf(text[6..], balance.Split(" = ")[0]);
            return;
        }

        if (text.StartsWith("right: ", StringComparison.Ordinal))
        {
            double right = SideOf(text[7..], balance.Split(" = ")[1]);

            // Six figures of what is subtracted: volts agree to 50 uV, currents to a thousandth, 20 nA and 5 ppm of each term.
            double terms = Amperes().Matches(text + leftText).Sum(m => Math.Abs(PrintedCalculator.Number(m.Value)));
            double allowed = text.EndsWith('V') ? 50e-6 : (1e-3 * Math.Abs(left)) + (text.EndsWith('A') ? 2e-8 + (5e-6 * terms) : 0);
            Assert.True(Math.Abs(left - right) <= allowed, $"{balance}: {left} and {right}");
            Balances++;
            return;
        }

        string[] sides = [.. Unrounded().Replace(text, string.Empty).Split(" = ")];
        if (sides.Length == 2 && !StartsWithNumber(sides[1]))
        {
            balance = text;
            return;
        }

        Assert.InRange(sides.Length, 2, 4);
        double printed = PrintedCalculator.Number(sides[^1]);
        foreach (string side in sides[1..^1])
        {
            Same(PrintedCalculator.Evaluate(side, symbols), sides[^1], text);
        }

        symbols[sides[0]] = printed;
        Steps++;
    }

    private double SideOf(string text, string formula)
    {
        string[] sides = text.Split(" = ");
        Same(PrintedCalculator.Evaluate(sides[0], symbols), sides[^1], text);
        Same(PrintedCalculator.Evaluate(formula, symbols), sides[^1], formula + ": " + text);
        return PrintedCalculator.Number(sides[^1]);
    }

    /// <summary>Rounded to six significant digits (temperatures to 0.001 degC) a value is the printed one.</summary>
    private static void Same(double value, string printed, string where)
    {
        double shown = PrintedCalculator.Number(printed);
        double half = printed.EndsWith("degC", StringComparison.Ordinal) ? 0.5e-3
            : value == 0 ? 0 : 0.5 * Math.Pow(10, Math.Floor(Math.Log10(Math.Abs(value))) - 5);
        Assert.True(Math.Abs(value - shown) <= (shown == 0 ? 1e-15 : half * (1 + 1e-6)), $"{where}: {value:R} is printed as {printed}");
    }

    private static bool StartsWithNumber(string text) => char.IsDigit(text.TrimStart('-')[0]) && !text.Contains('(', StringComparison.Ordinal);

    [GeneratedRegex(@"^    ([A-Za-z][A-Za-z0-9']*) +(-?[0-9]+(?:\.[0-9]+)?(?: (?:%|ppm/K|degC|K/W|K|[zafpnumkMG]?(?:V/K|W/K|A/K|Hz|V|A|W|s|ohm)))?) ")]
    private static partial Regex Figure();

    [GeneratedRegex(@"[0-9.]+ [pnum]?A(?![A-Za-z0-9])")]
    private static partial Regex Amperes();

    [GeneratedRegex(@" \(unrounded [^()]*\)$")]
    private static partial Regex Unrounded();
}
