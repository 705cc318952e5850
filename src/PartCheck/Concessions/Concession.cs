using PartCheck.Rules;

namespace PartCheck.Concessions;

/// <summary>One row of a concessions table.</summary>
public sealed record Concession
{
    /// <summary>Rule identifier.</summary>
    public required string Rule { get; init; }

    /// <summary>The reference cell as it stands: references, or the name of a channel or a pin; null: blank.</summary>
    public string? Reference { get; init; }

    /// <summary>References of the cell, ranges written out; empty: blank.</summary>
    public IReadOnlyList<string> References { get; init; } = [];

    /// <summary>Part number; null: whichever part is fitted.</summary>
    public string? PartNumber { get; init; }

    /// <summary>The board; null: every board that the table is given for.</summary>
    public string? Board { get; init; }

    /// <summary>What was granted.</summary>
    public required GrantedConcession Granted { get; init; }

    /// <summary>Whom it concerns, in words.</summary>
    public string Subject => string.Join(' ', new[] { Rule, Reference, PartNumber }.OfType<string>());

    /// <summary>
    /// True where it concerns a finding: rule, reference and part number agree where they are given. Reference is the finding's own
    /// reference; of a finding of a bill line all its references; of a channel or a pin its name.
    /// </summary>
    public bool Concerns(Finding finding)
    {
        ArgumentNullException.ThrowIfNull(finding);
        if (finding.Rule != Rule || (PartNumber is not null && !Same(PartNumber, finding.PartNumber)))
        {
            return false;
        }

        return Reference is null || (finding switch
        {
            { Reference: { } one } => References.Contains(one, StringComparer.OrdinalIgnoreCase),
            { References: { Count: > 0 } all } => all.All(r => References.Contains(r, StringComparer.OrdinalIgnoreCase)),
            { Pin: { } pin } => Same(pin, Reference),
            _ => Same(finding.Channel, Reference),
        });
    }

    private static bool Same(string? a, string? b) => string.Equals(a, b, StringComparison.OrdinalIgnoreCase);
}
