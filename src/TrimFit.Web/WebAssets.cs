using System.Security.Cryptography;
using System.Text;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using TrimFit.Pages;

namespace TrimFit.Web;

/// <summary>Style, script, icon: part of the program, under an address that changes with their content.</summary>
internal static class WebAssets
{
    private static readonly Dictionary<string, (string Type, byte[] Bytes)> _files = new()
    {
        ["fonts.css"] = ("text/css; charset=utf-8", Encoding.UTF8.GetBytes(PageStyle.Fonts)),
        ["web.css"] = ("text/css; charset=utf-8", [.. Encoding.UTF8.GetBytes(PageStyle.Sheet), .. Own("web.css")]),
        ["web.js"] = ("text/javascript; charset=utf-8", Own("web.js")),
        ["icon.svg"] = ("image/svg+xml", Own("icon.svg")),
    };

    /// <summary>Part of every address.</summary>
    public static string Version { get; } = Convert.ToHexStringLower(SHA256.HashData([.. _files.OrderBy(f => f.Key, StringComparer.Ordinal).SelectMany(f => f.Value.Bytes)]))[..12];

    public static void Map(WebApplication app)
    {
        foreach ((string name, (string type, byte[] bytes)) in _files)
        {
            app.MapGet($"/assets/{Version}/{name}", (RequestDelegate)(context =>
            {
                context.Response.ContentType = type;
                context.Response.Headers.CacheControl = "private, max-age=31536000, immutable";
                return context.Response.Body.WriteAsync(bytes).AsTask();
            }));
        }
    }

    private static byte[] Own(string name)
    {
        using Stream stream = typeof(WebAssets).Assembly.GetManifestResourceStream("TrimFit.Web.Assets." + name)
            ?? throw new InvalidOperationException($"{name} is missing from the program.");
        byte[] bytes = new byte[stream.Length];
        stream.ReadExactly(bytes);
        return bytes;
    }
}
