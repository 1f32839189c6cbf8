using TrimFit.Core.Logs;
using TrimFit.Import;

namespace TrimFit.Tests.Importing;

/// <summary>Header lines of loggers out of public documentation and logs, none of which was looked at when the table of names was written.
/// Each must be recognised or asked for, never misread. The sources are public repositories, found by the header itself; rows are made up.</summary>
public class HeaderLinesTests
{
    /// <summary>Source, file name, text, and the outcome: roles with units, questions asked, or the refusal.</summary>
    public static TheoryData<string, string, string, string> Headers => new()
    {
        {
            "skydiving GNSS logger, firmware before 2023, with units row (a parser's constants, 2014 format)", "track.csv",
            "time,lat,lon,hMSL,velN,velE,velD,hAcc,vAcc,sAcc,heading,cAcc,gpsFix,numSV\n,(deg),(deg),(m),(m/s),(m/s),(m/s),(m),(m),(m/s),(deg),(deg),,\n2026-05-12T10:00:00.00Z,45.1,7.1,900.1,9.0,1.0,0.5,1.2,1.9,0.4,6.3,2.1,3,12\n2026-05-12T10:00:00.20Z,45.1,7.1,900.0,9.1,1.0,0.5,1.2,1.9,0.4,6.3,2.1,3,12\n",
            "time; latitude deg; longitude deg; velocity_north m/s; velocity_east m/s; heading deg"
        },
        {
            "skydiving GNSS logger, firmware of 2023, record names in the header", "TRACK.CSV",
            "$FLYS,1\n$VAR,FIRMWARE_VER,v2023.09.22\n$VAR,DEVICE_ID,0000\n$COL,GNSS,time,lat,lon,hMSL,velN,velE,velD,hAcc,vAcc,sAcc,numSV\n$UNIT,GNSS,,deg,deg,m,m/s,m/s,m/s,m,m,m/s,\n$DATA\n$GNSS,2026-05-12T10:00:00.000Z,45.1,7.1,900.1,9.0,1.0,0.5,1.2,1.9,0.4,12\n$GNSS,2026-05-12T10:00:00.200Z,45.1,7.1,900.0,9.1,1.0,0.5,1.2,1.9,0.4,12\n",
            "time; latitude deg; longitude deg; velocity_north m/s; velocity_east m/s"
        },
        {
            "electric motor controller log", "controller.csv",
            "ms_today;input_voltage;temp_mos_max;temp_motor;current_motor;current_in;d_axis_current;q_axis_current;erpm;duty_cycle;amp_hours_used\n36000000;50.1;30;31;12.5;8.1;0;12;21000;0.4;0.1\n36000100;50.0;30;31;12.6;8.2;0;12;21100;0.4;0.1\n",
            "controller.csv(1): found no column for the time; the header has ms_today, input_voltage, temp_mos_max, temp_motor, current_motor, current_in, d_axis_current, q_axis_current, erpm, duty_cycle, amp_hours_used, expected a column with the time of each row. Name it: --column time=NAME:s."
        },
        {
            "glass-cockpit avionics, units in a comment above the names", "avionics.csv",
            "#info, log_version=\"1.03\"\n#yyy-mm-dd, hh:mm:ss,   hh:mm,  ident,      degrees,      degrees, ft Baro,  inch,  ft msl, deg C,     kt,     kt,     fpm,    deg,    deg,      G,      G,   deg,   deg, volts,  amps, rpm\n  Lcl Date, Lcl Time, UTCOfst, AtvWpt,     Latitude,    Longitude,    AltB, BaroA,  AltMSL,   OAT,    IAS, GndSpd,    VSpd,  Pitch,   Roll,  LatAc, NormAc,   HDG,   TRK, volt1, amp1, E1 RPM\n2026-05-12, 10:00:00,  -05:00,       ,   45.1000000,    7.1000000,   300.0, 29.90,   310.0,  20.0,    0.0,   0.00,    1.00,  0.00,   0.00,   0.00,   0.00,  10.0,  10.0,  25.0, 1.0, 0.0\n2026-05-12, 10:00:01,  -05:00,       ,   45.1000010,    7.1000000,   300.0, 29.90,   310.0,  20.0,    0.0,   0.00,    1.00,  0.00,   0.00,   0.00,   0.00,  10.0,  10.0,  25.0, 1.0, 0.0\n",
            "avionics.csv(3): found no column for the time; the header has Lcl Date, Lcl Time, UTCOfst, AtvWpt, Latitude, Longitude, AltB, BaroA, AltMSL, OAT, IAS, GndSpd, VSpd, Pitch, Roll, LatAc, NormAc, HDG, TRK, volt1, amp1, E1 RPM, expected a column with the time of each row. Name it: --column time=NAME:s."
        },
        {
            "phone, one file per sensor: gyroscope", "Gyroscope.csv",
            "time,seconds_elapsed,z,y,x\n1778580000000000000,0.10,0.1,0.2,0.3\n1778580000010000000,0.11,0.1,0.2,0.3\n",
            "time ns; gyro_z rad/s; gyro_y rad/s; gyro_x rad/s; several_columns"
        },
        {
            "phone, one file per sensor: location", "Location.csv",
            "time,seconds_elapsed,horizontalAccuracy,speed,bearing,altitude,longitude,latitude\n1778580000000000000,0.10,3.2,9.1,120.5,500.1,7.1,45.1\n1778580001000000000,1.10,3.2,9.1,121.5,500.3,7.1,45.1\n",
            "time ns; ground_course deg; altitude m; longitude deg; latitude deg; several_columns; unit_inferred; unit_unknown; unit_inferred"
        },
        {
            "phone, all sensors in one file", "phone.csv",
            "loggingTime(txt),loggingSample(N),locationLatitude(WGS84),locationLongitude(WGS84),locationAltitude(m),locationSpeed(m/s),accelerometerAccelerationX(G),motionRotationRateZ(rad/s),motionYaw(rad)\n2026-05-12T10:00:00.100+02:00,1,45.1,7.1,500.1,9.1,0.1,0.05,1.2\n2026-05-12T10:00:00.200+02:00,2,45.1,7.1,500.1,9.1,0.1,0.05,1.2\n",
            "time; latitude deg; longitude deg; acceleration_x g; gyro_z rad/s"
        },
        {
            "phone physics laboratory, gyroscope", "gyro.csv",
            "\"Time (s)\",\"Gyroscope x (rad/s)\",\"Gyroscope y (rad/s)\",\"Gyroscope z (rad/s)\",\"Absolute (rad/s)\"\n0.00,-2.7E-3,-7.4E-4,-2.2E-3,3.6E-3\n0.01,-2.7E-3,-7.4E-4,-2.2E-3,3.6E-3\n",
            "time s; gyro_x rad/s; gyro_y rad/s; gyro_z rad/s"
        },
        {
            "RC transmitter, long-range link, imperial units (a player script's comment)", "rc.csv",
            "Date,Time,FM,1RSS(dB),RQly(%),RxBt(V),Curr(A),Capa(mAh),GPS,GSpd(mph),Hdg(@),Alt(ft),Sats,Ptch(rad),Roll(rad),Yaw(rad),Rud,Ele,Thr,Ail,LSW,TxBat(V)\n2026-05-12,10:00:00.000,0,40,100,16.1,2.0,10,45.1 7.1,20.1,120.5,300,12,0.1,0.1,1.2,0,0,-1024,0,0x00,4.1\n2026-05-12,10:00:00.500,0,40,100,16.1,2.0,10,45.1 7.1,20.1,121.5,301,12,0.1,0.1,1.2,0,0,-1000,0,0x00,4.1\n",
            "date; time; voltage V; current A; position deg; ground_speed mph; ground_course deg; altitude ft; roll rad; heading rad; throttle -1024..1024; unit_inferred"
        },
        {
            "RC transmitter, serial telemetry, imperial units (a player script's comment)", "rc.csv",
            "Date,Time,Tmp1(@C),VFAS(V),Curr(A),Alt(ft),RSSI(dB),RxBt(V),Fuel(%),VSpd(f/s),Hdg(@),Ptch(@),Roll(@),Dist(ft),GAlt(ft),GSpd(mph),GPS,Rud,Ele,Thr,Ail,LSW,TxBat(V)\n2026-05-12,10:00:00.000,25,16.1,2.0,300,80,5.0,90,1.5,120.5,1.0,2.0,10,301,20.1,45.1 7.1,0,0,-1024,0,0x00,4.1\n2026-05-12,10:00:00.500,25,16.1,2.0,300,80,5.0,90,1.5,121.5,1.0,2.0,10,301,20.1,45.1 7.1,0,0,-1000,0,0x00,4.1\n",
            "date; time; voltage V; current A; altitude ft; ground_course deg; roll deg; ground_speed mph; position deg; throttle -1024..1024; unit_not_known; several_columns; several_columns; unit_inferred"
        },
        {
            "drone log service, metric and imperial mixed", "drone.csv",
            "time(millisecond),datetime(utc),latitude,longitude,height_above_takeoff(feet),altitude_above_seaLevel(feet),speed(mph),distance(feet),satellites,voltage(v),battery_percent,compass_heading(degrees),pitch(degrees),roll(degrees),isPhoto\n0,2026-05-12 10:00:00,45.1,7.1,10,1000,20.1,0,12,16.1,90,120.5,1.0,2.0,0\n100,2026-05-12 10:00:00,45.1,7.1,10,1000,20.1,1,12,16.1,90,121.5,1.0,2.0,0\n200,2026-05-12 10:00:00,45.1,7.1,10,1000,20.1,1,12,16.1,90,121.5,1.0,2.0,0\n",
            "time; latitude deg; longitude deg; ground_speed mph; voltage V; heading deg; roll deg; several_columns; coarse_time"
        },
        {
            "flight-controller black box", "blackbox.csv",
            "loopIteration,time (us),axisP[0],axisI[0],gyroADC[0],gyroADC[1],gyroADC[2],motor[0],vbatLatest (V)\n0,16131890,0,0,1,2,3,1200,16.1\n2,16132900,0,0,1,2,3,1200,16.1\n",
            "blackbox.csv(1): found no column that is known beside the time; the header has loopIteration, time (us), axisP[0], axisI[0], gyroADC[0], gyroADC[1], gyroADC[2], motor[0], vbatLatest (V), expected columns such as yaw_rate, throttle, rpm, latitude. Name them: --column ROLE=NAME:UNIT."
        },
        {
            "pocket GPS track logger, packed date and time, hemisphere letters", "gps.csv",
            "INDEX,TAG,DATE,TIME,LATITUDE N/S,LONGITUDE E/W,HEIGHT,SPEED,HEADING,VOX\n1,T,090430,194159,48.856330N,009.089779W,318,20,0,\n2,T,090430,194200,48.856340N,009.089779W,318,20,0,\n3,T,090430,194201,48.856350N,009.089779W,318,20,0,\n",
            "time; latitude deg; longitude deg; altitude m; date_order_unknown; unit_unknown; unit_unknown; unit_inferred"
        },
        {
            "German battery scooter log", "fahrt.csv",
            "Zeit;Breite;Laenge;Genauigkeit_m;Geschwindigkeit_kmh;Hoehe_m;BMS_Prozent;Spannung_V;Strom_A;Entnahme_W\n2026-05-12T10:00:00.000;45,1;7,1;3,2;20,1;300,5;90;50,1;8,2;410\n2026-05-12T10:00:01.000;45,1;7,1;3,2;20,1;300,5;90;50,1;8,2;410\n",
            "time; latitude deg; longitude deg; ground_speed km/h; altitude m; voltage V; current A"
        },
        {
            "German motorcycle track log", "track.csv",
            "Zeit;Breite;Länge;Höhe m;Tempo km/h;Limit km/h;Über Limit;Schräglage °\n2026-05-12 10:00:00;48,500000;12,250000;412;68;70;nein;12\n2026-05-12 10:00:01;48,500100;12,250000;412;74;70;nein;-18\n",
            "time; latitude deg; longitude deg; altitude m; roll deg"
        },
        {
            "IMU board, documentation table", "imu.csv",
            "Timestamp,Roll,Pitch,Yaw,AccX,AccY,AccZ,GyroX,GyroY,GyroZ\n1778580000000,2.1,-1.2,120.5,12,-8,998,1.2,-0.4,9.1\n1778580000010,2.1,-1.2,121.5,12,-8,998,1.2,-0.4,9.1\n",
            "time ms; heading deg; acceleration_x mg; acceleration_y mg; acceleration_z mg; unit_inferred; unit_unknown; unit_unknown; unit_unknown; unit_unknown; unit_inferred; unit_inferred; unit_inferred"
        },
        {
            "balloon tracker sketch", "balloon.csv",
            "Time,Latitude,Longitude,Altitude,Satellite Count,HDOP,Inside Temperature,Outside Temperature\n10:00:00,45.1,7.1,900.1,12,1.1,20.1,5.2\n10:00:01,45.1,7.1,901.1,12,1.1,20.1,5.2\n",
            "time; latitude deg; longitude deg; altitude m; unit_inferred"
        },
        {
            "Arduino GPS logger", "arduino.csv",
            "Date,Time,Latitude,Longitude,Altitude,GPS Satellites Value,Speed(kmph)\n2026-05-12,10:00:00,45.1,7.1,900.1,12,20.1\n2026-05-12,10:00:01,45.1,7.1,901.1,12,20.1\n",
            "date; time; latitude deg; longitude deg; altitude m; ground_speed km/h; unit_inferred"
        },
        {
            "engine diagnostics logger, documentation table", "obd_log.csv",
            "Timestamp,Engine Load (%),Engine Speed (rpm),Vehicle Speed (kph),Throttle Position (%),Relative Throttle Position (%),Runtime Since Engine Start (s),Fuel Level (%),Coolant Temp (C),Barometric Pressure (kPa)\n2026-05-12 10:00:00,40.1,2500,30,20.5,12.5,100,90,80,95.1\n2026-05-12 10:00:01,40.1,2600,30,20.5,12.5,101,90,80,95.1\n",
            "time; rpm rpm; throttle %; pressure kPa; several_columns"
        },
        {
            "home-made IMU and GNSS logger", "dataset.csv",
            "time,flag,gyroX,gyroY,gyroZ,accX,accY,accZ,magX,magY,magZ,press,numSat,lat,lon,hE,hMSL,velN,velE,velD\n1000.0,0,0.01,0.02,0.03,0.1,0.2,9.8,1,2,3,95000.1,12,45.1,7.1,950.1,900.1,9.1,1.0,0.2\n1010.0,0,0.01,0.02,0.03,0.1,0.2,9.8,1,2,3,95000.1,12,45.1,7.1,950.1,900.1,9.1,1.0,0.2\n",
            "time ms; acceleration_x m/s2; acceleration_y m/s2; acceleration_z m/s2; latitude deg; longitude deg; time_unit_inferred; unit_unknown; unit_unknown; unit_unknown; unit_unknown; unit_unknown; unit_inferred; unit_inferred; unit_inferred"
        },
    };

