using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Collector-emitter voltage, states on and off. Pass transistor: the whole of Supply peak stands across it when the load
/// drops nothing. Control: the highest base-node voltage, bounded by the pin's level. Allowed: VCEO x factor [V].
/// </summary>
public sealed class VceRule : TransistorRule
{
    /// <inheritdoc/>
    public override string Id => "vce";

    /// <inheritdoc/>
    public override string Title => "Collector-emitter voltage at most the derated VCEO";

    /// <inheritdoc/>
    public override string Unit => "V";

    /// <inheritdoc/>
    public override string Source => "limiting value VCEO (IEC 60134 absolute maximum rating system)";

    /// <inheritdoc/>
    public override bool Reads(SolvedState state) => state is { State: ChannelState.On or ChannelState.Off };

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        if (point.Part.Vceo is not { } rating)
        {
            return Stress.NotVerified("VCEO of " + point.Part.PartNumber);
        }

        double actual = point.Role == Role.Pass
            ? channel.Conditions.SupplyPeak.Volts
            : Math.Min(state.BaseVoltage, state.Corner.PinLevel);
        return Stress.AtMostOf(actual, rating.Value.Volts * rows.Own.Factor);
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        if (point.Role == Role.Pass)
        {
            steps.Given("Vpeak", channel.Conditions.SupplyPeak.Volts, "V", "Supply peak: the load drops nothing", PeakCell(channel))
                .Step("VCEmax", "Vpeak", "V", "the whole of it stands across the pass transistor");
        }
        else
        {
            steps.Step("VCEmax", "min(Vb, Vpin)", "V", "base-node voltage, bounded by the pin's level");
        }

        steps.Given("VCEO", point.Part.Vceo!.Value.Volts, "V", "rating of " + point.Part.PartNumber, point.Part.Vceo.Cell).Factor(rows.Own)
            .Step("VCEallowed", "VCEO x F", "V", "derated rating").AtMost("VCEmax", "VCEallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.Vceo?.Cell;

    /// <summary>The cell of the highest supply: Supply peak, or Supply max where no peak is given.</summary>
    internal static string? PeakCell(BoundChannel channel) => channel.ConditionCells.GetValueOrDefault(
        channel.Conditions.SupplyPeak.Volts == channel.Conditions.Supply.Max.Volts ? "Supply max" : "Supply peak");
}
