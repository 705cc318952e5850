using System.CommandLine;
using System.CommandLine.Invocation;

namespace PartCheck.Cli;

/// <summary>The command line as a function, so that tests call it as a user would.</summary>
public static class CommandLine
{
    /// <summary>Runs one command.</summary>
    /// <param name="args">Arguments.</param>
    /// <param name="output">Standard output.</param>
    /// <param name="error">Standard error.</param>
    /// <param name="colour">True where the output is a terminal that wants colour.</param>
    /// <param name="cancel">Stops the run (exit code 130).</param>
    /// <returns>The exit code.</returns>
    public static async Task<int> RunAsync(string[] args, TextWriter output, TextWriter error, bool colour, CancellationToken cancel)
    {
        ArgumentNullException.ThrowIfNull(output);
        ArgumentNullException.ThrowIfNull(error);
        try
        {
            RootCommand root = new("Checks LED current sinks of a board's bill of materials at worst case.")
            {
                CheckCommand.Build(output, error, colour),
                BillCommand.Build(output, error),
                TemplateCommand.Build(output, error),
                WorkingCommand.Build(output, error),
            };
            ParseResult parsed = root.Parse(args);
            if (UsageError.Of(parsed) is { } usage)
            {
                await error.WriteLineAsync("partcheck: " + usage).ConfigureAwait(false);
                return ExitCodes.Usage;
            }

            if (parsed.Action is null)
            {
                await error.WriteLineAsync("partcheck: no command given; partcheck --help lists them.").ConfigureAwait(false);
                return ExitCodes.Usage;
            }

            InvocationConfiguration configuration = new() { Output = output, Error = error, EnableDefaultExceptionHandler = false };
            int code = await parsed.InvokeAsync(configuration, cancel).ConfigureAwait(false);
            return await FlushedAsync(output).ConfigureAwait(false) ? code : await UnwritableAsync(error).ConfigureAwait(false);
        }
        catch (OperationCanceledException)
        {
            return ExitCodes.Interrupted;
        }
        catch (Exception e) when (e is not OutOfMemoryException)
        {
            bool debug = Environment.GetEnvironmentVariable("PARTCHECK_DEBUG") == "1";
            await error.WriteLineAsync("partcheck: internal error: " + (debug ? e.ToString() : UsageError.OneLine(e.GetType().Name + ": " + e.Message))).ConfigureAwait(false);
            return ExitCodes.Internal;
        }
    }

    /// <summary>Writes a report to standard output; false: it could not be written (disk full, closed).</summary>
    internal static async Task<bool> WrittenAsync(TextWriter output, string text)
    {
        try
        {
            await output.WriteAsync(text).ConfigureAwait(false);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return false;
        }

        return await FlushedAsync(output).ConfigureAwait(false);
    }

    /// <summary>Says that standard output could not be written.</summary>
    /// <returns>The exit code of it.</returns>
    internal static async Task<int> UnwritableAsync(TextWriter error)
    {
        await error.WriteLineAsync("partcheck: standard output could not be written.").ConfigureAwait(false);
        return ExitCodes.WriteFailure;
    }

    private static async Task<bool> FlushedAsync(TextWriter output)
    {
        try
        {
            await output.FlushAsync(CancellationToken.None).ConfigureAwait(false);
            return true;
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return false;
        }
    }
}
