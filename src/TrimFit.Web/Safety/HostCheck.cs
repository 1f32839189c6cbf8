using System.Net;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;

namespace TrimFit.Web.Safety;

/// <summary>Answers only to its own name, so that a foreign site whose name is turned to this machine gets nothing (DNS rebinding).</summary>
internal static class HostCheck
{
    public static void UseHostCheck(this IApplicationBuilder app, WebOptions options) => app.Use((context, next) =>
    {
        string host = context.Request.Host.Host;
        bool own = host is "localhost" or "127.0.0.1" or "[::1]" || (IPAddress.TryParse(host.Trim('[', ']'), out IPAddress? address) && address.Equals(options.Address));
        // Listening on a network, any name may be one of this machine's: there the token decides.
        if (own || (!options.IsLocal && options.Token is not null))
            return next(context);
        context.Response.StatusCode = StatusCodes.Status421MisdirectedRequest;
        return Task.CompletedTask;
    });
}
