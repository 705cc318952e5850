using System.CommandLine;
using PartCheck.Reports;

namespace PartCheck.Cli;

/// <summary><c>partcheck working BOARD CHANNEL</c></summary>
internal static class WorkingCommand
{
    public static Command Build(TextWriter output, TextWriter error)
    {
        Argument<string> board = UsageError.NoOption(new Argument<string>("BOARD") { Description = "Workbook, or folder with bom.csv and channels.csv" });
        Argument<string> channel = UsageError.NoOption(new Argument<string>("CHANNEL") { Description = "Name of the channel" });
        Option<string?> rule = UsageError.NoOption(new Option<string?>("--rule") { Description = "Findings of this rule (default: the worst of each rule)", HelpName = "ID" });
        Option<string?> reference = UsageError.NoOption(new Option<string?>("--reference") { Description = "Findings about this reference", HelpName = "REF" });
        BoardOptions options = new();
        Command command = options.On(new Command("working", "Derive findings of a channel step by step") { board, channel, rule, reference });
        command.SetAction(async (parse, cancel) =>
        {
            CheckRequest request = options.Request(parse, [parse.GetRequiredValue(board)]);
            if (await options.RefusedAsync(parse, request, error).ConfigureAwait(false) is { } refused)
            {
                return refused;
            }

            WorkingSelection selection = new(parse.GetRequiredValue(channel), parse.GetValue(rule), parse.GetValue(reference));
            WorkingReport report = CheckRun.Work(request, selection, out string? fault, cancel);
            if (await BoardOptions.MisaskedAsync(report.Check, error).ConfigureAwait(false) is { } misasked)
            {
                return misasked;
            }

            if (fault is not null)
            {
                await error.WriteLineAsync("partcheck: " + UsageError.OneLine(fault)).ConfigureAwait(false);
                return ExitCodes.Usage;
            }

            string text = options.Json(parse) ? JsonWorking.Write(report) : WorkingText.Write(report);
            return await options.WriteAsync(parse, text, ExitCodes.Of(report.Check, report.Verdict), output, error).ConfigureAwait(false);
        });
        return command;
    }
}
