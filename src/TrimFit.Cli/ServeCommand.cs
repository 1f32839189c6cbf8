using System.Globalization;
using System.Net;
using System.Security.Cryptography;
using TrimFit.Jobs;
using TrimFit.Web;

namespace TrimFit.Cli;

/// <summary>What <c>serve</c> was asked for.</summary>
internal sealed record ServeRequest
{
    public string? Listen { get; init; }
    public string? Port { get; init; }
    public string? Token { get; init; }
    public bool NoBrowser { get; init; }
    public string? Book { get; init; }
    public bool NoBook { get; init; }
}

internal static class ServeCommand
{
    private const int ShortestToken = 12;

    public static int Run(ServeRequest request, TextWriter output, TextWriter error)
    {
        IPAddress address = Address(request.Listen);
        bool local = IPAddress.IsLoopback(address);
        if (request.Token is { Length: < ShortestToken })
            throw new CommandLineException($"--token: found {request.Token.Length.ToString(CultureInfo.InvariantCulture)} characters, expected {ShortestToken.ToString(CultureInfo.InvariantCulture)} or more. Leave it out to get a random one.");
        string? token = request.Token ?? (local ? null : Convert.ToHexStringLower(RandomNumberGenerator.GetBytes(16)));
        var options = new WebOptions
        {
            Address = address,
            Port = Port(request.Port),
            Token = token,
            BookPath = request.NoBook ? null : request.Book ?? JobBook.DefaultPath,
            LoggersPath = JobBook.DefaultPath is string book ? Path.Combine(Path.GetDirectoryName(book)!, "loggers.json") : null,
            ProgramVersion = ProgramVersion.Provenance.ProgramVersion,
        };
        return ServeAsync(options, request.NoBrowser, output, error).GetAwaiter().GetResult();
    }

    private static async Task<int> ServeAsync(WebOptions options, bool noBrowser, TextWriter output, TextWriter error)
    {
        RunningServer server;
        try
        {
            server = await TrimFitServer.StartAsync(options, error);
        }
        catch (IOException)
        {
            throw new CommandLineException(options.Port is int port and not 0
                ? $"--port: {port.ToString(CultureInfo.InvariantCulture)} at {options.Address} cannot be opened; another program may have it. Name another port, or leave it out."
                : $"--listen: {options.Address} is not an address of this machine, or may not be opened.");
        }
        await using (server)
        {
            Uri shown = options.Token is string token ? new Uri(server.Address, "/?token=" + token) : server.Address;
            if (!options.IsLocal)
            {
                await error.WriteLineAsync($"trimfit: {options.Address} can be reached by other machines of this network. Whoever has the token can drop flights, use this machine's "
                    + $"processor and disk{(options.BookPath is null ? "" : ", and read and write the job book")}. The connection is not encrypted: use it in a network you trust.");
            }
            await output.WriteLineAsync($"TrimFit is at {shown}");
            await output.WriteLineAsync("It ends with Ctrl+C; work that runs is finished first.");
            await output.FlushAsync();
            if (!noBrowser)
                TrimFitServer.OpenBrowser(shown);
            await server.WaitAsync();
        }
        return ExitCode.Done;
    }

    private static IPAddress Address(string? text) => text is null ? IPAddress.Loopback
        : IPAddress.TryParse(text.Trim('[', ']'), out IPAddress? address) ? address
        : text == "localhost" ? IPAddress.Loopback
        : throw new CommandLineException($"--listen: found \"{text}\", expected an address of this machine, such as 192.168.1.20.");

    private static int? Port(string? text) => text is null ? null
        : int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out int port) && port <= 65535 ? port
        : throw new CommandLineException($"--port: found \"{text}\", expected a whole number from 0 (any free port) to 65535.");
}
