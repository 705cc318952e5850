using System.Text;

namespace PartCheck.Sheets;

/// <summary>A text and how it was read.</summary>
/// <param name="Text">The text.</param>
/// <param name="Encoding">The encoding in words, e.g. <c>UTF-8</c>, <c>Mac-Roman (found out)</c>.</param>
/// <param name="MixedLines">Lines that hold bytes of a second encoding; none: the text is of one.</param>
internal sealed record DecodedText(string Text, string Encoding, IReadOnlyList<int> MixedLines);

/// <summary>
/// Bytes to text: a byte-order mark decides, then the encoding named, then strict UTF-8, then UTF-16 without a mark, then the one
/// encoding of bills in which every character is plausible (<see cref="EncodingEvidence"/>), then UTF-8 mixed with Windows-1252.
/// </summary>
internal static class TextDecoding
{
    static TextDecoding() => Encoding.RegisterProvider(CodePagesEncodingProvider.Instance);

    /// <summary>The text; null with a complaint where the bytes cannot be told.</summary>
    internal static DecodedText? Decode(byte[] bytes, string shownName, string? encoding, ComplaintList complaints)
    {
        if (OfMark(bytes) is { } marked)
        {
            return Strict(bytes.AsSpan(marked.Length), marked.Encoding) is { } text
                ? new DecodedText(text, $"{Shown(marked.Encoding)} (byte-order mark)", [])
                : Refuse(shownName, ComplaintTexts.EncodingDoesNotFit(marked.Encoding.WebName), complaints);
        }

        if (encoding is not null)
        {
            if (Named(encoding) is not { } named)
            {
                return Refuse(shownName, ComplaintTexts.UnknownEncoding(encoding), complaints);
            }

            return Strict(bytes, named) is { } text
                ? new DecodedText(text, Shown(named) + " (as named)", [])
                : Refuse(shownName, ComplaintTexts.EncodingDoesNotFit(encoding), complaints);
        }

        if (bytes.AsSpan().Contains((byte)0))
        {
            return Unmarked16(bytes) is { } text
                ? new DecodedText(text, "UTF-16 (found out)", [])
                : Refuse(shownName, ComplaintTexts.BinaryText, complaints);
        }

        if (Strict(bytes, new UTF8Encoding(false, true)) is { } utf8)
        {
            return new DecodedText(utf8, bytes.AsSpan().ContainsAnyInRange((byte)0x80, (byte)0xFF) ? "UTF-8" : "ASCII", []);
        }

        List<(string Name, string Text)> fitting = [.. EncodingEvidence.Candidates
            .Select(c => (c.Shown, Text: Strict(bytes, Encoding.GetEncoding(c.Name)), c.Fits))
            .Where(c => c.Text is not null && c.Fits(c.Text)).Select(c => (c.Shown, c.Text!))];
        if (fitting.Count > 0 && fitting.TrueForAll(f => f.Text == fitting[0].Text))
        {
            return new DecodedText(fitting[0].Text, fitting[0].Name + " (found out)", []);
        }

        return (fitting.Count == 0 ? MixedEncoding.Read(bytes) : null)
            ?? Refuse(shownName, ComplaintTexts.EncodingNotFound(MixedEncoding.FirstBadLine(bytes), [.. fitting.Select(f => f.Name)]), complaints);
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

    private static string Shown(Encoding encoding) => encoding.WebName switch
    {
        "shift_jis" => "Shift-JIS",
        "macintosh" => "Mac-Roman",
        "windows-1252" => "Windows-1252",
        "windows-1251" => "Windows-1251",
        "utf-16BE" => "UTF-16 (big-endian)",
        string name => name.ToUpperInvariant(),
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

    private static DecodedText? Refuse(string shownName, string text, ComplaintList complaints)
    {
        SheetFile.Refuse(shownName, text, complaints, ComplaintTexts.WantedEncoding);
        return null;
    }
}
