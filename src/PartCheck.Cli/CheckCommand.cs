using System.CommandLine;
using PartCheck.Derating;
using PartCheck.Reports;
using PartCheck.Sheets;

namespace PartCheck.Cli;

/// <summary><c>partcheck check BOARD...</c></summary>
internal static class CheckCommand
{
    public static Command Build(TextWriter output, TextWriter error, bool colour)
    {
        Argument<string[]> boards = new("BOARD") { Description = "Workbook, or folder with bom.csv and channels.csv", Arity = ArgumentArity.OneOrMore };
        Option<string[]> parts = new("--parts") { Description = "Part tables (default: the board's own)", HelpName = "FILE", AllowMultipleArgumentsPerToken = false };
        Option<string?> bill = new("--bill") { Description = "Bill of materials apart from the board", HelpName = "FILE[:SHEET]" };
        Option<string?> channels = new("--channels") { Description = "Channels apart from the board", HelpName = "FILE[:SHEET]" };
        Option<string?> derating = new("--derating") { Description = "Derating table (default: workshop)", HelpName = "NAME|FILE" };
        Option<string?> pins = new("--pins") { Description = "Logic pins (default: the board's, else the project's own)", HelpName = "FILE" };
        Option<string?> columns = new("--columns") { Description = "Further header spellings", HelpName = "FILE" };
        Option<string?> encoding = new("--encoding") { Description = "Text encoding of CSV files (default: found out)", HelpName = "NAME" };
        Option<string> format = new("--format") { Description = "text or json", HelpName = "FORMAT", DefaultValueFactory = _ => "text" };
        format.AcceptOnlyFromAmong("text", "json");
        Option<string?> file = new("--out") { Description = "File to write instead of standard output", HelpName = "FILE" };
        Option<bool> replace = new("--replace") { Description = "Replace the --out file where it exists" };
        Command command = new("check", "Solve every channel at worst case and judge its parts")
        {
            boards, parts, bill, channels, derating, pins, columns, encoding, format, file, replace,
        };
        command.SetAction(async (parse, cancel) =>
        {
            CheckRequest request = new()
            {
                Boards = parse.GetRequiredValue(boards),
                Parts = parse.GetValue(parts) ?? [],
                Bill = parse.GetValue(bill),
                Channels = parse.GetValue(channels),
                Derating = parse.GetValue(derating),
                Pins = parse.GetValue(pins),
                Columns = parse.GetValue(columns),
                Encoding = parse.GetValue(encoding),
            };
            if (UsageFault(request) is { } fault)
            {
                await error.WriteLineAsync("partcheck: " + fault).ConfigureAwait(false);
                return ExitCodes.Usage;
            }

            string? target = parse.GetValue(file);
            if (target is not null && OutputFile.Refusal(target, parse.GetValue(replace), Inputs(request)) is { } refusal)
            {
                await error.WriteLineAsync("partcheck: " + refusal).ConfigureAwait(false);
                return ExitCodes.CannotCreate;
            }

            CheckReport report = CheckRun.Run(request, cancel);
            string text = parse.GetValue(format) == "json" ? JsonReport.Write(report) : TextReport.Write(report, colour && target is null);
            if (target is null)
            {
                await output.WriteAsync(text).ConfigureAwait(false);
                return ExitCodes.Of(report);
            }

            try
            {
                await OutputFile.WriteAsync(target, text).ConfigureAwait(false);
            }
            catch (Exception e) when (e is IOException or UnauthorizedAccessException)
            {
                await error.WriteLineAsync($"partcheck: {target} could not be written; nothing was changed.").ConfigureAwait(false);
                return ExitCodes.WriteFailure;
            }

            return ExitCodes.Of(report);
        });
        return command;
    }

    private static string? UsageFault(CheckRequest request)
    {
        if (request.Boards.Count > 1 && (request.Bill is not null || request.Channels is not null))
        {
            return "--bill and --channels go with one board.";
        }

        if (request.Derating is { } name && DeratingLibrary.Named(name) is null && !File.Exists(BoardSource.Split(name).Path))
        {
            return $"there is no derating table or file \"{name}\"; the tables are {string.Join(", ", DeratingLibrary.Names)}.";
        }

        return null;
    }

    /// <summary>Every file the run may read.</summary>
    private static IEnumerable<string> Inputs(CheckRequest request)
    {
        IEnumerable<string> named = request.Boards.Concat(request.Parts)
            .Concat(new[] { request.Bill, request.Channels, request.Derating, request.Pins, request.Columns }.OfType<string>())
            .Select(f => BoardSource.Split(f).Path);
        return named.SelectMany(f => Directory.Exists(f) ? Directory.EnumerateFiles(f, "*.csv") : [f]);
    }
}
