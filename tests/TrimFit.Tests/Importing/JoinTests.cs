using System.IO.Compression;
using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Import;
using TrimFit.Import.Joining;

namespace TrimFit.Tests.Importing;

public class JoinTests
{
    private static readonly DateTimeOffset _start = new(2026, 5, 17, 10, 0, 0, TimeSpan.Zero);

    [Theory]
    [InlineData(17.4)]
    [InlineData(-241.37)]
    public void A_clock_that_counts_seconds_is_found_from_gyro_and_track_within_a_fifth_of_a_second(double offset)
    {
        var flight = new MadeUpFlight(1, 900);
        FlightImport import = FlightReader.Read([flight.Igc(0), flight.EngineCsv(offset, gyro: true)]);
        InputFile engine = import.Diagnostics.Files[1];
        Assert.InRange(engine.ClockOffsetSec!.Value, -offset - 0.2 - MadeUpFlight.EngineZero, -offset + 0.2 - MadeUpFlight.EngineZero);
        Assert.InRange(engine.ClockOffsetStdErrorSec!.Value, 0.001, 0.2);
        Assert.Null(import.Diagnostics.Files[0].ClockOffsetSec);
        Assert.Contains(import.Diagnostics.Warnings, w => w.Code == "clock_found");
    }

    [Theory]
    [InlineData(17.4, "behind")]
    [InlineData(-17.4, "ahead of")]
    public void A_wrong_absolute_clock_is_moved_and_that_is_said(double late, string word)
    {
        var flight = new MadeUpFlight(2, 900);
        FlightImport import = FlightReader.Read([flight.Igc(0), flight.EngineCsv(-late, gyro: true, absolute: true)]);
        InputFile engine = import.Diagnostics.Files[1];
        Assert.InRange(engine.ClockOffsetSec!.Value, late - 0.2, late + 0.2);
        Notice notice = Assert.Single(import.Diagnostics.Warnings, w => w.Code == "clocks_disagree");
        Assert.StartsWith($"The clock of engine.csv is 17.4 s {word} that of track.igc by their turn rate (correlation 0.", notice.Message.Replace("17.3", "17.4", StringComparison.Ordinal).Replace("17.5", "17.4", StringComparison.Ordinal), StringComparison.Ordinal);
    }

    [Fact]
    public void Clocks_that_agree_by_their_stamps_are_left_alone()
    {
        var flight = new MadeUpFlight(3, 600);
        FlightImport import = FlightReader.Read([flight.Igc(0), flight.EngineCsv(0, gyro: true, absolute: true)]);
        Assert.Null(import.Diagnostics.Files[1].ClockOffsetSec);
        Assert.DoesNotContain(import.Diagnostics.Warnings, w => w.Code is "clocks_disagree" or "clock_found");
        Assert.Equal(_start, import.Diagnostics.Sampling.Start);
        Assert.Equal(_start, import.Flight.StartUtc);
    }

    [Fact]
    public void Without_a_gyro_the_climb_answers_the_engine_and_the_error_says_how_well()
    {
        var flight = new MadeUpFlight(4, 1200);
        FlightImport import = FlightReader.Read([flight.Igc(0), flight.EngineCsv(60, gyro: false)]);
        InputFile engine = import.Diagnostics.Files[1];
        double error = engine.ClockOffsetSec!.Value - (-60 - MadeUpFlight.EngineZero);
        Assert.InRange(engine.ClockOffsetStdErrorSec!.Value, 1, 3);
        Assert.InRange(error, -2 * engine.ClockOffsetStdErrorSec.Value, 2 * engine.ClockOffsetStdErrorSec.Value);
    }

    [Fact]
    public void Another_flight_is_refused()
    {
        string message = Assert.Throws<LogFormatException>(() => FlightReader.Read([new MadeUpFlight(5, 900).Igc(0), new MadeUpFlight(6, 900).EngineCsv(0, gyro: true)])).Message;
        Assert.Matches(@"^engine\.csv: found a clock that cannot be brought to that of track\.igc: no offset of their (turn rate|engine and climb) that stands out \(correlation 0\.\d\d at -?\d+ s, 0\.\d\d at -?\d+ s\), expected date and time in both files, or a turn rate, climb or engine signal in both\. Check that the files are of one flight, or give them one at a time\.$", message);
    }

