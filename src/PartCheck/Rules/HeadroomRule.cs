using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Headroom, state on, at minimum supply and maximum load drop, two halves of which the larger ratio counts: the load current
/// at least the window's minimum [A]; VCE of the tightest pass transistor at least VCEsat max x max(1, I/VCEsat at) [V].
/// </summary>
public sealed class HeadroomRule : ChannelRule
{
    /// <inheritdoc/>
    public override string Id => "headroom";

    /// <inheritdoc/>
    public override string Title => "At minimum supply and maximum drop enough current, and no pass transistor saturated";

    /// <inheritdoc/>
    public override string Unit => "V";

    /// <inheritdoc/>
    public override string Source => "the channel's own window; VCEsat of the part's sheet";

    /// <inheritdoc/>
    public override bool Reads(SolvedState state) => state is { State: ChannelState.On, LowestHeadroom: true };

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, BoundChannel channel, in RuleRows rows)
    {
        string? missing = MissingData.Gain(state) ?? (state.PinGuaranteed ? null : "pin level at this current");
        if (missing is not null)
        {
            return Stress.NotVerified(missing);
        }

        // A current half that needs the larger ratio is reported in amperes.
        Stress worst = Stress.AtLeastOf(state.LoadCurrent, channel.Conditions.CurrentWindow.Min.Amperes) with { Half = true };
        for (int i = 0; i < state.Transistors.Count; i++)
        {
            TransistorPoint point = state.Transistors[i];
            if (point.Role != Role.Pass)
            {
                continue;
            }

            if (point.Part is not { VceSatMax: { } saturation, VceSatAt: { } at })
            {
                missing = "VCEsat of " + point.Part.PartNumber;
                continue;
            }

            double required = saturation.Value.Volts * Math.Max(1, point.Ic / at.Amperes);
            Stress half = Stress.AtLeastOf(point.Vce, required);
            if (half.Worse(worst) > 0)
            {
                worst = half;
            }
        }

        missing ??= MissingData.Heat(state);
        return missing is not null && worst.Verdict != Verdict.Nonconforming ? Stress.NotVerified(missing) : worst;
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        if (stress.Half)
        {
            steps.Given("Imin", channel.Conditions.CurrentWindow.Min.Amperes, "A", "Current min", channel.ConditionCells.GetValueOrDefault("Current min"))
                .AtLeast("I", "Imin", stress);
            return;
        }

        for (int i = 0; i < state.Transistors.Count; i++)
        {
            TransistorPoint point = state.Transistors[i];
            if (point is { Role: Role.Pass, Part: { VceSatMax: { } saturation, VceSatAt: { } at } } && point.Vce == stress.Actual)
            {
                string leg = Derivation.SubjectOf(state, i);
                steps.Given("VCEsat", saturation.Value.Volts, "V", "VCEsat max of " + point.Part.PartNumber, saturation.Cell)
                    .Given("Isat", at.Amperes, "A", "collector current that it holds at", saturation.Cell)
                    .Step("Vneeded", $"VCEsat x max(1, IC{leg} / Isat)", "V", "VCEsat at this current")
                    .AtLeast("VCE" + leg, "Vneeded", stress);
                return;
            }
        }
    }

    /// <inheritdoc/>
    public override string? DecidingCell(BoundChannel channel, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        return stress.Half
            ? channel.ConditionCells.GetValueOrDefault("Current min")
            : channel.Legs[0].PassPart.VceSatMax?.Cell;
    }
}
