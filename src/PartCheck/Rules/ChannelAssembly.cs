using PartCheck.Channels;

namespace PartCheck.Rules;

/// <summary>One channel's judgement out of its readings: the worst reading of each finding counts and is named.</summary>
public static class ChannelAssembly
{
    /// <summary>Assembles a channel.</summary>
    /// <param name="channel">The channel.</param>
    /// <param name="derating">Name of its derating table.</param>
    /// <param name="readings">Its readings, judged; empty: it could not be.</param>
    /// <param name="missing">Why it could not be, or what else makes it not verified.</param>
    /// <param name="boardFindings">Findings of lines and pins, which count in the channels they name.</param>
    /// <param name="assumed">What was assumed.</param>
    public static ChannelJudgement Assemble(
        Channel channel, string derating, IReadOnlyList<ReadingJudgement> readings, IReadOnlyList<string> missing,
        IReadOnlyList<Finding> boardFindings, IReadOnlyList<Assumption> assumed)
    {
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(readings);
        ArgumentNullException.ThrowIfNull(boardFindings);
        List<string> gaps = [.. missing];
        gaps.AddRange(channel.RoleFaults.Where(f => !f.OfAlternate).Select(f => "a bill that serves the role of " + f.Reference));
        List<Finding> findings = [];
        ReadingJudgement? worst = null;
        if (readings.Count > 0)
        {
            Dictionary<(string Rule, string? Reference), Finding> byKey = [];
            List<(string Rule, string? Reference)> order = [];
            foreach (ReadingJudgement reading in readings)
            {
                foreach (Finding finding in reading.Findings)
                {
                    (string, string?) key = (finding.Rule, finding.Reference);
                    if (!byKey.TryGetValue(key, out Finding? kept))
                    {
                        order.Add(key);
                        byKey[key] = finding;
                    }
                    else if (FindingSeverity.Worse(finding, kept))
                    {
                        byKey[key] = finding;
                    }
                }

                worst = worst is null || Severity(reading) > Severity(worst) ? reading : worst;
            }

            findings.AddRange(order.Select(k => byKey[k]));
        }

        if (gaps.Count > 0)
        {
            // What could not be judged is said rule by rule: none is silently absent.
            findings = readings.Count > 0
                ? [.. findings.Select(f => f.Verdict == Verdict.Nonconforming ? f : f with { Verdict = Verdict.NotVerified, Missing = gaps, Concession = null })]
                : [.. RuleBook.StateRules.Where(r => r.AlwaysAsked).Select(r => r.Id).Append(PinCurrentRule.Id).Distinct().Select(id => new Finding
                    {
                        Channel = channel.Name, Rule = id, Verdict = Verdict.NotVerified, Source = "not judged", Cell = channel.Cell, Missing = gaps,
                    })];
        }

        IEnumerable<Verdict> counted = findings.Select(f => f.Verdict)
            .Concat(boardFindings.Where(f => f.Channel == channel.Name || (f.Channel is null && f.Channels?.Contains(channel.Name) == true)).Select(f => f.Verdict));
        return new ChannelJudgement
        {
            Channel = channel.Name,
            Verdict = FindingSeverity.WorstOf(counted),
            Derating = derating,
            LoadCurrent = worst?.Nominal is { } nominal && readings.All(r => double.IsFinite(r.LoadMin))
                ? new LoadCurrentRange(readings.Min(r => r.LoadMin), nominal.LoadCurrent, readings.Max(r => r.LoadMax))
                : null,
            TestLimits = readings.Count > 0 && readings.All(r => r.TestLimits is not null)
                ? readings.Select(r => r.TestLimits!).Aggregate((a, b) => a.Union(b))
                : null,
            HeatMax = readings.Count > 0 ? readings.Max(r => r.HeatMax) : null,
            Hottest = [.. readings.SelectMany(r => r.Hottest).GroupBy(h => h.Reference, StringComparer.Ordinal)
                .Select(g => (g.Key, g.Max(h => h.Tj))).OrderByDescending(h => h.Item2).ThenBy(h => h.Key, StringComparer.Ordinal)],
            Nominal = worst?.Nominal,
            Reading = worst?.Channel,
            CornersSolved = readings.Sum(r => r.Corners),
            NotSolved = readings.Sum(r => r.NotSolved),
            Findings = findings,
            Assumed = assumed,
        };
    }

    private static double Severity(ReadingJudgement reading) => reading.Findings.Max(f =>
        (1000 * FindingSeverity.Rank(f.Verdict)) + Math.Min(f.StressRatio ?? (f.Verdict == Verdict.Nonconforming ? 999 : 0), 999));
}