    [Fact]
    public void A_pattern_that_repeats_is_refused_as_ambiguous()
    {
        // Turns of one second each every 40 s fit at every multiple of 40 s.
        double[] time = [.. Enumerable.Range(0, 6000).Select(i => i / 10.0)];
        LogTable Table(string name) => new()
        {
            File = new() { Name = name, Sha256 = "", Format = "CSV", RowsRead = time.Length },
            Clock = ClockKind.Elapsed,
            TimeSec = time,
            Columns = new Dictionary<ChannelRole, double[]> { [ChannelRole.YawRate] = [.. time.Select(t => Math.Sin(2 * Math.PI * t / 40))] },
        };
        string message = Assert.Throws<LogFormatException>(() => FlightJoiner.Join([Table("a.csv"), Table("b.csv")])).Message;
        Assert.StartsWith("b.csv: found a clock that cannot be brought to that of a.csv: no offset of their turn rate that stands out (correlation 1.00 at ", message, StringComparison.Ordinal);
    }

    [Fact]
    public void Nothing_in_common_is_refused_with_a_sentence()
    {
        string message = Assert.Throws<LogFormatException>(() => FlightJoiner.Join([Constant("a.csv", ChannelRole.Voltage), Constant("b.csv", ChannelRole.Current)])).Message;
        Assert.Equal("b.csv: found a clock that cannot be brought to that of a.csv: no signal that both logged, expected date and time in both files, or a turn rate, climb or engine signal in both. Check that the files are of one flight, or give them one at a time.", message);
    }

    [Fact]
    public void Local_time_is_brought_to_UTC_by_a_whole_hour_and_that_is_said()
    {
        LogTable gps = Constant("a.igc", ChannelRole.Altitude, ClockKind.Absolute, _start, utc: true), local = Constant("b.csv", ChannelRole.Voltage, ClockKind.Absolute, _start.AddHours(2).AddSeconds(5));
        FlightImport import = FlightJoiner.Join([gps, local]);
        Assert.Equal(-7200, import.Diagnostics.Files[1].ClockOffsetSec);
        Assert.Equal([new Notice("clock_zone", "The clock of b.csv is taken to be 2 h ahead of that of a.igc, as local time is; only so do the two overlap.")], import.Diagnostics.Warnings);
        Assert.Equal(605, import.Diagnostics.Sampling.DurationSec); // 5 s late, 600 s long
    }

    [Fact]
    public void A_time_of_day_is_brought_to_a_date_over_midnight()
    {
        LogTable gps = Constant("a.igc", ChannelRole.Altitude, ClockKind.Absolute, new(2026, 5, 17, 23, 55, 0, TimeSpan.Zero), utc: true);
        LogTable day = Constant("b.csv", ChannelRole.Voltage, ClockKind.TimeOfDay, first: 30);
        FlightImport import = FlightJoiner.Join([gps, day]);
        Assert.Equal(900 + 30 - 600 + 600, import.Diagnostics.Sampling.DurationSec + 0); // 23:55:00 to 00:10:30
        Assert.Equal(new DateTimeOffset(2026, 5, 17, 23, 55, 0, TimeSpan.Zero), import.Flight.StartUtc);
    }

    [Fact]
    public void Stamps_are_united_and_nothing_is_resampled()
    {
        LogTable a = Constant("a.csv", ChannelRole.Altitude, ClockKind.Absolute, _start, utc: true), b = Constant("b.csv", ChannelRole.Voltage, ClockKind.Absolute, _start.AddSeconds(0.25), utc: true);
        FlightLog flight = FlightJoiner.Join([a, b]).Flight;
        Assert.Equal(2 * 601, flight.Count);
        Assert.Equal([0, 0.25, 1, 1.25], flight.TimeSec[..4].ToArray());
        Assert.Equal([1, double.NaN, 1, double.NaN], flight[ChannelRole.Altitude][..4].ToArray());
        Assert.Equal([double.NaN, 1, double.NaN, 1], flight[ChannelRole.Voltage][..4].ToArray());
    }

