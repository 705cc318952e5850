using System.Text;
using System.Text.Json;
using PartCheck.Rules;
using PartCheck.Workings;

namespace PartCheck.Reports;

/// <summary>
/// Workings for machines. The finding as in the report of <c>check</c>; each line with symbol, formula, figures, result, unit, source, cell and
/// whether it was assumed. Results are SI but for the unit <c>degC</c>, which the formulas are written in.
/// </summary>
public static class JsonWorking
{
    /// <summary>Writes the workings.</summary>
    /// <returns>JSON with LF line ends and a line end at its end.</returns>
    public static string Write(WorkingReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        using var bytes = new MemoryStream();
        using (var json = new Utf8JsonWriter(bytes, JsonReport.Options))
        {
            json.WriteStartObject();
            json.Text("board", report.Board.Board);
            json.Text("channel", report.Channel);
            json.Text("verdict", VerdictWords.Of(report.Verdict));
            json.Text("derating", report.Derating);
            json.Text("deratingNote", report.Board.DeratingNote);
            json.List("workings", report.Workings, WriteOne);
            json.List("assumed", report.Assumed, JsonReport.WriteAssumed);
            json.Texts("cautions", report.Board.Cautions);
            json.List("complaints", report.Check.Complaints, JsonReport.WriteComplaint);
            json.List("inputs", report.Check.Inputs, JsonReport.WriteInput);
            json.WriteEndObject();
        }

        bytes.WriteByte((byte)'\n');
        return Encoding.UTF8.GetString(bytes.GetBuffer(), 0, checked((int)bytes.Length));
    }

    private static void WriteOne(Utf8JsonWriter json, Working working)
    {
        json.WriteStartObject("finding");
        JsonFinding.Write(json, working.Finding);
        json.WriteEndObject();
        json.Text("actualSymbol", working.Actual);
        json.Text("allowedSymbol", working.Allowed);
        json.Text("ratioSymbol", working.Ratio);
        json.List("steps", working.Lines, WriteLine);
        json.List("checks", working.Checks, WriteLine);
    }

    private static void WriteLine(Utf8JsonWriter json, WorkingLine line)
    {
        DerivationLine l = line.Line;
        json.Text("kind", Word(l.Kind));
        json.Text("symbol", l.Symbol.Length > 0 ? l.Symbol : null);
        json.Text("formula", l.Formula.Length > 0 ? l.Formula : null);
        json.Text("numbers", line.Numbers);
        json.Real("result", line.Figure?.Value);
        json.Text("printed", line.Figure?.Text);
        json.Text("unit", line.Figure is null ? null : l.Unit);
        if (l.Kind == DerivationKind.Balance)
        {
            json.WriteStartObject("right");
            json.Text("formula", l.Right);
            json.Text("numbers", line.RightNumbers);
            json.Real("result", line.RightFigure?.Value);
            json.Text("printed", line.RightFigure?.Text);
            json.WriteEndObject();
        }

        if (line.Unrounded is { } unrounded)
        {
            json.Text("unrounded", unrounded.Text);
        }

        json.Text("meaning", l.Meaning);
        json.Text("source", l.Source);
        json.Text("cell", l.Cell);
        json.WriteBoolean("assumed", l.Assumed);
    }

    private static string Word(DerivationKind kind) => kind switch
    {
        DerivationKind.Given => "given",
        DerivationKind.Solved => "solved",
        DerivationKind.Step => "step",
        DerivationKind.Balance => "balance",
        DerivationKind.Note => "note",
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "A line is given, solved, a step, a balance or a note."),
    };
}