    [Theory]
    [MemberData(nameof(Headers))]
    public void A_header_never_seen_before_is_recognised_or_asked_for(string source, string name, string text, string outcome)
    {
        Assert.NotEmpty(source);
        Assert.Equal(outcome, Outcome(name, text));
    }

    [Fact]
    public void A_receivers_heading_that_is_the_way_over_ground_is_used_as_the_course()
    {
        var text = new System.Text.StringBuilder("time,velN,velE,heading\n,(m/s),(m/s),(deg)\n");
        for (int i = 0; i < 100; i++)
        {
            double course = i * 3.6;
            (double sin, double cos) = Math.SinCos(double.DegreesToRadians(course));
            text.Append(System.Globalization.CultureInfo.InvariantCulture, $"2026-05-12T10:00:{i / 5:00}.{i % 5 * 2}00Z,{10 * cos:F2},{10 * sin:F2},{course:F1}\n");
        }
        FlightImport import = FlightReader.Read([LogSource.FromBytes("track.csv", System.Text.Encoding.UTF8.GetBytes(text.ToString()))]);
        Assert.False(import.Flight.Has(ChannelRole.Heading));
        Assert.Equal(double.DegreesToRadians(90), import.Flight[ChannelRole.GroundCourse][25], 1e-9);
        Assert.Contains(new Notice("heading_is_course", "track.csv: column \"heading\" is the direction of the way over ground (they differ by 0.0 deg in the median) and is used as ground_course. "
            + "To use it as the nose's: --column heading=heading."), import.Diagnostics.Warnings);
    }

