using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;
using PartCheck.Sheets;

namespace PartCheck.Reports;

/// <summary>
/// The report of <c>check</c> for machines: SI numbers, temperatures in K, stable order of keys and items, no NaN or infinity,
/// no time stamp, file names as the user gave them. The text is the same for the same report in any culture.
/// </summary>
public static class JsonReport
{
    internal static readonly JsonWriterOptions Options = new()
    {
        Indented = true,
        IndentSize = 1,
        NewLine = "\n",
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
    };

    /// <summary>Writes the report.</summary>
    /// <returns>JSON with LF line ends and a line end at its end.</returns>
    public static string Write(CheckReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        using var bytes = new MemoryStream();
        using (var json = new Utf8JsonWriter(bytes, Options))
        {
            json.WriteStartObject();
            json.List("boards", report.Boards, WriteBoard);
            json.List("complaints", report.Complaints, WriteComplaint);
            json.List("inputs", report.Inputs, WriteInput);
            json.WriteEndObject();
        }

        bytes.WriteByte((byte)'\n');
        return Encoding.UTF8.GetString(bytes.GetBuffer(), 0, checked((int)bytes.Length));
    }

    private static void WriteBoard(Utf8JsonWriter json, BoardReport board)
    {
        json.Text("board", board.Board);
        json.Text("verdict", VerdictWords.Of(board.Verdict));
        json.Text("derating", board.Derating);
        if (board.Assembly is { } assembly)
        {
            json.Text("assembly", assembly);
            json.Texts("channelsNotFitted", board.ChannelsNotFitted);
        }

        if (board.ConcessionsAsOf is { } day)
        {
            json.Day("concessionsAsOf", day);
        }

        if (board.Comparison is { } comparison)
        {
            json.WriteStartObject("comparison");
            JsonComparison.Write(json, comparison);
            json.WriteEndObject();
        }

        json.List("channels", board.Channels, JsonChannel.Write);
        json.List("findings", FindingOrder.WorstFirst(board), JsonFinding.Write);
        if (board.Totals is { } totals)
        {
            json.WriteStartObject("totals");
            WriteTotals(json, totals);
            json.WriteEndObject();
        }
        else
        {
            json.WriteNull("totals");
        }

        json.Text("deratingNote", board.DeratingNote);
        json.Texts("cautions", board.Cautions);
        json.Texts("rules", board.Rules);
        json.Texts("rulesNotJudged", board.RulesNotJudged);
        json.List("assumed", board.Assumed, WriteAssumed);
        json.List("advice", board.Advice, WriteAdvice);
    }

    private static void WriteTotals(Utf8JsonWriter json, BoardTotals totals)
    {
        json.WriteStartObject("supplyCurrent");
        json.Real("min", totals.SupplyMin);
        json.Real("max", totals.SupplyMax);
        json.WriteEndObject();
        json.WriteStartObject("heat");
        json.Real("max", totals.HeatMax);
        json.WriteEndObject();
        json.List("pins", totals.Pins, (into, pin) =>
        {
            into.Text("pin", pin.Pin);
            into.Real("current", pin.Current);
        });
        json.List("hottest", totals.Hottest, (into, part) =>
        {
            into.Text("channel", part.Channel);
            into.Text("reference", part.Reference);
            into.Real("junctionTemperature", part.Tj);
        });
        json.Texts("without", totals.Without);
    }

    internal static void WriteAssumed(Utf8JsonWriter json, AssumedValue assumed)
    {
        json.Text("what", assumed.What);
        json.Text("of", assumed.Of);
        json.Text("value", assumed.Value);
        json.Texts("channels", assumed.Channels);
    }

    private static void WriteAdvice(Utf8JsonWriter json, Advice advice)
    {
        json.Text("channel", advice.Channel);
        json.Text("reference", advice.Reference);
        json.Text("text", advice.Text);
    }

    internal static void WriteComplaint(Utf8JsonWriter json, Complaint complaint)
    {
        json.Text("file", complaint.File);
        json.Text("sheet", complaint.Sheet);
        json.Whole("row", complaint.Row);
        json.Text("column", complaint.Column);
        json.Text("cell", complaint.Cell);
        json.Text("found", complaint.Found);
        json.Text("wanted", complaint.Wanted);
        json.Text("text", complaint.Text);
    }

    internal static void WriteInput(Utf8JsonWriter json, InputFile input)
    {
        json.Text("file", input.File);
        json.Text("sha256", input.Sha256);
    }
}
