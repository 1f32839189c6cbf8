using Microsoft.AspNetCore.Antiforgery;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.DependencyInjection;
using TrimFit.Web.Flights;
using TrimFit.Web.Steps;

namespace TrimFit.Web.Safety;

/// <summary>What goes wrong becomes a page in plain words; nothing of a flight and no stack trace goes anywhere.</summary>
internal static class FaultPages
{
    public static void UseFaultPages(this IApplicationBuilder app, TextWriter? faults) => app.Use(async (context, next) =>
    {
        int status;
        try
        {
            await next(context);
            return;
        }
        catch (BadHttpRequestException e)
        {
            status = e.StatusCode; // 413 too large, 408 too slow, 400 broken off
        }
        catch (AntiforgeryValidationException)
        {
            status = StatusCodes.Status403Forbidden;
        }
        catch (InvalidDataException) // more fields, longer names or more bytes than a form may have
        {
            status = StatusCodes.Status413PayloadTooLarge;
        }
        catch (BusyException)
        {
            status = StatusCodes.Status503ServiceUnavailable;
        }
        catch (OperationCanceledException) when (context.RequestAborted.IsCancellationRequested)
        {
            return; // the browser went away
        }
        catch (IOException) when (context.RequestAborted.IsCancellationRequested)
        {
            return;
        }
#pragma warning disable CA1031 // the last line of defence: people get a page, not a stack trace
        catch (Exception e)
        {
            faults?.WriteLine($"trimfit: this is a fault of the program, please report it: {e.GetType().Name}");
            status = StatusCodes.Status500InternalServerError;
        }
#pragma warning restore CA1031
        if (!context.Response.HasStarted)
            await context.RequestServices.GetRequiredService<Desk>().PlainAsync(context, status);
    });
}
