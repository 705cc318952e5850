using System.CommandLine;
using PartCheck.Derating;
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
    private readonly Option<string?> columns = UsageError.NoOption(new Option<string?>("--columns") { Description = "Further header spellings", HelpName = "FILE" });
    private readonly Option<string?> encoding = UsageError.NoOption(new Option<string?>("--encoding") { Description = "Text encoding of CSV files (default: found out)", HelpName = "NAME" });
    private readonly Option<string> format = new("--format") { Description = "text or json", HelpName = "FORMAT", DefaultValueFactory = _ => "text" };
    private readonly Option<string?> file = UsageError.NoOption(new Option<string?>("--out") { Description = "File to write instead of standard output", HelpName = "FILE" });
    private readonly Option<bool> replace = new("--replace") { Description = "Replace the --out file where it exists" };

    public BoardOptions() => format.AcceptOnlyFromAmong("text", "json");

    /// <summary>Gives a command these options.</summary>
    public Command On(Command command)
    {
        foreach (Option option in (Option[])[parts, bill, channels, derating, pins, columns, encoding, format, file, replace])
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
        if (UsageFault(request) is { } fault)
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

    /// <summary>Writes the report where it is to go.</summary>
    /// <param name="parse">The command line.</param>
    /// <param name="text">The report.</param>
    /// <param name="code">Exit code where all is well.</param>
    /// <param name="output">Standard output.</param>
    /// <param name="error">Standard error.</param>
    public async Task<int> WriteAsync(ParseResult parse, string text, int code, TextWriter output, TextWriter error)
    {
        if (parse.GetValue(file) is not { } target)
        {
            return await CommandLine.WrittenAsync(output, text).ConfigureAwait(false)
                ? code
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

        return code;
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
