namespace PartCheck.Quantities;

/// <summary>A closed interval of one quantity.</summary>
public readonly record struct Interval<T>(T Min, T Max);
