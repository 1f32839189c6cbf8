using CsvHelper;

namespace TrimFit.Import.Csv;

/// <summary>What the beginning of a file tells about the rest: encoding, separator, decimal mark, header, units row, first data row.</summary>
internal sealed class CsvHead
{
    /// <summary>Bytes of UTF-8 looked at before the one pass over the file.</summary>
    private const int HeadBytes = 256 * 1024;

    /// <summary>Records judged; more do not change the answer and cost time.</summary>
    private const int HeadRecords = 400;

    /// <summary>Share of short rows that makes them the logger's habit (trailing empty cells not written), not damage.</summary>
    private const double HabitShare = 0.2;

    private static readonly byte[] _separators = [(byte)'\t', (byte)';', (byte)'|', (byte)','];

    public required TextEncoding Encoding { get; init; }
    public required bool MendLineEnds { get; init; }
    public required byte Separator { get; init; }
    public required byte DecimalMark { get; init; }
    /// <summary>Whether a number with a decimal mark was seen; else the mark is a default.</summary>
    public required bool DecimalMarkSeen { get; init; }
    /// <summary>Line of the header, 0 without one.</summary>
    public required int HeaderLine { get; init; }
    public required string[] Names { get; init; }
    /// <summary>Texts of the units row, null without one.</summary>
    public required string[]? Units { get; init; }
    public required int DataLine { get; init; }
    public required long DataOffset { get; init; }
    /// <summary>The first data rows.</summary>
    public required IReadOnlyList<CsvRecord> Sample { get; init; }
    public required bool ShortRowsAreUsual { get; init; }
    /// <summary>Data rows in the whole file, about; 0 when its length is not known.</summary>
    public required double EstimatedRows { get; init; }

    public int Width => Names.Length;

    /// <summary>For people, such as <c>CSV, semicolon, decimal comma, UTF-8</c>.</summary>
    public string Describe() => string.Join(", ", new[]
    {
        "CSV",
        Separator switch { (byte)'\t' => "tab", (byte)';' => "semicolon", (byte)'|' => "pipe", _ => "comma" },
        DecimalMark == (byte)',' ? "decimal comma" : "decimal point",
        Encoding.Name,
        HeaderLine == 0 ? "no header" : "",
    }.Where(part => part.Length > 0));

    /// <summary>One record of the head.</summary>
    /// <param name="Line">Its first line, from 1.</param>
    /// <param name="Offset">Where it starts in the UTF-8 text.</param>
    /// <param name="Cells">Its cells without quotes.</param>
    internal sealed record CsvRecord(int Line, long Offset, byte[][] Cells);

    /// <summary>Reads and judges the head.</summary>
    /// <exception cref="LogFormatException">The file is empty, is no text, or has no row of numbers.</exception>
    public static CsvHead Read(LogSource source)
    {
        TextEncoding encoding = DetectEncoding(source);
        byte[] text = ReadText(source, encoding, mendLineEnds: false, out bool whole);
        bool mend = text.AsSpan().IndexOf("\r\r\n"u8) >= 0;
        if (mend)
            text = ReadText(source, encoding, mendLineEnds: true, out whole);
        if (CsvNumber.Trim(text.AsSpan().TrimEnd("\r\n\t "u8)).IsEmpty)
            throw LogFormatException.At(source.Name, null, null, "an empty file", "a flight log", "Copy the log from the logger again.");
        (byte separator, List<CsvRecord> records) = ChooseSeparator(text, whole, out int hintLines);
        int width = ModalWidth(records);
        int first = FirstDataRow(records, width);
        if (first < 0)
            throw NoRows(source, records, width, separator, hintLines);
        return Judge(source, encoding, mend, separator, records, width, first);
    }

    private static TextEncoding DetectEncoding(LogSource source)
    {
        using Stream stream = source.Open();
        byte[] head = new byte[64 * 1024];
        int length = stream.ReadAtLeast(head, head.Length, throwOnEndOfStream: false);
        if (length == 0)
            throw LogFormatException.At(source.Name, null, null, "an empty file", "a flight log", "Copy the log from the logger again.");
        return TextEncoding.Detect(head.AsSpan(0, length))
            ?? throw LogFormatException.At(source.Name, 1, null, "bytes that are no text", "a flight log as text (CSV)", "Export the log as CSV with the logger's own program.");
    }

    private static byte[] ReadText(LogSource source, TextEncoding encoding, bool mendLineEnds, out bool whole)
    {
        using var stream = new TextStream(source, encoding, mendLineEnds);
        byte[] text = new byte[HeadBytes];
        int length = stream.ReadAtLeast(text, text.Length, throwOnEndOfStream: false);
        whole = length < text.Length;
        return text[..length];
    }

