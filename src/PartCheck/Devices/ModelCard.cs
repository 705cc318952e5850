namespace PartCheck.Devices;

/// <summary>A <c>.MODEL</c> card as read.</summary>
/// <param name="Name">The card's own name.</param>
/// <param name="Parameters">The static parameters.</param>
/// <param name="Notes">What a person should know: parameters skipped, given twice.</param>
/// <param name="Assumed">Parameters that the card does not give and a simulator's default filled (IS, BF).</param>
public sealed record ModelCard(
    string Name, BipolarParameters Parameters, IReadOnlyList<string> Notes, IReadOnlyList<string> Assumed);

/// <summary>The result of reading a card: the card, or the reasons why there is none.</summary>
public sealed record ModelCardResult(ModelCard? Card, IReadOnlyList<string> Errors);
