using System.CommandLine;
using PartCheck.Bills;
using PartCheck.Reports;
using PartCheck.Sheets;

namespace PartCheck.Cli;

/// <summary><c>partcheck bill FILE</c></summary>
internal static class BillCommand
{
    public static Command Build(TextWriter output, TextWriter error)
    {
        Argument<string> bill = UsageError.NoOption(new Argument<string>("FILE") { Description = "Bill of materials, FILE or FILE:SHEET" });
        Option<string?> columns = UsageError.NoOption(new Option<string?>("--columns") { Description = "Further header spellings", HelpName = "FILE" });
        Option<string?> encoding = UsageError.NoOption(new Option<string?>("--encoding") { Description = "Text encoding of a CSV file (default: found out)", HelpName = "NAME" });
        Option<string> format = new("--format") { Description = "text or json", HelpName = "FORMAT", DefaultValueFactory = _ => "text" };
        format.AcceptOnlyFromAmong("text", "json");
        Option<string?> file = UsageError.NoOption(new Option<string?>("--out") { Description = "File to write instead of standard output", HelpName = "FILE" });
        Option<bool> replace = new("--replace") { Description = "Replace the --out file where it exists" };
        Command command = new("bill", "Show what is understood of a bill of materials: columns, lines, rows left out, complaints")
        {
            bill, columns, encoding, format, file, replace,
        };
        command.SetAction(async (parse, cancel) =>
        {
            string argument = parse.GetRequiredValue(bill);
            string? spellings = parse.GetValue(columns);
            string? target = parse.GetValue(file);
            string[] inputs = [.. new[] { argument, spellings }.OfType<string>().Select(f => BoardSource.Split(f).Path)];
            if (target is not null && OutputFile.Refusal(target, parse.GetValue(replace), inputs) is { } refusal)
            {
                await error.WriteLineAsync("partcheck: " + refusal).ConfigureAwait(false);
                return ExitCodes.CannotCreate;
            }

            BillReading reading = BillFile.Read(argument, spellings, parse.GetValue(encoding));
            string text = parse.GetValue(format) == "json" ? BillJson.Write(reading) : BillText.Write(reading);
            return await Delivery.SendAsync(text, target, parse.GetValue(replace), ExitCodes.Of(reading.Complaints), output, error).ConfigureAwait(false);
        });
        return command;
    }
}
