using System.Text;

namespace PartCheck.Cli;

/// <summary>Brings a result to standard output or into a file, and says why where it cannot.</summary>
internal static class Delivery
{
    /// <summary>Sends a text.</summary>
    /// <param name="text">The result.</param>
    /// <param name="target">The file of <c>--out</c>, found writable before; null: standard output.</param>
    /// <param name="replace">True where an existing file may be replaced.</param>
    /// <param name="code">The exit code of the run itself.</param>
    /// <param name="output">Standard output.</param>
    /// <param name="error">Standard error.</param>
    /// <returns>The exit code.</returns>
    internal static async Task<int> SendAsync(string text, string? target, bool replace, int code, TextWriter output, TextWriter error)
    {
        if (target is not null)
        {
            return await SaveAsync(new UTF8Encoding(false).GetBytes(text), target, replace, code, error).ConfigureAwait(false);
        }

        return await CommandLine.WrittenAsync(output, text).ConfigureAwait(false)
            ? code
            : await CommandLine.UnwritableAsync(error).ConfigureAwait(false);
    }

    /// <summary>Saves a file.</summary>
    internal static async Task<int> SaveAsync(byte[] bytes, string target, bool replace, int code, TextWriter error)
    {
        try
        {
            await OutputFile.WriteAsync(target, bytes, replace).ConfigureAwait(false);
        }
        catch (IOException) when (!replace && File.Exists(target))
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
}
