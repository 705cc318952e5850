using System.Globalization;
using PartCheck.OperatingPoints;
using PartCheck.Quantities;

namespace PartCheck.Rules;

/// <summary>Advice: a control beside a hot pass transistor, where how much of its heat arrives is assumed. Never a verdict.</summary>
public static class HotNeighbour
{
    /// <summary>Junction temperature from which a pass transistor counts as hot: 100 degC (common practice, no source) [K].</summary>
    public const double Hot = 373.15;

    /// <summary>One sentence; null: coupling is given, nothing is hot, or heat was not solved.</summary>
    /// <param name="model">The channel.</param>
    /// <param name="judgement">Its reading, judged.</param>
    public static string? Text(ChannelModel model, ReadingJudgement judgement)
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(judgement);
        if (model.CouplingGiven || !model.Heats)
        {
            return null;
        }

        List<string> pass = [.. model.Channel.Legs.Select(l => l.Pass.Reference)];
        (string Reference, double Tj) hottest = judgement.Hottest.Where(h => pass.Contains(h.Reference)).DefaultIfEmpty().MaxBy(h => h.Tj);
        return hottest.Tj <= Hot ? null : string.Create(
            CultureInfo.InvariantCulture,
            $"Stands beside {hottest.Reference}, which reaches {hottest.Tj - Temperature.CelsiusZero:0.0} degC; no Coupling is given, 0 and {ChannelModel.AssumedCouplingShare:0.0} RthJA were tried. Keep it away from that heat: a warmer control lowers the current.");
    }
}
