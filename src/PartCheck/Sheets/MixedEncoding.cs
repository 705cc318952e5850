using System.Buffers;
using System.Text;

namespace PartCheck.Sheets;

/// <summary>A text that was put together from two encodings: UTF-8 in some places, Windows-1252 in others.</summary>
internal static class MixedEncoding
{
    /// <summary>
    /// Each valid sequence of UTF-8 as itself, each other byte as Windows-1252; null where the text has no sequence of UTF-8 above
    /// ASCII, or where the rest is no plausible Latin text.
    /// </summary>
    internal static DecodedText? Read(byte[] bytes)
    {
        Encoding western = Encoding.GetEncoding(1252);
        StringBuilder text = new(bytes.Length);
        StringBuilder rest = new();
        List<int> lines = [];
        int sequences = 0;
        int line = 1;
        ReadOnlySpan<byte> left = bytes;
        while (left.Length > 0)
        {
            bool valid = Rune.DecodeFromUtf8(left, out Rune rune, out int consumed) == OperationStatus.Done;
            if (valid)
            {
                sequences += consumed > 1 ? 1 : 0;
                text.Append(rune.ToString());
                rest.Append(rune.IsAscii ? (char)rune.Value : ' ');
                line += EndsLine(rune, left) ? 1 : 0;
                left = left[consumed..];
                continue;
            }

            string one = western.GetString(left[..1]);
            text.Append(one);
            rest.Append(one);
            if (lines.Count == 0 || lines[^1] != line)
            {
                lines.Add(line);
            }

            left = left[1..];
        }

        return sequences > 0 && EncodingEvidence.FitsLatin(rest.ToString(), macRoman: false)
            ? new DecodedText(text.ToString(), "UTF-8 and Windows-1252 mixed (found out)", lines)
            : null;
    }

    /// <summary>The first line that is not UTF-8, from 1.</summary>
    internal static int FirstBadLine(byte[] bytes)
    {
        int line = 1;
        ReadOnlySpan<byte> left = bytes;
        while (left.Length > 0 && Rune.DecodeFromUtf8(left, out Rune rune, out int consumed) == OperationStatus.Done)
        {
            line += EndsLine(rune, left) ? 1 : 0;
            left = left[consumed..];
        }

        return line;
    }

    private static bool EndsLine(Rune rune, ReadOnlySpan<byte> left) =>
        rune.Value == '\n' || (rune.Value == '\r' && !(left.Length > 1 && left[1] == '\n'));
}
