using Microsoft.AspNetCore.Antiforgery;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.DependencyInjection;
using TrimFit.Web.Steps;

namespace TrimFit.Web.Safety;

/// <summary>Takes forms only from our own pages: the browser's word on where a request comes from, and a token bound to a cookie.</summary>
internal static class FormGuard
{
    public static void UseFormGuard(this IApplicationBuilder app) => app.Use(async (context, next) =>
    {
        if (HttpMethods.IsGet(context.Request.Method) || HttpMethods.IsHead(context.Request.Method))
        {
            await next(context);
            return;
        }
        string site = context.Request.Headers["Sec-Fetch-Site"].ToString();
        bool own = HttpMethods.IsPost(context.Request.Method) && site is "" or "same-origin" or "none";
        if (own && !context.Request.HasFormContentType)
            await context.RequestServices.GetRequiredService<Desk>().PlainAsync(context, StatusCodes.Status415UnsupportedMediaType);
        else if (own && await context.RequestServices.GetRequiredService<IAntiforgery>().IsRequestValidAsync(context))
            await next(context);
        else
            await context.RequestServices.GetRequiredService<Desk>().PlainAsync(context, StatusCodes.Status403Forbidden);
    });
}
