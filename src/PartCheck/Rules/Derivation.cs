using System.Globalization;
using PartCheck.Channels;
using PartCheck.OperatingPoints;

namespace PartCheck.Rules;

/// <summary>What one line of a derivation is.</summary>
public enum DerivationKind
{
    /// <summary>A value that a table, a constant or the corner gives.</summary>
    Given,

    /// <summary>A value of the non-linear solve; a balance elsewhere shows that it satisfies its equation.</summary>
    Solved,

    /// <summary>A value that a formula makes of values above it.</summary>
    Step,

    /// <summary>Two formulas that come to the same: an equation that solved values satisfy.</summary>
    Balance,

    /// <summary>A sentence.</summary>
    Note,
}

/// <summary>
/// One line of a derivation. Values are SI, but temperatures are degrees Celsius (unit <c>degC</c>), so that a formula reads as a person
/// writes it.
/// </summary>
public sealed record DerivationLine
{
    /// <summary>What the line is.</summary>
    public required DerivationKind Kind { get; init; }

    /// <summary>Symbol that formulas call it by; empty: a balance or a note.</summary>
    public string Symbol { get; init; } = string.Empty;

    /// <summary>The value; NaN: a formula makes it, or there is none.</summary>
    public double Value { get; init; } = double.NaN;

    /// <summary>Formula of a step, left side of a balance; empty: none.</summary>
    public string Formula { get; init; } = string.Empty;

    /// <summary>Right side of a balance; empty: none.</summary>
    public string Right { get; init; } = string.Empty;

    /// <summary>Unit of the value; empty: a plain number.</summary>
    public string Unit { get; init; } = string.Empty;

    /// <summary>What it is, in words.</summary>
    public required string Meaning { get; init; }

    /// <summary>Document or practice it comes from; null: none.</summary>
    public string? Source { get; init; }

    /// <summary>Cell it was read from; null: none.</summary>
    public string? Cell { get; init; }

    /// <summary>True where no table gave it and a stated default filled it.</summary>
    public bool Assumed { get; init; }
}

/// <summary>
/// The equation of a rule with its numbers, as the rule's own file states it beside the code that judges. The working of a finding evaluates these
/// formulas and holds the result to what the rule returned: the two cannot drift apart unnoticed.
/// <para>A formula knows + - x / ^, parentheses, min, max, abs, sqrt, ln, exp, numbers with units, and symbols. <c>#</c> after a symbol
/// stands for the transistor judged (its number in the channel, 0 for the control, nothing for the only leg): <c>VCE#</c>, <c>IC#</c>, <c>P#</c>,
/// <c>Tj#</c>. <c>@</c> stands for the resistance judged. The operating point's own symbols need no line of a rule: <c>Ta</c>, <c>Vb</c>,
/// <c>Vc</c>, <c>I</c>, <c>Vsupply</c>, <c>Vpin</c>, and for the resistor judged <c>VR</c>, <c>IR</c>, <c>PR</c>.</para>
/// </summary>
public sealed class Derivation
{
    private readonly List<DerivationLine> lines = [];
    private readonly string subject;
    private readonly string resistance;

    /// <summary>Begins a derivation.</summary>
    /// <param name="subject">What <c>#</c> stands for.</param>
    /// <param name="resistance">What <c>@</c> stands for.</param>
    public Derivation(string subject = "", string resistance = "")
    {
        this.subject = subject;
        this.resistance = resistance;
    }

    /// <summary>The lines, in order.</summary>
    public IReadOnlyList<DerivationLine> Lines => lines;

    /// <summary>Symbol of the actual value; null: none.</summary>
    public string? Actual { get; private set; }

    /// <summary>Symbol of the allowed (or required) value; null: none.</summary>
    public string? Allowed { get; private set; }

    /// <summary>Symbol of the stress ratio; null: none.</summary>
    public string? Ratio { get; private set; }

