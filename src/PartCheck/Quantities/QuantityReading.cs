namespace PartCheck.Quantities;

/// <summary>Why a text is not a quantity of the kind that is wanted.</summary>
public enum QuantityTrouble
{
    /// <summary>Nothing: the value was read.</summary>
    None,

    /// <summary>The text is empty.</summary>
    Empty,

    /// <summary>The text is not a number with or without a unit.</summary>
    NotANumber,

    /// <summary>The number stands with a unit of another kind, or with one that is not known.</summary>
    WrongUnit,

    /// <summary>The number is too large or too small to be held.</summary>
    OutOfRange,

    /// <summary>A comma or point may be a decimal sign or a thousands separator, or is not the decimal sign of this file.</summary>
    DecimalSign,
}

/// <summary>What was read from a text.</summary>
/// <param name="Trouble">None where the value was read.</param>
/// <param name="Si">The value in SI, finite; 0 where there is trouble.</param>
/// <param name="BareNumber">True where the text itself names no unit.</param>
/// <param name="Wanted">What was wanted, for a complaint.</param>
public readonly record struct QuantityReading(QuantityTrouble Trouble, double Si, bool BareNumber, string Wanted)
{
    /// <summary>True where the value was read.</summary>
    public bool Ok => Trouble == QuantityTrouble.None;
}
