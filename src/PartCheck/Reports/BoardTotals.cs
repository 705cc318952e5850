using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>Sums over a board with every channel on at once: currents and powers while on, whatever the duty; SI units.</summary>
/// <param name="SupplyMin">Smallest current from the load supplies [A].</param>
/// <param name="SupplyMax">Largest current from the load supplies [A].</param>
/// <param name="HeatMax">Largest heat of the channels' parts, loads left out [W].</param>
/// <param name="Pins">Largest current of each pin [A].</param>
/// <param name="Hottest">The hottest transistors: channel, reference, highest junction temperature, under PWM the peak [K].</param>
/// <param name="Without">Channels that could not be solved and are left out of the sums.</param>
public sealed record BoardTotals(
    double SupplyMin, double SupplyMax, double HeatMax, IReadOnlyList<(string Pin, double Current)> Pins,
    IReadOnlyList<(string Channel, string Reference, double Tj)> Hottest, IReadOnlyList<string> Without)
{
    private const int Listed = 5;

    /// <summary>Sums up.</summary>
    public static BoardTotals Of(IReadOnlyList<ChannelJudgement> channels, IReadOnlyList<Finding> pins)
    {
        ArgumentNullException.ThrowIfNull(channels);
        ArgumentNullException.ThrowIfNull(pins);
        List<ChannelJudgement> solved = [.. channels.Where(c => c.LoadCurrent is not null)];
        return new BoardTotals(
            solved.Sum(c => c.LoadCurrent!.Min),
            solved.Sum(c => c.LoadCurrent!.Max),
            solved.Sum(c => c.HeatMax ?? 0),
            [.. pins.Where(p => p.Pin is not null && p.Actual is not null).Select(p => (p.Pin!, p.Actual!.Value)).OrderBy(p => p.Item1, StringComparer.Ordinal)],
            [.. solved.SelectMany(c => c.Hottest.Select(h => (c.Channel, h.Reference, h.Tj)))
                .OrderByDescending(h => h.Tj).ThenBy(h => h.Channel, StringComparer.Ordinal).ThenBy(h => h.Reference, StringComparer.Ordinal).Take(Listed)],
            [.. channels.Where(c => c.LoadCurrent is null).Select(c => c.Channel)]);
    }
}
