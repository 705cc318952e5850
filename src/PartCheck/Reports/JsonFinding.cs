using System.Text.Json;
using PartCheck.OperatingPoints;
using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>One finding in JSON, with its corner.</summary>
internal static class JsonFinding
{
    internal static void Write(Utf8JsonWriter json, Finding finding)
    {
        json.Text("channel", finding.Channel);
        json.Text("rule", finding.Rule);
        json.Text("reference", finding.Reference);
        WriteGroup(json, finding);
        json.Text("partNumber", finding.PartNumber);
        json.Text("manufacturer", finding.Manufacturer);
        if (finding.Mix.Count > 0)
        {
            json.List("mix", finding.Mix, (into, line) =>
            {
                into.Texts("references", line.References);
                into.Text("partNumber", line.PartNumber);
                into.Text("manufacturer", line.Manufacturer);
                into.WriteBoolean("alternate", line.Alternate);
            });
        }

        json.Text("state", finding.State is { } state ? StateWord(state) : null);
        json.Real("actual", finding.Actual);
        if (finding.ActualIsAtLeast)
        {
            json.WriteBoolean("actualIsAtLeast", true);
        }

        json.Real("allowed", finding.Allowed);
        json.Text("unit", finding.Unit);
        json.Real("stressRatio", finding.StressRatio);
        json.Real("margin", finding.Margin);
        json.Text("verdict", VerdictWords.Of(finding.Verdict));
        if (finding.Corner is { } corner)
        {
            json.WriteStartObject("corner");
            WriteCorner(json, corner);
            json.WriteEndObject();
        }
        else
        {
            json.WriteNull("corner");
        }

        json.Text("source", finding.Source);
        json.Text("cell", finding.Cell);
        if (finding.Concession is { } concession)
        {
            json.WriteStartObject("concession");
            WriteConcession(json, concession);
            json.WriteEndObject();
        }
        else
        {
            json.WriteNull("concession");
        }

        json.Texts("missing", finding.Missing);
        if (finding.Text is not null)
        {
            json.Text("text", finding.Text);
        }
    }

    /// <summary><c>on</c>, <c>off</c> or <c>unfed</c>.</summary>
    internal static string StateWord(ChannelState state) => state switch
    {
        ChannelState.On => "on",
        ChannelState.Off => "off",
        ChannelState.Unfed => "unfed",
        _ => throw new ArgumentOutOfRangeException(nameof(state), state, "A state is on, off or unfed."),
    };

    private static void WriteConcession(Utf8JsonWriter json, GrantedConcession concession)
    {
        json.Text("reason", concession.Reason);
        json.Text("acceptedBy", concession.AcceptedBy);
        json.Day("date", concession.Date);
        json.Day("expires", concession.Expires);
        json.Text("effectivity", concession.Effectivity);
        json.Text("cell", concession.Cell);
    }

    private static void WriteGroup(Utf8JsonWriter json, Finding finding)
    {
        if (finding.References is { } references)
        {
            json.Texts("references", references);
        }

        if (finding.Pin is { } pin)
        {
            json.Text("pin", pin);
        }

        if (finding.Channels is { } channels)
        {
            json.Texts("channels", channels);
        }
    }

    private static void WriteCorner(Utf8JsonWriter json, Corner corner)
    {
        json.Real("supply", corner.Supply);
        json.Real("loadDrop", corner.LoadDrop);
        json.Real("ambient", corner.Ambient);
        json.Real("pinLevel", corner.PinLevel);
        json.Real("pinResistance", corner.PinResistance);
        json.Whole("heat", corner.Heat);
        if (corner.OddLeg is { } odd)
        {
            json.WriteStartObject("odd");
            json.Text("reference", odd);
            WriteEnds(json, corner.OddPass);
            json.Text("sense", End(corner.OddSense));
            json.Text("averaging", End(corner.OddAveraging));
            json.WriteEndObject();
        }
        else
        {
            json.WriteNull("odd");
        }

        json.WriteStartObject("control");
        WriteEnds(json, corner.Control);
        json.WriteEndObject();
        json.WriteStartObject("pass");
        WriteEnds(json, corner.Pass);
        json.WriteEndObject();
        json.Text("sense", End(corner.Sense));
        json.Text("feed", End(corner.Feed));
        json.Text("averaging", End(corner.Averaging));
        json.Text("pullDown", End(corner.PullDown));
        json.Real("coupling", corner.AssumedCoupling);
        json.Real("packageCoupling", corner.AssumedPackageCoupling);
        json.Real("neighboursOn", corner.NeighboursOn is { } on ? on ? 1 : 0 : null);
    }

    private static void WriteEnds(Utf8JsonWriter json, TransistorCorner ends)
    {
        json.Text("vbe", End(ends.Vbe));
        json.Text("hfe", End(ends.Hfe));
    }

    private static string End(Extreme end) => end switch
    {
        Extreme.Typical => "typical",
        Extreme.Min => "min",
        Extreme.Max => "max",
        Extreme.Match => "match",
        Extreme.Inside => "inside",
        _ => throw new ArgumentOutOfRangeException(nameof(end), end, "An end is typical, min, max, match or inside."),
    };
}
