using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Dissipation, state on, at the ambient where the ratio is worst. Allowed at ambient T:
/// factor x min(Power, Power - slope (T - flat), (Tmax - T)/RthJA) [W]; slope from (Tmax - flat) where the table gives none;
/// nothing from Tmax up, whatever the slope says. Where several transistors of a package are on, the sum of their powers is held in
/// the same way to Power both (missing: Power) and to (Tmax - T)/RthJA both; the larger ratio counts.
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

        Stress stress = OfOne(part, power.Value.Watts, part.PowerSlope?.Value, part.RthJa?.Value.KelvinsPerWatt, point.Power, state, rows);
        if (stress.Verdict != Verdict.NotVerified && point.PackagePower > 0)
        {
            double both = part.PowerBoth?.Value.Watts ?? power.Value.Watts;
            double? slope = part.PowerSlope?.Value * both / power.Value.Watts;
            Stress whole = OfOne(part, both, slope, part.RthJaBoth?.Value.KelvinsPerWatt, point.PackagePower, state, rows) with { Package = true };
            stress = whole.Worse(stress) > 0 ? whole : stress;
        }

        if (stress.Verdict != Verdict.Conforms)
        {
            return stress;
        }

        // With RthJA but no Tj max the third limit is unknown: what is known can refuse, but not clear.
        string? missing = part is { RthJa: not null, TjMax: null } ? "Tj max of " + part.PartNumber : MissingData.Heat(state);
        return missing is null ? stress : Stress.NotVerified(missing);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.Power?.Cell;

    private static Stress OfOne(
        Transistor part, double rated, double? slope, double? rth, double actual, SolvedState state, in RuleRows rows)
    {
        double ambient = state.Corner.Ambient;
        double above = Math.Max(0, ambient - part.FlatTo.Kelvins);
        if (slope is { } fall)
        {
            rated -= fall * above;
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

        if (part.TjMax is { } tmax && rth is { } resistance)
        {
            rated = Math.Min(rated, (tmax.Value.Kelvins - ambient) / resistance);
        }

        if (ambient >= part.TjMax?.Value.Kelvins)
        {
            rated = 0;
        }

        return Stress.AtMostOf(actual, rated * rows.Own.Factor);
    }
}
