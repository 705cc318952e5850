using System.Text.Json;
using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>A comparison in JSON.</summary>
internal static class JsonComparison
{
    internal static void Write(Utf8JsonWriter json, BoardComparison comparison)
    {
        json.Text("answer", ComparisonText.Answer(comparison.Answer).ToLowerInvariant());
        json.Text("reason", comparison.Reason.Replace(Columns80.Glue, ' '));
        WriteVerdicts(json, comparison.Before, comparison.After);
        json.List("changes", comparison.Changes, WriteChange);
        json.List("channels", comparison.Channels, WriteChannel);
        json.Texts("unchanged", comparison.Unchanged);
    }

    private static void WriteChange(Utf8JsonWriter json, PartChange change)
    {
        json.Texts("references", change.References);
        json.Text("from", change.From);
        json.Text("to", change.To);
        json.Text("manufacturer", change.Manufacturer);
        json.WriteStartObject("resistance");
        json.Real("before", change.FromOhms);
        json.Real("after", change.ToOhms);
        json.WriteEndObject();
    }

    private static void WriteChannel(Utf8JsonWriter json, ChannelShift channel)
    {
        json.Text("channel", channel.Channel);
        WriteVerdicts(json, channel.Before, channel.After);
        json.WriteStartObject("loadCurrent");
        WriteCurrent(json, "before", channel.CurrentBefore);
        WriteCurrent(json, "after", channel.CurrentAfter);
        json.WriteEndObject();
        json.List("rules", channel.Rules, (into, rule) =>
        {
            into.Text("rule", rule.Rule);
            WriteStanding(into, "before", rule.Before);
            WriteStanding(into, "after", rule.After);
        });
    }

    private static void WriteVerdicts(Utf8JsonWriter json, Verdict before, Verdict after)
    {
        json.WriteStartObject("verdict");
        json.Text("before", VerdictWords.Of(before));
        json.Text("after", VerdictWords.Of(after));
        json.WriteEndObject();
    }

    private static void WriteCurrent(Utf8JsonWriter json, string name, LoadCurrentRange? current)
    {
        if (current is null)
        {
            json.WriteNull(name);
            return;
        }

        json.WriteStartObject(name);
        json.Real("min", current.Min);
        json.Real("nominal", current.Nominal);
        json.Real("max", current.Max);
        json.WriteEndObject();
    }

    private static void WriteStanding(Utf8JsonWriter json, string name, RuleStanding? standing)
    {
        if (standing is null)
        {
            json.WriteNull(name);
            return;
        }

        json.WriteStartObject(name);
        json.Text("verdict", VerdictWords.Of(standing.Verdict));
        json.Real("stressRatio", standing.StressRatio);
        json.Text("reference", standing.Reference);
        json.WriteEndObject();
    }
}
