using System.Net.Mime;
using System.Text;
using Microsoft.AspNetCore.Antiforgery;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.Hosting;
using RazorSlices;
using TrimFit.Jobs;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;
using TrimFit.Web.Flights;
using TrimFit.Web.Safety;
using TrimFit.Web.Sessions;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>What all steps share: the session of a request, pages, documents, files, the job book.</summary>
internal sealed class Desk(WebOptions options, SessionStore sessions, IAntiforgery forms, WorkGate work, LoggerMemory loggers, TimeProvider time, IHostApplicationLifetime life)
{
    public WebOptions Options { get; } = options;

    public SessionStore Sessions { get; } = sessions;

    public WorkGate Work { get; } = work;

    public LoggerMemory Loggers { get; } = loggers;

    public Provenance Provenance { get; } = new(options.ProgramVersion);

    public DateTimeOffset Now => time.GetUtcNow();

    /// <summary>Whether the program was asked to stop: an answer is then sent at once, since the page it would go to is not served any more.</summary>
    public bool Stopping => life.ApplicationStopping.IsCancellationRequested;

    /// <summary>Answers an address; one request of a session at a time.</summary>
    public void Get(WebApplication app, string path, Func<Visit, Task> answer) => app.MapGet(path, Handler(answer));

    /// <summary>Takes a form; the same address asked for as a page leads to its step.</summary>
    public void Post(WebApplication app, string path, string page, Func<Visit, Task> answer)
    {
        app.MapPost(path, Handler(answer));
        if (path != page)
            app.MapGet(path, (RequestDelegate)(context =>
            {
                context.Response.Redirect(page);
                return Task.CompletedTask;
            }));
    }

    private RequestDelegate Handler(Func<Visit, Task> answer) => async context =>
    {
        Session session = Sessions.Of(context);
        await session.Gate.WaitAsync(context.RequestAborted);
        try
        {
            await answer(new Visit(context, session, this));
        }
        finally
        {
            session.LastUsed = Now;
            session.Gate.Release();
        }
    };

    public WebContext WebOf(HttpContext context, Session session) => new(session, Options, forms.GetAndStoreTokens(context).RequestToken!);

    /// <summary>A page that says what a status means, for a request without a session.</summary>
    public Task PlainAsync(HttpContext context, int status)
    {
        context.Response.StatusCode = status;
        Words words = Words.English;
        var document = new DocumentBuilder(words).Answer(words.Web.Status(status, Options.MostUploadBytes, Numbers.Invariant)).Build("TrimFit", "");
        return TextAsync(context, Page.Render(document, new()), "text/html; charset=utf-8", SecurityHeaders.DocumentPolicy);
    }

    public static string Render(RazorSlice slice)
    {
        using var text = new StringWriter { NewLine = "\n" };
        using (slice)
            slice.RenderAsync(text, PageEncoder.Instance).AsTask().GetAwaiter().GetResult(); // nothing in the templates waits
        return text.ToString();
    }

    public static Task TextAsync(HttpContext context, string text, string type, string? policy = null)
    {
        context.Response.ContentType = type;
        if (policy is not null)
            context.Response.Headers.ContentSecurityPolicy = policy;
        return context.Response.WriteAsync(text, Encoding.UTF8, context.RequestAborted);
    }

    /// <summary>The job book, opened for one request.</summary>
    /// <exception cref="JobBookException">It cannot be opened.</exception>
    public JobBook Book(BookAccess access) => JobBook.Open(Options.BookPath!, access, Now);

    /// <summary>Whether there is a book with something in it.</summary>
    public bool HasBook => Options.BookPath is string path && File.Exists(path);
}

/// <summary>One request of a session.</summary>
internal sealed record Visit(HttpContext Http, Session Session, Desk Desk)
{
    private WebContext? _web;

    public WebContext Web => _web ??= Desk.WebOf(Http, Session);

    public Words Words => Web.Words;

    public CancellationToken Gone => Http.RequestAborted;

    /// <summary>A text of the form; empty when it is missing.</summary>
    public string Field(string name) => Http.Request.Form[name].ToString().Trim();

    /// <summary>A text of the address; empty when it is missing.</summary>
    public string Query(string name) => Http.Request.Query[name].ToString().Trim();

    public Task PageAsync(string title, string path, RazorSlice body, string problem = "", string notice = "")
    {
        if (problem.Length > 0)
            Http.Response.StatusCode = StatusCodes.Status422UnprocessableEntity;
        return Desk.TextAsync(Http, Desk.Render(LayoutSlice.Create(new WebPage(Web, title, path, body) { Problem = problem, Notice = notice })), "text/html; charset=utf-8");
    }

    /// <summary>A page that only says where to go first.</summary>
    public Task MessageAsync(string title, string path, string text, string link, string linkText) =>
        PageAsync(title, path, MessageSlice.Create(new MessageView([text], link, linkText)));

    /// <summary>A document on a page of its own, to be printed; with a name it is saved as a file.</summary>
    public Task DocumentAsync(string html, string? fileName = null)
    {
        if (fileName is not null)
            Http.Response.Headers.ContentDisposition = new ContentDisposition { FileName = fileName }.ToString();
        return Desk.TextAsync(Http, html, "text/html; charset=utf-8", SecurityHeaders.DocumentPolicy);
    }

    public Task FileAsync(string text, string type, string fileName)
    {
        Http.Response.Headers.ContentDisposition = new ContentDisposition { FileName = fileName }.ToString();
        return Desk.TextAsync(Http, text, type);
    }

    public Task GoAsync(string path)
    {
        Http.Response.StatusCode = StatusCodes.Status303SeeOther;
        Http.Response.Headers.Location = path;
        return Task.CompletedTask;
    }
}
