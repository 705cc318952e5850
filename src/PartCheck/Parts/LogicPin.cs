using PartCheck.Quantities;

namespace PartCheck.Parts;

/// <summary>Output kind of a logic pin.</summary>
public enum PinOutput
{
    /// <summary>Pulls to its supply through a resistance.</summary>
    Cmos,

    /// <summary>Guarantees a level, no more.</summary>
    Ttl,
}

/// <summary>A guaranteed high level at an output current.</summary>
public sealed record HighLevel(Voltage Min, Current Current);

/// <summary>One row of the logic pin table.</summary>
public sealed record LogicPin(
    string Name, PinOutput Output, Interval<Voltage> Supply, IReadOnlyList<HighLevel> High, Voltage? LowMax, Current? LowCurrent,
    Cited<Current>? PinCurrentMax, string? Source, string Cell);

/// <summary>The part table and the logic pins of a run.</summary>
public sealed record PartTable(IReadOnlyList<Part> Parts)
{
    /// <summary>Part numbers of rows that could not be read or that contradict each other: they stand in the table, and a complaint says what is wrong.</summary>
    public IReadOnlySet<string> Unread { get; init; } = new HashSet<string>();

    /// <summary>Every row of a part number (compared without regard to case), in table order.</summary>
    public IReadOnlyList<Part> Find(string partNumber) =>
        byNumber.TryGetValue(partNumber, out List<Part>? found) ? found : [];

    /// <summary>The part that a person names: its part number alone, or manufacturer, blank and part number.</summary>
    /// <param name="name">What the person wrote.</param>
    /// <returns>Part number as the table writes it, and the manufacturer where one was named; null: there is no such part.</returns>
    public (string PartNumber, string? Manufacturer)? Named(string name)
    {
        ArgumentNullException.ThrowIfNull(name);
        if (Find(name) is { Count: > 0 } found)
        {
            return (found[0].PartNumber, null);
        }

        Part? byMaker = Parts.FirstOrDefault(p => p.Manufacturer is { } maker && string.Equals(maker + " " + p.PartNumber, name, StringComparison.OrdinalIgnoreCase));
        return byMaker is null ? null : (byMaker.PartNumber, byMaker.Manufacturer);
    }

    private readonly Dictionary<string, List<Part>> byNumber = Parts
        .GroupBy(p => p.PartNumber, StringComparer.OrdinalIgnoreCase)
        .ToDictionary(g => g.Key, g => g.ToList(), StringComparer.OrdinalIgnoreCase);
}
