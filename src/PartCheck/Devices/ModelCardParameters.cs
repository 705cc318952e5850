using System.Globalization;
using System.Text.RegularExpressions;

namespace PartCheck.Devices;

/// <summary>Turns the body of an NPN card into <see cref="BipolarParameters"/>.</summary>
internal static partial class ModelCardParameters
{
    private const double ZeroCelsius = 273.15;

    private static readonly HashSet<string> Positive = new(StringComparer.Ordinal) { "IS", "BF", "NF", "NE", "BR", "NR", "NC", "NKF", "EG" };

    private static readonly HashSet<string> AnySign = new(StringComparer.Ordinal) { "XTI", "XTB", "TNOM" };

    /// <summary>Reads the card that the reader chose; <paramref name="notes"/> are those it already has.</summary>
    public static ModelCardResult Read(ModelStatement card, List<string> notes)
    {
        List<string> errors =
            [.. card.Stray.Select(line => $"The line \"{line}\" follows the card {card.Name} without a leading +.")];
        Dictionary<string, double> values = new(StringComparer.Ordinal);
        foreach ((string key, string text) in Pairs(card, errors))
        {
            Take(card.Name, key, text, values, notes, errors);
        }

        if (errors.Count > 0)
        {
            return new ModelCardResult(null, errors);
        }

        List<string> assumed = [];
        if (!values.ContainsKey("IS"))
        {
            assumed.Add("IS 1e-16 A");
        }

        if (!values.ContainsKey("BF"))
        {
            assumed.Add("BF 100");
        }

        return new ModelCardResult(new ModelCard(card.Name, Parameters(values), notes, assumed), []);
    }

    private static List<(string Key, string Text)> Pairs(ModelStatement card, List<string> errors)
    {
        List<(string, string)> pairs = [];
        string body = card.Body;
        int at = 0;
        while (at < body.Length)
        {
            Match pair = Pair().Match(body, at);
            if (pair.Success)
            {
                pairs.Add((pair.Groups[1].Value, pair.Groups[2].Value));
                at += pair.Length;
                continue;
            }

            Match word = Word().Match(body, at);
            string text = word.Value.Trim();
            if (text.Trim('+').Length > 0)
            {
                errors.Add($"\"{text}\" on the card {card.Name} is no parameter: NAME=value is wanted.");
            }

            at += Math.Max(1, word.Length);
        }

        return pairs;
    }

    private static void Take(
        string card, string key, string text, Dictionary<string, double> values, List<string> notes, List<string> errors)
    {
        string name = ModelCardNames.Canonical(key);
        (ModelNameKind kind, string? resembles) = ModelCardNames.Classify(name);
        if (kind == ModelNameKind.NearMiss)
        {
            errors.Add($"The parameter {key} on the card {card} is not known; {resembles} is close to it.");
        }
        else if (kind == ModelNameKind.Foreign)
        {
            notes.Add($"{key} is not read");
        }
        else if (!ModelCardNumber.TryRead(text, out double value))
        {
            errors.Add($"{key}={text} on the card {card} is no number.");
        }
        else if (kind == ModelNameKind.Beyond)
        {
            if (!ModelCardNames.IsNeutral(name, value))
            {
                errors.Add($"{key}={text} on the card {card} changes the static result beyond the Gummel-Poon model: the card is refused.");
            }
            else if (name == "LEVEL")
            {
                notes.Add($"{key} is not read");
            }
        }
        else if (kind == ModelNameKind.Static)
        {
            string? wrong = Wrong(name, value);
            if (wrong is not null)
            {
                errors.Add($"{key}={text} on the card {card} {wrong}.");
            }

            if (!values.TryAdd(name, value))
            {
                values[name] = value;
                notes.Add($"{name} stands on the card twice; the last one, {text}, counts");
            }
        }
    }

    private static string? Wrong(string name, double value) => name switch
    {
        "TNOM" when value <= -ZeroCelsius => "is below absolute zero: degC are wanted",
        "NKF" when value > 1 => "is above 1: no more than 1 is wanted",
        "ISE" or "ISC" when value > 1 => "is above 1 A: a multiple of IS, as some programs take it, is not read",
        _ when Positive.Contains(name) && value <= 0 => "is not above zero",
        _ when !AnySign.Contains(name) && value < 0 => "is below zero",
        _ => null,
    };

    private static BipolarParameters Parameters(Dictionary<string, double> values)
    {
        BipolarParameters none = new();
        double Or(string name, double otherwise) => values.GetValueOrDefault(name, otherwise);
        double OrInfinite(string name) => Or(name, 0) is > 0 and double given ? given : double.PositiveInfinity;
        return new BipolarParameters
        {
            Is = Or("IS", none.Is),
            Bf = Or("BF", none.Bf),
            Nf = Or("NF", none.Nf),
            Vaf = OrInfinite("VAF"),
            Ikf = OrInfinite("IKF"),
            Nkf = Or("NKF", none.Nkf),
            Ise = Or("ISE", none.Ise),
            Ne = Or("NE", none.Ne),
            Br = Or("BR", none.Br),
            Nr = Or("NR", none.Nr),
            Var = OrInfinite("VAR"),
            Ikr = OrInfinite("IKR"),
            Isc = Or("ISC", none.Isc),
            Nc = Or("NC", none.Nc),
            Rb = Or("RB", none.Rb),
            Irb = OrInfinite("IRB"),
            Rbm = Or("RBM", double.NaN),
            Re = Or("RE", none.Re),
            Rc = Or("RC", none.Rc),
            Xti = Or("XTI", none.Xti),
            Eg = Or("EG", none.Eg),
            Xtb = Or("XTB", none.Xtb),
            Tnom = values.TryGetValue("TNOM", out double celsius) ? celsius + ZeroCelsius : none.Tnom,
        };
    }

    /// <summary>NAME = value, blanks around the sign allowed; the value ends at a blank or is quoted.</summary>
    [GeneratedRegex("""\G\s*\+?([^\s=+"]+)\s*=\s*("[^"]*"|[^\s="]+)(?=\s|$)""", RegexOptions.CultureInvariant)]
    private static partial Regex Pair();

    [GeneratedRegex(@"\G\s*\S*\s*", RegexOptions.CultureInvariant)]
    private static partial Regex Word();
}
