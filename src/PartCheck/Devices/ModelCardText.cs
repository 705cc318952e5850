namespace PartCheck.Devices;

/// <summary>One <c>.MODEL</c> statement, continuation lines joined, comments gone.</summary>
/// <param name="Line">Line of the text on which it begins, from 1.</param>
/// <param name="Name">The card's own name; empty where the statement ends before it.</param>
/// <param name="Type">Device type as written, e.g. <c>NPN</c>; empty where absent.</param>
/// <param name="Body">Everything after the type, parentheses and commas turned into blanks.</param>
/// <param name="Subcircuit">Name of the <c>.SUBCKT</c> around it; null: none.</param>
/// <param name="Stray">Lines that follow the card, look like parameters and do not continue it.</param>
internal sealed record ModelStatement(
    int Line, string Name, string Type, string Body, string? Subcircuit, IReadOnlyList<string> Stray);

/// <summary>
/// Cuts a text into its <c>.MODEL</c> statements: <c>*</c> lines and <c>;</c> and <c>$</c> tails are comments, <c>+</c>
/// continues, a closing parenthesis may stand on a line of its own or be missing.
/// </summary>
internal sealed class ModelCardText
{
    private readonly List<ModelStatement> _statements = [];
    private readonly List<string> _subcircuits = [];
    private readonly List<string> _stray = [];
    private string? _subcircuit;
    private string? _open;
    private int _openLine;

    private ModelCardText(string text)
    {
        string[] lines = text.TrimStart('\uFEFF').ReplaceLineEndings("\n").Split('\n');
        for (int i = 0; i < lines.Length; i++)
        {
            string line = WithoutComment(lines[i]);
            if (line.Length > 0)
            {
                Take(line, i + 1);
            }
        }

        Close();
    }

    /// <summary>The statements, in the order of the text.</summary>
    public IReadOnlyList<ModelStatement> Statements => _statements;

    /// <summary>Names of the sub-circuits that the text defines.</summary>
    public IReadOnlyList<string> Subcircuits => _subcircuits;

    /// <summary>Reads a text.</summary>
    public static ModelCardText Of(string text) => new(text);

    private static string WithoutComment(string line)
    {
        string trimmed = line.Trim();
        if (trimmed.StartsWith('*'))
        {
            return "";
        }

        int tail = trimmed.AsSpan().IndexOfAny(';', '$');
        return tail < 0 ? trimmed : trimmed[..tail].TrimEnd();
    }

    private void Take(string line, int number)
    {
        if (line.StartsWith('+'))
        {
            _open = _open is null ? null : _open + " " + line[1..];
        }
        else if (StartsWithWord(line, ".model"))
        {
            Close();
            _open = line[6..];
            _openLine = number;
        }
        else if (line.StartsWith('.'))
        {
            Close();
            TakeDirective(line);
        }
        else if (_open is not null && line.All(c => c == ')' || char.IsWhiteSpace(c)))
        {
            _open += " )";
        }
        else if (_open is not null && line.Contains('=', StringComparison.Ordinal))
        {
            _stray.Add(line);
        }
    }

    private void TakeDirective(string line)
    {
        if (StartsWithWord(line, ".subckt"))
        {
            string[] words = line.Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries);
            _subcircuit = words.Length > 1 ? words[1] : "?";
            _subcircuits.Add(_subcircuit);
        }
        else if (StartsWithWord(line, ".ends"))
        {
            _subcircuit = null;
        }
    }

    private void Close()
    {
        if (_open is not null)
        {
            string[] words = new string([.. _open.Select(c => c is '(' or ')' or ',' ? ' ' : c)])
                .Split((char[]?)null, 3, StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries);
            string Word(int i) => i < words.Length ? words[i] : "";
            _statements.Add(new ModelStatement(_openLine, Word(0), Word(1), Word(2), _subcircuit, [.. _stray]));
        }

        _stray.Clear();
        _open = null;
    }

    private static bool StartsWithWord(string line, string word) =>
        line.StartsWith(word, StringComparison.OrdinalIgnoreCase)
        && (line.Length == word.Length || char.IsWhiteSpace(line[word.Length]));
}
