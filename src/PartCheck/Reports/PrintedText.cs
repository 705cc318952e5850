using System.Globalization;
using System.Text;

namespace PartCheck.Reports;

/// <summary>A user's text on its way to a terminal: how wide it prints, and what must not reach it.</summary>
internal static class PrintedText
{
    /// <summary>
    /// The text with line breaks, tabs and other control characters as blanks, the marks that turn the writing direction left out,
    /// and halves of damaged characters replaced: a cell can neither break a line nor send a command to the terminal.
    /// </summary>
    public static string Clean(string text)
    {
        if (!text.AsSpan().ContainsAnyExceptInRange(' ', '~'))
        {
            return text;
        }

        StringBuilder clean = new(text.Length);
        foreach (Rune rune in text.EnumerateRunes())
        {
            switch (Rune.GetUnicodeCategory(rune))
            {
                case UnicodeCategory.Control:
                case UnicodeCategory.LineSeparator:
                case UnicodeCategory.ParagraphSeparator:
                    clean.Append(' ');
                    break;
                case UnicodeCategory.Format:
                    break;
                default:
                    clean.Append(rune.ToString());
                    break;
            }
        }

        return clean.ToString();
    }

    /// <summary>Columns of a terminal that a text takes: two for the wide characters of East Asian writing, none for combining marks.</summary>
    public static int Width(string text)
    {
        int width = 0;
        foreach (Rune rune in text.EnumerateRunes())
        {
            width += Width(rune);
        }

        return width;
    }

    /// <summary>Columns of a terminal that a character takes, 0 to 2.</summary>
    /// <remarks>The wide blocks of Unicode Standard Annex #11 (East Asian Width W and F), taken whole.</remarks>
    public static int Width(Rune rune)
    {
        if (Rune.GetUnicodeCategory(rune) is UnicodeCategory.NonSpacingMark or UnicodeCategory.EnclosingMark or UnicodeCategory.Format)
        {
            return 0;
        }

        return rune.Value switch
        {
            >= 0x1100 and <= 0x115F => 2,
            >= 0x2E80 and <= 0x303E => 2,
            >= 0x3041 and <= 0xA4CF => 2,
            >= 0xA960 and <= 0xA97F => 2,
            >= 0xAC00 and <= 0xD7A3 => 2,
            >= 0xF900 and <= 0xFAFF => 2,
            >= 0xFE30 and <= 0xFE6F => 2,
            >= 0xFF00 and <= 0xFF60 => 2,
            >= 0xFFE0 and <= 0xFFE6 => 2,
            >= 0x1F300 and <= 0x1F64F => 2,
            >= 0x1F900 and <= 0x1F9FF => 2,
            >= 0x20000 and <= 0x3FFFD => 2,
            _ => 1,
        };
    }

    /// <summary>The longest beginning of a text that fits, at least one character.</summary>
    /// <param name="text">The text; not empty.</param>
    /// <param name="columns">Columns there are.</param>
    public static string Beginning(string text, int columns)
    {
        int length = 0;
        int width = 0;
        foreach (Rune rune in text.EnumerateRunes())
        {
            width += Width(rune);
            if (width > columns && length > 0)
            {
                break;
            }

            length += rune.Utf16SequenceLength;
        }

        return text[..length];
    }
}
