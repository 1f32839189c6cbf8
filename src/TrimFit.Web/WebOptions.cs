using System.Net;

namespace TrimFit.Web;

/// <summary>How the local page is served.</summary>
public sealed record WebOptions
{
    /// <summary>Port asked for when nobody says which; another one when it is taken.</summary>
    public const int UsualPort = 8480;

    /// <summary>Address to listen on. Anything but this machine's own needs a <see cref="Token"/>.</summary>
    public IPAddress Address { get; init; } = IPAddress.Loopback;

    /// <summary>Port; null for <see cref="UsualPort"/> or any free one, 0 for any free one.</summary>
    public int? Port { get; init; }

    /// <summary>What a browser must bring the first time; null when only this machine can reach the page.</summary>
    public string? Token { get; init; }

    /// <summary>The job book; null for no book.</summary>
    public string? BookPath { get; init; }

    /// <summary>Where it is remembered what the columns of a logger are; null to forget.</summary>
    public string? LoggersPath { get; init; }

    /// <summary>Version shown in results.</summary>
    public required string ProgramVersion { get; init; }

    /// <summary>Largest upload of one request, bytes.</summary>
    public long MostUploadBytes { get; init; } = 200L << 20;

    /// <summary>Bytes of uploads that may lie on the disk over all sessions.</summary>
    public long MostStoredBytes { get; init; } = 1L << 30;

    /// <summary>A session that did nothing for so long is forgotten with its files.</summary>
    public TimeSpan SessionIdle { get; init; } = TimeSpan.FromHours(2);

    /// <summary>Sessions at once; beyond it the one that did nothing for longest goes.</summary>
    public int MostSessions { get; init; } = 200;

    /// <summary>Longest wait for running work when the program is asked to stop.</summary>
    public TimeSpan StopWait { get; init; } = TimeSpan.FromMinutes(2);

    /// <summary>Whether only this machine can reach the page.</summary>
    public bool IsLocal => IPAddress.IsLoopback(Address);
}
