using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using TrimFit.Simulation;

namespace TrimFit.Benchmarks;

/// <summary>The logs that are measured: made up, fixed seed.</summary>
internal static class MadeUpLogs
{
    /// <summary>Headings of the good card, 175 s each.</summary>
    public const int TenMinutes = 4, Hour = 21, TenHours = 206;

    private const int TableRows = 1_750_000 /* 200 MB */;

    /// <summary>A flight on the good card.</summary>
    public static SimulatedFlight Fly(int headings, int hertz = 10, ulong seed = 7)
    {
        Scenario s = RandomScenarios.Draw(seed, seed % 2 == 0 ? TurnResponse.FirstOrder : TurnResponse.SecondOrder);
        return FlightSimulator.Fly(s with
        {
            Legs = TestCards.Alternating(headings),
            Start = s.Start with { AltitudeM = 2500 },
            Sensors = s.Sensors with { GyroHz = hertz, BrakesHz = hertz, RpmHz = hertz, ThrottleHz = hertz },
        });
    }

    public static void Write(string folder, int fleet)
    {
        Directory.CreateDirectory(folder);
        Put(folder, "ten-minutes", Fly(TenMinutes));
        Put(folder, "ten-minutes-50hz", Fly(TenMinutes, 50));
        Put(folder, "hour", Fly(Hour));
        Put(folder, "ten-hours", Fly(TenHours));
        File.WriteAllBytes(Path.Join(folder, "ten-minutes.igc"), LogWriters.Igc(Fly(TenMinutes).Log));
        WriteTable(Path.Join(folder, "table.csv"));
        string many = Path.Join(folder, "fleet");
        Directory.CreateDirectory(many);
        for (int i = 0; i < fleet; i++)
        {
            SimulatedFlight flight = Fly(TenMinutes, seed: 1000 + (ulong)i);
            File.WriteAllBytes(Path.Join(many, FormattableString.Invariant($"f{i:D4}.csv")), LogWriters.Csv(flight.Log));
            File.WriteAllText(Path.Join(many, FormattableString.Invariant($"f{i:D4}-sheet.toml")), SheetText.Write(flight));
            if (i == 0)
                File.WriteAllText(Path.Join(many, "rig.toml"), RigText.Write(RandomScenarios.Draw(1000)));
        }
    }

    private static void Put(string folder, string name, SimulatedFlight flight)
    {
        File.WriteAllBytes(Path.Join(folder, name + ".csv"), LogWriters.Csv(flight.Log));
        File.WriteAllText(Path.Join(folder, name + "-rig.toml"), RigText.Write(flight.Scenario));
    }

    /// <summary>A plain table for the race of CSV readers: an ISO time ending in Z and 13 numbers, as loggers write them.</summary>
    private static void WriteTable(string path)
    {
        var random = new Random(1);
        var start = new DateTime(2025, 5, 17, 8, 0, 0, DateTimeKind.Utc);
        using var text = new StreamWriter(path, false, new UTF8Encoding(false)) { NewLine = "\n" };
        text.WriteLine("time,rpm,throttle_pct,yaw_rate_dps,brake_left_mm,brake_right_mm,lat_deg,lon_deg,speed_kmh,course_deg,altitude_m,vario_m_s,acceleration_x_m_s2,acceleration_y_m_s2");
        ImmutableArray<(double Low, double High, int Decimals)> columns =
            [(1000, 2600, 0), (0, 100, 1), (-20, 20, 3), (0, 200, 1), (0, 200, 1), (-38.6, -38.4, 7), (-112.3, -112.2, 7), (20, 50, 2), (0, 359.9, 1), (300, 500, 1), (-3, 3, 2), (-2, 2, 3), (-2, 2, 3)];
        for (int i = 0; i < TableRows; i++)
        {
            text.Write(start.AddMilliseconds(100 * i).ToString("yyyy-MM-ddTHH:mm:ss.fffZ", CultureInfo.InvariantCulture));
            foreach ((double low, double high, int decimals) in columns)
            {
                text.Write(',');
                text.Write((low + ((high - low) * random.NextDouble())).ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture));
            }
            text.WriteLine();
        }
    }
}
