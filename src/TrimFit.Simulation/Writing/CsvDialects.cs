using System.Collections.ObjectModel;

namespace TrimFit.Simulation;

/// <summary>Ways of writing CSV that loggers and spreadsheets are known for, by name.</summary>
public static class CsvDialects
{
    internal static readonly Dictionary<string, CsvDialect> ByName = new()
    {
        ["plain"] = new(),
        ["every_digit"] = new() { EveryDigit = true },
        ["semicolon"] = new() { Separator = ';', DecimalComma = true, Encoding = CsvEncoding.Utf8WithMark, NewLine = "\r\n", Header = CsvHeader.WordsAndBrackets },
        ["tab"] = new() { Separator = '\t', Time = CsvTime.Iso8601, Missing = "n/a" },
        ["pipe"] = new() { Separator = '|', Time = CsvTime.EpochMilliseconds, TrailingSeparator = true },
        ["utf16"] = new() { Separator = '\t', Encoding = CsvEncoding.Utf16WithMark, NewLine = "\r\n", Header = CsvHeader.WordsAndBrackets },
        ["utf16_without_mark"] = new() { Separator = ';', DecimalComma = true, Encoding = CsvEncoding.Utf16, NewLine = "\r\n" },
        ["windows_1252"] = new() { Encoding = CsvEncoding.Windows1252, Header = CsvHeader.WordsAndBrackets, Time = CsvTime.DateAndTime },
        ["units_row"] = new() { Header = CsvHeader.UnitsRow, Time = CsvTime.EpochSeconds, NewLine = "\r", Missing = "NaN" },
        ["preamble"] = new() { Preamble = ["# flight log, made up", "# firmware: 0.0", "sample interval;0.1 s", ""], Missing = "-" },
        ["restart"] = new() { RepeatHeaderEvery = 2500, NewLine = "\r\r\n", Time = CsvTime.ElapsedMilliseconds },
        ["long"] = new() { LongFormat = true, Time = CsvTime.Iso8601 },
    };

    /// <summary>The dialects by name: <c>plain</c>, <c>semicolon</c>, <c>utf16</c> and so on.</summary>
    public static ReadOnlyDictionary<string, CsvDialect> All { get; } = new(ByName);
}
