using System.Security.Cryptography;

namespace TrimFit.Import.Tracks;

/// <summary>Passes bytes on and takes their SHA-256 on the way, so that a file is read once.</summary>
internal sealed class HashingStream(Stream inner, long? length, Action<double>? progress) : Stream
{
    private readonly IncrementalHash _hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
    private long _read, _told;

    public override bool CanRead => true;

    public override bool CanSeek => false;

    public override bool CanWrite => false;

    public override long Length => throw new NotSupportedException();

    public override long Position
    {
        get => _read;
        set => throw new NotSupportedException();
    }

    public override int Read(byte[] buffer, int offset, int count) => Read(buffer.AsSpan(offset, count));

    public override int Read(Span<byte> buffer)
    {
        int n = inner.Read(buffer);
        _hash.AppendData(buffer[..n]);
        _read += n;
        if (progress is not null && length > 0 && _read - _told > 1 << 20)
        {
            _told = _read;
            progress((double)_read / length.Value);
        }
        return n;
    }

    /// <summary>Reads what is left and gives the hash of the whole file, lower-case hex.</summary>
    public string Finish()
    {
        byte[] buffer = new byte[64 * 1024];
        while (Read(buffer) > 0)
        {
        }
        progress?.Invoke(1);
        return Convert.ToHexStringLower(_hash.GetHashAndReset());
    }

    public override void Flush()
    {
    }

    public override long Seek(long offset, SeekOrigin origin) => throw new NotSupportedException();

    public override void SetLength(long value) => throw new NotSupportedException();

    public override void Write(byte[] buffer, int offset, int count) => throw new NotSupportedException();

    protected override void Dispose(bool disposing)
    {
        if (disposing)
        {
            _hash.Dispose();
            inner.Dispose();
        }
        base.Dispose(disposing);
    }
}