    [Fact]
    public void Units_in_a_comment_above_the_names_are_used()
    {
        const string text = "#yyy-mm-dd, hh:mm:ss, ft msl, kt, fpm, deg, deg\n Lcl Date, Lcl Time, AltMSL, GndSpd, VSpd, Roll, TRK\n2026-05-12, 10:00:00, 1000.0, 36.0, 100, 1.0, 90.0\n2026-05-12, 10:00:01, 1010.0, 36.0, 100, 1.0, 90.0\n";
        FlightImport import = FlightReader.Read([LogSource.FromBytes("a.csv", System.Text.Encoding.UTF8.GetBytes(text))], new ImportOptions
        {
            Columns = [new(ChannelRole.Time, "Lcl Time", null), new(ChannelRole.Date, "Lcl Date", null), new(ChannelRole.Altitude, "AltMSL", null), new(ChannelRole.GroundSpeed, "GndSpd", null)],
        });
        Accuracy.AgreesTo(12, 304.8, import.Flight[ChannelRole.Altitude][0]);                 // 1000 ft, exact
        Accuracy.AgreesTo(12, 36 * 1852 / 3600.0, import.Flight[ChannelRole.GroundSpeed][0]); // 36 kt, exact
        Accuracy.AgreesTo(12, 100 * 0.3048 / 60, import.Flight[ChannelRole.VerticalSpeed][0]); // 100 ft/min, exact
        Assert.Equal(new DateTimeOffset(2026, 5, 12, 10, 0, 0, TimeSpan.Zero), import.Flight.StartUtc);
    }

    [Fact]
    public void A_header_with_another_number_of_names_than_cells_is_refused_since_names_may_be_shifted() => Assert.Equal(
        "log.csv(1): found 2 names over rows of 3 cells, expected a name for each cell. Which name belongs to which cell cannot be told; correct the header.",
        Logs.Refusal("time_s,yaw_rate_dps\n1,0.0,5\n2,0.1,6\n3,0.2,7\n"));

    private static string Outcome(string name, string text)
    {
        try
        {
            FlightImport import = FlightReader.Read([LogSource.FromBytes(name, System.Text.Encoding.UTF8.GetBytes(text))]);
            IEnumerable<string> used = import.Diagnostics.Files[0].Columns.Where(c => c.Role is not null).Select(c => $"{ChannelRoles.NameOf(c.Role!.Value)} {c.Unit}".TrimEnd());
            IEnumerable<string> said = import.Diagnostics.Warnings.Select(w => w.Code);
            return string.Join("; ", used.Concat(said));
        }
        catch (LogFormatException refusal)
        {
            return refusal.Message;
        }
    }
}
