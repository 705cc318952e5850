using System.Globalization;

namespace PartCheck.Workings;

/// <summary>What a part of a formula is.</summary>
internal enum FormulaTokenKind
{
    /// <summary>A number with its unit.</summary>
    Number,

    /// <summary>A symbol.</summary>
    Symbol,

    /// <summary>A function's name.</summary>
    Function,

    /// <summary>An operator, a parenthesis or a comma.</summary>
    Mark,
}

/// <summary>One part of a formula.</summary>
/// <param name="Kind">What it is.</param>
/// <param name="Text">Its text, unit included.</param>
/// <param name="Before">Blanks before it.</param>
/// <param name="Value">Value of a number, SI (degrees Celsius for <c>degC</c>).</param>
internal sealed record FormulaToken(FormulaTokenKind Kind, string Text, string Before, double Value)
{
    private static readonly string[] Functions = ["min", "max", "abs", "sqrt", "ln", "exp"];

    /// <summary>Units that stand after the numbers of a rule's formulas, with their sizes.</summary>
    private static readonly Dictionary<string, double> Units = new(StringComparer.Ordinal)
    {
        ["V"] = 1,
        ["A"] = 1,
        ["W"] = 1,
        ["ohm"] = 1,
        ["K"] = 1,
        ["degC"] = 1,
        ["%"] = 0.01,
    };

    /// <summary>The parts of a formula.</summary>
    /// <exception cref="FormatException">A character that no formula has.</exception>
    public static List<FormulaToken> Of(string text)
    {
        List<FormulaToken> tokens = [];
        int at = 0;
        while (at < text.Length)
        {
            int start = at;
            while (at < text.Length && text[at] == ' ')
            {
                at++;
            }

            string before = text[start..at];
            int from = at;
            if (at < text.Length && char.IsAsciiDigit(text[at]))
            {
                tokens.Add(Number(text, ref at, before));
                continue;
            }

            if (at < text.Length && char.IsAsciiLetter(text[at]))
            {
                at = WordEnd(text, at);
                string word = text[from..at];
                FormulaTokenKind kind = word == "x" ? FormulaTokenKind.Mark
                    : Functions.Contains(word) ? FormulaTokenKind.Function
                    : FormulaTokenKind.Symbol;
                tokens.Add(new(kind, word, before, 0));
                continue;
            }

            if (at >= text.Length || !"+-/^(),".Contains(text[at], StringComparison.Ordinal))
            {
                throw new FormatException($"\"{text}\" is no formula.");
            }

            tokens.Add(new(FormulaTokenKind.Mark, text[at++].ToString(), before, 0));
        }

        return tokens;
    }

    private static FormulaToken Number(string text, ref int at, string before)
    {
        int from = at;
        while (at < text.Length && (char.IsAsciiDigit(text[at]) || text[at] == '.'))
        {
            at++;
        }

        double value = double.Parse(text.AsSpan(from, at - from), NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture);
        if (at + 1 < text.Length && text[at] == ' ')
        {
            int end = text[at + 1] == '%' ? at + 2 : WordEnd(text, at + 1);
            if (Units.TryGetValue(text[(at + 1)..end], out double size))
            {
                at = end;
                value *= size;
            }
        }

        return new(FormulaTokenKind.Number, text[from..at], before, value);
    }

    private static int WordEnd(string text, int at)
    {
        while (at < text.Length && (char.IsAsciiLetterOrDigit(text[at]) || text[at] == '\''))
        {
            at++;
        }

        return at;
    }
}
