using System.Globalization;
using PartCheck.Channels;
using PartCheck.OperatingPoints;

namespace PartCheck.Rules;

/// <summary>
/// How evenly legs share, state on: the largest I Rs (Rs nominal) of a leg over the mean of all legs, minus 1 [-]. The odd leg is off by
/// one lot's VBE match where the table gives one, else by the whole window. Allowed: Sharing max - 1, of the channel, else of the
/// derating table, else not asked.
/// </summary>
public sealed class SharingRule : ChannelRule
{
    /// <inheritdoc/>
    public override string Id => "sharing";

    /// <inheritdoc/>
    public override string Title => "No leg takes more than its share";

    /// <inheritdoc/>
    public override string Unit => string.Empty;

    /// <inheritdoc/>
    public override bool AlwaysAsked => false;

    /// <inheritdoc/>
    public override string Source => "the channel's or the derating table's limit (common practice, no source)";

    /// <inheritdoc/>
    public override bool Asked(BoundChannel channel, in RuleRows rows) =>
        channel is { Legs.Count: > 1 } && (channel.Conditions.SharingMax ?? rows.Own.Limit) is not null;

    /// <inheritdoc/>
    public override bool Reads(SolvedState state)
    {
        if (state is not { State: ChannelState.On, Transistors.Count: > 1 })
        {
            return false;
        }

        // With a match given for every leg, an odd leg elsewhere in the window is of another lot.
        bool match = state.Corner.OddPass.Vbe == Extreme.Match;
        for (int i = 0; i < state.Transistors.Count; i++)
        {
            TransistorPoint point = state.Transistors[i];
            if (point is { Role: Role.Pass, Part.VbeMatch: null })
            {
                return !match;
            }
        }

        return match;
    }

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, BoundChannel channel, in RuleRows rows)
    {
        double sum = 0;
        double most = 0;
        int legs = 0;
        for (int i = 0; i < state.Transistors.Count; i++)
        {
            TransistorPoint point = state.Transistors[i];
            if (point.Role == Role.Pass)
            {
                double share = point.SenseVoltage / point.SenseResistance * point.NominalSense;
                sum += point.Count * share;
                legs += point.Count;
                most = Math.Max(most, share);
            }
        }

        if ((channel.Conditions.SharingMax ?? rows.Own.Limit) is not { } limit)
        {
            return Stress.NotVerified("Sharing max");
        }

        if (!(sum > 0))
        {
            return Stress.NotVerified("a current through the legs");
        }

        Stress stress = Stress.AtMostOf((most * legs / sum) - 1, limit - 1);

        // A missing tolerance was solved as zero, missing thermal data as the cold start alone: they can refuse, but not clear.
        string? missing = MissingData.Tolerance(state) ?? MissingData.Heat(state);
        return stress.Verdict == Verdict.Conforms && missing is not null ? Stress.NotVerified(missing) : stress;
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        ArgumentNullException.ThrowIfNull(channel);
        List<string> shares = [];
        List<string> sum = [];
        int legs = 0;
        for (int i = 0; i < state.Transistors.Count; i++)
        {
            TransistorPoint point = state.Transistors[i];
            if (point.Role == Role.Pass)
            {
                string leg = Derivation.SubjectOf(state, i);
                steps.Given("Rn" + leg, point.NominalSense, "ohm", "nominal sense resistance")
                    .Step("S" + leg, $"VE{leg} / Rs{leg} x Rn{leg}", "V", "share of a leg: its current times the nominal resistance");
                shares.Add("S" + leg);
                sum.Add(point.Count == 1 ? "S" + leg : string.Create(CultureInfo.InvariantCulture, $"{point.Count} x S{leg}"));
                legs += point.Count;
            }
        }

        bool own = channel.Conditions.SharingMax is not null;
        steps.Step("Smean", string.Create(CultureInfo.InvariantCulture, $"({string.Join(" + ", sum)}) / {legs}"), "V", "mean of all legs")
            .Step("excess", $"max({string.Join(", ", shares)}) / Smean - 1", string.Empty, "how far the largest lies above the mean")
            .Given(
                "Smax", channel.Conditions.SharingMax ?? rows.Own.Limit ?? 1, string.Empty, own ? "Sharing max" : "limit of the derating table",
                own ? channel.ConditionCells.GetValueOrDefault("Sharing max") : rows.Own.Cell, own ? null : rows.Own.Source)
            .Step("allowed", "Smax - 1", string.Empty, "allowed excess")
            .AtMost("excess", "allowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(BoundChannel channel, in Stress stress) =>
        channel is { Conditions.SharingMax: not null } ? channel.ConditionCells.GetValueOrDefault("Sharing max") : null;
}
