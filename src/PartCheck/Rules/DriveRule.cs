using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Base drive, state on, h = 0 (the worst is the cold start). At the lowest base voltage where the control collects
/// (k' - 1) x sum IB: available is what pin level, source resistance, feed and pull-down deliver into the base node there;
/// required is k' x sum IB; k' = max(k, 1.2), k the drive factor of the derating table [A]. No such voltage below the pin's
/// level, or nothing available: nonconforming without a ratio, since the loop no longer regulates.
/// </summary>
public sealed class DriveRule : ChannelRule
{
    /// <inheritdoc/>
    public override string Id => "drive";

    /// <inheritdoc/>
    public override string Title => "Base drive at least the drive factor times what the pass transistors need";

    /// <inheritdoc/>
    public override string Unit => "A";

    /// <inheritdoc/>
    public override string Source => "forced-beta margin at the edge of regulation (common practice, no source)";

    /// <inheritdoc/>
    public override bool Reads(SolvedState state) => state is { State: ChannelState.On, Drive: not null };

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, BoundChannel channel, in RuleRows rows)
    {
        string? missing = MissingData.Gain(state) ?? MissingData.Vbe(state)
            ?? (state.PinGuaranteed ? null : "pin level at this current");
        if (missing is not null || state.Drive is not { } drive)
        {
            return Stress.NotVerified(missing ?? "edge of regulation");
        }

        double required = drive.Factor * drive.SumBaseCurrent;
        return drive.Exists && !(drive.Available <= 0)
            ? Stress.AtLeastOf(drive.Available, required)
            : new Stress(drive.Exists ? drive.Available : double.NaN, drive.Exists ? required : double.NaN, null, Verdict.Nonconforming);
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        if (state.Drive is not { Exists: true } drive)
        {
            steps.Note("No base voltage below the pin's level makes the control collect (k' - 1) times the sum of the base currents: the loop does not regulate.");
            return;
        }

        bool atPin = channel is { PullDown: not null, PullDownAt: PullDownAt.Pin };
        string delivered = atPin ? "(Vsource - Vedge) / Rsource" : "(Vpin - Vedge) / (Rf + Rpin)";
        steps.Given("k", rows.Own.Limit ?? 1, string.Empty, "drive factor of the derating table", rows.Own.Cell, rows.Own.Source)
            .Step("k'", "max(k, 1.2)", string.Empty, "drive factor, at least 1.2")
            .Solved("Vedge", drive.BaseVoltage, "V", "lowest base voltage at which the control regulates")
            .Solved("IBedge", drive.SumBaseCurrent, "A", "sum of the pass transistors' base currents there")
            .Solved("ICedge", drive.ControlCurrent, "A", "collector current of the control there")
            .Balance("ICedge", "(k' - 1) x IBedge", "A", "the edge of regulation")
            .Step(
                "Iavailable", channel is { PullDown: not null, PullDownAt: PullDownAt.Base } ? delivered + " - Vedge / Rp" : delivered, "A",
                "what pin, feed and pull-down deliver into the base node there")
            .Step("Ineeded", "k' x IBedge", "A", "what the pass transistors need, k' times")
            .AtLeast("Iavailable", "Ineeded", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(BoundChannel channel, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        return channel.Legs[0].PassPart.HfeCold?.Cell ?? channel.Legs[0].PassPart.Hfe?.Cell;
    }
}
