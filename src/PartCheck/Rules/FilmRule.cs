using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Film temperature of a resistor, state on, where its table row gives a thermal resistance: T = Ta + P Rth. Allowed: film maximum
/// less offset. Ratio (T - Ta)/(Tallowed - Ta).
/// </summary>
public sealed class FilmRule : ResistorRule
{
    /// <inheritdoc/>
    public override string Id => "r-film";

    /// <inheritdoc/>
    public override string Title => "Film temperature at most its derated maximum, where a thermal resistance is given";

    /// <inheritdoc/>
    public override string Unit => "K";

    /// <inheritdoc/>
    public override bool AlwaysAsked => false;

    /// <inheritdoc/>
    public override string Source => "T = Ta + P Rth; the rated dissipation holds only while the film's limit is kept (film chip sheets)";

    /// <inheritdoc/>
    public override bool AppliesTo(ResistorPart part) => part is { RthJa: not null, Resistance.Value.Ohms: > 0 };

    /// <inheritdoc/>
    public override bool Reads(SolvedState state) => state is { State: ChannelState.On };

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        if (point.Part.TjMax is not { } max)
        {
            return Stress.NotVerified("Film max of " + point.Part.PartNumber);
        }

        double ambient = state.Corner.Ambient;
        double film = ambient + (point.Power * (point.Part.RthJa?.Value.KelvinsPerWatt ?? 0));
        return Stress.Temperatures(film, ambient, JunctionRule.Allowed(max.Value, rows.Own));
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        steps.Given("Rth", point.Part.RthJa!.Value.KelvinsPerWatt, "K/W", "thermal resistance of " + point.Part.PartNumber, point.Part.RthJa.Cell)
            .Given("Tfilm", point.Part.TjMax!.Value.Celsius, "degC", "film maximum of " + point.Part.PartNumber, point.Part.TjMax.Cell)
            .Step("Tf", "Ta + PR x Rth", "degC", "film temperature");
        JunctionRule.DeriveAllowed(steps, "Tfilm", rows.Own);
        steps.Rises("Tf", "Tallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(ResistorPart part) => part.TjMax?.Cell;
}
