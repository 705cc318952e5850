using System.Text.RegularExpressions;

namespace PartCheck.Devices;

/// <summary>
/// Reads SPICE <c>.MODEL</c> cards of NPN transistors as they are met in the wild: any case, with or without parentheses,
/// continuation lines, comments, foreign parameters. Refuses what is not a plain NPN transistor, with the reason.
/// </summary>
public static partial class ModelCardReader
{
    /// <summary>Reads a card.</summary>
    /// <param name="text">One or several cards.</param>
    /// <param name="name">Which card; null: the only one.</param>
    public static ModelCardResult Read(string text, string? name)
    {
        ArgumentNullException.ThrowIfNull(text);
        List<string> lines = Joined(text);
        int depth = 0;
        List<(string Name, string Body, bool Inside)> cards = [];
        foreach (string line in lines)
        {
            if (line.StartsWith(".subckt", StringComparison.OrdinalIgnoreCase))
            {
                depth++;
            }
            else if (line.StartsWith(".ends", StringComparison.OrdinalIgnoreCase))
            {
                depth = Math.Max(0, depth - 1);
            }
            else if (Header().Match(line) is { Success: true } header)
            {
                cards.Add((header.Groups["name"].Value, header.Groups["body"].Value, depth > 0));
            }
        }

        if (cards.Count == 0)
        {
            return Refuse("There is no .MODEL card in the text.");
        }

        List<(string Name, string Body, bool Inside)> wanted = name is null
            ? cards
            : [.. cards.Where(c => string.Equals(c.Name, name, StringComparison.OrdinalIgnoreCase))];
        if (wanted.Count == 0)
        {
            return Refuse($"There is no card {name}: the cards are {string.Join(", ", cards.Select(c => c.Name))}.");
        }

        if (wanted.Count > 1)
        {
            return Refuse(name is null
                ? $"There are several cards, {string.Join(", ", cards.Select(c => c.Name))}: name one."
                : $"The card {name} stands there {wanted.Count} times: it is not clear which is meant.");
        }

        (string card, string body, bool inside) = wanted[0];
        return inside
            ? Refuse($"The card {card} stands inside a .SUBCKT: the part is more than one transistor.")
            : One(card, body);
    }

    private static ModelCardResult One(string name, string body)
    {
        Match type = TypeWord().Match(body);
        if (!type.Success)
        {
            return Refuse($"The card {name} has no type: NPN is wanted.");
        }

        string kind = type.Groups["type"].Value.ToUpperInvariant();
        if (kind != "NPN")
        {
            return Refuse(kind == "PNP"
                ? $"The card {name} is a PNP transistor: it does not fit a low-side sink."
                : $"The card {name} is of type {kind}: NPN is wanted.");
        }

        CardParameters parameters = new(name);
        string rest = Spaces().Replace(type.Groups["rest"].Value.Replace('(', ' ').Replace(')', ' ').Replace(',', ' '), " ").Trim();
        rest = AroundEquals().Replace(rest, "=");
        foreach (string item in rest.Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            int equals = item.IndexOf('=', StringComparison.Ordinal);
            if (equals <= 0 || equals == item.Length - 1)
            {
                parameters.Stray(item);
            }
            else
            {
                parameters.Take(item[..equals], item[(equals + 1)..]);
            }
        }

        return parameters.Result();
    }

    /// <summary>Lines without comments, continuation lines joined.</summary>
    private static List<string> Joined(string text)
    {
        List<string> lines = [];
        foreach (string raw in text.Split(['\n', '\r'], StringSplitOptions.RemoveEmptyEntries))
        {
            string line = Tail().Replace(raw, string.Empty).Trim();
            if (line.Length == 0 || line[0] == '*')
            {
                continue;
            }

            if (line[0] == '+' && lines.Count > 0)
            {
                lines[^1] += " " + line[1..];
            }
            else if (line == ")" && lines.Count > 0)
            {
                lines[^1] += " )";
            }
            else
            {
                lines.Add(line);
            }
        }

        return lines;
    }

    private static ModelCardResult Refuse(string reason) => new(null, [reason]);

    [GeneratedRegex(@"[;$].*$")]
    private static partial Regex Tail();

    [GeneratedRegex(@"^\.model\s+(?<name>\S+)\s+(?<body>.*)$", RegexOptions.IgnoreCase | RegexOptions.Singleline)]
    private static partial Regex Header();

    [GeneratedRegex(@"^\s*(?<type>[A-Za-z]+)\b(?<rest>.*)$", RegexOptions.Singleline)]
    private static partial Regex TypeWord();

    [GeneratedRegex(@"\s+")]
    private static partial Regex Spaces();

    [GeneratedRegex(@"\s*=\s*")]
    private static partial Regex AroundEquals();
}
