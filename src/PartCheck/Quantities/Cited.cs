namespace PartCheck.Quantities;

/// <summary>A value and the cell it was read from, so that a finding can point at it.</summary>
/// <param name="Value">The value.</param>
/// <param name="Cell">File and cell, e.g. <c>parts.csv!K12</c> or <c>bench.xlsx!Parts!K12</c>.</param>
public sealed record Cited<T>(T Value, string Cell);
