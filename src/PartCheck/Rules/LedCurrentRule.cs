using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Forward current of the load's LEDs, state on, at the ambient where the ratio is worst, where the channel names them. Actual: the load
/// current, or with n strings in parallel load current/n x String share max [A]. Allowed at ambient T:
/// factor x (IF - slope (T - flat)) [A]; slope straight to zero at Tj max where the table gives none; nothing from Tj max up.
/// A duty below 100 % changes nothing: the current while on is held to the continuous rating.
/// </summary>
public sealed class LedCurrentRule : LedRule
{
    /// <inheritdoc/>
    public override string Id => "led-current";

    /// <inheritdoc/>
    public override string Title => "Forward current of each LED at most its derated maximum at ambient temperature";

    /// <inheritdoc/>
    public override string Unit => "A";

    /// <inheritdoc/>
    public override string Source => "limiting value IF (IEC 60134 absolute maximum rating system): flat, then linear, as LED sheets draw it";

    /// <summary>The allowed forward current [A]; NaN: the table does not say what holds at this ambient.</summary>
    /// <param name="part">The LED.</param>
    /// <param name="rating">Its highest continuous forward current [A].</param>
    /// <param name="ambient">Ambient temperature [K].</param>
    /// <param name="factor">Derating factor [-].</param>
    public static double Allowed(LedPart part, double rating, double ambient, double factor)
    {
        ArgumentNullException.ThrowIfNull(part);
        if (ambient >= part.TjMax?.Value.Kelvins)
        {
            return 0;
        }

        double above = Math.Max(0, ambient - part.FlatTo.Kelvins);
        double fall = part switch
        {
            { ForwardCurrentSlope: { } slope } => slope.Value * above,
            { TjMax: { } max } => rating * above / (max.Value.Kelvins - part.FlatTo.Kelvins),
            _ => above > 0 ? double.NaN : 0,
        };
        return factor * Math.Max(0, rating - fall);
    }

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, LedPart part, BoundChannel channel, in RuleRows rows)
    {
        if (part.Missing is { } absent)
        {
            return Stress.NotVerified(absent);
        }

        if (part.ForwardCurrentMax is not { } rating)
        {
            return Stress.NotVerified("IF of " + part.PartNumber);
        }

        double allowed = Allowed(part, rating.Value.Amperes, state.Corner.Ambient, rows.Own.Factor);
        if (double.IsNaN(allowed))
        {
            return Stress.NotVerified("IF slope of " + part.PartNumber);
        }

        // Nobody knows how parallel strings share unless the channel says so: even shares can refuse, one string alone can clear.
        int strings = channel.Conditions.Strings;
        double even = state.LoadCurrent / strings;
        Stress stress = Stress.AtMostOf(even * Math.Min(strings, channel.Conditions.StringShareMax ?? strings), allowed);
        if (stress.Verdict == Verdict.Nonconforming && channel.Conditions.StringShareMax is null && strings > 1)
        {
            Stress least = Stress.AtMostOf(even, allowed);
            return least.Verdict == Verdict.Nonconforming ? least with { AtLeast = true } : Stress.NotVerified("String share max");
        }

        // An assumed VBE or gain, a tolerance solved as zero and a cold start alone can refuse, but not clear.
        string? missing = MissingData.Gain(state) ?? MissingData.Vbe(state) ?? MissingData.Tolerance(state) ?? MissingData.Heat(state);
        return stress.Verdict == Verdict.Conforms && missing is not null ? Stress.NotVerified(missing) : stress;
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, LedPart part, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        string actual = "I";
        ChannelConditions c = channel.Conditions;
        if (c.Strings > 1)
        {
            actual = "Istring";
            steps.Given("strings", c.Strings, string.Empty, "Strings in parallel", channel.ConditionCells.GetValueOrDefault("Strings"));
            if (stress.AtLeast)
            {
                steps.Step("Istring", "I / strings", "A", "current of a string at even shares: one of them carries at least this");
            }
            else
            {
                bool given = c.StringShareMax is not null;
                steps.Given(
                        "share", c.StringShareMax ?? c.Strings, string.Empty, given ? "String share max" : "no String share max is given: one string may carry all",
                        channel.ConditionCells.GetValueOrDefault("String share max"), assumed: !given)
                    .Step("Istring", "I / strings x min(strings, share)", "A", "most that one string carries");
            }
        }

        steps.Given("IF", part.ForwardCurrentMax!.Value.Amperes, "A", "highest forward current of " + part.PartNumber, part.ForwardCurrentMax.Cell)
            .Given("TLflat", part.FlatTo.Celsius, "degC", "it holds up to here", part.ForwardCurrentFlatTo?.Cell, assumed: part.ForwardCurrentFlatTo is null)
            .Factor(rows.Own);
        string fall = string.Empty;
        if (part.ForwardCurrentSlope is { } slope)
        {
            steps.Given("slope", slope.Value, "A/K", "slope above that", slope.Cell);
            fall = " - slope x max(0, Ta - TLflat)";
        }
        else if (part.TjMax is { } max)
        {
            steps.Given("TLmax", max.Value.Celsius, "degC", "Tj max of " + part.PartNumber, max.Cell);
            fall = " - IF x max(0, Ta - TLflat) / (TLmax - TLflat)";
        }

        bool none = state.Corner.Ambient >= part.TjMax?.Value.Kelvins;
        steps.Step(
                "Iallowed", none ? "0 A" : $"F x max(0, IF{fall})", "A", none ? "nothing: the ambient is at or above Tj max" : "derated forward current at the ambient")
            .AtMost(actual, "Iallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(LedPart part)
    {
        ArgumentNullException.ThrowIfNull(part);
        return part.ForwardCurrentMax?.Cell;
    }
}
