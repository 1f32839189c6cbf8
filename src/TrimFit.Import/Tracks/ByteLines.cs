namespace TrimFit.Import.Tracks;

/// <summary>Lines of a file as bytes, ended by CR LF, LF or CR, in constant memory however long a line is.</summary>
internal sealed class ByteLines(Stream stream)
{
    /// <summary>Far above any record of the line formats; the rest of a longer line is skipped.</summary>
    private const int LongestLine = 1024;

    private readonly byte[] _buffer = new byte[64 * 1024];
    private readonly byte[] _line = new byte[LongestLine];
    private int _next, _end, _length;
    private bool _lineFeedMayFollow;

    /// <summary>Number of the current line, from 1.</summary>
    public int Number { get; private set; }

    /// <summary>The current line without its end.</summary>
    public ReadOnlySpan<byte> Current => _line.AsSpan(0, _length);

    /// <summary>Moves to the next line that is not empty.</summary>
    public bool Read()
    {
        do
        {
            if (!ReadAny())
                return false;
        }
        while (_length == 0);
        return true;
    }

    private bool ReadAny()
    {
        _length = 0;
        bool any = false;
        while (true)
        {
            if (_next == _end)
            {
                _end = stream.Read(_buffer);
                _next = 0;
                if (_end == 0)
                {
                    Number += any ? 1 : 0;
                    return any;
                }
            }
            byte b = _buffer[_next++];
            if (b == '\n' && _lineFeedMayFollow)
            {
                _lineFeedMayFollow = false;
                continue;
            }
            _lineFeedMayFollow = b == '\r';
            if (b is (byte)'\n' or (byte)'\r')
            {
                Number++;
                return true;
            }
            any = true;
            if (_length < LongestLine)
                _line[_length++] = b;
        }
    }
}