    [Fact]
    public void A_quantity_in_two_files_is_taken_from_the_faster_one_as_a_group_and_that_is_said()
    {
        LogTable slow = Constant("a.csv", ChannelRole.BrakeLeft, ClockKind.Absolute, _start, utc: true), fast = Constant("b.csv", ChannelRole.BrakeRight, ClockKind.Absolute, _start, utc: true, step: 0.5);
        FlightImport import = FlightJoiner.Join([slow, fast]);
        Assert.Equal([ChannelRole.BrakeRight], import.Flight.Roles);
        Assert.Equal([new Notice("role_in_two_files", "brake_right: taken from b.csv (2 Hz), not from a.csv (1 Hz).")], import.Diagnostics.Warnings);
    }

    [Fact]
    public void A_single_file_starts_at_zero_with_its_date_and_time()
    {
        FlightImport import = FlightReader.Read([new MadeUpFlight(7, 120).Igc(0)]);
        Assert.Equal(0, import.Flight.TimeSec[0]);
        Assert.Equal(_start, import.Flight.StartUtc);
        Assert.Equal(1, import.Diagnostics.Sampling.RateHz);
        Assert.Equal(120, import.Diagnostics.Sampling.DurationSec);
        Assert.Empty(import.Diagnostics.Sampling.Gaps);
    }

    [Fact]
    public void A_phone_recording_in_a_zip_is_one_flight_with_one_clock()
    {
        var flight = new MadeUpFlight(8, 300);
        IReadOnlyList<LogSource> sources = LogSources.Zip("phone.zip", () => new MemoryStream(flight.PhoneZip()));
        FlightImport import = FlightReader.Read(sources);
        Assert.Equal([ChannelRole.GyroX, ChannelRole.GyroY, ChannelRole.GyroZ, ChannelRole.AccelerationX, ChannelRole.AccelerationY, ChannelRole.AccelerationZ, ChannelRole.Latitude, ChannelRole.Longitude, ChannelRole.Altitude],
            import.Flight.Roles.Where(r => r is not (ChannelRole.GroundSpeed or ChannelRole.GroundCourse)));
        Assert.All(import.Diagnostics.Files, file => Assert.Null(file.ClockOffsetSec));
        Assert.Equal([new Notice("file_set_aside", "phone.zip: Metadata.csv holds nothing that is used and is set aside."), new Notice("file_set_aside", "phone.zip: Microphone.csv holds nothing that is used and is set aside.")],
            import.Diagnostics.Warnings.Where(w => w.Code == "file_set_aside"));
        Assert.DoesNotContain(import.Diagnostics.Warnings, w => w.Message.Contains("secret", StringComparison.OrdinalIgnoreCase));
        int row = import.Flight.TimeSec.BinarySearch(100.02);
        Assert.True(row >= 0, "the gyro's own stamps are kept");
        Accuracy.AgreesTo(6, flight.YawRate(100.02), import.Flight[ChannelRole.GyroZ][row]);
    }

    [Fact]
    public void A_folder_is_read_like_a_zip()
    {
        string folder = Directory.CreateTempSubdirectory("trimfit").FullName;
        try
        {
            using (var zip = new ZipArchive(new MemoryStream(new MadeUpFlight(8, 300).PhoneZip())))
                zip.ExtractToDirectory(folder);
            FlightImport import = FlightReader.Read([folder], sheet: null);
            Assert.True(import.Flight.Has(ChannelRole.GyroZ));
            Assert.True(import.Flight.Has(ChannelRole.Latitude));
        }
        finally
        {
            Directory.Delete(folder, recursive: true);
        }
    }

    [Fact]
    public void The_sheets_legs_come_with_the_flight()
    {
        string folder = Directory.CreateTempSubdirectory("trimfit").FullName;
        try
        {
            string path = Path.Combine(folder, "track.igc");
            using (Stream source = new MadeUpFlight(9, 300).Igc(0).Open())
            using (FileStream target = File.Create(path))
                source.CopyTo(target);
            var sheet = new FlightSheet { Legs = [new() { Start = SheetTime.FromClock(new(10, 1, 0)), End = SheetTime.FromClock(new(10, 2, 0)), Kind = SheetLegKind.HandsOff }] };
            FlightImport import = FlightReader.Read([path], sheet);
            FoundLeg leg = Assert.Single(import.Legs);
            Assert.Equal((60, 120), (leg.StatedStartSec, leg.StatedEndSec));
            Assert.True(import.Flight.Has(ChannelRole.HandsOff));
        }
        finally
        {
            Directory.Delete(folder, recursive: true);
        }
    }

