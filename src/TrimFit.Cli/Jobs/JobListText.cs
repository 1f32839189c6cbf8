using System.Text.Json;
using TrimFit.Core.Workshop;

namespace TrimFit.Cli;

/// <summary>The list as JSON, schema <c>trimfit-job-list/1</c>.</summary>
internal static class JobListText
{
    public static string Write(IEnumerable<JobSummary> jobs, long bookBytes)
    {
        using var stream = new MemoryStream();
        using (var json = new Utf8JsonWriter(stream, new JsonWriterOptions { Indented = true, NewLine = "\n", Encoder = System.Text.Encodings.Web.JavaScriptEncoder.UnsafeRelaxedJsonEscaping }))
        {
            json.WriteStartObject();
            json.WriteString("schema", "trimfit-job-list/1");
            json.WriteNumber("book_bytes", bookBytes);
            json.WriteStartArray("jobs");
            foreach (JobSummary job in jobs)
            {
                json.WriteStartObject();
                json.WriteNumber("number", job.Number);
                json.WriteString("opened", job.Opened.UtcDateTime.ToString("yyyy-MM-dd'T'HH:mm:ss.fff'Z'", System.Globalization.CultureInfo.InvariantCulture));
                json.WriteString("machine", job.Machine);
                json.WriteString("customer", job.Customer);
                json.WriteString("wing", job.Wing);
                json.WriteString("complaint", job.Complaint);
                json.WriteNumber("setups", job.Setups);
                json.WriteNumber("flights", job.Flights);
                json.WriteString("verdict", job.Verdict);
                Number("rate_deg_s", job.RateRadPerSec);
                Number("rate_low95", job.RateInterval95?.Lower);
                Number("rate_high95", job.RateInterval95?.Upper);
                json.WriteBoolean("signed", job.IsSigned);
                json.WriteEndObject();
            }
            json.WriteEndArray();
            json.WriteEndObject();

            void Number(string name, double? rad)
            {
                if (rad is double r)
                    json.WriteNumber(name, Math.Round(double.RadiansToDegrees(r), 9));
                else
                    json.WriteNull(name);
            }
        }
        return System.Text.Encoding.UTF8.GetString(stream.ToArray()) + "\n";
    }
}
