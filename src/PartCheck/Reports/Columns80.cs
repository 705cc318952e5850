using System.Text;

namespace PartCheck.Reports;

/// <summary>Lines of at most 80 columns with a hanging indent.</summary>
internal static class Columns80
{
    /// <summary>The width of every text report.</summary>
    public const int Width = 80;

    /// <summary>Stands for a blank that no line breaks at: between a number and its unit.</summary>
    public const char Glue = '\u00A0';

    /// <summary>A beginning that leaves a line less room than this is wrapped with its text.</summary>
    private const int Room = 24;

    /// <summary>Appends a text, wrapped.</summary>
    /// <param name="into">Where to.</param>
    /// <param name="first">What the first line begins with; kept as it is where it leaves room for the text.</param>
    /// <param name="text">The text; its words are kept whole where they fit.</param>
    /// <param name="indent">Blanks before every further line.</param>
    public static void Wrap(StringBuilder into, string first, string text, int indent)
    {
        string line = PrintedText.Clean(first);
        string all = PrintedText.Clean(text);
        if (PrintedText.Width(line) > Width - Room)
        {
            string words = line.TrimStart(' ');
            all = words + " " + all;
            line = line[..^words.Length];
        }

        bool fresh = true;
        foreach (string word in all.Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            string rest = word.Replace(Glue, ' ');
            while (rest.Length > 0)
            {
                string glue = fresh || line.EndsWith(' ') ? string.Empty : " ";
                if (PrintedText.Width(line) + glue.Length + PrintedText.Width(rest) <= Width)
                {
                    line += glue + rest;
                    fresh = false;
                    break;
                }

                if (!fresh)
                {
                    into.Append(line.TrimEnd()).Append('\n');
                    line = new string(' ', indent);
                    fresh = true;
                    continue;
                }

                // A word longer than a line is cut.
                string beginning = PrintedText.Beginning(rest, Width - PrintedText.Width(line));
                into.Append(line).Append(beginning).Append('\n');
                rest = rest[beginning.Length..];
                line = new string(' ', indent);
            }
        }

        if (!fresh || line.Trim().Length > 0)
        {
            into.Append(line.TrimEnd()).Append('\n');
        }
    }
}
