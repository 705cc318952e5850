using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>Collector current, state on. Allowed: IC rating (continuous) x factor [A].</summary>
public sealed class IcRule : TransistorRule
{
    /// <inheritdoc/>
    public override string Id => "ic";

    /// <inheritdoc/>
    public override string Title => "Collector current at most the derated IC rating";

    /// <inheritdoc/>
    public override string Unit => "A";

    /// <inheritdoc/>
    public override string Source => "limiting value IC (IEC 60134 absolute maximum rating system)";

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows) =>
        point.Part.Ic is { } rating
            ? Stress.AtMostOf(point.Ic, rating.Value.Amperes * rows.Own.Factor)
            : Stress.NotVerified("IC of " + point.Part.PartNumber);

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        steps.Given("ICmax", point.Part.Ic!.Value.Amperes, "A", "IC rating of " + point.Part.PartNumber, point.Part.Ic.Cell).Factor(rows.Own)
            .Step("ICallowed", "ICmax x F", "A", "derated rating").AtMost("IC#", "ICallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.Ic?.Cell;
}

/// <summary>Current through a zero-ohm resistor, state on: the <c>ic</c> rule of a jumper. Allowed: its current rating x factor [A].</summary>
public sealed class ZeroOhmCurrentRule : ResistorRule
{
    /// <inheritdoc/>
    public override string Id => "ic";

    /// <inheritdoc/>
    public override string Title => "Current through a zero-ohm resistor at most its derated rating";

    /// <inheritdoc/>
    public override string Unit => "A";

    /// <inheritdoc/>
    public override string Source => "rated current of the zero-ohm resistor";

    /// <inheritdoc/>
    public override bool AppliesTo(ResistorPart part) => part is { Resistance.Value.Ohms: 0 };

    /// <inheritdoc/>
    public override bool Reads(SolvedState state) => state is { State: ChannelState.On };

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows) =>
        point.Part.Ic is { } rating
            ? Stress.AtMostOf(point.Current, rating.Value.Amperes * rows.Own.Factor)
            : Stress.NotVerified("IC of " + point.Part.PartNumber);

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        steps.Given("Imax", point.Part.Ic!.Value.Amperes, "A", "rated current of " + point.Part.PartNumber, point.Part.Ic.Cell).Factor(rows.Own)
            .Step("Iallowed", "Imax x F", "A", "derated rating").AtMost("IR", "Iallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(ResistorPart part) => part.Ic?.Cell;
}
