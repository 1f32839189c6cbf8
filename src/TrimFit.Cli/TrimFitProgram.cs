using System.CommandLine;
using System.Text;
using TrimFit.Import;
using TrimFit.Jobs;
using TrimFit.Simulation;

namespace TrimFit.Cli;

/// <summary>The program: results to standard output, all else to standard error, never a stack trace.</summary>
internal static class TrimFitProgram
{
    public static int Run(IReadOnlyList<string> args)
    {
        // UTF-8 without a mark whatever the machine's locale, so that a pipe gives the same bytes everywhere.
        using var output = new StreamWriter(Console.OpenStandardOutput(), new UTF8Encoding(false)) { NewLine = "\n" };
        using var error = new StreamWriter(Console.OpenStandardError(), new UTF8Encoding(false)) { NewLine = "\n", AutoFlush = true };
        int code = Run(args, output, error);
        try
        {
            output.Flush();
        }
        catch (IOException) // the reader of the pipe went away, such as `| head -1`
        {
            return code;
        }
        return code;
    }

    public static int Run(IReadOnlyList<string> args, TextWriter output, TextWriter error)
    {
        try
        {
            RootCommand root = CommandTree.Create(output, error);
            ParseResult parsed = root.Parse(args);
            if (parsed.Errors.Count > 0)
            {
                foreach (string message in parsed.Errors.Select(e => e.Message).Distinct())
                    error.WriteLine("trimfit: " + message);
                error.WriteLine($"trimfit: try: {string.Join(' ', CommandPath(parsed))} --help");
                return ExitCode.CommandLine;
            }
            return parsed.Invoke(new InvocationConfiguration { Output = output, Error = error, EnableDefaultExceptionHandler = false });
        }
        catch (CommandLineException e)
        {
            error.WriteLine("trimfit: " + e.Message);
            return ExitCode.CommandLine;
        }
        catch (Exception e) when (e is LogFormatException or JobBookException or ScenarioFormatException or SimulationException)
        {
            error.WriteLine(e.Message);
            return ExitCode.Input;
        }
#pragma warning disable CA1031 // the last line of defence: people get one line, not a stack trace
        catch (Exception e)
        {
            error.WriteLine($"trimfit: this is a fault of the program, please report it: {e.GetType().Name}: {OneLine(e.Message)}");
            return ExitCode.Fault;
        }
#pragma warning restore CA1031
    }

    private static IEnumerable<string> CommandPath(ParseResult parsed)
    {
        yield return "trimfit";
        if (parsed.CommandResult.Command is not RootCommand)
            yield return parsed.CommandResult.Command.Name;
    }

    private static string OneLine(string text) => text.ReplaceLineEndings(" ");
}
