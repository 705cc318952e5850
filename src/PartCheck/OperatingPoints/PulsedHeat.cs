using PartCheck.Channels;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>
/// How one transistor heats itself under PWM, duty d at most, on for ton = d/frequency. The peak of the junction, at the end of a pulse, is
/// Tj = Ta + P (d RthJA + (1 - d) Zth(ton)) with P the power while on: steady heating by the average, one pulse on top of it (the usual
/// approximation of transistor sheets). Without Zth points: d RthJA from 1 kHz up, RthJA below. Without a frequency: RthJA.
/// <para>Zth is log-log between its points, RthJA after the last, the first value before the first, never above RthJA. Thermal
/// resistances in K/W, times in s.</para>
/// </summary>
public sealed record PulsedHeat
{
    /// <summary>Frequency from which the power that a rating knows is the average over the period [Hz]: method's own bound (common practice, no source).</summary>
    public const double AveragedFrom = 1000;

    private PulsedHeat(double? steady, double? effective, double caseShare, string? assumed)
    {
        Steady = steady;
        Effective = effective;
        CaseShare = caseShare;
        Assumed = assumed;
    }

    /// <summary>Thermal resistance at steady power; null: not to be had [K/W].</summary>
    public double? Steady { get; }

    /// <summary>Peak rise of the junction over the power while on; null: not to be had [K/W].</summary>
    public double? Effective { get; }

    /// <summary>
    /// Effective over steady, 1 at steady power [-]. Heat that a pass transistor couples into the control is reduced by the same share: exact
    /// for averaged power; with Zth points an upper bound, since a pulse reaches the control later than the junction that it starts from.
    /// </summary>
    public double Share => Effective is { } effective && Steady is > 0 and var steady ? effective / steady : 1;

    /// <summary>
    /// Share of the power while on that surely warms the case [-]: d where the junction was solved for pulses, else 1. Tj less this share
    /// of P RthJC is never cooler than the case, since a pulse drops at least its average between junction and case.
    /// </summary>
    public double CaseShare { get; }

    /// <summary>What was assumed for want of a frequency or of Zth points; null: nothing.</summary>
    public string? Assumed { get; }

    /// <summary>Share of the power while on that <c>power</c> and <c>stability</c> read: the duty from 1 kHz up, else 1 [-].</summary>
    public static double AveragedShare(ChannelConditions conditions)
    {
        ArgumentNullException.ThrowIfNull(conditions);
        return conditions is { Duty: < 1, Frequency.Hertz: >= AveragedFrom } ? conditions.Duty : 1;
    }

    /// <summary>The heating of a part in a channel.</summary>
    /// <param name="part">The transistor.</param>
    /// <param name="rthJa">Its thermal resistance, given or assumed; null: not to be had [K/W].</param>
    /// <param name="conditions">Duty, above 0 and at most 1, and frequency.</param>
    public static PulsedHeat Of(Transistor part, double? rthJa, ChannelConditions conditions)
    {
        ArgumentNullException.ThrowIfNull(part);
        ArgumentNullException.ThrowIfNull(conditions);
        double duty = conditions.Duty;
        if (duty >= 1)
        {
            return new PulsedHeat(rthJa, rthJa, 1, null);
        }

        if (conditions.Frequency is not { Hertz: > 0 and var frequency })
        {
            return new PulsedHeat(rthJa, rthJa, 1, "none given: full power heats the junction");
        }

        if (part.Zth.Count > 0)
        {
            double? peak = rthJa is { } steady ? (duty * steady) + ((1 - duty) * Zth(part.Zth, duty / frequency, steady)) : null;
            return new PulsedHeat(rthJa, peak, duty, null);
        }

        return frequency >= AveragedFrom
            ? new PulsedHeat(rthJa, duty * rthJa, duty, "none given: from 1 kHz up the average power heats the junction")
            : new PulsedHeat(rthJa, rthJa, 1, "none given: below 1 kHz full power heats the junction");
    }

    /// <summary>The assumption, under the name of what is missing; null: nothing was assumed.</summary>
    internal static Assumption? AssumptionOf(PulsedHeat heat, Transistor part, BoundChannel channel) =>
        heat.Assumed is not { } value ? null
        : channel.Conditions.Frequency is null ? new Assumption("Frequency", channel.Name, value)
        : new Assumption("Zth points", part.PartNumber, value);

    private static double Zth(IReadOnlyList<ZthPoint> points, double seconds, double steady)
    {
        if (seconds > points[^1].Seconds)
        {
            return steady;
        }

        int i = 0;
        while (seconds > points[i].Seconds)
        {
            i++;
        }

        double right = points[i].Zth.KelvinsPerWatt;
        if (i == 0)
        {
            return Math.Min(right, steady);
        }

        // A point of 0 K/W has no logarithm; the larger neighbour bounds what lies between.
        double left = points[i - 1].Zth.KelvinsPerWatt;
        double share = Math.Log(seconds / points[i - 1].Seconds) / Math.Log(points[i].Seconds / points[i - 1].Seconds);
        return Math.Min(left > 0 ? left * Math.Pow(right / left, share) : right, steady);
    }
}
