namespace PartCheck.Bills;

/// <summary>One change of a bill as asked: <c>LINE=PN</c>.</summary>
/// <param name="Line">A reference, a range of references, or the part number of lines.</param>
/// <param name="PartNumber">What is to be fitted there.</param>
public sealed record AskedChange(string Line, string PartNumber)
{
    /// <summary>
    /// Reads <c>LINE=PN</c>, several of them separated by commas. A piece without an equals sign belongs to the part number
    /// before it, since part numbers may hold commas.
    /// </summary>
    /// <param name="texts">What the user wrote, one text for each use of the option.</param>
    /// <param name="changes">The changes, in order.</param>
    /// <returns>What is wrong; null: nothing.</returns>
    public static string? Read(IEnumerable<string> texts, out IReadOnlyList<AskedChange> changes)
    {
        ArgumentNullException.ThrowIfNull(texts);
        List<AskedChange> read = [];
        changes = read;
        foreach (string text in texts)
        {
            List<string> pieces = [];
            foreach (string piece in text.Split(','))
            {
                if (pieces.Count > 0 && !(piece.Contains('=', StringComparison.Ordinal) && pieces[^1].Contains('=', StringComparison.Ordinal)))
                {
                    pieces[^1] += "," + piece;
                }
                else
                {
                    pieces.Add(piece);
                }
            }

            foreach (string piece in pieces)
            {
                int at = piece.IndexOf('=', StringComparison.Ordinal);
                string line = at < 0 ? string.Empty : piece[..at].Trim();
                string part = at < 0 ? string.Empty : piece[(at + 1)..].Trim().TrimEnd(',').TrimEnd();
                if (line.Length == 0 || part.Length == 0)
                {
                    return $"\"{piece.Trim()}\" is no change: LINE=PN is wanted, such as Q3=PN, with a reference or a part number of the bill as LINE.";
                }

                read.Add(new AskedChange(line, part));
            }
        }

        return null;
    }
}
