using System.Security.Cryptography;
using System.Text;

namespace TrimFit.Import.Csv;

/// <summary>A file as UTF-8 without byte order mark, NUL padding and doubled carriage returns, whatever it was stored as; hashes the stored bytes on the way.</summary>
internal sealed class TextStream : Stream
{
    private const int BlockBytes = 128 * 1024;

    private readonly Stream _stored;
    private readonly Decoder? _decoder;
    private readonly bool _mendLineEnds;
    private readonly long? _length;
    private readonly Action<double>? _progress;
    private readonly IncrementalHash? _hash;
    private readonly byte[] _block;
    private readonly char[] _chars;
    private byte[] _text;
    private int _textStart, _textEnd;
    private int _skip;
    private bool _ended, _heldReturn;
    private long _read;
    private double _told;

    /// <summary>Opens a file.</summary>
    /// <param name="source">The file.</param>
    /// <param name="encoding">What its bytes are.</param>
    /// <param name="mendLineEnds">Whether CR CR LF stands for one line end.</param>
    /// <param name="hash">Whether the stored bytes are hashed.</param>
    /// <param name="progress">Told the share of bytes read, about every percent.</param>
    public TextStream(LogSource source, TextEncoding encoding, bool mendLineEnds = false, bool hash = false, Action<double>? progress = null)
    {
        _stored = source.Open();
        _length = source.Length;
        _progress = progress;
        _skip = encoding.MarkBytes;
        _decoder = encoding.Decoder();
        _mendLineEnds = mendLineEnds;
        _hash = hash ? IncrementalHash.CreateHash(HashAlgorithmName.SHA256) : null;
        _block = new byte[BlockBytes];
        _chars = _decoder is null ? [] : new char[BlockBytes + 2];
        _text = new byte[_decoder is null ? BlockBytes + 1 : BlockBytes * 3 + 16];
    }

    /// <summary>Passes over the first bytes of text.</summary>
    public void Skip(long bytes)
    {
        byte[] buffer = new byte[64 * 1024];
        while (bytes > 0)
        {
            int count = Read(buffer.AsSpan(0, (int)Math.Min(bytes, buffer.Length)));
            if (count == 0)
                return;
            bytes -= count;
        }
    }

    /// <summary>SHA-256 of the stored bytes, lower-case hex; to be asked after the end was read.</summary>
    public string Sha256()
    {
        while (ReadStored() > 0)
        {
        }
        return Convert.ToHexStringLower(_hash!.GetHashAndReset());
    }

    /// <inheritdoc/>
    public override int Read(Span<byte> buffer)
    {
        while (_textStart == _textEnd)
        {
            if (_ended)
                return 0;
            Fill();
        }
        int count = Math.Min(buffer.Length, _textEnd - _textStart);
        _text.AsSpan(_textStart, count).CopyTo(buffer);
        _textStart += count;
        return count;
    }

    /// <inheritdoc/>
    public override int Read(byte[] buffer, int offset, int count) => Read(buffer.AsSpan(offset, count));

    private int ReadStored()
    {
        int count = _stored.Read(_block, 0, _block.Length);
        _hash?.AppendData(_block, 0, count);
        _read += count;
        if (_progress is not null && _length is > 0)
        {
            double share = Math.Min(1, (double)_read / _length.Value);
            if (share >= _told + 0.01 || count == 0)
            {
                _told = share;
                _progress(share);
            }
        }
        return count;
    }

    private void Fill()
    {
        int count = ReadStored();
        ReadOnlySpan<byte> stored = _block.AsSpan(0, count);
        int skipped = Math.Min(_skip, count);
        _skip -= skipped;
        stored = stored[skipped..];
        _textStart = 0;
        if (_decoder is null)
        {
            stored.CopyTo(_text);
            _textEnd = stored.Length;
        }
        else
        {
            int chars = _decoder.GetChars(stored, _chars, flush: count == 0);
            _textEnd = Encoding.UTF8.GetBytes(_chars.AsSpan(0, chars), _text);
        }
        _ended = count == 0;
        DropNuls();
        if (_mendLineEnds)
            MendLineEnds();
    }

    private void DropNuls()
    {
        int first = _text.AsSpan(0, _textEnd).IndexOf((byte)0);
        if (first < 0)
            return;
        int kept = first;
        for (int i = first; i < _textEnd; i++)
        {
            if (_text[i] != 0)
                _text[kept++] = _text[i];
        }
        _textEnd = kept;
    }

    // A CR that another CR follows is dropped, also across blocks: the last CR of a block is held back.
    private void MendLineEnds()
    {
        Span<byte> text = _text;
        if (_heldReturn)
        {
            text[.._textEnd].CopyTo(text[1..]);
            text[0] = (byte)'\r';
            _textEnd++;
            _heldReturn = false;
        }
        int kept = 0;
        for (int i = 0; i < _textEnd; i++)
        {
            if (text[i] == (byte)'\r')
            {
                if (i + 1 == _textEnd && !_ended)
                {
                    _heldReturn = true;
                    break;
                }
                if (i + 1 < _textEnd && text[i + 1] == (byte)'\r')
                    continue;
            }
            text[kept++] = text[i];
        }
        _textEnd = kept;
    }

    /// <inheritdoc/>
    protected override void Dispose(bool disposing)
    {
        if (disposing)
        {
            _stored.Dispose();
            _hash?.Dispose();
        }
        base.Dispose(disposing);
    }

    /// <inheritdoc/>
    public override bool CanRead => true;
    /// <inheritdoc/>
    public override bool CanSeek => false;
    /// <inheritdoc/>
    public override bool CanWrite => false;
    /// <inheritdoc/>
    public override long Length => throw new NotSupportedException();
    /// <inheritdoc/>
    public override long Position { get => throw new NotSupportedException(); set => throw new NotSupportedException(); }
    /// <inheritdoc/>
    public override void Flush()
    {
    }
    /// <inheritdoc/>
    public override long Seek(long offset, SeekOrigin origin) => throw new NotSupportedException();
    /// <inheritdoc/>
    public override void SetLength(long value) => throw new NotSupportedException();
    /// <inheritdoc/>
    public override void Write(byte[] buffer, int offset, int count) => throw new NotSupportedException();
}
