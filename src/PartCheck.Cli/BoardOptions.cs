using System.CommandLine;
using PartCheck.Bills;
using PartCheck.Concessions;
using PartCheck.Derating;
using PartCheck.Reports;
using PartCheck.Sheets;

namespace PartCheck.Cli;

/// <summary>The options of every command that judges boards: what it reads, and where its report goes.</summary>
internal sealed class BoardOptions
{
    private readonly Option<string[]> parts = UsageError.NoOption(new Option<string[]>("--parts") { Description = "Part tables (default: the board's own)", HelpName = "FILE", AllowMultipleArgumentsPerToken = false });
    private readonly Option<string?> bill = UsageError.NoOption(new Option<string?>("--bill") { Description = "Bill of materials apart from the board", HelpName = "FILE[:SHEET]" });
    private readonly Option<string?> channels = UsageError.NoOption(new Option<string?>("--channels") { Description = "Channels apart from the board", HelpName = "FILE[:SHEET]" });
    private readonly Option<string?> derating = UsageError.NoOption(new Option<string?>("--derating") { Description = "Derating table (default: workshop)", HelpName = "NAME|FILE" });
    private readonly Option<string?> pins = UsageError.NoOption(new Option<string?>("--pins") { Description = "Logic pins (default: the board's, else the project's own)", HelpName = "FILE" });
    private readonly Option<string[]> with = UsageError.NoOption(new Option<string[]>("--with") { Description = "Judge the board with other parts, and compare: reference or part number of the bill, part number", HelpName = "LINE=PN,...", AllowMultipleArgumentsPerToken = false });
    private readonly Option<string?> assembly = UsageError.NoOption(new Option<string?>("--assembly") { Description = "Judge what is fitted in one assembly: the bill's column Populated NAME", HelpName = "NAME" });
    private readonly Option<string?> concessions = UsageError.NoOption(new Option<string?>("--concessions") { Description = "What was accepted in writing (default: the board's own); needs --date", HelpName = "FILE[:SHEET]" });
    private readonly Option<string?> date = UsageError.NoOption(new Option<string?>("--date") { Description = "Day that concessions are held against", HelpName = "YYYY-MM-DD" });
    private readonly Option<string?> columns = UsageError.NoOption(new Option<string?>("--columns") { Description = "Further header spellings", HelpName = "FILE" });
    private readonly Option<string?> encoding = UsageError.NoOption(new Option<string?>("--encoding") { Description = "Text encoding of CSV files (default: found out)", HelpName = "NAME" });
    private readonly Option<string> format = new("--format") { Description = "text or json", HelpName = "FORMAT", DefaultValueFactory = _ => "text" };
    private readonly Option<string?> file = UsageError.NoOption(new Option<string?>("--out") { Description = "File to write instead of standard output", HelpName = "FILE" });
    private readonly Option<bool> replace = new("--replace") { Description = "Replace the --out file where it exists" };

    public BoardOptions() => format.AcceptOnlyFromAmong("text", "json");

    /// <summary>Gives a command these options.</summary>
    public Command On(Command command)
    {
        foreach (Option option in (Option[])[parts, bill, channels, derating, pins, with, assembly, concessions, date, columns, encoding, format, file, replace])
        {
            command.Options.Add(option);
        }

        return command;
    }

    /// <summary>What a run is asked.</summary>
    public CheckRequest Request(ParseResult parse, IReadOnlyList<string> boards) => new()
    {
        Boards = boards,
        Parts = parse.GetValue(parts) ?? [],
        Bill = parse.GetValue(bill),
        Channels = parse.GetValue(channels),
        Derating = parse.GetValue(derating),
        Pins = parse.GetValue(pins),
        With = AskedChange.Read(parse.GetValue(with) ?? [], out IReadOnlyList<AskedChange> changes) is null ? changes : [],
        Assembly = parse.GetValue(assembly),
        Concessions = parse.GetValue(concessions),
        Date = parse.GetValue(date) is { } day ? ConcessionReader.DateOf(day) : null,
        Columns = parse.GetValue(columns),
        Encoding = parse.GetValue(encoding),
    };

    /// <summary>True where the report is to be JSON.</summary>
    public bool Json(ParseResult parse) => parse.GetValue(format) == "json";

    /// <summary>True where the report goes to standard output.</summary>
    public bool ToOutput(ParseResult parse) => parse.GetValue(file) is null;

    /// <summary>Refuses before the run what could not be judged or written; says why.</summary>
    /// <returns>The exit code; null: nothing is amiss.</returns>
    public async Task<int?> RefusedAsync(ParseResult parse, CheckRequest request, TextWriter error)
    {
        if ((Unread(parse) ?? UsageFault(request)) is { } fault)
        {
            await error.WriteLineAsync("partcheck: " + fault).ConfigureAwait(false);
            return ExitCodes.Usage;
        }

        if (parse.GetValue(file) is { } target && OutputFile.Refusal(target, parse.GetValue(replace), Inputs(request)) is { } refusal)
        {
            await error.WriteLineAsync("partcheck: " + refusal).ConfigureAwait(false);
            return ExitCodes.CannotCreate;
        }

        return null;
    }

    /// <summary>Refuses after the run what the boards do not have: a line, a part, an assembly; says all of it.</summary>
    /// <returns>The exit code; null: nothing is amiss.</returns>
    public static async Task<int?> MisaskedAsync(CheckReport report, TextWriter error)
    {
        foreach (string wrong in report.UsageFaults)
        {
            await error.WriteLineAsync("partcheck: " + UsageError.OneLine(wrong)).ConfigureAwait(false);
        }

        return report.UsageFaults.Count > 0 ? ExitCodes.Usage : null;
    }

    /// <summary>Writes the report where it is to go.</summary>
    /// <param name="parse">The command line.</param>
    /// <param name="text">The report.</param>
    /// <param name="code">Exit code where all is well.</param>
    /// <param name="output">Standard output.</param>
    /// <param name="error">Standard error.</param>
    public async Task<int> WriteAsync(ParseResult parse, string text, int code, TextWriter output, TextWriter error)
    {
        return await Delivery.SendAsync(text, parse.GetValue(file), parse.GetValue(replace), code, output, error).ConfigureAwait(false);
    }

    /// <summary>What cannot be read of changes and day; null: all can.</summary>
    private string? Unread(ParseResult parse) => AskedChange.Read(parse.GetValue(with) ?? [], out _)
        ?? (parse.GetValue(date) is { } typed && ConcessionReader.DateOf(typed) is null
            ? $"--date needs a day of the form YYYY-MM-DD, not {UsageError.OneLine(typed)}." : null);

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
