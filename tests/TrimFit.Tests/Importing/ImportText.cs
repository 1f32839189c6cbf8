using System.Text;
using TrimFit.Import;

namespace TrimFit.Tests.Importing;

/// <summary>Small files in memory for the tests of the formats.</summary>
internal static class ImportText
{
    public static LogSource Source(string name, string text) => LogSource.FromBytes(name, Encoding.Latin1.GetBytes(text));

    public static LogTable Read(this ILogFormat format, string name, string text, ImportOptions? options = null) => format.Read(Source(name, text), options ?? new());

    public static string Refusal(this ILogFormat format, string name, string text, ImportOptions? options = null) =>
        Assert.Throws<LogFormatException>(() => format.Read(name, text, options)).Message;

    public static bool Recognises(this ILogFormat format, string text) => format.Recognises(Encoding.Latin1.GetBytes(text), "log");

    /// <summary>Every cut and many changed bytes of a good file: the format either reads it or refuses it with one message that names the file.</summary>
    public static (int Read, int Refused) Damage(ILogFormat format, string name, byte[] good, int times, int seed)
    {
        var random = new Random(seed);
        int read = 0, refused = 0;
        for (int i = 0; i < times; i++)
        {
            byte[] bytes = [.. good.AsSpan(0, i % 2 == 0 ? random.Next(good.Length + 1) : good.Length)];
            for (int k = i % 4 == 0 ? 0 : 1 + random.Next(8); k > 0 && bytes.Length > 0; k--)
                bytes[random.Next(bytes.Length)] = (byte)random.Next(256);
            try
            {
                LogTable table = format.Read(LogSource.FromBytes(name, bytes), new());
                Assert.NotEmpty(table.TimeSec);
                Assert.Equal(table.File.RowsRead, table.TimeSec.Length + table.File.LeftOut.Sum(l => l.Rows));
                Assert.All(table.Columns.Values, column => Assert.DoesNotContain(column, double.IsInfinity));
                read++;
            }
            catch (LogFormatException e)
            {
                Assert.StartsWith(name, e.Message, StringComparison.Ordinal);
                refused++;
            }
        }
        return (read, refused);
    }
}
