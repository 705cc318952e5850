namespace PartCheck.Sheets;

/// <summary>Finds out which character separates the fields of a text: the one that gives most lines the same number of fields.</summary>
internal static class Separator
{
    private const int LinesLookedAt = 200;

    /// <summary>The separator's name.</summary>
    internal static string NameOf(char separator) => separator switch
    {
        ',' => "comma",
        ';' => "semicolon",
        _ => "tab",
    };

    /// <summary>Comma, semicolon or tab. A first line such as <c>sep=;</c> decides and is emptied, so that rows keep their numbers.</summary>
    internal static char Of(string text, out string body)
    {
        body = text;
        if (text.StartsWith("sep=", StringComparison.OrdinalIgnoreCase) && text.Length > 4 && text[4] is ',' or ';' or '\t'
            && (text.Length == 5 || text[5] is '\r' or '\n'))
        {
            body = text[5..];
            return text[4];
        }

        char best = ',';
        (int Lines, int Fields) most = (0, 0);
        foreach (char candidate in (ReadOnlySpan<char>)['\t', ';', ','])
        {
            (int Lines, int Fields) score = Score(text, candidate);
            if (score.CompareTo(most) > 0)
            {
                (best, most) = (candidate, score);
            }
        }

        return best;
    }

    /// <summary>How many lines have the commonest number of separators above 0, and that number.</summary>
    private static (int Lines, int Fields) Score(string text, char separator)
    {
        Dictionary<int, int> linesByCount = [];
        int count = 0;
        int lines = 0;
        bool quoted = false;
        bool fieldStart = true;
        for (int i = 0; i <= text.Length && lines < LinesLookedAt; i++)
        {
            char c = i < text.Length ? text[i] : '\n';
            if (quoted)
            {
                quoted = c != '"';
                continue;
            }

            if (c == '"' && (fieldStart || (i > 0 && text[i - 1] == '"')))
            {
                quoted = true;
            }
            else if (c == separator)
            {
                count++;
            }
            else if (c is '\r' or '\n')
            {
                lines += count > 0 ? 1 : 0;
                linesByCount[count] = linesByCount.GetValueOrDefault(count) + 1;
                count = 0;
            }

            fieldStart = c == separator || c is '\r' or '\n';
        }

        linesByCount.Remove(0);
        return linesByCount.Count == 0
            ? (0, 0)
            : linesByCount.Select(pair => (pair.Value, pair.Key)).Max();
    }
}
