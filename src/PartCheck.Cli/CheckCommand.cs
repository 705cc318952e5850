using System.CommandLine;
using PartCheck.Reports;

namespace PartCheck.Cli;

/// <summary><c>partcheck check BOARD...</c></summary>
internal static class CheckCommand
{
    public static Command Build(TextWriter output, TextWriter error, bool colour)
    {
        Argument<string[]> boards = UsageError.NoOption(new Argument<string[]>("BOARD") { Description = "Workbook, or folder with bom.csv and channels.csv", Arity = ArgumentArity.OneOrMore });
        BoardOptions options = new();
        Command command = options.On(new Command("check", "Solve every channel at worst case and judge its parts") { boards });
        command.SetAction(async (parse, cancel) =>
        {
            CheckRequest request = options.Request(parse, parse.GetRequiredValue(boards));
            if (await options.RefusedAsync(parse, request, error).ConfigureAwait(false) is { } refused)
            {
                return refused;
            }

            CheckReport report = CheckRun.Run(request, cancel);
            if (await BoardOptions.MisaskedAsync(report, error).ConfigureAwait(false) is { } misasked)
            {
                return misasked;
            }

            string text = options.Json(parse) ? JsonReport.Write(report) : TextReport.Write(report, colour && options.ToOutput(parse));
            return await options.WriteAsync(parse, text, ExitCodes.Of(report), output, error).ConfigureAwait(false);
        });
        return command;
    }
}
