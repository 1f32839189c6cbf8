using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Import;

namespace TrimFit.Tests.Importing;

/// <summary>Files damaged at random: the import reads them or refuses them, and never loses a row without counting it.</summary>
public class DamagedFilesTests
{
    private const int Seed = 20261201;

    [Fact]
    public void A_damaged_file_is_read_or_refused_and_every_row_is_accounted_for()
    {
        var random = new Random(Seed);
        byte[][] files = [.. CsvDialectTests.Dialects.Select(d => d.Data.Item3)];
        int read = 0, refused = 0;
        for (int round = 0; round < 800; round++)
        {
            byte[] damaged = Damage(files[random.Next(files.Length)], random);
            try
            {
                FlightImport import = FlightReader.Read([LogSource.FromBytes("log.csv", damaged)]);
                read++;
                InputFile file = import.Diagnostics.Files[0];
                bool oneValuePerRow = file.RowsRead - import.Diagnostics.RowsLeftOut > import.Flight.Count && Encoding.UTF8.GetString(damaged).Contains("value", StringComparison.Ordinal);
                if (!oneValuePerRow)
                    Assert.Equal(file.RowsRead, import.Flight.Count + import.Diagnostics.RowsLeftOut);
                foreach (ChannelRole role in import.Flight.Roles)
                    Assert.DoesNotContain(import.Flight[role].ToArray(), double.IsInfinity);
            }
            catch (LogFormatException refusal)
            {
                refused++;
                Assert.StartsWith("log.csv", refusal.Message, StringComparison.Ordinal);
            }
        }
        Assert.True(read > 150 && refused > 30, FormattableString.Invariant($"{read} read, {refused} refused: the damage must leave some of both"));
    }

    private static byte[] Damage(byte[] file, Random random)
    {
        List<byte> bytes = [.. file];
        int count = 1 + random.Next(4);
        for (int i = 0; i < count && bytes.Count > 0; i++)
        {
            int at = random.Next(bytes.Count);
            switch (random.Next(6))
            {
                case 0:
                    bytes[at] = (byte)random.Next(256);
                    break;
                case 1:
                    bytes.RemoveAt(at);
                    break;
                case 2:
                    bytes.Insert(at, (byte)"\",;\n\r\t.-#%e0 "[random.Next(13)]);
                    break;
                case 3:
                    bytes.RemoveRange(at, Math.Min(bytes.Count - at, random.Next(40)));
                    break;
                case 4:
                    bytes.InsertRange(at, bytes.GetRange(at, Math.Min(bytes.Count - at, random.Next(40))));
                    break;
                default:
                    bytes.RemoveRange(at, bytes.Count - at);
                    break;
            }
        }
        return [.. bytes];
    }
}
