using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;

namespace TrimFit.Web.Safety;

/// <summary>Headers that leave a browser nothing to do but show our own page.</summary>
internal static class SecurityHeaders
{
    /// <summary>For the pages of the program: own script and style files, nothing inline, nothing from elsewhere.</summary>
    public const string PagePolicy = "default-src 'none'; script-src 'self'; style-src 'self'; img-src 'self' data:; font-src 'self' data:; "
        + "connect-src 'self'; form-action 'self'; frame-ancestors 'none'; base-uri 'none'";

    /// <summary>For documents that stand alone: their style is inside, script never runs.</summary>
    public const string DocumentPolicy = "default-src 'none'; style-src 'unsafe-inline'; font-src data:; img-src data:; frame-ancestors 'none'; base-uri 'none'; form-action 'none'; sandbox";

    public static void UseSecurityHeaders(this IApplicationBuilder app) => app.Use((context, next) =>
    {
        IHeaderDictionary headers = context.Response.Headers;
        headers.ContentSecurityPolicy = PagePolicy;
        headers.XContentTypeOptions = "nosniff";
        headers["Referrer-Policy"] = "no-referrer";
        headers["Cross-Origin-Opener-Policy"] = "same-origin";
        headers["Cross-Origin-Resource-Policy"] = "same-origin";
        headers["Permissions-Policy"] = "geolocation=(), camera=(), microphone=()";
        headers.CacheControl = "no-store";
        return next(context);
    });
}
