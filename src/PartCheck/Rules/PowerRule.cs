using System.Globalization;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Dissipation, state on, under PWM from 1 kHz up its average over the period at the largest duty, at the ambient where the ratio is worst.
/// Allowed at ambient T:
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

        Stress stress = OfOne(part, power.Value.Watts, part.PowerSlope?.Value, part.RthJa?.Value.KelvinsPerWatt, point.Power * point.AveragedShare, state, rows);
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
    public override void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        Transistor part = point.Part;
        string actual = "P#";
        if (stress.Package)
        {
            steps.Solved("Ppack#", point.PackagePower, "W", "power of all elements of the package, averaged over the period where it counts as an average")
                .Given("Pratedall#", (part.PowerBoth ?? part.Power!).Value.Watts, "W", "rated power of the package of " + part.PartNumber, (part.PowerBoth ?? part.Power!).Cell, assumed: part.PowerBoth is null);
            actual = "Ppack#";
        }
        else
        {
            steps.Given("Prated#", part.Power!.Value.Watts, "W", "rated power of " + part.PartNumber, part.Power.Cell);
            if (point.AveragedShare < 1)
            {
                steps.Step("Pmean", "d x P#", "W", "average over the period, from 1 kHz up");
                actual = "Pmean";
            }
        }

        DeriveAllowed(steps, part, state.Corner.Ambient, rows, stress.Package);
        steps.AtMost(actual, "Pallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.Power?.Cell;

    /// <inheritdoc/>
    public override string? Remark(Placement placement, BoundChannel channel, in Stress stress)
    {
        List<string> words = [];
        if (stress.Package)
        {
            words.Add($"the whole package {placement.Package}, its elements together");
        }

        if (PulsedHeat.AveragedShare(channel.Conditions) is < 1 and var duty)
        {
            words.Add(string.Create(CultureInfo.InvariantCulture, $"averaged over a duty of {duty * 100:0.###} %"));
        }

        return words.Count == 0 ? null : string.Join("; ", words);
    }

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

    private static void DeriveAllowed(Derivation steps, Transistor part, double ambient, in RuleRows rows, bool package)
    {
        steps.Given("Tflat#", part.FlatTo.Celsius, "degC", "the rated power holds up to here", part.PowerFlatTo?.Cell, assumed: part.PowerFlatTo is null);
        string rated = package ? "Pratedall#" : "Prated#";
        string line = rated;
        if (part.TjMax is { } max)
        {
            steps.Given("Tmax#", max.Value.Celsius, "degC", "Tj max of " + part.PartNumber, max.Cell);
        }

        if (part.PowerSlope is { } slope)
        {
            double share = package && part is { PowerBoth: { } both, Power: { } one } ? both.Value.Watts / one.Value.Watts : 1;
            steps.Given("slope", slope.Value * share, "W/K", share == 1 ? "slope of the rated power above that" : "slope above that, as much steeper as the package's power is larger", slope.Cell);
            line = rated + " - slope x max(0, Ta - Tflat#)";
        }
        else if (part.TjMax is { } zero)
        {
            line = zero.Value.Kelvins > part.FlatTo.Kelvins ? rated + " x (1 - max(0, Ta - Tflat#) / (Tmax# - Tflat#))" : "0 W";
        }

        steps.Step("Pline", line, "W", "rated power at the ambient: flat, then a line");
        bool thermal = part.TjMax is not null && (package ? part.RthJaBoth : part.RthJa) is not null;
        if (thermal && package)
        {
            steps.Given("RthBoth#", part.RthJaBoth!.Value.KelvinsPerWatt, "K/W", "thermal resistance with all elements on, over the sum of their powers", part.RthJaBoth.Cell);
        }

        if (thermal)
        {
            steps.Step("Pth", package ? "(Tmax# - Ta) / RthBoth#" : "(Tmax# - Ta) / RthJA#", "W", "what the thermal resistance lets through up to Tj max");
        }

        bool none = ambient >= part.TjMax?.Value.Kelvins;
        steps.Factor(rows.Own)
            .Step(
                "Pallowed", none ? "0 W" : thermal ? "F x max(0, min(Pline, Pth))" : "F x max(0, Pline)", "W",
                none ? "nothing: the ambient is at or above Tj max" : "derated power");
    }
}