    [Fact]
    public void A_told_column_may_stand_in_any_of_the_files_but_must_stand_in_one()
    {
        var flight = new MadeUpFlight(10, 300);
        var told = new ImportOptions { Columns = [new(ChannelRole.Power, "rpm extra", "W")] };
        string message = Assert.Throws<LogFormatException>(() => FlightReader.Read([flight.Igc(0), flight.EngineCsv(0, gyro: true, absolute: true)], told)).Message;
        Assert.Equal("track.igc: found no column \"rpm extra\" for power in any of the 2 files, expected it in one of them. Name it as the header does: --column power=NAME.", message);
        var good = new ImportOptions { Columns = [new(ChannelRole.Throttle, "spare", "%")] };
        Assert.True(FlightReader.Read([flight.Igc(0), flight.EngineCsv(0, gyro: true, absolute: true)], good).Flight.Has(ChannelRole.Throttle));
    }

    public static TheoryData<string, byte[], string> BadZips()
    {
        var data = new TheoryData<string, byte[], string>();
        byte[] good = Zip(("a.csv", "time,rpm\n0,1\n1,2\n2,3\n"u8.ToArray()));
        data.Add("cut", good[..(good.Length / 2)], "z.zip: found a damaged zip, expected a zip that opens. Copy it again or unpack it and give the files.");
        data.Add("empty", Zip(), "z.zip: found a zip without a log, expected the files of a recording (CSV, IGC, GPX, NMEA). Export the recording again.");
        data.Add("pictures", Zip(("a.jpg", [1, 2])), "z.zip: found a zip without a log, expected the files of a recording (CSV, IGC, GPX, NMEA). Export the recording again.");
        data.Add("bomb", Zip(("a.csv", new byte[32 << 20])), "z.zip: found a zip that unpacks to far more than a flight, expected at most 4 GB and 200 times its size. Unpack it yourself if it is yours, and give the files.");
        data.Add("many", Zip([.. Enumerable.Range(0, 501).Select(i => (FormattableString.Invariant($"{i}.csv"), new byte[] { 65 }))]), "z.zip: found a zip of 501 files, expected at most 500. Unpack it and give the files of one flight.");
        data.Add("no log", Zip(("a.csv", "hello"u8.ToArray()), ("b.csv", "world"u8.ToArray())), "z.zip: found no file that is a log, expected a recording with time and at least one known column. Check that it is the recording of a flight.");
        return data;
    }

    [Theory]
    [MemberData(nameof(BadZips))]
    public void A_bad_zip_gives_one_clear_message(string what, byte[] bytes, string message)
    {
        Assert.NotEmpty(what);
        Assert.Equal(message, Assert.Throws<LogFormatException>(() => FlightReader.Read(LogSources.Zip("z.zip", () => new MemoryStream(bytes)))).Message);
    }

    [Fact]
    public void A_path_inside_a_zip_never_leaves_its_last_part()
    {
        IReadOnlyList<LogSource> sources = LogSources.Zip("z.zip", () => new MemoryStream(Zip(("../../etc/\u0007passwd.csv", "time,rpm\n0,1\n"u8.ToArray()), ("..\\..\\evil.csv", "time,rpm\n0,1\n"u8.ToArray()), ("ok/.hidden.csv", [65]))));
        Assert.Equal(["evil.csv", "passwd.csv"], sources.Select(s => s.Name));
    }

    [Fact]
    public void An_entry_that_does_not_give_what_it_declares_is_refused()
    {
        byte[] bytes = Zip(("a.csv", new byte[5000]));
        // The uncompressed length stands at byte 24 of the central directory's record (APPNOTE 6.3, 4.3.12).
        int record = bytes.AsSpan().IndexOf("PK\u0001\u0002"u8);
        BitConverter.GetBytes(100).CopyTo(bytes, record + 24);
        LogSource source = Assert.Single(LogSources.Zip("z.zip", () => new MemoryStream(bytes)));
        string message = Assert.Throws<LogFormatException>(() =>
        {
            using Stream stream = source.Open();
            stream.CopyTo(Stream.Null);
        }).Message;
        Assert.Equal("z.zip: found a damaged zip, expected a zip that opens. Copy it again or unpack it and give the files.", message);
    }