    /// <summary>A value that a table, a constant or the corner gives.</summary>
    public Derivation Given(string symbol, double value, string unit, string meaning, string? cell = null, string? source = null, bool assumed = false)
    {
        lines.Add(new DerivationLine
        {
            Kind = DerivationKind.Given,
            Symbol = Filled(symbol),
            Value = value,
            Unit = unit,
            Meaning = meaning,
            Cell = cell,
            Source = source,
            Assumed = assumed,
        });
        return this;
    }

    /// <summary>A value of the non-linear solve.</summary>
    public Derivation Solved(string symbol, double value, string unit, string meaning, string? cell = null)
    {
        lines.Add(new DerivationLine { Kind = DerivationKind.Solved, Symbol = Filled(symbol), Value = value, Unit = unit, Meaning = meaning, Cell = cell });
        return this;
    }

    /// <summary>A value that a formula makes.</summary>
    public Derivation Step(string symbol, string formula, string unit, string meaning)
    {
        lines.Add(new DerivationLine { Kind = DerivationKind.Step, Symbol = Filled(symbol), Formula = Filled(formula), Unit = unit, Meaning = meaning });
        return this;
    }

    /// <summary>An equation that solved values satisfy.</summary>
    public Derivation Balance(string left, string right, string unit, string meaning)
    {
        lines.Add(new DerivationLine { Kind = DerivationKind.Balance, Formula = Filled(left), Right = Filled(right), Unit = unit, Meaning = meaning });
        return this;
    }

    /// <summary>A sentence.</summary>
    public Derivation Note(string text, string? cell = null, string? source = null)
    {
        lines.Add(new DerivationLine { Kind = DerivationKind.Note, Meaning = text, Cell = cell, Source = source });
        return this;
    }

    /// <summary>The share of a rating that the derating table allows.</summary>
    public Derivation Factor(Derating.DeratingRow row, string symbol = "F")
    {
        ArgumentNullException.ThrowIfNull(row);
        return Given(symbol, row.Factor, string.Empty, $"derating factor of {row.Rule}", row.Cell, row.Source);
    }

    /// <summary>At most: ratio = actual/allowed; nothing allowed makes no ratio.</summary>
    public void AtMost(string actual, string allowed, in Stress stress) => Judged(actual, allowed, $"{actual} / {allowed}", stress);

    /// <summary>At least: ratio = required/actual.</summary>
    public void AtLeast(string actual, string required, in Stress stress) => Judged(actual, required, $"{required} / {actual}", stress);

    /// <summary>Temperatures: ratio of the rises over the ambient.</summary>
    public void Rises(string actual, string allowed, in Stress stress) => Judged(actual, allowed, $"({actual} - Ta) / ({allowed} - Ta)", stress);

    /// <summary>Actual, allowed and the ratio's own formula.</summary>
    public void Judged(string actual, string allowed, string ratio, in Stress stress)
    {
        Actual = Filled(actual);
        Allowed = Filled(allowed);
        if (stress.Ratio is null)
        {
            Note("No stress ratio: nothing is allowed here, or nothing is there where something is required.");
            return;
        }

        // 0/0 counts as 0: nothing is there, so nothing is too much.
        if (stress.Ratio == 0 && (stress.Allowed <= 0 || stress.Actual == 0))
        {
            Note("Nothing is there, or nothing is required: the stress ratio counts as 0.");
            return;
        }

        Ratio = "ratio";
        Step("ratio", ratio, string.Empty, "stress ratio");
    }

    /// <summary>An actual value that breaks any limit there may be.</summary>
    public void Broken(string actual) => Actual = Filled(actual);

    /// <summary>What <c>#</c> stands for where a state's transistor is judged: 0 the control, nothing the only leg group, else its number.</summary>
    public static string SubjectOf(SolvedState state, int transistor)
    {
        ArgumentNullException.ThrowIfNull(state);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual((uint)transistor, (uint)state.Transistors.Count, nameof(transistor));
        return state.Transistors[transistor].Role == Role.Control ? "0"
            : state.Transistors.Count == 2 ? string.Empty
            : (transistor + 1).ToString(CultureInfo.InvariantCulture);
    }

    private string Filled(string text) => text.Replace("#", subject, StringComparison.Ordinal).Replace("@", resistance, StringComparison.Ordinal);
}
