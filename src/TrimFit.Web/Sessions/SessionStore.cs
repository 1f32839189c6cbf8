using System.Collections.Concurrent;
using System.Security.Cryptography;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.Hosting;

namespace TrimFit.Web.Sessions;

/// <summary>The sessions, each with a random number in a cookie that scripts and other sites never see.</summary>
internal sealed class SessionStore : BackgroundService
{
    private const string CookieName = "trimfit-session";
    private const int IdBytes = 32;

    /// <summary>Rows of flights kept for answers over all sessions, about 300 bytes each: above it the oldest answers are given up.</summary>
    private const long MostKeptRows = 400_000;

    private static readonly TimeSpan _sweep = TimeSpan.FromMinutes(1);

    private readonly ConcurrentDictionary<string, Session> _sessions = new();
    private readonly WebOptions _options;
    private readonly TimeProvider _time;
    private readonly string _folder;

    public SessionStore(WebOptions options, TimeProvider time)
    {
        (_options, _time) = (options, time);
        _folder = Directory.CreateTempSubdirectory("trimfit-serve-").FullName;
    }

    /// <summary>Number of sessions.</summary>
    public int Count => _sessions.Count;

    /// <summary>Bytes of uploads on the disk.</summary>
    public long StoredBytes => _sessions.Values.Sum(s => s.StoredBytes);

    /// <summary>The request's session; a new one when it has none.</summary>
    public Session Of(HttpContext context)
    {
        if (context.Items[nameof(Session)] is Session known)
            return known;
        DateTimeOffset now = _time.GetUtcNow();
        Session? session = context.Request.Cookies[CookieName] is string id && _sessions.TryGetValue(id, out Session? found) && now - found.LastUsed < _options.SessionIdle ? found : null;
        if (session is null)
        {
            session = New();
            context.Response.Cookies.Append(CookieName, session.Id, new CookieOptions { HttpOnly = true, SameSite = SameSiteMode.Strict, Path = "/", IsEssential = true });
        }
        session.LastUsed = now;
        context.Items[nameof(Session)] = session;
        return session;
    }

    /// <summary>The request's session, null when it has none: asking for progress makes no session.</summary>
    public Session? Existing(HttpContext context) => context.Request.Cookies[CookieName] is string id && _sessions.TryGetValue(id, out Session? found) ? found : null;

    /// <summary>Gives up answers of the sessions that were not used for longest, until what is kept fits into memory.</summary>
    public void KeepWithinMemory(Session current)
    {
        long rows = _sessions.Values.Sum(s => s.Answers.Sum(a => a.Rows));
        foreach (Session session in _sessions.Values.OrderBy(s => s.LastUsed).Append(current))
        {
            while (rows > MostKeptRows && session.Answers.Length > (session == current ? 1 : 0))
            {
                rows -= session.Answers[0].Rows;
                session.Answers = session.Answers.RemoveAt(0);
            }
        }
    }

    private Session New()
    {
        while (_sessions.Count >= _options.MostSessions && _sessions.Values.MinBy(s => s.LastUsed) is Session oldest)
            Remove(oldest);
        string id = Convert.ToHexStringLower(RandomNumberGenerator.GetBytes(IdBytes));
        // The folder's name is another random number: a file name in a message never tells the cookie.
        var session = new Session(id, Path.Combine(_folder, Convert.ToHexStringLower(RandomNumberGenerator.GetBytes(8)))) { LastUsed = _time.GetUtcNow() };
        _sessions[id] = session;
        return session;
    }

    private void Remove(Session session)
    {
        if (_sessions.TryRemove(session.Id, out _))
            session.DeleteFiles();
    }

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        using var timer = new PeriodicTimer(_sweep, _time);
        try
        {
            while (await timer.WaitForNextTickAsync(stoppingToken))
            {
                foreach (Session session in _sessions.Values.Where(s => _time.GetUtcNow() - s.LastUsed >= _options.SessionIdle))
                    Remove(session);
            }
        }
        catch (OperationCanceledException)
        {
            return;
        }
    }

    public override void Dispose()
    {
        foreach (Session session in _sessions.Values)
            Remove(session);
        try
        {
            Directory.Delete(_folder, recursive: true);
        }
        catch (IOException)
        {
            // Left to the system's own tidying of temporary files.
        }
        base.Dispose();
    }
}
