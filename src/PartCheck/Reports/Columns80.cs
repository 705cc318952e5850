using System.Text;

namespace PartCheck.Reports;

/// <summary>Lines of at most 80 columns with a hanging indent.</summary>
internal static class Columns80
{
    /// <summary>The width of every text report.</summary>
    public const int Width = 80;

    /// <summary>Stands for a blank that no line breaks at: between a number and its unit.</summary>
    public const char Glue = '\u00A0';

    /// <summary>Appends a text, wrapped.</summary>
    /// <param name="into">Where to.</param>
    /// <param name="first">What the first line begins with.</param>
    /// <param name="text">The text; its words are kept whole where they fit.</param>
    /// <param name="indent">Blanks before every further line.</param>
    public static void Wrap(StringBuilder into, string first, string text, int indent)
    {
        string line = first;
        bool fresh = true;
        foreach (string word in text.Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            string rest = word.Replace(Glue, ' ');
            while (true)
            {
                string glue = fresh || line.EndsWith(' ') ? string.Empty : " ";
                if (line.Length + glue.Length + rest.Length <= Width)
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
                int room = Math.Max(1, Width - line.Length);
                into.Append(line).Append(rest.AsSpan(0, room)).Append('\n');
                rest = rest[room..];
                line = new string(' ', indent);
            }
        }

        into.Append(line.TrimEnd()).Append('\n');
    }
}
