namespace PartCheck.Sheets;

/// <summary>
/// The bytes of an XML part as they are, refused where no tag begins for a long way. An XML reader holds a name, an attribute or
/// a tag whole, however long it is; every tag begins with a less-than sign, and no attribute may hold one.
/// </summary>
internal sealed class MarkupLimit(Stream inner) : Stream
{
    /// <summary>Most bytes from one less-than sign to the next.</summary>
    private const int Longest = 1 << 20;

    private long since;

    public override bool CanRead => true;

    public override bool CanSeek => false;

    public override bool CanWrite => false;

    public override long Length => throw new NotSupportedException();

    public override long Position
    {
        get => throw new NotSupportedException();
        set => throw new NotSupportedException();
    }

    public override int Read(byte[] buffer, int offset, int count) => Read(buffer.AsSpan(offset, count));

    public override int Read(Span<byte> buffer)
    {
        int count = inner.Read(buffer);
        ReadOnlySpan<byte> left = buffer[..count];
        for (int next = left.IndexOf((byte)'<'); next >= 0; next = left.IndexOf((byte)'<'))
        {
            Within(since + next);
            since = 0;
            left = left[(next + 1)..];
        }

        since += left.Length;
        Within(since);
        return count;
    }

    public override void Flush() => throw new NotSupportedException();

    public override long Seek(long offset, SeekOrigin origin) => throw new NotSupportedException();

    public override void SetLength(long value) => throw new NotSupportedException();

    public override void Write(byte[] buffer, int offset, int count) => throw new NotSupportedException();

    protected override void Dispose(bool disposing)
    {
        if (disposing)
        {
            inner.Dispose();
        }

        base.Dispose(disposing);
    }

    private static void Within(long length)
    {
        if (length > Longest)
        {
            throw new InvalidDataException("it has a tag or a text of more than one million characters.");
        }
    }
}
