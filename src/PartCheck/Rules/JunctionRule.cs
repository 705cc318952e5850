using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Rules;

/// <summary>
/// Junction temperature, state on, under PWM its peak. Allowed: the lowest of Tmax x factor (a multiplication of degrees Celsius), Tmax - offset
/// and cap. Ratio (Tj - Ta)/(Tallowed - Ta). The solved Tj holds what the other elements of its package add. A junction that ran away is
/// nonconforming, "at least" where it is held.
/// </summary>
public sealed class JunctionRule : TransistorRule
{
    /// <inheritdoc/>
    public override string Id => "junction";

    /// <inheritdoc/>
    public override string Title => "Junction temperature at most the derated maximum";

    /// <inheritdoc/>
    public override string Unit => "K";

    /// <inheritdoc/>
    public override string Source => "Tj = Ta + P RthJA (JESD51 family, RthJA of the stated board)";

    /// <summary>The allowed junction temperature [K].</summary>
    /// <param name="maximum">Highest junction temperature.</param>
    /// <param name="row">Derating row.</param>
    public static double Allowed(Temperature maximum, DeratingRow row)
    {
        ArgumentNullException.ThrowIfNull(row);
        double allowed = Math.Min((maximum.Celsius * row.Factor) + Temperature.CelsiusZero, maximum.Kelvins - row.Offset.Kelvins);
        return Math.Min(allowed, row.Cap?.Kelvins ?? double.PositiveInfinity);
    }

    /// <summary>Writes down <see cref="Allowed"/>.</summary>
    /// <param name="steps">The derivation; the allowed temperature becomes <c>Tallowed</c> [degC].</param>
    /// <param name="maximum">Symbol of the maximum.</param>
    /// <param name="row">Derating row.</param>
    public static void DeriveAllowed(Derivation steps, string maximum, DeratingRow row)
    {
        ArgumentNullException.ThrowIfNull(steps);
        ArgumentNullException.ThrowIfNull(row);
        steps.Factor(row).Given("offset", row.Offset.Kelvins, "K", "distance from the maximum", row.Cell, row.Source);
        string limits = $"{maximum} x F, {maximum} - offset";
        if (row.Cap is { } cap)
        {
            steps.Given("Tcap", cap.Celsius, "degC", "upper bound of the limit", row.Cell, row.Source);
            limits += ", Tcap";
        }

        steps.Step("Tallowed", $"min({limits})", "degC", "the lowest of factor (of degrees Celsius), offset and cap");
    }

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        if (point.Part.TjMax is not { } max)
        {
            // A junction that ran away broke any limit there may be.
            return point.Held
                ? new Stress(point.Tj, double.NaN, null, Verdict.Nonconforming, AtLeast: true)
                : Stress.NotVerified("Tj max of " + point.Part.PartNumber);
        }

        double allowed = Allowed(max.Value, rows.Own);
        Stress stress = Stress.Temperatures(point.Tj, state.Corner.Ambient, allowed);
        if (point.Held)
        {
            return stress with { Verdict = Verdict.Nonconforming, AtLeast = true };
        }

        return stress.Verdict == Verdict.Conforms && MissingData.Heat(state) is { } missing ? Stress.NotVerified(missing) : stress;
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        if (point.Held)
        {
            steps.Note("The junction runs away; it is held at its bound, so that its temperature is at least this.");
        }

        if (point.Part.TjMax is not { } max)
        {
            steps.Broken("Tj#");
            return;
        }

        steps.Given("Tmax#", max.Value.Celsius, "degC", "Tj max of " + point.Part.PartNumber, max.Cell);
        DeriveAllowed(steps, "Tmax#", rows.Own);
        steps.Rises("Tj#", "Tallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.TjMax?.Cell;
}
