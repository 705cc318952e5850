namespace PartCheck.Rules;

/// <summary>What one rule says of one point of one state. SI units.</summary>
/// <param name="Actual">The value judged; NaN: none.</param>
/// <param name="Allowed">The limit; NaN: none.</param>
/// <param name="Ratio">Stress ratio; null: none (nonconforming at any size, or nothing to compare).</param>
/// <param name="Verdict">The verdict for this state alone.</param>
/// <param name="Missing">What is missing, where not verified.</param>
/// <param name="AtLeast">True where the actual value is a lower bound.</param>
/// <param name="Half">True where a rule of two halves speaks of its current half [A].</param>
/// <param name="Package">True where the values are of a whole package, not of one of its elements.</param>
public readonly record struct Stress(
    double Actual, double Allowed, double? Ratio, Verdict Verdict, string? Missing = null, bool AtLeast = false, bool Half = false,
    bool Package = false)
{
    /// <summary>
    /// Relative rounding of double-precision arithmetic that counts as equality [-]: 0.7 x 45 V must not fall short of 31.5 V.
    /// </summary>
    public const double Rounding = 1e-12;

    /// <summary>A datum is missing or not guaranteed in this state.</summary>
    public static Stress NotVerified(string missing) => new(double.NaN, double.NaN, null, Verdict.NotVerified, missing);

    /// <summary>
    /// At most: ratio = actual/allowed. Allowed 0 or negative counts as 0: with anything above it null and nonconforming,
    /// with nothing 0.
    /// </summary>
    public static Stress AtMostOf(double actual, double allowed) =>
        !double.IsFinite(actual) || !double.IsFinite(allowed) ? NotVerified("a finite value")
        : allowed > 0 ? Of(actual, allowed, actual / allowed)
        : actual > 0 ? new Stress(actual, Math.Max(allowed, 0), null, Verdict.Nonconforming)
        : Of(actual, 0, 0);

    /// <summary>At least: ratio = required/actual; nothing there where something is required: null and nonconforming.</summary>
    public static Stress AtLeastOf(double actual, double required) =>
        !double.IsFinite(actual) || !double.IsFinite(required) ? NotVerified("a finite value")
        : required <= 0 && actual >= required ? Of(actual, required, 0)
        : actual > 0 ? Of(actual, required, required / actual)
        : new Stress(actual, required, null, Verdict.Nonconforming);

    /// <summary>Temperatures: ratio = (Tj - Ta)/(Tallowed - Ta); an ambient at or above the limit: null and nonconforming.</summary>
    public static Stress Temperatures(double actual, double ambient, double allowed) =>
        !double.IsFinite(actual) || !double.IsFinite(allowed) ? NotVerified("a finite value")
        : allowed <= ambient ? new Stress(actual, allowed, null, Verdict.Nonconforming)
        : Of(actual, allowed, (actual - ambient) / (allowed - ambient));

    /// <summary>Within a window: the worse of (max - M)/(Wmax - M) and (M - min)/(M - Wmin), M the window's centre, for one value.</summary>
    public static Stress Window(double value, double min, double max)
    {
        double centre = (min + max) / 2;
        return value >= centre
            ? Of(value, max, (value - centre) / (max - centre))
            : Of(value, min, (centre - value) / (centre - min));
    }

    /// <summary>
    /// Orders stresses by how bad they are: nonconforming without a ratio above all, then the higher ratio.
    /// Positive: this one is worse.
    /// </summary>
    public int Worse(in Stress other) => Rank(this).CompareTo(Rank(other));

    private static double Rank(in Stress s) =>
        s.Ratio ?? (s.Verdict == Verdict.Nonconforming ? double.PositiveInfinity : double.NegativeInfinity);

    /// <summary>The one comparison: a ratio of exactly 1 conforms, and one that differs from it by rounding alone is 1.</summary>
    private static Stress Of(double actual, double allowed, double ratio)
    {
        if (!double.IsFinite(ratio))
        {
            return NotVerified("a finite value");
        }

        double settled = Math.Abs(ratio - 1) <= Rounding ? 1 : ratio;
        return new(actual, allowed, settled, settled <= 1 ? Verdict.Conforms : Verdict.Nonconforming);
    }
}
