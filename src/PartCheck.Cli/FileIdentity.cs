namespace PartCheck.Cli;

/// <summary>Which file a path means, whatever links lead there.</summary>
internal static class FileIdentity
{
    /// <summary>Paths compare as the platform's file systems commonly do.</summary>
    public static StringComparison Comparison { get; } =
        OperatingSystem.IsWindows() || OperatingSystem.IsMacOS() ? StringComparison.OrdinalIgnoreCase : StringComparison.Ordinal;

    /// <summary>The full path with every symbolic link in it followed; parts that do not exist stay as they are.</summary>
    /// <param name="path">A path, absolute or from the working folder.</param>
    /// <exception cref="IOException">The links go round in a circle.</exception>
    public static string Of(string path)
    {
        string full = Path.GetFullPath(path);
        if (Path.GetDirectoryName(full) is not { } parent)
        {
            return full;
        }

        // The folders first, so that a link's relative target is read from where the link really lies.
        string here = Path.Combine(Of(parent), Path.GetFileName(full));
        FileInfo file = new(here);
        return file.LinkTarget is null ? here : Of(file.ResolveLinkTarget(returnFinalTarget: true)?.FullName ?? here);
    }

    /// <summary>True where an existing path is a file that holds bytes: no pipe, socket or device, which a rename would destroy.</summary>
    /// <param name="path">The path of an existing file as given: /dev/stdout may lead to an ordinary file and is none.</param>
    public static bool IsOrdinary(string path)
    {
        string full = Path.GetFullPath(path);
        string real = Of(full);
        if (!OperatingSystem.IsWindows() && new[] { full, real }.Any(p => p.StartsWith("/dev/", StringComparison.Ordinal)))
        {
            return false;
        }

        try
        {
            // Opened for both, so that a pipe without a partner does not wait.
            using FileStream stream = new(real, FileMode.Open, FileAccess.ReadWrite, FileShare.ReadWrite | FileShare.Delete, 1);
            return stream.CanSeek;
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or NotSupportedException)
        {
            return false;
        }
    }
}
