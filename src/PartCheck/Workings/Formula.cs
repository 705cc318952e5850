using System.Collections.Concurrent;
using System.Globalization;
using System.Text;

namespace PartCheck.Workings;

/// <summary>
/// A formula as a person writes it: numbers with units, symbols, + - x / ^, parentheses, min, max, abs, sqrt, ln, exp. It is read once, then
/// evaluated for any values of its symbols, and written out with their figures in place.
/// </summary>
public sealed class Formula
{
    /// <summary>Rules have few formulas and many findings: each is read once.</summary>
    private static readonly ConcurrentDictionary<string, Formula> Read = new(StringComparer.Ordinal);

    private readonly List<FormulaToken> tokens;
    private readonly Func<Func<string, double>, double> evaluate;
    private int at;

    private Formula(string text)
    {
        Text = text;
        tokens = FormulaToken.Of(text);
        evaluate = Sum();
        if (at < tokens.Count)
        {
            throw Wrong();
        }

        Symbols = [.. tokens.Where(t => t.Kind == FormulaTokenKind.Symbol).Select(t => t.Text).Distinct(StringComparer.Ordinal)];
    }

    /// <summary>The text.</summary>
    public string Text { get; }

    /// <summary>Symbols, each once, in the order in which they stand.</summary>
    public IReadOnlyList<string> Symbols { get; }

    /// <summary>Reads a formula.</summary>
    /// <exception cref="FormatException">It is none: a programmer's mistake in a rule's derivation.</exception>
    public static Formula Parse(string text)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(text);
        return Read.GetOrAdd(text, static t => new Formula(t));
    }

    /// <summary>The value for given values of the symbols.</summary>
    public double Evaluate(Func<string, double> value) => evaluate(value);

    /// <summary>The text with each symbol replaced by its figure; a negative one in parentheses.</summary>
    public string With(Func<string, string> figure)
    {
        ArgumentNullException.ThrowIfNull(figure);
        StringBuilder text = new();
        foreach (FormulaToken token in tokens)
        {
            text.Append(token.Before);
            string shown = token.Kind == FormulaTokenKind.Symbol ? figure(token.Text) : token.Text;
            text.Append(token.Kind == FormulaTokenKind.Symbol && shown.StartsWith('-') ? "(" + shown + ")" : shown);
        }

        return text.ToString();
    }

    private Func<Func<string, double>, double> Sum()
    {
        Func<Func<string, double>, double> left = Product();
        while (Next("+", "-") is { } sign)
        {
            Func<Func<string, double>, double> a = left;
            Func<Func<string, double>, double> b = Product();
            left = sign == "+" ? v => a(v) + b(v) : v => a(v) - b(v);
        }

        return left;
    }

    private Func<Func<string, double>, double> Product()
    {
        Func<Func<string, double>, double> left = Signed();
        while (Next("x", "/") is { } sign)
        {
            Func<Func<string, double>, double> a = left;
            Func<Func<string, double>, double> b = Signed();
            left = sign == "x" ? v => a(v) * b(v) : v => a(v) / b(v);
        }

        return left;
    }

    private Func<Func<string, double>, double> Signed()
    {
        if (Next("-") is not null)
        {
            Func<Func<string, double>, double> a = Signed();
            return v => -a(v);
        }

        Func<Func<string, double>, double> power = Single();
        if (Next("^") is null)
        {
            return power;
        }

        Func<Func<string, double>, double> exponent = Signed();
        return v => Math.Pow(power(v), exponent(v));
    }

    private Func<Func<string, double>, double> Single()
    {
        FormulaToken token = at < tokens.Count ? tokens[at++] : throw Wrong();
        switch (token.Kind)
        {
            case FormulaTokenKind.Number:
                return _ => token.Value;
            case FormulaTokenKind.Symbol:
                return v => v(token.Text);
            case FormulaTokenKind.Function:
                return Call(token.Text);
            case FormulaTokenKind.Mark when token.Text == "(":
                Func<Func<string, double>, double> inner = Sum();
                Close();
                return inner;
            default:
                throw Wrong();
        }
    }

    private Func<Func<string, double>, double> Call(string name)
    {
        if (Next("(") is null)
        {
            throw Wrong();
        }

        List<Func<Func<string, double>, double>> arguments = [Sum()];
        while (Next(",") is not null)
        {
            arguments.Add(Sum());
        }

        Close();
        Func<Func<string, double>, double> first = arguments[0];
        return name switch
        {
            "min" => v => arguments.Min(a => a(v)),
            "max" => v => arguments.Max(a => a(v)),
            "abs" => v => Math.Abs(first(v)),
            "sqrt" => v => Math.Sqrt(first(v)),
            "ln" => v => Math.Log(first(v)),
            "exp" => v => Math.Exp(first(v)),
            _ => throw Wrong(),
        };
    }

    private void Close()
    {
        if (Next(")") is null)
        {
            throw Wrong();
        }
    }

    private string? Next(params ReadOnlySpan<string> marks)
    {
        if (at < tokens.Count && tokens[at].Kind == FormulaTokenKind.Mark && marks.Contains(tokens[at].Text))
        {
            return tokens[at++].Text;
        }

        return null;
    }

    private FormatException Wrong() =>
        new(string.Create(CultureInfo.InvariantCulture, $"\"{Text}\" is no formula: see its part {at + 1} of {tokens.Count}."));
}