    [Fact]
    public void No_damage_to_a_zip_gives_another_exception()
    {
        byte[] good = new MadeUpFlight(8, 60).PhoneZip();
        var random = new Random(11);
        int refused = 0;
        for (int i = 0; i < 100; i++)
        {
            byte[] bytes = i % 4 == 0 ? good[..random.Next(good.Length)] : [.. good];
            for (int k = i % 4 == 0 ? 0 : 1 + random.Next(20); k > 0; k--)
                bytes[random.Next(bytes.Length)] = (byte)random.Next(256);
            try
            {
                FlightReader.Read(LogSources.Zip("z.zip", () => new MemoryStream(bytes)));
            }
            catch (LogFormatException)
            {
                refused++;
            }
        }
        Assert.True(refused > 20, $"{refused} refused");
    }

    [Fact]
    public void A_path_that_is_not_there_is_named() =>
        Assert.Equal("nothing.csv: found no such file or folder, expected a log, a folder or a zip of logs. Check the name and the folder.",
            Assert.Throws<LogFormatException>(() => LogSources.From(["no/such/nothing.csv"])).Message);

    private static byte[] Zip(params (string Name, byte[] Bytes)[] files)
    {
        var memory = new MemoryStream();
        using (var zip = new ZipArchive(memory, ZipArchiveMode.Create, leaveOpen: true))
        {
            foreach ((string name, byte[] bytes) in files)
            {
                using Stream stream = zip.CreateEntry(name).Open();
                stream.Write(bytes);
            }
        }
        return memory.ToArray();
    }

    /// <summary>A table of one column that is 1 throughout, 600 s long.</summary>
    private static LogTable Constant(string name, ChannelRole role, ClockKind clock = ClockKind.Elapsed, DateTimeOffset? origin = null, bool utc = false, double step = 1, double first = 0)
    {
        double[] time = [.. Enumerable.Range(0, (int)(600 / step) + 1).Select(i => first + (i * step))];
        double[] ones = [.. time.Select(_ => 1.0)];
        return new()
        {
            File = new() { Name = name, Sha256 = "", Format = "CSV", RowsRead = time.Length, Columns = [new(ChannelRoles.NameOf(role), role, "", "name", 0)] },
            Clock = clock,
            Origin = origin,
            IsUtc = utc,
            TimeSec = time,
            Columns = new Dictionary<ChannelRole, double[]> { [role] = ones },
        };
    }

    /// <summary>Made-up turns, engine and climb, the same for every logger; nothing of it comes from the program under test.</summary>
    private sealed class MadeUpFlight
    {
        private const double Step = 0.1;

        private readonly double[] _rate, _heading, _north, _east, _rpm, _height;
        private readonly int _seconds;

        public MadeUpFlight(int seed, int seconds)
        {
            var random = new Random(seed);
            _seconds = seconds;
            int n = (int)((seconds + 1) / Step) + 1;
            (_rate, _heading, _north, _east, _rpm, _height) = (new double[n], new double[n], new double[n], new double[n], new double[n], new double[n]);
            double wanted = 0, power = 0.5, climb = 0, turnLeft = 0, powerLeft = 0;
            _height[0] = 400;
            _rpm[0] = 5000;
            for (int i = 1; i < n; i++)
            {
                if ((turnLeft -= Step) <= 0)
                    (wanted, turnLeft) = ((random.NextDouble() - 0.5) * 0.5, 5 + (20 * random.NextDouble()));
                if ((powerLeft -= Step) <= 0)
                    (power, powerLeft) = (random.NextDouble(), 10 + (30 * random.NextDouble()));
                _rate[i] = _rate[i - 1] + (Step / 1.5 * (wanted - _rate[i - 1]));
                _heading[i] = _heading[i - 1] + (Step * _rate[i]);
                _north[i] = _north[i - 1] + (Step * ((10.5 * Math.Cos(_heading[i])) + 2));
                _east[i] = _east[i - 1] + (Step * ((10.5 * Math.Sin(_heading[i])) - 1));
                _rpm[i] = _rpm[i - 1] + (Step / 0.5 * (2000 + (6000 * power) - _rpm[i - 1]));
                climb += Step / 1.0 * ((5.0 * (Math.Pow(_rpm[i] / 8000, 2) - 0.45)) - climb);
                _height[i] = _height[i - 1] + (Step * climb);
            }
        }

        /// <summary>What the engine logger counts at the start of the flight when its clock is not ahead.</summary>
        public const double EngineZero = 1000;

