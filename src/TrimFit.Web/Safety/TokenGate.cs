using System.Security.Cryptography;
using System.Text;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;

namespace TrimFit.Web.Safety;

/// <summary>Lets in who knows the token: once in the address, from then on in a cookie.</summary>
internal static class TokenGate
{
    private const string CookieName = "trimfit-token", QueryName = "token";

    public static void UseTokenGate(this IApplicationBuilder app, string token)
    {
        byte[] wanted = SHA256.HashData(Encoding.UTF8.GetBytes(token));
        string cookie = Convert.ToHexStringLower(SHA256.HashData(wanted)); // the cookie opens this page and tells nobody the token
        app.Use((context, next) =>
        {
            if (context.Request.Cookies[CookieName] is string brought && Same(brought, cookie))
                return next(context);
            if (context.Request.Query[QueryName].ToString() is { Length: > 0 } told
                && CryptographicOperations.FixedTimeEquals(SHA256.HashData(Encoding.UTF8.GetBytes(told)), wanted))
            {
                context.Response.Cookies.Append(CookieName, cookie, new CookieOptions { HttpOnly = true, SameSite = SameSiteMode.Strict, Path = "/", IsEssential = true });
                context.Response.Redirect("/"); // the token leaves the address bar; never a path from outside
                return Task.CompletedTask;
            }
            context.Response.StatusCode = StatusCodes.Status403Forbidden;
            return context.Response.WriteAsync("403\n");
        });
    }

    private static bool Same(string one, string other) => CryptographicOperations.FixedTimeEquals(Encoding.UTF8.GetBytes(one), Encoding.UTF8.GetBytes(other));
}
