using System.Text;

namespace PartCheck.Sheets;

/// <summary>
/// Bytes to text: a byte-order mark decides, then the encoding named, then strict UTF-8, then UTF-16 without a mark, then
/// Windows-1252 where it fits plainly.
/// </summary>
internal static class TextDecoding
{
    static TextDecoding() => Encoding.RegisterProvider(CodePagesEncodingProvider.Instance);

    /// <summary>The text; null with a complaint where the bytes cannot be told.</summary>
    internal static string? Decode(byte[] bytes, string shownName, string? encoding, ComplaintList complaints)
    {
        if (OfMark(bytes) is { } marked)
        {
            return Strict(bytes.AsSpan(marked.Length), marked.Encoding)
                ?? Refuse(shownName, ComplaintTexts.EncodingDoesNotFit(marked.Encoding.WebName), complaints);
        }

        if (encoding is not null)
        {
            if (Named(encoding) is not { } named)
            {
                return Refuse(shownName, ComplaintTexts.UnknownEncoding(encoding), complaints);
            }

            return Strict(bytes, named) ?? Refuse(shownName, ComplaintTexts.EncodingDoesNotFit(encoding), complaints);
        }

        if (bytes.AsSpan().Contains((byte)0))
        {
            return Unmarked16(bytes) ?? Refuse(shownName, ComplaintTexts.BinaryText, complaints);
        }

        if (Strict(bytes, new UTF8Encoding(false, true)) is { } utf8)
        {
            return utf8;
        }

        string western = Encoding.GetEncoding(1252).GetString(bytes);
        return FitsPlainly(western)
            ? western
            : Refuse(shownName, ComplaintTexts.EncodingNotFound(FirstBadLine(bytes)), complaints);
    }

    private static (Encoding Encoding, int Length)? OfMark(ReadOnlySpan<byte> bytes) => bytes switch
    {
        [0xEF, 0xBB, 0xBF, ..] => (new UTF8Encoding(false, true), 3),
        [0xFF, 0xFE, 0, 0, ..] => (new UTF32Encoding(false, false, true), 4),
        [0, 0, 0xFE, 0xFF, ..] => (new UTF32Encoding(true, false, true), 4),
        [0xFF, 0xFE, ..] => (new UnicodeEncoding(false, false, true), 2),
        [0xFE, 0xFF, ..] => (new UnicodeEncoding(true, false, true), 2),
        _ => null,
    };

    private static Encoding? Named(string name)
    {
        string plain = name.Trim();
        string? known = plain.ToUpperInvariant().Replace("_", "-", StringComparison.Ordinal) switch
        {
            "MAC-ROMAN" or "MACROMAN" or "X-MAC-ROMAN" or "MAC" => "macintosh",
            "CP1252" or "WIN-1252" or "1252" => "windows-1252",
            "CP1251" or "WIN-1251" or "1251" => "windows-1251",
            "SHIFT-JIS" or "SJIS" or "CP932" => "shift_jis",
            "UTF8" => "utf-8",
            "UTF16" => "utf-16",
            _ => null,
        };
        try
        {
            return Encoding.GetEncoding(known ?? plain);
        }
        catch (ArgumentException)
        {
            return null;
        }
    }

    /// <summary>
    /// The text; null where a byte does not belong to the encoding. Double-byte code pages map such bytes to the private-use area.
    /// </summary>
    private static string? Strict(ReadOnlySpan<byte> bytes, Encoding encoding)
    {
        Encoding strict = (Encoding)encoding.Clone();
        strict.DecoderFallback = DecoderFallback.ExceptionFallback;
        try
        {
            string text = strict.GetString(bytes);
            return !encoding.IsSingleByte && text.AsSpan().ContainsAnyInRange('\uE000', '\uF8FF') ? null : text;
        }
        catch (DecoderFallbackException)
        {
            return null;
        }
    }

    /// <summary>UTF-16 without a mark: nearly every second byte of a Latin text is 0.</summary>
    private static string? Unmarked16(byte[] bytes)
    {
        int even = 0;
        int odd = 0;
        for (int i = 0; i < bytes.Length; i++)
        {
            if (bytes[i] == 0)
            {
                _ = i % 2 == 0 ? even++ : odd++;
            }
        }

        bool little = odd > bytes.Length / 4 && even <= bytes.Length / 100;
        bool big = even > bytes.Length / 4 && odd <= bytes.Length / 100;
        return little || big ? Strict(bytes, new UnicodeEncoding(big, false, true)) : null;
    }

    /// <summary>
    /// True where the text reads as Windows-1252 beyond doubt: each character above ASCII stands alone and is a sign that bills
    /// use, or a letter inside a Latin word. Two in a row are another encoding (Cyrillic, Japanese, broken UTF-8).
    /// </summary>
    private static bool FitsPlainly(string text)
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
            bool letterInWord = c is >= '\u00C0' and <= '\u00FF' and not '\u00D7' and not '\u00F7'
                && (char.IsAsciiLetter(before) || char.IsAsciiLetter(after));
            if (!alone || !(letterInWord || IsSignOfBills(c)))
            {
                return false;
            }
        }

        return true;
    }

    private static bool IsSignOfBills(char c) =>
        c is '\u00B5' or '\u00B0' or '\u00B1' or '\u00B2' or '\u00B3' or '\u00B7' or '\u00D7' or '\u00A0' or '\u00AE' or '\u00A9'
            or '\u20AC' or '\u2013' or '\u2014' or '\u2018' or '\u2019' or '\u201C' or '\u201D' or '\u2122' or '\u00A7';

    private static int FirstBadLine(byte[] bytes)
    {
        int line = 1;
        ReadOnlySpan<byte> rest = bytes;
        while (rest.Length > 0)
        {
            bool valid = Rune.DecodeFromUtf8(rest, out Rune rune, out int consumed) == System.Buffers.OperationStatus.Done;
            if (!valid)
            {
                break;
            }

            bool lineEnd = rune.Value == '\n' || (rune.Value == '\r' && !(rest.Length > 1 && rest[1] == '\n'));
            line += lineEnd ? 1 : 0;
            rest = rest[consumed..];
        }

        return line;
    }

    private static string? Refuse(string shownName, string text, ComplaintList complaints)
    {
        SheetFile.Refuse(shownName, text, complaints, ComplaintTexts.WantedEncoding);
        return null;
    }
}
