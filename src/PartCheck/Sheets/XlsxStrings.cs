using System.Buffers;
using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using System.Xml;

namespace PartCheck.Sheets;

/// <summary>The shared strings of a workbook; phonetic runs are left out, rich text is joined.</summary>
internal static partial class XlsxStrings
{
    private const long MostCharacters = 256L << 20;

    /// <summary>Longest text that is read at all; a cell takes 32 767 characters.</summary>
    private const int LongestText = 1 << 20;

    internal static List<string> Read(XlsxPackage package, string? part)
    {
        List<string> strings = [];
        if (part is null)
        {
            return strings;
        }

        using XmlReader x = package.Open(part);
        long characters = 0;
        while (x.Read())
        {
            if (x.NodeType == XmlNodeType.Element && x.LocalName == "si")
            {
                // Trimmed once: a text that a million cells share is held once.
                string text = Item(x).Trim();
                characters += text.Length;
                if (characters > MostCharacters)
                {
                    throw new InvalidDataException("its texts are longer than 256 million characters.");
                }

                strings.Add(text);
            }
        }

        return strings;
    }

    /// <summary>The text inside the element at which the reader stands (<c>si</c> or <c>is</c>).</summary>
    internal static string Item(XmlReader x)
    {
        if (x.IsEmptyElement)
        {
            return string.Empty;
        }

        StringBuilder text = new();
        int depth = x.Depth;
        bool inText = false;
        int phonetic = 0;
        while (x.Read() && x.Depth > depth)
        {
            switch (x.NodeType)
            {
                case XmlNodeType.Element when x.LocalName == "rPh" && !x.IsEmptyElement:
                    phonetic++;
                    break;
                case XmlNodeType.EndElement when x.LocalName == "rPh":
                    phonetic--;
                    break;
                case XmlNodeType.Element when x.LocalName == "t":
                    inText = !x.IsEmptyElement;
                    break;
                case XmlNodeType.EndElement when x.LocalName == "t":
                    inText = false;
                    break;
                case XmlNodeType.Text or XmlNodeType.CDATA or XmlNodeType.Whitespace or XmlNodeType.SignificantWhitespace:
                    if (inText && phonetic == 0)
                    {
                        Append(text, x);
                    }

                    break;
                default:
                    break;
            }
        }

        return Unescaped(text.ToString());
    }

    /// <summary>Appends the text at which the reader stands, piece by piece: a giant one is never held whole.</summary>
    /// <exception cref="InvalidDataException">The text is longer than one million characters.</exception>
    internal static void Append(StringBuilder text, XmlReader x)
    {
        char[] piece = ArrayPool<char>.Shared.Rent(4096);
        try
        {
            for (int count = x.ReadValueChunk(piece, 0, piece.Length); count > 0; count = x.ReadValueChunk(piece, 0, piece.Length))
            {
                text.Append(piece, 0, count);
                if (text.Length > LongestText)
                {
                    throw new InvalidDataException("it has a tag or a text of more than one million characters.");
                }
            }
        }
        finally
        {
            ArrayPool<char>.Shared.Return(piece);
        }
    }

    /// <summary>Undoes <c>_x000D_</c> escapes (ECMA-376 part 1, 22.9.2.19).</summary>
    internal static string Unescaped(string text) =>
        text.Contains("_x", StringComparison.Ordinal)
            ? Escape().Replace(text, m => ((char)int.Parse(m.Groups[1].ValueSpan, NumberStyles.HexNumber, CultureInfo.InvariantCulture)).ToString())
            : text;

    [GeneratedRegex("_x([0-9A-Fa-f]{4})_", RegexOptions.CultureInvariant)]
    private static partial Regex Escape();
}
