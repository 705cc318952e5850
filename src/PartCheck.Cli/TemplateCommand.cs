using System.CommandLine;
using PartCheck.Reports;

namespace PartCheck.Cli;

/// <summary><c>partcheck template FILE.xlsx</c></summary>
internal static class TemplateCommand
{
    public static Command Build(TextWriter output, TextWriter error)
    {
        Argument<string> file = UsageError.NoOption(new Argument<string>("FILE") { Description = "Workbook to write, .xlsx" });
        Option<bool> replace = new("--replace") { Description = "Replace the file where it exists" };
        Command command = new("template", "Write a workbook to start from: every sheet, every column explained, one example channel") { file, replace };
        command.SetAction(async (parse, cancel) =>
        {
            string target = parse.GetRequiredValue(file);
            if (!Path.GetExtension(target).Equals(".xlsx", StringComparison.OrdinalIgnoreCase))
            {
                await error.WriteLineAsync($"partcheck: {target} is no name of a workbook: it must end in .xlsx.").ConfigureAwait(false);
                return ExitCodes.Usage;
            }

            if (OutputFile.Refusal(target, parse.GetValue(replace), []) is { } refusal)
            {
                await error.WriteLineAsync("partcheck: " + refusal).ConfigureAwait(false);
                return ExitCodes.CannotCreate;
            }

            int code = await Delivery.SaveAsync(TemplateWorkbook.Write(), target, parse.GetValue(replace), 0, error).ConfigureAwait(false);
            return code == 0 && !await CommandLine.WrittenAsync(output, $"{target}: sheets BOM, Channels, Parts, Pins and Derating with an example channel.\n").ConfigureAwait(false)
                ? await CommandLine.UnwritableAsync(error).ConfigureAwait(false)
                : code;
        });
        return command;
    }
}
