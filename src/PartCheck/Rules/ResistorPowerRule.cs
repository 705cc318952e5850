using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Dissipation of a resistor (zero ohm left out), states on and unfed. Allowed: factor x rated power up to T1, then a line to
/// zero at T3 (<c>rated</c>), at T2 = F (T3 - T1) + T1 (<c>parallel</c>) or at a stated temperature, never above T3 [W]. T3 is the
/// film maximum, or where the part's own power slope reaches zero if that is lower. Without a film maximum nothing is known above T1.
/// </summary>
public sealed class ResistorPowerRule : ResistorRule
{
    /// <inheritdoc/>
    public override string Id => "r-power";

    /// <inheritdoc/>
    public override string Title => "Resistor dissipation at most the derated power at ambient temperature";

    /// <inheritdoc/>
    public override string Unit => "W";

    /// <inheritdoc/>
    public override string Source => "rated dissipation: flat, then linear; T2 = F (T3 - T1) + T1 (NASA EEE-INST-002, R2 Table 4, notes 1, 3, 4)";

    /// <inheritdoc/>
    public override bool AppliesTo(ResistorPart part) => part is { Resistance.Value.Ohms: > 0 };

    /// <summary>The allowed power at an ambient [W]; NaN: not known there.</summary>
    /// <param name="part">The resistor; its power must be given.</param>
    /// <param name="row">Derating row of this rule.</param>
    /// <param name="ambient">Ambient temperature [K].</param>
    public static double Allowed(ResistorPart part, DeratingRow row, double ambient)
    {
        ArgumentNullException.ThrowIfNull(part);
        ArgumentNullException.ThrowIfNull(row);
        if (part.Power is not { } power)
        {
            return double.NaN;
        }

        double flat = part.FlatTo.Kelvins;
        double full = power.Value.Watts * row.Factor;
        if (part.TjMax is not { } film)
        {
            return ambient <= flat ? full : double.NaN;
        }

        double t3 = film.Value.Kelvins;
        if (part.PowerSlope is { Value: > 0 } slope)
        {
            t3 = Math.Min(t3, flat + (power.Value.Watts / slope.Value));
        }

        double zero = row.Zero switch
        {
            ZeroTemperature.Parallel => Math.Min(t3, (row.Factor * (t3 - flat)) + flat),
            ZeroTemperature.Fixed => Math.Min(t3, row.ZeroAt?.Kelvins ?? t3),
            _ => t3,
        };
        return ambient >= zero ? 0 : ambient <= flat ? full : full * (zero - ambient) / (zero - flat);
    }

    /// <summary>Writes down <see cref="Allowed"/>, which must be known.</summary>
    /// <param name="steps">The derivation; the allowed power becomes <c>Pallowed</c> [W].</param>
    /// <param name="part">The resistor.</param>
    /// <param name="row">Derating row of this rule.</param>
    /// <param name="ambient">Ambient temperature [K].</param>
    public static void DeriveAllowed(Derivation steps, ResistorPart part, DeratingRow row, double ambient)
    {
        ArgumentNullException.ThrowIfNull(steps);
        ArgumentNullException.ThrowIfNull(part);
        ArgumentNullException.ThrowIfNull(row);
        steps.Given("PRrated", part.Power!.Value.Watts, "W", "rated power of " + part.PartNumber, part.Power.Cell)
            .Given("T1", part.FlatTo.Celsius, "degC", "the rated power holds up to here", part.PowerFlatTo?.Cell, assumed: part.PowerFlatTo is null)
            .Factor(row, "Fp");
        if (part.TjMax is not { } film)
        {
            steps.Step("Pallowed", "PRrated x Fp", "W", "derated power, on its flat part");
            return;
        }

        string t3 = "Tfilm";
        steps.Given("Tfilm", film.Value.Celsius, "degC", "film maximum of " + part.PartNumber, film.Cell);
        if (part.PowerSlope is { Value: > 0 } slope)
        {
            t3 = "T3";
            steps.Given("slope", slope.Value, "W/K", "slope of the rated power", slope.Cell)
                .Step("T3", "min(Tfilm, T1 + PRrated / slope)", "degC", "where the rated power reaches zero");
        }

        if (row is { Zero: ZeroTemperature.Fixed, ZeroAt: { } fix })
        {
            steps.Given("Tzero", fix.Celsius, "degC", "zero temperature of the derating table", row.Cell, row.Source);
        }

        string zero = row switch
        {
            { Zero: ZeroTemperature.Parallel } => $"min({t3}, Fp x ({t3} - T1) + T1)",
            { Zero: ZeroTemperature.Fixed, ZeroAt: not null } => $"min({t3}, Tzero)",
            _ => t3,
        };
        steps.Step("T2", zero, "degC", "where the derated power reaches zero");
        double known = Allowed(part, row, ambient);
        steps.Step(
            "Pallowed", known == 0 ? "0 W" : ambient <= part.FlatTo.Kelvins ? "PRrated x Fp" : "PRrated x Fp x (T2 - Ta) / (T2 - T1)", "W",
            known == 0 ? "nothing: the ambient is at or above T2" : "derated power at the ambient");
    }

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        if (point.Part.Power is null)
        {
            return Stress.NotVerified("Power of " + point.Part.PartNumber);
        }

        double allowed = Allowed(point.Part, rows.Own, state.Corner.Ambient);
        return double.IsNaN(allowed)
            ? Stress.NotVerified("Film max of " + point.Part.PartNumber)
            : Stress.AtMostOf(point.Power, allowed);
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        DeriveAllowed(steps, point.Part, rows.Own, state.Corner.Ambient);
        steps.AtMost("PR", "Pallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(ResistorPart part) => part.Power?.Cell;
}
