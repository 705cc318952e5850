using FluentValidation;
using FluentValidation.Results;

namespace PartCheck.Sheets;

/// <summary>
/// Ties a FluentValidation validator to a table's row: the property name of a rule is the column's own name, its state what
/// is wanted there, its message the whole sentence; every failure becomes a complaint about that cell.
/// </summary>
public static class RowValidation
{
    /// <summary>Raises a complaint for every failure.</summary>
    /// <returns>True where there was none.</returns>
    public static bool Check<T>(this TableRow row, IValidator<T> validator, T value)
    {
        ArgumentNullException.ThrowIfNull(row);
        ArgumentNullException.ThrowIfNull(validator);
        ValidationResult result = validator.Validate(value);
        foreach (ValidationFailure failure in result.Errors)
        {
            row.Complain(failure.PropertyName, failure.CustomState as string ?? "another value", failure.ErrorMessage);
        }

        return result.IsValid;
    }

    /// <summary>A rule about a column.</summary>
    /// <param name="validator">The validator.</param>
    /// <param name="column">The column's own name.</param>
    /// <param name="holds">What must hold.</param>
    /// <param name="wanted">What is wanted in the cell.</param>
    /// <param name="text">The whole sentence where it does not hold.</param>
    public static void Demand<T>(
        this AbstractValidator<T> validator, string column, Func<T, bool> holds, string wanted, Func<T, string> text)
    {
        ArgumentNullException.ThrowIfNull(validator);
        validator.RuleFor(v => v).Must(holds).OverridePropertyName(column).WithState(_ => wanted).WithMessage(v => text(v));
    }
}
