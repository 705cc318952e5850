namespace PartCheck.Rules;

/// <summary>What every report says, whatever it found.</summary>
public static class Cautions
{
    /// <summary>The sentences.</summary>
    public static IReadOnlyList<string> All { get; } =
    [
        "Figures come from the tables given and a model of the circuit; they replace neither measurement nor the maker's data sheet.",
        "Parts at their limits are hot enough to burn; supplies may be derived from the mains and be dangerous to touch.",
        "LEDs of this kind can hurt eyes: do not look into them.",
        "Local codes and standards come first; a responsible, licensed engineer decides what is fitted.",
    ];
}
