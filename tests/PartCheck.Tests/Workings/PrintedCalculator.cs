using System.Globalization;
using System.Text.RegularExpressions;

namespace PartCheck.Tests.Workings;

/// <summary>
/// A person with a calculator: evaluates what a working prints, units and all. Written apart from the program's own reading of formulas (two
/// stacks, no recursion), so that one cannot hide the other's mistake.
/// </summary>
internal static partial class PrintedCalculator
{
    private static readonly string[] Functions = ["min", "max", "abs", "sqrt", "ln", "exp"];

    /// <summary>The value of a printed number with its unit; SI, but degrees Celsius.</summary>
    public static double Number(string text) => Evaluate(text.StartsWith('-') ? "(" + text + ")" : text, new Dictionary<string, double>());

    /// <summary>Evaluates an expression.</summary>
    /// <param name="text">The expression.</param>
    /// <param name="symbols">Values of symbols.</param>
    public static double Evaluate(string text, IReadOnlyDictionary<string, double> symbols)
    {
        Stack<double> values = new();
        Stack<(string Operator, int Arguments)> pending = new();
        bool operand = true;
        foreach (string token in Tokens(text))
        {
            if (operand && (char.IsDigit(token[0]) || symbols.ContainsKey(token)))
            {
                values.Push(char.IsDigit(token[0]) ? WithUnit(token) : symbols[token]);
                operand = false;
            }
            else if (operand && (Functions.Contains(token) || token == "("))
            {
                pending.Push((token, 1));
            }
            else if (operand && token == "-")
            {
                pending.Push(("negate", 1));
            }
            else if (!operand && token is ")" or ",")
            {
                while (pending.Peek().Operator != "(")
                {
                    Apply(pending.Pop(), values);
                }

                (string bracket, int count) = pending.Pop();
                operand = token == ",";
                if (operand)
                {
                    pending.Push((bracket, count + 1));
                }
                else if (pending.Count > 0 && Functions.Contains(pending.Peek().Operator))
                {
                    Apply((pending.Pop().Operator, count), values);
                }
            }
            else if (!operand && Rank(token) > 0)
            {
                while (pending.Count > 0 && Rank(pending.Peek().Operator) >= Rank(token) + (token == "^" ? 1 : 0))
                {
                    Apply(pending.Pop(), values);
                }

                pending.Push((token, 2));
                operand = true;
            }
            else
            {
                throw new FormatException($"\"{token}\" has no place in \"{text}\".");
            }
        }

        while (pending.Count > 0)
        {
            Apply(pending.Pop(), values);
        }

        return values.Count == 1 ? values.Pop() : throw new FormatException($"\"{text}\" is no expression.");
    }

    private static int Rank(string token) => token switch { "+" or "-" => 1, "x" or "/" => 2, "negate" => 3, "^" => 4, _ => 0 };

    private static void Apply((string Operator, int Arguments) what, Stack<double> values)
    {
        double[] a = [.. Enumerable.Range(0, what.Operator is "+" or "-" or "x" or "/" or "^" ? 2 : what.Arguments).Select(_ => values.Pop()).Reverse()];
        values.Push(what.Operator switch
        {
            "+" => a[0] + a[1],
            "-" => a[0] - a[1],
            "x" => a[0] * a[1],
            "/" => a[0] / a[1],
            "^" => Math.Pow(a[0], a[1]),
            "negate" => -a[0],
            "min" => a.Min(),
            "max" => a.Max(),
            "abs" => Math.Abs(a[0]),
            "sqrt" => Math.Sqrt(a[0]),
            "ln" => Math.Log(a[0]),
            "exp" => Math.Exp(a[0]),
            _ => throw new FormatException($"\"{what.Operator}\" is left over."),
        });
    }

    private static IEnumerable<string> Tokens(string text)
    {
        int at = 0;
        while (at < text.Length)
        {
            if (text[at] == ' ')
            {
                at++;
                continue;
            }

            Match match = Token().Match(text, at);
            if (!match.Success || match.Index != at)
            {
                throw new FormatException($"\"{text[at..]}\" is no part of an expression.");
            }

            at += match.Length;
            yield return match.Value;
        }
    }

    // Prefixes as the SI brochure gives them.
    private static double WithUnit(string token)
    {
        string[] parts = token.Split(' ');
        double value = double.Parse(parts[0], NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture);
        if (parts.Length == 1)
        {
            return value;
        }

        return parts[1] switch
        {
            "%" => value / 100,
            "ppm/K" => value / 1e6,
            "degC" or "K" or "K/W" => value,
            var unit => value * unit[0] switch
            {
                'z' => 1e-21,
                'a' => 1e-18,
                'f' => 1e-15,
                'p' => 1e-12,
                'n' => 1e-9,
                'u' => 1e-6,
                'm' => 1e-3,
                'k' => 1e3,
                'M' => 1e6,
                'G' => 1e9,
                _ => 1,
            },
        };
    }

    [GeneratedRegex(@"[0-9]+(\.[0-9]+)?( (%|ppm/K|degC|K/W|K|[zafpnumkMG]?(V/K|W/K|A/K|Hz|V|A|W|s|ohm))(?![A-Za-z0-9]))?|[A-Za-z][A-Za-z0-9']*|[-+/^(),]")]
    private static partial Regex Token();
}
