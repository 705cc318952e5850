using System.CommandLine;
using PartCheck.Bills;
using PartCheck.Concessions;
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
        Option<string[]> with = UsageError.NoOption(new Option<string[]>("--with") { Description = "Judge the board with other parts, and compare: reference or part number of the bill, part number", HelpName = "LINE=PN,...", AllowMultipleArgumentsPerToken = false });
        Option<string?> assembly = UsageError.NoOption(new Option<string?>("--assembly") { Description = "Judge what is fitted in one assembly: the bill's column Populated NAME", HelpName = "NAME" });
        Option<string?> concessions = UsageError.NoOption(new Option<string?>("--concessions") { Description = "What was accepted in writing (default: the board's own); needs --date", HelpName = "FILE[:SHEET]" });
        Option<string?> date = UsageError.NoOption(new Option<string?>("--date") { Description = "Day that concessions are held against", HelpName = "YYYY-MM-DD" });
        Option<string?> columns = UsageError.NoOption(new Option<string?>("--columns") { Description = "Further header spellings", HelpName = "FILE" });
        Option<string?> encoding = UsageError.NoOption(new Option<string?>("--encoding") { Description = "Text encoding of CSV files (default: found out)", HelpName = "NAME" });
        Option<string> format = new("--format") { Description = "text or json", HelpName = "FORMAT", DefaultValueFactory = _ => "text" };
        format.AcceptOnlyFromAmong("text", "json");
        Option<string?> file = UsageError.NoOption(new Option<string?>("--out") { Description = "File to write instead of standard output", HelpName = "FILE" });
        Option<bool> replace = new("--replace") { Description = "Replace the --out file where it exists" };
        Command command = new("check", "Solve every channel at worst case and judge its parts")
        {
            boards, parts, bill, channels, derating, pins, with, assembly, concessions, date, columns, encoding, format, file, replace,
        };
        command.SetAction(async (parse, cancel) =>
        {
            if (AskedChange.Read(parse.GetValue(with) ?? [], out IReadOnlyList<AskedChange> changes) is { } noChange)
            {
                await error.WriteLineAsync("partcheck: " + noChange).ConfigureAwait(false);
                return ExitCodes.Usage;
            }

            if (parse.GetValue(date) is { } typed && ConcessionReader.DateOf(typed) is null)
            {
                await error.WriteLineAsync($"partcheck: --date needs a day of the form YYYY-MM-DD, not {UsageError.OneLine(typed)}.").ConfigureAwait(false);
                return ExitCodes.Usage;
            }

            CheckRequest request = new()
            {
                Boards = parse.GetRequiredValue(boards),
                Parts = parse.GetValue(parts) ?? [],
                Bill = parse.GetValue(bill),
                Channels = parse.GetValue(channels),
                Derating = parse.GetValue(derating),
                Pins = parse.GetValue(pins),
                With = changes,
                Assembly = parse.GetValue(assembly),
                Concessions = parse.GetValue(concessions),
                Date = parse.GetValue(date) is { } day ? ConcessionReader.DateOf(day) : null,
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
            if (report.UsageFaults.Count > 0)
            {
                foreach (string wrong in report.UsageFaults)
                {
                    await error.WriteLineAsync("partcheck: " + UsageError.OneLine(wrong)).ConfigureAwait(false);
                }

                return ExitCodes.Usage;
            }

            string text = parse.GetValue(format) == "json" ? JsonReport.Write(report) : TextReport.Write(report, colour && target is null);
            if (target is null)
            {
                return await CommandLine.WrittenAsync(output, text).ConfigureAwait(false)
                    ? ExitCodes.Of(report)
                    : await CommandLine.UnwritableAsync(error).ConfigureAwait(false);
            }

            try
            {
                await OutputFile.WriteAsync(target, text, replace: parse.GetValue(replace)).ConfigureAwait(false);
            }
            catch (IOException) when (!parse.GetValue(replace) && File.Exists(target))
            {
                await error.WriteLineAsync($"partcheck: {target} came into being during the run; --replace allows to replace it.").ConfigureAwait(false);
                return ExitCodes.CannotCreate;
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

        if (request.Concessions is not null && request.Date is null)
        {
            return "--concessions needs --date YYYY-MM-DD: whether one is in force never hangs on the clock.";
        }

        if (request.Boards.Count > 1 && request.With.Count > 0)
        {
            return "--with goes with one board.";
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
            .Concat(new[] { request.Bill, request.Channels, request.Derating, request.Pins, request.Columns, request.Concessions }.OfType<string>())
            .Select(f => BoardSource.Split(f).Path);
        return named.SelectMany(f => Directory.Exists(f) ? Directory.EnumerateFiles(f, "*.csv") : [f]);
    }
}
