namespace PartCheck.Cli;

/// <summary>Writes a report beside its target and renames it: nothing is ever half-written.</summary>
internal static class OutputFile
{
    /// <summary>Why a file cannot be made; null: it can.</summary>
    /// <param name="path">The target.</param>
    /// <param name="replace">True where an existing file may be replaced.</param>
    /// <param name="inputs">Files that are being read and must not be replaced.</param>
    public static string? Refusal(string path, bool replace, IEnumerable<string> inputs)
    {
        string full;
        try
        {
            full = FileIdentity.Of(path);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return $"{path} cannot be created: its links lead nowhere.";
        }

        if (Directory.Exists(full))
        {
            return $"{path} is a folder.";
        }

        if (inputs.Where(File.Exists).Any(i => string.Equals(FileIdentity.Of(i), full, FileIdentity.Comparison)))
        {
            return $"{path} is an input of this run.";
        }

        if (File.Exists(full) && !replace)
        {
            return $"{path} exists; --replace allows to replace it.";
        }

        if (File.Exists(full) && !FileIdentity.IsOrdinary(path))
        {
            return $"{path} is no ordinary file that may be written, and is not replaced.";
        }

        try
        {
            using FileStream probe = new(Beside(full), FileMode.CreateNew, FileAccess.Write, FileShare.None, 1, FileOptions.DeleteOnClose);
            return null;
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or NotSupportedException or ArgumentException)
        {
            return $"{path} cannot be created: its folder does not exist or cannot be written to.";
        }
    }

    /// <summary>Writes a file; an exception leaves the target as it was. A link stays a link: the file it leads to is replaced.</summary>
    /// <param name="path">The target.</param>
    /// <param name="bytes">What it holds.</param>
    /// <param name="replace">True where an existing file may be replaced.</param>
    public static async Task WriteAsync(string path, byte[] bytes, bool replace)
    {
        string full = FileIdentity.Of(path);
        string beside = Beside(full);
        try
        {
            await File.WriteAllBytesAsync(beside, bytes, CancellationToken.None).ConfigureAwait(false);
            File.Move(beside, full, overwrite: replace);
        }
        catch
        {
            File.Delete(beside);
            throw;
        }
    }

    private static string Beside(string full) =>
        Path.Combine(Path.GetDirectoryName(full) ?? ".", "." + Path.GetFileName(full) + "." + Guid.NewGuid().ToString("N") + ".part");
}
