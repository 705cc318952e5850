namespace PartCheck.Quantities;

/// <summary>The border guard of every quantity: no NaN and no infinity gets in.</summary>
internal static class Finite
{
    internal static double Checked(double value, string name) =>
        double.IsFinite(value)
            ? value
            : throw new ArgumentOutOfRangeException(name, value, "A quantity is a finite number.");
}
