using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>One line of a working, with its figures as they are printed.</summary>
public sealed record WorkingLine
{
    /// <summary>The line that it prints.</summary>
    public required DerivationLine Line { get; init; }

    /// <summary>The value printed; null: a note.</summary>
    public PrintedFigure? Figure { get; init; }

    /// <summary>The formula (left side of a balance) with its figures in place; null: none.</summary>
    public string? Numbers { get; init; }

    /// <summary>Right side of a balance with its figures in place; null: none.</summary>
    public string? RightNumbers { get; init; }

    /// <summary>What the right side of a balance comes to; null: none.</summary>
    public PrintedFigure? RightFigure { get; init; }

    /// <summary>The unrounded figure, printed, where the rounded chain differs from it in the last digit; null: it does not.</summary>
    public PrintedFigure? Unrounded { get; init; }
}

/// <summary>The derivation of one finding, step by step, so that a person with a calculator comes from the printed figures to the printed figures.</summary>
/// <param name="Finding">The finding.</param>
/// <param name="Lines">What is given, what was solved and the steps to the stress ratio, each after what it needs.</param>
/// <param name="Checks">What else it takes to show that the solved figures satisfy the circuit's equations, and these balances.</param>
public sealed record Working(Finding Finding, IReadOnlyList<WorkingLine> Lines, IReadOnlyList<WorkingLine> Checks)
{
    /// <summary>Symbol of the actual value; null: none.</summary>
    public string? Actual { get; init; }

    /// <summary>Symbol of the allowed (or required) value; null: none.</summary>
    public string? Allowed { get; init; }

    /// <summary>Symbol of the stress ratio; null: none.</summary>
    public string? Ratio { get; init; }

    /// <summary>The printed figure of a symbol; null: it has none.</summary>
    public PrintedFigure? Of(string? symbol) => symbol is null ? null
        : Lines.FirstOrDefault(l => l.Line.Symbol == symbol)?.Figure;
}

/// <summary>A working that does not come to what the solver and the rule said: never printed, an internal error.</summary>
public sealed class NotReproducedException : Exception
{
    /// <summary>Makes one.</summary>
    public NotReproducedException()
    {
    }

    /// <summary>Makes one.</summary>
    /// <param name="message">Which figure of which finding, and how far it is off.</param>
    public NotReproducedException(string message)
        : base(message)
    {
    }

    /// <summary>Makes one.</summary>
    public NotReproducedException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