    private static (byte Separator, List<CsvRecord> Records) ChooseSeparator(byte[] text, bool whole, out int hintLines)
    {
        hintLines = 0;
        if (text.AsSpan().StartsWith("sep="u8) && text.Length > 5 && text[5] is (byte)'\r' or (byte)'\n')
        {
            hintLines = 1;
            List<CsvRecord> records = Split(text, text[4], whole);
            if (records[0].Line == 1)
                records.RemoveAt(0);
            return (text[4], records);
        }
        (byte Separator, List<CsvRecord> Records) best = default;
        double bestScore = -1;
        foreach (byte separator in _separators)
        {
            List<CsvRecord> records = Split(text, separator, whole);
            double score = Score(records);
            if (score > bestScore * 1.0001)
            {
                bestScore = score;
                best = (separator, records);
            }
        }
        return best;
    }

    private static List<CsvRecord> Split(byte[] text, byte separator, bool whole)
    {
        List<CsvRecord> records = Split(text, separator, whole, lineBreaksInQuotes: true, out bool openQuote);
        return openQuote ? Split(text, separator, whole, lineBreaksInQuotes: false, out _) : records;
    }

    private static List<CsvRecord> Split(byte[] text, byte separator, bool whole, bool lineBreaksInQuotes, out bool openQuote)
    {
        bool unterminated = false;
        using var reader = CsvReader.Create(text, new CsvReaderOptions
        {
            Separator = (char)separator,
            HasHeader = false,
            TrackLineNumbers = true,
            AllowLineBreaksInQuotes = lineBreaksInQuotes,
            OnMalformedRecord = record => unterminated |= record.Reason == CsvMalformedReason.UnterminatedQuote,
        });
        var records = new List<CsvRecord>();
        while (records.Count < HeadRecords && reader.Read())
        {
            byte[][] cells = new byte[reader.FieldCount][];
            for (int i = 0; i < cells.Length; i++)
                cells[i] = reader.GetSpan(i).ToArray();
            records.Add(new((int)reader.LineNumber, reader.ByteOffset, cells));
        }
        // The last record of a block that ends inside the file may be cut.
        if (!whole && records.Count is > 1 and < HeadRecords)
            records.RemoveAt(records.Count - 1);
        openQuote = unterminated && whole;
        return records;
    }

    private static double Score(List<CsvRecord> records)
    {
        int width = ModalWidth(records);
        if (width < 2)
            return 0;
        int rows = 0, all = 0, known = 0, cells = 0;
        foreach (CsvRecord record in records)
        {
            if (IsComment(record))
                continue;
            all++;
            if (record.Cells.Length != width)
                continue;
            rows++;
            foreach (byte[] cell in record.Cells)
            {
                CellClass kind = Classify(cell);
                if (kind == CellClass.Missing)
                    continue;
                cells++;
                known += kind == CellClass.Text ? 0 : 1;
            }
        }
        return cells == 0 ? 0 : (double)rows / all * (0.05 + (double)known / cells);
    }

    private static int ModalWidth(List<CsvRecord> records)
    {
        var counts = new Dictionary<int, int>();
        foreach (CsvRecord record in records)
        {
            if (record.Cells.Length > 1 && !IsComment(record))
                counts[record.Cells.Length] = counts.GetValueOrDefault(record.Cells.Length) + 1;
        }
        return counts.Count == 0 ? 1 : counts.OrderByDescending(c => c.Value).ThenByDescending(c => c.Key).First().Key;
    }

    private static int FirstDataRow(List<CsvRecord> records, int width)
    {
        for (int i = 0; i < records.Count; i++)
        {
            if (Math.Abs(records[i].Cells.Length - width) <= Math.Max(1, width / 2) && IsData(records[i]) && IsFollowedByData(records, i))
                return i;
        }
        return -1;
    }

    // One of the next few rows must be data too: a preamble may hold a single row of numbers, and a single row of data may be damaged.
    private static bool IsFollowedByData(List<CsvRecord> records, int at)
    {
        List<CsvRecord> next = [.. records.Skip(at + 1).Where(r => !IsComment(r)).Take(3)];
        return next.Count == 0 || next.Exists(IsData);
    }

    private static bool IsData(CsvRecord record)
    {
        if (record.Cells.Length < 2 || IsComment(record))
            return false;
        int known = 0, text = 0;
        foreach (byte[] cell in record.Cells)
        {
            CellClass kind = Classify(cell);
            known += kind is CellClass.Missing or CellClass.Text ? 0 : 1;
            text += kind == CellClass.Text ? 1 : 0;
        }
        return known > text || known == text && known > 0 && record.Cells.Length >= 4;
    }

