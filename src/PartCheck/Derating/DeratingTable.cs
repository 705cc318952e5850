using PartCheck.Quantities;

namespace PartCheck.Derating;

/// <summary>Where a resistor's derated power curve reaches zero.</summary>
public enum ZeroTemperature
{
    /// <summary>At the rated zero temperature T3 (film maximum).</summary>
    Rated,

    /// <summary>At T2 = F (T3 - T1) + T1: the derated line stays parallel to the rated one.</summary>
    Parallel,

    /// <summary>At a stated temperature.</summary>
    Fixed,
}

/// <summary>One row of a derating table.</summary>
public sealed record DeratingRow
{
    /// <summary>The rule it belongs to.</summary>
    public required string Rule { get; init; }

    /// <summary>Part kind it holds for (<c>npn</c>, <c>resistor</c>, <c>led</c>); null: any.</summary>
    public string? Kind { get; init; }

    /// <summary>Film style it holds for; null: any.</summary>
    public string? Style { get; init; }

    /// <summary>Share of the rating that may be used.</summary>
    public double Factor { get; init; } = 1;

    /// <summary>Upper bound of a temperature limit; null: none.</summary>
    public Temperature? Cap { get; init; }

    /// <summary>Distance from a maximum temperature [K].</summary>
    public TemperatureDelta Offset { get; init; }

    /// <summary>Where a resistor's curve reaches zero.</summary>
    public ZeroTemperature Zero { get; init; }

    /// <summary>The stated zero temperature, for <see cref="ZeroTemperature.Fixed"/>.</summary>
    public Temperature? ZeroAt { get; init; }

    /// <summary>A limit that is not a share of a rating (drive factor, sharing); null: none.</summary>
    public double? Limit { get; init; }

    /// <summary>Document, table and note, or <c>common practice, no source</c>.</summary>
    public required string Source { get; init; }

    /// <summary>File and cell of the row.</summary>
    public string? Cell { get; init; }
}

/// <summary>A named derating table.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Note">What every output that uses it must say; null: nothing.</param>
/// <param name="Rows">Its rows.</param>
public sealed record DeratingTable(string Name, string? Note, IReadOnlyList<DeratingRow> Rows)
{
    /// <summary>True for a table that somebody named and that there is not, or of which a row cannot be read: nothing judged by it is verified.</summary>
    public bool Unknown { get; init; }

    /// <summary>
    /// The row for a rule and a part: the most specific one (style before kind before any). No row: the rating itself
    /// (factor 1, no offset, no cap, no limit), with <c>no derating row: the rating itself</c> as its source.
    /// </summary>
    /// <param name="rule">Rule identifier.</param>
    /// <param name="kind"><c>npn</c>, <c>resistor</c>, <c>led</c> or null for rules of channel and pin.</param>
    /// <param name="style">Film style; null: none.</param>
    public DeratingRow For(string rule, string? kind = null, string? style = null)
    {
        DeratingRow? best = null;
        int bestScore = -1;
        foreach (DeratingRow row in Rows)
        {
            bool fits = string.Equals(row.Rule, rule, StringComparison.OrdinalIgnoreCase)
                && (row.Kind is null || string.Equals(row.Kind, kind, StringComparison.OrdinalIgnoreCase))
                && (row.Style is null || string.Equals(row.Style, style, StringComparison.OrdinalIgnoreCase));
            int score = (row.Style is null ? 0 : 2) + (row.Kind is null ? 0 : 1);
            if (fits && score > bestScore)
            {
                best = row;
                bestScore = score;
            }
        }

        return best ?? new DeratingRow { Rule = rule, Source = "no derating row: the rating itself" };
    }
}
