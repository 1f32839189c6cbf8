using System.Globalization;
using Microsoft.Data.Sqlite;

namespace TrimFit.Jobs;

/// <summary>Short ways to run a statement with values in the order of its $1, $2, ….</summary>
internal static class Statements
{
    public static int Run(this SqliteConnection connection, string sql, params ReadOnlySpan<object?> values)
    {
        using SqliteCommand command = Prepare(connection, sql, values);
        return command.ExecuteNonQuery();
    }

    public static long Number(this SqliteConnection connection, string sql, params ReadOnlySpan<object?> values)
    {
        using SqliteCommand command = Prepare(connection, sql, values);
        return Convert.ToInt64(command.ExecuteScalar(), CultureInfo.InvariantCulture);
    }

    public static List<T> Rows<T>(this SqliteConnection connection, string sql, Func<SqliteDataReader, T> read, params ReadOnlySpan<object?> values)
    {
        using SqliteCommand command = Prepare(connection, sql, values);
        using SqliteDataReader reader = command.ExecuteReader();
        var rows = new List<T>();
        while (reader.Read())
            rows.Add(read(reader));
        return rows;
    }

    public static double? NumberOrNull(this SqliteDataReader reader, int column) => reader.IsDBNull(column) ? null : reader.GetDouble(column);

    public static int? CountOrNull(this SqliteDataReader reader, int column) => reader.IsDBNull(column) ? null : reader.GetInt32(column);

    public static DateTimeOffset Time(this SqliteDataReader reader, int column) => TimeOf(reader.GetString(column));

    /// <summary>A time as the book writes it: ISO 8601, UTC, milliseconds, so that text sorts as time does.</summary>
    public static string TextOf(DateTimeOffset time) => time.ToUniversalTime().ToString("yyyy-MM-dd'T'HH:mm:ss.fff'Z'", CultureInfo.InvariantCulture);

    public static DateTimeOffset TimeOf(string text) => DateTimeOffset.ParseExact(text, "yyyy-MM-dd'T'HH:mm:ss.fff'Z'", CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal);

    private static SqliteCommand Prepare(SqliteConnection connection, string sql, ReadOnlySpan<object?> values)
    {
        SqliteCommand command = connection.CreateCommand();
#pragma warning disable CA2100 // every statement is a constant of this project; values are bound
        command.CommandText = sql;
#pragma warning restore CA2100
        for (int i = 0; i < values.Length; i++)
            command.Parameters.AddWithValue("$" + (i + 1).ToString(CultureInfo.InvariantCulture), values[i] ?? DBNull.Value);
        return command;
    }
}