    private static bool IsComment(CsvRecord record) =>
        record.Cells is [var first, ..] && (first.AsSpan().StartsWith("#"u8) || first.AsSpan().StartsWith("//"u8) || first.AsSpan().StartsWith("%"u8));

    /// <summary>What kind of thing a cell looks like, before anything is known about its column.</summary>
    internal enum CellClass
    {
        Missing,
        Integer,
        Point,
        Comma,
        Time,
        Pair,
        Text,
    }

    internal static CellClass Classify(ReadOnlySpan<byte> cell)
    {
        cell = CsvNumber.Trim(cell);
        if (CsvNumber.IsMissing(cell))
            return CellClass.Missing;
        if (IsNumber(cell, (byte)'.'))
            return cell.Contains((byte)'.') ? CellClass.Point : CellClass.Integer;
        if (IsNumber(cell, (byte)','))
            return CellClass.Comma;
        if (TimeText.TryParse(cell, DateOrder.Unknown, out _))
            return CellClass.Time;
        return CsvPosition.TryParse(cell, (byte)'.', out _, out _) || CsvPosition.TryParse(cell, (byte)',', out _, out _) ? CellClass.Pair : CellClass.Text;
    }

    private static bool IsNumber(ReadOnlySpan<byte> cell, byte mark) =>
        CsvNumber.Parse(cell, mark, out _, out ReadOnlySpan<byte> suffix) == CellKind.Number
        && (suffix.IsEmpty || CsvPosition.IsHemisphere(suffix) || suffix.Length <= 12 && !suffix.ContainsAny((byte)',', (byte)'.') && LogUnits.TryParse(System.Text.Encoding.UTF8.GetString(suffix), out _));

    private static CsvHead Judge(LogSource source, TextEncoding encoding, bool mend, byte separator, List<CsvRecord> records, int width, int first)
    {
        List<CsvRecord> sample = [.. records.Skip(first).Where(r => !IsComment(r))];
        int point = 0, comma = 0;
        foreach (CsvRecord record in sample)
        {
            foreach (byte[] cell in record.Cells)
            {
                CellClass kind = Classify(cell);
                point += kind == CellClass.Point ? 1 : 0;
                comma += kind == CellClass.Comma ? 1 : 0;
            }
        }
        int headerLine = 0;
        string[]? names = null, units = null;
        int at = first - 1;
        while (at > 0 && records[at].Cells.Length == 1) // a line such as $DATA between header and rows
            at--;
        if (at >= 1 && CouldBeHeader(records[at], width) && IsUnitsRow(records[at]) && CouldBeHeader(records[at - 1], width))
        {
            units = Texts(records[at], width);
            at--;
        }
        if (at >= 0 && CouldBeHeader(records[at], width))
        {
            headerLine = records[at].Line;
            names = Texts(records[at], width);
            // Avionics write the units in a comment over the names.
            if (units is null && at >= 1 && IsComment(records[at - 1]) && records[at - 1].Cells.Length == records[at].Cells.Length && CountUnits(records[at - 1]) >= 3)
                units = Texts(records[at - 1], width);
            // Rows above may name groups ("Brake" over "left", "right"); they count only when they make more of the names known.
            for (int above = at - 1; above >= Math.Max(0, at - 2) && records[above].Cells.Length == records[at].Cells.Length && CouldBeHeader(records[above], width); above--)
            {
                string[] joined = JoinGroups(Texts(records[above], width), names);
                if (joined.Count(IsKnown) <= names.Count(IsKnown))
                    break;
                names = joined;
                headerLine = records[above].Line;
            }
        }
        AlignRecordNames(ref names, ref units);
        if (names is not null)
            CheckAligned(source, headerLine, names.Length, sample);
        int columns = Math.Max(width, names?.Length ?? 0);
        int shortRows = sample.Count(r => r.Cells.Length < columns);
        string[] all = new string[columns];
        for (int i = 0; i < columns; i++)
        {
            string name = names is not null && i < names.Length ? names[i] : "";
            all[i] = name.Length > 0 ? name : FormattableString.Invariant($"column {i + 1}");
        }
        return new CsvHead
        {
            Encoding = encoding,
            MendLineEnds = mend,
            Separator = separator,
            DecimalMark = comma > point ? (byte)',' : (byte)'.',
            DecimalMarkSeen = comma + point > 0,
            HeaderLine = headerLine,
            Names = all,
            Units = units,
            DataLine = records[first].Line,
            DataOffset = records[first].Offset,
            Sample = sample,
            ShortRowsAreUsual = shortRows >= HabitShare * sample.Count && sample.Count >= 5,
            EstimatedRows = source.Length is { } length
                ? Math.Max(0, length / encoding.BytesPerAscii - records[first].Offset) / Math.Max(2.0, (double)(records[^1].Offset - records[first].Offset) / Math.Max(1, sample.Count - 1))
                : 0,
        };
    }

