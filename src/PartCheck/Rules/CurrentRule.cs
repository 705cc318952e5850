using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Load current, state on, both extremes within the channel's window: ratio max((Imax - M)/(Wmax - M), (M - Imin)/(M - Wmin)),
/// M the window's centre. The lower half is not verified where the pin's current exceeds the current of its guaranteed level.
/// </summary>
public sealed class CurrentRule : ChannelRule
{
    /// <inheritdoc/>
    public override string Id => "current";

    /// <inheritdoc/>
    public override string Title => "Load current within the channel's window";

    /// <inheritdoc/>
    public override string Unit => "A";

    /// <inheritdoc/>
    public override string Source => "the channel's own window";

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, BoundChannel channel, in RuleRows rows)
    {
        Interval window = new(channel.Conditions.CurrentWindow.Min.Amperes, channel.Conditions.CurrentWindow.Max.Amperes);
        Stress stress = Stress.Window(state.LoadCurrent, window.Min, window.Max);
        string? missing = MissingData.Gain(state) ?? MissingData.Vbe(state) ?? MissingData.Tolerance(state);
        if (missing is null && !state.PinGuaranteed && !(stress.Verdict == Verdict.Nonconforming && state.LoadCurrent > window.Max))
        {
            // A level that nobody guarantees may be lower still: such a state can break the upper end, but not clear the lower one.
            missing = "pin level at this current";
        }

        // Without thermal data the cold start alone was solved: it can refuse, but not clear.
        missing ??= stress.Verdict == Verdict.Conforms ? MissingData.Heat(state) : null;
        return missing is null ? stress : Stress.NotVerified(missing);
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        Interval window = new(channel.Conditions.CurrentWindow.Min.Amperes, channel.Conditions.CurrentWindow.Max.Amperes);
        bool upper = stress.Allowed == window.Max;
        steps.Given("Imin", window.Min, "A", "Current min", channel.ConditionCells.GetValueOrDefault("Current min"))
            .Given("Imax", window.Max, "A", "Current max", channel.ConditionCells.GetValueOrDefault("Current max"))
            .Step("M", "(Imin + Imax) / 2", "A", "centre of the window")
            .Judged("I", upper ? "Imax" : "Imin", upper ? "(I - M) / (Imax - M)" : "(M - I) / (M - Imin)", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(BoundChannel channel, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        string column = stress.Allowed == channel.Conditions.CurrentWindow.Min.Amperes ? "Current min" : "Current max";
        return channel.ConditionCells.GetValueOrDefault(column);
    }

    private readonly record struct Interval(double Min, double Max);
}
