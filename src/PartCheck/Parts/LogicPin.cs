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
    /// <summary>Every row of a part number (compared without regard to case), in table order.</summary>
    public IReadOnlyList<Part> Find(string partNumber) =>
        byNumber.TryGetValue(partNumber, out List<Part>? found) ? found : [];

    private readonly Dictionary<string, List<Part>> byNumber = Parts
        .GroupBy(p => p.PartNumber, StringComparer.OrdinalIgnoreCase)
        .ToDictionary(g => g.Key, g => g.ToList(), StringComparer.OrdinalIgnoreCase);
}
