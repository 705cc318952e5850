namespace PartCheck.Channels;

/// <summary>One row of the channels sheet as read.</summary>
public sealed record ChannelRow
{
    /// <summary>The channel's name.</summary>
    public required string Name { get; init; }

    /// <summary>File and cell of the name.</summary>
    public required string Cell { get; init; }

    /// <summary>Its conditions; null where the row has complaints.</summary>
    public ChannelConditions? Conditions { get; init; }

    /// <summary>Row of the pin table.</summary>
    public string? Logic { get; init; }

    /// <summary>Net name of the pin; null: its own pin.</summary>
    public string? Pin { get; init; }

    /// <summary>References by role, legs in order; an averaging entry <c>-</c> is a leg that is not sensed, <c>direct</c> one without a resistor.</summary>
    public required IReadOnlyDictionary<Role, IReadOnlyList<string>> References { get; init; }

    /// <summary>Where the pull-down sits.</summary>
    public PullDownAt PullDownAt { get; init; }

    /// <summary>What the row assumed.</summary>
    public required IReadOnlyList<Assumption> Assumed { get; init; }

    /// <summary>File and cell of each column.</summary>
    public required IReadOnlyDictionary<string, string> Cells { get; init; }

    /// <summary>References of a role; empty: none.</summary>
    public IReadOnlyList<string> Of(Role role) => References.GetValueOrDefault(role) ?? [];

    /// <summary>References of a role, the marks of averaging left out.</summary>
    public IEnumerable<string> Placed(Role role) => Of(role).Where(RoleNames.IsReference);
}
