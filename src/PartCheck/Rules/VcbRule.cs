using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Collector-base voltage, states on and off: the highest of all corners, Supply peak included. Allowed: VCBO x factor [V].
/// </summary>
public sealed class VcbRule : TransistorRule
{
    /// <inheritdoc/>
    public override string Id => "vcb";

    /// <inheritdoc/>
    public override string Title => "Collector-base voltage at most the derated VCBO";

    /// <inheritdoc/>
    public override string Unit => "V";

    /// <inheritdoc/>
    public override string Source => "limiting value VCBO (IEC 60134 absolute maximum rating system)";

    /// <inheritdoc/>
    public override bool Reads(SolvedState state) => state is { State: ChannelState.On or ChannelState.Off };

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        if (point.Part.Vcbo is not { } rating)
        {
            return Stress.NotVerified("VCBO of " + point.Part.PartNumber);
        }

        // A pass transistor's collector follows the supply's peak; with the pin low the load drops nothing.
        double actual = point.Role != Role.Pass ? point.Vcb
            : state.State == ChannelState.Off ? channel.Conditions.SupplyPeak.Volts - state.BaseVoltage
            : point.Vcb + Math.Max(0, channel.Conditions.SupplyPeak.Volts - state.Corner.Supply);
        return Stress.AtMostOf(actual, rating.Value.Volts * rows.Own.Factor);
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        if (point.Role == Role.Pass)
        {
            steps.Given("Vpeak", channel.Conditions.SupplyPeak.Volts, "V", "Supply peak", VceRule.PeakCell(channel))
                .Step(
                    "VCBmax", state.State == ChannelState.Off ? "Vpeak - Vb" : "VCB# + max(0, Vpeak - Vsupply)", "V",
                    state.State == ChannelState.Off ? "the load drops nothing" : "the collector follows the supply's peak");
        }
        else
        {
            steps.Step("VCBmax", "VCB#", "V", "collector-base voltage");
        }

        steps.Given("VCBO", point.Part.Vcbo!.Value.Volts, "V", "rating of " + point.Part.PartNumber, point.Part.Vcbo.Cell).Factor(rows.Own)
            .Step("VCBallowed", "VCBO x F", "V", "derated rating").AtMost("VCBmax", "VCBallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.Vcbo?.Cell;
}
