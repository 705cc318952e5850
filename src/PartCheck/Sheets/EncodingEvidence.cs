namespace PartCheck.Sheets;

/// <summary>Whether a text decoded by guess reads like a bill. A guess counts only where every character above ASCII is plausible.</summary>
internal static class EncodingEvidence
{
    private const double LeastCommon = 0.7;

    /// <summary>The encodings that bills come in beside Unicode; each with what makes it plausible.</summary>
    internal static IReadOnlyList<(string Name, string Shown, Func<string, bool> Fits)> Candidates { get; } =
    [
        ("windows-1252", "Windows-1252", t => FitsLatin(t, macRoman: false)),
        ("macintosh", "Mac-Roman", t => FitsLatin(t, macRoman: true)),
        ("windows-1251", "Windows-1251", FitsCyrillic),
        ("shift_jis", "Shift-JIS", FitsJapanese),
    ];

    /// <summary>
    /// Latin text: each character above ASCII stands alone and is a sign that bills use, or a letter inside a Latin word with its
    /// case. Two in a row are another encoding (Cyrillic, Japanese, broken UTF-8).
    /// </summary>
    internal static bool FitsLatin(string text, bool macRoman)
    {
        for (int i = 0; i < text.Length; i++)
        {
            char c = text[i];
            if (c < 0x80)
            {
                continue;
            }

            char before = i > 0 ? text[i - 1] : ' ';
            char after = i + 1 < text.Length ? text[i + 1] : ' ';
            bool alone = before < 0x80 && after < 0x80;
            if (!alone || !(IsLetterOfWord(before, c, after) || IsSignOfBills(c) || (macRoman && c is '\u2126' or '\u03A9')))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>An accented letter with a Latin letter beside it, and no capital inside a small word.</summary>
    private static bool IsLetterOfWord(char before, char c, char after) =>
        c is >= '\u00C0' and <= '\u00FF' and not '\u00D7' and not '\u00F7'
        && (char.IsAsciiLetter(before) || char.IsAsciiLetter(after))
        && !(char.IsUpper(c) && (char.IsAsciiLetterLower(before) || (char.IsAsciiLetterLower(after) && char.IsAsciiLetter(before))))
        && !(char.IsLower(c) && char.IsAsciiLetterUpper(before) && char.IsAsciiLetterUpper(after));

    private static bool IsSignOfBills(char c) =>
        c is '\u00B5' or '\u00B0' or '\u00B1' or '\u00B2' or '\u00B3' or '\u00B7' or '\u00D7' or '\u00A0' or '\u00AE' or '\u00A9'
            or '\u20AC' or '\u2013' or '\u2014' or '\u2018' or '\u2019' or '\u201C' or '\u201D' or '\u2122' or '\u00A7';

    /// <summary>Russian words: letters of the Russian alphabet with their case, one word of three letters with a vowel at least; else signs.</summary>
    private static bool FitsCyrillic(string text)
    {
        int run = 0;
        bool vowel = false;
        bool word = false;
        for (int i = 0; i < text.Length; i++)
        {
            char c = text[i];
            if (c is (>= '\u0410' and <= '\u044F') or '\u0401' or '\u0451')
            {
                bool capitalInside = run > 0 && char.IsUpper(c) && char.IsLower(text[i - 1]);
                if (capitalInside)
                {
                    return false;
                }

                run++;
                vowel |= "\u0430\u0435\u0438\u043E\u0443\u044B\u044D\u044E\u044F\u0451".Contains(char.ToLowerInvariant(c), StringComparison.Ordinal);
                word |= run >= 3 && vowel;
                continue;
            }

            run = 0;
            vowel = false;
            if (c >= 0x80 && !IsSignOfBills(c) && c is not '\u2116' and not '\u00AB' and not '\u00BB')
            {
                return false;
            }
        }

        return word;
    }

    /// <summary>
    /// Japanese: kana, characters, full-width forms and signs make up nearly all above ASCII, and two of them stand side by side (an
    /// accented letter before a Latin one decodes as a single character).
    /// </summary>
    private static bool FitsJapanese(string text)
    {
        int common = 0;
        int other = 0;
        int run = 0;
        bool word = false;
        foreach (char c in text)
        {
            bool written = c is (>= '\u3000' and <= '\u30FF') or (>= '\uFF01' and <= '\uFF5E') or (>= '\u4E00' and <= '\u9FFF');
            run = written ? run + 1 : 0;
            word |= run >= 2;
            if (c >= 0x80)
            {
                bool sign = c is '\u00B1' or '\u00B0' or '\u00B5' or '\u03BC' or '\u03A9' or '\u2103' or '\u2126' or '\u00D7';
                _ = written || sign ? common++ : other++;
            }
        }

        return word && common >= LeastCommon * (common + other);
    }
}
