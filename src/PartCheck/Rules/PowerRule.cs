using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Dissipation, state on, under PWM from 1 kHz up its average over the period at the largest duty, at the ambient where the ratio is worst. Allowed at ambient T:
/// factor x min(Power, Power - slope (T - flat), (Tmax - T)/RthJA) [W]; slope from (Tmax - flat) where the table gives none;
/// nothing from Tmax up, whatever the slope says.
/// MIL-PRF-19500/255 1.3 states its ratings so: flat at PT, then a line to zero at TJ maximum.
/// </summary>
public sealed class PowerRule : TransistorRule
{
    /// <inheritdoc/>
    public override string Id => "power";

    /// <inheritdoc/>
    public override string Title => "Dissipation at most the derated power at ambient temperature";

    /// <inheritdoc/>
    public override string Unit => "W";

    /// <inheritdoc/>
    public override string Source => "rated power: flat, then linear (form of MIL-PRF-19500/255, 1.3)";

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        Transistor part = point.Part;
        if (part.Power is not { } power)
        {
            return Stress.NotVerified("Power of " + part.PartNumber);
        }

        double ambient = state.Corner.Ambient;
        double above = Math.Max(0, ambient - part.FlatTo.Kelvins);
        double rated = power.Value.Watts;
        if (part.PowerSlope is { } slope)
        {
            rated -= slope.Value * above;
        }
        else if (part.TjMax is { } max)
        {
            double span = max.Value.Kelvins - part.FlatTo.Kelvins;
            rated = span > 0 ? rated * (1 - (above / span)) : 0;
        }
        else if (above > 0)
        {
            return Stress.NotVerified("Tj max of " + part.PartNumber);
        }

        if (part is { TjMax: { } tmax, RthJa: { } rth })
        {
            rated = Math.Min(rated, (tmax.Value.Kelvins - ambient) / rth.Value.KelvinsPerWatt);
        }

        if (ambient >= part.TjMax?.Value.Kelvins)
        {
            rated = 0;
        }

        Stress stress = Stress.AtMostOf(point.Power * point.AveragedShare, rated * rows.Own.Factor);
        if (stress.Verdict != Verdict.Conforms)
        {
            return stress;
        }

        // With RthJA but no Tj max the third limit is unknown: what is known can refuse, but not clear.
        string? missing = part is { RthJa: not null, TjMax: null } ? "Tj max of " + part.PartNumber : MissingData.Heat(state);
        return missing is null ? stress : Stress.NotVerified(missing);
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        Transistor part = point.Part;
        double ambient = state.Corner.Ambient;
        steps.Given("Prated#", part.Power!.Value.Watts, "W", "rated power of " + part.PartNumber, part.Power.Cell)
            .Given("Tflat#", part.FlatTo.Celsius, "degC", "the rated power holds up to here", part.PowerFlatTo?.Cell, assumed: part.PowerFlatTo is null);
        string line = "Prated#";
        if (part.TjMax is { } max)
        {
            steps.Given("Tmax#", max.Value.Celsius, "degC", "Tj max of " + part.PartNumber, max.Cell);
        }

        if (part.PowerSlope is { } slope)
        {
            steps.Given("slope", slope.Value, "W/K", "slope of the rated power above that", slope.Cell);
            line = "Prated# - slope x max(0, Ta - Tflat#)";
        }
        else if (part.TjMax is { } zero)
        {
            line = zero.Value.Kelvins > part.FlatTo.Kelvins ? "Prated# x (1 - max(0, Ta - Tflat#) / (Tmax# - Tflat#))" : "0 W";
        }

        steps.Step("Pline", line, "W", "rated power at the ambient: flat, then a line");
        bool thermal = part is { TjMax: not null, RthJa: not null };
        if (thermal)
        {
            steps.Step("Pth", "(Tmax# - Ta) / RthJA#", "W", "what the thermal resistance lets through up to Tj max");
        }

        bool averaged = point.AveragedShare != 1;
        if (averaged)
        {
            steps.Step("Pmean", "d x P#", "W", "average over the period, from 1 kHz up");
        }

        bool none = ambient >= part.TjMax?.Value.Kelvins;
        steps.Factor(rows.Own)
            .Step(
                "Pallowed", none ? "0 W" : thermal ? "F x max(0, min(Pline, Pth))" : "F x max(0, Pline)", "W",
                none ? "nothing: the ambient is at or above Tj max" : "derated power")
            .AtMost(averaged ? "Pmean" : "P#", "Pallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.Power?.Cell;
}
