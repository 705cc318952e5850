namespace PartCheck.Sheets;

/// <summary>
/// Where the tables of a board are: the sheets of a workbook, or the CSV files of a folder. A table that an option names
/// comes from there instead. Every file is read once and remembered.
/// </summary>
public sealed class BoardSource
{
    private readonly Dictionary<string, IReadOnlyList<SheetData>> read = new(StringComparer.Ordinal);
    private readonly List<(string Path, string Shown)> files = [];
    private readonly string? encoding;
    private readonly ComplaintList complaints;

    /// <summary>Makes a source for one run.</summary>
    /// <param name="encoding">Name of the text encoding of CSV files; null: found out.</param>
    /// <param name="complaints">Where complaints go.</param>
    public BoardSource(string? encoding, ComplaintList complaints)
    {
        this.encoding = encoding;
        this.complaints = complaints;
    }

    /// <summary>Every file read so far: its path and the name it is shown by.</summary>
    public IReadOnlyList<(string Path, string Shown)> Files => files;

    /// <summary>The name a path is shown by: as given, but never with a machine's own folders in it.</summary>
    public static string Shown(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        return (Path.IsPathRooted(path) ? Path.GetFileName(Path.TrimEndingDirectorySeparator(path)) : path).Replace('\\', '/');
    }

    /// <summary>A table of a board.</summary>
    /// <param name="board">Workbook or folder.</param>
    /// <param name="table">BOM, Channels, Parts, Pins or Derating.</param>
    /// <param name="required">True: its absence is a complaint.</param>
    /// <returns>The sheet; null where there is none.</returns>
    public SheetData? Table(string board, string table, bool required)
    {
        ArgumentNullException.ThrowIfNull(board);
        ArgumentNullException.ThrowIfNull(table);
        if (Directory.Exists(board))
        {
            // The name on disk in any case; the first in ordinal order where several differ by case only.
            string wanted = table + ".csv";
            string? file = Directory.EnumerateFiles(board)
                .Where(f => string.Equals(Path.GetFileName(f), wanted, StringComparison.OrdinalIgnoreCase))
                .Order(StringComparer.Ordinal).FirstOrDefault();
            if (file is not null)
            {
                string shown = Shown(board).TrimEnd('/') + "/" + Path.GetFileName(file);
                IReadOnlyList<SheetData> sheets = Read(file, shown);
                return sheets.Count == 0 ? null : sheets[0];
            }

            if (required)
            {
                complaints.Add(ComplaintOf(Shown(board), $"The folder has no {table.ToLowerInvariant()}.csv.", $"a file {table.ToLowerInvariant()}.csv", noInput: true));
            }

            return null;
        }

        return Named(Read(board, Shown(board)), Shown(board), table, required, fallBackToOnly: false);
    }

    /// <summary>A table from a file that an option names, FILE or FILE:SHEET.</summary>
    /// <param name="argument">The option's argument.</param>
    /// <param name="table">Sheet looked for in a workbook where the argument names none.</param>
    public SheetData? File(string argument, string table)
    {
        (string path, string? sheet) = Split(argument);
        return Named(Read(path, Shown(path)), Shown(path), sheet ?? table, required: true, fallBackToOnly: sheet is null);
    }

    /// <summary>Every sheet of a file that an option names, FILE or FILE:SHEET, with the sheet named; no sheets where it cannot be read.</summary>
    /// <param name="argument">The option's argument.</param>
    public (IReadOnlyList<SheetData> Sheets, string Shown, string? Sheet) Sheets(string argument)
    {
        (string path, string? sheet) = Split(argument);
        return (Read(path, Shown(path)), Shown(path), sheet);
    }

    /// <summary>Splits FILE:SHEET; a file of the whole name, or a drive letter, is no sheet.</summary>
    public static (string Path, string? Sheet) Split(string argument)
    {
        ArgumentNullException.ThrowIfNull(argument);
        int colon = argument.LastIndexOf(':');
        bool whole = colon <= 1 || System.IO.File.Exists(argument) || argument.IndexOfAny(['/', '\\'], colon) >= 0;
        return whole ? (argument, null) : (argument[..colon], argument[(colon + 1)..]);
    }

    private IReadOnlyList<SheetData> Read(string path, string shown)
    {
        if (!read.TryGetValue(path, out IReadOnlyList<SheetData>? sheets))
        {
            sheets = SheetFile.Read(path, shown, encoding, complaints);
            read[path] = sheets;
            if (System.IO.File.Exists(path))
            {
                files.Add((path, shown));
            }
        }

        return sheets;
    }

    private SheetData? Named(IReadOnlyList<SheetData> sheets, string shown, string name, bool required, bool fallBackToOnly)
    {
        if (sheets.Count == 0)
        {
            return null;
        }

        SheetData? found = sheets.FirstOrDefault(s => string.Equals(s.Sheet?.Trim(), name, StringComparison.OrdinalIgnoreCase));
        if (found is null && (sheets[0].Sheet is null ? fallBackToOnly : fallBackToOnly && sheets.Count == 1))
        {
            return sheets[0];
        }

        if (found is null && required)
        {
            string has = sheets[0].Sheet is null
                ? "It is a CSV file: one table. A board is a workbook with sheets BOM and Channels, or a folder with bom.csv and channels.csv."
                : "Its sheets are " + string.Join(", ", sheets.Select(s => s.Sheet)) + ".";
            complaints.Add(ComplaintOf(shown, $"There is no sheet {name}. {has}", $"a sheet {name}", noInput: false));
        }

        return found;
    }

    private static Complaint ComplaintOf(string file, string text, string wanted, bool noInput) =>
        new(file, null, null, null, null, null, wanted, text) { Fatal = true, NoInput = noInput };
}
