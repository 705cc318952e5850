using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Load current with the pin low, state off, at the hottest ambient, where the channel gives Off current max [A]. The table's ICBO of
/// each pass transistor is injected from its collector into the base node as given; it is never scaled, so one given below the
/// hottest ambient says nothing there.
/// </summary>
public sealed class OffRule : ChannelRule
{
    /// <inheritdoc/>
    public override string Id => "off";

    /// <inheritdoc/>
    public override string Title => "Load current with the pin low at most Off current max, hottest and with leakage";

    /// <inheritdoc/>
    public override string Unit => "A";

    /// <inheritdoc/>
    public override bool AlwaysAsked => false;

    /// <inheritdoc/>
    public override string Source => "the channel's own limit; ICBO of the part's sheet";

    /// <inheritdoc/>
    public override bool Asked(BoundChannel channel, in RuleRows rows) => channel is { Conditions.OffCurrentMax: not null };

    /// <inheritdoc/>
    public override bool Reads(SolvedState state) => state is { State: ChannelState.Off, Index: >= 0 };

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, BoundChannel channel, in RuleRows rows)
    {
        ArgumentNullException.ThrowIfNull(channel);
        LogicPin pin = channel.Logic;
        if (pin.LowMax is null || (pin.Output == PinOutput.Cmos && pin.LowCurrent is null))
        {
            return Stress.NotVerified((pin.LowMax is null ? "Low max of " : "Low current of ") + pin.Name);
        }

        for (int i = 0; i < channel.Legs.Count; i++)
        {
            Transistor part = channel.Legs[i].PassPart;
            if (part.IcboMax is null || part.IcboTemperature is null)
            {
                return Stress.NotVerified("ICBO of " + part.PartNumber);
            }

            // An element that is on in another channel warms the one that leaks.
            double hottest = state.Corner.NeighboursOn == true ? Warmest(state) : channel.Conditions.Ambient.Max.Kelvins;
            if (part.IcboTemperature.Value.Kelvins < hottest)
            {
                return Stress.NotVerified("ICBO at the hottest ambient of " + part.PartNumber);
            }
        }

        if (channel.Conditions.OffCurrentMax is not { } limit)
        {
            return Stress.NotVerified("Off current max");
        }

        // An assumed VBE and a tolerance solved as zero can refuse, but not clear.
        Stress stress = Stress.AtMostOf(state.LoadCurrent, limit.Amperes);
        string? missing = MissingData.Vbe(state) ?? MissingData.Tolerance(state)
            ?? (channel.Neighbours.Count > 0 ? MissingData.Heat(state) : null);
        return stress.Verdict == Verdict.Conforms && missing is not null ? Stress.NotVerified(missing) : stress;
    }

    private static double Warmest(SolvedState state)
    {
        double most = 0;
        for (int i = 0; i < state.Transistors.Count; i++)
        {
            most = state.Transistors[i].Role == Role.Pass ? Math.Max(most, state.Transistors[i].Tj) : most;
        }

        return most;
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        steps.Given("Ioff", channel.Conditions.OffCurrentMax!.Value.Amperes, "A", "Off current max", channel.ConditionCells.GetValueOrDefault("Off current max"))
            .AtMost("I", "Ioff", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(BoundChannel channel, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        return channel.ConditionCells.GetValueOrDefault("Off current max");
    }
}
