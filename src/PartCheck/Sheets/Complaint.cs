using System.Globalization;

namespace PartCheck.Sheets;

/// <summary>
/// Something in an input that could not be read or is impossible, with its cell. User errors are values, never exceptions:
/// they are collected, all of them, and reported in one go.
/// </summary>
/// <param name="File">The file's name as the user gave it.</param>
/// <param name="Sheet">The sheet's name, null for CSV.</param>
/// <param name="Row">One-based row, null where the whole file is meant.</param>
/// <param name="Column">The header of the column as it stands in the file, or the column's own name.</param>
/// <param name="Cell">The cell's address such as <c>D7</c>.</param>
/// <param name="Found">The text that stands there.</param>
/// <param name="Wanted">What is wanted instead.</param>
/// <param name="Text">The whole sentence, as a person reads it, without file and cell.</param>
public sealed record Complaint(
    string File, string? Sheet, int? Row, string? Column, string? Cell, string? Found, string? Wanted, string Text)
{
    private const string Letters = "ABCDEFGHIJKLMNOPQRSTUVWXYZ";

    /// <summary>The channel that the complaint makes unjudgeable; null when it concerns more or less than one channel.</summary>
    public string? Channel { get; init; }

    /// <summary>True when nothing of the board or table can be judged because of it (missing file, damaged workbook, no header).</summary>
    public bool Fatal { get; init; }

    /// <summary>True when the file is not there or cannot be opened (exit code 66).</summary>
    public bool NoInput { get; init; }

    /// <summary>True when it is about a quantity that disagrees with its references, which a rule judges as well.</summary>
    public bool IsCount { get; init; }

    /// <summary>A complaint about a place that something read earlier has cited.</summary>
    /// <param name="place">File, sheet where there is one, and cell: <c>parts.csv!K12</c>, <c>board.xlsx!Parts!K12</c>.</param>
    /// <param name="column">The column.</param>
    /// <param name="found">What stands there.</param>
    /// <param name="wanted">What is wanted.</param>
    /// <param name="text">The sentence.</param>
    public static Complaint At(string place, string column, string? found, string wanted, string text)
    {
        ArgumentNullException.ThrowIfNull(place);
        string[] parts = place.Split('!');
        int? row = int.TryParse(parts[^1].AsSpan().TrimStart(Letters), NumberStyles.None, CultureInfo.InvariantCulture, out int number) ? number : null;
        return new Complaint(parts[0], parts.Length > 2 ? parts[1] : null, row, column, parts[^1], found, wanted, text);
    }
}