    private static bool CouldBeHeader(CsvRecord record, int width)
    {
        if (record.Cells.Length < 2 || record.Cells.Length < width - 1 && record.Cells.Length < 0.6 * width)
            return false;
        int text = 0, filled = 0;
        foreach (byte[] cell in record.Cells)
        {
            if (CsvNumber.Trim(cell).IsEmpty)
                continue;
            filled++;
            text += Classify(cell) is CellClass.Text or CellClass.Missing ? 1 : 0;
        }
        return filled > 0 && text > 0.6 * filled;
    }

    // "$COL,GNSS,time,…" names the cells of rows that begin with "$GNSS,": two words before the names where the rows have one.
    private static void AlignRecordNames(ref string[]? names, ref string[]? units)
    {
        if (names is ["$COL", var kind, ..])
        {
            names = [$"${kind}", .. names[2..]];
            units = units is ["$UNIT", ..] ? ["", .. units[2..]] : null;
        }
    }

    // A header that has another number of names than every row has cells may be shifted against them, and a shifted name is a wrong one.
    private static void CheckAligned(LogSource source, int headerLine, int names, List<CsvRecord> sample)
    {
        int cells = sample[0].Cells.Length;
        foreach (CsvRecord row in sample)
        {
            if (row.Cells.Length != cells)
                return;
        }
        bool lastIsEmpty = sample.TrueForAll(row => CsvNumber.Trim(row.Cells[^1]).IsEmpty);
        if (cells == names || lastIsEmpty && cells == names + 1)
            return;
        throw LogFormatException.At(source.Name, headerLine, null, FormattableString.Invariant($"{names} names over rows of {cells} cells"), "a name for each cell",
            "Which name belongs to which cell cannot be told; correct the header.");
    }

    private static int CountUnits(CsvRecord record) => Texts(record, record.Cells.Length).Count(text => text.Length > 0 && LogUnits.TryParse(text, out _));

    private static bool IsUnitsRow(CsvRecord record)
    {
        if (record.Cells[0].AsSpan().SequenceEqual("$UNIT"u8))
            return true;

        int filled = 0, units = 0;
        foreach (string text in Texts(record, record.Cells.Length))
        {
            if (text.Length == 0)
                continue;
            filled++;
            units += text is "-" or "--" or "[-]" or "()" or "[]" or "n/a" || LogUnits.TryParse(text, out _) ? 1 : 0;
        }
        return filled > 0 && units >= 0.6 * filled;
    }

    private static string[] Texts(CsvRecord record, int width)
    {
        int length = record.Cells.Length;
        while (length > width && CsvNumber.Trim(record.Cells[length - 1]).IsEmpty)
            length--;
        string[] texts = new string[length];
        for (int i = 0; i < length; i++)
            texts[i] = string.Join(' ', System.Text.Encoding.UTF8.GetString(record.Cells[i]).Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries));
        if (IsComment(record))
            texts[0] = texts[0].TrimStart('#', '/', '%').Trim();
        return texts;
    }

    private static string[] JoinGroups(string[] groups, string[] names)
    {
        string[] joined = new string[names.Length];
        string group = "";
        for (int i = 0; i < names.Length; i++)
        {
            if (i < groups.Length && groups[i].Length > 0)
                group = groups[i];
            string both = $"{group} {names[i]}".Trim();
            joined[i] = IsKnown(both) || !IsKnown(names[i]) ? both : names[i];
        }
        return joined;
    }

    private static bool IsKnown(string name) => ColumnNames.TryFind(HeaderName.Split(name).Name, out _, out int rank) && rank < ColumnNames.BehindPrefix;

    private static LogFormatException NoRows(LogSource source, List<CsvRecord> records, int width, byte separator, int hintLines)
    {
        if (width < 2)
        {
            return LogFormatException.At(source.Name, hintLines + 1, null, "text without columns", "a header and rows of numbers, separated by commas, semicolons, tabs or pipes",
                "Export the log as CSV with the logger's own program.");
        }
        CsvRecord? header = records.FirstOrDefault(r => r.Cells.Length == width);
        bool headerOnly = header is not null && records.Count(r => r.Cells.Length == width) <= 2 && Texts(header, width).Any(IsKnown);
        return headerOnly
            ? LogFormatException.At(source.Name, header!.Line, null, "a header without rows under it", "rows of numbers", "The logger recorded nothing; copy the log again or take another flight.")
            : LogFormatException.At(source.Name, header?.Line ?? 1, null, "rows without numbers", "a header and rows of numbers", "Export the log as CSV with the logger's own program.");
    }
}
