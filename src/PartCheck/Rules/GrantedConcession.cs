namespace PartCheck.Rules;

/// <summary>The permission that a nonconforming finding was accepted under (ISO 9000:2015: concession).</summary>
/// <param name="Reason">Why it was accepted.</param>
/// <param name="AcceptedBy">Who accepted it.</param>
/// <param name="Date">First day in force.</param>
/// <param name="Expires">Last day in force.</param>
/// <param name="Effectivity">Serials or lots it holds for; null: the table names none.</param>
/// <param name="Cell">File and cell of its row.</param>
public sealed record GrantedConcession(string Reason, string AcceptedBy, DateOnly Date, DateOnly Expires, string? Effectivity, string Cell);