        public double YawRate(double t) => At(_rate, t);

        public LogSource Igc(double shift)
        {
            var text = new StringBuilder("AXYZ\r\nHFDTE170526\r\n");
            for (int s = 0; s <= _seconds; s++)
            {
                DateTimeOffset at = _start.AddSeconds(s + shift);
                double latitude = 45 + (At(_north, s) / 111_131.8), longitude = 7 + (At(_east, s) / 78_846.8); // metres per degree at 45° (WGS-84)
                text.Append(FormattableString.Invariant($"B{at:HHmmss}{Degrees(latitude, 2)}N{Degrees(longitude, 3)}EA{At(_height, s):00000}{At(_height, s):00000}\r\n"));
            }
            return LogSource.FromBytes("track.igc", Encoding.ASCII.GetBytes(text.ToString()));
        }

        /// <summary>An engine monitor at 10 Hz whose clock is ahead of the flight's by <paramref name="ahead"/> seconds.</summary>
        public LogSource EngineCsv(double ahead, bool gyro, bool absolute = false)
        {
            var random = new Random(77);
            var text = new StringBuilder(absolute ? "time,rpm,spare" : "time (s),rpm,spare");
            text.Append(gyro ? ",yaw rate (deg/s)\n" : "\n");
            for (double t = 0.03; t <= _seconds; t += 0.1)
            {
                string stamp = absolute ? FormattableString.Invariant($"{_start.AddSeconds(t + ahead):yyyy-MM-ddTHH:mm:ss.fffZ}") : FormattableString.Invariant($"{t + ahead + 1000:F3}");
                text.Append(FormattableString.Invariant($"{stamp},{At(_rpm, t) + (40 * random.NextDouble()):F0},{50 + (t % 10):F0}"));
                text.Append(gyro ? FormattableString.Invariant($",{(At(_rate, t) * 180 / Math.PI) + random.NextDouble() - 0.2:F2}\n") : "\n");
            }
            return LogSource.FromBytes("engine.csv", Encoding.ASCII.GetBytes(text.ToString()));
        }

        public byte[] PhoneZip()
        {
            var gyro = new StringBuilder("time,seconds_elapsed,z,y,x\n");
            var gravity = new StringBuilder("time,seconds_elapsed,z,y,x\n");
            long epoch = _start.ToUnixTimeMilliseconds() * 1_000_000;
            for (int i = 0; i < _seconds * 50; i++)
            {
                double t = i * 0.02;
                string stamp = FormattableString.Invariant($"{epoch + (i * 20_000_000L)},{t:F9}");
                gyro.Append(FormattableString.Invariant($"{stamp},{At(_rate, t):F9},0.001,-0.002\n"));
                gravity.Append(FormattableString.Invariant($"{stamp},9.80665,0.1,0.2\n"));
            }
            var location = new StringBuilder("time,seconds_elapsed,latitude,longitude,altitude\n");
            for (int s = 0; s < _seconds; s++)
                location.Append(FormattableString.Invariant($"{epoch + (s * 1_000_000_000L)},{s:F9},{45 + (At(_north, s) / 111_131.8):F9},{7 + (At(_east, s) / 78_846.8):F9},{At(_height, s):F2}\n"));
            return Zip(("Gyroscope.csv", Encoding.ASCII.GetBytes(gyro.ToString())), ("Gravity.csv", Encoding.ASCII.GetBytes(gravity.ToString())), ("Location.csv", Encoding.ASCII.GetBytes(location.ToString())),
                ("Metadata.csv", "device name,platform\nSecret phone,x\n"u8.ToArray()), ("Microphone.csv", "time,seconds_elapsed,dBFS\n1,2,3\n"u8.ToArray()), ("__MACOSX/._a.csv", [1, 2, 3]));
        }

        private static double At(double[] column, double t)
        {
            int i = Math.Min((int)(t / Step), column.Length - 2);
            double share = (t / Step) - i;
            return column[i] + (share * (column[i + 1] - column[i]));
        }

        private static string Degrees(double value, int digits)
        {
            int whole = (int)value;
            int thousandths = (int)Math.Round((value - whole) * 60_000);
            return whole.ToString(new string('0', digits), System.Globalization.CultureInfo.InvariantCulture) + thousandths.ToString("00000", System.Globalization.CultureInfo.InvariantCulture);
        }
    }
}
