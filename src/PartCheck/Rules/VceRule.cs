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
    public override string? DecidingCell(Transistor part) => part.Vceo?.Cell;
}
