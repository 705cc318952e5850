using System.Globalization;

namespace PartCheck.Devices;

/// <summary>
/// Reads SPICE <c>.MODEL</c> cards of NPN transistors as they are met: any case, with or without parentheses, continued with <c>+</c>.
/// </summary>
/// <remarks>
/// Refused with the reason: PNP, a card inside <c>.SUBCKT</c>, parameters that change the static result beyond
/// <see cref="BipolarParameters"/>, unreadable numbers, names one slip away from a known one. Charge, time and noise parameters are
/// skipped silently, foreign ones with a note.
/// </remarks>
public static class ModelCardReader
{
    /// <summary>Reads one card.</summary>
    /// <param name="text">The card's text or a whole file.</param>
    /// <param name="name">Name of the card wanted, in any case; null: the text's only transistor card.</param>
    /// <returns>The card, or the reasons why there is none; never both.</returns>
    public static ModelCardResult Read(string text, string? name)
    {
        ArgumentNullException.ThrowIfNull(text);
        ModelCardText cards = ModelCardText.Of(text);
        List<string> errors = [];
        List<string> notes = [];
        ModelStatement? chosen = Choose(cards, name, errors, notes);
        return chosen is null ? new ModelCardResult(null, errors) : ModelCardParameters.Read(chosen, notes);
    }

    private static ModelStatement? Choose(ModelCardText cards, string? name, List<string> errors, List<string> notes)
    {
        IReadOnlyList<ModelStatement> all = cards.Statements;
        List<ModelStatement> found = name is null
            ? OnlyTransistors(all)
            : [.. all.Where(s => string.Equals(s.Name, name, StringComparison.OrdinalIgnoreCase))];
        if (found.Count == 0)
        {
            errors.Add(NotFound(cards, name));
            return null;
        }

        if (found.Select(s => s.Name).Distinct(StringComparer.OrdinalIgnoreCase).Count() > 1)
        {
            errors.Add($"There are several cards, {Names(found)}: name one.");
            return null;
        }

        if (found.Any(s => s != found[0] && !SameCard(s, found[0])))
        {
            string lines = string.Join(", ", found.Select(s => s.Line.ToString(CultureInfo.InvariantCulture)));
            errors.Add($"The card {found[0].Name} stands in the text more than once, and differs (lines {lines}): it is not clear which is meant.");
            return null;
        }

        if (found.Count > 1)
        {
            notes.Add($"card {found[0].Name} stands in the text more than once, each time the same");
        }

        return Fits(found[0], errors) ? found[0] : null;
    }

    private static bool Fits(ModelStatement card, List<string> errors)
    {
        if (card.Subcircuit is string subcircuit)
        {
            errors.Add($"The card {card.Name} stands inside .SUBCKT {subcircuit}: the part (a Darlington, one with built-in resistors) is more "
                + "than one transistor.");
        }
        else if (card.Type.Equals("PNP", StringComparison.OrdinalIgnoreCase) || card.Type.Equals("LPNP", StringComparison.OrdinalIgnoreCase))
        {
            errors.Add($"The card {card.Name} is a PNP transistor: it does not fit a low-side sink.");
        }
        else if (!card.Type.Equals("NPN", StringComparison.OrdinalIgnoreCase))
        {
            errors.Add(card.Type.Length == 0
                ? "The .MODEL line ends before its type: .MODEL name NPN(...) is wanted."
                : $"The card {card.Name} is of type {card.Type}: NPN is wanted.");
        }

        return errors.Count == 0;
    }

    /// <summary>Cards of bipolar transistors; where there is none, every card, so that the reason can name it.</summary>
    private static List<ModelStatement> OnlyTransistors(IReadOnlyList<ModelStatement> all)
    {
        List<ModelStatement> transistors =
            [.. all.Where(s => s.Type.EndsWith("NPN", StringComparison.OrdinalIgnoreCase) || s.Type.EndsWith("PNP", StringComparison.OrdinalIgnoreCase))];
        return transistors.Count > 0 ? transistors : [.. all];
    }

    private static bool SameCard(ModelStatement a, ModelStatement b) =>
        string.Equals(a.Type, b.Type, StringComparison.OrdinalIgnoreCase)
        && a.Subcircuit is null == b.Subcircuit is null
        && a.Stray.Count + b.Stray.Count == 0
        && Words(a.Body).SequenceEqual(Words(b.Body), StringComparer.OrdinalIgnoreCase);

    private static string[] Words(string body) =>
        body.Replace("=", " = ", StringComparison.Ordinal).Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries);

    private static string NotFound(ModelCardText cards, string? name)
    {
        if (name is not null && cards.Subcircuits.Contains(name, StringComparer.OrdinalIgnoreCase))
        {
            return $"{name} is a .SUBCKT, not a .MODEL card: the part is more than one transistor.";
        }

        return cards.Statements.Count == 0
            ? "There is no .MODEL card in the text."
            : $"There is no card {name}: the text holds {Names(cards.Statements)}.";
    }

    private static string Names(IReadOnlyList<ModelStatement> cards) =>
        string.Join(", ", cards.Select(c => c.Name).Distinct(StringComparer.OrdinalIgnoreCase));
}
