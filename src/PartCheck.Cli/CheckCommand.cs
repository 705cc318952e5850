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
        Argument<string[]> boards = UsageError.NoOption(new Argument<string[]>("BOARD") { Description = "Workbook, or folder with bom.csv and channels.csv", Arity = ArgumentArity.OneOrMore });
        Option<string[]> parts = UsageError.NoOption(new Option<string[]>("--parts") { Description = "Part tables (default: the board's own)", HelpName = "FILE", AllowMultipleArgumentsPerToken = false });
        Option<string?> bill = UsageError.NoOption(new Option<string?>("--bill") { Description = "Bill of materials apart from the board", HelpName = "FILE[:SHEET]" });
        Option<string?> channels = UsageError.NoOption(new Option<string?>("--channels") { Description = "Channels apart from the board", HelpName = "FILE[:SHEET]" });
        Option<string?> derating = UsageError.NoOption(new Option<string?>("--derating") { Description = "Derating table (default: workshop)", HelpName = "NAME|FILE" });
        Option<string?> pins = UsageError.NoOption(new Option<string?>("--pins") { Description = "Logic pins (default: the board's, else the project's own)", HelpName = "FILE" });
        Option<string?> columns = UsageError.NoOption(new Option<string?>("--columns") { Description = "Further header spellings", HelpName = "FILE" });
        Option<string?> encoding = UsageError.NoOption(new Option<string?>("--encoding") { Description = "Text encoding of CSV files (default: found out)", HelpName = "NAME" });
        Option<string> format = new("--format") { Description = "text or json", HelpName = "FORMAT", DefaultValueFactory = _ => "text" };
        format.AcceptOnlyFromAmong("text", "json");
        Option<string?> file = UsageError.NoOption(new Option<string?>("--out") { Description = "File to write instead of standard output", HelpName = "FILE" });
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
            return await Delivery.SendAsync(text, target, parse.GetValue(replace), ExitCodes.Of(report), output, error).ConfigureAwait(false);
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
